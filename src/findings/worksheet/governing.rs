//! The stress that governs each of two parts where that is in a service state and not in the shop.

use super::super::condition::Condition;
use super::super::expression::sym;
use super::super::{Findings, RingStress};
use super::Units;
use super::faces::{RingFaces, Spin};
use super::sheet::Sheet;
use crate::joint::Ring;

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    for (index, ring) in findings.joint.rings.iter().enumerate() {
        let yields = index == 1 && super::strength::hub_yields(findings);
        if let Some(place) = place(findings, index).filter(|_| !yields) {
            stress(sheet, findings, units, ring, &place);
        }
    }
}

/// The state and the pair at which a ring is nearest to its strength.
struct Place<'a> {
    ring: usize,
    state: usize,
    tightest: bool,
    found: &'a RingStress,
}

/// Where a ring is nearest to its strength; none when that is in the shop.
fn place(findings: &Findings, ring: usize) -> Option<Place<'_>> {
    let mut least = findings.extremes.tightest.rings.get(ring)?.safety?;
    let mut place = None;
    for (state, duty) in findings.duty.iter().enumerate() {
        for (tightest, pair) in [(true, &duty.tightest), (false, &duty.loosest)] {
            let Some(found) = pair.rings.get(ring) else { continue };
            if let Some(safety) = found.safety.filter(|safety| *safety < least) {
                least = safety;
                place = Some(Place { ring, state, tightest, found });
            }
        }
    }
    place
}

fn stress(sheet: &mut Sheet, findings: &Findings, units: &Units, ring: &Ring, place: &Place<'_>) {
    let joint = &findings.joint;
    let Some(state) = joint.duty.get(place.state) else { return };
    let Ok(condition) = Condition::of_state(joint, state) else { return };
    let pair = if place.tightest { "tightest" } else { "loosest" };
    sheet.section(format!("Stress of the {} in {}, {pair} pair", ring.name, state.called()));
    let Some([loosest, tightest]) = super::duty::both_pressures(sheet, findings, units, place.state) else {
        return;
    };
    let number = place.state + 1;
    // Stress is that of the fresh pressure, also where relaxation leaves less of it for holding.
    let fresh = format!("p_e{number}");
    let loosest = if sheet.has(&fresh) { fresh } else { loosest };
    let contact = if place.tightest { tightest } else { loosest };
    let letter = if place.ring == 0 { "s" } else { "h" };
    let tag = format!("{letter}{number}");
    let stressed = format!("sigma_e{tag}");
    if condition.rise.get(place.ring).is_some_and(|rise| *rise != 0.0) {
        sheet.input(
            &stressed,
            &format!("equivalent stress of the {}, that of the heat flow with it", ring.name),
            place.found.equivalent * units.per_pascal,
            units.pressure,
            "rings in a logarithmic gradient; Timoshenko & Goodier, Theory of Elasticity, ch. 13",
        );
    } else {
        let (inner, outer) = (format!("q_i{number}"), format!("q_o{number}"));
        let known = |symbol: &str| sheet.has(symbol).then(|| symbol.to_owned());
        let (inside, outside) =
            if place.ring == 0 { (known(&inner), Some(contact)) } else { (Some(contact), known(&outer)) };
        let (speed, density, poisson) =
            (format!("w_{number}"), format!("rho_{letter}{number}"), format!("nu_{letter}"));
        let faces = RingFaces {
            ring,
            criterion: joint.criterion,
            tag: &tag,
            outer: if place.ring == 0 { "d" } else { "D" },
            inner: if place.ring == 0 { "b" } else { "d" },
            inside: inside.as_deref(),
            outside: outside.as_deref(),
            spin: (condition.speed > 0.0).then_some(Spin {
                speed: &speed,
                density: &density,
                poisson: &poisson,
            }),
        };
        faces.write(sheet, units, place.found.equivalent);
    }
    let strength = sheet.first_of(&[&format!("R_m{letter}"), &format!("R_e{letter}")]);
    if let Some(safety) = place.found.safety.filter(|_| sheet.has(&strength)) {
        sheet.formula(
            &format!("S_{tag}"),
            &format!("safety of the {}", ring.name),
            sym(&strength) / sym(&stressed),
            "",
            "strength over equivalent stress",
            Some(safety),
        );
    }
}
