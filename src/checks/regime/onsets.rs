//! Where a region's flow changes its nature: the published onset that belongs to its arrangement, and how far the region is
//! from it.

use crate::case::model::{BoundaryKind, Case, Region, Side};
use crate::checks::closure::sides::names;
use crate::checks::look::{Weighed, has_density_maximum};
use crate::physics::correlations::onset::{self, Onset};
use crate::physics::model::{ArrangementKind, RegionPhysics};

/// Height over spacing from which the layers on both walls of a cavity grow into each other, so that its spacing is the
/// length that counts: common practice, and the upper end of the correlations of Catton 1978.
const TALL: f64 = 10.0;

/// Turbulence in a tall cavity.
const TALL_CAVITY_TURBULENT: Onset = Onset {
    name: "turbulence in a tall side-heated cavity",
    rayleigh: 1e6,
    length: "distance of the walls",
    width: 0.9,
    source: "MacGregor and Emery, J. Heat Transfer 91 (1969) 391-403: their turbulent form holds from there",
};

/// Grashof number at which the layer on an upright wall turns turbulent, whatever the Prandtl number (Bejan and Lage 1990).
const UPRIGHT_WALL_GRASHOF: f64 = 1e9;

/// Turbulence on an upright wall: a plate, or a wall of a cavity in which both are apart.
/// In gases practice takes a Rayleigh number of 1e9 for it, which differs by less than the onset is sharp.
fn upright_wall(name: &'static str, prandtl: f64) -> Onset {
    let is_gas_like = (0.5..=1.0).contains(&prandtl);
    let by_practice = onset::VERTICAL_PLATE_TURBULENT.rayleigh;
    Onset {
        name,
        rayleigh: if is_gas_like { by_practice } else { UPRIGHT_WALL_GRASHOF * prandtl },
        length: "height",
        width: onset::VERTICAL_PLATE_TURBULENT.width,
        source: "Bejan and Lage, J. Heat Transfer 112 (1990) 787-790 (recalled)",
    }
}

/// An onset, and the region's Rayleigh number on the onset's own length.
#[derive(Clone, Copy, Debug)]
pub struct Held {
    /// The onset.
    pub onset: Onset,
    /// The region's Rayleigh number on the same length.
    pub rayleigh: Weighed,
}

impl Held {
    /// The Rayleigh number over the onset's.
    pub fn over_onset(&self) -> Weighed {
        scaled(self.rayleigh, 1.0 / self.onset.rayleigh)
    }

    /// The Rayleigh number over the upper end of the onset's band.
    pub fn over_band(&self) -> Weighed {
        scaled(self.rayleigh, 1.0 / (self.onset.rayleigh * (1.0 + self.onset.width)))
    }

    /// The onset's Rayleigh number over the region's.
    pub fn under_onset(&self) -> Weighed {
        let (least, most) = self.rayleigh.band;
        let over = |rayleigh: f64| self.onset.rayleigh / rayleigh;
        Weighed { value: over(self.rayleigh.value), band: (over(most), over(least)) }
    }
}

fn scaled(weighed: Weighed, factor: f64) -> Weighed {
    Weighed { value: weighed.value * factor, band: (weighed.band.0 * factor, weighed.band.1 * factor) }
}

/// The onset of turbulence; `None` for an arrangement of which none is published, or of no known Rayleigh number.
pub fn turbulence(physics: &RegionPhysics) -> Option<Held> {
    let geometry = &physics.geometry;
    let prandtl = physics.numbers.prandtl;
    let (onset, length) = match physics.arrangement.kind {
        ArrangementKind::VerticalPlate => (upright_wall("turbulence on an upright plate", prandtl), geometry.height),
        ArrangementKind::PlateFacingUp => (onset::HORIZONTAL_PLATE_TURBULENT, geometry.length),
        ArrangementKind::HorizontalCylinder => (onset::HORIZONTAL_CYLINDER_TURBULENT, geometry.length),
        ArrangementKind::LayerHeatedFromBelow => (onset::LAYER_TURBULENT, geometry.height),
        ArrangementKind::SideHeatedCavity if geometry.height > TALL * geometry.spacing => {
            (TALL_CAVITY_TURBULENT, geometry.spacing)
        }
        ArrangementKind::SideHeatedCavity => {
            (upright_wall("turbulence on the walls of a cavity", prandtl), geometry.height)
        }
        _ => return None,
    };
    held(physics, onset, length)
}

/// The onset of unsteadiness: that of turbulence where none is published for itself.
pub fn unsteadiness(physics: &RegionPhysics) -> Option<Held> {
    let geometry = &physics.geometry;
    let aspect = geometry.height / geometry.spacing;
    let is_square = (0.8..=1.25).contains(&aspect);
    let is_like_air = (0.6..=0.8).contains(&physics.numbers.prandtl);
    match physics.arrangement.kind {
        ArrangementKind::SideHeatedCavity if is_square && is_like_air => {
            held(physics, onset::SQUARE_CAVITY_UNSTEADY, geometry.height)
        }
        _ => turbulence(physics),
    }
}

/// The onset of motion in a layer heated from below, by whether its faces let the fluid slip.
pub fn motion(case: &Case, region: &Region, physics: &RegionPhysics) -> Option<Held> {
    let is_layer = physics.arrangement.kind == ArrangementKind::LayerHeatedFromBelow;
    if !is_layer || has_density_maximum(case, region, physics) {
        return None;
    }
    let slips = |side: Side| {
        case.boundaries_of(region)
            .filter(|boundary| names(boundary, side))
            .flat_map(|boundary| &boundary.kinds)
            .any(|(kind, _)| *kind == BoundaryKind::Wall { slip: true })
    };
    let onset = match (slips(Side::Bottom), slips(Side::Top)) {
        (false, false) => onset::LAYER_RIGID_RIGID,
        (true, true) => onset::LAYER_FREE_FREE,
        _ => onset::LAYER_RIGID_FREE,
    };
    held(physics, onset, physics.geometry.height)
}

fn held(physics: &RegionPhysics, onset: Onset, length: f64) -> Option<Held> {
    let numbers = &physics.numbers;
    let rayleigh = numbers.rayleigh * (length / physics.geometry.length).powi(3);
    (rayleigh.is_finite() && rayleigh > 0.0)
        .then(|| Held { onset, rayleigh: Weighed::proportional(rayleigh, physics.bracket.as_ref()) })
}

#[cfg(test)]
mod tests {
    use super::*;

    fn cavity(height: f64, spacing: f64, length: f64, rayleigh: f64) -> RegionPhysics {
        let mut physics = RegionPhysics::default();
        physics.arrangement.kind = ArrangementKind::SideHeatedCavity;
        (physics.geometry.height, physics.geometry.spacing, physics.geometry.length) = (height, spacing, length);
        (physics.numbers.rayleigh, physics.numbers.prandtl) = (rayleigh, 0.71);
        physics
    }

    #[test]
    fn the_square_cavity_of_le_quere_and_behnia() {
        // Steady below 1.82e8 (J. Fluid Mech. 359 (1998) 81): de Vahl Davis's 1e6 and Le Quéré's 1e8 are, 2e8 is not.
        for (rayleigh, is_beyond) in [(1e6, false), (1e8, false), (1.81e8, false), (2e8, true)] {
            let held = unsteadiness(&cavity(1.0, 1.0, 1.0, rayleigh)).unwrap();
            assert_eq!(held.over_band().value > 1.0, is_beyond, "{rayleigh}");
        }
        // Elsewhere the onset of turbulence stands in.
        assert_eq!(unsteadiness(&cavity(3.0, 1.0, 1.0, 1e8)).unwrap().onset.rayleigh, 1e9);
    }

    #[test]
    fn the_length_is_that_of_the_onset() {
        // Tian and Karayiannis 2000: 0.75 m square, Ra 1.58e9, a low level of turbulence.
        assert!(turbulence(&cavity(0.75, 0.75, 0.75, 1.58e9)).unwrap().over_onset().value > 1.0);
        // A pane of glass, 16 mm by 1.2 m: Ra on the spacing 1e4 is laminar, though on the height it is 4e9.
        let pane = turbulence(&cavity(1.2, 0.016, 0.016, 1e4)).unwrap();
        assert!((pane.over_onset().value - 0.01).abs() < 1e-12);
        // A cavity twice as high as wide whose Ra is on the spacing.
        let held = turbulence(&cavity(2.0, 1.0, 1.0, 1e8)).unwrap();
        assert!((held.rayleigh.value - 8e8).abs() < 1.0);
    }

    #[test]
    fn water_turns_turbulent_at_a_higher_rayleigh_number() {
        // Lankford and Bejan, J. Heat Transfer 108 (1986) 755: laminar layers in water at Ra 2.5e9 on the height, Pr 5.
        let mut physics = cavity(0.5, 0.15, 0.5, 2.5e9);
        physics.numbers.prandtl = 5.0;
        assert!(turbulence(&physics).unwrap().over_onset().value < 1.0);
    }

    #[test]
    fn unknown_numbers_have_no_onset() {
        assert!(turbulence(&cavity(1.0, 1.0, 1.0, f64::NAN)).is_none());
        assert!(turbulence(&cavity(1.0, f64::NAN, f64::NAN, 1e9)).is_none());
        assert!(turbulence(&RegionPhysics::default()).is_none());
    }
}
