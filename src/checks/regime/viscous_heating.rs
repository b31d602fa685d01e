//! What both checks of viscous heating weigh.

use crate::checks::look::Weighed;
use crate::physics::model::RegionPhysics;

/// Brinkman number Br = μ v² / (k ΔT): the heat of friction against the heat that conduction passes. v is the faster of the given
/// and the buoyant velocity. `NaN` where something is not known, and
/// where there is no difference to conduct any heat.
///
/// The buoyant velocity is √(g α ΔT H), and √(Pr) times slower where viscosity holds it back (Pr over 1): the velocity in the layers of
/// Patterson and Imberger, J. Fluid Mech. 100 (1980) 65. With it Br becomes the dissipation number α g H / cp of Gebhart, J. Fluid Mech.
/// 14 (1962) 225.
pub fn brinkman_number(physics: &RegionPhysics) -> Weighed {
    let numbers = &physics.numbers;
    let Some(properties) = &numbers.properties else { return Weighed::given(f64::NAN) };
    if numbers.difference <= 0.0 {
        return Weighed::given(f64::NAN);
    }
    let over_speed_squared = properties.viscosity / (properties.conductivity * numbers.difference);
    let buoyant = numbers.buoyant_velocity / numbers.prandtl.sqrt().max(1.0);
    if numbers.given_velocity > buoyant {
        Weighed::power(over_speed_squared * numbers.given_velocity.powi(2), -1.0, physics.bracket.as_ref())
    } else {
        // Both v² and the heat conducted go with the difference, which cancels.
        Weighed::given(over_speed_squared * buoyant.powi(2))
    }
}

/// The velocity that the number is built on, in words.
pub fn what_moves(physics: &RegionPhysics) -> &'static str {
    let numbers = &physics.numbers;
    if numbers.given_velocity > numbers.buoyant_velocity / numbers.prandtl.sqrt().max(1.0) {
        "the given velocity"
    } else {
        "the buoyant velocity"
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::substances::Properties;

    #[test]
    fn the_buoyant_number_is_the_dissipation_number_at_high_prandtl_numbers() {
        let oil = Properties {
            density: 870.0,
            heat_capacity: 2000.0,
            viscosity: 0.1,
            conductivity: 0.14,
            expansion: 7e-4,
            compressibility: 7e-10,
        };
        let (gravity, difference, height) = (9.81_f64, 20.0, 0.5);
        let mut physics = RegionPhysics::default();
        physics.numbers.properties = Some(oil);
        physics.numbers.difference = difference;
        physics.numbers.prandtl = oil.prandtl();
        physics.numbers.buoyant_velocity = (gravity * oil.expansion * difference * height).sqrt();
        let expected = oil.expansion * gravity * height / oil.heat_capacity;
        assert!((brinkman_number(&physics).value / expected - 1.0).abs() < 1e-12);
        // A journal bearing's film at 5 m/s: 0.1 x 25 / (0.14 x 20) = 0.893.
        physics.numbers.given_velocity = 5.0;
        assert!((brinkman_number(&physics).value - 0.1 * 25.0 / (0.14 * 20.0)).abs() < 1e-12);
    }
}
