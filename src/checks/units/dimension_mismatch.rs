//! `dimension-mismatch`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "dimension-mismatch",
    family: Family::Units,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether the dimensions of a sum, a comparison or a statement agree, exponents as exact rationals.",
        formula: "",
        source: "ISO 80000-1:2009, 5 (quantity calculus)",
        remedy: "Look for a wrong unit, or for the wrong quantity.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn in_a_sum() {
        expect(
            r##"
given
    a = 1 m + 2 s  #! dimension-mismatch "length"
"##,
        );
    }

    #[test]
    fn in_a_statement() {
        expect(
            r##"
run
    transient for 2 m step 1 s  #! dimension-mismatch "length"
"##,
        );
    }

    #[test]
    fn a_root_halves_exponents() {
        expect(
            r##"
given
    a = sqrt(4 m^2) + 1 m
    b = sqrt(9.81 m/s^2 * 1 m) + 1 m  #! dimension-mismatch
"##,
        );
    }

    #[test]
    fn a_function_of_a_length() {
        expect(
            r##"
given
    a = exp(1 m)  #! dimension-mismatch
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
given
    q = 6 W/m^2/K * (30 degC - 20 degC) * 2 m^2 + 1 kW
"##,
        );
    }
}
