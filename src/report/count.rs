//! How many findings of each level.

use super::sheet::Sheet;
use crate::syntax::Level;
use schemars::JsonSchema;
use serde::Serialize;

/// Numbers of findings, those that a waiver covers apart.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default, Serialize, JsonSchema)]
pub struct Count {
    /// Decks checked.
    pub decks: usize,
    /// Errors.
    pub errors: usize,
    /// Warnings.
    pub warnings: usize,
    /// Findings at the level `information`.
    pub information: usize,
    /// Hints.
    pub hints: usize,
    /// Findings that a waiver covers, of any level.
    pub waived: usize,
    /// Findings at the gate of their deck or above it.
    pub at_or_above_gate: usize,
}

impl Count {
    /// The count of sheets.
    pub fn of(sheets: &[Sheet]) -> Count {
        let mut count = Count { decks: sheets.len(), ..Count::default() };
        for remark in sheets.iter().flat_map(|sheet| &sheet.remarks) {
            let finding = &remark.finding;
            count.at_or_above_gate += usize::from(remark.reaches_gate);
            *match (&finding.waived, finding.level) {
                (Some(_), _) => &mut count.waived,
                (None, Level::Error) => &mut count.errors,
                (None, Level::Warning) => &mut count.warnings,
                (None, Level::Information) => &mut count.information,
                (None, Level::Hint) => &mut count.hints,
            } += 1;
        }
        count
    }

    /// The levels that have findings, in words, the highest first: `1 error`, `2 warnings`, `3 for information`.
    pub fn by_level(&self) -> Vec<(Level, String)> {
        let plural = |number: usize, word: &str| format!("{number} {word}{}", if number == 1 { "" } else { "s" });
        [
            (Level::Error, self.errors, plural(self.errors, "error")),
            (Level::Warning, self.warnings, plural(self.warnings, "warning")),
            (Level::Information, self.information, format!("{} for information", self.information)),
            (Level::Hint, self.hints, plural(self.hints, "hint")),
        ]
        .into_iter()
        .filter(|(_, number, _)| *number > 0)
        .map(|(level, _, words)| (level, words))
        .collect()
    }

    /// `3 decks checked`
    pub fn decks_in_words(&self) -> String {
        format!("{} deck{} checked", self.decks, if self.decks == 1 { "" } else { "s" })
    }
}
