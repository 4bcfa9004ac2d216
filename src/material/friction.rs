//! Coefficients of friction by pair of materials, method of assembly and lubrication.
//!
//! Three coefficients are kept apart, as in DIN 7190: against slip in service (`holding`), while pressing in
//! (`pressing`), and at first movement when pushing out (`release`). Each is a range with its sources, used
//! from its safe side: the low end of holding for capacity, the high end of the others for the press.
//!
//! How the ends were chosen from the published values, `materials/friction.csv`:
//! - holding, low end: the design value of DIN 7190, which is on the safe side, where it has the pair; else the
//!   low end of GB/T 5371; high end: the greatest published design value;
//! - pressing and release, high end: the greatest value measured or recommended; where only a safe-side design
//!   value for holding is published, the upper end 0.2 of the band for usual metal pairs.
//!
//! All coefficients refer to the calculated contact pressure of the effective interference.

use std::sync::LazyLock;

use serde::Deserialize;

use super::{Family, Material, Range, Sourced};

/// How the seat was joined, as far as friction is concerned.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum FrictionMethod {
    /// Pressed in along the axis.
    Pressed,
    /// Joined with clearance, by heating the hub or chilling the shaft.
    Shrunk,
}

/// What is on the seats while they are joined.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum Lubrication {
    /// Oiled. Shrunk seats: an oil film is left, as after an oil-injected joint has drained.
    Oiled,
    /// Wiped clean, neither oiled nor degreased.
    Dry,
    /// Cleaned of all grease. Pressed seats: taken as dry.
    Degreased,
}

impl Lubrication {
    /// What is assumed when nothing is said.
    ///
    /// Pressed seats: oiled, the usual practice, and the lower friction. Shrunk seats: wiped clean but not
    /// degreased; degreasing raises the coefficient of steel on steel from 0.14 to 0.20 and must be
    /// stated by whoever relies on it. Common practice, no source.
    pub fn assumed(method: FrictionMethod) -> Self {
        match method {
            FrictionMethod::Pressed => Self::Oiled,
            FrictionMethod::Shrunk => Self::Dry,
        }
    }
}

/// The coefficients of one joint.
#[derive(Debug, Clone, PartialEq)]
pub struct FrictionSet {
    /// Against slip in service, axial and circumferential.
    pub holding: Sourced<Range>,
    /// While pressing in.
    pub pressing: Sourced<Range>,
    /// At first movement when pushing out.
    pub release: Sourced<Range>,
    /// Lubrication for which they hold.
    pub lubrication: Lubrication,
    /// The pair of families whose values were taken, such as `steel/grey iron`.
    pub pair: &'static str,
    /// True when a coefficient is a general band because no value for the pair is known.
    pub is_fallback: bool,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq, Deserialize)]
#[serde(rename_all = "lowercase")]
enum Phase {
    Holding,
    Pressing,
    Release,
}

#[derive(Debug, Deserialize)]
struct Row {
    pair: String,
    method: FrictionMethod,
    lubrication: Lubrication,
    phase: Phase,
    low: f64,
    high: f64,
    source: String,
}

const TABLE: &str = include_str!("../../materials/friction.csv");

/// The pair of the rows that hold when nothing is known of the pair.
const ANY: &str = "any/any";

static ROWS: LazyLock<Vec<Row>> = LazyLock::new(|| {
    csv::Reader::from_reader(TABLE.as_bytes()).deserialize().filter_map(Result::ok).collect()
});

/// Coefficients of friction for two parts, the outer one and the inner one.
///
/// `lubrication` none: [`Lubrication::assumed`]. The same values hold whichever of the two is outside. While
/// pressing in a joint meant to be shrunk, the pressed values hold.
///
/// Source: with each range. Valid for clean machined seats, Rz up to about 10 µm, without coatings, pastes or
/// adhesives; molybdenum disulphide and rust preventives lower the slip torque sharply.
///
/// # Example
/// ```
/// use hubgrip::material::friction::{FrictionMethod, friction};
/// use hubgrip::material::library::Library;
/// let library = Library::built_in();
/// let (hub, shaft) = (library.find("EN-GJL-250")?, library.find("C45+N")?);
/// let found = friction(&hub, &shaft, FrictionMethod::Pressed, None);
/// assert_eq!((found.holding.value.low, found.holding.value.high), (0.05, 0.1));
/// assert!(found.holding.source.contains("from memory"));
/// # Ok::<(), hubgrip::material::library::NotFound>(())
/// ```
pub fn friction(
    outer: &Material,
    inner: &Material,
    method: FrictionMethod,
    lubrication: Option<Lubrication>,
) -> FrictionSet {
    let lubrication = match (method, lubrication.unwrap_or(Lubrication::assumed(method))) {
        (FrictionMethod::Pressed, Lubrication::Degreased) => Lubrication::Dry,
        (_, stated) => stated,
    };
    let pair = pair_of(outer.family, inner.family);
    let mut is_fallback = pair == ANY;
    let mut take = |method, lubrication, phase| match find(pair, method, lubrication, phase) {
        Some(range) => range,
        None => {
            is_fallback = true;
            find(ANY, method, lubrication, phase).unwrap_or_else(widest)
        }
    };
    let while_pressing =
        if lubrication == Lubrication::Oiled { Lubrication::Oiled } else { Lubrication::Dry };
    let holding = take(method, lubrication, Phase::Holding);
    let pressing = take(FrictionMethod::Pressed, while_pressing, Phase::Pressing);
    let release = take(method, lubrication, Phase::Release);
    FrictionSet { holding, pressing, release, lubrication, pair, is_fallback }
}

fn find(
    pair: &str,
    method: FrictionMethod,
    lubrication: Lubrication,
    phase: Phase,
) -> Option<Sourced<Range>> {
    let fits = |row: &&Row| {
        row.pair == pair && row.method == method && row.lubrication == lubrication && row.phase == phase
    };
    let row = ROWS.iter().find(fits)?;
    Some(Sourced::new(Range { low: row.low, high: row.high }, row.source.as_str()))
}

/// The widest of all rows; a test shows that [`ANY`] has a row for every case, so it is never needed.
fn widest() -> Sourced<Range> {
    Sourced::new(Range { low: 0.03, high: 0.35 }, "no value for this pair; widest of all pairs")
}

/// The rows to look in, whichever of the two families is outside.
fn pair_of(one: Family, other: Family) -> &'static str {
    let is_steel = |family| matches!(family, Family::Steel | Family::CastSteel | Family::StainlessSteel);
    let is_iron =
        |family| matches!(family, Family::GreyIron | Family::SpheroidalIron | Family::MalleableIron);
    match (one, other) {
        (Family::Polymer, _) | (_, Family::Polymer) => "steel/polymer",
        (a, b) if is_iron(a) && is_iron(b) => "cast iron/cast iron",
        (a, b) if is_steel(a) => with_steel(b),
        (a, b) if is_steel(b) => with_steel(a),
        _ => ANY,
    }
}

/// The pair of steel with `family`. Malleable iron is taken as spheroidal iron, magnesium as aluminium.
fn with_steel(family: Family) -> &'static str {
    match family {
        Family::Steel | Family::CastSteel | Family::StainlessSteel => "steel/steel",
        Family::GreyIron => "steel/grey iron",
        Family::SpheroidalIron | Family::MalleableIron => "steel/spheroidal iron",
        Family::Aluminium | Family::Magnesium => "steel/aluminium",
        Family::Bronze => "steel/bronze",
        Family::Brass => "steel/brass",
        Family::Titanium => "steel/titanium",
        Family::Polymer => "steel/polymer",
        Family::Copper | Family::Nickel | Family::Zinc | Family::CementedCarbide | Family::Other => ANY,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_row_of_the_table_is_read_and_ordered() {
        assert_eq!(ROWS.len(), TABLE.lines().count() - 1);
        for row in ROWS.iter() {
            assert!(0.0 < row.low && row.low <= row.high && row.high < 0.5, "{row:?}");
            assert!(row.source.len() > 5, "{row:?}");
        }
    }

    #[test]
    fn no_case_stands_in_the_table_twice() {
        let key = |row: &Row| format!("{} {:?} {:?} {:?}", row.pair, row.method, row.lubrication, row.phase);
        let mut keys: Vec<String> = ROWS.iter().map(key).collect();
        keys.sort();
        keys.dedup();
        assert_eq!(keys.len(), ROWS.len());
    }

    #[test]
    fn the_general_band_has_a_row_for_every_case() {
        for (method, lubrications) in [
            (FrictionMethod::Pressed, &[Lubrication::Oiled, Lubrication::Dry][..]),
            (FrictionMethod::Shrunk, &[Lubrication::Oiled, Lubrication::Dry, Lubrication::Degreased]),
        ] {
            for &lubrication in lubrications {
                assert!(find(ANY, method, lubrication, Phase::Holding).is_some());
                assert!(find(ANY, method, lubrication, Phase::Release).is_some());
                let pressing = find(ANY, FrictionMethod::Pressed, lubrication, Phase::Pressing);
                assert!(pressing.is_some() || lubrication == Lubrication::Degreased);
            }
        }
    }

    #[test]
    fn every_pair_that_can_be_chosen_has_rows() {
        let all = [
            Family::Steel,
            Family::CastSteel,
            Family::StainlessSteel,
            Family::GreyIron,
            Family::SpheroidalIron,
            Family::MalleableIron,
            Family::Aluminium,
            Family::Magnesium,
            Family::Bronze,
            Family::Brass,
            Family::Copper,
            Family::Titanium,
            Family::Nickel,
            Family::Zinc,
            Family::CementedCarbide,
            Family::Polymer,
            Family::Other,
        ];
        for one in all {
            for other in all {
                let pair = pair_of(one, other);
                assert_eq!(pair, pair_of(other, one), "{one} on {other}");
                assert!(ROWS.iter().any(|row| row.pair == pair), "{pair}");
            }
        }
    }
}
