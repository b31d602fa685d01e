//! Gathers the temperatures that a fluid can reach and keeps the lowest and the highest.

use crate::case::model::{Boundary, Case, Region, Value};
use crate::physics::correlations::Correlation;
use crate::physics::model::{Bound, Bracket};
use crate::quantity::display::format_si;
use crate::syntax::Place;
use crate::vocabulary::statements::TEMPERATURE;

/// A temperature that the fluid can reach.
#[derive(Clone, Copy, Debug)]
pub struct Candidate<'a> {
    /// K.
    pub value: f64,
    /// Its band, K.
    pub band: (f64, f64),
    /// What sets it.
    pub by: By<'a>,
    /// Where in the deck.
    pub place: Option<Place>,
    /// The literal, where a given temperature is one.
    pub literal: Option<Place>,
    /// How it was estimated.
    pub estimate: Option<How>,
}

/// What sets a temperature.
#[derive(Clone, Copy, Debug)]
pub enum By<'a> {
    /// A boundary's own temperature.
    Boundary(&'a Boundary),
    /// What enters at a boundary.
    Inflow(&'a Boundary),
    /// What comes back in at a boundary.
    Backflow(&'a Boundary),
    /// What lies outside a boundary.
    Outside(&'a Boundary),
    /// The ambient air.
    Ambient,
    /// The initial state.
    Initial,
    /// A boundary by its flux.
    Flux(&'a Boundary),
    /// A boundary by its power.
    Power(&'a Boundary),
    /// A boundary by the heat that passes through it.
    Passing(&'a Boundary),
    /// The fluid by its heat balance.
    Fluid(&'a Region),
    /// What rises over a source.
    Plume(&'a str),
}

/// How a temperature was estimated.
#[derive(Clone, Copy, Debug)]
pub struct How {
    /// The method, as the start of a sentence.
    pub method: &'static str,
    /// The correlation, where one was used.
    pub correlation: Option<&'static Correlation>,
    /// Whether it was used within its published range.
    pub is_inside_range: bool,
    /// Temperature of the properties, K.
    pub film: f64,
    /// Whether the substance's data hold there.
    pub holds: bool,
    /// Whether the solution converged.
    pub converged: bool,
    /// Whether radiation between walls was counted in.
    pub has_radiation: bool,
}

/// The lowest and highest candidates so far.
#[derive(Clone, Copy, Debug, Default)]
pub struct Reach<'a> {
    lowest: Option<Candidate<'a>>,
    highest: Option<Candidate<'a>>,
}

impl<'a> Reach<'a> {
    /// Takes in a candidate. One without a value is passed over.
    pub fn add(&mut self, candidate: Candidate<'a>) {
        if !candidate.value.is_finite() {
            return;
        }
        if self.lowest.is_none_or(|lowest| candidate.value < lowest.value) {
            self.lowest = Some(candidate);
        }
        if self.highest.is_none_or(|highest| candidate.value > highest.value) {
            self.highest = Some(candidate);
        }
    }

    /// Takes in a temperature as given.
    pub fn add_given(&mut self, value: &Value, by: By<'a>) {
        self.add(Candidate {
            value: value.si,
            band: (value.si, value.si),
            by,
            place: Some(value.origin.place),
            literal: value.origin.literal,
            estimate: None,
        });
    }

    /// The bracket, in words; `None` where there was no candidate.
    pub fn bracket(&self, case: &Case) -> Option<Bracket> {
        Some(Bracket { lowest: bound(case, self.lowest.as_ref()?), highest: bound(case, self.highest.as_ref()?) })
    }
}

fn bound(_case: &Case, candidate: &Candidate<'_>) -> Bound {
    let name = |boundary: &Boundary| boundary.name.text.clone();
    let set_by = match candidate.by {
        By::Boundary(boundary) => format!("boundary {}", name(boundary)),
        By::Inflow(boundary) => format!("what enters at boundary {}", name(boundary)),
        By::Backflow(boundary) => format!("the backflow at boundary {}", name(boundary)),
        By::Outside(boundary) => format!("the surroundings of boundary {}", name(boundary)),
        By::Ambient => "the ambient temperature".into(),
        By::Initial => "the initial temperature".into(),
        By::Flux(boundary) => format!("boundary {} by its flux", name(boundary)),
        By::Power(boundary) => format!("boundary {} by its power", name(boundary)),
        By::Passing(boundary) => format!("boundary {} by the heat that passes through it", name(boundary)),
        By::Fluid(region) => format!("the fluid of {} by its heat balance", region.name.text),
        By::Plume(source) => format!("the plume over source {source}"),
    };
    let (low, high) = candidate.band;
    let value = candidate.value;
    Bound {
        value,
        // Where an edge could not be solved, the value stands for it.
        band: (
            if low.is_finite() { low.min(value) } else { value },
            if high.is_finite() { high.max(value) } else { value },
        ),
        set_by,
        place: candidate.place,
        estimate: candidate.estimate.as_ref().map(How::text),
        literal: candidate.literal,
    }
}

impl How {
    /// As a sentence without its full stop.
    fn text(&self) -> String {
        let mut text = self.method.to_string();
        if let Some(correlation) = self.correlation {
            text.push_str(&format!(", with the Nusselt number of: {} ({})", correlation.name, correlation.source));
        }
        if self.has_radiation {
            text.push_str(", with radiation between the surfaces (emissivity 0.9 where none is stated)");
        }
        if self.film.is_finite() {
            text.push_str(&format!(", properties at {}", format_si(self.film, TEMPERATURE)));
        }
        if !self.holds {
            text.push_str(", which is outside the range of the substance's data: those at its nearer end were taken");
        }
        if self.correlation.is_some() && !self.is_inside_range {
            text.push_str("; outside the published range of the correlation");
        }
        if !self.converged {
            text.push_str("; the solution did not converge");
        }
        text
    }
}
