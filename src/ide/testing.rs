//! Helps the tests of this folder: a deck from a few lines of text with the cursor marked `$0`.

use crate::syntax::change::apply;
use crate::syntax::{Edit, FileId};
use crate::testing::{MemoryFiles, TODAY};
use crate::workspace::{Deck, Options, analyse, analyse_text};
use std::path::{Path, PathBuf};

/// The deck itself.
pub const DECK: FileId = FileId(0);

/// The deck and where the cursor stands. A line break at the start of the text is dropped.
pub fn at(marked: &str) -> (Deck, usize) {
    let marked = marked.strip_prefix('\n').unwrap_or(marked);
    let offset = marked.find("$0").expect("a cursor, `$0`");
    (analyse_text(&marked.replacen("$0", "", 1), TODAY), offset)
}

/// The deck whose first file is the first of these, all below `/project`.
pub fn of_files(files: &[(&str, &str)]) -> Deck {
    let memory =
        MemoryFiles { files: files.iter().map(|(path, text)| (PathBuf::from(path), (*text).to_string())).collect() };
    let options = Options { folder: Some(PathBuf::from("/project")), today: TODAY.to_string(), ..Options::default() };
    analyse(&memory, Path::new(files[0].0), &options).expect("the first file")
}

/// The text of the deck itself.
pub fn text(deck: &Deck) -> &str {
    &deck.files[0].text
}

/// The deck's text after these edits.
pub fn edited(deck: &Deck, edits: &[Edit]) -> String {
    apply(text(deck), edits.iter().filter(|edit| edit.file == DECK).map(|edit| (edit.span, edit.text.as_str())))
}
