//! Cautions of the method of assembly, with the numbers of this joint.

use super::Findings;
use crate::assembly::atmosphere::{CARBON_DIOXIDE_LIMIT, OxygenLevel};
use crate::assembly::cautions::{self as practice, Caution, Part, Process};
use crate::joint::practice::Heating;
use crate::joint::{Bath, Method, Ring};
use crate::material::Kind;
use crate::material::friction::Lubrication;
use crate::quantity::{Measure, show};

/// Below this handling time a lift must be drilled and may need another route, s (common practice, no source).
const SHORT: f64 = 15.0;

/// The cautions of the method, of the materials that go through it, of the air, and of a time that is short.
pub(super) fn cautions(findings: &Findings) -> Vec<Caution> {
    let mut all: Vec<Caution> = processes(findings).into_iter().flat_map(practice::cautions).collect();
    // The forces and the grip of a dry seat are not those of an oiled one.
    if matches!(findings.joint.friction.lubrication, Some(Lubrication::Dry | Lubrication::Degreased)) {
        all.retain(|caution| caution.text != practice::OIL_THE_SEAT);
    }
    all.extend(flammable(findings));
    all.extend(air(findings));
    all.extend(short_time(findings));
    all.extend(frosted(findings));
    all.extend(quench(findings));
    all.extend(crushing(findings));
    all.extend(materials(findings));
    all.extend(oil(findings));
    all
}

/// What must be minded when oil takes the joint apart, and the part that the oil would overstrain.
fn oil(findings: &Findings) -> Vec<Caution> {
    let Some(found) = &findings.assembly.oil else { return Vec::new() };
    let joint = &findings.joint;
    let (shaft, hub) = joint.joined_last();
    let mut all = vec![Caution {
        subject: "apart",
        text: format!(
            "If oil is pressed between the seats, keep a stop or a nut before the {}: it may jump off. Never pump above the rating of \
             pump, hoses and fittings, and stand clear of them. Let the oil drain for an hour or two, a day in the cold, before the \
             joint carries torque again.",
            hub.name
        ),
        source: "common practice, from memory".to_owned(),
        usual: true,
    }];
    let required = |ring: &Ring| match ring.material.kind {
        Kind::Brittle => joint.require.fracture_safety,
        Kind::Ductile | Kind::Polymer => joint.require.yield_safety,
    };
    for (ring, safety) in [(hub, found.tightest.hub_safety), (shaft, found.tightest.shaft_safety)] {
        let Some(safety) = safety.filter(|safety| *safety < required(ring)) else { continue };
        all.push(Caution {
            subject: "apart",
            text: format!(
                "The oil pressure that floats the tightest pair leaves the {} a safety of {safety:.2} only, less than the {:.2} \
                 required: warm the {} first, or take it off another way.",
                ring.name,
                required(ring),
                hub.name
            ),
            source: "Lamé, with the oil pressure in place of the contact pressure".to_owned(),
            // Oil is one way to take it apart; nobody has asked for it yet.
            usual: true,
        });
    }
    all
}

fn processes(findings: &Findings) -> Vec<Process> {
    let plan = &findings.joint.assembly;
    let heat = match plan.practice.heating {
        Heating::ForcedOven | Heating::StillOven => Process::HeatHub,
        Heating::OilBath => Process::OilBath,
        Heating::Induction => Process::Induction,
    };
    let bath = match plan.bath {
        Bath::DryIce => Process::DryIce,
        Bath::DryIceInAlcohol | Bath::DryIceInAcetone => Process::DryIceBath,
        Bath::LiquidNitrogen => Process::LiquidNitrogen,
    };
    match plan.method {
        Method::Press => vec![Process::Press],
        Method::HeatHub => vec![heat],
        Method::ChillShaft => vec![bath],
        Method::HeatAndChill => vec![heat, bath],
    }
}

/// The flash point of the liquid in a bath of dry ice.
fn flammable(findings: &Findings) -> Option<Caution> {
    let liquid = findings.assembly.cold_bath.as_ref()?.liquid.as_ref()?.liquid;
    let hot = if findings.joint.assembly.heats() {
        " The hub is hot: the part must be dry before it goes near."
    } else {
        ""
    };
    Some(Caution {
        subject: "cold",
        text: format!(
            "The {} of the bath is flammable, with a flash point of {}: cold it gives off little, but what is spilled, carried out on \
             the part or left to warm catches fire in a room that is warmer than that.{hot}",
            liquid.name,
            show(Measure::Temperature, liquid.flash_point, findings.joint.display)
        ),
        source: liquid.source.to_owned(),
        usual: false,
    })
}

fn air(findings: &Findings) -> Vec<Caution> {
    let Some(room) = findings.assembly.cold_bath.as_ref().and_then(|bath| bath.room.as_ref()) else {
        return Vec::new();
    };
    let mut all = Vec::new();
    let mut say = |text: String, source: &str| {
        all.push(Caution::found("cold", text, source));
    };
    let percent = |share: f64| format!("{:.1} %", (share * 1000.0 + 1e-9).floor() / 10.0);
    const SOURCE: &str =
        "displacement of air in a closed room; 19.5 % of 29 CFR 1910.134 (clause from memory)";
    if room.level != OxygenLevel::Sufficient {
        say(
            format!(
                "The gas of this job can bring the oxygen of the room down to {}: chill in the open or under an exhaust, wear an \
                 oxygen monitor, and do not work alone; local rules govern.",
                percent(room.oxygen)
            ),
            SOURCE,
        );
    } else if room.level_spilled != OxygenLevel::Sufficient {
        say(
            format!(
                "A spill of the whole bath can bring the oxygen of the room down to {}: leave the room at once and do not go back \
                 before the monitor clears; local rules govern.",
                percent(room.oxygen_spilled)
            ),
            SOURCE,
        );
    }
    if room.carbon_dioxide.is_some_and(|share| share > CARBON_DIOXIDE_LIMIT) {
        let share = room.carbon_dioxide.unwrap_or_default();
        say(
            format!(
                "The carbon dioxide of this job can reach {} of the air, above the 0.5 % allowed for eight hours: ventilate and \
                 measure it; local rules govern.",
                percent(share)
            ),
            "EIGA Doc 150, Dry ice; occupational limit of 5000 ppm",
        );
    }
    all
}

fn short_time(findings: &Findings) -> Option<Caution> {
    let gone = findings.assembly.times.handling.as_ref()?.tightest.gone?;
    let subject = if findings.joint.assembly.heats() { "heat" } else { "cold" };
    (gone < SHORT).then(|| Caution {
        subject,
        text: format!(
            "The tightest pair leaves less than {SHORT:.0} s to seat it: a hotter hub, a colder shaft or a larger clearance gives \
             more; practise the movement before."
        ),
        source: "common practice, no source".to_owned(),
        usual: false,
    })
}

/// A time that is met only without frost.
fn frosted(findings: &Findings) -> Option<Caution> {
    let needed = findings.joint.assembly.practice.time_needed()?;
    let end = findings.assembly.times.handling.as_ref()?.frost.as_ref()?.at_end?;
    (end.gone < needed && needed <= end.time).then(|| Caution {
        subject: "cold",
        text: "The time that is needed is met only while the seat carries no frost: wipe it, keep it in dry gas until the last moment, \
               or open more clearance."
            .to_owned(),
        source: "bound on the frost by the analogy of heat and mass transfer".to_owned(),
        usual: false,
    })
}

fn quench(findings: &Findings) -> Vec<Caution> {
    let times = &findings.assembly.times;
    let parts = [(&times.hub, "heat"), (&times.shaft, "cold")];
    let worried = parts.into_iter().filter_map(|(soak, subject)| {
        let soak = soak.as_ref()?;
        let (stress, strength) = soak.quench.as_ref()?;
        let share = stress.greatest() / (*strength)?;
        (share > 0.5).then(|| Caution {
            subject,
            text: format!(
                "The {} is brittle and the sudden change of temperature stresses it to {:.0} % of its tensile strength: bring it \
                 to temperature in steps or in a gentler medium.",
                soak.part,
                share * 100.0
            ),
            source: "thermal stress of a free cylinder (S. P. Timoshenko and J. N. Goodier, Theory of Elasticity, chapter 13); \
                     half the strength is common practice, no source"
                .to_owned(),
            usual: false,
        })
    });
    worried.collect()
}

/// Faces that crush and pins that buckle under the press.
fn crushing(findings: &Findings) -> Vec<Caution> {
    let joint = &findings.joint;
    let Some(work) = findings.assembly.press_work.as_ref().filter(|_| joint.assembly.method == Method::Press)
    else {
        return Vec::new();
    };
    let (shaft, hub) = joint.joined_last();
    let mut all = Vec::new();
    let mut say = |text: String, source: &str| {
        all.push(Caution::found("press", text, source));
    };
    for (ring, face) in [(shaft, &work.shaft_face), (hub, &work.hub_face)] {
        if face.safety.is_some_and(|safety| safety < 1.5) {
            say(
                format!(
                    "The end face of the {} is near to crushing under the peak press force: spread the force or press on a \
                     shoulder.",
                    ring.name
                ),
                "equilibrium; a safety of 1.5 is common practice, no source",
            );
        }
    }
    let peak = findings.assembly.press.tightest.peak_force;
    if work.slender().is_some_and(|buckling| buckling.force < 3.0 * peak) {
        say(
            format!("The {} is slender: guide it, or it buckles under the press force.", shaft.name),
            "R. G. Budynas and J. K. Nisbett, Shigley's Mechanical Engineering Design, chapter 4; a safety of 3 is common \
             practice, no source",
        );
    }
    all
}

fn materials(findings: &Findings) -> Vec<Caution> {
    let joint = &findings.joint;
    let plan = &joint.assembly;
    if plan.method == Method::Press {
        return Vec::new();
    }
    let shop = plan.shop_temperature;
    let handling = findings.assembly.times.handling.as_ref();
    let bath = findings.assembly.baths.iter().find(|bath| bath.bath == plan.bath);
    let (shaft, hub) = joint.joined_last();
    let oven = findings.assembly.times.hub.as_ref().map(|soak| soak.medium_temperature);
    let hottest = oven.or_else(|| handling.map(|handling| handling.hub_temperature)).unwrap_or(shop);
    let coldest = bath.filter(|_| plan.chills()).map_or(shop, |bath| bath.temperature);
    let parts = [
        Part { name: &hub.name, material: &hub.material, coldest: shop, hottest, quenched: false },
        Part {
            name: &shaft.name,
            material: &shaft.material,
            coldest,
            hottest: shop,
            quenched: plan.chills(),
        },
    ];
    parts.iter().flat_map(practice::material_cautions).collect()
}
