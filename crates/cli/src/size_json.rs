//! A sizing for machines.

use helmsplit_scenario::UnitSystem;
use helmsplit_study::Measure;
use helmsplit_study::sizing::{Change, Comparison, Step};
use helmsplit_view::worked_formula;
use serde::Serialize;

use crate::commands::Sized;
use crate::exit::Failure;
use crate::report_json::{Number, number, parameter_number};

/// Layout of the report.
const FORMAT: u32 = 1;

#[derive(Serialize)]
struct Report<'a> {
    format: u32,
    version: &'static str,
    circuit: &'a str,
    steps: Vec<StepNote<'a>>,
    changes: Vec<ChangeNote>,
    comparisons: Vec<ComparisonNote>,
    warnings: &'a [String],
}

#[derive(Serialize)]
struct StepNote<'a> {
    id: &'static str,
    label: &'static str,
    symbol: &'static str,
    formula: &'static str,
    worked: String,
    terms: Vec<TermNote>,
    result: Number,
    below: Option<f64>,
    above: Option<f64>,
    series: Option<&'static str>,
    taken: Number,
    usual: Option<(f64, f64)>,
    is_usual: bool,
    parameter: Option<&'static str>,
    note: &'a str,
    source: &'static str,
}

#[derive(Serialize)]
struct TermNote {
    symbol: &'static str,
    name: &'static str,
    #[serde(flatten)]
    number: Number,
}

/// A change of a parameter, in the unit that the parameter is shown in.
#[derive(Serialize)]
pub(crate) struct ChangeNote {
    parameter: &'static str,
    before: Number,
    after: Number,
}

#[derive(Serialize)]
struct ComparisonNote {
    label: &'static str,
    by_hand: Number,
    full_model: Option<Number>,
    missing: Option<String>,
    note: &'static str,
}

/// A change for machines.
pub(crate) fn change_note(change: &Change, units: UnitSystem) -> ChangeNote {
    ChangeNote {
        parameter: change.id.parameter().path,
        before: parameter_number(change.id, change.from, units),
        after: parameter_number(change.id, change.to, units),
    }
}

fn step_note(step: &Step, units: UnitSystem) -> StepNote<'_> {
    let of = |si: f64| match step.writes {
        Some(id) => parameter_number(id, si, units),
        None => number(Measure::new(si, step.result.quantity), units),
    };
    let size = |size: Option<f64>| size.map(|si| of(si).value);
    StepNote {
        id: step.id,
        label: step.label,
        symbol: step.symbol,
        formula: step.formula,
        worked: worked_formula(step, units),
        terms: step
            .terms
            .iter()
            .map(|term| TermNote {
                symbol: term.symbol,
                name: term.name,
                number: number(term.value, units),
            })
            .collect(),
        result: of(step.result.si),
        below: step.offer.and_then(|offer| size(offer.below)),
        above: step.offer.and_then(|offer| size(offer.above)),
        series: step.offer.map(|offer| offer.series.source()),
        taken: of(step.chosen),
        usual: step
            .usual
            .map(|(low, high)| (of(low).value, of(high).value)),
        is_usual: step.is_usual(),
        parameter: step.writes.map(|id| id.parameter().path),
        note: &step.note,
        source: step.source,
    }
}

fn comparison_note(one: &Comparison, units: UnitSystem) -> ComparisonNote {
    let quantity = one.predicted.quantity;
    ComparisonNote {
        label: one.label,
        by_hand: number(one.predicted, units),
        full_model: one
            .simulated
            .as_ref()
            .ok()
            .map(|&si| number(Measure::new(si, quantity), units)),
        missing: one.simulated.as_ref().err().map(ToString::to_string),
        note: one.note,
    }
}

/// The report as JSON text.
pub(crate) fn text(sized: &Sized<'_>, units: UnitSystem) -> Result<String, Failure> {
    let report = Report {
        format: FORMAT,
        version: env!("CARGO_PKG_VERSION"),
        circuit: &sized.scenario.name,
        steps: sized
            .sizing
            .steps
            .iter()
            .map(|step| step_note(step, units))
            .collect(),
        changes: sized
            .changes
            .iter()
            .map(|change| change_note(change, units))
            .collect(),
        comparisons: sized
            .comparisons
            .iter()
            .map(|one| comparison_note(one, units))
            .collect(),
        warnings: &sized.sizing.warnings,
    };
    Ok(format!("{}\n", serde_json::to_string_pretty(&report)?))
}
