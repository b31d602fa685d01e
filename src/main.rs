//! The program: reads the command line and calls the library.

use std::process::ExitCode;

fn main() -> ExitCode {
    deckline::command::run()
}
