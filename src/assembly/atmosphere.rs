//! What the gas of a cold bath does to the air of the room.

use super::error::{AssemblyError, not_negative, positive, require};

/// Volume share of oxygen in dry air (ISO 2533, Standard Atmosphere).
pub const OXYGEN_IN_AIR: f64 = 0.2095;

/// Below this share air counts as deficient in oxygen: 0.195 (29 CFR 1910.134, clause from memory; a convention
/// with margin).
pub const OXYGEN_WARNING: f64 = 0.195;

/// Alarm level of gas practice in Europe: 0.18 (from memory).
pub const OXYGEN_ALARM: f64 = 0.18;

/// Limit for carbon dioxide over eight hours: 5000 ppm (usual occupational limit).
pub const CARBON_DIOXIDE_LIMIT: f64 = 0.005;

/// Limit for carbon dioxide over fifteen minutes: 15 000 ppm (one regulator; another allows 30 000 ppm, from memory).
pub const CARBON_DIOXIDE_SHORT_LIMIT: f64 = 0.015;

/// How an oxygen share is judged.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum OxygenLevel {
    /// Below [`OXYGEN_ALARM`].
    Alarm,
    /// Below [`OXYGEN_WARNING`].
    Deficient,
    /// Not below [`OXYGEN_WARNING`].
    Sufficient,
}

/// Judges a volume share of oxygen.
///
/// # Example
/// ```
/// use hubgrip::assembly::atmosphere::{OxygenLevel, oxygen_level};
/// assert_eq!(oxygen_level(0.1833), OxygenLevel::Deficient);
/// ```
pub fn oxygen_level(share: f64) -> OxygenLevel {
    if share >= OXYGEN_WARNING {
        OxygenLevel::Sufficient
    } else if share >= OXYGEN_ALARM {
        OxygenLevel::Deficient
    } else {
        OxygenLevel::Alarm
    }
}

/// Oxygen left when the gas pushes its own volume of air out of a closed room: the one to warn by.
///
/// C = 0.2095 (1 − V_g/V)
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | V | volume of the room | m³ | > 0 |
/// | V_g | gas set free, at room temperature | m³ | 0 … V |
///
/// The room is taken as mixed; near the floor and in pits it is worse, because the cold gas is heavier than air.
///
/// Source: oxygen-depletion formula of compressed-gas codes of practice for liquid nitrogen.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::atmosphere::oxygen_after_displacement;
/// assert!((oxygen_after_displacement(40.0, 5.0).unwrap() - 0.1833125).abs() < 1e-12);
/// ```
pub fn oxygen_after_displacement(room: f64, gas: f64) -> Result<f64, AssemblyError> {
    check(room, gas)?;
    require(gas <= room, "gas set free (m³)", gas, "no more than the volume of the room")?;
    Ok(OXYGEN_IN_AIR * (1.0 - gas / room))
}

/// Oxygen left when the gas mixes with the room air as it comes, and the mixture leaves.
///
/// C = 0.2095 exp(−V_g/V), with the symbols of [`oxygen_after_displacement`]. It is never less than by displacement.
///
/// Source: balance of a stirred room.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
pub fn oxygen_after_mixing(room: f64, gas: f64) -> Result<f64, AssemblyError> {
    check(room, gas)?;
    Ok(OXYGEN_IN_AIR * (-gas / room).exp())
}

/// Oxygen after `time` in a ventilated, mixed room into which gas flows steadily.
///
/// C = C_∞ + (0.2095 − C_∞) exp(−(Q_a + q) t/V),  C_∞ = 0.2095 Q_a/(Q_a + q)
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | V | volume of the room | m³ | > 0 |
/// | Q_a | fresh air | m³/s | ≥ 0 |
/// | q | gas | m³/s | > 0 |
/// | t | time since the gas began | s | ≥ 0; infinite for the steady state |
///
/// Source: balance of a stirred room.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// Five cubic metres in ten minutes into 40 m³ with two air changes an hour:
/// ```
/// use hubgrip::assembly::atmosphere::oxygen_ventilated;
/// let share = oxygen_ventilated(40.0, 2.0 * 40.0 / 3600.0, 5.0 / 600.0, 600.0).unwrap();
/// assert!((share - 0.188493054).abs() < 1e-9);
/// ```
pub fn oxygen_ventilated(room: f64, air: f64, gas: f64, time: f64) -> Result<f64, AssemblyError> {
    positive("volume of the room (m³)", room)?;
    not_negative("fresh air (m³/s)", air)?;
    positive("gas (m³/s)", gas)?;
    require(time >= 0.0, "time (s)", time, "zero or more")?;
    let steady = OXYGEN_IN_AIR * air / (air + gas);
    Ok(steady + (OXYGEN_IN_AIR - steady) * (-(air + gas) * time / room).exp())
}

/// Fresh air that keeps oxygen at or above `share` for ever while gas flows steadily, m³/s.
///
/// Q_a = q C/(0.2095 − C), from the steady state of [`oxygen_ventilated`].
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::atmosphere::{OXYGEN_WARNING, air_needed, oxygen_ventilated};
/// let air = air_needed(0.01, OXYGEN_WARNING).unwrap();
/// let steady = oxygen_ventilated(40.0, air, 0.01, f64::INFINITY).unwrap();
/// assert!((steady - OXYGEN_WARNING).abs() < 1e-15);
/// ```
pub fn air_needed(gas: f64, share: f64) -> Result<f64, AssemblyError> {
    not_negative("gas (m³/s)", gas)?;
    require(share > 0.0 && share < OXYGEN_IN_AIR, "share of oxygen", share, "between 0 and 0.2095")?;
    Ok(gas * share / (OXYGEN_IN_AIR - share))
}

/// Share of carbon dioxide when the gas of dry ice mixes with the air of a closed room, 1 − exp(−V_g/V).
///
/// Symbols as in [`oxygen_after_displacement`]; the 0.04 % that air holds is left out. Compare with
/// [`CARBON_DIOXIDE_LIMIT`], not with an oxygen limit: carbon dioxide harms long before oxygen is short.
///
/// Source: balance of a stirred room; EIGA Doc 150, Dry ice.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// One kilogram of dry ice, 0.54 m³ of gas, passes the eight-hour limit even in 100 m³:
/// ```
/// use hubgrip::assembly::atmosphere::{CARBON_DIOXIDE_LIMIT, carbon_dioxide_share};
/// assert!(carbon_dioxide_share(100.0, 0.54).unwrap() > CARBON_DIOXIDE_LIMIT);
/// ```
pub fn carbon_dioxide_share(room: f64, gas: f64) -> Result<f64, AssemblyError> {
    check(room, gas)?;
    Ok(-(-gas / room).exp_m1())
}

fn check(room: f64, gas: f64) -> Result<(), AssemblyError> {
    positive("volume of the room (m³)", room)?;
    not_negative("gas set free (m³)", gas)?;
    Ok(())
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    /// V = 40 m³, 5 m³ of gas; 5 m³ in 600 s with two air changes an hour: balances by hand.
    #[test]
    fn oxygen_in_a_small_workshop() {
        assert_relative_eq!(oxygen_after_displacement(40.0, 5.0).unwrap(), 0.183_312_5, max_relative = 1e-12);
        assert_relative_eq!(oxygen_after_mixing(40.0, 5.0).unwrap(), 0.184_883_101, max_relative = 1e-8);
        let ventilated = oxygen_ventilated(40.0, 80.0 / 3600.0, 5.0 / 600.0, 600.0).unwrap();
        assert_relative_eq!(ventilated, 0.188_493_054, max_relative = 1e-8);
    }

    /// Ten litres of liquid nitrogen spilled in a closed room of 30 m³: 700 litres of gas a litre (university safety
    /// policy) leave 16.1 % oxygen.
    #[test]
    fn a_spill_of_ten_litres() {
        assert_relative_eq!(oxygen_after_displacement(30.0, 7.0).unwrap(), 0.161, max_relative = 3e-3);
        assert_eq!(oxygen_level(0.161), OxygenLevel::Alarm);
        assert_eq!(oxygen_level(OXYGEN_WARNING), OxygenLevel::Sufficient);
    }

    #[test]
    fn ventilated_room_tends_to_mixing_without_air() {
        let without = oxygen_ventilated(40.0, 0.0, 5.0 / 600.0, 600.0).unwrap();
        assert_relative_eq!(without, oxygen_after_mixing(40.0, 5.0).unwrap(), max_relative = 1e-12);
        assert!(oxygen_after_displacement(40.0, 41.0).is_err());
        assert!(oxygen_after_mixing(0.0, 1.0).is_err());
        assert!(oxygen_ventilated(40.0, 1.0, 0.0, 1.0).is_err());
        assert!(air_needed(1.0, 0.21).is_err());
    }
}
