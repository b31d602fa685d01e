//! Finds decks in folders.

use super::practice::PRACTICE_FILE;
use super::read::Problem;
use std::path::{Path, PathBuf};

/// The decks at the given paths, sorted and each once: a file as it is, a folder with all `.buoy` files below it. Ignore
/// files are respected; links are not followed. What cannot be looked at is a problem.
pub fn decks(paths: &[PathBuf]) -> (Vec<PathBuf>, Vec<Problem>) {
    let mut found = Vec::new();
    let mut problems = Vec::new();
    for path in paths {
        if path.is_dir() {
            walk(path, &mut found, &mut problems);
        } else {
            // Whether it can be read is found when it is.
            found.push(path.clone());
        }
    }
    found.sort();
    found.dedup();
    (found, problems)
}

fn walk(folder: &Path, found: &mut Vec<PathBuf>, problems: &mut Vec<Problem>) {
    let walker = ignore::WalkBuilder::new(folder).follow_links(false).require_git(false).build();
    for entry in walker {
        match entry {
            Ok(entry) => {
                let is_file = entry.file_type().is_some_and(|kind| kind.is_file());
                let is_deck = entry.path().extension().is_some_and(|extension| extension == "buoy");
                let is_practice = entry.file_name() == PRACTICE_FILE;
                if is_file && is_deck && !is_practice {
                    found.push(entry.into_path());
                }
            }
            Err(error) => problems.push(Problem { path: folder.to_path_buf(), message: error.to_string() }),
        }
    }
}
