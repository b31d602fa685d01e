//! Evaluates a substance at a temperature and pressure.

use super::forms;
use crate::case::compiled::{Compiled, Variable};
use crate::case::model::{Case, Fluid, Property, State, Substance};
use std::cell::RefCell;

/// Properties of a fluid at one state.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Properties {
    /// ρ, kg/m³.
    pub density: f64,
    /// cp, J/(kg K).
    pub heat_capacity: f64,
    /// μ, Pa s.
    pub viscosity: f64,
    /// k, W/(m K).
    pub conductivity: f64,
    /// α = −(1/ρ) ∂ρ/∂T at constant pressure, 1/K.
    pub expansion: f64,
    /// κ = (1/ρ) ∂ρ/∂p at constant temperature, 1/Pa.
    pub compressibility: f64,
}

impl Properties {
    /// ν = μ/ρ, m²/s.
    pub fn kinematic_viscosity(&self) -> f64 {
        self.viscosity / self.density
    }

    /// a = k/(ρ cp), m²/s.
    pub fn diffusivity(&self) -> f64 {
        self.conductivity / (self.density * self.heat_capacity)
    }

    /// Pr = ν/a.
    pub fn prandtl(&self) -> f64 {
        self.viscosity * self.heat_capacity / self.conductivity
    }
}

/// A substance at a composition.
#[derive(Clone, Copy, Debug)]
pub struct Medium<'a> {
    /// Its data.
    pub substance: &'a Substance,
    /// Mass fraction of the dissolved substance; 0 for a pure one.
    pub fraction: f64,
}

/// The state at which a property is wanted, and the substance's definitions as far as they were asked for there: several
/// properties share them.
struct At {
    temperature: f64,
    pressure: f64,
    locals: RefCell<Vec<Option<f64>>>,
}

impl At {
    fn new(temperature: f64, pressure: f64) -> At {
        At { temperature, pressure, locals: RefCell::default() }
    }
}

impl<'a> Medium<'a> {
    /// The medium of a fluid: the deck's own substance of that name, else the library's. `None` where the fluid
    /// names none that is known.
    pub fn of(case: &'a Case, fluid: &Fluid) -> Option<Medium<'a>> {
        let name = &*fluid.substance.as_ref()?.text;
        let substance = case
            .substances
            .iter()
            .find(|substance| &*substance.name.text == name)
            .or_else(|| super::library::find(name))?;
        Some(Medium { substance, fraction: fluid.fraction.as_ref().map_or(0.0, |value| value.si) })
    }

    /// All properties at `temperature` (K) and `pressure` (Pa). `None` outside the range of the data and where
    /// the substance has no density there. A property that has no value there is `NaN`.
    pub fn properties(&self, temperature: f64, pressure: f64) -> Option<Properties> {
        if !self.holds_at(temperature) || !pressure.is_finite() || pressure <= 0.0 {
            return None;
        }
        let at = &At::new(temperature, pressure);
        let substance = self.substance;
        // Without a density there is no such phase here, and no other property means anything.
        let density = self.value(substance.density.as_ref()?, Quantity::Density, at);
        if !density.is_finite() {
            return None;
        }
        Some(Properties {
            density,
            heat_capacity: self.optional(&substance.heat_capacity, Quantity::HeatCapacity, at),
            viscosity: self.optional(&substance.viscosity, Quantity::Viscosity, at),
            conductivity: self.optional(&substance.conductivity, Quantity::Conductivity, at),
            expansion: self.expansion_at(at),
            compressibility: self.compressibility_at(at),
        })
    }

    /// ρ, kg/m³; `None` outside the range of the data.
    pub fn density(&self, temperature: f64, pressure: f64) -> Option<f64> {
        let density = self.substance.density.as_ref()?;
        (self.holds_at(temperature) && pressure > 0.0)
            .then(|| self.value(density, Quantity::Density, &At::new(temperature, pressure)))
            .filter(|value| value.is_finite())
    }

    /// α, 1/K; `None` outside the range of the data.
    pub fn expansion(&self, temperature: f64, pressure: f64) -> Option<f64> {
        (self.holds_at(temperature) && pressure > 0.0)
            .then(|| self.expansion_at(&At::new(temperature, pressure)))
            .filter(|value| value.is_finite())
    }

    /// Lowest and highest temperature of the data, K.
    pub fn range(&self) -> (f64, f64) {
        self.substance.valid.unwrap_or((0.0, f64::INFINITY))
    }

    /// Whether the data hold at a temperature.
    pub fn holds_at(&self, temperature: f64) -> bool {
        let (lowest, highest) = self.range();
        // A limit written in degC and a temperature worked out elsewhere may differ in the last digit.
        temperature.is_finite() && temperature >= lowest - 1e-9 && temperature <= highest + 1e-9
    }

    /// Whether it is a gas.
    pub fn is_gas(&self) -> bool {
        self.substance.state == Some(State::Gas)
    }

    /// Boiling temperature at a pressure, K.
    pub fn boiling(&self, pressure: f64) -> Option<f64> {
        let boils = self.substance.boils.as_ref()?;
        Some(self.value(boils, Quantity::Boiling, &At::new(f64::NAN, pressure))).filter(|value| value.is_finite())
    }

    /// Freezing temperature at a pressure, K.
    pub fn freezing(&self, pressure: f64) -> Option<f64> {
        let freezes = self.substance.freezes.as_ref()?;
        Some(self.value(freezes, Quantity::Freezing, &At::new(f64::NAN, pressure))).filter(|value| value.is_finite())
    }

    fn expansion_at(&self, at: &At) -> f64 {
        if let Some(expansion) = &self.substance.expansion {
            return self.value(expansion, Quantity::Expansion, at);
        }
        match &self.substance.density {
            Some(Property::Code(form)) => forms::code(form, Quantity::Expansion, at.temperature, at.pressure),
            Some(density) => {
                // Central difference. At 1e-4 T its own error is below 1e-7 of α for every smooth form.
                let step = 1e-4 * at.temperature;
                let rho = |temperature| self.value(density, Quantity::Density, &At::new(temperature, at.pressure));
                -(rho(at.temperature + step) - rho(at.temperature - step)) / (2.0 * step * rho(at.temperature))
            }
            None => f64::NAN,
        }
    }

    fn compressibility_at(&self, at: &At) -> f64 {
        if let Some(compressibility) = &self.substance.compressibility {
            return self.value(compressibility, Quantity::Compressibility, at);
        }
        match &self.substance.density {
            Some(Property::Code(form)) => forms::code(form, Quantity::Compressibility, at.temperature, at.pressure),
            Some(density) => {
                let step = 1e-4 * at.pressure;
                let rho = |pressure| self.value(density, Quantity::Density, &At::new(at.temperature, pressure));
                let slope = (rho(at.pressure + step) - rho(at.pressure - step)) / (2.0 * step * rho(at.pressure));
                // A density that does not know of pressure says nothing of compressibility.
                if slope == 0.0 { f64::NAN } else { slope }
            }
            None => f64::NAN,
        }
    }

    fn optional(&self, property: &Option<Property>, quantity: Quantity, at: &At) -> f64 {
        property.as_ref().map_or(f64::NAN, |property| self.value(property, quantity, at))
    }

    fn value(&self, property: &Property, quantity: Quantity, at: &At) -> f64 {
        match property {
            Property::Expression(expression) => self.evaluate(expression, at),
            Property::Code(form) => forms::code(form, quantity, at.temperature, at.pressure),
            Property::Table(rows) => super::table::interpolate(rows, at.temperature, quantity == Quantity::Viscosity),
        }
    }

    fn evaluate(&self, expression: &Compiled, at: &At) -> f64 {
        expression.value(&|variable| match variable {
            Variable::Temperature => at.temperature,
            Variable::Pressure => at.pressure,
            Variable::Fraction => self.fraction,
            // A definition refers to earlier ones only, so this ends.
            Variable::Local(index) => self.local(*index, at),
            Variable::Given(_) | Variable::Deviation(_) | Variable::RegionNumber(..) => f64::NAN,
        })
    }

    fn local(&self, index: usize, at: &At) -> f64 {
        if let Some(Some(known)) = at.locals.borrow().get(index) {
            return *known;
        }
        let value = self.substance.locals.get(index).map_or(f64::NAN, |local| self.evaluate(local, at));
        let mut locals = at.locals.borrow_mut();
        if locals.len() <= index {
            locals.resize(self.substance.locals.len().max(index + 1), None);
        }
        if let Some(slot) = locals.get_mut(index) {
            *slot = Some(value);
        }
        value
    }
}

/// Which property is wanted of a form that gives several.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Quantity {
    /// ρ
    Density,
    /// cp
    HeatCapacity,
    /// μ
    Viscosity,
    /// k
    Conductivity,
    /// α
    Expansion,
    /// κ
    Compressibility,
    /// Boiling temperature
    Boiling,
    /// Freezing temperature
    Freezing,
}
