//! What the checks of the family share: the regions that a density law fills, each with its criteria, and how a
//! criterion over its limit becomes a finding.

use super::criterion::{Conditions, CriterionValues, evaluate_at, of_constants};
use crate::case::model::{Case, DensityLaw, Fluid, Region};
pub use crate::checks::look::celsius as temperature;
use crate::checks::look::sentence;
use crate::checks::properties::slip::is_slip_of_bound;
use crate::checks::properties::slip_of_state;
use crate::checks::{Check, Subject, Weighing};
use crate::physics::model::{Bracket, RegionPhysics};
use crate::quantity::display::format_number;
use crate::substances::{Medium, Properties};
use crate::syntax::{Finding, Fix, Level, Margin, Place};

/// A region whose fluid follows the density law that is asked for, under gravity, between known temperatures.
#[derive(Debug)]
pub struct Assessed<'a> {
    /// The case.
    pub case: &'a Case,
    /// The region.
    pub region: &'a Region,
    /// Its physics.
    pub physics: &'a RegionPhysics,
    /// Its fluid.
    pub fluid: &'a Fluid,
    /// The substance; `None` where the deck gives constants alone.
    pub medium: Option<Medium<'a>>,
    /// The constants that the solver takes.
    pub constants: &'a Properties,
    /// The temperatures.
    pub bracket: &'a Bracket,
    /// What the criteria were worked out under.
    pub conditions: Conditions,
    /// The criteria.
    pub values: CriterionValues,
    /// The criteria at the corners of the estimate's band: the narrowest, widest, coldest and warmest span; `None` where
    /// every temperature is given.
    pub band: Option<[CriterionValues; 4]>,
}

impl Assessed<'_> {
    /// The criteria under other conditions.
    pub fn under(&self, conditions: &Conditions) -> CriterionValues {
        match &self.medium {
            Some(medium) => evaluate_at(medium, conditions),
            None => of_constants(self.constants, conditions),
        }
    }

    /// Where a finding about the law stands: its statement, else the fluid's name.
    pub fn place(&self) -> Place {
        self.fluid.density_law.map_or(self.fluid.name.place, |law| law.place)
    }
}

/// Every region of the case that a fluid of the density law `law` fills.
pub fn assessed<'a>(subject: &Subject<'a>, law: &[DensityLaw]) -> Vec<Assessed<'a>> {
    let (case, physics) = (subject.case, subject.physics);
    // Without gravity there is no buoyancy to be misstated. Written so that an unknown gravity says nothing either.
    let acts = case.gravity.magnitude > 0.0;
    let slips = slip_of_state::slips(subject);
    let pairs = case.regions.iter().zip(&physics.regions).filter(|_| acts);
    let known = pairs.filter(|(_, physics)| {
        let bounds = physics.bracket.iter().flat_map(|bracket| [&bracket.lowest, &bracket.highest]);
        // What follows from a slip of unit, or from a temperature that cannot be, says nothing.
        bounds.into_iter().all(|bound| bound.value > 0.0 && !is_slip_of_bound(&slips, bound))
    });
    known.filter_map(|(region, physics)| assess(case, region, physics, law)).collect()
}

fn assess<'a>(
    case: &'a Case,
    region: &'a Region,
    physics: &'a RegionPhysics,
    law: &[DensityLaw],
) -> Option<Assessed<'a>> {
    let state = physics.fluid.as_ref()?;
    let fluid = case.fluids.get(state.index)?;
    if !law.contains(&fluid.density_law?.value) {
        return None;
    }
    let bracket = physics.bracket.as_ref()?;
    let medium = Medium::of(case, fluid);
    let conditions = Conditions {
        reference: state.reference_temperature,
        lowest: bracket.lowest.value,
        highest: bracket.highest.value,
        pressure: state.pressure,
        height: physics.geometry.height,
        gravity: case.gravity.magnitude,
        stated_expansion: credible_expansion(fluid, medium.as_ref(), state.reference_temperature, state.pressure),
    };
    let mut assessed = Assessed {
        case,
        region,
        physics,
        fluid,
        medium,
        constants: &state.constants,
        bracket,
        conditions,
        values: CriterionValues::UNKNOWN,
        band: None,
    };
    assessed.values = assessed.under(&conditions);
    assessed.band = bracket.rests_on_estimate().then(|| {
        let (low, high) = (bracket.lowest.band, bracket.highest.band);
        let middle = bracket.middle();
        [(low.1, high.0), (low.0, high.1), (low.0, high.0), (low.1, high.1)].map(|(lowest, highest)| {
            // Bands that overlap must not turn the span round.
            let (lowest, highest) = (lowest.min(middle), highest.max(middle));
            assessed.under(&Conditions { lowest, highest, ..conditions })
        })
    });
    Some(assessed)
}

/// The α that the deck states, where it can be the substance's: the law that the solver follows has this slope. One that
/// is off by more than a factor 2 is a wrong value, which the checks of the properties speak of.
fn credible_expansion(fluid: &Fluid, medium: Option<&Medium<'_>>, temperature: f64, pressure: f64) -> Option<f64> {
    let stated = fluid.expansion.as_ref()?.si;
    let own = medium?.expansion(temperature, pressure)?;
    (0.5..=2.0).contains(&(stated / own)).then_some(stated)
}

/// What a check says of a region.
#[derive(Debug, Default)]
pub struct Said {
    /// What is wrong.
    pub message: String,
    /// What would put it right.
    pub remedy: String,
    /// The same as changes of text.
    pub fixes: Vec<Fix>,
}

/// A number that a check weighs.
#[derive(Clone, Copy, Debug)]
pub struct Weighed {
    /// The check.
    pub check: &'static Check,
    /// Its symbol: "αΔT".
    pub symbol: &'static str,
    /// The number, from a region and a set of its criteria.
    pub value: fn(&Assessed<'_>, &CriterionValues) -> f64,
}

/// The number of a region with the level that it draws.
#[derive(Clone, Debug)]
pub struct Weight {
    /// The number.
    pub value: f64,
    /// Its least and greatest value, where an estimate stands behind it.
    pub band: Option<(f64, f64)>,
    /// The level that it draws, and the limit that it is over; `None` within the first limit.
    pub over: Option<(Level, f64)>,
    /// Whether the finding is milder for resting on an estimate.
    pub is_milder: bool,
}

impl Weighed {
    /// Weighs the number of a region.
    pub fn weigh(&self, assessed: &Assessed<'_>, weighing: &Weighing) -> Weight {
        let of = |values: &CriterionValues| (self.value)(assessed, values);
        let value = of(&assessed.values);
        let band = assessed.band.as_ref().map(|corners| {
            let values = || corners.iter().map(of);
            (values().fold(value, f64::min), values().fold(value, f64::max))
        });
        weight(value, band, weighing)
    }

    /// A finding for every region whose number is over a limit; `say` puts the number and the limit into words.
    pub fn findings(
        &self,
        subject: &Subject<'_>,
        weighing: &Weighing,
        say: impl Fn(&Assessed<'_>, f64, f64) -> Said,
    ) -> Vec<Finding> {
        let regions = assessed(subject, &[DensityLaw::Boussinesq]);
        let over = regions.iter().filter_map(|region| {
            let weight = self.weigh(region, weighing);
            let (level, limit) = weight.over?;
            let Said { message, remedy, fixes } = say(region, weight.value, limit);
            let message = if weight.is_milder { message + &rests_on(region.bracket, &weight) } else { message };
            let margin = Margin {
                quantity: self.symbol.to_string(),
                value: weight.value,
                limit,
                band: weight.band,
                unit: String::new(),
            };
            let mut finding = Finding::new(self.check.name, level, region.place(), sentence(&message))
                .remedy(remedy)
                .about(&*region.region.name.text)
                .weighing(margin);
            finding.fixes = fixes;
            Some(with_ends(finding, region.bracket))
        });
        over.collect()
    }
}

/// Weighs a number: one that rests on an estimate is a level milder unless its whole band is over the limit.
pub fn weight(value: f64, band: Option<(f64, f64)>, weighing: &Weighing) -> Weight {
    let over = weighing.over(value);
    let is_milder = over.is_some_and(|(_, limit)| band.is_some_and(|(least, _)| least <= limit));
    let over = over.map(|(level, limit)| (if is_milder { level.milder() } else { level }, limit));
    Weight { value, band, over, is_milder }
}

/// The finding with the places that set the temperatures.
pub fn with_ends(mut finding: Finding, bracket: &Bracket) -> Finding {
    for (bound, which) in [(&bracket.lowest, "lowest"), (&bracket.highest, "highest")] {
        if let Some(place) = bound.place {
            let estimated = if bound.estimate.is_some() { ", an estimate" } else { "" };
            let message = format!("sets the {which} temperature, {}{estimated}", temperature(bound.value));
            finding = finding.related(place, message);
        }
    }
    finding
}

/// The words for a number that rests on an estimate.
fn rests_on(bracket: &Bracket, weight: &Weight) -> String {
    let estimated = [&bracket.lowest, &bracket.highest].into_iter().find(|bound| bound.estimate.is_some());
    match (estimated, weight.band) {
        (Some(bound), Some((least, greatest))) => format!(
            "; this rests on an estimate, {} between {} and {}, which puts it between {} and {}",
            bound.set_by,
            temperature(bound.band.0),
            temperature(bound.band.1),
            three_digits(least),
            three_digits(greatest)
        ),
        _ => String::new(),
    }
}

/// The same to a tenth of a degree Celsius, for a property of the substance that is known no better.
pub fn to_a_tenth(kelvin: f64) -> String {
    temperature(273.15 + 0.1 * (10.0 * (kelvin - 273.15)).round())
}

/// A share in per cent, to two digits: "31 %".
pub fn per_cent(share: f64) -> String {
    let per_cent = 100.0 * share;
    if per_cent.abs() >= 10.0 { format!("{per_cent:.0} %") } else { format!("{} %", two_digits(per_cent)) }
}

/// A number to two or, from 100 on, three digits.
pub fn two_digits(value: f64) -> String {
    rounded_to(if value.abs() >= 100.0 { 3 } else { 2 }, value)
}

/// A number to three digits.
pub fn three_digits(value: f64) -> String {
    rounded_to(3, value)
}

fn rounded_to(digits: usize, value: f64) -> String {
    let places = digits.saturating_sub(1);
    format!("{value:.places$e}").parse().map_or_else(|_| format_number(value), |rounded: f64| format_number(rounded))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn limits() -> Weighing {
        Weighing { limits: vec![(Level::Warning, 0.1), (Level::Error, 0.2)], level: Level::Warning }
    }

    #[test]
    fn an_estimate_is_a_level_milder_unless_its_whole_band_is_over() {
        let level = |value, band| weight(value, band, &limits()).over.map(|(level, _)| level);
        assert_eq!(level(0.15, None), Some(Level::Warning));
        assert_eq!(level(0.15, Some((0.12, 0.18))), Some(Level::Warning));
        assert_eq!(level(0.15, Some((0.08, 0.22))), Some(Level::Information));
        assert_eq!(level(0.25, Some((0.15, 0.35))), Some(Level::Warning));
        assert_eq!(level(0.09, Some((0.05, 0.3))), None);
        assert_eq!(level(f64::NAN, None), None);
        assert_eq!(level(f64::NAN, Some((f64::NAN, f64::NAN))), None);
    }

    #[test]
    fn shares_are_written_short() {
        assert_eq!(per_cent(0.3124), "31 %");
        assert_eq!(per_cent(0.0512), "5.1 %");
        assert_eq!(per_cent(6.374), "637 %");
        assert_eq!(two_digits(0.15093), "0.15");
        assert_eq!(two_digits(47.3), "47");
        assert_eq!(two_digits(107.4), "107");
        assert_eq!(three_digits(0.15093), "0.151");
    }
}
