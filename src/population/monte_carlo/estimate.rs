//! A probability estimated by counting, with what may be said of it.

use crate::population::distribution::normal;

/// Least count at which an estimate is quoted: the standard error is then a tenth of it.
pub const LEAST_COUNT: u64 = 100;

/// Confidence of the interval.
pub const CONFIDENCE: f64 = 0.95;

/// So many standard errors away an expected probability no longer agrees (6e-5 by chance).
const DISAGREEMENT: f64 = 4.0;

/// How often something happened in how many samples.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Estimate {
    /// How often.
    pub count: u64,
    /// In how many.
    pub samples: u64,
}

impl Estimate {
    /// Share P = count/samples.
    pub fn share(&self) -> f64 {
        self.count as f64 / self.samples.max(1) as f64
    }

    /// Standard error √(P (1 − P)/n).
    pub fn standard_error(&self) -> f64 {
        let share = self.share();
        (share * (1.0 - share) / self.samples.max(1) as f64).sqrt()
    }

    /// Whether the estimate may be quoted: not below P = 100/n.
    pub fn is_quotable(&self) -> bool {
        self.count >= LEAST_COUNT
    }

    /// Interval that covers the probability with [`CONFIDENCE`], by E. B. Wilson's score.
    ///
    /// Source: E. B. Wilson, Journal of the American Statistical Association 22 (1927) 209–212.
    ///
    /// # Example
    /// ```
    /// use hubgrip::population::monte_carlo::estimate::Estimate;
    /// let (low, high) = Estimate { count: 0, samples: 1000 }.interval();
    /// assert!(low == 0.0 && (high - 0.00383).abs() < 5e-6);
    /// ```
    pub fn interval(&self) -> (f64, f64) {
        let n = self.samples.max(1) as f64;
        let z = normal::upper_quantile(0.5 * (1.0 - CONFIDENCE));
        let share = self.share();
        let middle = share + z * z / (2.0 * n);
        let half = z * (share * (1.0 - share) / n + z * z / (4.0 * n * n)).sqrt();
        let scale = 1.0 + z * z / n;
        let low = if self.count == 0 { 0.0 } else { ((middle - half) / scale).max(0.0) };
        let high = if self.count == self.samples { 1.0 } else { ((middle + half) / scale).min(1.0) };
        (low, high)
    }

    /// Whether the count is what a probability of `expected` would give, within four standard errors and the
    /// grain of small counts.
    pub fn agrees_with(&self, expected: f64) -> bool {
        let n = self.samples as f64;
        let spread = (n * expected * (1.0 - expected)).max(0.0).sqrt();
        (self.count as f64 - n * expected).abs() <= DISAGREEMENT * (spread + 1.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Newcombe, *Two-sided confidence intervals for the single proportion*, Statistics in Medicine 17 (1998)
    /// 857–872, table I, method 3 (Wilson's score): 81 of 263 → 0.2553 to 0.3662; 15 of 148 → 0.0624 to 0.1605;
    /// 0 of 20 → 0 to 0.1611.
    #[test]
    fn agrees_with_the_published_intervals() {
        for (count, samples, low, high) in
            [(81, 263, 0.2553, 0.3662), (15, 148, 0.0624, 0.1605), (0, 20, 0.0, 0.1611)]
        {
            let found = Estimate { count, samples }.interval();
            assert!((found.0 - low).abs() < 6e-5 && (found.1 - high).abs() < 6e-5, "{found:?}");
        }
    }

    #[test]
    fn a_small_count_is_not_quoted() {
        assert!(!Estimate { count: 99, samples: 1_000_000 }.is_quotable());
        assert!(Estimate { count: 100, samples: 1_000_000 }.is_quotable());
        assert!(Estimate { count: 6, samples: 1_000_000 }.agrees_with(2e-6));
        assert!(!Estimate { count: 1_000, samples: 1_000_000 }.agrees_with(2e-3));
    }
}
