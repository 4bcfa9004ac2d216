//! Scale of the section drawing and the lengths that are broken out of it.

/// Half the height that the section may take on paper, mm.
const HALF_HEIGHT: f64 = 45.0;
/// Least wall and least hub width that can still be hatched and dimensioned, mm.
const LEAST_WALL: f64 = 2.8;
const LEAST_WIDTH: f64 = 9.0;

/// Scales of technical drawings with the way they are written, largest first.
///
/// 1, 2 and 5 times a power of ten (ISO 5455:1979, table 1 and the rule below it).
fn scales() -> Vec<(f64, String)> {
    let reductions = (0..=7).flat_map(|decade| [1, 2, 5].map(|step| step * 10_i64.pow(decade)));
    let enlargements = (0..=7).rev().flat_map(|decade| [5, 2, 1].map(|step| step * 10_i64.pow(decade)));
    enlargements
        .map(|number| (number as f64, format!("{number} : 1")))
        .chain(reductions.skip(1).map(|number| (1.0 / number as f64, format!("1 : {number}"))))
        .collect()
}

/// One stretch of the drawing along the radius or the axis.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Stretch {
    /// Where it begins on paper, mm from the centre line or from the end of the hub.
    pub from: f64,
    /// Where it ends on paper, mm.
    pub to: f64,
    /// Whether a part of it is broken out.
    pub broken: bool,
}

impl Stretch {
    pub(super) fn middle(self) -> f64 {
        0.5 * (self.from + self.to)
    }
}

/// Scale and paper sizes of a section.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Layout {
    /// Paper length over true length.
    pub scale: f64,
    /// The scale as written on a drawing.
    pub scale_text: String,
    /// The bore of the innermost ring (empty when it is solid), then each ring outwards.
    pub radial: Vec<Stretch>,
    /// The hub along the shaft.
    pub axial: Stretch,
    /// True radii of the ends of the radial stretches, m.
    radii: Vec<f64>,
}

impl Layout {
    /// Radius on paper, mm, of a true radius, m; within a broken stretch in proportion to it.
    pub(super) fn paper(&self, radius: f64) -> f64 {
        let mut inner = 0.0;
        for (outer, stretch) in self.radii.iter().zip(&self.radial) {
            if radius <= *outer || (outer - radius).abs() < 1e-12 {
                let width = outer - inner;
                let share = if width > 0.0 { (radius - inner) / width } else { 1.0 };
                return stretch.from + share * (stretch.to - stretch.from);
            }
            inner = *outer;
        }
        self.radial.last().map_or(0.0, |stretch| stretch.to)
    }

    /// Whether any stretch is broken.
    pub(super) fn is_broken(&self) -> bool {
        self.axial.broken || self.radial.iter().any(|stretch| stretch.broken)
    }
}

/// Lays out a section from its face radii (m, inner face of the innermost ring first) and hub length (m);
/// the hub may take `room` mm along the shaft.
///
/// The largest scale of the standard series that shows the whole is taken. When that leaves a wall or the
/// hub too small to read, the scale is made larger and the long stretches are broken.
pub(super) fn layout(radii: &[f64], length: f64, room: f64) -> Layout {
    let mut sizes: Vec<f64> = vec![radii.first().copied().unwrap_or(0.0) * 1e3];
    sizes.extend(radii.windows(2).map(|pair| (pair[1] - pair[0]) * 1e3));
    let length = length * 1e3;
    let whole: f64 = sizes.iter().sum();
    let least = sizes.iter().skip(1).copied().fold(f64::INFINITY, f64::min);

    let fits = |scale: f64| whole * scale <= HALF_HEIGHT && length * scale <= room;
    let readable = |scale: f64| least * scale >= LEAST_WALL && length * scale >= LEAST_WIDTH;
    let series = scales();
    let fitting = series.iter().find(|(scale, _)| fits(*scale)).or(series.last());
    let chosen = match fitting {
        Some(found) if readable(found.0) => fitting,
        _ => series.iter().rev().find(|(scale, _)| readable(*scale)).or(series.first()),
    };
    let (scale, scale_text) = chosen.cloned().unwrap_or((1.0, "1 : 1".to_owned()));

    let limit = greatest_stretch(sizes.iter().map(|size| size * scale), HALF_HEIGHT);
    let mut from = 0.0;
    let radial = sizes
        .iter()
        .map(|size| {
            let paper = (size * scale).min(limit);
            let stretch = Stretch { from, to: from + paper, broken: paper < size * scale * (1.0 - 1e-9) };
            from = stretch.to;
            stretch
        })
        .collect();
    let width = (length * scale).min(room);
    let axial = Stretch { from: 0.0, to: width, broken: width < length * scale * (1.0 - 1e-9) };
    Layout { scale, scale_text, radial, axial, radii: radii.to_vec() }
}

/// The limit to which the largest sizes are cut so that all together take no more than `room`.
fn greatest_stretch(sizes: impl Iterator<Item = f64>, room: f64) -> f64 {
    let mut sizes: Vec<f64> = sizes.collect();
    sizes.sort_by(f64::total_cmp);
    let mut room = room;
    for (place, size) in sizes.iter().enumerate() {
        let share = room / (sizes.len() - place) as f64;
        if *size > share {
            return share;
        }
        room -= size;
    }
    f64::INFINITY
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn an_ordinary_joint_is_shown_whole_at_a_standard_scale() {
        let layout = layout(&[0.0, 0.030, 0.055], 0.070, 84.0);
        assert_eq!(layout.scale_text, "1 : 2");
        assert!(!layout.is_broken());
        assert_eq!(layout.radial[1].to, 15.0);
        assert_eq!(layout.axial.to, 35.0);
        assert_eq!([0.0, 0.030, 0.040, 0.055].map(|r| layout.paper(r)), [0.0, 15.0, 20.0, 27.5]);
    }

    #[test]
    fn a_thin_wall_on_a_large_wheel_breaks_the_wheel_not_the_wall() {
        let layout = layout(&[0.150, 0.900, 1.000], 0.130, 84.0);
        assert!(layout.radial[2].to - layout.radial[2].from >= LEAST_WALL);
        assert!(!layout.radial[2].broken && layout.radial[1].broken);
        assert!(layout.radial[2].to <= HALF_HEIGHT + 1e-9);
    }

    #[test]
    fn every_proportion_stays_on_the_paper_and_readable() {
        for inner in [0.0, 0.4, 0.9, 0.99] {
            for ratio in [1.01, 1.1, 2.0, 20.0] {
                for slenderness in [0.01, 0.5, 2.0, 50.0] {
                    for diameter in [0.001, 0.06, 3.0] {
                        let radius = diameter / 2.0;
                        let layout =
                            layout(&[inner * radius, radius, ratio * radius], slenderness * diameter, 84.0);
                        let top = layout.radial[2].to;
                        assert!(top <= HALF_HEIGHT + 1e-9 && layout.axial.to <= 84.0 + 1e-9);
                        for wall in &layout.radial[1..] {
                            assert!(
                                wall.to - wall.from >= LEAST_WALL - 1e-9,
                                "{inner} {ratio} {slenderness} {diameter}"
                            );
                        }
                        assert!(layout.axial.to >= LEAST_WIDTH - 1e-9);
                    }
                }
            }
        }
    }
}
