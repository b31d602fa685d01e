//! What can be folded away: the statements of an entry below its head, and blocks of comments.

use crate::syntax::tree::{Content, Line};
use crate::syntax::{FileId, Span};
use crate::workspace::Deck;

/// Lines that fold into their first.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Fold {
    /// From the first line's first byte to the last line's last, without its line end.
    pub span: Span,
    /// Whether they are comments.
    pub is_comment: bool,
}

/// Every fold of a file, in order; none of one line alone.
pub fn folds(deck: &Deck, file: FileId) -> Vec<Fold> {
    let Some(source) = deck.file(file) else { return Vec::new() };
    let mut folds = Vec::new();
    for placed in &source.tree.entries {
        let entry = &placed.entry;
        let mut put = |first: &Line, last: &Line, is_comment| {
            let end = last.span.start + last.span.of(&entry.text).trim_end().len();
            folds.push(Fold { span: Span::new(first.span.start, end).shifted(placed.start), is_comment });
        };
        let is_comment = |line: &Line| line.content == Content::Blank && line.comment.is_some();
        let mut block: Vec<&Line> = Vec::new();
        for line in entry.lines.iter().map(Some).chain([None]) {
            match line {
                Some(line) if is_comment(line) => block.push(line),
                _ => {
                    if let [first, .., last] = block.as_slice() {
                        put(first, last, true);
                    }
                    block.clear();
                }
            }
        }
        let says = |line: &Line| line.content != Content::Blank || line.comment.is_some() || line.problem.is_some();
        if let Some(head) = entry.head
            && let Some(last) = entry.lines.iter().rposition(says).filter(|last| *last > head)
            && let (Some(first), Some(last)) = (entry.lines.get(head), entry.lines.get(last))
        {
            put(first, last, false);
        }
    }
    folds.sort_by_key(|fold| fold.span);
    folds
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at, text};

    #[test]
    fn entries_and_blocks_of_comments() {
        let (deck, _) =
            at("# one\n# two\nrun\n    steady\n\n\ncase \"alone\"\ngiven\n    # why\n    # how\n    a = 1$0\n");
        let folded: Vec<(&str, bool)> =
            folds(&deck, DECK).into_iter().map(|fold| (fold.span.of(text(&deck)), fold.is_comment)).collect();
        assert_eq!(
            folded,
            [
                ("# one\n# two", true),
                ("run\n    steady", false),
                ("given\n    # why\n    # how\n    a = 1", false),
                ("    # why\n    # how", true)
            ]
        );
    }
}
