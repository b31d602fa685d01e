//! Findings as JSON, with a schema made from the same types. Field names are stable: a change of meaning raises
//! `format`.

use super::count::Count;
use super::position::Position;
use super::sheet::{Remark, Report, Sheet, Spot, Unreadable};
use crate::syntax::{Level, Margin};
use schemars::{JsonSchema, Schema, schema_for};
use serde::Serialize;
use std::io::{self, Write};

/// The version of the form.
pub const FORMAT: u32 = 1;

/// What was found in decks.
#[derive(Debug, Serialize, JsonSchema)]
#[schemars(title = "Findings of deckline")]
pub struct Findings {
    /// The version of this form.
    pub format: u32,
    /// What wrote it.
    pub tool: Tool,
    /// The decks that were checked, by path.
    pub decks: Vec<DeckNamed>,
    /// What was found, by deck and place. What several decks share, because they include the same file, stands once.
    pub findings: Vec<Found>,
    /// Files that could not be read.
    pub unreadable: Vec<Unreadable>,
    /// Numbers of findings.
    pub count: Count,
}

/// A program and its version.
#[derive(Debug, Serialize, JsonSchema)]
pub struct Tool {
    /// Its name.
    pub name: String,
    /// Its version.
    pub version: String,
}

/// A deck.
#[derive(Debug, Serialize, JsonSchema)]
pub struct DeckNamed {
    /// Its path, as it was found.
    pub path: String,
    /// The title of its case; empty if none.
    pub title: String,
    /// The level from which its findings make the assessment fail.
    pub gate: LevelWord,
}

/// One finding.
#[derive(Debug, Serialize, JsonSchema)]
pub struct Found {
    /// The name of the check.
    pub check: String,
    /// The family of the check; empty if unknown.
    pub family: String,
    /// How much it matters.
    pub level: LevelWord,
    /// Where.
    #[serde(flatten)]
    pub place: PlaceIn,
    /// The entry that the place is in, as its head says: `fluid cabinet_air`.
    pub entry: String,
    /// The entity that it is about, as a waiver names it; empty for the deck as a whole.
    pub subject: String,
    /// What is wrong.
    pub message: String,
    /// What would put it right; empty where nothing is sure.
    pub remedy: String,
    /// The number that was weighed.
    pub margin: Option<Weighed>,
    /// In a sweep: where in it the finding holds.
    pub points: Option<Points>,
    /// Other places that belong to it.
    pub related: Vec<RelatedPlace>,
    /// Remedies as changes of text.
    pub fixes: Vec<FixOffered>,
    /// The reason of the waiver that covers it; none where it counts.
    pub waived: Option<String>,
    /// Whether it makes the assessment fail.
    pub reaches_gate: bool,
    /// The decks that have it.
    pub decks: Vec<String>,
}

/// The levels.
#[derive(Debug, Serialize, JsonSchema)]
#[serde(rename_all = "lowercase")]
pub enum LevelWord {
    /// Worth knowing; nothing is wrong.
    Hint,
    /// A fact that bears on the result.
    Information,
    /// Probably wrong, or past a limit that practice holds.
    Warning,
    /// Wrong.
    Error,
}

/// A range of a file. Lines and columns count from 1, columns in characters; bytes from 0. `end` is one past the last.
#[derive(Debug, Serialize, JsonSchema)]
pub struct PlaceIn {
    /// The file.
    pub file: String,
    /// Its first character.
    pub start: Position,
    /// One past its last character.
    pub end: Position,
}

/// A number and the limit that it was held against.
#[derive(Debug, Serialize, JsonSchema)]
pub struct Weighed {
    /// Its symbol.
    pub quantity: String,
    /// Its value in `unit`.
    pub value: Option<f64>,
    /// The limit in `unit`.
    pub limit: Option<f64>,
    /// Lowest and highest value, where it is an estimate.
    pub band: Option<(f64, f64)>,
    /// The unit; empty for a pure number.
    pub unit: String,
}

/// Points of a sweep.
#[derive(Debug, Serialize, JsonSchema)]
pub struct Points {
    /// How many have the finding.
    pub count: usize,
    /// How many there are.
    pub total: usize,
    /// The first that has it.
    pub first: String,
}

/// Another place.
#[derive(Debug, Serialize, JsonSchema)]
pub struct RelatedPlace {
    /// Where.
    #[serde(flatten)]
    pub place: PlaceIn,
    /// What about it.
    pub message: String,
}

/// A remedy as a change of text.
#[derive(Debug, Serialize, JsonSchema)]
pub struct FixOffered {
    /// What it does.
    pub title: String,
    /// Whether it may be applied without looking.
    pub sure: bool,
    /// The changes.
    pub edits: Vec<EditOffered>,
}

/// A range and the text that takes its place.
#[derive(Debug, Serialize, JsonSchema)]
pub struct EditOffered {
    /// Where; empty for an insertion.
    #[serde(flatten)]
    pub place: PlaceIn,
    /// What stands there afterwards.
    pub text: String,
}

/// Writes the report.
///
/// # Errors
/// Those of `out`.
pub fn write(report: &Report, out: &mut dyn Write) -> io::Result<()> {
    serde_json::to_writer_pretty(&mut *out, &found_in(report)).map_err(io::Error::from)?;
    writeln!(out)
}

/// The schema of the report.
pub fn schema() -> Schema {
    schema_for!(Findings)
}

/// A report in this form.
pub fn found_in(report: &Report) -> Findings {
    let found = |sheet: &Sheet| sheet.remarks.iter().map(|remark| found(remark, sheet)).collect::<Vec<_>>();
    Findings {
        format: FORMAT,
        tool: Tool::this(),
        decks: report
            .sheets
            .iter()
            .map(|sheet| DeckNamed {
                path: sheet.path.clone(),
                title: sheet.title.clone(),
                gate: sheet.gate.unwrap_or(Level::Warning).into(),
            })
            .collect(),
        findings: report.sheets.iter().flat_map(found).collect(),
        unreadable: report.unreadable.clone(),
        count: report.count,
    }
}

fn found(remark: &Remark, sheet: &Sheet) -> Found {
    let finding = &remark.finding;
    let related = finding.related.iter().zip(&remark.related);
    let fixes = finding.fixes.iter().zip(&remark.edits);
    Found {
        check: finding.check.to_string(),
        family: crate::checks::find(finding.check).map_or("", |check| check.family.word()).to_string(),
        level: finding.level.into(),
        place: PlaceIn::from(&remark.spot),
        entry: remark.entry.clone(),
        subject: finding.subject.clone(),
        message: finding.message.clone(),
        remedy: finding.remedy.clone(),
        margin: finding.margin.as_ref().map(Weighed::from),
        points: finding.points.as_ref().map(|points| Points {
            count: points.count,
            total: points.total,
            first: points.first.clone(),
        }),
        related: related
            .map(|(related, spot)| RelatedPlace { place: spot.into(), message: related.message.clone() })
            .collect(),
        fixes: fixes
            .map(|(fix, spots)| FixOffered {
                title: fix.title.clone(),
                sure: fix.sure,
                edits: fix
                    .edits
                    .iter()
                    .zip(spots)
                    .map(|(edit, spot)| EditOffered { place: spot.into(), text: edit.text.clone() })
                    .collect(),
            })
            .collect(),
        waived: finding.waived.clone(),
        reaches_gate: remark.reaches_gate,
        decks: std::iter::once(&sheet.path).chain(&remark.also_in).cloned().collect(),
    }
}

/// JSON has no infinity.
fn finite(value: f64) -> Option<f64> {
    value.is_finite().then_some(value)
}

impl Tool {
    /// This program.
    pub fn this() -> Tool {
        Tool { name: env!("CARGO_PKG_NAME").to_string(), version: env!("CARGO_PKG_VERSION").to_string() }
    }
}

impl Weighed {
    /// The margin again; none where value or limit is no finite number.
    pub fn margin(&self) -> Option<Margin> {
        let (value, limit) = self.value.zip(self.limit)?;
        Some(Margin { quantity: self.quantity.clone(), value, limit, band: self.band, unit: self.unit.clone() })
    }
}

impl From<&Margin> for Weighed {
    fn from(margin: &Margin) -> Weighed {
        Weighed {
            quantity: margin.quantity.clone(),
            value: finite(margin.value),
            limit: finite(margin.limit),
            band: margin.band.and_then(|(from, to)| finite(from).zip(finite(to))),
            unit: margin.unit.clone(),
        }
    }
}

impl LevelWord {
    /// The level.
    pub const fn level(&self) -> Level {
        match self {
            LevelWord::Hint => Level::Hint,
            LevelWord::Information => Level::Information,
            LevelWord::Warning => Level::Warning,
            LevelWord::Error => Level::Error,
        }
    }
}

impl From<&Spot> for PlaceIn {
    fn from(spot: &Spot) -> PlaceIn {
        PlaceIn { file: spot.file.clone(), start: spot.start, end: spot.end }
    }
}

impl From<Level> for LevelWord {
    fn from(level: Level) -> LevelWord {
        match level {
            Level::Hint => LevelWord::Hint,
            Level::Information => LevelWord::Information,
            Level::Warning => LevelWord::Warning,
            Level::Error => LevelWord::Error,
        }
    }
}
