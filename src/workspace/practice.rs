//! Finds the project folder of a deck, and its house rules.

use super::read::Read;
use std::path::{Path, PathBuf};

/// The name of a file of house rules.
pub const PRACTICE_FILE: &str = "practice.buoy";

/// The folder that nothing is read outside of: that of the repository which holds the deck; else the folder that was
/// given to look through, where the deck lies in it; else the deck's own.
pub fn project_folder(deck: &Path, given: Option<&Path>) -> PathBuf {
    let real = deck.canonicalize().unwrap_or_else(|_| deck.to_path_buf());
    let folder = real.parent().unwrap_or(Path::new("")).to_path_buf();
    if let Some(repository) = folder.ancestors().find(|ancestor| ancestor.join(".git").exists()) {
        return repository.to_path_buf();
    }
    match given.and_then(|given| given.canonicalize().ok()) {
        Some(given) if folder.starts_with(&given) => given,
        _ => folder,
    }
}

/// The nearest practice file in the deck's folder or one above it, up to the project folder.
pub fn practice_file(reader: &dyn Read, deck: &Path, root: &Path) -> Option<PathBuf> {
    let real = reader.real_path(deck).unwrap_or_else(|| deck.to_path_buf());
    real.ancestors()
        .skip(1)
        .take_while(|folder| folder.starts_with(root))
        .map(|folder| folder.join(PRACTICE_FILE))
        .find(|path| reader.exists(path))
}
