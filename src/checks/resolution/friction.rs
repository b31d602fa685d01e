//! The friction velocity at the walls of a region, as an estimate.

use crate::physics::model::{ArrangementKind, RegionPhysics};

/// u_τ = √(τ_w / ρ), m/s: the larger of that of the buoyant layer on an upright wall and that of the given velocity; `NaN` where
/// neither is known.
pub fn friction_velocity(physics: &RegionPhysics) -> f64 {
    buoyant(physics).max(driven(physics))
}

/// Of the driven flow: u_τ = v √(cf / 2), cf = 0.0592 Re^(-1/5) (flat plate, turbulent; Schlichting, Boundary-Layer Theory, recalled).
fn driven(physics: &RegionPhysics) -> f64 {
    let numbers = &physics.numbers;
    numbers.given_velocity * (0.5 * 0.0592 * numbers.reynolds.powf(-0.2)).sqrt()
}

/// Of the turbulent layer at the top of an upright wall, by Eckert and Jackson, Analysis of Turbulent Free-Convection Boundary Layer
/// on Flat Plate, NACA TN 2207 (1950) (formulas recalled): with F = 1 + 0.494 Pr^(2/3),
/// u₁ = 1.185 (ν/x) Gr^(1/2) F^(-1/2), δ = 0.565 x Gr^(-1/10) Pr^(-8/15) F^(1/10), τ_w/ρ = 0.0225 u₁² (ν / (u₁ δ))^(1/4).
fn buoyant(physics: &RegionPhysics) -> f64 {
    let (numbers, geometry) = (&physics.numbers, &physics.geometry);
    // Each wall of a cavity sees half of the difference: the core lies between.
    let share = match physics.arrangement.kind {
        ArrangementKind::SideHeatedCavity => 0.5,
        ArrangementKind::VerticalPlate | ArrangementKind::VerticalChannel => 1.0,
        _ => return f64::NAN,
    };
    let Some(properties) = &numbers.properties else { return f64::NAN };
    let height = geometry.height;
    let grashof = share * numbers.grashof * (height / geometry.length).powi(3);
    let (_, shear) = layer(height, grashof, numbers.prandtl, properties.kinematic_viscosity());
    shear.sqrt()
}

/// The velocity u₁ of the layer, m/s, and its wall shear τ_w/ρ, m²/s².
fn layer(height: f64, grashof: f64, prandtl: f64, viscosity: f64) -> (f64, f64) {
    let f = 1.0 + 0.494 * prandtl.powf(2.0 / 3.0);
    let velocity = 1.185 * viscosity / height * grashof.sqrt() / f.sqrt();
    let thickness = 0.565 * height * grashof.powf(-0.1) * prandtl.powf(-8.0 / 15.0) * f.powf(0.1);
    let shear = 0.0225 * velocity * velocity * (viscosity / (velocity * thickness)).powf(0.25);
    (velocity, shear)
}

#[cfg(test)]
mod tests {
    use super::layer;
    use crate::physics::correlations::vertical_plate;

    #[test]
    fn the_shear_gives_the_heat_transfer_that_is_measured() {
        // Outside check: by the analogy that the layer is built on, Nu_x = τ_w x Pr^(1/3) / (ρ ν u₁). Its mean over the height,
        // Nu_x / 1.2 as Nu goes with x^1.2, is held against Churchill and Chu 1975, which fits measurements.
        let (height, prandtl, viscosity) = (3.0, 0.71, 1.6e-5);
        for grashof in [1e10, 1e11, 1e12] {
            let (velocity, shear) = layer(height, grashof, prandtl, viscosity);
            let local = shear * height * f64::powf(prandtl, 1.0 / 3.0) / (viscosity * velocity);
            let measured = vertical_plate::isothermal(grashof * prandtl, prandtl).value;
            assert!((local / 1.2 / measured - 1.0).abs() < 0.25, "{grashof}: {} {measured}", local / 1.2);
        }
    }
}
