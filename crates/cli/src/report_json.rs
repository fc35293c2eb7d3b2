//! The report of a run for machines.

use std::path::PathBuf;

use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::{ParameterId, UnitSystem};
use helmsplit_sim::{Audit, Rest, RunEnd, Statistics};
use helmsplit_study::{Check, Event, Limit, Measure, Solved, Status};
use serde::Serialize;

use crate::exit::Failure;
use crate::input::Loaded;

/// Layout of the report; a reader that knows this number knows the fields.
const FORMAT: u32 = 1;

#[derive(Serialize)]
struct Report<'a> {
    format: u32,
    version: &'static str,
    circuit: &'a str,
    source: &'a str,
    circuit_hash: String,
    end: &'a RunEnd,
    final_time_s: f64,
    elapsed_s: f64,
    start: Option<StartNote>,
    statistics: &'a Statistics,
    audit: Option<&'a Audit>,
    checks: Vec<CheckNote<'a>>,
    events: &'a [Event],
    files: Vec<String>,
}

#[derive(Serialize)]
struct StartNote {
    rest: Rest,
    text: String,
}

#[derive(Serialize)]
pub(crate) struct CheckNote<'a> {
    id: &'static str,
    label: &'static str,
    #[serde(flatten)]
    status: &'a Status,
    figure: Option<Number>,
    at_least: Option<f64>,
    at_most: Option<f64>,
    margin: Option<f64>,
    note: &'a str,
    time_s: Option<f64>,
    column: Option<&'a str>,
    formula: Option<&'static str>,
    operands: Vec<NamedNumber<'a>>,
    source: Option<&'static str>,
}

/// A value in the chosen unit; limits and margin of a check share the unit of its figure.
#[derive(Serialize)]
pub(crate) struct Number {
    pub(crate) value: f64,
    unit: &'static str,
}

#[derive(Serialize)]
struct NamedNumber<'a> {
    name: &'a str,
    #[serde(flatten)]
    number: Number,
}

pub(crate) fn number(measure: Measure, units: UnitSystem) -> Number {
    let unit = units.unit(measure.quantity);
    Number {
        value: unit.value_from_si(measure.si),
        unit: unit.symbol(),
    }
}

/// A value (SI) of a parameter in the unit that the parameter is shown in.
pub(crate) fn parameter_number(id: ParameterId, si: f64, units: UnitSystem) -> Number {
    let unit = display_unit(id.parameter(), units);
    Number {
        value: unit.value_from_si(si),
        unit: unit.symbol(),
    }
}

/// The report as JSON text.
pub(crate) fn report(
    loaded: &Loaded,
    solved: &Solved,
    units: UnitSystem,
    files: &[PathBuf],
) -> Result<String, Failure> {
    let run = &solved.run;
    let report = Report {
        format: FORMAT,
        version: env!("CARGO_PKG_VERSION"),
        circuit: &loaded.scenario.name,
        source: &loaded.source,
        circuit_hash: loaded.scenario.hash(),
        end: &run.end,
        final_time_s: run.final_time,
        elapsed_s: run.elapsed.as_secs_f64(),
        start: run.settled.as_ref().map(|settled| StartNote {
            rest: settled.rest,
            text: settled.to_string(),
        }),
        statistics: &run.statistics,
        audit: run.audit.as_ref(),
        checks: solved.checks.iter().map(|c| note(c, units)).collect(),
        events: &solved.events,
        files: files.iter().map(|f| f.display().to_string()).collect(),
    };
    Ok(format!("{}\n", serde_json::to_string_pretty(&report)?))
}

pub(crate) fn note(check: &Check, units: UnitSystem) -> CheckNote<'_> {
    let unit = check.figure.map(|f| units.unit(f.quantity));
    let shown = |si: f64| unit.map(|u| u.value_from_si(si));
    let (low, high) = match check.limit {
        Some(Limit::AtLeast(low)) => (Some(low), None),
        Some(Limit::AtMost(high)) => (None, Some(high)),
        Some(Limit::Inside(low, high)) => (Some(low), Some(high)),
        None => (None, None),
    };
    let evidence = check.evidence.as_ref();
    CheckNote {
        id: check.id.name(),
        label: check.id.label(),
        status: &check.status,
        figure: check.figure.map(|f| number(f, units)),
        at_least: low.and_then(shown),
        at_most: high.and_then(shown),
        margin: check.margin().and_then(shown),
        note: &check.note,
        time_s: evidence.and_then(|e| e.time),
        column: evidence.and_then(|e| e.column.as_deref()),
        formula: evidence.map(|e| e.formula),
        operands: evidence.map_or_else(Vec::new, |e| {
            e.operands
                .iter()
                .map(|o| NamedNumber {
                    name: &o.name,
                    number: number(o.value, units),
                })
                .collect()
        }),
        source: evidence.map(|e| e.source),
    }
}
