//! The manoeuvre: what is done to the circuit over time.
//!
//! Each input follows its free breakpoints, then what the templates append in their order. An
//! input without any stays at its level.

mod expand;
mod inputs;
mod template;
mod template_table;

use helmsplit_model::{Input, InputProfiles, Profile, ProfileError};

use crate::UnitSystem;
use crate::finding::{Finding, Findings};
use crate::value::{Allowed, Value};

pub use inputs::{INPUTS, InputRow, input_from_name, input_row};
pub use template::{Template, TemplateParameter, TemplateUse};
pub use template_table::{TEMPLATES, TemplateKind};

use expand::Track;

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
            value: Value::from_text(path, value, row.quantity)?.within(
                path,
                &Allowed {
                    range: row.allowed,
                    unit: row.unit(),
                },
            )?,
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

    /// Turns every template into free breakpoints, so that each point can be edited alone.
    ///
    /// # Errors
    /// As [`Manoeuvre::profiles`]; nothing is changed then.
    pub fn dissolve_templates(&mut self) -> Result<(), Findings> {
        let profiles = self.profiles()?;
        for row in &INPUTS {
            let driven = self
                .templates
                .iter()
                .any(|t| t.kind.template().drives == row.input);
            if driven {
                let second = inputs::second();
                let point = |&(time, value): &(f64, f64)| Breakpoint {
                    time: Value::from_si(time, second),
                    value: Value::from_si(value, row.unit()),
                };
                let points = profiles.get(row.input).points().iter().map(point);
                self.free[row.input as usize] = points.collect();
            }
        }
        self.templates.clear();
        Ok(())
    }

    /// All inputs over time, SI.
    ///
    /// # Errors
    /// Findings for breakpoints out of order and templates that do not fit behind what is there.
    pub fn profiles(&self) -> Result<InputProfiles, Findings> {
        let mut findings = Findings::default();
        let mut tracks: [Track; Input::ALL.len()] =
            std::array::from_fn(|place| self.track(&INPUTS[place]));
        for (place, template) in self.templates.iter().enumerate() {
            let track = &mut tracks[template.kind.template().drives as usize];
            if let Err(finding) = track.append(place, template) {
                findings.push(finding);
            }
        }
        let mut profiles = InputProfiles::default();
        for (row, track) in INPUTS.iter().zip(tracks) {
            match profile(row, track) {
                Ok(profile) => profiles.set(row.input, profile),
                Err(finding) => findings.push(finding),
            }
        }
        if findings.is_empty() {
            Ok(profiles)
        } else {
            Err(findings)
        }
    }

    fn track(&self, row: &InputRow) -> Track {
        let points = self
            .free(row.input)
            .iter()
            .map(|p| (p.time.si(), p.value.si()));
        Track::new(row.level(), points.collect())
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

/// The finished profile of an input.
fn profile(row: &InputRow, track: Track) -> Result<Profile, Finding> {
    let points = track.into_points();
    if points.is_empty() {
        return Ok(Profile::constant(row.level()));
    }
    let shown = |index: usize| {
        points
            .get(index)
            .map_or(String::new(), |(time, _)| format!("{time} s"))
    };
    Profile::new(points.clone()).map_err(|error| {
        let (index, hint) = match error {
            ProfileError::OutOfOrder { index } => (index, "give breakpoints in the order of time"),
            ProfileError::TripleTime { index } => {
                (index, "a jump takes two breakpoints at one time, no more")
            }
            ProfileError::NotFinite { index } => (index, "give finite numbers"),
            ProfileError::Empty => (0, "give at least one breakpoint"),
        };
        Finding::error(format!("{}[{index}]", row.path), error.to_string(), hint)
            .with_value(&shown(index))
    })
}

#[cfg(test)]
mod tests;
