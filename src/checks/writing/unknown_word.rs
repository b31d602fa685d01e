//! `unknown-word`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "unknown-word",
    family: Family::Writing,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether the word that opens an entry or a statement, or that a statement offers as a choice, is one of the language.",
        formula: "",
        source: "common practice",
        remedy: "Use the word that the finding names, or look it up with `deckline vocabulary`.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn an_entry() {
        expect(
            r##"
regin cabinet  #! unknown-word "regin"
    box 1 m by 1 m
"##,
        );
    }

    #[test]
    fn a_statement() {
        expect(
            r##"
case "title"
    gravty none  #! unknown-word
"##,
        );
    }

    #[test]
    fn a_choice() {
        expect(
            r##"
fluid room_air
    substance    air
    reference    20 degC at 1 bar
    density-law  bousinesq  #! unknown-word
"##,
        );
    }

    #[test]
    fn sound() {
        expect(
            r##"
run
    time-stepping explicit
    transient for 1 h step 1 s
"##,
        );
    }
}
