//! The shop or a service state: temperatures with what follows from them, speed, pressures from outside.

use super::FindingsError;
use crate::joint::{DutyState, Joint, Ring};
use crate::mechanics::MechanicsError;
use crate::mechanics::ring::RingSection;
use crate::mechanics::temperature::mean_temperature;

/// What acts on the parts besides their interference.
#[derive(Debug, Clone, PartialEq, Default)]
pub(super) struct Condition {
    /// Free strain of each ring at its inner face.
    pub(super) strain: Vec<f64>,
    /// Rise of the free strain to the outer face; empty without a gradient.
    pub(super) rise: Vec<f64>,
    /// Temperature of each ring at its inner face, K.
    pub(super) temperatures: Vec<f64>,
    /// Rise of the temperature to the outer face, K; empty without a gradient.
    pub(super) temperature_rises: Vec<f64>,
    /// Angular speed, rad/s.
    pub(super) speed: f64,
    /// Pressure inside the innermost ring, Pa.
    pub(super) inner_pressure: f64,
    /// Pressure round the outermost ring, Pa.
    pub(super) outer_pressure: f64,
}

impl Condition {
    /// At rest, every part at this temperature (K).
    pub(super) fn at_rest(joint: &Joint, temperature: f64) -> Result<Self, FindingsError> {
        Self::resting(joint, vec![temperature; joint.rings.len()])
    }

    /// At rest, each part at its temperature (K), innermost first.
    pub(super) fn resting(joint: &Joint, temperatures: Vec<f64>) -> Result<Self, FindingsError> {
        Ok(Self { strain: free_strains(joint, &temperatures)?, temperatures, ..Self::default() })
    }

    /// A service state.
    pub(super) fn of_state(joint: &Joint, state: &DutyState) -> Result<Self, FindingsError> {
        let strain = free_strains(joint, &state.temperatures)?;
        let rise = if state.temperature_rises.is_empty() {
            Vec::new()
        } else {
            let outside = state.temperatures.iter().zip(&state.temperature_rises);
            let outside: Vec<f64> = outside.map(|(inner, rise)| inner + rise).collect();
            let outside = free_strains(joint, &outside)?;
            outside.iter().zip(&strain).map(|(outer, inner)| outer - inner).collect()
        };
        Ok(Self {
            strain,
            rise,
            temperatures: state.temperatures.clone(),
            temperature_rises: state.temperature_rises.clone(),
            speed: state.speed,
            inner_pressure: state.inner_pressure,
            outer_pressure: state.outer_pressure,
        })
    }
}

impl Condition {
    /// Section of a ring with Young's modulus at the mean temperature of that section.
    ///
    /// Stress is the elastic law at the current temperature: σ = E(T) (ε − ε_free). Interference and expansion are
    /// lengths and do not change with E. Across a radial gradient E is taken uniform, at the mean temperature over the
    /// section, which the growth of the free ring follows too. Against E at the temperature of each radius the contact
    /// pressure is then off by at most 0.3 of the difference of E between a face and the mean, and the hoop stress at the
    /// bore by at most that difference: 0.3 % and 0.9 % with up to 43 K across a hub of steel or aluminium
    /// (`tests/modulus_numerical.rs`).
    pub(super) fn warm(
        &self,
        index: usize,
        ring: &Ring,
        section: RingSection,
    ) -> Result<RingSection, FindingsError> {
        let Some(inner) = self.temperatures.get(index).copied() else { return Ok(section) };
        let rise = self.temperature_rises.get(index).copied().unwrap_or(0.0);
        let mean = mean_temperature(&section, inner, inner + rise)?;
        Ok(section.with_youngs_modulus(youngs_modulus(ring, mean)?)?)
    }

    /// Young's modulus of each ring in this condition, Pa, over its whole section.
    pub(super) fn youngs_moduli(&self, joint: &Joint) -> Result<Vec<f64>, FindingsError> {
        let rings = joint.rings.iter().enumerate();
        rings
            .map(|(index, ring)| {
                let whole = section(ring, ring.inner_diameter, ring.outer_diameter)?;
                Ok(self.warm(index, ring, whole)?.youngs_modulus())
            })
            .collect()
    }
}

/// Young's modulus of a ring at a temperature (K), Pa.
pub(super) fn youngs_modulus(ring: &Ring, temperature: f64) -> Result<f64, FindingsError> {
    ring.material
        .youngs_modulus_at(temperature)
        .map_err(|cause| FindingsError::Modulus { material: ring.material.name.clone(), cause })
}

/// Free thermal strain of each ring at its temperature.
pub(super) fn free_strains(joint: &Joint, temperatures: &[f64]) -> Result<Vec<f64>, FindingsError> {
    joint
        .rings
        .iter()
        .zip(temperatures)
        .map(|(ring, temperature)| {
            ring.material
                .expansion
                .strain(*temperature)
                .map_err(|cause| FindingsError::Expansion { material: ring.material.name.clone(), cause })
        })
        .collect()
}

/// A ring of these diameters, with its modulus at 20 °C.
pub(super) fn section(
    ring: &Ring,
    inner_diameter: f64,
    outer_diameter: f64,
) -> Result<RingSection, MechanicsError> {
    RingSection::new(
        0.5 * inner_diameter,
        0.5 * outer_diameter,
        ring.material.youngs_modulus.value,
        ring.material.poisson.value,
        ring.material.density.value,
    )
}
