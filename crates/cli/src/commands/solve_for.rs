//! Finds the values of a parameter that give a figure its target.

use helmsplit_model::{Circuit, Quantity};
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_study::figure::{Ask, MAP_CHECKS, RUN_CHECKS, Statistic, trace_columns};
use helmsplit_study::solve_for::{Answer, Question, RootKind, solve_for as answer};
use helmsplit_study::{Measure, OperatingPoint};
use helmsplit_view::{Column, TextTable};

use crate::exit::{ExitStatus, Failure};
use crate::input::{Loaded, load};
use crate::measure_text::measure;
use crate::output::{complain, print};
use crate::progress::studied;
use crate::study_args::SolveForArguments;
use crate::study_json;
use crate::typed::{figure, parameter, quantity, quantity_or};
use crate::verdict::width;

/// Digits of a found dimension.
const DIGITS: Digits = Digits::Significant(5);

pub(super) fn solve_for(arguments: &SolveForArguments) -> Result<ExitStatus, Failure> {
    let loaded = load(&arguments.circuit)?;
    let circuit = loaded.scenario.circuit().map_err(Failure::Findings)?;
    if arguments.figures {
        print(&listing(&circuit))?;
        return Ok(ExitStatus::Done);
    }
    let question = question(arguments, &loaded, &circuit)?;
    let ask = ask(&loaded, arguments.at.as_deref())?;
    let found = studied(|watch| answer(&ask, &question, watch));
    if found.cancelled {
        return Ok(ExitStatus::Cancelled);
    }
    let units = arguments.circuit.units;
    let kind = question.figure.quantity(&circuit);
    let text = if arguments.json {
        study_json::answer(&loaded.scenario.name, &question, &found, kind, units)?
    } else {
        report(&loaded, &circuit, &question, &found, units)
    };
    print(&text)?;
    if found.roots.is_empty() {
        complain(&unreached(&question, &found, kind, units));
        return Ok(ExitStatus::BadInput);
    }
    Ok(ExitStatus::Done)
}

/// What figures are asked of: the circuit, and where it is looked at while it rests.
pub(super) fn ask<'a>(loaded: &'a Loaded, at: Option<&str>) -> Result<Ask<'a>, Failure> {
    let ask = Ask::of(&loaded.scenario).from_start(loaded.start.clone());
    let Some(text) = at else {
        return Ok(ask);
    };
    let time = quantity(text, "--at", Quantity::Time)?;
    let point = OperatingPoint::at(&loaded.scenario, time).map_err(Failure::Findings)?;
    Ok(ask.at_point(point))
}

fn question(
    arguments: &SolveForArguments,
    loaded: &Loaded,
    circuit: &Circuit,
) -> Result<Question, Failure> {
    let text = |option: &Option<String>| option.clone().unwrap_or_default();
    let id = parameter(&text(&arguments.parameter), &loaded.scenario)?;
    let wanted = figure(&text(&arguments.figure), circuit)?;
    let kind = wanted.quantity(circuit);
    let target = quantity(&text(&arguments.target), "--target", kind)?;
    let mut question = Question::new(id, wanted, target);
    let own = id.parameter().quantity;
    question.from = quantity_or(arguments.from.as_ref(), "--from", own, question.from)?;
    question.to = quantity_or(arguments.to.as_ref(), "--to", own, question.to)?;
    question.points = arguments.points;
    question
        .check(&loaded.scenario)
        .map_err(|error| Failure::Input(error.to_string()))?;
    Ok(question)
}

/// A value of the parameter as text.
fn value(question: &Question, si: f64, units: UnitSystem) -> String {
    let row = question.parameter.parameter();
    text_from_si(si, display_unit(row, units), DIGITS)
}

fn unreached(question: &Question, found: &Answer, kind: Quantity, units: UnitSystem) -> Failure {
    let show = |si: f64| measure(Measure::new(si, kind), units);
    let nearest = match found.nearest {
        Some((parameter, figure)) => format!(
            "the nearest is {} at {}",
            show(figure),
            value(question, parameter, units)
        ),
        None => "no value in the range gives the figure".to_owned(),
    };
    Failure::Input(format!(
        "{} = {} is not reached with {} from {} to {}; {nearest}",
        question.figure,
        show(question.target),
        question.parameter.parameter().path,
        value(question, question.from, units),
        value(question, question.to, units),
    ))
}

fn report(
    loaded: &Loaded,
    circuit: &Circuit,
    question: &Question,
    found: &Answer,
    units: UnitSystem,
) -> String {
    let row = question.parameter.parameter();
    let kind = question.figure.quantity(circuit);
    let show = |si: f64| measure(Measure::new(si, kind), units);
    let mut text = format!(
        "{} ({})\nWhich {} gives {} = {}?  ({} runs)\n",
        loaded.scenario.name,
        loaded.source,
        row.path,
        question.figure,
        show(question.target),
        found.runs
    );
    text.push_str(&format!(
        "  {}; now {}\n  {}\n\n",
        row.label,
        value(question, loaded.scenario.si(row.id), units),
        question.figure.label(circuit)
    ));
    let mut table = TextTable::new(vec![
        Column::right(row.name()),
        Column::right(question.figure.to_string()),
        Column::wrapped(""),
    ]);
    for sample in &found.samples {
        let (figure, why) = match &sample.figure {
            Ok(figure) => (show(*figure), String::new()),
            Err(missing) => (String::new(), missing.to_string()),
        };
        table.push([value(question, sample.parameter, units), figure, why]);
    }
    text.push_str(&table.to_text(width()));
    text.push('\n');
    if found.roots.is_empty() {
        text.push_str("No value in this range gives the target.\n");
    }
    for root in &found.roots {
        let at = value(question, root.parameter, units);
        text.push_str(&match root.kind {
            RootKind::Crossing => format!("{} = {at} gives {}\n", row.path, show(root.figure)),
            RootKind::Jump { below, above } => format!(
                "{} = {at}: the figure jumps over the target, from {} to {}\n",
                row.path,
                show(below),
                show(above)
            ),
        });
    }
    text
}

/// The figures of a circuit.
fn listing(circuit: &Circuit) -> String {
    let mut text = String::new();
    for (heading, checks) in [
        ("Checks of a run", &RUN_CHECKS[..]),
        ("Checks of the operating map", &MAP_CHECKS),
    ] {
        text.push_str(&format!("{heading}\n\n"));
        let mut table = TextTable::new(vec![Column::left("figure"), Column::wrapped("what it is")]);
        for id in checks {
            table.push([id.name(), id.label()]);
        }
        text.push_str(&table.to_text(width()));
        text.push('\n');
    }
    text.push_str(
        "At rest: rest.damping, the least damping ratio, and rest.NAME for any state or signal \
         below.\nThe operating point is that of low idle with nobody steering, or of the manoeuvre \
         --at a time.\n",
    );
    text.push_str(
        "\nStates and signals of the run, each with a statistic behind a dot, such as \
         p_in.largest\n\n",
    );
    let mut table = TextTable::new(vec![Column::left("statistic"), Column::wrapped("")]);
    for statistic in Statistic::ALL {
        table.push([statistic.name(), statistic.label()]);
    }
    text.push_str(&table.to_text(width()));
    text.push('\n');
    let mut table = TextTable::new(vec![
        Column::left("state or signal"),
        Column::wrapped("what it is"),
    ]);
    for (name, label, _) in trace_columns(circuit) {
        table.push([name, label]);
    }
    text.push_str(&table.to_text(width()));
    text
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_study::figure::Figure;

    #[test]
    fn every_figure_that_is_listed_is_read() {
        let circuit = helmsplit_scenario::Scenario::default().circuit().unwrap();
        let text = listing(&circuit);
        for id in RUN_CHECKS.into_iter().chain(MAP_CHECKS) {
            assert!(text.contains(id.name()), "{id:?}");
            assert!(Figure::parse(id.name(), &circuit).is_ok(), "{id:?}");
        }
    }
}
