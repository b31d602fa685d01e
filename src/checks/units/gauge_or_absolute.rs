//! `gauge-or-absolute`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "gauge-or-absolute",
    family: Family::Units,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether a gauge pressure stands where a pressure above ambient is wanted without its unit saying so again, and no two are added.",
        formula: "",
        source: "common practice",
        remedy: "Write the absolute pressure, or the plain unit where the statement already counts from ambient.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn two_gauge_pressures_added() {
        expect(
            r##"
given
    p = 1 barg + 2 barg  #! gauge-or-absolute
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
given
    p = 1 barg + 2 bar
"##,
        );
    }
}
