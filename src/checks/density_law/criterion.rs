//! The criteria of the Boussinesq law, worked out from a medium's own property functions over a span of temperatures.
//! Each formula stands in the file of its check; here the properties are sampled and the formulas called.

use super::{
    adiabatic_lapse, buoyancy_error, density_maximum, density_span, dissipation_number, drift, hydrostatic_span,
};
use crate::case::model::Property;
use crate::substances::{Medium, Properties};

/// Points at which the properties are taken, both ends of the span among them: more than the ends, for a property may
/// turn in between.
pub const SAMPLES: u32 = 33;

/// What the criteria depend on beside the medium. SI.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Conditions {
    /// T0, K.
    pub reference: f64,
    /// Lowest temperature of the span, K.
    pub lowest: f64,
    /// Highest temperature of the span, K.
    pub highest: f64,
    /// Absolute pressure, Pa.
    pub pressure: f64,
    /// H, the extent along gravity, m.
    pub height: f64,
    /// g, m/s².
    pub gravity: f64,
    /// α that the solver is told, 1/K; `None` for the medium's own at T0.
    pub stated_expansion: Option<f64>,
}

/// The value of every criterion that a medium, a span and a height decide. `NaN` where something is not known.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct CriterionValues {
    /// Midway between the lowest and the highest temperature, K.
    pub mean: f64,
    /// αΔT.
    pub density_span: f64,
    /// By how much the linear law misstates the driving force.
    pub buoyancy_error: f64,
    /// Where it does so most, K.
    pub buoyancy_error_at: f64,
    /// Whether the true buoyancy there is the greater one.
    pub buoyancy_is_understated: bool,
    /// Change of α over the span / α at T0.
    pub expansion_drift: f64,
    /// Change of μ over the span / μ at T0.
    pub viscosity_drift: f64,
    /// Change of k over the span / k at T0.
    pub conductivity_drift: f64,
    /// Change of cp over the span / cp at T0.
    pub heat_capacity_drift: f64,
    /// −(least α)/(greatest α): above 0 where α changes sign.
    pub density_reversal: f64,
    /// Temperature of greatest density where it lies within the span, K; `NaN` otherwise.
    pub densest_at: f64,
    /// ρ0 g H κ.
    pub hydrostatic_span: f64,
    /// α g H T0 / (cp ΔT).
    pub adiabatic_lapse: f64,
    /// α g H / cp.
    pub dissipation_number: f64,
    /// The part of the span for which the medium has data, K. The drifts and the buoyancy error are those of this
    /// part, and so no greater than those of the whole.
    pub covered: (f64, f64),
}

impl CriterionValues {
    /// Nothing known.
    pub const UNKNOWN: CriterionValues = CriterionValues {
        mean: f64::NAN,
        density_span: f64::NAN,
        buoyancy_error: f64::NAN,
        buoyancy_error_at: f64::NAN,
        buoyancy_is_understated: false,
        expansion_drift: f64::NAN,
        viscosity_drift: f64::NAN,
        conductivity_drift: f64::NAN,
        heat_capacity_drift: f64::NAN,
        density_reversal: f64::NAN,
        densest_at: f64::NAN,
        hydrostatic_span: f64::NAN,
        adiabatic_lapse: f64::NAN,
        dissipation_number: f64::NAN,
        covered: (f64::NAN, f64::NAN),
    };
}

/// Every criterion of `medium` with the reference `reference` between `lowest` and `highest` (K), at `pressure` (Pa),
/// over the height `height` (m) under `gravity` (m/s²). `UNKNOWN` where the medium has no data at the reference.
///
/// Source: D. D. Gray and A. Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551, whose criteria bound the
/// change of every property by temperature and by pressure; here the change is that of the property function itself
/// over the span, not its tangent's.
pub fn evaluate(
    medium: &Medium<'_>,
    reference: f64,
    lowest: f64,
    highest: f64,
    pressure: f64,
    height: f64,
    gravity: f64,
) -> CriterionValues {
    let conditions = Conditions { reference, lowest, highest, pressure, height, gravity, stated_expansion: None };
    evaluate_at(medium, &conditions)
}

/// The same under [`Conditions`], which may hold an expansion other than the medium's own.
pub fn evaluate_at(medium: &Medium<'_>, conditions: &Conditions) -> CriterionValues {
    let at = conditions;
    let Some(own) = medium.properties(at.reference, at.pressure) else { return CriterionValues::UNKNOWN };
    let told = Properties { expansion: at.stated_expansion.unwrap_or(own.expansion), ..own };
    let samples = sampled(medium, at, &own);
    let misstatement = buoyancy_error::misstatement(&samples, at.reference, &told);
    let over_span = |of: fn(&Properties) -> f64| drift::over_span(&samples, &own, of);
    CriterionValues {
        buoyancy_error: misstatement.share,
        buoyancy_error_at: misstatement.at,
        buoyancy_is_understated: misstatement.is_understated,
        expansion_drift: over_span(|properties| properties.expansion),
        viscosity_drift: over_span(|properties| properties.viscosity),
        conductivity_drift: over_span(|properties| properties.conductivity),
        heat_capacity_drift: over_span(|properties| properties.heat_capacity),
        density_reversal: density_maximum::reversal(&samples),
        densest_at: density_maximum::densest_at(medium, &samples, at.pressure),
        covered: covered(&samples),
        ..of_constants(&told, at)
    }
}

/// What constants alone decide, for a fluid of no known substance: the rest stays `NaN`.
pub fn of_constants(constants: &Properties, conditions: &Conditions) -> CriterionValues {
    let Conditions { reference, height, gravity, .. } = *conditions;
    let Properties { density, expansion, heat_capacity, compressibility, .. } = *constants;
    let span = conditions.highest - conditions.lowest;
    CriterionValues {
        mean: 0.5 * (conditions.lowest + conditions.highest),
        density_span: density_span::gay_lussac(expansion, span),
        hydrostatic_span: hydrostatic_span::compression(density, gravity, height, compressibility),
        adiabatic_lapse: adiabatic_lapse::pressure_work(expansion, gravity, height, reference, heat_capacity, span),
        dissipation_number: dissipation_number::dissipation(expansion, gravity, height, heat_capacity),
        ..CriterionValues::UNKNOWN
    }
}

/// The properties at a temperature, K.
pub type Sample = (f64, Properties);

/// The properties at evenly spaced temperatures of the span, where the medium has data.
fn sampled(medium: &Medium<'_>, conditions: &Conditions, own: &Properties) -> Vec<Sample> {
    let Conditions { lowest, highest, pressure, .. } = *conditions;
    (0..SAMPLES)
        .map(|index| lowest + (highest - lowest) * f64::from(index) / f64::from(SAMPLES - 1))
        .filter_map(|temperature| {
            let properties = medium.properties(temperature, pressure)?;
            let density = match medium.substance.expansion {
                // Such a substance may well give one density for all temperatures: α is what it says of the change.
                Some(Property::Expression(_) | Property::Table(_)) => {
                    own.density * contraction(medium, conditions.reference, temperature, pressure)
                }
                Some(Property::Code(_)) | None => properties.density,
            };
            Some((temperature, Properties { density, ..properties }))
        })
        .filter(|(_, properties)| properties.density.is_finite())
        .collect()
}

/// ρ/ρ0 = exp(−∫ α dT) from `from` to `to`, by Simpson's rule.
fn contraction(medium: &Medium<'_>, from: f64, to: f64, pressure: f64) -> f64 {
    const PANELS: u32 = 8;
    let step = (to - from) / f64::from(PANELS);
    let integral: f64 = (0..=PANELS)
        .map(|index| {
            let weight = if index == 0 || index == PANELS { 1.0 } else { 2.0 + 2.0 * f64::from(index % 2) };
            weight * medium.expansion(from + step * f64::from(index), pressure).unwrap_or(f64::NAN)
        })
        .sum();
    (-integral * step / 3.0).exp()
}

fn covered(samples: &[Sample]) -> (f64, f64) {
    match (samples.first(), samples.last()) {
        (Some((lowest, _)), Some((highest, _))) => (*lowest, *highest),
        _ => (f64::NAN, f64::NAN),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::substances::library;

    fn medium(name: &str) -> Medium<'static> {
        Medium { substance: library::find(name).unwrap(), fraction: 0.0 }
    }

    #[test]
    fn what_is_not_known_is_not_a_number() {
        let water = medium("water");
        assert!(evaluate(&water, f64::NAN, 280.0, 290.0, 1e5, 1.0, 9.81).density_span.is_nan());
        assert!(evaluate(&water, 285.0, f64::NAN, 290.0, 1e5, 1.0, 9.81).viscosity_drift.is_nan());
        assert!(evaluate(&water, 285.0, 280.0, 290.0, 1e5, f64::NAN, 9.81).hydrostatic_span.is_nan());
        // Steam is no business of liquid water.
        assert!(evaluate(&water, 500.0, 490.0, 510.0, 1e5, 1.0, 9.81).density_span.is_nan());
    }

    #[test]
    fn where_the_data_end_the_rest_of_the_span_still_counts() {
        // 1 bar: water boils at 99.6 degC.
        let values = evaluate(&medium("water"), 323.15, 303.15, 393.15, 1e5, 1.0, 9.81);
        assert!(values.covered.1 < 373.15 && values.covered.1 > 368.0, "{:?}", values.covered);
        assert!(values.viscosity_drift > 0.5);
    }

    #[test]
    fn a_span_of_nothing_changes_nothing() {
        let values = evaluate(&medium("air"), 300.0, 300.0, 300.0, 1e5, 1.0, 9.81);
        assert_eq!(values.density_span, 0.0);
        assert_eq!(values.viscosity_drift, 0.0);
        assert_eq!(values.buoyancy_error, 0.0);
        assert!(values.adiabatic_lapse.is_nan());
    }
}
