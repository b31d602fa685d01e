//! The names of a deck: definitions, varied names, entities and their members, and the order in which values can
//! be worked out.

use super::declare::{DeclaredEntry, named_kind};
use crate::syntax::tree::{Expression, ExpressionKind};
use crate::syntax::{Finding, Level, Place};
use crate::vocabulary::{self, EntryKind, NameOf, Takes};
use std::collections::HashMap;

/// What a named value is.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum ValueKind {
    /// Defined in `given`.
    Given,
    /// Runs over values in `vary`.
    Varied,
    /// A member of an entry, which an expression refers to.
    Member,
}

/// A value that expressions can refer to.
#[derive(Debug)]
pub struct NamedValue<'t> {
    /// Its name; for a member, `owner.member`.
    pub name: String,
    /// What it is.
    pub kind: ValueKind,
    /// Its expression; `None` where nothing was written. For a varied name: a list or range.
    pub expression: Option<&'t Expression>,
    /// Which entry it stands in.
    pub entry: usize,
    /// The place of its name.
    pub place: Place,
}

/// All names.
#[derive(Debug, Default)]
pub struct Names<'t> {
    /// The named values, by number.
    pub values: Vec<NamedValue<'t>>,
    by_name: HashMap<&'t str, usize>,
    members: HashMap<(usize, &'static str, usize), usize>,
    entities: HashMap<(EntityKey, &'t str), usize>,
    /// The first boundary of a name at a region.
    boundaries: HashMap<(&'t str, Option<&'t str>), usize>,
}

/// Names of boundaries are their region's own; all others are the deck's.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug)]
enum EntityKey {
    Substance,
    Fluid,
    Solid,
    Region,
    Boundary,
}

fn key(kind: NameOf) -> Option<EntityKey> {
    match kind {
        NameOf::Substance => Some(EntityKey::Substance),
        NameOf::Fluid => Some(EntityKey::Fluid),
        NameOf::Solid => Some(EntityKey::Solid),
        NameOf::Region => Some(EntityKey::Region),
        NameOf::Boundary => Some(EntityKey::Boundary),
        NameOf::Varied | NameOf::Anything => None,
    }
}

/// Collects the names that entries define. A name defined twice is a finding; the first holds.
pub fn collect<'t>(entries: &[DeclaredEntry<'t>], findings: &mut Vec<Finding>) -> Names<'t> {
    let mut names = Names::default();
    for (index, entry) in entries.iter().enumerate() {
        if let (Some(kind), Some(name)) = (named_kind(entry.row.kind).and_then(key), own_name(entry)) {
            names.add_entity(entries, index, kind, name, findings);
        }
        for definition in &entry.definitions {
            // The definitions of a substance are its own.
            if entry.row.kind == EntryKind::Given {
                let place = entry.place(definition.name.span);
                names.add_value(
                    &definition.name.text,
                    ValueKind::Given,
                    definition.value.as_ref(),
                    index,
                    place,
                    findings,
                );
            }
        }
        for (phrase, values) in &entry.sweeps {
            let place = entry.place(phrase.word.span);
            names.add_value(&phrase.word.text, ValueKind::Varied, *values, index, place, findings);
        }
    }
    names
}

/// The own name of an entry, borrowed from the tree.
fn own_name<'t>(entry: &DeclaredEntry<'t>) -> Option<&'t str> {
    let index = entry.row.slots.iter().position(|slot| matches!(slot.takes, Takes::NewName))?;
    let expression: &'t Expression = entry.arguments.get(index)?.first()?;
    match &expression.kind {
        ExpressionKind::Word(word) => Some(word),
        _ => None,
    }
}

impl<'t> Names<'t> {
    fn add_entity(
        &mut self,
        entries: &[DeclaredEntry<'t>],
        index: usize,
        kind: EntityKey,
        name: &'t str,
        findings: &mut Vec<Finding>,
    ) {
        let Some(entry) = entries.get(index) else { return };
        if kind == EntityKey::Boundary {
            let region = entry.arguments.get(1).and_then(|list| list.first().copied());
            let region: Option<&'t str> = region.and_then(|expression| match &expression.kind {
                ExpressionKind::Word(word) => Some(&**word),
                _ => None,
            });
            let first = *self.boundaries.entry((name, region)).or_insert(index);
            if let Some(first) = entries.get(first).filter(|_| first != index) {
                findings.push(repeated(name, entry.name().map_or(entry.head, |(_, place)| place), first.head));
            }
            self.entities.entry((kind, name)).or_insert(index);
            return;
        }
        match self.entities.get(&(kind, name)).and_then(|first| entries.get(*first)) {
            Some(first) => {
                let place = entry.name().map_or(entry.head, |(_, place)| place);
                findings.push(repeated(name, place, first.name().map_or(first.head, |(_, place)| place)));
            }
            None => {
                self.entities.insert((kind, name), index);
            }
        }
    }

    fn add_value(
        &mut self,
        name: &'t str,
        kind: ValueKind,
        expression: Option<&'t Expression>,
        entry: usize,
        place: Place,
        findings: &mut Vec<Finding>,
    ) {
        if let Some(first) = self.by_name.get(name).and_then(|index| self.values.get(*index)) {
            findings.push(repeated(name, place, first.place));
            return;
        }
        self.by_name.insert(name, self.values.len());
        self.values.push(NamedValue { name: name.to_string(), kind, expression, entry, place });
    }

    /// The number of the value of a name.
    pub fn value(&self, name: &str) -> Option<usize> {
        self.by_name.get(name).copied()
    }

    /// The names of all definitions and varied names.
    pub fn value_names(&self) -> impl Iterator<Item = &str> {
        self.by_name.keys().copied()
    }

    /// The entry that a name of a kind names; under `Anything`, the first of any kind.
    pub fn entity(&self, kind: NameOf, name: &str) -> Option<usize> {
        match key(kind) {
            Some(key) => self.entities.get(&(key, name)).copied(),
            None => [EntityKey::Region, EntityKey::Boundary, EntityKey::Fluid, EntityKey::Solid, EntityKey::Substance]
                .into_iter()
                .find_map(|key| self.entities.get(&(key, name)).copied()),
        }
    }

    /// The names of a kind; under `Anything`, all.
    pub fn entity_names(&self, kind: NameOf) -> impl Iterator<Item = &str> {
        let wanted = key(kind);
        self.entities.keys().filter(move |(key, _)| wanted.is_none_or(|wanted| wanted == *key)).map(|(_, name)| *name)
    }

    /// The number of the value that `owner.member` refers to, made on first use.
    ///
    /// # Errors
    /// Says why there is none, as a sentence.
    pub fn member(&mut self, entries: &[DeclaredEntry<'t>], owner: &str, member: &str) -> Result<usize, String> {
        let candidates = [NameOf::Region, NameOf::Fluid, NameOf::Solid];
        let Some(index) = candidates.into_iter().find_map(|kind| self.entity(kind, owner)) else {
            return Err(format!("No region, fluid or solid is called `{owner}`."));
        };
        let Some(entry) = entries.get(index) else { return Err(String::new()) };
        let mut is_word = false;
        for (row, slot, _) in vocabulary::member_slot(entry.row.kind, member) {
            is_word = true;
            let stated = entry.statements.iter().find(|statement| std::ptr::eq(statement.row, row));
            let Some(expression) = stated.and_then(|statement| statement.arguments.get(slot)?.first().copied()) else {
                continue;
            };
            let key = (index, row.word, slot);
            if let Some(number) = self.members.get(&key) {
                return Ok(*number);
            }
            let number = self.values.len();
            self.members.insert(key, number);
            self.values.push(NamedValue {
                name: format!("{owner}.{member}"),
                kind: ValueKind::Member,
                expression: Some(expression),
                entry: index,
                place: entry.place(expression.span),
            });
            return Ok(number);
        }
        Err(if is_word {
            format!("`{owner}` states no {}; a member names a value that the entry states.", member.replace('-', " "))
        } else {
            format!("A {} has no member `{member}`.", entry.row.word)
        })
    }
}

fn repeated(name: &str, place: Place, first: Place) -> Finding {
    Finding::new("repeated-name", Level::Error, place, format!("`{name}` is defined already."))
        .remedy("another name for one of the two")
        .related(first, "the first definition")
}

/// The order in which values can be worked out, and which of them refer to themselves. `dependencies` gives the
/// numbers that a value needs. Nothing here recurses: a chain of definitions may be as long as a deck.
pub fn order(dependencies: &[Vec<usize>]) -> (Vec<usize>, Vec<usize>) {
    let mut needs: Vec<usize> = dependencies.iter().map(Vec::len).collect();
    let mut needed_by: Vec<Vec<usize>> = vec![Vec::new(); dependencies.len()];
    for (index, list) in dependencies.iter().enumerate() {
        for &needed in list {
            if let Some(users) = needed_by.get_mut(needed) {
                users.push(index);
            }
        }
    }
    let mut ready: std::collections::VecDeque<usize> =
        needs.iter().enumerate().filter(|(_, count)| **count == 0).map(|(index, _)| index).collect();
    let mut order = Vec::with_capacity(dependencies.len());
    while let Some(index) = ready.pop_front() {
        order.push(index);
        for &user in needed_by.get(index).into_iter().flatten() {
            if let Some(count) = needs.get_mut(user) {
                *count -= 1;
                if *count == 0 {
                    ready.push_back(user);
                }
            }
        }
    }
    let mut circular: Vec<usize> =
        needs.iter().enumerate().filter(|(_, count)| **count > 0).map(|(index, _)| index).collect();
    drop_hangers_on(&mut circular, dependencies);
    (order, circular)
}

/// Of values that cannot be ordered, keeps those that some other of them needs: the circles and what lies between
/// two circles, not what merely depends on one.
fn drop_hangers_on(circular: &mut Vec<usize>, dependencies: &[Vec<usize>]) {
    let mut is_in: Vec<bool> = vec![false; dependencies.len()];
    let mut users: Vec<usize> = vec![0; dependencies.len()];
    for &index in &*circular {
        if let Some(flag) = is_in.get_mut(index) {
            *flag = true;
        }
        for &needed in dependencies.get(index).into_iter().flatten() {
            if let Some(count) = users.get_mut(needed) {
                *count += 1;
            }
        }
    }
    let unused = |index: &usize, users: &[usize]| users.get(*index).is_some_and(|count| *count == 0);
    let mut waiting: Vec<usize> = circular.iter().copied().filter(|index| unused(index, &users)).collect();
    while let Some(index) = waiting.pop() {
        if let Some(flag) = is_in.get_mut(index) {
            *flag = false;
        }
        for &needed in dependencies.get(index).into_iter().flatten() {
            if let Some(count) = users.get_mut(needed) {
                *count -= 1;
                if *count == 0 && is_in.get(needed).copied().unwrap_or(false) {
                    waiting.push(needed);
                }
            }
        }
    }
    circular.retain(|index| is_in.get(*index).copied().unwrap_or(false));
}

#[cfg(test)]
mod tests {
    use super::order;

    #[test]
    fn what_is_needed_comes_first() {
        let (sorted, circular) = order(&[vec![1, 2], vec![2], vec![]]);
        assert_eq!((sorted, circular), (vec![2, 1, 0], vec![]));
    }

    #[test]
    fn only_the_circle_is_blamed() {
        // 0 needs 1, 1 and 2 need each other, 3 needs itself.
        let (sorted, circular) = order(&[vec![1], vec![2], vec![1], vec![3], vec![]]);
        assert_eq!((sorted, circular), (vec![4], vec![1, 2, 3]));
    }

    #[test]
    fn a_long_chain_needs_no_stack() {
        let chain: Vec<Vec<usize>> =
            (0..200_000_usize).map(|index| if index == 0 { vec![] } else { vec![index - 1] }).collect();
        assert_eq!(order(&chain).0.len(), 200_000);
    }
}
