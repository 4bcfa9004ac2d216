//! The stresses at both faces of a ring under pressure and at speed, and the equivalent stress that governs.

use super::super::cautions::criterion_source;
use super::super::expression::{Expression, Function, greatest, num, sym};
use super::Units;
use super::sheet::Sheet;
use crate::joint::Ring;
use crate::material::Kind;
use crate::mechanics::criteria::DuctileCriterion;

const LAME: &str = "Lamé; Timoshenko & Goodier, Theory of Elasticity, § 28";
const ROTATION: &str = "Lamé with rotation; Timoshenko & Goodier, Theory of Elasticity, §§ 28, 32";

/// A ring with the symbols that the sheet knows it by.
pub(super) struct RingFaces<'a> {
    pub(super) ring: &'a Ring,
    pub(super) criterion: DuctileCriterion,
    /// What the symbols of these lines end with.
    pub(super) tag: &'a str,
    /// Its outer and its inner diameter.
    pub(super) outer: &'a str,
    pub(super) inner: &'a str,
    /// Pressure in its bore and round it; none where there is none.
    pub(super) inside: Option<&'a str>,
    pub(super) outside: Option<&'a str>,
    /// None at rest.
    pub(super) spin: Option<Spin<'a>>,
}

/// Symbols of what a ring at speed needs.
pub(super) struct Spin<'a> {
    pub(super) speed: &'a str,
    pub(super) density: &'a str,
    pub(super) poisson: &'a str,
}

impl RingFaces<'_> {
    fn name(&self, symbol: &str) -> String {
        format!("{symbol}{}", self.tag)
    }

    fn symbol(&self, symbol: &str) -> Expression {
        sym(&self.name(symbol))
    }

    fn is_solid(&self) -> bool {
        self.ring.inner_diameter == 0.0
    }

    /// The lines, the last of them `sigma_e` with the program's own figure, Pa.
    pub(super) fn write(&self, sheet: &mut Sheet, units: &Units, program: f64) {
        let name = &self.ring.name;
        let (mut bore, mut rim) = self.by_pressure(sheet);
        if let Some(spin) = &self.spin {
            let (at_bore, at_rim) = self.by_speed(sheet, units, spin);
            bore = add(bore, at_bore);
            rim = add(rim, at_rim);
        }
        let solid = self.is_solid();
        let source = if self.spin.is_some() { ROTATION } else { LAME };
        let first = if solid { "in the middle" } else { "at the bore" };
        let criterion = criterion_source(self.ring.material.kind == Kind::Brittle, self.criterion);
        for (hoop, found, pressure, place, formula) in [
            ("sigma_i", "e_i", self.inside.filter(|_| !solid), first, bore),
            ("sigma_o", "e_o", self.outside, "at the outside", rim),
        ] {
            let meaning = format!("hoop stress {place} of the {name}");
            let formula = formula.unwrap_or_else(|| num("0"));
            sheet.formula(&self.name(hoop), &meaning, formula, units.pressure, source, None);
            let formula = self.equivalent(sheet, units, hoop, pressure.map(sym));
            let meaning = format!("equivalent stress {place}");
            sheet.formula(&self.name(found), &meaning, formula, units.pressure, criterion, None);
        }
        sheet.formula(
            &self.name("sigma_e"),
            &format!("equivalent stress of the {name}, the greater of both faces"),
            greatest([self.symbol("e_i"), self.symbol("e_o")]),
            units.pressure,
            "both faces",
            Some(program * units.per_pascal),
        );
    }

    /// Hoop stress at both faces by the pressures: p_i (2k + 1) − 2 p_o (k + 1) and 2 p_i k − p_o (2k + 1), k = a²/(b² − a²).
    fn by_pressure(&self, sheet: &mut Sheet) -> (Option<Expression>, Option<Expression>) {
        let (inside, outside) = (self.inside.map(sym), self.outside.map(sym));
        if self.is_solid() {
            let all = outside.map(|pressure| -pressure);
            return (all.clone(), all);
        }
        let (outer, inner) = (sym(self.outer).power(2), sym(self.inner).power(2));
        let meaning = format!("bore over wall of the {}, squares of diameters", self.ring.name);
        sheet.formula(&self.name("k_"), &meaning, inner.clone() / (outer - inner), "", LAME, None);
        let k = || self.symbol("k_");
        let both = || num("2") * k() + num("1");
        let bore = less(
            inside.clone().map(|pressure| pressure * both()),
            outside.clone().map(|pressure| num("2") * pressure * (k() + num("1"))),
        );
        let rim =
            less(inside.map(|pressure| num("2") * pressure * k()), outside.map(|pressure| pressure * both()));
        (bore, rim)
    }

    /// Hoop stress at both faces by rotation.
    fn by_speed(&self, sheet: &mut Sheet, units: &Units, spin: &Spin<'_>) -> (Expression, Expression) {
        let meaning = format!("density and speed of the {}", self.ring.name);
        let unit = format!("{}/{}2", units.pressure, units.length);
        let force = sym(spin.density) * sym(spin.speed).power(2) / num("16");
        sheet.formula(&self.name("f_"), &meaning, force, &unit, ROTATION, None);
        let (outer, inner) = (|| sym(self.outer).power(2), || sym(self.inner).power(2));
        let three = || num("3") + sym(spin.poisson);
        let one = || num("1") - sym(spin.poisson);
        let (at_bore, at_rim) = if self.is_solid() {
            (three() / num("2") * outer(), one() * outer())
        } else {
            (three() * outer() + one() * inner(), three() * inner() + one() * outer())
        };
        (self.symbol("f_") * at_bore, self.symbol("f_") * at_rim)
    }

    /// The equivalent stress at a face under a pressure; without one the hoop stress is alone, or both stresses are equal as
    /// in the middle of a solid ring. What it compares is written first, two at a time.
    fn equivalent(
        &self,
        sheet: &mut Sheet,
        units: &Units,
        hoop: &str,
        pressure: Option<Expression>,
    ) -> Expression {
        let absolute = |formula: Expression| formula.call(Function::Abs);
        let first = if hoop == "sigma_i" { "i" } else { "o" };
        let stress = self.symbol(hoop);
        match (self.ring.material.kind, self.criterion, pressure) {
            (Kind::Brittle, _, _) if self.ring.tension_share() == 0.0 => greatest([num("0"), stress]),
            (Kind::Brittle, _, pressure) => {
                let share = num(&crate::quantity::number(self.ring.tension_share(), 6));
                let pressed = greatest([pressure.unwrap_or_else(|| num("0")), num("0") - stress.clone()]);
                let symbol = format!("c_{first}");
                let meaning = "compression there, by tensile over compressive strength";
                let source =
                    self.ring.material.compressive_strength.as_ref().map_or("", |value| &value.source);
                sheet.formula(&self.name(&symbol), meaning, share * pressed, units.pressure, source, None);
                greatest([stress, self.symbol(&symbol)])
            }
            (_, _, None) => absolute(stress),
            (_, DuctileCriterion::VonMises, Some(pressure)) => {
                (stress.clone().power(2) + pressure.clone().power(2) + pressure * stress).root()
            }
            (_, DuctileCriterion::Tresca, Some(pressure)) => {
                let symbol = format!("c_{first}");
                let meaning = "the greater of hoop and radial stress there";
                let single = greatest([absolute(stress.clone()), pressure.clone()]);
                let source = "differences from the axial stress, which is zero";
                sheet.formula(&self.name(&symbol), meaning, single, units.pressure, source, None);
                greatest([absolute(stress + pressure), self.symbol(&symbol)])
            }
        }
    }
}

fn add(sum: Option<Expression>, term: Expression) -> Option<Expression> {
    Some(match sum {
        Some(sum) => sum + term,
        None => term,
    })
}

fn less(whole: Option<Expression>, part: Option<Expression>) -> Option<Expression> {
    match (whole, part) {
        (Some(whole), Some(part)) => Some(whole - part),
        (Some(whole), None) => Some(whole),
        (None, part) => part.map(|part| -part),
    }
}
