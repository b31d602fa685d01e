//! Reads files, within bounds.

use super::deck::SourceFile;
use crate::syntax::limits::FILE_BYTES;
use crate::syntax::parse;
use std::io::Read as _;
use std::path::{Path, PathBuf};
use std::sync::Arc;

/// Why a file could not be read.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{}: {message}", path.display())]
pub struct Problem {
    /// Which file.
    pub path: PathBuf,
    /// Why.
    pub message: String,
}

/// Where files come from: the disk, or an editor's open buffers before it.
pub trait Read: Sync {
    /// The file at a path, parsed.
    ///
    /// # Errors
    /// Says why it cannot be had.
    fn read(&self, path: &Path) -> Result<Arc<SourceFile>, Problem>;

    /// Whether there is a file at a path.
    fn exists(&self, path: &Path) -> bool;

    /// The path with links followed, so that one file has one path.
    fn real_path(&self, path: &Path) -> Option<PathBuf>;
}

/// Files on disk.
#[derive(Clone, Copy, Debug, Default)]
pub struct Disk;

impl Read for Disk {
    fn read(&self, path: &Path) -> Result<Arc<SourceFile>, Problem> {
        let problem = |message: String| Problem { path: path.to_path_buf(), message };
        let text = read_text(path).map_err(problem)?;
        Ok(Arc::new(SourceFile { path: path.to_path_buf(), tree: parse(&text), text: text.into() }))
    }

    fn exists(&self, path: &Path) -> bool {
        path.is_file()
    }

    fn real_path(&self, path: &Path) -> Option<PathBuf> {
        path.canonicalize().ok()
    }
}

/// The text of a file on disk.
///
/// # Errors
/// Says why there is none: it cannot be opened, is no plain file, is too large, or is not UTF-8.
pub fn read_text(path: &Path) -> Result<String, String> {
    // A pipe or device could block or never end, so only plain files are opened.
    let about = std::fs::metadata(path).map_err(|error| in_words(&error))?;
    if !about.is_file() {
        return Err("not a plain file".into());
    }
    let file = std::fs::File::open(path).map_err(|error| in_words(&error))?;
    let limit = FILE_BYTES as u64;
    let mut bytes = Vec::new();
    file.take(limit + 1).read_to_end(&mut bytes).map_err(|error| in_words(&error))?;
    if bytes.len() > FILE_BYTES {
        return Err(format!("larger than {} MiB, which no deck is", FILE_BYTES / (1024 * 1024)));
    }
    String::from_utf8(bytes).map_err(|error| {
        let at = error.utf8_error().valid_up_to();
        let line = error.as_bytes().iter().take(at).filter(|byte| **byte == b'\n').count() + 1;
        format!("not UTF-8 text (line {line})")
    })
}

fn in_words(error: &std::io::Error) -> String {
    match error.kind() {
        std::io::ErrorKind::NotFound => "no such file".into(),
        std::io::ErrorKind::PermissionDenied => "may not be read (permission denied)".into(),
        _ => error.to_string(),
    }
}
