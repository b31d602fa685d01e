//! The field's kinds of quantity by dimension: what they are called, and the units that people write them in.

use crate::quantity::dimension::Dimension;

/// One kind of quantity.
#[derive(Debug)]
pub struct Kind {
    /// Its dimension.
    pub dimension: Dimension,
    /// Its name in words, with an article: "a heat flux".
    pub name: &'static str,
    /// The usual units, the usual one first.
    pub units: &'static [&'static str],
    /// For writing values: units in rising order, each with the least SI value that is written in it. Empty: the first
    /// usual unit always.
    pub ladder: &'static [(&'static str, f64)],
}

macro_rules! dimensions {
    ($($(#[$doc:meta])* $name:ident = ($l:expr, $m:expr, $t:expr, $i:expr, $theta:expr, $n:expr, $j:expr);)*) => {
        $($(#[$doc])* pub const $name: Dimension = Dimension::of($l, $m, $t, $i, $theta, $n, $j);)*
    };
}

// Length, mass, time, current, temperature, amount, luminous intensity.
dimensions! {
    /// m
    LENGTH = (1, 0, 0, 0, 0, 0, 0);
    /// m^2
    AREA = (2, 0, 0, 0, 0, 0, 0);
    /// m^3
    VOLUME = (3, 0, 0, 0, 0, 0, 0);
    /// s
    TIME = (0, 0, 1, 0, 0, 0, 0);
    /// 1/s
    FREQUENCY = (0, 0, -1, 0, 0, 0, 0);
    /// m/s
    SPEED = (1, 0, -1, 0, 0, 0, 0);
    /// m/s^2
    ACCELERATION = (1, 0, -2, 0, 0, 0, 0);
    /// kg
    MASS = (0, 1, 0, 0, 0, 0, 0);
    /// kg/m^3
    DENSITY = (-3, 1, 0, 0, 0, 0, 0);
    /// m^3/kg
    SPECIFIC_VOLUME = (3, -1, 0, 0, 0, 0, 0);
    /// K
    TEMPERATURE = (0, 0, 0, 0, 1, 0, 0);
    /// K/m
    TEMPERATURE_GRADIENT = (-1, 0, 0, 0, 1, 0, 0);
    /// K/s
    TEMPERATURE_RATE = (0, 0, -1, 0, 1, 0, 0);
    /// 1/K
    THERMAL_EXPANSION = (0, 0, 0, 0, -1, 0, 0);
    /// Pa
    PRESSURE = (-1, 1, -2, 0, 0, 0, 0);
    /// Pa/m
    PRESSURE_GRADIENT = (-2, 1, -2, 0, 0, 0, 0);
    /// 1/Pa
    COMPRESSIBILITY = (1, -1, 2, 0, 0, 0, 0);
    /// N
    FORCE = (1, 1, -2, 0, 0, 0, 0);
    /// N/m
    SURFACE_TENSION = (0, 1, -2, 0, 0, 0, 0);
    /// J
    ENERGY = (2, 1, -2, 0, 0, 0, 0);
    /// W
    POWER = (2, 1, -3, 0, 0, 0, 0);
    /// W/m
    POWER_PER_LENGTH = (1, 1, -3, 0, 0, 0, 0);
    /// W/m^2
    HEAT_FLUX = (0, 1, -3, 0, 0, 0, 0);
    /// W/m^3
    POWER_DENSITY = (-1, 1, -3, 0, 0, 0, 0);
    /// J/kg
    SPECIFIC_ENERGY = (2, 0, -2, 0, 0, 0, 0);
    /// Pa.s
    DYNAMIC_VISCOSITY = (-1, 1, -1, 0, 0, 0, 0);
    /// m^2/s
    KINEMATIC_VISCOSITY = (2, 0, -1, 0, 0, 0, 0);
    /// W/m/K
    THERMAL_CONDUCTIVITY = (1, 1, -3, 0, -1, 0, 0);
    /// J/kg/K
    SPECIFIC_HEAT_CAPACITY = (2, 0, -2, 0, -1, 0, 0);
    /// J/m^3/K
    VOLUMETRIC_HEAT_CAPACITY = (-1, 1, -2, 0, -1, 0, 0);
    /// J/K
    HEAT_CAPACITY = (2, 1, -2, 0, -1, 0, 0);
    /// W/m^2/K
    HEAT_TRANSFER_COEFFICIENT = (0, 1, -3, 0, -1, 0, 0);
    /// m^2.K/W
    THERMAL_INSULANCE = (0, -1, 3, 0, 1, 0, 0);
    /// K/W
    THERMAL_RESISTANCE = (-2, -1, 3, 0, 1, 0, 0);
    /// W/K
    THERMAL_CONDUCTANCE = (2, 1, -3, 0, -1, 0, 0);
    /// m^3/s
    VOLUME_FLOW_RATE = (3, 0, -1, 0, 0, 0, 0);
    /// kg/s
    MASS_FLOW_RATE = (0, 1, -1, 0, 0, 0, 0);
    /// kg/m^2/s
    MASS_FLUX = (-2, 1, -1, 0, 0, 0, 0);
    /// mol
    AMOUNT = (0, 0, 0, 0, 0, 1, 0);
    /// kg/mol
    MOLAR_MASS = (0, 1, 0, 0, 0, -1, 0);
    /// m^3/mol
    MOLAR_VOLUME = (3, 0, 0, 0, 0, -1, 0);
    /// mol/m^3
    CONCENTRATION = (-3, 0, 0, 0, 0, 1, 0);
    /// J/mol
    MOLAR_ENERGY = (2, 1, -2, 0, 0, -1, 0);
    /// J/mol/K
    MOLAR_HEAT_CAPACITY = (2, 1, -2, 0, -1, -1, 0);
    /// 1/m
    PER_LENGTH = (-1, 0, 0, 0, 0, 0, 0);
    /// A
    CURRENT = (0, 0, 0, 1, 0, 0, 0);
    /// C
    CHARGE = (0, 0, 1, 1, 0, 0, 0);
    /// V
    VOLTAGE = (2, 1, -3, -1, 0, 0, 0);
    /// Ω
    RESISTANCE = (2, 1, -3, -2, 0, 0, 0);
    /// S
    CONDUCTANCE = (-2, -1, 3, 2, 0, 0, 0);
    /// F
    CAPACITANCE = (-2, -1, 4, 2, 0, 0, 0);
    /// H
    INDUCTANCE = (2, 1, -2, -2, 0, 0, 0);
    /// Wb
    MAGNETIC_FLUX = (2, 1, -2, -1, 0, 0, 0);
    /// T
    MAGNETIC_FLUX_DENSITY = (0, 1, -2, -1, 0, 0, 0);
    /// cd
    LUMINOUS_INTENSITY = (0, 0, 0, 0, 0, 0, 1);
    /// lx
    ILLUMINANCE = (-2, 0, 0, 0, 0, 0, 1);
    /// kat
    CATALYTIC_ACTIVITY = (0, 0, -1, 0, 0, 1, 0);
    /// W/m^2/K^4, as of the Stefan-Boltzmann constant
    RADIATION_CONSTANT = (0, 1, -3, 0, -4, 0, 0);
}

const fn kind(
    dimension: Dimension,
    name: &'static str,
    units: &'static [&'static str],
    ladder: &'static [(&'static str, f64)],
) -> Kind {
    Kind { dimension, name, units, ladder }
}

/// The table. One row a dimension; a plain number's usual unit is `1`, which is not written.
#[rustfmt::skip]
pub static KINDS: &[Kind] = &[
    kind(Dimension::NONE, "a plain number", &["1", "%", "ppm", "deg", "rad"], &[]),
    kind(LENGTH, "a length", &["m", "mm", "cm", "µm", "km", "in", "ft", "yd", "mi"],
        &[("µm", 0.0), ("mm", 1e-4), ("m", 0.1), ("km", 1e4)]),
    kind(AREA, "an area", &["m^2", "cm^2", "mm^2", "km^2", "ha", "in^2", "ft^2"],
        &[("mm^2", 0.0), ("cm^2", 1e-4), ("m^2", 1e-2), ("km^2", 1e6)]),
    kind(VOLUME, "a volume", &["m^3", "L", "mL", "cm^3", "mm^3", "in^3", "ft^3", "gal"],
        &[("mm^3", 0.0), ("mL", 1e-6), ("L", 1e-3), ("m^3", 0.1)]),
    kind(TIME, "a time", &["s", "ms", "min", "h", "d"],
        &[("µs", 0.0), ("ms", 1e-3), ("s", 1.0), ("min", 600.0), ("h", 7200.0), ("d", 172_800.0)]),
    kind(FREQUENCY, "a frequency or rate", &["1/s", "Hz", "kHz", "1/min", "1/h", "rpm"], &[]),
    kind(SPEED, "a speed", &["m/s", "mm/s", "cm/s", "km/h", "ft/s", "ft/min", "mi/h"],
        &[("mm/s", 0.0), ("m/s", 0.1)]),
    kind(ACCELERATION, "an acceleration", &["m/s^2", "ft/s^2"], &[]),
    kind(MASS, "a mass", &["kg", "g", "mg", "t", "lb", "oz"],
        &[("mg", 0.0), ("g", 1e-3), ("kg", 1.0), ("t", 1e4)]),
    kind(DENSITY, "a density", &["kg/m^3", "g/cm^3", "kg/L", "lb/ft^3"], &[]),
    kind(SPECIFIC_VOLUME, "a specific volume", &["m^3/kg", "L/kg", "ft^3/lb"], &[]),
    kind(TEMPERATURE, "a temperature", &["degC", "K", "degF", "degR"], &[]),
    kind(TEMPERATURE_GRADIENT, "a temperature gradient", &["K/m", "K/mm", "K/km", "degF/ft"], &[]),
    kind(TEMPERATURE_RATE, "a rate of temperature change", &["K/s", "K/min", "K/h", "degF/min"], &[]),
    kind(THERMAL_EXPANSION, "a thermal expansion", &["1/K", "ppm/K", "1/degF"], &[]),
    kind(PRESSURE, "a pressure",
        &["Pa", "kPa", "MPa", "bar", "mbar", "atm", "mmHg", "psi", "inH2O", "barg", "kPag", "psig"],
        &[("mPa", 0.0), ("Pa", 0.1), ("kPa", 1e3), ("MPa", 1e6), ("GPa", 1e9)]),
    kind(PRESSURE_GRADIENT, "a pressure gradient", &["Pa/m", "kPa/m", "mbar/m", "psi/ft"], &[]),
    kind(COMPRESSIBILITY, "a compressibility", &["1/Pa", "1/kPa", "1/MPa", "1/GPa", "1/bar", "1/psi"], &[]),
    kind(FORCE, "a force", &["N", "kN", "mN", "kgf", "lbf"],
        &[("µN", 0.0), ("mN", 1e-3), ("N", 1.0), ("kN", 1e3), ("MN", 1e6)]),
    kind(SURFACE_TENSION, "a surface tension", &["N/m", "mN/m", "lbf/ft"], &[("mN/m", 0.0), ("N/m", 1.0)]),
    kind(ENERGY, "an energy", &["J", "kJ", "MJ", "kWh", "Wh", "kcal", "Btu", "therm"],
        &[("mJ", 0.0), ("J", 1.0), ("kJ", 1e3), ("MJ", 1e6), ("GJ", 1e9), ("TJ", 1e12)]),
    kind(POWER, "a power", &["W", "kW", "MW", "mW", "kcal/h", "Btu/h", "hp", "TR"],
        &[("µW", 0.0), ("mW", 1e-3), ("W", 1.0), ("kW", 1e3), ("MW", 1e6), ("GW", 1e9)]),
    kind(POWER_PER_LENGTH, "a power per length", &["W/m", "kW/m", "Btu/(h.ft)"],
        &[("mW/m", 0.0), ("W/m", 0.1), ("kW/m", 1e3)]),
    kind(HEAT_FLUX, "a heat flux", &["W/m^2", "kW/m^2", "W/cm^2", "Btu/(h.ft^2)"],
        &[("W/m^2", 0.0), ("kW/m^2", 1e4), ("MW/m^2", 1e6)]),
    kind(POWER_DENSITY, "a power density", &["W/m^3", "kW/m^3", "W/L", "W/cm^3", "Btu/(h.ft^3)"],
        &[("W/m^3", 0.0), ("kW/m^3", 1e4), ("MW/m^3", 1e6)]),
    kind(SPECIFIC_ENERGY, "a specific energy", &["J/kg", "kJ/kg", "MJ/kg", "kcal/kg", "Btu/lb"],
        &[("J/kg", 0.0), ("kJ/kg", 1e3), ("MJ/kg", 1e6)]),
    kind(DYNAMIC_VISCOSITY, "a dynamic viscosity", &["Pa.s", "mPa.s", "µPa.s", "cP", "P", "lb/(ft.s)"],
        &[("µPa.s", 0.0), ("mPa.s", 1e-4), ("Pa.s", 0.1)]),
    kind(KINEMATIC_VISCOSITY, "a kinematic viscosity or diffusivity", &["m^2/s", "mm^2/s", "cSt", "St", "ft^2/s"], &[]),
    kind(THERMAL_CONDUCTIVITY, "a thermal conductivity", &["W/m/K", "mW/m/K", "W/cm/K", "kcal/(h.m.K)", "Btu/(h.ft.degF)"],
        &[("mW/m/K", 0.0), ("W/m/K", 0.1)]),
    kind(SPECIFIC_HEAT_CAPACITY, "a specific heat capacity", &["J/kg/K", "kJ/kg/K", "kcal/kg/K", "Btu/(lb.degF)"], &[]),
    kind(VOLUMETRIC_HEAT_CAPACITY, "a volumetric heat capacity", &["J/m^3/K", "kJ/m^3/K", "MJ/m^3/K", "Btu/(ft^3.degF)"],
        &[("J/m^3/K", 0.0), ("kJ/m^3/K", 1e3), ("MJ/m^3/K", 1e6)]),
    kind(HEAT_CAPACITY, "a heat capacity", &["J/K", "kJ/K", "MJ/K", "Wh/K", "Btu/degF"],
        &[("J/K", 0.0), ("kJ/K", 1e3), ("MJ/K", 1e6)]),
    kind(HEAT_TRANSFER_COEFFICIENT, "a heat transfer coefficient", &["W/m^2/K", "kW/m^2/K", "kcal/(h.m^2.K)", "Btu/(h.ft^2.degF)"],
        &[("W/m^2/K", 0.0), ("kW/m^2/K", 1e4)]),
    kind(THERMAL_INSULANCE, "a thermal insulance", &["m^2.K/W", "h.ft^2.degF/Btu"], &[]),
    kind(THERMAL_RESISTANCE, "a thermal resistance", &["K/W", "K/kW", "h.degF/Btu"], &[]),
    kind(THERMAL_CONDUCTANCE, "a thermal conductance", &["W/K", "kW/K", "Btu/(h.degF)"], &[]),
    kind(VOLUME_FLOW_RATE, "a volume flow rate", &["m^3/s", "m^3/h", "L/s", "L/min", "mL/min", "cfm", "gpm"],
        &[("mL/s", 0.0), ("L/s", 1e-4), ("m^3/s", 0.1)]),
    kind(MASS_FLOW_RATE, "a mass flow rate", &["kg/s", "kg/h", "g/s", "t/h", "lb/h"],
        &[("mg/s", 0.0), ("g/s", 1e-3), ("kg/s", 0.1)]),
    kind(MASS_FLUX, "a mass flux", &["kg/m^2/s", "g/m^2/s", "lb/(h.ft^2)"], &[]),
    kind(AMOUNT, "an amount of substance", &["mol", "kmol", "mmol", "lbmol"], &[]),
    kind(MOLAR_MASS, "a molar mass", &["g/mol", "kg/kmol", "kg/mol", "lb/lbmol"], &[]),
    kind(MOLAR_VOLUME, "a molar volume", &["m^3/mol", "L/mol", "cm^3/mol", "m^3/kmol"], &[]),
    kind(CONCENTRATION, "a concentration", &["mol/m^3", "mol/L", "mmol/L", "kmol/m^3"], &[]),
    kind(MOLAR_ENERGY, "a molar energy", &["J/mol", "kJ/mol", "kcal/mol", "Btu/lbmol"],
        &[("J/mol", 0.0), ("kJ/mol", 1e3)]),
    kind(MOLAR_HEAT_CAPACITY, "a molar heat capacity", &["J/mol/K", "kJ/kmol/K", "cal/mol/K", "Btu/(lbmol.degF)"], &[]),
    kind(PER_LENGTH, "a reciprocal length", &["1/m", "1/mm", "1/cm", "1/ft"], &[]),
    kind(RADIATION_CONSTANT, "a radiation constant", &["W/m^2/K^4"], &[]),
    kind(CURRENT, "an electric current", &["A", "mA", "kA"], &[("mA", 0.0), ("A", 0.1), ("kA", 1e4)]),
    kind(CHARGE, "an electric charge", &["C"], &[]),
    kind(VOLTAGE, "a voltage", &["V", "mV", "kV"], &[("mV", 0.0), ("V", 0.1), ("kV", 1e3)]),
    kind(RESISTANCE, "an electric resistance", &["Ω", "mΩ", "kΩ"], &[]),
    kind(CONDUCTANCE, "an electric conductance", &["S"], &[]),
    kind(CAPACITANCE, "a capacitance", &["F", "µF"], &[]),
    kind(INDUCTANCE, "an inductance", &["H", "mH"], &[]),
    kind(MAGNETIC_FLUX, "a magnetic flux", &["Wb"], &[]),
    kind(MAGNETIC_FLUX_DENSITY, "a magnetic flux density", &["T", "mT"], &[]),
    kind(LUMINOUS_INTENSITY, "a luminous intensity or flux", &["cd", "lm"], &[]),
    kind(ILLUMINANCE, "an illuminance", &["lx"], &[]),
    kind(CATALYTIC_ACTIVITY, "an amount rate", &["mol/s", "kmol/h", "kat"], &[]),
];

/// The kind of quantity with this dimension, where the table has one.
#[must_use]
pub fn kind_of(dimension: Dimension) -> Option<&'static Kind> {
    KINDS.iter().find(|kind| kind.dimension == dimension)
}

/// The units that people write quantities of this dimension in, the usual one first; empty for an unnamed dimension.
#[must_use]
pub fn usual_units(dimension: Dimension) -> &'static [&'static str] {
    kind_of(dimension).map_or(&[], |kind| kind.units)
}

impl Dimension {
    /// The kind of quantity in words: "a heat flux", or "a quantity in kg.m^-2" where the field has no name for it.
    #[must_use]
    pub fn words(self) -> String {
        match kind_of(self) {
            Some(kind) => kind.name.to_string(),
            None => format!("a quantity in {}", self.base_units()),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::unit::parse_unit;

    #[test]
    fn every_unit_listed_parses_and_has_the_dimension() {
        for kind in KINDS {
            assert!(!kind.units.is_empty(), "{}", kind.name);
            for text in kind.units.iter().chain(kind.ladder.iter().map(|(text, _)| text)) {
                match parse_unit(text) {
                    Ok(unit) => {
                        assert_eq!(unit.dimension, kind.dimension, "{text} for {}", kind.name)
                    }
                    Err(problem) => panic!("{text} for {}: {problem:?}", kind.name),
                }
            }
        }
    }

    #[test]
    fn one_row_a_dimension_and_a_name() {
        for (at, kind) in KINDS.iter().enumerate() {
            for other in KINDS.iter().skip(at + 1) {
                assert_ne!(kind.dimension, other.dimension, "{} {}", kind.name, other.name);
                assert_ne!(kind.name, other.name);
            }
            assert!(kind.name.starts_with("a ") || kind.name.starts_with("an "));
        }
    }

    #[test]
    fn ladders_rise_from_zero() {
        for kind in KINDS.iter().filter(|kind| !kind.ladder.is_empty()) {
            assert_eq!(kind.ladder[0].1, 0.0, "{}", kind.name);
            assert!(kind.ladder.is_sorted_by(|a, b| a.1 < b.1), "{}", kind.name);
            let factors: Vec<f64> = kind.ladder.iter().map(|(text, _)| parse_unit(text).unwrap().factor).collect();
            assert!(factors.is_sorted_by(|a, b| a < b), "{}", kind.name);
        }
    }

    #[test]
    fn words() {
        assert_eq!(HEAT_FLUX.words(), "a heat flux");
        assert_eq!(Dimension::NONE.words(), "a plain number");
        assert_eq!(Dimension::of(-2, 1, 0, 0, 0, 0, 0).words(), "a quantity in kg.m^-2");
        assert_eq!(usual_units(HEAT_FLUX).first(), Some(&"W/m^2"));
        assert!(usual_units(Dimension::of(9, 0, 0, 0, 0, 0, 0)).is_empty());
    }
}
