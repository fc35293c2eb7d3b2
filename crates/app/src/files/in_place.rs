//! A changed circuit in the text it was read from: what did not change stays as it was written,
//! comments and blanks included.
//!
//! The text of the circuit as read and that of the circuit as it is to be are compared field by
//! field; the fields that differ are replaced or added in the source. The result is read again
//! before it is used: if it is not the wanted circuit to the last bit, the file is written anew.

use helmsplit_scenario::choice::CHOICES;
use helmsplit_scenario::document::{Document, Kind, Node};
use helmsplit_scenario::write::{Edit, added_field, replace_values, text_literal};
use helmsplit_scenario::{ParameterId, Scenario};

/// A text to save.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) enum Written {
    /// The source with its changed fields, every comment in its place.
    InPlace(String),
    /// The same, but lists that changed had comments within, which are gone.
    ListsAnew(String),
    /// A fresh text with our own comments.
    Anew(String),
}

impl Written {
    /// The text.
    pub(crate) fn text(self) -> String {
        match self {
            Self::InPlace(text) | Self::ListsAnew(text) | Self::Anew(text) => text,
        }
    }
}

/// The text of a circuit that was read from `source`.
pub(crate) fn written(source: &str, wanted: &Scenario) -> Written {
    let mut lost = false;
    match in_place(source, wanted, &mut lost) {
        Some(text) if reads_as(&text, wanted) && !lost => Written::InPlace(text),
        Some(text) if reads_as(&text, wanted) => Written::ListsAnew(text),
        _ => Written::Anew(wanted.to_text(true)),
    }
}

fn reads_as(text: &str, wanted: &Scenario) -> bool {
    let (scenario, _) = Scenario::from_text("", text);
    scenario.as_ref() == Some(wanted)
}

fn document(text: &str) -> Option<Document> {
    Document::from_text("", text).ok()
}

/// The source with its changed fields; `None` if that is not possible.
fn in_place(source: &str, wanted: &Scenario, lost: &mut bool) -> Option<String> {
    let read = document(source)?;
    let (old, _) = Scenario::from_document(&read);
    let before = document(&old?.to_text(false))?;
    let after = document(&wanted.to_text(false))?;
    let mut edits = Vec::new();
    let mut additions = Vec::new();
    for path in paths(&before, &after) {
        let (was, is) = (before.get(&path), after.get(&path));
        let same = was.map(|node| before.written(node)) == is.map(|node| after.written(node));
        if same {
            continue;
        }
        match (read.get(&path), is) {
            (Some(there), Some(is)) => {
                let change = Change {
                    source: &read,
                    before: &before,
                    after: &after,
                };
                change.of(there, was, is, lost, &mut edits);
            }
            (Some(there), None) => edits.push((there.span.clone(), default_text(&path, wanted)?)),
            (None, Some(is)) if !is_default(&path, wanted) => {
                additions.push((path, after.written(is).to_owned()));
            }
            (None, _) => {}
        }
    }
    let mut text = replace_values(read.source(), edits).ok()?;
    for (path, value) in additions {
        text = with_field(&text, &path, &value)?;
    }
    Some(text)
}

/// Paths of all fields of two texts of ours, in their order: `name`, `valve.stroke`, ...
fn paths(before: &Document, after: &Document) -> Vec<String> {
    let mut paths: Vec<String> = Vec::new();
    for document in [after, before] {
        for field in document.root().fields().unwrap_or(&[]) {
            let key = &field.key.text;
            let inner = match field.value.fields() {
                Some(fields) => fields
                    .iter()
                    .map(|field| format!("{key}.{}", field.key.text))
                    .collect(),
                None => vec![key.clone()],
            };
            paths.extend(inner);
        }
    }
    let mut seen = std::collections::BTreeSet::new();
    paths.retain(|path| seen.insert(path.clone()));
    paths
}

/// Whether a field may be left out.
fn is_default(path: &str, wanted: &Scenario) -> bool {
    let choice = CHOICES.iter().find(|choice| choice.path == path);
    match (ParameterId::from_path(path), choice) {
        (Some(id), _) => wanted.is_default(id),
        (None, Some(choice)) => wanted.option(choice.id) == choice.default,
        (None, None) => false,
    }
}

/// What to write for a field that a fresh text would leave out: its default, or an empty list.
fn default_text(path: &str, wanted: &Scenario) -> Option<String> {
    if let Some(id) = ParameterId::from_path(path) {
        return Some(text_literal(&wanted.value(id).text()));
    }
    if let Some(choice) = CHOICES.iter().find(|choice| choice.path == path) {
        return Some(text_literal(wanted.option_key(choice.id)));
    }
    match path {
        "notes" => Some("\"\"".to_owned()),
        // Nothing stands for no file.
        "start.state" => None,
        _ => Some("[]".to_owned()),
    }
}

/// The text with a new field; a section that is not there comes with it.
fn with_field(text: &str, path: &str, value: &str) -> Option<String> {
    let read = document(text)?;
    let edits = match path.split_once('.') {
        None => added_field(&read, read.root(), path, value),
        Some((section, key)) => match read.get(section) {
            Some(there) => added_field(&read, there, key, value),
            None => {
                let whole = format!("(\n        {key}: {value},\n    )");
                added_field(&read, read.root(), section, &whole)
            }
        },
    };
    replace_values(read.source(), edits.ok()?).ok()
}

/// The three texts of a change.
struct Change<'a> {
    source: &'a Document,
    before: &'a Document,
    after: &'a Document,
}

impl Change<'_> {
    /// The edits that turn the value `there` of the source, which was written `was`, into `is`.
    fn of(
        &self,
        there: &Node,
        was: Option<&Node>,
        is: &Node,
        lost: &mut bool,
        edits: &mut Vec<Edit>,
    ) {
        if let Some(was) = was
            && let Some(parts) = parts(there, was, is)
        {
            for (there, was, is) in parts {
                if self.before.written(was) != self.after.written(is) {
                    self.of(there, Some(was), is, lost, edits);
                }
            }
            return;
        }
        let replaced = self.source.written(there);
        // Texts with such signs in a list are rare, and the price is one word too many.
        let is_list = there.elements().is_some();
        *lost |= is_list && (replaced.contains("//") || replaced.contains("/*"));
        edits.push((there.span.clone(), self.after.written(is).to_owned()));
    }
}

/// A value of the source, what it was and what it is to be.
type Part<'a> = (&'a Node, &'a Node, &'a Node);

/// The parts of three values of one shape, side by side.
fn parts<'a>(there: &'a Node, was: &'a Node, is: &'a Node) -> Option<Vec<Part<'a>>> {
    match (&there.kind, &was.kind, &is.kind) {
        (Kind::List(a), Kind::List(b), Kind::List(c))
        | (Kind::Tuple(a), Kind::Tuple(b), Kind::Tuple(c))
            if a.len() == b.len() && b.len() == c.len() =>
        {
            Some(
                a.iter()
                    .zip(b)
                    .zip(c)
                    .map(|((a, b), c)| (a, b, c))
                    .collect(),
            )
        }
        (Kind::Struct(_), Kind::Struct(b), Kind::Struct(c)) if b.len() == c.len() => {
            let field = |field: &'a helmsplit_scenario::document::Field| {
                let key = &field.key.text;
                Some((there.get(key)?, was.get(key)?, &field.value))
            };
            c.iter().map(field).collect()
        }
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::PRESETS;

    const SOURCE: &str = "// The carrier of row 7
(
    name: \"Row 7\", /* short */
    valve: (
        // drilled by hand
        fixed_orifice_diameter: \"3.67 mm\", // twice measured
        stroke: \"8 mm\"
    ),
    manoeuvre: (
        engine_speed: [
            (\"0 s\", \"900 rpm\"), // idle
            (\"1 s\", \"2400 rpm\"), // governed
        ],
    ),
)
";

    fn read(text: &str) -> Scenario {
        let (scenario, findings) = Scenario::from_text("a.ron", text);
        scenario.unwrap_or_else(|| panic!("{findings}"))
    }

    fn changed(sets: &[(&str, &str)]) -> Written {
        let mut scenario = read(SOURCE);
        for (path, value) in sets {
            scenario.set(path, value).unwrap();
        }
        written(SOURCE, &scenario)
    }

    #[test]
    fn nothing_changed_nothing_rewritten() {
        assert_eq!(
            changed(&[]),
            Written::InPlace(SOURCE.to_owned()),
            "to the byte"
        );
    }

    #[test]
    fn a_changed_value_keeps_every_comment() {
        let sets = [
            ("valve.fixed_orifice_diameter", "3.4 mm"),
            ("name", "Row 8"),
        ];
        let expected = SOURCE
            .replace("3.67 mm", "3.4 mm")
            .replace("Row 7\"", "Row 8\"");
        assert_eq!(changed(&sets), Written::InPlace(expected), "two texts");
    }

    #[test]
    fn new_fields_and_sections_are_added() {
        let sets = [
            ("valve.spring_preload", "180 N"),
            ("oil.temperature", "70 degC"),
            ("priority_relief.kind", "none"),
        ];
        let Written::InPlace(text) = changed(&sets) else {
            panic!("written anew");
        };
        for part in [
            "spring_preload: \"180 N\"",
            "oil: (",
            "// drilled by hand",
            "// idle",
        ] {
            assert!(text.contains(part), "{part} in\n{text}");
        }
    }

    #[test]
    fn a_value_back_at_its_default_is_still_written() {
        let source = "(excess: (kind: \"tank\"), pump: (teeth: 11 /* counted */))";
        let mut scenario = read(source);
        scenario.set("pump.teeth", "12").unwrap();
        let default = Scenario::default();
        let teeth = ParameterId::from_path("pump.teeth").unwrap();
        scenario
            .set_text(teeth, &default.value(teeth).text())
            .unwrap();
        let Written::InPlace(text) = written(source, &scenario) else {
            panic!("written anew");
        };
        assert!(text.contains("/* counted */"), "{text}");
        assert_eq!(read(&text), scenario, "the default");
    }

    #[test]
    fn points_that_move_keep_their_comments_and_new_ones_do_not_vanish_silently() {
        let mut scenario = read(SOURCE);
        let other = read(&SOURCE.replace("2400 rpm", "2200 rpm"));
        scenario.manoeuvre = other.manoeuvre.clone();
        let expected = SOURCE.replace("2400 rpm", "2200 rpm");
        assert_eq!(
            written(SOURCE, &scenario),
            Written::InPlace(expected),
            "moved"
        );
        let longer = SOURCE.replace("// governed", "\n(\"2 s\", \"2500 rpm\"),");
        scenario.manoeuvre = read(&longer).manoeuvre;
        let Written::ListsAnew(text) = written(SOURCE, &scenario) else {
            panic!("comments in the list are gone and nobody says so");
        };
        assert!(text.contains("// twice measured"), "{text}");
        assert_eq!(read(&text), scenario, "all points");
    }

    #[test]
    fn every_preset_turns_into_every_other() {
        for from in PRESETS {
            for to in PRESETS {
                let wanted = to.scenario().unwrap();
                let text = written(from.text, &wanted).text();
                assert_eq!(read(&text), wanted, "{} to {}", from.key, to.key);
            }
        }
    }
}
