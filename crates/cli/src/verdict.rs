//! The verdict table and the evidence, for people.

use std::path::PathBuf;

use helmsplit_scenario::UnitSystem;
use helmsplit_sim::{Balance, RunEnd};
use helmsplit_study::{Check, Event, Solved, Status};
use helmsplit_view::{Column, TextTable};

use crate::input::Loaded;
use crate::measure_text::{figure, limit, measure};

/// Most events that the summary lists; the rest are counted.
const MOST_EVENTS: usize = 12;

/// Width of a table in a file, characters.
const PAGE: usize = 110;

/// Narrowest terminal that tables are set for, characters.
const NARROWEST: usize = 60;

const CAUTIONS: &str = "\
Results support, never replace, tests on the machine, the maker's instructions, local codes and
licensed or competent practice. Not modelled: temperature changes along the circuit, wave travel
inside a line segment, eccentric spools, deformation of bodies, the machine beyond one mass,
spring and friction at the steering cylinder.
";

/// Verdict table, run and files.
pub(crate) fn summary(
    loaded: &Loaded,
    solved: &Solved,
    units: UnitSystem,
    files: &[PathBuf],
) -> String {
    let mut text = head(loaded, solved);
    text.push('\n');
    text.push_str(&table(&solved.checks, units));
    text.push_str(&events_text(&solved.events));
    if !files.is_empty() {
        text.push_str("\nWrote\n");
        for file in files {
            text.push_str(&format!("  {}\n", file.display()));
        }
    }
    text.push('\n');
    text.push_str(CAUTIONS);
    text
}

/// Every check with its evidence.
pub(crate) fn evidence(loaded: &Loaded, solved: &Solved, units: UnitSystem) -> String {
    let mut text = head(loaded, solved);
    for check in &solved.checks {
        text.push('\n');
        text.push_str(&one(check, units));
    }
    text.push('\n');
    text.push_str(CAUTIONS);
    text
}

/// Name, run, audits.
fn head(loaded: &Loaded, solved: &Solved) -> String {
    let run = &solved.run;
    let statistics = &run.statistics;
    let mut text = format!("{}  ({})\n", loaded.scenario.name, loaded.source);
    let end = match &run.end {
        RunEnd::Finished => format!("{} s solved", run.final_time),
        end => end.to_string(),
    };
    text.push_str(&format!(
        "{end} in {:.0} ms: {} steps, {} right-hand sides, {} Jacobians\n",
        run.elapsed.as_secs_f64() * 1e3,
        statistics.steps,
        statistics.rhs_calls,
        statistics.jacobian_calls
    ));
    if let Some(settled) = &run.settled {
        text.push_str(&format!("start: {settled}\n"));
    }
    if let Some(audit) = &run.audit {
        let share = |b: &Balance| format!("{:.1e}", b.relative);
        text.push_str(&format!(
            "audits: volume closes to {}, energy to {} of the turnover\n",
            share(&audit.volume),
            share(&audit.energy)
        ));
    }
    text
}

fn table(checks: &[Check], units: UnitSystem) -> String {
    let mut table = TextTable::new(vec![
        Column::left("check"),
        Column::left("verdict"),
        Column::right("figure"),
        Column::left("limit"),
        Column::right("at"),
        Column::wrapped("note"),
    ]);
    for check in checks {
        let at = check.evidence.as_ref().and_then(|e| e.time);
        let note = match &check.status {
            Status::NotApplicable(reason) => reason.clone(),
            _ => check.note.clone(),
        };
        table.push([
            check.id.name().to_owned(),
            check.status.word().to_owned(),
            figure(check, units),
            limit(check, units),
            at.map_or_else(String::new, |t| format!("{t:.3} s")),
            note,
        ]);
    }
    table.to_text(width())
}

/// Width of the terminal; of a page where the output is no terminal.
pub(crate) fn width() -> usize {
    terminal_size::terminal_size().map_or(PAGE, |(width, _)| usize::from(width.0).max(NARROWEST))
}

fn events_text(events: &[Event]) -> String {
    if events.is_empty() {
        return String::new();
    }
    let mut text = String::from("\nEvents\n");
    for event in events.iter().take(MOST_EVENTS) {
        text.push_str(&format!(
            "  {:>8.3} s  {}\n",
            event.time,
            event.kind.label()
        ));
    }
    if events.len() > MOST_EVENTS {
        text.push_str(&format!("  and {} more\n", events.len() - MOST_EVENTS));
    }
    text
}

fn one(check: &Check, units: UnitSystem) -> String {
    let mut text = format!("{}: {}\n", check.id.name(), check.status.word());
    text.push_str(&format!("  {}\n", check.id.label()));
    if let Status::NotApplicable(reason) = &check.status {
        text.push_str(&format!("  {reason}\n"));
    }
    let (value, bound) = (figure(check, units), limit(check, units));
    if !value.is_empty() {
        text.push_str(&format!("  figure   {value}, {bound}\n"));
    }
    if !check.note.is_empty() {
        text.push_str(&format!("  note     {}\n", check.note));
    }
    let Some(evidence) = &check.evidence else {
        return text;
    };
    if let Some(time) = evidence.time {
        let column = evidence.column.as_deref().unwrap_or("the traces");
        text.push_str(&format!("  look at  {time:.4} s in {column}\n"));
    }
    text.push_str(&format!("  formula  {}\n", evidence.formula));
    for operand in &evidence.operands {
        text.push_str(&format!(
            "           {} = {}\n",
            operand.name,
            measure(operand.value, units)
        ));
    }
    text.push_str(&format!("  source   {}\n", evidence.source));
    text
}
