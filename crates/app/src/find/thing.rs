//! What can be found, with what it shows now and what Enter does.

use helmsplit_scenario::choice::{CHOICES, Choice, Condition};
use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::quantity_text::{Digits, number_from_si};
use helmsplit_scenario::{Parameter, Scenario, UnitSystem, parameters};
use helmsplit_study::{Check, CheckId};
use helmsplit_view::plot::Figure;

use super::commands::commands;
use crate::action::Action;
use crate::document::Document;
use crate::parts::Part;
use crate::settings::Settings;
use crate::spot::Spot;
use crate::text::{check_name, measure, real_minus, unit_label};

/// Digits of a value in the list.
const DIGITS: u32 = 7;

/// Where things are looked for.
pub(crate) struct Findable<'a> {
    pub(crate) document: &'a Document,
    pub(crate) checks: &'a [Check],
    pub(crate) figure: &'a Figure,
    pub(crate) settings: &'a Settings,
}

/// One thing.
#[derive(Debug, Clone)]
pub(crate) struct Thing {
    pub(super) label: String,
    /// Empty where it has none.
    pub(super) symbol: &'static str,
    /// Path in the circuit file; empty where it has none.
    pub(super) path: &'static str,
    /// The part, or the kind of thing.
    pub(super) group: String,
    /// Value with unit, option or state.
    pub(super) shown: String,
    /// What it means.
    pub(super) note: String,
    /// Whether it counts in the present circuit.
    pub(super) in_use: bool,
    /// What Enter does.
    pub(super) action: Action,
}

/// Everything that can be found: the circuit from shaft to tank, verdicts, traces, commands.
pub(crate) fn things(findable: &Findable<'_>) -> Vec<Thing> {
    let scenario = findable.document.scenario();
    let units = findable.settings.units;
    let choices = CHOICES.iter().map(|row| choice(row, scenario));
    let rows = parameters().iter();
    let rows = rows.map(|row| parameter(row, scenario, units));
    let verdicts = CheckId::ALL
        .into_iter()
        .map(|id| verdict(id, findable.checks, units));
    let panels = findable.figure.panels.iter().map(|panel| {
        let names: Vec<_> = panel
            .series
            .iter()
            .map(|series| series.label.as_str())
            .collect();
        Thing {
            note: format!("Lines: {}.", names.join(", ")),
            shown: panel.unit.clone(),
            ..plain(
                &panel.label,
                "Trace",
                Action::ShowTrace(panel.label.clone()),
            )
        }
    });
    choices
        .chain(rows)
        .chain(verdicts)
        .chain(panels)
        .chain(commands(findable))
        .collect()
}

/// A thing without symbol, path and value.
pub(super) fn plain(label: &str, group: &str, action: Action) -> Thing {
    Thing {
        label: label.to_owned(),
        symbol: "",
        path: "",
        group: group.to_owned(),
        shown: String::new(),
        note: String::new(),
        in_use: true,
        action,
    }
}

fn part_label(path: &str) -> &'static str {
    Part::of(path).map_or("", |part| part.label)
}

fn parameter(row: &'static Parameter, scenario: &Scenario, units: UnitSystem) -> Thing {
    let spot = Spot::Parameter(row.id);
    let base = Thing {
        symbol: row.symbol,
        path: row.path,
        note: row.note.to_owned(),
        ..plain(row.label, part_label(row.path), Action::GoTo(spot))
    };
    if let Some(missing) = missing(row.when, scenario) {
        return unused(base, missing);
    }
    let unit = display_unit(row, units);
    let number = number_from_si(scenario.si(row.id), unit, Digits::Significant(DIGITS));
    let shown = format!("{} {}", real_minus(&number), unit_label(unit));
    Thing {
        shown: shown.trim_end().to_owned(),
        ..base
    }
}

fn choice(row: &'static Choice, scenario: &Scenario) -> Thing {
    let options: Vec<_> = row.options.iter().map(|option| option.label).collect();
    let base = Thing {
        path: row.path,
        note: format!("{} One of: {}.", row.note, options.join(", ")),
        ..plain(
            row.label,
            part_label(row.path),
            Action::GoTo(Spot::Choice(row.id)),
        )
    };
    if let Some(missing) = missing(row.when, scenario) {
        return unused(base, missing);
    }
    let at = usize::from(scenario.option(row.id));
    Thing {
        shown: row.options[at].label.to_owned(),
        ..base
    }
}

/// The condition that keeps something out of use: the outermost that the user can meet now.
fn missing(conditions: &'static [Condition], scenario: &Scenario) -> Option<&'static Condition> {
    let unmet = conditions
        .iter()
        .find(|condition| !scenario.meets(std::slice::from_ref(condition)))?;
    let above = missing(unmet.choice.choice().when, scenario);
    Some(above.unwrap_or(unmet))
}

/// A thing that the present choices leave out leads to the choice that would bring it in.
fn unused(base: Thing, missing: &Condition) -> Thing {
    let choice = missing.choice.choice();
    let options = missing.any_of.iter();
    let options: Vec<_> = options
        .map(|&option| choice.options[usize::from(option)].label)
        .collect();
    Thing {
        shown: "not in use".to_owned(),
        note: format!(
            "{} In use with {}: {}. Enter leads to that choice.",
            base.note,
            choice.label,
            options.join(" or ")
        ),
        in_use: false,
        action: Action::GoTo(Spot::Choice(missing.choice)),
        ..base
    }
}

fn verdict(id: CheckId, checks: &[Check], units: UnitSystem) -> Thing {
    let check = checks.iter().find(|check| check.id == id);
    let shown = check.map_or_else(String::new, |check| {
        let figure = check.figure.map(|figure| measure(figure, units, 3) + ", ");
        format!("{}{}", figure.unwrap_or_default(), check.status.word())
    });
    let name = check_name(id);
    let mut letters = name.chars();
    let first = letters.next().map(char::to_uppercase);
    let label: String = first.into_iter().flatten().chain(letters).collect();
    Thing {
        shown,
        note: id.label().to_owned(),
        ..plain(&label, "Verdict", Action::Evidence(id))
    }
}

#[cfg(test)]
pub(super) mod tests {
    use super::*;
    use helmsplit_scenario::PRESETS;

    pub(in super::super) fn of_the_orchard_carrier() -> Vec<Thing> {
        let document = Document::from_preset(&PRESETS[0]).unwrap();
        things(&Findable {
            document: &document,
            checks: &[],
            figure: &Figure::default(),
            settings: &Settings::default(),
        })
    }

    #[test]
    fn what_is_not_in_use_leads_to_a_choice_that_is() {
        let document = Document::from_preset(&PRESETS[0]).unwrap();
        let things = of_the_orchard_carrier();
        let unused: Vec<_> = things
            .iter()
            .filter(|thing| !thing.in_use && !thing.path.is_empty())
            .collect();
        assert!(unused.len() > 10, "the carrier does not use everything");
        for thing in unused {
            let Action::GoTo(Spot::Choice(id)) = thing.action else {
                panic!("{} leads to {:?}", thing.path, thing.action);
            };
            assert!(
                document.scenario().uses_choice(id),
                "{} leads to {}, which is on no card now",
                thing.path,
                id.choice().path
            );
        }
    }

    #[test]
    fn values_stand_in_the_units_of_the_window() {
        let document = Document::from_preset(&PRESETS[0]).unwrap();
        let settings = Settings {
            units: UnitSystem::Us,
            ..Settings::default()
        };
        let things = things(&Findable {
            document: &document,
            checks: &[],
            figure: &Figure::default(),
            settings: &settings,
        });
        let orifice = things
            .iter()
            .find(|thing| thing.path == "valve.fixed_orifice_diameter");
        let shown = &orifice.unwrap().shown;
        assert!(shown.ends_with(" in"), "{shown}");
    }
}
