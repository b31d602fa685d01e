//! Findings as people and programs read them: cards, lines, JSON, SARIF.
//!
//! A deck is first made into a [`Sheet`], which holds everything that a face shows and nothing else, so that the deck
//! itself need not be kept. Every face then shows the same sheets.

pub mod basis;
pub mod cards;
pub mod count;
pub mod json;
pub mod lines;
pub mod numbers;
pub mod paint;
pub mod position;
pub mod sarif;
pub mod scale;
pub mod sheet;
pub mod substance;
pub mod wrap;

pub use count::Count;
pub use paint::Paint;
pub use position::Position;
pub use sheet::{Remark, Report, Sheet, Unreadable};
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

/// How text for people is laid out.
#[derive(Clone, Copy, Debug)]
pub struct Layout {
    /// Columns of text at most.
    pub width: usize,
    /// Whether terminal colours are written.
    pub paint: Paint,
}

impl Default for Layout {
    fn default() -> Self {
        Layout { width: 80, paint: Paint::Plain }
    }
}

/// Writes what was found.
///
/// # Errors
/// Those of `out`.
pub fn write(report: &Report, face: Face, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    match face {
        Face::Cards => cards::write(report, out, layout),
        Face::Lines => lines::write(report, out),
        Face::Json => json::write(report, out),
        Face::Sarif => sarif::write(report, out),
    }
}
