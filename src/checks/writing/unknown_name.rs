//! `unknown-name`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "unknown-name",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether every name that is used is defined in the deck, its includes, or the library.",
        formula: "",
        source: "common practice",
        remedy: "Correct the name, or define it.",
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
    height = 1 m
    twice = 2 * heigth  #! unknown-name "heigth"
"##,
        );
    }

    #[test]
    fn a_fluid() {
        expect(
            r##"
fluid room_air
    substance airr  #! unknown-name
"##,
        );
    }

    #[test]
    fn a_subtraction_without_spaces() {
        expect(
            r##"
given
    a = 3 m
    b = 1 m
    c = a-b  #! unknown-name "spaces"
"##,
        );
    }

    #[test]
    fn a_member_not_stated() {
        expect(
            r##"
fluid room_air
    substance air
given
    mu = room_air.viscosity  #! unknown-name "states no viscosity"
"##,
        );
    }
}
