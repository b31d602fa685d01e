//! Estimates the temperature of a wall from the heat that passes through it: a plate or body in a wide fluid, or one wall
//! of an enclosure against the fluid in its middle.
//!
//! Before: `boundary face of plate` / `heated by 300 W/m^2`, far fluid at 20 degC.
//! After: the wall temperature at which the Nusselt number of an upright plate with uniform flux carries 300 W/m²,
//! properties at the film temperature (midway between wall and fluid).

use super::root;
use crate::physics::conditions::Condition;
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

/// The wall temperature of a surface that is `condition`ed, in a fluid at `bulk` K. `None` where the condition passes no
/// heat or properties are not known.
pub fn temperature(
    source: &Source<'_>,
    gravity: f64,
    surface: Surface,
    condition: &Condition<'_>,
    bulk: f64,
) -> Option<WallTemperature> {
    let at_bulk = source.at(bulk);
    let first = with_properties(&at_bulk, gravity, surface, condition, bulk, Edge::Value)?;
    let by_flux = is_by_flux(condition);
    let solved = if source.is_constant() {
        root::Root { at: first, converged: true }
    } else {
        let residual = |wall: f64| {
            let fluid = source.at(0.5 * (wall + bulk));
            surface.coefficient(&fluid, gravity, wall - bulk, by_flux, Edge::Value) * (wall - bulk)
                - condition.flux_at(wall)
        };
        root::near(first, 0.1 * (first - bulk).abs() + TOLERANCE, RANGE, TOLERANCE, residual)
            .unwrap_or(root::Root { at: first, converged: false })
    };
    let mean = solved.at;
    let film = 0.5 * (mean + bulk);
    let fluid = if source.is_constant() { at_bulk } else { source.at(film) };
    let edge = |edge| with_properties(&fluid, gravity, surface, condition, bulk, edge).unwrap_or(f64::NAN);
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
    gravity: f64,
    surface: Surface,
    condition: &Condition<'_>,
    bulk: f64,
    edge: Edge,
) -> Option<f64> {
    if let Some(held) = condition.held {
        return Some(held.si);
    }
    if !condition.is_level() {
        let rise = rise(fluid, gravity, surface, condition.flux, edge)?;
        return Some(bulk + rise);
    }
    let residual = |wall: f64| {
        surface.coefficient(fluid, gravity, wall - bulk, false, edge) * (wall - bulk) - condition.flux_at(wall)
    };
    let outer = condition.temperature_at(0.0)?;
    if (outer - bulk).abs() < TOLERANCE {
        return Some(outer);
    }
    // The wall lies between the fluid and the temperature at which no heat would pass.
    root::between(bulk, outer, 1e-2 * TOLERANCE, residual).map(|root| root.at)
}

/// Difference between wall and fluid, K, at which a flux, W/m², passes; signed as the flux.
fn rise(fluid: &Transport, gravity: f64, surface: Surface, flux: f64, edge: Edge) -> Option<f64> {
    if flux == 0.0 {
        return Some(0.0);
    }
    // In logarithms the law is nearly a straight line, of slope 1 (no motion) to 4/3 (turbulent).
    let wanted = flux.abs().ln();
    let residual = |logarithm: f64| {
        let difference = logarithm.exp();
        (surface.coefficient(fluid, gravity, difference, true, edge) * difference).ln() - wanted
    };
    let guess = -0.8 * residual(0.0);
    let root = root::near(guess, 0.1, (-40.0, 14.0), 1e-9, residual)?;
    Some(root.at.exp() * flux.signum())
}
