//! The temperatures that the fluid of a region can reach: given ones directly, the others estimated. One file a kind of
//! estimate.

mod balance;
mod channel;
pub mod given;
mod heating;
pub mod neighbour;
pub mod reach;
mod rising;
pub use rising::power;
pub mod root;
mod series;
mod through_flow;
mod wall;

use super::arrangement::Placement;
use super::conditions::Wall;
use super::convection;
use super::correlations::Correlation;
use super::fluid_state::Source;
use super::geometry::Sizes;
use super::model::{ArrangementKind as Kind, Bracket};
use super::roles::Role;
use crate::case::model::{Case, Radiation, Region};
use crate::syntax::Place;
use reach::{By, Candidate, How, Reach};
use wall::WallTemperature;

/// What a bracket is found from.
pub struct Question<'a> {
    /// The case.
    pub case: &'a Case,
    /// The region.
    pub region: &'a Region,
    /// Its walls.
    pub walls: &'a [Wall<'a>],
    /// Its arrangement.
    pub placement: &'a Placement,
    /// Its fluid.
    pub source: &'a Source<'a>,
    /// g, m/s².
    pub gravity: f64,
    /// Heat released inside, W.
    pub power: f64,
    /// Volume, m³.
    pub volume: f64,
    /// Temperature of the far fluid, K, for a plate, body or channel.
    pub far: Option<(f64, Candidate<'a>)>,
    /// Whether warmer fluid is the heavier one.
    pub is_inverted: bool,
}

/// Emissivity of a wall that states none, where radiation is computed: that of paint and most materials other than bare
/// metal (common practice).
pub const USUAL_EMISSIVITY: f64 = 0.9;

impl Question<'_> {
    /// Whether radiation passes between the walls: the region computes it, and the fluid is no liquid.
    pub fn has_radiation(&self) -> bool {
        let is_computed = self.region.radiation.is_some_and(|radiation| radiation.value != Radiation::None);
        is_computed && self.source.medium.is_none_or(|medium| medium.is_gas())
    }

    /// Emissivity of a wall towards the others; 0 where no radiation passes.
    fn emissivity(&self, wall: &Wall<'_>) -> f64 {
        if !self.has_radiation() {
            return 0.0;
        }
        wall.piece.boundary.emissivity.as_ref().map_or(USUAL_EMISSIVITY, |value| value.si)
    }
}

/// Temperatures of a region.
#[derive(Debug, Default)]
pub struct Temperatures {
    /// The bracket.
    pub bracket: Option<Bracket>,
    /// Mean temperature of each wall, K; `NaN` where not known.
    pub walls: Vec<f64>,
    /// Temperature of the fluid in the middle or far away, K; `NaN` where not known.
    pub bulk: f64,
}

/// What an estimate found.
pub struct Found<'a> {
    /// Mean temperature of each wall, K.
    walls: Vec<f64>,
    /// Of the fluid, K.
    bulk: f64,
    candidates: Vec<Candidate<'a>>,
    question_walls: &'a [Wall<'a>],
    region: &'a Region,
    source: &'a Source<'a>,
    /// How walls and fluid without a correlation of their own were estimated.
    method: &'static str,
    correlation: Option<&'static Correlation>,
    is_inside_range: bool,
    film: f64,
    converged: bool,
    has_radiation: bool,
}

impl<'a> Found<'a> {
    fn new(question: &Question<'a>, film: f64) -> Found<'a> {
        Found {
            walls: held(question.walls),
            bulk: f64::NAN,
            candidates: Vec::with_capacity(question.walls.len() + 1),
            question_walls: question.walls,
            region: question.region,
            source: question.source,
            method: "",
            correlation: None,
            is_inside_range: true,
            film,
            converged: true,
            has_radiation: question.has_radiation(),
        }
    }

    fn how(&self) -> How {
        How {
            method: self.method,
            correlation: self.correlation,
            is_inside_range: self.is_inside_range,
            film: self.film,
            holds: self.source.holds_at(self.film),
            converged: self.converged,
            has_radiation: self.has_radiation,
        }
    }

    fn add(&mut self, value: f64, band: (f64, f64), by: By<'a>, place: Option<Place>, how: How) {
        self.candidates.push(Candidate { value, band, by, place, literal: None, estimate: Some(how) });
    }

    /// Takes in a temperature of the fluid.
    fn add_fluid(&mut self, value: f64, band: (f64, f64)) {
        let how = self.how();
        self.add(value, band, By::Fluid(self.region), None, how);
    }

    /// Takes in a wall's temperature by the method at hand.
    fn set(&mut self, index: usize, value: f64, band: (f64, f64)) {
        let how = self.how();
        self.set_how(index, value, value, band, how);
    }

    /// Takes in a wall that was solved for by itself.
    fn set_wall(&mut self, index: usize, at: &WallTemperature, band: (f64, f64)) {
        let how = How {
            method: "wall temperature at which the heat that is prescribed passes into the fluid",
            correlation: Some(at.chosen.correlation),
            is_inside_range: at.chosen.estimate.inside_range,
            film: at.film,
            holds: self.source.holds_at(at.film),
            converged: at.converged && self.converged,
            has_radiation: self.has_radiation,
        };
        self.set_how(index, at.mean, at.extreme, band, how);
    }

    fn set_how(&mut self, index: usize, mean: f64, extreme: f64, band: (f64, f64), how: How) {
        if let Some(own) = self.walls.get_mut(index) {
            *own = mean;
        }
        let Some(wall) = self.question_walls.get(index) else { return };
        if wall.condition.held.is_some() {
            return;
        }
        let boundary = wall.piece.boundary;
        let by = if wall.condition.is_by_power {
            By::Power(boundary)
        } else if wall.condition.has_flux {
            By::Flux(boundary)
        } else {
            By::Passing(boundary)
        };
        self.add(extreme, band, by, wall.condition.place, how);
    }
}

/// The temperatures of a region.
pub fn temperatures<'a>(question: &Question<'a>, sizes: &Sizes) -> Temperatures {
    let mut reach = Reach::default();
    let far = question.far.as_ref().map_or(f64::NAN, |(value, _)| *value);
    let mut temperatures = Temperatures { bracket: None, walls: held(question.walls), bulk: far };
    let all_known = given::collect(question, &mut reach);
    if !all_known || !question.power.is_finite() {
        return temperatures;
    }
    let prescribes = |wall: &Wall<'_>| !wall.is_open && wall.condition.held.is_none() && wall.condition.is_active();
    if question.power == 0.0 && !question.walls.iter().any(prescribes) {
        temperatures.bracket = reach.bracket(question.case);
        return temperatures;
    }
    match estimate(question, sizes) {
        Some(found) => {
            for candidate in found.candidates {
                reach.add(candidate);
            }
            temperatures.walls = found.walls;
            if found.bulk.is_finite() {
                temperatures.bulk = found.bulk;
            }
        }
        None => {
            // A flux whose wall cannot be found leaves the bracket open. Without one, no temperature goes past those that
            // walls and surroundings have (maximum principle of heat conduction and convection).
            if question.power != 0.0 || question.walls.iter().any(|wall| wall.condition.flux != 0.0) {
                return temperatures;
            }
            add_outside(question, &mut reach);
        }
    }
    temperatures.bracket = reach.bracket(question.case);
    temperatures
}

/// Temperatures of the walls that are held.
fn held(walls: &[Wall<'_>]) -> Vec<f64> {
    walls.iter().map(|wall| wall.condition.held.map_or(f64::NAN, |value| value.si)).collect()
}

fn add_outside<'a>(question: &Question<'a>, reach: &mut Reach<'a>) {
    for wall in question.walls.iter().filter(|wall| !wall.is_open && wall.condition.held.is_none()) {
        let outside = wall.condition.exchange.into_iter().chain(wall.condition.radiates);
        for (_, temperature) in outside {
            reach.add(Candidate {
                value: temperature,
                band: (temperature, temperature),
                by: By::Outside(wall.piece.boundary),
                place: wall.condition.place,
                literal: None,
                estimate: None,
            });
        }
    }
}

/// The estimate that the arrangement calls for.
fn estimate<'a>(question: &Question<'a>, sizes: &Sizes) -> Option<Found<'a>> {
    let placement = question.placement;
    if placement.is_body {
        return body(question);
    }
    if placement.kind == Kind::VerticalChannel {
        return channel::plates(question, question.far.as_ref()?.0);
    }
    let is_free = |wall: &Wall<'_>| through_flow::is_free(wall.piece.boundary);
    let is_driven = question.walls.iter().any(|wall| wall.piece.boundary.enters.is_some());
    if question.walls.iter().any(is_free) && !is_driven {
        return open_space(question, sizes);
    }
    let is_transient = question.case.run.as_ref().is_some_and(|run| run.transient.is_some());
    let mut found = if is_transient && !is_driven { heating::transient(question, sizes) } else { None };
    if found.is_none() && placement.is_two_sided && question.power == 0.0 {
        found = series::two_sides(question);
    }
    let mut found = found.or_else(|| balance::steady(question, sizes))?;
    let bulk = found.bulk;
    if !is_driven && bulk.is_finite() {
        rising::plumes(question, &mut found, bulk);
    }
    Some(found)
}

/// A plate or body in a wide fluid.
fn body<'a>(question: &Question<'a>) -> Option<Found<'a>> {
    let far = question.far.as_ref()?.0;
    let mut found = Found::new(question, far);
    found.bulk = far;
    for (index, one) in question.walls.iter().enumerate() {
        let is_face = question.placement.roles.get(index).is_some_and(|role| *role != Role::Neutral);
        if !is_face || !one.condition.is_active() || one.condition.held.is_some() {
            continue;
        }
        let is_hot = question.placement.roles.get(index) == Some(&Role::Hot);
        let surface = convection::of_body(question.placement, is_hot)?;
        // Its surroundings are taken at the temperature of the far fluid.
        let emissivity = question.emissivity(one);
        let mut condition = one.condition;
        if emissivity > 0.0 && condition.radiates.is_none() {
            condition.radiates = Some((emissivity, far));
        }
        let inside = wall::Inside { surface, gravity: question.gravity, emissivity: 0.0 };
        let at = wall::temperature(question.source, inside, &condition, far)?;
        found.set_wall(index, &at, at.band);
    }
    Some(found)
}

/// A space that buoyancy exchanges with surroundings at one temperature: its fluid is taken to have that, and its walls
/// and plumes stand off from it.
fn open_space<'a>(question: &Question<'a>, sizes: &Sizes) -> Option<Found<'a>> {
    let network = balance::Network::new(question, sizes)?;
    let boundaries = question.walls.iter().filter(|wall| wall.is_open).map(|wall| wall.piece.boundary);
    let inlet = boundaries.filter_map(|boundary| given::let_in(question.case, boundary)).next()?.0.si;
    let mut found = Found::new(question, inlet);
    found.method = "the space is open: its fluid is taken at the temperature outside";
    network.fill(&mut found, inlet, (inlet, inlet));
    rising::plumes(question, &mut found, inlet);
    Some(found)
}
