//! The case at one point: every bound value evaluated and put where it belongs.

use super::bind::{Bound, BoundEntry, BoundStatement, BoundValue};
use super::compiled::{Compiled, Variable};
use super::model::{
    Axis, Boundary, BoundaryKind, Case, DensityLaw, Flow, Fluid, Given, Gravity, Heat, Initial, Mesh, Name, Practice,
    Radiation, Region, Requirement, Run, Shape, Side, Solid, Source, Stated, Value, Waiver,
};
use super::resolution::Resolution;
use crate::syntax::Place;
use crate::vocabulary::EntryKind;

/// The values of a deck's names at one point of its sweep.
#[derive(Clone, Debug, Default)]
pub struct Point {
    /// By number; `NaN` where unknown.
    pub values: Vec<f64>,
    /// How far each value with a tolerance is from its middle, SI.
    pub deviations: Vec<f64>,
}

impl Point {
    /// The value of an expression. Numbers of regions are not known here.
    pub fn evaluate(&self, compiled: &Compiled) -> f64 {
        compiled.value(&|variable| match variable {
            Variable::Given(number) => self.values.get(*number).copied().unwrap_or(f64::NAN),
            Variable::Deviation(index) => self.deviations.get(*index).copied().unwrap_or(0.0),
            _ => f64::NAN,
        })
    }
}

/// Reads the slots of one entry.
#[derive(Clone, Copy)]
struct Reader<'r> {
    entry: &'r BoundEntry,
    point: &'r Point,
}

impl Reader<'_> {
    fn statement(&self, word: &str) -> Option<&BoundStatement> {
        self.entry.statements.iter().find(|statement| statement.row.word == word)
    }

    fn slot(&self, word: &str, slot: usize) -> Option<&Bound> {
        self.statement(word)?.slots.get(slot)?.first()
    }

    fn value_of(&self, bound: &BoundValue) -> Value {
        Value { si: self.point.evaluate(&bound.compiled), dimension: bound.dimension, origin: bound.origin.clone() }
    }

    fn value(&self, word: &str, slot: usize) -> Option<Value> {
        match self.slot(word, slot)? {
            Bound::Value(bound) => Some(self.value_of(bound)),
            _ => None,
        }
    }

    fn first(&self, word: &str) -> Option<Value> {
        self.value(word, 0)
    }

    fn name(&self, word: &str) -> Option<Name> {
        match self.slot(word, 0)? {
            Bound::Name(name) | Bound::Text(name) => Some(name.clone()),
            _ => None,
        }
    }

    fn text(&self, word: &str, slot: usize) -> Option<Name> {
        match self.slot(word, slot)? {
            Bound::Text(text) => Some(text.clone()),
            _ => None,
        }
    }

    fn choice(&self, word: &str) -> Option<(&'static str, Place)> {
        match self.slot(word, 0)? {
            Bound::Choice(choice, _) => Some((*choice, self.statement(word)?.place)),
            _ => None,
        }
    }

    fn switch(&self, word: &str) -> Option<Stated<bool>> {
        self.choice(word).map(|(choice, place)| Stated { value: choice == "on", place })
    }

    fn direction(&self, word: &str, slot: usize) -> Option<[f64; 3]> {
        match self.slot(word, slot)? {
            Bound::Direction(parts) => unit_vector([
                self.point.evaluate(&parts[0]),
                self.point.evaluate(&parts[1]),
                self.point.evaluate(&parts[2]),
            ]),
            _ => None,
        }
    }

    fn head_name(&self, slot: usize) -> Option<Name> {
        match self.entry.slots.get(slot)?.first()? {
            Bound::Name(name) | Bound::Text(name) => Some(name.clone()),
            _ => None,
        }
    }

    fn own_name(&self) -> Name {
        self.entry.name.clone().unwrap_or(Name { text: "".into(), place: self.entry.head })
    }
}

fn unit_vector(parts: [f64; 3]) -> Option<[f64; 3]> {
    let length = parts.iter().map(|part| part * part).sum::<f64>().sqrt();
    (length > 0.0 && length.is_finite()).then(|| parts.map(|part| part / length))
}

/// The case at a point.
pub fn build(resolution: &Resolution, point: &Point) -> Case {
    let mut case = Case { practice: Practice::default(), ..Case::default() };
    case.given = resolution
        .given
        .iter()
        .map(|given| Given {
            name: given.name.clone(),
            value: Value {
                si: point.values.get(given.number).copied().unwrap_or(f64::NAN),
                dimension: given.dimension,
                origin: given.origin.clone(),
            },
            description: given.description.clone(),
        })
        .collect();
    case.substances.clone_from(&resolution.substances);
    case.requirements = resolution.requirements.iter().map(|requirement| at_point(requirement, point)).collect();
    for entry in &resolution.entries {
        add(&mut case, Reader { entry, point });
    }
    case
}

/// A requirement with the values of the deck's names put in; only numbers of regions are left open.
fn at_point(requirement: &Requirement, point: &Point) -> Requirement {
    let known = |variable: &Variable| match variable {
        Variable::Given(_) | Variable::Deviation(_) => Some(point.evaluate(&Compiled::Variable(variable.clone()))),
        _ => None,
    };
    Requirement {
        left: requirement.left.settled(&known),
        right: requirement.right.settled(&known),
        upper: requirement.upper.as_ref().map(|upper| upper.settled(&known)),
        ..requirement.clone()
    }
}

fn add(case: &mut Case, reader: Reader<'_>) {
    match reader.entry.row.kind {
        EntryKind::Case => add_case(case, reader),
        EntryKind::Fluid => case.fluids.push(fluid(reader)),
        EntryKind::Solid => case.solids.push(Solid {
            name: reader.own_name(),
            conductivity: reader.first("conductivity"),
            density: reader.first("density"),
            heat_capacity: reader.first("heat-capacity"),
            emissivity: reader.first("emissivity"),
        }),
        EntryKind::Region => case.regions.push(region(reader)),
        EntryKind::Boundary => case.boundaries.push(boundary(reader)),
        EntryKind::Initial => case.initials.push(Initial {
            region: reader.head_name(0),
            place: reader.entry.head,
            temperature: reader.first("temperature"),
            stratified: reader.value("stratified", 0).zip(reader.value("stratified", 1)),
            at_rest: reader.statement("at").is_some(),
            velocity: match reader.slot("velocity", 0) {
                Some(Bound::Vector(parts)) => Some(parts.each_ref().map(|part| reader.value_of(part))),
                _ => None,
            },
        }),
        EntryKind::Source => case.sources.push(Source {
            name: reader.own_name(),
            region: reader.head_name(1),
            releases: reader.first("releases"),
            within: reader.first("within"),
        }),
        EntryKind::Mesh => case.meshes.push(Mesh {
            region: reader.head_name(0),
            place: reader.entry.head,
            cells: (0..3).filter_map(|slot| reader.value("cells", slot)).collect(),
            first_cell: reader.first("first-cell"),
            growth: reader.first("growth"),
            graded: reader.choice("spacing").map(|(choice, place)| Stated { value: choice == "graded", place }),
            spacing: reader.first("spacing"),
        }),
        EntryKind::Run if case.run.is_none() => {
            case.run = Some(Run {
                place: reader.entry.head,
                steady: reader.statement("steady").map(|statement| statement.place),
                transient: reader.value("transient", 0).zip(reader.value("transient", 1)),
                explicit: reader
                    .choice("time-stepping")
                    .map(|(choice, place)| Stated { value: choice == "explicit", place }),
            });
        }
        EntryKind::Waive => {
            if let Some(check) = reader.head_name(0) {
                case.waivers.push(Waiver {
                    place: reader.entry.head,
                    check,
                    of: reader.head_name(1),
                    because: reader.text("because", 0),
                    until: reader.text("because", 1),
                });
            }
        }
        EntryKind::Practice => add_practice(&mut case.practice, reader),
        EntryKind::Include
        | EntryKind::Given
        | EntryKind::Vary
        | EntryKind::Substance
        | EntryKind::Run
        | EntryKind::Require => {}
    }
}

fn add_case(case: &mut Case, reader: Reader<'_>) {
    case.place = reader.entry.head;
    case.title = reader.head_name(0);
    case.purpose = reader.text("purpose", 0);
    case.prepared_by = reader.text("prepared", 0);
    case.revision = reader.text("revision", 0);
    case.ambient_temperature = reader.value("ambient", 0);
    case.ambient_pressure = reader.value("ambient", 1);
    if let Some(statement) = reader.statement("gravity") {
        let is_none = matches!(reader.slot("gravity", 0), Some(Bound::Choice("none", _)));
        let value = reader.value("gravity", 0);
        case.gravity = Gravity {
            place: Some(statement.place),
            magnitude: if is_none { 0.0 } else { value.as_ref().map_or(f64::NAN, |value| value.si) },
            value,
            direction: reader.direction("gravity", 1).unwrap_or([0.0, 0.0, -1.0]),
        };
    }
}

fn fluid(reader: Reader<'_>) -> Fluid {
    Fluid {
        name: reader.own_name(),
        substance: reader.name("substance"),
        fraction: reader.value("substance", 1),
        reference_temperature: reader.value("reference", 0),
        reference_pressure: reader.value("reference", 1),
        density_law: reader.choice("density-law").map(|(choice, place)| Stated {
            value: match choice {
                "boussinesq" => DensityLaw::Boussinesq,
                "ideal-gas" => DensityLaw::IdealGas,
                "variable" => DensityLaw::Variable,
                _ => DensityLaw::Constant,
            },
            place,
        }),
        density: reader.first("density"),
        expansion: reader.first("expansion"),
        viscosity: reader.first("viscosity"),
        kinematic_viscosity: reader.first("kinematic-viscosity"),
        conductivity: reader.first("conductivity"),
        diffusivity: reader.first("diffusivity"),
        heat_capacity: reader.first("heat-capacity"),
        prandtl: reader.first("prandtl"),
    }
}

fn region(reader: Reader<'_>) -> Region {
    let shape = shape(reader);
    let surrounded = reader.name("surrounded");
    let is_plate = matches!(shape, Some((Shape::Plate { .. }, _)));
    Region {
        name: reader.own_name(),
        shape_place: shape.as_ref().map(|(_, place)| *place),
        is_surrounded: surrounded.is_some() || is_plate,
        shape: shape.map(|(shape, _)| shape),
        axis: axis(reader),
        filled_with: reader.name("filled").or(surrounded),
        made_of: reader.name("made"),
        length: reader.first("length"),
        tilt: reader.first("tilt"),
        flow: reader.choice("flow").map(|(choice, place)| Stated {
            value: match (choice, reader.slot("flow", 1)) {
                ("laminar", _) => Flow::Laminar,
                (_, Some(Bound::Choice(model, _))) => Flow::Turbulent(Some(model)),
                _ => Flow::Turbulent(None),
            },
            place,
        }),
        arrangement: reader.choice("arrangement").map(|(value, place)| Stated { value, place }),
        radiation: reader.choice("radiation").map(|(choice, place)| Stated {
            value: match choice {
                "none" => Radiation::None,
                "participating" => Radiation::Participating,
                _ => Radiation::SurfaceToSurface,
            },
            place,
        }),
        viscous_heating: reader.switch("viscous-heating"),
        pressure_work: reader.switch("pressure-work"),
    }
}

fn axis(reader: Reader<'_>) -> Option<Stated<Axis>> {
    let (word, slot) = if reader.statement("cylinder").is_some() { ("cylinder", 2) } else { ("annulus", 3) };
    match reader.slot(word, slot)? {
        Bound::Choice(choice, place) => Some(Stated {
            value: match *choice {
                "x" => Axis::X,
                "y" => Axis::Y,
                _ => Axis::Z,
            },
            place: *place,
        }),
        _ => None,
    }
}

fn shape(reader: Reader<'_>) -> Option<(Shape, Place)> {
    const SHAPES: [&str; 7] = ["box", "cylinder", "sphere", "annulus", "gap", "plate", "channel"];
    let statement = reader.entry.statements.iter().find(|statement| SHAPES.contains(&statement.row.word))?;
    let word = statement.row.word;
    let length = |slot| reader.value(word, slot);
    let shape = match word {
        // Two lengths make a plane case: they run along x and z.
        "box" => match length(2) {
            Some(z) => Shape::Box { x: length(0)?, y: length(1), z },
            None => Shape::Box { x: length(0)?, y: None, z: length(1)? },
        },
        "cylinder" => Shape::Cylinder { diameter: length(0)?, height: length(1)? },
        "sphere" => Shape::Sphere { diameter: length(0)? },
        "annulus" => Shape::Annulus { inner: length(0)?, outer: length(1)?, length: length(2) },
        "gap" => Shape::Gap { spacing: length(0)?, height: length(1)?, depth: length(2) },
        "plate" => Shape::Plate { height: length(0)?, depth: length(1) },
        _ => Shape::Channel { spacing: length(0)?, height: length(1)?, depth: length(2) },
    };
    Some((shape, statement.place))
}

fn side(word: &str) -> Side {
    match word {
        "west" => Side::West,
        "east" => Side::East,
        "south" => Side::South,
        "north" => Side::North,
        "bottom" => Side::Bottom,
        "top" => Side::Top,
        "around" => Side::Around,
        "inner" => Side::Inner,
        "outer" => Side::Outer,
        "face" => Side::Face,
        "far" => Side::Far,
        _ => Side::Remaining,
    }
}

fn boundary(reader: Reader<'_>) -> Boundary {
    let mut kinds = Vec::new();
    let mut heat = Vec::new();
    for statement in &reader.entry.statements {
        let place = statement.place;
        let bound = |slot: usize| statement.slots.get(slot).and_then(|list| list.first());
        let value = |slot| match bound(slot) {
            Some(Bound::Value(bound)) => Some(reader.value_of(bound)),
            _ => None,
        };
        let name = || match bound(0) {
            Some(Bound::Name(name)) => Some(name.clone()),
            _ => None,
        };
        match statement.row.word {
            "wall" => {
                kinds.push((BoundaryKind::Wall { slip: matches!(bound(0), Some(Bound::Choice("slip", _))) }, place))
            }
            "inlet" => kinds.push((BoundaryKind::Inlet, place)),
            "outlet" => kinds.push((BoundaryKind::Outlet, place)),
            "opening" => kinds.push((BoundaryKind::Opening, place)),
            "symmetry" => kinds.push((BoundaryKind::Symmetry, place)),
            "repeats" => kinds.extend(name().map(|name| (BoundaryKind::Repeats(name), place))),
            "meets" => kinds.extend(name().map(|name| (BoundaryKind::Meets(name), place))),
            "held" => heat.extend(value(0).map(|value| (Heat::HeldAt(value), place))),
            "heated" => heat.extend(value(0).map(|value| (Heat::HeatedBy(value), place))),
            "cooled" => heat.extend(value(0).map(|value| (Heat::CooledBy(value), place))),
            "insulated" => heat.push((Heat::Insulated, place)),
            "exchanges" => heat.extend(
                value(0)
                    .zip(value(1))
                    .map(|(coefficient, temperature)| (Heat::Exchanges { coefficient, temperature }, place)),
            ),
            "radiates" => heat.extend(value(0).map(|value| (Heat::RadiatesTo(value), place))),
            _ => {}
        }
    }
    let sides = reader.statement("side").map(|statement| {
        let chosen = statement.slots.iter().flatten().filter_map(|bound| match bound {
            Bound::Choice(word, place) => Some(Stated { value: side(word), place: *place }),
            _ => None,
        });
        chosen.collect()
    });
    Boundary {
        name: reader.own_name(),
        region: reader.head_name(1),
        sides: sides.unwrap_or_default(),
        patch: reader.value("patch", 0).zip(reader.value("patch", 1)),
        area: reader.first("area"),
        kinds,
        heat,
        emissivity: reader.first("emissivity"),
        moves: reader.first("moves").map(|speed| (speed, reader.direction("moves", 1))),
        enters: reader.first("enters"),
        enters_along: reader.direction("enters", 1),
        carries: reader.first("carries"),
        gauge: reader.first("gauge"),
        backflow: reader.first("backflow"),
    }
}

fn add_practice(practice: &mut Practice, reader: Reader<'_>) {
    for statement in &reader.entry.statements {
        let bound = |slot: usize| statement.slots.get(slot).and_then(|list| list.first());
        match (statement.row.word, bound(0), bound(1)) {
            ("limit", Some(Bound::Text(check)), Some(Bound::Value(limit))) => {
                practice.limits.push((check.clone(), reader.value_of(limit)));
            }
            ("level", Some(Bound::Text(check)), Some(Bound::Level(level))) => {
                practice.levels.push((check.clone(), *level))
            }
            ("gate", Some(Bound::Level(level)), _) => practice.gate = *level,
            _ => {}
        }
    }
}
