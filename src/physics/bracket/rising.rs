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
            has_radiation: false,
        };
        let band = (bulk + excess(gravity.low), bulk + AXIS_OVER_MEAN * excess(gravity.high));
        let place = source.releases.as_ref().map(|value| value.origin.place);
        found.add(bulk + excess(gravity.value), band, By::Plume(&source.name.text), place, how);
    }
}

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    fn room(within: &str) -> crate::physics::model::Bracket {
        let text = format!(
            "case \"t\"\n    gravity 9.81 m/s^2\n    ambient 20 degC\nfluid f\n    substance air\n    reference 20 degC\nregion r\n    box 4 m by 4 m by 3 m\n    filled with f\n\
             boundary door of r\n    side west\n    patch 1 m by 2 m\n    opening\nboundary rest of r\n    side remaining\n    wall\n    insulated\n\
             source hob in r\n    releases 1 kW\n{within}run\n    steady\n"
        );
        physics(&text).remove(0).bracket.unwrap()
    }

    #[test]
    fn a_plume_over_a_small_source() {
        let bracket = room("    within 0.02 m^3\n");
        assert_eq!(bracket.highest.set_by, "the plume over source hob");
        // By hand: B = 9.81 · 1000/(1.204 · 1006 · 293.15) = 0.02763 m⁴/s³; Q = 0.1665 · B^(1/3) · 3^(5/3), so
        // Q = 0.314 m³/s and ΔT = 1000/(1.204 · 1006 · 0.314) = 2.6 K. The constant: (6 · 0.117/5) (9 · 0.117/10)^(1/3) π^(2/3).
        let excess = bracket.highest.value - 293.15;
        let constant = 0.1404 * 0.1053_f64.cbrt() * std::f64::consts::PI.powf(2.0 / 3.0);
        let flow = constant * 0.02763_f64.cbrt() * 3_f64.powf(5.0 / 3.0);
        assert!((excess / (1000.0 / (1.204 * 1006.0 * flow)) - 1.0).abs() < 0.02, "{excess} {flow}");
        assert!(bracket.highest.band.1 > 293.15 + 2.0 * excess, "the axis is within the band: {bracket:?}");
    }

    #[test]
    fn a_source_that_fills_the_room_sends_up_none() {
        assert!(room("").highest.value < 293.16);
    }
}
