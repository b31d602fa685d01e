//! `deckline completions SHELL` and `deckline manual`: made from the same description of the options that reads them.

use super::{Arguments, SOUND, terminal};
use clap::{Args, CommandFactory};
use clap_complete::Shell;
use clap_mangen::Man;
use std::io::{self, Write};

/// Which shell.
#[derive(Clone, Debug, Args)]
pub struct Completions {
    /// The shell
    #[arg(value_name = "SHELL", value_enum)]
    pub shell: Shell,
}

/// Prints completions.
pub fn completions(arguments: &Completions) -> u8 {
    // Made in memory first: the generator takes a failed write for a bug.
    let mut script = Vec::new();
    clap_complete::generate(arguments.shell, &mut Arguments::command(), env!("CARGO_PKG_NAME"), &mut script);
    terminal::print(SOUND, |out| out.write_all(&script))
}

/// Prints the manual page, with a section for every command.
pub fn page() -> u8 {
    let mut page = Vec::new();
    // Writing to memory does not fail.
    if let Err(error) = write_page(&mut page) {
        return terminal::fail(format_args!("the manual page cannot be made: {error}"));
    }
    terminal::print(SOUND, |out| out.write_all(&page))
}

fn write_page(out: &mut dyn Write) -> io::Result<()> {
    let mut command = Arguments::command();
    command.build();
    let page = Man::new(command.clone()).manual("Buoyancy-driven flow").source(env!("CARGO_PKG_NAME"));
    page.render_title(out)?;
    page.render_name_section(out)?;
    page.render_synopsis_section(out)?;
    page.render_description_section(out)?;
    for subcommand in command.get_subcommands() {
        let mut section = Vec::new();
        let man = Man::new(subcommand.clone());
        man.render_synopsis_section(&mut section)?;
        man.render_description_section(&mut section)?;
        man.render_options_section(&mut section)?;
        writeln!(out, ".SH {}", subcommand.get_name().to_uppercase())?;
        // Sections of their own there are parts of this one here.
        out.write_all(String::from_utf8_lossy(&section).replace(".SH ", ".SS ").as_bytes())?;
    }
    page.render_extra_section(out)?;
    page.render_version_section(out)
}
