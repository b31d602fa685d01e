//! Byte offsets as lines and columns.
//!
//! Lines and columns count from 1; a column counts characters (Unicode scalar values), as editors show it and as the
//! `unicodeCodePoints` of SARIF are counted. LF and CRLF end a line.

use crate::syntax::Span;
use schemars::JsonSchema;
use serde::Serialize;

/// A place in a text.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Default, Serialize, JsonSchema)]
pub struct Position {
    /// Line, from 1.
    pub line: usize,
    /// Column in characters, from 1.
    pub column: usize,
    /// Offset in bytes, from 0.
    pub byte: usize,
}

/// Where the lines of a text start.
#[derive(Debug)]
pub struct Index<'a> {
    text: &'a str,
    starts: Vec<usize>,
}

impl<'a> Index<'a> {
    /// The index of a text.
    pub fn of(text: &'a str) -> Index<'a> {
        let after_breaks = text.bytes().enumerate().filter(|(_, byte)| *byte == b'\n').map(|(at, _)| at + 1);
        Index { text, starts: std::iter::once(0).chain(after_breaks).collect() }
    }

    /// The position of a byte. An offset inside a character counts as its first byte, one past the end as the end.
    pub fn at(&self, offset: usize) -> Position {
        let mut byte = offset.min(self.text.len());
        while !self.text.is_char_boundary(byte) {
            byte -= 1;
        }
        let line = self.starts.partition_point(|start| *start <= byte);
        let start = line.checked_sub(1).and_then(|line| self.starts.get(line)).copied().unwrap_or(0);
        let before = Span::new(start, byte).of(self.text);
        // A byte-order mark takes no room in an editor.
        let before = if start == 0 { before.trim_start_matches('\u{feff}') } else { before };
        // A place behind the end of a CRLF line stands behind what can be seen of it.
        let ended = byte < self.text.len() && self.text.as_bytes().get(byte) == Some(&b'\n');
        let before = if ended { before.trim_end_matches('\r') } else { before };
        Position { line, column: before.chars().count() + 1, byte }
    }

    /// A line, from 1, without its end and without a byte-order mark; empty past the end.
    pub fn line(&self, line: usize) -> &'a str {
        let start = line.checked_sub(1).and_then(|line| self.starts.get(line)).copied();
        let end = self.starts.get(line).copied().unwrap_or(self.text.len());
        let whole = start.map_or("", |start| Span::new(start, end).of(self.text));
        whole.trim_end_matches('\n').trim_end_matches('\r').trim_start_matches('\u{feff}')
    }
}

#[allow(clippy::unwrap_used, clippy::panic)]
#[cfg(test)]
mod tests {
    use super::*;

    /// Line and column of the `$0` in a text.
    fn of_mark(marked: &str) -> (usize, usize) {
        let offset = marked.find("$0").unwrap();
        let text = marked.replacen("$0", "", 1);
        let position = Index::of(&text).at(offset);
        (position.line, position.column)
    }

    #[test]
    fn lines_and_columns_count_from_one() {
        assert_eq!(of_mark("$0case"), (1, 1));
        assert_eq!(of_mark("case$0\nrun"), (1, 5));
        assert_eq!(of_mark("case\n$0run"), (2, 1));
        assert_eq!(of_mark("case\nrun\n$0"), (3, 1));
        assert_eq!(of_mark("$0"), (1, 1));
        assert_eq!(of_mark("\n\n  a$0b\n"), (3, 4));
    }

    #[test]
    fn columns_count_characters() {
        assert_eq!(of_mark("    ΔT = $05 K"), (1, 10));
        assert_eq!(of_mark("\"🌡\" $0x"), (1, 5));
        assert_eq!(of_mark("e\u{301}$0"), (1, 3), "a combining mark is a character of its own");
        assert_eq!(of_mark("水の$0"), (1, 3));
    }

    #[test]
    fn line_ends_of_either_kind() {
        assert_eq!(of_mark("case\r\n  $0run\r\n"), (2, 3));
        assert_eq!(of_mark("case\r$0\n"), (1, 5));
        assert_eq!(of_mark("case$0\r\n"), (1, 5));
        assert_eq!(of_mark("a\rb$0"), (1, 4), "a lone CR ends no line");
        assert_eq!(Index::of("a\r\nbc\r\n").line(2), "bc");
        assert_eq!(Index::of("a\nbc").line(2), "bc");
        assert_eq!(Index::of("a\n").line(2), "");
        assert_eq!(Index::of("a\n").line(9), "");
        assert_eq!(Index::of("a\n").line(0), "");
    }

    #[test]
    fn a_byte_order_mark_takes_no_column() {
        assert_eq!(of_mark("\u{feff}$0case"), (1, 1));
        assert_eq!(of_mark("\u{feff}ca$0se"), (1, 3));
        assert_eq!(Index::of("\u{feff}case\n").line(1), "case");
    }

    #[test]
    fn any_offset_has_a_position() {
        for text in ["", "é", "a\r\n水\n🌡", "\u{feff}", "\r\n\r\n"] {
            let index = Index::of(text);
            let mut last = index.at(0);
            for offset in 0..text.len() + 3 {
                let position = index.at(offset);
                assert!(position >= last, "{text:?} {offset}");
                assert!(position.line >= 1 && position.column >= 1 && position.byte <= text.len());
                last = position;
            }
        }
    }
}
