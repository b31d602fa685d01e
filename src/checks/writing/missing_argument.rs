//! `missing-argument`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "missing-argument",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether a statement has all that it needs behind it.",
        formula: "",
        source: "common practice",
        remedy: "Write what the finding names.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn behind_the_word() {
        expect(
            r##"
fluid f
    substance  #! missing-argument
"##,
        );
    }

    #[test]
    fn behind_a_link() {
        expect(
            r##"
run
    transient for 1 h  #! missing-argument "step"
"##,
        );
    }

    #[test]
    fn of_a_definition() {
        expect(
            r##"
given
    a =  #! missing-argument
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
run
    transient for 1 h step 1 s
"##,
        );
    }
}
