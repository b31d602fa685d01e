//! Findings for a person at a terminal: by deck, then by entry and statement, in the deck's own words.
//!
//! ```text
//! instrument-cabinet.buoy
//!
//!   fluid cabinet_air
//!
//!     line 16: density-law boussinesq
//!     density-span, warning
//!     αΔT is 0.148 between 25 and 70 degC; the Boussinesq law is held to 0.1.
//!       αΔT  0 ······················ 0.1 |···········◆ 0.148
//!     Put right by: density-law ideal-gas, or T_hot below 55 degC.
//! ```

use super::paint::{Paint, harmless};
use super::sheet::{Remark, Report, Sheet, Spot};
use super::wrap::{self, sentence};
use super::{Layout, scale};
use crate::syntax::Level;
use std::io::{self, Write};
use unicode_width::UnicodeWidthStr;

/// Columns by which entries stand in.
const ENTRY: usize = 2;
/// Columns by which remarks stand in.
const REMARK: usize = 4;

/// Writes the cards and a closing summary.
///
/// # Errors
/// Those of `out`.
pub fn write(report: &Report, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    for sheet in report.sheets.iter().filter(|sheet| !sheet.remarks.is_empty()) {
        deck(sheet, out, layout)?;
    }
    closing(report, out, layout)
}

fn deck(sheet: &Sheet, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    writeln!(out, "{}", layout.paint.strong(&harmless(&sheet.path)))?;
    let (waived, counted): (Vec<&Remark>, Vec<&Remark>) =
        sheet.remarks.iter().partition(|remark| remark.finding.waived.is_some());
    let mut above: Option<&Remark> = None;
    for remark in counted {
        let same_entry = above.is_some_and(|above| {
            (&above.entry, above.entry_line, &above.spot.file) == (&remark.entry, remark.entry_line, &remark.spot.file)
        });
        if !same_entry {
            heading(remark, sheet, out, layout)?;
        }
        let same_line = same_entry && above.is_some_and(|above| above.spot.start.line == remark.spot.start.line);
        card(remark, above.filter(|_| same_entry), !same_line, out, layout)?;
        above = Some(remark);
    }
    if !waived.is_empty() {
        writeln!(out)?;
        waivers(&waived, out, layout)?;
    }
    writeln!(out)
}

/// The entry, and its file where that is not the deck.
fn heading(remark: &Remark, sheet: &Sheet, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    let indent = " ".repeat(ENTRY);
    let elsewhere = if remark.spot.file == sheet.path { None } else { Some(harmless(&remark.spot.file)) };
    let entry = match (remark.entry.as_str(), &elsewhere) {
        ("", _) => "above the first entry".to_string(),
        (entry, _) => cut(&harmless(entry), layout.width.saturating_sub(ENTRY)),
    };
    write!(out, "\n{indent}{}", layout.paint.strong(&entry))?;
    match elsewhere {
        None => writeln!(out),
        Some(file) => writeln!(out, "{}", layout.paint.faint(&format!(", in {file}"))),
    }
}

fn card(
    remark: &Remark,
    above: Option<&Remark>,
    with_line: bool,
    out: &mut dyn Write,
    layout: Layout,
) -> io::Result<()> {
    let (finding, indent) = (&remark.finding, " ".repeat(REMARK));
    let paint = layout.paint;
    writeln!(out)?;
    if with_line {
        let line = format!("line {}", remark.spot.start.line);
        let said = harmless(&remark.statement);
        let quoted = if said.is_empty() { line } else { format!("{line}: {said}") };
        writeln!(out, "{indent}{}", paint.faint(&cut(&quoted, layout.width.saturating_sub(REMARK))))?;
    }
    let level = paint.level(finding.level, finding.level.word()).to_string();
    writeln!(out, "{indent}{}, {level}", paint.strong(finding.check))?;
    wrap::paragraph(out, &sentence(&harmless(&remark.whole_message())), REMARK, 0, layout.width)?;
    if let Some(drawn) =
        finding.margin.as_ref().and_then(|margin| scale::line(margin, layout.width.min(wrap::WIDEST) - REMARK - 2))
    {
        writeln!(out, "{indent}  {}", coloured(&harmless(&drawn), finding.level, paint))?;
    }
    if let Some(remedy) = remedy(remark) {
        wrap::paragraph(out, &harmless(&remedy), REMARK, 2, layout.width)?;
    }
    // Findings about one span of temperatures all point to what sets it: once is enough.
    let said_above = above.is_some_and(|above| above.finding.related == finding.related);
    for (related, spot) in finding.related.iter().zip(&remark.related).filter(|_| !said_above) {
        let place = place_beside(spot, &remark.spot);
        let text = sentence(&format!("See {place}: {}", harmless(&related.message)));
        wrap::paragraph(out, &text, REMARK, 2, layout.width)?;
    }
    if !remark.also_in.is_empty() {
        wrap::paragraph(out, &format!("Also in {}.", shortened(&remark.also_in)), REMARK, 2, layout.width)?;
    }
    Ok(())
}

/// The advice in words; where there is none, what the surest fix does.
fn remedy(remark: &Remark) -> Option<String> {
    let finding = &remark.finding;
    if !finding.remedy.is_empty() {
        return Some(sentence(&format!("Put right by: {}", finding.remedy)));
    }
    let fix = finding.fixes.iter().find(|fix| fix.sure).or(finding.fixes.first())?;
    let mut letters = fix.title.chars();
    let first: String = letters.next().map(|first| first.to_lowercase().collect()).unwrap_or_default();
    Some(sentence(&format!("To put it right, {first}{}", letters.as_str())))
}

fn waivers(waived: &[&Remark], out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    let mut said: Vec<(String, usize)> = Vec::new();
    for remark in waived {
        let finding = &remark.finding;
        let of = if finding.subject.is_empty() { String::new() } else { format!(" of {}", finding.subject) };
        let reason = finding.waived.as_deref().unwrap_or_default();
        let line = format!("{}{of}: {reason}", finding.check);
        match said.iter_mut().find(|(known, _)| *known == line) {
            Some((_, times)) => *times += 1,
            None => said.push((line, 1)),
        }
    }
    for (line, times) in said {
        let times = if times > 1 { format!(" ({times} times)") } else { String::new() };
        let text = format!("Waived{times}: {}", harmless(&line));
        for line in wrap::lines(&text, ENTRY, 2, layout.width) {
            writeln!(out, "{}", layout.paint.faint(&line))?;
        }
    }
    Ok(())
}

/// The summary: decks, findings by level, and how many reach the gate.
///
/// # Errors
/// Those of `out`.
pub fn closing(report: &Report, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    let (paint, count) = (layout.paint, &report.count);
    write!(out, "{}: ", count.decks_in_words())?;
    let levels = count.by_level();
    if levels.is_empty() {
        write!(out, "{}", paint.good("nothing to report"))?;
    }
    for (at, (level, words)) in levels.iter().enumerate() {
        write!(out, "{}{}", if at == 0 { "" } else { ", " }, paint.level(*level, words))?;
    }
    if count.waived > 0 {
        write!(out, "; {} waived", count.waived)?;
    }
    writeln!(out, ".")?;
    if levels.is_empty() {
        return Ok(());
    }
    let reached = match count.at_or_above_gate {
        0 => "nothing reaches it".to_string(),
        1 => "1 finding reaches it".to_string(),
        more => format!("{more} findings reach it"),
    };
    let mut gates: Vec<Level> = report.sheets.iter().map(|sheet| sheet.gate.unwrap_or(Level::Warning)).collect();
    gates.sort_unstable();
    gates.dedup();
    match gates.as_slice() {
        [one] => writeln!(out, "The gate is at {}: {reached}.", one.word()),
        _ => writeln!(out, "The gate is that of each deck's practice: {reached}."),
    }
}

/// A place as said beside another: the file only where it differs.
fn place_beside(spot: &Spot, beside: &Spot) -> String {
    if spot.file == beside.file {
        format!("line {}", spot.start.line)
    } else {
        format!("{}, line {}", harmless(&spot.file), spot.start.line)
    }
}

/// A list of decks, the first three by name.
fn shortened(paths: &[String]) -> String {
    let named: Vec<String> = paths.iter().take(3).map(|path| harmless(path)).collect();
    match paths.len() - named.len() {
        0 => named.join(", "),
        1 => format!("{} and 1 more deck", named.join(", ")),
        more => format!("{} and {more} more decks", named.join(", ")),
    }
}

/// A line cut to a width.
fn cut(text: &str, width: usize) -> String {
    let width = width.clamp(wrap::NARROWEST, wrap::WIDEST);
    if text.width() <= width {
        return text.to_string();
    }
    let mut kept = String::new();
    for character in text.chars() {
        let mut next = kept.clone();
        next.push(character);
        if next.width() + 2 > width {
            break;
        }
        kept = next;
    }
    format!("{} …", kept.trim_end())
}

/// The scale with its pointer in the colour of the level.
fn coloured(drawn: &str, level: Level, paint: Paint) -> String {
    match drawn.split_once(scale::POINTER) {
        Some((before, after)) => {
            format!("{before}{}{after}", paint.level(level, &scale::POINTER.to_string()))
        }
        None => drawn.to_string(),
    }
}
