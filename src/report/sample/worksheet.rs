//! A worksheet of the length and shape that the report must set.

use crate::findings::expression::{Expression, Function, Symbol, greatest, num, sym};
use crate::findings::{PairFindings, WorksheetLine, WorksheetSection};
use crate::joint::Joint;
use crate::tolerance::Extremes;

const DIN: &str = "DIN 7190-1";
const LAME: &str = "Lamé; Timoshenko and Goodier, Theory of Elasticity, §28";

/// The interference, the pressure and the capacity of the tightest pair, line by line.
pub(super) fn worksheet(joint: &Joint, extremes: &Extremes<PairFindings>) -> Vec<WorksheetSection> {
    let pair = &extremes.tightest;
    let hub = &joint.rings[1];
    let q = joint.diameter / hub.outer_diameter;
    let squared = || sym("Q_h").power(2);
    let given = |symbol: &str, meaning: &str, printed: String, unit: &str| {
        line(symbol, meaning, None, printed, unit, "joint file")
    };
    let inputs = vec![
        given("d", "nominal diameter", format!("{}", joint.diameter * 1e3), "mm"),
        given("D_h", "outer diameter of the hub", format!("{}", hub.outer_diameter * 1e3), "mm"),
        given("L", "length that carries", format!("{}", (joint.length - joint.relief) * 1e3), "mm"),
        given("U_max", "greatest interference", format!("{:.1}", pair.interference * 1e6), "µm"),
        given("mu", "coefficient of friction", "0.12".into(), ""),
        given("phi", "half-angle of the chamfer", "8.7e-2".into(), "rad"),
        given("nu_h", "Poisson's ratio of the hub", format!("{}", hub.material.poisson.value), ""),
    ];
    let c_h = (1.0 + q * q) / (1.0 - q * q) + hub.material.poisson.value;
    let pressure = vec![
        line("Q_h", "diameter ratio of the hub", Some(sym("d") / sym("D_h")), format!("{q:.4}"), "", LAME),
        line(
            "C_h",
            "shape factor of the hub",
            Some((num("1") + squared()) / (num("1") - squared()) + sym("nu_h")),
            format!("{c_h:.4}"),
            "",
            LAME,
        ),
        line(
            "p_max",
            "contact pressure",
            Some(
                sym("U_max") * num("1e-3")
                    / (sym("d") * (sym("C_h") / num("110e3") + num("0.71") / num("210e3"))),
            ),
            format!("{:.2}", pair.pressure / 1e6),
            "MPa",
            LAME,
        ),
        line(
            "sigma_v_h",
            "von Mises equivalent stress at the bore",
            Some(sym("p_max") * (num("3") + sym("Q_h").power(4)).root() / (num("1") - squared())),
            format!("{:.1}", pair.rings[1].bore.von_mises / 1e6),
            "MPa",
            "von Mises 1913",
        ),
    ];
    let capacity = vec![
        line(
            "T",
            "torque at which the joint slips",
            Some(sym("mu") * sym("p_max") * sym("pi") * sym("d").power(2) * sym("L") / num("2e3")),
            format!("{:.1}", pair.torque_capacity),
            "N·m",
            DIN,
        ),
        line(
            "K",
            "force ratio on the chamfer",
            Some(
                (sym("mu") + sym("phi").call(Function::Tan))
                    / (num("1") - sym("mu") * sym("phi").call(Function::Tan)),
            ),
            "0.2086".into(),
            "",
            "equilibrium",
        ),
        line(
            "zeta",
            "greatest of two, to show the form",
            Some(greatest([sym("K"), -(sym("mu") - sym("nu_h")).call(Function::Abs)])),
            "0.2086".into(),
            "",
            "made up for this test",
        ),
    ];
    let section = |title: &str, lines| WorksheetSection { title: title.into(), lines };
    vec![
        section("Inputs", inputs),
        section("Contact pressure of the tightest pair", pressure),
        section("Capacity and chamfer", capacity),
    ]
}

fn line(
    symbol: &str,
    meaning: &str,
    formula: Option<Expression>,
    printed: String,
    unit: &str,
    source: &str,
) -> WorksheetLine {
    WorksheetLine {
        symbol: Symbol::new(symbol),
        meaning: meaning.into(),
        formula,
        printed,
        unit: unit.into(),
        source: source.into(),
    }
}
