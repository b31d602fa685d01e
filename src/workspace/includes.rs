//! Takes in the files that a deck includes.
//!
//! An include stays inside the deck's project folder, names a `.buoy` file, and comes no deeper and no more often
//! than the limits here.

use super::deck::SourceFile;
use super::read::Read;
use crate::syntax::tree::{Expression, ExpressionKind};
use crate::syntax::{FileId, Finding, Level, Place};
use crate::vocabulary::EntryKind;
use std::path::{Component, Path, PathBuf};
use std::sync::Arc;

/// Deepest chain of includes.
pub const INCLUDE_DEPTH: usize = 16;
/// Most files of one deck.
pub const INCLUDE_FILES: usize = 256;

/// A deck's own file and all that it takes in, each once, and what was found on the way.
#[derive(Debug, Default)]
pub struct Loaded {
    /// The files; the deck's own first.
    pub files: Vec<Arc<SourceFile>>,
    /// What was found.
    pub findings: Vec<Finding>,
}

/// An include waiting to be followed.
struct Waiting {
    from: FileId,
    place: Place,
    written: String,
    /// The files from the deck down to the one that includes, to tell a circle.
    chain: Vec<PathBuf>,
}

/// Loads a deck and what it includes. `root` is the folder that nothing is read outside of.
pub fn load(reader: &dyn Read, deck: Arc<SourceFile>, root: &Path) -> Loaded {
    let mut loaded = Loaded::default();
    let mut known: Vec<PathBuf> = vec![real(reader, &deck.path)];
    let mut waiting: Vec<Waiting> = Vec::new();
    push_includes(&deck, FileId(0), vec![real(reader, &deck.path)], &mut waiting);
    loaded.files.push(deck);
    let root = real(reader, root);
    while let Some(next) = waiting.pop() {
        let Some(from) = loaded.files.get(next.from.0 as usize) else { continue };
        match target(reader, &from.path, &next, &root) {
            Err(finding) => loaded.findings.push(*finding),
            Ok(path) if next.chain.contains(&path) => {
                let message = format!("`{}` comes to include itself this way.", shown(&path));
                loaded.findings.push(Finding::new("include-circular", Level::Error, next.place, message));
            }
            Ok(path) if known.contains(&path) => {}
            Ok(path) => {
                if next.chain.len() > INCLUDE_DEPTH || known.len() >= INCLUDE_FILES {
                    let message =
                        format!("Includes go {INCLUDE_DEPTH} deep and take in {INCLUDE_FILES} files at most.");
                    loaded.findings.push(Finding::new("include-too-deep", Level::Error, next.place, message));
                    continue;
                }
                match reader.read(&path) {
                    Err(problem) => {
                        let message = format!("`{}` cannot be read: {}.", next.written, problem.message);
                        loaded.findings.push(Finding::new("include-not-found", Level::Error, next.place, message));
                    }
                    Ok(file) => {
                        #[expect(clippy::cast_possible_truncation, reason = "bounded by INCLUDE_FILES")]
                        let id = FileId(loaded.files.len() as u32);
                        let mut chain = next.chain.clone();
                        chain.push(path.clone());
                        known.push(path);
                        push_includes(&file, id, chain, &mut waiting);
                        loaded.files.push(file);
                    }
                }
            }
        }
    }
    loaded
}

fn real(reader: &dyn Read, path: &Path) -> PathBuf {
    reader.real_path(path).unwrap_or_else(|| path.to_path_buf())
}

fn push_includes(file: &SourceFile, id: FileId, chain: Vec<PathBuf>, waiting: &mut Vec<Waiting>) {
    let mut found: Vec<Waiting> = include_paths(file)
        .map(|(place, written)| Waiting {
            from: id,
            place: Place::new(id, place.span),
            written: written.to_string(),
            chain: chain.clone(),
        })
        .collect();
    // Taken from the end, so the first is followed first.
    found.reverse();
    waiting.append(&mut found);
}

/// The paths that a file includes, as written, with their places (file 0).
pub fn include_paths(file: &SourceFile) -> impl Iterator<Item = (Place, &str)> {
    file.tree.entries.iter().filter_map(|placed| {
        let phrase = placed.entry.head_phrase()?;
        if &*phrase.word.text != EntryKind::Include.word() {
            return None;
        }
        match phrase.arguments.first() {
            Some(Expression { kind: ExpressionKind::Text(path), span }) => {
                Some((Place::new(FileId(0), span.shifted(placed.start)), &**path))
            }
            _ => None,
        }
    })
}

fn target(reader: &dyn Read, from: &Path, include: &Waiting, root: &Path) -> Result<PathBuf, Box<Finding>> {
    let finding = |check, message: String| Box::new(Finding::new(check, Level::Error, include.place, message));
    let written = Path::new(&include.written);
    if written.is_absolute() || include.written.contains('\\') || include.written.contains(':') {
        let message = "The path of an include is relative to this file, with `/` between folders.";
        return Err(finding("include-outside", message.into()));
    }
    if written.extension().is_none_or(|extension| extension != "buoy") {
        return Err(finding(
            "include-not-found",
            format!("`{}` is no deck: includes end in `.buoy`.", include.written),
        ));
    }
    let folder = from.parent().unwrap_or(Path::new(""));
    // Decided from the path as written first, so that a path out of the project is not even looked for.
    let plain = normalised(&real(reader, folder).join(written));
    let outside = |path: &Path| !path.starts_with(root);
    let says_outside = || {
        finding(
            "include-outside",
            format!("`{}` lies outside the project folder, and nothing outside it is read.", include.written),
        )
    };
    if outside(&plain) {
        return Err(says_outside());
    }
    let Some(path) = reader.real_path(&plain).filter(|path| reader.exists(path)) else {
        return Err(finding("include-not-found", format!("There is no file `{}`.", include.written)));
    };
    // A link may still lead out.
    if outside(&path) { Err(says_outside()) } else { Ok(path) }
}

/// The path with `.` and `..` worked out by its text alone.
pub fn normalised(path: &Path) -> PathBuf {
    let mut plain = PathBuf::new();
    for component in path.components() {
        match component {
            Component::CurDir => {}
            Component::ParentDir => {
                plain.pop();
            }
            other => plain.push(other),
        }
    }
    plain
}

fn shown(path: &Path) -> String {
    path.file_name().map_or_else(|| path.display().to_string(), |name| name.to_string_lossy().into_owned())
}
