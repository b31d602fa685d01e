//! Estimates how far a closed space warms or cools over the time of a transient run.
//!
//! Before: `transient for 1 h step 1 s`, `initial` `temperature 20 degC`, a heater of 100 W, insulated walls.
//! After: 20 degC + 100 W · 1 h / (ρ cp V); with walls that lose heat, the approach to the steady balance with the time
//! constant ρ cp V / Σ h A.
//!
//! Energy balance of the well mixed fluid (first law), ρ cp V dT/dt = heat in. The walls' own heat capacity, which slows
//! it, is left out.

use super::balance::Network;
use super::given::initial;
use super::{Found, Question};
use crate::physics::convection::Edge;
use crate::physics::geometry::Sizes;

/// The temperatures at the end of a run; `None` where it is not transient or the start is not known.
pub fn transient<'a>(question: &Question<'a>, sizes: &Sizes) -> Option<Found<'a>> {
    let (duration, _) = question.case.run.as_ref()?.transient.as_ref()?;
    let start = initial(question.case, question.region)?;
    let start = match (&start.temperature, &start.stratified) {
        (Some(value), _) => value.si,
        (None, Some((bottom, top))) => 0.5 * (bottom.si + top.si),
        (None, None) => return None,
    };
    let duration = duration.si;
    if !(start.is_finite() && duration.is_finite() && duration >= 0.0) {
        return None;
    }
    let network = Network::new(question, sizes)?;
    let fluid = question.source.at(start);
    let capacity = fluid.density * fluid.heat_capacity * sizes.volume;
    if !(capacity.is_finite() && capacity > 0.0) {
        return None;
    }
    let (end, band, converged) = match network.settled() {
        Some(settled) => {
            let approach = |edge: Edge, last: f64| {
                let heat = network.heat(start, &settled.fluid, edge);
                let conductance = heat / (last - start);
                if !conductance.is_finite() {
                    return last;
                }
                last + (start - last) * (-duration * conductance.max(0.0) / capacity).exp()
            };
            let end = approach(Edge::Value, settled.bulk);
            let bulk = |edge| network.bulk(settled.bulk, &settled.fluid, edge).map_or(f64::NAN, |root| root.at);
            let edges = [approach(Edge::Low, bulk(Edge::Low)), approach(Edge::High, bulk(Edge::High))];
            (end, (edges[0].min(edges[1]), edges[0].max(edges[1])), settled.converged)
        }
        None => {
            let heat = network.heat(start, &fluid, Edge::Value);
            let end = start + heat * duration / capacity;
            (end, (end, end), true)
        }
    };
    if !(end.is_finite() && end > 0.0) {
        return None;
    }
    let mut found = Found::new(question, end);
    found.method = "heat let in over the time of the run warms the fluid, less what walls lose: heat balance of the well mixed fluid";
    found.converged = converged;
    // Walls stand off from the fluid at the start as at the end.
    network.fill(&mut found, start, (start, start));
    network.fill(&mut found, end, band);
    Some(found)
}
