//! What the client can do, of what makes a difference here, and what this server offers it.

use super::text::Encoding;
use super::tokens;
use tower_lsp::lsp_types::*;

/// What the client can do.
#[derive(Clone, Debug, Default)]
pub struct Abilities {
    /// Asks for findings itself, so none are pushed.
    pub pulls: bool,
    /// Shows places that belong to a finding.
    pub related: bool,
    /// Can be told to ask for findings again.
    pub refreshes_findings: bool,
    /// Can be told to ask for hints again.
    pub refreshes_hints: bool,
    /// Can be asked to watch files.
    pub watches: bool,
    /// Shows progress that the server starts.
    pub progress: bool,
    /// Can be asked for its settings.
    pub configuration: bool,
    /// Fills in the stops of a snippet.
    pub snippets: bool,
    /// Shows symbols as a tree.
    pub symbol_tree: bool,
    /// Takes code actions, not only commands.
    pub code_actions: bool,
    /// The process to end with.
    pub process: Option<u32>,
}

impl Abilities {
    /// Those that a client states.
    pub fn of(params: &InitializeParams) -> Abilities {
        let text = params.capabilities.text_document.clone().unwrap_or_default();
        let workspace = params.capabilities.workspace.clone().unwrap_or_default();
        let window = params.capabilities.window.clone().unwrap_or_default();
        let yes = |flag: Option<bool>| flag == Some(true);
        Abilities {
            pulls: text.diagnostic.is_some(),
            related: text.publish_diagnostics.is_none_or(|it| yes(it.related_information)),
            refreshes_findings: workspace.diagnostic.is_some_and(|it| yes(it.refresh_support)),
            refreshes_hints: workspace.inlay_hint.is_some_and(|it| yes(it.refresh_support)),
            watches: workspace.did_change_watched_files.is_some_and(|it| yes(it.dynamic_registration)),
            progress: yes(window.work_done_progress),
            configuration: yes(workspace.configuration),
            snippets: text.completion.and_then(|it| it.completion_item).is_some_and(|item| yes(item.snippet_support)),
            symbol_tree: text.document_symbol.is_some_and(|it| yes(it.hierarchical_document_symbol_support)),
            code_actions: text.code_action.is_some_and(|it| it.code_action_literal_support.is_some()),
            process: params.process_id,
        }
    }
}

/// What this server offers.
pub fn offered(encoding: Encoding) -> ServerCapabilities {
    ServerCapabilities {
        position_encoding: Some(encoding.kind()),
        text_document_sync: Some(TextDocumentSyncCapability::Options(TextDocumentSyncOptions {
            open_close: Some(true),
            change: Some(TextDocumentSyncKind::INCREMENTAL),
            save: Some(TextDocumentSyncSaveOptions::Supported(true)),
            ..TextDocumentSyncOptions::default()
        })),
        completion_provider: Some(CompletionOptions {
            trigger_characters: Some([" ", ".", "(", "\"", "/", ","].map(String::from).to_vec()),
            ..CompletionOptions::default()
        }),
        hover_provider: Some(HoverProviderCapability::Simple(true)),
        signature_help_provider: Some(SignatureHelpOptions {
            trigger_characters: Some([" ", "(", ","].map(String::from).to_vec()),
            ..SignatureHelpOptions::default()
        }),
        inlay_hint_provider: Some(OneOf::Left(true)),
        code_action_provider: Some(CodeActionProviderCapability::Options(CodeActionOptions {
            code_action_kinds: Some(vec![
                CodeActionKind::QUICKFIX,
                CodeActionKind::REFACTOR,
                CodeActionKind::SOURCE_FIX_ALL,
            ]),
            ..CodeActionOptions::default()
        })),
        document_symbol_provider: Some(OneOf::Left(true)),
        workspace_symbol_provider: Some(OneOf::Left(true)),
        definition_provider: Some(OneOf::Left(true)),
        references_provider: Some(OneOf::Left(true)),
        document_highlight_provider: Some(OneOf::Left(true)),
        rename_provider: Some(OneOf::Right(RenameOptions {
            prepare_provider: Some(true),
            work_done_progress_options: WorkDoneProgressOptions::default(),
        })),
        folding_range_provider: Some(FoldingRangeProviderCapability::Simple(true)),
        selection_range_provider: Some(SelectionRangeProviderCapability::Simple(true)),
        semantic_tokens_provider: Some(SemanticTokensServerCapabilities::SemanticTokensOptions(
            SemanticTokensOptions {
                legend: tokens::legend(),
                range: Some(true),
                full: Some(SemanticTokensFullOptions::Delta { delta: Some(true) }),
                ..SemanticTokensOptions::default()
            },
        )),
        document_link_provider: Some(DocumentLinkOptions {
            resolve_provider: Some(false),
            work_done_progress_options: WorkDoneProgressOptions::default(),
        }),
        document_formatting_provider: Some(OneOf::Left(true)),
        document_range_formatting_provider: Some(OneOf::Left(true)),
        document_on_type_formatting_provider: Some(DocumentOnTypeFormattingOptions {
            first_trigger_character: "\n".into(),
            more_trigger_character: None,
        }),
        diagnostic_provider: Some(DiagnosticServerCapabilities::Options(DiagnosticOptions {
            identifier: Some(super::diagnostics::SOURCE.into()),
            inter_file_dependencies: true,
            workspace_diagnostics: true,
            work_done_progress_options: WorkDoneProgressOptions::default(),
        })),
        workspace: Some(WorkspaceServerCapabilities {
            workspace_folders: Some(WorkspaceFoldersServerCapabilities {
                supported: Some(true),
                change_notifications: Some(OneOf::Left(true)),
            }),
            file_operations: None,
        }),
        ..ServerCapabilities::default()
    }
}
