//! `unreadable-line`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "unreadable-line",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether each line has the shape of a statement: a word and its arguments, a definition, a comparison or a table row.",
        formula: "",
        source: "common practice",
        remedy: "Correct the line. Every other line of the deck is read all the same.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn a_brace_is_no_deck() {
        expect(
            r##"
given
    a = 1 m {  #! unreadable-line "Braces"
    b = 2 m
"##,
        );
    }

    #[test]
    fn an_open_quote() {
        expect(
            r##"
case "title  #! unreadable-line "not closed"
    purpose "what it shows"
"##,
        );
    }

    #[test]
    fn a_decimal_comma() {
        expect(
            r##"
given
    a = 0,5 m  #! unreadable-line "decimal mark"
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
case "title"
    gravity none
"##,
        );
    }
}
