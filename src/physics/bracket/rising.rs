//! Estimates how much warmer than the fluid around it the plume over a small source is where it meets the ceiling, and a
//! space that is open to surroundings at one temperature.
//!
//! Before: `source hob in kitchen` `releases 1 kW` `within 0.02 m^3`, an opening to 20 degC.
//! After: 20 degC plus the plume's excess at the ceiling (Morton, Taylor and Turner 1956).

use super::reach::{By, How};
use super::{Found, Question};
use crate::case::model::Source;
use crate::physics::correlations::plume;
use crate::vocabulary::statements::POWER;

/// Up to this share of the region's volume a source is small enough to send up a plume of its own (common practice).
const SMALL: f64 = 0.1;
/// On its axis a plume is about this many times as warm as on average (top-hat over Gaussian profile; Morton, Taylor
/// and Turner 1956).
const AXIS_OVER_MEAN: f64 = 2.0;

/// Power of a source, W.
pub fn power(source: &Source, volume: f64) -> f64 {
    let Some(releases) = &source.releases else { return 0.0 };
    if releases.dimension == POWER {
        releases.si
    } else {
        releases.si * source.within.as_ref().map_or(volume, |within| within.si)
    }
}

/// Adds the plumes over the small sources of a region to what was found, above fluid at `bulk` K.
pub fn plumes<'a>(question: &Question<'a>, found: &mut Found<'a>, bulk: f64) {
    let height = question.placement.height;
    let own = question
        .case
        .sources
        .iter()
        .filter(|source| source.region.as_ref().is_some_and(|region| region.text == question.region.name.text));
    for source in own {
        let power = power(source, question.volume);
        let is_small = source.within.as_ref().is_some_and(|within| within.si <= SMALL * question.volume);
        if !is_small || power.is_nan() || power <= 0.0 || question.is_inverted {
            continue;
        }
        let fluid = question.source.at(bulk);
        let expansion = fluid.expansion.abs();
        let flux = plume::buoyancy_flux(question.gravity, expansion, power, fluid.density, fluid.heat_capacity);
        let gravity = plume::point(flux, height).reduced_gravity;
        if gravity.value <= 0.0 {
            continue;
        }
        let excess = |reduced| plume::temperature_excess(reduced, question.gravity, expansion);
        let how = How {
            method: "the plume over the source mixes with the fluid around it up to the ceiling; its mean there, up to its axis as the upper edge",
            correlation: Some(&plume::POINT),
            is_inside_range: gravity.inside_range,
            film: bulk,
            holds: question.source.holds_at(bulk),
            converged: true,
        };
        let band = (bulk + excess(gravity.low), bulk + AXIS_OVER_MEAN * excess(gravity.high));
        let place = source.releases.as_ref().map(|value| value.origin.place);
        found.add(bulk + excess(gravity.value), band, By::Plume(&source.name.text), place, how);
    }
}
