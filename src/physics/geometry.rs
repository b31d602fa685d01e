//! From a shape to sizes: extents, sides with area and normal, height along gravity, volume.
//!
//! A plane case (a box of two lengths, a gap, plate or channel without a width, an annulus without a length) counts
//! per metre of depth: areas in m²/m, volumes in m³/m.

pub use super::cover::{area_of, covered_sides};
use super::model::{Geometry, SideGeometry};
use super::vector::{dot, length, scaled, sum, unit};
use crate::case::model::{Axis, Case, Region, Shape, Side};
use std::f64::consts::PI;

/// Sizes of a shape before it is known which way it stands.
#[derive(Clone, Copy, Debug)]
pub struct Sizes {
    /// Extent along x, y, z; `NaN` along the depth of a plane case.
    pub extent: [f64; 3],
    /// Volume, m³ (m³/m in a plane case).
    pub volume: f64,
    /// How it is rounded.
    pub roundness: Roundness,
}

/// Which shapes are round, and about which axis.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Roundness {
    /// Flat sides only.
    Flat,
    /// A cylinder or annulus: unit vector along the axis, outer and inner diameter (0 for a cylinder), length (`NaN`
    /// in a plane case).
    AboutAxis {
        /// Along the axis.
        axis: [f64; 3],
        /// Outer diameter, m.
        outer: f64,
        /// Inner diameter, m.
        inner: f64,
        /// Along the axis, m.
        length: f64,
    },
    /// A sphere of a diameter.
    Ball(f64),
}

/// The sizes of a region; `None` where it has no shape.
pub fn sizes(region: &Region) -> Option<Sizes> {
    let flat = |x: f64, y: Option<f64>, z: f64| Sizes {
        extent: [x, y.unwrap_or(f64::NAN), z],
        volume: x * y.unwrap_or(1.0) * z,
        roundness: Roundness::Flat,
    };
    Some(match region.shape.as_ref()? {
        Shape::Box { x, y, z } => flat(x.si, y.as_ref().map(|y| y.si), z.si),
        Shape::Gap { spacing, height, depth } | Shape::Channel { spacing, height, depth } => {
            flat(spacing.si, depth.as_ref().map(|depth| depth.si), height.si)
        }
        Shape::Plate { height, depth } => {
            Sizes { volume: f64::NAN, ..flat(0.0, depth.as_ref().map(|depth| depth.si), height.si) }
        }
        Shape::Cylinder { diameter, height } => about_axis(axis_of(region, Axis::Z), diameter.si, 0.0, Some(height.si)),
        Shape::Annulus { inner, outer, length } => {
            // Without a length it is a plane case across its axis; a plane case lies in x and z.
            let unsaid = if length.is_some() { Axis::Z } else { Axis::Y };
            about_axis(axis_of(region, unsaid), outer.si, inner.si, length.as_ref().map(|length| length.si))
        }
        Shape::Sphere { diameter } => Sizes {
            extent: [diameter.si; 3],
            volume: PI / 6.0 * diameter.si.powi(3),
            roundness: Roundness::Ball(diameter.si),
        },
    })
}

fn axis_of(region: &Region, unsaid: Axis) -> Axis {
    region.axis.map_or(unsaid, |axis| axis.value)
}

fn about_axis(axis: Axis, outer: f64, inner: f64, along: Option<f64>) -> Sizes {
    let length = along.unwrap_or(f64::NAN);
    let direction = direction(axis);
    Sizes {
        extent: direction.map(|component| if component > 0.5 { length } else { outer }),
        volume: PI / 4.0 * (outer * outer - inner * inner) * along.unwrap_or(1.0),
        roundness: Roundness::AboutAxis { axis: direction, outer, inner, length },
    }
}

/// The unit vector of an axis.
pub const fn direction(axis: Axis) -> [f64; 3] {
    match axis {
        Axis::X => [1.0, 0.0, 0.0],
        Axis::Y => [0.0, 1.0, 0.0],
        Axis::Z => [0.0, 0.0, 1.0],
    }
}

/// The unit vector against gravity; +z where gravity has no direction.
pub fn up(case: &Case) -> [f64; 3] {
    unit(scaled(case.gravity.direction, -1.0)).unwrap_or([0.0, 0.0, 1.0])
}

/// Extent along a direction, m: of a box as it stands, however the direction lies.
pub fn extent_along(sizes: &Sizes, direction: [f64; 3]) -> f64 {
    match sizes.roundness {
        Roundness::Flat => {
            // The depth of a plane case is unknown, and nothing varies along it.
            sizes.extent.iter().zip(direction).filter(|(size, _)| !size.is_nan()).map(|(size, d)| size * d.abs()).sum()
        }
        Roundness::AboutAxis { axis, outer, length, .. } => {
            let along = dot(axis, direction).abs().min(1.0);
            let across = (1.0 - along * along).sqrt();
            let ends = if length.is_nan() || along < 1e-9 { 0.0 } else { length * along };
            outer * across + ends
        }
        Roundness::Ball(diameter) => diameter,
    }
}

/// The geometry of a region as it stands under gravity. `length` and `spacing` are for the arrangement to fill.
pub fn geometry(case: &Case, region: &Region) -> Geometry {
    let Some(sizes) = sizes(region) else { return Geometry::default() };
    let sides = sides(case, region, &sizes);
    Geometry { height: extent_along(&sizes, up(case)), volume: sizes.volume, sides, ..Geometry::default() }
}

/// The inclination of a plate against the horizontal, rad: as stated, else by gravity, under which a plate stands along
/// z with the fluid on its side of high x. 0 faces up, π faces down.
pub fn plate_tilt(case: &Case, region: &Region) -> f64 {
    match &region.tilt {
        Some(tilt) => tilt.si,
        None => up(case)[0].clamp(-1.0, 1.0).acos(),
    }
}

/// The sides that the shape of a region has.
pub fn sides(case: &Case, region: &Region, sizes: &Sizes) -> Vec<SideGeometry> {
    let side = |side, area, normal| SideGeometry { side, area, normal };
    let none = [0.0; 3];
    if region.is_surrounded {
        let (area, normal) = face_of_body(case, region, sizes);
        return vec![side(Side::Face, area, normal), side(Side::Far, f64::NAN, none)];
    }
    match sizes.roundness {
        Roundness::Ball(diameter) => vec![side(Side::Around, PI * diameter * diameter, none)],
        Roundness::AboutAxis { axis, outer, inner, length } => {
            let along = if length.is_nan() && matches!(region.shape, Some(Shape::Annulus { length: None, .. })) {
                1.0
            } else {
                length
            };
            let mut sides = if inner == 0.0 && !matches!(region.shape, Some(Shape::Annulus { .. })) {
                vec![side(Side::Around, PI * outer * along, none)]
            } else {
                vec![side(Side::Inner, PI * inner * along, none), side(Side::Outer, PI * outer * along, none)]
            };
            if !matches!(region.shape, Some(Shape::Annulus { length: None, .. })) {
                let end = PI / 4.0 * (outer * outer - inner * inner);
                let (low, high) = match axis {
                    [x, _, _] if x > 0.5 => (Side::West, Side::East),
                    [_, y, _] if y > 0.5 => (Side::South, Side::North),
                    _ => (Side::Bottom, Side::Top),
                };
                sides.push(side(low, end, scaled(axis, -1.0)));
                sides.push(side(high, end, axis));
            }
            sides
        }
        Roundness::Flat => {
            let [x, y, z] = sizes.extent;
            let is_plane = has_no_depth(region);
            let depth = if is_plane { 1.0 } else { y };
            let mut sides = vec![
                side(Side::West, depth * z, [-1.0, 0.0, 0.0]),
                side(Side::East, depth * z, [1.0, 0.0, 0.0]),
                side(Side::Bottom, x * depth, [0.0, 0.0, -1.0]),
                side(Side::Top, x * depth, [0.0, 0.0, 1.0]),
            ];
            if !is_plane {
                sides.push(side(Side::South, x * z, [0.0, -1.0, 0.0]));
                sides.push(side(Side::North, x * z, [0.0, 1.0, 0.0]));
            }
            sides
        }
    }
}

/// Whether the shape is one of two dimensions.
pub fn has_no_depth(region: &Region) -> bool {
    match &region.shape {
        Some(Shape::Box { y, .. }) => y.is_none(),
        Some(Shape::Gap { depth, .. } | Shape::Plate { depth, .. } | Shape::Channel { depth, .. }) => depth.is_none(),
        Some(Shape::Annulus { length, .. }) => length.is_none(),
        Some(Shape::Cylinder { .. } | Shape::Sphere { .. }) | None => false,
    }
}

/// Area of the face of a plate or body, and the unit vector out of the fluid, which is into the plate.
fn face_of_body(case: &Case, region: &Region, sizes: &Sizes) -> (f64, [f64; 3]) {
    match sizes.roundness {
        Roundness::Ball(diameter) => (PI * diameter * diameter, [0.0; 3]),
        // The curved face alone: the correlations are for long cylinders.
        Roundness::AboutAxis { outer, length, .. } => (PI * outer * length, [0.0; 3]),
        Roundness::Flat => {
            let [x, y, z] = sizes.extent;
            let depth = if has_no_depth(region) { 1.0 } else { y };
            if matches!(region.shape, Some(Shape::Plate { .. })) {
                let up = up(case);
                let (sine, cosine) = plate_tilt(case, region).sin_cos();
                let outward = sum(scaled(up, -cosine), scaled(level(up), -sine));
                (z * depth, outward)
            } else if has_no_depth(region) {
                (2.0 * (x + z), [0.0; 3])
            } else {
                (2.0 * (x * y + y * z + z * x), [0.0; 3])
            }
        }
    }
}

/// A level direction: +x, or the nearest to it that is level.
pub fn level(up: [f64; 3]) -> [f64; 3] {
    let [x, _, _] = up;
    let across = sum([1.0, 0.0, 0.0], scaled(up, -x));
    if length(across) > 1e-6 { unit(across).unwrap_or([1.0, 0.0, 0.0]) } else { [0.0, 0.0, 1.0] }
}

/// Area over perimeter of a rectangle, the length of a horizontal plate (Goldstein, Sparrow and Jones, Int. J. Heat
/// Mass Transfer 16 (1973) 1025-1035); half the width of a strip whose other length is `NaN`.
pub fn area_over_perimeter(a: f64, b: f64) -> f64 {
    if b.is_nan() {
        0.5 * a
    } else if a.is_nan() {
        0.5 * b
    } else {
        a * b / (2.0 * (a + b))
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::physics;

    fn geometry_of(case: &str, shape: &str) -> Geometry {
        let text = format!(
            "case \"t\"\n    {case}\nfluid a\n    substance air\n    reference 20 degC\nregion r\n    {shape}\n    filled with a\n"
        );
        physics(&text).remove(0).geometry
    }

    fn area(geometry: &Geometry, side: Side) -> f64 {
        geometry.sides.iter().find(|own| own.side == side).map_or(f64::NAN, |own| own.area)
    }

    fn close(a: f64, b: f64) -> bool {
        (a - b).abs() <= 1e-9 * b.abs().max(1e-3)
    }

    #[test]
    fn boxes() {
        let solid = geometry_of("gravity 9.81 m/s^2", "box 2 m by 3 m by 4 m");
        assert!(close(solid.height, 4.0) && close(solid.volume, 24.0), "{solid:?}");
        assert!(close(area(&solid, Side::West), 12.0) && close(area(&solid, Side::North), 8.0));
        let total: f64 = solid.sides.iter().map(|side| side.area).sum();
        assert!(close(total, 52.0));
        let closed = solid.sides.iter().fold([0.0; 3], |all, side| sum(all, scaled(side.normal, side.area)));
        assert!(length(closed) < 1e-12, "normals of a closed surface add up to nothing");
        let plane = geometry_of("gravity 9.81 m/s^2", "box 2 m by 4 m");
        assert!(close(plane.height, 4.0) && close(plane.volume, 8.0) && plane.sides.len() == 4, "{plane:?}");
        assert!(close(area(&plane, Side::Bottom), 2.0) && area(&plane, Side::South).is_nan());
    }

    #[test]
    fn height_follows_gravity() {
        assert!(close(geometry_of("gravity 9.81 m/s^2 along x", "box 2 m by 3 m by 4 m").height, 2.0));
        assert!(close(geometry_of("gravity 9.81 m/s^2 along -y", "box 2 m by 3 m by 4 m").height, 3.0));
        let oblique = geometry_of("gravity 9.81 m/s^2 along (3, 0, -4)", "box 2 m by 3 m by 4 m");
        assert!(close(oblique.height, 0.6 * 2.0 + 0.8 * 4.0), "{oblique:?}");
        // Across the axis of a cylinder the diameter counts, along it the length.
        assert!(close(geometry_of("gravity 9.81 m/s^2", "cylinder 0.5 m by 2 m along x").height, 0.5));
        assert!(close(geometry_of("gravity 9.81 m/s^2", "cylinder 0.5 m by 2 m").height, 2.0));
        // A cylinder leaning by 30 degrees: cap to cap plus its length's component.
        let leaning = geometry_of("gravity 9.81 m/s^2 along (0.5, 0, -0.8660254037844386)", "cylinder 0.5 m by 2 m");
        assert!(close(leaning.height, 0.5 * 0.5 + 2.0 * 0.866_025_403_784_438_6), "{leaning:?}");
        assert!(close(geometry_of("gravity none", "box 2 m by 3 m by 4 m").height, 4.0));
    }

    #[test]
    fn round_shapes() {
        let ring = geometry_of("gravity 9.81 m/s^2", "annulus 0.1 m by 0.3 m");
        assert!(close(ring.volume, PI / 4.0 * 0.08) && close(area(&ring, Side::Inner), PI * 0.1), "{ring:?}");
        assert!(close(ring.height, 0.3) && ring.sides.len() == 2);
        let tube = geometry_of("gravity 9.81 m/s^2", "annulus 0.1 m by 0.3 m by 2 m");
        assert!(close(tube.height, 2.0) && close(area(&tube, Side::Outer), PI * 0.6), "{tube:?}");
        assert!(close(area(&tube, Side::Bottom), PI / 4.0 * 0.08));
        let ball = geometry_of("gravity 9.81 m/s^2", "sphere 0.2 m");
        assert!(close(ball.volume, PI / 6.0 * 0.008) && close(area(&ball, Side::Around), PI * 0.04));
        let lying = geometry_of("gravity 9.81 m/s^2", "cylinder 0.5 m by 2 m along x");
        assert!(close(area(&lying, Side::West), PI / 16.0) && close(area(&lying, Side::Around), PI), "{lying:?}");
    }

    #[test]
    fn plates_by_their_tilt() {
        let plate = |tilt: &str| geometry_of("gravity 9.81 m/s^2", &format!("plate 0.5 m by 0.4 m\n    tilt {tilt}"));
        let normal = |geometry: &Geometry| geometry.sides[0].normal;
        assert!(close(plate("90 deg").height, 0.5) && close(area(&plate("90 deg"), Side::Face), 0.2));
        assert!(close(plate("30 deg").height, 0.25));
        // The fluid lies over a plate that faces up: out of it is down.
        assert!(close(normal(&plate("0 deg"))[2], -1.0) && close(normal(&plate("180 deg"))[2], 1.0));
        let sideways = geometry_of("gravity 9.81 m/s^2 along -x", "plate 0.5 m by 0.4 m");
        assert!(close(sideways.sides[0].normal[0], -1.0), "{sideways:?}");
        assert!(close(area_over_perimeter(0.2, 0.3), 0.06) && close(area_over_perimeter(0.2, f64::NAN), 0.1));
    }
}
