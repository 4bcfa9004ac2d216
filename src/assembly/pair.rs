//! A hub and the piece of shaft it goes over, as rings that exchange heat with the air and across the gap.

use std::f64::consts::PI;

use super::conduction::{Body, Substance};
use super::film::{Film, Surface};
use super::integrator::HeatNetwork;
use crate::material::Expansion;

/// One part of the pair in the air.
#[derive(Debug, Clone, Copy)]
pub(crate) struct PairPart<'a> {
    pub(crate) body: Body,
    pub(crate) substance: &'a Substance,
    pub(crate) expansion: &'a Expansion,
    /// Exchange with the air at the bore, the rim and the end faces.
    pub(crate) films: [&'a Film; 3],
}

/// What lies between the parts once they overlap.
#[derive(Debug, Clone, Copy)]
pub(crate) enum Gap {
    /// Gas of this conductivity, W/(m·K), in a gap as wide as the clearance.
    Gas(f64),
    /// Nothing: the parts press on each other.
    Contact,
}

/// Below this width the gap conducts no better, m: less than any roughness, so that contact is still reached.
const LEAST_GAP: f64 = 1e-9;

/// Shaft rings first, then hub rings.
///
/// Along the axis each ring has one temperature, so the end faces take heat from all rings: their Biot number
/// in air, h L/(2k), is far below 0.1.
pub(crate) struct Pair<'a> {
    pub(crate) shaft: PairPart<'a>,
    pub(crate) hub: PairPart<'a>,
    pub(crate) diameter: f64,
    pub(crate) interference: f64,
    pub(crate) air: f64,
    /// None while the parts are apart.
    pub(crate) gap: Option<Gap>,
    /// Rings of each part.
    pub(crate) rings: usize,
}

/// One part as rings: faces, and the index of its first cell.
struct Rings<'p, 'a> {
    part: &'p PairPart<'a>,
    count: usize,
    first: usize,
}

impl Rings<'_, '_> {
    fn face(&self, index: usize) -> f64 {
        let (inner, outer) = (self.part.body.inner_diameter / 2.0, self.part.body.outer_diameter / 2.0);
        inner + (outer - inner) * index as f64 / self.count as f64
    }

    fn middle(&self, ring: usize) -> f64 {
        0.5 * (self.face(ring) + self.face(ring + 1))
    }

    fn area(&self, ring: usize) -> f64 {
        PI * (self.face(ring + 1).powi(2) - self.face(ring).powi(2))
    }

    fn conductivity(&self, temperature: f64) -> f64 {
        self.part.substance.conductivity.value_held(temperature)
    }

    /// Conductance from the middle of a ring to a face, W/(m²·K).
    fn to_face(&self, ring: usize, face: usize, temperature: f64) -> f64 {
        self.conductivity(temperature) / (self.face(face) - self.middle(ring)).abs()
    }

    fn mean(&self, temperatures: &[f64], function: impl Fn(f64) -> f64) -> f64 {
        let (mut sum, mut area) = (0.0, 0.0);
        for ring in 0..self.count {
            sum += self.area(ring) * function(temperatures[self.first + ring]);
            area += self.area(ring);
        }
        sum / area
    }

    /// Area mean of the expansion strain; the curve is held at its ends for iterates just outside.
    fn strain(&self, temperatures: &[f64]) -> f64 {
        let expansion = self.part.expansion;
        let (from, to) = expansion.range();
        self.mean(temperatures, |t| expansion.strain(t.clamp(from, to)).unwrap_or(f64::NAN))
    }
}

impl<'a> Pair<'a> {
    fn shaft_rings(&self) -> Rings<'_, 'a> {
        Rings { part: &self.shaft, count: self.rings, first: 0 }
    }

    fn hub_rings(&self) -> Rings<'_, 'a> {
        Rings { part: &self.hub, count: self.rings, first: self.rings }
    }

    /// Temperatures of all rings with each part at one temperature.
    pub(crate) fn uniform(&self, shaft: f64, hub: f64) -> Vec<f64> {
        let mut temperatures = vec![shaft; self.rings];
        temperatures.resize(2 * self.rings, hub);
        temperatures
    }

    /// Area means of shaft and hub, K.
    pub(crate) fn means(&self, temperatures: &[f64]) -> (f64, f64) {
        (self.shaft_rings().mean(temperatures, |t| t), self.hub_rings().mean(temperatures, |t| t))
    }

    /// Diametral clearance from the area means of the expansion strains, m.
    pub(crate) fn clearance(&self, temperatures: &[f64]) -> f64 {
        let (shaft, hub) = (self.shaft_rings().strain(temperatures), self.hub_rings().strain(temperatures));
        self.diameter * (hub - shaft) - self.interference * (1.0 + shaft)
    }

    fn length(&self) -> f64 {
        self.hub.body.length
    }

    /// Conductance from the middle of the outermost shaft ring to that of the innermost hub ring, W/K.
    fn across(&self, gap: Gap, temperatures: &[f64]) -> f64 {
        let width = (self.clearance(temperatures) / 2.0).max(LEAST_GAP);
        let last = self.rings - 1;
        let shaft = self.shaft_rings().to_face(last, self.rings, temperatures[last]);
        let hub = self.hub_rings().to_face(0, 0, temperatures[self.rings]);
        let between = match gap {
            Gap::Gas(conductivity) => width / conductivity,
            Gap::Contact => 0.0,
        };
        let resistance = 1.0 / shaft + between + 1.0 / hub;
        PI * self.diameter * self.length() / resistance
    }
}

impl HeatNetwork for Pair<'_> {
    fn cells(&self) -> usize {
        2 * self.rings
    }

    fn bandwidth(&self) -> usize {
        1
    }

    fn content(&self, cell: usize, temperature: f64) -> f64 {
        let rings = if cell < self.rings { self.shaft_rings() } else { self.hub_rings() };
        let substance = rings.part.substance;
        rings.area(cell - rings.first)
            * self.length()
            * substance.density
            * substance.specific_heat.content(temperature)
    }

    fn capacity(&self, cell: usize, temperature: f64) -> f64 {
        let rings = if cell < self.rings { self.shaft_rings() } else { self.hub_rings() };
        let substance = rings.part.substance;
        rings.area(cell - rings.first)
            * self.length()
            * substance.density
            * substance.specific_heat.value_held(temperature)
    }

    fn for_each_link(&self, temperatures: &[f64], visit: &mut dyn FnMut(usize, usize, f64)) {
        for rings in [self.shaft_rings(), self.hub_rings()] {
            for ring in 0..rings.count - 1 {
                let cell = rings.first + ring;
                let mean = 0.5 * (temperatures[cell] + temperatures[cell + 1]);
                let way = rings.middle(ring + 1) - rings.middle(ring);
                let area = 2.0 * PI * rings.face(ring + 1) * self.length();
                visit(cell, cell + 1, rings.conductivity(mean) * area / way);
            }
        }
        if let Some(gap) = self.gap {
            visit(self.rings - 1, self.rings, self.across(gap, temperatures));
        }
    }

    fn for_each_surface(&self, temperatures: &[f64], visit: &mut dyn FnMut(usize, f64, Surface)) {
        let (shaft, hub, last) = (self.shaft_rings(), self.hub_rings(), self.rings - 1);
        let mut face = |rings: &Rings, ring: usize, face: usize, film: &Film| {
            let cell = rings.first + ring;
            let area = 2.0 * PI * rings.face(face) * self.length();
            if area > 0.0 && *film != Film::Insulated {
                let conductance = rings.to_face(ring, face, temperatures[cell]);
                visit(cell, area, film.surface(temperatures[cell], conductance, self.air));
            }
        };
        face(&shaft, 0, 0, self.shaft.films[0]);
        face(&hub, last, self.rings, self.hub.films[1]);
        if self.gap.is_none() {
            face(&shaft, last, self.rings, self.shaft.films[1]);
            face(&hub, 0, 0, self.hub.films[0]);
        }
        for rings in [&shaft, &hub] {
            let film = rings.part.films[2];
            if *film != Film::Insulated {
                for ring in 0..rings.count {
                    let cell = rings.first + ring;
                    // From the mean of a layer cooled on both faces to a face, quasi-steady: a sixth of its thickness.
                    let way = self.length() / 6.0;
                    let conductance = rings.conductivity(temperatures[cell]) / way;
                    let surface = film.surface(temperatures[cell], conductance, self.air);
                    visit(cell, 2.0 * rings.area(ring), surface);
                }
            }
        }
    }
}
