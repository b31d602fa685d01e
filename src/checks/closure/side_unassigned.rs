//! `side-unassigned`: a part of a region's surface that no boundary covers.

use super::parts::add_entry;
use super::sides::{area_of_side, is_partial, names, sides_to_assign, stated_area, word};
use crate::case::model::{Case, Region, Side};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{finding_of, listed, regions};
use crate::physics::model::RegionPhysics;
use crate::quantity::display::format_si;
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::AREA;

/// The check.
pub const CHECK: Check = Check {
    name: "side-unassigned",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Holds the sides of each region's shape against those that its boundaries cover.",
        formula: "",
        source: "the equations take a condition at every point of the surface (Carslaw and Jaeger 1959, section 1.9, recalled). That the \
                 rims of a gap and the ends of an annulus count as insulated, and the ends of a channel as open, is common practice",
        remedy: "A boundary for the side, or one with `side remaining`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    regions(subject).filter_map(|(region, physics)| of_region(subject.case, region, physics, weighing.level)).collect()
}

fn of_region(case: &Case, region: &Region, physics: &RegionPhysics, level: Level) -> Option<Finding> {
    if case.boundaries_of(region).any(|boundary| names(boundary, Side::Remaining)) {
        return None;
    }
    let name = &region.name.text;
    let open: Vec<&str> = sides_to_assign(region)
        .iter()
        .filter(|side| !is_covered(case, region, physics, **side))
        .map(|side| word(*side))
        .collect();
    if open.is_empty() {
        return None;
    }
    let nothing_at_all = case.boundaries_of(region).next().is_none();
    let message = if nothing_at_all {
        format!("`{name}` has no boundary: nothing holds on its sides {}.", listed(&open))
    } else {
        match open.as_slice() {
            [side] => {
                format!("No boundary covers the side `{side}` of `{name}`{}.", part_of(case, region, physics, side))
            }
            _ => format!("No boundary covers the sides {} of `{name}`.", listed(&open)),
        }
    };
    let finding = finding_of(CHECK.name, level, &region.name, message);
    if region.is_surrounded {
        return Some(
            finding.remedy("a boundary with `side face` for the body and one with `side far` for the wide fluid"),
        );
    }
    let mut finding = finding.remedy("a boundary with `side remaining`, or one for each");
    if !nothing_at_all {
        let free_name = (1..100)
            .map(|number| if number == 1 { format!("rest_of_{name}") } else { format!("rest_{number}_of_{name}") })
            .find(|name| !case.boundaries.iter().any(|boundary| *boundary.name.text == **name));
        let entry = free_name
            .map(|free| format!("boundary {free} of {name}\n    side       remaining\n    wall\n    insulated"));
        let fix = entry.and_then(|entry| add_entry(case, "Insulate what remains", &entry));
        finding.fixes.extend(fix);
    }
    Some(finding)
}

fn is_covered(case: &Case, region: &Region, physics: &RegionPhysics, side: Side) -> bool {
    if case.boundaries_of(region).any(|boundary| names(boundary, side) && !is_partial(boundary)) {
        return true;
    }
    // Patches that make up the whole side. An unknown area is given the benefit of the doubt.
    let parts = parts_of(case, region, side);
    let whole = area_of_side(physics, side);
    let falls_short = parts.iter().sum::<f64>() < 0.99 * whole;
    !parts.is_empty() && !falls_short
}

fn parts_of(case: &Case, region: &Region, side: Side) -> Vec<f64> {
    case.boundaries_of(region).filter(|boundary| names(boundary, side)).filter_map(stated_area).collect()
}

/// How much of the side is covered, where a patch covers some of it.
fn part_of(case: &Case, region: &Region, physics: &RegionPhysics, open: &str) -> String {
    let Some(side) = sides_to_assign(region).iter().copied().find(|side| word(*side) == open) else {
        return String::new();
    };
    let covered: f64 = parts_of(case, region, side).iter().sum();
    let whole = area_of_side(physics, side);
    if covered > 0.0 && whole.is_finite() {
        format!(" beyond {} of its {}", format_si(covered, AREA), format_si(whole, AREA))
    } else {
        String::new()
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn sides_left_over() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room  #! side-unassigned "`south`, `north` and `top`"
    box 1 m by 2 m by 3 m
    filled with a
boundary one of room
    side west, east, bottom
    insulated
region bare  #! side-unassigned "has no boundary"
    box 1 m by 2 m
    filled with a
region pipe  #! side-unassigned "`far`"
    cylinder 50 mm by 2 m
    axis x
    surrounded by a
boundary skin of pipe
    side face
    held at 60 degC
"##,
        );
    }

    #[test]
    fn all_covered() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
boundary one of room
    side west
    insulated
boundary rest of room
    side remaining
    insulated
region pane
    gap 16 mm by 1.2 m
    filled with a
boundary warm of pane
    side west
    held at 20 degC
boundary cold of pane
    side east
    held at 0 degC
region ring
    annulus 50 mm by 120 mm by 1 m
    filled with a
boundary inner_one of ring
    side inner
    held at 20 degC
boundary outer_one of ring
    side outer
    held at 0 degC
"##,
        );
    }

    #[test]
    fn the_fix_adds_a_boundary() {
        let text = r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room
    side west
    insulated

run
    steady
"##;
        let mended = r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room
    side west
    insulated

boundary rest_of_room of room
    side       remaining
    wall
    insulated

run
    steady
"##;
        assert_eq!(after_fix(CHECK.name, text), mended);
    }
}
