//! The pass over a deck: text, trees, case, physics, findings.

use super::deck::{Deck, SourceFile};
use super::includes::{Loaded, load};
use super::practice::{practice_file, project_folder};
use super::read::{Problem, Read};
use super::sweep;
use crate::case::model::Case;
use crate::case::{Known, Role, Source, resolve};
use crate::checks;
use crate::physics::model::Physics;
use crate::substances::library::NAMES;
use crate::syntax::{FileId, Finding, parse};
use std::path::{Path, PathBuf};
use std::sync::Arc;

/// How decks are looked at.
#[derive(Clone, Debug, Default)]
pub struct Options {
    /// House rules to use in place of those found beside or above a deck.
    pub practice: Option<PathBuf>,
    /// The folder that was given to look through.
    pub folder: Option<PathBuf>,
    /// Today, as `2027-03-01`; empty for the clock's.
    pub today: String,
}

/// Everything about the deck at a path.
///
/// # Errors
/// Where the deck itself, or a practice file that was asked for, cannot be read.
pub fn analyse(reader: &dyn Read, path: &Path, options: &Options) -> Result<Deck, Problem> {
    let deck = reader.read(path)?;
    let root = project_folder(path, options.folder.as_deref());
    let is_practice = path.file_name().is_some_and(|name| name == super::practice::PRACTICE_FILE);
    let practice = match &options.practice {
        _ if is_practice => None,
        Some(asked_for) => Some(reader.read(asked_for)?),
        None => practice_file(reader, path, &root).and_then(|path| reader.read(&path).ok()),
    };
    let loaded = load(reader, deck, &root);
    Ok(from_files(loaded, practice, is_practice, &options.today))
}

/// Everything about a deck that is a text alone.
pub fn analyse_text(text: &str, today: &str) -> Deck {
    from_files(only(text), None, false, today)
}

/// A deck that is a text alone, resolved and no further: its findings are those of reading.
pub fn resolved_text(text: &str) -> Deck {
    resolved(only(text), None, false)
}

fn only(text: &str) -> Loaded {
    let file = Arc::new(SourceFile { path: PathBuf::from("deck.buoy"), tree: parse(text), text: text.into() });
    Loaded { files: vec![file], findings: Vec::new() }
}

fn resolved(loaded: Loaded, practice: Option<Arc<SourceFile>>, is_practice: bool) -> Deck {
    let Loaded { mut files, mut findings } = loaded;
    let deck_files = files.len();
    files.extend(practice);
    let sources: Vec<Source<'_>> = files
        .iter()
        .enumerate()
        .map(|(index, file)| Source {
            #[expect(clippy::cast_possible_truncation, reason = "bounded by the limit on includes")]
            file: FileId(index as u32),
            tree: &file.tree,
            role: if is_practice || index >= deck_files { Role::Practice } else { Role::Deck },
        })
        .collect();
    let check_names: Vec<&str> = checks::CHECKS.iter().map(|check| check.name).collect();
    let mut resolution = resolve(&sources, Known { substances: &NAMES, checks: &check_names });
    findings.append(&mut resolution.findings);
    Deck { files, resolution, case: Case::default(), physics: Physics::default(), findings }
}

fn from_files(loaded: Loaded, practice: Option<Arc<SourceFile>>, is_practice: bool, today: &str) -> Deck {
    let mut deck = resolved(loaded, practice, is_practice);
    let today = if today.is_empty() { clock_today() } else { today.to_string() };
    let mut findings = std::mem::take(&mut deck.findings);
    if is_practice {
        deck.case.practice = deck.resolution.case(&deck.resolution.nominal).practice;
    } else {
        findings.append(&mut sweep::over_all_points(&mut deck, &today));
    }
    deck.findings = finish(findings, &deck, &today);
    deck
}

/// Levels by practice, waivers, and the order of places.
fn finish(findings: Vec<Finding>, deck: &Deck, today: &str) -> Vec<Finding> {
    let findings = checks::at_practice_level(findings, &deck.case.practice);
    let mut findings = checks::apply_waivers(&deck.case, findings, today);
    findings.sort_by(|a, b| {
        (a.place, std::cmp::Reverse(a.level), a.check, &a.message).cmp(&(
            b.place,
            std::cmp::Reverse(b.level),
            b.check,
            &b.message,
        ))
    });
    findings.dedup();
    findings
}

/// Today by the system's clock, UTC, as `2027-03-01`.
fn clock_today() -> String {
    let seconds = std::time::SystemTime::now().duration_since(std::time::UNIX_EPOCH).map_or(0, |since| since.as_secs());
    civil_date(seconds / 86_400)
}

/// The day that lies `days` after 1970-01-01 in the Gregorian calendar, counted year by year.
fn civil_date(days: u64) -> String {
    let is_leap = |year: u64| year.is_multiple_of(4) && (!year.is_multiple_of(100) || year.is_multiple_of(400));
    let mut year = 1970;
    let mut rest = days;
    while rest >= if is_leap(year) { 366 } else { 365 } && year < 9999 {
        rest -= if is_leap(year) { 366 } else { 365 };
        year += 1;
    }
    let february = if is_leap(year) { 29 } else { 28 };
    let mut month = 1;
    for length in [31, february, 31, 30, 31, 30, 31, 31, 30, 31, 30] {
        if rest < length {
            break;
        }
        rest -= length;
        month += 1;
    }
    format!("{year:04}-{month:02}-{:02}", rest.min(30) + 1)
}

#[cfg(test)]
mod tests {
    use super::civil_date;

    #[test]
    fn days_become_dates() {
        // Outside: `date -d @0`, `date -d @951782400`, `date -d @1798761600` (GNU coreutils, UTC).
        assert_eq!(civil_date(0), "1970-01-01");
        assert_eq!(civil_date(951_782_400 / 86_400), "2000-02-29");
        assert_eq!(civil_date(1_798_761_600 / 86_400), "2027-01-01");
    }
}
