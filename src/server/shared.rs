//! What the threads of the server share, and the sending of messages.

use super::abilities::Abilities;
use super::folder::Folder;
use super::world::World;
use serde::Serialize;
use std::sync::{Arc, Condvar, Mutex, MutexGuard, OnceLock, PoisonError};
use tokio::runtime::Handle;
use tokio::sync::mpsc;
use tower_lsp::Client;
use tower_lsp::lsp_types::notification::{Notification, PublishDiagnostics};
use tower_lsp::lsp_types::{Diagnostic, PublishDiagnosticsParams, Url};

/// What goes to the writer.
#[derive(Debug)]
pub enum Outgoing {
    /// The body of a message.
    Message(Vec<u8>),
    /// Nothing more comes.
    End,
}

/// What the threads share.
pub struct Shared {
    /// The present state. Held while it is replaced, and while findings are sent, so that none go out for a state that
    /// is gone.
    world: Mutex<Arc<World>>,
    /// Told when the state changes.
    pub changed: Condvar,
    /// What the client can do; empty before it has said so.
    pub abilities: OnceLock<Abilities>,
    /// The decks of the folders that are not open.
    pub folder: Folder,
    /// Requests to the client.
    pub client: OnceLock<Client>,
    /// Where those wait for their answers.
    pub runtime: Handle,
    /// To the writer.
    pub out: mpsc::Sender<Outgoing>,
}

impl Shared {
    /// Before a client has said anything.
    pub fn new(runtime: Handle, out: mpsc::Sender<Outgoing>) -> Shared {
        Shared {
            world: Mutex::default(),
            changed: Condvar::new(),
            abilities: OnceLock::new(),
            folder: Folder::default(),
            client: OnceLock::new(),
            runtime,
            out,
        }
    }

    /// The present state, held still.
    pub fn hold(&self) -> MutexGuard<'_, Arc<World>> {
        locked(&self.world)
    }

    /// The present state.
    pub fn world(&self) -> Arc<World> {
        self.hold().clone()
    }

    /// Goes on to the next state.
    pub fn next<T>(&self, change: impl FnOnce(&mut World) -> T) -> T {
        let result = change(Arc::make_mut(&mut self.hold()));
        self.changed.notify_all();
        result
    }

    /// What the client can do.
    pub fn abilities(&self) -> Abilities {
        self.abilities.get().cloned().unwrap_or_default()
    }

    /// Sends a notification; waits while the client does not read. Not for asynchronous code.
    pub fn notify<N: Notification>(&self, params: &N::Params) {
        #[derive(Serialize)]
        struct Message<'a, P> {
            jsonrpc: &'static str,
            method: &'static str,
            params: &'a P,
        }
        let message = Message { jsonrpc: "2.0", method: N::METHOD, params };
        if let Ok(body) = serde_json::to_vec(&message) {
            // Fails only once the writer has ended, and then all does.
            let _ = self.out.blocking_send(Outgoing::Message(body));
        }
    }

    /// Pushes findings, to a client that does not pull them.
    pub fn push(&self, uri: Url, mut diagnostics: Vec<Diagnostic>, version: Option<i32>) {
        let abilities = self.abilities();
        if abilities.pulls {
            return;
        }
        if !abilities.related {
            super::diagnostics::without_related(&mut diagnostics);
        }
        self.notify::<PublishDiagnostics>(&PublishDiagnosticsParams { uri, diagnostics, version });
    }

    /// Asks the client, where it can, to pull findings and hints again.
    pub fn refresh(&self) {
        let abilities = self.abilities();
        let Some(client) = self.client.get().cloned() else { return };
        self.runtime.spawn(async move {
            // A client that refuses will find out by itself.
            if abilities.refreshes_findings {
                let _ = client.workspace_diagnostic_refresh().await;
            }
            if abilities.refreshes_hints {
                let _ = client.inlay_hint_refresh().await;
            }
        });
    }
}

/// A lock, also where another thread came to grief holding it: what is guarded is whole at every step.
pub fn locked<T>(mutex: &Mutex<T>) -> MutexGuard<'_, T> {
    mutex.lock().unwrap_or_else(PoisonError::into_inner)
}
