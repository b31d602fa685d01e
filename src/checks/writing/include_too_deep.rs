//! `include-too-deep`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "include-too-deep",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether includes stay within their bounds in depth and number.",
        formula: "",
        source: "common practice",
        remedy: "Include files directly rather than through one another.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_files;

    #[test]
    fn a_long_chain() {
        expect_files(&[
            ("/project/deck.buoy", r##"include "f1.buoy""##),
            ("/project/f1.buoy", r##"include "f2.buoy""##),
            ("/project/f2.buoy", r##"include "f3.buoy""##),
            ("/project/f3.buoy", r##"include "f4.buoy""##),
            ("/project/f4.buoy", r##"include "f5.buoy""##),
            ("/project/f5.buoy", r##"include "f6.buoy""##),
            ("/project/f6.buoy", r##"include "f7.buoy""##),
            ("/project/f7.buoy", r##"include "f8.buoy""##),
            ("/project/f8.buoy", r##"include "f9.buoy""##),
            ("/project/f9.buoy", r##"include "f10.buoy""##),
            ("/project/f10.buoy", r##"include "f11.buoy""##),
            ("/project/f11.buoy", r##"include "f12.buoy""##),
            ("/project/f12.buoy", r##"include "f13.buoy""##),
            ("/project/f13.buoy", r##"include "f14.buoy""##),
            ("/project/f14.buoy", r##"include "f15.buoy""##),
            ("/project/f15.buoy", r##"include "f16.buoy""##),
            ("/project/f16.buoy", r##"include "f17.buoy"  #! include-too-deep"##),
            ("/project/f17.buoy", r##"given"##),
        ]);
    }

    #[test]
    fn sound() {
        expect_files(&[
            ("/project/deck.buoy", r##"include "f1.buoy""##),
            ("/project/f1.buoy", r##"include "f2.buoy""##),
            ("/project/f2.buoy", r##"include "f3.buoy""##),
            ("/project/f3.buoy", r##"include "f4.buoy""##),
            ("/project/f4.buoy", r##"include "f5.buoy""##),
            ("/project/f5.buoy", r##"include "f6.buoy""##),
            ("/project/f6.buoy", r##"include "f7.buoy""##),
            ("/project/f7.buoy", r##"include "f8.buoy""##),
            ("/project/f8.buoy", r##"include "f9.buoy""##),
            ("/project/f9.buoy", r##"include "f10.buoy""##),
            ("/project/f10.buoy", r##"given"##),
        ]);
    }
}
