//! `deckline substances [NAME]`: property data, and their values at a temperature and pressure.

use super::{SOUND, quantity, terminal};
use crate::case::model::{State, Substance};
use crate::quantity::Dimension;
use crate::quantity::dimension_names::{PRESSURE, TEMPERATURE};
use crate::quantity::display::format_si;
use crate::quantity::suggest::nearest;
use crate::report::paint::harmless;
use crate::report::{Layout, substance, wrap};
use crate::substances::{Medium, library};
use clap::Args;
use std::io::{self, Write};

/// Standard atmosphere, Pa.
const ATMOSPHERE: f64 = 101_325.0;

/// Its options.
#[derive(Clone, Debug, Args)]
pub struct Arguments {
    /// The substance; without it, the list of all
    #[arg(value_name = "NAME")]
    pub name: Option<String>,

    /// The temperature at which to evaluate, such as 40 degC
    #[arg(long, num_args = 1..=2, value_names = ["TEMPERATURE", "UNIT"], allow_negative_numbers = true)]
    pub at: Option<Vec<String>>,

    /// The absolute pressure at which to evaluate, such as 2 bar; without it, 101.325 kPa
    #[arg(long, num_args = 1..=2, value_names = ["PRESSURE", "UNIT"])]
    pub pressure: Option<Vec<String>>,

    /// The mass fraction of the dissolved substance, such as 30 %
    #[arg(long, num_args = 1..=2, value_names = ["FRACTION", "UNIT"])]
    pub fraction: Option<Vec<String>>,
}

/// Runs it.
pub fn run(arguments: &Arguments) -> u8 {
    let read = |words: &Option<Vec<String>>, dimension: Dimension| {
        words.as_ref().map(|words| quantity::read(words, dimension)).transpose()
    };
    let values = read(&arguments.at, TEMPERATURE).and_then(|temperature| {
        Ok((temperature, read(&arguments.pressure, PRESSURE)?, read(&arguments.fraction, Dimension::NONE)?))
    });
    let (temperature, pressure, fraction) = match values {
        Ok(values) => values,
        Err(message) => return terminal::fail(message),
    };
    let pressure = pressure.unwrap_or(ATMOSPHERE);
    if pressure <= 0.0 || temperature.is_some_and(|temperature| temperature <= 0.0) {
        return terminal::fail("an absolute temperature or pressure is above zero");
    }
    let layout = terminal::layout();
    let Some(name) = &arguments.name else {
        return terminal::print(SOUND, |out| list(out, layout));
    };
    let Some(found) = library::find(name) else {
        return match nearest(name, library::NAMES.iter().copied()) {
            Some(meant) => terminal::fail(format_args!("no substance is called `{name}`; `{meant}` may be meant")),
            None => terminal::fail(format_args!("no substance is called `{name}`; `deckline substances` lists them")),
        };
    };
    let (least, most) = found.fraction.unwrap_or((0.0, 0.0));
    let fraction = fraction.unwrap_or(least);
    if !(least..=most).contains(&fraction) {
        let what = if most > 0.0 {
            format!("the data of `{name}` hold for mass fractions from {least} to {most}")
        } else {
            format!("`{name}` is no solution and has no mass fraction")
        };
        return terminal::fail(what);
    }
    let medium = Medium { substance: found, fraction };
    let Some(temperature) = temperature else {
        return terminal::print(SOUND, |out| substance::sheet(&medium, pressure, out, layout));
    };
    match medium.properties(temperature, pressure) {
        Some(properties) => {
            terminal::print(SOUND, |out| substance::state(&medium, temperature, pressure, &properties, out, layout))
        }
        None => {
            let (low, high) = medium.range();
            let (low, high) = (format_si(low, TEMPERATURE), format_si(high, TEMPERATURE));
            match substance::other_phase(&medium, temperature, pressure) {
                Some(phase) => {
                    let (temperature, pressure) = (format_si(temperature, TEMPERATURE), format_si(pressure, PRESSURE));
                    terminal::fail(format_args!("`{name}` has {phase} at {temperature} and {pressure}"))
                }
                None => terminal::fail(format_args!("the data of `{name}` hold from {low} to {high}")),
            }
        }
    }
}

fn list(out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    let substances: Vec<&Substance> = library::library().collect();
    for state in [State::Gas, State::Liquid] {
        writeln!(out, "{}\n", layout.paint.strong(if state == State::Gas { "gases" } else { "liquids" }))?;
        for substance in substances.iter().filter(|substance| substance.state == Some(state)) {
            let range = substance.valid.map_or(String::new(), |(low, high)| {
                format!(", {} to {}", format_si(low, TEMPERATURE), format_si(high, TEMPERATURE))
            });
            writeln!(out, "  {}{}", layout.paint.strong(&substance.name.text), layout.paint.faint(&range))?;
            let first = substance.description.lines().next().unwrap_or_default();
            wrap::paragraph(out, &harmless(first), 4, 0, layout.width)?;
        }
        if state == State::Gas {
            writeln!(out)?;
        }
    }
    Ok(())
}
