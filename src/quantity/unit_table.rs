//! Every unit that can be written, as data: a new unit is a new row.
//!
//! An exact symbol wins over a prefix and a symbol: `min` is a minute and `ft` a foot, whatever prefixes might make of them.

use std::collections::HashMap;
use std::f64::consts::PI;
use std::sync::LazyLock;

use crate::quantity::dimension::Dimension;
use crate::quantity::dimension_names::{
    AMOUNT, AREA, CAPACITANCE, CATALYTIC_ACTIVITY, CHARGE, CONDUCTANCE, CURRENT, DYNAMIC_VISCOSITY, ENERGY, FORCE,
    FREQUENCY, ILLUMINANCE, INDUCTANCE, KINEMATIC_VISCOSITY, LENGTH, LUMINOUS_INTENSITY, MAGNETIC_FLUX,
    MAGNETIC_FLUX_DENSITY, MASS, POWER, PRESSURE, RESISTANCE, SPECIFIC_ENERGY, TEMPERATURE, TIME, VOLTAGE, VOLUME,
    VOLUME_FLOW_RATE,
};
use crate::quantity::prefix::{PREFIXES, Prefix};
use crate::quantity::unit::{Scale, Unit};

/// Which SI prefixes a unit takes.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Prefixes {
    /// None.
    Never,
    /// All of them.
    All,
    /// Kilo and larger: the tonne, whose `ft`, `ct`, `pt` and `qt` are other things to everyone.
    KiloAndLarger,
}

/// One unit.
#[derive(Debug)]
pub struct UnitRow {
    /// The symbol, as the source writes it or nearest to it.
    pub symbol: &'static str,
    /// Other accepted spellings.
    pub aliases: &'static [&'static str],
    /// The name, in words.
    pub name: &'static str,
    /// SI value = value * factor + offset.
    pub factor: f64,
    /// In the SI unit of the dimension; 0 for all but temperature points.
    pub offset: f64,
    /// The dimension.
    pub dimension: Dimension,
    /// Which prefixes it takes.
    pub prefixes: Prefixes,
    /// How numbers in it are to be taken.
    pub scale: Scale,
    /// Where the factor is published.
    pub source: &'static str,
    /// What must be known to use it rightly; often empty.
    pub note: &'static str,
}

/// A row, and the prefix before it.
#[derive(Clone, Copy, Debug)]
pub struct Found {
    /// The row.
    pub row: &'static UnitRow,
    /// The prefix, if one was written.
    pub prefix: Option<&'static Prefix>,
}

/// The row, with its prefix, that a symbol names. An exact symbol wins over a prefix and a symbol.
#[must_use]
pub fn find(symbol: &str) -> Option<Found> {
    let by_spelling = &*BY_SPELLING;
    if let Some(&row) = by_spelling.get(symbol) {
        return Some(Found { row, prefix: None });
    }
    PREFIXES.iter().find_map(|prefix| {
        prefix.spellings().find_map(|spelling| {
            let row = *by_spelling.get(symbol.strip_prefix(spelling)?)?;
            row.takes(prefix).then_some(Found { row, prefix: Some(prefix) })
        })
    })
}

static BY_SPELLING: LazyLock<HashMap<&'static str, &'static UnitRow>> =
    LazyLock::new(|| UNITS.iter().flat_map(|row| row.spellings().map(move |spelling| (spelling, row))).collect());

impl UnitRow {
    /// The symbol and the other spellings.
    pub fn spellings(&self) -> impl Iterator<Item = &'static str> + use<> {
        std::iter::once(self.symbol).chain(self.aliases.iter().copied())
    }

    /// Whether it takes any prefix.
    #[must_use]
    pub fn takes_prefixes(&self) -> bool {
        self.prefixes != Prefixes::Never
    }

    /// Whether it takes this prefix.
    #[must_use]
    pub fn takes(&self, prefix: &Prefix) -> bool {
        match self.prefixes {
            Prefixes::Never => false,
            Prefixes::All => true,
            Prefixes::KiloAndLarger => prefix.factor >= 1e3,
        }
    }

    const fn prefixed(mut self) -> UnitRow {
        self.prefixes = Prefixes::All;
        self
    }

    const fn scaled(mut self, scale: Scale) -> UnitRow {
        self.scale = scale;
        self
    }

    const fn zero_at(mut self, offset: f64) -> UnitRow {
        self.offset = offset;
        self
    }

    const fn noted(mut self, note: &'static str) -> UnitRow {
        self.note = note;
        self
    }
}

impl Found {
    /// The unit.
    #[must_use]
    pub fn unit(&self) -> Unit {
        Unit {
            factor: self.prefix.map_or(1.0, |prefix| prefix.factor) * self.row.factor,
            offset: self.row.offset,
            dimension: self.row.dimension,
            scale: self.row.scale,
        }
    }
}

const fn row(
    symbol: &'static str,
    aliases: &'static [&'static str],
    name: &'static str,
    factor: f64,
    dimension: Dimension,
    source: &'static str,
) -> UnitRow {
    let (prefixes, scale) = (Prefixes::Never, Scale::Plain);
    UnitRow { symbol, aliases, name, factor, offset: 0.0, dimension, prefixes, scale, source, note: "" }
}

const SI: &str = "BIPM SI Brochure, 9th ed., tables 2 and 4";
const WITH_SI: &str = "BIPM SI Brochure, 9th ed., table 8";
const SP811: &str = "NIST SP 811 (2008), appendix B";
const NUMBER: &str = "ISO 80000-1";
const TRADE: &str = "common practice";

/// Standard gravity, m/s^2 (exact; 3rd CGPM, 1901).
pub const STANDARD_GRAVITY: f64 = 9.80665;
const INCH: f64 = 0.0254;
const FOOT: f64 = 0.3048;
const POUND: f64 = 0.453_592_37;
const POUND_FORCE: f64 = POUND * STANDARD_GRAVITY;
const PSI: f64 = POUND_FORCE / (INCH * INCH);
const ATMOSPHERE: f64 = 101_325.0;
/// Conventional density of mercury, kg/m^3, and of water (NIST SP 811, appendix B, "conventional").
const MERCURY: f64 = 13_595.1;
const WATER: f64 = 1000.0;
/// Exact by the International Table calorie 4.1868 J: Btu_IT/lb = 2.326 kJ/kg.
const BTU: f64 = 2326.0 * POUND;
/// Btu_th/lb = 4.184/1.8 kJ/kg.
const BTU_TH: f64 = 4184.0 / 1.8 * POUND;
/// 231 cubic inches.
const GALLON: f64 = 231.0 * INCH * INCH * INCH;
const MINUTE: f64 = 60.0;
const HOUR: f64 = 3600.0;
const DEGREE: f64 = PI / 180.0;
const NONE: Dimension = Dimension::NONE;

use Scale::{Gauge, TemperatureOpen, TemperaturePoint};

/// The table.
#[rustfmt::skip]
pub static UNITS: &[UnitRow] = &[
    // SI base units.
    row("m", &[], "metre", 1.0, LENGTH, SI).prefixed(),
    row("g", &[], "gram", 1e-3, MASS, SI).prefixed(),
    row("s", &[], "second", 1.0, TIME, SI).prefixed(),
    row("A", &[], "ampere", 1.0, CURRENT, SI).prefixed(),
    row("K", &["\u{212a}"], "kelvin", 1.0, TEMPERATURE, SI).prefixed().scaled(TemperatureOpen)
        .noted("a temperature or a difference of temperatures, by use"),
    row("mol", &[], "mole", 1.0, AMOUNT, SI).prefixed(),
    row("cd", &[], "candela", 1.0, LUMINOUS_INTENSITY, SI).prefixed(),
    // SI units with names of their own.
    row("rad", &[], "radian", 1.0, NONE, SI).prefixed(),
    row("sr", &[], "steradian", 1.0, NONE, SI).prefixed(),
    row("Hz", &[], "hertz", 1.0, FREQUENCY, SI).prefixed(),
    row("N", &[], "newton", 1.0, FORCE, SI).prefixed(),
    row("Pa", &[], "pascal", 1.0, PRESSURE, SI).prefixed(),
    row("J", &[], "joule", 1.0, ENERGY, SI).prefixed(),
    row("W", &[], "watt", 1.0, POWER, SI).prefixed(),
    row("C", &[], "coulomb", 1.0, CHARGE, SI).prefixed(),
    row("V", &[], "volt", 1.0, VOLTAGE, SI).prefixed(),
    row("F", &[], "farad", 1.0, CAPACITANCE, SI).prefixed(),
    row("\u{3a9}", &["\u{2126}", "ohm"], "ohm", 1.0, RESISTANCE, SI).prefixed(),
    row("S", &[], "siemens", 1.0, CONDUCTANCE, SI).prefixed(),
    row("Wb", &[], "weber", 1.0, MAGNETIC_FLUX, SI).prefixed(),
    row("T", &[], "tesla", 1.0, MAGNETIC_FLUX_DENSITY, SI).prefixed(),
    row("H", &[], "henry", 1.0, INDUCTANCE, SI).prefixed(),
    row("lm", &[], "lumen", 1.0, LUMINOUS_INTENSITY, SI).prefixed(),
    row("lx", &[], "lux", 1.0, ILLUMINANCE, SI).prefixed(),
    row("Bq", &[], "becquerel", 1.0, FREQUENCY, SI).prefixed(),
    row("Gy", &[], "gray", 1.0, SPECIFIC_ENERGY, SI).prefixed(),
    row("Sv", &[], "sievert", 1.0, SPECIFIC_ENERGY, SI).prefixed(),
    row("kat", &[], "katal", 1.0, CATALYTIC_ACTIVITY, SI).prefixed(),
    // Accepted with the SI.
    row("min", &[], "minute", MINUTE, TIME, WITH_SI),
    row("h", &[], "hour", HOUR, TIME, WITH_SI),
    row("d", &[], "day", 86_400.0, TIME, WITH_SI),
    row("au", &[], "astronomical unit", 149_597_870_700.0, LENGTH, WITH_SI),
    row("deg", &["°"], "degree", DEGREE, NONE, WITH_SI),
    row("arcmin", &["′"], "minute of arc", DEGREE / 60.0, NONE, WITH_SI),
    row("arcsec", &["″"], "second of arc", DEGREE / 3600.0, NONE, WITH_SI),
    row("ha", &[], "hectare", 1e4, AREA, WITH_SI),
    row("L", &["l"], "litre", 1e-3, VOLUME, WITH_SI).prefixed(),
    UnitRow { prefixes: Prefixes::KiloAndLarger, ..row("t", &[], "tonne", 1e3, MASS, WITH_SI) },
    row("eV", &[], "electronvolt", 1.602_176_634e-19, ENERGY, WITH_SI).prefixed(),
    // Plain numbers.
    row("%", &[], "per cent", 1e-2, NONE, NUMBER),
    row("ppm", &[], "part per million", 1e-6, NONE, SP811),
    row("ppb", &[], "part per billion", 1e-9, NONE, SP811).noted("billion is 10^9 here"),
    row("rev", &[], "revolution", 2.0 * PI, NONE, SP811),
    row("rpm", &[], "revolution per minute", 2.0 * PI / MINUTE, FREQUENCY, SP811)
        .noted("an angular speed: 1 rpm is 2π rad in a minute"),
    // Temperature.
    row("degC", &["°C", "\u{2103}"], "degree Celsius", 1.0, TEMPERATURE, SI)
        .zero_at(273.15).scaled(TemperaturePoint),
    row("degF", &["°F", "\u{2109}"], "degree Fahrenheit", 5.0 / 9.0, TEMPERATURE, SP811)
        .zero_at(459.67 * 5.0 / 9.0).scaled(TemperaturePoint),
    row("degR", &["°R"], "degree Rankine", 5.0 / 9.0, TEMPERATURE, SP811).scaled(TemperatureOpen)
        .noted("a temperature or a difference of temperatures, by use"),
    // Length and volume.
    row("in", &[], "inch", INCH, LENGTH, SP811),
    row("ft", &[], "foot", FOOT, LENGTH, SP811).noted("the international foot"),
    row("yd", &[], "yard", 3.0 * FOOT, LENGTH, SP811),
    row("mi", &[], "mile", 5280.0 * FOOT, LENGTH, SP811).noted("the international mile"),
    row("gal", &[], "gallon", GALLON, VOLUME, SP811).noted("the US gallon, 231 cubic inches"),
    // Mass and amount.
    row("lb", &["lbm"], "pound", POUND, MASS, SP811).noted("avoirdupois; a mass, not a force"),
    row("oz", &[], "ounce", POUND / 16.0, MASS, SP811).noted("avoirdupois; a mass"),
    row("lbmol", &[], "pound mole", 1e3 * POUND, AMOUNT, TRADE)
        .noted("the amount whose mass in pounds is its molar mass in g/mol"),
    // Force.
    row("lbf", &[], "pound-force", POUND_FORCE, FORCE, SP811),
    row("kgf", &[], "kilogram-force", STANDARD_GRAVITY, FORCE, SP811),
    // Pressure.
    row("bar", &["bara"], "bar", 1e5, PRESSURE, SP811).prefixed(),
    row("atm", &["atma"], "standard atmosphere", ATMOSPHERE, PRESSURE, SP811),
    row("torr", &["Torr"], "torr", ATMOSPHERE / 760.0, PRESSURE, SP811),
    row("mmHg", &[], "millimetre of mercury", 1e-3 * MERCURY * STANDARD_GRAVITY, PRESSURE, SP811)
        .noted("conventional: mercury of 13 595.1 kg/m^3"),
    row("inHg", &[], "inch of mercury", INCH * MERCURY * STANDARD_GRAVITY, PRESSURE, SP811)
        .noted("conventional: mercury of 13 595.1 kg/m^3"),
    row("mmH2O", &[], "millimetre of water", 1e-3 * WATER * STANDARD_GRAVITY, PRESSURE, SP811)
        .noted("conventional: water of 1000 kg/m^3"),
    row("inH2O", &[], "inch of water", INCH * WATER * STANDARD_GRAVITY, PRESSURE, SP811)
        .noted("conventional: water of 1000 kg/m^3"),
    row("ftH2O", &[], "foot of water", FOOT * WATER * STANDARD_GRAVITY, PRESSURE, SP811)
        .noted("conventional: water of 1000 kg/m^3"),
    row("psi", &["psia"], "pound-force per square inch", PSI, PRESSURE, SP811),
    // Pressure above ambient. The factors are those of the absolute units.
    row("Pag", &[], "pascal above ambient", 1.0, PRESSURE, TRADE).scaled(Gauge),
    row("kPag", &[], "kilopascal above ambient", 1e3, PRESSURE, TRADE).scaled(Gauge),
    row("MPag", &[], "megapascal above ambient", 1e6, PRESSURE, TRADE).scaled(Gauge),
    row("mbarg", &[], "millibar above ambient", 1e2, PRESSURE, TRADE).scaled(Gauge),
    row("barg", &[], "bar above ambient", 1e5, PRESSURE, TRADE).scaled(Gauge),
    row("atmg", &[], "atmosphere above ambient", ATMOSPHERE, PRESSURE, TRADE).scaled(Gauge),
    row("psig", &[], "pound-force per square inch above ambient", PSI, PRESSURE, TRADE).scaled(Gauge),
    // Energy and power.
    row("cal", &["cal_IT"], "calorie", 4.1868, ENERGY, SP811).prefixed()
        .noted("the International Table calorie, 4.1868 J, as in heating and steam practice; the thermochemical one is cal_th"),
    row("cal_th", &[], "thermochemical calorie", 4.184, ENERGY, SP811).prefixed(),
    row("Btu", &["Btu_IT"], "British thermal unit", BTU, ENERGY, SP811)
        .noted("the International Table Btu, 1055.055 852 62 J"),
    row("Btu_th", &[], "thermochemical British thermal unit", BTU_TH, ENERGY, SP811),
    row("therm", &[], "therm", 1.055_06e8, ENERGY, SP811)
        .noted("therm (EC), 1.055 06e8 J; the therm (US) is 1.054 804e8 J"),
    row("Wh", &[], "watt-hour", HOUR, ENERGY, SP811).prefixed(),
    row("hp", &[], "horsepower", 550.0 * FOOT * POUND_FORCE, POWER, SP811)
        .noted("mechanical horsepower, 550 ft.lbf/s (745.7 W); the metric one is 735.5 W"),
    row("TR", &[], "ton of refrigeration", 12_000.0 * BTU / HOUR, POWER, SP811)
        .noted("12 000 Btu/h of cooling"),
    // Flow.
    row("gpm", &[], "gallon per minute", GALLON / MINUTE, VOLUME_FLOW_RATE, SP811).noted("US gallons"),
    row("cfm", &[], "cubic foot per minute", FOOT * FOOT * FOOT / MINUTE, VOLUME_FLOW_RATE, SP811)
        .noted("at the state of the gas itself, not at a standard one"),
    // Viscosity.
    row("P", &[], "poise", 0.1, DYNAMIC_VISCOSITY, SP811).prefixed(),
    row("St", &[], "stokes", 1e-4, KINEMATIC_VISCOSITY, SP811).prefixed(),
];

#[cfg(test)]
mod tests {
    use super::*;
    use std::collections::{BTreeMap, BTreeSet};

    #[test]
    fn every_spelling_is_used_once() {
        let mut seen = BTreeSet::new();
        for row in UNITS {
            for spelling in row.spellings() {
                assert!(seen.insert(spelling), "{spelling} stands twice");
                let found = find(spelling).unwrap();
                assert!(found.prefix.is_none() && std::ptr::eq(found.row, row), "{spelling}");
                assert!(crate::quantity::unit::parse_unit(spelling).is_ok(), "{spelling}");
            }
            assert!(!row.name.is_empty() && !row.source.is_empty());
            assert!(row.factor.is_normal() && row.factor > 0.0);
        }
    }

    /// Every prefix and symbol that an exact symbol, or another prefix and symbol, spells too.
    fn collisions(takes: impl Fn(&UnitRow, &Prefix) -> bool) -> Vec<String> {
        let exact: BTreeSet<&str> = UNITS.iter().flat_map(UnitRow::spellings).collect();
        let mut made: BTreeMap<String, BTreeSet<(&str, &str)>> = BTreeMap::new();
        for row in UNITS {
            for prefix in PREFIXES.iter().filter(|prefix| takes(row, prefix)) {
                for before in prefix.spellings() {
                    for symbol in row.spellings() {
                        let makers = made.entry(format!("{before}{symbol}")).or_default();
                        makers.insert((prefix.symbol, row.symbol));
                    }
                }
            }
        }
        let collides = |(text, makers): &(String, BTreeSet<_>)| exact.contains(text.as_str()) || makers.len() > 1;
        made.into_iter().filter(collides).map(|(text, _)| text).collect()
    }

    #[test]
    fn no_text_has_two_readings() {
        assert_eq!(collisions(UnitRow::takes), Vec::<String>::new());
    }

    #[test]
    fn what_would_have_two_readings_if_every_unit_took_every_prefix() {
        let settled = ["MPag", "cd", "ft", "kPag", "mbarg", "min", "yd"];
        assert_eq!(collisions(|_, _| true), settled);
    }

    #[test]
    fn gauge_factors_are_those_of_the_absolute_units() {
        for row in UNITS.iter().filter(|row| row.scale == Scale::Gauge) {
            let absolute = find(row.symbol.strip_suffix('g').unwrap()).unwrap().unit();
            assert_eq!((row.factor, row.dimension), (absolute.factor, absolute.dimension), "{}", row.symbol);
        }
    }

    /// 1 lb of a substance of 1 g/mol is 453.592 37 mol.
    #[test]
    fn a_pound_mole() {
        assert!((find("lbmol").unwrap().unit().factor - 453.592_37).abs() < 1e-12);
    }

    #[test]
    fn exact_symbols_win() {
        for (symbol, name) in [
            ("min", "minute"),
            ("ft", "foot"),
            ("Pa", "pascal"),
            ("cd", "candela"),
            ("h", "hour"),
            ("mmHg", "millimetre of mercury"),
            ("atm", "standard atmosphere"),
            ("mol", "mole"),
            ("kat", "katal"),
            ("gal", "gallon"),
            ("T", "tesla"),
            ("au", "astronomical unit"),
        ] {
            let found = find(symbol).unwrap();
            assert_eq!((found.row.name, found.prefix.is_none()), (name, true), "{symbol}");
        }
    }

    #[test]
    fn prefixes_stand_only_where_they_may() {
        for (symbol, factor) in [
            ("kg", 1.0),
            ("mg", 1e-6),
            ("dam", 10.0),
            ("µm", 1e-6),
            ("μm", 1e-6),
            ("um", 1e-6),
            ("kWh", 3.6e6),
            ("mbar", 100.0),
            ("cP", 1e-3),
            ("cSt", 1e-6),
            ("kcal", 4186.8),
            ("mL", 1e-6),
            ("Mt", 1e9),
            ("QW", 1e30),
            ("qm", 1e-30),
            ("RHz", 1e27),
            ("rs", 1e-27),
            ("kΩ", 1e3),
        ] {
            let unit = find(symbol).unwrap_or_else(|| panic!("{symbol}")).unit();
            assert!((unit.factor / factor - 1.0).abs() < 1e-15, "{symbol} {}", unit.factor);
        }
        for symbol in ["kmin", "kft", "pt", "qt", "ct", "mdegC", "kdeg", "kBtu", "mkg", "kkg", "mbara2", "k", ""] {
            assert!(find(symbol).is_none(), "{symbol}");
        }
    }
}
