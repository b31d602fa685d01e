//! Estimates the temperature of a wall from the heat that passes through it: a plate or body in a wide fluid, or one wall
//! of an enclosure against the fluid in its middle.
//!
//! Before: `boundary face of plate` / `heated by 300 W/m^2`, far fluid at 20 degC.
//! After: the wall temperature at which the Nusselt number of an upright plate with uniform flux carries 300 W/m²,
//! properties at the film temperature (midway between wall and fluid).

use super::root;
use crate::physics::conditions::{Condition, STEFAN_BOLTZMANN};
use crate::physics::convection::{Edge, Surface};
use crate::physics::correlations::Chosen;
use crate::physics::fluid_state::{Source, Transport};

/// A wall temperature.
#[derive(Clone, Copy, Debug)]
pub struct WallTemperature {
    /// Mean, K (for a plate of uniform flux that at mid-height).
    pub mean: f64,
    /// The most extreme on the wall, K.
    pub extreme: f64,
    /// Band of the extreme, K, low and high.
    pub band: (f64, f64),
    /// The correlation.
    pub chosen: Chosen,
    /// Film temperature, K.
    pub film: f64,
    /// Whether the solution converged.
    pub converged: bool,
}

/// Temperatures between which a wall is looked for, K.
const RANGE: (f64, f64) = (1.0, 1e5);
/// Closeness of a solution, K.
const TOLERANCE: f64 = 1e-4;
/// How much hotter than mid-height the top of a laminar plate of uniform flux is: the difference grows as the fifth
/// root of the height (Sparrow and Gregg, Trans. ASME 78 (1956) 435-440), so by 2^(1/5).
const TOP_OVER_MIDDLE: f64 = 1.148_698_354_997_035;
/// Up to this Rayleigh number a plate counts as laminar (common practice).
const LAMINAR_UP_TO: f64 = 1e9;

/// What passes heat from a wall into the fluid and to the other walls.
#[derive(Clone, Copy, Debug)]
pub struct Inside {
    /// The surface that convection sees.
    pub surface: Surface,
    /// g, m/s².
    pub gravity: f64,
    /// Emissivity, where radiation passes to the other walls; 0 elsewhere. They are taken at the temperature of the fluid
    /// (common practice in rooms and cabinets).
    pub emissivity: f64,
}

impl Inside {
    /// Coefficient of convection and radiation together, W/(m² K).
    pub fn coefficient(&self, fluid: &Transport, wall: f64, bulk: f64, is_by_flux: bool, edge: Edge) -> f64 {
        let radiative = self.emissivity * STEFAN_BOLTZMANN * (wall * wall + bulk * bulk) * (wall + bulk);
        self.surface.coefficient(fluid, self.gravity, wall - bulk, is_by_flux, edge) + radiative
    }
}

/// The wall temperature of a surface that is `condition`ed, in a fluid at `bulk` K. `None` where the condition passes no
/// heat or properties are not known.
pub fn temperature(
    source: &Source<'_>,
    inside: Inside,
    condition: &Condition<'_>,
    bulk: f64,
) -> Option<WallTemperature> {
    let Inside { surface, gravity, .. } = inside;
    let at_bulk = source.at(bulk);
    let first = with_properties(&at_bulk, inside, condition, bulk, Edge::Value)?;
    let by_flux = is_by_flux(condition);
    let solved = if source.is_constant() {
        root::Root { at: first, converged: true }
    } else {
        let residual = |wall: f64| {
            let fluid = source.at(0.5 * (wall + bulk));
            inside.coefficient(&fluid, wall, bulk, by_flux, Edge::Value) * (wall - bulk) - condition.flux_at(wall)
        };
        root::near(first, 0.1 * (first - bulk).abs() + TOLERANCE, RANGE, TOLERANCE, residual)
            .unwrap_or(root::Root { at: first, converged: false })
    };
    let mean = solved.at;
    let film = 0.5 * (mean + bulk);
    let fluid = if source.is_constant() { at_bulk } else { source.at(film) };
    let edge = |edge| with_properties(&fluid, inside, condition, bulk, edge).unwrap_or(f64::NAN);
    let (weak, strong) = (edge(Edge::Low), edge(Edge::High));
    let rayleigh = fluid.rayleigh(gravity, mean - bulk, surface.length());
    let is_laminar_flux = by_flux && matches!(surface, Surface::Upright(_)) && rayleigh <= LAMINAR_UP_TO;
    let top = if is_laminar_flux { TOP_OVER_MIDDLE } else { 1.0 };
    let at_top = |wall: f64| bulk + top * (wall - bulk);
    Some(WallTemperature {
        mean,
        extreme: at_top(mean),
        band: (at_top(weak.min(strong)), at_top(weak.max(strong))),
        chosen: surface.nusselt(rayleigh, fluid.prandtl(), by_flux),
        film,
        converged: solved.converged,
    })
}

/// Whether nothing but a flux is prescribed.
fn is_by_flux(condition: &Condition<'_>) -> bool {
    condition.has_flux && !condition.is_level()
}

/// The wall temperature with fixed properties.
pub fn with_properties(
    fluid: &Transport,
    inside: Inside,
    condition: &Condition<'_>,
    bulk: f64,
    edge: Edge,
) -> Option<f64> {
    if let Some(held) = condition.held {
        return Some(held.si);
    }
    if !condition.is_level() {
        let rise = rise(fluid, inside, condition.flux, bulk, edge)?;
        return Some(bulk + rise);
    }
    let coefficient = |wall: f64| inside.coefficient(fluid, wall, bulk, false, edge);
    let outer = condition.temperature_at(0.0)?;
    if (outer - bulk).abs() < TOLERANCE {
        return Some(outer);
    }
    // Newton's steps with the slope of a law that goes as the difference to the power 1.3, which lies within 5 % of every
    // law here; from the wall's place for equal conductances inside and outside.
    let exchange = condition.exchange.map_or(0.0, |(coefficient, _)| coefficient);
    let emission = condition.radiates.map_or(0.0, |(emissivity, _)| 4.0 * emissivity * STEFAN_BOLTZMANN);
    let (low, high) = (bulk.min(outer), bulk.max(outer));
    let mut wall = 0.5 * (bulk + outer);
    for _ in 0..12 {
        let coefficient = coefficient(wall);
        let slope = 1.3 * coefficient + exchange + emission * wall.powi(3);
        let step = (condition.flux_at(wall) - coefficient * (wall - bulk)) / slope;
        let next = (wall + step).clamp(low, high);
        if next.is_nan() {
            return None;
        }
        if (next - wall).abs() < TOLERANCE {
            return Some(next);
        }
        wall = next;
    }
    // The wall lies between the fluid and the temperature at which no heat would pass.
    let residual = |wall: f64| coefficient(wall) * (wall - bulk) - condition.flux_at(wall);
    root::between(bulk, outer, TOLERANCE, residual).map(|root| root.at)
}

/// Difference between wall and fluid, K, at which a flux, W/m², passes; signed as the flux.
fn rise(fluid: &Transport, inside: Inside, flux: f64, bulk: f64, edge: Edge) -> Option<f64> {
    if flux == 0.0 {
        return Some(0.0);
    }
    // In logarithms the law is nearly a straight line, of slope 1 (no motion) to 4/3 (turbulent).
    let wanted = flux.abs().ln();
    let residual = |logarithm: f64| {
        let difference = logarithm.exp();
        let wall = (bulk + difference.copysign(flux)).max(0.0);
        let convected = inside.surface.coefficient(fluid, inside.gravity, difference, true, edge) * difference;
        let radiated = inside.emissivity * STEFAN_BOLTZMANN * (wall.powi(4) - bulk.powi(4)).abs();
        (convected + radiated).ln() - wanted
    };
    let guess = -0.8 * residual(0.0);
    let root = root::near(guess, 0.1, (-40.0, 14.0), 1e-9, residual)?;
    Some(root.at.exp() * flux.signum())
}

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    fn plate(substance: &str, heat: &str, far: &str) -> crate::physics::model::RegionPhysics {
        physics(&format!(
            "case \"t\"\n    gravity 9.80665 m/s^2\nfluid f\n    substance {substance}\n    reference {far}\nregion r\n    \
             plate 0.5 m by 0.4 m\n    filled with f\nboundary face of r\n    side face\n    wall\n    {heat}\n\
             boundary away of r\n    side far\n    opening\n    backflow {far}\n"
        ))
        .remove(0)
    }

    #[test]
    fn the_heat_given_is_the_heat_that_passes() {
        for (substance, heat, flux) in [
            ("air", "heated by 300 W/m^2", 300.0),
            ("air", "heated by 60 W", 300.0),
            ("water", "heated by 2 W/cm^2", 2e4),
            ("engine_oil", "heated by 2000 W/m^2", 2e3),
            ("mercury", "heated by 1e4 W/m^2", 1e4),
            ("air", "cooled by 50 W/m^2", 50.0),
        ] {
            let plate = plate(substance, heat, "20 degC");
            let numbers = &plate.numbers;
            // Properties of the numbers are those at mid-span, which counts by the top of the plate.
            let passing = numbers.heat_transfer_coefficient * numbers.difference;
            assert!((passing / flux - 1.0).abs() < 0.02, "{substance} {heat}: {passing}, not {flux}");
            let bracket = plate.bracket.unwrap();
            let end = if heat.starts_with('c') { &bracket.lowest } else { &bracket.highest };
            let estimate = end.estimate.as_ref().unwrap();
            assert!(!estimate.contains("converge"), "{estimate}");
            assert!(end.band.0 < end.value && end.value < end.band.1, "{end:?}");
            assert!(
                end.set_by
                    == if heat.ends_with(" W") { "boundary face by its power" } else { "boundary face by its flux" }
            );
        }
    }

    #[test]
    fn the_top_of_a_laminar_plate_is_hotter() {
        let plate = plate("air", "heated by 100 W/m^2", "20 degC");
        assert!(plate.numbers.rayleigh < 1e9);
        let rise = plate.bracket.unwrap().span();
        // Sparrow and Gregg 1956: 2^(1/5).
        assert!((rise / plate.numbers.difference - 1.1487).abs() < 1e-3, "{rise} {}", plate.numbers.difference);
    }

    #[test]
    fn a_band_is_the_published_scatter() {
        // Churchill and Chu, 20 %: a flux fixed, the difference goes as h^(-1) at a power between 1/4 and 1/3.
        let bracket = plate("air", "heated by 300 W/m^2", "20 degC").bracket.unwrap();
        let far = bracket.lowest.value;
        let (low, high) = bracket.highest.band;
        let ratio = |value: f64| (value - far) / (bracket.highest.value - far);
        assert!((0.8_f64.powf(-0.74)..0.8_f64.powf(-0.81)).contains(&ratio(high)), "{}", ratio(high));
        assert!((1.2_f64.powf(-0.81)..1.2_f64.powf(-0.74)).contains(&ratio(low)), "{}", ratio(low));
    }

    #[test]
    fn losses_behind_a_wall_count() {
        let plain = plate("air", "heated by 300 W/m^2", "20 degC").bracket.unwrap();
        let losing = plate("air", "heated by 300 W/m^2\n    radiates to 20 degC\n    emissivity 0.9", "20 degC")
            .bracket
            .unwrap();
        let warmed = plate("air", "exchanges 10 W/m^2/K with 90 degC", "20 degC").bracket.unwrap();
        assert!(losing.highest.value < plain.highest.value - 10.0, "{losing:?}");
        assert!((293.15..363.15).contains(&warmed.highest.value), "{warmed:?}");
        assert_eq!(warmed.highest.set_by, "boundary face by the heat that passes through it");
    }

    #[test]
    fn past_the_data_the_estimate_says_so() {
        let far_out = plate("water", "heated by 1e6 W/m^2", "20 degC").bracket.unwrap();
        let text = far_out.highest.estimate.unwrap();
        assert!(text.contains("which is outside the range") && !text.contains("converge"), "it would boil: {text}");
        let furnace = plate("air", "heated by 1e5 W/m^2", "20 degC").bracket.unwrap();
        assert!(furnace.highest.value.is_finite());
        assert!(furnace.highest.estimate.unwrap().contains("which is outside the range of the substance's data"));
    }
}
