//! `repeated-name`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "repeated-name",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether a name is defined once.",
        formula: "",
        source: "common practice",
        remedy: "Give one of the two another name.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn a_value() {
        expect(
            r##"
given
    a = 1 m
    a = 2 m  #! repeated-name
"##,
        );
    }

    #[test]
    fn a_varied_name_that_is_given() {
        expect(
            r##"
given
    T = 20 degC
vary
    T over [20 degC, 30 degC]  #! repeated-name
"##,
        );
    }

    #[test]
    fn an_entry() {
        expect(
            r##"
solid steel
    conductivity 16 W/m/K
solid steel  #! repeated-name
    conductivity 16 W/m/K
"##,
        );
    }
}
