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
use super::{Found, Question, wall};
use crate::physics::convection::{Edge, Surface, of_wall};
use crate::physics::fluid_state::Transport;
use crate::physics::geometry::Sizes;

/// A space as a balance sees it.
pub struct Network<'q, 'a> {
    /// What is asked.
    pub question: &'q Question<'a>,
    /// Each wall's surface where it is hotter than the fluid, and where it is colder.
    surfaces: Vec<(Surface, Surface)>,
    /// Σ ṁ cp of what enters, W/K.
    flow: f64,
    /// Its mean temperature, K.
    flow_temperature: f64,
    /// Heat released inside, W.
    power: f64,
}

/// Temperatures between which the fluid's is looked for, K.
const RANGE: (f64, f64) = (1.0, 1e5);
/// Closeness of a solution, K.
const TOLERANCE: f64 = 1e-4;

impl<'q, 'a> Network<'q, 'a> {
    /// The network of a space; `None` where what flows in is not known.
    pub fn new(question: &'q Question<'a>, sizes: &Sizes) -> Option<Network<'q, 'a>> {
        let surfaces =
            question.walls.iter().map(|wall| of_wall(wall, sizes, question.placement, question.is_inverted)).collect();
        let (flow, flow_temperature) = super::through_flow::inflow(question)?;
        Some(Network { question, surfaces, flow, flow_temperature, power: question.power })
    }

    /// Whether anything fixes a level of temperature.
    pub fn has_level(&self) -> bool {
        self.flow > 0.0 || self.question.walls.iter().any(|wall| !wall.is_open && wall.condition.is_level())
    }

    /// The mean of the temperatures that walls and inflow draw to, K.
    pub fn mean_anchor(&self) -> Option<f64> {
        let walls = self.question.walls.iter().filter(|wall| !wall.is_open).filter_map(|wall| wall.condition.anchor());
        let inflow = (self.flow > 0.0).then_some(self.flow_temperature);
        let (sum, count) = walls.chain(inflow).fold((0.0, 0.0), |(sum, count), anchor| (sum + anchor, count + 1.0));
        (count > 0.0).then(|| sum / count)
    }

    /// Heat into a fluid at `bulk` K, W, with fixed properties. `NaN` where it cannot be worked out.
    pub fn heat(&self, bulk: f64, fluid: &Transport, edge: Edge) -> f64 {
        let mut heat = self.power + if self.flow > 0.0 { self.flow * (self.flow_temperature - bulk) } else { 0.0 };
        for (index, one) in self.question.walls.iter().enumerate() {
            let condition = &one.condition;
            if one.is_open || !condition.is_active() {
                continue;
            }
            let flux = if let Some(held) = condition.held {
                let difference = held.si - bulk;
                self.surface(index, difference > 0.0).coefficient(fluid, self.question.gravity, difference, false, edge)
                    * difference
            } else if condition.is_level() {
                self.wall_temperature(index, bulk, fluid, edge).map_or(f64::NAN, |wall| condition.flux_at(wall))
            } else {
                condition.flux
            };
            heat += flux * one.piece.area;
        }
        heat
    }

    /// Temperature of a wall, K, with fixed properties.
    pub fn wall_temperature(&self, index: usize, bulk: f64, fluid: &Transport, edge: Edge) -> Option<f64> {
        let condition = &self.question.walls.get(index)?.condition;
        let is_hotter = match condition.temperature_at(0.0) {
            Some(outer) => outer > bulk,
            None => condition.flux > 0.0,
        };
        wall::with_properties(fluid, self.question.gravity, self.surface(index, is_hotter), condition, bulk, edge)
    }

    /// The surface that a wall is.
    pub fn surface(&self, index: usize, is_hotter: bool) -> Surface {
        match self.surfaces.get(index) {
            Some((hotter, _)) if is_hotter => *hotter,
            Some((_, colder)) => *colder,
            None => Surface::Upright(f64::NAN),
        }
    }

    /// The fluid's temperature at which the balance closes, K, with fixed properties.
    pub fn bulk(&self, guess: f64, fluid: &Transport, edge: Edge) -> Option<root::Root> {
        root::near(guess, 2.0, RANGE, TOLERANCE, |bulk| self.heat(bulk, fluid, edge))
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
        for pass in 0..12 {
            let solved = self.bulk(bulk, &fluid, Edge::Value)?;
            let moved = (solved.at - bulk).abs();
            // Halved once it should swing.
            bulk = if pass < 6 { solved.at } else { 0.5 * (bulk + solved.at) };
            converged = solved.converged && (source.is_constant() || moved < 0.05);
            if converged {
                break;
            }
            fluid = source.at(bulk);
        }
        let edge = |edge| self.bulk(bulk, &fluid, edge).map_or(f64::NAN, |root| root.at);
        let (weak, strong) = (edge(Edge::Low), edge(Edge::High));
        Some(Settled { bulk, band: (weak.min(strong), weak.max(strong)), fluid, converged })
    }

    /// Fills in the walls' temperatures against a fluid at `bulk` K within `band`, and the fluid's own.
    pub fn fill(&self, found: &mut Found<'a>, bulk: f64, band: (f64, f64)) {
        let question = self.question;
        found.bulk = bulk;
        found.add_fluid(bulk, band);
        for (index, one) in question.walls.iter().enumerate() {
            if one.is_open || !one.condition.is_active() || one.condition.held.is_some() {
                continue;
            }
            let is_hotter = match one.condition.temperature_at(0.0) {
                Some(outer) => outer > bulk,
                None => one.condition.flux > 0.0,
            };
            let surface = self.surface(index, is_hotter);
            if let Some(at) = wall::temperature(question.source, question.gravity, surface, &one.condition, bulk) {
                // A wall follows the fluid that it faces: the fluid's band adds to its own.
                let (below, above) = (finite_or_zero(bulk - band.0), finite_or_zero(band.1 - bulk));
                found.set_wall(index, &at, (at.band.0 - below, at.band.1 + above));
            }
        }
    }
}

fn finite_or_zero(value: f64) -> f64 {
    if value.is_finite() { value.max(0.0) } else { 0.0 }
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
