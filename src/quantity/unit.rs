//! A unit: how a number written in it becomes SI, and what dimension it has.

use crate::quantity::dimension::Dimension;
use crate::quantity::problem::UnitProblem;
use crate::quantity::unit_parser;

/// How numbers in a unit are to be taken.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug)]
pub enum Scale {
    /// As amounts. A `Plain` unit of the dimension of temperature (`m.K/m`) counts differences.
    Plain,
    /// As points on a temperature scale: `degC`, `degF`.
    TemperaturePoint,
    /// As a temperature or a difference of temperatures, which the use must tell: `K`, `degR`.
    TemperatureOpen,
    /// As pressure above the ambient one: `barg`, `psig`. The factor converts; the ambient is the caller's to add.
    Gauge,
}

/// A unit as written.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Unit {
    /// SI value = value * factor + offset. Finite and above 0.
    pub factor: f64,
    /// In the SI unit of the dimension; 0 for all but temperature points.
    pub offset: f64,
    /// The dimension.
    pub dimension: Dimension,
    /// How numbers in it are to be taken.
    pub scale: Scale,
}

impl Unit {
    /// The SI value of `value` in this unit. For a gauge unit: the SI value above ambient.
    #[must_use]
    pub fn to_si(&self, value: f64) -> f64 {
        value * self.factor + self.offset
    }

    /// The number to write in this unit for an SI value. For a gauge unit: of an SI value above ambient.
    #[must_use]
    pub fn from_si(&self, si: f64) -> f64 {
        let above = si - self.offset;
        // What the subtraction leaves of a point at the scale's zero (0 degF) is rounding, not temperature.
        if above.abs() <= 4.0 * f64::EPSILON * self.offset.abs() {
            return 0.0;
        }
        above / self.factor
    }

    /// The SI value of a difference of `value` in this unit: 9 degF is 5 K.
    #[must_use]
    pub fn difference_to_si(&self, value: f64) -> f64 {
        value * self.factor
    }
}

/// Reads a unit such as `W/(m^2.K)`, `kJ/kg/degC`, `mm²`, `1/s`, `degC` or `%`.
///
/// Products are `.`, `*`, `·`; quotients `/`, from left to right; powers `^2`, `^-1`, `^0.5`, `^(1/2)`, `²`, `⁻¹`. There is
/// no white space. A temperature point counts as a difference inside a compound or a power (`W/m^2/degC`), as is common
/// practice.
///
/// # Errors
/// Says what is unknown or malformed and where; never panics, and the work is bounded by
/// [`unit_parser::LONGEST_UNIT`] and [`unit_parser::DEEPEST_UNIT`].
pub fn parse_unit(text: &str) -> Result<Unit, UnitProblem> {
    unit_parser::parse(text)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn unit(text: &str) -> Unit {
        parse_unit(text).unwrap()
    }

    #[test]
    fn temperature_points_differences_and_open_ones() {
        assert_eq!(unit("degC").to_si(20.0), 293.15);
        assert_eq!(unit("°C"), unit("degC"));
        assert!((unit("degF").to_si(68.0) - 293.15).abs() < 1e-12);
        assert!((unit("°F").from_si(273.15) - 32.0).abs() < 1e-12);
        assert_eq!(unit("degF").from_si(unit("degF").to_si(0.0)), 0.0);
        assert!((unit("degF").difference_to_si(9.0) - 5.0).abs() < 1e-15);
        assert_eq!(unit("degC").scale, Scale::TemperaturePoint);
        assert_eq!(unit("K").scale, Scale::TemperatureOpen);
        assert_eq!(unit("mK").scale, Scale::TemperatureOpen);
        assert!((unit("degR").to_si(491.67) - 273.15).abs() < 1e-12);
        for compound in ["W/m^2/degC", "degC^2", "1/degC", "m.degC/m", "K^2", "kJ/(kg.°C)"] {
            assert_eq!(unit(compound).scale, Scale::Plain, "{compound}");
            assert_eq!(unit(compound).offset, 0.0, "{compound}");
        }
        assert_eq!(unit("kJ/kg/degC"), unit("kJ/kg/K"));
        assert_eq!(unit("degC^2"), unit("K^2"));
        assert!(parse_unit("mdegC").is_err());
        assert!(parse_unit("k°C").is_err());
    }

    #[test]
    fn gauge_units_stand_alone() {
        assert_eq!(unit("barg").scale, Scale::Gauge);
        assert_eq!(unit("barg").factor, 1e5);
        assert_eq!(unit("psig").factor, unit("psi").factor);
        assert_eq!(unit("bar").scale, Scale::Plain);
        for compound in ["barg/m", "1/barg", "barg^2", "m.kPag"] {
            let problem = parse_unit(compound).unwrap_err();
            assert!(problem.message().contains("above ambient"), "{compound}: {problem:?}");
        }
    }
}
