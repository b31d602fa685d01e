//! The case: what a deck says, every value in SI with the place it came from.
//!
//! A value that could not be worked out (a finding says why) is not a number, `NaN`; whatever is computed from it
//! is `NaN` too, and no check speaks of it.

use super::compiled::Compiled;
use super::index::Index;
use crate::quantity::Dimension;
use crate::syntax::tree::{Comparison, Expression};
use crate::syntax::{FileId, Level, Place};
use std::sync::OnceLock;

/// A value in SI and where it stands in the deck.
#[derive(Clone, Debug, PartialEq)]
pub struct Value {
    /// Magnitude in the SI unit of `dimension`; temperatures in kelvin, pressures absolute. `NaN` if unknown.
    pub si: f64,
    /// Its dimension, as found from the units, which tells a power from a flux.
    pub dimension: Dimension,
    /// Where it came from.
    pub origin: Origin,
}

/// Where a value came from.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Origin {
    /// The expression in the statement.
    pub place: Place,
    /// The unit as written there or, where a lone name stands there, in that name's definition; empty where an
    /// expression has no unit of its own.
    pub unit: Box<str>,
    /// The quantity as a literal, where the value is one or is a lone name for one: what a fix may replace.
    pub literal: Option<Place>,
}

/// A word of the deck and where it stands.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Name {
    /// The word.
    pub text: Box<str>,
    /// Where.
    pub place: Place,
}

/// One of a fixed set of things that a statement chooses, and where it does.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Stated<T> {
    /// What was chosen.
    pub value: T,
    /// The statement.
    pub place: Place,
}

/// All that a deck says.
#[derive(Clone, Debug, Default)]
pub struct Case {
    /// The place of `case`; the start of the deck where there is none.
    pub place: Place,
    /// Its title.
    pub title: Option<Name>,
    /// What it is for.
    pub purpose: Option<Name>,
    /// Who wrote it.
    pub prepared_by: Option<Name>,
    /// Its revision.
    pub revision: Option<Name>,
    /// Gravity.
    pub gravity: Gravity,
    /// Ambient temperature, K.
    pub ambient_temperature: Option<Value>,
    /// Ambient pressure, Pa.
    pub ambient_pressure: Option<Value>,
    /// The values of `given`, in the deck's order.
    pub given: Vec<Given>,
    /// Substances that the deck defines.
    pub substances: Vec<Substance>,
    /// Fluids.
    pub fluids: Vec<Fluid>,
    /// Solids.
    pub solids: Vec<Solid>,
    /// Regions.
    pub regions: Vec<Region>,
    /// Boundaries.
    pub boundaries: Vec<Boundary>,
    /// Initial states.
    pub initials: Vec<Initial>,
    /// Heat sources.
    pub sources: Vec<Source>,
    /// Meshes.
    pub meshes: Vec<Mesh>,
    /// The run.
    pub run: Option<Run>,
    /// What must hold.
    pub requirements: Vec<Requirement>,
    /// Findings set aside.
    pub waivers: Vec<Waiver>,
    /// House rules in force.
    pub practice: Practice,
    /// Where names are; made when first asked for.
    pub index: OnceLock<Index>,
}

/// A defined name and its value.
#[derive(Clone, Debug)]
pub struct Given {
    /// The name.
    pub name: Name,
    /// Its value.
    pub value: Value,
    /// Its description; empty if none.
    pub description: Box<str>,
}

/// Gravity.
#[derive(Clone, Debug, PartialEq)]
pub struct Gravity {
    /// The statement, if there is one.
    pub place: Option<Place>,
    /// Magnitude, m/s²; 0 under `gravity none`, standard gravity where nothing is said.
    pub magnitude: f64,
    /// The magnitude as written.
    pub value: Option<Value>,
    /// Unit vector along which it acts.
    pub direction: [f64; 3],
}

impl Default for Gravity {
    fn default() -> Self {
        Gravity { place: None, magnitude: 9.806_65, value: None, direction: [0.0, 0.0, -1.0] }
    }
}

/// How density depends on temperature in the solver.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum DensityLaw {
    /// Linear, and only in the buoyancy term.
    Boussinesq,
    /// The ideal-gas law.
    IdealGas,
    /// The substance's own function.
    Variable,
    /// Constant everywhere.
    Constant,
}

/// A fluid as the solver is told of it.
#[derive(Clone, Debug)]
pub struct Fluid {
    /// Its name.
    pub name: Name,
    /// The substance it is.
    pub substance: Option<Name>,
    /// Mass fraction of the dissolved substance.
    pub fraction: Option<Value>,
    /// Reference temperature T0, K.
    pub reference_temperature: Option<Value>,
    /// Reference pressure, Pa.
    pub reference_pressure: Option<Value>,
    /// Density law.
    pub density_law: Option<Stated<DensityLaw>>,
    /// ρ, kg/m³.
    pub density: Option<Value>,
    /// α, 1/K.
    pub expansion: Option<Value>,
    /// μ, Pa s.
    pub viscosity: Option<Value>,
    /// ν, m²/s.
    pub kinematic_viscosity: Option<Value>,
    /// k, W/(m K).
    pub conductivity: Option<Value>,
    /// a, m²/s.
    pub diffusivity: Option<Value>,
    /// cp, J/(kg K).
    pub heat_capacity: Option<Value>,
    /// Pr.
    pub prandtl: Option<Value>,
}

/// A solid.
#[derive(Clone, Debug)]
pub struct Solid {
    /// Its name.
    pub name: Name,
    /// k, W/(m K).
    pub conductivity: Option<Value>,
    /// ρ, kg/m³.
    pub density: Option<Value>,
    /// c, J/(kg K).
    pub heat_capacity: Option<Value>,
    /// Emissivity.
    pub emissivity: Option<Value>,
}

/// A shape; lengths in m.
#[derive(Clone, Debug)]
pub enum Shape {
    /// Lengths along x, y, z; without y a plane case.
    Box {
        /// Along x.
        x: Value,
        /// Along y.
        y: Option<Value>,
        /// Along z.
        z: Value,
    },
    /// A cylinder.
    Cylinder {
        /// Diameter.
        diameter: Value,
        /// Length along the axis.
        height: Value,
    },
    /// A sphere.
    Sphere {
        /// Diameter.
        diameter: Value,
    },
    /// Between coaxial cylinders.
    Annulus {
        /// Inner diameter.
        inner: Value,
        /// Outer diameter.
        outer: Value,
        /// Length along the axis; without it a plane case.
        length: Option<Value>,
    },
    /// Between two plates, closed around.
    Gap {
        /// Distance of the plates.
        spacing: Value,
        /// Height of the plates.
        height: Value,
        /// Width of the plates.
        depth: Option<Value>,
    },
    /// One plate in a wide fluid.
    Plate {
        /// Length along the flow.
        height: Value,
        /// Width.
        depth: Option<Value>,
    },
    /// Between two plates, open below and above.
    Channel {
        /// Distance of the plates.
        spacing: Value,
        /// Height of the plates.
        height: Value,
        /// Width of the plates.
        depth: Option<Value>,
    },
}

/// A direction of the coordinate system.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Axis {
    /// x
    X,
    /// y
    Y,
    /// z
    Z,
}

/// How turbulence is treated.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Flow {
    /// No model.
    Laminar,
    /// A model, by its word in the vocabulary; `None` where none is named.
    Turbulent(Option<&'static str>),
}

/// How radiation is treated.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Radiation {
    /// Left out.
    None,
    /// Between surfaces.
    SurfaceToSurface,
    /// The fluid takes part.
    Participating,
}

/// A space.
#[derive(Clone, Debug)]
pub struct Region {
    /// Its name.
    pub name: Name,
    /// Its shape and the statement that gives it.
    pub shape: Option<Shape>,
    /// The statement of the shape.
    pub shape_place: Option<Place>,
    /// Axis of a cylinder or annulus.
    pub axis: Option<Stated<Axis>>,
    /// The fluid, by name.
    pub filled_with: Option<Name>,
    /// The solid, by name.
    pub made_of: Option<Name>,
    /// Whether the fluid lies around the shape, not in it (`surrounded by`, or a plate).
    pub is_surrounded: bool,
    /// Characteristic length as stated, m.
    pub length: Option<Value>,
    /// Tilt, rad.
    pub tilt: Option<Value>,
    /// Laminar or turbulent.
    pub flow: Option<Stated<Flow>>,
    /// The arrangement as stated, by its word.
    pub arrangement: Option<Stated<&'static str>>,
    /// Radiation.
    pub radiation: Option<Stated<Radiation>>,
    /// Viscous heating computed.
    pub viscous_heating: Option<Stated<bool>>,
    /// Pressure work computed.
    pub pressure_work: Option<Stated<bool>>,
}

/// A side of a region.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Side {
    /// Low x.
    West,
    /// High x.
    East,
    /// Low y.
    South,
    /// High y.
    North,
    /// Low z.
    Bottom,
    /// High z.
    Top,
    /// Curved face.
    Around,
    /// Inner face of an annulus.
    Inner,
    /// Outer face of an annulus.
    Outer,
    /// Face of a plate or body.
    Face,
    /// Far from a plate or body.
    Far,
    /// All that no other boundary names.
    Remaining,
}

/// What a boundary is.
#[derive(Clone, Debug, PartialEq)]
pub enum BoundaryKind {
    /// A wall; whether it slips.
    Wall {
        /// No friction.
        slip: bool,
    },
    /// Fluid enters.
    Inlet,
    /// Fluid leaves.
    Outlet,
    /// Either.
    Opening,
    /// A mirror.
    Symmetry,
    /// Pairs with another boundary.
    Repeats(Name),
    /// Shared with another region.
    Meets(Name),
}

/// A heat condition.
#[derive(Clone, Debug)]
pub enum Heat {
    /// Temperature given, K.
    HeldAt(Value),
    /// Flux (W/m²) or power (W) into the fluid, told apart by the value's dimension.
    HeatedBy(Value),
    /// Flux or power out of the fluid.
    CooledBy(Value),
    /// None passes.
    Insulated,
    /// Through a coefficient, W/(m² K), to a temperature, K.
    Exchanges {
        /// Coefficient.
        coefficient: Value,
        /// Temperature outside.
        temperature: Value,
    },
    /// Radiates to surroundings at a temperature, K.
    RadiatesTo(Value),
}

/// A part of a region's surface.
#[derive(Clone, Debug)]
pub struct Boundary {
    /// Its name.
    pub name: Name,
    /// The region, by name.
    pub region: Option<Name>,
    /// Sides that it covers.
    pub sides: Vec<Stated<Side>>,
    /// A rectangle on the side: width, height in m.
    pub patch: Option<(Value, Value)>,
    /// Area, m².
    pub area: Option<Value>,
    /// What it is; more than one is a finding.
    pub kinds: Vec<(BoundaryKind, Place)>,
    /// Heat conditions; whether they go together is a check's matter.
    pub heat: Vec<(Heat, Place)>,
    /// Emissivity.
    pub emissivity: Option<Value>,
    /// Speed of a sliding wall, m/s, and its direction.
    pub moves: Option<(Value, Option<[f64; 3]>)>,
    /// Speed, volume flow or mass flow in, told apart by dimension.
    pub enters: Option<Value>,
    /// Direction in which it enters; `None` is straight in.
    pub enters_along: Option<[f64; 3]>,
    /// Temperature of what enters, K.
    pub carries: Option<Value>,
    /// Pressure above ambient, Pa.
    pub gauge: Option<Value>,
    /// Temperature of what comes back in, K.
    pub backflow: Option<Value>,
}

/// The state at the start.
#[derive(Clone, Debug)]
pub struct Initial {
    /// The region, by name.
    pub region: Option<Name>,
    /// The place of the entry's head.
    pub place: Place,
    /// Uniform temperature, K.
    pub temperature: Option<Value>,
    /// Linear in height: bottom, top, K.
    pub stratified: Option<(Value, Value)>,
    /// `at rest`.
    pub at_rest: bool,
    /// Velocity, m/s.
    pub velocity: Option<[Value; 3]>,
}

/// Heat released inside.
#[derive(Clone, Debug)]
pub struct Source {
    /// Its name.
    pub name: Name,
    /// The region, by name.
    pub region: Option<Name>,
    /// Power (W) or power density (W/m³), told apart by dimension.
    pub releases: Option<Value>,
    /// Volume, m³.
    pub within: Option<Value>,
}

/// Cells.
#[derive(Clone, Debug)]
pub struct Mesh {
    /// The region, by name.
    pub region: Option<Name>,
    /// The place of the entry's head.
    pub place: Place,
    /// Numbers of cells as written: x, y, z; or x, z in a plane case.
    pub cells: Vec<Value>,
    /// Height of the first cell, m.
    pub first_cell: Option<Value>,
    /// Growth.
    pub growth: Option<Value>,
    /// Whether the cells are graded.
    pub graded: Option<Stated<bool>>,
    /// Size of cells that are all alike, m.
    pub spacing: Option<Value>,
}

/// How the run goes in time.
#[derive(Clone, Debug)]
pub struct Run {
    /// The place of the entry's head.
    pub place: Place,
    /// `steady`.
    pub steady: Option<Place>,
    /// `transient`: duration and step, s.
    pub transient: Option<(Value, Value)>,
    /// Explicit steps.
    pub explicit: Option<Stated<bool>>,
}

/// What must hold.
#[derive(Clone, Debug)]
pub struct Requirement {
    /// All of it.
    pub place: Place,
    /// As written.
    pub text: Box<str>,
    /// The file that it stands in, for the spans of its expressions.
    pub file: FileId,
    /// The offset of its entry in the file: the spans of its expressions count from there.
    pub offset: usize,
    /// Left side; of the deck's names their values are put in, so that only numbers of regions are left open.
    pub left: Compiled,
    /// Comparison.
    pub comparison: Comparison,
    /// Right side; for `within` the lower bound.
    pub right: Compiled,
    /// The upper bound of `within`.
    pub upper: Option<Compiled>,
    /// Dimension of both sides.
    pub dimension: Dimension,
    /// Whether both sides are differences of temperatures, not points.
    pub is_difference: bool,
    /// The left side as syntax.
    pub expression: Expression,
}

/// A finding set aside.
#[derive(Clone, Debug)]
pub struct Waiver {
    /// The place of the entry's head.
    pub place: Place,
    /// Which check.
    pub check: Name,
    /// Of what; without it, of everything.
    pub of: Option<Name>,
    /// Why.
    pub because: Option<Name>,
    /// Last day, `2027-03-01`.
    pub until: Option<Name>,
}

/// House rules.
#[derive(Clone, Debug, Default)]
pub struct Practice {
    /// Limits by check.
    pub limits: Vec<(Name, Value)>,
    /// Levels by check; `None` is off.
    pub levels: Vec<(Name, Option<Level>)>,
    /// The gate.
    pub gate: Option<Level>,
}

/// Gas or liquid.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum State {
    /// Gas.
    Gas,
    /// Liquid.
    Liquid,
}

/// Property data of a substance.
#[derive(Clone, Debug)]
pub struct Substance {
    /// Its name.
    pub name: Name,
    /// The comment lines above it.
    pub description: Box<str>,
    /// Where the data are from.
    pub source: Box<str>,
    /// How far they are from their reference.
    pub deviation: Box<str>,
    /// Gas or liquid.
    pub state: Option<State>,
    /// Lowest and highest temperature, K.
    pub valid: Option<(f64, f64)>,
    /// Least and most mass fraction.
    pub fraction: Option<(f64, f64)>,
    /// The definitions inside the entry, in order; property expressions refer to them by index.
    pub locals: Vec<Compiled>,
    /// ρ, kg/m³.
    pub density: Option<Property>,
    /// cp, J/(kg K).
    pub heat_capacity: Option<Property>,
    /// μ, Pa s.
    pub viscosity: Option<Property>,
    /// k, W/(m K).
    pub conductivity: Option<Property>,
    /// α, 1/K; without it, from density.
    pub expansion: Option<Property>,
    /// κ, 1/Pa; without it, from density.
    pub compressibility: Option<Property>,
    /// Boiling temperature, K.
    pub boils: Option<Property>,
    /// Freezing temperature, K.
    pub freezes: Option<Property>,
}

/// How a property is given.
#[derive(Clone, Debug)]
pub enum Property {
    /// An expression in T, p, x and the substance's definitions.
    Expression(Compiled),
    /// A form that is code, by its word in the vocabulary.
    Code(&'static str),
    /// A table: temperatures (rising, K) and values.
    Table(Vec<(f64, f64)>),
}

impl Value {
    /// Whether it could be worked out.
    pub fn is_known(&self) -> bool {
        self.si.is_finite()
    }
}

impl Case {
    /// The region of a name.
    pub fn region(&self, name: &str) -> Option<&Region> {
        self.regions.get(self.index().region(self, name)?)
    }

    /// The fluid of a name.
    pub fn fluid(&self, name: &str) -> Option<&Fluid> {
        self.fluids.get(self.index().fluid(self, name)?)
    }

    /// The fluid in or around a region.
    pub fn fluid_of(&self, region: &Region) -> Option<&Fluid> {
        self.fluid(&region.filled_with.as_ref()?.text)
    }

    /// The boundaries of a region.
    pub fn boundaries_of<'a>(&'a self, region: &'a Region) -> impl Iterator<Item = &'a Boundary> + 'a {
        let numbers = self.index().boundaries_of(self, &region.name.text);
        numbers.iter().filter_map(|number| self.boundaries.get(*number)).filter(|boundary| boundary.region.is_some())
    }

    fn index(&self) -> &Index {
        self.index.get_or_init(|| Index::of(self))
    }
}
