//! What a check is: a name, its basis, its limits, and a plain function of the case and its physics.

use crate::case::model::Case;
use crate::physics::model::Physics;
use crate::syntax::{Finding, Level};

/// What a check looks at.
#[derive(Clone, Copy, Debug)]
pub struct Subject<'a> {
    /// The case.
    pub case: &'a Case,
    /// Its physics.
    pub physics: &'a Physics,
    /// Today, as `2027-03-01`: what waivers are held against.
    pub today: &'a str,
}

/// One check.
#[derive(Debug)]
pub struct Check {
    /// Its name, lower case with hyphens.
    pub name: &'static str,
    /// The family it belongs to.
    pub family: Family,
    /// The limits over which it speaks, the mildest first, with the level that each brings. Empty for a check
    /// that weighs no number.
    pub limits: &'static [(Level, f64)],
    /// The level of a check without limits.
    pub level: Level,
    /// What it rests on.
    pub basis: Basis,
    /// Finds. `None` for what reading the deck finds by itself (`syntax` and `case`).
    pub run: Option<fn(&Subject<'_>, &Weighing) -> Vec<Finding>>,
}

/// Families of checks, in the order of the list.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Family {
    /// Is the deck well written?
    Writing,
    /// Do the units fit?
    Units,
    /// Are the values those of the substance?
    Properties,
    /// Is the problem well posed?
    Closure,
    /// Does the Boussinesq law hold?
    DensityLaw,
    /// Does the model suit the regime?
    Regime,
    /// Does the mesh resolve it?
    Resolution,
    /// Requirements, waivers.
    Record,
}

/// The technical basis of a check.
#[derive(Debug)]
pub struct Basis {
    /// What it compares, as a sentence.
    pub compares: &'static str,
    /// The formula, with its symbols said; empty where there is none.
    pub formula: &'static str,
    /// The published source, or "common practice".
    pub source: &'static str,
    /// What to do.
    pub remedy: &'static str,
}

/// The limits of one check, as the deck's practice sets them.
#[derive(Clone, Debug)]
pub struct Weighing {
    /// Limits and levels, the mildest first.
    pub limits: Vec<(Level, f64)>,
    /// The level of a check without limits.
    pub level: Level,
}

impl Weighing {
    /// The highest level whose limit `value` is over, and that limit. `NaN` is over none.
    pub fn over(&self, value: f64) -> Option<(Level, f64)> {
        self.limits.iter().rev().find(|(_, limit)| value > *limit).copied()
    }

    /// The limit at which the check first speaks; infinite for a check that has none.
    pub fn first_limit(&self) -> f64 {
        self.limits.first().map_or(f64::INFINITY, |(_, limit)| *limit)
    }
}

impl Family {
    /// Its name.
    pub const fn word(self) -> &'static str {
        match self {
            Family::Writing => "writing",
            Family::Units => "units",
            Family::Properties => "properties",
            Family::Closure => "closure",
            Family::DensityLaw => "density law",
            Family::Regime => "regime",
            Family::Resolution => "resolution",
            Family::Record => "record",
        }
    }
}
