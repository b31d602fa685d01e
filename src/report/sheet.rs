//! What a deck has to show: its findings with their places as lines and columns, in the deck's own words.

use super::position::{Index, Position};
use crate::syntax::tree::{Content, Entry};
use crate::syntax::{Finding, Level, Place};
use crate::workspace::deck::{Deck, SourceFile};
use std::collections::{BTreeSet, HashMap};
use std::path::PathBuf;

/// One deck.
#[derive(Clone, Debug, Default)]
pub struct Sheet {
    /// Its path, as it is shown.
    pub path: String,
    /// The title of its case; empty if none.
    pub title: String,
    /// The gate of its practice.
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
    /// The sheet of a deck.
    pub fn of(deck: &Deck) -> Sheet {
        let indexed: Vec<(&SourceFile, Index<'_>)> =
            deck.files.iter().map(|file| (&**file, Index::of(&file.text))).collect();
        let mut remarks: Vec<Remark> = deck.findings.iter().map(|finding| Remark::of(finding, &indexed)).collect();
        // The deck itself before what it includes, then by place; the order in which checks ran decides nothing.
        remarks.sort_by(|one, other| one.key().cmp(&other.key()));
        Sheet {
            path: deck.files.first().map(|file| shown(file)).unwrap_or_default(),
            title: deck.case.title.as_ref().map(|title| title.text.to_string()).unwrap_or_default(),
            gate: deck.case.practice.gate,
            files: deck.files.iter().map(|file| file.path.clone()).collect(),
            remarks,
        }
    }
}

impl Remark {
    fn of(finding: &Finding, files: &[(&SourceFile, Index<'_>)]) -> Remark {
        let spot = |place: Place| spot(place, files);
        let place = finding.place;
        let start = spot(place);
        let file = files.get(place.file.0 as usize);
        let (entry, entry_line) = file.and_then(|file| head(file, place)).unwrap_or_default();
        let on_head = start.start.line == entry_line;
        let line = file.map_or("", |(_, index)| index.line(start.start.line));
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
        }
    }

    fn key(&self) -> impl Ord + '_ {
        let finding = &self.finding;
        let place = finding.place;
        (place.file, place.span.start, place.span.end, std::cmp::Reverse(finding.level), finding.check, &finding.message)
    }

    /// The message and what stands beside it in one paragraph.
    pub fn whole_message(&self) -> String {
        let mut said = self.finding.message.clone();
        if let Some(points) = &self.finding.points {
            said.push_str(&format!(" At {} of {} points, first at {}.", points.count, points.total, points.first));
        }
        said
    }
}

/// Sheets by path, with the remarks that several decks share, because they include the same file, in the first of
/// them only.
pub fn in_order(sheets: &[Sheet]) -> Vec<Sheet> {
    let mut sheets = sheets.to_vec();
    sheets.sort_by(|one, other| one.path.cmp(&other.path));
    let mut first_in: HashMap<(String, Position, Position, &'static str, String, bool), (usize, usize)> = HashMap::new();
    let mut shared: Vec<((usize, usize), String)> = Vec::new();
    for (at, sheet) in sheets.iter_mut().enumerate() {
        let path = sheet.path.clone();
        let mut kept = 0;
        sheet.remarks.retain(|remark| {
            let (spot, finding) = (&remark.spot, &remark.finding);
            let key = (spot.file.clone(), spot.start, spot.end, finding.check, finding.message.clone(), finding.waived.is_some());
            if let Some(&first) = first_in.get(&key) {
                if first.0 != at {
                    shared.push((first, path.clone()));
                }
                return false;
            }
            first_in.insert(key, (at, kept));
            kept += 1;
            true
        });
    }
    for ((sheet, remark), path) in shared {
        if let Some(remark) = sheets.get_mut(sheet).and_then(|sheet| sheet.remarks.get_mut(remark)) {
            let known: BTreeSet<String> = remark.also_in.drain(..).chain([path]).collect();
            remark.also_in = known.into_iter().collect();
        }
    }
    sheets
}

fn shown(file: &SourceFile) -> String {
    file.path.to_string_lossy().into_owned()
}

fn spot(place: Place, files: &[(&SourceFile, Index<'_>)]) -> Spot {
    let Some((file, index)) = files.get(place.file.0 as usize) else { return Spot::default() };
    let (start, end) = (index.at(place.span.start), index.at(place.span.end));
    Spot { file: shown(file), start, end: end.max(start) }
}

/// Head and line of the entry around a place.
fn head((file, index): &(&SourceFile, Index<'_>), place: Place) -> Option<(String, usize)> {
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
