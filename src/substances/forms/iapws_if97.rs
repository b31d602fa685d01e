//! Liquid water by IAPWS-IF97: the basic equation of region 1 and the saturation line of region 4.
//!
//! Source: IAPWS R7-97(2012), "Revised Release on the IAPWS Industrial Formulation 1997 for the
//! Thermodynamic Properties of Water and Steam", equations 7 (region 1), 30 and 31 (region 4), with the
//! coefficients of its tables 2 and 34.

/// Specific gas constant of water in IAPWS-IF97, J/(kg·K).
const GAS_CONSTANT: f64 = 461.526;

/// Lowest temperature of IAPWS-IF97, K.
pub const LOWEST_TEMPERATURE: f64 = 273.15;
/// Highest temperature of region 1, K.
pub const HIGHEST_LIQUID_TEMPERATURE: f64 = 623.15;
/// Highest pressure of regions 1 and 2, Pa.
pub const HIGHEST_PRESSURE: f64 = 100.0e6;
/// Critical temperature, K.
pub const CRITICAL_TEMPERATURE: f64 = 647.096;
/// Critical pressure, Pa.
pub const CRITICAL_PRESSURE: f64 = 22.064e6;

/// Thermodynamic properties of water in one phase at a temperature and a pressure.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct WaterState {
    /// Density, kg/m³.
    pub density: f64,
    /// Specific enthalpy, J/kg (zero internal energy for the liquid at the triple point).
    pub enthalpy: f64,
    /// Specific heat capacity at constant pressure, J/(kg·K).
    pub heat_capacity: f64,
    /// Specific heat capacity at constant volume, J/(kg·K).
    pub heat_capacity_at_constant_volume: f64,
    /// Thermal expansion (1/v)(∂v/∂T) at constant pressure, 1/K; negative for liquid below 4 °C.
    pub thermal_expansion: f64,
    /// Compressibility −(1/v)(∂v/∂p) at constant temperature, 1/Pa.
    pub compressibility: f64,
    /// Speed of sound, m/s.
    pub speed_of_sound: f64,
}

/// Derivatives of the dimensionless Gibbs energy γ(π, τ), where π is the reduced pressure and τ the
/// inverse reduced temperature.
#[derive(Debug, Clone, Copy, Default)]
pub(super) struct GibbsDerivatives {
    pub(super) pi: f64,
    pub(super) tau: f64,
    pub(super) by_pi: f64,
    pub(super) by_pi_pi: f64,
    pub(super) by_tau: f64,
    pub(super) by_tau_tau: f64,
    pub(super) by_pi_tau: f64,
}

impl GibbsDerivatives {
    /// Adds one term with value `value` that goes as `base_pi^i * base_tau^j`. `pi_sign` is the derivative
    /// of `base_pi` by π.
    pub(super) fn add(&mut self, value: f64, pi: (f64, i32, f64), tau: (f64, i32)) {
        let (base_pi, i, pi_sign) = (pi.0, f64::from(pi.1), pi.2);
        let (base_tau, j) = (tau.0, f64::from(tau.1));
        self.by_pi += pi_sign * value * i / base_pi;
        self.by_pi_pi += value * i * (i - 1.0) / (base_pi * base_pi);
        self.by_tau += value * j / base_tau;
        self.by_tau_tau += value * j * (j - 1.0) / (base_tau * base_tau);
        self.by_pi_tau += pi_sign * value * i * j / (base_pi * base_tau);
    }

    /// Properties from the derivatives: tables 3 and 12 of the release, which are the same relations.
    pub(super) fn state(&self, temperature: f64, pressure: f64) -> Option<WaterState> {
        let g = self;
        let volume = GAS_CONSTANT * temperature / pressure * g.pi * g.by_pi;
        let slope = g.by_pi - g.tau * g.by_pi_tau;
        let curvature = g.tau * g.tau * g.by_tau_tau;
        let sound_squared = GAS_CONSTANT * temperature * g.by_pi * g.by_pi / (slope * slope / curvature - g.by_pi_pi);
        let state = WaterState {
            density: 1.0 / volume,
            enthalpy: GAS_CONSTANT * temperature * g.tau * g.by_tau,
            heat_capacity: -GAS_CONSTANT * curvature,
            heat_capacity_at_constant_volume: GAS_CONSTANT * (slope * slope / g.by_pi_pi - curvature),
            thermal_expansion: slope / (g.by_pi * temperature),
            compressibility: -g.pi * g.by_pi_pi / (g.by_pi * pressure),
            speed_of_sound: sound_squared.sqrt(),
        };
        (state.density > 0.0 && state.speed_of_sound.is_finite()).then_some(state)
    }
}

/// Properties of liquid water (region 1).
///
/// `temperature` in K from 273.15 to 623.15, `pressure` in Pa from saturation to 100 MPa; `None` outside, so
/// also where water at that temperature and pressure is steam.
pub fn liquid(temperature: f64, pressure: f64) -> Option<WaterState> {
    if !(LOWEST_TEMPERATURE..=HIGHEST_LIQUID_TEMPERATURE).contains(&temperature) {
        return None;
    }
    let lowest_pressure = saturation_pressure(temperature)?;
    if !(lowest_pressure..=HIGHEST_PRESSURE).contains(&pressure) {
        return None;
    }
    let pi = pressure / 16.53e6;
    let tau = 1386.0 / temperature;
    let mut gibbs = GibbsDerivatives { pi, tau, ..GibbsDerivatives::default() };
    // Both bases stay above 1 over the whole region, so dividing a term by them is safe.
    let (base_pi, base_tau) = (7.1 - pi, tau - 1.222);
    for (i, j, n) in LIQUID_TERMS {
        let value = n * base_pi.powi(i) * base_tau.powi(j);
        gibbs.add(value, (base_pi, i, -1.0), (base_tau, j));
    }
    gibbs.state(temperature, pressure)
}

/// Pressure in Pa at which water boils at `temperature` (K, from 273.15 to the critical 647.096).
pub fn saturation_pressure(temperature: f64) -> Option<f64> {
    if !(LOWEST_TEMPERATURE..=CRITICAL_TEMPERATURE).contains(&temperature) {
        return None;
    }
    let [n1, n2, n3, n4, n5, n6, n7, n8, n9, n10] = SATURATION_COEFFICIENTS;
    let theta = temperature + n9 / (temperature - n10);
    let a = theta * theta + n1 * theta + n2;
    let b = n3 * theta * theta + n4 * theta + n5;
    let c = n6 * theta * theta + n7 * theta + n8;
    let root = 2.0 * c / (-b + (b * b - 4.0 * a * c).sqrt());
    let pressure = root.powi(4) * 1.0e6;
    pressure.is_finite().then_some(pressure)
}

/// Temperature in K at which water boils at `pressure` (Pa, from 611.213 to the critical 22.064 MPa).
pub fn saturation_temperature(pressure: f64) -> Option<f64> {
    if !(611.213..=CRITICAL_PRESSURE).contains(&pressure) {
        return None;
    }
    let [n1, n2, n3, n4, n5, n6, n7, n8, n9, n10] = SATURATION_COEFFICIENTS;
    let beta = (pressure / 1.0e6).sqrt().sqrt();
    let e = beta * beta + n3 * beta + n6;
    let f = n1 * beta * beta + n4 * beta + n7;
    let g = n2 * beta * beta + n5 * beta + n8;
    let d = 2.0 * g / (-f - (f * f - 4.0 * e * g).sqrt());
    let sum = n10 + d;
    let temperature = (sum - (sum * sum - 4.0 * (n9 + n10 * d)).sqrt()) / 2.0;
    temperature.is_finite().then_some(temperature)
}

/// Table 34 of the release: coefficients of the saturation line, n1 to n10.
const SATURATION_COEFFICIENTS: [f64; 10] = [
    1.1670521452767e3,
    -7.2421316703206e5,
    -1.7073846940092e1,
    1.2020824702470e4,
    -3.2325550322333e6,
    1.4915108613530e1,
    -4.8232657361591e3,
    4.0511340542057e5,
    -2.3855557567849e-1,
    6.5017534844798e2,
];

/// Table 2 of the release: exponents I and J and coefficient n of each term of region 1.
const LIQUID_TERMS: [(i32, i32, f64); 34] = [
    (0, -2, 1.4632971213167e-1),
    (0, -1, -8.4548187169114e-1),
    (0, 0, -3.756360367204),
    (0, 1, 3.3855169168385),
    (0, 2, -9.5791963387872e-1),
    (0, 3, 1.5772038513228e-1),
    (0, 4, -1.6616417199501e-2),
    (0, 5, 8.1214629983568e-4),
    (1, -9, 2.8319080123804e-4),
    (1, -7, -6.0706301565874e-4),
    (1, -1, -1.8990068218419e-2),
    (1, 0, -3.2529748770505e-2),
    (1, 1, -2.1841717175414e-2),
    (1, 3, -5.283835796993e-5),
    (2, -3, -4.7184321073267e-4),
    (2, 0, -3.0001780793026e-4),
    (2, 1, 4.7661393906987e-5),
    (2, 3, -4.4141845330846e-6),
    (2, 17, -7.2694996297594e-16),
    (3, -4, -3.1679644845054e-5),
    (3, 0, -2.8270797985312e-6),
    (3, 6, -8.5205128120103e-10),
    (4, -5, -2.2425281908e-6),
    (4, -2, -6.5171222895601e-7),
    (4, 10, -1.4341729937924e-13),
    (5, -8, -4.0516996860117e-7),
    (8, -11, -1.2734301741641e-9),
    (8, -6, -1.7424871230634e-10),
    (21, -29, -6.8762131295531e-19),
    (23, -31, 1.4478307828521e-20),
    (29, -38, 2.6335781662795e-23),
    (30, -39, -1.1947622640071e-23),
    (31, -40, 1.8228094581404e-24),
    (32, -41, -9.3537087292458e-26),
];

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;

    /// Nine printed digits: half a unit of the ninth.
    fn close(value: f64, printed: f64) {
        let relative = (value / printed - 1.0).abs();
        assert!(relative < 5.0e-9, "{value} is not {printed}");
    }

    /// Table 5 of R7-97(2012), and the α and κ that the same states have in the iapws package 1.5.5.
    #[test]
    fn region_1_gives_the_verification_table() {
        let table = [
            (300.0, 3.0e6, 0.100215168e-2, 115.331273e3, 4.17301218e3, 1507.73921),
            (300.0, 80.0e6, 0.971180894e-3, 184.142828e3, 4.01008987e3, 1634.69054),
            (500.0, 3.0e6, 0.120241800e-2, 975.542239e3, 4.65580682e3, 1240.71337),
        ];
        for (temperature, pressure, volume, enthalpy, heat_capacity, sound) in table {
            let state = liquid(temperature, pressure).unwrap();
            close(1.0 / state.density, volume);
            close(state.enthalpy, enthalpy);
            close(state.heat_capacity, heat_capacity);
            close(state.speed_of_sound, sound);
        }
        close(liquid(300.0, 80.0e6).unwrap().heat_capacity_at_constant_volume, 3.91736606e3);
        let hot = liquid(500.0, 3.0e6).unwrap();
        close(hot.thermal_expansion, 0.00164118128);
        close(hot.compressibility, 0.00112892188e-6);
    }

    /// Expansion and compressibility are the slopes of the density that they claim to be.
    #[test]
    fn expansion_and_compressibility_are_slopes_of_density() {
        for (temperature, pressure) in [(274.0, 1.0e5), (300.0, 3.0e6), (450.0, 2.0e6), (600.0, 50.0e6)] {
            let state = liquid(temperature, pressure).unwrap();
            let log_density = |t, p| liquid(t, p).unwrap().density.ln();
            let expansion =
                (log_density(temperature - 0.01, pressure) - log_density(temperature + 0.01, pressure)) / 0.02;
            let step = 1.0e-3 * pressure;
            let compressibility =
                (log_density(temperature, pressure + step) - log_density(temperature, pressure - step)) / (2.0 * step);
            assert!((expansion - state.thermal_expansion).abs() < 1.0e-8 + 1.0e-6 * expansion.abs());
            assert!((compressibility / state.compressibility - 1.0).abs() < 1.0e-4);
        }
    }

    /// Tables 35 and 36 of R7-97(2012).
    #[test]
    fn region_4_gives_the_verification_tables() {
        for (temperature, pressure) in [(300.0, 0.353658941e4), (500.0, 0.263889776e7), (600.0, 0.123443146e8)] {
            close(saturation_pressure(temperature).unwrap(), pressure);
        }
        for (pressure, temperature) in [(0.1e6, 372.755919), (1.0e6, 453.035632), (10.0e6, 584.149488)] {
            close(saturation_temperature(pressure).unwrap(), temperature);
        }
    }

    #[test]
    fn outside_the_region_there_is_no_answer() {
        for (temperature, pressure) in [
            (273.0, 1.0e5),
            (624.0, 50.0e6),
            (400.0, 1.0e5), // steam
            (300.0, 101.0e6),
            (300.0, 0.0),
            (300.0, -1.0e5),
            (f64::NAN, 1.0e5),
            (300.0, f64::NAN),
            (f64::INFINITY, 1.0e5),
            (300.0, f64::INFINITY),
        ] {
            assert_eq!(liquid(temperature, pressure), None, "{temperature} K, {pressure} Pa");
        }
        assert_eq!(saturation_pressure(650.0), None);
        assert_eq!(saturation_pressure(f64::NAN), None);
        assert_eq!(saturation_temperature(100.0), None);
        assert_eq!(saturation_temperature(23.0e6), None);
        assert_eq!(saturation_temperature(f64::NAN), None);
    }
}
