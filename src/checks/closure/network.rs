//! Regions joined by faces that they share, and the heat that such a network takes in and gives off.

use super::parts::{Role, is_open_by_shape, role, ties_temperature};
use crate::case::model::{BoundaryKind, Heat, Region, Value};
use crate::checks::check::Subject;
use crate::checks::look::regions;
use crate::physics::geometry::area_of;
use crate::physics::model::RegionPhysics;
use crate::vocabulary::statements::{HEAT_FLUX, POWER, POWER_DENSITY};

/// Regions between which heat passes.
#[derive(Debug)]
pub struct Network<'a> {
    /// Its regions with their physics, in the deck's order.
    pub regions: Vec<(&'a Region, &'a RegionPhysics)>,
}

/// What a network exchanges by given fluxes and powers, W; per metre of depth for a plane case. `NaN` where not known.
#[derive(Clone, Copy, Debug, Default)]
pub struct HeatBudget {
    /// In.
    pub supplied: f64,
    /// Out.
    pub withdrawn: f64,
}

/// The networks of a case. A region that shares no face is one by itself.
pub fn networks<'a>(subject: &Subject<'a>) -> Vec<Network<'a>> {
    let every: Vec<_> = regions(subject).collect();
    // Which network each region belongs to: joined by lowering both to the lower number until nothing changes.
    let mut number: Vec<usize> = (0..every.len()).collect();
    let index_of = |name: &str| every.iter().position(|(region, _)| &*region.name.text == name);
    for boundary in &subject.case.boundaries {
        let Some(here) = boundary.region.as_ref().and_then(|region| index_of(&region.text)) else { continue };
        for (kind, _) in &boundary.kinds {
            let BoundaryKind::Meets(other) = kind else { continue };
            let Some(there) = index_of(&other.text) else { continue };
            let (Some(one), Some(two)) = (number.get(here).copied(), number.get(there).copied()) else { continue };
            for entry in &mut number {
                if *entry == one.max(two) {
                    *entry = one.min(two);
                }
            }
        }
    }
    (0..every.len())
        .map(|network| every.iter().zip(&number).filter(|(_, of)| **of == network).map(|(region, _)| *region).collect())
        .map(|regions: Vec<_>| Network { regions })
        .filter(|network| !network.regions.is_empty())
        .collect()
}

impl Network<'_> {
    /// Whether a given temperature anywhere settles the level: of a wall, of the surroundings, or of fluid that enters.
    pub fn has_given_temperature(&self, subject: &Subject<'_>) -> bool {
        self.regions.iter().any(|(region, _)| {
            is_open_by_shape(subject.case, region)
                || subject.case.boundaries_of(region).any(|boundary| {
                    matches!(role(boundary), Role::Inlet | Role::Opening | Role::Far)
                        || boundary.carries.is_some()
                        || boundary.backflow.is_some()
                        || boundary.heat.iter().any(|(heat, _)| ties_temperature(heat))
                })
        })
    }

    /// Whether a condition is missing somewhere, which another check reports: then nothing can be said of the whole.
    pub fn is_unfinished(&self, subject: &Subject<'_>) -> bool {
        self.regions.iter().any(|(region, _)| {
            let mut boundaries = subject.case.boundaries_of(region).peekable();
            boundaries.peek().is_none()
                || boundaries.any(|boundary| match role(boundary) {
                    Role::Wall => boundary.heat.is_empty(),
                    role => role == Role::Unsaid,
                })
        })
    }

    /// The heat that given fluxes, powers and sources bring and take.
    pub fn budget(&self, subject: &Subject<'_>) -> HeatBudget {
        let mut budget = HeatBudget::default();
        for (region, physics) in &self.regions {
            for boundary in subject.case.boundaries_of(region) {
                let area = || area_of(subject.case, region, boundary);
                for (heat, _) in &boundary.heat {
                    match heat {
                        Heat::HeatedBy(value) => budget.add(power_of(value, area)),
                        Heat::CooledBy(value) => budget.add(-power_of(value, area)),
                        _ => {}
                    }
                }
            }
            for source in &subject.case.sources {
                if source.region.as_ref().is_none_or(|of| of.text != region.name.text) {
                    continue;
                }
                if let Some(value) = &source.releases {
                    let volume = source.within.as_ref().map_or(physics.geometry.volume, |volume| volume.si);
                    budget.add(if value.dimension == POWER_DENSITY { value.si * volume } else { value.si });
                }
            }
        }
        budget
    }
}

impl HeatBudget {
    fn add(&mut self, power: f64) {
        // An unknown power makes both unknown.
        if power >= 0.0 {
            self.supplied += power;
        } else if power < 0.0 {
            self.withdrawn -= power;
        } else {
            *self = HeatBudget { supplied: f64::NAN, withdrawn: f64::NAN };
        }
    }

    /// In less out, as a share of the larger; `NaN` where nothing is exchanged or something is not known.
    pub fn imbalance(&self) -> f64 {
        (self.supplied - self.withdrawn).abs() / self.supplied.max(self.withdrawn)
    }
}

fn power_of(value: &Value, area: impl Fn() -> f64) -> f64 {
    if value.dimension == HEAT_FLUX {
        value.si * area()
    } else if value.dimension == POWER {
        value.si
    } else {
        f64::NAN
    }
}
