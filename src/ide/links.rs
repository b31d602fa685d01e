//! The paths of includes, as links to open.

use crate::syntax::tree::ExpressionKind;
use crate::syntax::{FileId, Span};
use crate::vocabulary::EntryKind;
use crate::workspace::Deck;
use crate::workspace::includes::normalised;
use std::path::{Path, PathBuf};

/// Each path in a file, without its quotes, and the file that it means.
pub fn links(deck: &Deck, file: FileId) -> Vec<(Span, PathBuf)> {
    let Some(source) = deck.file(file) else { return Vec::new() };
    let folder = source.path.parent().unwrap_or(Path::new(""));
    let mut found = Vec::new();
    for placed in &source.tree.entries {
        let Some(phrase) = placed.entry.head_phrase().filter(|head| &*head.word.text == EntryKind::Include.word())
        else {
            continue;
        };
        for argument in &phrase.arguments {
            if let ExpressionKind::Text(path) = &argument.kind
                && !path.is_empty()
                && Path::new(&**path).is_relative()
            {
                let inside = Span::new(argument.span.start + 1, argument.span.end.saturating_sub(1));
                found.push((inside.shifted(placed.start), normalised(&folder.join(&**path))));
            }
        }
    }
    found
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, of_files, text};

    #[test]
    fn a_path_from_the_folder_of_the_deck() {
        let deck =
            of_files(&[("/project/a/deck.buoy", "include \"../shared/b.buoy\"\ninclude \"\"\ninclude \"/etc/x\"\n")]);
        let found = links(&deck, DECK);
        assert_eq!(found.len(), 1);
        assert_eq!(found[0].0.of(text(&deck)), "../shared/b.buoy");
        assert_eq!(found[0].1, PathBuf::from("/project/shared/b.buoy"));
    }
}
