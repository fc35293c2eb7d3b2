//! The manoeuvre: what is done to the circuit over time.
//!
//! Each input follows its free breakpoints; a template writes a stretch of its own among them,
//! from the value that the input has where it begins. An input without any stays at its level.

mod edit;
mod expand;
mod inputs;
mod line;
mod points_text;
mod template;
mod template_table;

use helmsplit_model::{Input, InputProfiles};

use crate::UnitSystem;
use crate::finding::{Finding, Findings};
use crate::value::Value;

pub use inputs::{INPUTS, InputRow, input_from_name, input_row};
pub use line::{Line, LinePoint, Origin, Span};
pub(crate) use points_text::{pairs_from_text, pairs_text};
pub use template::{Template, TemplateParameter, TemplateUse};
pub use template_table::{TEMPLATES, TemplateKind};

/// A free breakpoint: a time and the value of the input then. Between breakpoints the input runs
/// in a straight line; a repeated time is a jump.
#[derive(Debug, Clone, PartialEq)]
pub struct Breakpoint {
    /// Time.
    pub time: Value,
    /// Value of the input.
    pub value: Value,
}

impl Breakpoint {
    /// A breakpoint from two texts, such as `1 s` and `900 rpm`. `path` names it in findings.
    ///
    /// # Errors
    /// A finding when a text does not read or is not allowed.
    pub(crate) fn from_texts(
        path: &str,
        row: &InputRow,
        time: &str,
        value: &str,
    ) -> Result<Self, Finding> {
        Ok(Self {
            time: inputs::time_value(path, time)?,
            value: inputs::input_value(path, row, value)?,
        })
    }
}

/// Inputs over time, as the user writes them.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Manoeuvre {
    /// Ready manoeuvres, in their order.
    pub templates: Vec<TemplateUse>,
    free: [Vec<Breakpoint>; Input::ALL.len()],
}

impl Manoeuvre {
    /// The free breakpoints of an input.
    #[must_use]
    pub fn free(&self, input: Input) -> &[Breakpoint] {
        &self.free[input as usize]
    }

    /// The free breakpoints of an input, to edit.
    pub fn free_mut(&mut self, input: Input) -> &mut Vec<Breakpoint> {
        &mut self.free[input as usize]
    }

    /// Replaces the free breakpoints of an input by texts such as `("1 s", "900 rpm")`.
    ///
    /// # Errors
    /// A finding that names the first point that does not read; nothing is changed then. Order
    /// is checked by [`Manoeuvre::profiles`].
    pub fn set_free(&mut self, input: Input, points: &[(&str, &str)]) -> Result<(), Finding> {
        let row = input_row(input);
        let read = |(place, (time, value)): (usize, &(&str, &str))| {
            Breakpoint::from_texts(&format!("{}[{place}]", row.path), row, time, value)
        };
        let points = points
            .iter()
            .enumerate()
            .map(read)
            .collect::<Result<Vec<_>, _>>()?;
        self.free[input as usize] = points;
        Ok(())
    }

    /// All inputs over time, SI.
    ///
    /// # Errors
    /// Findings for breakpoints out of order and templates that do not fit in.
    pub fn profiles(&self) -> Result<InputProfiles, Findings> {
        let mut findings = Findings::default();
        let mut profiles = InputProfiles::default();
        for row in &INPUTS {
            match self.line(row) {
                Ok(line) => match line.profile() {
                    Ok(profile) => profiles.set(row.input, profile),
                    Err(error) => findings.push(Finding::error(row.path, error.to_string(), "")),
                },
                Err(more) => findings.extend(more),
            }
        }
        if findings.is_empty() {
            Ok(profiles)
        } else {
            Err(findings)
        }
    }

    /// Whether anything moves the input.
    #[must_use]
    pub fn moves(&self, input: Input) -> bool {
        !self.free(input).is_empty()
            || self
                .templates
                .iter()
                .any(|t| t.kind.template().drives == input)
    }

    pub(crate) fn rewrite_units(&mut self, system: UnitSystem) {
        for (points, row) in self.free.iter_mut().zip(&INPUTS) {
            for point in points {
                let unit = crate::convert::input_unit(row, system);
                point.value = point.value.in_unit(unit);
            }
        }
        for template in &mut self.templates {
            template.rewrite_units(system);
        }
    }
}

#[cfg(test)]
mod tests;
