//! Functions, constants and the numbers of a region that expressions may use.

use crate::quantity::Dimension;

/// A function of one or more numbers.
#[derive(Debug)]
pub struct Function {
    /// Its name.
    pub name: &'static str,
    /// How many arguments it takes: at least, at most.
    pub arguments: (usize, usize),
    /// What it gives.
    pub description: &'static str,
}

const fn function(name: &'static str, arguments: (usize, usize), description: &'static str) -> Function {
    Function { name, arguments, description }
}

/// The functions.
pub const FUNCTIONS: &[Function] = &[
    function("sqrt", (1, 1), "square root; halves the exponents of the dimension"),
    function("exp", (1, 1), "exponential of a pure number"),
    function("ln", (1, 1), "natural logarithm of a pure number"),
    function("log10", (1, 1), "decimal logarithm of a pure number"),
    function("sin", (1, 1), "sine of an angle"),
    function("cos", (1, 1), "cosine of an angle"),
    function("tan", (1, 1), "tangent of an angle"),
    function("abs", (1, 1), "magnitude"),
    function("min", (1, 64), "the least of values of one dimension"),
    function("max", (1, 64), "the greatest of values of one dimension"),
];

/// A constant.
#[derive(Debug)]
pub struct Constant {
    /// Its name.
    pub name: &'static str,
    /// Its value in SI.
    pub value: f64,
    /// Its dimension.
    pub dimension: Dimension,
    /// What it is, and where the value is from.
    pub description: &'static str,
}

/// The constants. A name of the deck goes before one of these.
pub const CONSTANTS: &[Constant] = &[
    Constant {
        name: "pi",
        value: std::f64::consts::PI,
        dimension: Dimension::NONE,
        description: "the ratio of a circle's circumference to its diameter",
    },
    Constant {
        name: "g0",
        value: 9.806_65,
        dimension: Dimension::of(1, 0, -2, 0, 0, 0, 0),
        description: "standard acceleration of free fall, 9.80665 m/s^2 (CGPM 1901, Resolution 2)",
    },
    Constant {
        name: "R",
        value: 8.314_462_618_153_24,
        dimension: Dimension::of(2, 1, -2, 0, -1, -1, 0),
        description: "molar gas constant, 8.314462618 J/(mol.K) (exact since 2019; SI Brochure, 9th edition)",
    },
];

/// A number that the tool works out for a region, and that a requirement may name: `Ra(cabinet)`.
#[derive(Debug)]
pub struct RegionNumber {
    /// Its name.
    pub name: &'static str,
    /// Its dimension.
    pub dimension: Dimension,
    /// Whether it is a point on the temperature scale.
    pub is_temperature_point: bool,
    /// What it is.
    pub description: &'static str,
}

const fn number(name: &'static str, description: &'static str) -> RegionNumber {
    RegionNumber { name, dimension: Dimension::NONE, is_temperature_point: false, description }
}

const fn temperature(name: &'static str, is_temperature_point: bool, description: &'static str) -> RegionNumber {
    RegionNumber { name, dimension: Dimension::of(0, 0, 0, 0, 1, 0, 0), is_temperature_point, description }
}

/// The numbers of a region. Names and symbols follow ISO 80000-11.
pub const REGION_NUMBERS: &[RegionNumber] = &[
    number("Ra", "Rayleigh number, g α ΔT L³ / (ν a)"),
    number("Gr", "Grashof number, g α ΔT L³ / ν²"),
    number("Pr", "Prandtl number, ν / a"),
    number("Re", "Reynolds number of the fastest given velocity, v L / ν"),
    number("Ri", "Richardson number, Gr / Re²"),
    number("Nu", "Nusselt number by the correlation of the arrangement"),
    number("Ma", "Mach number of the fastest velocity, given or buoyant"),
    number("alpha_dT", "αΔT over the whole span of temperatures"),
    temperature("peak_temperature", true, "the highest temperature that the fluid can reach"),
    temperature("lowest_temperature", true, "the lowest temperature that the fluid can reach"),
    temperature("temperature_span", false, "the highest temperature less the lowest"),
];
