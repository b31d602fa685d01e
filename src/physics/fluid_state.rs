//! The properties of a region's fluid: what the deck states goes before what the substance has.

use super::model::FluidState;
use crate::case::model::{Case, DensityLaw, Fluid, Region, Value};
use crate::substances::{Medium, Properties};

/// Standard atmosphere, Pa (CGPM 1954, Resolution 4).
pub const STANDARD_ATMOSPHERE: f64 = 101_325.0;

/// The substance of a fluid; `None` where it names none that is known.
pub fn medium<'a>(case: &'a Case, fluid: &Fluid) -> Option<Medium<'a>> {
    Medium::of(case, fluid)
}

/// A fluid that can be asked for its properties at a temperature.
#[derive(Clone, Copy, Debug)]
pub struct Source<'a> {
    /// The fluid as the deck has it.
    pub fluid: &'a Fluid,
    /// Its place in `Case::fluids`.
    pub index: usize,
    /// Its substance.
    pub medium: Option<Medium<'a>>,
    /// Pressure, Pa.
    pub pressure: f64,
    /// Temperatures over which the substance's data hold and it neither boils nor condenses, K.
    pub range: (f64, f64),
}

/// Properties as heat transfer needs them. `NaN` for what is not known: a deck may give ν and a alone.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Transport {
    /// ρ, kg/m³.
    pub density: f64,
    /// cp, J/(kg K).
    pub heat_capacity: f64,
    /// k, W/(m K).
    pub conductivity: f64,
    /// ν, m²/s.
    pub kinematic_viscosity: f64,
    /// a, m²/s.
    pub diffusivity: f64,
    /// α, 1/K.
    pub expansion: f64,
    /// κ, 1/Pa.
    pub compressibility: f64,
}

impl Transport {
    /// Pr = ν/a.
    pub fn prandtl(&self) -> f64 {
        self.kinematic_viscosity / self.diffusivity
    }

    /// Ra = g |α| ΔT L³ / (ν a).
    pub fn rayleigh(&self, gravity: f64, difference: f64, length: f64) -> f64 {
        gravity * self.expansion.abs() * difference.abs() * length.powi(3)
            / (self.kinematic_viscosity * self.diffusivity)
    }

    /// The same as the plain set of properties.
    pub fn properties(&self) -> Properties {
        Properties {
            density: self.density,
            heat_capacity: self.heat_capacity,
            viscosity: self.kinematic_viscosity * self.density,
            conductivity: self.conductivity,
            expansion: self.expansion,
            compressibility: self.compressibility,
        }
    }
}

/// The fluid of a region; `None` for a solid, or where no fluid is named or known.
pub fn source<'a>(case: &'a Case, region: &Region) -> Option<Source<'a>> {
    let name = &region.filled_with.as_ref()?.text;
    let (index, fluid) = case.fluids.iter().enumerate().find(|(_, fluid)| fluid.name.text == *name)?;
    let pressure = [&fluid.reference_pressure, &case.ambient_pressure]
        .into_iter()
        .flatten()
        .next()
        .map_or(STANDARD_ATMOSPHERE, |value| value.si);
    let medium = medium(case, fluid);
    Some(Source { fluid, index, medium, pressure, range: range(medium, pressure) })
}

/// A liquid's range ends where it boils; a vapour's begins there.
fn range(medium: Option<Medium<'_>>, pressure: f64) -> (f64, f64) {
    let Some(medium) = medium else { return (0.0, f64::INFINITY) };
    let (lowest, highest) = medium.range();
    match medium.boiling(pressure) {
        Some(boiling) if medium.is_gas() => (lowest.max(boiling), highest),
        Some(boiling) => (lowest, highest.min(boiling)),
        None => (lowest, highest),
    }
}

impl Source<'_> {
    /// Properties at a temperature, K. Outside the range of the substance's data they are those at its nearer end:
    /// another check speaks of that, and an estimate says so.
    pub fn at(&self, temperature: f64) -> Transport {
        let base = self.medium.and_then(|medium| {
            let (lowest, highest) = self.range;
            // `clamp` demands bounds in order and no `NaN` among them, which a deck's own substance may have.
            if temperature.is_nan() || lowest.is_nan() || highest.is_nan() || lowest > highest {
                return None;
            }
            medium.properties(temperature.max(lowest).min(highest), self.pressure)
        });
        combine(self.fluid, base, temperature)
    }

    /// Whether the substance's data hold at a temperature; so do the constants of a fluid without a substance.
    pub fn holds_at(&self, temperature: f64) -> bool {
        let (lowest, highest) = self.range;
        temperature >= lowest - 1e-6 && temperature <= highest + 1e-6
    }

    /// Whether the properties are the same at every temperature.
    pub fn is_constant(&self) -> bool {
        self.medium.is_none()
    }

    /// The state that the solver is told of, where `middle` is the middle of the temperatures reached.
    pub fn state(&self, middle: f64) -> FluidState {
        let reference_temperature = self.fluid.reference_temperature.as_ref().map_or(middle, |value| value.si);
        FluidState {
            index: self.index,
            reference_temperature,
            pressure: self.pressure,
            constants: self.at(reference_temperature).properties(),
        }
    }
}

/// The first that is known.
fn first<const N: usize>(candidates: [f64; N]) -> f64 {
    candidates.into_iter().find(|value| !value.is_nan()).unwrap_or(f64::NAN)
}

/// Stated values before the substance's, and what follows from stated ones before it too: ν and ρ give μ; a, or Pr with
/// ν, gives k. A stated value that could not be worked out leaves `NaN`, not the substance's value.
fn combine(fluid: &Fluid, base: Option<Properties>, temperature: f64) -> Transport {
    let unknown = f64::NAN;
    let stated = |value: &Option<Value>| value.as_ref().map_or(f64::NAN, |value| value.si);
    let of_base = |pick: fn(&Properties) -> f64| base.as_ref().map_or(unknown, pick);
    let is_unreadable = |value: &Option<Value>| value.as_ref().is_some_and(|value| !value.is_known());
    let (viscosity, kinematic) = (stated(&fluid.viscosity), stated(&fluid.kinematic_viscosity));
    let (conductivity, diffusivity) = (stated(&fluid.conductivity), stated(&fluid.diffusivity));
    let prandtl = stated(&fluid.prandtl);

    let density = first([stated(&fluid.density), of_base(|base| base.density), viscosity / kinematic]);
    let heat_capacity = first([
        stated(&fluid.heat_capacity),
        conductivity / (diffusivity * density),
        prandtl * conductivity / viscosity,
        of_base(|base| base.heat_capacity),
    ]);
    let volumetric = density * heat_capacity;
    let base_kinematic = of_base(Properties::kinematic_viscosity);
    let kinematic_viscosity = first([
        kinematic,
        viscosity / density,
        prandtl * diffusivity,
        prandtl * conductivity / volumetric,
        // The substance's μ and the density in force.
        of_base(|base| base.viscosity) / density,
        base_kinematic,
    ]);
    let diffusivity = first([
        diffusivity,
        conductivity / volumetric,
        kinematic_viscosity / prandtl,
        of_base(|base| base.conductivity) / volumetric,
    ]);
    let unreadable = |values: &[&Option<Value>]| values.iter().any(|value| is_unreadable(value));
    let ideal_gas = fluid.density_law.is_some_and(|law| law.value == DensityLaw::IdealGas);
    let from_law = if ideal_gas { 1.0 / temperature } else { unknown };
    let keep = |value: f64, depends_on: &[&Option<Value>]| if unreadable(depends_on) { unknown } else { value };
    Transport {
        density: keep(density, &[&fluid.density]),
        heat_capacity: keep(heat_capacity, &[&fluid.heat_capacity]),
        conductivity: keep(
            first([conductivity, diffusivity * volumetric, of_base(|base| base.conductivity)]),
            &[&fluid.conductivity, &fluid.diffusivity, &fluid.prandtl],
        ),
        kinematic_viscosity: keep(
            kinematic_viscosity,
            &[&fluid.viscosity, &fluid.kinematic_viscosity, &fluid.prandtl, &fluid.density],
        ),
        diffusivity: keep(
            diffusivity,
            &[&fluid.conductivity, &fluid.diffusivity, &fluid.prandtl, &fluid.density, &fluid.heat_capacity],
        ),
        expansion: keep(
            first([stated(&fluid.expansion), of_base(|base| base.expansion), from_law]),
            &[&fluid.expansion],
        ),
        compressibility: of_base(|base| base.compressibility),
    }
}

#[cfg(test)]
mod tests {
    use crate::substances::Properties;
    use crate::testing::physics;

    fn constants(fluid: &str) -> Properties {
        let text = format!("fluid a\n    {fluid}\nregion r\n    box 1 m by 1 m by 1 m\n    filled with a\n");
        physics(&text).remove(0).fluid.unwrap().constants
    }

    fn close(a: f64, b: f64) -> bool {
        (a / b - 1.0).abs() < 1e-12
    }

    #[test]
    fn the_substance_where_nothing_is_stated() {
        let air = constants("substance air\n    reference 25 degC at 1 bar");
        // Air at 25 degC and 1 bar by CoolProp 8.0.0: 1.16855 kg/m3, 1006.4 J/(kg K), 18.45e-6 Pa s, 0.02623 W/(m K).
        assert!(
            (air.density / 1.16855 - 1.0).abs() < 0.003 && (air.viscosity / 18.45e-6 - 1.0).abs() < 0.005,
            "{air:?}"
        );
        assert!((air.conductivity / 0.02623 - 1.0).abs() < 0.01 && (air.heat_capacity / 1006.4 - 1.0).abs() < 0.005);
    }

    #[test]
    fn stated_values_go_before_it() {
        let air = constants("substance air\n    reference 25 degC at 1 bar");
        let own = constants(
            "substance air\n    reference 25 degC at 1 bar\n    kinematic-viscosity 2e-5 m^2/s\n    density 1.5 kg/m^3",
        );
        assert!(close(own.viscosity, 3e-5) && close(own.density, 1.5) && close(own.heat_capacity, air.heat_capacity));
        let own = constants("substance air\n    reference 25 degC at 1 bar\n    diffusivity 3e-5 m^2/s");
        assert!(close(own.diffusivity(), 3e-5) && close(own.viscosity, air.viscosity), "{own:?}");
        let own = constants("substance air\n    reference 25 degC at 1 bar\n    prandtl 0.9");
        assert!(close(own.prandtl(), 0.9) && close(own.viscosity, air.viscosity), "{own:?}");
        let own =
            constants("substance air\n    reference 25 degC at 1 bar\n    conductivity 0.03 W/m/K\n    prandtl 0.9");
        assert!(
            close(own.prandtl(), 0.9) && close(own.conductivity, 0.03) && close(own.density, air.density),
            "{own:?}"
        );
    }

    #[test]
    fn constants_alone() {
        let own = constants(
            "reference 20 degC\n    density 900 kg/m^3\n    viscosity 0.1 Pa.s\n    heat-capacity 2 kJ/kg/K\n    \
             prandtl 1000\n    expansion 7e-4 1/K",
        );
        assert!(
            close(own.conductivity, 0.2) && close(own.kinematic_viscosity(), 0.1 / 900.0) && close(own.expansion, 7e-4)
        );
        // Viscosities of both kinds give the density.
        let own = constants("reference 20 degC\n    viscosity 0.1 Pa.s\n    kinematic-viscosity 1e-4 m^2/s");
        assert!(close(own.density, 1000.0) && own.conductivity.is_nan(), "{own:?}");
    }

    #[test]
    fn an_unreadable_value_is_not_replaced() {
        let own = constants("substance air\n    reference 25 degC\n    viscosity 1 / 0 * 1 Pa.s");
        assert!(own.viscosity.is_nan() && own.density.is_finite(), "{own:?}");
    }
}
