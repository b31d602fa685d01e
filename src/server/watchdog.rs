//! Watches what lies outside the stream of messages: the client's process, and files on disk.

use super::End;
use super::shared::Shared;
use std::sync::mpsc::Sender;
use std::thread;
use std::time::Duration;
use tower_lsp::lsp_types::{DidChangeWatchedFilesRegistrationOptions, FileSystemWatcher, GlobPattern, Registration};

/// How often the client's process is looked for.
const EVERY: Duration = Duration::from_secs(2);

/// Ends the server when the client's process is gone: some clients end without closing the pipes, which their children
/// may still hold open.
pub fn watch(process: u32, ends: Sender<End>) {
    // Without this thread the server ends with its input, as nearly always.
    let _ = thread::Builder::new().name("watchdog".into()).spawn(move || {
        while is_running(process) {
            thread::sleep(EVERY);
        }
        let _ = ends.send(End::ClientGone);
    });
}

/// Whether a process is there; yes where that cannot be found out.
#[cfg(unix)]
fn is_running(process: u32) -> bool {
    use rustix::process::{Pid, test_kill_process};
    let Some(id) = i32::try_from(process).ok().and_then(Pid::from_raw) else { return true };
    // Not to be allowed to signal it means that it is there.
    !matches!(test_kill_process(id), Err(rustix::io::Errno::SRCH))
}

/// Whether a process is there; yes where that cannot be found out.
#[cfg(not(unix))]
fn is_running(_process: u32) -> bool {
    true
}

/// Asks the client to tell of decks that change on disk.
pub fn register_watched_files(shared: &Shared) {
    let Some(client) = shared.client.get().cloned() else { return };
    let watcher = FileSystemWatcher { glob_pattern: GlobPattern::String("**/*.buoy".into()), kind: None };
    let options = DidChangeWatchedFilesRegistrationOptions { watchers: vec![watcher] };
    let registration = Registration {
        id: "decks".into(),
        method: "workspace/didChangeWatchedFiles".into(),
        register_options: serde_json::to_value(options).ok(),
    };
    shared.runtime.spawn(async move {
        // A client that refuses will not tell; decks are then read again when they are opened or included.
        let _ = client.register_capability(vec![registration]).await;
    });
}

#[cfg(all(test, unix))]
mod tests {
    use super::is_running;

    #[test]
    fn a_process_is_seen_to_run_and_to_be_gone() {
        assert!(is_running(std::process::id()));
        let mut child = std::process::Command::new("true").spawn().expect("a process");
        let id = child.id();
        child.wait().expect("its end");
        assert!(!is_running(id));
    }
}
