//! `side-twice`: two boundaries on the same part of a region's surface.

use super::sides::{area_of_side, is_partial, names, sides_of, stated_area, word};
use crate::case::model::{Boundary, Case, Region, Side};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{finding_of, listed, regions};
use crate::physics::model::RegionPhysics;
use crate::quantity::display::format_si;
use crate::syntax::{Finding, Level, Place};
use crate::vocabulary::statements::AREA;

/// The check.
pub const CHECK: Check = Check {
    name: "side-twice",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Looks for a side that two boundaries cover wholly, for patches that together are larger than their side, and for \
                   `remaining` where nothing remains.",
        formula: "",
        source: "common practice: one set of conditions at every point of the surface",
        remedy: "Give each side to one boundary; give a part of it by `patch` or `area`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    regions(subject).flat_map(|(region, physics)| of_region(subject.case, region, physics, weighing.level)).collect()
}

fn of_region(case: &Case, region: &Region, physics: &RegionPhysics, level: Level) -> Vec<Finding> {
    let mut findings = Vec::new();
    let every = sides_of(region).iter().copied().chain([Side::Remaining]);
    for side in every {
        let whole: Vec<(&Boundary, Place)> = case
            .boundaries_of(region)
            .filter(|boundary| !is_partial(boundary) || side == Side::Remaining)
            .flat_map(|boundary| boundary.sides.iter().map(move |stated| (boundary, stated)))
            .filter(|(_, stated)| stated.value == side)
            .map(|(boundary, stated)| (boundary, stated.place))
            .collect();
        if let [(first, first_place), (second, second_place), ..] = whole.as_slice() {
            let message = if first.name.text == second.name.text {
                format!("`{}` names the side `{}` twice.", first.name.text, word(side))
            } else {
                format!(
                    "Both {} cover the side `{}` of `{}`.",
                    listed(&[&first.name.text, &second.name.text]),
                    word(side),
                    region.name.text
                )
            };
            findings.push(
                Finding::new(CHECK.name, level, *second_place, message)
                    .about(&*second.name.text)
                    .remedy("give the side to one of them; a part of it is given by `patch` or `area`")
                    .related(*first_place, "the other time"),
            );
        }
        findings.extend(too_large(case, region, physics, side, level));
    }
    findings.extend(nothing_remains(case, region));
    findings
}

/// Patches that are larger than their side.
fn too_large(case: &Case, region: &Region, physics: &RegionPhysics, side: Side, level: Level) -> Option<Finding> {
    // A stated area over several sides cannot be told apart by side.
    let parts: Vec<(&Boundary, f64)> = case
        .boundaries_of(region)
        .filter(|boundary| boundary.sides.len() == 1 && names(boundary, side))
        .filter_map(|boundary| Some((boundary, stated_area(boundary)?)))
        .collect();
    let covered: f64 = parts.iter().map(|(_, area)| area).sum();
    let whole = area_of_side(physics, side);
    let (last, _) = parts.last()?;
    // A hundredth is left to rounding in the deck.
    (covered > 1.01 * whole).then(|| {
        let names: Vec<&str> = parts.iter().map(|(boundary, _)| &*boundary.name.text).collect();
        let verb = if names.len() == 1 { "covers" } else { "together cover" };
        let message = format!(
            "{} {verb} {}, and the side `{}` of `{}` has only {}.",
            listed(&names),
            format_si(covered, AREA),
            word(side),
            region.name.text,
            format_si(whole, AREA)
        );
        finding_of(CHECK.name, level, &last.name, message).remedy("a smaller `patch` or `area`, or another side")
    })
}

/// `remaining` where the other boundaries cover everything.
fn nothing_remains(case: &Case, region: &Region) -> Option<Finding> {
    let boundary = case.boundaries_of(region).find(|boundary| names(boundary, Side::Remaining))?;
    let stated = boundary.sides.iter().find(|stated| stated.value == Side::Remaining)?;
    let is_taken = |side: &Side| case.boundaries_of(region).any(|other| names(other, *side) && !is_partial(other));
    let sides = sides_of(region);
    (!sides.is_empty() && sides.iter().all(is_taken)).then(|| {
        let message = format!(
            "Nothing remains for `{}`: other boundaries cover every side of `{}`.",
            boundary.name.text, region.name.text
        );
        Finding::new(CHECK.name, Level::Warning, stated.place, message)
            .about(&*boundary.name.text)
            .remedy("leave the boundary out, or free the sides that it is meant for")
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn twice() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room
    side west, east
    insulated
boundary two of room
    side east  #! side-twice "Both `one` and `two`"
    insulated
boundary three of room
    side top, top  #! side-twice "twice"
    insulated
"##,
        );
    }

    #[test]
    fn nothing_remains() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region slab
    box 1 m by 2 m
    filled with a
boundary one of slab
    side west, east, bottom, top
    insulated
boundary rest of slab
    side remaining  #! side-twice "Nothing remains"
    insulated
"##,
        );
    }

    #[test]
    fn a_patch_beside_the_rest() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary heater of room
    side west
    patch 0.2 m by 0.3 m
    held at 40 degC
boundary wall_behind of room
    side west
    insulated
boundary rest of room
    side remaining
    insulated
"##,
        );
    }
}
