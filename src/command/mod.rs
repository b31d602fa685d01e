//! The command line: what may be typed, and one file a command.

pub mod align;
pub mod assess;
pub mod basis;
pub mod begin;
pub mod manual;
pub mod numbers;
pub mod quantity;
pub mod serve;
pub mod substances;
pub mod terminal;
pub mod vocabulary;
pub mod watch;

use clap::{Parser, Subcommand, ValueEnum};
use std::process::ExitCode;

/// Nothing is at or above the gate.
pub const SOUND: u8 = 0;
/// Something is at or above the gate.
pub const FOUND: u8 = 1;
/// The work could not be done, or not all of it.
pub const FAILED: u8 = 2;

/// What the program is asked to do.
#[derive(Debug, Parser)]
#[command(
    name = "deckline",
    version,
    about = "Checks decks of buoyancy-driven flow before they run.",
    long_about = "Checks decks of buoyancy-driven flow before they run: units, properties, closure and the reach of the \
                  Boussinesq law. Results are screening estimates; they replace neither a validated simulation nor \
                  the codes that apply nor an engineer's judgement.",
    after_help = "Exit status: 0 nothing is at or above the gate, 1 something is, 2 the work could not be done.",
    disable_help_subcommand = true
)]
pub struct Arguments {
    /// The command.
    #[command(subcommand)]
    pub command: Command,
}

/// The commands.
#[derive(Debug, Subcommand)]
pub enum Command {
    /// Check decks, and folders of decks
    Assess(assess::Arguments),
    /// Lay decks out: white space only
    Align(align::Arguments),
    /// Print the characteristic numbers, estimates and margins of a deck, region by region
    Numbers(numbers::Arguments),
    /// Print the technical basis of a check, or the list of the checks
    Basis(basis::Arguments),
    /// Print the property data of a substance, or the list of the substances
    Substances(substances::Arguments),
    /// Print what a word of the language means, or the list of the words
    Vocabulary(vocabulary::Arguments),
    /// Serve an editor: the language server, on standard input and output
    Serve,
    /// Write a small working case folder to start from
    Begin(begin::Arguments),
    /// Print the completions of a shell
    Completions(manual::Completions),
    /// Print the manual page
    Manual,
}

/// The forms of a result that is not a list of findings.
#[derive(Clone, Copy, PartialEq, Eq, Debug, ValueEnum)]
pub enum Form {
    /// For a person
    Cards,
    /// For a program
    Json,
}

/// Does what the command line asks. Wrong options end the program here, with a message.
pub fn run() -> ExitCode {
    let done = match Arguments::parse().command {
        Command::Assess(arguments) => assess::run(&arguments),
        Command::Align(arguments) => align::run(&arguments),
        Command::Numbers(arguments) => numbers::run(&arguments),
        Command::Basis(arguments) => basis::run(&arguments),
        Command::Substances(arguments) => substances::run(&arguments),
        Command::Vocabulary(arguments) => vocabulary::run(&arguments),
        Command::Serve => serve::run(),
        Command::Begin(arguments) => begin::run(&arguments),
        Command::Completions(arguments) => manual::completions(&arguments),
        Command::Manual => manual::page(),
    };
    ExitCode::from(done)
}
