//! The statements.

use super::choices as offer;
use super::rows::{EntryKind as In, NameOf, Need, Slot, StatementRow, Takes, Temperature, Times};
use crate::quantity::Dimension;

/// Length, m.
pub const LENGTH: Dimension = Dimension::of(1, 0, 0, 0, 0, 0, 0);
/// Area, m².
pub const AREA: Dimension = Dimension::of(2, 0, 0, 0, 0, 0, 0);
/// Volume, m³.
pub const VOLUME: Dimension = Dimension::of(3, 0, 0, 0, 0, 0, 0);
/// Time, s.
pub const TIME: Dimension = Dimension::of(0, 0, 1, 0, 0, 0, 0);
/// Temperature, K.
pub const TEMPERATURE: Dimension = Dimension::of(0, 0, 0, 0, 1, 0, 0);
/// Speed, m/s.
pub const SPEED: Dimension = Dimension::of(1, 0, -1, 0, 0, 0, 0);
/// Acceleration, m/s².
pub const ACCELERATION: Dimension = Dimension::of(1, 0, -2, 0, 0, 0, 0);
/// Pressure, Pa.
pub const PRESSURE: Dimension = Dimension::of(-1, 1, -2, 0, 0, 0, 0);
/// Density, kg/m³.
pub const DENSITY: Dimension = Dimension::of(-3, 1, 0, 0, 0, 0, 0);
/// Specific heat capacity, J/(kg K).
pub const HEAT_CAPACITY: Dimension = Dimension::of(2, 0, -2, 0, -1, 0, 0);
/// Dynamic viscosity, Pa s.
pub const VISCOSITY: Dimension = Dimension::of(-1, 1, -1, 0, 0, 0, 0);
/// Kinematic viscosity and thermal diffusivity, m²/s.
pub const DIFFUSIVITY: Dimension = Dimension::of(2, 0, -1, 0, 0, 0, 0);
/// Thermal conductivity, W/(m K).
pub const CONDUCTIVITY: Dimension = Dimension::of(1, 1, -3, 0, -1, 0, 0);
/// Thermal expansion, 1/K.
pub const EXPANSION: Dimension = Dimension::of(0, 0, 0, 0, -1, 0, 0);
/// Power, W.
pub const POWER: Dimension = Dimension::of(2, 1, -3, 0, 0, 0, 0);
/// Heat flux, W/m².
pub const HEAT_FLUX: Dimension = Dimension::of(0, 1, -3, 0, 0, 0, 0);
/// Power density, W/m³.
pub const POWER_DENSITY: Dimension = Dimension::of(-1, 1, -3, 0, 0, 0, 0);
/// Heat transfer coefficient, W/(m² K).
pub const HEAT_TRANSFER: Dimension = Dimension::of(0, 1, -3, 0, -1, 0, 0);
/// Volume flow rate, m³/s.
pub const VOLUME_FLOW: Dimension = Dimension::of(3, 0, -1, 0, 0, 0, 0);
/// Mass flow rate, kg/s.
pub const MASS_FLOW: Dimension = Dimension::of(0, 1, -1, 0, 0, 0, 0);
/// A pure number.
pub const NUMBER: Dimension = Dimension::NONE;

const fn of(dimensions: &'static [Dimension]) -> Takes {
    Takes::Quantity(dimensions, Temperature::Point)
}
const fn slot(link: &'static str, name: &'static str, takes: Takes, need: Need) -> Slot {
    Slot { link, name, takes, need }
}
const fn row(
    word: &'static str,
    entries: &'static [In],
    slots: &'static [Slot],
    times: Times,
    description: &'static str,
    example: &'static str,
) -> StatementRow {
    StatementRow { word, entries, slots, times, description, example }
}

const A_LENGTH: Takes = of(&[LENGTH]);
const A_TEMPERATURE: Takes = of(&[TEMPERATURE]);
const REQUIRED: Need = Need::Required;
const OPTIONAL: Need = Need::Optional;
const ONCE: Times = Times::AtMostOnce;

/// Every statement, by entry.
pub const STATEMENTS: &[StatementRow] = &[
    // case
    row(
        "gravity",
        &[In::Case],
        &[
            slot("", "magnitude", Takes::ChoiceOrQuantity(offer::NO_GRAVITY, ACCELERATION), REQUIRED),
            slot("along", "direction", Takes::Direction, OPTIONAL),
        ],
        ONCE,
        "The acceleration of gravity and its direction, which is -z where none is given.",
        "gravity 9.81 m/s^2 along -z",
    ),
    row(
        "purpose",
        &[In::Case],
        &[slot("", "purpose", Takes::Text, REQUIRED)],
        ONCE,
        "What the case is to show.",
        "purpose \"Does the cabinet need a fan?\"",
    ),
    row(
        "prepared",
        &[In::Case],
        &[slot("by", "author", Takes::Text, REQUIRED)],
        ONCE,
        "Who wrote the case.",
        "prepared by \"M. Okafor\"",
    ),
    row(
        "revision",
        &[In::Case],
        &[slot("", "revision", Takes::Text, REQUIRED)],
        ONCE,
        "Which state of the case this is.",
        "revision \"B\"",
    ),
    row(
        "ambient",
        &[In::Case],
        &[slot("", "temperature", A_TEMPERATURE, OPTIONAL), slot("at", "pressure", of(&[PRESSURE]), OPTIONAL)],
        ONCE,
        "The surroundings: temperature, and the pressure above which gauge pressures count.",
        "ambient 8 degC at 0.79 bar",
    ),
    // vary
    row(
        "together",
        &[In::Vary],
        &[slot("", "names", Takes::Name(NameOf::Varied), Need::OneOrMore)],
        Times::Any,
        "Pairs the values of these names, first with first, instead of crossing them.",
        "together T_hot, T_cold",
    ),
    // substance
    row(
        "source",
        &[In::Substance],
        &[slot("", "source", Takes::Text, REQUIRED)],
        ONCE,
        "Where the data are from.",
        "source \"Data sheet 12, revision C\"",
    ),
    row(
        "deviation",
        &[In::Substance],
        &[slot("", "deviation", Takes::Text, REQUIRED)],
        ONCE,
        "How far the data are from their reference, and where.",
        "deviation \"density within 0.1 %\"",
    ),
    row(
        "state",
        &[In::Substance],
        &[slot("", "state", Takes::Choice(offer::STATES), REQUIRED)],
        ONCE,
        "Whether it is a gas or a liquid.",
        "state liquid",
    ),
    row(
        "valid",
        &[In::Substance],
        &[slot("from", "lowest", A_TEMPERATURE, REQUIRED), slot("to", "highest", A_TEMPERATURE, REQUIRED)],
        ONCE,
        "The temperatures over which the data hold.",
        "valid from 0 degC to 150 degC",
    ),
    row(
        "fraction",
        &[In::Substance],
        &[slot("from", "least", of(&[NUMBER]), REQUIRED), slot("to", "most", of(&[NUMBER]), REQUIRED)],
        ONCE,
        "The mass fractions `x` of the dissolved substance over which the data hold.",
        "fraction from 0 % to 60 %",
    ),
    row(
        "density",
        &[In::Substance],
        &[
            slot("", "density", Takes::PropertyForm(DENSITY), OPTIONAL),
            slot("by", "form", Takes::Choice(offer::PROPERTY_FORMS), OPTIONAL),
        ],
        ONCE,
        "Density.",
        "density 998 kg/m^3",
    ),
    row(
        "heat-capacity",
        &[In::Substance],
        &[
            slot("", "heat-capacity", Takes::PropertyForm(HEAT_CAPACITY), OPTIONAL),
            slot("by", "form", Takes::Choice(offer::PROPERTY_FORMS), OPTIONAL),
        ],
        ONCE,
        "Specific heat capacity at constant pressure.",
        "heat-capacity 4.18 kJ/kg/K",
    ),
    row(
        "viscosity",
        &[In::Substance],
        &[
            slot("", "viscosity", Takes::PropertyForm(VISCOSITY), OPTIONAL),
            slot("by", "form", Takes::Choice(offer::PROPERTY_FORMS), OPTIONAL),
        ],
        ONCE,
        "Dynamic viscosity.",
        "viscosity 1.458e-6 Pa.s/K^0.5 * T^1.5 / (T + 110.4 K)",
    ),
    row(
        "conductivity",
        &[In::Substance],
        &[
            slot("", "conductivity", Takes::PropertyForm(CONDUCTIVITY), OPTIONAL),
            slot("by", "form", Takes::Choice(offer::PROPERTY_FORMS), OPTIONAL),
        ],
        ONCE,
        "Thermal conductivity.",
        "conductivity 0.6 W/m/K",
    ),
    row(
        "expansion",
        &[In::Substance],
        &[slot("", "expansion", Takes::PropertyForm(EXPANSION), OPTIONAL)],
        ONCE,
        "Thermal expansion; without it, the slope of the density.",
        "expansion 2.1e-4 1/K",
    ),
    row(
        "compressibility",
        &[In::Substance],
        &[slot("", "compressibility", Takes::PropertyForm(Dimension::of(1, -1, 2, 0, 0, 0, 0)), REQUIRED)],
        ONCE,
        "Isothermal compressibility; without it, the slope of the density over pressure.",
        "compressibility 4.6e-10 1/Pa",
    ),
    row(
        "boils",
        &[In::Substance],
        &[
            slot("at", "temperature", Takes::PropertyForm(TEMPERATURE), OPTIONAL),
            slot("by", "form", Takes::Choice(offer::PROPERTY_FORMS), OPTIONAL),
        ],
        ONCE,
        "The boiling temperature, which may depend on `p`.",
        "boils at 351.4 K",
    ),
    row(
        "freezes",
        &[In::Substance],
        &[
            slot("at", "temperature", Takes::PropertyForm(TEMPERATURE), OPTIONAL),
            slot("by", "form", Takes::Choice(offer::PROPERTY_FORMS), OPTIONAL),
        ],
        ONCE,
        "The freezing temperature, which may depend on `p` and `x`.",
        "freezes at 0 degC",
    ),
    row(
        "table",
        &[In::Substance],
        &[slot("", "columns", Takes::Choice(offer::COLUMNS), Need::OneOrMore)],
        ONCE,
        "The columns of a table over temperature, whose rows follow.",
        "table temperature, density, viscosity",
    ),
    // fluid
    row(
        "substance",
        &[In::Fluid],
        &[
            slot("", "substance", Takes::Name(NameOf::Substance), REQUIRED),
            slot("at", "fraction", of(&[NUMBER]), OPTIONAL),
        ],
        ONCE,
        "What the fluid is: a substance of the library or of the deck; for a solution, its mass fraction.",
        "substance ethylene_glycol at 30 %",
    ),
    row(
        "reference",
        &[In::Fluid],
        &[slot("", "temperature", A_TEMPERATURE, REQUIRED), slot("at", "pressure", of(&[PRESSURE]), OPTIONAL)],
        ONCE,
        "The state at which constant properties and the density law are taken.",
        "reference 25 degC at 0.79 bar",
    ),
    row(
        "density-law",
        &[In::Fluid],
        &[slot("", "law", Takes::Choice(offer::DENSITY_LAWS), REQUIRED)],
        ONCE,
        "How the solver lets density depend on temperature.",
        "density-law boussinesq",
    ),
    row(
        "density",
        &[In::Fluid, In::Solid],
        &[slot("", "density", of(&[DENSITY]), REQUIRED)],
        ONCE,
        "Density ρ.",
        "density 998 kg/m^3",
    ),
    row(
        "expansion",
        &[In::Fluid],
        &[slot("", "expansion", of(&[EXPANSION]), REQUIRED)],
        ONCE,
        "Thermal expansion α, at the reference.",
        "expansion 2.1e-4 1/K",
    ),
    row(
        "viscosity",
        &[In::Fluid],
        &[slot("", "viscosity", of(&[VISCOSITY]), REQUIRED)],
        ONCE,
        "Dynamic viscosity μ.",
        "viscosity 1.0 mPa.s",
    ),
    row(
        "kinematic-viscosity",
        &[In::Fluid],
        &[slot("", "kinematic-viscosity", of(&[DIFFUSIVITY]), REQUIRED)],
        ONCE,
        "Kinematic viscosity ν.",
        "kinematic-viscosity 1.5e-5 m^2/s",
    ),
    row(
        "conductivity",
        &[In::Fluid, In::Solid],
        &[slot("", "conductivity", of(&[CONDUCTIVITY]), REQUIRED)],
        ONCE,
        "Thermal conductivity k.",
        "conductivity 0.026 W/m/K",
    ),
    row(
        "diffusivity",
        &[In::Fluid],
        &[slot("", "diffusivity", of(&[DIFFUSIVITY]), REQUIRED)],
        ONCE,
        "Thermal diffusivity a.",
        "diffusivity 2.1e-5 m^2/s",
    ),
    row(
        "heat-capacity",
        &[In::Fluid, In::Solid],
        &[slot("", "heat-capacity", of(&[HEAT_CAPACITY]), REQUIRED)],
        ONCE,
        "Specific heat capacity at constant pressure, cp.",
        "heat-capacity 1006 J/kg/K",
    ),
    row(
        "prandtl",
        &[In::Fluid],
        &[slot("", "prandtl", of(&[NUMBER]), REQUIRED)],
        ONCE,
        "Prandtl number, ν/a.",
        "prandtl 0.71",
    ),
    // region
    row(
        "box",
        &[In::Region],
        &[
            slot("", "width", A_LENGTH, REQUIRED),
            slot("by", "depth", A_LENGTH, REQUIRED),
            slot("by", "height", A_LENGTH, OPTIONAL),
        ],
        ONCE,
        "A box: its lengths along x, y and z. Two lengths make a plane case in x and z.",
        "box 0.5 m by 0.6 m by 1.1 m",
    ),
    row(
        "cylinder",
        &[In::Region],
        &[
            slot("", "diameter", A_LENGTH, REQUIRED),
            slot("by", "height", A_LENGTH, REQUIRED),
            slot("along", "axis", Takes::Choice(offer::AXES), OPTIONAL),
        ],
        ONCE,
        "A cylinder: diameter, length, and the direction of its axis, z where none is given.",
        "cylinder 0.8 m by 1.6 m along z",
    ),
    row(
        "sphere",
        &[In::Region],
        &[slot("", "diameter", A_LENGTH, REQUIRED)],
        ONCE,
        "A sphere: its diameter.",
        "sphere 0.4 m",
    ),
    row(
        "annulus",
        &[In::Region],
        &[
            slot("", "inner-diameter", A_LENGTH, REQUIRED),
            slot("by", "outer-diameter", A_LENGTH, REQUIRED),
            slot("by", "height", A_LENGTH, OPTIONAL),
            slot("along", "axis", Takes::Choice(offer::AXES), OPTIONAL),
        ],
        ONCE,
        "The space between two coaxial cylinders: inner and outer diameter, length, and the direction of the axis; without a length, a plane case across the axis.",
        "annulus 0.05 m by 0.12 m by 1 m along x",
    ),
    row(
        "gap",
        &[In::Region],
        &[
            slot("", "spacing", A_LENGTH, REQUIRED),
            slot("by", "height", A_LENGTH, REQUIRED),
            slot("by", "depth", A_LENGTH, OPTIONAL),
        ],
        ONCE,
        "A narrow space between two plates: spacing, height and width. The plates are its west and east sides.",
        "gap 16 mm by 1.2 m by 1 m",
    ),
    row(
        "plate",
        &[In::Region],
        &[slot("", "height", A_LENGTH, REQUIRED), slot("by", "depth", A_LENGTH, OPTIONAL)],
        ONCE,
        "The wide fluid at one plate: height along the plate and width. `tilt` turns it: 90 deg is vertical, the default, 0 deg faces up, 180 deg faces down.",
        "plate 0.71 m by 1.02 m",
    ),
    row(
        "channel",
        &[In::Region],
        &[
            slot("", "spacing", A_LENGTH, REQUIRED),
            slot("by", "height", A_LENGTH, REQUIRED),
            slot("by", "depth", A_LENGTH, OPTIONAL),
        ],
        ONCE,
        "The space between two plates that is open below and above: spacing, height and width.",
        "channel 20 mm by 0.5 m by 0.3 m",
    ),
    row(
        "filled",
        &[In::Region],
        &[slot("with", "fluid", Takes::Name(NameOf::Fluid), REQUIRED)],
        ONCE,
        "The fluid in the region.",
        "filled with cabinet_air",
    ),
    row(
        "made",
        &[In::Region],
        &[slot("of", "solid", Takes::Name(NameOf::Solid), REQUIRED)],
        ONCE,
        "The solid that the region is made of.",
        "made of steel",
    ),
    row(
        "surrounded",
        &[In::Region],
        &[slot("by", "fluid", Takes::Name(NameOf::Fluid), REQUIRED)],
        ONCE,
        "The wide fluid around a cylinder, sphere or plate, whose far side is the boundary `far`.",
        "surrounded by room_air",
    ),
    row(
        "length",
        &[In::Region],
        &[slot("", "length", A_LENGTH, REQUIRED)],
        ONCE,
        "The characteristic length, where the shape does not settle it or another is meant.",
        "length 0.3 m",
    ),
    row(
        "tilt",
        &[In::Region],
        &[slot("", "tilt", of(&[NUMBER]), REQUIRED)],
        ONCE,
        "The angle of the hot plate against the horizontal: 0 deg is heated from below, 90 deg from the side, 180 deg from above.",
        "tilt 60 deg",
    ),
    row(
        "flow",
        &[In::Region],
        &[
            slot("", "regime", Takes::Choice(offer::FLOWS), REQUIRED),
            slot("by", "model", Takes::Choice(offer::TURBULENCE_MODELS), OPTIONAL),
        ],
        ONCE,
        "How turbulence is treated.",
        "flow turbulent by k-omega",
    ),
    row(
        "arrangement",
        &[In::Region],
        &[slot("", "arrangement", Takes::Choice(super::arrangements::ARRANGEMENTS), REQUIRED)],
        ONCE,
        "The arrangement, where another than the one found from shape, gravity and heating is meant.",
        "arrangement side-heated-cavity",
    ),
    row(
        "radiation",
        &[In::Region],
        &[slot("", "radiation", Takes::Choice(offer::RADIATION), REQUIRED)],
        ONCE,
        "How radiation is treated.",
        "radiation surface-to-surface",
    ),
    row(
        "viscous-heating",
        &[In::Region],
        &[slot("", "viscous-heating", Takes::Choice(offer::ON_OFF), REQUIRED)],
        ONCE,
        "Whether the heat of friction is computed.",
        "viscous-heating off",
    ),
    row(
        "pressure-work",
        &[In::Region],
        &[slot("", "pressure-work", Takes::Choice(offer::ON_OFF), REQUIRED)],
        ONCE,
        "Whether the work of pressure is computed in the energy equation.",
        "pressure-work off",
    ),
    // boundary
    row(
        "side",
        &[In::Boundary],
        &[slot("", "sides", Takes::Choice(offer::SIDES), Need::OneOrMore)],
        ONCE,
        "The sides of the region that the boundary covers.",
        "side west, east",
    ),
    row(
        "patch",
        &[In::Boundary],
        &[slot("", "width", A_LENGTH, REQUIRED), slot("by", "height", A_LENGTH, REQUIRED)],
        ONCE,
        "A rectangle on the side, when the boundary covers only that.",
        "patch 0.2 m by 0.3 m",
    ),
    row(
        "area",
        &[In::Boundary],
        &[slot("", "area", of(&[AREA]), REQUIRED)],
        ONCE,
        "The area, when the boundary covers only a part of the side.",
        "area 0.06 m^2",
    ),
    row(
        "wall",
        &[In::Boundary],
        &[slot("", "slip", Takes::Choice(offer::WALLS), OPTIONAL)],
        ONCE,
        "A wall.",
        "wall no-slip",
    ),
    row(
        "moves",
        &[In::Boundary],
        &[slot("at", "speed", of(&[SPEED]), REQUIRED), slot("along", "direction", Takes::Direction, OPTIONAL)],
        ONCE,
        "The speed of a wall that slides.",
        "moves at 0.1 m/s along x",
    ),
    row("inlet", &[In::Boundary], &[], ONCE, "Where fluid enters.", "inlet"),
    row("outlet", &[In::Boundary], &[], ONCE, "Where fluid leaves.", "outlet"),
    row("opening", &[In::Boundary], &[], ONCE, "Where fluid may enter or leave.", "opening"),
    row("symmetry", &[In::Boundary], &[], ONCE, "A mirror plane.", "symmetry"),
    row(
        "repeats",
        &[In::Boundary],
        &[slot("with", "boundary", Takes::Name(NameOf::Boundary), REQUIRED)],
        ONCE,
        "The flow repeats: what leaves here enters at the other boundary.",
        "repeats with east_face",
    ),
    row(
        "meets",
        &[In::Boundary],
        &[slot("", "region", Takes::Name(NameOf::Region), REQUIRED)],
        ONCE,
        "The face is shared with another region, and heat passes through it.",
        "meets shelf",
    ),
    row(
        "held",
        &[In::Boundary],
        &[slot("at", "temperature", A_TEMPERATURE, REQUIRED)],
        ONCE,
        "The temperature of the face is given.",
        "held at 40 degC",
    ),
    row(
        "heated",
        &[In::Boundary],
        &[slot("by", "heat", of(&[HEAT_FLUX, POWER]), REQUIRED)],
        ONCE,
        "Heat into the fluid: a flux, or a power over the whole face.",
        "heated by 180 W",
    ),
    row(
        "cooled",
        &[In::Boundary],
        &[slot("by", "heat", of(&[HEAT_FLUX, POWER]), REQUIRED)],
        ONCE,
        "Heat out of the fluid: a flux, or a power over the whole face.",
        "cooled by 40 W/m^2",
    ),
    row("insulated", &[In::Boundary], &[], ONCE, "No heat passes.", "insulated"),
    row(
        "exchanges",
        &[In::Boundary],
        &[
            slot("", "coefficient", of(&[HEAT_TRANSFER]), REQUIRED),
            slot("with", "temperature", A_TEMPERATURE, REQUIRED),
        ],
        ONCE,
        "Heat passes to surroundings at a temperature, through a heat transfer coefficient.",
        "exchanges 6 W/m^2/K with 8 degC",
    ),
    row(
        "radiates",
        &[In::Boundary],
        &[slot("to", "temperature", A_TEMPERATURE, REQUIRED)],
        ONCE,
        "The outer face radiates to surroundings at a temperature.",
        "radiates to -40 degC",
    ),
    row(
        "emissivity",
        &[In::Boundary, In::Solid],
        &[slot("", "emissivity", of(&[NUMBER]), REQUIRED)],
        ONCE,
        "Emissivity of the face, 0 to 1.",
        "emissivity 0.85",
    ),
    row(
        "enters",
        &[In::Boundary],
        &[
            slot("at", "rate", of(&[SPEED, VOLUME_FLOW, MASS_FLOW]), REQUIRED),
            slot("along", "direction", Takes::Direction, OPTIONAL),
        ],
        ONCE,
        "How fast fluid enters: a speed, a volume flow or a mass flow; straight in where no direction is given.",
        "enters at 0.2 m/s",
    ),
    row(
        "carries",
        &[In::Boundary],
        &[slot("", "temperature", A_TEMPERATURE, REQUIRED)],
        ONCE,
        "The temperature of the fluid that enters.",
        "carries 18 degC",
    ),
    row(
        "gauge",
        &[In::Boundary],
        &[slot("", "pressure", Takes::Quantity(&[PRESSURE], Temperature::Difference), REQUIRED)],
        ONCE,
        "Pressure above the ambient one.",
        "gauge 0 Pa",
    ),
    row(
        "backflow",
        &[In::Boundary],
        &[slot("", "temperature", A_TEMPERATURE, REQUIRED)],
        ONCE,
        "The temperature of fluid that comes back in.",
        "backflow 20 degC",
    ),
    // initial
    row(
        "temperature",
        &[In::Initial],
        &[slot("", "temperature", A_TEMPERATURE, REQUIRED)],
        ONCE,
        "One temperature everywhere.",
        "temperature 20 degC",
    ),
    row(
        "at",
        &[In::Initial],
        &[slot("", "state", Takes::Choice(offer::AT_REST), REQUIRED)],
        ONCE,
        "The fluid does not move: `at rest`.",
        "at rest",
    ),
    row(
        "velocity",
        &[In::Initial],
        &[slot("", "velocity", Takes::Vector(SPEED), REQUIRED)],
        ONCE,
        "One velocity everywhere.",
        "velocity (0.1 m/s, 0 m/s, 0 m/s)",
    ),
    row(
        "stratified",
        &[In::Initial],
        &[slot("from", "bottom", A_TEMPERATURE, REQUIRED), slot("to", "top", A_TEMPERATURE, REQUIRED)],
        ONCE,
        "Temperature linear with height, from bottom to top.",
        "stratified from 18 degC to 24 degC",
    ),
    // source
    row(
        "releases",
        &[In::Source],
        &[slot("", "heat", of(&[POWER, POWER_DENSITY]), REQUIRED)],
        Times::Once,
        "The heat released: a power, or a power per volume.",
        "releases 40 W",
    ),
    row(
        "within",
        &[In::Source],
        &[slot("", "volume", of(&[VOLUME]), REQUIRED)],
        ONCE,
        "The volume in which it is released; without it, the whole region.",
        "within 0.002 m^3",
    ),
    // mesh
    row(
        "cells",
        &[In::Mesh],
        &[
            slot("", "x", of(&[NUMBER]), REQUIRED),
            slot("by", "y", of(&[NUMBER]), OPTIONAL),
            slot("by", "z", of(&[NUMBER]), OPTIONAL),
        ],
        ONCE,
        "The number of cells along x, y and z; along x and z in a plane case.",
        "cells 100 by 120 by 220",
    ),
    row(
        "first-cell",
        &[In::Mesh],
        &[slot("", "height", A_LENGTH, REQUIRED)],
        ONCE,
        "The height of the cells at walls.",
        "first-cell 1.5 mm",
    ),
    row(
        "growth",
        &[In::Mesh],
        &[slot("", "ratio", of(&[NUMBER]), REQUIRED)],
        ONCE,
        "The ratio of the heights of neighbouring cells, from walls inward.",
        "growth 1.15",
    ),
    row(
        "spacing",
        &[In::Mesh],
        &[slot("", "spacing", Takes::ChoiceOrQuantity(offer::SPACINGS, LENGTH), REQUIRED)],
        ONCE,
        "How cells are spread, or the size of cells that are all alike.",
        "spacing graded",
    ),
    // run
    row("steady", &[In::Run], &[], ONCE, "A steady state is sought.", "steady"),
    row(
        "transient",
        &[In::Run],
        &[slot("for", "duration", of(&[TIME]), REQUIRED), slot("step", "step", of(&[TIME]), REQUIRED)],
        ONCE,
        "The case is followed in time.",
        "transient for 2 h step 0.5 s",
    ),
    row(
        "time-stepping",
        &[In::Run],
        &[slot("", "scheme", Takes::Choice(offer::TIME_STEPPING), REQUIRED)],
        ONCE,
        "Whether steps are explicit or implicit.",
        "time-stepping implicit",
    ),
    // waive
    row(
        "because",
        &[In::Waive],
        &[slot("", "reason", Takes::Text, REQUIRED), slot("until", "day", Takes::Date, OPTIONAL)],
        Times::Once,
        "Why the finding does not count, and the last day on which that holds.",
        "because \"Tested; see report 12.\" until 2027-03-01",
    ),
    // practice
    row(
        "limit",
        &[In::Practice],
        &[slot("", "check", Takes::CheckName, REQUIRED), slot("to", "limit", of(&[NUMBER]), REQUIRED)],
        Times::Any,
        "Sets the limit over which a check speaks.",
        "limit density-span to 0.05",
    ),
    row(
        "level",
        &[In::Practice],
        &[slot("", "check", Takes::CheckName, REQUIRED), slot("to", "level", Takes::LevelName, REQUIRED)],
        Times::Any,
        "Sets the level of a check: error, warning, information, hint or off.",
        "level stable-layer to hint",
    ),
    row(
        "gate",
        &[In::Practice],
        &[slot("", "level", Takes::LevelName, REQUIRED)],
        ONCE,
        "The level from which findings make an assessment fail.",
        "gate error",
    ),
];
