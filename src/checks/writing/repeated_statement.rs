//! `repeated-statement`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "repeated-statement",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether a statement that counts once stands once, and an entry that a deck has once.",
        formula: "",
        source: "common practice",
        remedy: "Keep one of the two.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn a_statement() {
        expect(
            r##"
case "title"
    gravity none
    gravity none  #! repeated-statement
"##,
        );
    }

    #[test]
    fn an_entry() {
        expect(
            r##"
case "one"
    gravity none
case "two"  #! repeated-statement
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
given
    a = 1 m
given
    b = 1 m
"##,
        );
    }
}
