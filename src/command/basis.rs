//! `deckline basis [CHECK]`: what a check rests on.

use super::{SOUND, terminal};
use crate::checks::{self, CHECKS};
use crate::quantity::suggest::nearest;
use crate::report::{basis, wrap};
use clap::Args;

/// Its options.
#[derive(Clone, Debug, Args)]
pub struct Arguments {
    /// The check; without it, the list of all
    #[arg(value_name = "CHECK")]
    pub check: Option<String>,
}

/// Runs it.
pub fn run(arguments: &Arguments) -> u8 {
    match &arguments.check {
        None => list(),
        Some(name) => match checks::find(name) {
            Some(check) => {
                let layout = terminal::layout();
                terminal::print(SOUND, |out| basis::write(check, out, layout.width, layout.paint))
            }
            None => match nearest(name, CHECKS.iter().map(|check| check.name)) {
                Some(meant) => terminal::fail(format_args!("no check is called `{name}`; `{meant}` may be meant")),
                None => terminal::fail(format_args!("no check is called `{name}`; `deckline basis` lists them")),
            },
        },
    }
}

fn list() -> u8 {
    let layout = terminal::layout();
    let mut checks = CHECKS.to_vec();
    checks.sort_by_key(|check| (check.family, check.name));
    terminal::print(SOUND, |out| {
        for (at, family) in checks.chunk_by(|one, other| one.family == other.family).enumerate() {
            let title = family.first().map_or("", |check| check.family.word());
            writeln!(out, "{}{}", if at == 0 { "" } else { "\n" }, layout.paint.strong(title))?;
            for check in family {
                writeln!(out, "\n  {}, {}", layout.paint.strong(check.name), layout.paint.faint(&basis::when(check)))?;
                wrap::paragraph(out, check.basis.compares, 4, 0, layout.width)?;
            }
        }
        Ok(())
    })
}
