//! From a scenario to the text of a circuit file.

use helmsplit_model::{Input, Quantity};

use crate::choice::{CHOICES, Choice};
use crate::land_table;
use crate::manoeuvre::{INPUTS, TemplateUse};
use crate::migrate;
use crate::parameter::{Parameter, parameters};
use crate::read::sections;
use crate::scenario::Scenario;
use crate::value::{Value as Number, range_text};
use crate::write::{Entry, Value, emit};

/// Head of a written file.
const HEAD: &str = "A Helmsplit circuit. Quantities are texts with a unit, such as \"3.7 mm\"; any \
unit of\nthe right kind will do. Left out values take the defaults of docs/circuit-file.md.";

impl Scenario {
    /// The circuit file: every value that is used, and those that are not but were changed.
    /// With `comments`, each line says what it means and what is usual.
    ///
    /// Reading it back gives an equal scenario.
    #[must_use]
    pub fn to_text(&self, comments: bool) -> String {
        let mut root = Vec::new();
        if comments {
            root.push(Entry::Comment(HEAD.to_owned()));
        }
        root.push(Entry::field(migrate::KEY, Value::Integer(migrate::FORMAT)));
        root.push(Entry::field("name", Value::text(&self.name)));
        if !self.notes.is_empty() {
            root.push(Entry::field("notes", Value::text(&self.notes)));
        }
        for section in sections() {
            let entries = self.section_entries(section, comments);
            if !entries.is_empty() {
                if comments {
                    root.push(Entry::Blank);
                }
                root.push(Entry::field(section, Value::Section(entries)));
            }
        }
        // Every key stands in our own tables, and a test emits them all.
        emit(&root).unwrap_or_else(|error| unreachable!("keys of the tables are valid: {error}"))
    }

    fn section_entries(&self, section: &str, comments: bool) -> Vec<Entry> {
        let mut entries = Vec::new();
        for choice in CHOICES.iter().filter(|choice| choice.section() == section) {
            let changed = self.option(choice.id) != choice.default;
            if self.uses_choice(choice.id) || changed {
                entries.push(self.choice_entry(choice, comments));
            }
        }
        if section == "start"
            && let Some(state) = &self.start_state
        {
            entries.push(Entry::field("state", Value::text(state)));
        }
        for row in parameters().iter().filter(|row| row.section() == section) {
            if self.uses(row.id) || !self.is_default(row.id) {
                entries.push(self.parameter_entry(row, comments));
            }
        }
        match section {
            "valve" => entries.extend(self.table_entry()),
            "manoeuvre" => entries.extend(self.manoeuvre_entries()),
            _ => {}
        }
        entries
    }

    fn choice_entry(&self, choice: &Choice, comments: bool) -> Entry {
        let value = Value::text(self.option_key(choice.id));
        if comments {
            let keys: Vec<_> = choice.options.iter().map(|option| option.key).collect();
            Entry::commented(choice.name(), value, keys.join(" | "))
        } else {
            Entry::field(choice.name(), value)
        }
    }

    fn parameter_entry(&self, row: &Parameter, comments: bool) -> Entry {
        let text = self.value(row.id).text();
        let value = match (row.quantity, text.parse()) {
            (Quantity::Count, Ok(number)) => Value::Integer(number),
            _ => Value::text(text),
        };
        if !comments {
            return Entry::field(row.name(), value);
        }
        let symbol = if row.symbol.is_empty() {
            String::new()
        } else {
            format!(" ({})", row.symbol)
        };
        let usual = range_text(&row.usual, row.unit());
        let comment = format!("{}{symbol}; usual {usual}", within_line(row.label));
        Entry::commented(row.name(), value, comment)
    }

    fn table_entry(&self) -> Option<Entry> {
        use crate::choice::ValveLand;
        let wanted = self.chosen::<ValveLand>() == ValveLand::Table
            || self.land_table != land_table::LandTable::default();
        wanted.then(|| {
            let points = self
                .land_table
                .points
                .iter()
                .map(|(z, a)| pair(z, a))
                .collect();
            Entry::field(
                crate::choice::name_of(land_table::PATH),
                Value::List(points),
            )
        })
    }

    fn manoeuvre_entries(&self) -> Vec<Entry> {
        let mut entries = Vec::new();
        for row in &INPUTS {
            let points = self.manoeuvre.free(row.input);
            if !points.is_empty() {
                let points = points.iter().map(|p| pair(&p.time, &p.value)).collect();
                entries.push(Entry::field(row.name(), Value::List(points)));
            }
        }
        if !self.manoeuvre.templates.is_empty() {
            let templates = self
                .manoeuvre
                .templates
                .iter()
                .map(template_value)
                .collect();
            entries.push(Entry::field("templates", Value::List(templates)));
        }
        debug_assert!(INPUTS.len() == Input::ALL.len(), "every input is written");
        entries
    }
}

fn pair(first: &Number, second: &Number) -> Value {
    Value::Tuple(vec![Value::text(first.text()), Value::text(second.text())])
}

fn template_value(template: &TemplateUse) -> Value {
    let mut fields = vec![("kind".to_owned(), Value::text(template.kind.key()))];
    for (row, value) in template.numbers() {
        fields.push((row.name.to_owned(), Value::text(value.text())));
    }
    Value::Inline(fields)
}

/// A label within a line: without its capital, unless it begins with a name or an abbreviation.
fn within_line(label: &str) -> String {
    let mut letters = label.chars();
    let first = letters.next();
    let abbreviation = letters.clone().next().is_some_and(char::is_uppercase);
    let name = ["Coulomb", "Stribeck"]
        .iter()
        .any(|name| label.starts_with(name));
    match first {
        Some(first) if !abbreviation && !name => first.to_lowercase().chain(letters).collect(),
        _ => label.to_owned(),
    }
}
