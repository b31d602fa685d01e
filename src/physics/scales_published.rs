//! Published scales of buoyancy-driven flow: layer thicknesses, times, and the spacing a direct simulation needs.
//!
//! Pure functions in SI. `None` where an input is negative, zero where that makes no sense, or not finite, or where the formula
//! gives no finite number; so no caller ever sees a NaN.

use core::f64::consts::{PI, SQRT_2};

/// The result, where it is a usable positive number and so are all inputs.
fn usable(inputs: &[f64], result: f64) -> Option<f64> {
    let good = |x: &f64| x.is_finite() && *x > 0.0;
    (inputs.iter().all(good) && good(&result)).then_some(result)
}

/// Prandtl-number factor of the laminar vertical plate: wall gradient of the similarity solution,
/// 0.75 Pr^(1/2) / (0.609 + 1.221 Pr^(1/2) + 1.238 Pr)^(1/4).
///
/// LeFevre, Proc. 9th Int. Congr. Appl. Mech. 4 (1956) 168-174, fitted to Ostrach, NACA Report 1111 (1953), within 0.5 %.
pub fn similarity_gradient(prandtl: f64) -> Option<f64> {
    let root = prandtl.sqrt();
    usable(&[prandtl], 0.75 * root / (0.609 + 1.221 * root + 1.238 * prandtl).powf(0.25))
}

/// Mean Nusselt number of the laminar vertical plate by the similarity solution: (4/3) (Gr/4)^(1/4) times
/// [`similarity_gradient`], Gr = Ra/Pr on the height (Ostrach 1953).
pub fn laminar_plate_nusselt(rayleigh: f64, prandtl: f64) -> Option<f64> {
    let gradient = similarity_gradient(prandtl)?;
    usable(&[rayleigh], 4.0 / 3.0 * (0.25 * rayleigh / prandtl).powf(0.25) * gradient)
}

/// Scale of the thermal layer on a laminar vertical plate, H Ra^(-1/4), in m (order of magnitude, any Prandtl number over 1).
pub fn laminar_layer_scale(height: f64, rayleigh: f64) -> Option<f64> {
    usable(&[height, rayleigh], height * rayleigh.powf(-0.25))
}

/// Thickness of the thermal layer at the top of a laminar vertical plate, in m: difference over wall gradient, height over local
/// Nusselt number (Ostrach 1953). The layer's outer edge, where 1 % of the difference is left,
/// lies 2.2 times as far out in air, 1.9 in water, 2.8 in liquid metals; the velocity peaks at 0.5 of this thickness in air, 0.8 in
/// water (computed from the same solution).
pub fn laminar_layer_at_top(height: f64, rayleigh: f64, prandtl: f64) -> Option<f64> {
    let local_nusselt = 0.75 * laminar_plate_nusselt(rayleigh, prandtl)?;
    usable(&[height, rayleigh], height / local_nusselt)
}

/// The same, averaged by the mean Nusselt number: three quarters of that at the top.
pub fn laminar_layer_mean(height: f64, rayleigh: f64, prandtl: f64) -> Option<f64> {
    layer_from_nusselt(height, laminar_plate_nusselt(rayleigh, prandtl)?)
}

/// Thickness of the thermal layer from a Nusselt number on the same length, L/Nu, in m: a turbulent layer on one wall.
pub fn layer_from_nusselt(length: f64, nusselt: f64) -> Option<f64> {
    usable(&[length, nusselt], length / nusselt)
}

/// Thickness of each of the two thermal layers of a layer heated from below, or of a cavity whose core is at one temperature:
/// depth / (2 Nu), in m (each layer carries half of the difference).
pub fn convection_layer(depth: f64, nusselt: f64) -> Option<f64> {
    usable(&[depth, nusselt], 0.5 * depth / nusselt)
}

/// Viscous layer that goes with a thermal layer at a Prandtl number over 1: Pr^(1/2) times as thick, in m (Patterson and
/// Imberger, J. Fluid Mech. 100 (1980) 65-86). At lower Prandtl numbers as thick as the thermal layer.
pub fn viscous_layer(thermal_layer: f64, prandtl: f64) -> Option<f64> {
    usable(&[thermal_layer, prandtl], thermal_layer * prandtl.sqrt().max(1.0))
}

/// Time for the layers on the side walls to form, h² / (a Ra^(1/2)), in s; h height in m, a thermal diffusivity in m²/s, Rayleigh
/// number on the height (Patterson and Imberger 1980).
pub fn boundary_layer_time(height: f64, diffusivity: f64, rayleigh: f64) -> Option<f64> {
    usable(&[height, diffusivity, rayleigh], height * height / (diffusivity * rayleigh.sqrt()))
}

/// Velocity in the layers on the side walls, a Ra^(1/2) / h, in m/s (Patterson and Imberger 1980).
pub fn boundary_layer_velocity(height: f64, diffusivity: f64, rayleigh: f64) -> Option<f64> {
    usable(&[height, diffusivity, rayleigh], diffusivity * rayleigh.sqrt() / height)
}

/// Time for the layers' flow to fill the cavity with stratified fluid, h l / (a Ra^(1/4)), in s; l is the width in m
/// (Patterson and Imberger 1980).
pub fn filling_time(height: f64, width: f64, diffusivity: f64, rayleigh: f64) -> Option<f64> {
    usable(&[height, width, diffusivity, rayleigh], height * width / (diffusivity * rayleigh.powf(0.25)))
}

/// Time for heat to cross a length by conduction, l²/a, in s.
pub fn diffusion_time(length: f64, diffusivity: f64) -> Option<f64> {
    usable(&[length, diffusivity], length * length / diffusivity)
}

/// Mean Kolmogorov length of a layer heated from below, in m: H (Pr² / ((Nu - 1) Ra))^(1/4), from the exact mean dissipation
/// ν³ (Nu - 1) Ra Pr^(-2) / H⁴. `None` at a Nusselt number of 1 or less (no motion, nothing to resolve).
pub fn kolmogorov_length(depth: f64, rayleigh: f64, prandtl: f64, nusselt: f64) -> Option<f64> {
    let length = depth * (prandtl * prandtl / ((nusselt - 1.0) * rayleigh)).powf(0.25);
    usable(&[depth, rayleigh, prandtl, nusselt - 1.0], length)
}

/// Mean Batchelor length, in m: the Kolmogorov length times Pr^(-1/2).
pub fn batchelor_length(depth: f64, rayleigh: f64, prandtl: f64, nusselt: f64) -> Option<f64> {
    let length = kolmogorov_length(depth, rayleigh, prandtl, nusselt)? / prandtl.sqrt();
    usable(&[], length)
}

/// Largest mean grid spacing of a direct simulation, in m: π times the Kolmogorov length at Prandtl numbers up to 1, π times the
/// Batchelor length above.
///
/// Groetzbach, Spatial resolution requirements for direct numerical simulation of the Rayleigh-Benard convection, J. Comput. Phys.
/// 49 (1983) 241-264 (recalled).
pub fn direct_simulation_spacing(depth: f64, rayleigh: f64, prandtl: f64, nusselt: f64) -> Option<f64> {
    let smallest = if prandtl <= 1.0 {
        kolmogorov_length(depth, rayleigh, prandtl, nusselt)?
    } else {
        batchelor_length(depth, rayleigh, prandtl, nusselt)?
    };
    usable(&[], PI * smallest)
}

/// Constant of the kinetic layer, δ = a H / Re^(1/2), as Grossmann and Lohse 2002 take it (recalled).
pub const KINETIC_LAYER_CONSTANT: f64 = 0.482;
/// The same constant as fitted to simulations (Stevens, Verzicco and Lohse, J. Fluid Mech. 643 (2010) 495-507; attribution recalled):
/// asks for nearly twice the nodes.
pub const KINETIC_LAYER_CONSTANT_STRICT: f64 = 0.922;

/// Least number of nodes within the layers at the heated and the cooled plate.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LayerNodes {
    /// Within the thermal layer.
    pub thermal: f64,
    /// Within the kinetic layer.
    pub kinetic: f64,
}

/// Least number of nodes within each boundary layer of a layer heated from below.
///
/// Shishkina, Stevens, Grossmann and Lohse, Boundary layer structure in turbulent thermal convection and its consequences for the
/// required numerical resolution, New J. Phys. 12 (2010) 075022: √2 a Nu^(1/2) times a function of the Prandtl number in four
/// ranges. `constant` is a: [`KINETIC_LAYER_CONSTANT`] or [`KINETIC_LAYER_CONSTANT_STRICT`]. Logarithms are decimal; that, and the
/// powers of π, are confirmed by the four ranges meeting at their ends.
pub fn layer_nodes(nusselt: f64, prandtl: f64, constant: f64) -> Option<LayerNodes> {
    /// Wall gradients of the Prandtl-Blasius layer: velocity, and temperature at large Prandtl numbers over Pr^(1/3).
    const VELOCITY_GRADIENT: f64 = 0.332;
    const LAYER_RATIO: f64 = 0.982;
    let logarithm = prandtl.log10();
    let (thermal, kinetic) = if prandtl < 3e-4 {
        (
            prandtl.powf(-0.75) * VELOCITY_GRADIENT.powf(1.5) * PI.powf(0.75),
            prandtl.powf(-0.25) * VELOCITY_GRADIENT.sqrt() * PI.powf(0.25),
        )
    } else if prandtl <= 1.0 {
        (prandtl.powf(-0.5355 + 0.033 * logarithm), prandtl.powf(-0.1785 + 0.011 * logarithm))
    } else if prandtl <= 3.0 {
        (prandtl.powf(-0.0355 + 0.033 * logarithm), prandtl.powf(0.3215 + 0.011 * logarithm))
    } else {
        (LAYER_RATIO.powf(1.5), prandtl.cbrt() * LAYER_RATIO.sqrt())
    };
    let common = SQRT_2 * constant * nusselt.sqrt();
    Some(LayerNodes {
        thermal: usable(&[nusselt, prandtl, constant], common * thermal)?,
        kinetic: usable(&[nusselt, prandtl, constant], common * kinetic)?,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn unusable_inputs_give_none() {
        for bad in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY, -1.0, 0.0] {
            assert_eq!(similarity_gradient(bad), None);
            assert_eq!(laminar_plate_nusselt(bad, 0.7), None);
            assert_eq!(laminar_layer_scale(1.0, bad), None);
            assert_eq!(laminar_layer_at_top(bad, 1e6, 0.7), None);
            assert_eq!(laminar_layer_mean(1.0, 1e6, bad), None);
            assert_eq!(layer_from_nusselt(1.0, bad), None);
            assert_eq!(convection_layer(bad, 5.0), None);
            assert_eq!(viscous_layer(1.0, bad), None);
            assert_eq!(boundary_layer_time(1.0, bad, 1e6), None);
            assert_eq!(boundary_layer_velocity(bad, 1e-5, 1e6), None);
            assert_eq!(filling_time(1.0, bad, 1e-5, 1e6), None);
            assert_eq!(diffusion_time(1.0, bad), None);
            assert_eq!(kolmogorov_length(1.0, 1e6, 0.7, bad), None);
            assert_eq!(batchelor_length(1.0, bad, 0.7, 5.0), None);
            assert_eq!(direct_simulation_spacing(1.0, 1e6, bad, 5.0), None);
            assert_eq!(layer_nodes(bad, 0.7, KINETIC_LAYER_CONSTANT), None);
            assert_eq!(layer_nodes(5.0, bad, KINETIC_LAYER_CONSTANT), None);
        }
        assert_eq!(kolmogorov_length(1.0, 1e6, 0.7, 1.0), None);
    }

    #[test]
    fn ranges_of_the_node_formula_meet() {
        for (prandtl, tolerance) in [(3e-4, 0.002), (1.0, 1e-9), (3.0, 0.007)] {
            let below = layer_nodes(30.0, prandtl * (1.0 - 1e-12), KINETIC_LAYER_CONSTANT).unwrap();
            let above = layer_nodes(30.0, prandtl * (1.0 + 1e-12), KINETIC_LAYER_CONSTANT).unwrap();
            assert!((below.thermal / above.thermal - 1.0).abs() < tolerance, "{prandtl} {below:?} {above:?}");
            assert!((below.kinetic / above.kinetic - 1.0).abs() < tolerance, "{prandtl} {below:?} {above:?}");
        }
    }

    #[test]
    fn node_counts_of_the_paper() {
        // The authors' own summary for Pr 0.7: 0.35 Ra^0.15 thermal and 0.31 Ra^0.15 kinetic nodes, Ra 1e6 to 1e10 (recalled).
        // Nusselt numbers of simulations at Pr 0.7: 8.6, 32, 128 at 1e6, 1e8, 1e10 (recalled).
        for (rayleigh, nusselt) in [(1e6_f64, 8.6), (1e8, 32.0), (1e10, 128.0)] {
            let nodes = layer_nodes(nusselt, 0.7, KINETIC_LAYER_CONSTANT).unwrap();
            let thermal = 0.35 * rayleigh.powf(0.15);
            let kinetic = 0.31 * rayleigh.powf(0.15);
            assert!((nodes.thermal / thermal - 1.0).abs() < 0.2, "{nodes:?} {thermal}");
            assert!((nodes.kinetic / kinetic - 1.0).abs() < 0.2, "{nodes:?} {kinetic}");
        }
    }

    #[test]
    fn spacing_and_exact_dissipation() {
        // η = (ν³/ε)^(1/4) with ε = ν³ (Nu - 1) Ra Pr^(-2) / H⁴.
        let (depth, rayleigh, prandtl, nusselt, viscosity) = (0.5_f64, 1e8_f64, 0.7_f64, 32.0, 1.5e-5_f64);
        let dissipation = viscosity.powi(3) * (nusselt - 1.0) * rayleigh / (prandtl.powi(2) * depth.powi(4));
        let expected = (viscosity.powi(3) / dissipation).powf(0.25);
        let got = kolmogorov_length(depth, rayleigh, prandtl, nusselt).unwrap();
        assert!((got / expected - 1.0).abs() < 1e-12);
        assert_eq!(direct_simulation_spacing(depth, rayleigh, prandtl, nusselt), Some(PI * got));
        let water = direct_simulation_spacing(depth, rayleigh, 7.0, nusselt).unwrap();
        let expected = PI * depth * (1.0 / ((nusselt - 1.0) * rayleigh)).powf(0.25);
        assert!((water / expected - 1.0).abs() < 1e-12);
    }

    #[test]
    fn times_are_consistent() {
        // The filling time is the layer time times Ra^(1/4) width over height; the layer diffuses its own thickness in the layer time.
        let (height, width, diffusivity, rayleigh) = (0.3, 0.1, 1.43e-7, 1e8_f64);
        let layer_time = boundary_layer_time(height, diffusivity, rayleigh).unwrap();
        let filling = filling_time(height, width, diffusivity, rayleigh).unwrap();
        assert!((filling / (layer_time * rayleigh.powf(0.25) * width / height) - 1.0).abs() < 1e-12);
        let thickness = laminar_layer_scale(height, rayleigh).unwrap();
        assert!((diffusion_time(thickness, diffusivity).unwrap() / layer_time - 1.0).abs() < 1e-12);
        let top = laminar_layer_at_top(height, rayleigh, 7.0).unwrap();
        assert!((laminar_layer_mean(height, rayleigh, 7.0).unwrap() / top - 0.75).abs() < 1e-12);
    }
}
