//! Thermal conductivity of water and steam by the IAPWS formulation of 2011, with its critical
//! enhancement in the form for industrial use.
//!
//! Source: IAPWS R15-11, "Release on the IAPWS Formulation 2011 for the Thermal Conductivity of Ordinary
//! Water Substance", equations 15 to 26 with tables 1, 2, 3 and 6.

use std::f64::consts::PI;

use super::iapws_if97::{CRITICAL_PRESSURE, WaterState};
use super::iapws_viscosity::{REFERENCE_DENSITY, REFERENCE_TEMPERATURE, viscosity, within_range};

/// Thermal conductivity in W/(m·K) at `temperature` (K) of water or steam in the thermodynamic `state` that it
/// has there. `None` outside 251.165 to 1173.15 K or above 1200 kg/m³.
pub fn conductivity(temperature: f64, state: &WaterState) -> Option<f64> {
    let background = background_conductivity(temperature, state.density)?;
    let viscosity = viscosity(temperature, state.density)?;
    let total = background + critical_enhancement(temperature, state, viscosity);
    total.is_finite().then_some(total)
}

/// Conductivity in W/(m·K) without the critical enhancement, at `temperature` (K) and `density` (kg/m³).
pub fn background_conductivity(temperature: f64, density: f64) -> Option<f64> {
    if !within_range(temperature, density) {
        return None;
    }
    let reduced_temperature = temperature / REFERENCE_TEMPERATURE;
    let reduced_density = density / REFERENCE_DENSITY;

    let mut dilute = 0.0;
    for (power, coefficient) in (0..).zip(DILUTE_COEFFICIENTS) {
        dilute += coefficient / reduced_temperature.powi(power);
    }
    let dilute_conductivity = reduced_temperature.sqrt() / dilute;

    let (base_temperature, base_density) = (1.0 / reduced_temperature - 1.0, reduced_density - 1.0);
    let mut exponent = 0.0;
    for (i, row) in (0..).zip(DENSITY_COEFFICIENTS) {
        exponent += base_temperature.powi(i) * polynomial(&row, base_density);
    }
    let conductivity = 1.0e-3 * dilute_conductivity * (reduced_density * exponent).exp();
    conductivity.is_finite().then_some(conductivity)
}

/// What the nearness of the critical point adds, W/(m·K): equations 18 to 26. It is nothing in liquid water
/// below 100 °C, 0.2 % of the whole in the liquid at 200 °C and 20 bar, and grows from there.
fn critical_enhancement(temperature: f64, state: &WaterState, viscosity: f64) -> f64 {
    let reduced_temperature = temperature / REFERENCE_TEMPERATURE;
    let reduced_density = state.density / REFERENCE_DENSITY;
    let reduced_compressibility = state.density * state.compressibility * CRITICAL_PRESSURE / REFERENCE_DENSITY;
    let excess = reduced_density
        * (reduced_compressibility - reference_compressibility(reduced_density) * 1.5 / reduced_temperature);
    if excess <= 0.0 {
        return 0.0;
    }
    let correlation_length = 0.13 * (excess / 0.06_f64).powf(0.630 / 1.239); // nm
    let y = correlation_length / 0.40;
    if y < 1.2e-7 {
        return 0.0;
    }
    let inverse_ratio = state.heat_capacity_at_constant_volume / state.heat_capacity;
    let crossover = 2.0 / (PI * y)
        * ((1.0 - inverse_ratio) * y.atan() + inverse_ratio * y
            - (1.0 - (-1.0 / (1.0 / y + y * y / (3.0 * reduced_density * reduced_density))).exp()));
    let reduced_heat_capacity = state.heat_capacity / 461.51805;
    let reduced_viscosity = viscosity * 1.0e6;
    1.0e-3 * 177.8514 * reduced_density * reduced_heat_capacity * reduced_temperature / reduced_viscosity * crossover
}

/// Reduced derivative of density by pressure at 1.5 times the critical temperature: equation 25.
fn reference_compressibility(reduced_density: f64) -> f64 {
    let [a, b, c, d, e] = REFERENCE_COMPRESSIBILITY;
    let row = if reduced_density <= 0.310559006 {
        a
    } else if reduced_density <= 0.776397516 {
        b
    } else if reduced_density <= 1.242236025 {
        c
    } else if reduced_density <= 1.863354037 {
        d
    } else {
        e
    };
    1.0 / polynomial(&row, reduced_density)
}

/// Sum of `coefficients[i] * x^i`.
fn polynomial(coefficients: &[f64], x: f64) -> f64 {
    coefficients.iter().rev().fold(0.0, |sum, c| sum * x + c)
}

/// Table 1 of the release: coefficients of the dilute gas.
const DILUTE_COEFFICIENTS: [f64; 5] = [2.443221e-3, 1.323095e-2, 6.770357e-3, -3.454586e-3, 4.096266e-4];

/// Table 2 of the release: a row for each power of the temperature term, a column for each of the density term.
const DENSITY_COEFFICIENTS: [[f64; 6]; 5] = [
    [1.60397357, -0.646013523, 0.111443906, 0.102997357, -0.0504123634, 0.00609859258],
    [2.33771842, -2.78843778, 1.53616167, -0.463045512, 0.0832827019, -0.00719201245],
    [2.19650529, -4.54580785, 3.55777244, -1.40944978, 0.275418278, -0.0205938816],
    [-1.21051378, 1.60812989, -0.621178141, 0.0716373224, 0.0, 0.0],
    [-2.7203370, 4.57586331, -3.18369245, 1.1168348, -0.19268305, 0.012913842],
];

/// Table 6 of the release: a row for each range of density.
const REFERENCE_COMPRESSIBILITY: [[f64; 6]; 5] = [
    [6.53786807199516, -5.61149954923348, 3.39624167361325, -2.27492629730878, 10.2631854662709, 1.97815050331519],
    [6.52717759281799, -6.30816983387575, 8.08379285492595, -9.82240510197603, 12.1358413791395, -5.54349664571295],
    [5.35500529896124, -3.96415689925446, 8.91990208918795, -12.0338729505790, 9.19494865194302, -2.16866274479712],
    [1.55225959906681, 0.464621290821181, 8.93237374861479, -11.0321960061126, 6.16780999933360, -0.965458722086812],
    [1.11999926419994, 0.595748562571649, 9.88952565078920, -10.3255051147040, 4.66861294457414, -0.503243546373828],
];

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::super::iapws_if97::liquid;
    use super::super::iapws_if97_steam::steam;
    use super::*;

    /// Table 4 of R15-11: temperature, density, conductivity in mW/(m·K) with λ2 = 0.
    #[test]
    fn background_gives_the_verification_table() {
        let table = [
            (298.15, 0.0, 18.4341883),
            (298.15, 998.0, 607.712868),
            (298.15, 1200.0, 799.038144),
            (873.15, 0.0, 79.1034659),
        ];
        for (temperature, density, printed) in table {
            let value = background_conductivity(temperature, density).unwrap() * 1.0e3;
            assert!((value / printed - 1.0).abs() < 5.0e-9, "{value} is not {printed}");
        }
    }

    /// Table 5 of R15-11, at 647.35 K. The states there are those of IAPWS-95, read from the iapws package 1.5.5
    /// (density; heat capacities at constant pressure and volume in J/(kg·K); derivative of density by pressure in
    /// kg/(m³·MPa); viscosity in Pa·s). The table takes the reference compressibility from IAPWS-95 too, while
    /// equation 25 fits it, so the states nearest to the critical point differ by up to 2e-4.
    #[test]
    fn enhancement_gives_the_verification_table() {
        let table = [
            (1.0, 2069.0812064568445, 1595.6990729197903, 3.377406739465491, 2.3377752122053447e-05, 51.9298924),
            (122.0, 11353.470032452045, 3243.791325724296, 17.10930848910934, 2.552067683647617e-05, 130.922885),
            (222.0, 101243.301964791, 4523.436913569457, 175.45698097222572, 3.133758919727548e-05, 367.787459),
            (272.0, 794916.0384973817, 5491.264195750882, 1508.2800389174552, 3.622814313612671e-05, 757.959776),
            (322.0, 5420611.272142669, 6188.749461187982, 12136.419490290928, 4.296157881023444e-05, 1443.75556),
            (372.0, 500237.65192503924, 5181.40664244077, 1245.9172043669446, 4.5688204474707416e-05, 650.319402),
            (422.0, 62663.67284339692, 3904.379773638148, 130.39353796525097, 4.943625601494997e-05, 448.883487),
            (750.0, 4570.62456517307, 2833.6557941038977, 1.0510776327652136, 9.401498317589303e-05, 600.961346),
        ];
        for (density, at_pressure, at_volume, by_pressure, viscosity, printed) in table {
            let state = WaterState {
                density,
                enthalpy: 0.0,
                heat_capacity: at_pressure,
                heat_capacity_at_constant_volume: at_volume,
                thermal_expansion: 0.0,
                compressibility: by_pressure * 1.0e-6 / density,
                speed_of_sound: 0.0,
            };
            let value = 1.0e3
                * (background_conductivity(647.35, density).unwrap() + critical_enhancement(647.35, &state, viscosity));
            assert!((value / printed - 1.0).abs() < 2.0e-4, "{value} is not {printed}");
        }
    }

    /// Tables 7 and 8 of R15-11: the whole chain for industrial use, IAPWS-IF97 regions 1 and 2.
    #[test]
    fn industrial_form_gives_the_verification_tables() {
        for (temperature, pressure, printed) in [(620.0, 20.0e6, 481.485195), (620.0, 50.0e6, 545.038940)] {
            let state = liquid(temperature, pressure).unwrap();
            let value = conductivity(temperature, &state).unwrap() * 1.0e3;
            assert!((value / printed - 1.0).abs() < 5.0e-9, "{value} is not {printed}");
        }
        for (temperature, pressure, printed) in [(650.0, 0.3e6, 52.2311024), (800.0, 50.0e6, 177.709914)] {
            let state = steam(temperature, pressure).unwrap();
            let value = conductivity(temperature, &state).unwrap() * 1.0e3;
            assert!((value / printed - 1.0).abs() < 5.0e-9, "{value} is not {printed}");
        }
    }

    #[test]
    fn outside_the_range_there_is_no_answer() {
        for (temperature, density) in
            [(200.0, 998.0), (1200.0, 1.0), (300.0, -1.0), (f64::NAN, 998.0), (300.0, f64::NAN)]
        {
            assert_eq!(background_conductivity(temperature, density), None);
        }
    }
}
