//! Templates and breakpoints.

use helmsplit_model::Input;

use super::Reader;
use crate::document::{Kind, Node};
use crate::finding::Finding;
use crate::manoeuvre::{
    Breakpoint, TEMPLATES, TemplateKind, TemplateUse, input_from_name, input_row,
};
use crate::nearest;

/// Name of the list of templates.
const TEMPLATES_NAME: &str = "templates";

impl Reader<'_> {
    /// Reads a list of the manoeuvre; false when there is none of that name.
    pub(super) fn manoeuvre_field(&mut self, name: &str, node: &Node) -> bool {
        if name == TEMPLATES_NAME {
            self.templates(node);
        } else if let Some(input) = input_from_name(name) {
            self.breakpoints(input, node);
        } else {
            return false;
        }
        true
    }

    fn breakpoints(&mut self, input: Input, node: &Node) {
        let row = input_row(input);
        let Kind::List(elements) = &node.kind else {
            self.wrong_kind(row.path, node, "a list of breakpoints in square brackets");
            return;
        };
        let mut points = Vec::new();
        for (place, element) in elements.iter().enumerate() {
            let path = format!("{}[{place}]", row.path);
            if let Some((time, value)) = self.pair(&path, element) {
                let point = Breakpoint::from_texts(&path, row, &time, &value);
                points.extend(self.take(point, element.span.start));
            }
        }
        *self.scenario.manoeuvre.free_mut(input) = points;
    }

    fn templates(&mut self, node: &Node) {
        let path = format!("manoeuvre.{TEMPLATES_NAME}");
        let Kind::List(elements) = &node.kind else {
            self.wrong_kind(&path, node, "a list of templates in square brackets");
            return;
        };
        for (place, element) in elements.iter().enumerate() {
            let path = format!("{path}[{place}]");
            self.places.insert(path.clone(), element.span.start);
            if let Some(template) = self.template(&path, element) {
                self.scenario.manoeuvre.templates.push(template);
            }
        }
    }

    fn template(&mut self, path: &str, node: &Node) -> Option<TemplateUse> {
        let Some(fields) = node.fields() else {
            self.wrong_kind(
                path,
                node,
                "a template such as (kind: \"wheel step\", at: \"3 s\")",
            );
            return None;
        };
        let mut template = TemplateUse::new(self.template_kind(path, node)?);
        for field in fields.iter().filter(|field| field.key.text != "kind") {
            let name = field.key.text.as_str();
            let field_path = format!("{path}.{name}");
            if let Some(text) = self.quantity_text(&field_path, &field.value) {
                let known = template.value(name).is_some();
                let result = template.set(path, name, &text);
                let at = if known {
                    field.value.span.start
                } else {
                    field.key.span.start
                };
                self.take(result, at);
            }
        }
        Some(template)
    }

    fn template_kind(&mut self, path: &str, node: &Node) -> Option<TemplateKind> {
        let keys = || TEMPLATES.iter().map(|template| template.key);
        let all = || format!("templates: {}", keys().collect::<Vec<_>>().join(", "));
        let path = format!("{path}.kind");
        let Some(kind) = node.get("kind") else {
            let finding = Finding::error(path, "the kind of template is missing", all());
            self.push_at(finding, node.span.start);
            return None;
        };
        let Some(key) = kind.text() else {
            self.wrong_kind(&path, kind, "the name of a template in quotes");
            return None;
        };
        let found = TemplateKind::from_key(key);
        if found.is_none() {
            let hint = match nearest(key, keys()) {
                Some(near) => format!("did you mean \"{near}\"?"),
                None => all(),
            };
            let finding = Finding::error(path, "there is no such template", hint).with_value(key);
            self.push_at(finding, kind.span.start);
        }
        found
    }
}
