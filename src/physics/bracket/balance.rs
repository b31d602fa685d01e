//! Estimates the temperature of the fluid in the middle of a space by its heat balance: sources, walls by flux, walls that
//! lose heat, and fluid that flows through.
//!
//! Before: `source lamp` `releases 40 W`, all walls `exchanges 5 W/m^2/K with 20 degC`.
//! After: the fluid's temperature at which the walls lose 40 W, each through its coefficient outside and that of an
//! upright or level plate inside.
//!
//! Steady energy balance of a well mixed space, Σ h A (Tw − T) + Σ ṁ cp (Tin − T) + P = 0 (first law); the walls' inner
//! coefficients are those of plates in fluid at T (common practice for rooms and cabinets).

use super::root;
use super::wall::{self, Inside, WallTemperature};
use super::{Found, Question};
use crate::case::model::Boundary;
use crate::physics::conditions::Condition;
use crate::physics::convection::{Edge, Surface, of_wall};
use crate::physics::fluid_state::Transport;
use crate::physics::geometry::Sizes;

/// A space as a balance sees it.
pub struct Network<'q, 'a> {
    /// What is asked.
    pub question: &'q Question<'a>,
    parts: Vec<Part<'a>>,
    /// Σ ṁ cp of what enters, W/K.
    flow: f64,
    /// Its mean temperature, K.
    flow_temperature: f64,
}

/// Walls of one boundary that are alike: the upright sides of a box that lose heat together count once.
struct Part<'a> {
    condition: Condition<'a>,
    area: f64,
    /// Emissivity, where walls radiate to each other; else 0.
    emissivity: f64,
    /// Surface where it is hotter than the fluid.
    hotter: Surface,
    /// Surface where it is colder.
    colder: Surface,
    /// The walls.
    walls: Vec<usize>,
}

impl Part<'_> {
    /// What it passes heat by against fluid at `bulk` K.
    fn inside(&self, gravity: f64, bulk: f64) -> Inside {
        let is_hotter = match self.condition.temperature_at(0.0) {
            Some(outer) => outer > bulk,
            None => self.condition.flux > 0.0,
        };
        let surface = if is_hotter { self.hotter } else { self.colder };
        Inside { surface, gravity, emissivity: self.emissivity }
    }
}

/// Temperatures between which the fluid's is looked for, K.
const RANGE: (f64, f64) = (1.0, 1e5);
/// Closeness of a solution, K.
const TOLERANCE: f64 = 1e-3;

impl<'q, 'a> Network<'q, 'a> {
    /// The network of a space; `None` where what flows in is not known.
    pub fn new(question: &'q Question<'a>, sizes: &Sizes) -> Option<Network<'q, 'a>> {
        let mut parts: Vec<Part<'a>> = Vec::with_capacity(question.walls.len());
        for (index, wall) in question.walls.iter().enumerate() {
            if wall.is_open || !wall.condition.is_active() {
                continue;
            }
            let (hotter, colder) = of_wall(wall, sizes, question.placement, question.is_inverted);
            let alike = |part: &&mut Part<'a>| {
                part.hotter == hotter && part.colder == colder && is_of(question, part, wall.piece.boundary)
            };
            match parts.iter_mut().find(alike) {
                Some(part) => {
                    part.area += wall.piece.area;
                    part.walls.push(index);
                }
                None => {
                    let condition = wall.condition;
                    let emissivity = question.emissivity(wall);
                    let area = wall.piece.area;
                    parts.push(Part { condition, area, emissivity, hotter, colder, walls: vec![index] });
                }
            }
        }
        let (flow, flow_temperature) = super::through_flow::inflow(question)?;
        Some(Network { question, parts, flow, flow_temperature })
    }

    /// Whether anything fixes a level of temperature.
    pub fn has_level(&self) -> bool {
        self.flow > 0.0 || self.parts.iter().any(|part| part.condition.is_level())
    }

    /// The mean of the temperatures that walls and inflow draw to, K.
    fn mean_anchor(&self) -> Option<f64> {
        let walls = self.parts.iter().filter_map(|part| part.condition.anchor());
        let inflow = (self.flow > 0.0).then_some(self.flow_temperature);
        let (sum, count) = walls.chain(inflow).fold((0.0, 0.0), |(sum, count), anchor| (sum + anchor, count + 1.0));
        (count > 0.0).then(|| sum / count)
    }

    /// Heat into a fluid at `bulk` K, W, with fixed properties. `NaN` where it cannot be worked out.
    pub fn heat(&self, bulk: f64, fluid: &Transport, edge: Edge) -> f64 {
        let gravity = self.question.gravity;
        let carried = if self.flow > 0.0 { self.flow * (self.flow_temperature - bulk) } else { 0.0 };
        let mut heat = self.question.power + carried;
        for part in &self.parts {
            let condition = &part.condition;
            let flux = if let Some(held) = condition.held {
                part.inside(gravity, bulk).coefficient(fluid, held.si, bulk, false, edge) * (held.si - bulk)
            } else if condition.is_level() {
                let wall = wall::with_properties(fluid, part.inside(gravity, bulk), condition, bulk, edge);
                wall.map_or(f64::NAN, |wall| condition.flux_at(wall))
            } else {
                condition.flux
            };
            heat += flux * part.area;
        }
        heat
    }

    /// The fluid's temperature at which the balance closes, K, with fixed properties.
    pub fn bulk(&self, guess: f64, reach: f64, fluid: &Transport, edge: Edge) -> Option<root::Root> {
        root::near(guess, reach, RANGE, TOLERANCE, |bulk| self.heat(bulk, fluid, edge))
    }

    /// The fluid's temperature with properties taken at it; `None` where nothing fixes a level.
    pub fn settled(&self) -> Option<Settled> {
        if !self.has_level() {
            return None;
        }
        let source = self.question.source;
        let mut bulk = self.mean_anchor()?;
        let mut fluid = source.at(bulk);
        let mut converged = false;
        let mut reach = 5.0;
        for pass in 0..12 {
            let solved = self.bulk(bulk, reach, &fluid, Edge::Value)?;
            let moved = (solved.at - bulk).abs();
            // Halved once it should swing.
            bulk = if pass < 6 { solved.at } else { 0.5 * (bulk + solved.at) };
            // Over a kelvin properties change by some tenths of a percent: what that moves is not looked at.
            converged = solved.converged && (source.is_constant() || moved < 1.0);
            if converged {
                break;
            }
            reach = 0.05 * moved;
            fluid = source.at(bulk);
        }
        let (weak, strong) = self.edges(bulk, &fluid);
        Some(Settled { bulk, band: (weak.min(strong), weak.max(strong)), fluid, converged })
    }

    /// The fluid's temperature with the inner coefficients at the lower and at the upper edge of their bands.
    pub fn edges(&self, bulk: f64, fluid: &Transport) -> (f64, f64) {
        let edge = |edge| self.bulk(bulk, 1.0, fluid, edge).map_or(f64::NAN, |root| root.at);
        (edge(Edge::Low), edge(Edge::High))
    }

    /// Fills in the walls' temperatures against a fluid at `bulk` K within `band`, and the fluid's own.
    pub fn fill(&self, found: &mut Found<'a>, bulk: f64, band: (f64, f64)) {
        let question = self.question;
        found.bulk = bulk;
        found.add_fluid(bulk, band);
        // Where an edge could not be solved the value stands for it.
        let band = (if band.0.is_finite() { band.0 } else { bulk }, if band.1.is_finite() { band.1 } else { bulk });
        let mut fluid = None;
        for part in self.parts.iter().filter(|part| part.condition.held.is_none()) {
            let inside = part.inside(question.gravity, bulk);
            if part.condition.is_level() {
                let fluid = fluid.get_or_insert_with(|| question.source.at(bulk));
                let wall = |bulk, edge| wall::with_properties(fluid, inside, &part.condition, bulk, edge);
                let Some(value) = wall(bulk, Edge::Value) else { continue };
                let edges = [(band.0, Edge::Low), (band.0, Edge::High), (band.1, Edge::Low), (band.1, Edge::High)]
                    .map(|(bulk, edge)| wall(bulk, edge).unwrap_or(value));
                let band = (edges.into_iter().fold(value, f64::min), edges.into_iter().fold(value, f64::max));
                let rayleigh = fluid.rayleigh(question.gravity, value - bulk, inside.surface.length());
                let chosen = inside.surface.nusselt(rayleigh, fluid.prandtl(), false);
                let at = WallTemperature { mean: value, extreme: value, band, chosen, film: bulk, converged: true };
                part.walls.iter().for_each(|index| found.set_wall(*index, &at, band));
            } else if let Some(at) = wall::temperature(question.source, inside, &part.condition, bulk) {
                // A wall follows the fluid that it faces: the fluid's band adds to its own.
                let band = (at.band.0 - (bulk - band.0).max(0.0), at.band.1 + (band.1 - bulk).max(0.0));
                part.walls.iter().for_each(|index| found.set_wall(*index, &at, band));
            }
        }
    }
}

/// Whether a part is of a boundary.
fn is_of(question: &Question<'_>, part: &Part<'_>, boundary: &Boundary) -> bool {
    let wall = part.walls.first().and_then(|index| question.walls.get(*index));
    wall.is_some_and(|wall| std::ptr::eq(wall.piece.boundary, boundary))
}

/// A balance that closes.
#[derive(Clone, Copy, Debug)]
pub struct Settled {
    /// The fluid's temperature, K.
    pub bulk: f64,
    /// Its band, K.
    pub band: (f64, f64),
    /// Properties.
    pub fluid: Transport,
    /// Whether the solution converged.
    pub converged: bool,
}

/// The steady temperatures of a space.
pub fn steady<'a>(question: &Question<'a>, sizes: &Sizes) -> Option<Found<'a>> {
    let network = Network::new(question, sizes)?;
    let settled = network.settled()?;
    let mut found = Found::new(question, settled.bulk);
    found.method =
        "heat released and let in is lost through walls and outflow: steady heat balance of the well mixed fluid";
    found.converged = settled.converged;
    network.fill(&mut found, settled.bulk, settled.band);
    Some(found)
}

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    fn boxed(boundaries: &str) -> crate::physics::model::RegionPhysics {
        physics(&format!(
            "fluid f\n    substance air\n    reference 20 degC\nregion r\n    box 1 m by 1 m by 1 m\n    filled with f\n{boundaries}run\n    steady\n"
        ))
        .remove(0)
    }

    #[test]
    fn walls_lose_what_a_source_releases() {
        let boxed = boxed(
            "boundary skin of r\n    side remaining\n    wall\n    exchanges 5 W/m^2/K with 20 degC\n\
             source s in r\n    releases 200 W\n",
        );
        let bracket = boxed.bracket.unwrap();
        // Six faces of 1 m² lose 200 W: on average 6.7 K above the air outside.
        let mean = 293.15 + 200.0 / 30.0;
        assert!(bracket.lowest.value < mean && mean < bracket.highest.value, "{bracket:?}");
        assert_eq!(bracket.highest.set_by, "the fluid of r by its heat balance");
        // Inside coefficients of plates at some kelvins in air are 1 to 4 W/(m² K): the fluid is 8 to 35 K above the walls.
        let above = bracket.highest.value - mean;
        assert!((200.0 / 6.0 / 4.0..200.0 / 6.0).contains(&above), "{above}");
        assert!(bracket.highest.band.0 < bracket.highest.value && bracket.highest.band.1 > bracket.highest.value);
    }

    #[test]
    fn one_outer_coefficient_without_end_is_a_held_wall() {
        let source = "source s in r\n    releases 200 W\n";
        let held = boxed(&format!("boundary skin of r\n    side remaining\n    wall\n    held at 20 degC\n{source}"));
        let exchanging = boxed(&format!(
            "boundary skin of r\n    side remaining\n    wall\n    exchanges 1e7 W/m^2/K with 20 degC\n{source}"
        ));
        let (held, exchanging) = (held.bracket.unwrap(), exchanging.bracket.unwrap());
        assert!((held.highest.value - exchanging.highest.value).abs() < 0.01, "{held:?} {exchanging:?}");
    }

    #[test]
    fn a_steady_space_without_a_level_has_no_bracket() {
        let floating = boxed(
            "boundary skin of r\n    side remaining\n    wall\n    insulated\nsource s in r\n    releases 200 W\n\
             initial r\n    temperature 20 degC\n",
        );
        assert!(floating.bracket.is_none());
        assert!(floating.numbers.rayleigh.is_nan());
    }

    #[test]
    fn radiation_to_the_other_walls_counts_where_it_is_computed() {
        let patched = |radiation: &str| {
            physics(&format!(
                "fluid f\n    substance air\n    reference 20 degC\nregion r\n    box 1 m by 1 m by 1 m\n    filled with f\n    {radiation}\n\
                 boundary heater of r\n    side west\n    patch 0.3 m by 0.3 m\n    wall\n    heated by 40 W\n\
                 boundary skin of r\n    side remaining\n    wall\n    held at 20 degC\nrun\n    steady\n"
            ))
            .remove(0)
            .bracket
            .unwrap()
            .highest
            .value
        };
        let (with, without) = (patched("radiation surface-to-surface"), patched("radiation none"));
        // 444 W/m² at about 5 W/(m² K) of convection, and of radiation as much again.
        assert!(with < without - 20.0 && with > 293.15 + 25.0, "{with} {without}");
    }

    #[test]
    fn a_heated_patch_stands_above_the_fluid() {
        let patched = boxed(
            "boundary heater of r\n    side west\n    patch 0.3 m by 0.3 m\n    wall\n    heated by 40 W\n\
             boundary skin of r\n    side remaining\n    wall\n    exchanges 5 W/m^2/K with 20 degC\n",
        );
        let bracket = patched.bracket.unwrap();
        assert_eq!(bracket.highest.set_by, "boundary heater by its power");
        // 444 W/m² at 4 to 8 W/(m² K).
        assert!((50.0..115.0).contains(&(bracket.highest.value - bracket.lowest.value)), "{bracket:?}");
    }
}
