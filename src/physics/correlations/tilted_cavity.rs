//! Tilted cavity: mean Nusselt number on the gap L, from heated from below (tilt 0) over side-heated (90 degrees) to
//! heated from above (180 degrees).

use super::{Chosen, Correlation, bottom_heated_layer, estimate, is_gas_like_air, positive_part, side_heated_cavity};

/// Tilted cavity, wide, air.
pub const WIDE_AIR: Correlation = Correlation {
    name: "tilted cavity, wide, air",
    source: "Hollands, Unny, Raithby and Konicek, Free convective heat transfer across inclined air layers, J. Heat Transfer 98 (1976) \
     189-193",
    range: "H/L 12 or more, tilt up to 70 degrees (67 at H/L 12), Rayleigh number up to 1e5, air",
    scatter: 0.10,
    scatter_basis: "the authors give 5 % to 60 degrees and 10 % to 75 degrees (recalled)",
};

/// Tilted cavity, below the critical tilt.
pub const BELOW_CRITICAL_TILT: Correlation = Correlation {
    name: "tilted cavity, below the critical tilt",
    source: "Catton, Natural convection in enclosures, Proc. 6th Int. Heat Transfer Conf. 6 (1978) 13-31",
    range: "H/L 1 to 12, tilt up to the critical one (25, 53, 60, 67 degrees at H/L 1, 3, 6, 12), in the range of the level and the upright \
     cavity's correlation",
    scatter: 0.25,
    scatter_basis: "common practice (an interpolation between two correlations)",
};

/// Tilted cavity, critical tilt to upright.
pub const ABOVE_CRITICAL_TILT: Correlation = Correlation {
    name: "tilted cavity, critical tilt to upright",
    source: "Ayyaswamy and Catton, The boundary-layer regime for natural convection in a differentially heated tilted rectangular cavity, \
     J. Heat Transfer 95 (1973) 543-545",
    range: "tilt from the critical one to 90 degrees, any H/L, in the range of the upright cavity's correlation",
    scatter: 0.25,
    scatter_basis: "common practice",
};

/// Tilted cavity, heated from above.
pub const HEATED_FROM_ABOVE: Correlation = Correlation {
    name: "tilted cavity, heated from above",
    source: "Arnold, Catton and Edwards, Experimental investigation of natural convection in inclined rectangular regions of differing \
     aspect ratios, J. Heat Transfer 98 (1976) 67-71",
    range: "tilt 90 to 180 degrees, any H/L, in the range of the upright cavity's correlation",
    scatter: 0.25,
    scatter_basis: "common practice",
};

/// Aspect ratio H/L and critical tilt in degrees (Catton 1978, as handbooks print it).
const CRITICAL_TILT: [(f64, f64); 4] = [(1.0, 25.0), (3.0, 53.0), (6.0, 60.0), (12.0, 67.0)];

/// Critical tilt in radians: below it the cavity behaves like a layer heated from below. Linear between the
/// table's entries (common practice), 70 degrees beyond H/L 12, 25 below H/L 1 or where H/L is no number.
pub fn critical_tilt(aspect: f64) -> f64 {
    let mut degrees = 25.0;
    for pair in CRITICAL_TILT.windows(2) {
        let [(low_aspect, low), (high_aspect, high)] = pair else {
            continue;
        };
        if aspect > *low_aspect {
            let share = ((aspect - low_aspect) / (high_aspect - low_aspect)).min(1.0);
            degrees = low + share * (high - low);
        }
    }
    if aspect > 12.0 {
        degrees = 70.0;
    }
    degrees.to_radians()
}

/// Hollands et al. 1976. Rayleigh number on the gap with the whole of gravity; tilt in radians from level.
pub fn wide_air(rayleigh: f64, prandtl: f64, aspect: f64, tilt: f64) -> super::Estimate {
    let inside = aspect >= 12.0
        && (0.0..=critical_tilt(aspect)).contains(&tilt)
        && (0.0..=1e5).contains(&rayleigh)
        && is_gas_like_air(prandtl);
    estimate(&WIDE_AIR, &[rayleigh, prandtl, aspect, tilt], 1.0, inside, || {
        let driving = rayleigh * tilt.cos().max(0.0);
        if driving <= 0.0 {
            return 1.0;
        }
        let first = positive_part(1.0 - 1708.0 / driving);
        // The sine is of 1.8 times the tilt; beyond 100 degrees it would turn negative.
        let tilt_effect = 1.0 - 1708.0 * (1.8 * tilt).sin().max(0.0).powf(1.6) / driving;
        let turbulent = positive_part((driving / 5830.0).cbrt() - 1.0);
        1.0 + 1.44 * first * tilt_effect + turbulent
    })
}

/// The correlation for a tilted cavity, and what it gives.
///
/// Rayleigh number on the gap L with the whole of gravity, `aspect` H/L with H the length of the heated faces,
/// `tilt` in radians: 0 heated from below, π/2 upright, π heated from above; beyond π it reads as π.
pub fn choose(rayleigh: f64, prandtl: f64, aspect: f64, tilt: f64) -> Chosen {
    let tilt = if tilt.is_finite() && tilt > core::f64::consts::PI { core::f64::consts::PI } else { tilt };
    let critical = critical_tilt(aspect);
    let inputs = [rayleigh, prandtl, aspect, tilt];
    let upright = side_heated_cavity::choose(rayleigh, prandtl, aspect).estimate;
    if tilt > core::f64::consts::FRAC_PI_2 {
        let estimate = estimate(&HEATED_FROM_ABOVE, &inputs, 1.0, upright.inside_range, || {
            1.0 + (upright.value - 1.0) * tilt.sin().max(0.0)
        });
        return Chosen { correlation: &HEATED_FROM_ABOVE, estimate };
    }
    if tilt > critical {
        let estimate = estimate(&ABOVE_CRITICAL_TILT, &inputs, 1.0, upright.inside_range, || {
            upright.value * tilt.sin().powf(0.25)
        });
        return Chosen { correlation: &ABOVE_CRITICAL_TILT, estimate };
    }
    if aspect >= 12.0 {
        return Chosen { correlation: &WIDE_AIR, estimate: wide_air(rayleigh, prandtl, aspect, tilt) };
    }
    let level = bottom_heated_layer::choose(rayleigh, prandtl, aspect).estimate;
    // The handbooks use this between level and upright at any H/L of 1 or more: the level layer's own
    // demand for width is not repeated here.
    let level_in_range = bottom_heated_layer::choose(rayleigh, prandtl, f64::MAX).estimate.inside_range;
    let inside = aspect >= 1.0 && upright.inside_range && level_in_range;
    let estimate = estimate(&BELOW_CRITICAL_TILT, &inputs, 1.0, inside, || {
        let share = tilt / critical;
        level.value * (upright.value / level.value).powf(share) * critical.sin().powf(0.25 * share)
    });
    Chosen { correlation: &BELOW_CRITICAL_TILT, estimate }
}

#[cfg(test)]
mod tests {
    use super::*;
    use core::f64::consts::{FRAC_PI_2, PI};

    #[test]
    fn critical_tilt_table() {
        for (aspect, degrees) in
            [(0.5, 25.0), (1.0, 25.0), (2.0, 39.0), (3.0, 53.0), (6.0, 60.0), (12.0, 67.0), (13.0, 70.0)]
        {
            assert!((critical_tilt(aspect).to_degrees() - degrees).abs() < 1e-9, "{aspect}");
        }
        assert!((critical_tilt(f64::NAN).to_degrees() - 25.0).abs() < 1e-9);
    }

    #[test]
    fn meets_the_level_and_the_upright_cavity() {
        for aspect in [1.0, 4.0, 11.0] {
            let level = choose(1e5, 0.71, aspect, 0.0).estimate.value;
            assert!((level - bottom_heated_layer::choose(1e5, 0.71, aspect).estimate.value).abs() < 1e-12);
            let upright = choose(1e5, 0.71, aspect, FRAC_PI_2).estimate.value;
            assert!((upright - side_heated_cavity::choose(1e5, 0.71, aspect).estimate.value).abs() < 1e-12);
            // Continuous at the critical tilt.
            let at = critical_tilt(aspect);
            let below = choose(1e5, 0.71, aspect, at * (1.0 - 1e-9)).estimate.value;
            let above = choose(1e5, 0.71, aspect, at * (1.0 + 1e-9)).estimate.value;
            assert!((below / above - 1.0).abs() < 1e-6);
        }
        assert!(
            (choose(1e5, 0.71, 20.0, 0.0).estimate.value - bottom_heated_layer::air(1e5, 0.71, 20.0).value).abs()
                < 1e-12
        );
        assert!((choose(1e5, 0.71, 4.0, PI).estimate.value - 1.0).abs() < 1e-9);
    }

    #[test]
    fn unusable_tilts() {
        for tilt in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY, -0.1] {
            let got = choose(1e5, 0.71, 4.0, tilt).estimate;
            assert!(got.value.is_finite() && got.value >= 1.0);
            if tilt.is_nan() || tilt < 0.0 {
                assert!(!got.inside_range);
            }
        }
    }
}
