//! Temperatures for joining hot or cold, without allocation.
//!
//! As [`Joining`](crate::assembly::joining::Joining): the same clearance, the same limits, the same answers to
//! rounding. The clearance wanted is turned into the strain that a part must reach, and that into a
//! temperature on its expansion curve.

use super::{KernelError, strain};
use crate::findings::bath_temperature;
use crate::joint::{Bath, Joint, Method};
use crate::material::Expansion;
use crate::numerics::root::bracketed;

/// Two parts that are to be joined hot or cold; the interference is given with each question.
#[derive(Debug, Clone, Copy)]
pub struct PlainJoining<'a> {
    diameter: f64,
    clearance: f64,
    shop_temperature: f64,
    hub: &'a Expansion,
    shaft: &'a Expansion,
    hub_shop_strain: f64,
    shaft_shop_strain: f64,
    hub_limit: Option<f64>,
    /// What the oven is set to, K; none: as hot as is needed.
    oven: Option<f64>,
}

/// A temperature (K) that a part must reach; none when its expansion curve ends before.
pub type Reached = Option<f64>;

impl<'a> PlainJoining<'a> {
    /// The joining of a joint of two rings.
    ///
    /// # Errors
    /// A joint that is not of two rings, a shop temperature outside an expansion curve.
    pub fn of(joint: &'a Joint) -> Result<Self, KernelError> {
        let [inner, outer] = joint.rings.as_slice() else {
            return Err(KernelError::NotTwoRings(joint.rings.len()));
        };
        let shop_temperature = joint.assembly.shop_temperature;
        let user = joint.assembly.hub_temperature_limit;
        let material = outer.material.max_temperature.as_ref().map(|limit| limit.value);
        let hub_limit = material.into_iter().chain(user).reduce(f64::min);
        let oven = joint.assembly.practice.oven_temperature.filter(|_| joint.assembly.heats());
        Ok(Self {
            diameter: joint.diameter,
            clearance: joint.assembly.clearance_to_open(),
            shop_temperature,
            hub: &outer.material.expansion,
            shaft: &inner.material.expansion,
            hub_shop_strain: strain(outer, shop_temperature)?,
            shaft_shop_strain: strain(inner, shop_temperature)?,
            hub_limit,
            oven,
        })
    }

    /// Highest temperature for the hub, K: the lowest of the material's, the user's and the oven's.
    pub fn hub_limit(&self) -> Option<f64> {
        self.hub_limit.into_iter().chain(self.oven).reduce(f64::min)
    }

    /// Whether a hub temperature was found and is allowed.
    pub fn allowed(&self, hub_temperature: Reached) -> bool {
        hub_temperature.is_some_and(|found| self.hub_limit.is_none_or(|limit| found <= limit))
    }

    /// Hub temperature (K) that opens the clearance over a shaft at shop temperature.
    pub fn heat_hub(&self, interference: f64) -> Reached {
        self.hub_over(interference, self.shaft_shop_strain)
    }

    /// Shaft temperature (K) that opens the clearance in a hub at shop temperature.
    pub fn chill_shaft(&self, interference: f64) -> Reached {
        if self.clear(interference, self.hub_shop_strain, self.shaft_shop_strain) {
            return Some(self.shop_temperature);
        }
        let target = (self.diameter * self.hub_shop_strain - interference - self.clearance)
            / (self.diameter + interference);
        first_reached(
            self.shaft,
            self.shaft.points().windows(2).rev().map(|pair| (pair[1], pair[0])),
            |strain| target - strain,
        )
    }

    /// Hub temperature (K) that is needed besides a bath for the shaft; shop temperature when the bath will do.
    pub fn hub_besides(&self, bath: Bath, interference: f64) -> Reached {
        let shaft_strain = self.bath_strain(bath)?;
        self.hub_over(interference, shaft_strain)
    }

    /// Whether a bath for the shaft alone opens the clearance.
    pub fn bath_alone(&self, bath: Bath, interference: f64) -> bool {
        self.bath_strain(bath)
            .is_some_and(|shaft_strain| self.clear(interference, self.hub_shop_strain, shaft_strain))
    }

    /// What the method has to reach and whether it can, as the verdict on assembly has it; a press has neither.
    ///
    /// The temperature is the hub's, or the shaft's when the method chills it alone.
    pub fn by_method(&self, method: Method, bath: Bath, interference: f64) -> Option<(Reached, bool)> {
        let too_hot = self.oven.filter(|oven| self.hub_limit.is_some_and(|limit| *oven > limit));
        let in_the_oven =
            |found: Reached| found.is_some_and(|found| self.oven.is_none_or(|oven| found <= oven));
        match method {
            Method::Press => None,
            Method::HeatHub | Method::HeatAndChill if too_hot.is_some() => Some((too_hot, false)),
            Method::HeatHub => {
                let found = self.heat_hub(interference);
                Some((found, self.allowed(found) && in_the_oven(found)))
            }
            Method::ChillShaft => Some((self.chill_shaft(interference), self.bath_alone(bath, interference))),
            Method::HeatAndChill => {
                let found = self.hub_besides(bath, interference).filter(|found| self.allowed(Some(*found)));
                Some((found, in_the_oven(found)))
            }
        }
    }

    fn bath_strain(&self, bath: Bath) -> Option<f64> {
        let temperature = bath_temperature(bath);
        let (low, high) = self.shaft.range();
        if !(low..=high).contains(&temperature) {
            return None;
        }
        self.shaft.strain(temperature).ok()
    }

    fn hub_over(&self, interference: f64, shaft_strain: f64) -> Reached {
        if self.clear(interference, self.hub_shop_strain, shaft_strain) {
            return Some(self.shop_temperature);
        }
        let target = shaft_strain + (self.clearance + interference * (1.0 + shaft_strain)) / self.diameter;
        first_reached(self.hub, self.hub.points().windows(2).map(|pair| (pair[0], pair[1])), |strain| {
            strain - target
        })
    }

    /// Whether the clearance wanted is open, c = D (ε_h − ε_s) − U (1 + ε_s).
    fn clear(&self, interference: f64, hub_strain: f64, shaft_strain: f64) -> bool {
        let open = self.diameter * (hub_strain - shaft_strain) - interference * (1.0 + shaft_strain);
        open >= self.clearance
    }
}

/// First temperature along the pieces of a curve at which `surplus` of the strain rises to zero.
fn first_reached(
    curve: &Expansion,
    pieces: impl Iterator<Item = ((f64, f64), (f64, f64))>,
    surplus: impl Fn(f64) -> f64,
) -> Reached {
    for ((from, from_strain), (to, to_strain)) in pieces {
        if surplus(from_strain) <= 0.0 && surplus(to_strain) >= 0.0 {
            let at = |temperature| curve.strain(temperature).map_or(f64::NAN, &surplus);
            return bracketed(at, from, to, 0.0).ok();
        }
    }
    None
}
