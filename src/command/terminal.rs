//! Standard output and standard error: width, colour, and what becomes of a reader that has gone.

use super::FAILED;
use crate::report::paint::harmless;
use crate::report::{Layout, Paint};
use anstream::{AutoStream, ColorChoice};
use std::fmt::Display;
use std::io::{self, IsTerminal, Write};

/// Columns where no terminal says how wide it is.
const USUAL_WIDTH: usize = 80;

/// Whether standard output is a terminal.
pub fn is_terminal() -> bool {
    io::stdout().is_terminal()
}

/// Width and colour of standard output: colour on a terminal alone, and not where `NO_COLOR` forbids it.
pub fn layout() -> Layout {
    let paint = match AutoStream::choice(&io::stdout()) {
        ColorChoice::Never => Paint::Plain,
        _ => Paint::Coloured,
    };
    let width = terminal_size::terminal_size().map_or(USUAL_WIDTH, |(width, _)| usize::from(width.0));
    Layout { width, paint }
}

/// Writes a result to standard output and gives the exit status: `status`, or [`FAILED`] where it cannot be written. A
/// reader that has gone (`| head`) is no failure: it has what it wanted.
pub fn print(status: u8, write: impl FnOnce(&mut dyn Write) -> io::Result<()>) -> u8 {
    match try_print(write) {
        Printed::Whole | Printed::NobodyReads => status,
        Printed::Failed => FAILED,
    }
}

/// What became of a result.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Printed {
    /// It was written.
    Whole,
    /// The reader has gone.
    NobodyReads,
    /// It could not be written, and a message says why.
    Failed,
}

/// Writes a result to standard output.
pub fn try_print(write: impl FnOnce(&mut dyn Write) -> io::Result<()>) -> Printed {
    // Colours are decided by `layout`; the stream only makes them work on every system's terminal.
    let mut out = io::BufWriter::new(AutoStream::always(io::stdout().lock()));
    match write(&mut out).and_then(|()| out.flush()) {
        Ok(()) => Printed::Whole,
        Err(error) if error.kind() == io::ErrorKind::BrokenPipe => Printed::NobodyReads,
        Err(error) => {
            complain(format_args!("the result cannot be written: {error}"));
            Printed::Failed
        }
    }
}

/// Says on standard error what could not be done.
pub fn complain(message: impl Display) {
    // Where not even this can be written, the exit status still tells.
    let _ = writeln!(io::stderr(), "deckline: {}", harmless(&message.to_string()));
}

/// The same, and the exit status that goes with it.
pub fn fail(message: impl Display) -> u8 {
    complain(message);
    FAILED
}
