//! Work-done progress of a pass over a big folder.

use super::shared::Shared;
use std::sync::atomic::{AtomicUsize, Ordering};
use tokio::sync::mpsc::{UnboundedReceiver, UnboundedSender, unbounded_channel};
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
    /// Percent told last.
    last: usize,
    /// To the task that shows it: how many decks are done.
    done: UnboundedSender<usize>,
}

impl Progress {
    /// Begins to show a pass over so many decks, where there are many and the client can show it. Nothing waits for the
    /// client's consent.
    pub fn begin(shared: &Shared, total: usize) -> Option<Progress> {
        let client = shared.client.get()?.clone();
        if total < WORTH_SHOWING || !shared.abilities().progress {
            return None;
        }
        let token = NumberOrString::String(format!("deckline/pass-{}", NUMBER.fetch_add(1, Ordering::Relaxed)));
        let (done, to_show) = unbounded_channel();
        shared.runtime.spawn(show(client, token.clone(), total, to_show));
        Some(Progress { token, total, last: 0, done })
    }

    /// Whether the client means this by its token.
    pub fn is(&self, token: &ProgressToken) -> bool {
        self.token == *token
    }

    /// Shows how many are left, at each new percent.
    pub fn report(&mut self, left: usize) {
        let done = self.total.saturating_sub(left);
        let percent = percent(done, self.total);
        if percent != self.last {
            self.last = percent;
            // The task ends before this only where the client did not consent.
            let _ = self.done.send(done);
        }
    }
}

fn percent(done: usize, total: usize) -> usize {
    (100 * done / total.max(1)).min(100)
}

/// Asks for consent, and shows the pass until it is over.
async fn show(client: Client, token: ProgressToken, total: usize, mut to_show: UnboundedReceiver<usize>) {
    let params = WorkDoneProgressCreateParams { token: token.clone() };
    if client.send_request::<WorkDoneProgressCreate>(params).await.is_err() {
        return;
    }
    let tell = |progress: WorkDoneProgress| {
        let value = ProgressParamsValue::WorkDone(progress);
        client.send_notification::<ProgressNotification>(ProgressParams { token: token.clone(), value })
    };
    tell(WorkDoneProgress::Begin(WorkDoneProgressBegin {
        title: "Checking decks".into(),
        cancellable: Some(true),
        message: Some(format!("{total} decks")),
        percentage: Some(0),
    }))
    .await;
    while let Some(done) = to_show.recv().await {
        tell(WorkDoneProgress::Report(WorkDoneProgressReport {
            cancellable: Some(true),
            message: Some(format!("{done} of {total} decks")),
            percentage: u32::try_from(percent(done, total)).ok(),
        }))
        .await;
    }
    tell(WorkDoneProgress::End(WorkDoneProgressEnd { message: None })).await;
}
