//! The lengths that an arrangement's correlation and numbers are built on.

use super::arrangement::Placement;
use super::geometry::{Roundness, Sizes, area_over_perimeter, extent_along, level};
use super::model::ArrangementKind as Kind;
use super::vector::{dot, scaled, sum, unit};
use crate::case::model::Region;

/// Turns the frame so that the hot plate, whose normal out of the fluid is `hot_normal`, has the stated tilt (rad).
/// Without a hot plate it is the west side, or the bottom where the tilt is level.
pub fn turn(placement: &mut Placement, sizes: &Sizes, tilt: f64, hot_normal: Option<[f64; 3]>) {
    let normal = hot_normal.unwrap_or([-1.0, 0.0, 0.0]);
    let slope = if dot(normal, [0.0, 0.0, 1.0]).abs() < 0.5 { [0.0, 0.0, 1.0] } else { [1.0, 0.0, 0.0] };
    placement.up = sum(scaled(normal, -tilt.cos()), scaled(slope, tilt.sin()));
    placement.tilt = tilt;
    placement.height = extent_along(sizes, placement.up);
}

/// Fills spacing, run, width over depth and the characteristic lengths.
pub fn fill(region: &Region, sizes: &Sizes, placement: &mut Placement) {
    let up = placement.up;
    let [x, y, z] = sizes.extent;
    let level_extent = narrowest(sizes, up);
    placement.run = placement.height;
    placement.own_length = match placement.kind {
        Kind::SideHeatedCavity | Kind::TiltedCavity => {
            let across =
                placement.across.filter(|across| placement.kind == Kind::TiltedCavity || dot(*across, up).abs() < 0.5);
            match (across, sizes.roundness) {
                (Some(across), _) => {
                    placement.spacing = extent_along(sizes, across);
                    let slope = unit(sum(up, scaled(across, -dot(up, across)))).unwrap_or(level(up));
                    placement.run = extent_along(sizes, slope);
                }
                (None, Roundness::AboutAxis { outer, inner, .. }) if inner > 0.0 => {
                    placement.spacing = 0.5 * (outer - inner)
                }
                (None, _) => placement.spacing = level_extent,
            }
            placement.spacing
        }
        Kind::LayerHeatedFromBelow | Kind::StableLayer => {
            let across = placement.across.filter(|across| dot(*across, up).abs() >= 0.5).unwrap_or(up);
            placement.spacing = extent_along(sizes, across);
            placement.width_over_depth = narrowest(sizes, across) / placement.spacing;
            placement.spacing
        }
        Kind::Annulus => {
            let (inner, outer) = placement.diameters;
            placement.spacing = 0.5 * (outer - inner);
            placement.spacing
        }
        Kind::VerticalChannel => {
            placement.spacing = x;
            x
        }
        Kind::PlateFacingUp | Kind::PlateFacingDown => {
            region.length.as_ref().map_or(area_over_perimeter(z, y), |length| length.si)
        }
        Kind::InclinedPlate => {
            placement.run = z;
            z
        }
        Kind::HorizontalCylinder | Kind::Sphere => match sizes.roundness {
            Roundness::AboutAxis { outer, .. } => outer,
            Roundness::Ball(diameter) => diameter,
            Roundness::Flat => placement.height,
        },
        Kind::VerticalPlate | Kind::ThroughFlow | Kind::UniformHeating | Kind::Unknown => {
            if !placement.is_body {
                placement.spacing = level_extent;
            }
            placement.height
        }
    };
    placement.length = region.length.as_ref().map_or(placement.own_length, |length| length.si);
}

/// The least extent across a direction, m; nothing is known along the depth of a plane case.
fn narrowest(sizes: &Sizes, direction: [f64; 3]) -> f64 {
    let across = |component: f64| component.abs() < 0.75;
    let extents = sizes.extent.iter().zip(direction).filter(|(size, d)| across(*d) && !size.is_nan());
    extents.map(|(size, _)| *size).fold(f64::NAN, f64::min)
}
