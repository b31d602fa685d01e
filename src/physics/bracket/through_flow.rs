//! Works out what enters a space and at what temperature: mass flow times heat capacity, for the heat balance.
//!
//! Before: `boundary supply` / `inlet` / `enters at 0.05 m^3/s` / `carries 16 degC`, a load of 600 W.
//! After: ṁ cp = 60 W/K, so that what leaves is 10 K warmer.

use super::Question;
use super::given::let_in;
use crate::case::model::Boundary;
use crate::physics::cover::area_of;
use crate::vocabulary::statements::{MASS_FLOW, SPEED, VOLUME_FLOW};

/// Σ ṁ cp, W/K (W/(m K) in a plane case), and the mean temperature of what enters, K. Zero where nothing is driven in;
/// `None` where something is and its temperature or rate is not known.
pub fn inflow(question: &Question<'_>) -> Option<(f64, f64)> {
    let (mut flow, mut carried) = (0.0, 0.0);
    for boundary in question.case.boundaries_of(question.region) {
        let Some(rate) = &boundary.enters else { continue };
        let (temperature, _) = let_in(question.case, boundary)?;
        let fluid = question.source.at(temperature.si);
        let mass = if rate.dimension == MASS_FLOW {
            rate.si
        } else if rate.dimension == VOLUME_FLOW {
            rate.si * fluid.density
        } else if rate.dimension == SPEED {
            rate.si * area_of(question.case, question.region, boundary) * fluid.density
        } else {
            return None;
        };
        let capacity = mass * fluid.heat_capacity;
        if !capacity.is_finite() {
            return None;
        }
        flow += capacity;
        carried += capacity * temperature.si;
    }
    Some((flow, if flow > 0.0 { carried / flow } else { f64::NAN }))
}

/// Whether a boundary lets fluid in at a rate that buoyancy settles.
pub fn is_free(boundary: &Boundary) -> bool {
    boundary.enters.is_none() && crate::physics::conditions::is_open(boundary)
}

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    fn room(rate: &str) -> f64 {
        let text = format!(
            "fluid f\n    substance air\n    reference 20 degC at 1 bar\nregion r\n    box 4 m by 5 m by 3 m\n    filled with f\n\
             boundary supply of r\n    side west\n    patch 0.5 m by 0.2 m\n    inlet\n    enters at {rate}\n    carries 16 degC\n\
             boundary exhaust of r\n    side east\n    patch 0.5 m by 0.2 m\n    outlet\n\
             boundary rest of r\n    side remaining\n    wall\n    insulated\nsource load in r\n    releases 600 W\nrun\n    steady\n"
        );
        physics(&text).remove(0).bracket.unwrap().highest.value
    }

    #[test]
    fn what_leaves_carries_the_load() {
        // Air at 16 degC and 1 bar: 1.2053 kg/m³, 1006 J/(kg K) (CoolProp 8.0.0).
        let expected = 289.15 + 600.0 / (0.05 * 1.2053 * 1006.0);
        let by_volume = room("0.05 m^3/s");
        assert!((by_volume - expected).abs() < 0.05, "{by_volume} {expected}");
        assert!((room("0.5 m/s") - by_volume).abs() < 1e-3);
        assert!((room("0.060265 kg/s") - by_volume).abs() < 0.05);
        assert!((room("180 m^3/h") - by_volume).abs() < 1e-6);
    }
}
