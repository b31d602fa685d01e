//! Slips of unit: a value that is wrong as written and right in another unit. What was found of each kind, and the
//! question whether a value is one, so that no other check speaks of it.

use super::{slip_of_number, slip_of_property, slip_of_size, slip_of_state};
use crate::case::model::Value;
use crate::checks::Subject;
use crate::physics::model::Bound;
use crate::syntax::{Edit, Fix, Level, Place};

/// A value that was probably meant in another unit.
#[derive(Clone, Debug)]
pub struct Slip {
    /// The value's place.
    pub place: Place,
    /// What a fix may replace.
    pub literal: Option<Place>,
    /// What it belongs to, by name.
    pub subject: String,
    /// What is wrong.
    pub message: String,
    /// What was meant, as it would be written.
    pub meant: String,
    /// How much it matters.
    pub level: Level,
    /// Whether nothing else can have been meant.
    pub sure: bool,
}

impl Slip {
    /// A slip of `value`, which was meant as `meant`.
    pub fn of(value: &Value, subject: &str, level: Level, meant: String, sure: bool, message: String) -> Slip {
        Slip {
            place: value.origin.place,
            literal: value.origin.literal,
            subject: subject.to_string(),
            message,
            meant,
            level,
            sure,
        }
    }
}

/// Every slip of a case, one for each literal.
pub fn slips(subject: &Subject<'_>) -> Vec<Slip> {
    let mut slips = slip_of_property::slips(subject);
    slips.extend(slip_of_state::slips(subject));
    slips.extend(slip_of_size::slips(subject));
    slips.extend(slip_of_number::slips(subject));
    // A literal that a name carries to several statements is one slip.
    let mut seen: Vec<Place> = Vec::new();
    slips.retain(|slip| {
        let place = slip.literal.unwrap_or(slip.place);
        let is_new = !seen.contains(&place);
        seen.push(place);
        is_new
    });
    slips
}

/// Whether a value is one of the slips.
pub fn is_slip(slips: &[Slip], value: &Value) -> bool {
    slips.iter().any(|slip| {
        slip.place == value.origin.place || (slip.literal.is_some() && slip.literal == value.origin.literal)
    })
}

/// Whether an end of the temperatures of a region is one of the slips: what follows from it then says nothing.
pub fn is_slip_of_bound(slips: &[Slip], bound: &Bound) -> bool {
    slips
        .iter()
        .any(|slip| bound.place == Some(slip.place) || (slip.literal.is_some() && slip.literal == bound.literal))
}

/// A fix that replaces a literal.
pub fn replacement(title: String, literal: Place, text: String, sure: bool) -> Fix {
    Fix { title, edits: vec![Edit { file: literal.file, span: literal.span, text }], sure }
}
