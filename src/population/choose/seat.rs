//! What a fit does to the bearing whose ring is fitted.

use crate::findings;
use crate::joint::{Fit, Joint, Method};
use crate::tolerance::FitLimits;

/// What a seat does to a bearing. Nothing of it is a requirement of the joint file, so no fit is left out for it.
#[derive(Debug, Clone, PartialEq)]
pub struct SeatEffect {
    /// Least radial internal clearance that is left after mounting and in every state, m; negative is preload.
    pub least_clearance: f64,
    /// Where that is: `after mounting`, or the name of the state.
    pub at: String,
    /// Hoop stress of greatest size in the ring at the tightest pair, Pa: tension in an inner ring.
    pub hoop_stress: f64,
}

impl SeatEffect {
    /// What limits do to the bearing of a joint; none when it has no bearing, or cannot be computed.
    pub(super) fn of(joint: &Joint, limits: &FitLimits) -> Option<Self> {
        joint.bearing.as_ref()?;
        let fit = Fit { callout: String::new(), limits: *limits, source: String::new() };
        let mut joint = Joint { fits: vec![fit], ..joint.clone() };
        // How the ring is mounted changes nothing of what is left, and heat would be followed for its time.
        joint.assembly.method = Method::Press;
        let findings = findings::compute(joint).ok()?;
        let bearing = findings.bearing.as_ref()?;
        let states = findings.joint.duty.iter().zip(&bearing.states);
        let all = states.map(|(state, found)| (found.left.low, state.name.as_str()));
        let (least_clearance, at) = std::iter::once((bearing.mounted.low, "after mounting"))
            .chain(all)
            .min_by(|a, b| a.0.total_cmp(&b.0))?;
        Some(Self { least_clearance, at: at.to_owned(), hoop_stress: bearing.hoop_stress.tightest })
    }
}
