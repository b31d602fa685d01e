//! `sweep-too-large`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "sweep-too-large",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether the points of a sweep stay below the number that is looked at.",
        formula: "",
        source: "common practice",
        remedy: "Take fewer values, or step names together.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn too_many_points() {
        expect(
            r##"
vary
    a over 1 s .. 2000 s step 1 s  #! sweep-too-large
    b over 1 h .. 2000 h step 1 h
run
    transient for b step a
"##,
        );
    }
}
