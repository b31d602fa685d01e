//! Answers that may reach into several decks: definition, references, rename.
//!
//! A name that a file defines may be used by every deck that includes it. So besides the deck with the file at its
//! head, each deck is asked that has looked at the file.

use super::handlers::OWN;
use super::places::Places;
use super::shared::Shared;
use super::world::{WorkedOut, World};
use crate::ide;
use crate::syntax::{FileId, Place};
use std::collections::{BTreeSet, HashMap};
use std::path::Path;
use std::sync::Arc;
use tower_lsp::lsp_types::{Location, Position, PrepareRenameResponse, TextEdit, Url, WorkspaceEdit};

/// Where what stands under the cursor is defined.
pub fn definition(places: &Places<'_>, position: Position) -> Option<Vec<Location>> {
    let found = ide::navigate::definition(places.deck, OWN, places.offset(OWN, position)?);
    Some(found.into_iter().filter_map(|place| places.location(place)).collect())
}

/// All uses of what stands under the cursor, in every deck.
pub fn references(
    shared: &Shared,
    world: &World,
    uri: &Url,
    position: Position,
    with_definition: bool,
) -> Option<Vec<Location>> {
    let mut found: Vec<Location> = Vec::new();
    let ask = |places: &Places<'_>, file: FileId, offset: usize| {
        let defined: BTreeSet<Place> = ide::navigate::definition(places.deck, file, offset).into_iter().collect();
        ide::navigate::references(places.deck, file, offset)
            .into_iter()
            .filter(|place| with_definition || !defined.contains(place))
            .filter_map(|place| places.location(place))
            .collect::<Vec<Location>>()
    };
    each_deck(shared, world, uri, position, |places, file, offset| found.append(&mut ask(places, file, offset)))?;
    found.sort_by(|a, b| (&a.uri, a.range.start, a.range.end).cmp(&(&b.uri, b.range.start, b.range.end)));
    found.dedup();
    Some(found)
}

/// What a rename would take.
pub fn prepare(places: &Places<'_>, position: Position) -> Option<Result<PrepareRenameResponse, String>> {
    let offset = places.offset(OWN, position)?;
    Some(ide::rename::prepare(places.deck, OWN, offset).and_then(|(span, placeholder)| {
        let range = places.span(OWN, span).ok_or("The file of this name is not at hand.")?;
        Ok(PrepareRenameResponse::RangeWithPlaceholder { range, placeholder })
    }))
}

/// The edits that rename what stands under the cursor, in every deck; or why not.
pub fn rename(
    shared: &Shared,
    world: &World,
    uri: &Url,
    position: Position,
    new_name: &str,
) -> Option<Result<WorkspaceEdit, String>> {
    let mut changes: HashMap<Url, Vec<TextEdit>> = HashMap::new();
    let mut refused: Option<String> = None;
    each_deck(shared, world, uri, position, |places, file, offset| {
        match ide::rename::rename(places.deck, file, offset, new_name) {
            Ok(edits) => {
                for (uri, mut edits) in places.edits(&edits) {
                    changes.entry(uri).or_default().append(&mut edits);
                }
            }
            Err(why) => {
                let name = places.deck.files.first().and_then(|file| file.path.file_name());
                let name = name.map_or_else(String::new, |name| name.to_string_lossy().into_owned());
                let is_own = file == OWN;
                refused.get_or_insert(if is_own { why } else { format!("In `{name}`: {why}") });
            }
        }
    })?;
    if let Some(why) = refused {
        return Some(Err(why));
    }
    for edits in changes.values_mut() {
        edits.sort_by_key(|edit| (edit.range.start, edit.range.end));
        edits.dedup();
    }
    Some(Ok(WorkspaceEdit { changes: Some(changes), ..WorkspaceEdit::default() }))
}

/// Calls `ask` with every deck that the file belongs to, the number of the file in it, and the offset of the cursor in
/// the file; first with its own deck. `None` where the file is not open.
fn each_deck(
    shared: &Shared,
    world: &World,
    uri: &Url,
    position: Position,
    mut ask: impl FnMut(&Places<'_>, FileId, usize),
) -> Option<()> {
    let document = world.documents.get(uri)?;
    let own = world.worked_out(document);
    let own_deck = own.deck.as_ref().ok()?;
    let places = Places::new(world, own_deck);
    let offset = places.offset(OWN, position)?;
    // A name may be defined in a file that this one includes, and be used by others that include that.
    let mut files: BTreeSet<&Path> = BTreeSet::from([document.path.as_path()]);
    let defined = ide::navigate::definition(own_deck, OWN, offset);
    files.extend(defined.iter().filter_map(|place| own_deck.file(place.file)).map(|file| file.path.as_path()));
    ask(&places, OWN, offset);
    for other in decks_with(shared, world, &files, &document.path) {
        let Ok(deck) = &other.deck else { continue };
        let places = Places::new(world, deck);
        let targets = std::iter::once((document.path.as_path(), offset)).chain(
            defined.iter().filter_map(|place| Some((own_deck.file(place.file)?.path.as_path(), place.span.start))),
        );
        for (path, offset) in targets {
            let index = deck.files.iter().position(|file| file.path == path);
            if let Some(file) = index.and_then(|index| u32::try_from(index).ok()) {
                ask(&places, FileId(file), offset);
                break;
            }
        }
    }
    Some(())
}

/// The decks, open or not, that have looked at one of these files, but for the one at `own`.
fn decks_with(shared: &Shared, world: &World, files: &BTreeSet<&Path>, own: &Path) -> Vec<Arc<WorkedOut>> {
    let open = world.documents.values().filter(|document| document.path != own);
    let mut decks: Vec<Arc<WorkedOut>> = open
        .map(|document| world.worked_out(document))
        .filter(|worked_out| files.iter().any(|file| worked_out.looked_at.contains(*file)))
        .collect();
    let closed: BTreeSet<_> = files.iter().flat_map(|file| shared.folder.that_looked_at(file)).collect();
    let closed = closed.iter().filter(|path| world.at(path).is_none() && *path != own);
    decks.extend(closed.map(|path| Arc::new(world.work_out(path, Some(path)))));
    decks
}
