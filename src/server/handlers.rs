//! The requests that the framework routes: each takes the state it came upon, calls a plain function, and puts the
//! answer into the protocol's form.

use super::abilities::offered;
use super::places::Places;
use super::shared::Shared;
use super::world::World;
use super::{across, changes, completing, reading, reports, symbols, tokens};
use crate::syntax::FileId;
use std::sync::Arc;
use tower_lsp::jsonrpc::{Error, ErrorCode, Result};
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
    sent_tokens: Arc<tokens::Sent>,
}

impl Handlers {
    /// Over what the threads share.
    pub fn new(shared: Arc<Shared>) -> Handlers {
        Handlers { shared, sent_tokens: Arc::default() }
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

    async fn completion(&self, params: CompletionParams) -> Result<Option<CompletionResponse>> {
        let TextDocumentPositionParams { text_document, position } = params.text_document_position;
        let with_snippets = self.shared.abilities().snippets;
        let answer = move |places: &Places<'_>| completing::complete(places, position, with_snippets);
        Ok(on_deck(&text_document.uri, answer).await?.map(CompletionResponse::List))
    }

    async fn hover(&self, params: HoverParams) -> Result<Option<Hover>> {
        let TextDocumentPositionParams { text_document, position } = params.text_document_position_params;
        on_deck(&text_document.uri, move |places| reading::hover(places, position)).await
    }

    async fn signature_help(&self, params: SignatureHelpParams) -> Result<Option<SignatureHelp>> {
        let TextDocumentPositionParams { text_document, position } = params.text_document_position_params;
        on_deck(&text_document.uri, move |places| reading::signature(places, position)).await
    }

    async fn inlay_hint(&self, params: InlayHintParams) -> Result<Option<Vec<InlayHint>>> {
        if !arrival().settings.hints {
            return Ok(None);
        }
        on_deck(&params.text_document.uri, move |places| reading::hints(places, params.range)).await
    }

    async fn document_link(&self, params: DocumentLinkParams) -> Result<Option<Vec<DocumentLink>>> {
        on_deck(&params.text_document.uri, reading::links).await
    }

    async fn folding_range(&self, params: FoldingRangeParams) -> Result<Option<Vec<FoldingRange>>> {
        on_deck(&params.text_document.uri, reading::folds).await
    }

    async fn selection_range(&self, params: SelectionRangeParams) -> Result<Option<Vec<SelectionRange>>> {
        on_deck(&params.text_document.uri, move |places| reading::selections(places, &params.positions)).await
    }

    async fn document_highlight(&self, params: DocumentHighlightParams) -> Result<Option<Vec<DocumentHighlight>>> {
        let TextDocumentPositionParams { text_document, position } = params.text_document_position_params;
        on_deck(&text_document.uri, move |places| reading::highlights(places, position)).await
    }

    async fn document_symbol(&self, params: DocumentSymbolParams) -> Result<Option<DocumentSymbolResponse>> {
        let as_tree = self.shared.abilities().symbol_tree;
        on_deck(&params.text_document.uri, move |places| symbols::document(places, as_tree)).await
    }

    async fn symbol(&self, params: WorkspaceSymbolParams) -> Result<Option<Vec<SymbolInformation>>> {
        let (world, shared) = (arrival(), self.shared.clone());
        away(move || Some(symbols::workspace(&world, &shared, &params.query))).await
    }

    async fn goto_definition(&self, params: GotoDefinitionParams) -> Result<Option<GotoDefinitionResponse>> {
        let TextDocumentPositionParams { text_document, position } = params.text_document_position_params;
        let found = on_deck(&text_document.uri, move |places| across::definition(places, position)).await?;
        Ok(found.filter(|found| !found.is_empty()).map(GotoDefinitionResponse::Array))
    }

    async fn references(&self, params: ReferenceParams) -> Result<Option<Vec<Location>>> {
        let TextDocumentPositionParams { text_document, position } = params.text_document_position;
        let with_definition = params.context.include_declaration;
        let (world, shared) = (arrival(), self.shared.clone());
        away(move || across::references(&shared, &world, &text_document.uri, position, with_definition)).await
    }

    async fn prepare_rename(&self, params: TextDocumentPositionParams) -> Result<Option<PrepareRenameResponse>> {
        let position = params.position;
        let found = on_deck(&params.text_document.uri, move |places| across::prepare(places, position)).await?;
        found.transpose().map_err(refused)
    }

    async fn rename(&self, params: RenameParams) -> Result<Option<WorkspaceEdit>> {
        let TextDocumentPositionParams { text_document, position } = params.text_document_position;
        let (world, shared) = (arrival(), self.shared.clone());
        let answer = move || across::rename(&shared, &world, &text_document.uri, position, &params.new_name);
        away(answer).await?.transpose().map_err(refused)
    }

    async fn code_action(&self, params: CodeActionParams) -> Result<Option<CodeActionResponse>> {
        if !self.shared.abilities().code_actions {
            return Ok(None);
        }
        on_deck(&params.text_document.uri.clone(), move |places| changes::actions(places, &params)).await
    }

    async fn formatting(&self, params: DocumentFormattingParams) -> Result<Option<Vec<TextEdit>>> {
        on_deck(&params.text_document.uri, changes::document).await
    }

    async fn range_formatting(&self, params: DocumentRangeFormattingParams) -> Result<Option<Vec<TextEdit>>> {
        on_deck(&params.text_document.uri, move |places| changes::range(places, params.range)).await
    }

    async fn on_type_formatting(&self, params: DocumentOnTypeFormattingParams) -> Result<Option<Vec<TextEdit>>> {
        let TextDocumentPositionParams { text_document, position } = params.text_document_position;
        on_deck(&text_document.uri, move |places| changes::on_enter(places, position)).await
    }

    async fn semantic_tokens_full(&self, params: SemanticTokensParams) -> Result<Option<SemanticTokensResult>> {
        let (uri, sent) = (params.text_document.uri, self.sent_tokens.clone());
        let answer = move |places: &Places<'_>, uri: &Url| {
            let data = tokens::of(places, None)?;
            Some(SemanticTokens { result_id: Some(sent.note(places.world, uri, &data)), data })
        };
        Ok(on_deck(&uri.clone(), move |places| answer(places, &uri)).await?.map(SemanticTokensResult::Tokens))
    }

    async fn semantic_tokens_full_delta(
        &self,
        params: SemanticTokensDeltaParams,
    ) -> Result<Option<SemanticTokensFullDeltaResult>> {
        let (uri, sent, before) = (params.text_document.uri, self.sent_tokens.clone(), params.previous_result_id);
        let answer = move |places: &Places<'_>, uri: &Url| {
            let data = tokens::of(places, None)?;
            let edits = sent.change(uri, &before, &data);
            let result_id = Some(sent.note(places.world, uri, &data));
            Some(match edits {
                Some(edits) => SemanticTokensFullDeltaResult::TokensDelta(SemanticTokensDelta { result_id, edits }),
                None => SemanticTokensFullDeltaResult::Tokens(SemanticTokens { result_id, data }),
            })
        };
        on_deck(&uri.clone(), move |places| answer(places, &uri)).await
    }

    async fn semantic_tokens_range(
        &self,
        params: SemanticTokensRangeParams,
    ) -> Result<Option<SemanticTokensRangeResult>> {
        let answer = move |places: &Places<'_>| {
            Some(SemanticTokens { result_id: None, data: tokens::of(places, Some(params.range))? })
        };
        Ok(on_deck(&params.text_document.uri, answer).await?.map(SemanticTokensRangeResult::Tokens))
    }
}

/// A request that was understood and refused, with the reason in words.
fn refused(why: String) -> Error {
    // RequestFailed, LSP 3.17.
    Error { code: ErrorCode::ServerError(-32803), message: why.into(), data: None }
}
