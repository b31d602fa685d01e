//! A quantity of the deck as an amount: its value in SI and in other units.

use crate::quantity::dimension_names::usual_units;
use crate::quantity::{Dimension, Scale, Unit, parse_unit};
use crate::syntax::tree::{Expression, ExpressionKind, Mark, Quantity};
use crate::vocabulary::Temperature;
use crate::vocabulary::statements::TEMPERATURE;

/// A quantity with a unit, read.
#[derive(Clone, Copy, Debug)]
pub struct Amount<'d> {
    /// The quantity.
    pub quantity: &'d Quantity,
    /// Its unit as written.
    pub unit_text: &'d str,
    /// Its unit.
    pub unit: Unit,
    /// Its number, with the sign before it.
    pub number: f64,
    /// Whether it is taken as a difference of temperatures or pressures.
    pub is_difference: bool,
}

/// The amount that a quantity is, where its unit is known. `negative` where a sign stands before it; `kind` is what its
/// place wants.
pub fn amount(quantity: &Quantity, negative: bool, kind: Option<Temperature>) -> Option<Amount<'_>> {
    let unit_text = &*quantity.unit.as_ref()?.text;
    let unit = parse_unit(unit_text).ok()?;
    let number = if negative { -quantity.number } else { quantity.number };
    let is_difference = match quantity.mark {
        Some((Mark::Difference, _)) => true,
        Some((Mark::Absolute, _)) => false,
        None => match unit.scale {
            Scale::TemperaturePoint | Scale::Gauge => false,
            Scale::TemperatureOpen => kind == Some(Temperature::Difference),
            Scale::Plain => unit.dimension == TEMPERATURE,
        },
    };
    Some(Amount { quantity, unit_text, unit, number, is_difference }).filter(|amount| amount.si().is_finite())
}

/// The quantity that an expression is, with whether a sign stands before it.
pub fn literal(expression: &Expression) -> Option<(&Quantity, bool)> {
    match &expression.kind {
        ExpressionKind::Quantity(quantity) => Some((quantity, false)),
        ExpressionKind::Negative(inner) => match &inner.kind {
            ExpressionKind::Quantity(quantity) => Some((quantity, true)),
            _ => None,
        },
        _ => None,
    }
}

impl Amount<'_> {
    /// Its value in SI; a gauge pressure stays one above ambient.
    pub fn si(&self) -> f64 {
        if self.is_difference { self.unit.difference_to_si(self.number) } else { self.unit.to_si(self.number) }
    }

    /// Its dimension.
    pub fn dimension(&self) -> Dimension {
        self.unit.dimension
    }

    /// The number to write in another unit for the same amount; `None` where that unit counts something else.
    pub fn number_in(&self, other: &str) -> Option<f64> {
        let unit = parse_unit(other).ok().filter(|unit| unit.dimension == self.unit.dimension)?;
        let (from_gauge, to_gauge) = (self.unit.scale == Scale::Gauge, unit.scale == Scale::Gauge);
        if from_gauge != to_gauge {
            return None;
        }
        if self.is_difference {
            // A point unit would read as a point.
            return (unit.scale != Scale::TemperaturePoint).then(|| self.si() / unit.factor);
        }
        Some(unit.from_si(self.si()))
    }

    /// The amount in the other usual units: the number and the unit.
    pub fn elsewhere(&self) -> Vec<(f64, &'static str)> {
        let others = usual_units(self.dimension()).iter().copied();
        let others = others.filter(|other| *other != self.unit_text && *other != "1");
        others.filter_map(|other| Some((self.number_in(other)?, other))).collect()
    }
}
