//! Which arrangement a region is, and why: from shape, gravity, tilt, and which sides are hot and cold.
//!
//! `box 0.75 m by 0.75 m`, `west held at 50 degC`, `east held at 10 degC`: a side-heated cavity. The same with bottom
//! and top: a layer heated from below.

use super::conditions::Wall;
use super::facing::{facing, group, is_two_sided};
use super::geometry::{Roundness, Sizes, extent_along, plate_tilt, sizes, up};
use super::lengths;
use super::model::ArrangementKind as Kind;
use super::roles::{Role, roles};
use super::vector::{dot, scaled};
use super::why;
use crate::case::model::{Case, Region, Shape, Side};
use std::f64::consts::{FRAC_PI_2, PI};

/// Up to this angle from the level or the upright a side counts as level or upright, rad: 5 degrees (common practice;
/// the component of gravity along it changes by 0.4 %).
pub const ABOUT_STRAIGHT: f64 = 5.0 * PI / 180.0;

/// An arrangement with the sizes that its correlation is built on.
#[derive(Clone, Debug)]
pub struct Placement {
    /// Which.
    pub kind: Kind,
    /// Why, as a sentence.
    pub why: String,
    /// Role of each wall.
    pub roles: Vec<Role>,
    /// Unit vector against gravity, in the frame of the shape (a stated tilt turns it).
    pub up: [f64; 3],
    /// Angle of the hot plate against the horizontal, rad; of the plate for a plate.
    pub tilt: f64,
    /// Extent along gravity, m.
    pub height: f64,
    /// The direction from the hot to the cold side, or back, where it is one.
    pub across: Option<[f64; 3]>,
    /// Distance from the hot to the cold side, m; `NaN` for a plate or body.
    pub spacing: f64,
    /// Length of the hot side along gravity or the slope, m.
    pub run: f64,
    /// Narrowest width over depth of a level layer.
    pub width_over_depth: f64,
    /// Inner and outer diameter of an annulus, m.
    pub diameters: (f64, f64),
    /// The length that the arrangement's correlation is built on, m.
    pub own_length: f64,
    /// The length that characteristic numbers are built on, m: as stated, else the same.
    pub length: f64,
    /// Whether hot and cold are one whole side each, face to face, and nothing else passes heat.
    pub is_two_sided: bool,
    /// Whether the fluid lies round the shape.
    pub is_body: bool,
}

/// What the arrangement is found from.
pub struct Question<'a> {
    /// The case.
    pub case: &'a Case,
    /// The region.
    pub region: &'a Region,
    /// Its walls.
    pub walls: &'a [Wall<'a>],
    /// Whether heat is released inside.
    pub releases_heat: bool,
    /// Temperature of the far fluid, K, for a plate or body.
    pub far: Option<f64>,
    /// Whether warmer fluid is the heavier one (water below 4 degC).
    pub is_inverted: bool,
}

/// The arrangement of a region.
pub fn arrangement(question: &Question<'_>) -> Placement {
    let Question { case, region, walls, .. } = *question;
    let up = up(case);
    let mut placement = Placement {
        kind: Kind::Unknown,
        why: String::new(),
        roles: roles(walls, question.releases_heat),
        up,
        tilt: f64::NAN,
        height: f64::NAN,
        across: None,
        spacing: f64::NAN,
        run: f64::NAN,
        width_over_depth: f64::NAN,
        diameters: (f64::NAN, f64::NAN),
        own_length: f64::NAN,
        length: f64::NAN,
        is_two_sided: false,
        is_body: region.is_surrounded,
    };
    let Some(sizes) = sizes(region) else {
        placement.why = "the region has no shape".into();
        return placement;
    };
    if region.filled_with.is_none() {
        placement.why = if region.made_of.is_some() { "the region is solid" } else { "no fluid fills it" }.into();
        placement.height = extent_along(&sizes, up);
        return placement;
    }
    placement.height = extent_along(&sizes, up);
    if let Roundness::AboutAxis { outer, inner, .. } = sizes.roundness {
        placement.diameters = (inner, outer);
    }
    let found = if region.is_surrounded {
        body(question, &sizes, &mut placement)
    } else {
        enclosure(question, &sizes, &mut placement)
    };
    placement.kind = found.0;
    placement.why = found.1;
    if question.is_inverted {
        invert(&mut placement);
    }
    if let Some(stated) = &region.arrangement
        && let Some(kind) = of_word(stated.value)
    {
        placement.kind = kind;
        placement.why = format!("the region states it: arrangement {}", stated.value);
    }
    lengths::fill(region, &sizes, &mut placement);
    placement
}

/// A plate or body in a wide fluid.
fn body(question: &Question<'_>, sizes: &Sizes, placement: &mut Placement) -> (Kind, String) {
    let Question { case, region, walls, far, .. } = *question;
    let face = walls.iter().find(|wall| wall.piece.side == Side::Face);
    let is_cold = face.is_some_and(|wall| match (wall.condition.anchor(), far) {
        (Some(anchor), Some(far)) => anchor < far,
        _ => wall.condition.flux < 0.0,
    });
    for (role, wall) in placement.roles.iter_mut().zip(walls) {
        *role = match wall.piece.side {
            Side::Face if is_cold => Role::Cold,
            Side::Face => Role::Hot,
            _ => Role::Neutral,
        };
    }
    match sizes.roundness {
        Roundness::Ball(_) => (Kind::Sphere, "the region is a sphere in a wide fluid".into()),
        Roundness::AboutAxis { axis, .. } => {
            if dot(axis, placement.up).abs() > 0.5_f64.sqrt() {
                let why = "the region is a cylinder that stands upright in a wide fluid: an upright plate of its height, \
                           as long as it is thick against the layer on it";
                (Kind::VerticalPlate, why.into())
            } else {
                (Kind::HorizontalCylinder, "the region is a level cylinder in a wide fluid".into())
            }
        }
        Roundness::Flat if !matches!(region.shape, Some(Shape::Plate { .. })) => {
            (Kind::VerticalPlate, "the region is a block in a wide fluid: its upright faces are taken".into())
        }
        Roundness::Flat => {
            let tilt = plate_tilt(case, region).clamp(0.0, PI);
            placement.tilt = tilt;
            let [_, _, along] = sizes.extent;
            placement.height = along * tilt.sin();
            let heat = if is_cold { "cooled" } else { "heated" };
            if (tilt - FRAC_PI_2).abs() <= ABOUT_STRAIGHT {
                (Kind::VerticalPlate, "the plate stands upright in a wide fluid".into())
            } else if tilt <= ABOUT_STRAIGHT {
                let kind = if is_cold { Kind::PlateFacingDown } else { Kind::PlateFacingUp };
                (kind, format!("the plate is level and its {heat} face looks up"))
            } else if tilt >= PI - ABOUT_STRAIGHT {
                let kind = if is_cold { Kind::PlateFacingUp } else { Kind::PlateFacingDown };
                (kind, format!("the plate is level and its {heat} face looks down"))
            } else {
                let degrees = tilt.to_degrees();
                (
                    Kind::InclinedPlate,
                    format!("the plate is inclined by {degrees:.0} deg to the level, its face {heat}"),
                )
            }
        }
    }
}

/// A closed or open space.
fn enclosure(question: &Question<'_>, sizes: &Sizes, placement: &mut Placement) -> (Kind, String) {
    let Question { case, region, walls, .. } = *question;
    let hot = group(walls, &placement.roles, Role::Hot);
    let cold = group(walls, &placement.roles, Role::Cold);
    if let Some(tilt) = &region.tilt
        && tilt.is_known()
    {
        lengths::turn(placement, sizes, tilt.si, hot.normal.or(cold.normal.map(|normal| scaled(normal, -1.0))));
    }
    if let Some(Shape::Channel { .. }) = &region.shape {
        let is_driven = walls.iter().any(|wall| wall.piece.boundary.enters.is_some());
        let is_upright = dot(placement.up, [0.0, 0.0, 1.0]).abs() >= ABOUT_STRAIGHT.cos();
        return match (is_driven, is_upright) {
            (false, true) => (Kind::VerticalChannel, "two upright plates, open below and above".into()),
            (true, _) => (Kind::ThroughFlow, "fluid is driven through the channel".into()),
            (false, false) => (Kind::ThroughFlow, "the channel is open at its ends and does not stand upright".into()),
        };
    }
    if let Some(wall) = walls.iter().find(|wall| wall.is_open) {
        return (Kind::ThroughFlow, format!("fluid passes through boundary {}", wall.piece.boundary.name.text));
    }
    if matches!(sizes.roundness, Roundness::AboutAxis { inner, axis, .. } if inner > 0.0 && dot(axis, placement.up).abs() < 0.5)
        && hot.sides.iter().chain(&cold.sides).all(|side| matches!(side, Side::Inner | Side::Outer))
        && (hot.area > 0.0 || cold.area > 0.0)
    {
        placement.is_two_sided = is_two_sided(walls, &hot, &cold);
        return (Kind::Annulus, "one of two level cylinders, one in the other, is hotter than the other".into());
    }
    if hot.area == 0.0 || cold.area == 0.0 {
        return (Kind::UniformHeating, why::one_sided(question, &placement.roles, &hot, &cold));
    }
    placement.is_two_sided = is_two_sided(walls, &hot, &cold);
    let (kind, tilt) = facing(&hot, &cold, placement.up);
    placement.tilt = tilt;
    placement.across = hot.normal.or(cold.normal);
    let is_radial = hot.sides.iter().chain(&cold.sides).all(|side| matches!(side, Side::Inner | Side::Outer));
    let kind = if is_radial { Kind::SideHeatedCavity } else { kind };
    (kind, why::two_sided(case, kind, tilt, walls, &placement.roles, region.tilt.is_some()))
}

/// Warmer fluid sinks: what was stable is not, and the reverse.
fn invert(placement: &mut Placement) {
    let (kind, changed) = match placement.kind {
        Kind::LayerHeatedFromBelow => (Kind::StableLayer, true),
        Kind::StableLayer => (Kind::LayerHeatedFromBelow, true),
        Kind::PlateFacingUp => (Kind::PlateFacingDown, true),
        Kind::PlateFacingDown => (Kind::PlateFacingUp, true),
        Kind::TiltedCavity => {
            placement.tilt = PI - placement.tilt;
            (Kind::TiltedCavity, true)
        }
        other => (other, false),
    };
    placement.kind = kind;
    if changed {
        placement.why.push_str("; and the warmer fluid is the heavier one here");
    }
}

/// The arrangement that a word of the vocabulary names.
pub fn of_word(word: &str) -> Option<Kind> {
    ALL.iter().find(|(known, _)| *known == word).map(|(_, kind)| *kind)
}

/// The word of an arrangement; `unknown` where nothing settles it.
pub fn word(kind: Kind) -> &'static str {
    ALL.iter().find(|(_, known)| *known == kind).map_or("unknown", |(word, _)| word)
}

/// The words of the vocabulary and what they stand for.
const ALL: &[(&str, Kind)] = &[
    ("side-heated-cavity", Kind::SideHeatedCavity),
    ("layer-heated-from-below", Kind::LayerHeatedFromBelow),
    ("stable-layer", Kind::StableLayer),
    ("tilted-cavity", Kind::TiltedCavity),
    ("vertical-plate", Kind::VerticalPlate),
    ("plate-facing-up", Kind::PlateFacingUp),
    ("plate-facing-down", Kind::PlateFacingDown),
    ("inclined-plate", Kind::InclinedPlate),
    ("horizontal-cylinder", Kind::HorizontalCylinder),
    ("sphere", Kind::Sphere),
    ("annulus", Kind::Annulus),
    ("vertical-channel", Kind::VerticalChannel),
    ("through-flow", Kind::ThroughFlow),
    ("uniform-heating", Kind::UniformHeating),
];

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::physics;
    use crate::vocabulary::arrangements::ARRANGEMENTS;

    fn of(case: &str, region: &str, boundaries: &[(&str, &str)]) -> crate::physics::model::RegionPhysics {
        let mut text = format!(
            "case \"t\"\n    {case}\nfluid a\n    substance air\n    reference 20 degC\nregion r\n    {region}\n    filled with a\n"
        );
        for (index, (side, heat)) in boundaries.iter().enumerate() {
            text.push_str(&format!("boundary b{index} of r\n    side {side}\n    {heat}\n"));
        }
        physics(&text).remove(0)
    }

    fn kind(case: &str, region: &str, boundaries: &[(&str, &str)]) -> Kind {
        of(case, region, boundaries).arrangement.kind
    }

    const DOWN: &str = "gravity 9.81 m/s^2";
    const HOT: &str = "held at 40 degC";
    const COLD: &str = "held at 10 degC";

    #[test]
    fn every_word_has_its_kind() {
        for choice in ARRANGEMENTS {
            let kind = of_word(choice.word).unwrap();
            assert_eq!(word(kind), choice.word);
        }
        assert_eq!(ARRANGEMENTS.len(), ALL.len());
        assert_eq!(word(Kind::Unknown), "unknown");
    }

    #[test]
    fn enclosures_by_gravity() {
        let cube = "box 1 m by 1 m by 1 m";
        let sides = [("west", HOT), ("east", COLD)];
        assert_eq!(kind(DOWN, cube, &sides), Kind::SideHeatedCavity);
        assert_eq!(kind("gravity 9.81 m/s^2 along -x", cube, &sides), Kind::LayerHeatedFromBelow);
        assert_eq!(kind("gravity 9.81 m/s^2 along x", cube, &sides), Kind::StableLayer);
        assert_eq!(kind("gravity 9.81 m/s^2 along (-1, 0, -1)", cube, &sides), Kind::TiltedCavity);
        assert_eq!(kind(DOWN, cube, &[("bottom", HOT), ("top", COLD)]), Kind::LayerHeatedFromBelow);
        assert_eq!(kind(DOWN, cube, &[("bottom", COLD), ("top", HOT)]), Kind::StableLayer);
        assert_eq!(kind("gravity none", cube, &sides), Kind::SideHeatedCavity);
    }

    #[test]
    fn a_stated_tilt_turns_the_hot_side() {
        let gap = |tilt: &str| format!("gap 20 mm by 1 m\n    tilt {tilt}");
        let hot_west = [("west", HOT), ("east", COLD)];
        let hot_east = [("east", HOT), ("west", COLD)];
        for (tilt, expected) in [
            ("0 deg", Kind::LayerHeatedFromBelow),
            ("60 deg", Kind::TiltedCavity),
            ("90 deg", Kind::SideHeatedCavity),
            ("180 deg", Kind::StableLayer),
        ] {
            assert_eq!(kind(DOWN, &gap(tilt), &hot_west), expected, "{tilt}");
            assert_eq!(kind(DOWN, &gap(tilt), &hot_east), expected, "{tilt}");
        }
        let tilted = of(DOWN, &gap("30 deg"), &hot_west).geometry;
        let height = 0.5 + 0.02 * 30_f64.to_radians().cos();
        assert!((tilted.height - height).abs() < 1e-9 && (tilted.spacing - 0.02).abs() < 1e-12, "{tilted:?}");
    }

    #[test]
    fn sides_that_do_not_face_each_other() {
        let cube = "box 1 m by 1 m by 1 m";
        assert_eq!(kind(DOWN, cube, &[("bottom", HOT), ("west", COLD)]), Kind::SideHeatedCavity);
        assert_eq!(kind(DOWN, cube, &[("bottom", HOT), ("remaining", COLD)]), Kind::LayerHeatedFromBelow);
        assert_eq!(kind(DOWN, cube, &[("west", HOT), ("remaining", COLD)]), Kind::SideHeatedCavity);
        assert_eq!(kind(DOWN, cube, &[("top", HOT), ("remaining", COLD)]), Kind::SideHeatedCavity);
        assert_eq!(kind(DOWN, cube, &[("remaining", HOT)]), Kind::UniformHeating);
        assert_eq!(kind(DOWN, cube, &[]), Kind::UniformHeating);
    }

    #[test]
    fn round_spaces() {
        let ring = [("inner", HOT), ("outer", COLD)];
        assert_eq!(kind(DOWN, "annulus 0.1 m by 0.2 m", &ring), Kind::Annulus);
        assert_eq!(kind(DOWN, "annulus 0.1 m by 0.2 m by 1 m along x", &ring), Kind::Annulus);
        let upright = of(DOWN, "annulus 0.1 m by 0.2 m by 1 m", &ring);
        assert_eq!(upright.arrangement.kind, Kind::SideHeatedCavity);
        assert!((upright.geometry.spacing - 0.05).abs() < 1e-12, "{upright:?}");
        assert_eq!(kind(DOWN, "cylinder 1 m by 2 m", &[("bottom", HOT), ("top", COLD)]), Kind::LayerHeatedFromBelow);
        assert_eq!(kind(DOWN, "cylinder 1 m by 2 m", &[("bottom", HOT), ("around", COLD)]), Kind::LayerHeatedFromBelow);
        assert_eq!(kind(DOWN, "sphere 1 m", &[("around", HOT)]), Kind::UniformHeating);
    }

    #[test]
    fn plates_and_bodies() {
        let plate = |tilt: &str| format!("plate 0.5 m by 0.5 m\n    tilt {tilt}");
        let hot = [("face", HOT), ("far", COLD)];
        let cold = [("face", COLD), ("far", HOT)];
        assert_eq!(kind(DOWN, "plate 0.5 m", &hot), Kind::VerticalPlate);
        assert_eq!(kind(DOWN, &plate("0 deg"), &hot), Kind::PlateFacingUp);
        assert_eq!(kind(DOWN, &plate("0 deg"), &cold), Kind::PlateFacingDown);
        assert_eq!(kind(DOWN, &plate("180 deg"), &hot), Kind::PlateFacingDown);
        assert_eq!(kind(DOWN, &plate("180 deg"), &cold), Kind::PlateFacingUp);
        assert_eq!(kind(DOWN, &plate("45 deg"), &hot), Kind::InclinedPlate);
        let facing_up = of(DOWN, &plate("0 deg"), &hot).geometry;
        assert!((facing_up.length - 0.125).abs() < 1e-12, "area over perimeter: {facing_up:?}");
        let stated = of(DOWN, "plate 0.5 m by 0.5 m\n    tilt 0 deg\n    length 0.2 m", &hot).geometry;
        assert!((stated.length - 0.2).abs() < 1e-12);
    }

    #[test]
    fn flow_through_and_channels() {
        let cube = "box 1 m by 1 m by 1 m";
        assert_eq!(kind(DOWN, cube, &[("west", "inlet"), ("east", "outlet")]), Kind::ThroughFlow);
        assert_eq!(
            kind(DOWN, "channel 10 mm by 1 m", &[("west", HOT), ("bottom, top", "opening")]),
            Kind::VerticalChannel
        );
        assert_eq!(
            kind("gravity 9.81 m/s^2 along x", "channel 10 mm by 1 m", &[("west", HOT), ("bottom, top", "opening")]),
            Kind::ThroughFlow
        );
    }

    #[test]
    fn what_the_region_states_goes_before() {
        let stated = of(DOWN, "box 1 m by 1 m by 1 m\n    arrangement stable-layer", &[("bottom", HOT), ("top", COLD)]);
        assert_eq!(stated.arrangement.kind, Kind::StableLayer);
        assert_eq!(stated.arrangement.why, "the region states it: arrangement stable-layer");
    }

    #[test]
    fn cold_water_turns_layers_over() {
        let text = |hot: &str, cold: &str| {
            format!(
                "fluid w\n    substance water\n    reference 2 degC\nregion r\n    box 1 m by 0.2 m\n    filled with w\n\
                 boundary b1 of r\n    side bottom\n    held at {hot}\nboundary b2 of r\n    side top\n    held at {cold}\n"
            )
        };
        let kind = |hot: &str, cold: &str| physics(&text(hot, cold)).remove(0).arrangement.kind;
        assert_eq!(kind("3 degC", "0.5 degC"), Kind::StableLayer);
        assert_eq!(kind("0.5 degC", "3 degC"), Kind::LayerHeatedFromBelow);
        assert_eq!(kind("30 degC", "20 degC"), Kind::LayerHeatedFromBelow);
    }

    #[test]
    fn sentences_use_the_names_of_the_case() {
        let cavity = of(DOWN, "box 1 m by 1 m by 1 m", &[("west", HOT), ("east", COLD)]);
        assert_eq!(
            cavity.arrangement.why,
            "boundary b0 (west) is hot and boundary b1 (east) is cold, and an upright side drives the flow, \
             under gravity along -z"
        );
    }
}
