//! `no-initial`: a case followed in time that does not say where it starts.

use super::parts::add_entry;
use crate::case::model::{Case, Region};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{celsius, finding_of, is_fluid};
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "no-initial",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "In a transient run, looks for the temperature that each region starts from.",
        formula: "",
        source: "the energy equation is of first order in time and takes one initial state: Carslaw and Jaeger, Conduction of Heat in \
                 Solids, 2nd edition, 1959, section 1.9 (recalled)",
        remedy: "An `initial` entry with `temperature` or `stratified` for the region.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    if case.run.as_ref().is_none_or(|run| run.transient.is_none()) {
        return Vec::new();
    }
    case.regions
        .iter()
        .filter(|region| !starts(case, region))
        .map(|region| of_region(case, region, weighing.level))
        .collect()
}

fn starts(case: &Case, region: &Region) -> bool {
    case.initials
        .iter()
        .filter(|initial| initial.region.as_ref().is_some_and(|of| of.text == region.name.text))
        .any(|initial| initial.temperature.is_some() || initial.stratified.is_some())
}

fn of_region(case: &Case, region: &Region, level: Level) -> Finding {
    let name = &region.name.text;
    let message = format!("The run is transient, and nothing says how warm `{name}` is when it starts.");
    let mut finding = finding_of(CHECK.name, level, &region.name, message)
        .remedy(format!("an entry `initial {name}` with `temperature` or `stratified`"));
    if let Some(run) = &case.run {
        finding = finding.related(run.place, "the run");
    }
    let reference = case.fluid_of(region).and_then(|fluid| fluid.reference_temperature.as_ref());
    let start = case.ambient_temperature.as_ref().or(reference).filter(|value| value.is_known());
    let has_entry =
        case.initials.iter().any(|initial| initial.region.as_ref().is_some_and(|of| of.text == region.name.text));
    if let (Some(start), false) = (start, has_entry) {
        let rest = if is_fluid(region) { "\n    at rest" } else { "" };
        let entry = format!("initial {name}\n    temperature  {}{rest}", celsius(start.si));
        finding.fixes.extend(add_entry(case, &format!("Start from {}", celsius(start.si)), &entry));
    }
    finding
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn where_it_starts() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room  #! no-initial "how warm `room` is"
    box 1 m by 2 m by 3 m
    filled with a
region hall
    box 1 m by 2 m by 3 m
    filled with a
initial hall
    stratified from 18 degC to 24 degC
run
    transient for 1 h step 1 s
"##,
        );
    }

    #[test]
    fn steady_needs_none() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

run
    steady
"##,
        );
    }

    #[test]
    fn the_fix_starts_from_ambient() {
        let text = r##"
case
    ambient 8 degC
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

run
    transient for 1 h step 1 s
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

initial room
    temperature  8 degC
    at rest

run
    transient for 1 h step 1 s
"##;
        assert_eq!(after_fix(CHECK.name, text), mended);
    }
}
