//! `missing-statement`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "missing-statement",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether an entry has the statements that it cannot do without.",
        formula: "",
        source: "common practice",
        remedy: "Add the statement.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn a_waiver_without_a_reason() {
        expect(
            r##"
waive density-span  #! missing-statement "because"
"##,
        );
    }

    #[test]
    fn a_substance_without_a_density() {
        expect(
            r##"
substance oil  #! missing-statement "density"
    valid from 0 degC to 50 degC
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
waive density-span
    because "Measured; see report 12."
"##,
        );
    }
}
