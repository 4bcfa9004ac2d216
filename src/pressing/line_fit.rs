//! A straight line by least squares.

/// A line y = intercept + slope x with how well it is known.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Line {
    pub(super) slope: f64,
    pub(super) intercept: f64,
    /// Standard error of the slope from the scatter about the line.
    pub(super) slope_error: f64,
}

/// The line through points (x, y) of equal weight; none with fewer than three points or all at one x.
///
/// slope = Σ (x − x̄)(y − ȳ) / Σ (x − x̄)²; its standard error is √(Σ r² / (n − 2) / Σ (x − x̄)²) with the residuals r.
///
/// Source: least squares; JCGM 100:2008 (GUM), H.3.
pub(super) fn line(points: &[(f64, f64)]) -> Option<Line> {
    let count = points.len() as f64;
    if points.len() < 3 {
        return None;
    }
    let mean_x = points.iter().map(|point| point.0).sum::<f64>() / count;
    let mean_y = points.iter().map(|point| point.1).sum::<f64>() / count;
    let spread: f64 = points.iter().map(|point| (point.0 - mean_x).powi(2)).sum();
    if spread <= 0.0 || !spread.is_finite() {
        return None;
    }
    let slope = points.iter().map(|point| (point.0 - mean_x) * (point.1 - mean_y)).sum::<f64>() / spread;
    let intercept = mean_y - slope * mean_x;
    let residuals: f64 = points.iter().map(|point| (point.1 - intercept - slope * point.0).powi(2)).sum();
    Some(Line { slope, intercept, slope_error: (residuals / (count - 2.0) / spread).sqrt() })
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    /// Derived by hand: points (0,1) (1,2) (2,6): slope 5/2, intercept 1/2, Σr² = 1.5, Σ(x−x̄)² = 2.
    #[test]
    fn known_line() {
        let line = line(&[(0.0, 1.0), (1.0, 2.0), (2.0, 6.0)]).unwrap();
        assert_relative_eq!(line.slope, 2.5);
        assert_relative_eq!(line.intercept, 0.5);
        assert_relative_eq!(line.slope_error, 0.75f64.sqrt());
    }

    #[test]
    fn too_little_is_no_line() {
        assert!(line(&[(0.0, 1.0), (1.0, 2.0)]).is_none());
        assert!(line(&[(1.0, 1.0), (1.0, 2.0), (1.0, 3.0)]).is_none());
    }
}
