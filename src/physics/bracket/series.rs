//! Estimates the temperatures of a hot and a cold side that face each other: heat passes from what lies behind the one,
//! through the fluid, to what lies behind the other, resistances in series.
//!
//! Before: `boards` (west) `heated by 180 W`, `skin` (east) `exchanges 6 W/m^2/K with 8 degC`.
//! After: 180 W puts the skin at 8 degC + 180 W / (6 W/m²/K · area), and the boards above it by the difference at which
//! the side-heated cavity carries 180 W.
//!
//! Thermal resistances in series: Fourier's and Newton's laws; the fluid's by the correlation of the arrangement.

use super::root;
use super::{Found, Question};
use crate::physics::conditions::{Condition, STEFAN_BOLTZMANN};
use crate::physics::convection::{Edge, conductance, of_enclosure};
use crate::physics::correlations::Chosen;
use crate::physics::fluid_state::Transport;
use crate::physics::roles::Role;

/// Closeness of a difference, K.
const TOLERANCE: f64 = 1e-4;

/// One of the two sides.
struct Sheet<'a> {
    condition: Condition<'a>,
    area: f64,
    /// Index of one of its walls.
    wall: usize,
}

impl Sheet<'_> {
    /// Its temperature when `heat`, W, passes from it into the fluid.
    fn temperature(&self, heat: f64) -> Option<f64> {
        self.condition.temperature_at(heat / self.area)
    }

    /// The heat, W, where nothing but a flux is prescribed.
    fn fixed(&self) -> Option<f64> {
        (!self.condition.is_level()).then_some(self.condition.flux * self.area)
    }
}

/// The two sides' temperatures and what they rest on; `None` where the level floats or the fluid's properties are not
/// known, or where a side has several conditions.
pub fn two_sides<'a>(question: &Question<'a>) -> Option<Found<'a>> {
    let hot = sheet(question, Role::Hot)?;
    let cold = sheet(question, Role::Cold)?;
    let guess = 0.5 * (level(&hot).or_else(|| level(&cold))? + level(&cold).or_else(|| level(&hot))?);
    let source = question.source;
    let mut film = guess;
    let mut fluid = source.at(film);
    let mut result = solve(question, &hot, &cold, &fluid, film, Edge::Value)?;
    let has_radiation = question.has_radiation();
    let mut converged = source.is_constant() && !has_radiation;
    film = 0.5 * (result.0 + result.1);
    // The film temperature of a cavity moves little with the properties taken at it: repeated substitution settles
    // within a few passes, and is halved where it should swing.
    for pass in 0..12 {
        if converged {
            break;
        }
        fluid = source.at(film);
        result = solve(question, &hot, &cold, &fluid, film, Edge::Value)?;
        let next = 0.5 * (result.0 + result.1);
        converged = (next - film).abs() < 0.02;
        film = if pass < 4 { next } else { 0.5 * (next + film) };
    }
    let (hot_temperature, cold_temperature, chosen) = result;
    let weak = solve(question, &hot, &cold, &fluid, film, Edge::Low);
    let strong = solve(question, &hot, &cold, &fluid, film, Edge::High);
    let band = |pick: fn(&(f64, f64, Chosen)) -> f64| {
        let edges = [weak.as_ref().map_or(f64::NAN, pick), strong.as_ref().map_or(f64::NAN, pick)];
        (edges[0].min(edges[1]), edges[0].max(edges[1]))
    };
    let mut found = Found::new(question, 0.5 * (hot_temperature + cold_temperature));
    found.method = "heat passes from side to side through the fluid, resistances in series";
    found.correlation = Some(chosen.correlation);
    found.is_inside_range = chosen.estimate.inside_range;
    found.film = film;
    found.converged = converged;
    found.set(hot.wall, hot_temperature, band(|result| result.0));
    found.set(cold.wall, cold_temperature, band(|result| result.1));
    Some(found)
}

/// The side of a role; `None` where its walls differ in what holds on them.
fn sheet<'a>(question: &Question<'a>, role: Role) -> Option<Sheet<'a>> {
    let mut own =
        question.walls.iter().enumerate().filter(|(index, _)| question.placement.roles.get(*index) == Some(&role));
    let (wall, first) = own.next()?;
    if own.next().is_some() {
        return None;
    }
    Some(Sheet { condition: first.condition, area: first.piece.area, wall })
}

fn level(sheet: &Sheet<'_>) -> Option<f64> {
    sheet.condition.anchor()
}

/// Share of black-body exchange between two sides that face each other, on the smaller one's area: 1/(1/εi + (Ai/Ao)(1/εo − 1))
/// (Christiansen, Ann. Phys. Chem. 255 (1883) 267-283; recalled; parallel plates for equal areas). 0 without radiation.
fn radiative_exchange(question: &Question<'_>, hot: &Sheet<'_>, cold: &Sheet<'_>) -> f64 {
    let emissivity = |sheet: &Sheet<'_>| question.walls.get(sheet.wall).map_or(0.0, |wall| question.emissivity(wall));
    let (inner, outer) = if hot.area < cold.area { (hot, cold) } else { (cold, hot) };
    let (of_inner, of_outer) = (emissivity(inner), emissivity(outer));
    if of_inner <= 0.0 || of_outer <= 0.0 {
        return 0.0;
    }
    1.0 / (1.0 / of_inner + inner.area / outer.area * (1.0 / of_outer - 1.0))
}

/// Hot and cold temperature and the correlation, with fixed properties.
fn solve(
    question: &Question<'_>,
    hot: &Sheet<'_>,
    cold: &Sheet<'_>,
    fluid: &Transport,
    film: f64,
    edge: Edge,
) -> Option<(f64, f64, Chosen)> {
    let placement = question.placement;
    let chosen = |difference: f64| {
        let rayleigh = fluid.rayleigh(question.gravity, difference, placement.spacing);
        if rayleigh.is_finite() { of_enclosure(placement, rayleigh, fluid.prandtl()) } else { None }
    };
    // By the inner face of an annulus; for flat sides both are alike.
    let area = if hot.area < cold.area { hot.area } else { cold.area };
    let exchange = radiative_exchange(question, hot, cold);
    let passing = |difference: f64| {
        let (warm, cool) = (film + 0.5 * difference, film - 0.5 * difference);
        let radiated = area * exchange * STEFAN_BOLTZMANN * (warm * warm + cool * cool) * 2.0 * film * difference;
        chosen(difference).map_or(f64::NAN, |chosen| {
            conductance(placement, area, fluid.conductivity, edge.of(&chosen.estimate)) * difference + radiated
        })
    };
    let carries = |heat: f64| {
        if heat <= 0.0 {
            return None;
        }
        let residual = |logarithm: f64| passing(logarithm.exp()).ln() - heat.ln();
        let root = root::near(-0.8 * residual(0.0), 0.3, (-40.0, 14.0), 1e-8, residual)?;
        Some(root.at.exp())
    };
    let (hot_temperature, cold_temperature) = match (hot.fixed(), cold.fixed()) {
        (Some(_), Some(_)) => return None,
        (Some(heat), None) => {
            let cold_temperature = cold.temperature(-heat)?;
            (cold_temperature + carries(heat)?, cold_temperature)
        }
        (None, Some(heat)) => {
            let hot_temperature = hot.temperature(-heat)?;
            (hot_temperature, hot_temperature - carries(-heat)?)
        }
        (None, None) => {
            let most = hot.temperature(0.0)? - cold.temperature(0.0)?;
            if most <= 0.0 {
                return None;
            }
            let left = |difference: f64| {
                let heat = passing(difference);
                match (hot.temperature(heat), cold.temperature(-heat)) {
                    (Some(hot), Some(cold)) => hot - cold - difference,
                    // More heat than any temperature behind could give or take.
                    _ if heat.is_nan() => f64::NAN,
                    _ => -difference - 1.0,
                }
            };
            let root = root::between(0.0, most, TOLERANCE * 1e-2, left)?;
            let heat = passing(root.at);
            (hot.temperature(heat)?, cold.temperature(-heat)?)
        }
    };
    let chosen = chosen(hot_temperature - cold_temperature)?;
    (hot_temperature.is_finite() && cold_temperature.is_finite()).then_some((hot_temperature, cold_temperature, chosen))
}

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    fn cavity(hot: &str, cold: &str, run: &str) -> crate::physics::model::RegionPhysics {
        physics(&format!(
            "fluid f\n    substance air\n    reference 20 degC\nregion r\n    box 0.1 m by 1 m by 0.8 m\n    filled with f\n\
             boundary hot of r\n    side west\n    wall\n    {hot}\nboundary cold of r\n    side east\n    wall\n    {cold}\n\
             boundary rest of r\n    side remaining\n    wall\n    insulated\nrun\n    {run}\n"
        ))
        .remove(0)
    }

    #[test]
    fn one_heat_passes_every_resistance() {
        let cavity = cavity("exchanges 8 W/m^2/K with 60 degC", "exchanges 20 W/m^2/K with -10 degC", "steady");
        let bracket = cavity.bracket.unwrap();
        let (hot, cold) = (bracket.highest.value, bracket.lowest.value);
        let from_hot = 8.0 * (333.15 - hot);
        let to_cold = 20.0 * (cold - 263.15);
        let between = cavity.numbers.heat_transfer_coefficient * (hot - cold);
        assert!((from_hot / to_cold - 1.0).abs() < 1e-4, "{from_hot} {to_cold}");
        assert!((from_hot / between - 1.0).abs() < 2e-3, "{from_hot} {between}");
        assert!(bracket.highest.estimate.unwrap().contains("Berkovsky and Polevikov"));
    }

    #[test]
    fn a_flux_sets_the_difference_from_the_cold_side() {
        let cavity = cavity("heated by 100 W/m^2", "exchanges 10 W/m^2/K with 20 degC", "steady");
        let bracket = cavity.bracket.unwrap();
        assert!((bracket.lowest.value - 303.15).abs() < 1e-6, "{bracket:?}");
        assert_eq!(bracket.lowest.band, (bracket.lowest.value, bracket.lowest.value));
        let passing = cavity.numbers.heat_transfer_coefficient * cavity.numbers.difference;
        assert!((passing / 100.0 - 1.0).abs() < 2e-3, "{passing}");
    }

    #[test]
    fn a_cooling_flux_below_a_held_side() {
        let cavity = cavity("held at 40 degC", "cooled by 50 W/m^2", "steady");
        let bracket = cavity.bracket.unwrap();
        assert!((bracket.highest.value - 313.15).abs() < 1e-9 && bracket.highest.estimate.is_none());
        let passing = cavity.numbers.heat_transfer_coefficient * cavity.numbers.difference;
        assert!((passing / 50.0 - 1.0).abs() < 2e-3, "{passing}");
    }

    #[test]
    fn two_fluxes_leave_the_level_open() {
        assert!(cavity("heated by 50 W/m^2", "cooled by 50 W/m^2", "steady").bracket.is_none());
    }

    #[test]
    fn radiation_between_the_sides_counts_where_it_is_computed() {
        let cavity = |radiation: &str| {
            physics(&format!(
                "fluid f\n    substance air\n    reference 20 degC\nregion r\n    box 0.1 m by 1 m by 0.8 m\n    filled with f\n    {radiation}\n\
                 boundary hot of r\n    side west\n    wall\n    heated by 200 W/m^2\n    emissivity 0.8\n\
                 boundary cold of r\n    side east\n    wall\n    held at 20 degC\n    emissivity 0.6\nrun\n    steady\n"
            ))
            .remove(0)
        };
        let (with, without) = (cavity("radiation surface-to-surface"), cavity("radiation none"));
        let hot = with.bracket.as_ref().unwrap().highest.value;
        assert!(hot < without.bracket.unwrap().highest.value - 20.0);
        // Parallel plates: σ (T⁴ − T⁴) / (1/0.8 + 1/0.6 − 1).
        let radiated = 5.670_374_419e-8 * (hot.powi(4) - 293.15_f64.powi(4)) / (1.0 / 0.8 + 1.0 / 0.6 - 1.0);
        let convected = with.numbers.heat_transfer_coefficient * (hot - 293.15);
        assert!(((radiated + convected) / 200.0 - 1.0).abs() < 2e-3, "{radiated} {convected}");
        assert!(with.bracket.unwrap().highest.estimate.unwrap().contains("with radiation between the surfaces"));
    }

    #[test]
    fn a_cold_side_that_radiates() {
        let cavity = cavity("heated by 100 W/m^2", "radiates to 0 degC\n    emissivity 0.5", "steady");
        let cold = cavity.bracket.unwrap().lowest.value;
        let lost = 0.5 * 5.670_374_419e-8 * (cold.powi(4) - 273.15_f64.powi(4));
        assert!((lost / 100.0 - 1.0).abs() < 1e-6, "{lost}");
    }
}
