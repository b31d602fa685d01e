//! Temperature at which water freezes under pressure (ordinary ice, Ih).
//!
//! Source: IAPWS R14-08(2011), "Revised Release on the Pressure along the Melting and Sublimation Curves of
//! Ordinary Water Substance", equation 1.

/// Triple point of water: temperature, K.
pub const TRIPLE_TEMPERATURE: f64 = 273.16;
/// Triple point of water: pressure, Pa.
pub const TRIPLE_PRESSURE: f64 = 611.657;
/// Coldest temperature at which liquid water and ice Ih meet, K.
pub const LOWEST_MELTING_TEMPERATURE: f64 = 251.165;

/// Halvings of the temperature interval: 22 K over 2^60 is below the spacing of numbers near 273.
const HALVINGS: usize = 60;

/// Pressure in Pa at which ice Ih melts at `temperature` (K, from 251.165 to 273.16).
pub fn melting_pressure(temperature: f64) -> Option<f64> {
    if !(LOWEST_MELTING_TEMPERATURE..=TRIPLE_TEMPERATURE).contains(&temperature) {
        return None;
    }
    let theta = temperature / TRIPLE_TEMPERATURE;
    let sum = 1.0
        + 0.119539337e7 * (1.0 - theta.powi(3))
        + 0.808183159e5 * (1.0 - theta.powf(25.75))
        + 0.333826860e4 * (1.0 - theta.powf(103.75));
    Some(sum * TRIPLE_PRESSURE)
}

/// Temperature in K at which water freezes at `pressure` (Pa, from 611.657 to about 208.6 MPa). The melting
/// pressure falls steadily with temperature, so halving the interval finds it.
pub fn melting_temperature(pressure: f64) -> Option<f64> {
    let highest_pressure = melting_pressure(LOWEST_MELTING_TEMPERATURE)?;
    if !(TRIPLE_PRESSURE..=highest_pressure).contains(&pressure) {
        return None;
    }
    let (mut cold, mut warm) = (LOWEST_MELTING_TEMPERATURE, TRIPLE_TEMPERATURE);
    for _ in 0..HALVINGS {
        let middle = 0.5 * (cold + warm);
        if melting_pressure(middle)? > pressure {
            cold = middle;
        } else {
            warm = middle;
        }
    }
    Some(0.5 * (cold + warm))
}

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;

    /// Table 3 of R14-08(2011): 138.268 MPa at 260 K.
    #[test]
    fn gives_the_verification_value() {
        let value = melting_pressure(260.0).unwrap() / 1.0e6;
        assert!((value - 138.268).abs() < 5.0e-4, "{value}");
        let back = melting_temperature(138.268e6).unwrap();
        assert!((back - 260.0).abs() < 1.0e-4, "{back}");
    }

    /// Under one atmosphere air-free water freezes at 273.1525 K (Feistel and Wagner 2006; recalled).
    #[test]
    fn freezes_at_zero_celsius_under_one_atmosphere() {
        let value = melting_temperature(101_325.0).unwrap();
        assert!((value - 273.1525).abs() < 2.0e-4, "{value}");
    }

    #[test]
    fn outside_the_range_there_is_no_answer() {
        for pressure in [0.0, -1.0, 600.0, 300.0e6, f64::NAN, f64::INFINITY] {
            assert_eq!(melting_temperature(pressure), None);
        }
        for temperature in [200.0, 273.17, f64::NAN] {
            assert_eq!(melting_pressure(temperature), None);
        }
    }
}
