//! The numbers of a region that a requirement may name, with the bands of the estimates behind them.

use crate::checks::check::Subject;
use crate::checks::look::{Weighed, regions};
use crate::physics;
use crate::physics::model::{Bound, RegionPhysics};

/// Which value of an estimate is taken.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum End {
    /// The estimate itself.
    Middle,
    /// The least that its band allows.
    Least,
    /// The most.
    Most,
}

/// The number of that name (see `vocabulary::functions::REGION_NUMBERS`) of a region; `NaN` where it is not known.
pub fn region_number(subject: &Subject<'_>, number: &str, region: &str, end: End) -> f64 {
    let found = regions(subject).find(|(of, _)| *of.name.text == *region);
    found.map_or(f64::NAN, |(_, physics)| at_end(&of_physics(physics, number), end))
}

/// Whether an estimate stands behind the number.
pub fn is_estimate(subject: &Subject<'_>, number: &str, region: &str) -> bool {
    region_number(subject, number, region, End::Least) < region_number(subject, number, region, End::Most)
}

fn at_end(weighed: &Weighed, end: End) -> f64 {
    match end {
        End::Middle => weighed.value,
        End::Least => weighed.band.0,
        End::Most => weighed.band.1,
    }
}

fn of_physics(physics: &RegionPhysics, number: &str) -> Weighed {
    let value = physics::region_number(physics, number);
    let (numbers, bracket) = (&physics.numbers, physics.bracket.as_ref());
    let at = |bound: Option<&Bound>| Weighed { value, band: bound.map_or((value, value), |bound| bound.band) };
    match number {
        "Ra" | "Gr" | "Ri" | "alpha_dT" | "temperature_span" => Weighed::proportional(value, bracket),
        "Nu" => Weighed { value, band: numbers.nusselt_band },
        // The buoyant velocity goes with the root of the difference; a given velocity does not change.
        "Ma" if numbers.given_velocity >= numbers.buoyant_velocity => Weighed::given(value),
        "Ma" => Weighed::power(value, 0.5, bracket),
        "peak_temperature" => at(bracket.map(|bracket| &bracket.highest)),
        "lowest_temperature" => at(bracket.map(|bracket| &bracket.lowest)),
        _ => Weighed::given(value),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::vocabulary::functions::REGION_NUMBERS;

    #[test]
    fn every_number_of_the_vocabulary_is_known_here() {
        let mut physics = RegionPhysics::default();
        let numbers = &mut physics.numbers;
        (numbers.rayleigh, numbers.grashof, numbers.prandtl, numbers.reynolds) = (7.1, 10.0, 0.71, 2.0);
        (numbers.richardson, numbers.nusselt, numbers.mach, numbers.expansion_span) = (2.5, 1.2, 0.01, 0.1);
        numbers.nusselt_band = (1.1, 1.3);
        let bound = |value: f64| Bound {
            value,
            band: (value, value),
            set_by: String::new(),
            place: None,
            estimate: None,
            literal: None,
        };
        physics.bracket = Some(crate::physics::model::Bracket { lowest: bound(290.0), highest: bound(310.0) });
        for number in REGION_NUMBERS {
            assert!(of_physics(&physics, number.name).value.is_finite(), "{}", number.name);
        }
        assert_eq!(of_physics(&physics, "temperature_span").value, 20.0);
    }
}
