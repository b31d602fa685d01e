//! Chooses the published correlation for a surface or an enclosure, and turns it into a heat transfer coefficient.

use super::arrangement::Placement;
use super::conditions::Wall;
use super::correlations::{
    Chosen, Correlation, Estimate, annulus, bottom_heated_layer, cylinder_and_sphere, horizontal_plate, inclined_plate,
    side_heated_cavity, tilted_cavity, vertical_channel, vertical_plate,
};
use super::fluid_state::Transport;
use super::geometry::{Sizes, area_over_perimeter};
use super::model::ArrangementKind as Kind;
use super::vector::dot;
use std::f64::consts::FRAC_PI_2;

/// A surface in a fluid at one temperature, with the length, m, that its Nusselt number is built on.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Surface {
    /// An upright plate of a height.
    Upright(f64),
    /// A level plate, hot and facing up or cold and facing down; area over perimeter.
    FacingUp(f64),
    /// A level plate, hot and facing down or cold and facing up; area over perimeter.
    FacingDown(f64),
    /// An inclined plate of a length, at an angle from the vertical, rad; whether the flow lifts off (hot face up).
    Inclined(f64, f64, bool),
    /// A level cylinder of a diameter.
    Cylinder(f64),
    /// A sphere of a diameter.
    Sphere(f64),
}

/// Which edge of a correlation's band is taken.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Edge {
    /// The formula's value.
    Value,
    /// The lower edge.
    Low,
    /// The upper edge.
    High,
}

impl Edge {
    /// That edge of an estimate.
    pub fn of(self, estimate: &Estimate) -> f64 {
        match self {
            Edge::Value => estimate.value,
            Edge::Low => estimate.low,
            Edge::High => estimate.high,
        }
    }
}

impl Surface {
    /// The length, m.
    pub fn length(self) -> f64 {
        match self {
            Surface::Upright(length)
            | Surface::FacingUp(length)
            | Surface::FacingDown(length)
            | Surface::Inclined(length, ..)
            | Surface::Cylinder(length)
            | Surface::Sphere(length) => length,
        }
    }

    /// The mean Nusselt number on the length. A plate of uniform flux counts by the difference at mid-height. The forms
    /// taken are those that have no step between laminar and turbulent, so that a wall temperature can be solved for.
    pub fn nusselt(self, rayleigh: f64, prandtl: f64, is_by_flux: bool) -> Chosen {
        let chosen = |correlation: &'static Correlation, estimate| Chosen { correlation, estimate };
        match self {
            Surface::Upright(_) if is_by_flux => {
                chosen(&vertical_plate::UNIFORM_FLUX, vertical_plate::uniform_flux(rayleigh, prandtl))
            }
            Surface::Upright(_) => chosen(&vertical_plate::ISOTHERMAL, vertical_plate::isothermal(rayleigh, prandtl)),
            Surface::FacingUp(_) => {
                chosen(&horizontal_plate::HOT_FACE_UP_BLENDED, horizontal_plate::hot_face_up_blended(rayleigh, prandtl))
            }
            Surface::FacingDown(_) => chosen(
                &horizontal_plate::HOT_FACE_DOWN_BLENDED,
                horizontal_plate::hot_face_down_blended(rayleigh, prandtl),
            ),
            Surface::Inclined(_, from_vertical, lifts_off) => {
                let mut estimate = inclined_plate::inclined(rayleigh, prandtl, from_vertical);
                estimate.inside_range &= !lifts_off;
                chosen(&inclined_plate::INCLINED, estimate)
            }
            Surface::Cylinder(_) => chosen(
                &cylinder_and_sphere::HORIZONTAL_CYLINDER,
                cylinder_and_sphere::horizontal_cylinder(rayleigh, prandtl),
            ),
            Surface::Sphere(_) => chosen(
                &cylinder_and_sphere::SPHERE_TO_TURBULENT,
                cylinder_and_sphere::sphere_to_turbulent(rayleigh, prandtl),
            ),
        }
    }

    /// Heat transfer coefficient, W/(m² K), at a difference between wall and fluid, K. `NaN` where a property is not
    /// known.
    pub fn coefficient(self, fluid: &Transport, gravity: f64, difference: f64, is_by_flux: bool, edge: Edge) -> f64 {
        let length = self.length();
        let rayleigh = fluid.rayleigh(gravity, difference, length);
        if !rayleigh.is_finite() {
            return f64::NAN;
        }
        edge.of(&self.nusselt(rayleigh, fluid.prandtl(), is_by_flux).estimate) * fluid.conductivity / length
    }
}

/// The surface of a plate or body in a wide fluid; `None` for an enclosure.
pub fn of_body(placement: &Placement, is_hot: bool) -> Option<Surface> {
    let length = placement.own_length;
    Some(match placement.kind {
        Kind::VerticalPlate => Surface::Upright(length),
        Kind::PlateFacingUp => Surface::FacingUp(length),
        Kind::PlateFacingDown => Surface::FacingDown(length),
        Kind::InclinedPlate => {
            let lifts_off = (placement.tilt < FRAC_PI_2) == is_hot;
            Surface::Inclined(length, (placement.tilt - FRAC_PI_2).abs(), lifts_off)
        }
        Kind::HorizontalCylinder => Surface::Cylinder(length),
        Kind::Sphere => Surface::Sphere(length),
        _ => return None,
    })
}

/// The surface that a wall of an enclosure is, where the wall is hotter than the fluid and where it is colder.
pub fn of_wall(wall: &Wall<'_>, sizes: &Sizes, placement: &Placement, is_inverted: bool) -> (Surface, Surface) {
    let piece = &wall.piece;
    let rising = dot(piece.normal, placement.up);
    let patch = piece.boundary.patch.as_ref().map(|(width, height)| (width.si, height.si));
    if rising.abs() < 0.5_f64.sqrt() {
        let height = patch.map_or(placement.height, |(_, height)| height);
        return (Surface::Upright(height), Surface::Upright(height));
    }
    let length = match patch {
        Some((width, height)) => area_over_perimeter(width, height),
        None => {
            let mut across =
                sizes.extent.iter().zip(piece.normal).filter(|(_, n)| n.abs() < 0.5).map(|(size, _)| *size);
            match (across.next(), across.next()) {
                (Some(a), Some(b)) => area_over_perimeter(a, b),
                _ => 0.25 * piece.area.sqrt(),
            }
        }
    };
    let (with_lift, against) = (Surface::FacingUp(length), Surface::FacingDown(length));
    // A floor's normal out of the fluid points down.
    if (rising < 0.0) != is_inverted { (with_lift, against) } else { (against, with_lift) }
}

/// The mean Nusselt number of an enclosure between its hot and its cold side, on the distance between them; for an
/// annulus the effective over the true conductivity. `None` for what is no such enclosure.
pub fn of_enclosure(placement: &Placement, rayleigh: f64, prandtl: f64) -> Option<Chosen> {
    let aspect = placement.run / placement.spacing;
    Some(match placement.kind {
        Kind::SideHeatedCavity => side_heated_cavity::choose(rayleigh, prandtl, aspect),
        Kind::LayerHeatedFromBelow => bottom_heated_layer::choose(rayleigh, prandtl, placement.width_over_depth),
        Kind::TiltedCavity => tilted_cavity::choose(rayleigh, prandtl, aspect, placement.tilt),
        Kind::StableLayer => {
            Chosen { correlation: &STABLE, estimate: Estimate { value: 1.0, low: 1.0, high: 1.0, inside_range: true } }
        }
        Kind::Annulus => {
            let (inner, outer) = placement.diameters;
            Chosen { correlation: &annulus::CYLINDERS, estimate: annulus::cylinders(rayleigh, prandtl, inner, outer) }
        }
        _ => return None,
    })
}

/// The mean Nusselt number of a channel's plates on their distance; `is_both` where both are heated.
pub fn of_channel(placement: &Placement, rayleigh: f64, is_both: bool) -> Chosen {
    let number = rayleigh * placement.spacing / placement.run;
    if is_both {
        Chosen { correlation: &vertical_channel::ISOTHERMAL_BOTH, estimate: vertical_channel::isothermal_both(number) }
    } else {
        Chosen { correlation: &vertical_channel::ISOTHERMAL_ONE, estimate: vertical_channel::isothermal_one(number) }
    }
}

/// Conductance of an enclosure between its hot and cold side for a Nusselt number, W/K (W/(m K) in a plane case);
/// `area` is that of the hot side.
pub fn conductance(placement: &Placement, area: f64, conductivity: f64, nusselt: f64) -> f64 {
    if placement.kind == Kind::Annulus {
        // Conduction through a cylindrical shell, with the area of the side that is given: 2π k L / ln(Do/Di).
        let (inner, outer) = placement.diameters;
        nusselt * conductivity * area / (0.5 * inner * (outer / inner).ln())
    } else {
        nusselt * conductivity * area / placement.spacing
    }
}

/// A layer that is warm above: conduction.
pub static STABLE: Correlation = Correlation {
    name: "conduction in a stable layer",
    source: "Fourier, Theorie analytique de la chaleur, 1822: no motion where the warmer fluid lies above",
    range: "side walls that neither heat nor cool",
    scatter: f64::MIN_POSITIVE,
    scatter_basis: "exact",
};
