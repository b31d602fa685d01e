//! What decks have to show: their findings with places as lines and columns, in the decks' own words.

use super::count::Count;
use super::position::{Index, Position};
use super::wrap::sentence;
use crate::syntax::tree::{Content, Entry};
use crate::syntax::{Finding, Level, Place};
use crate::workspace::deck::{Deck, SourceFile};
use schemars::JsonSchema;
use serde::Serialize;
use std::collections::HashMap;
use std::path::{Path, PathBuf};

/// One deck.
#[derive(Clone, Debug, Default)]
pub struct Sheet {
    /// Its path, as it is shown.
    pub path: String,
    /// The title of its case; empty if none.
    pub title: String,
    /// The gate of its practice; in a [`Report`], the one that holds for it.
    pub gate: Option<Level>,
    /// Every file that it was read from.
    pub files: Vec<PathBuf>,
    /// What was found, by file and place.
    pub remarks: Vec<Remark>,
}

/// One finding and where it stands.
#[derive(Clone, Debug)]
pub struct Remark {
    /// The finding.
    pub finding: Finding,
    /// Its place.
    pub spot: Spot,
    /// Head of the entry that it stands in ("fluid cabinet_air"); empty before the first entry.
    pub entry: String,
    /// Line of that head.
    pub entry_line: usize,
    /// The first line of the place as written, its white space squeezed; empty where it is the entry's head.
    pub statement: String,
    /// The places of `finding.related`, in its order.
    pub related: Vec<Spot>,
    /// The places of the edits of `finding.fixes`, in their order.
    pub edits: Vec<Vec<Spot>>,
    /// Other decks that have the very same remark, because they include the file.
    pub also_in: Vec<String>,
    /// Whether it is at the gate of a deck that has it, or above it.
    pub reaches_gate: bool,
}

/// A file that could not be read.
#[derive(Clone, PartialEq, Eq, PartialOrd, Ord, Debug, Serialize, JsonSchema)]
pub struct Unreadable {
    /// Its path.
    pub path: String,
    /// Why.
    pub message: String,
}

/// Everything that an assessment found, in the order in which it is shown.
#[derive(Clone, Debug, Default)]
pub struct Report {
    /// The decks by path. What several of them share, because they include the same file, stands in the first only.
    pub sheets: Vec<Sheet>,
    /// Files that could not be read, by path.
    pub unreadable: Vec<Unreadable>,
    /// Numbers of findings.
    pub count: Count,
}

impl Report {
    /// The report of decks. A finding reaches the gate at the level `gate`; without one, at that of the deck's
    /// practice, or else at warning.
    pub fn of(mut sheets: Vec<Sheet>, gate: Option<Level>, mut unreadable: Vec<Unreadable>) -> Report {
        sheets.sort_by(|one, other| one.path.cmp(&other.path));
        sheets.dedup_by(|one, other| one.path == other.path);
        for sheet in &mut sheets {
            sheet.gate = gate.or(sheet.gate);
            let level = sheet.gate.unwrap_or(Level::Warning);
            for remark in &mut sheet.remarks {
                remark.reaches_gate = remark.finding.waived.is_none() && remark.finding.level >= level;
            }
        }
        say_once(&mut sheets);
        unreadable.sort();
        unreadable.dedup();
        Report { count: Count::of(&sheets), sheets, unreadable }
    }
}

/// A place in a file.
#[derive(Clone, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Default)]
pub struct Spot {
    /// The file's path, as it is shown.
    pub file: String,
    /// First character.
    pub start: Position,
    /// One past the last.
    pub end: Position,
}

impl Sheet {
    /// The sheet of a deck. Where the deck's own path is relative, so are those of the files that it includes: to
    /// `folder`, the folder that the deck's is relative to.
    pub fn of(deck: &Deck, folder: &Path) -> Sheet {
        let relative = deck.files.first().is_some_and(|file| file.path.is_relative());
        let indexed: Vec<Indexed<'_>> = deck
            .files
            .iter()
            .map(|file| Indexed {
                file,
                index: Index::of(&file.text),
                shown: shown(&file.path, relative.then_some(folder)),
            })
            .collect();
        let mut remarks: Vec<Remark> = deck.findings.iter().map(|finding| Remark::of(finding, &indexed)).collect();
        // The deck itself before what it includes, then by place; the order in which checks ran decides nothing.
        remarks.sort_by(|one, other| one.key().cmp(&other.key()));
        Sheet {
            path: indexed.first().map(|file| file.shown.clone()).unwrap_or_default(),
            title: deck.case.title.as_ref().map(|title| title.text.to_string()).unwrap_or_default(),
            gate: deck.case.practice.gate,
            files: deck.files.iter().map(|file| file.path.clone()).collect(),
            remarks,
        }
    }
}

impl Remark {
    fn of(finding: &Finding, files: &[Indexed<'_>]) -> Remark {
        let spot = |place: Place| spot(place, files);
        let place = finding.place;
        let start = spot(place);
        let file = files.get(place.file.0 as usize);
        let (entry, entry_line) = file.and_then(|file| head(file, place)).unwrap_or_default();
        let on_head = start.start.line == entry_line;
        let line = file.map_or("", |file| file.index.line(start.start.line));
        Remark {
            statement: if on_head { String::new() } else { squeezed(line) },
            entry,
            entry_line,
            spot: start,
            related: finding.related.iter().map(|related| spot(related.place)).collect(),
            edits: finding
                .fixes
                .iter()
                .map(|fix| fix.edits.iter().map(|edit| spot(Place::new(edit.file, edit.span))).collect())
                .collect(),
            finding: finding.clone(),
            also_in: Vec::new(),
            reaches_gate: false,
        }
    }

    fn key(&self) -> impl Ord + '_ {
        let finding = &self.finding;
        let place = finding.place;
        (
            place.file,
            place.span.start,
            place.span.end,
            std::cmp::Reverse(finding.level),
            finding.check,
            &finding.message,
        )
    }

    /// The message and what stands beside it in one paragraph.
    pub fn whole_message(&self) -> String {
        let mut said = sentence(&self.finding.message);
        if let Some(points) = &self.finding.points {
            said.push_str(&format!(" At {} of {} points, first at {}.", points.count, points.total, points.first));
        }
        said
    }
}

/// Leaves the remarks that several decks share, because they include the same file, in the first of them only.
fn say_once(sheets: &mut [Sheet]) {
    type Key = (Spot, &'static str, String, bool);
    let mut first_in: HashMap<Key, (usize, usize)> = HashMap::new();
    let mut again: Vec<((usize, usize), String, bool)> = Vec::new();
    for (at, sheet) in sheets.iter_mut().enumerate() {
        let path = sheet.path.clone();
        let mut kept = 0;
        sheet.remarks.retain(|remark| {
            let finding = &remark.finding;
            let key = (remark.spot.clone(), finding.check, finding.message.clone(), finding.waived.is_some());
            if let Some(&first) = first_in.get(&key) {
                again.push((first, path.clone(), remark.reaches_gate));
                return false;
            }
            first_in.insert(key, (at, kept));
            kept += 1;
            true
        });
    }
    for ((sheet, remark), path, reaches_gate) in again {
        let Some(sheet) = sheets.get_mut(sheet) else { continue };
        let Some(first) = sheet.remarks.get_mut(remark) else { continue };
        first.reaches_gate |= reaches_gate;
        if path != sheet.path && first.also_in.last() != Some(&path) {
            first.also_in.push(path);
        }
    }
}

/// A file, the index of its lines and its path as it is shown.
struct Indexed<'a> {
    file: &'a SourceFile,
    index: Index<'a>,
    shown: String,
}

fn shown(path: &Path, relative_to: Option<&Path>) -> String {
    let path = match relative_to {
        Some(folder) if path.is_absolute() => pathdiff::diff_paths(path, folder).unwrap_or_else(|| path.to_path_buf()),
        _ => path.to_path_buf(),
    };
    path.strip_prefix(".").unwrap_or(&path).to_string_lossy().into_owned()
}

fn spot(place: Place, files: &[Indexed<'_>]) -> Spot {
    let Some(Indexed { index, shown, .. }) = files.get(place.file.0 as usize) else { return Spot::default() };
    let (start, end) = (index.at(place.span.start), index.at(place.span.end));
    Spot { file: shown.clone(), start, end: end.max(start) }
}

/// Head and line of the entry around a place.
fn head(Indexed { file, index, .. }: &Indexed<'_>, place: Place) -> Option<(String, usize)> {
    let placed = file.tree.entries.get(file.tree.entry_at(place.span.start)?)?;
    let entry = &placed.entry;
    let line = entry.lines.get(entry.head?)?;
    Some((head_words(entry).unwrap_or_default(), index.at(placed.start + line.span.start).line))
}

/// The head of an entry as a person would say it: its word and names, without a title, path or comment.
fn head_words(entry: &Entry) -> Option<String> {
    let line = entry.lines.get(entry.head?)?;
    Some(match &line.content {
        Content::Phrase(phrase) => squeezed(phrase.span.of(&entry.text)),
        _ => squeezed(line.span.of(&entry.text)),
    })
}

/// A line with single spaces and without what follows a `#` outside quotes.
fn squeezed(line: &str) -> String {
    let mut quoted = false;
    let end = line.char_indices().find(|(_, character)| {
        quoted ^= *character == '"';
        *character == '#' && !quoted
    });
    let said = end.map_or(line, |(at, _)| line.get(..at).unwrap_or(line));
    let said = if said.trim().is_empty() { line } else { said };
    said.split_whitespace().collect::<Vec<_>>().join(" ")
}

#[cfg(test)]
mod tests {
    use super::squeezed;

    #[test]
    fn a_statement_is_quoted_without_its_layout() {
        assert_eq!(squeezed("    density-law    boussinesq   # for now"), "density-law boussinesq");
        assert_eq!(squeezed("  purpose \"case #2\" # x"), "purpose \"case #2\"");
        assert_eq!(squeezed("# only a comment"), "# only a comment");
        assert_eq!(squeezed(""), "");
    }
}
