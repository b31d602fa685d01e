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
