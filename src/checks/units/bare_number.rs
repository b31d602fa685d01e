//! `bare-number`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "bare-number",
    family: Family::Units,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether a number that stands for a quantity has its unit.",
        formula: "",
        source: "common practice",
        remedy: "Write the unit.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn in_a_statement() {
        expect(
            r##"
run
    transient for 3600 step 1 s  #! bare-number
"##,
        );
    }

    #[test]
    fn in_a_sum() {
        expect(
            r##"
given
    a = 1 m + 2  #! bare-number
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
given
    a = 2 * 1 m
"##,
        );
    }
}
