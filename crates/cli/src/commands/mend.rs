//! Finds the smallest changes that meet a failing check.

use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_scenario::{Scenario, UnitSystem, nearest};
use helmsplit_study::figure::{Ask, MAP_CHECKS, RUN_CHECKS};
use helmsplit_study::influence::design_parameters;
use helmsplit_study::mend::{Dropped, Fault, MendError, Mending, Proposal, mend as study};
use helmsplit_study::sizing::{Change, adopt};
use helmsplit_study::{Check, CheckId};
use helmsplit_view::{Column, TextTable};

use super::size::write_adopted;
use crate::exit::{ExitStatus, Failure};
use crate::input::{Loaded, load};
use crate::measure_text::{figure, limit};
use crate::output::print;
use crate::progress::studied;
use crate::study_args::MendArguments;
use crate::study_json;
use crate::typed::parameter;
use crate::verdict::width;

pub(super) fn mend(arguments: &MendArguments) -> Result<ExitStatus, Failure> {
    let loaded = load(&arguments.circuit)?;
    let fault = fault(arguments, &loaded.scenario)?;
    let ask = Ask::of(&loaded.scenario).from_start(loaded.start.clone());
    let (found, cancelled) = studied(|watch| (study(&ask, &fault, watch), watch.is_cancelled()));
    if cancelled {
        return Ok(ExitStatus::Cancelled);
    }
    let found = match found {
        Ok(found) => found,
        Err(MendError::Met(name)) => {
            print(&format!(
                "The check {name} is met already: nothing to mend.\n"
            ))?;
            return Ok(ExitStatus::Done);
        }
        Err(error) => return Err(Failure::Input(error.to_string())),
    };
    let units = arguments.circuit.units;
    let mut text = if arguments.json {
        study_json::mending(&loaded.scenario.name, &found, units)?
    } else {
        report(&loaded, &found, units)
    };
    let Some(best) = found.singles.first().or(found.pair.as_ref()) else {
        print(&text)?;
        return Ok(ExitStatus::CheckFailed);
    };
    if let Some(file) = &arguments.adopt {
        let mut mended = loaded.scenario.clone();
        adopt(&mut mended, &best.changes).map_err(Failure::Finding)?;
        write_adopted(&mended, file, arguments.force)?;
        if !arguments.json {
            text.push_str(&format!("\nWrote {}.\n", file.display()));
        }
    }
    print(&text)?;
    Ok(ExitStatus::Done)
}

fn fault(arguments: &MendArguments, scenario: &Scenario) -> Result<Fault, Failure> {
    let check = check_of(&arguments.check)?;
    let mut parameters = Vec::new();
    for path in &arguments.parameters {
        parameters.push(parameter(path, scenario)?);
    }
    if parameters.is_empty() {
        parameters = design_parameters(scenario);
    }
    let factor = arguments.largest_factor;
    if !(1.01..=100.0).contains(&factor) {
        return Err(Failure::Input(format!(
            "--largest-factor {factor}: write a number from 1.01 to 100"
        )));
    }
    Ok(Fault {
        most: arguments.most,
        largest_ratio: factor,
        ..Fault::new(check, parameters)
    })
}

/// The check of that name.
fn check_of(name: &str) -> Result<CheckId, Failure> {
    let known = || RUN_CHECKS.into_iter().chain(MAP_CHECKS);
    if let Some(id) = known().find(|id| id.name() == name.trim()) {
        return Ok(id);
    }
    let names = || known().map(CheckId::name);
    let hint = match nearest(name, names()) {
        Some(near) => format!("did you mean {near}?"),
        None => format!("checks: {}", names().collect::<Vec<_>>().join(", ")),
    };
    Err(Failure::Input(format!(
        "there is no check \"{name}\" of a circuit; {hint}"
    )))
}

/// Changes in words: `valve.disc_hole_diameter 0.5 mm to 0.45 mm (-10.0 %)`.
fn change_text(changes: &[Change], units: UnitSystem) -> String {
    let one = |change: &Change| {
        let row = change.id.parameter();
        let show = |si: f64| text_from_si(si, display_unit(row, units), Digits::Significant(4));
        format!(
            "{} {} to {} ({:+.1} %)",
            row.path,
            show(change.from),
            show(change.to),
            100.0 * (change.to / change.from - 1.0)
        )
    };
    changes.iter().map(one).collect::<Vec<_>>().join(" and ")
}

/// A check as one reads it: figure, limit, verdict.
fn check_text(check: &Check, units: UnitSystem) -> String {
    let value = figure(check, units);
    let bound = limit(check, units);
    if value.is_empty() {
        check.status.word().to_owned()
    } else {
        format!("{value} ({bound}), {}", check.status.word())
    }
}

fn report(loaded: &Loaded, found: &Mending, units: UnitSystem) -> String {
    let mut text = format!(
        "{} ({})\n{}: {}\n\n",
        loaded.scenario.name,
        loaded.source,
        found.before.id.name(),
        check_text(&found.before, units)
    );
    if found.singles.is_empty() {
        text.push_str("No single change within the range meets the check.\n");
    } else {
        text.push_str("One change, the smallest first; each confirmed by a full run\n");
    }
    for proposal in &found.singles {
        text.push_str(&proposal_text(proposal, units));
    }
    if let Some(pair) = &found.pair {
        text.push_str("\nTwo changes together, smaller than any single one\n");
        text.push_str(&proposal_text(pair, units));
    }
    text.push_str(&dropped_text(&found.dropped, &found.before, units));
    if found.unresolved > 0 {
        text.push_str(&format!(
            "\nLeft out for want of a resolved influence: {}.\n",
            count(found.unresolved)
        ));
    }
    text.push_str("\nNever raise a relief beyond the ratings to meet a check.\n");
    text
}

fn count(dimensions: usize) -> String {
    if dimensions == 1 {
        "1 dimension".to_owned()
    } else {
        format!("{dimensions} dimensions")
    }
}

/// A proposal with what it does to the other checks.
fn proposal_text(proposal: &Proposal, units: UnitSystem) -> String {
    let mut text = format!(
        "\n  {}\n    {}: {}\n",
        change_text(&proposal.changes, units),
        proposal.check.id.name(),
        check_text(&proposal.check, units)
    );
    for effect in proposal.effects.iter().filter(|e| e.is_worse()) {
        let word = if effect.breaks() { "breaks" } else { "costs" };
        text.push_str(&format!(
            "    {word} {}: {} to {}\n",
            effect.before.id.name(),
            figure(&effect.before, units),
            check_text(&effect.after, units)
        ));
    }
    text
}

fn dropped_text(dropped: &[Dropped], check: &Check, units: UnitSystem) -> String {
    if dropped.is_empty() {
        return String::new();
    }
    let mut table = TextTable::new(vec![
        Column::left("tried without success"),
        Column::right("nearest figure"),
        Column::right("at"),
    ]);
    for one in dropped {
        match one {
            Dropped::NotReached {
                parameter,
                value,
                figure: si,
            } => {
                let row = parameter.parameter();
                let mut near = check.clone();
                near.figure = near
                    .figure
                    .map(|f| helmsplit_study::Measure { si: *si, ..f });
                let at = text_from_si(*value, display_unit(row, units), Digits::Significant(4));
                table.push([row.path.to_owned(), figure(&near, units), at]);
            }
            Dropped::NoFigure { parameter } => {
                let none = "no run gave a figure".to_owned();
                table.push([parameter.parameter().path.to_owned(), none, String::new()]);
            }
        }
    }
    format!("\n{}", table.to_text(width()))
}
