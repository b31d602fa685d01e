//! Findings that a client asks for: of one document, and of the workspace.

use super::diagnostics::{self, result_id};
use super::shared::Shared;
use super::world::{World, path_of};
use tower_lsp::lsp_types::*;

/// What is found in a document; that it is what the client has already, where it is.
pub fn document(world: &World, shared: &Shared, params: &DocumentDiagnosticParams) -> DocumentDiagnosticReport {
    let uri = &params.text_document.uri;
    let mut items = match world.documents.get(uri) {
        Some(document) => diagnostics::of(world, &world.worked_out(document)),
        None => shared.folder.at(&path_of(uri)).map(|known| known.diagnostics.to_vec()).unwrap_or_default(),
    };
    if !shared.abilities().related {
        diagnostics::without_related(&mut items);
    }
    let result_id = result_id(&items);
    if params.previous_result_id.as_ref() == Some(&result_id) {
        return DocumentDiagnosticReport::Unchanged(RelatedUnchangedDocumentDiagnosticReport {
            related_documents: None,
            unchanged_document_diagnostic_report: UnchangedDocumentDiagnosticReport { result_id },
        });
    }
    DocumentDiagnosticReport::Full(RelatedFullDocumentDiagnosticReport {
        related_documents: None,
        full_document_diagnostic_report: FullDocumentDiagnosticReport { result_id: Some(result_id), items },
    })
}

/// What is known now of every deck, open or not; decks that the client knows of and that are no more are cleared.
pub fn workspace(world: &World, shared: &Shared, known: &[PreviousResultId]) -> Vec<WorkspaceDocumentDiagnosticReport> {
    let open = world.documents.values().map(|document| {
        let found = diagnostics::of(world, &world.worked_out(document));
        (document.uri.clone(), Some(i64::from(document.version)), found)
    });
    let closed = shared.folder.all().into_iter().filter(|closed| !world.documents.contains_key(&closed.uri));
    let closed = closed.map(|closed| (closed.uri, None, closed.diagnostics.to_vec()));
    let mut reports: Vec<(Url, Option<i64>, Vec<Diagnostic>)> = open.chain(closed).collect();
    reports.sort_by(|a, b| a.0.cmp(&b.0));
    let is_gone = |known: &&PreviousResultId| reports.binary_search_by(|report| report.0.cmp(&known.uri)).is_err();
    let gone: Vec<_> = known.iter().filter(is_gone).map(|known| (known.uri.clone(), None, Vec::new())).collect();
    reports.extend(gone);
    let known: std::collections::HashMap<&Url, &String> = known.iter().map(|it| (&it.uri, &it.value)).collect();
    let related = shared.abilities().related;
    let report = |(uri, version, mut items): (Url, Option<i64>, Vec<Diagnostic>)| {
        if !related {
            diagnostics::without_related(&mut items);
        }
        let result_id = result_id(&items);
        if known.get(&uri) == Some(&&result_id) {
            let unchanged_document_diagnostic_report = UnchangedDocumentDiagnosticReport { result_id };
            return WorkspaceDocumentDiagnosticReport::Unchanged(WorkspaceUnchangedDocumentDiagnosticReport {
                uri,
                version,
                unchanged_document_diagnostic_report,
            });
        }
        let full_document_diagnostic_report = FullDocumentDiagnosticReport { result_id: Some(result_id), items };
        WorkspaceDocumentDiagnosticReport::Full(WorkspaceFullDocumentDiagnosticReport {
            uri,
            version,
            full_document_diagnostic_report,
        })
    };
    reports.into_iter().map(report).collect()
}
