//! `include-not-found`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "include-not-found",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether an included file is there, is a deck, and can be read.",
        formula: "",
        source: "common practice",
        remedy: "Correct the path: it counts from the folder of the file that includes.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_files;

    #[test]
    fn no_such_file() {
        expect_files(&[("/project/deck.buoy", r##"include "other.buoy"  #! include-not-found "no file""##)]);
    }

    #[test]
    fn not_a_deck() {
        expect_files(&[
            ("/project/deck.buoy", r##"include "notes.txt"  #! include-not-found "no deck""##),
            ("/project/notes.txt", r##"x"##),
        ]);
    }

    #[test]
    fn sound() {
        expect_files(&[
            ("/project/cases/deck.buoy", r##"include "../shared/common.buoy""##),
            (
                "/project/shared/common.buoy",
                r##"given
    a = 1 m"##,
            ),
        ]);
    }
}
