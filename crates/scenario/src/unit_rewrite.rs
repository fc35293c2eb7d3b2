//! Other units for a circuit file, in place: its comments and its layout stay.

use helmsplit_model::Quantity;

use crate::UnitSystem;
use crate::convert::{display_unit, input_unit, unit_in_system};
use crate::document::{Document, Node};
use crate::finding::Findings;
use crate::land_table;
use crate::manoeuvre::{INPUTS, TemplateKind};
use crate::parameter::ParameterId;
use crate::scenario::Scenario;
use crate::units::Unit;
use crate::value::Value;
use crate::write::{Edit, replace_values, text_literal};

/// The text of a circuit file with every quantity in the units of `system`.
///
/// Values keep every bit; comments, order and spacing stay as they are. Times of breakpoints
/// stay in the unit they were written in.
///
/// # Errors
/// The findings of reading the file when any of them is an error.
pub fn convert_units(document: &Document, system: UnitSystem) -> Result<String, Findings> {
    let (scenario, findings) = Scenario::from_document(document);
    if scenario.is_none() {
        return Err(findings);
    }
    let mut rewriter = Rewriter {
        system,
        edits: Vec::new(),
    };
    for section in document.root().fields().unwrap_or(&[]) {
        for field in section.value.fields().unwrap_or(&[]) {
            let path = format!("{}.{}", section.key.text, field.key.text);
            rewriter.field(&path, &field.value);
        }
    }
    // Nodes of one tree never overlap.
    let text = replace_values(document.source(), rewriter.edits);
    Ok(text.unwrap_or_else(|error| unreachable!("nodes lie side by side: {error}")))
}

struct Rewriter {
    system: UnitSystem,
    edits: Vec<Edit>,
}

impl Rewriter {
    fn field(&mut self, path: &str, node: &Node) {
        if let Some(id) = ParameterId::from_path(path) {
            let row = id.parameter();
            self.quantity(node, row.quantity, display_unit(row, self.system));
        } else if path == land_table::PATH {
            let units = [Quantity::Length, Quantity::Area].map(|q| (q, self.system.unit(q)));
            for pair in node.elements().unwrap_or(&[]) {
                for (member, (quantity, unit)) in pair.elements().unwrap_or(&[]).iter().zip(units) {
                    self.quantity(member, quantity, unit);
                }
            }
        } else if let Some(row) = INPUTS.iter().find(|row| row.path == path) {
            for pair in node.elements().unwrap_or(&[]) {
                if let Some([_, value]) = pair.elements() {
                    self.quantity(value, row.quantity, input_unit(row, self.system));
                }
            }
        } else if path == "manoeuvre.templates" {
            for template in node.elements().unwrap_or(&[]) {
                self.template(template);
            }
        }
    }

    fn template(&mut self, node: &Node) {
        let kind = node
            .get("kind")
            .and_then(Node::text)
            .and_then(TemplateKind::from_key);
        for row in kind.map_or(&[][..], |kind| kind.template().parameters) {
            if let Some(value) = node.get(row.name) {
                let unit = unit_in_system(row.quantity, row.unit(), self.system);
                self.quantity(value, row.quantity, unit);
            }
        }
    }

    /// A bare number has no unit to change.
    fn quantity(&mut self, node: &Node, quantity: Quantity, unit: &'static Unit) {
        let Some(text) = node.text() else {
            return;
        };
        // The file was read before: every quantity in it reads.
        if let Ok(value) = Value::from_text("", text, quantity)
            && value.unit() != unit
        {
            let text = value.in_unit(unit).text();
            self.edits.push((node.span.clone(), text_literal(&text)));
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const TEXT: &str = "( // my circuit
    format: 1,
    pump: (displacement: /* as measured */ \"20 cm3/rev\"), // gear pump
    valve: (
        land: \"table\",
        fixed_orifice_diameter: \"3.67 mm\", // drilled
        table: [(\"0 mm\", \"0 mm2\"), (\"4 mm\", \"90 mm2\")],
    ),
    manoeuvre: (
        templates: [(kind: \"kerb strike\", force: \"20 kN\")],
        engine_speed: [(\"0 s\", \"900 rpm\"), (\"1 s\", \"2400 rpm\")],
    ),
)
";

    fn converted(text: &str, system: UnitSystem) -> String {
        let document = Document::from_text("a.ron", text).unwrap();
        convert_units(&document, system).unwrap()
    }

    #[test]
    fn comments_stay_and_values_keep_every_bit() {
        let us = converted(TEXT, UnitSystem::Us);
        for part in [
            "// my circuit",
            "/* as measured */",
            "// drilled",
            "in3/rev",
            " in2\"",
            " lbf\"",
        ] {
            assert!(us.contains(part), "{part} in\n{us}");
        }
        let (before, _) = Scenario::from_text("a.ron", TEXT);
        for system in UnitSystem::ALL {
            let text = converted(TEXT, system);
            let (after, findings) = Scenario::from_text("a.ron", &text);
            assert_eq!(after, before, "{system:?}: {findings}");
            assert_eq!(
                converted(&text, UnitSystem::Metric),
                TEXT,
                "{system:?} and back"
            );
        }
    }

    #[test]
    fn a_file_with_errors_is_left_alone() {
        let document = Document::from_text("a.ron", "(pump: (displacement: \"20 mm\"))").unwrap();
        let findings = convert_units(&document, UnitSystem::Us).unwrap_err();
        assert!(findings.has_errors(), "{findings}");
    }
}
