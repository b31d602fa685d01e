//! Inclined plate: the laminar vertical plate with gravity's component along the plate.

use super::{Correlation, Estimate, estimate, vertical_plate};

/// Inclined plate, laminar.
pub const INCLINED: Correlation = Correlation {
    name: "inclined plate, laminar",
    source: "Rich, Trans. ASME 75 (1953) 489-499, and Vliet, J. Heat Transfer 91 (1969) 511-516: Churchill and Chu 1975 \
     with g cos(tilt) for g",
    range: "tilt up to 60 degrees from the vertical and Rayleigh number times cos(tilt) up to 1e9; hot face down or cold \
     face up (on the other face the flow lifts off, and transition comes far earlier); limits recalled",
    scatter: 0.15,
    scatter_basis: "common practice",
};

/// Inclined isothermal plate. Rayleigh number on the plate's length, with the whole of gravity;
/// `tilt` from the vertical in radians, either way (0 vertical).
///
/// At 90 degrees and beyond no component drives the flow along the plate: the value without motion.
pub fn inclined(rayleigh: f64, prandtl: f64, tilt: f64) -> Estimate {
    let tilt = tilt.abs();
    let along = tilt.cos().max(0.0);
    let driving = if tilt < core::f64::consts::FRAC_PI_2 { rayleigh * along } else { 0.0 };
    let laminar = vertical_plate::isothermal_laminar(driving, prandtl);
    // A rounding's width, so that 60 degrees turned into radians is within the limit of 60.
    let inside = laminar.inside_range && tilt <= 60_f64.to_radians() + 1e-12;
    estimate(&INCLINED, &[rayleigh, prandtl, tilt], 0.68, inside, || laminar.value)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn upright_is_the_vertical_plate_and_sixty_degrees_halves_gravity() {
        let upright = inclined(1e7, 0.71, 0.0).value;
        assert_eq!(upright, vertical_plate::isothermal_laminar(1e7, 0.71).value);
        let leaning = inclined(1e7, 0.71, 60_f64.to_radians());
        assert!((leaning.value - vertical_plate::isothermal_laminar(5e6, 0.71).value).abs() < 1e-9);
        assert!(leaning.inside_range);
        assert!(!inclined(1e7, 0.71, 1.1).inside_range);
        assert_eq!(inclined(1e7, 0.71, 1e9).value, 0.68);
        assert_eq!(inclined(1e7, 0.71, f64::NAN).value, 0.68);
    }
}
