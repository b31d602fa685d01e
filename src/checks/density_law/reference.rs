//! What the checks of the reference share: the span of a fluid over all the regions that it fills.

use super::assess::Assessed;
use crate::case::model::Fluid;
use crate::physics::model::Bound;

/// The lowest and the highest temperature of a fluid.
#[derive(Clone, Copy, Debug)]
pub struct Span<'a> {
    /// The lowest.
    pub lowest: &'a Bound,
    /// The highest.
    pub highest: &'a Bound,
}

/// The span of a fluid over its regions; `None` where none is known.
pub fn span_of<'a>(fluid: &Fluid, regions: &'a [Assessed<'_>]) -> Option<Span<'a>> {
    let brackets = || {
        regions
            .iter()
            .filter(|region| std::ptr::eq(region.fluid, fluid))
            .map(|region| region.bracket)
            .filter(|bracket| bracket.span().is_finite())
    };
    let lowest = brackets().map(|bracket| &bracket.lowest).min_by(|a, b| a.value.total_cmp(&b.value))?;
    let highest = brackets().map(|bracket| &bracket.highest).max_by(|a, b| a.value.total_cmp(&b.value))?;
    Some(Span { lowest, highest })
}
