//! Estimates what a solid that a boundary meets does to it: the solid's other faces and sources, as one equivalent
//! condition.
//!
//! Before: `boundary inside of room` / `meets pane`, and the pane's outer face `held at -5 degC`.
//! After: the inner face exchanges heat with -5 degC through the pane's conductance.
//!
//! The solid is one node, reached from each face through half its thickness: an equivalent source in the sense of
//! Thevenin. Exact for a slab between two faces (Fourier's law, conduction resistances in series).

use crate::case::model::{Case, Region};
use crate::physics::conditions::{Condition, STEFAN_BOLTZMANN, stated};
use crate::physics::cover::pieces;
use crate::physics::geometry::{extent_along, sides, sizes};
use crate::physics::vector;

/// The condition on a face of area `area` that meets the region `name`, from the region `of`.
pub fn behind<'a>(case: &'a Case, of: &Region, name: &'a crate::case::model::Name, area: f64) -> Condition<'a> {
    let nothing = Condition { through: Some(&name.text), ..Condition::default() };
    let Some(solid) = case.region(&name.text) else { return nothing };
    let Some(material) = &solid.made_of else { return nothing };
    let conductivity = case
        .solids
        .iter()
        .find(|candidate| candidate.name.text == material.text)
        .and_then(|candidate| candidate.conductivity.as_ref())
        .map_or(f64::INFINITY, |value| value.si);
    let Some(sizes) = sizes(solid) else { return nothing };
    let sides = sides(case, solid, &sizes);
    let pieces = pieces(case, solid, &sides);
    // Conductance of half the thickness behind a face, W/(m² K).
    let half = |normal: [f64; 3]| {
        if vector::length(normal) < 0.5 { f64::INFINITY } else { 2.0 * conductivity / extent_along(&sizes, normal) }
    };
    let (mut conductance, mut drawn, mut power, mut inner, mut is_unknown) = (0.0, 0.0, 0.0, f64::INFINITY, false);
    for piece in &pieces {
        let meets_back = piece.boundary.kinds.iter().any(
            |(kind, _)| matches!(kind, crate::case::model::BoundaryKind::Meets(back) if back.text == of.name.text),
        );
        if meets_back {
            inner = half(piece.normal);
            continue;
        }
        let whole: f64 =
            pieces.iter().filter(|other| std::ptr::eq(other.boundary, piece.boundary)).map(|other| other.area).sum();
        let condition = stated(piece.boundary, piece.boundary.area.as_ref().map_or(whole, |area| area.si));
        is_unknown |= condition.is_unknown;
        if condition.has_flux {
            power += condition.flux * piece.area;
        }
        let Some(anchor) = condition.anchor() else { continue };
        let outside = if condition.held.is_some() {
            f64::INFINITY
        } else {
            let radiative =
                condition.radiates.map_or(0.0, |(emissivity, t)| 4.0 * emissivity * STEFAN_BOLTZMANN * t.powi(3));
            condition.exchange.map_or(0.0, |(coefficient, _)| coefficient) + radiative
        };
        let through = series(outside, half(piece.normal)).min(1e9) * piece.area;
        conductance += through;
        drawn += through * anchor;
    }
    for source in case.sources.iter().filter(|source| source.region.as_ref().is_some_and(|r| r.text == name.text)) {
        let Some(releases) = &source.releases else { continue };
        let volume = source.within.as_ref().map_or(sizes.volume, |volume| volume.si);
        power +=
            if releases.dimension == crate::vocabulary::statements::POWER { releases.si } else { releases.si * volume };
    }
    let is_unknown = is_unknown || !power.is_finite() || !conductance.is_finite();
    if conductance > 0.0 {
        let exchange = Some((series(conductance / area, inner), (drawn + power) / conductance));
        Condition { exchange, is_unknown, ..nothing }
    } else if power != 0.0 {
        Condition { flux: power / area, has_flux: true, is_unknown, ..nothing }
    } else {
        Condition { is_unknown, ..nothing }
    }
}

/// Two conductances one behind the other.
fn series(a: f64, b: f64) -> f64 {
    if a.is_infinite() {
        b
    } else if b.is_infinite() {
        a
    } else {
        a * b / (a + b)
    }
}

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    fn behind(pane: &str, conductivity: &str, outside: &str) -> crate::physics::model::Bracket {
        let text = format!(
            "fluid f\n    substance air\n    reference 10 degC\nsolid glass\n    conductivity {conductivity}\n\
             region pane\n    {pane}\n    made of glass\nregion r\n    gap 50 mm by 1 m by 1 m\n    filled with f\n\
             boundary out of pane\n    side west\n    {outside}\nboundary back of pane\n    side east\n    meets r\n\
             boundary cold of r\n    side west\n    meets pane\nboundary hot of r\n    side east\n    wall\n    heated by 100 W/m^2\nrun\n    steady\n"
        );
        physics(&text).pop().unwrap().bracket.unwrap()
    }

    #[test]
    fn a_slab_adds_its_resistance() {
        // 100 W/m² through 20 mm of 0.5 W/(m K): 4 K; through 25 W/(m² K): 4 K more.
        let held = behind("box 20 mm by 1 m by 1 m", "0.5 W/m/K", "held at 0 degC");
        assert!((held.lowest.value - 277.15).abs() < 1e-6, "{held:?}");
        let exchanging = behind("box 20 mm by 1 m by 1 m", "0.5 W/m/K", "exchanges 25 W/m^2/K with 0 degC");
        assert!((exchanging.lowest.value - 281.15).abs() < 1e-6, "{exchanging:?}");
        assert!(exchanging.lowest.estimate.is_some());
        assert_eq!(exchanging.lowest.set_by, "boundary cold by the heat that passes through it");
    }

    #[test]
    fn a_flux_passes_through() {
        let text = "fluid f\n    substance air\n    reference 10 degC\nsolid steel\n    conductivity 16 W/m/K\n\
             region plate1\n    box 20 mm by 1 m by 1 m\n    made of steel\nregion r\n    gap 50 mm by 1 m by 1 m\n    filled with f\n\
             boundary out of plate1\n    side west\n    heated by 80 W/m^2\nboundary back of plate1\n    side east\n    meets r\n\
             boundary warm of r\n    side west\n    meets plate1\nboundary cold of r\n    side east\n    wall\n    held at 10 degC\nrun\n    steady\n";
        let physics = physics(text).pop().unwrap();
        let passing = physics.numbers.heat_transfer_coefficient * physics.numbers.difference;
        assert!((passing / 80.0 - 1.0).abs() < 5e-3, "{passing}");
    }
}
