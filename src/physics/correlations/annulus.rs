//! Gap between concentric horizontal cylinders or spheres: effective over true conductivity.

use super::{Correlation, Estimate, estimate};

const RAITHBY_HOLLANDS: &str = "Raithby and Hollands, A general method of obtaining approximate solutions to laminar and turbulent free \
     convection problems, Advances in Heat Transfer 11 (1975) 265-315";

/// Annulus between horizontal cylinders.
pub const CYLINDERS: Correlation = Correlation {
    name: "annulus between horizontal cylinders",
    source: RAITHBY_HOLLANDS,
    range: "reduced Rayleigh number 1e2 to 1e7 (below, conduction), Prandtl number 0.7 to 6000",
    scatter: 0.15,
    scatter_basis: "common practice",
};

/// Gap between concentric spheres.
pub const SPHERES: Correlation = Correlation {
    name: "gap between concentric spheres",
    source: RAITHBY_HOLLANDS,
    range: "reduced Rayleigh number 1e2 to 1e4, Prandtl number 0.7 to 4000",
    scatter: 0.15,
    scatter_basis: "common practice",
};

/// Geometric factor for cylinders: [ln(Do/Di)]⁴ / (L³ (Di^(-3/5) + Do^(-3/5))⁵), L = (Do - Di)/2.
///
/// Only the ratio of the diameters matters; 0 where there is no gap or a diameter is no usable number.
pub fn cylinder_factor(inner_diameter: f64, outer_diameter: f64) -> f64 {
    let Some(ratio) = diameter_ratio(inner_diameter, outer_diameter) else {
        return 0.0;
    };
    let gap = 0.5 * (ratio - 1.0);
    let factor = ratio.ln().powi(4) / (gap.powi(3) * (1.0 + ratio.powf(-0.6)).powi(5));
    if factor.is_finite() { factor } else { 0.0 }
}

/// Geometric factor for spheres: L / ((Di Do)⁴ (Di^(-7/5) + Do^(-7/5))⁵), L = (Do - Di)/2; as
/// [`cylinder_factor`] otherwise.
pub fn sphere_factor(inner_diameter: f64, outer_diameter: f64) -> f64 {
    let Some(ratio) = diameter_ratio(inner_diameter, outer_diameter) else {
        return 0.0;
    };
    let gap = 0.5 * (ratio - 1.0);
    let factor = gap / (ratio.powi(4) * (1.0 + ratio.powf(-1.4)).powi(5));
    if factor.is_finite() { factor } else { 0.0 }
}

/// Outer over inner diameter, where both are usable and leave a gap.
fn diameter_ratio(inner_diameter: f64, outer_diameter: f64) -> Option<f64> {
    let ratio = outer_diameter / inner_diameter;
    (inner_diameter > 0.0 && ratio.is_finite() && ratio > 1.0).then_some(ratio)
}

/// Concentric horizontal cylinders, Rayleigh number on the gap (Do - Di)/2: k_eff/k =
/// 0.386 (Pr / (0.861 + Pr))^(1/4) (F Ra)^(1/4), at least 1.
pub fn cylinders(rayleigh: f64, prandtl: f64, inner_diameter: f64, outer_diameter: f64) -> Estimate {
    let reduced = cylinder_factor(inner_diameter, outer_diameter) * rayleigh;
    let inside = reduced > 0.0 && reduced <= 1e7 && (0.7..=6000.0).contains(&prandtl);
    estimate(&CYLINDERS, &[rayleigh, prandtl, inner_diameter, outer_diameter], 1.0, inside, || {
        gap_value(0.386, reduced, prandtl)
    })
}

/// Concentric spheres, Rayleigh number on the gap (Do - Di)/2: k_eff/k = 0.74 (Pr / (0.861 + Pr))^(1/4)
/// (F Ra)^(1/4), at least 1.
pub fn spheres(rayleigh: f64, prandtl: f64, inner_diameter: f64, outer_diameter: f64) -> Estimate {
    let reduced = sphere_factor(inner_diameter, outer_diameter) * rayleigh;
    let inside = reduced > 0.0 && reduced <= 1e4 && (0.7..=4000.0).contains(&prandtl);
    estimate(&SPHERES, &[rayleigh, prandtl, inner_diameter, outer_diameter], 1.0, inside, || {
        gap_value(0.74, reduced, prandtl)
    })
}

fn gap_value(coefficient: f64, reduced_rayleigh: f64, prandtl: f64) -> f64 {
    coefficient * (prandtl / (0.861 + prandtl)).powf(0.25) * reduced_rayleigh.powf(0.25)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn factors_agree_with_the_handbooks_other_form() {
        // Incropera and DeWitt write the same by a length on the radii:
        // Lc = 2 [ln(ro/ri)]^(4/3) / (ri^(-3/5) + ro^(-3/5))^(5/3),
        // Ls = (1/ri - 1/ro)^(4/3) / (2^(1/3) (ri^(-7/5) + ro^(-7/5))^(5/3)); F is (L_c / L)³.
        for (inner, outer) in [(0.1, 0.12), (0.05, 0.2), (1.0, 2.6)] {
            let (ri, ro) = (0.5_f64 * inner, 0.5_f64 * outer);
            let gap = ro - ri;
            let length = 2.0 * (ro / ri).ln().powf(4.0 / 3.0) / (ri.powf(-0.6) + ro.powf(-0.6)).powf(5.0 / 3.0);
            let expected = (length / gap).powi(3);
            assert!((cylinder_factor(inner, outer) / expected - 1.0).abs() < 1e-12);
            let length = (1.0 / ri - 1.0 / ro).powf(4.0 / 3.0)
                / (2_f64.cbrt() * (ri.powf(-1.4) + ro.powf(-1.4)).powf(5.0 / 3.0));
            let expected = (length / gap).powi(3);
            assert!((sphere_factor(inner, outer) / expected - 1.0).abs() < 1e-12);
        }
    }

    #[test]
    fn published_solution_for_air_in_an_annulus() {
        // Kuehn and Goldstein, J. Fluid Mech. 74 (1976) 695: Do/Di 2.6, Pr 0.7, equivalent conductivity 2.010 at
        // Ra 1e4 and 3.024 at 5e4 (numerical solution; recalled).
        for (rayleigh, published) in [(1e4, 2.010), (5e4, 3.024)] {
            let got = cylinders(rayleigh, 0.7, 1.0, 2.6);
            assert!(got.low < published && published < got.high, "{rayleigh:e} {got:?}");
            assert!(got.inside_range);
        }
    }

    #[test]
    fn concentric_spheres_worked_example() {
        // Cengel, Heat and Mass Transfer, example of the concentric spheres: 0.2 and 0.3 m, 320 / 280 K, air: shape factor
        // 0.005229, Ra 4.776e5, Pr 0.7290, k 0.02566 W/(m K), effective conductivity 0.1105 W/(m K) (recalled).
        assert!((sphere_factor(0.2, 0.3) - 0.005229).abs() < 1e-6);
        let got = spheres(4.776e5, 0.7290, 0.2, 0.3);
        assert!((got.value * 0.02566 - 0.1105).abs() < 1e-4, "{got:?}");
    }

    #[test]
    fn no_gap_is_conduction() {
        for (inner, outer) in [(1.0, 1.0), (2.0, 1.0), (0.0, 1.0), (-1.0, 1.0), (f64::NAN, 1.0), (1.0, f64::INFINITY)] {
            let got = cylinders(1e6, 0.7, inner, outer);
            assert_eq!((got.value, got.inside_range), (1.0, false));
            let got = spheres(1e6, 0.7, inner, outer);
            assert_eq!((got.value, got.inside_range), (1.0, false));
        }
    }
}
