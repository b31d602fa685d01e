//! `circular-definition`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "circular-definition",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether a value can be worked out without itself.",
        formula: "",
        source: "common practice",
        remedy: "Break the circle: state one of the values as a quantity.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn of_itself() {
        expect(
            r##"
given
    a = 2 * a  #! circular-definition
"##,
        );
    }

    #[test]
    fn by_way_of_another() {
        expect(
            r##"
given
    a = 2 * b  #! circular-definition
    b = a / 2  #! circular-definition
    c = a + b
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
given
    b = a / 2
    a = 2 m
"##,
        );
    }
}
