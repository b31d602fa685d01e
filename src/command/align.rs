//! `deckline align [PATH..]`: lays decks out. Only white space changes, and no comment is lost.

use super::terminal::{self, complain};
use super::{FAILED, FOUND, SOUND};
use crate::syntax::layout::laid_out;
use crate::workspace::{read::read_text, walk};
use clap::Args;
use std::fs;
use std::io::{self, Write};
use std::path::{Path, PathBuf};

/// Its options.
#[derive(Clone, Debug, Args)]
pub struct Arguments {
    /// Decks, and folders to look through for decks; without any, this folder
    #[arg(value_name = "PATH")]
    pub paths: Vec<PathBuf>,

    /// Change nothing; list the decks that would change, and give 1 where there are any
    #[arg(long)]
    pub check: bool,
}

/// Runs it: lists the decks that were changed, or would be.
pub fn run(arguments: &Arguments) -> u8 {
    let here = [PathBuf::from(".")];
    let (decks, problems) = walk::decks(if arguments.paths.is_empty() { &here } else { &arguments.paths });
    let mut failed = !problems.is_empty();
    for problem in problems {
        complain(problem);
    }
    let mut changed = Vec::new();
    for path in decks {
        match align(&path, arguments.check) {
            Ok(true) => changed.push(path),
            Ok(false) => {}
            Err(message) => {
                complain(format_args!("{}: {message}", path.display()));
                failed = true;
            }
        }
    }
    let status = if failed {
        FAILED
    } else if arguments.check && !changed.is_empty() {
        FOUND
    } else {
        SOUND
    };
    terminal::print(status, |out| changed.iter().try_for_each(|path| writeln!(out, "{}", path.display())))
}

/// Lays one deck out; whether that changes it.
fn align(path: &Path, only_looks: bool) -> Result<bool, String> {
    let text = read_text(path)?;
    let new = laid_out(&text);
    if new == text {
        return Ok(false);
    }
    // Held before anything is written: a layout that touched more than white space would be worse than none.
    if !text.chars().filter(|c| !c.is_whitespace()).eq(new.chars().filter(|c| !c.is_whitespace())) {
        return Err(
            "its layout would change more than white space, which is a fault of this program; left as it is".into()
        );
    }
    if !only_looks {
        replace(path, &new).map_err(|error| format!("cannot be written: {error}"))?;
    }
    Ok(true)
}

/// Puts a text in the place of a file at one stroke, so that no half of it is ever there: written beside it first, with its
/// permissions. A link stays a link; what it leads to is replaced.
fn replace(path: &Path, text: &str) -> io::Result<()> {
    let real = fs::canonicalize(path)?;
    let permissions = fs::metadata(&real)?.permissions();
    if permissions.readonly() {
        return Err(io::Error::from(io::ErrorKind::PermissionDenied));
    }
    let folder = real.parent().unwrap_or(Path::new("."));
    let mut name = std::ffi::OsString::from(".");
    name.push(real.file_name().unwrap_or_default());
    name.push(format!(".{}.new", std::process::id()));
    let beside = folder.join(name);
    let write = || {
        let mut file = fs::OpenOptions::new().write(true).create_new(true).open(&beside)?;
        file.write_all(text.as_bytes())?;
        file.set_permissions(permissions)?;
        file.sync_all()?;
        fs::rename(&beside, &real)
    };
    let written = write();
    if written.is_err() {
        // What was begun is taken away again; that the first error is told matters more than that this succeeds.
        let _ = fs::remove_file(&beside);
    }
    written
}
