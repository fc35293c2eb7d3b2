//! A quantity as the circuit file holds it: its SI value and the text as written.

use helmsplit_model::Quantity;

use crate::finding::Finding;
use crate::parameter::Range;
use crate::quantity_text::{self, Digits, text_from_si};
use crate::units::Unit;

/// A quantity with its text.
#[derive(Debug, Clone)]
pub struct Value {
    si: f64,
    /// As written; empty when the number was set in SI and nobody has asked for a text.
    text: String,
    unit: &'static Unit,
}

/// Two values are equal when their SI numbers are the same bits; spelling does not count.
impl PartialEq for Value {
    fn eq(&self, other: &Self) -> bool {
        self.si.to_bits() == other.si.to_bits()
    }
}

/// Range of a value, in a unit of its own.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Allowed {
    pub(crate) range: Range,
    pub(crate) unit: &'static Unit,
}

impl Value {
    /// Reads a text. `path` names the field in findings.
    ///
    /// # Errors
    /// The finding says what is wrong with the text and what would do.
    pub(crate) fn from_text(path: &str, text: &str, quantity: Quantity) -> Result<Self, Finding> {
        match quantity_text::parse(text, quantity) {
            Ok(parsed) => Ok(Self {
                si: parsed.si,
                text: text.trim().to_owned(),
                unit: parsed.unit,
            }),
            Err(error) => {
                Err(Finding::error(path, error.to_string(), error.hint()).with_value(text))
            }
        }
    }

    /// A number in SI that will be written in `unit`.
    #[must_use]
    pub fn from_si(si: f64, unit: &'static Unit) -> Self {
        Self {
            si,
            text: String::new(),
            unit,
        }
    }

    /// The value in SI.
    #[must_use]
    pub fn si(&self) -> f64 {
        self.si
    }

    /// The unit it is written in.
    #[must_use]
    pub fn unit(&self) -> &'static Unit {
        self.unit
    }

    /// The text as written; for a number set in SI the shortest text that reads back to it.
    #[must_use]
    pub fn text(&self) -> String {
        if self.text.is_empty() {
            text_from_si(self.si, self.unit, Digits::Exact)
        } else {
            self.text.clone()
        }
    }

    /// The same value written in another unit of its kind.
    #[must_use]
    pub fn in_unit(&self, unit: &'static Unit) -> Self {
        if unit == self.unit {
            return self.clone();
        }
        Self::from_si(self.si, unit)
    }

    /// Checks that the value is allowed.
    ///
    /// # Errors
    /// The finding names the range.
    pub(crate) fn within(self, path: &str, allowed: &Allowed) -> Result<Self, Finding> {
        let number = allowed.unit.value_from_si(self.si);
        if allowed.range.contains(number) {
            return Ok(self);
        }
        let hint = format!("allowed: {}", range_text(&allowed.range, allowed.unit));
        let side = if number > allowed.range.high {
            "too large"
        } else {
            "too small"
        };
        let message = if number.is_nan() {
            "not a number"
        } else {
            side
        };
        Err(Finding::error(path, message, hint).with_value(&self.text()))
    }
}

/// A range in words: `above 0, up to 50 mm`.
pub(crate) fn range_text(range: &Range, unit: &Unit) -> String {
    let number = |value: f64| {
        // Limits of the table are short decimals: what `Display` prints is what was typed.
        let odd = value != 0.0 && !(1e-4..1e6).contains(&value.abs());
        if odd {
            format!("{value:e}")
        } else {
            format!("{value}")
        }
    };
    let (low, high) = (number(range.low), number(range.high));
    let space = if unit.is_bare() {
        String::new()
    } else {
        format!(" {unit}")
    };
    if range.low_open {
        format!("above {low}, up to {high}{space}")
    } else {
        format!("{low} to {high}{space}")
    }
}
