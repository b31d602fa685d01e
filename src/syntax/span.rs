//! Where something stands in a text: byte offsets, and the file they count in.

use serde::Serialize;

/// A half-open range of byte offsets. In a syntax tree it counts from the start of the entry that holds it;
/// in a [`Place`] from the start of the file.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Default, Serialize)]
pub struct Span {
    /// First byte.
    pub start: usize,
    /// One past the last byte.
    pub end: usize,
}

impl Span {
    /// The range from `start` up to but not including `end`.
    pub const fn new(start: usize, end: usize) -> Span {
        Span { start, end }
    }

    /// The same range counted from an origin `offset` bytes earlier.
    pub const fn shifted(self, offset: usize) -> Span {
        Span { start: self.start + offset, end: self.end + offset }
    }

    /// The smallest range that holds both.
    pub fn cover(self, other: Span) -> Span {
        Span { start: self.start.min(other.start), end: self.end.max(other.end) }
    }

    /// Whether `offset` lies inside, or just behind the last byte (where a cursor may stand).
    pub const fn touches(self, offset: usize) -> bool {
        self.start <= offset && offset <= self.end
    }

    /// The text of the range; empty if the range does not fit the text.
    pub fn of(self, text: &str) -> &str {
        text.get(self.start..self.end).unwrap_or("")
    }
}

/// The number of a file within one set of decks that are looked at together; the deck itself is file 0.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Default, Serialize)]
pub struct FileId(pub u32);

/// A range of bytes in a file.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Default, Serialize)]
pub struct Place {
    /// Which file.
    pub file: FileId,
    /// Which bytes of it.
    pub span: Span,
}

impl Place {
    /// The range `span` of `file`.
    pub const fn new(file: FileId, span: Span) -> Place {
        Place { file, span }
    }
}
