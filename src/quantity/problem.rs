//! What can be wrong with a unit as written, and how that is said.

use std::ops::Range;

/// Why a text is not a unit. Ranges are in bytes of that text.
#[derive(Clone, PartialEq, Eq, Debug)]
pub enum UnitProblem {
    /// A symbol that no unit has.
    Unknown {
        /// The symbol as written.
        symbol: String,
        /// Where it stands.
        at: Range<usize>,
        /// What to write in its place.
        suggestion: Option<String>,
    },
    /// The text does not have the shape of a unit.
    Malformed {
        /// Where.
        at: Range<usize>,
        /// Why, as a sentence without a full stop.
        why: String,
    },
    /// Longer than [`crate::quantity::unit_parser::LONGEST_UNIT`] bytes.
    TooLong,
    /// An exponent or a factor beyond what can be held.
    Overflow,
}

impl UnitProblem {
    /// The problem in words, without a full stop.
    #[must_use]
    pub fn message(&self) -> String {
        match self {
            UnitProblem::Unknown { symbol, suggestion: Some(meant), .. } => {
                format!("`{symbol}` is not a known unit; `{meant}` may be meant")
            }
            UnitProblem::Unknown { symbol, .. } => format!("`{symbol}` is not a known unit"),
            UnitProblem::Malformed { why, .. } => why.clone(),
            UnitProblem::TooLong => "this is too long for a unit".to_string(),
            UnitProblem::Overflow => "the powers in this unit are beyond what can be computed".to_string(),
        }
    }

    /// Where in the text the problem is; `None` where it is all of it.
    #[must_use]
    pub fn at(&self) -> Option<Range<usize>> {
        match self {
            UnitProblem::Unknown { at, .. } | UnitProblem::Malformed { at, .. } => Some(at.clone()),
            UnitProblem::TooLong | UnitProblem::Overflow => None,
        }
    }
}

#[cfg(test)]
mod tests {
    use crate::quantity::unit::parse_unit;

    #[test]
    fn messages_say_what_and_what_to_write() {
        let said = |text: &str| parse_unit(text).unwrap_err().message();
        assert_eq!(said("Mpa"), "`Mpa` is not a known unit; `MPa` may be meant");
        assert_eq!(said("qqqqq"), "`qqqqq` is not a known unit");
        assert_eq!(said("W/m^2/"), "a unit is missing after `/`");
        assert_eq!(said(&"m".repeat(1000)), "this is too long for a unit");
    }
}
