//! The technical basis of a check as text: for a terminal, and for a reader of SARIF.

use super::paint::Paint;
use super::wrap;
use crate::checks::Check;
use crate::quantity::display::format_number;
use std::io::{self, Write};

/// Writes the basis of one check.
///
/// # Errors
/// Those of `out`.
pub fn write(check: &Check, out: &mut dyn Write, width: usize, paint: Paint) -> io::Result<()> {
    writeln!(out, "{}, {}", paint.strong(check.name), check.family.word())?;
    for (title, text) in parts(check) {
        writeln!(out, "\n  {}", paint.faint(title))?;
        wrap::paragraph(out, &text, 4, 0, width)?;
    }
    Ok(())
}

/// The basis as paragraphs without a heading.
pub fn plain(check: &Check) -> String {
    let lines: Vec<String> = parts(check).into_iter().map(|(title, text)| format!("{title}: {text}")).collect();
    lines.join("\n")
}

/// The basis as Markdown.
pub fn markdown(check: &Check) -> String {
    let lines: Vec<String> = parts(check).into_iter().map(|(title, text)| format!("**{title}.** {text}")).collect();
    lines.join("\n\n")
}

/// When the check speaks: its limits with their levels, or its level.
pub fn when(check: &Check) -> String {
    if check.limits.is_empty() {
        return format!("{} where it applies", check.level.word());
    }
    let limits: Vec<String> =
        check.limits.iter().map(|(level, limit)| format!("{} over {}", level.word(), format_number(*limit))).collect();
    limits.join(", ")
}

fn parts(check: &Check) -> Vec<(&'static str, String)> {
    let basis = &check.basis;
    [
        ("What it compares", basis.compares.to_string()),
        ("Formula", basis.formula.to_string()),
        ("Level", when(check)),
        ("Source", basis.source.to_string()),
        ("What to do", basis.remedy.to_string()),
    ]
    .into_iter()
    .filter(|(_, text)| !text.is_empty())
    .collect()
}
