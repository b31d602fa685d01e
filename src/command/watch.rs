//! `deckline assess --watch`: checks again whenever a deck changes.

use super::assess::{self, Arguments, Assessment};
use super::terminal::{self, Printed};
use notify::{Event, EventKind, RecommendedWatcher, RecursiveMode, Watcher};
use std::collections::BTreeSet;
use std::path::{Path, PathBuf};
use std::sync::mpsc::{Receiver, RecvTimeoutError, channel};
use std::time::{Duration, Instant};

/// Editors write a file in several steps; a pause this long ends them.
const PAUSE: Duration = Duration::from_millis(150);
/// A check comes this long after the first change at the latest.
const LONGEST_PAUSE: Duration = Duration::from_secs(2);

/// Checks, waits for a change, and checks again, until interrupted or until nobody reads the result.
pub fn run(arguments: &Arguments) -> u8 {
    let (sender, changes) = channel();
    let mut watcher = match notify::recommended_watcher(sender) {
        Ok(watcher) => watcher,
        Err(error) => return terminal::fail(format_args!("files cannot be watched here: {error}")),
    };
    let mut watched: BTreeSet<(PathBuf, bool)> = BTreeSet::new();
    loop {
        let assessment = assess::assess(arguments);
        watch(&mut watcher, &folders(&assessment), &mut watched);
        let (status, printed) = assess::show(&assessment, arguments);
        if printed != Printed::Whole {
            return status;
        }
        if !wait(&changes) {
            return status;
        }
    }
}

/// The folders to watch, and whether with those below them. A folder is watched rather than a file, because editors put
/// a new file in the place of the old one.
fn folders(assessment: &Assessment) -> BTreeSet<(PathBuf, bool)> {
    assessment
        .seen
        .iter()
        .filter_map(|path| {
            let path = path.canonicalize().ok()?;
            if path.is_dir() { Some((path, true)) } else { Some((path.parent()?.to_path_buf(), false)) }
        })
        .collect()
}

fn watch(
    watcher: &mut RecommendedWatcher,
    folders: &BTreeSet<(PathBuf, bool)>,
    watched: &mut BTreeSet<(PathBuf, bool)>,
) {
    for (folder, below) in folders {
        let covered =
            watched.iter().any(|(known, all)| known == folder && (*all || !below) || *all && folder.starts_with(known));
        if covered {
            continue;
        }
        let mode = if *below { RecursiveMode::Recursive } else { RecursiveMode::NonRecursive };
        match watcher.watch(folder, mode) {
            Ok(()) => {
                watched.insert((folder.clone(), *below));
            }
            Err(error) => terminal::complain(format_args!("{} cannot be watched: {error}", folder.display())),
        }
    }
}

/// Waits until decks have changed and the changes have come to rest; false where no change can come any more.
fn wait(changes: &Receiver<notify::Result<Event>>) -> bool {
    loop {
        match changes.recv() {
            Err(_) => return false,
            Ok(event) if concerns_decks(&event) => break,
            Ok(_) => {}
        }
    }
    // Other files may change all the time, and decks too: neither may put the check off for ever.
    let latest = Instant::now() + LONGEST_PAUSE;
    let mut rest = Instant::now() + PAUSE;
    loop {
        match changes.recv_timeout(rest.min(latest).saturating_duration_since(Instant::now())) {
            Err(RecvTimeoutError::Timeout) => return true,
            Err(RecvTimeoutError::Disconnected) => return false,
            Ok(event) if concerns_decks(&event) => rest = Instant::now() + PAUSE,
            Ok(_) => {}
        }
    }
}

fn concerns_decks(event: &notify::Result<Event>) -> bool {
    let is_deck = |path: &Path| path.extension().is_some_and(|extension| extension == "buoy");
    match event {
        // Reading a deck is an event too, and the next check would start it again.
        Ok(event) => !matches!(event.kind, EventKind::Access(_)) && event.paths.iter().any(|path| is_deck(path)),
        // Changes were lost: look.
        Err(_) => true,
    }
}
