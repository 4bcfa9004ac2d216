//! Everything that is computed about a joint, in one place, SI.

mod assembly_of;
mod bearing_of;
mod cautions;
pub mod cold_bath;
mod compute;
mod condition;
mod earlier;
mod envelope;
pub mod expression;
mod fatigue;
pub mod frost;
mod joining_cautions;
mod kernel;
mod modulus_notes;
pub mod oil;
pub mod press_work;
mod service;
mod service_cautions;
mod shaft_alone;
mod softening;
mod thermal_part;
pub mod times;
mod verdicts;
pub mod worksheet;

pub use assembly_of::{bath_name, bath_temperature};
pub use bearing_of::{BearingFindings, BearingState, HOOP_LIMIT, RING_LIMIT_SOURCE};
pub use cautions::criterion_source;
use cold_bath::ColdBathFindings;
pub(crate) use compute::seating_verdict;
pub use compute::{FindingsError, compute};
pub use earlier::EarlierJoint;
pub use envelope::{Envelope, EnvelopeLine, EnvelopeMeaning, EnvelopeState};
pub use fatigue::{Fatigue, PLAIN_SHARE, TESTED_DIAMETER, TESTED_NOTCH};
pub use kernel::after_smoothing;
use oil::OilFindings;
use press_work::PressWorkFindings;
pub use service::{
    GoverningRing, Loosening, OrderStep, PlasticFindings, ServiceFindings, ThinLiner, WornHub,
};
use times::Times;
pub use verdicts::{combination, failure};

pub use crate::assembly::cautions::Caution;
use crate::assembly::press::PressCurve;
use crate::joint::{Bath, Joint};
use crate::material::Range;
use crate::tolerance::{Character, Extremes};

/// All results for one joint. Lengths m, pressures and stresses Pa, forces N, torques N·m, temperatures K.
#[derive(Debug, Clone, PartialEq)]
pub struct Findings {
    /// The joint as understood.
    pub joint: Joint,
    /// Clearance, transition or interference fit.
    pub character: Character,
    /// The loosest, mean and tightest pair at the shop temperature, at rest.
    pub extremes: Extremes<PairFindings>,
    /// Each service state.
    pub duty: Vec<DutyFindings>,
    /// What speed, heat, yielding and order of assembly do.
    pub service: ServiceFindings,
    /// How it is put together.
    pub assembly: AssemblyFindings,
    /// What the seat does to the bearing, when a ring of one is fitted.
    pub bearing: Option<BearingFindings>,
    /// Onset of yield of the joint, when an elastic limit exists.
    pub onset_of_yield: Option<OnsetOfYield>,
    /// The three questions answered against the requirements.
    pub verdicts: Vec<Verdict>,
    /// What must be minded; each a full sentence.
    pub cautions: Vec<Caution>,
    /// Why a quantity does not exist, what is not covered; full sentences.
    pub notes: Vec<String>,
}

impl Findings {
    /// The derivation, line by line; worked when asked for, since most who ask for findings never print it.
    pub fn worksheet(&self) -> Vec<WorksheetSection> {
        worksheet::worksheet(self)
    }

    /// What is left of the pressure at speed and with a hot hub, of the loosest pair; drawn when asked for. None where it
    /// cannot be drawn: more than two rings, a stepped joint, a pair that does not grip.
    ///
    /// # Errors
    /// As [`compute`], which has found the same numbers before.
    pub fn envelope(&self) -> Result<Option<Envelope>, FindingsError> {
        let kernel = kernel::Kernel::new(&self.joint)?;
        let worn = self.service.plastic.as_ref().and_then(|plastic| plastic.worn.as_ref());
        let mut loosest = kernel::pair_interferences(&self.joint).loosest;
        loosest.shrink(worn.map_or(0.0, |worn| worn.loosest));
        let speed = self.service.loosening.first().and_then(|loosening| loosening.speed);
        envelope::envelope(&self.joint, &kernel, &loosest, &self.duty, speed)
    }
}

/// One pair of parts at the shop temperature, at rest.
#[derive(Debug, Clone, PartialEq)]
pub struct PairFindings {
    /// Diametral interference of the parts at 20 °C, m; negative is clearance.
    pub interference: f64,
    /// Loss by smoothing that was taken, m.
    pub smoothing: f64,
    /// Interference that grips, m; negative is clearance.
    pub effective_interference: f64,
    /// Interference that acts at the shop temperature, m: [`Self::effective_interference`] with the difference of free
    /// growth from 20 °C and, with more than two rings, what the joints made before strain the parts.
    pub shop_interference: f64,
    /// Contact pressure, Pa; zero when the pair has clearance.
    pub pressure: f64,
    /// Contact pressure had the smoothing loss been taken, Pa.
    pub pressure_smoothed: f64,
    /// Contact pressure had it been kept, Pa.
    pub pressure_unsmoothed: f64,
    /// Stress in each ring, innermost first; of a stepped joint, in the slice where it is greatest.
    pub rings: Vec<RingStress>,
    /// Each interface, from the innermost outwards.
    pub interfaces: Vec<InterfaceFindings>,
    /// The slices of a stepped joint; empty when it is of one section.
    pub slices: Vec<SliceFindings>,
    /// Torque at which the joint slips, N·m.
    pub torque_capacity: f64,
    /// Axial force at which it slips, N.
    pub axial_capacity: f64,
    /// Greatest force while pressing in, over the friction range, N.
    pub press_force: Range,
    /// Force at first movement when pushing out, over the friction range, N.
    pub release_force: Range,
}

/// Stress and safety of one ring.
#[derive(Debug, Clone, PartialEq)]
pub struct RingStress {
    /// Its inner face; the centre when it is solid.
    pub bore: FaceStress,
    /// Its outer face.
    pub rim: FaceStress,
    /// Equivalent stress that governs, Pa, by the criterion of its kind.
    pub equivalent: f64,
    /// Strength it is compared with, Pa.
    pub strength: Option<f64>,
    /// Strength over equivalent stress; none when nothing stresses the ring or no strength is known.
    pub safety: Option<f64>,
    /// Change of the inner diameter, m.
    pub bore_change: f64,
    /// Change of the outer diameter, m.
    pub outer_change: f64,
}

/// Stress at one face of a ring, Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct FaceStress {
    /// Radial stress.
    pub radial: f64,
    /// Hoop stress.
    pub hoop: f64,
    /// von Mises equivalent.
    pub von_mises: f64,
    /// Tresca equivalent.
    pub tresca: f64,
}

/// One service state at both extremes.
#[derive(Debug, Clone, PartialEq)]
pub struct DutyFindings {
    /// Young's modulus of each ring, Pa, at its temperature; with a radial gradient at the mean temperature over its section.
    pub youngs_moduli: Vec<f64>,
    /// The loosest pair.
    pub loosest: StateFindings,
    /// The tightest pair.
    pub tightest: StateFindings,
}

/// One pair in one service state.
#[derive(Debug, Clone, PartialEq)]
pub struct StateFindings {
    /// Contact pressure, Pa.
    pub pressure: f64,
    /// Torque at which it slips, N·m.
    pub torque_capacity: f64,
    /// Axial force at which it slips, N.
    pub axial_capacity: f64,
    /// Safety against slip; none when the state has neither torque nor axial force.
    pub slip_safety: Option<f64>,
    /// What bending does to the edges; none without bending moment and radial force.
    pub bending: Option<BendingFindings>,
    /// Each interface, from the innermost outwards.
    pub interfaces: Vec<InterfaceFindings>,
    /// Stress in each ring.
    pub rings: Vec<RingStress>,
}

/// One interface of a pair. With two rings there is one.
#[derive(Debug, Clone, PartialEq)]
pub struct InterfaceFindings {
    /// Its diameter, m.
    pub diameter: f64,
    /// Diametral interference as made, m.
    pub interference: f64,
    /// Diametral interference that grips, m.
    pub effective_interference: f64,
    /// Contact pressure, Pa; mean over the length of a stepped joint.
    pub pressure: f64,
    /// Diametral gap, m; zero where it is closed.
    pub gap: f64,
    /// Whether it is open.
    pub open: bool,
    /// Torque at which it slips, N·m.
    pub torque_capacity: f64,
    /// Axial force at which it slips, N.
    pub axial_capacity: f64,
}

/// One slice of a stepped joint.
#[derive(Debug, Clone, PartialEq)]
pub struct SliceFindings {
    /// Its length, m.
    pub length: f64,
    /// Outer diameter of the hub there, m.
    pub hub_outer_diameter: f64,
    /// Bore of the shaft there, m.
    pub shaft_bore: f64,
    /// Contact pressure, Pa.
    pub pressure: f64,
    /// Stress in both parts.
    pub rings: Vec<RingStress>,
}

/// What bending does to the pressure at the edges of the seat.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct BendingFindings {
    /// Change of pressure at the edges, Pa.
    pub edge_change: f64,
    /// Least pressure at an edge, Pa, of a stepped joint that of the weaker end; negative means that it gapes.
    pub least_edge: f64,
    /// Greatest pressure at an edge, Pa.
    pub greatest_edge: f64,
    /// Bending moment at which an edge begins to gape, N·m.
    pub limiting_moment: f64,
    /// Ring of a stepped joint that is nearest to its strength at a loaded edge, with its safety there: that of its slice, by
    /// the rise of the pressure.
    pub weakest: Option<(usize, f64)>,
}

/// Where the first ring starts to yield (or break, when brittle).
#[derive(Debug, Clone, PartialEq)]
pub struct OnsetOfYield {
    /// Index of the ring.
    pub ring: usize,
    /// Contact pressure at onset, Pa.
    pub pressure: f64,
    /// Effective diametral interference at onset at the shop temperature, m.
    pub interference: f64,
}

/// How the joint is put together; all routes are computed, the plan says which was asked for.
#[derive(Debug, Clone, PartialEq)]
pub struct AssemblyFindings {
    /// Press force along the travel: loosest pair at the low friction, tightest at the high.
    pub press: Extremes<PressCurve>,
    /// Press rating to look for, N.
    pub press_rating: f64,
    /// Heating the hub alone.
    pub heat_hub: ThermalRoute,
    /// Chilling the shaft alone: the temperature it would need.
    pub chill_shaft: ThermalRoute,
    /// Each bath: what it gives and what hub temperature is needed besides.
    pub baths: Vec<BathFindings>,
    /// Clearance needed while joining, m.
    pub clearance: f64,
    /// Change of diameter needed of the tightest pair, interference plus clearance, m.
    pub needed: f64,
    /// Highest temperature for the hub, K, with the reason.
    pub hub_limit: Option<(f64, String)>,
    /// What one room-temperature coefficient would say in place of the curves.
    pub constant_coefficient: Vec<ConstantCoefficient>,
    /// Soak and handling times of the method asked for.
    pub times: Times,
    /// The cold bath of the method asked for.
    pub cold_bath: Option<ColdBathFindings>,
    /// The joints of several rings that are made before the last one; empty with two rings.
    pub earlier: Vec<EarlierJoint>,
    /// Around the press, and after it; none when no pair grips.
    pub press_work: Option<PressWorkFindings>,
    /// Oil injection; none when no pair grips.
    pub oil: Option<OilFindings>,
}

/// What the coefficient at 20 °C would say of a part in place of its expansion curve.
#[derive(Debug, Clone, PartialEq)]
pub struct ConstantCoefficient {
    /// Name of the part.
    pub part: String,
    /// Temperature, K.
    pub temperature: f64,
    /// Change of diameter from 20 °C by the curve, m.
    pub by_curve: f64,
    /// The same by the coefficient at 20 °C, m.
    pub by_coefficient: f64,
}

/// One thermal route.
#[derive(Debug, Clone, PartialEq)]
pub struct ThermalRoute {
    /// Temperature the part must reach, K; none when its curve ends before.
    pub temperature: Option<f64>,
    /// Whether it is within the limit of the material and of the expansion curve.
    pub possible: bool,
    /// Plain statement of what it takes or why it cannot be.
    pub statement: String,
}

/// What one bath does for the tightest pair.
#[derive(Debug, Clone, PartialEq)]
pub struct BathFindings {
    /// The bath.
    pub bath: Bath,
    /// Its temperature, K.
    pub temperature: f64,
    /// Diametral shrinkage of the shaft in it from shop temperature, m; none when the curve ends before.
    pub shrinkage: Option<f64>,
    /// Hub temperature that is needed as well, K; shop temperature when none.
    pub hub_temperature: Option<f64>,
    /// Whether the bath alone clears.
    pub alone: bool,
    /// Plain statement.
    pub statement: String,
}

/// Which of the three questions.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Question {
    /// Does it hold?
    Hold,
    /// Does it keep its strength?
    Strength,
    /// How is it assembled?
    Assembly,
}

/// Unit of a verdict's numbers.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum VerdictUnit {
    /// A safety factor.
    Safety,
    /// Force, N.
    Force,
    /// Temperature, K.
    Temperature,
    /// A share of the whole, 0 to 1.
    Share,
    /// Time, s.
    Time,
}

/// One requirement with what was found.
#[derive(Debug, Clone, PartialEq)]
pub struct Verdict {
    /// The question it belongs to.
    pub question: Question,
    /// What is judged, such as `slip safety`.
    pub subject: String,
    /// The requirement; none when nothing was required.
    pub required: Option<f64>,
    /// What was found; none when it does not exist.
    pub found: Option<f64>,
    /// Unit of both.
    pub unit: VerdictUnit,
    /// Whether it is met.
    pub ok: bool,
    /// At which pair and state.
    pub at: String,
}

/// A part of the worksheet.
#[derive(Debug, Clone, PartialEq)]
pub struct WorksheetSection {
    /// Heading.
    pub title: String,
    /// Lines in order.
    pub lines: Vec<WorksheetLine>,
}

/// One line: symbol = formula = numbers = result with unit · source.
#[derive(Debug, Clone, PartialEq)]
pub struct WorksheetLine {
    /// Symbol that the line defines.
    pub symbol: expression::Symbol,
    /// What the symbol means.
    pub meaning: String,
    /// The formula; none when the symbol is an input.
    pub formula: Option<expression::Expression>,
    /// The printed value, exactly as printed.
    pub printed: String,
    /// Unit as printed; empty for a pure number.
    pub unit: String,
    /// Source of the formula or of the input.
    pub source: String,
}
