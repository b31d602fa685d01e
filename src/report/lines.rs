//! One line a finding, in the form of the GNU Coding Standards, "Formatting Error Messages":
//! `file:line:column: level: text [check]`. What a waiver covers is left out.

use super::paint::harmless;
use super::sheet::{Remark, Report};
use super::wrap::sentence;
use std::io::{self, Write};

/// Writes the lines.
///
/// # Errors
/// Those of `out`.
pub fn write(report: &Report, out: &mut dyn Write) -> io::Result<()> {
    for remark in report.sheets.iter().flat_map(|sheet| &sheet.remarks).filter(|remark| remark.finding.waived.is_none())
    {
        writeln!(out, "{}", line(remark))?;
    }
    Ok(())
}

fn line(remark: &Remark) -> String {
    let (finding, start) = (&remark.finding, remark.spot.start);
    let mut text = remark.whole_message();
    if !finding.remedy.is_empty() {
        text.push_str(&sentence(&format!(" Put right by: {}", finding.remedy)));
    }
    let (file, text) = (harmless(&remark.spot.file), harmless(&text));
    format!("{file}:{}:{}: {}: {text} [{}]", start.line, start.column, finding.level.word(), finding.check)
}
