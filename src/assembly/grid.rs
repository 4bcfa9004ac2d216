//! Finite volumes of a solid or hollow cylinder, over its radius and half its length.

use std::f64::consts::PI;

use super::conduction::{Body, Substance, Surroundings};
use super::film::Surface;
use super::integrator::HeatNetwork;

/// The cells of a cylinder: `radial` rings, each of `axial` cells from the middle plane to the end face.
///
/// Volumes and areas are those of the whole body: the two halves are alike.
pub(crate) struct CylinderGrid<'a> {
    substance: &'a Substance,
    surroundings: &'a Surroundings,
    radial_faces: Vec<f64>,
    axial_faces: Vec<f64>,
}

impl<'a> CylinderGrid<'a> {
    /// `radial` equal rings; when the ends exchange heat, `axial` cells that grow finer towards the end.
    pub(crate) fn new(
        body: &Body,
        substance: &'a Substance,
        surroundings: &'a Surroundings,
        radial: usize,
        axial: usize,
    ) -> Self {
        let (inner, outer) = (body.inner_diameter / 2.0, body.outer_diameter / 2.0);
        let half_length = body.length / 2.0;
        let part = |count: usize, index: usize| index as f64 / count as f64;
        Self {
            substance,
            surroundings,
            radial_faces: (0..=radial).map(|i| inner + (outer - inner) * part(radial, i)).collect(),
            axial_faces: (0..=axial).map(|j| half_length * (1.0 - (1.0 - part(axial, j)).powi(2))).collect(),
        }
    }

    fn rings(&self) -> usize {
        self.radial_faces.len() - 1
    }

    fn layers(&self) -> usize {
        self.axial_faces.len() - 1
    }

    fn middle_radius(&self, ring: usize) -> f64 {
        0.5 * (self.radial_faces[ring] + self.radial_faces[ring + 1])
    }

    fn middle_height(&self, layer: usize) -> f64 {
        0.5 * (self.axial_faces[layer] + self.axial_faces[layer + 1])
    }

    /// Length of a layer, both halves, m.
    fn layer_length(&self, layer: usize) -> f64 {
        2.0 * (self.axial_faces[layer + 1] - self.axial_faces[layer])
    }

    /// Area of a ring seen along the axis, both halves, m².
    fn ring_area(&self, ring: usize) -> f64 {
        2.0 * PI * (self.radial_faces[ring + 1].powi(2) - self.radial_faces[ring].powi(2))
    }

    pub(crate) fn volume(&self, cell: usize) -> f64 {
        let (ring, layer) = (cell / self.layers(), cell % self.layers());
        0.5 * self.ring_area(ring) * self.layer_length(layer)
    }

    /// Volume mean of a function of temperature.
    pub(crate) fn mean(&self, temperatures: &[f64], function: impl Fn(f64) -> f64) -> f64 {
        let (mut sum, mut volume) = (0.0, 0.0);
        for (cell, &temperature) in temperatures.iter().enumerate() {
            sum += self.volume(cell) * function(temperature);
            volume += self.volume(cell);
        }
        sum / volume
    }

    /// Temperature of the bore, or of the centre of a solid cylinder, in the middle plane.
    pub(crate) fn inner(&self, temperatures: &[f64]) -> f64 {
        self.in_middle_plane(|layer| {
            if self.radial_faces[0] > 0.0 {
                self.bore_surface(layer, temperatures).temperature
            } else {
                self.on_axis(temperatures[layer], temperatures[self.layers() + layer])
            }
        })
    }

    /// Temperature of the rim in the middle plane.
    pub(crate) fn outer(&self, temperatures: &[f64]) -> f64 {
        self.in_middle_plane(|layer| self.rim_surface(layer, temperatures).temperature)
    }

    /// Temperature of the end face at the centre, or at the bore.
    pub(crate) fn end(&self, temperatures: &[f64]) -> f64 {
        let [first, second] = [0, 1].map(|ring| self.end_surface(ring, temperatures).temperature);
        if self.radial_faces[0] > 0.0 { (3.0 * first - second) / 2.0 } else { self.on_axis(first, second) }
    }

    fn on_axis(&self, first: f64, second: f64) -> f64 {
        symmetric(self.middle_radius(0), first, self.middle_radius(1), second)
    }

    fn in_middle_plane(&self, value: impl Fn(usize) -> f64) -> f64 {
        if self.layers() == 1 {
            return value(0);
        }
        symmetric(self.middle_height(0), value(0), self.middle_height(1), value(1))
    }

    fn bore_surface(&self, layer: usize, temperatures: &[f64]) -> Surface {
        let inside = temperatures[layer];
        let way = self.middle_radius(0) - self.radial_faces[0];
        let conductance = self.substance.conductivity.value_held(inside) / way;
        self.surroundings.inner.surface(inside, conductance, self.surroundings.temperature)
    }

    fn rim_surface(&self, layer: usize, temperatures: &[f64]) -> Surface {
        let ring = self.rings() - 1;
        let inside = temperatures[ring * self.layers() + layer];
        let way = self.radial_faces[ring + 1] - self.middle_radius(ring);
        let conductance = self.substance.conductivity.value_held(inside) / way;
        self.surroundings.outer.surface(inside, conductance, self.surroundings.temperature)
    }

    fn end_surface(&self, ring: usize, temperatures: &[f64]) -> Surface {
        let layer = self.layers() - 1;
        let inside = temperatures[ring * self.layers() + layer];
        let way = self.axial_faces[layer + 1] - self.middle_height(layer);
        let conductance = self.substance.conductivity.value_held(inside) / way;
        self.surroundings.ends.surface(inside, conductance, self.surroundings.temperature)
    }
}

impl HeatNetwork for CylinderGrid<'_> {
    fn cells(&self) -> usize {
        self.rings() * self.layers()
    }

    fn bandwidth(&self) -> usize {
        self.layers()
    }

    fn content(&self, cell: usize, temperature: f64) -> f64 {
        self.volume(cell) * self.substance.density * self.substance.specific_heat.content(temperature)
    }

    fn capacity(&self, cell: usize, temperature: f64) -> f64 {
        self.volume(cell) * self.substance.density * self.substance.specific_heat.value_held(temperature)
    }

    fn for_each_link(&self, temperatures: &[f64], visit: &mut dyn FnMut(usize, usize, f64)) {
        let layers = self.layers();
        let conductivity = |one: usize, other: usize| {
            self.substance.conductivity.value_held(0.5 * (temperatures[one] + temperatures[other]))
        };
        for ring in 0..self.rings() {
            for layer in 0..layers {
                let cell = ring * layers + layer;
                if ring + 1 < self.rings() {
                    let area = 2.0 * PI * self.radial_faces[ring + 1] * self.layer_length(layer);
                    let way = self.middle_radius(ring + 1) - self.middle_radius(ring);
                    visit(cell, cell + layers, conductivity(cell, cell + layers) * area / way);
                }
                if layer + 1 < layers {
                    let way = self.middle_height(layer + 1) - self.middle_height(layer);
                    visit(cell, cell + 1, conductivity(cell, cell + 1) * self.ring_area(ring) / way);
                }
            }
        }
    }

    fn for_each_surface(&self, temperatures: &[f64], visit: &mut dyn FnMut(usize, f64, Surface)) {
        let (rings, layers) = (self.rings(), self.layers());
        for layer in 0..layers {
            let length = self.layer_length(layer);
            if self.radial_faces[0] > 0.0 {
                let area = 2.0 * PI * self.radial_faces[0] * length;
                visit(layer, area, self.bore_surface(layer, temperatures));
            }
            let area = 2.0 * PI * self.radial_faces[rings] * length;
            visit((rings - 1) * layers + layer, area, self.rim_surface(layer, temperatures));
        }
        for ring in 0..rings {
            visit(ring * layers + layers - 1, self.ring_area(ring), self.end_surface(ring, temperatures));
        }
    }
}

/// Value at zero of the parabola without a slope there through two points.
fn symmetric(first_at: f64, first: f64, second_at: f64, second: f64) -> f64 {
    let (near, far) = (first_at * first_at, second_at * second_at);
    (far * first - near * second) / (far - near)
}
