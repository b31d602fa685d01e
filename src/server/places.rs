//! Places in the files of a deck as the protocol's ranges and locations, and back.

use super::text;
use super::world::World;
use crate::syntax::{Edit, FileId, Place, Span};
use crate::workspace::Deck;
use ropey::Rope;
use std::cell::OnceCell;
use std::collections::HashMap;
use tower_lsp::lsp_types::{Location, Position, Range, TextEdit, Url};

/// The texts of a deck's files, for counting in.
pub struct Places<'a> {
    /// The state that the deck belongs to.
    pub world: &'a World,
    /// The deck.
    pub deck: &'a Deck,
    texts: Vec<OnceCell<Rope>>,
}

impl<'a> Places<'a> {
    /// For the files of `deck`, worked out in `world`.
    pub fn new(world: &'a World, deck: &'a Deck) -> Places<'a> {
        Places { world, deck, texts: vec![OnceCell::new(); deck.files.len()] }
    }

    /// The text of a file: that of the open document where there is one, which costs nothing.
    fn text(&self, file: FileId) -> Option<&Rope> {
        let index = file.0 as usize;
        let source = self.deck.files.get(index)?;
        Some(self.texts.get(index)?.get_or_init(|| match self.world.at(&source.path) {
            Some(document) => document.text.clone(),
            None => Rope::from_str(&source.text),
        }))
    }

    /// The range of a place in its file.
    pub fn range(&self, place: Place) -> Option<Range> {
        Some(text::range(self.text(place.file)?, place.span, self.world.encoding))
    }

    /// The range of a span of a file.
    pub fn span(&self, file: FileId, span: Span) -> Option<Range> {
        self.range(Place::new(file, span))
    }

    /// The position of an offset in a file.
    pub fn position(&self, file: FileId, offset: usize) -> Option<Position> {
        Some(text::position(self.text(file)?, offset, self.world.encoding))
    }

    /// The offset of a position in a file.
    pub fn offset(&self, file: FileId, position: Position) -> Option<usize> {
        Some(text::offset(self.text(file)?, position, self.world.encoding))
    }

    /// The span of a range in a file.
    pub fn span_of(&self, file: FileId, range: Range) -> Option<Span> {
        Some(text::span(self.text(file)?, range, self.world.encoding))
    }

    /// The protocol's name of a file.
    pub fn uri(&self, file: FileId) -> Option<Url> {
        self.world.uri(&self.deck.file(file)?.path)
    }

    /// A place as the protocol names it.
    pub fn location(&self, place: Place) -> Option<Location> {
        Some(Location { uri: self.uri(place.file)?, range: self.range(place)? })
    }

    /// Edits in the protocol's form, by document.
    pub fn edits(&self, edits: &[Edit]) -> HashMap<Url, Vec<TextEdit>> {
        let mut by_document: HashMap<Url, Vec<TextEdit>> = HashMap::new();
        for edit in edits {
            if let (Some(uri), Some(range)) = (self.uri(edit.file), self.span(edit.file, edit.span)) {
                by_document.entry(uri).or_default().push(TextEdit { range, new_text: edit.text.clone() });
            }
        }
        by_document
    }

    /// Edits of one file.
    pub fn edits_of(&self, file: FileId, edits: &[Edit]) -> Vec<TextEdit> {
        edits
            .iter()
            .filter(|edit| edit.file == file)
            .filter_map(|edit| Some(TextEdit { range: self.span(file, edit.span)?, new_text: edit.text.clone() }))
            .collect()
    }
}
