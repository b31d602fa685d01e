//! The thread that works open decks out after every edit and pushes what it finds.
//!
//! It takes up the latest state only: states that edits have overtaken are never begun, and what was found for a state
//! that has gone by in the meantime is dropped.

use super::diagnostics;
use super::shared::Shared;
use super::world::{Document, WorkedOut};
use std::collections::HashMap;
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::sync::{Arc, OnceLock, PoisonError};
use tower_lsp::lsp_types::Url;

/// For each open document, the state whose findings were sent.
type Sent = HashMap<Url, Arc<OnceLock<Arc<WorkedOut>>>>;

/// Works decks out for ever.
pub fn run(shared: &Shared) {
    let mut sent = Sent::new();
    loop {
        let (world, document) = {
            let mut world = shared.hold();
            loop {
                sent.retain(|uri, _| world.documents.contains_key(uri));
                if let Some(document) = next(&world, &sent) {
                    break (world.clone(), document);
                }
                world = shared.changed.wait(world).unwrap_or_else(PoisonError::into_inner);
            }
        };
        // A fault in one deck must not keep others from being worked out.
        let found = catch_unwind(AssertUnwindSafe(|| diagnostics::of(&world, &world.worked_out(&document))));
        let present = shared.hold();
        let is_present = present
            .documents
            .get(&document.uri)
            .is_some_and(|present| Arc::ptr_eq(&present.worked_out, &document.worked_out));
        if is_present && let Ok(found) = found {
            shared.push(document.uri.clone(), found, Some(document.version));
        }
        drop(present);
        sent.insert(document.uri, document.worked_out);
    }
}

/// A document whose findings were not sent in its present state; the one edited last comes first.
fn next(world: &super::world::World, sent: &Sent) -> Option<Document> {
    let is_due =
        |document: &&Document| sent.get(&document.uri).is_none_or(|sent| !Arc::ptr_eq(sent, &document.worked_out));
    let latest = world.latest.as_ref().and_then(|uri| world.documents.get(uri)).filter(is_due);
    latest.or_else(|| world.documents.values().find(is_due)).cloned()
}
