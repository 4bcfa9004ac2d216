//! Growth of a von Mises hub by integrating the flow rule numerically in radius and zone, from its stresses alone.

use hubgrip::mechanics::plastic::von_mises::VonMisesHub;

use super::STEEL;

/// Central steps of the differences, as shares of the zone's radius.
const STEP: f64 = 2e-5;

struct Rates {
    hub: VonMisesHub,
    zone: f64,
}

impl Rates {
    /// Rate of the elastic strain (radial, hoop) with the zone at a fixed radius, from inside the zone.
    fn elastic_strain(&self, radius: f64) -> [f64; 2] {
        let step = STEP * self.zone;
        let strain = |zone: f64| {
            let stress = self.hub.stress_at(zone, radius).unwrap();
            let (e, nu) = (STEEL.youngs_modulus, STEEL.poisson);
            [(stress.radial - nu * stress.hoop) / e, (stress.hoop - nu * stress.radial) / e]
        };
        let (here, near, far) = (strain(self.zone), strain(self.zone + step), strain(self.zone + 2.0 * step));
        [0, 1].map(|part: usize| (4.0 * near[part] - 3.0 * here[part] - far[part]) / (2.0 * step))
    }

    /// Rate of u at the edge of the zone, from the elastic outside.
    fn edge_velocity(&self) -> f64 {
        let step = STEP * self.zone;
        let displacement = |zone: f64| {
            let stress = self.hub.stress_at(zone, self.zone).unwrap();
            self.zone * (stress.hoop - STEEL.poisson * stress.radial) / STEEL.youngs_modulus
        };
        let (here, near, far) =
            (displacement(self.zone), displacement(self.zone - step), displacement(self.zone - 2.0 * step));
        (3.0 * here - 4.0 * near + far) / (2.0 * step)
    }

    /// dv/dr = ε̇r^e + (n_r/n_φ) (v/r − ε̇φ^e), n_r = 2 σr − σφ, n_φ = 2 σφ − σr.
    fn slope(&self, radius: f64, velocity: f64) -> f64 {
        let stress = self.hub.stress_at(self.zone, radius).unwrap();
        let flow = (2.0 * stress.radial - stress.hoop) / (2.0 * stress.hoop - stress.radial);
        let elastic = self.elastic_strain(radius);
        elastic[0] + flow * (velocity / radius - elastic[1])
    }

    /// Rate of u at the bore r = 1, by the classical Runge-Kutta method inwards from the edge.
    fn bore_velocity(&self) -> f64 {
        let steps = 40;
        let step = (1.0 - self.zone) / f64::from(steps);
        let mut velocity = self.edge_velocity();
        for index in 0..steps {
            let radius = self.zone + f64::from(index) * step;
            // The last steps end on the bore itself; rounding must not carry them beyond it.
            let end = (radius + step).max(1.0);
            let k1 = self.slope(radius.min(self.zone * (1.0 - 1e-15)), velocity);
            let k2 = self.slope(radius + 0.5 * step, velocity + 0.5 * step * k1);
            let k3 = self.slope(radius + 0.5 * step, velocity + 0.5 * step * k2);
            let k4 = self.slope(end, velocity + step * k3);
            velocity += step * (k1 + 2.0 * (k2 + k3) + k4) / 6.0;
        }
        velocity
    }
}

/// Growth of u(a)/a between two zones, by Simpson's rule over the zone.
fn growth(hub: VonMisesHub, from: f64, to: f64) -> f64 {
    let intervals = 20;
    let velocity = |zone: f64| Rates { hub, zone }.bore_velocity();
    let width = (to - from) / f64::from(intervals);
    (0..intervals)
        .map(|index| {
            let start = from + width * f64::from(index);
            let (left, middle, right) =
                (velocity(start), velocity(start + 0.5 * width), velocity(start + width));
            width * (left + 4.0 * middle + right) / 6.0
        })
        .sum()
}

// Both agree within the error of the differences here, about 1e-8.
#[test]
fn growth_follows_the_flow_rule() {
    for (ratio, from, to) in
        [(0.5, 1.05, 1.6), (0.5, 1.3, 1.9), (0.8, 1.02, 1.2), (0.3, 1.1, 1.7), (0.15, 1.1, 1.5)]
    {
        let hub = VonMisesHub::new(300e6, ratio).unwrap();
        let bore = |zone: f64| hub.bore_strain(zone, STEEL).unwrap();
        let (found, expected) = (bore(to) - bore(from), growth(hub, from, to));
        assert!((found / expected - 1.0).abs() < 2e-8, "{ratio} {from} {to}: {found} {expected}");
    }
}
