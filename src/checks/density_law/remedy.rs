//! What would put a density-law finding right, worked out for the case: another law, a reference at mid-span, a
//! narrower span; in words and as changes of text.

use super::assess::{Assessed, temperature, two_digits};
use super::criterion::{Conditions, CriterionValues};
use crate::case::model::{DensityLaw, Fluid, Stated, Value};
use crate::quantity::display::{format_in, format_number};
use crate::quantity::parse_unit;
use crate::syntax::{Edit, Fix, Span};

/// Halvings in the search for the widest span within a limit: to 1/16384 of the span.
const HALVINGS: u32 = 14;

/// The density law that follows the true density.
pub fn other_law(assessed: &Assessed<'_>) -> &'static str {
    if assessed.medium.is_some_and(|medium| medium.is_gas()) { "ideal-gas" } else { "variable" }
}

/// The other law as advice.
pub fn by_other_law(assessed: &Assessed<'_>) -> String {
    format!("`density-law {}`", other_law(assessed))
}

/// "a reference of 67 degC", where that brings the number within the limit.
pub fn centred(assessed: &Assessed<'_>, pick: fn(&CriterionValues) -> f64, limit: f64) -> Option<String> {
    let (middle, values) = at_mid_span(assessed)?;
    let value = pick(&values);
    (value <= limit).then(|| format!("a reference of {} ({} there)", temperature(middle), two_digits(value)))
}

/// The criteria with the reference at mid-span, and that reference as it would be written, K.
pub fn at_mid_span(assessed: &Assessed<'_>) -> Option<(f64, CriterionValues)> {
    let middle = mid_span(assessed.conditions.lowest, assessed.conditions.highest, unit_of_reference(assessed.fluid))?;
    // An expansion that the deck states is that of the old reference.
    let conditions = Conditions { reference: middle, stated_expansion: None, ..assessed.conditions };
    Some((middle, assessed.under(&conditions)))
}

/// "boundary lid below 67 degC": how far the end of the span that is farther from the reference may go, the other one
/// staying; where that is not enough, "a span below 12 K".
pub fn narrower(assessed: &Assessed<'_>, pick: fn(&CriterionValues) -> f64, limit: f64) -> Option<String> {
    let Conditions { reference, lowest, highest, .. } = assessed.conditions;
    if !(lowest <= highest && reference.is_finite()) {
        return None;
    }
    let about = reference.max(lowest).min(highest);
    let value = |conditions: Conditions| pick(&assessed.under(&conditions));
    let hot_end = highest - about >= about - lowest;
    let one_end = most_within(limit, |share| {
        value(if hot_end {
            Conditions { highest: about + share * (highest - about), ..assessed.conditions }
        } else {
            Conditions { lowest: about + share * (lowest - about), ..assessed.conditions }
        })
    });
    if let Some(share) = one_end {
        let (bound, word, end) = if hot_end {
            (&assessed.bracket.highest, "below", about + share * (highest - about))
        } else {
            (&assessed.bracket.lowest, "above", about + share * (lowest - about))
        };
        return Some(format!("{} {word} {}", bound.set_by, temperature(cautious(end, hot_end))));
    }
    let both = most_within(limit, |share| {
        let to = |end: f64| about + share * (end - about);
        value(Conditions { lowest: to(lowest), highest: to(highest), ..assessed.conditions })
    })?;
    Some(format!("a span below {} K", two_digits(both * (highest - lowest))))
}

/// The greatest share of 1 at which the value is within the limit; `None` where it is not even at 0.
fn most_within(limit: f64, value_at: impl Fn(f64) -> f64) -> Option<f64> {
    let (mut within, mut over) = (0.0, 1.0);
    if value_at(within) > limit {
        return None;
    }
    for _ in 0..HALVINGS {
        let middle = 0.5 * (within + over);
        if value_at(middle) <= limit {
            within = middle;
        } else {
            over = middle;
        }
    }
    (within > 0.0).then_some(within)
}

/// Rounded to a tenth of a degree Celsius, down for a highest temperature and up for a lowest one.
fn cautious(kelvin: f64, is_highest: bool) -> f64 {
    let tenths = 10.0 * (kelvin - 273.15);
    let rounded = if is_highest { tenths.floor() } else { tenths.ceil() };
    273.15 + 0.1 * rounded
}

/// Advice joined: "A, B, or C".
pub fn join(options: &[Option<String>]) -> String {
    let options: Vec<&str> = options.iter().flatten().map(String::as_str).collect();
    match options.split_last() {
        None => String::new(),
        Some((last, [])) => (*last).to_string(),
        Some((last, rest)) => format!("{}, or {last}", rest.join(", ")),
    }
}

/// The unit in which the reference is written.
pub fn unit_of_reference(fluid: &Fluid) -> &str {
    fluid.reference_temperature.as_ref().map_or("degC", |value| unit_of(value))
}

fn unit_of(value: &Value) -> &str {
    if value.origin.unit.is_empty() { "degC" } else { &value.origin.unit }
}

/// Mid-span in K, rounded to a whole degree of `unit`, or to a tenth in a span below 10 K.
pub fn mid_span(lowest: f64, highest: f64, unit: &str) -> Option<f64> {
    let unit = parse_unit(unit).ok()?;
    let tenth = if highest - lowest < 10.0 { 10.0 } else { 1.0 };
    let rounded = (unit.from_si(0.5 * (lowest + highest)) * tenth).round() / tenth;
    Some(unit.to_si(rounded)).filter(|middle| middle.is_finite())
}

/// Moves the reference: the expression in its statement is replaced, so that no name that other statements use changes.
pub fn move_reference(fluid: &Fluid, to: f64, sure: bool) -> Option<Fix> {
    let stated = fluid.reference_temperature.as_ref()?;
    let text = format_in(to, unit_of(stated))?;
    let edits = vec![Edit { file: stated.origin.place.file, span: stated.origin.place.span, text: text.clone() }];
    Some(Fix { title: format!("Move the reference to mid-span, {text}"), edits, sure })
}

/// Changes the word of the law, the last of its statement.
pub fn change_law(law: Stated<DensityLaw>, to: DensityLaw, sure: bool) -> Fix {
    let span = law.place.span;
    let start = span.end.saturating_sub(law_word(law.value).len()).max(span.start);
    let text = law_word(to).to_string();
    let title = format!("Use density-law {text}");
    Fix { title, edits: vec![Edit { file: law.place.file, span: Span::new(start, span.end), text }], sure }
}

/// The other law as a fix.
pub fn to_other_law(assessed: &Assessed<'_>) -> Option<Fix> {
    let to = if other_law(assessed) == "ideal-gas" { DensityLaw::IdealGas } else { DensityLaw::Variable };
    assessed.fluid.density_law.map(|law| change_law(law, to, false))
}

/// The word of a law in a deck.
pub fn law_word(law: DensityLaw) -> &'static str {
    match law {
        DensityLaw::Boussinesq => "boussinesq",
        DensityLaw::IdealGas => "ideal-gas",
        DensityLaw::Variable => "variable",
        DensityLaw::Constant => "constant",
    }
}

/// "below 12 m", for a height that a limit allows.
pub fn height_below(height: f64, value: f64, limit: f64) -> String {
    format!("a height below {} m", format_number(height * limit / value))
}
