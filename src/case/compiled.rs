//! Expressions with their names resolved and their units folded in: quick to evaluate again and again.

/// An expression in SI.
#[derive(Clone, Debug, PartialEq)]
pub enum Compiled {
    /// A number.
    Constant(f64),
    /// What the expression depends on.
    Variable(Variable),
    /// `-a`
    Negative(Box<Compiled>),
    /// `a operator b`
    Binary(Arithmetic, Box<Compiled>, Box<Compiled>),
    /// A function of one number.
    Function(Function, Box<Compiled>),
    /// The least or greatest.
    Extreme {
        /// Greatest, not least.
        greatest: bool,
        /// Of these.
        of: Vec<Compiled>,
    },
}

/// What an expression may depend on.
#[derive(Clone, Debug, PartialEq)]
pub enum Variable {
    /// A definition of the deck, by its number.
    Given(usize),
    /// A definition inside the same substance, by its number.
    Local(usize),
    /// Absolute temperature, K, in a property.
    Temperature,
    /// Absolute pressure, Pa, in a property.
    Pressure,
    /// Mass fraction, in a property.
    Fraction,
    /// How far a value with a tolerance is from its middle, by the number of the tolerance.
    Deviation(usize),
    /// A number of a region, in a requirement: its name and the region's.
    RegionNumber(&'static str, Box<str>),
}

/// The four operations and the power.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Arithmetic {
    /// Sum.
    Add,
    /// Difference.
    Subtract,
    /// Product.
    Multiply,
    /// Quotient.
    Divide,
    /// Power.
    Power,
}

/// Functions of one number.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Function {
    /// Square root.
    SquareRoot,
    /// Exponential.
    Exponential,
    /// Natural logarithm.
    Logarithm,
    /// Decimal logarithm.
    DecimalLogarithm,
    /// Sine.
    Sine,
    /// Cosine.
    Cosine,
    /// Tangent.
    Tangent,
    /// Magnitude.
    Magnitude,
}

impl Compiled {
    /// Its value, where `variable` gives what it depends on. `NaN` where it has none.
    pub fn value(&self, variable: &dyn Fn(&Variable) -> f64) -> f64 {
        match self {
            Compiled::Constant(value) => *value,
            Compiled::Variable(which) => variable(which),
            Compiled::Negative(inner) => -inner.value(variable),
            Compiled::Binary(operation, left, right) => {
                let (left, right) = (left.value(variable), right.value(variable));
                match operation {
                    Arithmetic::Add => left + right,
                    Arithmetic::Subtract => left - right,
                    Arithmetic::Multiply => left * right,
                    Arithmetic::Divide => left / right,
                    Arithmetic::Power => power(left, right),
                }
            }
            Compiled::Function(function, inner) => {
                let inner = inner.value(variable);
                match function {
                    Function::SquareRoot => inner.sqrt(),
                    Function::Exponential => inner.exp(),
                    Function::Logarithm => inner.ln(),
                    Function::DecimalLogarithm => inner.log10(),
                    Function::Sine => inner.sin(),
                    Function::Cosine => inner.cos(),
                    Function::Tangent => inner.tan(),
                    Function::Magnitude => inner.abs(),
                }
            }
            Compiled::Extreme { greatest, of } => {
                let values = of.iter().map(|inner| inner.value(variable));
                // An unknown member makes the whole unknown, which `f64::max` would hide.
                values
                    .reduce(|a, b| {
                        if a.is_nan() || b.is_nan() {
                            f64::NAN
                        } else if *greatest {
                            a.max(b)
                        } else {
                            a.min(b)
                        }
                    })
                    .unwrap_or(f64::NAN)
            }
        }
    }

    /// The same with the variables that `known` gives put in as numbers.
    pub fn settled(&self, known: &dyn Fn(&Variable) -> Option<f64>) -> Compiled {
        let settle = |inner: &Compiled| Box::new(inner.settled(known));
        match self {
            Compiled::Constant(value) => Compiled::Constant(*value),
            Compiled::Variable(which) => known(which).map_or_else(|| self.clone(), Compiled::Constant),
            Compiled::Negative(inner) => Compiled::Negative(settle(inner)),
            Compiled::Binary(operation, left, right) => Compiled::Binary(*operation, settle(left), settle(right)),
            Compiled::Function(function, inner) => Compiled::Function(*function, settle(inner)),
            Compiled::Extreme { greatest, of } => {
                Compiled::Extreme { greatest: *greatest, of: of.iter().map(|inner| inner.settled(known)).collect() }
            }
        }
    }

    /// Calls `visit` with every variable it depends on.
    pub fn variables(&self, visit: &mut dyn FnMut(&Variable)) {
        match self {
            Compiled::Constant(_) => {}
            Compiled::Variable(which) => visit(which),
            Compiled::Negative(inner) | Compiled::Function(_, inner) => inner.variables(visit),
            Compiled::Binary(_, left, right) => {
                left.variables(visit);
                right.variables(visit);
            }
            Compiled::Extreme { of, .. } => of.iter().for_each(|inner| inner.variables(visit)),
        }
    }
}

fn power(base: f64, exponent: f64) -> f64 {
    // Whole powers are the common ones and are exact this way.
    if exponent.fract() == 0.0 && exponent.abs() <= 16.0 {
        #[expect(clippy::cast_possible_truncation, reason = "a whole number within 16 of zero")]
        base.powi(exponent as i32)
    } else {
        base.powf(exponent)
    }
}
