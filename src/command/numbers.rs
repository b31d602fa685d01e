//! `deckline numbers DECK`: what a deck comes to, region by region.

use super::terminal;
use super::{Form, SOUND};
use crate::report::numbers;
use crate::workspace::{self, Disk, Options};
use clap::Args;
use std::io;
use std::path::PathBuf;

/// Its options.
#[derive(Clone, Debug, Args)]
pub struct Arguments {
    /// The deck
    #[arg(value_name = "DECK", required_unless_present = "schema")]
    pub deck: Option<PathBuf>,

    /// The form of the result
    #[arg(long = "as", value_name = "FORM", value_enum, default_value = "cards")]
    pub form: Form,

    /// A file of house rules to use in place of those found beside or above the deck
    #[arg(long, value_name = "FILE")]
    pub practice: Option<PathBuf>,

    /// Print the JSON Schema of `--as json` and do nothing else
    #[arg(long, exclusive = true)]
    pub schema: bool,
}

/// Runs it.
pub fn run(arguments: &Arguments) -> u8 {
    let Some(path) = &arguments.deck else {
        return terminal::print(SOUND, |out| json(&numbers::schema(), out));
    };
    let options = Options { practice: arguments.practice.clone(), ..Options::default() };
    let deck = match workspace::analyse(&Disk, path, &options) {
        Ok(deck) => deck,
        Err(problem) => return terminal::fail(problem),
    };
    let numbers = numbers::Numbers::of(&deck);
    let layout = terminal::layout();
    terminal::print(SOUND, |out| match arguments.form {
        Form::Cards => numbers::write(&numbers, out, layout),
        Form::Json => json(&numbers, out),
    })
}

fn json(value: &impl serde::Serialize, out: &mut dyn io::Write) -> io::Result<()> {
    serde_json::to_writer_pretty(&mut *out, value).map_err(io::Error::from)?;
    writeln!(out)
}
