//! Tolerances and internal clearances of rolling bearings: ISO 492 and ISO 5753-1.

use std::sync::Arc;

use serde::Deserialize;

use super::bearing::BearingKind;
use super::error::{AssemblyError, positive};
use crate::material::{Range, Sourced};
use crate::tolerance::Limits;

const ISO_492: &str = include_str!("tables/iso492_deviations.csv");
const ISO_5753_1: &str = include_str!("tables/iso5753_1_radial_clearance.csv");

/// Tolerance class of a radial bearing (ISO 492).
#[derive(Debug, Clone, Copy, PartialEq, Eq, Deserialize)]
pub enum BearingClass {
    /// Normal class.
    #[serde(rename = "normal")]
    Normal,
    /// Class 6.
    #[serde(rename = "6")]
    Class6,
    /// Class 5.
    #[serde(rename = "5")]
    Class5,
}

/// Ring of a bearing.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum BearingRing {
    /// Inner ring: the bore is meant.
    Inner,
    /// Outer ring: the outside diameter is meant.
    Outer,
}

/// Group of radial internal clearance (ISO 5753-1).
#[derive(Debug, Clone, Copy, PartialEq, Eq, Deserialize)]
pub enum ClearanceGroup {
    /// Less than normal.
    C2,
    /// Normal.
    CN,
    /// Greater than normal.
    C3,
    /// Greater than C3.
    C4,
    /// Greater than C4.
    C5,
}

#[derive(Deserialize)]
struct DeviationRow {
    class: BearingClass,
    ring: BearingRing,
    over_mm: f64,
    up_to_mm: f64,
    upper_um: f64,
    lower_um: f64,
    basis: String,
}

#[derive(Deserialize)]
struct ClearanceRow {
    bearing: String,
    over_mm: f64,
    up_to_mm: f64,
    group: ClearanceGroup,
    least_um: f64,
    greatest_um: f64,
    basis: String,
}

/// Limits of the mean bore or mean outside diameter of a radial bearing from its nominal size, m.
///
/// The tolerance lies wholly below the nominal size, for the bore too, unlike that of an H hole. Tapered roller
/// bearings have a table of their own, which is not here.
///
/// Source: ISO 492, Normal class, classes 6 and 5 (mean diameter in a plane); the source of each value says on
/// what reprints it rests.
///
/// # Errors
/// [`AssemblyError::NotInTable`] when the table has no row for that size.
///
/// # Example
/// ```
/// use hubgrip::assembly::bearing_tables::{BearingClass, BearingRing, bearing_limits};
/// let bore = bearing_limits(BearingClass::Normal, BearingRing::Inner, 0.05).unwrap();
/// assert!((bore.value.lower + 12e-6).abs() < 1e-18 && bore.value.upper == 0.0);
/// ```
pub fn bearing_limits(
    class: BearingClass,
    ring: BearingRing,
    diameter: f64,
) -> Result<Sourced<Limits>, AssemblyError> {
    positive("nominal diameter (m)", diameter)?;
    rows::<DeviationRow>(ISO_492)
        .find(|row| {
            row.class == class
                && row.ring == ring
                && in_step(diameter, row.over_mm, row.up_to_mm, smallest(ring))
        })
        .map(|row| {
            let limits = Limits { lower: row.lower_um * 1e-6, upper: row.upper_um * 1e-6 };
            Sourced::new(limits, source("ISO 492", &row.basis))
        })
        .ok_or(AssemblyError::NotInTable { table: "ISO 492", given: diameter })
}

/// Radial internal clearance before mounting, least and greatest, m.
///
/// For bearings with a cylindrical bore: radial-contact groove ball bearings of 2.5 mm to 250 mm bore and cylindrical
/// roller bearings up to 500 mm. C4 and C5 do not exist for balls up to 6 mm bore.
///
/// Source: ISO 5753-1; the source of each value says on what reprints it rests.
///
/// # Errors
/// [`AssemblyError::NotInTable`] when the table has no row for that bore and group.
///
/// # Example
/// ```
/// use hubgrip::assembly::bearing::BearingKind;
/// use hubgrip::assembly::bearing_tables::{ClearanceGroup, radial_clearance};
/// let normal = radial_clearance(BearingKind::Ball, ClearanceGroup::CN, 0.05).unwrap();
/// assert!((normal.value.low - 6e-6).abs() < 1e-18 && (normal.value.high - 23e-6).abs() < 1e-18);
/// ```
pub fn radial_clearance(
    kind: BearingKind,
    group: ClearanceGroup,
    bore: f64,
) -> Result<Sourced<Range>, AssemblyError> {
    positive("bore of the bearing (m)", bore)?;
    let (name, first) = match kind {
        BearingKind::Ball => ("ball", 2.5),
        BearingKind::Roller => ("roller", 0.0),
    };
    rows::<ClearanceRow>(ISO_5753_1)
        .find(|row| {
            row.bearing == name && row.group == group && in_step(bore, row.over_mm, row.up_to_mm, first)
        })
        .map(|row| {
            let range = Range { low: row.least_um * 1e-6, high: row.greatest_um * 1e-6 };
            Sourced::new(range, source("ISO 5753-1", &row.basis))
        })
        .ok_or(AssemblyError::NotInTable { table: "ISO 5753-1", given: bore })
}

/// Smallest size of the ISO 492 tables, which itself belongs to the first step, mm.
fn smallest(ring: BearingRing) -> f64 {
    match ring {
        BearingRing::Inner => 0.6,
        BearingRing::Outer => 2.5,
    }
}

/// Whether a size (m) lies over one limit and up to the other (mm); the first size of a table belongs to it.
fn in_step(size: f64, over_mm: f64, up_to_mm: f64, first_mm: f64) -> bool {
    // Sizes in metres carry rounding of 1e-16; steps are whole tenths of a millimetre.
    let millimetres = (size * 1e9).round() / 1e6;
    millimetres <= up_to_mm && (millimetres > over_mm || (millimetres == over_mm && over_mm == first_mm))
}

fn source(standard: &str, basis: &str) -> Arc<str> {
    let basis = match basis {
        "two_sources" => "two independent reprints agree",
        "one_source" => "one reprint",
        "memory_supported" => "from memory, supported by an inch table",
        _ => "from memory",
    };
    format!("{standard}; {basis}").into()
}

/// Rows of one of the tables built into the program; a test reads every one of them.
fn rows<T: for<'a> Deserialize<'a>>(table: &'static str) -> impl Iterator<Item = T> {
    csv::Reader::from_reader(table.as_bytes()).into_deserialize().filter_map(Result::ok)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn line_count(table: &str) -> usize {
        table.lines().count() - 1
    }

    #[test]
    fn every_row_is_read() {
        assert_eq!(rows::<DeviationRow>(ISO_492).count(), line_count(ISO_492));
        assert_eq!(rows::<ClearanceRow>(ISO_5753_1).count(), line_count(ISO_5753_1));
    }

    #[test]
    fn steps_join_and_limits_grow_with_size() {
        let mut last: Option<DeviationRow> = None;
        for row in rows::<DeviationRow>(ISO_492) {
            assert!(row.lower_um < row.upper_um && row.upper_um == 0.0 && row.over_mm < row.up_to_mm);
            if let Some(before) = last
                && before.class == row.class
                && before.ring == row.ring
            {
                assert_eq!(before.up_to_mm, row.over_mm);
                assert!(row.lower_um <= before.lower_um);
            }
            last = Some(row);
        }
    }

    #[test]
    fn clearance_groups_follow_each_other() {
        let all: Vec<ClearanceRow> = rows(ISO_5753_1).collect();
        for two in all.windows(2) {
            assert!(two[0].least_um < two[0].greatest_um);
            if two[0].bearing == two[1].bearing && two[0].over_mm == two[1].over_mm {
                assert!(two[1].least_um >= two[0].least_um && two[1].greatest_um > two[0].greatest_um);
            }
        }
    }

    /// ISO 492, Normal class: bore over 30 to 50 mm 0/−12 µm, over 50 to 80 mm 0/−15 µm; outside over 80 to 120 mm
    /// 0/−15 µm. ISO 5753-1: groove ball bearings over 30 to 40 mm, C3 15 to 33 µm.
    #[test]
    fn known_values() {
        let bore = |d| bearing_limits(BearingClass::Normal, BearingRing::Inner, d).unwrap().value.lower * 1e6;
        assert!((bore(0.05) + 12.0).abs() < 1e-9 && (bore(0.0501) + 15.0).abs() < 1e-9);
        let outside = bearing_limits(BearingClass::Normal, BearingRing::Outer, 0.09).unwrap();
        assert!((outside.value.lower * 1e6 + 15.0).abs() < 1e-9);
        assert!(outside.source.starts_with("ISO 492; "));
        let ball = radial_clearance(BearingKind::Ball, ClearanceGroup::C3, 0.04).unwrap().value;
        assert!((ball.low * 1e6 - 15.0).abs() < 1e-9 && (ball.high * 1e6 - 33.0).abs() < 1e-9);
    }

    #[test]
    fn first_size_belongs_to_the_table_and_nothing_is_invented_outside() {
        assert!(bearing_limits(BearingClass::Normal, BearingRing::Inner, 0.0006).is_ok());
        assert!(bearing_limits(BearingClass::Normal, BearingRing::Inner, 0.0005).is_err());
        assert!(radial_clearance(BearingKind::Ball, ClearanceGroup::CN, 0.0025).is_ok());
        assert!(radial_clearance(BearingKind::Ball, ClearanceGroup::C4, 0.005).is_err());
        assert!(radial_clearance(BearingKind::Ball, ClearanceGroup::CN, 0.3).is_err());
        assert!(radial_clearance(BearingKind::Roller, ClearanceGroup::CN, 0.3).is_ok());
        assert!(matches!(
            bearing_limits(BearingClass::Class5, BearingRing::Outer, 3.0),
            Err(AssemblyError::NotInTable { table: "ISO 492", .. })
        ));
    }
}
