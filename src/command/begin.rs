//! `deckline begin FOLDER`: writes a small working case folder. Nothing that exists is changed.

use super::{SOUND, terminal};
use clap::Args;
use std::fs::{self, OpenOptions};
use std::io::{self, Write};
use std::path::{Path, PathBuf};

/// What is written: name and text.
pub const FILES: [(&str, &str); 2] =
    [("cell.buoy", include_str!("begin/cell.buoy")), ("practice.buoy", include_str!("begin/practice.buoy"))];

/// Its options.
#[derive(Clone, Debug, Args)]
pub struct Arguments {
    /// The folder; made where there is none
    #[arg(value_name = "FOLDER")]
    pub folder: PathBuf,
}

/// Runs it.
pub fn run(arguments: &Arguments) -> u8 {
    let folder = &arguments.folder;
    // Looked at before anything is written, so that a folder is never left with half of it.
    let there: Vec<&str> =
        FILES.iter().map(|(name, _)| *name).filter(|name| folder.join(name).symlink_metadata().is_ok()).collect();
    if !there.is_empty() {
        return terminal::fail(format_args!(
            "{} holds {} already; nothing was written",
            folder.display(),
            there.join(" and ")
        ));
    }
    if let Err(error) = fs::create_dir_all(folder) {
        return terminal::fail(format_args!("the folder {} cannot be made: {error}", folder.display()));
    }
    for (name, text) in FILES {
        if let Err(error) = write_new(&folder.join(name), text) {
            return terminal::fail(format_args!("{} cannot be written: {error}", folder.join(name).display()));
        }
    }
    terminal::print(SOUND, |out| {
        for (name, _) in FILES {
            writeln!(out, "{}", folder.join(name).display())?;
        }
        Ok(())
    })
}

fn write_new(path: &Path, text: &str) -> io::Result<()> {
    OpenOptions::new().write(true).create_new(true).open(path)?.write_all(text.as_bytes())
}
