//! The decks of the workspace's folders that are not open: worked out one after another in the background, of which
//! only the findings, the names and the paths looked at are kept.

use super::diagnostics;
use super::places::Places;
use super::progress::Progress;
use super::shared::{Shared, locked};
use super::world::{WorkedOut, World};
use crate::workspace::practice::PRACTICE_FILE;
use crate::workspace::walk;
use std::collections::{BTreeMap, BTreeSet, HashMap};
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::path::{Path, PathBuf};
use std::sync::{Arc, Condvar, Mutex, PoisonError};
use std::time::{Duration, Instant};
use tower_lsp::lsp_types::{Diagnostic, SymbolInformation, Url};

/// How long a file that others include must rest before those are worked out again.
const REST: Duration = Duration::from_millis(300);

/// What is known of closed decks, and what is still to be done.
#[derive(Default)]
pub struct Folder {
    state: Mutex<State>,
    wake: Condvar,
}

#[derive(Default)]
struct State {
    closed: BTreeMap<PathBuf, Closed>,
    /// For each path, the closed decks that looked at it: an edit asks for it, so it must not take a walk through all.
    users: HashMap<Arc<Path>, BTreeSet<PathBuf>>,
    to_walk: bool,
    waiting: BTreeSet<PathBuf>,
    not_before: Option<Instant>,
    /// What has changed since the deck was begun that is being worked out now.
    changed_meanwhile: Vec<PathBuf>,
    progress: Option<Progress>,
    has_news: bool,
}

/// What is kept of a closed deck.
#[derive(Clone, Debug)]
pub struct Closed {
    /// Its name in the protocol.
    pub uri: Url,
    /// What was found.
    pub diagnostics: Arc<[Diagnostic]>,
    /// A text that is the same for the same findings.
    pub result_id: String,
    /// What it defines.
    pub symbols: Arc<[SymbolInformation]>,
    /// The paths it was made from.
    looked_at: Arc<[Arc<Path>]>,
}

impl Folder {
    /// Looks through the folders again.
    pub fn walk(&self) {
        locked(&self.state).to_walk = true;
        self.wake.notify_all();
    }

    /// Works a deck out again, soon.
    pub fn check(&self, path: PathBuf) {
        locked(&self.state).waiting.insert(path);
        self.wake.notify_all();
    }

    /// A file has changed: works out again what looked at it, once it has come to rest.
    pub fn changed(&self, path: &Path) {
        let mut state = locked(&self.state);
        state.changed_meanwhile.push(path.to_path_buf());
        let users = state.users.get(path).into_iter().flatten();
        let concerned: Vec<PathBuf> = users.filter(|own| own.as_path() != path).cloned().collect();
        if !concerned.is_empty() {
            state.waiting.extend(concerned);
            state.not_before = Some(Instant::now() + REST);
            self.wake.notify_all();
        }
    }

    /// Works every known deck out again.
    pub fn all_changed(&self) {
        let mut state = locked(&self.state);
        let all: Vec<PathBuf> = state.closed.keys().cloned().collect();
        state.waiting.extend(all);
        self.wake.notify_all();
    }

    /// Knows nothing of a deck any more; says whether it did.
    pub fn forget(&self, path: &Path) -> Option<Closed> {
        let mut state = locked(&self.state);
        state.waiting.remove(path);
        state.forget(path)
    }

    /// Knows nothing any more of the decks outside these folders; gives them.
    pub fn forget_outside(&self, folders: &[PathBuf]) -> Vec<Closed> {
        let mut state = locked(&self.state);
        let is_inside = |path: &Path| folders.iter().any(|folder| path.starts_with(folder));
        let outside: Vec<PathBuf> = state.closed.keys().filter(|path| !is_inside(path)).cloned().collect();
        state.waiting.retain(|path| is_inside(path));
        outside.iter().filter_map(|path| state.forget(path)).collect()
    }

    /// Stops what is being done, if the client means this.
    pub fn cancel(&self, token: &tower_lsp::lsp_types::NumberOrString) {
        let mut state = locked(&self.state);
        if state.progress.as_ref().is_some_and(|progress| progress.is(token)) {
            state.waiting.clear();
        }
    }

    /// What is known of all closed decks.
    pub fn all(&self) -> Vec<Closed> {
        locked(&self.state).closed.values().cloned().collect()
    }

    /// What is known of the closed deck at a path.
    pub fn at(&self, path: &Path) -> Option<Closed> {
        locked(&self.state).closed.get(path).cloned()
    }

    /// The closed decks that looked at a path.
    pub fn that_looked_at(&self, path: &Path) -> Vec<PathBuf> {
        let state = locked(&self.state);
        state.users.get(path).into_iter().flatten().cloned().collect()
    }
}

impl State {
    /// Knows this of a deck from now on; gives what was known before.
    fn know(&mut self, path: PathBuf, mut known: Closed) -> Option<Closed> {
        let before = self.forget(&path);
        // One copy of each path, however many decks look at it.
        let shared =
            |seen: &Arc<Path>| self.users.get_key_value(seen).map_or_else(|| seen.clone(), |(it, _)| it.clone());
        known.looked_at = known.looked_at.iter().map(shared).collect();
        for seen in known.looked_at.iter() {
            self.users.entry(seen.clone()).or_default().insert(path.clone());
        }
        self.closed.insert(path, known);
        before
    }

    fn forget(&mut self, path: &Path) -> Option<Closed> {
        let known = self.closed.remove(path)?;
        for seen in known.looked_at.iter() {
            if let Some(users) = self.users.get_mut(seen) {
                users.remove(path);
                if users.is_empty() {
                    self.users.remove(seen);
                }
            }
        }
        Some(known)
    }
}

/// Works closed decks out for ever.
pub fn run(shared: &Shared) {
    let folder = &shared.folder;
    loop {
        let next = {
            let mut state = locked(&folder.state);
            loop {
                if std::mem::take(&mut state.to_walk) {
                    break None;
                }
                let wait = state.not_before.map_or(Duration::ZERO, |at| at.saturating_duration_since(Instant::now()));
                if wait.is_zero()
                    && let Some(path) = state.waiting.pop_first()
                {
                    state.changed_meanwhile.clear();
                    break Some(path);
                }
                if state.waiting.is_empty() {
                    state.progress = None;
                    if std::mem::take(&mut state.has_news) {
                        drop(state);
                        shared.refresh();
                        state = locked(&folder.state);
                        continue;
                    }
                    state = folder.wake.wait(state).unwrap_or_else(PoisonError::into_inner);
                } else {
                    state = folder.wake.wait_timeout(state, wait).unwrap_or_else(PoisonError::into_inner).0;
                }
            }
        };
        match next {
            None => walk_through(shared),
            Some(path) => check(shared, path),
        }
    }
}

/// Lists the decks of the folders, and starts to work them out.
fn walk_through(shared: &Shared) {
    let world = shared.world();
    let (decks, _) = walk::decks(&world.folders);
    let practices: BTreeSet<PathBuf> = decks
        .iter()
        .filter_map(|deck| deck.parent())
        .map(|folder| folder.join(PRACTICE_FILE))
        .filter(|path| path.is_file())
        .collect();
    let mut state = locked(&shared.folder.state);
    state.waiting.extend(decks);
    state.waiting.extend(practices);
    state.progress = Progress::begin(shared, state.waiting.len());
}

fn check(shared: &Shared, path: PathBuf) {
    let world = shared.world();
    let known = if world.at(&path).is_some() {
        None
    } else {
        // A fault in one deck must not keep others from being worked out.
        catch_unwind(AssertUnwindSafe(|| closed(&world, &path))).ok().flatten()
    };
    // Held until the findings are sent: a document that is opened now sends its own after these.
    let present = shared.hold();
    let mut state = locked(&shared.folder.state);
    let left = state.waiting.len();
    if let Some(progress) = &mut state.progress {
        progress.report(left);
    }
    let Some(known) = known.filter(|_| present.at(&path).is_none()) else { return };
    if state.changed_meanwhile.iter().any(|changed| known.looked_at.iter().any(|seen| **seen == **changed)) {
        state.waiting.insert(path.clone());
    }
    let before = state.know(path, known.clone());
    if before.is_none_or(|before| before.result_id != known.result_id) {
        state.has_news = true;
        drop(state);
        shared.push(known.uri, known.diagnostics.to_vec(), None);
    }
}

/// What is kept of the deck at a path; `None` where there is no file any more.
fn closed(world: &World, path: &Path) -> Option<Closed> {
    if !path.is_file() {
        return None;
    }
    let uri = Url::from_file_path(path).ok()?;
    let worked_out: WorkedOut = world.work_out(path, Some(path));
    let diagnostics = diagnostics::of(world, &worked_out);
    let symbols = match &worked_out.deck {
        Ok(deck) => super::symbols::of_workspace(&Places::new(world, deck)),
        Err(_) => Vec::new(),
    };
    Some(Closed {
        uri,
        result_id: diagnostics::result_id(&diagnostics),
        diagnostics: diagnostics.into(),
        symbols: symbols.into(),
        looked_at: worked_out.looked_at.into_iter().map(Arc::from).collect(),
    })
}
