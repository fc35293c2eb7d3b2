//! Names of undo steps for edits of lists.

use helmsplit_model::Input;
use helmsplit_scenario::manoeuvre::{Breakpoint, TemplateUse, input_row};
use helmsplit_scenario::{Scenario, Value};

use super::edit::ListTarget;

impl ListTarget {
    /// The change from `before` to `after` in words, such as
    /// `steering wheel rate, point 3: 2 s, 60 rpm to 2.2 s, 80 rpm`.
    #[must_use]
    pub fn step_name(self, before: &Scenario, after: &Scenario) -> String {
        let lines = (&before.manoeuvre, &after.manoeuvre);
        match self {
            Self::Point(input, place) => {
                let text = |points: &[Breakpoint]| points.get(place).map(point_text);
                let (from, to) = (text(lines.0.free(input)), text(lines.1.free(input)));
                let label = line_name(input);
                format!("{label}, point {}: {}", place + 1, from_to(from, to))
            }
            Self::Points(input) => {
                let label = line_name(input);
                let change = changed(lines.0.free(input), lines.1.free(input), point_text);
                format!("{label}, point {change}")
            }
            Self::Number(place, name) => {
                let text = |templates: &[TemplateUse]| {
                    let value = templates.get(place).and_then(|t| t.value(name));
                    value.map(Value::text)
                };
                let (from, to) = (text(&lines.0.templates), text(&lines.1.templates));
                let template = lines.1.templates.get(place);
                let label = template.and_then(|template| {
                    let mut rows = template.kind.template().parameters.iter();
                    rows.find(|row| row.name == name).map(|row| row.label)
                });
                let kind = template.map_or("template", |template| template.kind.key());
                let label = label.unwrap_or(name).to_lowercase();
                format!("{kind}, {label}: {}", from_to(from, to))
            }
            Self::Templates => templates_change(&lines.0.templates, &lines.1.templates),
            Self::Dissolved(place) => {
                let name = lines.0.templates.get(place).map(template_text);
                let name = name.unwrap_or_else(|| "template".to_owned());
                match lines.0.templates.len() - lines.1.templates.len() {
                    0 | 1 => format!("{name} turned into breakpoints"),
                    2 => format!("{name} and one ahead of it turned into breakpoints"),
                    n => format!("{name} and {} ahead of it turned into breakpoints", n - 1),
                }
            }
            Self::Land(place) => {
                let text =
                    |scenario: &Scenario| scenario.land_table().points.get(place).map(land_text);
                let change = from_to(text(before), text(after));
                format!("table of the land, point {}: {change}", place + 1)
            }
            Self::LandPoints => {
                let (from, to) = (before.land_table(), after.land_table());
                let change = changed(&from.points, &to.points, land_text);
                format!("table of the land, point {change}")
            }
        }
    }
}

/// The name of a line within a sentence.
pub(crate) fn line_name(input: Input) -> String {
    input_row(input).label.to_lowercase()
}

fn point_text(point: &Breakpoint) -> String {
    format!("{}, {}", point.time.text(), point.value.text())
}

fn land_text((travel, area): &(Value, Value)) -> String {
    format!("{}, {}", travel.text(), area.text())
}

fn template_text(template: &TemplateUse) -> String {
    let at = template.value("at").map(Value::text).unwrap_or_default();
    format!("{} at {at}", template.kind.key())
}

fn from_to(from: Option<String>, to: Option<String>) -> String {
    let text = |text: Option<String>| text.unwrap_or_else(|| "none".to_owned());
    format!("{} to {}", text(from), text(to))
}

/// `3 added: 2 s, 60 rpm` or `3 removed: ...`, from the first place where the lists differ; the
/// last of those that were added.
fn changed<T: PartialEq>(before: &[T], after: &[T], text: fn(&T) -> String) -> String {
    let (longer, word) = if after.len() > before.len() {
        (after, "added")
    } else {
        (before, "removed")
    };
    let more = before.len().abs_diff(after.len());
    let same = before.iter().zip(after).take_while(|(a, b)| a == b).count();
    let place = (same + more.max(1) - 1).min(longer.len().saturating_sub(1));
    let text = longer.get(place).map(text).unwrap_or_default();
    format!("{} {word}: {text}", place + 1)
}

fn templates_change(before: &[TemplateUse], after: &[TemplateUse]) -> String {
    let differs = |place: &usize| before.get(*place) != after.get(*place);
    if before.len() == after.len() {
        let mut places = (0..before.len()).filter(differs);
        let mut name = || {
            let template = places.next().and_then(|place| before.get(place));
            template.map_or("template", |template| template.kind.key())
        };
        let first = name();
        return format!("{first} exchanged with {}", name());
    }
    let (longer, word) = if after.len() > before.len() {
        (after, "added")
    } else {
        (before, "removed")
    };
    let place = (0..longer.len()).find(differs).unwrap_or(0);
    let name = longer.get(place).map(template_text).unwrap_or_default();
    format!("{name} {word}")
}
