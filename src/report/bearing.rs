//! What the seat does to a bearing, as rows for terminal and report.

use crate::assembly::bearing::BearingKind;
use crate::assembly::bearing_tables::{BearingClass, BearingRing};
use crate::findings::Findings;
use crate::material::Range;
use crate::quantity::{Measure, UnitSystem, show};

/// One row: what it is, its value, where it comes from or what it is held against.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Row {
    /// What it is.
    pub name: String,
    /// Its value with unit.
    pub value: String,
    /// Source, limit or condition; may be empty.
    pub note: String,
}

/// The bearing in a line, such as `ball bearing 50 × 90 × 20 mm, normal class, clearance CN: inner ring on the shaft`.
pub fn title(findings: &Findings) -> Option<String> {
    let seat = findings.joint.bearing.as_ref()?;
    let size = |si: f64| show(Measure::Size, si, findings.joint.display);
    let kind = match seat.kind {
        BearingKind::Ball => "ball bearing",
        BearingKind::Roller => "roller bearing",
    };
    let class = match seat.class {
        BearingClass::Normal => "Normal class",
        BearingClass::Class6 => "class 6",
        BearingClass::Class5 => "class 5",
    };
    let place = match seat.ring {
        BearingRing::Inner => "inner ring on the shaft",
        BearingRing::Outer => "outer ring in the housing",
    };
    Some(format!(
        "{kind} {} × {} × {}, {class}, clearance {:?}: {place}",
        size(seat.bore).number,
        size(seat.outside_diameter).number,
        size(seat.width),
        seat.clearance
    ))
}

/// The rows; none when no bearing is fitted.
pub fn rows(findings: &Findings) -> Vec<Row> {
    let (Some(bearing), Some(seat)) = (&findings.bearing, &findings.joint.bearing) else { return Vec::new() };
    let system = findings.joint.display;
    let row = |name: &str, value: String, note: String| Row { name: name.to_owned(), value, note };
    let deviations = |range: Range| span(Measure::Deviation, range, system);
    let mut rows = vec![
        row("radial clearance before", deviations(bearing.before.value), bearing.before.source.to_string()),
        row(
            "loss by the fit",
            deviations(Range { low: bearing.loss.loosest, high: bearing.loss.tightest }),
            format!("plain ring to a raceway of {}", show(Measure::Size, seat.raceway(), system)),
        ),
        row("left after mounting", deviations(bearing.mounted), "shop temperature, at rest".to_owned()),
    ];
    for (state, left) in findings.joint.duty.iter().zip(&bearing.states) {
        let hotter = show(Measure::TemperatureDifference, left.inner_hotter_by, system);
        let note =
            format!("inner ring {hotter} warmer than the outer; the fit takes {}", deviations(left.loss));
        rows.push(row(&format!("left, {}", state.name), deviations(left.left), note));
    }
    let hoop = bearing.hoop_stress;
    let hoop = Range { low: hoop.loosest.min(hoop.tightest), high: hoop.loosest.max(hoop.tightest) };
    let note = match seat.ring {
        BearingRing::Inner => "at the bore; through-hardened rings to about 130 MPa (handbooks, from memory)",
        BearingRing::Outer => "at the raceway; compression",
    };
    rows.push(row("hoop stress in the ring", span(Measure::Pressure, hoop, system), note.to_owned()));
    let force = |si: f64| format!("at most {}", show(Measure::Force, si, system));
    rows.push(row(
        "mounting force",
        force(bearing.mounting_force),
        "tightest pair, high friction".to_owned(),
    ));
    rows.push(row(
        "pull-off force",
        force(bearing.pull_off_force),
        "tightest pair, high friction".to_owned(),
    ));
    rows.push(row(
        match seat.ring {
            BearingRing::Inner => "mounting temperature",
            BearingRing::Outer => "temperature of the housing",
        },
        bearing
            .mounting_temperature
            .map_or("none found".to_owned(), |hot| show(Measure::Temperature, hot, system).to_string()),
        mounting_note(findings, bearing.mounting_possible),
    ));
    rows
}

fn mounting_note(findings: &Findings, possible: bool) -> String {
    let limit = findings
        .assembly
        .hub_limit
        .as_ref()
        .map(|(limit, _)| show(Measure::Temperature, *limit, findings.joint.display));
    match (possible, limit) {
        (true, Some(limit)) => format!("within the limit of {limit}"),
        (true, None) => String::new(),
        (false, Some(limit)) => format!("NOT within the limit of {limit}: press it, or chill the other part"),
        (false, None) => "not possible by heat alone".to_owned(),
    }
}

/// `low to high` with the unit.
fn span(measure: Measure, range: Range, system: UnitSystem) -> String {
    format!("{} to {}", show(measure, range.low, system).number, show(measure, range.high, system))
}
