//! Horizontal layer heated from below: mean Nusselt number on the depth of the layer.

use super::{Chosen, Correlation, Estimate, estimate, is_gas_like_air, onset, positive_part};

const HOLLANDS_1975: &str = "Hollands, Raithby and Konicek, Correlation equations for free convection heat transfer in horizontal layers \
     of air and water, Int. J. Heat Mass Transfer 18 (1975) 879-884";

/// Layer heated from below, turbulent.
pub const WIDE_TURBULENT: Correlation = Correlation {
    name: "layer heated from below, turbulent",
    source: "Globe and Dropkin, Natural-convection heat transfer in liquids confined by two horizontal plates and heated from below, \
     J. Heat Transfer 81 (1959) 24-28",
    range: "Rayleigh number 1.5e5 to 6.8e8, Prandtl number 0.02 to 8750, layer wide enough for the side walls not to matter",
    scatter: 0.15,
    scatter_basis: "common practice",
};

/// Layer heated from below, air.
pub const AIR: Correlation = Correlation {
    name: "layer heated from below, air",
    source: HOLLANDS_1975,
    range: "air, Rayleigh number up to 1e8, wide layer",
    scatter: 0.20,
    scatter_basis: "the authors' own data lie within about 5 % (recalled), but Hoelling and Herwig, Int. J. Heat Mass Transfer 49 (2006) 1129-1136, \
     lies up to 15 % higher",
};

/// Layer heated from below, water.
pub const WATER: Correlation = Correlation {
    name: "layer heated from below, water",
    source: HOLLANDS_1975,
    range: "water, Rayleigh number up to 3.5e9 (recalled), wide layer",
    scatter: 0.10,
    scatter_basis: "common practice",
};

/// Layer heated from below, any Prandtl number.
pub const ANY_PRANDTL: Correlation = Correlation {
    name: "layer heated from below, any Prandtl number",
    source: "Hollands, Multi-Prandtl number correlation equations for natural convection in layers and enclosures, Int. J. Heat Mass \
     Transfer 27 (1984) 466-468, the form of Hollands et al. 1975 with the Prandtl number's effect",
    range: "Prandtl number 0.02 to 1e4, Rayleigh number up to 1e10 (both recalled), wide layer",
    scatter: 0.15,
    scatter_basis: "common practice",
};

/// Width over depth from which a layer counts as wide: the onset in a box of 6 by 6 by 1 is then 5 % (side
/// walls insulated) to 17 % (side walls conducting) over the unbounded layer's (Catton 1970, 1972).
pub const WIDE_FROM: f64 = 6.0;

/// The constant of the turbulent term, Hollands et al. 1975.
const TURBULENT_SCALE: f64 = 5830.0;
/// The onset as these correlations write it.
const ONSET: f64 = 1708.0;

/// Globe and Dropkin: Nu = 0.069 Ra^(1/3) Pr^0.074.
pub fn wide_turbulent(rayleigh: f64, prandtl: f64, width_over_depth: f64) -> Estimate {
    let inside =
        (1.5e5..=6.8e8).contains(&rayleigh) && (0.02..=8750.0).contains(&prandtl) && width_over_depth >= WIDE_FROM;
    estimate(&WIDE_TURBULENT, &[rayleigh, prandtl, width_over_depth], 1.0, inside, || {
        0.069 * rayleigh.cbrt() * prandtl.powf(0.074)
    })
}

/// Air: Nu = 1 + 1.44 [1 - 1708/Ra]* + [(Ra/5830)^(1/3) - 1]*.
pub fn air(rayleigh: f64, prandtl: f64, width_over_depth: f64) -> Estimate {
    let inside = (0.0..=1e8).contains(&rayleigh) && is_gas_like_air(prandtl) && width_over_depth >= WIDE_FROM;
    estimate(&AIR, &[rayleigh, prandtl, width_over_depth], 1.0, inside, || layer(rayleigh, 1.44, None))
}

/// Water: as for air, with a term of the liquid's own. The authors fitted it at Prandtl numbers of about 3 to 10.
pub fn water(rayleigh: f64, prandtl: f64, width_over_depth: f64) -> Estimate {
    let inside = (0.0..=3.5e9).contains(&rayleigh) && (3.0..=10.0).contains(&prandtl) && width_over_depth >= WIDE_FROM;
    estimate(&WATER, &[rayleigh, prandtl, width_over_depth], 1.0, inside, || layer(rayleigh, 1.44, Some(140.0)))
}

/// Any Prandtl number: k1 = 1.44 / (1 + 0.018/Pr + 0.00136/Pr²), k2 = 75 exp(1.5 Pr^(-1/2)).
pub fn any_prandtl(rayleigh: f64, prandtl: f64, width_over_depth: f64) -> Estimate {
    let inside = (0.0..=1e10).contains(&rayleigh) && (0.02..=1e4).contains(&prandtl) && width_over_depth >= WIDE_FROM;
    estimate(&ANY_PRANDTL, &[rayleigh, prandtl, width_over_depth], 1.0, inside, || {
        let first = 1.44 / (1.0 + 0.018 / prandtl + 0.00136 / (prandtl * prandtl));
        let second = 75.0 * (1.5 / prandtl.sqrt()).exp();
        layer(rayleigh, first, Some(second))
    })
}

/// 1 + [1 - 1708/Ra]* (k1 + 2 x^(1 - ln x)) + [(Ra/5830)^(1/3) - 1]* with x = Ra^(1/3)/k2.
fn layer(rayleigh: f64, first: f64, second: Option<f64>) -> f64 {
    let above_onset = if rayleigh > 0.0 { positive_part(1.0 - ONSET / rayleigh) } else { 0.0 };
    let liquid = match second {
        Some(scale) => {
            let x = rayleigh.cbrt() / scale;
            // As x goes to 0 the term goes to 0; its logarithm would not be a number there.
            if x > 0.0 { 2.0 * x.powf(1.0 - x.ln()) } else { 0.0 }
        }
        None => 0.0,
    };
    let turbulent = positive_part((rayleigh / TURBULENT_SCALE).cbrt() - 1.0);
    1.0 + above_onset * (first + liquid) + turbulent
}

/// The correlation for a layer heated from below, and what it gives.
///
/// Gases like air take Hollands et al. 1975; liquids the form for any Prandtl number; liquid metals (Prandtl
/// number under that of gases) Globe and Dropkin where it was measured. `width_over_depth` is the smaller
/// horizontal extent over the depth; below [`WIDE_FROM`] the side walls matter and the estimate is outside its
/// range (they delay the onset and lower the Nusselt number).
pub fn choose(rayleigh: f64, prandtl: f64, width_over_depth: f64) -> Chosen {
    if is_gas_like_air(prandtl) {
        Chosen { correlation: &AIR, estimate: air(rayleigh, prandtl, width_over_depth) }
    } else if prandtl < 0.6 && rayleigh >= 1.5e5 {
        Chosen { correlation: &WIDE_TURBULENT, estimate: wide_turbulent(rayleigh, prandtl, width_over_depth) }
    } else {
        Chosen { correlation: &ANY_PRANDTL, estimate: any_prandtl(rayleigh, prandtl, width_over_depth) }
    }
}

/// Whether a wide layer between rigid plates carries heat by conduction alone (heated from below, below the
/// onset, or stable).
pub fn is_conduction_only(rayleigh: f64) -> bool {
    rayleigh < onset::LAYER_RIGID_RIGID.rayleigh
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn conduction_below_the_onset() {
        for prandtl in [0.025, 0.71, 7.0, 1000.0] {
            assert_eq!(choose(1700.0, prandtl, 20.0).estimate.value, 1.0);
            assert!(choose(3000.0, prandtl, 20.0).estimate.value > 1.1);
        }
        assert!(is_conduction_only(1707.0) && !is_conduction_only(1708.0) && is_conduction_only(-1e6));
    }

    #[test]
    fn published_forms_overlap() {
        for exponent in [5.5, 6.0, 7.0, 8.0] {
            let rayleigh = 10_f64.powf(exponent);
            let globe = wide_turbulent(rayleigh, 0.71, 20.0);
            let hollands = air(rayleigh, 0.71, 20.0);
            assert!(globe.low < hollands.high && hollands.low < globe.high, "{globe:?} {hollands:?}");
            let water_form = water(rayleigh, 6.0, 20.0);
            let general = any_prandtl(rayleigh, 6.0, 20.0);
            assert!((water_form.value / general.value - 1.0).abs() < 0.03, "{water_form:?} {general:?}");
        }
    }

    #[test]
    fn which_was_used() {
        assert_eq!(choose(1e6, 0.71, 20.0).correlation.name, AIR.name);
        assert_eq!(choose(1e6, 0.025, 20.0).correlation.name, WIDE_TURBULENT.name);
        assert_eq!(choose(1e6, 7.0, 20.0).correlation.name, ANY_PRANDTL.name);
        assert!(!choose(1e6, 7.0, 1.0).estimate.inside_range);
        assert!(choose(1e300, 1e-300, 1.0).estimate.value.is_finite());
        assert_eq!(choose(0.0, 7.0, 20.0).estimate.value, 1.0);
    }
}
