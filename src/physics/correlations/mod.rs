//! Published natural-convection correlations, each with its source, range and scatter.
//!
//! One file a geometry family. Every function is pure and takes dimensionless numbers; which
//! length they are built on stands in the function's comment. A [`Correlation`] row says where the
//! formula comes from; [`ALL`] lists the rows, so that documentation can be made from them.
//!
//! What holds for every function here:
//!
//! - The result is finite, whatever the input, and nothing panics.
//! - An input that is negative or not finite gives the value without motion (conduction only: 1 for
//!   an enclosure, 2 for a sphere, the formula's own limit elsewhere), with no band and
//!   `inside_range` false. A negative Rayleigh number so reads as a stable arrangement.
//! - `value` and `low` are never below the value without motion.
//! - Outside the published range the formula is still evaluated, and `inside_range` is false.
//!
//! A range or scatter marked 'recalled' was not read from its source when this was written.
//! 'Common practice' marks a figure of the trade that no single paper settles.

pub mod annulus;
pub mod bottom_heated_layer;
pub mod cylinder_and_sphere;
pub mod horizontal_plate;
pub mod inclined_plate;
pub mod onset;
pub mod plume;
pub mod side_heated_cavity;
pub mod tilted_cavity;
pub mod vertical_channel;
pub mod vertical_plate;

/// A dimensionless result (a Nusselt number, unless the function says otherwise) with its band.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Estimate {
    /// The formula's value.
    pub value: f64,
    /// Lower edge of the published scatter.
    pub low: f64,
    /// Upper edge of the published scatter.
    pub high: f64,
    /// Whether every input is within the range that the source gives.
    pub inside_range: bool,
}

/// Where a formula comes from and how far it can be trusted.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Correlation {
    /// Name for people.
    pub name: &'static str,
    /// Authors, title or journal, year.
    pub source: &'static str,
    /// The published range, in words.
    pub range: &'static str,
    /// Relative half width of the band around the value.
    pub scatter: f64,
    /// What the half width rests on.
    pub scatter_basis: &'static str,
}

/// An estimate together with the correlation that was chosen for it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Chosen {
    /// The correlation that was used.
    pub correlation: &'static Correlation,
    /// What it gives.
    pub estimate: Estimate,
}

/// Every correlation of this module, by family.
pub const ALL: &[Correlation] = &[
    vertical_plate::ISOTHERMAL,
    vertical_plate::ISOTHERMAL_LAMINAR,
    vertical_plate::UNIFORM_FLUX,
    vertical_plate::UNIFORM_FLUX_LAMINAR,
    inclined_plate::INCLINED,
    horizontal_plate::HOT_FACE_UP_LAMINAR,
    horizontal_plate::HOT_FACE_UP_TURBULENT,
    horizontal_plate::HOT_FACE_DOWN,
    horizontal_plate::HOT_FACE_DOWN_MCADAMS,
    horizontal_plate::HOT_FACE_UP_BLENDED,
    horizontal_plate::HOT_FACE_DOWN_BLENDED,
    cylinder_and_sphere::HORIZONTAL_CYLINDER,
    cylinder_and_sphere::HORIZONTAL_CYLINDER_LAMINAR,
    cylinder_and_sphere::SPHERE,
    cylinder_and_sphere::SPHERE_TO_TURBULENT,
    side_heated_cavity::SQUARE,
    side_heated_cavity::MODERATE,
    side_heated_cavity::TALL_LAMINAR,
    side_heated_cavity::TALL_TURBULENT,
    side_heated_cavity::TALL_AIR,
    bottom_heated_layer::WIDE_TURBULENT,
    bottom_heated_layer::AIR,
    bottom_heated_layer::WATER,
    bottom_heated_layer::ANY_PRANDTL,
    tilted_cavity::WIDE_AIR,
    tilted_cavity::BELOW_CRITICAL_TILT,
    tilted_cavity::ABOVE_CRITICAL_TILT,
    tilted_cavity::HEATED_FROM_ABOVE,
    annulus::CYLINDERS,
    annulus::SPHERES,
    vertical_channel::ISOTHERMAL_BOTH,
    vertical_channel::ISOTHERMAL_ONE,
    vertical_channel::FLUX_BOTH,
    vertical_channel::FLUX_ONE,
    plume::POINT,
    plume::LINE,
];

/// The formula's value with the correlation's band, or the value without motion where an input or
/// the formula's value is no usable number.
pub(crate) fn estimate(
    correlation: &Correlation,
    inputs: &[f64],
    without_motion: f64,
    inside_range: bool,
    formula: impl FnOnce() -> f64,
) -> Estimate {
    let at_rest = Estimate { value: without_motion, low: without_motion, high: without_motion, inside_range: false };
    if !inputs.iter().all(|input| input.is_finite() && *input >= 0.0) {
        return at_rest;
    }
    let raw = formula();
    let high = raw * (1.0 + correlation.scatter);
    if !high.is_finite() {
        return at_rest;
    }
    Estimate {
        value: raw.max(without_motion),
        low: (raw * (1.0 - correlation.scatter)).max(without_motion),
        high: high.max(without_motion),
        inside_range,
    }
}

/// The bracket `[x]*` of the enclosure correlations: x where positive, else 0.
pub(crate) fn positive_part(x: f64) -> f64 {
    x.max(0.0)
}

/// A gas of about air's Prandtl number: the correlations measured in air are taken to hold for it.
/// The limits are common practice (air, nitrogen, oxygen, noble gases and their like lie within).
pub(crate) fn is_gas_like_air(prandtl: f64) -> bool {
    (0.6..=0.8).contains(&prandtl)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn rows_are_complete_and_named_once() {
        for (index, row) in ALL.iter().enumerate() {
            assert!(row.scatter > 0.0 && row.scatter < 1.0, "{}", row.name);
            for text in [row.name, row.source, row.range, row.scatter_basis] {
                assert!(!text.trim().is_empty());
            }
            assert!(row.source.chars().any(|c| c.is_ascii_digit()), "no year: {}", row.name);
            assert!(ALL[index + 1..].iter().all(|other| other.name != row.name));
        }
    }

    #[test]
    fn unusable_inputs_give_the_value_without_motion() {
        let row = &vertical_plate::ISOTHERMAL;
        for input in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY, -1.0] {
            let got = estimate(row, &[input], 1.0, true, || 7.0);
            assert_eq!((got.value, got.low, got.high, got.inside_range), (1.0, 1.0, 1.0, false));
        }
        let got = estimate(row, &[1.0], 1.0, true, || f64::NAN);
        assert_eq!((got.value, got.inside_range), (1.0, false));
    }
}
