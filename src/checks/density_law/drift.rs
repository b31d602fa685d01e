//! What the four drift checks share: the change of a property over the span.

use super::assess::{Assessed, Said, per_cent, temperature};
use super::criterion::{CriterionValues, Sample};
use super::remedy;
use crate::checks::look::named;
use crate::quantity::Dimension;
use crate::quantity::display::format_si;
use crate::substances::Properties;

/// (greatest − least) / |value at T0| over the samples.
///
/// Source: Gray and Giorgini 1976, whose criteria for μ, k, cp and α these are.
pub fn over_span(samples: &[Sample], reference: &Properties, of: fn(&Properties) -> f64) -> f64 {
    let values = || samples.iter().map(|(_, properties)| of(properties)).filter(|value| value.is_finite());
    let change = values().fold(f64::NEG_INFINITY, f64::max) - values().fold(f64::INFINITY, f64::min);
    let drift = change / of(reference).abs();
    if drift.is_finite() { drift } else { f64::NAN }
}

/// A property that may drift: its words, and how to take it.
#[derive(Clone, Copy, Debug)]
pub struct Drifting {
    /// Its name.
    pub name: &'static str,
    /// Its dimension.
    pub dimension: Dimension,
    /// Its drift, from the criteria.
    pub drift: fn(&CriterionValues) -> f64,
    /// Itself, from the properties.
    pub property: fn(&Properties) -> f64,
}

/// The words of a drift finding; `by_function` is the advice that lets the property follow temperature.
pub fn said(assessed: &Assessed<'_>, value: f64, limit: f64, of: &Drifting, by_function: String) -> Said {
    let name = of.name;
    Said {
        message: format!(
            "the {name} of {} {}, by {} of its value at the reference, {}; held constant, it is taken to {}",
            named(&assessed.fluid.name),
            course(assessed, value, of),
            per_cent(value),
            temperature(assessed.conditions.reference),
            per_cent(limit),
        ),
        remedy: remedy::join(&[
            Some(by_function),
            remedy::centred(assessed, of.drift, limit),
            remedy::narrower(assessed, of.drift, limit),
        ]),
        fixes: Vec::new(),
    }
}

/// "falls from 0.653 mPa.s at 40 degC to 0.304 mPa.s at 93 degC", where that is the whole change.
fn course(assessed: &Assessed<'_>, value: f64, of: &Drifting) -> String {
    let reference = assessed.conditions.reference;
    let (lowest, highest) = assessed.values.covered;
    let property_at = |temperature: f64| {
        let properties = assessed.medium?.properties(temperature, assessed.conditions.pressure)?;
        Some((of.property)(&properties)).filter(|property| property.is_finite())
    };
    if let (Some(low), Some(high), Some(at_reference)) =
        (property_at(lowest), property_at(highest), property_at(reference))
        && ((high - low) / at_reference).abs() > 0.98 * value
    {
        return format!(
            "{} from {} at {} to {} at {}",
            if high < low { "falls" } else { "rises" },
            format_si(low, of.dimension),
            temperature(lowest),
            format_si(high, of.dimension),
            temperature(highest),
        );
    }
    format!("changes between {} and {}", temperature(lowest), temperature(highest))
}
