//! `deckline vocabulary [WORD]`: the language, from the table that the checker reads.

use super::{SOUND, terminal};
use crate::quantity::suggest::nearest;
use crate::quantity::unit_table;
use crate::report::{Layout, wrap};
use crate::vocabulary::functions::{CONSTANTS, FUNCTIONS, REGION_NUMBERS};
use crate::vocabulary::print::{how_often, shape, takes};
use crate::vocabulary::{Choice, ENTRIES, EntryRow, STATEMENTS, Slot, StatementRow, Takes, statements_of};
use clap::Args;
use std::collections::BTreeSet;
use std::io::{self, Write};

/// Its options.
#[derive(Clone, Debug, Args)]
pub struct Arguments {
    /// An entry, a statement, a word that a statement offers, a function or a unit; without it, the list of entries and
    /// statements
    #[arg(value_name = "WORD")]
    pub word: Option<String>,
}

/// Runs it.
pub fn run(arguments: &Arguments) -> u8 {
    let layout = terminal::layout();
    let Some(word) = &arguments.word else {
        return terminal::print(SOUND, |out| list(out, layout));
    };
    let mut said = Vec::new();
    if let Err(error) = describe(word, &mut said, layout) {
        return terminal::fail(error);
    }
    if !said.is_empty() {
        return terminal::print(SOUND, |out| out.write_all(&said));
    }
    match nearest(word, known()) {
        Some(meant) => terminal::fail(format_args!("the language has no word `{word}`; `{meant}` may be meant")),
        None => terminal::fail(format_args!("the language has no word `{word}`; `deckline vocabulary` lists them")),
    }
}

fn list(out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    for (at, entry) in ENTRIES.iter().enumerate() {
        let head = shape(entry.word, entry.slots);
        writeln!(out, "{}{}", if at == 0 { "" } else { "\n" }, layout.paint.strong(&head))?;
        wrap::paragraph(out, entry.description, 2, 0, layout.width)?;
        for row in statements_of(entry.kind) {
            writeln!(out, "    {}", shape(row.word, row.slots))?;
        }
    }
    Ok(())
}

/// Writes everything that a word means; nothing for an unknown one.
fn describe(word: &str, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    for row in ENTRIES.iter().filter(|row| row.word == word) {
        entry(row, out, layout)?;
    }
    for row in STATEMENTS.iter().filter(|row| row.word == word) {
        statement(row, out, layout)?;
    }
    for row in STATEMENTS {
        for (slot, choice) in offered(row).filter(|(_, choice)| choice.word == word) {
            let owner = format!("{word}, in `{}`", shape(row.word, row.slots));
            block(&owner, choice.description, out, layout)?;
            wrap::paragraph(out, &format!("{} is {}.", slot.name.to_uppercase(), takes(slot)), 2, 2, layout.width)?;
        }
    }
    for function in FUNCTIONS.iter().filter(|function| function.name == word) {
        block(&format!("{word}(..)"), function.description, out, layout)?;
    }
    for constant in CONSTANTS.iter().filter(|constant| constant.name == word) {
        block(word, constant.description, out, layout)?;
    }
    for number in REGION_NUMBERS.iter().filter(|number| number.name == word) {
        block(&format!("{word}(REGION), in `require`"), number.description, out, layout)?;
    }
    if let Some(found) = unit_table::find(word) {
        let prefix = found.prefix.map_or("", |prefix| prefix.name);
        let unit = found.unit();
        let text = [
            format!("{prefix}{}, {}", found.row.name, unit.dimension.words()),
            if found.row.note.is_empty() { String::new() } else { format!("; {}", found.row.note) },
            format!(". The factor is from {}.", found.row.source),
        ];
        block(&format!("{word}, a unit"), &text.concat(), out, layout)?;
    }
    Ok(())
}

fn entry(row: &EntryRow, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    block(&shape(row.word, row.slots), row.description, out, layout)?;
    slots(row.slots, out, layout)?;
    writeln!(out, "  Stands {} in a deck.", how_often(row.times))?;
    let statements: Vec<String> = statements_of(row.kind).map(|row| shape(row.word, row.slots)).collect();
    if !statements.is_empty() {
        writeln!(out, "\n  Statements:")?;
        for statement in statements {
            writeln!(out, "    {statement}")?;
        }
    }
    example(row.example, out, layout)
}

fn statement(row: &'static StatementRow, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    let entries: Vec<&str> = row.entries.iter().map(|kind| kind.word()).collect();
    block(&format!("{}, in `{}`", shape(row.word, row.slots), entries.join("`, `")), row.description, out, layout)?;
    slots(row.slots, out, layout)?;
    writeln!(out, "  Stands {} in an entry.", how_often(row.times))?;
    let offered: Vec<&Choice> = offered(row).map(|(_, choice)| choice).collect();
    if !offered.is_empty() {
        writeln!(out)?;
        for choice in offered {
            wrap::paragraph(out, &format!("{}: {}", choice.word, choice.description), 4, 4, layout.width)?;
        }
    }
    example(row.example, out, layout)
}

fn block(title: &str, text: &str, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    writeln!(out, "{}", layout.paint.strong(title))?;
    wrap::paragraph(out, text, 2, 0, layout.width)
}

fn slots(slots: &[Slot], out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    for slot in slots {
        let text = format!("{} is {}.", slot.name.to_uppercase(), takes(slot));
        wrap::paragraph(out, &text, 2, 2, layout.width)?;
    }
    Ok(())
}

fn example(text: &str, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    writeln!(out, "\n  For example:\n")?;
    for line in text.lines() {
        writeln!(out, "    {}", layout.paint.faint(line))?;
    }
    writeln!(out)
}

/// The words that a statement offers, with the slot that does.
fn offered(row: &'static StatementRow) -> impl Iterator<Item = (&'static Slot, &'static Choice)> {
    row.slots.iter().flat_map(|slot| {
        let offered: &'static [Choice] = match slot.takes {
            Takes::Choice(offered) | Takes::ChoiceOrQuantity(offered, _) => offered,
            _ => &[],
        };
        offered.iter().map(move |choice| (slot, choice))
    })
}

/// Every word, for finding the one that was meant.
fn known() -> BTreeSet<&'static str> {
    let entries = ENTRIES.iter().map(|row| row.word);
    let statements = STATEMENTS.iter().map(|row| row.word);
    let offered = STATEMENTS.iter().flat_map(|row| offered(row).map(|(_, choice)| choice.word));
    let functions = FUNCTIONS.iter().map(|function| function.name);
    let numbers = REGION_NUMBERS.iter().map(|number| number.name);
    entries.chain(statements).chain(offered).chain(functions).chain(numbers).collect()
}
