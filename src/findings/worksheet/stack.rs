//! A joint of more than two rings: each interface's pressure checked against its neighbours.

use super::super::expression::{Expression, num, sym};
use super::super::kernel::{Kernel, pair_interferences};
use super::super::{Findings, PairFindings};
use super::Units;
use super::sheet::Sheet;

const BALANCE: &str = "no gap at a closed interface: g = M p + q = 0; Lamé for each ring";

/// The gap equations of the loosest and the tightest pair, solved for each pressure by itself: the pressures come
/// from one linear system, and each line checks one of its rows.
pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    let Ok(kernel) = Kernel::new(joint) else { return };
    let pairs = pair_interferences(joint);
    for (name, tag, pair, found) in [
        ("loosest", "a", &pairs.loosest, &findings.extremes.loosest),
        ("tightest", "b", &pairs.tightest, &findings.extremes.tightest),
    ] {
        let Ok(stack) = kernel.stack(&pair.effective, &kernel.shop) else { return };
        let Ok(influence) = stack.influence() else { return };
        sheet.section(format!("Contact pressures of the {name} pair: every row of the linear system"));
        let scale = units.per_metre / units.per_pascal;
        for (k, interface) in found.interfaces.iter().enumerate() {
            let number = k + 1;
            let input = |sheet: &mut Sheet, symbol: &str, meaning: &str, value: f64, unit: &str| {
                sheet.input(&format!("{symbol}{number}{tag}"), meaning, value, unit, "elastic rings, Lamé");
            };
            let flexibility = format!("{}/{}", units.length, units.pressure);
            let pressure = interface.pressure * units.per_pascal;
            input(sheet, "p_", &format!("pressure at interface {number}"), pressure, units.pressure);
            input(
                sheet,
                "q_",
                "gap without contact pressure",
                influence.free_gaps[k] * units.per_metre,
                units.length,
            );
            input(sheet, "M_d", "gap by its own pressure", influence.diagonal[k] * scale, &flexibility);
            if k > 0 {
                input(sheet, "M_i", "gap by the pressure inside", influence.lower[k] * scale, &flexibility);
            }
            if k + 1 < found.interfaces.len() {
                input(sheet, "M_o", "gap by the pressure outside", influence.upper[k] * scale, &flexibility);
            }
        }
        rows(sheet, found, tag, units);
    }
}

fn rows(sheet: &mut Sheet, found: &PairFindings, tag: &str, units: &Units) {
    let count = found.interfaces.len();
    for (k, interface) in found.interfaces.iter().enumerate() {
        if interface.open {
            continue;
        }
        let number = k + 1;
        let name = |symbol: &str, of: usize| sym(&format!("{symbol}{of}{tag}"));
        let mut sum: Expression = name("q_", number);
        if k > 0 {
            sum = sum + name("M_i", number) * name("p_", number - 1);
        }
        if number < count {
            sum = sum + name("M_o", number) * name("p_", number + 1);
        }
        sheet.formula(
            &format!("r_{number}{tag}"),
            &format!("pressure at interface {number} from its row"),
            (num("0") - sum) / name("M_d", number),
            units.pressure,
            BALANCE,
            Some(interface.pressure * units.per_pascal),
        );
    }
}
