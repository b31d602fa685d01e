//! Steam by IAPWS-IF97: the basic equation of region 2.
//!
//! Source: IAPWS R7-97(2012), "Revised Release on the IAPWS Industrial Formulation 1997 for the
//! Thermodynamic Properties of Water and Steam", equations 5 (edge of region 3) and 15 to 17, with the
//! coefficients of its tables 1, 10 and 11.

use super::iapws_if97::{
    GibbsDerivatives, HIGHEST_LIQUID_TEMPERATURE, HIGHEST_PRESSURE, LOWEST_TEMPERATURE, WaterState, saturation_pressure,
};

/// Highest temperature of region 2, K.
pub const HIGHEST_STEAM_TEMPERATURE: f64 = 1073.15;

/// Properties of steam (region 2).
///
/// `temperature` in K from 273.15 to 1073.15, `pressure` in Pa above zero and up to saturation, or beyond
/// 623.15 K up to the edge of region 3 and at most 100 MPa; `None` outside, so also where water at that
/// temperature and pressure is liquid.
pub fn steam(temperature: f64, pressure: f64) -> Option<WaterState> {
    if !(LOWEST_TEMPERATURE..=HIGHEST_STEAM_TEMPERATURE).contains(&temperature) {
        return None;
    }
    let highest_pressure = highest_pressure(temperature)?;
    if !(pressure > 0.0 && pressure <= highest_pressure) {
        return None;
    }
    let pi = pressure / 1.0e6;
    let tau = 540.0 / temperature;
    // The ideal-gas part starts with ln π.
    let mut gibbs =
        GibbsDerivatives { pi, tau, by_pi: 1.0 / pi, by_pi_pi: -1.0 / (pi * pi), ..GibbsDerivatives::default() };
    for (j, n) in IDEAL_GAS_TERMS {
        gibbs.add(n * tau.powi(j), (pi, 0, 1.0), (tau, j));
    }
    // At the hottest, 1073.15 K, this base is 0.0032: small but never zero.
    let base_tau = tau - 0.5;
    for (i, j, n) in RESIDUAL_TERMS {
        let value = n * pi.powi(i) * base_tau.powi(j);
        gibbs.add(value, (pi, i, 1.0), (base_tau, j));
    }
    gibbs.state(temperature, pressure)
}

/// Highest pressure (Pa) that region 2 reaches at `temperature` (K).
fn highest_pressure(temperature: f64) -> Option<f64> {
    if temperature <= HIGHEST_LIQUID_TEMPERATURE {
        saturation_pressure(temperature)
    } else {
        let edge = 348.05185628969 - 1.1671859879975 * temperature + 1.0192970039326e-3 * temperature * temperature;
        Some((edge * 1.0e6).min(HIGHEST_PRESSURE))
    }
}

/// Table 10 of the release: exponent J and coefficient n of each ideal-gas term.
const IDEAL_GAS_TERMS: [(i32, f64); 9] = [
    (0, -9.6927686500217),
    (1, 1.0086655968018e1),
    (-5, -5.608791128302e-3),
    (-4, 7.1452738081455e-2),
    (-3, -4.0710498223928e-1),
    (-2, 1.4240819171444),
    (-1, -4.383951131945),
    (2, -2.8408632460772e-1),
    (3, 2.1268463753307e-2),
];

/// Table 11 of the release: exponents I and J and coefficient n of each residual term.
const RESIDUAL_TERMS: [(i32, i32, f64); 43] = [
    (1, 0, -1.7731742473213e-3),
    (1, 1, -1.7834862292358e-2),
    (1, 2, -4.5996013696365e-2),
    (1, 3, -5.7581259083432e-2),
    (1, 6, -5.032527872793e-2),
    (2, 1, -3.3032641670203e-5),
    (2, 2, -1.8948987516315e-4),
    (2, 4, -3.9392777243355e-3),
    (2, 7, -4.3797295650573e-2),
    (2, 36, -2.6674547914087e-5),
    (3, 0, 2.0481737692309e-8),
    (3, 1, 4.3870667284435e-7),
    (3, 3, -3.227767723857e-5),
    (3, 6, -1.5033924542148e-3),
    (3, 35, -4.0668253562649e-2),
    (4, 1, -7.8847309559367e-10),
    (4, 2, 1.2790717852285e-8),
    (4, 3, 4.8225372718507e-7),
    (5, 7, 2.2922076337661e-6),
    (6, 3, -1.6714766451061e-11),
    (6, 16, -2.1171472321355e-3),
    (6, 35, -2.3895741934104e1),
    (7, 0, -5.905956432427e-18),
    (7, 11, -1.2621808899101e-6),
    (7, 25, -3.8946842435739e-2),
    (8, 8, 1.1256211360459e-11),
    (8, 36, -8.2311340897998),
    (9, 13, 1.9809712802088e-8),
    (10, 4, 1.0406965210174e-19),
    (10, 10, -1.0234747095929e-13),
    (10, 14, -1.0018179379511e-9),
    (16, 29, -8.0882908646985e-11),
    (16, 50, 1.0693031879409e-1),
    (18, 57, -3.3662250574171e-1),
    (20, 20, 8.9185845355421e-25),
    (20, 35, 3.0629316876232e-13),
    (20, 48, -4.2002467698208e-6),
    (21, 21, -5.9056029685639e-26),
    (22, 53, 3.7826947613457e-6),
    (23, 39, -1.2768608934681e-15),
    (24, 26, 7.3087610595061e-29),
    (24, 40, 5.5414715350778e-17),
    (24, 58, -9.436970724121e-7),
];

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;

    fn close(value: f64, printed: f64) {
        let relative = (value / printed - 1.0).abs();
        assert!(relative < 5.0e-9, "{value} is not {printed}");
    }

    /// Table 15 of R7-97(2012), and the α, κ and cv that the same states have in the iapws package 1.5.5.
    #[test]
    fn region_2_gives_the_verification_table() {
        let table = [
            (300.0, 0.0035e6, 0.394913866e2, 2549.91145e3, 1.91300162e3, 427.920172),
            (700.0, 0.0035e6, 0.923015898e2, 3335.68375e3, 2.08141274e3, 644.289068),
            (700.0, 30.0e6, 0.542946619e-2, 2631.49474e3, 10.3505092e3, 480.386523),
        ];
        for (temperature, pressure, volume, enthalpy, heat_capacity, sound) in table {
            let state = steam(temperature, pressure).unwrap();
            close(1.0 / state.density, volume);
            close(state.enthalpy, enthalpy);
            close(state.heat_capacity, heat_capacity);
            close(state.speed_of_sound, sound);
        }
        let cold = steam(300.0, 0.0035e6).unwrap();
        close(cold.thermal_expansion, 0.00337578289);
        close(cold.compressibility, 286.239651e-6);
        close(steam(700.0, 0.0035e6).unwrap().heat_capacity_at_constant_volume, 1.61978333e3);
    }

    #[test]
    fn outside_the_region_there_is_no_answer() {
        for (temperature, pressure) in [
            (300.0, 1.0e5),  // liquid
            (640.0, 25.0e6), // region 3
            (1074.0, 1.0e5),
            (900.0, 101.0e6),
            (400.0, 0.0),
            (400.0, -1.0),
            (f64::NAN, 1.0e5),
            (400.0, f64::NAN),
            (400.0, f64::INFINITY),
        ] {
            assert_eq!(steam(temperature, pressure), None, "{temperature} K, {pressure} Pa");
        }
        assert!(steam(1073.15, 100.0e6).is_some());
        assert!(steam(400.0, 1.0e-3).is_some());
    }
}
