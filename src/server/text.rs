//! The text of an open document, and positions in it by the encoding agreed with the client.
//!
//! Line ends are those of the protocol: LF, CRLF and a lone CR. A position past the end of its line means the end of that
//! line, before its line end; a line past the last one means the end of the text; a position inside a character means
//! its start. So any position a client sends has a meaning.

use crate::syntax::Span;
use ropey::{Rope, RopeSlice};
use tower_lsp::lsp_types::{Position, PositionEncodingKind, Range, TextDocumentContentChangeEvent};

/// How a position counts in its line.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Default)]
pub enum Encoding {
    /// Bytes of UTF-8.
    Utf8,
    /// Code units of UTF-16: what a client means that says nothing.
    #[default]
    Utf16,
}

impl Encoding {
    /// The encoding to use with a client that offers these: bytes where it can, because offsets here are bytes.
    pub fn agreed(offered: Option<&[PositionEncodingKind]>) -> Encoding {
        match offered {
            Some(offered) if offered.contains(&PositionEncodingKind::UTF8) => Encoding::Utf8,
            _ => Encoding::Utf16,
        }
    }

    /// Its name in the protocol.
    pub fn kind(self) -> PositionEncodingKind {
        match self {
            Encoding::Utf8 => PositionEncodingKind::UTF8,
            Encoding::Utf16 => PositionEncodingKind::UTF16,
        }
    }
}

/// A line without its line end.
fn body(line: RopeSlice<'_>) -> RopeSlice<'_> {
    let mut end = line.len_chars();
    for ending in ['\n', '\r'] {
        if end > 0 && line.get_char(end - 1) == Some(ending) {
            end -= 1;
        }
    }
    line.get_slice(..end).unwrap_or(line)
}

/// The byte offset of a position.
pub fn offset(text: &Rope, position: Position, encoding: Encoding) -> usize {
    let Some(line) = text.get_line(position.line as usize) else { return text.len_bytes() };
    let start = text.try_line_to_byte(position.line as usize).unwrap_or_else(|_| text.len_bytes());
    let body = body(line);
    let column = position.character as usize;
    let within = match encoding {
        Encoding::Utf8 => {
            // Down to the start of the character that holds the byte.
            let char = body.try_byte_to_char(column.min(body.len_bytes())).unwrap_or_else(|_| body.len_chars());
            body.try_char_to_byte(char).unwrap_or_else(|_| body.len_bytes())
        }
        Encoding::Utf16 => {
            let char = body.try_utf16_cu_to_char(column.min(body.len_utf16_cu())).unwrap_or_else(|_| body.len_chars());
            body.try_char_to_byte(char).unwrap_or_else(|_| body.len_bytes())
        }
    };
    start + within
}

/// The position of a byte offset; of the end of the text for one past it.
pub fn position(text: &Rope, offset: usize, encoding: Encoding) -> Position {
    let offset = offset.min(text.len_bytes());
    let line = text.try_byte_to_line(offset).unwrap_or(0);
    let start = text.try_line_to_byte(line).unwrap_or(0);
    let column = match (encoding, text.get_line(line)) {
        (_, None) => 0,
        (Encoding::Utf8, Some(_)) => offset - start,
        (Encoding::Utf16, Some(slice)) => slice
            .try_byte_to_char(offset - start)
            .ok()
            .and_then(|char| slice.try_char_to_utf16_cu(char).ok())
            .unwrap_or(0),
    };
    Position::new(capped(line), capped(column))
}

/// The range of a span.
pub fn range(text: &Rope, span: Span, encoding: Encoding) -> Range {
    Range::new(position(text, span.start, encoding), position(text, span.end, encoding))
}

/// The span of a range; empty at its start where it is turned round.
pub fn span(text: &Rope, range: Range, encoding: Encoding) -> Span {
    let start = offset(text, range.start, encoding);
    Span::new(start, offset(text, range.end, encoding).max(start))
}

/// Carries out the changes of one message, each on the text that the one before it left.
pub fn change(text: &mut Rope, changes: &[TextDocumentContentChangeEvent], encoding: Encoding) {
    for change in changes {
        let Some(range) = change.range else {
            *text = Rope::from_str(&change.text);
            continue;
        };
        let span = span(text, range, encoding);
        let from = text.try_byte_to_char(span.start).unwrap_or_else(|_| text.len_chars());
        let to = text.try_byte_to_char(span.end).unwrap_or_else(|_| text.len_chars());
        // Both lie within the text, so neither can fail.
        let _ = text.try_remove(from..to);
        let _ = text.try_insert(from, &change.text);
    }
}

/// A count as the protocol writes it; texts are far shorter than its limit.
fn capped(count: usize) -> u32 {
    u32::try_from(count).unwrap_or(u32::MAX)
}

#[cfg(test)]
mod tests {
    use super::*;
    use Encoding::{Utf8, Utf16};

    fn at(line: u32, character: u32) -> Position {
        Position::new(line, character)
    }

    fn edited(text: &str, changes: &[(Position, Position, &str)], encoding: Encoding) -> String {
        let mut rope = Rope::from_str(text);
        let changes: Vec<TextDocumentContentChangeEvent> = changes
            .iter()
            .map(|(start, end, text)| TextDocumentContentChangeEvent {
                range: Some(Range::new(*start, *end)),
                range_length: None,
                text: (*text).to_string(),
            })
            .collect();
        change(&mut rope, &changes, encoding);
        rope.to_string()
    }

    #[test]
    fn columns_count_bytes_or_utf16_units() {
        // α: 2 bytes, 1 unit; 🌡: 4 bytes, 2 units; e and a combining acute: 1 + 2 bytes, 1 + 1 units.
        let rope = Rope::from_str("α🌡e\u{301}x\n");
        for (bytes, units) in [(0, 0), (2, 1), (6, 3), (7, 4), (9, 5), (10, 6)] {
            assert_eq!(offset(&rope, at(0, bytes), Utf8), bytes as usize);
            assert_eq!(offset(&rope, at(0, units), Utf16), bytes as usize);
            assert_eq!(position(&rope, bytes as usize, Utf8), at(0, bytes));
            assert_eq!(position(&rope, bytes as usize, Utf16), at(0, units));
        }
    }

    #[test]
    fn a_position_inside_a_character_is_its_start() {
        let rope = Rope::from_str("🌡x");
        assert_eq!(offset(&rope, at(0, 1), Utf16), 0);
        assert_eq!(offset(&rope, at(0, 3), Utf8), 0);
    }

    #[test]
    fn positions_out_of_the_text_are_pulled_in() {
        let rope = Rope::from_str("ab\r\ncd");
        assert_eq!(offset(&rope, at(0, 99), Utf16), 2);
        assert_eq!(offset(&rope, at(0, 3), Utf8), 2);
        assert_eq!(offset(&rope, at(1, 99), Utf16), 6);
        assert_eq!(offset(&rope, at(7, 0), Utf16), 6);
        assert_eq!(offset(&rope, at(u32::MAX, u32::MAX), Utf8), 6);
        assert_eq!(position(&rope, 99, Utf16), at(1, 2));
        assert_eq!(span(&rope, Range::new(at(1, 1), at(0, 0)), Utf8), Span::new(5, 5));
    }

    #[test]
    fn lines_end_with_lf_crlf_or_cr_and_nothing_else() {
        let rope = Rope::from_str("a\rb\r\nc\nd\u{b}e\u{2028}f\u{85}g");
        assert_eq!(offset(&rope, at(1, 0), Utf8), 2);
        assert_eq!(offset(&rope, at(2, 0), Utf8), 5);
        assert_eq!(offset(&rope, at(3, 1), Utf8), 8);
        assert_eq!(offset(&rope, at(4, 0), Utf8), rope.len_bytes());
    }

    #[test]
    fn changes_of_one_message_follow_one_another() {
        // The second speaks of the text that the first has left, and overlaps it.
        assert_eq!(edited("abc\n", &[(at(0, 1), at(0, 2), "xyz"), (at(0, 2), at(0, 4), "")], Utf16), "axc\n");
        assert_eq!(edited("", &[(at(0, 0), at(0, 0), "é🌡"), (at(0, 3), at(0, 3), "!")], Utf16), "é🌡!");
        assert_eq!(edited("a\r\nb", &[(at(0, 1), at(1, 0), "")], Utf8), "ab");
        assert_eq!(edited("ab", &[(at(5, 5), at(9, 9), "c")], Utf8), "abc");
    }

    #[test]
    fn bytes_are_taken_where_offered() {
        assert_eq!(Encoding::agreed(None), Utf16);
        assert_eq!(Encoding::agreed(Some(&[PositionEncodingKind::UTF16])), Utf16);
        assert_eq!(Encoding::agreed(Some(&[PositionEncodingKind::UTF16, PositionEncodingKind::UTF8])), Utf8);
    }
}
