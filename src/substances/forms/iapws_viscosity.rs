//! Viscosity of water and steam by the IAPWS formulation of 2008.
//!
//! Source: IAPWS R12-08, "Release on the IAPWS Formulation 2008 for the Viscosity of Ordinary Water
//! Substance", equations 10 to 12 with tables 1 and 2. The critical enhancement is left out (μ2 = 1), as
//! the release recommends for industrial use: it reaches 2 % only within 4 K of the critical temperature, at
//! densities near the critical.

/// Temperature that the formulation is reduced by, K (also of the conductivity formulation).
pub(super) const REFERENCE_TEMPERATURE: f64 = 647.096;
/// Density that the formulation is reduced by, kg/m³.
pub(super) const REFERENCE_DENSITY: f64 = 322.0;

/// Lowest temperature accepted, K: the coldest melting point of water.
const LOWEST_TEMPERATURE: f64 = 251.165;
/// Highest temperature of the release, K.
const HIGHEST_TEMPERATURE: f64 = 1173.15;
/// Highest density accepted, kg/m³: the densest state of the release's verification table.
const HIGHEST_DENSITY: f64 = 1200.0;

/// Whether transport properties are defined at `temperature` (K) and `density` (kg/m³).
pub(super) fn within_range(temperature: f64, density: f64) -> bool {
    (LOWEST_TEMPERATURE..=HIGHEST_TEMPERATURE).contains(&temperature) && (0.0..=HIGHEST_DENSITY).contains(&density)
}

/// Dynamic viscosity in Pa·s at `temperature` (K, 251.165 to 1173.15) and `density` (kg/m³, 0 to 1200).
pub fn viscosity(temperature: f64, density: f64) -> Option<f64> {
    if !within_range(temperature, density) {
        return None;
    }
    let reduced_temperature = temperature / REFERENCE_TEMPERATURE;
    let reduced_density = density / REFERENCE_DENSITY;

    let mut dilute = 0.0;
    for (power, coefficient) in (0..).zip(DILUTE_COEFFICIENTS) {
        dilute += coefficient / reduced_temperature.powi(power);
    }
    let dilute_viscosity = 100.0 * reduced_temperature.sqrt() / dilute;

    let (base_temperature, base_density) = (1.0 / reduced_temperature - 1.0, reduced_density - 1.0);
    let mut exponent = 0.0;
    for (i, j, coefficient) in DENSITY_TERMS {
        exponent += coefficient * base_temperature.powi(i) * base_density.powi(j);
    }
    let viscosity = 1.0e-6 * dilute_viscosity * (reduced_density * exponent).exp();
    viscosity.is_finite().then_some(viscosity)
}

/// Table 1 of the release: coefficients of the dilute gas.
const DILUTE_COEFFICIENTS: [f64; 4] = [1.67752, 2.20462, 0.6366564, -0.241605];

/// Table 2 of the release: power of the temperature term, power of the density term, coefficient.
const DENSITY_TERMS: [(i32, i32, f64); 21] = [
    (0, 0, 5.20094e-1),
    (1, 0, 8.50895e-2),
    (2, 0, -1.08374),
    (3, 0, -2.89555e-1),
    (0, 1, 2.22531e-1),
    (1, 1, 9.99115e-1),
    (2, 1, 1.88797),
    (3, 1, 1.26613),
    (5, 1, 1.20573e-1),
    (0, 2, -2.81378e-1),
    (1, 2, -9.06851e-1),
    (2, 2, -7.72479e-1),
    (3, 2, -4.89837e-1),
    (4, 2, -2.57040e-1),
    (0, 3, 1.61913e-1),
    (1, 3, 2.57399e-1),
    (0, 4, -3.25372e-2),
    (3, 4, 6.98452e-2),
    (4, 5, 8.72102e-3),
    (3, 6, -4.35673e-3),
    (5, 6, -5.93264e-4),
];

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;

    /// Table 4 of R12-08: temperature, density, viscosity in µPa·s with μ2 = 1.
    #[test]
    fn gives_the_verification_table() {
        let table = [
            (298.15, 998.0, 889.735100),
            (298.15, 1200.0, 1437.649467),
            (373.15, 1000.0, 307.883622),
            (433.15, 1.0, 14.538324),
            (433.15, 1000.0, 217.685358),
            (873.15, 1.0, 32.619287),
            (873.15, 100.0, 35.802262),
            (873.15, 600.0, 77.430195),
            (1173.15, 1.0, 44.217245),
            (1173.15, 100.0, 47.640433),
            (1173.15, 400.0, 64.154608),
        ];
        for (temperature, density, printed) in table {
            let value = viscosity(temperature, density).unwrap() * 1.0e6;
            assert!((value - printed).abs() < 1.0e-6, "{value} is not {printed} at {temperature} K");
        }
    }

    #[test]
    fn outside_the_range_there_is_no_answer() {
        for (temperature, density) in [
            (200.0, 998.0),
            (1200.0, 1.0),
            (300.0, -1.0),
            (300.0, 5000.0),
            (f64::NAN, 998.0),
            (300.0, f64::NAN),
            (300.0, f64::INFINITY),
        ] {
            assert_eq!(viscosity(temperature, density), None);
        }
    }
}
