//! Horizontal cylinder and sphere in open surroundings: mean Nusselt number on the diameter.

use super::{Correlation, Estimate, estimate};

const CHURCHILL_CHU_CYLINDER: &str = "Churchill and Chu, Correlating equations for laminar and turbulent free convection from a \
     horizontal cylinder, Int. J. Heat Mass Transfer 18 (1975) 1049-1053";
const CHURCHILL_SPHERE: &str = "Churchill, Free convection around immersed bodies, in Schluender (ed.), Heat Exchanger Design Handbook, \
     1983, section 2.5.7";

/// Horizontal cylinder, isothermal.
pub const HORIZONTAL_CYLINDER: Correlation = Correlation {
    name: "horizontal cylinder, isothermal",
    source: CHURCHILL_CHU_CYLINDER,
    range: "Rayleigh number on the diameter 1e-5 to 1e12 (lower end recalled), any Prandtl number",
    scatter: 0.30,
    scatter_basis: "Kuehn and Goldstein, Int. J. Heat Mass Transfer 19 (1976) 1127-1134, lies up to 26 % higher in air (at Ra 100, thin wires); from Ra 1e6 \
     common practice is 20 %",
};

/// Horizontal cylinder, isothermal, laminar.
pub const HORIZONTAL_CYLINDER_LAMINAR: Correlation = Correlation {
    name: "horizontal cylinder, isothermal, laminar",
    source: CHURCHILL_CHU_CYLINDER,
    range: "Rayleigh number on the diameter 1e-6 to 1e9 (lower end recalled), any Prandtl number",
    scatter: 0.30,
    scatter_basis: "Kuehn and Goldstein, Int. J. Heat Mass Transfer 19 (1976) 1127-1134, lies up to 26 % higher in air (at Ra 100, thin wires); from Ra 1e6 \
     common practice is 20 %",
};

/// Sphere, isothermal.
pub const SPHERE: Correlation = Correlation {
    name: "sphere, isothermal",
    source: CHURCHILL_SPHERE,
    range: "Rayleigh number on the diameter up to 1e11, Prandtl number 0.7 or more",
    scatter: 0.15,
    scatter_basis: "common practice; from Ra 1e8 take the fuller form, which lies 31 % higher at Ra 1e9",
};

/// Sphere, isothermal, laminar to turbulent.
pub const SPHERE_TO_TURBULENT: Correlation = Correlation {
    name: "sphere, isothermal, laminar to turbulent",
    source: CHURCHILL_SPHERE,
    range: "Rayleigh number on the diameter up to 1e13",
    scatter: 0.20,
    scatter_basis: "common practice",
};

/// Isothermal horizontal cylinder, laminar or turbulent.
pub fn horizontal_cylinder(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (1e-5..=1e12).contains(&rayleigh) && prandtl > 0.0;
    estimate(&HORIZONTAL_CYLINDER, &[rayleigh, prandtl], 0.36, inside, || {
        let prandtl_term = (1.0 + (0.559 / prandtl).powf(9.0 / 16.0)).powf(8.0 / 27.0);
        (0.60 + 0.387 * rayleigh.powf(1.0 / 6.0) / prandtl_term).powi(2)
    })
}

/// Isothermal horizontal cylinder, laminar.
pub fn horizontal_cylinder_laminar(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (1e-6..=1e9).contains(&rayleigh) && prandtl > 0.0;
    estimate(&HORIZONTAL_CYLINDER_LAMINAR, &[rayleigh, prandtl], 0.36, inside, || {
        let prandtl_term = (1.0 + (0.559 / prandtl).powf(9.0 / 16.0)).powf(4.0 / 9.0);
        0.36 + 0.518 * rayleigh.powf(0.25) / prandtl_term
    })
}

/// Isothermal sphere, laminar; from Ra 1e8 [`sphere_to_turbulent`] is the better one.
pub fn sphere(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (0.0..=1e11).contains(&rayleigh) && prandtl >= 0.7;
    estimate(&SPHERE, &[rayleigh, prandtl], 2.0, inside, || {
        2.0 + 0.589 * rayleigh.powf(0.25) / sphere_prandtl_term(prandtl)
    })
}

/// Isothermal sphere, with the handbook's factor for turbulence.
pub fn sphere_to_turbulent(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (0.0..=1e13).contains(&rayleigh) && prandtl > 0.0;
    estimate(&SPHERE_TO_TURBULENT, &[rayleigh, prandtl], 2.0, inside, || {
        let prandtl_term = sphere_prandtl_term(prandtl);
        let turbulent = (1.0 + 7.44e-8 * rayleigh / prandtl_term.powi(4)).powf(1.0 / 12.0);
        2.0 + 0.589 * rayleigh.powf(0.25) / prandtl_term * turbulent
    })
}

/// [1 + (0.469/Pr)^(9/16)]^(4/9).
fn sphere_prandtl_term(prandtl: f64) -> f64 {
    (1.0 + (0.469 / prandtl).powf(9.0 / 16.0)).powf(4.0 / 9.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn conduction_limits() {
        // A sphere in a medium at rest has Nu 2 exactly.
        assert_eq!(sphere(0.0, 0.71).value, 2.0);
        assert!(sphere(1e-3, 0.71).low >= 2.0);
        assert!((horizontal_cylinder(1e-12, 0.71).value - 0.36).abs() < 0.01);
    }

    #[test]
    fn laminar_forms_meet_the_fuller_ones() {
        for rayleigh in [1e3, 1e4, 1e5] {
            for prandtl in [0.71, 7.0] {
                let laminar = horizontal_cylinder_laminar(rayleigh, prandtl).value;
                let full = horizontal_cylinder(rayleigh, prandtl).value;
                assert!((laminar / full - 1.0).abs() < 0.08, "{rayleigh:e} {prandtl} {laminar} {full}");
            }
        }
        for rayleigh in [1e3, 1e6] {
            let plain = sphere(rayleigh, 0.71).value;
            let full = sphere_to_turbulent(rayleigh, 0.71).value;
            assert!((plain / full - 1.0).abs() < 0.003, "{rayleigh:e} {plain} {full}");
        }
    }
}
