//! The requests that the framework routes: each takes the state it came upon, calls a plain function, and puts the
//! answer into the protocol's form.

use super::abilities::offered;
use super::places::Places;
use super::reports;
use super::shared::Shared;
use super::world::World;
use crate::syntax::FileId;
use std::sync::Arc;
use tower_lsp::jsonrpc::{Error, Result};
use tower_lsp::lsp_types::*;
use tower_lsp::{LanguageServer, async_trait};

tokio::task_local! {
    /// The state that a request came upon.
    pub static ARRIVAL: Arc<World>;
}

/// The file that a request names: the head of its own deck.
pub const OWN: FileId = FileId(0);

/// Answers requests.
pub struct Handlers {
    shared: Arc<Shared>,
}

impl Handlers {
    /// Over what the threads share.
    pub fn new(shared: Arc<Shared>) -> Handlers {
        Handlers { shared }
    }
}

fn arrival() -> Arc<World> {
    ARRIVAL.try_with(Arc::clone).unwrap_or_default()
}

/// Answers off the threads that route messages; a fault in a feature costs the one answer.
async fn away<T: Send + 'static>(answer: impl FnOnce() -> T + Send + 'static) -> Result<T> {
    tokio::task::spawn_blocking(answer).await.map_err(|_| Error::internal_error())
}

/// Answers from the deck of an open document; `None` where it is not open or cannot be read.
async fn on_deck<T: Send + 'static>(
    uri: &Url,
    answer: impl FnOnce(&Places<'_>) -> Option<T> + Send + 'static,
) -> Result<Option<T>> {
    let world = arrival();
    let Some(document) = world.documents.get(uri).cloned() else { return Ok(None) };
    away(move || {
        let worked_out = world.worked_out(&document);
        answer(&Places::new(&world, worked_out.deck.as_ref().ok()?))
    })
    .await
}

#[async_trait]
impl LanguageServer for Handlers {
    async fn initialize(&self, _: InitializeParams) -> Result<InitializeResult> {
        let version = env!("CARGO_PKG_VERSION").to_string();
        Ok(InitializeResult {
            capabilities: offered(arrival().encoding),
            server_info: Some(ServerInfo { name: "deckline".into(), version: Some(version) }),
        })
    }

    async fn shutdown(&self) -> Result<()> {
        Ok(())
    }

    async fn diagnostic(&self, params: DocumentDiagnosticParams) -> Result<DocumentDiagnosticReportResult> {
        let (world, shared) = (arrival(), self.shared.clone());
        let report = away(move || reports::document(&world, &shared, &params)).await?;
        Ok(DocumentDiagnosticReportResult::Report(report))
    }

    async fn workspace_diagnostic(&self, params: WorkspaceDiagnosticParams) -> Result<WorkspaceDiagnosticReportResult> {
        let (world, shared) = (arrival(), self.shared.clone());
        let items = away(move || reports::workspace(&world, &shared, &params.previous_result_ids)).await?;
        Ok(WorkspaceDiagnosticReportResult::Report(WorkspaceDiagnosticReport { items }))
    }
}
