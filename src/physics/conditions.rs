//! What holds thermally on each piece of a region's surface, and the heat that follows from a wall's temperature.

use super::bracket::neighbour;
use super::bracket::root;
use super::cover::Piece;
use crate::case::model::{Boundary, BoundaryKind, Case, Heat, Region, Value};
use crate::syntax::Place;
use crate::vocabulary::statements::POWER;

/// Stefan-Boltzmann constant, W/(m² K⁴) (CODATA 2018, exact from SI constants).
pub const STEFAN_BOLTZMANN: f64 = 5.670_374_419e-8;

/// The thermal condition of a wall.
#[derive(Clone, Copy, Debug, Default)]
pub struct Condition<'a> {
    /// Temperature given, K.
    pub held: Option<&'a Value>,
    /// Flux into the fluid, W/m², negative for cooling; 0 without one.
    pub flux: f64,
    /// Whether a flux or power is stated.
    pub has_flux: bool,
    /// Whether a power is.
    pub is_by_power: bool,
    /// Coefficient, W/(m² K), and temperature, K, outside.
    pub exchange: Option<(f64, f64)>,
    /// Emissivity and temperature of the surroundings, K.
    pub radiates: Option<(f64, f64)>,
    /// Where the first heat statement stands.
    pub place: Option<Place>,
    /// Whether it comes through another region.
    pub through: Option<&'a str>,
    /// Whether a value in it could not be worked out.
    pub is_unknown: bool,
}

/// The condition of a boundary whose whole area, m², is `area`.
pub fn condition<'a>(case: &'a Case, region: &'a Region, boundary: &'a Boundary, area: f64) -> Condition<'a> {
    let mut condition = stated(boundary, area);
    for (kind, place) in &boundary.kinds {
        if let BoundaryKind::Meets(name) = kind
            && boundary.heat.is_empty()
        {
            condition = neighbour::behind(case, region, name, area);
            condition.place = Some(*place);
        }
    }
    condition
}

/// The condition that a boundary states itself.
pub fn stated(boundary: &Boundary, area: f64) -> Condition<'_> {
    let mut condition = Condition::default();
    let flux = |value: &Value, sign: f64, condition: &mut Condition<'_>| {
        let is_power = value.dimension == POWER;
        condition.flux += sign * if is_power { value.si / area } else { value.si };
        condition.has_flux = true;
        condition.is_by_power |= is_power;
    };
    for (heat, place) in &boundary.heat {
        condition.place.get_or_insert(*place);
        match heat {
            Heat::HeldAt(value) => condition.held = condition.held.or(Some(value)),
            Heat::HeatedBy(value) => flux(value, 1.0, &mut condition),
            Heat::CooledBy(value) => flux(value, -1.0, &mut condition),
            Heat::Insulated => {}
            Heat::Exchanges { coefficient, temperature } => {
                condition.exchange = Some((coefficient.si, temperature.si));
            }
            Heat::RadiatesTo(value) => {
                // A surface whose emissivity is not stated is taken as black.
                let emissivity = boundary.emissivity.as_ref().map_or(1.0, |value| value.si);
                condition.radiates = Some((emissivity, value.si));
            }
        }
    }
    let is_usable = |(coefficient, temperature): (f64, f64)| {
        coefficient.is_finite() && coefficient >= 0.0 && temperature.is_finite() && temperature >= 0.0
    };
    condition.is_unknown = condition.held.is_some_and(|held| !held.is_known())
        || !condition.flux.is_finite()
        || condition.exchange.is_some_and(|pair| !is_usable(pair))
        || condition.radiates.is_some_and(|pair| !is_usable(pair));
    condition
}

impl Condition<'_> {
    /// Whether it fixes a level of temperature.
    pub fn is_level(&self) -> bool {
        self.held.is_some() || self.exchange.is_some() || self.radiates.is_some()
    }

    /// Whether heat can pass.
    pub fn is_active(&self) -> bool {
        self.is_level() || self.flux != 0.0
    }

    /// The temperature that it draws to, K: the one given, or that of the surroundings.
    pub fn anchor(&self) -> Option<f64> {
        if let Some(held) = self.held {
            return Some(held.si);
        }
        match (self.exchange, self.radiates) {
            (Some((coefficient, outside)), Some((emissivity, surroundings))) => {
                let radiative = 4.0 * emissivity * STEFAN_BOLTZMANN * surroundings.powi(3);
                let mean = (coefficient * outside + radiative * surroundings) / (coefficient + radiative);
                Some(if mean.is_nan() { outside } else { mean })
            }
            (Some((_, outside)), None) => Some(outside),
            (None, Some((_, surroundings))) => Some(surroundings),
            (None, None) => None,
        }
    }

    /// Flux into the fluid, W/m², at a wall temperature, K; for a condition other than `held`.
    pub fn flux_at(&self, wall: f64) -> f64 {
        let exchanged = self.exchange.map_or(0.0, |(coefficient, outside)| coefficient * (outside - wall));
        let radiated = self.radiates.map_or(0.0, |(emissivity, surroundings)| {
            emissivity * STEFAN_BOLTZMANN * (surroundings.powi(4) - wall.powi(4))
        });
        self.flux + exchanged + radiated
    }

    /// The wall temperature, K, at which `flux`, W/m², passes into the fluid; `None` where nothing fixes a level or no
    /// temperature gives that flux.
    pub fn temperature_at(&self, flux: f64) -> Option<f64> {
        if let Some(held) = self.held {
            return Some(held.si);
        }
        let found = match (self.exchange, self.radiates) {
            (None, None) => None,
            (Some((coefficient, outside)), None) => Some(outside + (self.flux - flux) / coefficient),
            (None, Some((emissivity, surroundings))) => {
                Some((surroundings.powi(4) + (self.flux - flux) / (emissivity * STEFAN_BOLTZMANN)).powf(0.25))
            }
            (Some(_), Some(_)) => {
                let guess = self.anchor()?;
                let balance = |wall: f64| self.flux_at(wall) - flux;
                root::near(guess, 10.0, (0.0, 1e5), 1e-7, balance).map(|root| root.at)
            }
        };
        found.filter(|temperature| temperature.is_finite() && *temperature > 0.0)
    }
}

/// A piece of the surface with its condition.
#[derive(Clone, Copy, Debug)]
pub struct Wall<'a> {
    /// Where it lies.
    pub piece: Piece<'a>,
    /// What holds there.
    pub condition: Condition<'a>,
    /// Whether fluid passes through it.
    pub is_open: bool,
}

/// The pieces of a region's surface with their conditions.
pub fn walls<'a>(case: &'a Case, region: &'a Region, pieces: Vec<Piece<'a>>) -> Vec<Wall<'a>> {
    let area = |boundary: &Boundary| -> f64 {
        match &boundary.area {
            Some(area) => area.si,
            None => {
                let own = pieces.iter().filter(|piece| std::ptr::eq(piece.boundary, boundary));
                own.map(|piece| piece.area).sum()
            }
        }
    };
    let mut walls: Vec<Wall<'a>> = Vec::with_capacity(pieces.len());
    for piece in &pieces {
        let known = walls.iter().find(|wall| std::ptr::eq(wall.piece.boundary, piece.boundary));
        let condition = match known {
            Some(wall) => wall.condition,
            None => condition(case, region, piece.boundary, area(piece.boundary)),
        };
        walls.push(Wall { piece: *piece, condition, is_open: is_open(piece.boundary) });
    }
    walls
}

/// Whether fluid passes through a boundary.
pub fn is_open(boundary: &Boundary) -> bool {
    boundary
        .kinds
        .iter()
        .any(|(kind, _)| matches!(kind, BoundaryKind::Inlet | BoundaryKind::Outlet | BoundaryKind::Opening))
}
