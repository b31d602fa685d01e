//! The words that slots offer.

use super::rows::Choice;

const fn choice(word: &'static str, description: &'static str) -> Choice {
    Choice { word, description }
}

/// `gravity none`
pub const NO_GRAVITY: &[Choice] = &[choice("none", "no gravity acts, and so no buoyancy")];

/// `density-law`
pub const DENSITY_LAWS: &[Choice] = &[
    choice("boussinesq", "density constant but in the buoyancy term, where it falls linearly with temperature"),
    choice("ideal-gas", "density by the ideal-gas law"),
    choice("variable", "density by the substance's own property function of temperature"),
    choice("constant", "density constant everywhere: no buoyancy"),
];

/// `flow`
pub const FLOWS: &[Choice] = &[
    choice("laminar", "no turbulence model"),
    choice("turbulent", "a turbulence model, named behind `by`, or direct simulation"),
];

/// `flow turbulent by`
pub const TURBULENCE_MODELS: &[Choice] = &[
    choice("k-epsilon", "two equations with wall functions: the first cell lies in the logarithmic layer"),
    choice("low-reynolds-k-epsilon", "two equations with damping near walls: the first cell lies in the viscous layer"),
    choice("k-omega", "two equations carried to the wall: the first cell lies in the viscous layer"),
    choice("reynolds-stress", "transport equations of the stresses with wall functions"),
    choice("one-equation", "one equation for an eddy viscosity, carried to the wall"),
    choice("large-eddy", "large eddies resolved, small ones modelled"),
    choice("direct-simulation", "no model: every scale resolved in space and time"),
];

/// `radiation`
pub const RADIATION: &[Choice] = &[
    choice("none", "no exchange by radiation is computed"),
    choice("surface-to-surface", "surfaces exchange radiation through a fluid that takes no part"),
    choice("participating", "the fluid absorbs and emits as well"),
];

/// Switches.
pub const ON_OFF: &[Choice] = &[choice("on", "the term is computed"), choice("off", "the term is left out")];

/// `side`
pub const SIDES: &[Choice] = &[
    choice("west", "the face at the low end of x"),
    choice("east", "the face at the high end of x"),
    choice("south", "the face at the low end of y"),
    choice("north", "the face at the high end of y"),
    choice("bottom", "the face at the low end of z"),
    choice("top", "the face at the high end of z"),
    choice("around", "the curved face of a cylinder or sphere"),
    choice("inner", "the inner face of an annulus"),
    choice("outer", "the outer face of an annulus"),
    choice("face", "the face of a plate, or of a body in a wide fluid"),
    choice("far", "the fluid far from a plate or body"),
    choice("remaining", "every face that no other boundary of the region names"),
];

/// `wall`
pub const WALLS: &[Choice] = &[
    choice("no-slip", "the fluid rests at the wall; the default"),
    choice("slip", "the fluid glides along the wall without friction"),
];

/// The axis of a cylinder or annulus.
pub const AXES: &[Choice] = &[choice("x", "along x"), choice("y", "along y"), choice("z", "along z; the default")];

/// `time-stepping`
pub const TIME_STEPPING: &[Choice] = &[
    choice("explicit", "each step from the last one alone; the step is bounded by stability"),
    choice("implicit", "each step solves for its own end; the step is bounded by accuracy"),
];

/// `spacing`
pub const SPACINGS: &[Choice] =
    &[choice("uniform", "cells of one size"), choice("graded", "cells grow from the walls inward by `growth`")];

/// `state` of a substance
pub const STATES: &[Choice] = &[choice("gas", "a gas"), choice("liquid", "a liquid")];

/// Forms of a property that are code, because no expression holds them.
pub const PROPERTY_FORMS: &[Choice] = &[
    choice("iapws-if97", "IAPWS-IF97, region 1: liquid water"),
    choice("iapws-if97-steam", "IAPWS-IF97, region 2: steam"),
    choice("iapws-viscosity", "IAPWS R12-08: viscosity of water and steam"),
    choice("iapws-melting", "IAPWS R14-08: where ice melts"),
    choice("iapws-conductivity", "IAPWS R15-11: thermal conductivity of water and steam"),
];

/// Columns of a property table.
pub const COLUMNS: &[Choice] = &[
    choice("temperature", "temperature; the first column"),
    choice("density", "density"),
    choice("heat-capacity", "specific heat capacity at constant pressure"),
    choice("viscosity", "dynamic viscosity"),
    choice("conductivity", "thermal conductivity"),
];

/// `rest`
pub const AT_REST: &[Choice] = &[choice("rest", "no motion")];
