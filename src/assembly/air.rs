//! Conductivity of air, in a gap and round a part.

/// Conductivity of air, temperature (K) and W/(m·K): F. P. Incropera and D. P. DeWitt, *Fundamentals of Heat and Mass
/// Transfer*, table A.4 (from memory).
const TABLE: [(f64, f64); 11] = [
    (100.0, 9.34e-3),
    (150.0, 13.8e-3),
    (200.0, 18.1e-3),
    (250.0, 22.3e-3),
    (300.0, 26.3e-3),
    (350.0, 30.0e-3),
    (400.0, 33.8e-3),
    (450.0, 37.3e-3),
    (500.0, 40.7e-3),
    (550.0, 43.9e-3),
    (600.0, 46.9e-3),
];

/// Conductivity of air at a temperature (K), W/(m·K).
///
/// Linear between the rows of the table, 100 K to 600 K, and the end of it beyond. At atmospheric pressure. Source:
/// Incropera and DeWitt, table A.4 (from memory).
///
/// # Example
/// ```
/// use hubgrip::assembly::air::air_conductivity;
/// assert!((air_conductivity(350.0) - 0.030).abs() < 1e-12);
/// assert!((air_conductivity(275.0) - 0.0243).abs() < 1e-12);
/// assert_eq!(air_conductivity(700.0), 46.9e-3);
/// ```
pub fn air_conductivity(temperature: f64) -> f64 {
    let between = TABLE.windows(2).find_map(|rows| {
        let [(low, from), (high, to)] = rows else { return None };
        let inside = (*low..=*high).contains(&temperature);
        inside.then(|| from + (to - from) * (temperature - low) / (high - low))
    });
    let [(coldest, least), .., (_, greatest)] = TABLE;
    between.unwrap_or(if temperature < coldest { least } else { greatest })
}
