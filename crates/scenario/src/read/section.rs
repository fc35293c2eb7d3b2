//! Sections of parameters and choices.

use super::Reader;
use crate::choice::{CHOICES, ChoiceId};
use crate::document::{Field, Kind, Node};
use crate::finding::Finding;
use crate::land_table::{self, LandTable};
use crate::manoeuvre::INPUTS;
use crate::nearest;
use crate::parameter::{ParameterId, parameters};
use crate::value::Value;

/// Path of the state file.
const STATE: &str = crate::validate::STATE_PATH;

/// Every section, in the order of the circuit file.
pub(crate) fn sections() -> impl Iterator<Item = &'static str> {
    let mut names: Vec<&'static str> = Vec::new();
    for row in parameters() {
        if names.last() != Some(&row.section()) {
            names.push(row.section());
        }
    }
    // The prime mover's section stands first even where it has a choice alone.
    names.into_iter()
}

/// Every name that a section knows.
pub(crate) fn known_names(section: &str) -> Vec<&'static str> {
    let choices = CHOICES
        .iter()
        .filter(|c| c.section() == section)
        .map(|c| c.name());
    let rows = parameters()
        .iter()
        .filter(|row| row.section() == section)
        .map(|row| row.name());
    let extras = [land_table::PATH, STATE, "manoeuvre.templates"]
        .into_iter()
        .chain(INPUTS.iter().map(|row| row.path))
        .filter_map(|path| path.split_once('.'))
        .filter(|(home, _)| *home == section)
        .map(|(_, name)| name);
    choices.chain(rows).chain(extras).collect()
}

impl Reader<'_> {
    pub(super) fn section(&mut self, section: &str, node: &Node) {
        let Some(fields) = node.fields() else {
            self.wrong_kind(section, node, "a section in brackets");
            return;
        };
        for field in fields {
            let path = format!("{section}.{}", field.key.text);
            self.places.insert(path.clone(), field.value.span.start);
            self.field(section, &path, field);
        }
    }

    fn field(&mut self, section: &str, path: &str, field: &Field) {
        let node = &field.value;
        if let Some(id) = ParameterId::from_path(path) {
            if let Some(text) = self.quantity_text(path, node) {
                let result = self.scenario.set_text(id, &text);
                self.take(result, node.span.start);
            }
        } else if let Some(id) = ChoiceId::from_path(path) {
            self.choice(id, path, node);
        } else if path == land_table::PATH {
            self.land_table(node);
        } else if path == STATE {
            self.scenario.start_state = self.free_text(path, node);
        } else if section == "manoeuvre" && self.manoeuvre_field(&field.key.text, node) {
            // Taken.
        } else {
            self.unknown_field(section, path, field);
        }
    }

    fn choice(&mut self, id: ChoiceId, path: &str, node: &Node) {
        match &node.kind {
            Kind::Text(key) => {
                let result = self.scenario.choose_key(id, key);
                self.take(result, node.span.start);
            }
            _ => self.wrong_kind(path, node, "one of the options in quotes"),
        }
    }

    fn unknown_field(&mut self, section: &str, path: &str, field: &Field) {
        let key = field.key.text.as_str();
        let names = known_names(section);
        let elsewhere = sections()
            .filter(|other| *other != section)
            .find(|other| known_names(other).contains(&key));
        let hint = match (nearest(key, names.iter().copied()), elsewhere) {
            (Some(near), _) => format!("did you mean {near}?"),
            (None, Some(home)) => format!("did you mean {home}.{key}?"),
            (None, None) => format!("fields of {section}: {}", names.join(", ")),
        };
        let message = format!("{section} has no such field");
        let finding = Finding::error(path, message, hint);
        self.push_at(finding, field.key.span.start);
    }

    fn land_table(&mut self, node: &Node) {
        let Kind::List(elements) = &node.kind else {
            self.wrong_kind(
                land_table::PATH,
                node,
                "a list of points in square brackets",
            );
            return;
        };
        let mut points = Vec::new();
        for (place, element) in elements.iter().enumerate() {
            let path = format!("{}[{place}]", land_table::PATH);
            let Some((travel, area)) = self.pair(&path, element) else {
                continue;
            };
            let (row_z, row_a) = (
                helmsplit_model::Quantity::Length,
                helmsplit_model::Quantity::Area,
            );
            let travel_value = Value::from_text(&path, &travel, row_z);
            let area_value = Value::from_text(&path, &area, row_a);
            let travel = self.take(travel_value, element.span.start);
            let area = self.take(area_value, element.span.start);
            if let (Some(travel), Some(area)) = (travel, area) {
                points.push((travel, area));
            }
        }
        self.scenario.land_table = LandTable { points };
    }

    /// Two texts in brackets, such as `("1 s", "900 rpm")`.
    pub(super) fn pair(&mut self, path: &str, node: &Node) -> Option<(String, String)> {
        self.places.insert(path.to_owned(), node.span.start);
        match node.elements() {
            Some([first, second]) => {
                let first = self.quantity_text(path, first);
                let second = self.quantity_text(path, second);
                // The group, not its second member, is what the path names.
                self.places.insert(path.to_owned(), node.span.start);
                Some((first?, second?))
            }
            _ => {
                self.wrong_kind(path, node, "two quantities in brackets");
                None
            }
        }
    }
}
