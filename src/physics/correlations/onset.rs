//! Rayleigh numbers at which the flow changes its nature: onset of motion, of unsteadiness, of turbulence.

/// One published limit.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Onset {
    /// What sets in, and where.
    pub name: &'static str,
    /// The Rayleigh number.
    pub rayleigh: f64,
    /// The length that the Rayleigh number is built on.
    pub length: &'static str,
    /// How sharp it is: relative half width, 0 where it is exact.
    pub width: f64,
    /// Where it comes from.
    pub source: &'static str,
}

const CHANDRASEKHAR: &str = "Chandrasekhar, Hydrodynamic and Hydromagnetic Stability, 1961, chapter II";

/// Motion in a layer heated from below, both faces rigid (critical wave number 3.117).
/// Motion in a layer heated from below, both faces rigid.
pub const LAYER_RIGID_RIGID: Onset = Onset {
    name: "motion in a layer heated from below, both faces rigid",
    rayleigh: 1707.762,
    length: "depth of the layer",
    width: 0.0,
    source: CHANDRASEKHAR,
};

/// Motion in a layer heated from below, one face rigid, one free (critical wave number 2.682).
/// Motion in a layer heated from below, one face rigid, one free.
pub const LAYER_RIGID_FREE: Onset = Onset {
    name: "motion in a layer heated from below, one face rigid, one free",
    rayleigh: 1100.65,
    length: "depth of the layer",
    width: 0.0,
    source: CHANDRASEKHAR,
};

/// Motion in a layer heated from below, both faces free: 27 π⁴/4 (critical wave number π/√2).
/// Motion in a layer heated from below, both faces free.
pub const LAYER_FREE_FREE: Onset = Onset {
    name: "motion in a layer heated from below, both faces free",
    rayleigh: 657.511,
    length: "depth of the layer",
    width: 0.0,
    source: CHANDRASEKHAR,
};

/// Turbulence in a layer heated from below. Cells break down gradually, earlier at low Prandtl numbers.
/// Turbulence in a layer heated from below.
pub const LAYER_TURBULENT: Onset = Onset {
    name: "turbulence in a layer heated from below",
    rayleigh: 3e5,
    length: "depth of the layer",
    width: 0.9,
    source: "common practice (Cengel, Heat and Mass Transfer, 2006, section 9-5)",
};

/// Unsteadiness of the square side-heated cavity filled with air, insulated top and bottom (plane case).
/// Unsteadiness in a square side-heated cavity of air, insulated top and bottom.
pub const SQUARE_CAVITY_UNSTEADY: Onset = Onset {
    name: "unsteadiness in a square side-heated cavity of air, insulated top and bottom",
    rayleigh: 1.82e8,
    length: "side of the cavity",
    width: 0.01 / 1.82,
    source: "Le Quere and Behnia, From onset of unsteadiness to chaos in a differentially heated square cavity, J. Fluid Mech. 359 (1998) \
     81-107",
};

/// Turbulence on a vertical plate.
/// Turbulence on a vertical plate.
pub const VERTICAL_PLATE_TURBULENT: Onset = Onset {
    name: "turbulence on a vertical plate",
    rayleigh: 1e9,
    length: "height of the plate",
    width: 0.9,
    source: "common practice; Bejan and Lage, J. Heat Transfer 112 (1990) 787-790, put it at a Grashof number of 1e9 at any Prandtl number \
     (recalled)",
};

/// Turbulence over a horizontal plate, hot face up.
/// Turbulence over a horizontal plate, hot face up.
pub const HORIZONTAL_PLATE_TURBULENT: Onset = Onset {
    name: "turbulence over a horizontal plate, hot face up",
    rayleigh: 8e6,
    length: "area over perimeter",
    width: 0.3,
    source: "Lloyd and Moran, J. Heat Transfer 96 (1974) 443-447 (recalled); handbooks round it to 1e7",
};

/// Turbulence on a horizontal cylinder.
/// Turbulence on a horizontal cylinder.
pub const HORIZONTAL_CYLINDER_TURBULENT: Onset = Onset {
    name: "turbulence on a horizontal cylinder",
    rayleigh: 1e9,
    length: "diameter",
    width: 0.9,
    source: "upper end of the laminar form of Churchill and Chu, Int. J. Heat Mass Transfer 18 (1975) 1049-1053",
};

/// Every limit of this file.
pub const ALL: &[Onset] = &[
    LAYER_RIGID_RIGID,
    LAYER_RIGID_FREE,
    LAYER_FREE_FREE,
    LAYER_TURBULENT,
    SQUARE_CAVITY_UNSTEADY,
    VERTICAL_PLATE_TURBULENT,
    HORIZONTAL_PLATE_TURBULENT,
    HORIZONTAL_CYLINDER_TURBULENT,
];

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn free_faces_have_the_closed_form() {
        let exact = 27.0 * core::f64::consts::PI.powi(4) / 4.0;
        assert!((LAYER_FREE_FREE.rayleigh - exact).abs() < 1e-3);
    }

    #[test]
    fn rows_are_sound() {
        assert!(ALL.iter().all(|row| row.rayleigh > 0.0 && (0.0..1.0).contains(&row.width)));
    }
}
