//! `side-unassigned`: a part of a region's surface that no boundary covers.

use super::parts::add_entry;
use super::side_not_of_shape::names_others;
use super::sides::{is_partial, names, sides_of, sides_to_assign, stated_area, word};
use crate::case::model::{Boundary, Case, Region, Side};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{finding_of, listed};
use crate::physics::model::SideGeometry;
use crate::quantity::display::format_si;
use crate::syntax::{Finding, Fix, Level};
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
    subject.case.regions.iter().filter_map(|region| of_region(subject.case, region, weighing.level)).collect()
}

fn of_region(case: &Case, region: &Region, level: Level) -> Option<Finding> {
    if case.boundaries_of(region).any(|boundary| names(boundary, Side::Remaining)) {
        return None;
    }
    // A boundary on a side that is not there is meant for one of those left over: `side-not-of-shape` says so.
    let all: Vec<Side> = sides_of(case, region).iter().map(|of| of.side).collect();
    if names_others(case, region, &all) {
        return None;
    }
    let name = &region.name.text;
    let open: Vec<SideGeometry> =
        sides_to_assign(case, region).into_iter().filter(|side| !is_covered(case, region, side)).collect();
    let words: Vec<&str> = open.iter().map(|side| word(side.side)).collect();
    let nothing_at_all = case.boundaries_of(region).next().is_none();
    let message = match open.as_slice() {
        [] => return None,
        _ if nothing_at_all => format!("`{name}` has no boundary: nothing holds on its sides {}.", listed(&words)),
        [side] => {
            format!("No boundary covers the side `{}` of `{name}`{}.", word(side.side), part_of(case, region, side))
        }
        _ => format!("No boundary covers the sides {} of `{name}`.", listed(&words)),
    };
    let finding = finding_of(CHECK.name, level, &region.name, message);
    if region.is_surrounded {
        return Some(
            finding.remedy("a boundary with `side face` for the body and one with `side far` for the wide fluid"),
        );
    }
    let mut finding = finding.remedy("a boundary with `side remaining`, or one for each");
    if !nothing_at_all {
        finding.fixes.extend(insulate_the_rest(case, name));
    }
    Some(finding)
}

fn insulate_the_rest(case: &Case, region: &str) -> Option<Fix> {
    let free_name = (1..100)
        .map(|number| if number == 1 { format!("rest_of_{region}") } else { format!("rest_{number}_of_{region}") })
        .find(|name| !case.boundaries.iter().any(|boundary| *boundary.name.text == **name))?;
    let entry = format!("boundary {free_name} of {region}\n    side       remaining\n    wall\n    insulated");
    add_entry(case, "Insulate what remains", &entry)
}

fn is_covered(case: &Case, region: &Region, side: &SideGeometry) -> bool {
    // The face of a body may be called by any side of its shape.
    let is_face = region.is_surrounded && side.side == Side::Face;
    let covers = |boundary: &Boundary| {
        names(boundary, side.side) || is_face && boundary.sides.iter().any(|stated| stated.value != Side::Far)
    };
    if case.boundaries_of(region).any(|boundary| covers(boundary) && !is_partial(boundary)) {
        return true;
    }
    // Patches that make up the whole side. An unknown area is given the benefit of the doubt.
    let parts = parts_of(case, region, side.side);
    let falls_short = parts.iter().sum::<f64>() < 0.99 * side.area;
    !parts.is_empty() && !falls_short
}

fn parts_of(case: &Case, region: &Region, side: Side) -> Vec<f64> {
    case.boundaries_of(region).filter(|boundary| names(boundary, side)).filter_map(stated_area).collect()
}

/// How much of the side is covered, where a patch covers some of it.
fn part_of(case: &Case, region: &Region, side: &SideGeometry) -> String {
    let covered: f64 = parts_of(case, region, side.side).iter().sum();
    if covered > 0.0 && side.area.is_finite() {
        format!(" beyond {} of its {}", format_si(covered, AREA), format_si(side.area, AREA))
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
    cylinder 50 mm by 2 m along x
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
region can
    cylinder 1 m by 2 m along x
    filled with a
boundary mantle of can
    side around
    held at 20 degC
boundary ends of can
    side west, east
    insulated
region ball
    sphere 0.1 m
    surrounded by a
boundary skin of ball
    side around
    held at 40 degC
boundary air_around of ball
    side far
    held at 20 degC
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
