//! Oil pressed between the seats: what floats the hub, how far the seats part, what the hub carries meanwhile.

use super::error::{AssemblyError, not_negative, positive, require};
use crate::material::Range;

/// Oil pressure over contact pressure that floats a hub in practice: 1.1 to 1.5 (textbooks on shrink joints, from memory;
/// DIN 15055 on oil-pressure joints of rolling mills goes the same way, from memory). The edges of the seat press harder
/// than its middle, and some of the pressure is lost along the film.
pub const OIL_OVER_CONTACT: Range = Range { low: 1.1, high: 1.5 };

/// Where [`OIL_OVER_CONTACT`] comes from.
pub const OIL_SOURCE: &str = "1.1 to 1.5 times the contact pressure: textbooks on shrink joints and DIN 15055, oil-pressure joints (from memory)";

/// What is planned with: a fifth over the contact pressure (common practice, no source).
pub const OIL_PLANNED: f64 = 1.2;

/// How far the seats part on the diameter under oil, m.
///
/// While a film carries the whole seat it presses both parts as the contact did, with p_o in place of p. The parts give way
/// in a straight line, so that the seats part by
///
/// δ_o = (p_o − p) f,  f = U/p
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | p_o | oil pressure | Pa | ≥ p: below it the seats still touch |
/// | p | contact pressure | Pa | ≥ 0 |
/// | f | interference for each pascal of pressure | m/Pa | > 0 |
///
/// Elastic parts, one pressure along the seat, no flow.
///
/// Source: equilibrium of the film with both parts; Lamé.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// 50 µm at 75 MPa, oil at 90 MPa:
/// ```
/// use hubgrip::assembly::oil::film_opening;
/// let film = film_opening(75e6, 90e6, 50e-6 / 75e6).unwrap();
/// assert!((film - 10e-6).abs() < 1e-15);
/// ```
pub fn film_opening(contact: f64, oil: f64, give: f64) -> Result<f64, AssemblyError> {
    not_negative("contact pressure (Pa)", contact)?;
    positive("interference for each pascal (m/Pa)", give)?;
    require(
        oil >= contact,
        "oil pressure (Pa)",
        oil,
        "at least the contact pressure: below it the seats still touch",
    )?;
    Ok((oil - contact) * give)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn oil_below_the_contact_floats_nothing() {
        assert!(film_opening(75e6, 74e6, 1e-12).is_err());
        assert!(film_opening(75e6, 75e6, 0.0).is_err());
        assert_eq!(film_opening(75e6, 75e6, 1e-12).unwrap(), 0.0);
    }
}
