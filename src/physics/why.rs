//! Says in the case's own words why an arrangement was taken.

use super::arrangement::Question;
use super::conditions::Wall;
use super::facing::Group;
use super::model::ArrangementKind as Kind;
use super::roles::Role;
use crate::case::model::{Case, Side};
use crate::quantity::display::format_number;

/// Of a space with a hot and a cold part.
pub fn two_sided(
    case: &Case,
    kind: Kind,
    tilt: f64,
    walls: &[Wall<'_>],
    roles: &[Role],
    has_stated_tilt: bool,
) -> String {
    let hot = named(walls, roles, Role::Hot);
    let cold = named(walls, roles, Role::Cold);
    let gravity = if has_stated_tilt { "at the stated tilt".to_string() } else { gravity_words(case) };
    match kind {
        Kind::SideHeatedCavity => {
            format!("{hot} is hot and {cold} is cold, and an upright side drives the flow, {gravity}")
        }
        Kind::LayerHeatedFromBelow => format!("{hot} is hot and {cold} is cold, the hot below the cold, {gravity}"),
        Kind::StableLayer => format!("{hot} is hot and {cold} is cold, the hot above the cold, {gravity}"),
        Kind::TiltedCavity => {
            let degrees = tilt.to_degrees();
            format!(
                "{hot} is hot and {cold} is cold, and the hot side is inclined by {degrees:.0} deg to the level, {gravity}"
            )
        }
        _ => format!("{hot} is hot and {cold} is cold, and neither faces one way"),
    }
}

/// Of a space without a hot or without a cold part.
pub fn one_sided(question: &Question<'_>, roles: &[Role], hot: &Group, cold: &Group) -> String {
    let walls = question.walls;
    if cold.area > 0.0 {
        let cold = named(walls, roles, Role::Cold);
        let inside = if question.releases_heat { "heat is released inside" } else { "no side is hot" };
        format!("{inside}, and {cold} is cold: there is no pair of a hot and a cold side")
    } else if hot.area > 0.0 {
        let hot = named(walls, roles, Role::Hot);
        format!("{hot} is hot and no side is cold: there is no pair of a hot and a cold side")
    } else if question.releases_heat {
        "heat is released inside, and no side is hot or cold".into()
    } else {
        "no side is hotter than another".into()
    }
}

/// "under gravity along -z".
fn gravity_words(case: &Case) -> String {
    if case.gravity.magnitude == 0.0 {
        return "though no gravity acts".into();
    }
    let [x, y, z] = case.gravity.direction;
    let axes = [("x", x), ("y", y), ("z", z)];
    match axes.into_iter().find(|(_, component)| component.abs() > 0.999_999) {
        Some((axis, component)) => format!("under gravity along {}{axis}", if component < 0.0 { "-" } else { "" }),
        None => format!("under gravity along ({}, {}, {})", format_number(x), format_number(y), format_number(z)),
    }
}

/// The boundaries of a role: "boundary hot (west)", at most two by name.
fn named(walls: &[Wall<'_>], roles: &[Role], role: Role) -> String {
    let mut names: Vec<(&str, Side, usize)> = Vec::new();
    for (wall, _) in walls.iter().zip(roles).filter(|(_, own)| **own == role) {
        let name = &*wall.piece.boundary.name.text;
        match names.iter_mut().find(|(known, ..)| *known == name) {
            Some((.., sides)) => *sides += 1,
            None => names.push((name, wall.piece.side, 1)),
        }
    }
    let word = |(name, side, sides): &(&str, Side, usize)| {
        let place = if *sides == 1 { side_word(*side).to_string() } else { format!("{sides} sides") };
        format!("boundary {name} ({place})")
    };
    match names.as_slice() {
        [] => "nothing".into(),
        [one] => word(one),
        [one, two] => format!("{} with {}", word(one), word(two)),
        [one, two, rest @ ..] => format!("{} with {} and {} more", word(one), word(two), rest.len()),
    }
}

/// The word of a side in the vocabulary.
pub const fn side_word(side: Side) -> &'static str {
    match side {
        Side::West => "west",
        Side::East => "east",
        Side::South => "south",
        Side::North => "north",
        Side::Bottom => "bottom",
        Side::Top => "top",
        Side::Around => "around",
        Side::Inner => "inner",
        Side::Outer => "outer",
        Side::Face => "face",
        Side::Far => "far",
        Side::Remaining => "remaining",
    }
}
