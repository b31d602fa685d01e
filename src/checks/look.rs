//! What several checks look at alike: regions with their physics, bands of estimates, and how numbers are worded.

use super::check::{Subject, Weighing};
use crate::case::model::{Boundary, Case, Name, Region};
use crate::physics::model::{Bracket, RegionPhysics};
use crate::quantity::display::format_si;
use crate::substances::Medium;
use crate::syntax::{Finding, Level, Margin};
use crate::vocabulary::statements::TEMPERATURE;

/// Every region with its physics.
pub fn regions<'a>(subject: &Subject<'a>) -> impl Iterator<Item = (&'a Region, &'a RegionPhysics)> {
    subject.case.regions.iter().zip(&subject.physics.regions)
}

/// The region that a boundary belongs to, with its physics.
pub fn region_of<'a>(subject: &Subject<'a>, boundary: &Boundary) -> Option<(&'a Region, &'a RegionPhysics)> {
    let name = &boundary.region.as_ref()?.text;
    regions(subject).find(|(region, _)| region.name.text == *name)
}

/// Whether a region holds, or is surrounded by, a fluid.
pub fn is_fluid(region: &Region) -> bool {
    region.filled_with.is_some()
}

/// Whether gravity acts. Unknown gravity does not count.
pub fn gravity_acts(case: &Case) -> bool {
    case.gravity.magnitude > 0.0
}

/// Whether the density of a region's fluid has a maximum between the temperatures that it reaches (water near 4 degC). Then
/// a part of a layer is stable and a part is not, and one Rayleigh number does not tell.
pub fn has_density_maximum(case: &Case, region: &Region, physics: &RegionPhysics) -> bool {
    let change = || {
        let fluid = case.fluid_of(region)?;
        let medium = Medium::of(case, fluid)?;
        let (bracket, pressure) = (physics.bracket.as_ref()?, physics.fluid.as_ref()?.pressure);
        let low = medium.expansion(bracket.lowest.value, pressure)?;
        let high = medium.expansion(bracket.highest.value, pressure)?;
        Some(low * high <= 0.0)
    };
    change().unwrap_or(false)
}

/// Whether the run seeks a steady state.
pub fn is_steady(case: &Case) -> bool {
    case.run.as_ref().is_some_and(|run| run.steady.is_some() && run.transient.is_none())
}

/// By which factors the span of temperatures may be less and more than it is taken, where its ends are estimates;
/// (1, 1) where they are given. The characteristic numbers that are proportional to the span share the band.
pub fn relative_band(bracket: Option<&Bracket>) -> (f64, f64) {
    let Some(bracket) = bracket else { return (1.0, 1.0) };
    let span = bracket.span();
    let least = bracket.highest.band.0 - bracket.lowest.band.1;
    let most = bracket.highest.band.1 - bracket.lowest.band.0;
    let usable = bracket.rests_on_estimate() && span > 0.0 && least.is_finite() && most.is_finite();
    if usable { ((least / span).max(0.0), most / span) } else { (1.0, 1.0) }
}

/// A number that is weighed, with the band of the estimate behind it.
#[derive(Clone, Copy, Debug)]
pub struct Weighed {
    /// The number.
    pub value: f64,
    /// Its least and its greatest value; both the number itself where no estimate stands behind it.
    pub band: (f64, f64),
}

impl Weighed {
    /// A number that rests on no estimate.
    pub const fn given(value: f64) -> Weighed {
        Weighed { value, band: (value, value) }
    }

    /// A number proportional to the span of temperatures.
    pub fn proportional(value: f64, bracket: Option<&Bracket>) -> Weighed {
        let (least, most) = relative_band(bracket);
        Weighed { value, band: (value * least, value * most) }
    }

    /// A number that goes with a power of the span of temperatures.
    pub fn power(value: f64, exponent: f64, bracket: Option<&Bracket>) -> Weighed {
        let (least, most) = relative_band(bracket);
        let (one, other) = (value * least.powf(exponent), value * most.powf(exponent));
        Weighed { value, band: (one.min(other), one.max(other)) }
    }

    /// Whether an estimate stands behind it.
    pub fn is_estimate(&self) -> bool {
        self.band.0 < self.band.1
    }

    /// The level that it brings and the limit that it is over: one level milder for an estimate, unless its whole band is
    /// beyond the limit.
    pub fn over(&self, weighing: &Weighing) -> Option<(Level, f64)> {
        let (level, limit) = weighing.over(self.value)?;
        Some((if self.band.0 > limit || !self.is_estimate() { level } else { level.milder() }, limit))
    }

    /// The margin, for a finding.
    pub fn margin(&self, quantity: &str, limit: f64) -> Margin {
        let band = self.is_estimate().then_some(self.band);
        Margin { quantity: quantity.into(), value: self.value, limit, band, unit: String::new() }
    }
}

/// The sentence that a finding resting on an estimate ends with; empty where the temperatures are given.
pub fn estimate_note(bracket: Option<&Bracket>) -> String {
    match bracket {
        Some(bracket) if bracket.rests_on_estimate() => format!(
            " This rests on estimated temperatures: {} to {}.",
            celsius(bracket.lowest.value),
            celsius(bracket.highest.value)
        ),
        _ => String::new(),
    }
}

/// A temperature, as people write it.
pub fn celsius(kelvin: f64) -> String {
    format_si(kelvin, TEMPERATURE)
}

/// A sentence from its words: with a capital, where it begins with a Latin letter, and a full stop.
pub fn sentence(words: &str) -> String {
    let mut letters = words.chars();
    match letters.next() {
        Some(first) => format!("{}{}.", first.to_ascii_uppercase(), letters.as_str()),
        None => String::new(),
    }
}

/// A name as a sentence has it.
pub fn named(name: &Name) -> String {
    format!("`{}`", name.text)
}

/// A size down to two digits, so that what is advised is enough.
pub fn rounded_down(size: f64) -> f64 {
    let step = 10_f64.powf(size.log10().floor() - 1.0);
    // What is whole already stays so in spite of rounding.
    (size / step * (1.0 + 1e-12)).floor() * step
}

/// Names as a sentence has them: "`a`, `b` and `c`".
pub fn listed(names: &[&str]) -> String {
    let quoted: Vec<String> = names.iter().map(|name| format!("`{name}`")).collect();
    match quoted.split_last() {
        None => String::new(),
        Some((last, [])) => last.clone(),
        Some((last, before)) => format!("{} and {last}", before.join(", ")),
    }
}

/// A finding about an entity, whose name a waiver may give.
pub fn finding_of(check: &'static str, level: Level, name: &Name, message: String) -> Finding {
    Finding::new(check, level, name.place, message).about(&*name.text)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::physics::model::Bound;

    fn bracket(lowest: (f64, f64, f64), highest: (f64, f64, f64), estimated: bool) -> Bracket {
        let bound = |(low, value, high): (f64, f64, f64)| Bound {
            value,
            band: (low, high),
            set_by: String::new(),
            place: None,
            estimate: estimated.then(String::new),
            literal: None,
        };
        Bracket { lowest: bound(lowest), highest: bound(highest) }
    }

    #[test]
    fn bands() {
        let given = bracket((290.0, 290.0, 290.0), (310.0, 310.0, 310.0), false);
        assert_eq!(relative_band(Some(&given)), (1.0, 1.0));
        let estimated = bracket((290.0, 290.0, 290.0), (305.0, 310.0, 315.0), true);
        assert_eq!(relative_band(Some(&estimated)), (0.75, 1.25));
        let unknown = bracket((290.0, 290.0, 290.0), (f64::NAN, f64::NAN, f64::NAN), true);
        assert_eq!(relative_band(Some(&unknown)), (1.0, 1.0));
        assert_eq!(relative_band(None), (1.0, 1.0));
    }

    #[test]
    fn an_estimate_is_milder_unless_its_whole_band_is_beyond() {
        let weighing = Weighing { limits: vec![(Level::Warning, 1.0)], level: Level::Warning };
        let level = |low, value, high| Weighed { value, band: (low, high) }.over(&weighing).map(|(level, _)| level);
        assert_eq!(level(0.9, 1.2, 1.5), Some(Level::Information));
        assert_eq!(level(1.1, 1.2, 1.5), Some(Level::Warning));
        assert_eq!(level(0.5, 0.9, 1.5), None);
        assert_eq!(Weighed::given(1.2).over(&weighing), Some((Level::Warning, 1.0)));
        assert_eq!(Weighed::given(f64::NAN).over(&weighing), None);
    }

    #[test]
    fn sentences() {
        assert_eq!(sentence("the lid reaches 93 degC"), "The lid reaches 93 degC.");
        assert_eq!(sentence("αΔT is 0.15"), "αΔT is 0.15.");
        assert_eq!(sentence(""), "");
    }

    #[test]
    fn advice_is_on_the_safe_side() {
        assert!((rounded_down(0.002_69) - 0.0026).abs() < 1e-12);
        assert!((rounded_down(1.8) - 1.8).abs() < 1e-9);
        assert!(rounded_down(f64::NAN).is_nan());
    }

    #[test]
    fn lists() {
        assert_eq!(listed(&[]), "");
        assert_eq!(listed(&["west"]), "`west`");
        assert_eq!(listed(&["west", "east", "top"]), "`west`, `east` and `top`");
    }
}
