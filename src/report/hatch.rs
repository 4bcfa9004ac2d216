//! Hatching of cut faces: straight lines clipped to rectangles.

use crate::report::svg::digits;

/// An upright rectangle on paper, mm.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Rectangle {
    pub left: f64,
    pub top: f64,
    pub right: f64,
    pub bottom: f64,
}

/// Direction and distance of the lines of one part.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Hatching {
    /// Slope of the lines, degrees from the horizontal.
    pub angle: f64,
    /// Distance of neighbouring lines, mm.
    pub pitch: f64,
}

/// Neighbours differ in direction, the next but one in distance (ISO 128-3:2020, clause 7).
pub(crate) fn hatching_of(ring: usize) -> Hatching {
    const KINDS: [Hatching; 4] = [
        Hatching { angle: 45.0, pitch: 2.4 },
        Hatching { angle: -45.0, pitch: 1.6 },
        Hatching { angle: 45.0, pitch: 1.2 },
        Hatching { angle: -45.0, pitch: 2.8 },
    ];
    KINDS[ring % KINDS.len()]
}

/// Path data of the lines across the rectangles; one family of lines runs through all of them.
pub(crate) fn lines(rectangles: &[Rectangle], hatching: Hatching) -> String {
    let (sine, cosine) = hatching.angle.to_radians().sin_cos();
    let mut data = String::new();
    for rectangle in rectangles {
        let offsets = [
            (rectangle.left, rectangle.top),
            (rectangle.right, rectangle.top),
            (rectangle.left, rectangle.bottom),
            (rectangle.right, rectangle.bottom),
        ]
        .map(|(x, y)| x * sine + y * cosine);
        let least = offsets.iter().copied().fold(f64::INFINITY, f64::min);
        let greatest = offsets.iter().copied().fold(f64::NEG_INFINITY, f64::max);
        let first = (least / hatching.pitch).ceil() as i64;
        let last = (greatest / hatching.pitch).floor() as i64;
        for number in first..=last {
            let offset = number as f64 * hatching.pitch;
            if let Some((from, to)) = clipped(rectangle, offset, sine, cosine) {
                data.push_str(&format!(
                    "M{} {}L{} {}",
                    digits(from.0),
                    digits(from.1),
                    digits(to.0),
                    digits(to.1)
                ));
            }
        }
    }
    data
}

/// The part inside of the line x·sin + y·cos = offset, which rises to the right by the angle.
fn clipped(rectangle: &Rectangle, offset: f64, sine: f64, cosine: f64) -> Option<((f64, f64), (f64, f64))> {
    let at_x = |x: f64| (x, (offset - x * sine) / cosine);
    let at_y = |y: f64| ((offset - y * cosine) / sine, y);
    let tolerance = 1e-9;
    let inside = |(x, y): (f64, f64)| {
        x >= rectangle.left - tolerance
            && x <= rectangle.right + tolerance
            && y >= rectangle.top - tolerance
            && y <= rectangle.bottom + tolerance
    };
    let mut ends: Vec<(f64, f64)> =
        [at_x(rectangle.left), at_x(rectangle.right), at_y(rectangle.top), at_y(rectangle.bottom)]
            .into_iter()
            .filter(|end| inside(*end))
            .collect();
    ends.sort_by(|a, b| a.0.total_cmp(&b.0));
    let (from, to) = (*ends.first()?, *ends.last()?);
    (to.0 - from.0 > 0.05).then_some((from, to))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn neighbours_differ_in_direction() {
        for ring in 0..8 {
            assert_ne!(hatching_of(ring), hatching_of(ring + 1));
            assert_ne!(hatching_of(ring).angle, hatching_of(ring + 1).angle);
            assert_ne!(hatching_of(ring).pitch, hatching_of(ring + 2).pitch);
        }
    }

    #[test]
    fn lines_end_on_the_edges() {
        let square = Rectangle { left: 0.0, top: 0.0, right: 10.0, bottom: 10.0 };
        let diagonal = clipped(&square, 10.0 / 2f64.sqrt(), 0.5f64.sqrt(), 0.5f64.sqrt()).unwrap();
        approx::assert_relative_eq!(diagonal.0.1, 10.0, epsilon = 1e-9);
        approx::assert_relative_eq!(diagonal.1.0, 10.0, epsilon = 1e-9);
        assert_eq!(clipped(&square, 100.0, 0.5f64.sqrt(), 0.5f64.sqrt()), None);
    }

    #[test]
    fn lines_are_as_far_apart_as_asked() {
        let square = Rectangle { left: 0.0, top: 0.0, right: 10.0, bottom: 10.0 };
        let count = lines(&[square], Hatching { angle: 45.0, pitch: 2.0 }).matches('M').count();
        // A diagonal of 14.14 mm holds seven gaps of 2 mm; the corner line has no length.
        assert_eq!(count, 7);
    }
}
