//! The joint file: its shape, its faults with line and column, and the joint as understood.
//!
//! [`read::read`] takes a text to a [`Joint`]: validated, in SI, with every default marked as one.
//!
//! | module | subject |
//! |---|---|
//! | [`read`](mod@read) | from text to joint, or to everything that is wrong |
//! | [`population`] | how the parts scatter |
//! | [`practice`] | oven, bath, room and handling |
//! | [`set`] | changes from the command line |
//! | [`template`] | commented files to start from |
//! | [`schema`](mod@schema) | JSON Schema for editors |

mod assembly_keys;
mod bearing;
mod bearing_keys;
mod decode;
mod diagnose;
mod draft;
mod file;
mod grow;
mod leaf;
mod place;
pub mod population;
mod population_keys;
pub mod practice;
pub mod read;
pub mod schema;
pub mod set;
pub mod template;
mod tree;
mod validate;
mod written;

pub use bearing::BearingSeat;
pub(crate) use draft::SMALLEST;
pub use file::VERSION;
pub(crate) use leaf::ROUGHEST;
pub(crate) use validate::COARSEST;

use std::sync::Arc;

use crate::material::friction::Lubrication;
use crate::material::{Kind, Material, Range, Sourced, Strength};
use crate::mechanics::criteria::DuctileCriterion;
use crate::mechanics::plastic::YieldRule;
use crate::quantity::UnitSystem;
use crate::tolerance::FitLimits;

/// A validated joint. Lengths m, forces N, torques N·m, temperatures K, pressures Pa.
#[derive(Debug, Clone, PartialEq)]
pub struct Joint {
    /// Free text; empty when none was given.
    pub title: String,
    /// Drawing number and revision.
    pub drawing: Option<String>,
    /// Free note.
    pub note: Option<String>,
    /// Date as written in the file; the program never reads a clock.
    pub date: Option<String>,
    /// Nominal diameter of the mating surface, m.
    pub diameter: f64,
    /// Length of the hub along the shaft, m.
    pub length: f64,
    /// Part of the length that carries nothing, m.
    pub relief: f64,
    /// The rings from the innermost outwards; a plain joint has two: shaft and hub.
    pub rings: Vec<Ring>,
    /// The fit between ring k and ring k + 1.
    pub fits: Vec<Fit>,
    /// Coefficients of friction.
    pub friction: Friction,
    /// The bearing, when one of the two parts is a ring of one.
    pub bearing: Option<BearingSeat>,
    /// The interfaces in the order in which they are joined; a plain joint has the one interface 0.
    pub order: Vec<usize>,
    /// The joint along its length where hub or shaft is stepped; empty when both are of one section.
    pub slices: Vec<Slice>,
    /// Service states; never empty.
    pub duty: Vec<DutyState>,
    /// How it is put together.
    pub assembly: AssemblyPlan,
    /// Loss of interference as roughness peaks flatten.
    pub smoothing: Smoothing,
    /// Criterion for ductile parts.
    pub criterion: DuctileCriterion,
    /// What must be met.
    pub require: Requirements,
    /// How the parts scatter; nothing said when the file is silent.
    pub population: population::PopulationPlan,
    /// Units shown to the reader.
    pub display: UnitSystem,
    /// Every default that was taken, in the order of the joint file's keys.
    pub defaults: Vec<DefaultTaken>,
    /// What a reader should know of the input; full sentences.
    pub remarks: Vec<String>,
    /// Changes made from the command line, as typed.
    pub set: Vec<(String, String)>,
    /// SHA-256 of the input text (and of the changes), hexadecimal.
    pub digest: String,
}

impl Joint {
    /// Length that carries: the hub's length less the relief, m.
    pub fn engaged_length(&self) -> f64 {
        self.length - self.relief
    }

    /// Diameter of an interface, m; the mating diameter when there is none of that number.
    pub fn interface_diameter(&self, interface: usize) -> f64 {
        self.rings.get(interface).map_or(self.diameter, |ring| ring.outer_diameter)
    }

    /// The rings inside and outside the interface that is joined last.
    pub fn joined_last(&self) -> (&Ring, &Ring) {
        let inside = self.last_interface().min(self.rings.len().saturating_sub(2));
        (&self.rings[inside], &self.rings[inside + 1])
    }

    /// The interface that is joined last: the one that assembly is worked out for.
    pub fn last_interface(&self) -> usize {
        self.order.last().copied().unwrap_or(0)
    }

    /// Whether a ring has no bore, in any slice.
    pub fn is_solid(&self, index: usize) -> bool {
        let ring = self.rings.get(index).is_some_and(|ring| ring.inner_diameter == 0.0);
        ring && (index > 0 || self.slices.iter().all(|slice| slice.shaft_bore == 0.0))
    }

    /// The innermost and the outermost ring.
    pub fn shaft_and_hub(&self) -> (&Ring, &Ring) {
        (&self.rings[0], &self.rings[self.rings.len() - 1])
    }
}

/// One ring of the joint; the shaft is a ring whose inner diameter may be zero.
#[derive(Debug, Clone, PartialEq)]
pub struct Ring {
    /// What it is called: `shaft`, `hub`, or the name given in the file.
    pub name: String,
    /// Its material.
    pub material: Arc<Material>,
    /// Ruling section for its strength, m.
    pub section: f64,
    /// Strength at that section.
    pub strength: Strength,
    /// Inner diameter, m; zero for a solid shaft.
    pub inner_diameter: f64,
    /// Outer diameter, m.
    pub outer_diameter: f64,
    /// Roughness Rz of the mating surface, m.
    pub roughness: Sourced<f64>,
}

impl Ring {
    /// Tensile over compressive strength of a brittle ring; zero where either is not known, or the ring is not brittle.
    pub fn tension_share(&self) -> f64 {
        let compressive =
            self.material.compressive_strength.as_ref().filter(|_| self.material.kind == Kind::Brittle);
        match (self.strength.tensile_strength, compressive) {
            (Some(tensile), Some(compressive)) => tensile / compressive.value,
            _ => 0.0,
        }
    }
}

/// The fit at one interface.
#[derive(Debug, Clone, PartialEq)]
pub struct Fit {
    /// The callout as written, such as `H7/s6`.
    pub callout: String,
    /// Limits of both members.
    pub limits: FitLimits,
    /// Which standard or measurement the limits come from.
    pub source: String,
}

/// Coefficients of friction; each range is used from its safe side.
#[derive(Debug, Clone, PartialEq)]
pub struct Friction {
    /// Against slip in service; the low end is used.
    pub holding: Sourced<Range>,
    /// While pressing in; the high end sizes the press.
    pub pressing: Sourced<Range>,
    /// At first movement when pushing out after rest; the high end sizes the press.
    pub release: Sourced<Range>,
    /// State of the seats that these belong to; none when the numbers are given without one.
    pub lubrication: Option<Lubrication>,
}

/// A piece of a stepped joint, from the end that enters first.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Slice {
    /// Length along the shaft, m.
    pub length: f64,
    /// Outer diameter of the hub there, m.
    pub hub_outer_diameter: f64,
    /// Bore of the shaft there, m; zero when solid.
    pub shaft_bore: f64,
}

/// Whether a ductile hub may yield by design.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Allow {
    /// Every part stays elastic with the safety required.
    Elastic,
    /// A ductile hub may become plastic over this share of its section at most.
    Plastic {
        /// Greatest share of the hub's section that may be plastic.
        share: f64,
    },
}

/// One service state.
#[derive(Debug, Clone, PartialEq)]
pub struct DutyState {
    /// Its name.
    pub name: String,
    /// Torque, N·m, not negative.
    pub torque: f64,
    /// Axial force, N, not negative.
    pub axial_force: f64,
    /// Temperature of each ring, K, innermost first; in a radial gradient that of its inner face.
    pub temperatures: Vec<f64>,
    /// Temperature of the outer face less that of the inner face of each ring, K; empty without a gradient.
    pub temperature_rises: Vec<f64>,
    /// Angular speed, rad/s, not negative.
    pub speed: f64,
    /// Pressure inside the innermost ring, Pa.
    pub inner_pressure: f64,
    /// Pressure outside the outermost ring, Pa.
    pub outer_pressure: f64,
    /// Bending moment about the middle of the joint, N·m, not negative.
    pub bending_moment: f64,
    /// Radial force on the joint, N, not negative.
    pub radial_force: f64,
    /// Whether the bending turns with the shaft, so that it fatigues it.
    pub rotating_bending: bool,
    /// Whether the torque reverses.
    pub reversing: bool,
    /// Share of the contact pressure that relaxation leaves for holding, above 0 and at most 1.
    pub relaxation: f64,
}

impl DutyState {
    /// What it is called in a sentence: `state rated`, and `state 2` where the file gives no name.
    pub fn called(&self) -> String {
        if self.name.starts_with("state ") { self.name.clone() } else { format!("state {}", self.name) }
    }

    /// A state at rest without load, each ring at its temperature (K).
    pub fn unloaded(name: impl Into<String>, temperatures: Vec<f64>) -> Self {
        Self {
            name: name.into(),
            torque: 0.0,
            axial_force: 0.0,
            temperatures,
            temperature_rises: Vec::new(),
            speed: 0.0,
            inner_pressure: 0.0,
            outer_pressure: 0.0,
            bending_moment: 0.0,
            radial_force: 0.0,
            rotating_bending: false,
            reversing: false,
            relaxation: 1.0,
        }
    }
}

/// Method of assembly.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Method {
    /// Pressed in at shop temperature.
    Press,
    /// The hub is heated, the shaft is at shop temperature.
    HeatHub,
    /// The shaft is chilled, the hub is at shop temperature.
    ChillShaft,
    /// The shaft is chilled in the bath and the hub is heated for the rest.
    HeatAndChill,
}

/// A cold bath.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Bath {
    /// Dry ice packed round the part, −78.5 °C.
    DryIce,
    /// Dry ice in alcohol, −72 °C.
    DryIceInAlcohol,
    /// Dry ice in acetone, −78 °C.
    DryIceInAcetone,
    /// Liquid nitrogen, −196 °C.
    LiquidNitrogen,
}

impl Bath {
    /// Whether carbon dioxide comes off it.
    pub fn is_dry_ice(self) -> bool {
        matches!(self, Self::DryIce | Self::DryIceInAlcohol | Self::DryIceInAcetone)
    }
}

/// How the joint is put together.
#[derive(Debug, Clone, PartialEq)]
pub struct AssemblyPlan {
    /// Method asked for.
    pub method: Method,
    /// Temperature of the shop, K.
    pub shop_temperature: f64,
    /// Diametral clearance wanted while joining hot or cold, m.
    pub clearance: Sourced<f64>,
    /// Half-angle of the lead-in chamfer, rad.
    pub chamfer_angle: Sourced<f64>,
    /// Bath used when the method chills and shares.
    pub bath: Bath,
    /// Highest hub temperature allowed by the user, K, the lower of `assembly.hub_temperature_limit` and
    /// `require.hub_temperature`; the material's own limit holds as well.
    pub hub_temperature_limit: Option<f64>,
    /// Oven, bath, room and handling.
    pub practice: practice::Practice,
}

impl AssemblyPlan {
    /// Diametral clearance to be opened: the one wanted, the form error and the allowance for handling, m.
    pub fn clearance_to_open(&self) -> f64 {
        self.clearance.value + self.practice.form_error + self.practice.handling_allowance
    }

    /// Whether the hub is heated.
    pub fn heats(&self) -> bool {
        matches!(self.method, Method::HeatHub | Method::HeatAndChill)
    }

    /// Whether the shaft is chilled.
    pub fn chills(&self) -> bool {
        matches!(self.method, Method::ChillShaft | Method::HeatAndChill)
    }
}

/// At which pairs the smoothing loss is taken.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum SmoothingAt {
    /// Lost at the loosest and the mean pair, kept at the tightest.
    Loosest,
    /// Lost at every pair.
    Both,
    /// Kept at every pair.
    None,
}

/// Loss of interference by smoothing.
#[derive(Debug, Clone, PartialEq)]
pub struct Smoothing {
    /// Full diametral loss of each fit, m, from the rule and the two roughnesses.
    pub loss: Vec<f64>,
    /// Share of (Rz shaft + Rz hub), when the rule is of that kind.
    pub factor: Option<f64>,
    /// The rule, with its source.
    pub rule: String,
    /// Where it is taken.
    pub at: SmoothingAt,
}

/// What must be met.
#[derive(Debug, Clone, PartialEq)]
pub struct Requirements {
    /// Least safety against slip at the loosest pair.
    pub slip_safety: f64,
    /// Least safety against yield of ductile parts at the tightest pair.
    pub yield_safety: f64,
    /// Least safety against fracture of brittle parts at the tightest pair.
    pub fracture_safety: f64,
    /// Greatest press-in force, N.
    pub press_force: Option<f64>,
    /// Whether the hub may yield by design.
    pub allow: Allow,
    /// Yield rule of the elastic-plastic hub.
    pub yield_rule: YieldRule,
}

/// A default that was taken because the file is silent.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct DefaultTaken {
    /// Key of the joint file, such as `friction.holding`.
    pub key: String,
    /// The value as it would be written in the file.
    pub value: String,
    /// Where the default comes from.
    pub source: String,
}
