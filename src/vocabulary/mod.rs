//! The words of the language: one table that the reader, completion, hover, signature help, the layout and the
//! printed reference all read. A new statement is a new row.

pub mod arrangements;
pub mod choices;
pub mod entries;
pub mod functions;
pub mod look_up;
pub mod print;
pub mod rows;
pub mod statements;

pub use entries::ENTRIES;
pub use look_up::{entry_row, member_slot, statement_row, statements_of};
pub use rows::{Choice, EntryKind, EntryRow, NameOf, Need, Slot, StatementRow, Takes, Temperature, Times};
pub use statements::STATEMENTS;
