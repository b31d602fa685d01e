//! Horizontal plate in open surroundings: mean Nusselt number on area / perimeter.
//!
//! "Hot face up" stands for a cold face down as well, "hot face down" for a cold face up.

use super::{Chosen, Correlation, Estimate, estimate};

const LLOYD_MORAN: &str = "Lloyd and Moran, Natural convection adjacent to horizontal surface of various planforms, \
     J. Heat Transfer 96 (1974) 443-447";
const RAITHBY_HOLLANDS: &str = "Raithby and Hollands, Natural convection, in Rohsenow, Hartnett and Cho (eds.), Handbook of Heat \
     Transfer, 3rd ed., 1998, chapter 4";

/// Horizontal plate, hot face up, laminar.
pub const HOT_FACE_UP_LAMINAR: Correlation = Correlation {
    name: "horizontal plate, hot face up, laminar",
    source: LLOYD_MORAN,
    range: "Rayleigh number on area / perimeter 2.2e4 to 8e6 as published (recalled); handbooks widen it to 1e4 to 1e7, \
     Prandtl number 0.7 or more; the wider range is used here",
    scatter: 0.15,
    scatter_basis: "common practice",
};

/// Horizontal plate, hot face up, turbulent.
pub const HOT_FACE_UP_TURBULENT: Correlation = Correlation {
    name: "horizontal plate, hot face up, turbulent",
    source: LLOYD_MORAN,
    range: "Rayleigh number on area / perimeter 8e6 to 1.6e9 as published (recalled); handbooks widen it to 1e7 to 1e11; the \
     wider range is used here",
    scatter: 0.15,
    scatter_basis: "common practice",
};

/// Horizontal plate, hot face down.
pub const HOT_FACE_DOWN: Correlation = Correlation {
    name: "horizontal plate, hot face down",
    source: "Radziemska and Lewandowski, Heat transfer by natural convection from an isothermal downward-facing round plate \
     in unlimited space, Applied Energy 68 (2001) 347-366",
    range: "Rayleigh number on area / perimeter 1e4 to 1e9, Prandtl number 0.7 or more",
    scatter: 0.20,
    scatter_basis: "common practice",
};

/// Horizontal plate, hot face down, McAdams.
pub const HOT_FACE_DOWN_MCADAMS: Correlation = Correlation {
    name: "horizontal plate, hot face down, McAdams",
    source: "McAdams, Heat Transmission, 3rd ed., 1954, chapter 7",
    range: "Rayleigh number on area / perimeter 1e5 to 1e10",
    scatter: 0.25,
    scatter_basis: "common practice; an older form, kept for comparison",
};

/// Horizontal plate, hot face up, laminar to turbulent.
pub const HOT_FACE_UP_BLENDED: Correlation = Correlation {
    name: "horizontal plate, hot face up, laminar to turbulent",
    source: RAITHBY_HOLLANDS,
    range: "Rayleigh number on area / perimeter 1 to 1e10, any Prandtl number (recalled)",
    scatter: 0.15,
    scatter_basis: "common practice",
};

/// Horizontal plate, hot face down, any Prandtl number.
pub const HOT_FACE_DOWN_BLENDED: Correlation = Correlation {
    name: "horizontal plate, hot face down, any Prandtl number",
    source: RAITHBY_HOLLANDS,
    range: "Rayleigh number on area / perimeter 1e3 to 1e10, any Prandtl number (recalled)",
    scatter: 0.20,
    scatter_basis: "common practice",
};

/// Where the turbulent branch takes over from the laminar one.
const TRANSITION: f64 = 1e7;

/// Hot face up, laminar branch: Nu = 0.54 Ra^(1/4).
pub fn hot_face_up_laminar(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (1e4..=TRANSITION).contains(&rayleigh) && prandtl >= 0.7;
    estimate(&HOT_FACE_UP_LAMINAR, &[rayleigh, prandtl], 0.0, inside, || 0.54 * rayleigh.powf(0.25))
}

/// Hot face up, turbulent branch: Nu = 0.15 Ra^(1/3).
pub fn hot_face_up_turbulent(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (TRANSITION..=1e11).contains(&rayleigh) && prandtl > 0.0;
    estimate(&HOT_FACE_UP_TURBULENT, &[rayleigh, prandtl], 0.0, inside, || 0.15 * rayleigh.cbrt())
}

/// Hot face up: the branch that the Rayleigh number calls for.
pub fn hot_face_up(rayleigh: f64, prandtl: f64) -> Chosen {
    if rayleigh > TRANSITION {
        Chosen { correlation: &HOT_FACE_UP_TURBULENT, estimate: hot_face_up_turbulent(rayleigh, prandtl) }
    } else {
        Chosen { correlation: &HOT_FACE_UP_LAMINAR, estimate: hot_face_up_laminar(rayleigh, prandtl) }
    }
}

/// Hot face down: Nu = 0.52 Ra^(1/5).
pub fn hot_face_down(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (1e4..=1e9).contains(&rayleigh) && prandtl >= 0.7;
    estimate(&HOT_FACE_DOWN, &[rayleigh, prandtl], 0.0, inside, || 0.52 * rayleigh.powf(0.2))
}

/// Hot face down, the older form: Nu = 0.27 Ra^(1/4).
pub fn hot_face_down_mcadams(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (1e5..=1e10).contains(&rayleigh) && prandtl > 0.0;
    estimate(&HOT_FACE_DOWN_MCADAMS, &[rayleigh, prandtl], 0.0, inside, || 0.27 * rayleigh.powf(0.25))
}

/// Hot face up, one curve from conduction to turbulence.
pub fn hot_face_up_blended(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (1.0..=1e10).contains(&rayleigh) && prandtl > 0.0;
    estimate(&HOT_FACE_UP_BLENDED, &[rayleigh, prandtl], 0.0, inside, || {
        let laminar_coefficient = 0.671 / (1.0 + (0.492 / prandtl).powf(9.0 / 16.0)).powf(4.0 / 9.0);
        let thin_layer = 0.835 * laminar_coefficient * rayleigh.powf(0.25);
        let laminar = thick_layer(1.4, thin_layer);
        let turbulent = 0.14 * (1.0 + 0.0107 * prandtl) / (1.0 + 0.01 * prandtl) * rayleigh.cbrt();
        let (larger, smaller) = (laminar.max(turbulent), laminar.min(turbulent));
        // (l^10 + t^10)^(1/10), arranged so that a huge Rayleigh number does not overflow.
        if larger > 0.0 { larger * (1.0 + (smaller / larger).powi(10)).powf(0.1) } else { 0.0 }
    })
}

/// Hot face down with the Prandtl number's effect.
pub fn hot_face_down_blended(rayleigh: f64, prandtl: f64) -> Estimate {
    let inside = (1e3..=1e10).contains(&rayleigh) && prandtl > 0.0;
    estimate(&HOT_FACE_DOWN_BLENDED, &[rayleigh, prandtl], 0.0, inside, || {
        let thin_layer = 0.527 * rayleigh.powf(0.2) / (1.0 + (1.9 / prandtl).powf(0.9)).powf(2.0 / 9.0);
        thick_layer(2.5, thin_layer)
    })
}

/// Correction of a thin-layer Nusselt number for the layer's thickness: c / ln(1 + c / Nu).
fn thick_layer(constant: f64, thin_layer: f64) -> f64 {
    if thin_layer > 0.0 { constant / (constant / thin_layer).ln_1p() } else { 0.0 }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn branches_meet_near_the_transition() {
        let below = hot_face_up(TRANSITION, 0.71);
        let above = hot_face_up(TRANSITION * 1.0001, 0.71);
        assert_eq!(below.correlation.name, HOT_FACE_UP_LAMINAR.name);
        assert_eq!(above.correlation.name, HOT_FACE_UP_TURBULENT.name);
        assert!((above.estimate.value / below.estimate.value - 1.0).abs() < 0.1);
    }

    #[test]
    fn two_published_forms_agree_within_their_bands() {
        for exponent in 4..=10 {
            let rayleigh = 10_f64.powi(exponent);
            let plain = hot_face_up(rayleigh, 0.71).estimate;
            let blended = hot_face_up_blended(rayleigh, 0.71);
            assert!(plain.low < blended.high && blended.low < plain.high, "{rayleigh:e} {plain:?} {blended:?}");
        }
    }

    #[test]
    fn no_overflow() {
        assert!(hot_face_up_blended(1e300, 1e300).value.is_finite());
        assert_eq!(hot_face_up_blended(0.0, 0.71).value, 0.0);
    }
}
