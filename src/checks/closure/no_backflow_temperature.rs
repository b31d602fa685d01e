//! `no-backflow-temperature`: an opening through which fluid may come in at a temperature that nothing gives.

use super::parts::{Role, add_to_boundary, role};
use crate::case::model::Boundary;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{celsius, finding_of, region_of};
use crate::syntax::{Finding, Level};

/// Below this Richardson number the forced flow holds an outlet open: the limit of forced convection that
/// `buoyancy-negligible` names too.
const FORCED: f64 = 0.1;

/// The check.
pub const CHECK: Check = Check {
    name: "no-backflow-temperature",
    family: Family::Closure,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "Looks at every opening, and at every outlet where buoyancy counts (Ri over 0.1 or not known), for the temperature of \
                   fluid that comes back in.",
        formula: "",
        source: "common practice: buoyant flow leaves through one part of an opening and enters through another",
        remedy: "`backflow` with the temperature outside.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    subject.case.boundaries.iter().filter_map(|boundary| of_boundary(subject, boundary, weighing.level)).collect()
}

fn of_boundary(subject: &Subject<'_>, boundary: &Boundary, level: Level) -> Option<Finding> {
    if boundary.backflow.is_some() || boundary.carries.is_some() {
        return None;
    }
    let name = &boundary.name.text;
    let (level, message) = match role(boundary) {
        Role::Opening => (level, format!("Fluid may enter at `{name}`, and nothing says how warm it is.")),
        Role::Outlet => {
            let (_, physics) = region_of(subject, boundary)?;
            if physics.numbers.richardson < FORCED {
                return None;
            }
            (
                level.milder(),
                format!("Buoyancy may draw fluid back in at the outlet `{name}`, and nothing says how warm it is."),
            )
        }
        _ => return None,
    };
    let finding = finding_of(CHECK.name, level, &boundary.name, message);
    Some(match subject.case.ambient_temperature.as_ref().filter(|value| value.is_known()) {
        Some(ambient) => {
            let statement = format!("backflow {}", celsius(ambient.si));
            add_to_boundary(
                finding.remedy(format!("`{statement}`, the ambient temperature")),
                boundary,
                &statement,
                true,
            )
        }
        None => finding.remedy("`backflow` with the temperature outside"),
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn openings() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary door of room  #! no-backflow-temperature "may enter at `door`"
    side west
    opening
boundary hatch of room
    side top
    opening
    backflow 20 degC
"##,
        );
    }

    #[test]
    fn outlets() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary door of room  #! no-backflow-temperature "back in at the outlet `door`"
    side west
    outlet
boundary panel of room
    side east
    held at 40 degC
boundary hatch of room
    side top
    inlet
    enters at 0.1 m/s
    carries 20 degC
"##,
        );
    }

    #[test]
    fn the_fix_takes_ambient() {
        let text = r##"
case
    ambient 8 degC
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary door of room
    side west
    opening
"##;
        let mended = r##"
case
    ambient 8 degC
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary door of room
    backflow 8 degC
    side west
    opening
"##;
        assert_eq!(after_fix(CHECK.name, text), mended);
    }
}
