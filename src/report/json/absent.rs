//! Why a quantity is null: one sentence for each name.

use serde::Serialize;
use serde_json::Value;

/// Ends of names that may be null, with the case in which they are.
const WHY: &[(&str, &str)] = &[
    ("onset_of_yield", "where no contact pressure brings a ring to its strength, or no strength is known"),
    ("slip_safety", "where a state has neither torque nor axial force"),
    ("yield_safety", "where nothing stresses the ring, or its strength is not known"),
    ("hub_yield_safety", "where nothing stresses the hub, or its strength is not known"),
    ("shaft_yield_safety", "where nothing stresses the shaft, or its strength is not known"),
    (
        "youngs_modulus_curve",
        "where the material has no modulus against temperature, so that of 20 °C is taken",
    ),
    ("strength_mpa", "where the material has no strength of the kind that its criterion needs"),
    ("bending", "where a state has neither bending moment nor radial force"),
    ("loosening.speed_rpm", "where no speed opens the interface"),
    ("loosening.temperature_c", "where no temperature within the expansion curves opens the interface"),
    (
        "loosening.outer_temperature_c",
        "where no temperature of the outer parts within their expansion curves opens the interface",
    ),
    ("plastic", "where the hub stays elastic, or is not one of two ductile rings of one section"),
    ("growth_after_duty_um", "where the hub may not yield by design"),
    (
        "finite_length",
        "where the shaft is hollow, or the proportions are outside those computed by finite elements",
    ),
    ("liner", "where the innermost part is not a tube with a wall of at most 5 % of its mean diameter"),
    ("governing.state", "where the ring is stressed most at the shop temperature, at rest"),
    ("governing.safety", "where nothing stresses the ring, or its strength is not known"),
    (
        "assembly.hub_temperature_c",
        "where the joint is pressed, or the expansion curve of the hub ends below the temperature needed",
    ),
    (
        "assembly.shaft_temperature_c",
        "where the joint is pressed, or the expansion curve of the shaft ends above the temperature needed",
    ),
    ("hub_limit_c", "where no limit of the hub's temperature is known"),
    ("shrinkage_um", "where the expansion curve of the shaft ends above the temperature of the bath"),
    (
        "baths.hub_temperature_c",
        "where an expansion curve ends before the temperature of the bath or of the hub that is needed",
    ),
    ("bearing", "where no ring of a bearing is fitted"),
    ("mounting_temperature_c", "where no temperature within the expansion curve clears the tightest pair"),
    (
        "handling_time_s",
        "where nothing is heated or chilled, the parts pass each other for ever, or a note tells why there is no time",
    ),
    ("hub_soak", "where the hub is not heated, or is heated by induction"),
    ("shaft_chill", "where the shaft is not chilled, or a note tells why it cannot be judged"),
    ("handling", "where nothing is heated or chilled, or a note tells why it cannot be judged"),
    ("frost", "where the shaft is not chilled, or no frost settles on it"),
    ("frost.at_end", "where the parts pass each other for ever, or never"),
    ("gone_s", "where the parts pass each other for ever"),
    ("gone_in_air_s", "where the parts pass each other for ever in air alone"),
    ("to_wanted_s", "where the medium never brings the part there"),
    ("quench_stress_mpa", "where the part is not brittle"),
    ("cold_bath", "where no cold bath is used"),
    ("boiled_by_liquid_kg", "where the bath has no liquid besides its ice or nitrogen"),
    ("liquid", "where the bath has no liquid besides its ice or nitrogen"),
    ("liquid_l", "where the bath has no liquid besides its ice or nitrogen"),
    ("liquid_kg", "where the bath has no liquid besides its ice or nitrogen"),
    ("liquid_flash_point_c", "where the bath has no liquid besides its ice or nitrogen"),
    ("room", "where the joint file gives no room"),
    ("carbon_dioxide_percent", "where the bath is not dry ice"),
    ("press_work", "where no pair grips"),
    ("oil_injection", "where no pair grips"),
    ("oil_injection.loosest", "where the loosest pair does not grip"),
    ("oil_hub_safety", "where the hub has no strength to reckon with"),
    ("hub_safety", "where the hub has no strength to reckon with"),
    ("shaft_safety", "where the shaft has no strength to reckon with"),
    ("hub_limit_mpa", "where the hub has no strength to reckon with, or it is passed already"),
    ("shaft_limit_mpa", "where the shaft has no strength to reckon with, or it is passed already"),
    ("parts_rise_k", "where the record of a part gives no specific heat"),
    ("seat_rise_k", "where the record of a part gives no specific heat or conductivity"),
    ("release_hub_temperature_c", "where heat alone does not free the joint within the expansion curves"),
    ("buckling_n", "where the shaft has no strength to reckon with"),
    ("slenderness", "where the shaft has no strength to reckon with"),
    ("verdicts.required", "where nothing is required"),
    ("verdicts.found", "where the quantity that is judged does not exist"),
];

/// A sentence for each name that is null somewhere in the document, in the order of the names.
pub(super) fn notes(document: &impl Serialize) -> Vec<String> {
    let mut sentences = Vec::new();
    if let Ok(value) = serde_json::to_value(document) {
        walk(&value, "", &mut sentences);
    }
    sentences
}

fn walk(value: &Value, path: &str, sentences: &mut Vec<String>) {
    match value {
        Value::Null => {
            let sentence = sentence(path);
            if !sentences.contains(&sentence) {
                sentences.push(sentence);
            }
        }
        Value::Array(items) => items.iter().for_each(|item| walk(item, path, sentences)),
        Value::Object(members) => {
            for (name, member) in members {
                let path = if path.is_empty() { name.clone() } else { format!("{path}.{name}") };
                walk(member, &path, sentences);
            }
        }
        _ => {}
    }
}

fn sentence(path: &str) -> String {
    let is_end =
        |end: &str| path.strip_suffix(end).is_some_and(|before| before.is_empty() || before.ends_with('.'));
    match WHY.iter().find(|(end, _)| is_end(end)) {
        Some((end, why)) => format!("{end} is null {why}."),
        None => format!("{path} is null because it is not a finite number."),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn each_name_is_explained_once() {
        let document = serde_json::json!({
            "duty": [{"slip_safety": null}, {"slip_safety": null}],
            "assembly": {"hub_temperature_c": null, "baths": [{"hub_temperature_c": null}]},
            "extremes": {"mean": {"pressure_mpa": null, "torque_capacity_nm": 1.0}},
        });
        let notes = notes(&document);
        assert_eq!(notes.len(), 4, "{notes:?}");
        assert!(notes[0].starts_with("baths.hub_temperature_c is null where"), "{notes:?}");
        assert!(notes[1].starts_with("assembly.hub_temperature_c is null where"), "{notes:?}");
        assert!(notes[2].starts_with("slip_safety is null where"), "{notes:?}");
        assert_eq!(notes[3], "extremes.mean.pressure_mpa is null because it is not a finite number.");
    }

    #[test]
    fn part_of_a_name_is_not_the_name() {
        assert!(sentence("duty.loosest.rings.yield_safety").starts_with("yield_safety is"));
        assert!(sentence("duty.loosest.hub_yield_safety").starts_with("hub_yield_safety is"));
    }
}
