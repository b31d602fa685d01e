//! `region-unreached`: a region that shares no face with the rest of the case.

use super::network::networks;
use crate::case::model::{BoundaryKind, Case};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{finding_of, is_fluid, listed};
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "region-unreached",
    family: Family::Closure,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "In a case of several regions, follows the faces that they share, and looks for regions that none leads to; and for \
                   regions that meet themselves.",
        formula: "",
        source: "common practice: no heat passes between regions that share no face. Fluid regions none of which meets another are taken \
                 as cases of their own",
        remedy: "`meets` on the face that it shares with its neighbour.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    let mut findings = meeting_themselves(case);
    let any_meet = case
        .boundaries
        .iter()
        .flat_map(|boundary| &boundary.kinds)
        .any(|(kind, _)| matches!(kind, BoundaryKind::Meets(_)));
    let networks = networks(subject);
    // The largest network, the first of equals, is the case; the others are apart from it.
    let size = |index: usize| networks.get(index).map_or(0, |network| network.regions.len());
    let Some(main) = (0..networks.len()).rev().max_by_key(|index| size(*index)) else { return findings };
    for (index, network) in networks.iter().enumerate() {
        let all_solid = network.regions.iter().all(|(region, _)| !is_fluid(region) && region.made_of.is_some());
        if index == main || !(any_meet || all_solid) {
            continue;
        }
        let names: Vec<&str> = network.regions.iter().map(|(region, _)| &*region.name.text).collect();
        let (Some((first, _)), plural) = (network.regions.first(), names.len() > 1) else { continue };
        let message = format!(
            "{} {} no face with the rest of the case, so no heat passes to {}.",
            listed(&names),
            if plural { "share" } else { "shares" },
            if plural { "them" } else { "it" },
        );
        findings.push(
            finding_of(CHECK.name, weighing.level, &first.name, message)
                .remedy("`meets` on the face that it shares with its neighbour, or a deck of its own"),
        );
    }
    findings
}

fn meeting_themselves(case: &Case) -> Vec<Finding> {
    let mut findings = Vec::new();
    for boundary in &case.boundaries {
        for (kind, place) in &boundary.kinds {
            let (BoundaryKind::Meets(other), Some(region)) = (kind, &boundary.region) else { continue };
            if other.text == region.text {
                let message =
                    format!("`{}` is a boundary of `{}` and meets it again.", boundary.name.text, region.text);
                findings.push(
                    Finding::new(CHECK.name, Level::Error, *place, message)
                        .about(&*boundary.name.text)
                        .remedy("the region on the other side of the face"),
                );
            }
        }
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn apart_from_the_rest() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
solid brick
    conductivity 0.8 W/m/K
region room
    box 1 m by 2 m by 3 m
    filled with a
boundary inside of room
    side west
    meets masonry
region masonry
    box 0.2 m by 2 m by 3 m
    made of brick
boundary itself of masonry
    side east
    meets masonry  #! region-unreached "meets it again"
region shelf  #! region-unreached "`shelf` shares no face"
    box 0.2 m by 2 m by 3 m
    made of brick
"##,
        );
    }

    #[test]
    fn cases_of_their_own() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
region hall
    box 1 m by 2 m by 3 m
    filled with a
"##,
        );
    }
}
