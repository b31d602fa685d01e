//! Open-ended vertical channel between parallel plates, flow driven by the plates' heat: Nusselt number on the spacing S.
//!
//! The channel number (Elenbaas number) is the Rayleigh number on the spacing times spacing over height, Ra_S S/L.

use super::{Correlation, Estimate, estimate};

const BAR_COHEN_ROHSENOW: &str = "Bar-Cohen and Rohsenow, Thermally optimum spacing of vertical, natural convection cooled, parallel plates, \
     J. Heat Transfer 106 (1984) 116-123";
const BASIS: &str = "common practice; both limits are exact or measured, the blend between them is within 10 %";
const RANGE_TEMPERATURE: &str =
    "laminar; channel number from 0.1 (fully developed) to 1e5 (each plate on its own); limits recalled";
const RANGE_FLUX: &str =
    "laminar; flux channel number from 0.1 (fully developed) to 1e5 (each plate on its own); limits recalled";

/// Vertical channel, both plates isothermal.
pub const ISOTHERMAL_BOTH: Correlation = Correlation {
    name: "vertical channel, both plates isothermal",
    source: BAR_COHEN_ROHSENOW,
    range: RANGE_TEMPERATURE,
    scatter: 0.10,
    scatter_basis: BASIS,
};

/// Vertical channel, one plate isothermal, one insulated.
pub const ISOTHERMAL_ONE: Correlation = Correlation {
    name: "vertical channel, one plate isothermal, one insulated",
    source: BAR_COHEN_ROHSENOW,
    range: RANGE_TEMPERATURE,
    scatter: 0.15,
    scatter_basis: BASIS,
};

/// Vertical channel, uniform flux on both plates.
pub const FLUX_BOTH: Correlation = Correlation {
    name: "vertical channel, uniform flux on both plates",
    source: BAR_COHEN_ROHSENOW,
    range: RANGE_FLUX,
    scatter: 0.10,
    scatter_basis: BASIS,
};

/// Vertical channel, uniform flux on one plate, one insulated.
pub const FLUX_ONE: Correlation = Correlation {
    name: "vertical channel, uniform flux on one plate, one insulated",
    source: BAR_COHEN_ROHSENOW,
    range: RANGE_FLUX,
    scatter: 0.15,
    scatter_basis: BASIS,
};

fn in_range(channel_number: f64) -> bool {
    (0.1..=1e5).contains(&channel_number)
}

/// [C1/El² + 2.873/El^(1/2)]^(-1/2).
fn isothermal(developed: f64, channel_number: f64) -> f64 {
    (developed / channel_number.powi(2) + 2.873 / channel_number.sqrt()).powf(-0.5)
}

/// [C1/El + 2.51/El^(2/5)]^(-1/2).
fn flux(developed: f64, channel_number: f64) -> f64 {
    (developed / channel_number + 2.51 / channel_number.powf(0.4)).powf(-0.5)
}

/// Both plates at one temperature: mean Nusselt number on the difference to the entering fluid.
pub fn isothermal_both(channel_number: f64) -> Estimate {
    estimate(&ISOTHERMAL_BOTH, &[channel_number], 0.0, in_range(channel_number), || isothermal(576.0, channel_number))
}

/// One plate at a temperature, the other insulated: mean Nusselt number of the heated plate.
pub fn isothermal_one(channel_number: f64) -> Estimate {
    estimate(&ISOTHERMAL_ONE, &[channel_number], 0.0, in_range(channel_number), || isothermal(144.0, channel_number))
}

/// Uniform flux on both plates: Nusselt number at the upper edge (where the plate is hottest). The flux channel
/// number is g α q S⁵ / (k ν a L).
pub fn flux_both(flux_channel_number: f64) -> Estimate {
    estimate(&FLUX_BOTH, &[flux_channel_number], 0.0, in_range(flux_channel_number), || flux(48.0, flux_channel_number))
}

/// Uniform flux on one plate, the other insulated: as [`flux_both`].
pub fn flux_one(flux_channel_number: f64) -> Estimate {
    estimate(&FLUX_ONE, &[flux_channel_number], 0.0, in_range(flux_channel_number), || flux(24.0, flux_channel_number))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn fully_developed_limits_are_the_exact_ones() {
        // From the balance of buoyancy and wall friction (12 ν U / S² = g α ΔT): El/24 and El/12 for plates at a
        // temperature, √(El/48) and √(El/24) for plates with a flux.
        let small = 1e-4;
        assert!((isothermal_both(small).value / (small / 24.0) - 1.0).abs() < 1e-6);
        assert!((isothermal_one(small).value / (small / 12.0) - 1.0).abs() < 1e-6);
        let small = 1e-9_f64;
        assert!((flux_both(small).value / (small / 48.0).sqrt() - 1.0).abs() < 1e-4);
        assert!((flux_one(small).value / (small / 24.0).sqrt() - 1.0).abs() < 1e-4);
    }

    #[test]
    fn published_optimum_spacing() {
        // Cengel, Heat and Mass Transfer: the best spacing is 2.714 L / Ra_L^(1/4), channel number 2.714⁴, and Nu is
        // 1.307 there. Heat per width of array goes as Nu/S², with El as S⁴ that is Nu/El^(1/2).
        let best = 2.714_f64.powi(4);
        assert!((isothermal_both(best).value - 1.307).abs() < 0.001);
        let heat = |number: f64| isothermal_both(number).value / number.sqrt();
        assert!(heat(best) > heat(best * 1.05) && heat(best) > heat(best / 1.05));
        for unusable in [f64::NAN, -1.0, f64::INFINITY] {
            assert_eq!(isothermal_both(unusable).value, 0.0);
        }
        assert_eq!(isothermal_both(0.0).value, 0.0);
    }
}
