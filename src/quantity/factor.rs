//! Safety factors as printed.

use super::number;

/// A safety factor that was found, to two decimals, rounded down so that a printed figure never passes what the number
/// fails; from 100 on only that it is over 100.
///
/// # Example
/// ```
/// use hubgrip::quantity::factor_found;
/// assert_eq!(factor_found(1.9964), "1.99");
/// assert_eq!(factor_found(1.2), "1.20");
/// assert_eq!(factor_found(250.0), "over 100");
/// ```
pub fn factor_found(value: f64) -> String {
    if value >= 100.0 {
        "over 100".to_owned()
    } else {
        format!("{:.2}", (value * 100.0 + 1e-9).floor() / 100.0)
    }
}

/// A safety factor that is required, to two decimals or to as many as it was given with.
///
/// # Example
/// ```
/// use hubgrip::quantity::factor_required;
/// assert_eq!(factor_required(1.5), "1.50");
/// assert_eq!(factor_required(1.998), "1.998");
/// ```
pub fn factor_required(value: f64) -> String {
    let two = format!("{value:.2}");
    let is_all = two.parse::<f64>().is_ok_and(|read| (read - value).abs() < 1e-9);
    if is_all { two } else { number(value, 6) }
}
