//! A bearing seat: raceways, loss of clearance, what is left of it, stress in the ring, forces and temperature of mounting.

use super::super::bearing_of::HOOP_LIMIT;
use super::super::expression::{Expression, num, sym};
use super::super::{BearingFindings, BearingState, Findings, RING_LIMIT_SOURCE};
use super::Units;
use super::sheet::Sheet;
use super::strength::hub_yields;
use crate::assembly::bearing::BearingKind;
use crate::assembly::bearing_tables::BearingRing;
use crate::joint::{BearingSeat, Joint};
use crate::material::Range;

const RING: &str = "Lamé; T. A. Harris and M. N. Kotzalas, Essential Concepts of Bearing Technology, 5th ed., interference fitting and \
                    clearance";
const BALANCE: &str = "T. A. Harris and M. N. Kotzalas, Essential Concepts of Bearing Technology, 5th ed.: clearance after mounting";
const RACEWAYS: &str = "bearing handbooks (from memory), where the true raceway is not known";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let (Some(bearing), Some(seat)) = (&findings.bearing, &findings.joint.bearing) else { return };
    let work = Work { findings, units, bearing, seat };
    work.raceways(sheet);
    work.clearance(sheet);
    for (index, state) in bearing.states.iter().enumerate() {
        work.state(sheet, index, state);
    }
    work.strength(sheet);
    work.mounting(sheet);
}

struct Work<'a> {
    findings: &'a Findings,
    units: &'a Units,
    bearing: &'a BearingFindings,
    seat: &'a BearingSeat,
}

impl Work<'_> {
    fn inner(&self) -> bool {
        self.seat.ring == BearingRing::Inner
    }

    /// Raceway of the fitted ring.
    fn raceway(&self) -> Expression {
        sym(if self.inner() { "d_ri" } else { "d_ro" })
    }

    /// |F² − d²| of the fitted ring.
    fn wall(&self) -> Expression {
        let (outer, inner) = if self.inner() { (sym("d_ri"), sym("d")) } else { (sym("d"), sym("d_ro")) };
        outer.power(2) - inner.power(2)
    }

    /// Symbol of the pressure of a pair in the shop.
    fn pressure(&self, tag: &str) -> String {
        format!("{}_{tag}", if hub_yields(self.findings) { "P" } else { "p" })
    }

    fn raceways(&self, sheet: &mut Sheet) {
        let (units, seat) = (self.units, self.seat);
        let length = |metres: f64| metres * units.per_metre;
        sheet.section(format!(
            "Bearing: raceways of a ring that counts as plain, {} fitted",
            seat.ring_name()
        ));
        sheet.input("d_B", "bore of the bearing", length(seat.bore), units.length, "joint file");
        sheet.input(
            "D_B",
            "outside diameter of the bearing",
            length(seat.outside_diameter),
            units.length,
            "joint file",
        );
        let (parts, near) = match seat.kind {
            BearingKind::Ball => (num("5"), num("4")),
            BearingKind::Roller => (num("4"), num("3")),
        };
        for (symbol, key, meaning, raceway, far, close) in [
            (
                "d_ri",
                "inner_raceway",
                "effective raceway of the inner ring",
                seat.inner_raceway,
                "D_B",
                "d_B",
            ),
            (
                "d_ro",
                "outer_raceway",
                "effective raceway of the outer ring",
                seat.outer_raceway,
                "d_B",
                "D_B",
            ),
        ] {
            if estimated(&self.findings.joint, key) {
                let formula = (sym(far) + near.clone() * sym(close)) / parts.clone();
                sheet.formula(symbol, meaning, formula, units.length, RACEWAYS, Some(length(raceway)));
            } else {
                sheet.input(symbol, meaning, length(raceway), units.length, "joint file");
            }
        }
    }

    /// Change of the raceway under a pressure, in the small unit; the ring has the modulus of the state, where it has one.
    fn loss(&self, sheet: &Sheet, pressure: &str, tag: &str) -> Expression {
        let shop = if self.inner() { "E_h" } else { "E_s" };
        let modulus = sheet.first_of(&[&format!("{shop}{tag}"), shop]);
        num("2000") * sym(pressure) * sym("d").power(2) * self.raceway() / (sym(&modulus) * self.wall())
    }

    fn clearance(&self, sheet: &mut Sheet) {
        let (units, bearing) = (self.units, self.bearing);
        let small = |metres: f64| metres * units.small_per_metre;
        sheet.section("Bearing: radial internal clearance, shop temperature");
        for (symbol, meaning, value) in [
            ("g_min", "least clearance of the group before mounting", bearing.before.value.low),
            ("g_max", "greatest clearance of the group before mounting", bearing.before.value.high),
        ] {
            sheet.input(symbol, meaning, small(value), units.small, &bearing.before.source);
        }
        for (tag, name, loss) in [
            ("min", "loosest", bearing.loss.loosest),
            ("m", "mean", bearing.loss.mean),
            ("max", "tightest", bearing.loss.tightest),
        ] {
            let change = self.loss(sheet, &self.pressure(tag), "");
            sheet.formula(
                &format!("Delta_{tag}"),
                &format!("clearance lost by the fit, {name} pair: change of the raceway"),
                change,
                units.small,
                RING,
                Some(small(loss)),
            );
        }
        self.left(sheet, "", None, bearing.mounted);
    }

    /// Least and greatest clearance left; the least of the group goes with the tightest pair.
    fn left(&self, sheet: &mut Sheet, tag: &str, heat: Option<&str>, left: Range) {
        let units = self.units;
        let small = |metres: f64| metres * units.small_per_metre;
        for (symbol, meaning, group, loss, program) in [
            ("a_min", "least clearance left; negative is preload", "g_min", "Delta_max", left.low),
            ("a_max", "greatest clearance left", "g_max", "Delta_min", left.high),
        ] {
            let rest = sym(group) - sym(&format!("{loss}{tag}"));
            let formula = match heat {
                Some(heat) => rest - sym(heat),
                None => rest,
            };
            sheet.formula(
                &format!("{symbol}{tag}"),
                meaning,
                formula,
                units.small,
                BALANCE,
                Some(small(program)),
            );
        }
    }

    fn state(&self, sheet: &mut Sheet, index: usize, state: &BearingState) {
        let Some(named) = self.findings.joint.duty.get(index) else { return };
        let tag = (index + 1).to_string();
        sheet.section(format!("Bearing: clearance in duty state {}", named.name));
        let Some([loosest, tightest]) = super::duty::both_pressures(sheet, self.findings, self.units, index)
        else {
            return;
        };
        for (symbol, name, pressure, loss) in [
            ("Delta_min", "loosest", loosest, state.loss.low),
            ("Delta_max", "tightest", tightest, state.loss.high),
        ] {
            let change = self.loss(sheet, &pressure, &tag);
            sheet.formula(
                &format!("{symbol}{tag}"),
                &format!("clearance lost by the fit, {name} pair"),
                change,
                self.units.small,
                RING,
                Some(loss * self.units.small_per_metre),
            );
        }
        let heat = (state.inner_hotter_by != 0.0).then(|| self.heat(sheet, &tag, state));
        self.left(sheet, &tag, heat.as_deref(), state.left);
    }

    /// Clearance that a warmer inner ring takes; the symbol of the line.
    fn heat(&self, sheet: &mut Sheet, tag: &str, state: &BearingState) -> String {
        let (units, joint) = (self.units, &self.findings.joint);
        let celsius = units.temperature == "degC";
        let (unit, per_kelvin, each) = if celsius { ("K", 1.0, "1/K") } else { ("degF", 1.8, "1/degF") };
        let ring = joint.rings.get(self.seat.index());
        let (hotter, alpha, taken) = (format!("dT_{tag}"), format!("alpha_B{tag}"), format!("Delta_T{tag}"));
        sheet.input(
            &hotter,
            "inner ring warmer than the outer by",
            state.inner_hotter_by * per_kelvin,
            unit,
            &self.seat.inner_hotter_by.source,
        );
        sheet.input(
            &alpha,
            "mean expansion of the ring between both temperatures, from its curve",
            state.expansion / per_kelvin,
            each,
            ring.map_or("", |ring| &ring.material.expansion.source),
        );
        let mean = 0.5 * (self.seat.inner_raceway + self.seat.outer_raceway);
        let program = state.expansion * state.inner_hotter_by * mean * units.small_per_metre;
        sheet.formula(
            &taken,
            "clearance that this takes",
            num("1000") * sym(&alpha) * sym(&hotter) * (sym("d_ri") + sym("d_ro")) / num("2"),
            units.small,
            BALANCE,
            Some(program),
        );
        taken
    }

    fn strength(&self, sheet: &mut Sheet) {
        let (units, hoop) = (self.units, &self.bearing.hoop_stress);
        sheet.section("Bearing: hoop stress in the ring, shop temperature");
        for (tag, name, stress) in [("min", "loosest", hoop.loosest), ("max", "tightest", hoop.tightest)] {
            let pressure = sym(&self.pressure(tag));
            let (place, formula) = if self.inner() {
                let sum = sym("d_ri").power(2) + sym("d").power(2);
                ("at its bore, tension", pressure * sum / self.wall())
            } else {
                ("at its raceway, compression", -(num("2") * pressure * sym("d").power(2) / self.wall()))
            };
            sheet.formula(
                &format!("sigma_B{tag}"),
                &format!("hoop stress in the {} {place}, {name} pair", self.seat.ring_name()),
                formula,
                units.pressure,
                RING,
                Some(stress * units.per_pascal),
            );
        }
        if self.inner() && hoop.tightest > 0.0 {
            sheet.input(
                "sigma_Bl",
                "limit of a through-hardened inner ring",
                HOOP_LIMIT * units.per_pascal,
                units.pressure,
                RING_LIMIT_SOURCE,
            );
            sheet.formula(
                "S_B",
                "limit over hoop stress, tightest pair",
                sym("sigma_Bl") / sym("sigma_Bmax"),
                "",
                "limit over stress",
                Some(HOOP_LIMIT / hoop.tightest),
            );
        }
    }

    /// Forces; the mounting temperature is worked with the hub temperature.
    fn mounting(&self, sheet: &mut Sheet) {
        let (units, bearing, friction) = (self.units, self.bearing, &self.findings.joint.friction.release);
        if bearing.mounting_force <= 0.0 {
            return;
        }
        sheet.section("Bearing: forces, tightest pair");
        sheet.formula(
            "F_on",
            "mounting force, high friction",
            sym("F_peak"),
            units.force,
            "peak press-in force, as worked above",
            Some(bearing.mounting_force * units.per_newton),
        );
        sheet.input("mu_off", "friction at release, high end", friction.value.high, "", &friction.source);
        sheet.formula(
            "F_off",
            "pull-off force at first movement",
            sym("mu_off") * sym(&self.pressure("max")) * sym("pi") * sym("d") * sym("l"),
            units.force,
            "equilibrium; DIN 7190-1",
            Some(bearing.pull_off_force * units.per_newton),
        );
    }
}

/// Whether a raceway is the usual estimate.
fn estimated(joint: &Joint, key: &str) -> bool {
    joint.defaults.iter().any(|taken| taken.key.ends_with(&format!(".bearing.{key}")))
}
