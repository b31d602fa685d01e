//! `include-circular`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "include-circular",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether a file comes to include itself.",
        formula: "",
        source: "common practice",
        remedy: "Take out one of the includes of the circle.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_files;

    #[test]
    fn itself() {
        expect_files(&[("/project/deck.buoy", r##"include "deck.buoy"  #! include-circular"##)]);
    }

    #[test]
    fn by_way_of_another() {
        expect_files(&[
            ("/project/deck.buoy", r##"include "a.buoy""##),
            ("/project/a.buoy", r##"include "b.buoy""##),
            ("/project/b.buoy", r##"include "./a.buoy"  #! include-circular"##),
        ]);
    }

    #[test]
    fn a_file_taken_in_twice_is_no_circle() {
        expect_files(&[
            (
                "/project/deck.buoy",
                r##"include "a.buoy"
include "b.buoy""##,
            ),
            ("/project/a.buoy", r##"include "b.buoy""##),
            (
                "/project/b.buoy",
                r##"given
    x = 1 m"##,
            ),
        ]);
    }
}
