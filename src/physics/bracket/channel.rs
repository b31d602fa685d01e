//! Estimates the temperatures of the plates of an upright channel that draws in fluid from below.
//!
//! Before: `channel 8 mm by 0.2 m`, both plates `heated by 150 W/m^2`, fluid at 25 degC below.
//! After: the temperature of the plates' upper edge (Bar-Cohen and Rohsenow 1984, uniform flux).

use super::reach::How;
use super::root;
use super::{Found, Question, wall};
use crate::case::model::Side;
use crate::physics::convection::{Edge, Surface};
use crate::physics::correlations::{Chosen, vertical_channel};
use crate::physics::fluid_state::Transport;

/// The plates' temperatures above fluid drawn in at `inlet` K.
pub fn plates<'a>(question: &Question<'a>, inlet: f64) -> Option<Found<'a>> {
    let is_plate = |side: Side| matches!(side, Side::West | Side::East);
    let active =
        question.walls.iter().filter(|wall| !wall.is_open && is_plate(wall.piece.side) && wall.condition.is_active());
    let is_both = active.count() > 1;
    let mut found = Found::new(question, inlet);
    found.bulk = inlet;
    for (index, one) in question.walls.iter().enumerate() {
        let condition = &one.condition;
        if one.is_open || !condition.is_active() || condition.held.is_some() {
            continue;
        }
        if condition.is_level() || !is_plate(one.piece.side) {
            // What no correlation for channels covers: as an upright plate in fluid at the inlet's temperature.
            let surface = Surface::Upright(question.placement.run);
            let inside = wall::Inside { surface, gravity: question.gravity, emissivity: 0.0 };
            let at = wall::temperature(question.source, inside, condition, inlet)?;
            found.set_wall(index, &at, at.band);
            continue;
        }
        let (edge, chosen, film, converged) = upper_edge(question, condition.flux, inlet, is_both)?;
        let how = How {
            method: "temperature of the plate's upper edge, at which the heat given passes into the fluid drawn in",
            correlation: Some(chosen.correlation),
            is_inside_range: chosen.estimate.inside_range,
            film,
            holds: question.source.holds_at(film),
            converged,
            has_radiation: false,
        };
        found.set_how(index, edge.0, edge.0, (edge.1.min(edge.2), edge.1.max(edge.2)), how);
    }
    Some(found)
}

type Edges = (f64, f64, f64);

/// Temperature of the upper edge: value, and with the correlation's weak and strong edge.
fn upper_edge(question: &Question<'_>, flux: f64, inlet: f64, is_both: bool) -> Option<(Edges, Chosen, f64, bool)> {
    let placement = question.placement;
    let (spacing, height) = (placement.spacing, placement.run);
    let chosen = |fluid: &Transport| {
        let number = question.gravity * fluid.expansion.abs() * flux.abs() * spacing.powi(5)
            / (fluid.conductivity * fluid.kinematic_viscosity * fluid.diffusivity * height);
        if is_both {
            Chosen { correlation: &vertical_channel::FLUX_BOTH, estimate: vertical_channel::flux_both(number) }
        } else {
            Chosen { correlation: &vertical_channel::FLUX_ONE, estimate: vertical_channel::flux_one(number) }
        }
    };
    let edge_with = |fluid: &Transport, edge: Edge| {
        inlet + flux * spacing / (fluid.conductivity * edge.of(&chosen(fluid).estimate))
    };
    let source = question.source;
    let first = edge_with(&source.at(inlet), Edge::Value);
    let residual = |wall: f64| wall - edge_with(&source.at(0.5 * (wall + inlet)), Edge::Value);
    let solved = root::near(first, 0.1 * (first - inlet).abs() + 1e-4, (1.0, 1e5), 1e-4, residual)?;
    let film = 0.5 * (solved.at + inlet);
    let fluid = source.at(film);
    let edges = (solved.at, edge_with(&fluid, Edge::Low), edge_with(&fluid, Edge::High));
    Some((edges, chosen(&fluid), film, solved.converged))
}

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    fn channel(west: &str, east: &str) -> crate::physics::model::RegionPhysics {
        physics(&format!(
            "case \"t\"\n    ambient 25 degC\nfluid f\n    substance air\n    reference 25 degC\nregion r\n    channel 8 mm by 0.2 m\n    filled with f\n\
             boundary one of r\n    side west\n    wall\n    {west}\nboundary two of r\n    side east\n    wall\n    {east}\n\
             boundary ends of r\n    side bottom, top\n    opening\nrun\n    steady\n"
        ))
        .remove(0)
    }

    #[test]
    fn both_plates_run_hotter_than_one() {
        let peak = |west: &str, east: &str| channel(west, east).bracket.unwrap().highest.value;
        let flux = "heated by 150 W/m^2";
        assert!(peak(flux, flux) > peak(flux, "insulated") + 5.0);
        assert!(peak("heated by 300 W/m^2", "insulated") > peak(flux, "insulated") + 5.0);
    }

    #[test]
    fn the_nusselt_number_carries_the_flux() {
        let channel = channel("heated by 150 W/m^2", "heated by 150 W/m^2");
        let passing = channel.numbers.heat_transfer_coefficient * channel.numbers.difference;
        assert!((passing / 150.0 - 1.0).abs() < 2e-3, "{passing}");
        let text = channel.bracket.unwrap().highest.estimate.unwrap();
        assert!(text.contains("Bar-Cohen and Rohsenow"), "{text}");
    }

    #[test]
    fn plates_that_are_held() {
        let channel = channel("held at 60 degC", "held at 60 degC");
        let bracket = channel.bracket.unwrap();
        assert!(!bracket.rests_on_estimate() && (bracket.span() - 35.0).abs() < 1e-9);
        assert!(channel.numbers.nusselt > 0.0 && channel.numbers.nusselt_basis.contains("both plates isothermal"));
    }
}
