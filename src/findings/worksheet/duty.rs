//! Each loaded service state at the loosest pair.

use super::super::condition::Condition;
use super::super::expression::{Expression, num, sym};
use super::super::{Findings, StateFindings};
use super::Units;
use super::sheet::Sheet;
use super::strength::{ModulusAt, axial, flexibility, grip, hub_yields, modulus_at, torque};
use crate::joint::{DutyState, Ring};

const LAME: &str = "Lamé; Timoshenko & Goodier, Theory of Elasticity, § 28";
const ROTATION: &str = "rotating disc, Timoshenko & Goodier, Theory of Elasticity, § 32";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    for (index, duty) in findings.duty.iter().enumerate() {
        if let Some(sheet_of_state) = StateSheet::of(findings, units, index) {
            sheet_of_state.write(sheet, &duty.loosest);
        }
    }
}

/// The contact pressures of a state at the loosest and at the tightest pair, unless they are there; their symbols.
pub(super) fn both_pressures(
    sheet: &mut Sheet,
    findings: &Findings,
    units: &Units,
    index: usize,
) -> Option<[String; 2]> {
    let duty = findings.duty.get(index)?;
    let state = StateSheet::of(findings, units, index)?;
    let (loosest, tightest) = (state.name("p_"), state.name("p_t"));
    if !sheet.has(&loosest) {
        state.causes(sheet);
        state.contact(sheet, &duty.loosest);
    }
    if !sheet.has(&tightest) {
        state.tightest(sheet, &tightest, &duty.tightest);
    }
    Some([loosest, tightest])
}

/// One state with the number that its symbols carry.
struct StateSheet<'a> {
    findings: &'a Findings,
    units: &'a Units,
    state: &'a DutyState,
    condition: Condition,
    /// Young's modulus of shaft and hub, Pa.
    moduli: Vec<f64>,
    tag: usize,
}

impl<'a> StateSheet<'a> {
    fn of(findings: &'a Findings, units: &'a Units, index: usize) -> Option<Self> {
        let state = findings.joint.duty.get(index)?;
        let condition = Condition::of_state(&findings.joint, state).ok()?;
        let moduli = findings.duty.get(index)?.youngs_moduli.clone();
        Some(Self { findings, units, state, condition, moduli, tag: index + 1 })
    }

    fn name(&self, symbol: &str) -> String {
        format!("{symbol}{}", self.tag)
    }

    fn write(&self, sheet: &mut Sheet, pair: &StateFindings) {
        let pressed = self.state.inner_pressure > 0.0 || self.state.outer_pressure > 0.0;
        if pair.slip_safety.is_none() && self.state.speed == 0.0 && !pressed {
            return;
        }
        sheet.section(format!("Duty {}: the loosest pair", self.state.called()));
        self.causes(sheet);
        self.contact(sheet, pair);
        self.capacity(sheet, pair);
    }

    /// What changes the interference in this state.
    fn causes(&self, sheet: &mut Sheet) {
        self.heat(sheet);
        self.moduli(sheet);
        self.rotation(sheet);
        self.pressed(sheet);
    }

    /// Interference that acts, from the symbol of the one that grips and that of the growth that stays of a hub that yields.
    fn held(&self, sheet: &Sheet, width: &str, growth: &str) -> Expression {
        let mut held = grip(width, &self.name("eps_s"), &self.name("eps_h"));
        let lost = self.name("V_");
        if sheet.has(&lost) {
            held = held - sym(&lost);
        }
        for added in [self.name("Y_i"), self.name("Y_o")] {
            if sheet.has(&added) {
                held = held + sym(&added);
            }
        }
        if hub_yields(self.findings) { held - sym(growth) } else { held }
    }

    /// Contact pressure of the tightest pair.
    fn tightest(&self, sheet: &mut Sheet, symbol: &str, pair: &StateFindings) {
        if hub_yields(self.findings) && !sheet.has("G_max") {
            let worn = self.findings.service.plastic.as_ref().and_then(|plastic| plastic.worn.as_ref());
            let growth = worn.map_or(0.0, |worn| worn.tightest) * self.units.per_metre;
            let meaning = "growth of the hub's bore that stays, tightest pair, after the hardest state";
            sheet.input("G_max", meaning, growth, self.units.length, "elastic-plastic hub, as worked above");
        }
        let held = self.held(sheet, "W_max", "G_max");
        sheet.formula(
            symbol,
            "contact pressure, tightest pair",
            super::super::expression::greatest([
                num("0"),
                held / flexibility(&self.modulus("h"), &self.modulus("s")),
            ]),
            self.units.pressure,
            "Lamé with free thermal strains and rotation",
            Some(pair.pressure * self.units.per_pascal),
        );
    }

    /// Contact pressure of the loosest pair, fresh and after relaxation.
    fn contact(&self, sheet: &mut Sheet, pair: &StateFindings) {
        let held = self.held(sheet, "W_min", "G_min");
        let share = self.state.relaxation;
        let fresh = if share < 1.0 { self.name("p_e") } else { self.name("p_") };
        sheet.formula(
            &fresh,
            "contact pressure",
            super::super::expression::greatest([
                num("0"),
                held / flexibility(&self.modulus("h"), &self.modulus("s")),
            ]),
            self.units.pressure,
            "Lamé with free thermal strains and rotation",
            Some(pair.pressure / share * self.units.per_pascal),
        );
        if share < 1.0 {
            let left = self.name("k_");
            sheet.input(&left, "share that relaxation leaves", share, "", "joint file");
            sheet.formula(
                &self.name("p_"),
                "contact pressure after relaxation",
                sym(&fresh) * sym(&left),
                self.units.pressure,
                "share of the fresh pressure",
                Some(pair.pressure * self.units.per_pascal),
            );
        }
    }

    /// Free strain of both parts; in a gradient the mean over the section, which bore and rim both follow.
    fn heat(&self, sheet: &mut Sheet) {
        let units = self.units;
        for (number, (letter, ring)) in ["s", "h"].into_iter().zip(&self.findings.joint.rings).enumerate() {
            let temperature = self.state.temperatures.get(number).copied().unwrap_or_default();
            let strain = self.condition.strain.get(number).copied().unwrap_or_default();
            let rise = self.condition.rise.get(number).copied().unwrap_or_default();
            let (where_, what) = if rise == 0.0 {
                ("", format!("expansion of the {} from 20 °C", ring.name))
            } else {
                (
                    " at its inner face",
                    format!("expansion of the {} from 20 °C, mean over its section", ring.name),
                )
            };
            sheet.input(
                &format!("T_{letter}{}", self.tag),
                &format!("temperature of the {}{where_}", ring.name),
                units.degrees(temperature),
                units.temperature,
                "joint file",
            );
            let mean = strain + rise * mean_share(ring);
            sheet.input(
                &self.name(&format!("eps_{letter}")),
                &what,
                mean,
                "",
                &ring.material.expansion.source,
            );
        }
    }

    /// Young's modulus of both parts where it is not that of the shop temperature.
    fn moduli(&self, sheet: &mut Sheet) {
        for (number, (index, ring)) in ["s", "h"].into_iter().zip(&self.findings.joint.rings).enumerate() {
            let Some(modulus) = self.changed(number) else { continue };
            let inner = self.state.temperatures.get(number).copied().unwrap_or_default();
            let rise = self.state.temperature_rises.get(number).copied().unwrap_or(0.0);
            let temperature = self.units.degrees(inner + rise * mean_share(ring));
            let tag = self.tag.to_string();
            modulus_at(sheet, ring, &ModulusAt { index, tag: &tag, temperature, modulus }, self.units);
        }
    }

    /// Young's modulus of a part, Pa, where it is not that of the shop temperature.
    fn changed(&self, number: usize) -> Option<f64> {
        let joint = &self.findings.joint;
        let (modulus, ring) = (*self.moduli.get(number)?, joint.rings.get(number)?);
        let shop = ring.material.youngs_modulus_at(joint.assembly.shop_temperature).ok()?;
        (modulus != shop).then_some(modulus)
    }

    /// Symbol of the modulus of a part in this state.
    fn modulus(&self, index: &str) -> String {
        let number = usize::from(index == "h");
        if self.changed(number).is_some() { self.name(&format!("E_{index}")) } else { format!("E_{index}") }
    }

    /// Interference that rotation takes; nothing at rest.
    fn rotation(&self, sheet: &mut Sheet) {
        let (units, joint) = (self.units, &self.findings.joint);
        let [shaft, hub] = joint.rings.as_slice() else { return };
        if self.state.speed == 0.0 {
            return;
        }
        let speed = self.name("w_");
        sheet.input(&speed, "angular speed", self.state.speed, "rad/s", "joint file");
        for (letter, ring) in [("s", shaft), ("h", hub)] {
            let density = ring.material.density.value * units.per_kilogram_per_cubic_metre;
            let what = format!("density of the {}", ring.name);
            sheet.input(
                &self.name(&format!("rho_{letter}")),
                &what,
                density,
                units.density,
                &ring.material.density.source,
            );
        }
        let growth = |letter: &str, other: &str| -> Expression {
            let (rho, nu, modulus) =
                (self.name(&format!("rho_{letter}")), format!("nu_{letter}"), self.modulus(letter));
            sym(&rho) * sym(&speed).power(2) * sym("d") / (num("16") * sym(&modulus))
                * ((num("3") + sym(&nu)) * sym(other).power(2) + (num("1") - sym(&nu)) * sym("d").power(2))
        };
        for (symbol, meaning, formula) in [
            ("v_h", "growth of the free hub's bore by rotation", growth("h", "D")),
            ("v_s", "growth of the free shaft by rotation", growth("s", "b")),
            ("V_", "interference that rotation takes", sym(&self.name("v_h")) - sym(&self.name("v_s"))),
        ] {
            sheet.formula(&self.name(symbol), meaning, formula, units.length, ROTATION, None);
        }
    }

    /// Interference that pressures in the bore and round the hub add.
    fn pressed(&self, sheet: &mut Sheet) {
        let units = self.units;
        for (symbol, grown, what, pressure, outer, inner, modulus, numerator) in [
            ("q_i", "Y_i", "in the bore", self.state.inner_pressure, "d", "b", "s", "b"),
            ("q_o", "Y_o", "round the hub", self.state.outer_pressure, "D", "d", "h", "D"),
        ] {
            if pressure == 0.0 {
                continue;
            }
            let (symbol, grown) = (self.name(symbol), self.name(grown));
            let value = pressure * units.per_pascal;
            sheet.input(&symbol, &format!("pressure {what}"), value, units.pressure, "joint file");
            let square = |name: &str| sym(name).power(2);
            let formula = num("2") * sym(&symbol) * sym("d") * square(numerator)
                / (sym(&self.modulus(modulus)) * (square(outer) - square(inner)));
            let meaning = format!("interference added by the pressure {what}");
            sheet.formula(&grown, &meaning, formula, units.length, LAME, None);
        }
    }

    fn capacity(&self, sheet: &mut Sheet, pair: &StateFindings) {
        let Some(safety) = pair.slip_safety else { return };
        let units = self.units;
        let (axial_name, torque_name) = (self.name("F_cap"), self.name("M_cap"));
        let (force_name, moment_name) = (self.name("F_"), self.name("M_"));
        let equilibrium = "equilibrium; DIN 7190-1";
        sheet.formula(
            &axial_name,
            "axial force at slip",
            axial(&self.name("p_")),
            units.force,
            equilibrium,
            Some(pair.axial_capacity * units.per_newton),
        );
        sheet.formula(
            &torque_name,
            "torque at slip",
            torque(&axial_name, units),
            units.torque,
            equilibrium,
            Some(pair.torque_capacity * units.per_newton_metre),
        );
        let (moment, force) =
            (self.state.torque * units.per_newton_metre, self.state.axial_force * units.per_newton);
        sheet.input(&moment_name, "torque", moment, units.torque, "joint file");
        sheet.input(&force_name, "axial force", force, units.force, "joint file");
        if pair.pressure <= 0.0 {
            return;
        }
        let share = |load: &str, capacity: &str| (sym(load) / sym(capacity)).power(2);
        sheet.formula(
            &self.name("S_"),
            "safety against slip",
            num("1") / (share(&moment_name, &torque_name) + share(&force_name, &axial_name)).root(),
            "",
            "resultant of both friction shares; Kollmann, Welle-Nabe-Verbindungen (1984)",
            Some(safety),
        );
    }
}

/// Where the mean over the section lies between the strain of the inner and that of the outer face, when the strain
/// follows the logarithm of the radius: b²/(b² − a²) − 1/(2 ln(b/a)).
fn mean_share(ring: &Ring) -> f64 {
    if ring.inner_diameter == 0.0 {
        return 0.0;
    }
    let ratio = ring.outer_diameter / ring.inner_diameter;
    ratio * ratio / (ratio * ratio - 1.0) - 0.5 / ratio.ln()
}
