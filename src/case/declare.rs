//! Reads the tree by the vocabulary: which entry and statement each line is, and which argument fills which slot.
//! What does not fit becomes a finding of the family "writing".

use crate::case::Source;
use crate::quantity::suggest::nearest;
use crate::syntax::tree::{Content, Definition, Entry, Expression, ExpressionKind, Line, Phrase, Requirement, Row};
use crate::syntax::{FileId, Finding, Level, Place, Span};
use crate::vocabulary::rows::Holds;
use crate::vocabulary::{self, EntryKind, EntryRow, NameOf, Need, Slot, StatementRow, Takes, Times};

/// An entry of a known kind.
#[derive(Debug)]
pub struct DeclaredEntry<'t> {
    /// The file it stands in.
    pub file: FileId,
    /// Where its text starts in the file: spans of the tree count from there.
    pub offset: usize,
    /// Its tree.
    pub entry: &'t Entry,
    /// Its row in the vocabulary.
    pub row: &'static EntryRow,
    /// Place of its head line.
    pub head: Place,
    /// What fills the slots of its head.
    pub arguments: Vec<Vec<&'t Expression>>,
    /// Its statements.
    pub statements: Vec<DeclaredStatement<'t>>,
    /// Its other lines.
    pub definitions: Vec<&'t Definition>,
    /// Sweeps: the name and what it runs over.
    pub sweeps: Vec<(&'t Phrase, Option<&'t Expression>)>,
    /// Comparisons.
    pub requirements: Vec<&'t Requirement>,
    /// Table rows, each with the number of the statement that it follows.
    pub rows: Vec<(Option<usize>, &'t Row)>,
}

/// A statement of a known word.
#[derive(Debug)]
pub struct DeclaredStatement<'t> {
    /// Its row in the vocabulary.
    pub row: &'static StatementRow,
    /// Its place.
    pub place: Place,
    /// What fills its slots, slot by slot.
    pub arguments: Vec<Vec<&'t Expression>>,
}

impl DeclaredEntry<'_> {
    /// A span of the entry's tree as a place in the file.
    pub fn place(&self, span: Span) -> Place {
        Place::new(self.file, span.shifted(self.offset))
    }

    /// The entry's own name, if its head has a slot for one and it is filled.
    pub fn name(&self) -> Option<(&str, Place)> {
        let index = self.row.slots.iter().position(|slot| matches!(slot.takes, Takes::NewName))?;
        let expression = self.arguments.get(index)?.first()?;
        match &expression.kind {
            ExpressionKind::Word(word) => Some((word, self.place(expression.span))),
            _ => None,
        }
    }

    /// What to call the entry in a message: "boundary `boards`", "run".
    pub fn title(&self) -> String {
        match self.name() {
            Some((name, _)) => format!("{} `{name}`", self.row.word),
            None => self.row.word.to_string(),
        }
    }
}

/// Every entry of the sources that the vocabulary knows, in order.
pub fn declare<'t>(sources: &[Source<'t>], findings: &mut Vec<Finding>) -> Vec<DeclaredEntry<'t>> {
    let mut declared = Vec::new();
    for source in sources {
        for placed in &source.tree.entries {
            if let Some(entry) = declare_entry(source.file, placed.start, &placed.entry, findings) {
                declared.push(entry);
            }
        }
    }
    check_counts(&declared, findings);
    declared
}

fn declare_entry<'t>(
    file: FileId,
    offset: usize,
    entry: &'t Entry,
    findings: &mut Vec<Finding>,
) -> Option<DeclaredEntry<'t>> {
    let place = |span: Span| Place::new(file, span.shifted(offset));
    for line in &entry.lines {
        report_problem(line, file, offset, findings);
    }
    let Some(head_index) = entry.head else {
        for line in entry.lines.iter().filter(|line| line.content != Content::Blank) {
            let finding = Finding::new(
                "misplaced-statement",
                Level::Error,
                place(content_span(line)),
                "This line is indented but no entry stands above it.",
            );
            findings.push(finding.remedy("an entry above it, in the first column, such as `region NAME`"));
        }
        return None;
    };
    let head = entry.lines.get(head_index)?;
    let phrase = match &head.content {
        Content::Phrase(phrase) => phrase,
        Content::Blank => return None,
        Content::Definition(_) | Content::Row(_) | Content::Requirement(_) => {
            let finding = Finding::new(
                "misplaced-statement",
                Level::Error,
                place(content_span(head)),
                "This line stands in the first column, where only an entry starts.",
            );
            findings.push(finding.remedy("white space before it, below the entry that it belongs to"));
            return None;
        }
    };
    let Some(row) = vocabulary::entry_row(&phrase.word.text) else {
        findings.push(unknown_entry(phrase, file, offset));
        return None;
    };
    let mut declared = DeclaredEntry {
        file,
        offset,
        entry,
        row,
        head: place(phrase.span),
        arguments: bind(row.word, row.slots, phrase, head, file, offset, findings),
        statements: Vec::new(),
        definitions: Vec::new(),
        sweeps: Vec::new(),
        requirements: Vec::new(),
        rows: Vec::new(),
    };
    for line in entry.statements() {
        declare_line(&mut declared, line, findings);
    }
    Some(declared)
}

fn report_problem(line: &Line, file: FileId, offset: usize, findings: &mut Vec<Finding>) {
    if let Some(problem) = &line.problem {
        let mut span = problem.span.shifted(offset);
        if span.start == span.end {
            // Something to point at: the last byte of what was written.
            span.start = span.start.saturating_sub(1).max(line.span.start + offset);
        }
        findings.push(Finding::new(problem.check, Level::Error, Place::new(file, span), problem.message.clone()));
    }
}

fn content_span(line: &Line) -> Span {
    match &line.content {
        Content::Blank => line.span,
        Content::Phrase(phrase) => phrase.span,
        Content::Definition(definition) => definition.span,
        Content::Row(row) => row.span,
        Content::Requirement(requirement) => requirement.span,
    }
}

fn unknown_entry(phrase: &Phrase, file: FileId, offset: usize) -> Finding {
    let word = &*phrase.word.text;
    let place = Place::new(file, phrase.word.span.shifted(offset));
    let statement_of = vocabulary::STATEMENTS.iter().find(|row| row.word == word);
    if let Some(row) = statement_of {
        let homes: Vec<&str> = row.entries.iter().map(|kind| kind.word()).collect();
        let message = format!(
            "`{word}` is a statement of {}; it starts in the first column here, as an entry does.",
            join(&homes)
        );
        let finding = Finding::new("misplaced-statement", Level::Error, place, message);
        let start = Span::new(place.span.start, place.span.start);
        return finding.remedy("white space before it").fix("Indent it", start, "    ", false);
    }
    let finding = Finding::new("unknown-word", Level::Error, place, format!("No entry starts with `{word}`."));
    match nearest(word, vocabulary::ENTRIES.iter().map(|row| row.word)) {
        Some(meant) => finding.remedy(format!("`{meant}`")).fix(format!("Write `{meant}`"), place.span, meant, true),
        None => {
            let words: Vec<&str> = vocabulary::ENTRIES.iter().map(|row| row.word).collect();
            finding.remedy(format!("one of {}", join(&words)))
        }
    }
}

fn declare_line<'t>(declared: &mut DeclaredEntry<'t>, line: &'t Line, findings: &mut Vec<Finding>) {
    let holds = declared.row.holds;
    let misplaced = |what: &str, declared: &DeclaredEntry<'_>| {
        let message = format!("{what} has no place in {}.", declared.title());
        Finding::new("misplaced-statement", Level::Error, declared.place(content_span(line)), message)
    };
    match &line.content {
        Content::Blank => {}
        Content::Definition(definition) => match holds {
            Holds::Definitions | Holds::DefinitionsAndRows => declared.definitions.push(definition),
            _ => {
                let finding = misplaced("A definition", declared);
                findings.push(finding.remedy("a line of its own below `given`"));
            }
        },
        Content::Row(row) => match holds {
            Holds::DefinitionsAndRows => declared.rows.push((declared.statements.len().checked_sub(1), row)),
            _ => findings.push(misplaced("A table row", declared).remedy("a row below `table` in a substance")),
        },
        Content::Requirement(requirement) => match holds {
            Holds::Requirements => declared.requirements.push(requirement),
            _ => findings.push(misplaced("A comparison", declared).remedy("a line below `require`")),
        },
        Content::Phrase(phrase) => declare_phrase(declared, line, phrase, findings),
    }
}

fn declare_phrase<'t>(
    declared: &mut DeclaredEntry<'t>,
    line: &'t Line,
    phrase: &'t Phrase,
    findings: &mut Vec<Finding>,
) {
    let (file, offset, kind) = (declared.file, declared.offset, declared.row.kind);
    if declared.row.holds == Holds::Sweeps
        && let Some(over) = phrase.links.iter().find(|part| &*part.link.text == "over")
    {
        declared.sweeps.push((phrase, over.arguments.first()));
        return;
    }
    if let Some(description) = &phrase.description {
        let at = declared.place(description.span);
        let message = "A text behind a statement describes it only for a definition and a sweep.";
        let comment = format!("# {}", description.text);
        let finding = Finding::new("unexpected-argument", Level::Error, at, message).remedy("a comment");
        findings.push(finding.fix("Make it a comment", at.span, comment, true));
    }
    match vocabulary::statement_row(kind, &phrase.word.text) {
        Some(row) => {
            let arguments = bind(row.word, row.slots, phrase, line, file, offset, findings);
            declared.statements.push(DeclaredStatement { row, place: declared.place(phrase.span), arguments });
        }
        // A line with a problem of its own has been reported, and its word may not be what was meant.
        None if line.problem.is_some() => {}
        None => findings.push(unknown_statement(declared, phrase)),
    }
}

fn unknown_statement(declared: &DeclaredEntry<'_>, phrase: &Phrase) -> Finding {
    let kind = declared.row.kind;
    let word = &*phrase.word.text;
    let place = declared.place(phrase.word.span);
    if let Some(row) = vocabulary::STATEMENTS.iter().find(|row| row.word == word) {
        let homes: Vec<&str> = row.entries.iter().map(|kind| kind.word()).collect();
        let message = format!("`{word}` is a statement of {}, not of {}.", join(&homes), declared.row.word);
        return Finding::new("misplaced-statement", Level::Error, place, message);
    }
    if vocabulary::entry_row(word).is_some() {
        let message = format!("`{word}` starts an entry, and an entry starts in the first column.");
        let space = Span::new(place.span.start.saturating_sub(indent_before(declared, phrase)), place.span.start);
        return Finding::new("misplaced-statement", Level::Error, place, message).fix(
            "Start it in the first column",
            space,
            "",
            false,
        );
    }
    let finding = Finding::new(
        "unknown-word",
        Level::Error,
        place,
        format!("`{word}` is no statement of {}.", declared.row.word),
    );
    let words: Vec<&str> = vocabulary::statements_of(kind).map(|row| row.word).collect();
    match nearest(word, words.iter().copied()) {
        Some(meant) => finding.remedy(format!("`{meant}`")).fix(format!("Write `{meant}`"), place.span, meant, true),
        None => {
            if words.is_empty() {
                finding
            } else {
                finding.remedy(format!("one of {}", join(&words)))
            }
        }
    }
}

/// How many bytes of white space stand before the phrase on its line.
fn indent_before(declared: &DeclaredEntry<'_>, phrase: &Phrase) -> usize {
    let before = declared.entry.text.get(..phrase.span.start).unwrap_or("");
    before.len() - before.trim_end_matches([' ', '\t']).len()
}

/// Fills slots with the arguments of a phrase. Links may come in any order; several slots with one link are
/// filled in turn.
fn bind<'t>(
    word: &str,
    slots: &'static [Slot],
    phrase: &'t Phrase,
    line: &Line,
    file: FileId,
    offset: usize,
    findings: &mut Vec<Finding>,
) -> Vec<Vec<&'t Expression>> {
    let place = |span: Span| Place::new(file, span.shifted(offset));
    let mut bound: Vec<Vec<&'t Expression>> = vec![Vec::new(); slots.len()];
    let mut taken = vec![false; slots.len()];
    let direct = (!phrase.arguments.is_empty()).then_some(("", &phrase.arguments, phrase.word.span));
    let linked = phrase.links.iter().map(|part| (&*part.link.text, &part.arguments, part.link.span));
    for (link, arguments, span) in direct.into_iter().chain(linked) {
        let free = slots
            .iter()
            .enumerate()
            .position(|(index, slot)| slot.link == link && !taken.get(index).copied().unwrap_or(true));
        let Some(index) = free else {
            let at = arguments
                .last()
                .map_or(span, |last| arguments.first().map_or(span, |first| first.span.cover(last.span)));
            findings.push(unexpected(word, slots, link, place(if link.is_empty() { at } else { span.cover(at) })));
            continue;
        };
        if let Some(taken) = taken.get_mut(index) {
            *taken = true;
        }
        let many = slots.get(index).is_some_and(|slot| matches!(slot.need, Need::Several | Need::OneOrMore));
        if let (false, Some(second)) = (many, arguments.get(1)) {
            let rest = arguments.iter().skip(1).fold(second.span, |span, more| span.cover(more.span));
            let message = format!("`{word}` takes one value here, not a list.");
            findings.push(Finding::new("unexpected-argument", Level::Error, place(rest), message));
        }
        if let Some(slot) = bound.get_mut(index) {
            slot.extend(arguments.iter().take(if many { usize::MAX } else { 1 }));
        }
    }
    // Where the line could not be read to its end, what is missing may stand in the unread part.
    if line.problem.is_none() {
        for (slot, arguments) in slots.iter().zip(&bound) {
            if matches!(slot.need, Need::Required | Need::OneOrMore) && arguments.is_empty() {
                findings.push(missing(word, slot, place(phrase.span)));
            }
        }
    }
    bound
}

fn unexpected(word: &str, slots: &[Slot], link: &str, place: Place) -> Finding {
    let message = match link {
        "" if slots.is_empty() => format!("`{word}` takes nothing behind it."),
        "" => format!("`{word}` takes no value directly behind it."),
        link => format!("`{word}` takes nothing behind `{link}`, or not so often."),
    };
    let finding = Finding::new("unexpected-argument", Level::Error, place, message);
    if slots.is_empty() { finding } else { finding.remedy(format!("`{}`", form(word, slots))) }
}

fn missing(word: &str, slot: &Slot, place: Place) -> Finding {
    let what = slot.name.replace('-', " ");
    let message = match slot.link {
        "" => format!("`{word}` needs the {what} behind it."),
        link => format!("`{word}` needs the {what} behind `{link}`."),
    };
    Finding::new("missing-argument", Level::Error, place, message)
}

/// The form of a phrase: "reference TEMPERATURE at PRESSURE".
pub fn form(word: &str, slots: &[Slot]) -> String {
    let mut form = word.to_string();
    for slot in slots {
        let name = match slot.takes {
            Takes::Choice(choices) if choices.len() <= 4 && slot.need == Need::Required => {
                choices.iter().map(|choice| choice.word).collect::<Vec<_>>().join(" / ")
            }
            _ => slot.name.to_uppercase(),
        };
        let part = if slot.link.is_empty() { name } else { format!("{} {name}", slot.link) };
        let part = if matches!(slot.need, Need::Required | Need::OneOrMore) { part } else { format!("({part})") };
        form.push(' ');
        form.push_str(&part);
    }
    form
}

/// "a, b and c", each in back quotes.
pub fn join(words: &[&str]) -> String {
    let quoted: Vec<String> = words.iter().map(|word| format!("`{word}`")).collect();
    match quoted.split_last() {
        Some((last, rest)) if !rest.is_empty() => format!("{} and {last}", rest.join(", ")),
        Some((last, _)) => last.clone(),
        None => String::new(),
    }
}

fn check_counts(declared: &[DeclaredEntry<'_>], findings: &mut Vec<Finding>) {
    for row in vocabulary::ENTRIES.iter().filter(|row| row.times != Times::Any) {
        let mut all = declared.iter().filter(|entry| entry.row.kind == row.kind);
        let first = all.next();
        for again in all {
            let message = format!("A deck has one `{}`; this is another.", row.word);
            let finding = Finding::new("repeated-statement", Level::Error, again.head, message);
            findings.push(match first {
                Some(first) => finding.related(first.head, "the first one"),
                None => finding,
            });
        }
    }
    for entry in declared {
        check_statement_counts(entry, findings);
    }
}

fn check_statement_counts(entry: &DeclaredEntry<'_>, findings: &mut Vec<Finding>) {
    let mut seen: Vec<(&str, Place)> = Vec::new();
    for statement in entry.statements.iter().filter(|statement| statement.row.times != Times::Any) {
        match seen.iter().find(|(word, _)| *word == statement.row.word) {
            Some((word, first)) => {
                let message = format!("{} has `{word}` already.", capitalised(&entry.title()));
                let finding = Finding::new("repeated-statement", Level::Error, statement.place, message);
                findings.push(finding.related(*first, "the first one"));
            }
            None => seen.push((statement.row.word, statement.place)),
        }
    }
    let is_unreadable = entry.entry.lines.iter().any(|line| line.problem.is_some());
    if is_unreadable {
        return;
    }
    for row in vocabulary::statements_of(entry.row.kind).filter(|row| row.times == Times::Once) {
        if !seen.iter().any(|(word, _)| *word == row.word) {
            let message = format!("{} has no `{}`.", capitalised(&entry.title()), row.word);
            findings.push(
                Finding::new("missing-statement", Level::Error, entry.head, message)
                    .remedy(format!("`{}`", form(row.word, row.slots))),
            );
        }
    }
}

/// The text with its first letter large.
pub fn capitalised(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}

/// What kind of thing an entry's own name names.
pub fn named_kind(kind: EntryKind) -> Option<NameOf> {
    match kind {
        EntryKind::Substance => Some(NameOf::Substance),
        EntryKind::Fluid => Some(NameOf::Fluid),
        EntryKind::Solid => Some(NameOf::Solid),
        EntryKind::Region => Some(NameOf::Region),
        EntryKind::Boundary => Some(NameOf::Boundary),
        _ => None,
    }
}
