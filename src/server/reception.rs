//! What happens to each message as it comes in: edits and all else that changes the state are carried out at once, in
//! the order of their coming; requests get the state they came upon and are answered meanwhile.

use super::abilities::Abilities;
use super::handlers::{ARRIVAL, Handlers};
use super::settings::Settings;
use super::shared::{Outgoing, Shared};
use super::text::Encoding;
use super::world::path_of;
use super::{End, LAST_WORDS, transport, watchdog};
use crate::workspace::overlay::real_path;
use futures::{Sink, SinkExt};
use serde::de::DeserializeOwned;
use serde_json::{Value, json};
use std::io::{BufRead, ErrorKind};
use std::path::PathBuf;
use std::sync::Arc;
use std::sync::mpsc as threads;
use std::task::{Context, Waker};
use tokio::sync::Semaphore;
use tower_lsp::jsonrpc::{Request, Response};
use tower_lsp::lsp_types::*;
use tower_lsp::{ExitedError, LspService};
use tower_service::Service;

/// Most requests that are being answered at a time; a client that sends more waits.
const AT_ONCE: u32 = 256;

/// The reading side of the server.
pub struct Reception {
    shared: Arc<Shared>,
    service: LspService<Handlers>,
    answers: Box<dyn Sink<Response, Error = ExitedError> + Send + Unpin>,
    permits: Arc<Semaphore>,
    ends: threads::Sender<End>,
    stage: Stage,
}

#[derive(Clone, Copy, PartialEq, Eq)]
enum Stage {
    BeforeInitialize,
    Serving,
    ShutDown,
}

impl Reception {
    /// Ready for the first message.
    pub fn new(shared: &Arc<Shared>, ends: threads::Sender<End>) -> Reception {
        let (service, socket) = LspService::new(|client| {
            // Set here and nowhere else.
            let _ = shared.client.set(client);
            Handlers::new(shared.clone())
        });
        let (requests, answers) = socket.split();
        let to_write = shared.clone();
        shared.runtime.spawn(async move {
            use futures::StreamExt;
            let mut requests = requests;
            while let Some(request) = requests.next().await {
                if let Ok(body) = serde_json::to_vec(&request) {
                    let _ = to_write.out.send(Outgoing::Message(body)).await;
                }
            }
        });
        let permits = Arc::new(Semaphore::new(AT_ONCE as usize));
        Reception {
            shared: shared.clone(),
            service,
            answers: Box::new(answers),
            permits,
            ends,
            stage: Stage::BeforeInitialize,
        }
    }

    /// Receives messages until there are no more.
    pub fn receive_all(&mut self, input: &mut impl BufRead) -> End {
        let end = loop {
            match transport::read_message(input) {
                Ok(None) => break End::ClientGone,
                Err(error) if error.kind() == ErrorKind::InvalidData => break End::Broken(error),
                Err(_) => break End::ClientGone,
                Ok(Some(body)) => {
                    if let Some(end) = self.receive(&body) {
                        break end;
                    }
                }
            }
        };
        // The last requests still get their answers.
        let answered = async { tokio::time::timeout(LAST_WORDS, self.permits.acquire_many(AT_ONCE)).await.is_ok() };
        let _ = self.shared.runtime.block_on(answered);
        end
    }

    fn receive(&mut self, body: &[u8]) -> Option<End> {
        let Ok(mut message) = serde_json::from_slice::<Value>(body) else {
            self.refuse(-32700, "This message is no JSON.");
            return None;
        };
        // Some clients send `null` where a method takes no parameters; the framework refuses that.
        if let Some(fields) = message.as_object_mut()
            && fields.get("params").is_some_and(Value::is_null)
        {
            fields.remove("params");
        }
        let method = message.get("method").and_then(Value::as_str).unwrap_or("").to_string();
        if method.is_empty() {
            match serde_json::from_value::<Response>(message) {
                Ok(response) => {
                    let _ = self.shared.runtime.block_on(self.answers.send(response));
                }
                Err(_) => self.refuse(-32600, "This message is neither a request nor an answer."),
            }
            return None;
        }
        if method == "exit" {
            return Some(End::Exit { after_shutdown: self.stage == Stage::ShutDown });
        }
        let is_request = message.get("id").is_some();
        if is_request || method == "$/cancelRequest" {
            self.request(&method, message);
        } else if self.stage == Stage::Serving {
            self.notification(&method, message);
        }
        None
    }

    /// Answers a message that has no number to answer to.
    fn refuse(&self, code: i32, message: &str) {
        let answer = json!({"jsonrpc": "2.0", "id": null, "error": {"code": code, "message": message}});
        let _ = self.shared.out.blocking_send(Outgoing::Message(answer.to_string().into_bytes()));
    }

    fn request(&mut self, method: &str, message: Value) {
        let is_first = method == "initialize" && self.stage == Stage::BeforeInitialize;
        let params = is_first.then(|| message.get("params").cloned().unwrap_or_default());
        let Ok(request) = serde_json::from_value::<Request>(message) else {
            self.refuse(-32600, "This request is not one.");
            return;
        };
        if let Some(params) = params
            && let Ok(params) = serde_json::from_value::<InitializeParams>(params)
        {
            self.initialize(&params);
        }
        if method == "shutdown" && self.stage == Stage::Serving {
            self.stage = Stage::ShutDown;
        }
        // The service is always ready until it is told to exit, which it never is.
        if !self.service.poll_ready(&mut Context::from_waker(Waker::noop())).is_ready() {
            return;
        }
        let answer = ARRIVAL.scope(self.shared.world(), self.service.call(request));
        let out = self.shared.out.clone();
        let send = async move {
            if let Ok(Some(response)) = answer.await
                && let Ok(body) = serde_json::to_vec(&response)
            {
                let _ = out.send(Outgoing::Message(body)).await;
            }
        };
        // What follows these two depends on them.
        if method == "initialize" || method == "shutdown" {
            self.shared.runtime.block_on(send);
            return;
        }
        let Ok(permit) = self.shared.runtime.block_on(self.permits.clone().acquire_owned()) else { return };
        self.shared.runtime.spawn(async move {
            send.await;
            drop(permit);
        });
    }

    fn initialize(&mut self, params: &InitializeParams) {
        self.stage = Stage::Serving;
        let abilities = Abilities::of(params);
        if let Some(process) = abilities.process {
            watchdog::watch(process, self.ends.clone());
        }
        let _ = self.shared.abilities.set(abilities);
        let offered = params.capabilities.general.as_ref().and_then(|general| general.position_encodings.as_deref());
        let encoding = Encoding::agreed(offered);
        let root = params.root_uri.clone();
        let named = params.workspace_folders.clone().unwrap_or_default().into_iter().map(|folder| folder.uri);
        let mut folders: Vec<PathBuf> = named.filter_map(|uri| folder_path(&uri)).collect();
        if folders.is_empty() {
            folders.extend(root.and_then(|uri| folder_path(&uri)));
        }
        let options = params.initialization_options.clone().unwrap_or_default();
        let settings = Settings::from_value(&options, folders.first().map(PathBuf::as_path));
        self.shared.next(|world| {
            world.encoding = encoding;
            world.folders = folders;
            world.settings = Arc::new(settings);
        });
    }

    fn notification(&mut self, method: &str, message: Value) {
        match method {
            "initialized" => self.initialized(),
            "textDocument/didOpen" => self.with(message, Reception::opened),
            "textDocument/didChange" => self.with(message, Reception::edited),
            "textDocument/didClose" => self.with(message, Reception::closed),
            "textDocument/didSave" => {}
            "workspace/didChangeConfiguration" => self.with(message, Reception::configured),
            "workspace/didChangeWatchedFiles" => self.with(message, Reception::files_changed),
            "workspace/didChangeWorkspaceFolders" => self.with(message, Reception::folders_changed),
            "window/workDoneProgress/cancel" => {
                self.with(message, |reception, params: WorkDoneProgressCancelParams| {
                    reception.shared.folder.cancel(&params.token);
                })
            }
            // Others need no answer.
            _ => {}
        }
    }

    /// A notification that does not say what it should is let go by.
    fn with<P: DeserializeOwned>(&mut self, mut message: Value, then: impl FnOnce(&mut Reception, P)) {
        let params = message.get_mut("params").map(Value::take).unwrap_or_default();
        if let Ok(params) = serde_json::from_value(params) {
            then(self, params);
        }
    }

    fn initialized(&self) {
        self.shared.folder.walk();
        let abilities = self.shared.abilities();
        if abilities.watches {
            watchdog::register_watched_files(&self.shared);
        }
    }

    fn opened(&mut self, params: DidOpenTextDocumentParams) {
        let DidOpenTextDocumentParams { text_document: document } = params;
        let path = path_of(&document.uri);
        self.shared.folder.forget(&path);
        self.shared.next(|world| world.open(document.uri, document.version, &document.text));
        self.shared.folder.changed(&path);
    }

    fn edited(&mut self, params: DidChangeTextDocumentParams) {
        let document = params.text_document;
        let path = self.shared.next(|world| {
            world.edit(&document.uri, document.version, &params.content_changes);
            world.documents.get(&document.uri).map(|document| document.path.clone())
        });
        if let Some(path) = path {
            self.shared.folder.changed(&path);
        }
    }

    fn closed(&mut self, params: DidCloseTextDocumentParams) {
        let uri = params.text_document.uri;
        let path = {
            let mut present = self.shared.hold();
            let path = Arc::make_mut(&mut present).close(&uri);
            // While the state is held, so that no findings of the open document come behind.
            if path.is_some() {
                self.shared.push(uri, Vec::new(), None);
            }
            path
        };
        self.shared.changed.notify_all();
        if let Some(path) = path {
            self.shared.folder.changed(&path);
            self.check_if_inside(path);
        }
    }

    /// A closed deck of a folder is still a deck of the folder.
    fn check_if_inside(&self, path: PathBuf) {
        let is_deck = path.extension().is_some_and(|extension| extension == "buoy");
        if is_deck && path.is_file() && self.shared.world().folders.iter().any(|folder| path.starts_with(folder)) {
            self.shared.folder.check(path);
        }
    }

    fn configured(&mut self, params: DidChangeConfigurationParams) {
        if params.settings.is_null() && self.shared.abilities().configuration {
            ask_for_settings(&self.shared);
        } else {
            apply_settings(&self.shared, &params.settings);
        }
    }

    fn files_changed(&mut self, params: DidChangeWatchedFilesParams) {
        for event in params.changes {
            let path = path_of(&event.uri);
            self.shared.next(|world| {
                world.disk.forget(&path);
                // An open document is what the editor says, not the disk; others may include it by its name on disk.
                if world.at(&path).is_none() {
                    world.changed(&path);
                }
            });
            if event.typ == FileChangeType::DELETED {
                if let Some(known) = self.shared.folder.forget(&path) {
                    self.shared.push(known.uri, Vec::new(), None);
                }
            } else if self.shared.world().at(&path).is_none() {
                self.check_if_inside(path.clone());
            }
            self.shared.folder.changed(&path);
        }
    }

    fn folders_changed(&mut self, params: DidChangeWorkspaceFoldersParams) {
        let gone: Vec<PathBuf> = params.event.removed.iter().filter_map(|folder| folder_path(&folder.uri)).collect();
        let come: Vec<PathBuf> = params.event.added.iter().filter_map(|folder| folder_path(&folder.uri)).collect();
        let folders = self.shared.next(|world| {
            world.folders.retain(|folder| !gone.contains(folder));
            world.folders.extend(come);
            world.all_changed();
            world.folders.clone()
        });
        for known in self.shared.folder.forget_outside(&folders) {
            self.shared.push(known.uri, Vec::new(), None);
        }
        self.shared.folder.walk();
    }
}

/// Takes new settings on.
fn apply_settings(shared: &Shared, settings: &Value) {
    shared.next(|world| {
        let first = world.folders.first().map(PathBuf::as_path);
        world.settings = Arc::new(Settings::from_value(settings, first));
        world.all_changed();
    });
    shared.folder.all_changed();
    shared.refresh();
}

/// Asks the client for the settings that it has only said to have changed.
fn ask_for_settings(shared: &Arc<Shared>) {
    let Some(client) = shared.client.get().cloned() else { return };
    let shared = shared.clone();
    shared.runtime.clone().spawn(async move {
        let item = ConfigurationItem { scope_uri: None, section: Some("deckline".into()) };
        if let Ok(settings) = client.configuration(vec![item]).await
            && let Some(settings) = settings.into_iter().next()
        {
            apply_settings(&shared, &settings);
        }
    });
}

fn folder_path(uri: &Url) -> Option<PathBuf> {
    uri.to_file_path().ok().map(|path| real_path(&path))
}
