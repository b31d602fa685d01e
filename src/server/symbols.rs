//! Symbols of a document and of the workspace.

use super::handlers::OWN;
use super::places::Places;
use super::shared::Shared;
use super::world::World;
use crate::ide::symbols::{self, Symbol, SymbolKind as Kind};
use tower_lsp::lsp_types::{DocumentSymbol, DocumentSymbolResponse, Location, SymbolInformation, SymbolKind};

/// Most symbols of the workspace that are given at once.
const MOST: usize = 1000;

/// The symbols of a document, as a tree or, for a client that shows none, as a list.
pub fn document(places: &Places<'_>, as_tree: bool) -> Option<DocumentSymbolResponse> {
    if !as_tree {
        return Some(DocumentSymbolResponse::Flat(flat(places)));
    }
    let symbols = symbols::document(places.deck, OWN);
    Some(DocumentSymbolResponse::Nested(symbols.iter().filter_map(|symbol| tree(places, symbol)).collect()))
}

/// The symbols of a document as a list.
pub fn flat(places: &Places<'_>) -> Vec<SymbolInformation> {
    let mut list = Vec::new();
    for symbol in symbols::document(places.deck, OWN) {
        add(places, &symbol, None, &mut list);
    }
    list
}

/// The symbols of a document that are worth finding from elsewhere: entries and named values.
pub fn of_workspace(places: &Places<'_>) -> Vec<SymbolInformation> {
    let mut list = Vec::new();
    for mut symbol in symbols::document(places.deck, OWN) {
        symbol.children.retain(|child| child.kind == Kind::Value);
        add(places, &symbol, None, &mut list);
    }
    list
}

/// The symbols of all decks, open or not, that match a query.
pub fn workspace(world: &World, shared: &Shared, query: &str) -> Vec<SymbolInformation> {
    let open = world.documents.values().flat_map(|document| match &world.worked_out(document).deck {
        Ok(deck) => of_workspace(&Places::new(world, deck)),
        Err(_) => Vec::new(),
    });
    let closed = shared.folder.all().into_iter().flat_map(|closed| closed.symbols.to_vec());
    let mut found = matching(open.chain(closed), query);
    found.sort_by(|a, b| (&a.name, &a.location.uri).cmp(&(&b.name, &b.location.uri)));
    found
}

/// Those whose names hold the letters of the query in their order, whatever the case.
pub fn matching(symbols: impl Iterator<Item = SymbolInformation>, query: &str) -> Vec<SymbolInformation> {
    let wanted: Vec<char> = query.to_lowercase().chars().filter(|letter| !letter.is_whitespace()).collect();
    let holds = |name: &str| {
        let mut wanted = wanted.iter().peekable();
        for letter in name.to_lowercase().chars() {
            wanted.next_if_eq(&&letter);
        }
        wanted.peek().is_none()
    };
    symbols.filter(|symbol| holds(&symbol.name)).take(MOST).collect()
}

#[expect(deprecated, reason = "the protocol's types still have the field")]
fn tree(places: &Places<'_>, symbol: &Symbol) -> Option<DocumentSymbol> {
    let children: Vec<DocumentSymbol> = symbol.children.iter().filter_map(|child| tree(places, child)).collect();
    Some(DocumentSymbol {
        // The protocol allows no empty name.
        name: if symbol.name.trim().is_empty() { "-".into() } else { symbol.name.clone() },
        detail: (!symbol.detail.is_empty()).then(|| symbol.detail.clone()),
        kind: kind(symbol.kind),
        tags: None,
        deprecated: None,
        range: places.span(OWN, symbol.span)?,
        selection_range: places.span(OWN, symbol.name_span)?,
        children: (!children.is_empty()).then_some(children),
    })
}

#[expect(deprecated, reason = "the protocol's types still have the field")]
fn add(places: &Places<'_>, symbol: &Symbol, container: Option<&str>, list: &mut Vec<SymbolInformation>) {
    if let (Some(uri), Some(range)) = (places.uri(OWN), places.span(OWN, symbol.name_span)) {
        list.push(SymbolInformation {
            name: symbol.name.clone(),
            kind: kind(symbol.kind),
            tags: None,
            deprecated: None,
            location: Location { uri, range },
            container_name: container.map(str::to_string),
        });
    }
    for child in &symbol.children {
        add(places, child, Some(&symbol.name), list);
    }
}

fn kind(kind: Kind) -> SymbolKind {
    match kind {
        Kind::Entry(_) => SymbolKind::MODULE,
        Kind::Value => SymbolKind::VARIABLE,
        Kind::Statement => SymbolKind::PROPERTY,
        Kind::Requirement => SymbolKind::BOOLEAN,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use tower_lsp::lsp_types::{Range, Url};

    #[test]
    #[expect(deprecated, reason = "the protocol's types still have the field")]
    fn a_query_matches_letters_in_their_order() {
        let symbol = |name: &str| SymbolInformation {
            name: name.into(),
            kind: SymbolKind::VARIABLE,
            tags: None,
            deprecated: None,
            location: Location { uri: Url::parse("file:///a.buoy").expect("a uri"), range: Range::default() },
            container_name: None,
        };
        let found = |query: &str| {
            let all = ["T_hot", "T_cold", "cabinet_air"].map(symbol);
            matching(all.into_iter(), query).into_iter().map(|symbol| symbol.name).collect::<Vec<_>>()
        };
        assert_eq!(found("th"), ["T_hot"]);
        assert_eq!(found("T"), ["T_hot", "T_cold", "cabinet_air"]);
        assert_eq!(found("cair"), ["cabinet_air"]);
        assert_eq!(found("").len(), 3);
        assert!(found("xyz").is_empty());
    }
}
