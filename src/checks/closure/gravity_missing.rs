//! `gravity-missing`: a density that drives buoyancy, and no gravity for it to act in.

use super::parts::add_below;
use crate::case::model::{Case, DensityLaw, Fluid};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::syntax::{Edit, Finding, Fix, Level, Span};

/// The check.
pub const CHECK: Check = Check {
    name: "gravity-missing",
    family: Family::Closure,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "Where a fluid's density law lets density fall with temperature, looks for gravity, which turns that into a force.",
        formula: "f = (ρ − ρ0) g",
        source: "Archimedes' law; that the magnitude and direction are stated rather than left to a default is common practice",
        remedy: "`gravity 9.81 m/s^2 along -z` in the case.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    let Some(fluid) = buoyant_fluid(case) else { return Vec::new() };
    let name = &fluid.name.text;
    let law = fluid.density_law.map_or(fluid.name.place, |law| law.place);
    match case.gravity.place {
        None => {
            let message = format!(
                "The density of `{name}` falls with temperature, and nothing says how gravity acts: 9.807 m/s^2 along -z is taken."
            );
            let mut finding = Finding::new(CHECK.name, weighing.level, case.place, message)
                .remedy("`gravity 9.81 m/s^2 along -z`")
                .related(law, "its density law");
            finding.fixes.push(state_gravity(case));
            vec![finding]
        }
        Some(place) if case.gravity.magnitude == 0.0 => {
            let message = format!("There is no gravity, so the density law of `{name}` drives nothing.");
            vec![
                Finding::new(CHECK.name, weighing.level, place, message)
                    .remedy("`gravity 9.81 m/s^2 along -z`, or `density-law constant`")
                    .related(law, "its density law"),
            ]
        }
        Some(_) => Vec::new(),
    }
}

/// The first fluid in a region whose density law drives buoyancy.
fn buoyant_fluid(case: &Case) -> Option<&Fluid> {
    let drives = |fluid: &&Fluid| fluid.density_law.is_some_and(|law| law.value != DensityLaw::Constant);
    case.regions.iter().filter_map(|region| case.fluid_of(region)).find(drives)
}

fn state_gravity(case: &Case) -> Fix {
    const STATEMENT: &str = "gravity 9.81 m/s^2 along -z";
    let has_entry = case.place.span.end > case.place.span.start;
    if has_entry {
        return add_below(case.place, STATEMENT, true);
    }
    let start = Span::new(case.place.span.start, case.place.span.start);
    let edit = Edit { file: case.place.file, span: start, text: format!("case\n    {STATEMENT}\n\n") };
    Fix { title: format!("Add `{STATEMENT}`"), edits: vec![edit], sure: true }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn no_word_of_gravity() {
        expect_of(
            CHECK.name,
            r##"
case "Room"  #! gravity-missing "`a` falls with temperature"
    ambient 20 degC
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a
"##,
        );
    }

    #[test]
    fn no_gravity_at_all() {
        expect_of(
            CHECK.name,
            r##"
case
    gravity none  #! gravity-missing "drives nothing"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a
"##,
        );
    }

    #[test]
    fn nothing_buoyant() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
    density-law constant
region room
    box 1 m by 2 m by 3 m
    filled with a
"##,
        );
    }

    #[test]
    fn the_fix_states_it() {
        let text = r##"
case "Room"
    ambient 20 degC
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a
"##;
        let mended = r##"
case "Room"
    gravity 9.81 m/s^2 along -z
    ambient 20 degC
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a
"##;
        assert_eq!(after_fix(CHECK.name, text), mended);
    }
}
