//! `include-outside`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "include-outside",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether an include stays inside the project folder: that of the repository, else the folder being looked through.",
        formula: "",
        source: "common practice",
        remedy: "Move the file into the project.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_files;

    #[test]
    fn above_the_project() {
        expect_files(&[
            ("/project/deck.buoy", r##"include "../secret.buoy"  #! include-outside"##),
            ("/secret.buoy", r##"given"##),
        ]);
    }

    #[test]
    fn an_absolute_path() {
        expect_files(&[
            ("/project/deck.buoy", r##"include "/secret.buoy"  #! include-outside"##),
            ("/secret.buoy", r##"given"##),
        ]);
    }

    #[test]
    fn up_and_back_in_is_inside() {
        expect_files(&[
            ("/project/cases/deck.buoy", r##"include "../../project/cases/a.buoy""##),
            (
                "/project/cases/a.buoy",
                r##"given
    x = 1 m"##,
            ),
        ]);
    }
}
