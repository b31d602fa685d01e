//! Actions: what an editor can do to the text under the cursor.
//!
//! ```text
//!     heated by 180 w$0            Write `W`                          a remedy of a finding
//!     exchanges 6 W/m^2$0/K ..     Write as 1.06 Btu/(h.ft^2.degF)    `remedies`
//!     held at 40$0 degC            Give it a name in `given`          `name_value`
//! ```

use super::{name_value, remedies};
use crate::syntax::{Edit, FileId, Finding, Span};
use crate::workspace::Deck;
use std::collections::BTreeMap;

/// What an action is for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum ActionKind {
    /// Puts a finding right.
    QuickFix,
    /// Says the same, or more, in another way.
    Refactor,
    /// Every sure remedy of the file at once.
    FixAll,
}

/// A change of text that may be made.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Action {
    /// What it does, as a short imperative.
    pub title: String,
    /// What it is for.
    pub kind: ActionKind,
    /// The changes, none overlapping another.
    pub edits: Vec<Edit>,
    /// Whether it is certain to be what was meant.
    pub sure: bool,
    /// The check whose finding it puts right.
    pub resolves: Option<&'static str>,
}

impl Action {
    /// A change that puts nothing right and is no certain wish.
    pub fn refactor(title: impl Into<String>, edits: Vec<Edit>) -> Action {
        Action { title: title.into(), kind: ActionKind::Refactor, edits, sure: false, resolves: None }
    }
}

/// Everything that can be done to the text of `span`, the remedies of findings first.
pub fn actions(deck: &Deck, file: FileId, span: Span) -> Vec<Action> {
    let mut actions = fixes(deck, file, span);
    actions.extend(remedies::all(deck, file, span));
    actions.extend(name_value::extract(deck, file, span));
    actions.extend(name_value::inline(deck, file, span.start));
    actions.extend(remedies::waivers(deck, file, span));
    actions.extend(fix_all(deck, file));
    actions
}

/// Whether two ranges share a byte or touch.
pub fn meet(a: Span, b: Span) -> bool {
    a.start <= b.end && b.start <= a.end
}

/// The findings at a range of a file.
pub fn findings_at(deck: &Deck, file: FileId, span: Span) -> impl Iterator<Item = &Finding> {
    deck.findings.iter().filter(move |finding| finding.place.file == file && meet(finding.place.span, span))
}

/// The remedies of the findings at a range.
fn fixes(deck: &Deck, file: FileId, span: Span) -> Vec<Action> {
    findings_at(deck, file, span)
        .filter(|finding| finding.waived.is_none())
        .flat_map(|finding| {
            finding.fixes.iter().map(|fix| Action {
                title: fix.title.clone(),
                kind: ActionKind::QuickFix,
                edits: fix.edits.clone(),
                sure: fix.sure,
                resolves: Some(finding.check),
            })
        })
        .collect()
}

/// Every sure remedy in a file. Of two that overlap, the first; what is left shows again afterwards.
pub fn fix_all(deck: &Deck, file: FileId) -> Option<Action> {
    let mut edits: Vec<Edit> = Vec::new();
    // The ranges that are changed already, by their starts: a file may hold thousands.
    let mut taken: BTreeMap<usize, usize> = BTreeMap::new();
    let mut count = 0_usize;
    for finding in deck.findings.iter().filter(|finding| finding.place.file == file && finding.waived.is_none()) {
        // Several sure remedies of one finding would be none.
        let mut sure = finding.fixes.iter().filter(|fix| fix.sure);
        let (Some(fix), None) = (sure.next(), sure.next()) else { continue };
        let is_free = |span: Span| {
            let before = taken.range(..=span.end).next_back();
            before.is_none_or(|(_, end)| *end < span.start)
        };
        if fix.edits.iter().all(|new| new.file == file && is_free(new.span)) {
            taken.extend(fix.edits.iter().map(|edit| (edit.span.start, edit.span.end)));
            edits.extend(fix.edits.iter().cloned());
            count += 1;
        }
    }
    edits.sort_by_key(|edit| edit.span);
    (count > 0).then(|| Action {
        title: if count == 1 {
            "Carry out the sure remedy".into()
        } else {
            format!("Carry out all {count} sure remedies")
        },
        kind: ActionKind::FixAll,
        edits,
        sure: true,
        resolves: None,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at, edited};

    #[test]
    fn a_remedy_under_the_cursor_and_all_sure_ones() {
        let (deck, offset) = at("given\n    a = 3 Mp$0a\n    b = 2*a\nregion r\n    boxx 1 m by 1 m\n");
        let all = actions(&deck, DECK, Span::new(offset, offset));
        let fix = all.iter().find(|action| action.kind == ActionKind::QuickFix).unwrap();
        assert_eq!((fix.title.as_str(), fix.resolves, fix.sure), ("Write `MPa`", Some("unknown-unit"), true));
        assert!(edited(&deck, &fix.edits).contains("a = 3 MPa\n"));
        let every = all.iter().find(|action| action.kind == ActionKind::FixAll).unwrap();
        assert_eq!(edited(&deck, &every.edits), "given\n    a = 3 MPa\n    b = 2 * a\nregion r\n    box 1 m by 1 m\n");
    }

    #[test]
    fn no_action_has_changes_that_overlap() {
        let (deck, _) = at(
            "given\n    a = 3 Mpa\n    b = 2*a\n    T = 20 degC\nfluid f\n    substance water\n    density 998 kg/m^3\n    reference T at 2 bar$0\n",
        );
        let text = crate::ide::testing::text(&deck);
        for start in 0..=text.len() {
            for action in actions(&deck, DECK, Span::new(start, start)) {
                let mut edits = action.edits.clone();
                edits.sort_by_key(|edit| edit.span);
                assert!(edits.windows(2).all(|pair| pair[0].span.end <= pair[1].span.start), "{action:?}");
                assert!(!action.edits.is_empty(), "{action:?}");
            }
        }
    }
}
