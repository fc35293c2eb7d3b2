//! One step of a sizing: formula, numbers, result, source, and the standard sizes beside it.

use helmsplit_model::Quantity;
use helmsplit_scenario::ParameterId;

use super::sizes::Offer;
use crate::check::Measure;

/// A symbol of a formula with its value.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Term {
    /// As the formula writes it.
    pub symbol: &'static str,
    /// What it is.
    pub name: &'static str,
    /// Its value.
    pub value: Measure,
}

/// One step. Put into the formula, the terms give the result in SI: a test holds that for every
/// step, so a reader can check it by hand.
#[derive(Debug, Clone, PartialEq)]
pub struct Step {
    /// Short unique name: `fixed-orifice`.
    pub id: &'static str,
    /// What is found.
    pub label: &'static str,
    /// Symbol of the result.
    pub symbol: &'static str,
    /// What the result is equal to, in the symbols of `terms`. Where the result itself stands in
    /// it, the equation was solved and can be checked by putting the result in.
    pub formula: &'static str,
    /// Its symbols, in the order of reading.
    pub terms: Vec<Term>,
    /// What the formula gives.
    pub result: Measure,
    /// Standard sizes beside the result, where there is a series.
    pub offer: Option<Offer>,
    /// The value that later steps and the circuit take: the result or a standard size, SI.
    pub chosen: f64,
    /// What is usual, SI.
    pub usual: Option<(f64, f64)>,
    /// Where formula and figures come from.
    pub source: &'static str,
    /// One more thing that a reader should know.
    pub note: String,
    /// The parameter that the chosen value goes into.
    pub writes: Option<ParameterId>,
}

impl Step {
    /// A step without standard sizes that writes nothing.
    pub(crate) fn new(
        id: &'static str,
        label: &'static str,
        symbol: &'static str,
        formula: &'static str,
        result: Measure,
    ) -> Self {
        Self {
            id,
            label,
            symbol,
            formula,
            terms: Vec::new(),
            result,
            offer: None,
            chosen: result.si,
            usual: None,
            source: "",
            note: String::new(),
            writes: None,
        }
    }

    /// Adds a symbol of the formula.
    pub(crate) fn term(
        mut self,
        symbol: &'static str,
        name: &'static str,
        si: f64,
        quantity: Quantity,
    ) -> Self {
        let value = Measure::new(si, quantity);
        self.terms.push(Term {
            symbol,
            name,
            value,
        });
        self
    }

    pub(crate) fn from(mut self, source: &'static str) -> Self {
        self.source = source;
        self
    }

    pub(crate) fn usually(mut self, low: f64, high: f64) -> Self {
        self.usual = Some((low, high));
        self
    }

    pub(crate) fn noted(mut self, note: impl Into<String>) -> Self {
        self.note = note.into();
        self
    }

    /// The chosen value goes into a parameter; its usual range is that of the parameter unless
    /// the step named one.
    pub(crate) fn into_parameter(mut self, id: ParameterId) -> Self {
        self.writes = Some(id);
        if self.usual.is_none() {
            let row = id.parameter();
            let si = |value: f64| row.unit().si_from_value(value);
            self.usual = Some((si(row.usual.low), si(row.usual.high)));
        }
        self
    }

    /// Takes a standard size where `take` is true; else only shows what is near.
    pub(crate) fn offering(mut self, offer: Offer, take: bool) -> Self {
        if take && let Some(size) = offer.pick {
            self.chosen = size;
        }
        self.offer = Some(offer);
        self
    }

    /// Whether the chosen value lies in the usual range; `true` where none is known.
    #[must_use]
    pub fn is_usual(&self) -> bool {
        // Ranges of the table are read in their own unit: give way by a rounding.
        let slack = 1e-12;
        self.usual.is_none_or(|(low, high)| {
            self.chosen >= low - slack * low.abs() && self.chosen <= high + slack * high.abs()
        })
    }
}
