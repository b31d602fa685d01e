//! `conduction-only`: a layer heated from below in which nothing moves.

use super::onsets::motion;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{estimate_note, finding_of, regions};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "conduction-only",
    family: Family::Regime,
    limits: &[(Level::Information, 1.0)],
    level: Level::Information,
    basis: Basis {
        compares: "Holds the Rayleigh number of a layer heated from below against the onset of motion.",
        formula: "Ra_onset / Ra on the depth; 1707.76 between walls, 1100.65 with one face that slips, 657.51 with two",
        source: "Chandrasekhar, Hydrodynamic and Hydromagnetic Stability, 1961, chapter II. Side walls only raise the onset",
        remedy: "Nothing needs doing where conduction is what is meant: the Nusselt number is 1, and no flow need be computed.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let Some(held) = motion(subject.case, region, physics) else { continue };
        let ratio = held.under_onset();
        let Some((level, limit)) = ratio.over(weighing) else { continue };
        let message = format!(
            "Ra of `{}` is {}, below {} for {}: nothing moves, and heat passes by conduction alone.{}",
            region.name.text,
            format_number(held.rayleigh.value),
            format_number(held.onset.rayleigh),
            held.onset.name,
            estimate_note(physics.bracket.as_ref()),
        );
        findings.push(
            finding_of(CHECK.name, level, &region.name, message)
                .remedy("a conduction calculation, unless a larger difference or depth is meant")
                .weighing(ratio.margin("Ra_onset / Ra", limit)),
        );
    }
    findings
}
