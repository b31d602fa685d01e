//! `no-finite-value`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "no-finite-value",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether a value comes out as a number at all.",
        formula: "",
        source: "common practice",
        remedy: "Look for a division by zero, a root or logarithm of a negative number, or a number too large.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn division_by_zero() {
        expect(
            r##"
given
    a = 0 m
    b = 1 m / a  #! no-finite-value
"##,
        );
    }

    #[test]
    fn a_number_too_large() {
        expect(
            r##"
given
    a = 1e999 m  #! no-finite-value
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
given
    a = 1e300 m
"##,
        );
    }
}
