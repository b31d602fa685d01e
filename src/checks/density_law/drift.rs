//! What the four drift checks share: the change of a property over the span.

use super::assess::{Assessed, Said, temperature};
use super::criterion::{CriterionValues, Sample};
use super::remedy;
use crate::quantity::display::format_number;
use crate::substances::Properties;

/// (greatest − least) / |value at T0|, the value at T0 counted among them: the solver holds the property at that value,
/// so a reference outside the span adds to the change.
///
/// Source: Gray and Giorgini 1976, whose criteria for μ, k, cp and α these are.
pub fn over_span(samples: &[Sample], reference: &Properties, of: fn(&Properties) -> f64) -> f64 {
    let at_reference = of(reference);
    let values = samples.iter().map(|(_, properties)| of(properties)).filter(|value| value.is_finite());
    let (count, least, greatest) = values.fold((0, at_reference, at_reference), |(count, least, greatest), value| {
        (count + 1, value.min(least), value.max(greatest))
    });
    if count == 0 || at_reference == 0.0 { f64::NAN } else { (greatest - least) / at_reference.abs() }
}

/// The words of a drift finding. `name` is the property's; `by_function` the advice that lets it follow temperature;
/// `pick` takes the drift from the criteria and `of` the property from the properties.
pub fn said(
    assessed: &Assessed<'_>,
    value: f64,
    limit: f64,
    name: &str,
    by_function: String,
    pick: fn(&CriterionValues) -> f64,
    of: fn(&Properties) -> f64,
) -> Said {
    let bracket = assessed.bracket;
    let conditions = &assessed.conditions;
    let ratio = assessed.medium.and_then(|medium| {
        let (lowest, highest) = assessed.values.covered;
        let low = of(&medium.properties(lowest, conditions.pressure)?);
        let high = of(&medium.properties(highest, conditions.pressure)?);
        Some((lowest, highest, high / low))
    });
    let change = match ratio {
        Some((lowest, highest, ratio)) if ratio.is_finite() && ratio > 0.0 => format!(
            "; from {} to {} it {} by a factor {}",
            temperature(lowest),
            temperature(highest),
            if ratio < 1.0 { "falls" } else { "rises" },
            format_number(if ratio < 1.0 { 1.0 / ratio } else { ratio })
        ),
        _ => String::new(),
    };
    Said {
        message: format!(
            "the {name} of {} changes by {} % of its value at the reference, {}, between {} and {}{change}; a constant {name} is held to {} %",
            assessed.fluid.name.text,
            format_number(100.0 * value),
            temperature(conditions.reference),
            temperature(bracket.lowest.value),
            temperature(bracket.highest.value),
            format_number(100.0 * limit),
        ),
        remedy: remedy::join(&[
            Some(by_function),
            remedy::centred(assessed, pick, limit),
            remedy::narrower(assessed, pick, limit),
        ]),
        fixes: Vec::new(),
    }
}
