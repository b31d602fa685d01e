//! What the client has told so far: open documents, folders, settings. A value that never changes: an edit makes the
//! next one, so whoever holds one speaks of one state of all texts.
//!
//! A deck is worked out once for each state that concerns it, by whoever needs it first; others wait for that.

use super::settings::Settings;
use super::text::{self, Encoding};
use crate::syntax::limits::FILE_BYTES;
use crate::syntax::parse_again;
use crate::workspace::overlay::{Buffers, DiskFiles, Overlay, real_path};
use crate::workspace::{Deck, Options, Problem, SourceFile, analyse};
use ropey::Rope;
use std::collections::{BTreeSet, HashMap};
use std::path::{Path, PathBuf};
use std::sync::{Arc, OnceLock};
use tower_lsp::lsp_types::{TextDocumentContentChangeEvent, Url};

/// One state of everything.
#[derive(Clone, Debug, Default)]
pub struct World {
    /// Open documents, by the client's name for them.
    pub documents: HashMap<Url, Document>,
    /// The document that was opened or edited last.
    pub latest: Option<Url>,
    /// The document open at a path.
    paths: HashMap<PathBuf, Url>,
    /// The folders of the workspace.
    pub folders: Vec<PathBuf>,
    /// The settings.
    pub settings: Arc<Settings>,
    /// How positions count.
    pub encoding: Encoding,
    /// Files on disk, kept between states.
    pub disk: Arc<DiskFiles>,
}

/// An open document in one state.
#[derive(Clone, Debug)]
pub struct Document {
    /// The client's name for it.
    pub uri: Url,
    /// The path of its file, or one that no file has.
    pub path: PathBuf,
    /// The client's number for this state.
    pub version: i32,
    /// The text.
    pub text: Rope,
    /// The text parsed, once someone needed it.
    source: Arc<OnceLock<Arc<SourceFile>>>,
    /// An earlier state that was parsed: entries that have not changed are taken over.
    before: Option<Arc<SourceFile>>,
    /// The deck with this document at its head, once someone needed it.
    pub worked_out: Arc<OnceLock<Arc<WorkedOut>>>,
}

/// A deck worked out.
#[derive(Debug)]
pub struct WorkedOut {
    /// The deck; or why it cannot be read.
    pub deck: Result<Deck, Problem>,
    /// The paths it was made from: those that were looked for and not there too.
    pub looked_at: BTreeSet<PathBuf>,
}

impl Document {
    fn parsed(&self) -> Result<Arc<SourceFile>, Problem> {
        if self.text.len_bytes() > FILE_BYTES {
            let message = format!("larger than {} MiB, which no deck is", FILE_BYTES / (1024 * 1024));
            return Err(Problem { path: self.path.clone(), message });
        }
        let parsed = self.source.get_or_init(|| {
            let text: Arc<str> = self.text.to_string().into();
            let none = crate::syntax::tree::Tree::default();
            let tree = parse_again(&text, self.before.as_ref().map_or(&none, |file| &file.tree));
            Arc::new(SourceFile { path: self.path.clone(), tree, text })
        });
        Ok(parsed.clone())
    }
}

impl Buffers for World {
    fn buffer(&self, path: &Path) -> Option<Result<Arc<SourceFile>, Problem>> {
        Some(self.at(path)?.parsed())
    }
}

impl World {
    /// The document open at a path.
    pub fn at(&self, path: &Path) -> Option<&Document> {
        self.documents.get(self.paths.get(path)?)
    }

    /// The next state after a document was opened.
    pub fn open(&mut self, uri: Url, version: i32, text: &str) {
        self.close(&uri);
        let path = path_of(&uri);
        self.latest = Some(uri.clone());
        self.paths.insert(path.clone(), uri.clone());
        self.changed(&path);
        let document = Document {
            uri: uri.clone(),
            path,
            version,
            text: Rope::from_str(text),
            source: Arc::default(),
            before: None,
            worked_out: Arc::default(),
        };
        self.documents.insert(uri, document);
    }

    /// The next state after a document was edited. Nothing happens to one that is not open.
    pub fn edit(&mut self, uri: &Url, version: i32, changes: &[TextDocumentContentChangeEvent]) {
        let encoding = self.encoding;
        let Some(document) = self.documents.get_mut(uri) else { return };
        text::change(&mut document.text, changes, encoding);
        document.version = version;
        if let Some(source) = document.source.get() {
            document.before = Some(source.clone());
        }
        document.source = Arc::default();
        document.worked_out = Arc::default();
        let path = document.path.clone();
        self.latest = Some(uri.clone());
        self.changed(&path);
    }

    /// The next state after a document was closed; gives its path.
    pub fn close(&mut self, uri: &Url) -> Option<PathBuf> {
        let document = self.documents.remove(uri)?;
        if self.paths.get(&document.path) == Some(uri) {
            self.paths.remove(&document.path);
        }
        self.disk.forget(&document.path);
        self.changed(&document.path);
        Some(document.path)
    }

    /// Has every deck worked out again that looked at a path. One that is still being worked out may have.
    pub fn changed(&mut self, path: &Path) {
        for document in self.documents.values_mut() {
            if document.worked_out.get().is_none_or(|worked_out| worked_out.looked_at.contains(path)) {
                document.worked_out = Arc::default();
            }
        }
    }

    /// Has every deck worked out again.
    pub fn all_changed(&mut self) {
        for document in self.documents.values_mut() {
            document.worked_out = Arc::default();
        }
    }

    /// The deck with an open document at its head.
    pub fn worked_out(&self, document: &Document) -> Arc<WorkedOut> {
        document.worked_out.get_or_init(|| Arc::new(self.work_out(&document.path, None))).clone()
    }

    /// The deck at a path.
    pub fn work_out(&self, path: &Path, passing: Option<&Path>) -> WorkedOut {
        let overlay = Overlay::new(self, &self.disk, passing);
        let folder = self.folders.iter().find(|folder| path.starts_with(folder)).cloned();
        let options = Options { practice: self.settings.practice.clone(), folder, today: String::new() };
        let deck = analyse(&overlay, path, &options);
        WorkedOut { deck, looked_at: overlay.looked_at() }
    }

    /// The name of a file in the protocol: the client's own where it has it open.
    pub fn uri(&self, path: &Path) -> Option<Url> {
        match self.at(path) {
            Some(document) => Some(document.uri.clone()),
            None => Url::from_file_path(path).ok(),
        }
    }
}

/// The path of a document. One that is no file gets a path in a folder that does not exist, so that it finds no
/// neighbours.
pub fn path_of(uri: &Url) -> PathBuf {
    match uri.to_file_path() {
        Ok(path) if uri.scheme() == "file" => real_path(&path),
        _ => Path::new("/no-folder").join(uri.as_str().replace(['/', '\\', ':'], "_")),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn uri(name: &str) -> Url {
        Url::parse(&format!("file:///deckline-nowhere/{name}")).expect("a uri")
    }

    #[test]
    fn an_edit_concerns_its_document_and_those_that_looked_at_it() {
        let mut world = World::default();
        world.open(uri("a.buoy"), 1, "include \"shared.buoy\"\n");
        world.open(uri("b.buoy"), 1, "run\n    steady\n");
        world.open(uri("shared.buoy"), 1, "given\n    height = 1 m\n");
        let state = |world: &World, name: &str| world.worked_out(world.documents.get(&uri(name)).expect(name));
        let before = ["a.buoy", "b.buoy", "shared.buoy"].map(|name| state(&world, name));
        world.edit(&uri("shared.buoy"), 2, &[]);
        let after = ["a.buoy", "b.buoy", "shared.buoy"].map(|name| state(&world, name));
        let kept: Vec<bool> = before.iter().zip(&after).map(|(before, after)| Arc::ptr_eq(before, after)).collect();
        assert_eq!(kept, [false, true, false]);
    }

    #[test]
    fn a_document_that_is_no_file_has_no_neighbours() {
        let mut world = World::default();
        let untitled = Url::parse("untitled:Untitled-1").expect("a uri");
        world.open(untitled.clone(), 1, "include \"/etc/hosts.buoy\"\ninclude \"../tmp/a.buoy\"\n");
        let worked_out = world.worked_out(world.documents.get(&untitled).expect("open"));
        let deck = worked_out.deck.as_ref().expect("a deck");
        assert_eq!(deck.files.len(), 1);
        let checks: Vec<&str> = deck.findings.iter().map(|finding| finding.check).collect();
        assert_eq!(checks.iter().filter(|check| check.starts_with("include-")).count(), 2, "{checks:?}");
    }

    /// The offset of a position, worked out the long way round.
    fn naive_offset(text: &str, line: usize, column: usize, encoding: Encoding) -> usize {
        let mut starts = vec![0];
        let bytes = text.as_bytes();
        for (at, byte) in bytes.iter().enumerate() {
            if *byte == b'\n' || (*byte == b'\r' && bytes.get(at + 1) != Some(&b'\n')) {
                starts.push(at + 1);
            }
        }
        let Some(start) = starts.get(line).copied() else { return text.len() };
        let mut units = 0;
        for (at, character) in text[start..].char_indices() {
            units += if encoding == Encoding::Utf8 { character.len_utf8() } else { character.len_utf16() };
            if units > column || character == '\n' || character == '\r' {
                return start + at;
            }
        }
        text.len()
    }

    #[test]
    fn after_thousands_of_edits_text_and_tree_are_those_of_a_fresh_open() {
        let pieces = [
            "",
            "x",
            " ",
            "\n",
            "\r\n",
            "\r",
            "α",
            "🌡",
            "e\u{301}",
            "given\n    T = 3 K\n",
            "run\n",
            "# c\n",
            "\u{2028}",
        ];
        // Numbers that only look random (xorshift, G. Marsaglia, J. Stat. Software 8(14), 2003).
        let mut seed = 0x2545_f491_4f6c_dd1d_u64;
        let mut below = |bound: u64| {
            seed ^= seed << 13;
            seed ^= seed >> 7;
            seed ^= seed << 17;
            seed % bound
        };
        for encoding in [Encoding::Utf8, Encoding::Utf16] {
            let mut world = World { encoding, ..World::default() };
            let mut copy = String::from("given\r\n    a = 1 m\n\nregion b\n    box 1 m by 2 m\n");
            world.open(uri("a.buoy"), 0, &copy);
            for version in 1..3000 {
                let changes: Vec<TextDocumentContentChangeEvent> = (0..1 + below(3))
                    .map(|_| {
                        let mut place = || (below(12) as u32, below(14) as u32);
                        let (from, to) = (place(), place());
                        let piece = pieces[below(pieces.len() as u64) as usize];
                        let start = naive_offset(&copy, from.0 as usize, from.1 as usize, encoding);
                        let end = naive_offset(&copy, to.0 as usize, to.1 as usize, encoding).max(start);
                        copy.replace_range(start..end, piece);
                        let position = |(line, column)| tower_lsp::lsp_types::Position::new(line, column);
                        let range = tower_lsp::lsp_types::Range::new(position(from), position(to));
                        TextDocumentContentChangeEvent { range: Some(range), range_length: None, text: piece.into() }
                    })
                    .collect();
                world.edit(&uri("a.buoy"), version, &changes);
                let document = world.documents.get(&uri("a.buoy")).expect("open");
                assert_eq!(document.text.to_string(), copy, "version {version}");
                // Parsed now and then only, so that entries are taken over across several edits.
                if below(3) == 0 {
                    let parsed = document.parsed().expect("small");
                    let fresh = crate::syntax::parse(&copy);
                    let entries = |tree: &crate::syntax::tree::Tree| {
                        tree.entries.iter().map(|placed| (placed.start, placed.entry.clone())).collect::<Vec<_>>()
                    };
                    assert_eq!(entries(&parsed.tree), entries(&fresh), "version {version}");
                }
            }
        }
    }
}
