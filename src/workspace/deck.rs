//! A deck with everything that is known of it.

use crate::case::Resolution;
use crate::case::model::Case;
use crate::physics::model::Physics;
use crate::syntax::tree::Tree;
use crate::syntax::{FileId, Finding};
use std::path::PathBuf;
use std::sync::Arc;

/// One file: its text and tree.
#[derive(Debug)]
pub struct SourceFile {
    /// Its path, as it is shown.
    pub path: PathBuf,
    /// Its text.
    pub text: Arc<str>,
    /// Its tree.
    pub tree: Tree,
}

/// A deck, the files that it takes in, and what follows from them.
#[derive(Debug)]
pub struct Deck {
    /// The deck itself, its includes in the order met, and the practice file. [`FileId`] counts in this list.
    pub files: Vec<Arc<SourceFile>>,
    /// Everything that does not depend on the point of a sweep.
    pub resolution: Resolution,
    /// The case; at the first point of a sweep.
    pub case: Case,
    /// Its physics.
    pub physics: Physics,
    /// All findings, in the order of their places.
    pub findings: Vec<Finding>,
}

impl Deck {
    /// The file of a number.
    pub fn file(&self, id: FileId) -> Option<&Arc<SourceFile>> {
        self.files.get(id.0 as usize)
    }
}
