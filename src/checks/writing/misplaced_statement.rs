//! `misplaced-statement`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "misplaced-statement",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether each statement stands in an entry that takes it, and each entry in the first column.",
        formula: "",
        source: "common practice",
        remedy: "Move the line to the entry that the finding names.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn of_another_entry() {
        expect(
            r##"
case "title"
    gravity none
    box 1 m by 1 m  #! misplaced-statement "region"
"##,
        );
    }

    #[test]
    fn above_every_entry() {
        expect(
            r##"
    gravity none  #! misplaced-statement
case "title"
    gravity none
"##,
        );
    }

    #[test]
    fn an_entry_indented() {
        expect(
            r##"
case "title"
    gravity none
    given  #! misplaced-statement "first column"
"##,
        );
    }

    #[test]
    fn house_rules_in_a_deck() {
        expect(
            r##"
practice  #! misplaced-statement "practice.buoy"
    gate error
"##,
        );
    }
}
