//! Vertical plate in open surroundings: mean Nusselt number on the height, isothermal or uniform flux.

use super::{Correlation, Estimate, estimate};

const CHURCHILL_CHU: &str = "Churchill and Chu, Correlating equations for laminar and turbulent free convection \
     from a vertical plate, Int. J. Heat Mass Transfer 18 (1975) 1323-1329";

/// Vertical plate, isothermal.
pub const ISOTHERMAL: Correlation = Correlation {
    name: "vertical plate, isothermal",
    source: CHURCHILL_CHU,
    range: "Rayleigh number on the height 0.1 to 1e12, any Prandtl number (laminar and turbulent)",
    scatter: 0.20,
    scatter_basis: "common practice for plates through transition",
};

/// Vertical plate, isothermal, laminar.
pub const ISOTHERMAL_LAMINAR: Correlation = Correlation {
    name: "vertical plate, isothermal, laminar",
    source: CHURCHILL_CHU,
    range: "Rayleigh number on the height up to 1e9, any Prandtl number (laminar only)",
    scatter: 0.10,
    scatter_basis: "common practice; the similarity solution (Ostrach 1953) lies within 1.4 % at Ra 1e8 and Prandtl numbers 0.7 to 1000, 3.3 % down to 0.01",
};

/// Vertical plate, uniform flux.
pub const UNIFORM_FLUX: Correlation = Correlation {
    name: "vertical plate, uniform flux",
    source: CHURCHILL_CHU,
    range: "Rayleigh number on the height and the temperature difference at mid-height 0.1 to 1e12, any Prandtl number",
    scatter: 0.20,
    scatter_basis: "common practice for plates through transition",
};

/// Vertical plate, uniform flux, laminar.
pub const UNIFORM_FLUX_LAMINAR: Correlation = Correlation {
    name: "vertical plate, uniform flux, laminar",
    source: CHURCHILL_CHU,
    range: "Rayleigh number on the height and the temperature difference at mid-height up to 1e9, any Prandtl number",
    scatter: 0.10,
    scatter_basis: "common practice; the similarity solution (Sparrow and Gregg 1956) lies within 0.8 % as layers grow thin (Prandtl numbers 0.7 to 7)",
};

/// Prandtl-number constant of the isothermal plate.
const PRANDTL_ISOTHERMAL: f64 = 0.492;
/// Prandtl-number constant of the plate with uniform flux.
const PRANDTL_FLUX: f64 = 0.437;

/// Value of the full form without motion, 0.825².
const FULL_WITHOUT_MOTION: f64 = 0.825 * 0.825;
/// Value of the laminar form without motion.
const LAMINAR_WITHOUT_MOTION: f64 = 0.68;

fn full(rayleigh: f64, prandtl: f64, constant: f64) -> f64 {
    let prandtl_term = (1.0 + (constant / prandtl).powf(9.0 / 16.0)).powf(8.0 / 27.0);
    (0.825 + 0.387 * rayleigh.powf(1.0 / 6.0) / prandtl_term).powi(2)
}

fn laminar(rayleigh: f64, prandtl: f64, constant: f64) -> f64 {
    let prandtl_term = (1.0 + (constant / prandtl).powf(9.0 / 16.0)).powf(4.0 / 9.0);
    0.68 + 0.670 * rayleigh.powf(0.25) / prandtl_term
}

fn in_full_range(rayleigh: f64) -> bool {
    (0.1..=1e12).contains(&rayleigh)
}

/// Isothermal plate, laminar or turbulent. Rayleigh number on the height.
pub fn isothermal(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = in_full_range(rayleigh) && prandtl > 0.0;
    estimate(&ISOTHERMAL, &[rayleigh, prandtl], FULL_WITHOUT_MOTION, inside, || {
        full(rayleigh, prandtl, PRANDTL_ISOTHERMAL)
    })
}

/// Isothermal plate, laminar (closer than the full form below Ra 1e9). Rayleigh number on the height.
pub fn isothermal_laminar(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = rayleigh > 0.0 && rayleigh <= 1e9 && prandtl > 0.0;
    estimate(&ISOTHERMAL_LAMINAR, &[rayleigh, prandtl], LAMINAR_WITHOUT_MOTION, inside, || {
        laminar(rayleigh, prandtl, PRANDTL_ISOTHERMAL)
    })
}

/// Plate with uniform flux, laminar or turbulent. Rayleigh number on the height; it and the Nusselt number on the difference
/// between wall and surroundings at mid-height. (A laminar wall is 15 % hotter than that at its top, the difference there
/// being 2^(1/5) times as large.)
pub fn uniform_flux(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = in_full_range(rayleigh) && prandtl > 0.0;
    estimate(&UNIFORM_FLUX, &[rayleigh, prandtl], FULL_WITHOUT_MOTION, inside, || full(rayleigh, prandtl, PRANDTL_FLUX))
}

/// Plate with uniform flux, laminar. Rayleigh number as in [`uniform_flux`].
pub fn uniform_flux_laminar(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = rayleigh > 0.0 && rayleigh <= 1e9 && prandtl > 0.0;
    estimate(&UNIFORM_FLUX_LAMINAR, &[rayleigh, prandtl], LAMINAR_WITHOUT_MOTION, inside, || {
        laminar(rayleigh, prandtl, PRANDTL_FLUX)
    })
}

/// Plate with uniform flux where only the flux is known: the flux Rayleigh number is
/// g α q H⁴ / (k ν a), which is the Rayleigh number times the Nusselt number.
///
/// Solves Nu = f(Ra_flux / Nu) with the full form, by bisection on the logarithm.
pub fn uniform_flux_from_flux(flux_rayleigh: f64, prandtl: f64) -> Estimate {
    let inputs = [flux_rayleigh, prandtl];
    if !inputs.iter().all(|x| x.is_finite() && *x >= 0.0) {
        return uniform_flux(f64::NAN, prandtl);
    }
    // The formula's value falls as the trial value rises, so the crossing is the only one. It lies
    // between the value without motion and the value at the whole flux Rayleigh number.
    let mut low = FULL_WITHOUT_MOTION.ln();
    let mut high = full(flux_rayleigh, prandtl, PRANDTL_FLUX).max(1.0).ln();
    if !high.is_finite() {
        return uniform_flux(f64::NAN, prandtl);
    }
    for _ in 0..80 {
        let middle = 0.5 * (low + high);
        let trial = middle.exp();
        if full(flux_rayleigh / trial, prandtl, PRANDTL_FLUX) > trial {
            low = middle;
        } else {
            high = middle;
        }
    }
    uniform_flux(flux_rayleigh / high.exp(), prandtl)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn glass_door_worked_example() {
        // Incropera and DeWitt, Fundamentals of Heat and Mass Transfer, example of the glass door:
        // 0.71 m high, 232 / 23 degC, Ra 1.813e9, Pr 0.690, Nu 147 (recalled).
        let nusselt = isothermal(1.813e9, 0.690);
        assert!((nusselt.value - 147.0).abs() < 0.5, "{nusselt:?}");
        assert!(nusselt.inside_range);
    }

    #[test]
    fn flux_and_difference_forms_agree() {
        for flux_rayleigh in [1.0, 1e4, 1e8, 1e12] {
            for prandtl in [0.01, 0.71, 7.0, 1000.0] {
                let got = uniform_flux_from_flux(flux_rayleigh, prandtl);
                let back = uniform_flux(flux_rayleigh / got.value, prandtl);
                assert!((back.value / got.value - 1.0).abs() < 1e-9);
            }
        }
    }

    #[test]
    fn range_ends() {
        assert!(isothermal_laminar(1e9, 0.7).inside_range);
        assert!(!isothermal_laminar(1.1e9, 0.7).inside_range);
        assert!(!isothermal(1.1e12, 0.7).inside_range);
        assert!(!isothermal(-1e6, 0.7).inside_range);
    }
}
