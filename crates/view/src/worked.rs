//! A step of a sizing as a formula with its numbers, and the whole as text.

use helmsplit_model::Quantity;
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_study::Measure;
use helmsplit_study::sizing::{Change, Comparison, Sizing, Step};

use crate::table::{Column, TextTable};

/// Digits of numbers that a reader puts into a calculator.
const DIGITS: Digits = Digits::Significant(5);

/// A measure as text in a unit system; counts and ratios of a formula stand as bare numbers.
fn text(measure: Measure, units: UnitSystem) -> String {
    text_from_si(measure.si, units.unit(measure.quantity), DIGITS)
}

/// A value of a step in the unit of the parameter that it goes into.
fn value_text(step: &Step, si: f64, units: UnitSystem) -> String {
    let unit = match step.writes {
        Some(id) => display_unit(id.parameter(), units),
        None => units.unit(step.result.quantity),
    };
    text_from_si(si, unit, DIGITS)
}

/// The formula with the numbers in the places of its symbols: quantities keep their units, so it
/// can be worked by hand in any.
#[must_use]
pub fn worked_formula(step: &Step, units: UnitSystem) -> String {
    let number = |symbol: &str| {
        let term = step.terms.iter().find(|term| term.symbol == symbol)?;
        let text = text(term.value, units);
        let bare = matches!(term.value.quantity, Quantity::Count);
        Some(if bare { text } else { format!("({text})") })
    };
    let mut out = String::new();
    let mut word = String::new();
    // A closing blank hands over the last word.
    for character in step.formula.chars().chain([' ']) {
        let goes_on = character.is_ascii_alphanumeric() || character == '_';
        if goes_on && (!word.is_empty() || character.is_ascii_alphabetic()) {
            word.push(character);
            continue;
        }
        if !word.is_empty() {
            out.push_str(&number(&word).unwrap_or_else(|| word.clone()));
            word.clear();
        }
        out.push(character);
    }
    out.truncate(out.trim_end().len());
    out
}

/// What a step found, what is beside it, and what is taken: one row a step.
#[must_use]
pub fn sizing_table(sizing: &Sizing, units: UnitSystem) -> TextTable {
    let mut table = TextTable::new(vec![
        Column::left("step"),
        Column::left(""),
        Column::right("result"),
        Column::right("taken"),
        Column::left("usual"),
        Column::wrapped("what"),
    ]);
    for step in &sizing.steps {
        let taken = if step.writes.is_some() || step.chosen.to_bits() != step.result.si.to_bits() {
            value_text(step, step.chosen, units)
        } else {
            String::new()
        };
        table.push([
            step.id.to_owned(),
            step.symbol.to_owned(),
            value_text(step, step.result.si, units),
            taken,
            usual_word(step).to_owned(),
            step.label.to_owned(),
        ]);
    }
    table
}

fn usual_word(step: &Step) -> &'static str {
    match (step.usual, step.is_usual()) {
        (None, _) => "",
        (Some(_), true) => "yes",
        (Some(_), false) => "NO",
    }
}

/// Every step with formula, numbers, standard sizes, usual range and source.
#[must_use]
pub fn worked_steps(sizing: &Sizing, units: UnitSystem) -> String {
    let mut out = String::new();
    for step in &sizing.steps {
        let result = value_text(step, step.result.si, units);
        out.push_str(&format!("\n{}: {}\n", step.id, step.label));
        out.push_str(&format!("  {} = {}\n", step.symbol, step.formula));
        let pad = " ".repeat(step.symbol.len());
        out.push_str(&format!("  {pad} = {}\n", worked_formula(step, units)));
        out.push_str(&format!("  {pad} = {result}\n"));
        for term in &step.terms {
            let value = text(term.value, units);
            out.push_str(&format!("      {} = {value}, {}\n", term.symbol, term.name));
        }
        if let Some(offer) = &step.offer {
            let one = |size: Option<f64>| {
                size.map_or_else(|| "none".to_owned(), |si| value_text(step, si, units))
            };
            out.push_str(&format!(
                "  sizes    {} below, {} above ({})\n",
                one(offer.below),
                one(offer.above),
                offer.series.source()
            ));
        }
        if let Some(id) = step.writes {
            let taken = value_text(step, step.chosen, units);
            out.push_str(&format!("  taken    {} = {taken}\n", id.parameter().path));
        }
        if let Some((low, high)) = step.usual {
            let (low, high) = (value_text(step, low, units), value_text(step, high, units));
            let word = if step.is_usual() { "" } else { ": NOT usual" };
            out.push_str(&format!("  usual    {low} to {high}{word}\n"));
        }
        if !step.note.is_empty() {
            out.push_str(&format!("  note     {}\n", step.note));
        }
        out.push_str(&format!("  source   {}\n", step.source));
    }
    out
}

/// Changes of parameters: path, before, after.
#[must_use]
pub fn change_table(changes: &[Change], units: UnitSystem) -> TextTable {
    let mut table = TextTable::new(vec![
        Column::left("parameter"),
        Column::right("before"),
        Column::right("after"),
        Column::right("change"),
    ]);
    for change in changes {
        let row = change.id.parameter();
        let show = |si: f64| text_from_si(si, display_unit(row, units), DIGITS);
        let ratio = change.to / change.from;
        let share = if ratio.is_finite() && ratio > 0.0 {
            format!("{:+.1} %", 100.0 * (ratio - 1.0))
        } else {
            String::new()
        };
        table.push([
            row.path.to_owned(),
            show(change.from),
            show(change.to),
            share,
        ]);
    }
    table
}

/// What the hand formulas say against what the full model gives.
#[must_use]
pub fn comparison_table(comparisons: &[Comparison], units: UnitSystem) -> TextTable {
    let mut table = TextTable::new(vec![
        Column::left("figure"),
        Column::right("by hand"),
        Column::right("full model"),
        Column::right("difference"),
        Column::wrapped("note"),
    ]);
    for one in comparisons {
        let simulated = one.simulated.as_ref();
        let difference = simulated
            .ok()
            .filter(|_| one.predicted.si.abs() > 0.0)
            .map(|&si| format!("{:+.1} %", 100.0 * (si / one.predicted.si - 1.0)));
        let note = match simulated {
            Ok(_) => one.note.to_owned(),
            Err(missing) => missing.to_string(),
        };
        let quantity = one.predicted.quantity;
        table.push([
            one.label.to_owned(),
            text(one.predicted, units),
            simulated.map_or_else(
                |_missing| String::new(),
                |&si| text(Measure::new(si, quantity), units),
            ),
            difference.unwrap_or_default(),
            note,
        ]);
    }
    table
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::Scenario;
    use helmsplit_study::sizing::{Demand, size};

    fn sizing() -> Sizing {
        let scenario = Scenario::default();
        size(&scenario, &Demand::of(&scenario)).unwrap()
    }

    #[test]
    fn formulas_carry_their_numbers_with_units() {
        let sizing = sizing();
        let worked = |id: &str, units| worked_formula(sizing.step(id).unwrap(), units);
        assert_eq!(
            worked("displacement", UnitSystem::Metric),
            "(500 cm3) / 4",
            "quantities in brackets, counts bare"
        );
        assert_eq!(
            worked("set-flow", UnitSystem::Metric),
            "(125 cm3/rev) * (120 rpm)",
            "both units"
        );
        let si = worked("fixed-orifice", UnitSystem::Si);
        assert!(
            si.starts_with("sqrt(4 * (0.00025 m3/s) / (pi * 0.61"),
            "{si}"
        );
    }

    #[test]
    fn no_symbol_is_left_without_its_number() {
        let sizing = sizing();
        for step in &sizing.steps {
            let worked = worked_formula(step, UnitSystem::Metric);
            for term in &step.terms {
                let left = worked
                    .split(|c: char| !(c.is_ascii_alphanumeric() || c == '_'))
                    .any(|word| word == term.symbol && word != "d" && word.len() > 1);
                assert!(!left, "{} is left in {worked}", term.symbol);
            }
        }
    }

    #[test]
    fn tables_hold_a_row_for_each_step() {
        let sizing = sizing();
        let table = sizing_table(&sizing, UnitSystem::Metric).to_text(120);
        let steps = worked_steps(&sizing, UnitSystem::Metric);
        for step in &sizing.steps {
            assert!(table.contains(step.id), "{}", step.id);
            assert!(steps.contains(step.source), "{}", step.id);
        }
    }
}
