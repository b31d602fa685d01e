//! `unknown-unit`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "unknown-unit",
    family: Family::Units,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether the text behind a number is a unit.",
        formula: "",
        source: "BIPM, The International System of Units, 9th edition (2019); NIST SP 811 (2008)",
        remedy: "Write the unit that the finding names, or one of those listed in the language reference.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn a_slip_of_case() {
        expect(
            r##"
given
    a = 3 Mpa  #! unknown-unit "MPa"
"##,
        );
    }

    #[test]
    fn powers_without_a_sign() {
        expect(
            r##"
given
    a = 3 W/m2/K  #! unknown-unit
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
given
    a = 3 MPa
    b = 5 W/(m².K)
"##,
        );
    }
}
