//! The checks, one file each, and the list of them.

pub mod check;
pub mod closure;
pub mod density_law;
pub mod list;
pub mod look;
pub mod properties;
pub mod record;
pub mod regime;
pub mod resolution;
pub mod units;
pub mod writing;

use crate::case::model::{Case, Practice};
use crate::physics::model::Physics;
use crate::syntax::{Finding, Level};
#[cfg(test)]
pub use crate::testing;
pub use check::{Basis, Check, Family, Subject, Weighing};
pub use list::CHECKS;
pub use record::apply_waivers;

/// The check of a name.
pub fn find(name: &str) -> Option<&'static Check> {
    CHECKS.iter().copied().find(|check| check.name == name)
}

/// Everything that the checks find in a case, at the levels and limits of its practice. Waivers are not yet applied.
pub fn run(case: &Case, physics: &Physics, today: &str) -> Vec<Finding> {
    let subject = Subject { case, physics, today };
    CHECKS
        .iter()
        .filter_map(|check| check.run.map(|run| run(&subject, &weighing(check, &case.practice))))
        .flatten()
        .collect()
}

/// The limits and level of a check under a practice. A practice's limit is the one at which the check first
/// speaks; the others keep their ratio to it. Its level becomes that of every finding of the check (see
/// [`at_practice_level`]).
pub fn weighing(check: &Check, practice: &Practice) -> Weighing {
    let mut limits = check.limits.to_vec();
    let stated = practice.limits.iter().rev().find(|(name, value)| &*name.text == check.name && value.is_known());
    if let (Some((_, value)), Some((_, first))) = (stated, check.limits.first()) {
        let ratio = value.si / first;
        for (_, limit) in &mut limits {
            *limit *= ratio;
        }
    }
    Weighing { limits, level: check.level }
}

/// The findings at the levels that a practice sets; those of a check that is off are dropped.
pub fn at_practice_level(findings: Vec<Finding>, practice: &Practice) -> Vec<Finding> {
    let level_of =
        |check: &str| practice.levels.iter().rev().find(|(name, _)| &*name.text == check).map(|(_, level)| *level);
    findings
        .into_iter()
        .filter_map(|mut finding| match level_of(finding.check) {
            None => Some(finding),
            Some(None) => None,
            Some(Some(level)) => {
                finding.level = level;
                Some(finding)
            }
        })
        .collect()
}

/// The highest level among findings that no waiver covers.
pub fn worst(findings: &[Finding]) -> Option<Level> {
    findings.iter().filter(|finding| finding.waived.is_none()).map(|finding| finding.level).max()
}
