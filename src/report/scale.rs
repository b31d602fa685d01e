//! The margin scale: a number and its limit on one line.
//!
//! ```text
//! αΔT  0 ······················ 0.1 |···········◆ 0.148
//! ```
//!
//! The bar `|` is the limit, the diamond the value, and a double line the band of an estimate. The scale starts at 0 and
//! is linear; where value and limit lie far apart it is logarithmic, and starts at a power of ten.

use crate::quantity::display::format_number;
use crate::syntax::Margin;
use unicode_width::UnicodeWidthStr;

/// The value's mark.
pub const POINTER: char = '◆';
/// The limit's mark.
pub const LIMIT: char = '|';
const BAND: char = '═';
const EMPTY: char = '·';
/// Cells of the bar.
const MOST_CELLS: usize = 44;
const FEWEST_CELLS: usize = 12;
/// Value and limit further apart than this are shown on a logarithmic scale.
const LINEAR_RATIO: f64 = 20.0;

/// The scale of a margin, at most `width` columns wide where that leaves the bar its fewest cells. `None` where value or
/// limit is no finite number.
pub fn line(margin: &Margin, width: usize) -> Option<String> {
    if !margin.value.is_finite() || !margin.limit.is_finite() {
        return None;
    }
    let drawn = |cells: usize| draw(margin, &Axis::of(margin), cells);
    // Which labels stand behind the bar depends on its length, so the longest bar that fits is found by trying.
    let fits = (FEWEST_CELLS..=MOST_CELLS).rev().map(drawn).find(|line| line.width() <= width);
    Some(fits.unwrap_or_else(|| drawn(FEWEST_CELLS)))
}

fn draw(margin: &Margin, axis: &Axis, cells: usize) -> String {
    let said = value_label(margin);
    let limit = in_unit(margin.limit, &margin.unit);
    let mut bar = Bar { cells: vec![EMPTY; cells] };
    if let Some((from, to)) = margin.band.filter(|(from, to)| from.is_finite() && to.is_finite()) {
        bar.fill(axis.cell(from, cells), axis.cell(to, cells));
    }
    let mut value_at = axis.cell(margin.value, cells);
    let mut limit_at = axis.cell(margin.limit, cells);
    if value_at == limit_at {
        // Side by side, in their order.
        match margin.value > margin.limit {
            true if limit_at > 0 => limit_at -= 1,
            true => value_at += 1,
            false if value_at > 0 => value_at -= 1,
            false => limit_at += 1,
        }
    }
    bar.set(limit_at, LIMIT);
    bar.set(value_at, POINTER);

    let mut after: Vec<String> = Vec::new();
    // The value's label stands behind the bar where the value ends it, and in the bar where there is room.
    if value_at + 1 == cells || !(bar.write_right_of(value_at, &said) || bar.write_left_of(value_at, &said)) {
        after.push(said);
    }
    if limit_at + 1 == cells && after.is_empty() {
        after.push(limit);
    } else if !(bar.write_left_of(limit_at, &limit) || bar.write_right_of(limit_at, &limit)) {
        after.push(format!("limit {limit}"));
    }
    let mut line = [margin.quantity.as_str(), "  ", &format_number(axis.low), " "].concat();
    line.extend(bar.cells);
    for (at, label) in after.iter().enumerate() {
        line.push_str(if at == 0 { " " } else { ", " });
        line.push_str(label);
    }
    line
}

fn value_label(margin: &Margin) -> String {
    let value = in_unit(margin.value, &margin.unit);
    match margin.band.filter(|(from, to)| from.is_finite() && to.is_finite()) {
        Some((from, to)) => format!("{value} ({} to {})", format_number(from), format_number(to)),
        None => value,
    }
}

fn in_unit(value: f64, unit: &str) -> String {
    let number = format_number(value);
    if unit.is_empty() { number } else { format!("{number} {unit}") }
}

/// What the ends of the bar stand for.
struct Axis {
    low: f64,
    high: f64,
    logarithmic: bool,
}

impl Axis {
    fn of(margin: &Margin) -> Axis {
        let band = margin.band.filter(|(from, to)| from.is_finite() && to.is_finite());
        let marks = [Some(margin.value), Some(margin.limit), band.map(|band| band.0), band.map(|band| band.1)];
        let least = marks.iter().flatten().copied().fold(f64::INFINITY, f64::min);
        let most = marks.iter().flatten().copied().fold(f64::NEG_INFINITY, f64::max);
        if least > 0.0 && most / least > LINEAR_RATIO {
            // At least a third of a decade below the least mark, so that it does not stand at the very end.
            let low = 10_f64.powf((least.log10() - 0.3).floor()).max(f64::MIN_POSITIVE);
            return Axis { low, high: most, logarithmic: true };
        }
        Axis { low: least.min(0.0), high: most.max(0.0), logarithmic: false }
    }

    fn cell(&self, value: f64, cells: usize) -> usize {
        let part = if self.logarithmic {
            (value.log10() - self.low.log10()) / (self.high.log10() - self.low.log10())
        } else {
            (value - self.low) / (self.high - self.low)
        };
        let last = cells.saturating_sub(1);
        if part.is_finite() { ((part.clamp(0.0, 1.0) * last as f64).round() as usize).min(last) } else { 0 }
    }
}

struct Bar {
    cells: Vec<char>,
}

impl Bar {
    fn set(&mut self, at: usize, mark: char) {
        if let Some(cell) = self.cells.get_mut(at) {
            *cell = mark;
        }
    }

    fn fill(&mut self, from: usize, to: usize) {
        for at in from..=to {
            self.set(at, BAND);
        }
    }

    /// Writes a label, with a space on either side, into the empty cells from `from` on; false where it does not fit.
    fn write(&mut self, from: usize, label: &str) -> bool {
        let text: Vec<char> = std::iter::once(' ').chain(label.chars()).chain([' ']).collect();
        let Some(cells) = self.cells.get_mut(from..from + text.len()) else { return false };
        if label.width() + 2 != text.len() || cells.iter().any(|cell| *cell != EMPTY) {
            return false;
        }
        cells.copy_from_slice(&text);
        true
    }

    fn write_right_of(&mut self, at: usize, label: &str) -> bool {
        self.write(at + 1, label)
    }

    fn write_left_of(&mut self, at: usize, label: &str) -> bool {
        at.checked_sub(label.chars().count() + 2).is_some_and(|from| self.write(from, label))
    }
}

#[allow(clippy::unwrap_used, clippy::panic)]
#[cfg(test)]
mod tests {
    use super::*;

    fn margin(value: f64, limit: f64, band: Option<(f64, f64)>, unit: &str) -> Margin {
        Margin { quantity: "αΔT".to_string(), value, limit, band, unit: unit.to_string() }
    }

    fn shown(value: f64, limit: f64, band: Option<(f64, f64)>, unit: &str) -> String {
        line(&margin(value, limit, band, unit), 60).unwrap()
    }

    #[test]
    fn scales() {
        insta::assert_snapshot!(
            [
                shown(0.148, 0.1, None, ""),
                shown(0.05, 0.1, None, ""),
                shown(0.1002, 0.1, None, ""),
                shown(0.0999, 0.1, None, ""),
                shown(0.148, 0.1, Some((0.12, 0.19)), ""),
                shown(0.148, 0.1, Some((0.09, 0.19)), ""),
                shown(0.01, 0.1, None, ""),
                shown(3.2, 1.5, None, "mm"),
                shown(4.1e9, 1e6, None, ""),
                shown(12.0, 4.1e9, None, ""),
                shown(-4.0, 2.0, None, "K"),
                shown(-4.0, -8.0, None, "K"),
                shown(0.0, 0.0, None, ""),
                shown(1e300, 1e-300, None, ""),
                shown(0.2, 0.1, Some((f64::NAN, f64::INFINITY)), ""),
            ]
            .join("\n")
        );
    }

    #[test]
    fn nothing_is_drawn_of_what_is_no_number() {
        for (value, limit) in [(f64::NAN, 0.1), (0.1, f64::NAN), (f64::INFINITY, 0.1), (0.1, f64::NEG_INFINITY)] {
            assert_eq!(line(&margin(value, limit, None, ""), 60), None);
        }
    }

    #[test]
    fn value_and_limit_stand_in_their_order_at_any_width() {
        for width in [0, 20, 40, 60, 80, 200] {
            for value in [-1e9, -1.0, -1e-9, 0.0, 1e-9, 0.0999, 0.1, 0.1001, 0.2, 1.0, 3.0, 1e9] {
                for limit in [-2.0, 0.0, 0.1, 5.0, 1e6] {
                    let drawn = line(&margin(value, limit, None, "K"), width).unwrap();
                    let (pointer, mark) = (drawn.find(POINTER).unwrap(), drawn.find(LIMIT).unwrap());
                    assert_eq!(value > limit, pointer > mark, "{value} {limit} {width}: {drawn}");
                    assert!(width < 60 || drawn.width() <= width, "{drawn}");
                    assert!(!drawn.contains('\n'));
                }
            }
        }
    }
}
