//! How the joint is put together: press curves, heating, chilling, and both shared.

use super::cold_bath::cold_bath;
use super::press_work::press_work;
use super::times::{self, Extent, Times};
use super::{AssemblyFindings, BathFindings, ConstantCoefficient, FindingsError, PairFindings, ThermalRoute};
use crate::assembly::bath_liquid::{ACETONE, ALCOHOL};
use crate::assembly::joining::{BathRoute, Joining, Obstacle, Route};
use crate::assembly::press::{self, PressCurve, PressInput};
use crate::joint::{Bath, Joint, Ring};
use crate::material::{REFERENCE_TEMPERATURE, media};
use crate::quantity::{Measure, UnitSystem, show};
use crate::tolerance::Extremes;

const CURVE_POINTS: usize = 120;

/// Assembly of the joint by every route; the plan says which one was asked for.
pub(super) fn assembly(
    joint: &Joint,
    extremes: &Extremes<PairFindings>,
    extent: Extent,
) -> Result<AssemblyFindings, FindingsError> {
    let pressing = joint.friction.pressing.value;
    let press = Extremes {
        loosest: press_curve(joint, &extremes.loosest, pressing.low)?,
        mean: press_curve(joint, &extremes.mean, 0.5 * (pressing.low + pressing.high))?,
        tightest: press_curve(joint, &extremes.tightest, pressing.high)?,
    };
    let (shaft, hub) = joint.joined_last();
    let hub_limit = hub_limit(joint, hub);
    let joining = Joining {
        diameter: joint.interface_diameter(joint.last_interface()),
        interference: extremes.tightest.interference + strained(joint, &extremes.tightest),
        clearance: joint.assembly.clearance_to_open(),
        hub: &hub.material.expansion,
        shaft: &shaft.material.expansion,
        shop_temperature: joint.assembly.shop_temperature,
        hub_limit: hub_limit.as_ref().map(|(limit, _)| *limit),
    };
    let words = Words { display: joint.display, hub: &hub.name, shaft: &shaft.name };
    // Dry ice in the form that was asked for.
    let ice = if joint.assembly.bath.is_dry_ice() { joint.assembly.bath } else { Bath::DryIce };
    let baths = [ice, Bath::LiquidNitrogen]
        .into_iter()
        .map(|bath| Ok(words.bath(bath, &joining.bath(bath_temperature(bath))?)))
        .collect::<Result<Vec<_>, FindingsError>>()?;
    let mut assembly = AssemblyFindings {
        press_rating: press::press_rating(press.tightest.peak_force),
        press,
        heat_hub: words.heat_hub(&joining.heat_hub(joint.assembly.shop_temperature)?),
        chill_shaft: words.chill_shaft(&joining.chill_shaft()?),
        baths,
        clearance: joining.clearance,
        needed: joining.needed()?.max(0.0),
        hub_limit,
        constant_coefficient: Vec::new(),
        times: Times::default(),
        cold_bath: None,
        earlier: Vec::new(),
        press_work: None,
        oil: None,
    };
    assembly.press_work = press_work(joint, extremes, &assembly, &joining)?;
    in_the_oven_and_bath(joint, extremes, &mut assembly, extent)?;
    Ok(assembly)
}

/// Times, amounts and the error of a constant coefficient, for a joint that is heated or chilled.
fn in_the_oven_and_bath(
    joint: &Joint,
    extremes: &Extremes<PairFindings>,
    assembly: &mut AssemblyFindings,
    extent: Extent,
) -> Result<(), FindingsError> {
    let to_part = |pair: &PairFindings| pair.interference + strained(joint, pair);
    let interference = (to_part(&extremes.loosest), to_part(&extremes.tightest));
    assembly.times = times::times(joint, assembly, interference, extent)?;
    if let Some(soak) = &assembly.times.shaft {
        match cold_bath(joint, soak)? {
            Ok(found) => assembly.cold_bath = Some(found),
            Err(gap) => assembly.times.gaps.push(gap),
        }
    }
    if let Some(handling) = &assembly.times.handling {
        let (shaft, hub) = joint.joined_last();
        let diameter = joint.interface_diameter(joint.last_interface());
        let shop = joint.assembly.shop_temperature;
        assembly.constant_coefficient =
            [(hub, handling.hub_temperature), (shaft, handling.shaft_temperature)]
                .into_iter()
                .filter(|(_, temperature)| (temperature - shop).abs() > 1.0)
                .filter_map(|(ring, temperature)| constant_coefficient(ring, temperature, diameter))
                .collect();
    }
    Ok(())
}

fn constant_coefficient(ring: &Ring, temperature: f64, diameter: f64) -> Option<ConstantCoefficient> {
    let expansion = &ring.material.expansion;
    let coefficient = expansion.mean_coefficient(REFERENCE_TEMPERATURE).ok()?;
    Some(ConstantCoefficient {
        part: ring.name.clone(),
        temperature,
        by_curve: diameter * expansion.strain(temperature).ok()?,
        by_coefficient: diameter * coefficient * (temperature - REFERENCE_TEMPERATURE),
    })
}

/// Overlap that the joints made before add at the interface joined last, m: they have grown what is inside it and shrunk what
/// is outside.
fn strained(joint: &Joint, pair: &PairFindings) -> f64 {
    if joint.rings.len() == 2 {
        return 0.0;
    }
    let (shaft, hub) = joint.joined_last();
    let shop = joint.assembly.shop_temperature;
    let strain = |ring: &Ring| ring.material.expansion.strain(shop).unwrap_or(0.0);
    let by_temperature = joint.interface_diameter(joint.last_interface()) * (strain(shaft) - strain(hub));
    pair.shop_interference - pair.effective_interference - by_temperature
}

fn press_curve(joint: &Joint, pair: &PairFindings, friction: f64) -> Result<PressCurve, FindingsError> {
    Ok(press::press_curve(
        &press_input(joint, pair.pressure, pair.shop_interference, friction),
        CURVE_POINTS,
    )?)
}

/// The pressing-in of one pair with its interference at the shop temperature, where it is pressed.
pub(super) fn press_input(joint: &Joint, pressure: f64, interference: f64, friction: f64) -> PressInput {
    PressInput {
        // Parts that only just part may have a pressure of rounding left.
        pressure: if interference > 0.0 { pressure } else { 0.0 },
        interference: interference.max(0.0),
        diameter: joint.interface_diameter(joint.last_interface()),
        length: joint.engaged_length(),
        friction,
        chamfer_angle: joint.assembly.chamfer_angle.value,
    }
}

/// Routes told in plain sentences.
struct Words<'a> {
    display: UnitSystem,
    hub: &'a str,
    shaft: &'a str,
}

impl Words<'_> {
    fn temperature(&self, kelvin: f64) -> String {
        show(Measure::Temperature, kelvin, self.display).to_string()
    }

    fn change(&self, metres: f64) -> String {
        show(Measure::Deviation, metres, self.display).to_string()
    }

    fn obstacle(&self, part: &str, obstacle: &Obstacle) -> String {
        match obstacle {
            Obstacle::CurveEnds { end, clearance, wanted } => format!(
                "the expansion data of the {part} end at {}, where the clearance is {} of the {} wanted",
                self.temperature(*end),
                self.change(*clearance),
                self.change(*wanted)
            ),
            Obstacle::AboveLimit { needed, limit } => format!(
                "the {part} would need {}, but must not go above {}",
                self.temperature(*needed),
                self.temperature(*limit)
            ),
        }
    }

    fn heat_hub(&self, route: &Route) -> ThermalRoute {
        let statement = match (&route.obstacle, route.temperature) {
            (Some(obstacle), _) => {
                format!("heating the {} alone cannot do it: {}", self.hub, self.obstacle(self.hub, obstacle))
            }
            (None, Some(temperature)) => {
                format!("heat the {} to at least {}", self.hub, self.temperature(temperature))
            }
            (None, None) => format!("no temperature of the {} was found", self.hub),
        };
        ThermalRoute { temperature: route.temperature, possible: route.possible(), statement }
    }

    fn chill_shaft(&self, route: &Route) -> ThermalRoute {
        let statement = match (&route.obstacle, route.temperature) {
            (Some(obstacle), _) => format!(
                "chilling the {} alone cannot do it: {}",
                self.shaft,
                self.obstacle(self.shaft, obstacle)
            ),
            (None, Some(temperature)) => {
                format!("chill the {} to at most {}", self.shaft, self.temperature(temperature))
            }
            (None, None) => format!("no temperature of the {} was found", self.shaft),
        };
        ThermalRoute { temperature: route.temperature, possible: route.possible(), statement }
    }

    fn bath(&self, bath: Bath, route: &BathRoute) -> BathFindings {
        let name = bath_name(bath);
        let hub = route.hub.as_ref();
        let statement = match (route.shrinkage, hub) {
            (None, _) => {
                let why = route.obstacle.as_ref().map(|obstacle| self.obstacle(self.shaft, obstacle));
                format!("{name} cannot be judged: {}", why.unwrap_or_default())
            }
            (Some(shrinkage), _) if route.alone => {
                format!(
                    "{name} gives {} of the {} needed: it clears alone",
                    self.change(shrinkage),
                    self.change(route.needed)
                )
            }
            (Some(shrinkage), hub) => {
                let besides = match hub.map(|hub| (&hub.obstacle, hub.temperature)) {
                    Some((None, Some(temperature))) => {
                        format!("heat the {} to at least {} as well", self.hub, self.temperature(temperature))
                    }
                    Some((Some(obstacle), _)) => {
                        format!(
                            "and heating the {} as well cannot do it: {}",
                            self.hub,
                            self.obstacle(self.hub, obstacle)
                        )
                    }
                    _ => "no hub temperature makes up the rest".to_owned(),
                };
                format!(
                    "{name} cannot do it alone, it gives {} of the {} needed: {besides}",
                    self.change(shrinkage),
                    self.change(route.needed)
                )
            }
        };
        BathFindings {
            bath,
            temperature: route.temperature,
            shrinkage: route.shrinkage,
            hub_temperature: hub.filter(|hub| hub.possible()).and_then(|hub| hub.temperature),
            alone: route.alone,
            statement,
        }
    }
}

/// The lower of the material's limit and the user's.
pub(super) fn hub_limit(joint: &Joint, hub: &Ring) -> Option<(f64, String)> {
    let material = hub
        .material
        .max_temperature
        .as_ref()
        .map(|limit| (limit.value, format!("limit of {}", hub.material.name)));
    let user =
        joint.assembly.hub_temperature_limit.map(|limit| (limit, "limit given in the joint file".to_owned()));
    material.into_iter().chain(user).reduce(|low, other| if other.0 < low.0 { other } else { low })
}

/// Temperature of a bath, K.
pub fn bath_temperature(bath: Bath) -> f64 {
    match bath {
        Bath::DryIce => media::dry_ice::TEMPERATURE.value,
        Bath::DryIceInAlcohol => ALCOHOL.temperature,
        Bath::DryIceInAcetone => ACETONE.temperature,
        Bath::LiquidNitrogen => media::liquid_nitrogen::TEMPERATURE.value,
    }
}

/// Name of a bath in a sentence.
pub fn bath_name(bath: Bath) -> &'static str {
    match bath {
        Bath::DryIce => "dry ice",
        Bath::DryIceInAlcohol => "dry ice in alcohol",
        Bath::DryIceInAcetone => "dry ice in acetone",
        Bath::LiquidNitrogen => "liquid nitrogen",
    }
}
