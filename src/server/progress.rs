//! Work-done progress of a pass over a big folder.

use super::shared::Shared;
use std::sync::Arc;
use std::sync::atomic::{AtomicBool, AtomicUsize, Ordering};
use tower_lsp::Client;
use tower_lsp::lsp_types::notification::Progress as ProgressNotification;
use tower_lsp::lsp_types::request::WorkDoneProgressCreate;
use tower_lsp::lsp_types::{
    NumberOrString, ProgressParams, ProgressParamsValue, ProgressToken, WorkDoneProgress, WorkDoneProgressBegin,
    WorkDoneProgressCreateParams, WorkDoneProgressEnd, WorkDoneProgressReport,
};

/// Fewest decks that are worth showing progress for.
const WORTH_SHOWING: usize = 20;
static NUMBER: AtomicUsize = AtomicUsize::new(0);

/// A pass whose progress is shown; shown as ended when dropped.
pub struct Progress {
    token: ProgressToken,
    total: usize,
    /// Set once the client has agreed to show it.
    is_shown: Arc<AtomicBool>,
    /// Set once the pass is over.
    is_over: Arc<AtomicBool>,
    last: AtomicUsize,
    client: Client,
    runtime: tokio::runtime::Handle,
}

impl Progress {
    /// Begins to show a pass over so many decks, where there are many and the client can show it.
    pub fn begin(shared: &Shared, total: usize) -> Option<Progress> {
        let client = shared.client.get()?.clone();
        if total < WORTH_SHOWING || !shared.abilities().progress {
            return None;
        }
        let token = NumberOrString::String(format!("deckline/pass-{}", NUMBER.fetch_add(1, Ordering::Relaxed)));
        let (is_shown, is_over) = (Arc::new(AtomicBool::new(false)), Arc::new(AtomicBool::new(false)));
        let progress = Progress {
            token: token.clone(),
            total,
            is_shown: is_shown.clone(),
            is_over: is_over.clone(),
            last: AtomicUsize::new(0),
            client: client.clone(),
            runtime: shared.runtime.clone(),
        };
        // Nothing waits for the client's consent: a slow client sees the pass from the middle on.
        shared.runtime.spawn(async move {
            let params = WorkDoneProgressCreateParams { token: token.clone() };
            if client.send_request::<WorkDoneProgressCreate>(params).await.is_ok() {
                let begin = WorkDoneProgress::Begin(WorkDoneProgressBegin {
                    title: "Checking decks".into(),
                    cancellable: Some(true),
                    message: Some(format!("{total} decks")),
                    percentage: Some(0),
                });
                client.send_notification::<ProgressNotification>(value(&token, begin)).await;
                is_shown.store(true, Ordering::SeqCst);
                if is_over.load(Ordering::SeqCst) {
                    end(&client, &token, &is_shown).await;
                }
            }
        });
        Some(progress)
    }

    /// Whether the client means this by its token.
    pub fn is(&self, token: &ProgressToken) -> bool {
        self.token == *token
    }

    /// Shows how many are left, at each new percent.
    pub fn report(&self, left: usize) {
        let done = self.total.saturating_sub(left);
        let percentage = (100 * done / self.total.max(1)).min(100);
        if !self.is_shown.load(Ordering::SeqCst) || self.last.swap(percentage, Ordering::Relaxed) == percentage {
            return;
        }
        let report = WorkDoneProgress::Report(WorkDoneProgressReport {
            cancellable: Some(true),
            message: Some(format!("{done} of {} decks", self.total)),
            percentage: u32::try_from(percentage).ok(),
        });
        // By the way that the beginning took, so that it cannot come before it.
        let (client, token) = (self.client.clone(), self.token.clone());
        self.runtime
            .spawn(async move { client.send_notification::<ProgressNotification>(value(&token, report)).await });
    }
}

impl Drop for Progress {
    fn drop(&mut self) {
        self.is_over.store(true, Ordering::SeqCst);
        let (client, token, is_shown) = (self.client.clone(), self.token.clone(), self.is_shown.clone());
        self.runtime.spawn(async move { end(&client, &token, &is_shown).await });
    }
}

/// Shows the end of what is shown, once.
async fn end(client: &Client, token: &ProgressToken, is_shown: &AtomicBool) {
    if is_shown.swap(false, Ordering::SeqCst) {
        let end = WorkDoneProgress::End(WorkDoneProgressEnd { message: None });
        client.send_notification::<ProgressNotification>(value(token, end)).await;
    }
}

fn value(token: &ProgressToken, progress: WorkDoneProgress) -> ProgressParams {
    ProgressParams { token: token.clone(), value: ProgressParamsValue::WorkDone(progress) }
}
