//! `sweep-without-end`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "sweep-without-end",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether the steps of a range in vary reach its end.",
        formula: "",
        source: "common practice",
        remedy: "Turn the sign of the step, or exchange the ends.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn wrong_way() {
        expect(
            r##"
vary
    t over 10 s .. 5 s step 1 s  #! sweep-without-end
run
    transient for t step 1 s
"##,
        );
    }

    #[test]
    fn no_step_at_all() {
        expect(
            r##"
vary
    t over 10 s .. 20 s step 0 s  #! sweep-without-end
run
    transient for t step 1 s
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
vary
    t over 10 s .. 5 s step -1 s
run
    transient for t step 1 s
"##,
        );
    }
}
