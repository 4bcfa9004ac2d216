//! A force-travel curve of any length in bounded memory.

/// Most bins that are kept of a record.
pub const MOST_BINS: usize = 8192;

/// Width of a bin to begin with, m: 0.1 µm, finer than any press measures.
const FIRST_WIDTH: f64 = 1e-7;

/// What the rows of one bin have in common.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Point {
    /// Mean travel, m.
    pub travel: f64,
    /// Mean force, N.
    pub force: f64,
    /// Least force, N.
    pub least: f64,
    /// Greatest force, N.
    pub greatest: f64,
    /// Number of rows.
    pub rows: u64,
}

#[derive(Debug, Clone, Copy)]
struct Bin {
    rows: u64,
    travel: f64,
    force: f64,
    least: f64,
    greatest: f64,
}

impl Bin {
    const EMPTY: Self =
        Self { rows: 0, travel: 0.0, force: 0.0, least: f64::INFINITY, greatest: f64::NEG_INFINITY };

    fn add(&mut self, other: &Self) {
        self.rows += other.rows;
        self.travel += other.travel;
        self.force += other.force;
        self.least = self.least.min(other.least);
        self.greatest = self.greatest.max(other.greatest);
    }

    fn point(&self) -> Option<Point> {
        let rows = self.rows as f64;
        (self.rows > 0).then(|| Point {
            travel: self.travel / rows,
            force: self.force / rows,
            least: self.least,
            greatest: self.greatest,
            rows: self.rows,
        })
    }
}

/// A curve in bins of equal width along the travel.
///
/// The width doubles when the travel outgrows [`MOST_BINS`], so that one pass without knowing the end is enough and
/// the same rows always give the same bins. No row is dropped: each adds to the mean and the extremes of its bin.
///
/// # Example
/// ```
/// use hubgrip::pressing::trace::Trace;
/// let mut trace = Trace::default();
/// for step in 0..100_000 {
///     trace.push(f64::from(step) * 1e-6, f64::from(step));
/// }
/// let points = trace.points();
/// assert!(points.len() <= 8192 && points.iter().map(|point| point.rows).sum::<u64>() == 100_000);
/// ```
#[derive(Debug, Clone)]
pub struct Trace {
    origin: Option<f64>,
    width: f64,
    bins: Vec<Bin>,
}

impl Default for Trace {
    fn default() -> Self {
        Self { origin: None, width: FIRST_WIDTH, bins: Vec::new() }
    }
}

impl Trace {
    /// Adds a row; its travel (m) must not lie before that of the row before it. Force in N.
    pub fn push(&mut self, travel: f64, force: f64) {
        let origin = *self.origin.get_or_insert(travel);
        let from_origin = (travel - origin).max(0.0);
        while from_origin / self.width >= MOST_BINS as f64 {
            self.halve();
        }
        let index = (from_origin / self.width) as usize;
        if index >= self.bins.len() {
            self.bins.resize(index + 1, Bin::EMPTY);
        }
        if let Some(bin) = self.bins.get_mut(index) {
            bin.add(&Bin { rows: 1, travel, force, least: force, greatest: force });
        }
    }

    /// The bins that hold rows, in order of travel.
    pub fn points(&self) -> Vec<Point> {
        self.bins.iter().filter_map(Bin::point).collect()
    }

    /// Joins each two neighbours.
    fn halve(&mut self) {
        let joined = self.bins.chunks(2).map(|two| {
            let mut bin = Bin::EMPTY;
            two.iter().for_each(|one| bin.add(one));
            bin
        });
        self.bins = joined.collect();
        self.width *= 2.0;
    }
}

/// The points between two travels (m) gathered into at most `cells` cells of equal width; empty cells are left out.
pub fn gathered(points: &[Point], from: f64, to: f64, cells: usize) -> Vec<Point> {
    let mut bins = vec![Bin::EMPTY; cells];
    for point in points.iter().filter(|point| point.travel >= from && point.travel <= to) {
        let share = (point.travel - from) / (to - from);
        let index = ((share * cells as f64) as usize).min(cells.saturating_sub(1));
        let rows = point.rows as f64;
        if let Some(bin) = bins.get_mut(index) {
            bin.add(&Bin {
                rows: point.rows,
                travel: point.travel * rows,
                force: point.force * rows,
                least: point.least,
                greatest: point.greatest,
            });
        }
    }
    bins.iter().filter_map(Bin::point).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_row_is_counted_and_a_spike_is_kept() {
        let mut trace = Trace::default();
        for row in 0..200_000u32 {
            trace.push(f64::from(row) * 3.1e-7, if row == 123_456 { 9e3 } else { 1e3 });
        }
        let points = trace.points();
        assert!(points.len() <= MOST_BINS && points.len() > MOST_BINS / 4, "{}", points.len());
        assert_eq!(points.iter().map(|point| point.rows).sum::<u64>(), 200_000);
        let greatest = points.iter().map(|point| point.greatest).fold(0.0, f64::max);
        assert_eq!(greatest, 9e3);
        assert!(points.windows(2).all(|two| two[0].travel < two[1].travel));
    }

    #[test]
    fn a_short_record_keeps_its_rows_apart() {
        let mut trace = Trace::default();
        for row in 0..50u32 {
            trace.push(0.12 + f64::from(row) * 1e-3, f64::from(row));
        }
        assert_eq!(trace.points().len(), 50);
        let gathered = gathered(&trace.points(), 0.12, 0.17, 10);
        assert_eq!(gathered.iter().map(|point| point.rows).sum::<u64>(), 50);
        assert_eq!(gathered.len(), 10);
    }

    #[test]
    fn a_travel_out_of_all_proportion_ends() {
        let mut trace = Trace::default();
        trace.push(0.0, 0.0);
        trace.push(1e300, 1.0);
        assert_eq!(trace.points().len(), 2);
    }
}
