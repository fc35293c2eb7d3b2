//! The parameter table, searchable.

use helmsplit_scenario::choice::{CHOICES, Choice};
use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::quantity_text::{Digits, parse, text_from_si};
use helmsplit_scenario::{Parameter, UnitSystem, parameters as rows};
use serde::Serialize;

use crate::args::ParameterArguments;
use crate::exit::{ExitStatus, Failure};
use crate::output::print;

/// Digits of ranges and defaults in other units: as many as a drawing would show.
const DIGITS: Digits = Digits::Significant(5);

pub(super) fn parameters(arguments: &ParameterArguments) -> Result<ExitStatus, Failure> {
    let words: Vec<String> = arguments.search.iter().map(|w| w.to_lowercase()).collect();
    let hit = |fields: &[&str]| {
        let text = fields.join(" ").to_lowercase();
        words.iter().all(|word| text.contains(word))
    };
    let choices: Vec<&Choice> = CHOICES
        .iter()
        .filter(|c| hit(&[c.path, c.label, c.note]))
        .collect();
    let found: Vec<&Parameter> = rows()
        .iter()
        .copied()
        .filter(|p| hit(&[p.path, p.label, p.symbol, p.note]))
        .collect();
    if choices.is_empty() && found.is_empty() {
        return Err(Failure::Input(format!(
            "nothing matches \"{}\"; search fewer words, or list all with `helmsplit parameters`",
            arguments.search.join(" ")
        )));
    }
    let text = if arguments.json {
        let listing = Listing {
            choices: choices.iter().map(|c| ChoiceRow::of(c)).collect(),
            parameters: found
                .iter()
                .map(|p| ParameterRow::of(p, arguments.units))
                .collect(),
        };
        format!("{}\n", serde_json::to_string_pretty(&listing)?)
    } else {
        table(&choices, &found, arguments.units)
    };
    print(&text)?;
    Ok(ExitStatus::Done)
}

#[derive(Serialize)]
struct Listing {
    choices: Vec<ChoiceRow>,
    parameters: Vec<ParameterRow>,
}

#[derive(Serialize)]
struct ChoiceRow {
    path: &'static str,
    label: &'static str,
    options: Vec<&'static str>,
    default: &'static str,
    note: &'static str,
}

impl ChoiceRow {
    fn of(choice: &Choice) -> Self {
        Self {
            path: choice.path,
            label: choice.label,
            options: choice.options.iter().map(|o| o.key).collect(),
            default: choice.options[usize::from(choice.default)].key,
            note: choice.note,
        }
    }
}

#[derive(Serialize)]
struct ParameterRow {
    path: &'static str,
    label: &'static str,
    symbol: &'static str,
    unit: &'static str,
    default: String,
    allowed: String,
    usual: String,
    note: &'static str,
    source: &'static str,
}

impl ParameterRow {
    fn of(row: &Parameter, units: UnitSystem) -> Self {
        let unit = display_unit(row, units);
        let own = row.unit();
        let show = |value: f64| text_from_si(own.si_from_value(value), unit, DIGITS);
        // A test of the table holds that every default reads.
        let default = match parse(row.default, row.quantity) {
            Ok(parsed) if unit.symbol() != own.symbol() => text_from_si(parsed.si, unit, DIGITS),
            _ => row.default.to_owned(),
        };
        let range = |range: &helmsplit_scenario::parameter::Range| {
            format!("{} to {}", show(range.low), show(range.high))
        };
        Self {
            path: row.path,
            label: row.label,
            symbol: row.symbol,
            unit: unit.symbol(),
            default,
            allowed: range(&row.allowed),
            usual: range(&row.usual),
            note: row.note,
            source: row.source,
        }
    }
}

fn table(choices: &[&Choice], found: &[&Parameter], units: UnitSystem) -> String {
    let mut text = String::new();
    for choice in choices {
        let row = ChoiceRow::of(choice);
        text.push_str(&format!("{} = \"{}\"\n", row.path, row.default));
        text.push_str(&format!("    {}: {}\n", row.label, row.options.join(" | ")));
        text.push_str(&format!("    {}\n", row.note));
    }
    for parameter in found {
        let row = ParameterRow::of(parameter, units);
        let symbol = if row.symbol.is_empty() {
            String::new()
        } else {
            format!(" ({})", row.symbol)
        };
        text.push_str(&format!("{} = \"{}\"\n", row.path, row.default));
        text.push_str(&format!(
            "    {}{symbol}; usual {}, allowed {}\n",
            row.label, row.usual, row.allowed
        ));
        text.push_str(&format!("    {}\n", row.note));
    }
    text
}
