//! Counts in classes of equal width, and what they say of a distribution.

/// Classes of a histogram.
pub const CLASSES: usize = 1 << 11;

/// Counts in classes of equal width; what lies outside is counted in the outermost class.
#[derive(Debug, Clone, PartialEq)]
pub struct Histogram {
    low: f64,
    per_class: f64,
    counts: Box<[u64; CLASSES]>,
}

impl Histogram {
    /// Empty, over a range.
    pub fn new(low: f64, high: f64) -> Self {
        let width = if high > low { high - low } else { 1.0 };
        Self { low, per_class: CLASSES as f64 / width, counts: Box::new([0; CLASSES]) }
    }

    /// Counts values.
    #[inline]
    pub fn count(&mut self, values: &[f64]) {
        // Added to 2⁵², a number has its nearest whole number in its lowest bits: this vectorises, a cast does not.
        const WHOLE: f64 = (1u64 << 52) as f64;
        const LAST: f64 = (CLASSES - 1) as f64;
        let (low, per_class) = (self.low, self.per_class);
        let mut classes = [0u64; 64];
        for part in values.chunks(classes.len()) {
            for (class, value) in classes.iter_mut().zip(part) {
                let place = (value - low) * per_class - 0.5;
                let place = if place > 0.0 { place } else { 0.0 };
                let place = if place < LAST { place } else { LAST };
                *class = (place + WHOLE).to_bits();
            }
            for class in &classes[..part.len()] {
                self.counts[*class as usize & (CLASSES - 1)] += 1;
            }
        }
    }

    /// Adds the counts of another over the same range.
    pub fn add(&mut self, other: &Self) {
        for (count, more) in self.counts.iter_mut().zip(other.counts.iter()) {
            *count += more;
        }
    }

    /// Number of values.
    pub fn total(&self) -> u64 {
        self.counts.iter().sum()
    }

    /// Middle of a class.
    fn middle(&self, class: usize) -> f64 {
        self.low + (class as f64 + 0.5) / self.per_class
    }

    /// Mean and standard deviation of a function of the value, each class at its middle.
    pub fn moments(&self, function: impl Fn(f64) -> f64) -> (f64, f64) {
        let total = self.total().max(1) as f64;
        let filled = || self.counts.iter().enumerate().filter(|(_, count)| **count > 0);
        let value = |class: usize| function(self.middle(class));
        let mean = filled().map(|(class, count)| *count as f64 * value(class)).sum::<f64>() / total;
        let square =
            filled().map(|(class, count)| *count as f64 * (value(class) - mean).powi(2)).sum::<f64>();
        (mean, (square / total).sqrt())
    }

    /// Value with a share below it, on a straight line within its class.
    pub fn quantile(&self, share: f64) -> f64 {
        let wanted = share * self.total() as f64;
        let mut before = 0.0;
        for (class, count) in self.counts.iter().enumerate() {
            let count = *count as f64;
            if count > 0.0 && before + count >= wanted {
                let within = ((wanted - before) / count).clamp(0.0, 1.0);
                return self.low + (class as f64 + within) / self.per_class;
            }
            before += count;
        }
        self.middle(CLASSES - 1)
    }

    /// Share of all in about `groups` wider classes between `from` and `to`: lower end, upper end, share.
    pub fn coarse(&self, from: f64, to: f64, groups: usize) -> Vec<(f64, f64, f64)> {
        let total = self.total().max(1) as f64;
        let class = |value: f64| ((value - self.low) * self.per_class).clamp(0.0, CLASSES as f64) as usize;
        let (first, last) = (class(from), class(to).max(class(from) + 1).min(CLASSES));
        let each = (last - first).div_ceil(groups.max(1)).max(1);
        (first..last)
            .step_by(each)
            .map(|begin| {
                let end = (begin + each).min(CLASSES);
                let share = self.counts[begin..end].iter().sum::<u64>() as f64 / total;
                (self.low + begin as f64 / self.per_class, self.low + end as f64 / self.per_class, share)
            })
            .collect()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn counts_quantiles_and_moments_of_a_ramp() {
        let values: Vec<f64> = (0..100_000).map(|i| (f64::from(i) + 0.5) * 1e-5).collect();
        let mut histogram = Histogram::new(0.0, 1.0);
        histogram.count(&values);
        histogram.count(&[-3.0, 9.0]);
        assert_eq!(histogram.total(), 100_002);
        assert!((histogram.quantile(0.25) - 0.25).abs() < 1e-4);
        let (mean, sd) = histogram.moments(|x| 2.0 * x);
        assert!((mean - 1.0).abs() < 1e-4 && (sd - 2.0 / 12f64.sqrt()).abs() < 1e-4);
        let coarse = histogram.coarse(0.0, 1.0, 10);
        assert!(coarse.len() <= 10 && (coarse[3].2 - (coarse[3].1 - coarse[3].0)).abs() < 1e-4);
    }
}
