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
            let (weak, strong) = network.edges(settled.bulk, &settled.fluid);
            let (weak, strong) = (approach(Edge::Low, weak), approach(Edge::High, strong));
            (end, (weak.min(strong), weak.max(strong)), settled.converged)
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

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    fn peak(walls: &str, duration: &str) -> f64 {
        let text = format!(
            "fluid f\n    substance water\n    reference 20 degC at 1 bar\nregion r\n    box 0.5 m by 0.5 m by 0.4 m\n    filled with f\n\
             boundary skin of r\n    side remaining\n    wall\n    {walls}\nsource s in r\n    releases 500 W\n\
             initial r\n    temperature 20 degC\nrun\n    transient for {duration} step 1 s\n"
        );
        physics(&text).remove(0).bracket.unwrap().highest.value
    }

    #[test]
    fn a_closed_tank_warms_by_the_energy_let_in() {
        // 0.1 m³ of water at 20 degC, 1 bar: 998.2 kg/m³ and 4185 J/(kg K) (CoolProp 8.0.0): 417.7 kJ/K.
        let rise = peak("insulated", "2 h") - 293.15;
        assert!((rise / (500.0 * 7200.0 / 417.7e3) - 1.0).abs() < 1e-3, "{rise}");
    }

    #[test]
    fn losses_bound_the_rise() {
        let (short, longer, longest) = (
            peak("exchanges 10 W/m^2/K with 20 degC", "10 min"),
            peak("exchanges 10 W/m^2/K with 20 degC", "10 h"),
            peak("exchanges 10 W/m^2/K with 20 degC", "2000 h"),
        );
        assert!(293.15 < short && short < longer && longer < longest, "{short} {longer} {longest}");
        // 1.3 m² lose 500 W at 38 K; water inside adds little.
        assert!((longest - 293.15 - 500.0 / 13.0) < 3.0 && longest - 293.15 > 500.0 / 13.0, "{longest}");
        let rise = short - 293.15;
        assert!((rise / (500.0 * 600.0 / 417.7e3) - 1.0).abs() < 0.05, "hardly a loss in 10 min: {rise}");
    }

    #[test]
    fn the_start_counts_too() {
        let text = "fluid f\n    substance water\n    reference 20 degC\nregion r\n    box 0.5 m by 0.5 m by 0.4 m\n    filled with f\n\
                    boundary skin of r\n    side remaining\n    wall\n    exchanges 10 W/m^2/K with 5 degC\n\
                    initial r\n    temperature 60 degC\nrun\n    transient for 1 h step 1 s\n";
        let bracket = physics(text).remove(0).bracket.unwrap();
        assert!((bracket.highest.value - 333.15).abs() < 1e-9 && bracket.highest.estimate.is_none(), "{bracket:?}");
        assert!(bracket.lowest.value > 278.15 && bracket.lowest.value < 333.15, "{bracket:?}");
    }
}
