//! `unit-spacing`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "unit-spacing",
    family: Family::Units,
    limits: &[],
    level: Level::Information,
    basis: Basis {
        compares: "Whether white space stands where the language wants it: around operators, between a number and its unit, and not inside a unit.",
        formula: "",
        source: "common practice",
        remedy: "Accept the fix.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn no_space_around_an_operator() {
        expect(
            r##"
given
    a = 1 m
    b = 2*a  #! unit-spacing
"##,
        );
    }

    #[test]
    fn a_unit_torn_apart() {
        expect(
            r##"
given
    a = 2 m / s  #! unit-spacing "no white space"
"##,
        );
    }

    #[test]
    fn a_division_by_a_name() {
        expect(
            r##"
given
    s = 4 s
    a = 2 m / s
"##,
        );
    }
}
