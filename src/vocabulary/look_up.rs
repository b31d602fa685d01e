//! Finds rows of the table.

use super::entries::ENTRIES;
use super::rows::{EntryKind, EntryRow, Slot, StatementRow};
use super::statements::STATEMENTS;

/// The row of the entry that `word` opens.
pub fn entry_row(word: &str) -> Option<&'static EntryRow> {
    ENTRIES.iter().find(|row| row.word == word)
}

impl EntryKind {
    /// The row of the kind.
    pub fn row(self) -> Option<&'static EntryRow> {
        ENTRIES.iter().find(|row| row.kind == self)
    }

    /// The word that opens it.
    pub fn word(self) -> &'static str {
        self.row().map_or("", |row| row.word)
    }
}

/// The statements that an entry may hold, in the table's order.
pub fn statements_of(kind: EntryKind) -> impl Iterator<Item = &'static StatementRow> {
    STATEMENTS.iter().filter(move |row| row.entries.contains(&kind))
}

/// The row of a statement's word in an entry.
pub fn statement_row(kind: EntryKind, word: &str) -> Option<&'static StatementRow> {
    statements_of(kind).find(|row| row.word == word)
}

/// The statement and the index of its slot that `member` names in an entry: a statement's word stands for its
/// first slot (`cabinet_air.viscosity`), a slot's name for the slot (`cabinet.height`).
pub fn member_slot(
    kind: EntryKind,
    member: &str,
) -> impl Iterator<Item = (&'static StatementRow, usize, &'static Slot)> + '_ {
    let rows = move || statements_of(kind);
    let by_word =
        rows().filter(move |row| row.word == member).filter_map(|row| row.slots.first().map(|slot| (row, 0, slot)));
    let by_slot = rows().flat_map(move |row| {
        row.slots
            .iter()
            .enumerate()
            .filter(move |(_, slot)| slot.name == member)
            .map(move |(index, slot)| (row, index, slot))
    });
    by_word.chain(by_slot)
}
