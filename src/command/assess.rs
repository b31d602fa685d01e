//! `deckline assess [PATH..]`: checks decks and folders of decks.

use super::terminal::{self, Printed, complain};
use super::{FAILED, FOUND, SOUND, watch};
use crate::report::{self, Face, Report, Sheet, Unreadable};
use crate::syntax::Level;
use crate::workspace::{self, Disk, Options, Problem, walk};
use clap::{Args, ValueEnum};
use indicatif::{ProgressBar, ProgressDrawTarget, ProgressStyle};
use rayon::prelude::*;
use std::io::{self, BufRead, IsTerminal};
use std::path::{Path, PathBuf};
use std::time::Duration;

/// Fewest decks for which progress is shown.
const MANY_DECKS: usize = 50;

/// Its options.
#[derive(Clone, Debug, Args)]
pub struct Arguments {
    /// Decks, and folders to look through for decks; without any, this folder
    #[arg(value_name = "PATH")]
    pub paths: Vec<PathBuf>,

    /// The form of the result; without it, cards on a terminal and lines elsewhere
    #[arg(long = "as", value_name = "FORM", value_enum)]
    pub form: Option<Form>,

    /// The level from which findings make the exit status 1; without it, that of the practice, or warning
    #[arg(long, value_name = "LEVEL", value_enum)]
    pub gate: Option<Gate>,

    /// A file of house rules to use in place of those found beside or above the decks
    #[arg(long, value_name = "FILE")]
    pub practice: Option<PathBuf>,

    /// How many decks are checked at the same time; without it, as many as the machine has processors
    #[arg(long, value_name = "N", value_parser = clap::value_parser!(u16).range(1..=1024))]
    pub jobs: Option<u16>,

    /// A file that lists decks, one path a line; `-` reads the list from standard input
    #[arg(long, value_name = "FILE")]
    pub from_list: Option<PathBuf>,

    /// The day against which waivers are held, such as 2027-03-01; without it, today
    #[arg(long, value_name = "DAY", value_parser = day)]
    pub on: Option<String>,

    /// Check again whenever a deck changes, until interrupted
    #[arg(long)]
    pub watch: bool,

    /// Print the JSON Schema of `--as json` and do nothing else
    #[arg(long, exclusive = true)]
    pub schema: bool,
}

/// The forms of the findings.
#[derive(Clone, Copy, PartialEq, Eq, Debug, ValueEnum)]
pub enum Form {
    /// For a person at a terminal
    Cards,
    /// One line a finding: `file:line:column: level: text [check]`
    Lines,
    /// For a program; --schema prints the schema
    Json,
    /// SARIF 2.1.0
    Sarif,
}

/// The levels, as an option.
#[derive(Clone, Copy, PartialEq, Eq, Debug, ValueEnum)]
pub enum Gate {
    /// Every finding
    Hint,
    /// Findings for information, and above
    Information,
    /// Warnings and errors
    Warning,
    /// Errors only
    Error,
}

/// What an assessment looked at and found.
pub struct Assessment {
    /// The report.
    pub report: Report,
    /// Every file that was read, and every folder that was looked through.
    pub seen: Vec<PathBuf>,
    /// What could not be done besides reading decks.
    pub failures: Vec<String>,
}

/// Runs it.
pub fn run(arguments: &Arguments) -> u8 {
    if arguments.schema {
        return terminal::print(SOUND, |out| {
            serde_json::to_writer_pretty(&mut *out, &report::json::schema()).map_err(io::Error::from)?;
            writeln!(out)
        });
    }
    if let Some(jobs) = arguments.jobs {
        let pool = rayon::ThreadPoolBuilder::new().num_threads(usize::from(jobs));
        if let Err(error) = pool.build_global() {
            return terminal::fail(format_args!("{jobs} decks cannot be checked at the same time: {error}"));
        }
    }
    if arguments.watch {
        if arguments.from_list.as_deref() == Some(Path::new("-")) {
            return terminal::fail("standard input is read only once, so `--from-list -` does not go with `--watch`");
        }
        return watch::run(arguments);
    }
    let assessment = assess(arguments);
    show(&assessment, arguments).0
}

/// Checks what the options name.
pub fn assess(arguments: &Arguments) -> Assessment {
    let mut failures = Vec::new();
    let mut paths = arguments.paths.clone();
    if let Some(list) = &arguments.from_list {
        match listed(list) {
            Ok(mut more) => paths.append(&mut more),
            Err(error) => failures.push(format!("{}: {error}", list.display())),
        }
    } else if paths.is_empty() {
        paths.push(PathBuf::from("."));
    }
    let (decks, problems) = walk::decks(&paths);
    let folders: Vec<PathBuf> = paths.into_iter().filter(|path| path.is_dir()).collect();
    let (sheets, more) = check(&decks, &folders, arguments);
    let unreadable = problems.into_iter().chain(more).map(|problem| unreadable(&problem)).collect();
    let mut seen: Vec<PathBuf> = sheets.iter().flat_map(|sheet| sheet.files.iter().cloned()).collect();
    seen.extend(decks);
    seen.extend(folders);
    Assessment { report: Report::of(sheets, arguments.gate.map(Level::from), unreadable), seen, failures }
}

/// Checks decks, several at a time.
fn check(decks: &[PathBuf], folders: &[PathBuf], arguments: &Arguments) -> (Vec<Sheet>, Vec<Problem>) {
    let here = std::env::current_dir().and_then(|here| here.canonicalize()).unwrap_or_default();
    let progress = progress(decks.len());
    let checked: Vec<Result<Sheet, Problem>> = decks
        .par_iter()
        .map(|deck| {
            let options = Options {
                practice: arguments.practice.clone(),
                folder: folders.iter().find(|folder| deck.starts_with(folder)).cloned(),
                today: arguments.on.clone().unwrap_or_default(),
            };
            // Only what is shown is kept, so that a large folder does not fill the memory.
            let sheet = workspace::analyse(&Disk, deck, &options).map(|deck| Sheet::of(&deck, &here));
            progress.inc(1);
            sheet
        })
        .collect();
    progress.finish_and_clear();
    let (mut sheets, mut problems) = (Vec::new(), Vec::new());
    for result in checked {
        match result {
            Ok(sheet) => sheets.push(sheet),
            Err(problem) => problems.push(problem),
        }
    }
    (sheets, problems)
}

/// Prints an assessment; the exit status, and whether anybody reads.
pub fn show(assessment: &Assessment, arguments: &Arguments) -> (u8, Printed) {
    let report = &assessment.report;
    for Unreadable { path, message } in &report.unreadable {
        complain(format_args!("{path}: {message}"));
    }
    assessment.failures.iter().for_each(complain);
    let face = match arguments.form {
        Some(Form::Cards) => Face::Cards,
        Some(Form::Lines) => Face::Lines,
        Some(Form::Json) => Face::Json,
        Some(Form::Sarif) => Face::Sarif,
        None if terminal::is_terminal() => Face::Cards,
        None => Face::Lines,
    };
    let printed = terminal::try_print(|out| report::write(report, face, out, terminal::layout()));
    let status = if printed == Printed::Failed || !report.unreadable.is_empty() || !assessment.failures.is_empty() {
        FAILED
    } else if report.count.at_or_above_gate > 0 {
        FOUND
    } else {
        SOUND
    };
    (status, printed)
}

/// The paths in a list, one a line.
fn listed(list: &Path) -> io::Result<Vec<PathBuf>> {
    let source: Box<dyn BufRead> = if list == Path::new("-") {
        Box::new(io::stdin().lock())
    } else {
        Box::new(io::BufReader::new(std::fs::File::open(list)?))
    };
    let mut paths = Vec::new();
    for line in source.lines() {
        let line = line?;
        if !line.trim().is_empty() {
            paths.push(PathBuf::from(line.trim_end_matches('\r')));
        }
    }
    Ok(paths)
}

fn progress(decks: usize) -> ProgressBar {
    if decks < MANY_DECKS || !io::stderr().is_terminal() {
        return ProgressBar::hidden();
    }
    let bar = ProgressBar::with_draw_target(Some(decks as u64), ProgressDrawTarget::stderr());
    if let Ok(style) = ProgressStyle::with_template("{pos} of {len} decks checked {wide_bar}") {
        bar.set_style(style);
    }
    bar.enable_steady_tick(Duration::from_millis(200));
    bar
}

fn unreadable(problem: &Problem) -> Unreadable {
    let path = problem.path.strip_prefix(".").unwrap_or(&problem.path);
    Unreadable { path: path.to_string_lossy().into_owned(), message: problem.message.clone() }
}

/// A day as waivers write it.
fn day(text: &str) -> Result<String, String> {
    let digits = |part: Option<&str>, count: usize| -> Option<u32> {
        part.filter(|part| part.len() == count && part.bytes().all(|byte| byte.is_ascii_digit()))?.parse().ok()
    };
    let mut parts = text.split('-');
    let year = digits(parts.next(), 4);
    let month = digits(parts.next(), 2).filter(|month| (1..=12).contains(month));
    let day = digits(parts.next(), 2).filter(|day| (1..=31).contains(day));
    match (year, month, day, parts.next()) {
        (Some(_), Some(_), Some(_), None) => Ok(text.to_string()),
        _ => Err("a day is written like 2027-03-01".to_string()),
    }
}

impl From<Gate> for Level {
    fn from(gate: Gate) -> Level {
        match gate {
            Gate::Hint => Level::Hint,
            Gate::Information => Level::Information,
            Gate::Warning => Level::Warning,
            Gate::Error => Level::Error,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::day;

    #[test]
    fn days() {
        assert!(day("2027-03-01").is_ok());
        for text in
            ["", "2027-3-1", "2027-13-01", "2027-00-01", "2027-01-32", "2027-01-01-01", "20270301", "+027-01-01"]
        {
            assert!(day(text).is_err(), "{text}");
        }
    }
}
