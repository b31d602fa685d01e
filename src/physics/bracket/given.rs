//! Takes the temperatures that a deck gives directly: held walls, what enters or comes back in, the far fluid, the
//! ambient air at openings, and the initial state of a transient run.

use super::Question;
use super::reach::{By, Candidate, Reach};
use crate::case::model::{Boundary, BoundaryKind, Case, Initial, Region, Value};
use crate::physics::conditions::{Wall, is_open};

/// The temperature that an open boundary lets in: what it carries, else what comes back in, else the ambient one.
pub fn let_in<'a>(case: &'a Case, boundary: &'a Boundary) -> Option<(&'a Value, By<'a>)> {
    let own = boundary.carries.as_ref().map(|value| (value, By::Inflow(boundary)));
    let back = || boundary.backflow.as_ref().map(|value| (value, By::Backflow(boundary)));
    let is_opening = boundary.kinds.iter().any(|(kind, _)| matches!(kind, BoundaryKind::Opening));
    let ambient = || case.ambient_temperature.as_ref().filter(|_| is_opening).map(|value| (value, By::Ambient));
    own.or_else(back).or_else(ambient)
}

/// The temperature of the fluid far from a plate or body, or of that which a channel draws in: by the boundary there, else
/// ambient, else initial.
pub fn far<'a>(case: &'a Case, region: &Region, walls: &[Wall<'a>]) -> Option<(f64, Candidate<'a>)> {
    let at_far = walls.iter().filter(|wall| {
        if region.is_surrounded { wall.piece.side == crate::case::model::Side::Far } else { wall.is_open }
    });
    let mut found: Option<(&Value, By<'a>)> = None;
    for wall in at_far {
        let boundary = wall.piece.boundary;
        let held = wall.condition.held.map(|value| (value, By::Boundary(boundary)));
        // A channel draws in at its lower end: the first that tells is taken.
        found = found.or(held).or_else(|| let_in(case, boundary));
        if found.is_none()
            && let Some((_, outside)) = wall.condition.exchange
        {
            let candidate = candidate(outside, By::Outside(boundary), wall.condition.place);
            return Some((outside, candidate));
        }
    }
    let ambient = || case.ambient_temperature.as_ref().map(|value| (value, By::Ambient));
    let initial = || {
        let initial = initial(case, region)?;
        initial.temperature.as_ref().map(|value| (value, By::Initial))
    };
    let (value, by) = found.or_else(ambient).or_else(initial)?;
    Some((value.si, Candidate { literal: value.origin.literal, ..candidate(value.si, by, Some(value.origin.place)) }))
}

fn candidate<'a>(value: f64, by: By<'a>, place: Option<crate::syntax::Place>) -> Candidate<'a> {
    Candidate { value, band: (value, value), by, place, literal: None, estimate: None }
}

/// The initial state of a region.
pub fn initial<'a>(case: &'a Case, region: &Region) -> Option<&'a Initial> {
    case.initials.iter().find(|initial| initial.region.as_ref().is_some_and(|name| name.text == region.name.text))
}

/// Adds all of them; `false` where one of them could not be worked out, so that nothing sure can be said.
pub fn collect<'a>(question: &Question<'a>, reach: &mut Reach<'a>) -> bool {
    let Question { case, region, walls, .. } = *question;
    let mut all_known = walls.iter().all(|wall| !wall.condition.is_unknown);
    let mut add = |value: &Value, by: By<'a>| {
        all_known &= value.is_known();
        reach.add_given(value, by);
    };
    for boundary in case.boundaries_of(region) {
        if let Some((crate::case::model::Heat::HeldAt(value), _)) =
            boundary.heat.iter().find(|(heat, _)| matches!(heat, crate::case::model::Heat::HeldAt(_)))
        {
            add(value, By::Boundary(boundary));
        }
        if let Some(value) = &boundary.carries {
            add(value, By::Inflow(boundary));
        }
        if let Some(value) = &boundary.backflow {
            add(value, By::Backflow(boundary));
        } else if is_open(boundary)
            && let Some((value, by)) = let_in(case, boundary)
        {
            add(value, by);
        }
    }
    // A steady state does not depend on where the search for it starts.
    let is_steady = case.run.as_ref().is_some_and(|run| run.steady.is_some() && run.transient.is_none());
    if !is_steady && let Some(initial) = initial(case, region) {
        for value in initial.temperature.iter().chain(initial.stratified.iter().flat_map(|(bottom, top)| [bottom, top]))
        {
            add(value, By::Initial);
        }
    }
    if let Some((value, candidate)) = &question.far {
        all_known &= value.is_finite();
        reach.add(*candidate);
    }
    all_known
}

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    fn bracket(boundaries: &str, rest: &str) -> Option<crate::physics::model::Bracket> {
        let text = format!(
            "case \"t\"\n    ambient 12 degC\nfluid f\n    substance air\n    reference 20 degC\nregion r\n    box 1 m by 1 m by 1 m\n    filled with f\n{boundaries}{rest}"
        );
        physics(&text).remove(0).bracket
    }

    const WALLS: &str =
        "boundary w of r\n    side west\n    held at 40 degC\nboundary e of r\n    side east\n    held at 30 degC\n";

    #[test]
    fn held_walls_are_taken_as_they_stand() {
        let bracket = bracket(WALLS, "").unwrap();
        assert!((bracket.highest.value - 313.15).abs() < 1e-9 && (bracket.lowest.value - 303.15).abs() < 1e-9);
        assert_eq!((bracket.highest.set_by.as_str(), bracket.lowest.set_by.as_str()), ("boundary w", "boundary e"));
        assert!(bracket.highest.literal.is_some() && bracket.highest.place.is_some() && !bracket.rests_on_estimate());
    }

    #[test]
    fn the_start_counts_unless_the_run_is_steady() {
        let start = "initial r\n    stratified from 5 degC to 50 degC\n";
        let transient = bracket(WALLS, &format!("{start}run\n    transient for 1 h step 1 s\n")).unwrap();
        assert!((transient.lowest.value - 278.15).abs() < 1e-9 && (transient.highest.value - 323.15).abs() < 1e-9);
        assert_eq!(transient.highest.set_by, "the initial temperature");
        let steady = bracket(WALLS, &format!("{start}run\n    steady\n")).unwrap();
        assert!((steady.span() - 10.0).abs() < 1e-9, "{steady:?}");
    }

    #[test]
    fn openings_let_in_the_ambient_or_what_they_state() {
        let opening = "boundary door of r\n    side north\n    opening\n";
        let ambient = bracket(&format!("{WALLS}{opening}"), "").unwrap();
        assert!((ambient.lowest.value - 285.15).abs() < 1e-9 && ambient.lowest.set_by == "the ambient temperature");
        let stated = bracket(&format!("{WALLS}{opening}    backflow 2 degC\n"), "").unwrap();
        assert!((stated.lowest.value - 275.15).abs() < 1e-9 && stated.lowest.set_by == "the backflow at boundary door");
        let outlet = bracket(&format!("{WALLS}boundary out of r\n    side north\n    outlet\n"), "").unwrap();
        assert!((outlet.lowest.value - 303.15).abs() < 1e-9, "an outlet lets nothing in: {outlet:?}");
    }

    #[test]
    fn nothing_is_said_where_a_temperature_is_unknown() {
        let broken = "boundary n of r\n    side north\n    held at 20 degC + 1 / 0 * 1 K\n";
        assert!(bracket(&format!("{WALLS}{broken}"), "").is_none());
        assert!(bracket("", "").is_none());
    }
}
