//! The language server: messages in, plain calls, messages out. Nothing else knows the protocol.
//!
//! ```text
//! reader thread    reads messages; applies edits at once, in order; hands requests on, each with the state it came upon
//! analyst thread   works open decks out after every edit and pushes findings
//! folder thread    works the folders' closed decks out in the background
//! request tasks    answer requests from the state they came upon
//! writer thread    writes messages
//! ```
//!
//! The framework routes requests and their answers. Its own loop over standard input is not used: it polls handlers of
//! several messages at a time, so that edits can overtake one another, and does not end on `exit`.

mod abilities;
mod across;
mod analyst;
mod changes;
mod completing;
mod diagnostics;
mod folder;
mod handlers;
mod places;
mod progress;
mod reading;
mod reception;
mod reports;
mod settings;
mod shared;
mod symbols;
mod text;
mod tokens;
mod transport;
mod watchdog;
mod world;

use reception::Reception;
use shared::{Outgoing, Shared};
use std::io::{self, BufReader, Read, Write};
use std::sync::Arc;
use std::sync::mpsc as threads;
use std::thread;
use std::time::Duration;
use tokio::sync::mpsc;

/// Messages that wait for the writer before whoever sends the next one waits too.
const OUTGOING: usize = 256;
/// How long the answers to the last requests are waited for, and then the writer.
const LAST_WORDS: Duration = Duration::from_secs(2);

/// Why the server ends.
#[derive(Debug)]
pub(crate) enum End {
    /// The client said `exit`; before that `shutdown`, as it should, or not.
    Exit {
        /// Whether it did.
        after_shutdown: bool,
    },
    /// The input or output was closed, or the client's process is gone.
    ClientGone,
    /// What comes in is no message.
    Broken(io::Error),
}

/// Serves a client on standard input and output until it says `exit`, closes them, or its process is gone.
///
/// # Errors
/// Where the client says `exit` without `shutdown`, or sends what is no message.
pub fn serve() -> io::Result<()> {
    serve_on(io::stdin(), io::stdout())
}

/// Serves a client on any two streams. Threads that wait for input that never comes are left behind, for the end of the
/// process to end.
///
/// # Errors
/// As [`serve`].
pub fn serve_on(input: impl Read + Send + 'static, output: impl Write + Send + 'static) -> io::Result<()> {
    let runtime =
        tokio::runtime::Builder::new_multi_thread().worker_threads(2).max_blocking_threads(4).enable_time().build()?;
    let (out, to_write) = mpsc::channel(OUTGOING);
    let shared = Arc::new(Shared::new(runtime.handle().clone(), out));
    let (ends, ended) = threads::channel();
    let writer = {
        let ends = ends.clone();
        thread::Builder::new().name("writer".into()).spawn(move || write(to_write, output, &ends))?
    };
    let mut reception = Reception::new(&shared, ends.clone());
    spawn("analyst", &shared, analyst::run)?;
    spawn("folder", &shared, folder::run)?;
    thread::Builder::new().name("reader".into()).spawn(move || {
        let end = reception.receive_all(&mut BufReader::with_capacity(64 * 1024, input));
        // The other side is gone only when the server has ended already.
        let _ = ends.send(end);
    })?;
    let end = ended.recv().unwrap_or(End::ClientGone);
    shared.runtime.block_on(async {
        let _ = tokio::time::timeout(LAST_WORDS, shared.out.send(Outgoing::End)).await;
    });
    let begun = std::time::Instant::now();
    while !writer.is_finished() && begun.elapsed() < LAST_WORDS {
        thread::sleep(Duration::from_millis(1));
    }
    runtime.shutdown_background();
    match end {
        End::Exit { after_shutdown: true } | End::ClientGone => Ok(()),
        End::Exit { after_shutdown: false } => Err(io::Error::other("the client left without a word")),
        End::Broken(error) => Err(error),
    }
}

fn spawn(name: &str, shared: &Arc<Shared>, run: fn(&Shared)) -> io::Result<()> {
    let shared = shared.clone();
    thread::Builder::new().name(name.into()).spawn(move || run(&shared)).map(drop)
}

fn write(mut to_write: mpsc::Receiver<Outgoing>, mut output: impl Write, ends: &threads::Sender<End>) {
    while let Some(Outgoing::Message(body)) = to_write.blocking_recv() {
        if transport::write_message(&mut output, &body).is_err() {
            let _ = ends.send(End::ClientGone);
            return;
        }
    }
}
