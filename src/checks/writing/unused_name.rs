//! `unused-name`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "unused-name",
    family: Family::Writing,
    limits: &[],
    level: Level::Information,
    basis: Basis {
        compares: "Whether each definition, fluid, solid and substance of the deck itself is used. Included files may offer more than a deck needs.",
        formula: "",
        source: "common practice",
        remedy: "Delete it, or use it.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn a_value() {
        expect(
            r##"
case "x"
given
    a = 1 m  #! unused-name
"##,
        );
    }

    #[test]
    fn a_solid() {
        expect(
            r##"
case "x"
solid steel  #! unused-name
    conductivity 16 W/m/K
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
case "x"
given
    a = 1 s
run
    transient for 1 h step a
"##,
        );
    }

    #[test]
    fn a_file_for_others_to_include() {
        expect(
            r##"
given
    a = 1 m
"##,
        );
    }
}
