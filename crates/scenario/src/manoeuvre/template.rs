//! Templates: ready manoeuvres with a few numbers of their own.

use helmsplit_model::{Input, Quantity};

use super::TemplateKind;
use crate::UnitSystem;
use crate::finding::Finding;
use crate::nearest;
use crate::parameter::Range;
use crate::quantity_text;
use crate::units::{Unit, si_unit};
use crate::value::{Allowed, Value};

/// One template.
#[derive(Debug)]
pub struct Template {
    /// Its identity.
    pub kind: TemplateKind,
    /// How the circuit file spells it.
    pub key: &'static str,
    /// What a person calls it.
    pub label: &'static str,
    /// What it does, in one sentence.
    pub note: &'static str,
    /// The input that it drives.
    pub drives: Input,
    /// Its numbers; `at` is the first of each.
    pub parameters: &'static [TemplateParameter],
}

/// One number of a template.
#[derive(Debug)]
pub struct TemplateParameter {
    /// Its name in the circuit file.
    pub name: &'static str,
    /// What a person calls it.
    pub label: &'static str,
    /// Kind of quantity.
    pub quantity: Quantity,
    /// Default; its unit is the preferred metric unit.
    pub default: &'static str,
    /// What is allowed, in the unit of the default.
    pub allowed: Range,
    /// Meaning in one sentence.
    pub note: &'static str,
}

impl TemplateParameter {
    /// Its preferred metric unit.
    #[must_use]
    pub fn unit(&self) -> &'static Unit {
        quantity_text::parse(self.default, self.quantity)
            .map_or_else(|_| si_unit(self.quantity), |parsed| parsed.unit)
    }

    fn default_value(&self) -> Value {
        // A test holds that every default reads.
        Value::from_text(self.name, self.default, self.quantity)
            .unwrap_or_else(|_| Value::from_si(0.0, si_unit(self.quantity)))
    }
}

/// A template with its numbers, as it stands in a manoeuvre.
#[derive(Debug, Clone, PartialEq)]
pub struct TemplateUse {
    /// Which template.
    pub kind: TemplateKind,
    values: Vec<Value>,
}

impl TemplateUse {
    /// The template with its default numbers.
    #[must_use]
    pub fn new(kind: TemplateKind) -> Self {
        let rows = kind.template().parameters;
        Self {
            kind,
            values: rows.iter().map(TemplateParameter::default_value).collect(),
        }
    }

    /// The number called `name` in SI; `None` when the template has no such number.
    #[must_use]
    pub fn si(&self, name: &str) -> Option<f64> {
        self.value(name).map(Value::si)
    }

    /// The number called `name`.
    #[must_use]
    pub fn value(&self, name: &str) -> Option<&Value> {
        self.values.get(self.place(name)?)
    }

    fn place(&self, name: &str) -> Option<usize> {
        self.kind
            .template()
            .parameters
            .iter()
            .position(|row| row.name == name)
    }

    /// Every number with its row.
    pub fn numbers(&self) -> impl Iterator<Item = (&'static TemplateParameter, &Value)> {
        self.kind.template().parameters.iter().zip(&self.values)
    }

    /// Sets a number from text. `path` names the template in findings, such as
    /// `manoeuvre.templates[0]`.
    ///
    /// # Errors
    /// A finding when there is no such number, or the text does not read or is not allowed.
    pub fn set(&mut self, path: &str, name: &str, text: &str) -> Result<(), Finding> {
        let rows = self.kind.template().parameters;
        let field = format!("{path}.{name}");
        let Some(place) = self.place(name) else {
            let names: Vec<_> = rows.iter().map(|row| row.name).collect();
            let hint = match nearest(name, names.iter().copied()) {
                Some(near) => format!("did you mean {near}?"),
                None => format!("it has {}", names.join(", ")),
            };
            let message = format!("the template \"{}\" has no such field", self.kind.key());
            return Err(Finding::error(field, message, hint));
        };
        let row = &rows[place];
        let allowed = Allowed {
            range: row.allowed,
            unit: row.unit(),
        };
        self.values[place] =
            Value::from_text(&field, text, row.quantity)?.within(&field, &allowed)?;
        Ok(())
    }

    /// Puts the begin, the first number of each template.
    pub(super) fn set_begin(&mut self, begin: Value) {
        self.values[0] = begin;
    }

    pub(crate) fn rewrite_units(&mut self, system: UnitSystem) {
        for (value, row) in self.values.iter_mut().zip(self.kind.template().parameters) {
            let unit = crate::convert::unit_in_system(row.quantity, row.unit(), system);
            *value = value.in_unit(unit);
        }
    }
}
