//! `unexpected-argument`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "unexpected-argument",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether what stands behind a word, and the link before it, is what the word takes.",
        formula: "",
        source: "common practice",
        remedy: "Follow the form that the finding shows.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn a_link_too_many() {
        expect(
            r##"
run
    transient for 1 h step 1 s by 2  #! unexpected-argument
"##,
        );
    }

    #[test]
    fn a_value_where_none_goes() {
        expect(
            r##"
run
    steady 3  #! unexpected-argument
"##,
        );
    }

    #[test]
    fn a_text_for_a_value() {
        expect(
            r##"
run
    transient for "an hour" step 1 s  #! unexpected-argument
"##,
        );
    }

    #[test]
    fn a_day_that_is_none() {
        expect(
            r##"
waive density-span
    because "Measured." until 2027-02-30  #! unexpected-argument
"##,
        );
    }
}
