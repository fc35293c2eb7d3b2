//! The figure of one run.

use helmsplit_model::Circuit;
use helmsplit_scenario::{Scenario, UnitSystem};
use helmsplit_sim::Trace;
use helmsplit_study::Solved;

use super::columns::Columns;
use super::panels::RunPanels;
use crate::plot::{Figure, Mark, TimeAxis, power_text};

/// What the figure of a run is made from.
#[derive(Debug, Clone)]
pub struct RunFigure<'a> {
    /// Title: the name of the circuit.
    pub title: &'a str,
    /// What must be known to read it; may be empty.
    pub subtitle: &'a str,
    /// The circuit: gives stops, edges and settings.
    pub circuit: &'a Circuit,
    /// The trace.
    pub trace: &'a Trace,
    /// Start and end of the time axis, s; `None` for those of the trace.
    pub span: Option<(f64, f64)>,
    /// Events.
    pub marks: Vec<Mark>,
    /// Units to show.
    pub units: UnitSystem,
}

/// Stacked traces of a run: inputs, spool travel, pressures, flow split, steering, consumers and
/// power, as far as the circuit has them.
#[must_use]
pub fn run_figure(run: &RunFigure<'_>) -> Figure {
    let mut maker = RunPanels {
        circuit: run.circuit,
        columns: Columns::new(run.trace, run.units),
        notes: Vec::new(),
    };
    let panels = maker.all();
    Figure {
        title: run.title.to_owned(),
        subtitle: run.subtitle.to_owned(),
        time: TimeAxis {
            range: run.span,
            ..TimeAxis::default()
        },
        panels,
        marks: run.marks.clone(),
        notes: maker.notes,
    }
}

/// The figure of a solved scenario, with its notes above, its events, and below how the run ended
/// and what its audits leave open. The time axis is as long as the run was meant to be.
#[must_use]
pub fn solved_figure(scenario: &Scenario, solved: &Solved, units: UnitSystem) -> Figure {
    let events = solved.events.iter();
    let marks = events
        .map(|event| Mark {
            time: event.time,
            label: event.kind.label().to_owned(),
        })
        .collect();
    let run = &solved.run;
    let mut figure = run_figure(&RunFigure {
        title: &scenario.name,
        subtitle: &scenario.notes,
        circuit: &solved.circuit,
        trace: &run.trace,
        span: Some((0.0, scenario.solver().duration)),
        marks,
        units,
    });
    if !run.end.is_finished() {
        figure
            .notes
            .insert(0, format!("The run is not complete: {}.", run.end));
    }
    if let Some(audit) = &run.audit {
        let [volume, energy] = [&audit.volume, &audit.energy].map(|b| power_text(b.relative));
        figure.notes.push(format!(
            "Audits: volume closes to {volume} of its turnover, energy to {energy}."
        ));
    }
    figure
}
