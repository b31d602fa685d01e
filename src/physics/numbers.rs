//! Characteristic numbers (ISO 80000-11), the Nusselt number of the arrangement, and the scales of layers and times.

use super::arrangement::Placement;
use super::bracket::Temperatures;
use super::bracket::given::initial;
use super::conditions::{Wall, is_open};
use super::convection::{self, Surface};
use super::correlations::{Chosen, vertical_channel};
use super::cover::area_of;
use super::fluid_state::{Source, Transport};
use super::model::{ArrangementKind as Kind, Numbers};
use super::roles::Role;
use super::scales_published as scales;
use crate::case::model::{Case, Region};
use crate::vocabulary::statements::{MASS_FLOW, SPEED, VOLUME_FLOW};

/// What numbers are worked out from.
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
    /// Its temperatures.
    pub temperatures: &'a Temperatures,
    /// g, m/s².
    pub gravity: f64,
}

/// The numbers of a region.
pub fn numbers(question: &Question<'_>) -> Numbers {
    let Question { placement, source, gravity, .. } = *question;
    let mut numbers = Numbers::default();
    let bracket = question.temperatures.bracket.as_ref();
    let reference = source.fluid.reference_temperature.as_ref().map_or(f64::NAN, |value| value.si);
    numbers.film_temperature = bracket.map_or(reference, |bracket| bracket.middle());
    let fluid = source.at(numbers.film_temperature);
    if fluid.density.is_finite() || fluid.kinematic_viscosity.is_finite() {
        numbers.properties = Some(fluid.properties());
    }
    numbers.prandtl = fluid.prandtl();
    numbers.difference = difference(question);
    numbers.rayleigh = fluid.rayleigh(gravity, numbers.difference, placement.length);
    numbers.grashof = numbers.rayleigh / numbers.prandtl;
    let height = if placement.height > 0.0 { placement.height } else { placement.own_length };
    numbers.buoyant_velocity = (gravity * fluid.expansion.abs() * numbers.difference * height).sqrt();
    numbers.given_velocity = given_velocity(question, &fluid);
    numbers.reynolds = numbers.given_velocity * placement.length / fluid.kinematic_viscosity;
    numbers.richardson = numbers.grashof / (numbers.reynolds * numbers.reynolds);
    // `max` passes over the one that is not known.
    let fastest = numbers.given_velocity.max(numbers.buoyant_velocity);
    numbers.mach = fastest / speed_of_sound(&fluid, numbers.film_temperature);
    if let Some(bracket) = bracket {
        let reference = if reference.is_nan() { numbers.film_temperature } else { reference };
        numbers.expansion_span = expansion(source, reference).abs() * bracket.span();
    }
    nusselt(question, &fluid, &mut numbers);
    layers_and_times(question, &fluid, &mut numbers);
    numbers
}

/// α at the reference, 1/K.
fn expansion(source: &Source<'_>, reference: f64) -> f64 {
    match (&source.fluid.expansion, &source.medium) {
        (Some(stated), _) => stated.si,
        (None, Some(medium)) => medium.expansion(reference, source.pressure).unwrap_or(f64::NAN),
        (None, None) => source.at(reference).expansion,
    }
}

/// The driving difference, K: hot less cold side of an enclosure, wall less far fluid of a body, plate less fluid drawn in
/// of a channel, wall less fluid of a space without a hot and a cold side; else, and for through-flow, the whole span.
fn difference(question: &Question<'_>) -> f64 {
    let Question { walls, placement, temperatures, .. } = *question;
    let mean = |role: Role| {
        let own = walls.iter().zip(&placement.roles).zip(&temperatures.walls).filter(|((_, own), _)| **own == role);
        let (sum, area) = own.fold((0.0, 0.0), |(sum, area), ((wall, _), temperature)| {
            let weight = if wall.piece.area > 0.0 { wall.piece.area } else { 1.0 };
            (sum + weight * temperature, area + weight)
        });
        sum / area
    };
    let from_fluid = || {
        let closed = walls.iter().zip(&temperatures.walls).filter(|(wall, _)| !wall.is_open);
        closed.map(|(_, temperature)| (temperature - temperatures.bulk).abs()).fold(f64::NAN, f64::max)
    };
    let own = match placement.kind {
        Kind::SideHeatedCavity
        | Kind::LayerHeatedFromBelow
        | Kind::StableLayer
        | Kind::TiltedCavity
        | Kind::Annulus => mean(Role::Hot) - mean(Role::Cold),
        Kind::VerticalPlate
        | Kind::PlateFacingUp
        | Kind::PlateFacingDown
        | Kind::InclinedPlate
        | Kind::HorizontalCylinder
        | Kind::Sphere
            if placement.is_body =>
        {
            let hot = mean(Role::Hot);
            (if hot.is_nan() { mean(Role::Cold) } else { hot }) - temperatures.bulk
        }
        Kind::VerticalChannel | Kind::UniformHeating => from_fluid(),
        _ => f64::NAN,
    };
    if own.is_nan() { temperatures.bracket.as_ref().map_or(f64::NAN, |bracket| bracket.span()) } else { own.abs() }
}

/// The fastest velocity that the deck gives, m/s: of what enters, of sliding walls, at the start. `NaN` without one.
fn given_velocity(question: &Question<'_>, fluid: &Transport) -> f64 {
    let Question { case, region, .. } = *question;
    let mut fastest = f64::NAN;
    for boundary in case.boundaries_of(region) {
        if let Some((speed, _)) = &boundary.moves {
            fastest = fastest.max(speed.si.abs());
        }
        let Some(rate) = boundary.enters.as_ref().filter(|_| is_open(boundary)) else { continue };
        let area = || area_of(case, region, boundary);
        let speed = if rate.dimension == SPEED {
            rate.si
        } else if rate.dimension == VOLUME_FLOW {
            rate.si / area()
        } else if rate.dimension == MASS_FLOW {
            rate.si / (fluid.density * area())
        } else {
            f64::NAN
        };
        fastest = fastest.max(speed.abs());
    }
    if let Some(velocity) = initial(case, region).and_then(|initial| initial.velocity.as_ref()) {
        fastest = fastest.max(velocity.iter().map(|component| component.si * component.si).sum::<f64>().sqrt());
    }
    fastest
}

/// Speed of sound, m/s, from the other properties: c² = 1/(ρ κs), κs = κ − T α²/(ρ cp) (thermodynamic identity; Callen,
/// Thermodynamics, 1985, chapter 7). `NaN` where compressibility is not known.
fn speed_of_sound(fluid: &Transport, temperature: f64) -> f64 {
    let isentropic =
        fluid.compressibility - temperature * fluid.expansion * fluid.expansion / (fluid.density * fluid.heat_capacity);
    if isentropic > 0.0 { (fluid.density * isentropic).sqrt().recip() } else { f64::NAN }
}

/// The Nusselt number by the correlation of the arrangement, and the heat transfer coefficient.
fn nusselt(question: &Question<'_>, fluid: &Transport, numbers: &mut Numbers) {
    let placement = question.placement;
    let rayleigh = fluid.rayleigh(question.gravity, numbers.difference, placement.own_length);
    if !rayleigh.is_finite() || !numbers.prandtl.is_finite() {
        return;
    }
    let prandtl = numbers.prandtl;
    let mut remark = "";
    let chosen = match placement.kind {
        Kind::Unknown => None,
        Kind::ThroughFlow | Kind::UniformHeating => {
            remark = ", taken for the upright walls";
            let mut chosen = Surface::Upright(placement.own_length).nusselt(rayleigh, prandtl, false);
            chosen.estimate.inside_range = false;
            Some(chosen)
        }
        Kind::VerticalChannel => Some(channel(question, fluid, rayleigh)),
        _ => convection::of_enclosure(placement, rayleigh, prandtl).or_else(|| {
            let is_hot = placement.roles.contains(&Role::Hot);
            let surface = convection::of_body(placement, is_hot)?;
            Some(surface.nusselt(rayleigh, prandtl, is_by_flux(question)))
        }),
    };
    let Some(Chosen { correlation, estimate }) = chosen else { return };
    let scale = placement.length / placement.own_length;
    numbers.nusselt = estimate.value * scale;
    numbers.nusselt_band = (estimate.low * scale, estimate.high * scale);
    numbers.nusselt_inside_range = estimate.inside_range;
    numbers.nusselt_basis = [correlation.name, " (", correlation.source, ")", remark].concat();
    numbers.heat_transfer_coefficient = if placement.kind == Kind::Annulus {
        convection::conductance(placement, 1.0, fluid.conductivity, estimate.value)
    } else {
        estimate.value * fluid.conductivity / placement.own_length
    };
}

/// Whether a body's face has nothing but a flux.
fn is_by_flux(question: &Question<'_>) -> bool {
    let mut faces = question.walls.iter().zip(&question.placement.roles).filter(|(_, role)| **role != Role::Neutral);
    faces.any(|(wall, _)| wall.condition.has_flux && !wall.condition.is_level())
}

fn channel(question: &Question<'_>, fluid: &Transport, rayleigh: f64) -> Chosen {
    let placement = question.placement;
    let plates = || question.walls.iter().filter(|wall| !wall.is_open && wall.condition.is_active());
    let is_both = plates().count() > 1;
    let flux = plates().map(|wall| &wall.condition).find(|condition| condition.has_flux && !condition.is_level());
    let Some(condition) = flux else { return convection::of_channel(placement, rayleigh, is_both) };
    let spacing = placement.spacing;
    let number = question.gravity * fluid.expansion.abs() * condition.flux.abs() * spacing.powi(5)
        / (fluid.conductivity * fluid.kinematic_viscosity * fluid.diffusivity * placement.run);
    if is_both {
        Chosen { correlation: &vertical_channel::FLUX_BOTH, estimate: vertical_channel::flux_both(number) }
    } else {
        Chosen { correlation: &vertical_channel::FLUX_ONE, estimate: vertical_channel::flux_one(number) }
    }
}

fn layers_and_times(question: &Question<'_>, fluid: &Transport, numbers: &mut Numbers) {
    let Question { placement, gravity, .. } = *question;
    let known = |value: Option<f64>| value.unwrap_or(f64::NAN);
    let per_layer = numbers.nusselt * placement.own_length / placement.length;
    let is_enclosure = matches!(
        placement.kind,
        Kind::SideHeatedCavity | Kind::LayerHeatedFromBelow | Kind::StableLayer | Kind::TiltedCavity | Kind::Annulus
    );
    numbers.thermal_layer = known(if is_enclosure {
        scales::convection_layer(placement.spacing, per_layer)
    } else {
        scales::layer_from_nusselt(placement.own_length, per_layer)
    });
    if placement.kind == Kind::VerticalChannel {
        numbers.thermal_layer = numbers.thermal_layer.min(0.5 * placement.spacing);
    }
    numbers.viscous_layer = known(scales::viscous_layer(numbers.thermal_layer, numbers.prandtl));
    let height = placement.height;
    let rise = stratification(question, numbers.difference);
    numbers.buoyancy_frequency =
        if rise <= 0.0 { 0.0 } else { (gravity * fluid.expansion.abs() * rise / height).sqrt() };
    let along_walls = !matches!(
        placement.kind,
        Kind::LayerHeatedFromBelow | Kind::StableLayer | Kind::PlateFacingUp | Kind::PlateFacingDown | Kind::Unknown
    );
    if along_walls {
        let on_height = fluid.rayleigh(gravity, numbers.difference, height);
        numbers.boundary_layer_time = known(scales::boundary_layer_time(height, fluid.diffusivity, on_height));
        if matches!(placement.kind, Kind::SideHeatedCavity | Kind::TiltedCavity | Kind::Annulus | Kind::UniformHeating)
        {
            let width = placement.spacing;
            numbers.filling_time = known(scales::filling_time(height, width, fluid.diffusivity, on_height));
        }
    }
}

/// Temperature rise from bottom to top, K: of the initial state, of a stable layer, or of the core of a side-heated cavity,
/// which fills with warm fluid from the top (Patterson and Imberger 1980). 0 elsewhere.
fn stratification(question: &Question<'_>, difference: f64) -> f64 {
    let initial = initial(question.case, question.region).and_then(|initial| initial.stratified.as_ref());
    match (initial, question.placement.kind) {
        (Some((bottom, top)), _) => top.si - bottom.si,
        (None, Kind::StableLayer | Kind::SideHeatedCavity) => difference,
        (None, _) => 0.0,
    }
}

#[cfg(test)]
mod tests {
    use crate::physics::model::RegionPhysics;
    use crate::physics::region_number;
    use crate::testing::physics;
    use crate::vocabulary::functions::REGION_NUMBERS;

    fn cavity(fluid: &str, extra: &str) -> RegionPhysics {
        let text = format!(
            "case \"t\"\n    gravity 10 m/s^2\nfluid f\n    {fluid}\nregion r\n    box 0.1 m by 0.2 m\n    filled with f\n{extra}\
             boundary hot of r\n    side west\n    wall\n    held at 30 degC\nboundary cold of r\n    side east\n    wall\n    held at 20 degC\n"
        );
        physics(&text).remove(0)
    }

    const CONSTANTS: &str =
        "reference 25 degC\n    kinematic-viscosity 2e-5 m^2/s\n    diffusivity 4e-5 m^2/s\n    expansion 4e-3 1/K";

    #[test]
    fn by_hand() {
        let r = cavity(CONSTANTS, "");
        let n = &r.numbers;
        // Ra = 10 · 4e-3 · 10 · 0.1³ / (2e-5 · 4e-5) = 5e5.
        assert!(
            (n.rayleigh / 5e5 - 1.0).abs() < 1e-9
                && (n.prandtl - 0.5).abs() < 1e-12
                && (n.grashof / 1e6 - 1.0).abs() < 1e-9
        );
        assert!((n.buoyant_velocity - (10.0_f64 * 4e-3 * 10.0 * 0.2).sqrt()).abs() < 1e-12);
        assert!((n.expansion_span - 0.04).abs() < 1e-12 && (n.difference - 10.0).abs() < 1e-9);
        // N² = g α ΔT / H; layer time H² / (a Ra_H^(1/2)) with Ra_H = 8 Ra; filling time H W / (a Ra_H^(1/4)).
        assert!((n.buoyancy_frequency - 2_f64.sqrt()).abs() < 1e-9, "{n:?}");
        assert!((n.boundary_layer_time - 0.04 / (4e-5 * 4e6_f64.sqrt())).abs() < 1e-6, "{n:?}");
        assert!((n.filling_time - 0.02 / (4e-5 * 4e6_f64.powf(0.25))).abs() < 1e-6, "{n:?}");
        assert!(
            n.reynolds.is_nan() && n.richardson.is_nan() && n.heat_transfer_coefficient.is_nan() && n.nusselt > 1.0
        );
        assert!((n.thermal_layer - 0.05 / n.nusselt).abs() < 1e-12 && n.viscous_layer == n.thermal_layer);
    }

    #[test]
    fn a_stated_length_is_the_one_of_the_numbers() {
        let (own, stated) = (cavity(CONSTANTS, ""), cavity(CONSTANTS, "    length 0.2 m\n"));
        assert!((stated.numbers.rayleigh / own.numbers.rayleigh - 8.0).abs() < 1e-9);
        assert!((stated.numbers.nusselt / own.numbers.nusselt - 2.0).abs() < 1e-9, "the same heat on another length");
        assert_eq!(stated.numbers.thermal_layer, own.numbers.thermal_layer);
    }

    #[test]
    fn given_velocities() {
        let lid = "boundary lid of r\n    side top\n    wall\n    moves at 0.3 m/s\n    insulated\n";
        let r = cavity(CONSTANTS, lid);
        assert!((r.numbers.given_velocity - 0.3).abs() < 1e-12 && (r.numbers.reynolds - 1500.0).abs() < 1e-6);
        assert!((r.numbers.richardson - 1e6 / 1500.0_f64.powi(2)).abs() < 1e-9);
        let start = "initial r\n    velocity (0.3 m/s, 0 m/s, 0.4 m/s)\n";
        assert!((cavity(CONSTANTS, start).numbers.given_velocity - 0.5).abs() < 1e-12);
    }

    #[test]
    fn an_initial_stratification_has_a_frequency() {
        let r = cavity(CONSTANTS, "initial r\n    stratified from 20 degC to 25 degC\n");
        assert!((r.numbers.buoyancy_frequency - (10.0_f64 * 4e-3 * 5.0 / 0.2).sqrt()).abs() < 1e-9);
    }

    #[test]
    fn without_gravity_nothing_is_driven() {
        let text = "case \"t\"\n    gravity none\nfluid f\n    substance air\n    reference 25 degC\nregion r\n    box 0.1 m by 0.2 m\n    filled with f\n\
             boundary hot of r\n    side west\n    wall\n    held at 30 degC\nboundary cold of r\n    side east\n    wall\n    held at 20 degC\n";
        let n = physics(text).remove(0).numbers;
        assert_eq!((n.rayleigh, n.nusselt, n.buoyant_velocity), (0.0, 1.0, 0.0));
    }

    #[test]
    fn every_name_of_the_vocabulary_is_a_number() {
        let lid = "boundary lid of r\n    side top\n    wall\n    moves at 0.3 m/s\n    insulated\n";
        let r = cavity("substance air\n    reference 25 degC", lid);
        for number in REGION_NUMBERS {
            assert!(region_number(&r, number.name).is_finite(), "{}", number.name);
        }
        assert!(region_number(&r, "Sh").is_nan());
        assert!((region_number(&r, "peak_temperature") - 303.15).abs() < 1e-9);
        assert!((region_number(&r, "lowest_temperature") - 293.15).abs() < 1e-9);
        assert!((region_number(&r, "temperature_span") - 10.0).abs() < 1e-9);
    }
}
