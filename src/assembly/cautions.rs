//! The usual cautions for a way of assembly and for the materials that go through it.
//!
//! They are usual cautions, not instructions: local codes, the owner's procedures and licensed practice
//! govern, and the first caution of every list says so.

use crate::material::{Kind, Material};

/// One caution with its subject and source.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Caution {
    /// What it belongs to: `press`, `heat`, `cold` or `apart`.
    pub subject: &'static str,
    /// One or more full sentences.
    pub text: String,
    /// Where it comes from.
    pub source: String,
    /// Whether it goes with the way of joining or the material whatever the numbers are, and not with what was found.
    pub usual: bool,
}

impl Caution {
    /// A caution that what was found calls for.
    pub fn found(subject: &'static str, text: impl Into<String>, source: impl Into<String>) -> Self {
        Self { subject, text: text.into(), source: source.into(), usual: false }
    }

    /// The same as one that is usual.
    pub fn usual(self) -> Self {
        Self { usual: true, ..self }
    }
}

/// A way to put a joint together or to take it apart.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Process {
    /// Pressed in at shop temperature.
    Press,
    /// The hub is heated in an oven.
    HeatHub,
    /// The hub is heated in hot oil.
    OilBath,
    /// The hub is heated by induction.
    Induction,
    /// The shaft is chilled in dry ice.
    DryIce,
    /// The shaft is chilled in alcohol or acetone with dry ice.
    DryIceBath,
    /// The shaft is chilled in liquid nitrogen.
    LiquidNitrogen,
    /// The joint is pushed apart, or floated apart with oil under pressure.
    Dismount,
}

impl Process {
    /// Every process, in the order of this list.
    pub const ALL: [Self; 8] = [
        Self::Press,
        Self::HeatHub,
        Self::OilBath,
        Self::Induction,
        Self::DryIce,
        Self::DryIceBath,
        Self::LiquidNitrogen,
        Self::Dismount,
    ];

    /// Subject of its cautions: `press`, `heat` or `cold`.
    pub fn subject(self) -> &'static str {
        match self {
            Self::Press | Self::Dismount => "press",
            Self::HeatHub | Self::OilBath | Self::Induction => "heat",
            Self::DryIce | Self::DryIceBath | Self::LiquidNitrogen => "cold",
        }
    }
}

const MEMORY: &str = "common practice, from memory";
const OXYGEN_LAW: &str = "19.5 % is the limit of 29 CFR 1910.134 (clause from memory); CGA P-12 and SB-2 for the practice (from memory)";

/// The usual cautions for a process, the one that defers to local codes first.
///
/// # Example
/// ```
/// use hubgrip::assembly::cautions::{Process, cautions};
/// let list = cautions(Process::LiquidNitrogen);
/// assert!(list[0].text.contains("local codes"));
/// assert!(list.iter().any(|caution| caution.text.contains("19.5 %")));
/// ```
pub fn cautions(process: Process) -> Vec<Caution> {
    let lists: &[&[(&str, &str)]] = match process {
        Process::Press => &[PRESS],
        Process::HeatHub => &[HOT],
        Process::OilBath => &[HOT, OIL],
        Process::Induction => &[HOT, INDUCTION],
        Process::DryIce => &[COLD, DRY_ICE],
        Process::DryIceBath => &[COLD, DRY_ICE, FLAMMABLE],
        Process::LiquidNitrogen => &[COLD, NITROGEN],
        Process::Dismount => &[DISMOUNT],
    };
    let deference = [(
        "These are usual cautions only; local codes, the owner's procedures and licensed practice govern.",
        "scope of this list",
    )];
    deference
        .iter()
        .chain(lists.iter().copied().flatten())
        .map(|(text, source)| Caution {
            subject: process.subject(),
            text: (*text).to_owned(),
            source: (*source).to_owned(),
            usual: true,
        })
        .collect()
}

/// What is said of a seat that is pressed oiled, as is usual.
pub const OIL_THE_SEAT: &str = "Oil the seat lightly.";

const PRESS: &[(&str, &str)] = &[
    (
        "Guard the press and stand out of line with the ram: a part that seizes or a tool that slips can fly.",
        MEMORY,
    ),
    ("Align the parts before the force comes on; a shaft that enters askew galls the bore.", MEMORY),
    (
        "Watch force against travel and stop at a sudden rise or drop.",
        "EN 13260 asks for the force-travel record of railway wheelsets (second-hand)",
    ),
    ("Press in one stroke without a pause: the force jumps when the parts start to move again.", MEMORY),
    (
        "Keep the press speed low; a few millimetres a second is usual and 2 mm/s is a common limit.",
        "DIN 7190 gives 2 mm/s (from memory)",
    ),
    (OIL_THE_SEAT, "DIN 7190 (from memory)"),
    ("Do not load a pressed joint for about 24 hours.", "DIN 7190 (from memory)"),
    ("Wear eye protection and never hammer on a hardened part: it can shatter.", MEMORY),
];

const HOT: &[(&str, &str)] = &[
    (
        "Treat every part as hot: bare metal at 65 °C to 70 °C burns skin within about a second.",
        "burn thresholds of ISO 13732-1 (from memory)",
    ),
    ("Mark the hot part and wear gloves rated for its temperature; it looks the same as a cold one.", MEMORY),
    (
        "Rehearse the lift and agree when to give up before the part leaves the oven; \
         a hub that seizes half-way cannot be freed by force.",
        MEMORY,
    ),
    (
        "Do not heat with an open flame: it overheats locally, softens and distorts the part and is not controlled.",
        "bearing makers' mounting guidelines",
    ),
    ("Vent every closed hollow space before heating: trapped air or oil builds up pressure.", MEMORY),
    ("Hold the hub against its shoulder until it grips: it also shrinks along the axis as it cools.", MEMORY),
];

const OIL: &[(&str, &str)] = &[
    (
        "Keep the bath well below the flash point of the oil, which lies near 190 °C to 220 °C for common \
         mineral oils and lower for used oil; 50 K below is a common limit.",
        "lubricant data sheets for ISO VG 32 oils; the 50 K is common practice, no source",
    ),
    ("Cut the heat as soon as the oil smokes.", "university rules for oil baths"),
    ("Keep water out of the bath: it turns to steam and throws hot oil.", "university rules for oil baths"),
    ("Hang the part or set it on a grid, clear of the hot bottom.", "bearing makers' mounting guidelines"),
    (
        "Allow for the oil's own expansion and set the bath in a second container.",
        "university rules for oil baths",
    ),
];

const INDUCTION: &[(&str, &str)] = &[
    ("Keep persons with a pacemaker away from the heater; take off rings and watches.", MEMORY),
    (
        "Demagnetise the part after heating; a magnetised part collects swarf.",
        "bearing makers' mounting guidelines",
    ),
    (
        "Heat slowly enough that rim and bore stay together: about 35 K to 50 K apart is a common limit \
         for bearings and castings.",
        MEMORY,
    ),
];

const COLD: &[(&str, &str)] = &[
    (
        "Wear a face shield, loose dry insulating gloves and trousers outside the boots; \
         skin freezes to cold metal and tears.",
        "university laboratory sheets for liquid nitrogen",
    ),
    ("Do not hammer, straighten or load a cold part: let it come back to room temperature first.", MEMORY),
    (
        "Wipe frost off the seat at once and join without delay; oil the joint against rust after it is warm.",
        MEMORY,
    ),
    ("Drain blind holes and hollow shafts: trapped liquid boils and sprays as the part warms.", MEMORY),
];

const DRY_ICE: &[(&str, &str)] = &[
    (
        "Ventilate at floor level: 1 kg of dry ice gives about 0.54 m³ of carbon dioxide, which is heavier \
         than air and collects low.",
        "university and supplier safety sheets for dry ice",
    ),
    (
        "Measure carbon dioxide, not only oxygen: it harms while the oxygen is still normal. \
         The 8-hour limit is 5000 ppm.",
        "EIGA Doc 150, Dry ice; occupational limit",
    ),
    ("Never shut dry ice into a gas-tight container: it bursts.", "university safety sheets for dry ice"),
];

const FLAMMABLE: &[(&str, &str)] = &[
    (
        "Add the ice slowly, in small pieces, and leave a hand's breadth of rim: the bath foams over, most of all when \
         a warm part goes in.",
        "university safety sheets for cooling baths; the rim is common practice, no source",
    ),
    (
        "Keep fire, sparks and hot parts away, use an open metal vessel in a tray, and cover it only loosely.",
        "university safety sheets for cooling baths; the rest is common practice, from memory",
    ),
    (
        "Let the liquid run off the part before it is joined: what is left on the seat takes the place of clearance, \
         and it takes off oil and grease.",
        "common practice, no source",
    ),
];

const NITROGEN: &[(&str, &str)] = &[
    (
        "Guard against lack of oxygen: one litre gives about 700 litres of gas, and the body gives no warning. \
         Ventilate at floor level, and carry an oxygen monitor with its alarm at 19.5 %.",
        OXYGEN_LAW,
    ),
    (
        "Never work alone, never lean into the tank, and never follow a collapsed person without an air supply.",
        "CGA SB-2 and SB-15 (from memory)",
    ),
    ("Never close the vessel tightly: the gas must be free to leave.", "CGA P-12 (from memory)"),
    (
        "Lower the part slowly. It boils quietly at first and then violently for some seconds when it comes \
         within about 30 K of the bath.",
        "film boiling; NBS Technical Note 317 (from memory)",
    ),
    (
        "Keep oil, grease and rags away from cold surfaces: oxygen-rich liquid air condenses on them.",
        "university laboratory sheets for liquid nitrogen",
    ),
    (
        "Use tongs, hooks and chains of austenitic steel, aluminium or copper; plain carbon steel turns brittle.",
        "A. Hurlich, Low temperature metals (1968)",
    ),
];

const DISMOUNT: &[(&str, &str)] = &[
    ("Guard the press and stand out of line: the force drops suddenly when the joint lets go.", MEMORY),
    (
        "Keep a stop nut or another axial restraint when oil pressure is used: a hub leaves a taper suddenly.",
        MEMORY,
    ),
    (
        "Expect a higher force after rest than while pressing in, and stop if it passes the press rating.",
        MEMORY,
    ),
    ("Inspect both seats before they are used again: a pressed joint loses interference each time.", MEMORY),
];

/// A part with the temperatures it goes through.
#[derive(Debug, Clone, Copy)]
pub struct Part<'a> {
    /// What it is called, such as `hub`.
    pub name: &'a str,
    /// Its material.
    pub material: &'a Material,
    /// Lowest temperature it sees, K.
    pub coldest: f64,
    /// Highest temperature it sees, K.
    pub hottest: f64,
    /// Whether it goes into a boiling or alcohol bath rather than cooling slowly.
    pub quenched: bool,
}

/// Below this temperature hardened steel may transform and stays brittle: −100 °C (common practice, from memory).
const HARDENED_STEEL_COLD: f64 = 173.15;
/// Usual limit for rolling bearings: 120 °C (bearing makers' mounting guidelines).
const BEARING_HOT: f64 = 393.15;
/// A part is called chilled below −20 °C (common practice, no source).
const CHILLED: f64 = 253.15;
/// Magnesium: no furnace above 120 °C (common practice, from memory).
const MAGNESIUM_HOT: f64 = 393.15;

/// The cautions that follow from the material of a part and the temperatures it goes through.
///
/// Families are told by the material's kind and by the words of its name and condition (`harden`, `bearing`,
/// `magnesium`, `zinc`); a material described in other words gets only the cautions of its kind and limits.
pub fn material_cautions(part: &Part) -> Vec<Caution> {
    let mut list = Vec::new();
    heat_cautions(part, &mut list);
    cold_cautions(part, &mut list);
    list
}

fn heat_cautions(part: &Part, list: &mut Vec<Caution>) {
    let mut say = |text: String, source: &str| {
        list.push(Caution::found("heat", text, source));
    };
    let (name, material) = (part.name, part.material);
    if let Some(limit) = &material.max_temperature
        && part.hottest > limit.value
    {
        let (hottest, limit_text) = (celsius(part.hottest), celsius(limit.value));
        say(
            format!(
                "The {name} reaches {hottest}, above the {limit_text} usually allowed for {}; \
                 its strength or hardness may be lost.",
                material.name
            ),
            &limit.source,
        );
    }
    if words(material).contains("bearing") && part.hottest > BEARING_HOT {
        say(
            format!(
                "The {name} reaches {}; a rolling bearing is usually kept at or below {}, \
                 unless its maker states a higher stabilisation class.",
                celsius(part.hottest),
                celsius(BEARING_HOT)
            ),
            "bearing makers' mounting guidelines: 120 °C usual, 150 °C to 350 °C for classes S0 to S4",
        );
    }
    if words(material).contains("magnesium") && part.hottest > MAGNESIUM_HOT {
        say(
            format!(
                "The {name} is magnesium and reaches {}: use no flame and no furnace above about {}; it can burn.",
                celsius(part.hottest),
                celsius(MAGNESIUM_HOT)
            ),
            MEMORY,
        );
    }
    if material.kind == Kind::Polymer && part.hottest > crate::material::REFERENCE_TEMPERATURE + 20.0 {
        say(
            format!(
                "The {name} is a polymer: it softens and creeps when warm, so part of the grip is lost for good."
            ),
            "common practice, no source",
        );
    }
}

fn cold_cautions(part: &Part, list: &mut Vec<Caution>) {
    if part.coldest >= CHILLED {
        return;
    }
    let (name, material, words) = (part.name, part.material, words(part.material));
    let coldest = celsius(part.coldest);
    if let Some(caution) = &material.low_temperature_caution {
        let text = format!("The {name} is chilled to {coldest}. {}", sentence(caution));
        list.push(Caution::found("cold", text, "material record").usual());
    }
    let mut say = |text: String, source: &str| {
        list.push(Caution::found("cold", text, source));
    };
    if words.contains("harden") && part.coldest < HARDENED_STEEL_COLD {
        say(
            format!(
                "The {name} is hardened and chilled to {coldest}, below −100 °C: retained austenite may turn to \
                 martensite, which makes it grow and leaves it brittle until it is tempered."
            ),
            "ASM Handbook, Cold and Cryogenic Treatment of Steel, for the transformation; the limit from memory",
        );
    }
    if material.kind == Kind::Brittle && part.quenched {
        say(
            format!(
                "The {name} is brittle: chill it slowly in cold gas or not at all; a casting can crack when it is \
                 put straight into the bath."
            ),
            MEMORY,
        );
    }
    if material.kind == Kind::Polymer {
        say(
            format!("The {name} is a polymer: at {coldest} it is stiff and breaks at notches."),
            "R. J. Crawford, Plastics Engineering, for the transition temperatures",
        );
    }
    if words.contains("zinc") {
        say(
            format!("The {name} is a zinc casting: it loses its toughness near 0 °C, so do not chill it."),
            MEMORY,
        );
    }
}

fn words(material: &Material) -> String {
    let condition = material.condition.as_deref().unwrap_or_default();
    format!("{} {} {}", material.id, material.name, condition).to_lowercase()
}

fn celsius(kelvin: f64) -> String {
    format!("{:.0} °C", kelvin - 273.15).replace('-', "−")
}

/// The text with a capital first and a full stop last.
fn sentence(text: &str) -> String {
    let text = text.trim();
    let mut letters = text.chars();
    let first: String = letters.next().map(|c| c.to_uppercase().collect()).unwrap_or_default();
    let stop = if text.ends_with(['.', '!', '?']) { "" } else { "." };
    format!("{first}{}{stop}", letters.as_str())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::material::{Expansion, Origin, Sourced, Strength};

    fn material(name: &str, kind: Kind, condition: Option<&str>) -> Material {
        Material {
            family: crate::material::Family::default(),
            id: name.to_owned(),
            name: name.to_owned(),
            designations: Vec::new(),
            kind,
            condition: condition.map(str::to_owned),
            youngs_modulus: Sourced::new(200e9, "test"),
            youngs_modulus_curve: None,
            poisson: Sourced::new(0.3, "test"),
            density: Sourced::new(7800.0, "test"),
            expansion: Expansion::from_mean(12e-6, 77.0, 700.0, "test").unwrap(),
            strength: vec![Strength {
                section_up_to: None,
                yield_strength: None,
                tensile_strength: None,
                source: "test".into(),
            }],
            compressive_strength: None,
            long_term_strength: None,
            conductivity: None,
            specific_heat: None,
            max_temperature: Some(Sourced::new(473.15, "test limit")),
            low_temperature_caution: None,
            notes: None,
            origin: Origin::BuiltIn,
        }
    }

    fn said(part: &Part) -> String {
        material_cautions(part).iter().map(|c| c.text.as_str()).collect::<Vec<_>>().join("\n")
    }

    #[test]
    fn every_process_defers_to_local_codes_and_speaks_in_full_sentences() {
        for process in Process::ALL {
            let list = cautions(process);
            assert!(list.len() > 3, "{process:?}");
            assert!(list[0].text.contains("local codes"));
            for caution in &list {
                assert!(caution.text.ends_with('.'), "{}", caution.text);
                assert!(caution.text.starts_with(char::is_uppercase), "{}", caution.text);
                assert!(!caution.source.is_empty() && !caution.text.contains("  "), "{}", caution.text);
                assert_eq!(caution.subject, process.subject());
            }
        }
    }

    #[test]
    fn heat_above_the_limit_is_told_with_both_temperatures() {
        let steel = material("steel", Kind::Ductile, None);
        let hot = Part { name: "hub", material: &steel, coldest: 293.15, hottest: 523.15, quenched: false };
        assert!(said(&hot).contains("reaches 250 °C, above the 200 °C"));
        assert!(material_cautions(&Part { hottest: 473.15, ..hot }).is_empty());
    }

    #[test]
    fn hardened_steel_is_told_below_minus_100() {
        let steel = material("shaft steel", Kind::Ductile, Some("case hardened"));
        let cold = Part { name: "shaft", material: &steel, coldest: 77.36, hottest: 293.15, quenched: true };
        assert!(said(&cold).contains("chilled to −196 °C, below −100 °C"));
        assert!(material_cautions(&Part { coldest: 194.65, ..cold }).is_empty());
    }

    #[test]
    fn families_get_their_own_cautions() {
        let part =
            |material| Part { name: "part", material, coldest: 77.36, hottest: 423.15, quenched: true };
        let iron = material("grey iron", Kind::Brittle, None);
        assert!(said(&part(&iron)).contains("casting can crack"));
        let bearing = material("bearing steel", Kind::Ductile, Some("hardened"));
        assert!(said(&part(&bearing)).contains("at or below 120 °C"));
        let magnesium = material("magnesium AZ91D", Kind::Ductile, None);
        assert!(said(&part(&magnesium)).contains("can burn"));
        let nylon = material("polyamide", Kind::Polymer, None);
        assert!(said(&part(&nylon)).contains("creeps") && said(&part(&nylon)).contains("notches"));
        let zinc = material("zinc alloy", Kind::Ductile, None);
        assert!(said(&part(&zinc)).contains("zinc casting"));
    }

    #[test]
    fn the_record_s_own_caution_becomes_a_sentence() {
        let mut steel = material("steel", Kind::Ductile, None);
        steel.low_temperature_caution = Some("notch-brittle when cold".to_owned());
        let cold = Part { name: "shaft", material: &steel, coldest: 194.65, hottest: 293.15, quenched: true };
        assert!(said(&cold).ends_with("Notch-brittle when cold."));
    }
}
