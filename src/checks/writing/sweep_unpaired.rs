//! `sweep-unpaired`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "sweep-unpaired",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether names that step together have the same number of values.",
        formula: "",
        source: "common practice",
        remedy: "Give both as many values.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn two_and_three() {
        expect(
            r##"
vary
    a over [1 s, 2 s]
    b over [1 h, 2 h, 3 h]
    together a, b  #! sweep-unpaired
run
    transient for b step a
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
vary
    a over [1 s, 2 s]
    b over [1 h, 2 h]
    together a, b
run
    transient for b step a
"##,
        );
    }
}
