//! What contradicts itself or is doubtful in a scenario, all in one pass.

mod manoeuvre;
mod reliefs;
mod steering;
mod supply;
mod valve;

use helmsplit_model::Quantity;

use crate::finding::{Finding, Findings, Severity};
use crate::parameter::{ParameterId, parameters};
use crate::quantity_text::{Digits, text_from_si};
use crate::scenario::Scenario;
use crate::units::unit;
use crate::value::range_text;

impl Scenario {
    /// Checks how the values go together. Whether each one alone is allowed was checked when it
    /// was set.
    ///
    /// Errors mean that there is no circuit; warnings that a person should look. The findings
    /// carry paths and values, but no places: these are added when a file is read.
    #[must_use]
    pub fn validate(&self) -> Findings {
        let mut findings = Findings::default();
        let out = &mut findings;
        self.check_supply(out);
        self.check_valve(out);
        self.check_reliefs(out);
        self.check_steering(out);
        self.check_cylinders(out);
        self.check_manoeuvre(out);
        self.check_start(out);
        self.check_usual(out);
        findings
    }

    /// Values outside their usual range.
    fn check_usual(&self, out: &mut Findings) {
        for row in parameters() {
            if !self.uses(row.id) {
                continue;
            }
            let number = row.unit().value_from_si(self.si(row.id));
            if !row.usual.contains(number) {
                let hint = format!("usual: {}", range_text(&row.usual, row.unit()));
                out.push(self.warning_at(row.id, "unusual", &hint));
            }
        }
    }

    /// An error about a parameter, with its value.
    pub(crate) fn finding_at(&self, id: ParameterId, message: &str, hint: &str) -> Finding {
        self.about(id, Severity::Error, message, hint)
    }

    /// A warning about a parameter, with its value.
    pub(crate) fn warning_at(&self, id: ParameterId, message: &str, hint: &str) -> Finding {
        self.about(id, Severity::Warning, message, hint)
    }

    fn about(&self, id: ParameterId, severity: Severity, message: &str, hint: &str) -> Finding {
        let path = id.parameter().path;
        let finding = match severity {
            Severity::Error => Finding::error(path, message, hint),
            Severity::Warning => Finding::warning(path, message, hint),
        };
        finding.with_value(&self.value(id).text())
    }

    /// Refuses `low` unless it lies below `high`.
    fn must_lie_below(&self, low: ParameterId, high: ParameterId, why: &str, out: &mut Findings) {
        if self.si(low) < self.si(high) {
            return;
        }
        let above = high.parameter();
        let message = format!(
            "{why}: it must lie below {} ({})",
            above.path,
            self.value(high).text()
        );
        let hint = format!("lower it or raise {}", above.path);
        out.push(self.finding_at(low, &message, &hint));
    }
}

/// A number in SI as text in a named unit, four digits.
pub(crate) fn shown(si: f64, quantity: Quantity, symbol: &str) -> String {
    match unit(quantity, symbol) {
        Some(unit) => text_from_si(si, unit, Digits::Significant(4)),
        None => format!("{si} {}", quantity.si_symbol()),
    }
}

pub(crate) use manoeuvre::STATE_PATH;

#[cfg(test)]
mod tests;
