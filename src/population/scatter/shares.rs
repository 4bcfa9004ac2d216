//! Which tolerance matters most: shares of the variance.
//!
//! The interference that grips is a sum of independent parts, so its variance is the sum of theirs, exactly. The
//! capacity is the product of that sum, of μ and of 1/C, all independent; its first-order shares are
//! Var(E[T | one part])/Var(T), and what is left over acts jointly.
//!
//! Both leave aside that a grip ends at zero.
//!
//! Source: I. M. Sobol', *Sensitivity Estimates for Nonlinear Mathematical Models*, Mathematical Modelling and
//! Computational Experiment 1 (1993) 407–414.

use super::model::Model;
use crate::population::integration::law::Law;

/// Share of one quantity in the variance.
#[derive(Debug, Clone, PartialEq)]
pub struct Share {
    /// What scatters.
    pub of: &'static str,
    /// Share of the variance of the effective interference; none when it has no part in it.
    pub interference: Option<f64>,
    /// First-order share of the variance of the torque capacity.
    pub torque: f64,
}

/// Shares of all that scatters, the greatest in the torque capacity first; what acts jointly is the rest to 1.
pub fn shares(model: &Model) -> Vec<Share> {
    let population = &model.population;
    let factor = if model.loss_when_holding { model.smoothing_factor } else { 0.0 };
    let parts = [
        ("hole", population.hole.sd()),
        ("shaft", population.shaft.sd()),
        ("hub roughness", factor * population.hub_roughness.sd()),
        ("shaft roughness", factor * population.shaft_roughness.sd()),
    ];
    let loss = factor * (population.hub_roughness.mean() + population.shaft_roughness.mean());
    let grip = population.shaft.mean() - population.hole.mean() - loss + model.shop_thermal;
    let grip_variance: f64 = parts.iter().map(|(_, sd)| sd * sd).sum();
    let (friction, friction_variance) = (population.friction.mean(), population.friction.sd().powi(2));

    let (hub, shaft) = (Law::of(&population.hub_modulus), Law::of(&population.shaft_modulus));
    let given_hub = |e: f64, power: i32| shaft.expect(&[], |s| model.compliance(e, s).powi(-power));
    let given_shaft = |e: f64| hub.expect(&[], |h| 1.0 / model.compliance(h, e));
    let stiffness = hub.expect(&[], |e| given_hub(e, 1));
    let stiffness_square = hub.expect(&[], |e| given_hub(e, 2));
    let hub_variance = hub.expect(&[], |e| (given_hub(e, 1) - stiffness).powi(2));
    let shaft_variance = shaft.expect(&[], |e| (given_shaft(e) - stiffness).powi(2));

    let square = |mean: f64, variance: f64| mean * mean + variance;
    let torque_variance =
        square(grip, grip_variance) * square(friction, friction_variance) * stiffness_square
            - (grip * friction * stiffness).powi(2);
    let of_torque = |variance: f64, others: f64| {
        if torque_variance > 0.0 { variance * others * others / torque_variance } else { 0.0 }
    };
    let mut all: Vec<Share> = parts
        .into_iter()
        .filter(|(_, sd)| *sd > 0.0)
        .map(|(of, sd)| Share {
            of,
            interference: Some(sd * sd / grip_variance),
            torque: of_torque(sd * sd, friction * stiffness),
        })
        .collect();
    for (of, variance, others) in [
        ("friction", friction_variance, grip * stiffness),
        ("hub Young's modulus", hub_variance, grip * friction),
        ("shaft Young's modulus", shaft_variance, grip * friction),
    ] {
        let torque = of_torque(variance, others);
        if torque > 1e-12 {
            all.push(Share { of, interference: None, torque });
        }
    }
    all.sort_by(|a, b| b.torque.total_cmp(&a.torque));
    all
}
