//! What a case implies: arrangement, temperatures reached, characteristic numbers, scales, correlations.

pub mod arrangement;
pub mod bracket;
pub mod conditions;
pub mod convection;
pub mod correlations;
pub mod cover;
pub mod facing;
pub mod fluid_state;
pub mod geometry;
pub mod lengths;
pub mod model;
pub mod numbers;
pub mod roles;
pub mod scales_published;
pub mod vector;
mod why;

use crate::case::model::{Case, Region};
use conditions::Wall;
use geometry::Sizes;
use model::{Arrangement, ArrangementKind, Geometry, Physics, RegionPhysics};

/// The physics of every region of a case.
pub fn work_out(case: &Case) -> Physics {
    Physics { regions: case.regions.iter().map(|region| of_region(case, region)).collect() }
}

/// The physics of one region.
pub fn of_region(case: &Case, region: &Region) -> RegionPhysics {
    let sizes = geometry::sizes(region);
    let sides = sizes.map(|sizes| geometry::sides(case, region, &sizes)).unwrap_or_default();
    let sizes = sizes.unwrap_or(UNKNOWN_SIZES);
    let walls = conditions::walls(case, region, cover::pieces(case, region, &sides));
    let power = released(case, region, sizes.volume);
    let source = fluid_state::source(case, region);
    let far = if region.is_surrounded || matches!(region.shape, Some(crate::case::model::Shape::Channel { .. })) {
        bracket::given::far(case, region, &walls)
    } else {
        None
    };
    let far_temperature = far.map(|(temperature, _)| temperature);
    let is_inverted = source.as_ref().is_some_and(|source| is_inverted(case, region, source, &walls, far_temperature));
    let placement = arrangement::arrangement(&arrangement::Question {
        case,
        region,
        walls: &walls,
        releases_heat: power > 0.0,
        far: far_temperature,
        is_inverted,
    });
    let mut physics = RegionPhysics {
        geometry: Geometry {
            height: placement.height,
            length: placement.length,
            spacing: placement.spacing,
            volume: sizes.volume,
            sides,
        },
        ..RegionPhysics::default()
    };
    if let Some(source) = &source {
        let gravity = case.gravity.magnitude;
        let question = bracket::Question {
            case,
            region,
            walls: &walls,
            placement: &placement,
            source,
            gravity,
            power,
            volume: sizes.volume,
            far,
            is_inverted,
        };
        let temperatures = bracket::temperatures(&question, &sizes);
        physics.numbers = numbers::numbers(&numbers::Question {
            case,
            region,
            walls: &walls,
            placement: &placement,
            source,
            temperatures: &temperatures,
            gravity,
        });
        physics.fluid = Some(source.state(physics.numbers.film_temperature));
        physics.bracket = temperatures.bracket;
    }
    let kind = if source.is_some() { placement.kind } else { ArrangementKind::Unknown };
    physics.arrangement = Arrangement { kind, why: placement.why };
    physics
}

/// The sizes of a region that has no shape.
const UNKNOWN_SIZES: Sizes = Sizes { extent: [f64::NAN; 3], volume: f64::NAN, roundness: geometry::Roundness::Flat };

/// Heat released in a region, W (W/m in a plane case).
fn released(case: &Case, region: &Region, volume: f64) -> f64 {
    let is_here =
        |source: &&crate::case::model::Source| source.region.as_ref().is_some_and(|name| name.text == region.name.text);
    case.sources.iter().filter(is_here).map(|source| bracket::power(source, volume)).sum()
}

/// Whether warmer fluid is the heavier one, about the temperatures that the deck gives: water below 4 degC.
fn is_inverted(
    case: &Case,
    region: &Region,
    source: &fluid_state::Source<'_>,
    walls: &[Wall<'_>],
    far: Option<f64>,
) -> bool {
    if let Some(stated) = &source.fluid.expansion {
        return stated.si < 0.0;
    }
    let Some(medium) = source.medium.filter(|medium| !medium.is_gas()) else { return false };
    let start = || bracket::given::initial(case, region)?.temperature.as_ref().map(|value| value.si);
    let anchors = walls.iter().filter_map(|wall| wall.condition.anchor()).chain(far);
    let (sum, count) = anchors.fold((0.0, 0.0), |(sum, count), anchor| (sum + anchor, count + 1.0));
    let mean = if count > 0.0 { Some(sum / count) } else { start() };
    mean.and_then(|mean| medium.expansion(mean, source.pressure)).is_some_and(|expansion| expansion < 0.0)
}

/// A number of a region by its name in [`REGION_NUMBERS`](crate::vocabulary::functions::REGION_NUMBERS), SI; `NaN` where
/// it is not known or there is none of that name.
pub fn region_number(physics: &RegionPhysics, name: &str) -> f64 {
    let numbers = &physics.numbers;
    let of_bracket = |pick: fn(&model::Bracket) -> f64| physics.bracket.as_ref().map_or(f64::NAN, pick);
    match name {
        "Ra" => numbers.rayleigh,
        "Gr" => numbers.grashof,
        "Pr" => numbers.prandtl,
        "Re" => numbers.reynolds,
        "Ri" => numbers.richardson,
        "Nu" => numbers.nusselt,
        "Ma" => numbers.mach,
        "alpha_dT" => numbers.expansion_span,
        "peak_temperature" => of_bracket(|bracket| bracket.highest.value),
        "lowest_temperature" => of_bracket(|bracket| bracket.lowest.value),
        "temperature_span" => of_bracket(model::Bracket::span),
        _ => f64::NAN,
    }
}
