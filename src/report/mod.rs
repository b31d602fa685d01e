//! Findings as people and programs read them: cards, lines, JSON, SARIF.
//!
//! A deck is first made into a [`Sheet`], which holds everything that a face shows and nothing else, so that the deck
//! itself need not be kept. Every face then shows the same sheets.

pub mod basis;
pub mod cards;
pub mod count;
pub mod json;
pub mod lines;
pub mod paint;
pub mod position;
pub mod sarif;
pub mod scale;
pub mod sheet;
pub mod wrap;

use crate::syntax::Level;
pub use count::Count;
pub use paint::Paint;
pub use position::Position;
pub use sheet::{Remark, Sheet};
use std::io::{self, Write};

/// The forms in which findings are shown.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Face {
    /// For a person at a terminal.
    Cards,
    /// One line a finding, in the GNU form.
    Lines,
    /// The report of [`json`].
    Json,
    /// SARIF 2.1.0.
    Sarif,
}

/// What a report says beside the findings, and how it is laid out.
#[derive(Clone, Debug)]
pub struct Options {
    /// Columns of text at most; cards only.
    pub width: usize,
    /// Whether terminal colours are written; cards only.
    pub paint: Paint,
    /// The level from which findings make an assessment fail.
    pub gate: Level,
    /// Files that could not be read: path and why.
    pub unreadable: Vec<(String, String)>,
}

impl Default for Options {
    fn default() -> Self {
        Options { width: 80, paint: Paint::Plain, gate: Level::Warning, unreadable: Vec::new() }
    }
}

/// Writes what was found in decks. The sheets are shown in the order of their paths, and the same remark in a file
/// that several decks include is shown once.
///
/// # Errors
/// Those of `out`.
pub fn write(sheets: &[Sheet], face: Face, out: &mut dyn Write, options: &Options) -> io::Result<()> {
    let sheets = &sheet::in_order(sheets);
    match face {
        Face::Cards => cards::write(sheets, out, options),
        Face::Lines => lines::write(sheets, out),
        Face::Json => json::write(sheets, out, options),
        Face::Sarif => sarif::write(sheets, out, options),
    }
}
