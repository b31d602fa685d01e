//! `not-physical`: a value that nothing in nature has: a temperature below absolute zero, a length of nothing, an
//! emissivity over 1.

use super::slip;
use super::stated::{PROPERTIES, as_written};
use crate::case::model::{Case, Heat, Region, Shape, Value};
use crate::checks::look::{named, sentence};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "not-physical",
    family: Family::Properties,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Every value with what its kind can be: absolute temperature, pressure, length, density, viscosity, conductivity, heat capacity, duration and step above 0; emissivity and fraction from 0 to 1; growth 1 or more; numbers of cells whole and at least 1.",
        formula: "",
        source: "Laws of thermodynamics (ISO 80000-5); common practice",
        remedy: "Write the value that was meant.",
    },
    run: Some(run),
};

/// What a value must be.
#[derive(Clone, Copy, Debug, PartialEq)]
enum Must {
    BeAbove0,
    NotBeBelow0,
    BeAboveAbsoluteZero,
    BeAShare,
    BeAtLeast1,
    BeWhole,
    BeATilt,
}

impl Must {
    /// Whether a value is what it must be. An unknown one is taken as such.
    fn holds(self, value: f64) -> bool {
        if value.is_nan() {
            return true;
        }
        match self {
            Must::BeAbove0 | Must::BeAboveAbsoluteZero => value > 0.0,
            Must::NotBeBelow0 => value >= 0.0,
            Must::BeAShare => (0.0..=1.0).contains(&value),
            Must::BeAtLeast1 => value >= 1.0,
            Must::BeWhole => value >= 1.0 && (value - value.round()).abs() <= 1e-9 * value,
            Must::BeATilt => (-1e-9..=std::f64::consts::PI + 1e-9).contains(&value),
        }
    }

    fn words(self) -> &'static str {
        match self {
            Must::BeAbove0 => "must be above 0",
            Must::NotBeBelow0 => "must not be below 0",
            Must::BeAboveAbsoluteZero => "is not above absolute zero, -273.15 degC",
            Must::BeAShare => "must lie between 0 and 1",
            Must::BeAtLeast1 => "must be 1 or more",
            Must::BeWhole => "must be a whole number of 1 or more",
            Must::BeATilt => "must lie between 0 deg and 180 deg",
        }
    }

    fn remedy(self) -> &'static str {
        match self {
            Must::BeAbove0 => "",
            Must::NotBeBelow0 => "a magnitude; which way it goes, the statement says",
            Must::BeAboveAbsoluteZero => "the unit that was meant",
            Must::BeAShare => "a share between 0 and 1, or a percentage with its sign: 85 %",
            Must::BeAtLeast1 => "the ratio of a cell to the one before it, nearer the wall: 1.15",
            Must::BeWhole => "a whole number",
            Must::BeATilt => {
                "the angle of the hot plate against the horizontal: 0 deg is heated from below, 90 deg from the side"
            }
        }
    }
}

/// A value, what it is, whose it is and what it must be.
struct Held<'a> {
    value: &'a Value,
    name: String,
    of: &'a str,
    must: Must,
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let slips = slip::slips(subject);
    let mut findings: Vec<Finding> = held(subject.case)
        .into_iter()
        .filter(|held| !held.must.holds(held.value.si) && !slip::is_slip(&slips, held.value))
        .map(|held| {
            let message =
                format!("the {} of `{}`, {}, {}", held.name, held.of, as_written(held.value), held.must.words());
            let finding = Finding::new(CHECK.name, weighing.level, held.value.origin.place, sentence(&message));
            finding.remedy(held.must.remedy()).about(held.of)
        })
        .collect();
    findings.extend(subject.case.regions.iter().filter_map(|region| turned_annulus(region, weighing.level)));
    findings
}

/// An annulus whose inner cylinder is not the smaller one.
fn turned_annulus(region: &Region, level: Level) -> Option<Finding> {
    let Some(Shape::Annulus { inner, outer, .. }) = &region.shape else { return None };
    if !(inner.si > 0.0 && outer.si > 0.0 && inner.si >= outer.si) {
        return None;
    }
    let message = format!(
        "the inner diameter of {}, {}, is not below the outer one, {}",
        named(&region.name),
        as_written(inner),
        as_written(outer)
    );
    let finding = Finding::new(CHECK.name, level, inner.origin.place, sentence(&message));
    Some(finding.remedy("the inner diameter first, then the outer one").about(&*region.name.text))
}

fn held(case: &Case) -> Vec<Held<'_>> {
    let mut all = Vec::new();
    of_case(case, &mut all);
    of_materials(case, &mut all);
    case.regions.iter().for_each(|region| of_region(region, &mut all));
    of_boundaries(case, &mut all);
    of_states(case, &mut all);
    of_mesh_and_run(case, &mut all);
    all
}

fn add<'a>(all: &mut Vec<Held<'a>>, value: Option<&'a Value>, name: &str, of: &'a str, must: Must) {
    all.extend(value.map(|value| Held { value, name: name.to_string(), of, must }));
}

fn of_case<'a>(case: &'a Case, all: &mut Vec<Held<'a>>) {
    add(all, case.gravity.value.as_ref(), "gravity", "case", Must::NotBeBelow0);
    add(all, case.ambient_temperature.as_ref(), "ambient temperature", "case", Must::BeAboveAbsoluteZero);
    add(all, case.ambient_pressure.as_ref(), "ambient pressure", "case", Must::BeAbove0);
}

fn of_materials<'a>(case: &'a Case, all: &mut Vec<Held<'a>>) {
    for fluid in &case.fluids {
        let of = &*fluid.name.text;
        add(all, fluid.reference_temperature.as_ref(), "reference temperature", of, Must::BeAboveAbsoluteZero);
        add(all, fluid.reference_pressure.as_ref(), "reference pressure", of, Must::BeAbove0);
        add(all, fluid.fraction.as_ref(), "fraction", of, Must::BeAShare);
        // Water below 4 degC expands as it cools, so α may have either sign.
        for row in PROPERTIES.iter().filter(|row| row.symbol != "α") {
            add(all, (row.stated)(fluid), row.name, of, Must::BeAbove0);
        }
    }
    for solid in &case.solids {
        let of = &*solid.name.text;
        add(all, solid.conductivity.as_ref(), "conductivity", of, Must::BeAbove0);
        add(all, solid.density.as_ref(), "density", of, Must::BeAbove0);
        add(all, solid.heat_capacity.as_ref(), "heat capacity", of, Must::BeAbove0);
        add(all, solid.emissivity.as_ref(), "emissivity", of, Must::BeAShare);
    }
}

fn of_region<'a>(region: &'a Region, all: &mut Vec<Held<'a>>) {
    let of = &*region.name.text;
    for length in region.shape.iter().flat_map(super::slip_of_size::lengths) {
        add(all, Some(length), "size", of, Must::BeAbove0);
    }
    add(all, region.length.as_ref(), "length", of, Must::BeAbove0);
    add(all, region.tilt.as_ref(), "tilt", of, Must::BeATilt);
}

fn of_boundaries<'a>(case: &'a Case, all: &mut Vec<Held<'a>>) {
    for boundary in &case.boundaries {
        let of = &*boundary.name.text;
        for (heat, _) in &boundary.heat {
            match heat {
                Heat::HeldAt(value) => add(all, Some(value), "temperature", of, Must::BeAboveAbsoluteZero),
                Heat::RadiatesTo(value) => add(all, Some(value), "surroundings", of, Must::BeAboveAbsoluteZero),
                Heat::Exchanges { coefficient, temperature } => {
                    add(all, Some(coefficient), "heat transfer coefficient", of, Must::NotBeBelow0);
                    add(all, Some(temperature), "surroundings", of, Must::BeAboveAbsoluteZero);
                }
                Heat::HeatedBy(_) | Heat::CooledBy(_) | Heat::Insulated => {}
            }
        }
        add(all, boundary.emissivity.as_ref(), "emissivity", of, Must::BeAShare);
        add(all, boundary.area.as_ref(), "area", of, Must::BeAbove0);
        if let Some((width, height)) = &boundary.patch {
            add(all, Some(width), "patch", of, Must::BeAbove0);
            add(all, Some(height), "patch", of, Must::BeAbove0);
        }
        add(all, boundary.enters.as_ref(), "inflow", of, Must::NotBeBelow0);
        add(all, boundary.carries.as_ref(), "inflow temperature", of, Must::BeAboveAbsoluteZero);
        add(all, boundary.backflow.as_ref(), "backflow temperature", of, Must::BeAboveAbsoluteZero);
    }
}

fn of_states<'a>(case: &'a Case, all: &mut Vec<Held<'a>>) {
    for initial in &case.initials {
        let of = initial.region.as_ref().map_or("initial", |name| &*name.text);
        add(all, initial.temperature.as_ref(), "initial temperature", of, Must::BeAboveAbsoluteZero);
        if let Some((bottom, top)) = &initial.stratified {
            add(all, Some(bottom), "initial temperature", of, Must::BeAboveAbsoluteZero);
            add(all, Some(top), "initial temperature", of, Must::BeAboveAbsoluteZero);
        }
    }
    for source in &case.sources {
        add(all, source.within.as_ref(), "volume", &source.name.text, Must::BeAbove0);
    }
}

fn of_mesh_and_run<'a>(case: &'a Case, all: &mut Vec<Held<'a>>) {
    for mesh in &case.meshes {
        let of = mesh.region.as_ref().map_or("mesh", |name| &*name.text);
        for cells in &mesh.cells {
            add(all, Some(cells), "number of cells", of, Must::BeWhole);
        }
        add(all, mesh.first_cell.as_ref(), "first cell", of, Must::BeAbove0);
        add(all, mesh.growth.as_ref(), "growth", of, Must::BeAtLeast1);
    }
    if let Some((duration, step)) = case.run.as_ref().and_then(|run| run.transient.as_ref()) {
        add(all, Some(duration), "duration", "run", Must::BeAbove0);
        add(all, Some(step), "step", "run", Must::BeAbove0);
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn each_kind() {
        expect_of(
            CHECK.name,
            r##"
case "Nothing of this can be"
    gravity -9.81 m/s^2   #! not-physical "gravity"
fluid custom
    density      -1 kg/m^3   #! not-physical "must be above 0"
    viscosity    0 Pa.s      #! not-physical
    reference    -300 degC   #! not-physical "absolute zero"
solid steel
    emissivity   -0.2        #! not-physical "between 0 and 1"
region room
    box          1 m by 0 m by 3 m   #! not-physical "size of `room`"
    tilt         200 deg     #! not-physical
region ring
    annulus      0.2 m by 0.1 m   #! not-physical "inner diameter"
boundary w of room
    side west
    wall
    exchanges    -3 W/m^2/K with 20 degC   #! not-physical
boundary e of room
    side east
    wall
    held at      -280 degC   #! not-physical
mesh of room
    cells        10.5 by 10 by 0   #! not-physical "number of cells of `room`, 10.5", not-physical "number of cells of `room`, 0"
    growth       0.8         #! not-physical "1 or more"
run
    transient for 0 s step -1 s   #! not-physical "duration", not-physical "step"
"##,
        );
    }

    #[test]
    fn sound() {
        expect_of(
            CHECK.name,
            r##"
case "A room"
    gravity 9.81 m/s^2 along -z
fluid custom
    density      1 kg/m^3
    viscosity    1e-5 Pa.s
    expansion    -3e-5 1/K
    reference    -20 degC
region room
    box          1 m by 1 m by 3 m
    tilt         180 deg
boundary w of room
    side west
    wall
    emissivity   0
    exchanges    0 W/m^2/K with 20 degC
mesh of room
    cells        10 by 10 by 1
    growth       1
run
    transient for 10 s step 0.1 s
"##,
        );
    }
}
