//! Formatting as an editor asks for it: the whole file, a part, or the line just left with Enter.
//!
//! ```text
//! region cabinet⏎          the new line is indented below the head
//!   box  1 m by 2 m⏎       the line left is laid out, the new one indented
//! ```

use super::spot::spot;
use crate::syntax::layout::changes;
use crate::syntax::tree::Content;
use crate::syntax::{Edit, FileId, Span};
use crate::workspace::Deck;

/// The changes that lay a file out.
pub fn document(deck: &Deck, file: FileId) -> Vec<Edit> {
    let Some(source) = deck.file(file) else { return Vec::new() };
    let all = changes(&source.text, &source.tree);
    all.into_iter().map(|(span, text)| Edit { file, span, text }).collect()
}

/// The changes that lay out the lines which `part` touches.
pub fn range(deck: &Deck, file: FileId, part: Span) -> Vec<Edit> {
    let Some(source) = deck.file(file) else { return Vec::new() };
    let text = &*source.text;
    let start = text.get(..part.start).map_or(0, |before| before.rfind('\n').map_or(0, |at| at + 1));
    let end = part.end + text.get(part.end..).map_or(0, |behind| behind.find('\n').map_or(behind.len(), |at| at + 1));
    let mut edits = document(deck, file);
    edits.retain(|edit| start <= edit.span.start && edit.span.end <= end);
    edits
}

/// The changes after Enter, with the cursor on the new line: the line left is laid out, and the new one indented where an
/// entry goes on.
pub fn on_enter(deck: &Deck, file: FileId, offset: usize) -> Vec<Edit> {
    let Some(spot) = spot(deck, file, offset) else { return Vec::new() };
    let (_, line_start) = spot.before();
    let Some(left) = line_start.checked_sub(1) else { return Vec::new() };
    let left_start = spot.text.get(..left).and_then(|before| before.rfind('\n')).map_or(0, |at| at + 1);
    let mut edits = range(deck, file, Span::new(left_start, left));
    // Only the line itself: an empty line behind the entry comes when the next one is written.
    edits.retain(|edit| edit.span.end <= left && !edit.text.contains('\n'));
    // White space that an earlier Enter left behind goes.
    let left_line = Span::new(left_start, left).of(spot.text).trim_end_matches('\r');
    if !left_line.is_empty() && left_line.trim().is_empty() {
        let span = Span::new(left_start, left_start + left_line.len());
        edits.retain(|edit| edit.span.end <= span.start);
        edits.push(Edit { file, span, text: String::new() });
    }
    let rest = spot.text.get(line_start..).unwrap_or("");
    let rest = rest.split('\n').next().unwrap_or("").trim_end_matches('\r');
    let before = super::spot::spot(deck, file, left_start);
    let goes_on = before.is_some_and(|before| {
        before.entry.head.is_some()
            && before.line().is_some_and(|line| line.content != Content::Blank || line.problem.is_some())
            && before.row.is_some_and(|row| row.holds != crate::vocabulary::rows::Holds::Nothing)
    });
    let indent = rest.len() - rest.trim_start().len();
    if rest.trim().is_empty() && goes_on && rest != "    " {
        let span = Span::new(line_start, line_start + indent);
        edits.push(Edit { file, span, text: "    ".to_string() });
    }
    edits
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at, edited};

    fn entered(marked: &str) -> String {
        let (deck, offset) = at(marked);
        edited(&deck, &on_enter(&deck, DECK, offset))
    }

    #[test]
    fn a_file_and_a_part() {
        let (deck, offset) = at("run\n  steady\nmesh of a\n growth  $01.2\n");
        assert_eq!(edited(&deck, &document(&deck, DECK)), "run\n    steady\n\nmesh of a\n    growth         1.2\n");
        assert_eq!(
            edited(&deck, &range(&deck, DECK, Span::new(offset, offset))),
            "run\n  steady\nmesh of a\n    growth         1.2\n"
        );
    }

    #[test]
    fn after_a_head_the_line_is_indented() {
        assert_eq!(entered("region  cabinet\n$0"), "region cabinet\n    ");
        assert_eq!(entered("region cabinet\n$0\nrun\n"), "region cabinet\n    \nrun\n");
    }

    #[test]
    fn after_a_statement_it_is_laid_out() {
        assert_eq!(entered("region r\n  box  1 m by 2 m\n  $0"), "region r\n    box            1 m by 2 m\n    ");
        assert_eq!(entered("region r\n  box  1 m by 2 m\r\n$0"), "region r\n    box            1 m by 2 m\r\n    ");
    }

    #[test]
    fn after_an_empty_line_nothing_is_indented() {
        assert_eq!(entered("run\n    steady\n    \n$0"), "run\n    steady\n\n");
        assert_eq!(entered("include \"a.buoy\"\n$0"), "include \"a.buoy\"\n");
        assert_eq!(entered("$0"), "");
        assert_eq!(entered("# a\n$0"), "# a\n");
    }
}
