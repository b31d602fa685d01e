//! How the hot and the cold walls face each other.

use super::arrangement::ABOUT_STRAIGHT;
use super::conditions::Wall;
use super::model::ArrangementKind as Kind;
use super::roles::Role;
use super::vector::{dot, length, scaled, sum, unit};
use crate::case::model::Side;
use std::f64::consts::{FRAC_PI_2, PI};

/// The walls of one role taken together.
#[derive(Clone, Debug)]
pub struct Group {
    /// Area, m².
    pub area: f64,
    /// The unit vector out of the fluid; `None` where the walls face several ways.
    pub normal: Option<[f64; 3]>,
    /// The sides.
    pub sides: Vec<Side>,
    /// Whether it is the whole of one side.
    pub is_whole_side: bool,
}

/// Walls face one way where their mean normal is at least this long.
const ONE_WAY: f64 = 0.9;

/// The walls of a role taken together.
pub fn group(walls: &[Wall<'_>], roles: &[Role], role: Role) -> Group {
    let mut group = Group { area: 0.0, normal: None, sides: Vec::new(), is_whole_side: false };
    let (mut mean, mut side_area) = ([0.0; 3], 0.0);
    for (wall, _) in walls.iter().zip(roles).filter(|(_, own)| **own == role) {
        let piece = &wall.piece;
        // A wall whose area is not known still tells which way it faces.
        let area = if piece.area > 0.0 { piece.area } else { 1e-9 };
        group.area += area;
        mean = sum(mean, scaled(piece.normal, area));
        if !group.sides.contains(&piece.side) {
            group.sides.push(piece.side);
            side_area += piece.side_area;
        }
    }
    let mean = scaled(mean, 1.0 / group.area.max(f64::MIN_POSITIVE));
    group.normal = if length(mean) >= ONE_WAY { unit(mean) } else { None };
    group.is_whole_side = group.sides.len() == 1 && group.area >= 0.95 * side_area;
    group
}

/// Whether heat passes between two whole sides that face each other and nowhere else.
pub fn is_two_sided(walls: &[Wall<'_>], hot: &Group, cold: &Group) -> bool {
    let face_each_other = match (hot.normal, cold.normal) {
        (Some(a), Some(b)) => dot(a, b) < -0.99,
        _ => matches!(
            (hot.sides.as_slice(), cold.sides.as_slice()),
            ([Side::Inner], [Side::Outer]) | ([Side::Outer], [Side::Inner])
        ),
    };
    let elsewhere = walls.iter().any(|wall| {
        wall.is_open
            || wall.condition.is_active()
                && !hot.sides.contains(&wall.piece.side)
                && !cold.sides.contains(&wall.piece.side)
    });
    hot.is_whole_side && cold.is_whole_side && face_each_other && !elsewhere
}

/// The arrangement of hot and cold groups, and the tilt.
pub fn facing(hot: &Group, cold: &Group, up: [f64; 3]) -> (Kind, f64) {
    let by_tilt = |tilt: f64| match tilt {
        tilt if tilt <= ABOUT_STRAIGHT => Kind::LayerHeatedFromBelow,
        tilt if tilt >= PI - ABOUT_STRAIGHT => Kind::StableLayer,
        tilt if (tilt - FRAC_PI_2).abs() <= ABOUT_STRAIGHT => Kind::SideHeatedCavity,
        _ => Kind::TiltedCavity,
    };
    // The hot plate's normal out of the fluid points down where it is heated from below.
    let below = |normal: [f64; 3]| (-dot(normal, up)).clamp(-1.0, 1.0);
    match (hot.normal, cold.normal) {
        (Some(a), Some(b)) if dot(a, b) < -ONE_WAY => {
            let tilt = below(a).acos();
            (by_tilt(tilt), tilt)
        }
        // Not face to face. Hot floor or cold lid: unstable. Else an upright side drives the flow.
        (a, b) => {
            let unstable = a.is_some_and(|a| below(a) > 0.9) || b.is_some_and(|b| below(b) < -0.9);
            let upright_one = |normal: Option<[f64; 3]>| normal.is_none_or(|normal| below(normal).abs() < 0.5);
            if unstable && !(a.is_some_and(|a| below(a).abs() < 0.1) || b.is_some_and(|b| below(b).abs() < 0.1)) {
                (Kind::LayerHeatedFromBelow, 0.0)
            } else if a.is_none() && b.is_none() {
                (Kind::UniformHeating, f64::NAN)
            } else if upright_one(a) || upright_one(b) {
                (Kind::SideHeatedCavity, FRAC_PI_2)
            } else {
                (Kind::StableLayer, PI)
            }
        }
    }
}
