//! A symmetric positive definite system whose matrix has a narrow band.

/// The lower band of a symmetric matrix, row by row.
pub struct Banded {
    width: usize,
    rows: Vec<Vec<f64>>,
}

impl Banded {
    /// A matrix of zeros that holds `width` places below its diagonal.
    pub fn new(size: usize, width: usize) -> Self {
        Self { width, rows: (0..size).map(|row| vec![0.0; width.min(row) + 1]).collect() }
    }

    /// Adds to a place on or below the diagonal; a place above it is left to its mirror image.
    pub fn add(&mut self, row: usize, column: usize, value: f64) {
        if column <= row {
            let first = self.first(row);
            self.rows[row][column - first] += value;
        }
    }

    /// Makes an unknown zero.
    pub fn fix(&mut self, unknown: usize, right: &mut [f64]) {
        self.rows[unknown].fill(0.0);
        *self.rows[unknown].last_mut().unwrap() = 1.0;
        right[unknown] = 0.0;
        for row in unknown + 1..(unknown + self.width + 1).min(self.rows.len()) {
            let first = self.first(row);
            self.rows[row][unknown - first] = 0.0;
        }
    }

    /// Makes every unknown zero that nothing has been added to.
    pub fn fix_unused(&mut self, right: &mut [f64]) {
        for unknown in 0..self.rows.len() {
            if self.rows[unknown].last() == Some(&0.0) {
                self.fix(unknown, right);
            }
        }
    }

    /// Solves by Cholesky's factors, forward and back substitution.
    pub fn solve(mut self, mut right: Vec<f64>) -> Vec<f64> {
        (0..self.rows.len()).for_each(|row| self.factorize(row));
        for row in 0..right.len() {
            let first = self.first(row);
            let (pivot, before) = self.rows[row].split_last().unwrap();
            right[row] = (right[row] - dot(before, &right[first..row])) / pivot;
        }
        for row in (0..right.len()).rev() {
            let first = self.first(row);
            let (pivot, before) = self.rows[row].split_last().unwrap();
            right[row] /= pivot;
            let solved = right[row];
            right[first..row].iter_mut().zip(before).for_each(|(value, factor)| *value -= factor * solved);
        }
        right
    }

    fn factorize(&mut self, row: usize) {
        let first = self.first(row);
        let (done, rest) = self.rows.split_at_mut(row);
        let own = &mut rest[0];
        for column in first..row {
            let other = &done[column];
            let other_first = column + 1 - other.len();
            let start = first.max(other_first);
            let sum =
                dot(&own[start - first..column - first], &other[start - other_first..column - other_first]);
            own[column - first] = (own[column - first] - sum) / other[column - other_first];
        }
        let (pivot, before) = own.split_last_mut().unwrap();
        *pivot = (*pivot - dot(before, before)).sqrt();
    }

    fn first(&self, row: usize) -> usize {
        row + 1 - self.rows[row].len()
    }
}

fn dot(a: &[f64], b: &[f64]) -> f64 {
    a.iter().zip(b).map(|(a, b)| a * b).sum()
}
