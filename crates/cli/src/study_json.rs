//! Answers of solve-for, influence and mend for machines.

use helmsplit_model::{Circuit, Quantity};
use helmsplit_scenario::UnitSystem;
use helmsplit_study::Measure;
use helmsplit_study::influence::{Influence, Influences, Scale};
use helmsplit_study::mend::{Dropped, Mending, Proposal};
use helmsplit_study::solve_for::{Answer, Question, RootKind};
use serde::Serialize;

use crate::exit::Failure;
use crate::report_json::{CheckNote, Number, note, number, parameter_number};
use crate::size_json::{ChangeNote, change_note};

/// Layout of the reports.
const FORMAT: u32 = 1;

fn written<T: Serialize>(report: &T) -> Result<String, Failure> {
    Ok(format!("{}\n", serde_json::to_string_pretty(report)?))
}

#[derive(Serialize)]
struct AnswerReport<'a> {
    format: u32,
    version: &'static str,
    circuit: &'a str,
    parameter: &'static str,
    figure: String,
    target: Number,
    runs: usize,
    roots: Vec<RootNote>,
    nearest: Option<SampleNote>,
    samples: Vec<SampleNote>,
}

#[derive(Serialize)]
struct RootNote {
    parameter: Number,
    figure: Number,
    kind: &'static str,
    below: Option<f64>,
    above: Option<f64>,
}

#[derive(Serialize)]
struct SampleNote {
    parameter: Number,
    figure: Option<Number>,
    missing: Option<String>,
}

/// The answer of solve-for.
pub(crate) fn answer(
    circuit: &str,
    question: &Question,
    found: &Answer,
    kind: Quantity,
    units: UnitSystem,
) -> Result<String, Failure> {
    let figure = |si: f64| number(Measure::new(si, kind), units);
    let parameter = |si: f64| parameter_number(question.parameter, si, units);
    let roots = found.roots.iter().map(|root| {
        let (kind, sides) = match root.kind {
            RootKind::Crossing => ("crossing", None),
            RootKind::Jump { below, above } => ("jump", Some((below, above))),
        };
        RootNote {
            parameter: parameter(root.parameter),
            figure: figure(root.figure),
            kind,
            below: sides.map(|(below, _)| figure(below).value),
            above: sides.map(|(_, above)| figure(above).value),
        }
    });
    let samples = found.samples.iter().map(|sample| SampleNote {
        parameter: parameter(sample.parameter),
        figure: sample.figure.as_ref().ok().map(|&si| figure(si)),
        missing: sample.figure.as_ref().err().map(ToString::to_string),
    });
    written(&AnswerReport {
        format: FORMAT,
        version: env!("CARGO_PKG_VERSION"),
        circuit,
        parameter: question.parameter.parameter().path,
        figure: question.figure.to_string(),
        target: figure(question.target),
        runs: found.runs,
        roots: roots.collect(),
        nearest: found.nearest.map(|(value, si)| SampleNote {
            parameter: parameter(value),
            figure: Some(figure(si)),
            missing: None,
        }),
        samples: samples.collect(),
    })
}

#[derive(Serialize)]
struct InfluencesReport<'a> {
    format: u32,
    version: &'static str,
    circuit: &'a str,
    runs: usize,
    figures: Vec<FigureNote>,
}

#[derive(Serialize)]
#[serde(untagged)]
enum FigureNote {
    Found(InfluenceNote),
    Missing { missing: String },
}

#[derive(Serialize)]
struct InfluenceNote {
    figure: String,
    label: String,
    base: Number,
    noise: f64,
    rows: Vec<RowNote>,
}

#[derive(Serialize)]
struct RowNote {
    parameter: &'static str,
    value: Number,
    relative_to: &'static str,
    sensitivity: Option<f64>,
    uncertainty: Option<f64>,
    step: f64,
    resolved: bool,
    missing: Option<String>,
}

fn influence_note(influence: &Influence, circuit: &Circuit, units: UnitSystem) -> InfluenceNote {
    let finite = |value: f64| value.is_finite().then_some(value);
    let kind = influence.figure.quantity(circuit);
    let rows = influence.rows.iter().map(|row| RowNote {
        parameter: row.parameter.parameter().path,
        value: parameter_number(row.parameter, row.value, units),
        relative_to: match row.scale {
            Scale::Value => "value",
            Scale::UsualRange => "usual range",
        },
        sensitivity: finite(row.sensitivity),
        uncertainty: finite(row.uncertainty),
        step: row.step,
        resolved: row.resolved,
        missing: row.missing.as_ref().map(ToString::to_string),
    });
    InfluenceNote {
        figure: influence.figure.to_string(),
        label: influence.figure.label(circuit),
        base: number(Measure::new(influence.base, kind), units),
        noise: influence.noise,
        rows: rows.collect(),
    }
}

/// The influences on every figure.
pub(crate) fn influences(
    name: &str,
    circuit: &Circuit,
    found: &Influences,
    units: UnitSystem,
) -> Result<String, Failure> {
    let figures = found.figures.iter().map(|figure| match figure {
        Ok(influence) => FigureNote::Found(influence_note(influence, circuit, units)),
        Err(error) => FigureNote::Missing {
            missing: error.to_string(),
        },
    });
    written(&InfluencesReport {
        format: FORMAT,
        version: env!("CARGO_PKG_VERSION"),
        circuit: name,
        runs: found.runs,
        figures: figures.collect(),
    })
}

#[derive(Serialize)]
struct MendingReport<'a> {
    format: u32,
    version: &'static str,
    circuit: &'a str,
    before: CheckNote<'a>,
    singles: Vec<ProposalNote<'a>>,
    pair: Option<ProposalNote<'a>>,
    not_reached: Vec<DroppedNote>,
    unresolved: usize,
}

#[derive(Serialize)]
struct ProposalNote<'a> {
    changes: Vec<ChangeNote>,
    size: f64,
    check: CheckNote<'a>,
    effects: Vec<EffectNote<'a>>,
}

#[derive(Serialize)]
struct EffectNote<'a> {
    worse: bool,
    breaks: bool,
    before: CheckNote<'a>,
    after: CheckNote<'a>,
}

#[derive(Serialize)]
struct DroppedNote {
    parameter: &'static str,
    nearest: Option<Number>,
    at: Option<Number>,
}

fn proposal_note(proposal: &Proposal, units: UnitSystem) -> ProposalNote<'_> {
    ProposalNote {
        changes: proposal
            .changes
            .iter()
            .map(|change| change_note(change, units))
            .collect(),
        size: proposal.size,
        check: note(&proposal.check, units),
        effects: proposal
            .effects
            .iter()
            .map(|effect| EffectNote {
                worse: effect.is_worse(),
                breaks: effect.breaks(),
                before: note(&effect.before, units),
                after: note(&effect.after, units),
            })
            .collect(),
    }
}

/// The proposals of mend.
pub(crate) fn mending(name: &str, found: &Mending, units: UnitSystem) -> Result<String, Failure> {
    let kind = found.before.figure.map_or(Quantity::Ratio, |f| f.quantity);
    let dropped = found.dropped.iter().map(|one| match one {
        Dropped::NotReached {
            parameter,
            value,
            figure,
        } => DroppedNote {
            parameter: parameter.parameter().path,
            nearest: Some(number(Measure::new(*figure, kind), units)),
            at: Some(parameter_number(*parameter, *value, units)),
        },
        Dropped::NoFigure { parameter } => DroppedNote {
            parameter: parameter.parameter().path,
            nearest: None,
            at: None,
        },
    });
    written(&MendingReport {
        format: FORMAT,
        version: env!("CARGO_PKG_VERSION"),
        circuit: name,
        before: note(&found.before, units),
        singles: found
            .singles
            .iter()
            .map(|proposal| proposal_note(proposal, units))
            .collect(),
        pair: found.pair.as_ref().map(|pair| proposal_note(pair, units)),
        not_reached: dropped.collect(),
        unresolved: found.unresolved,
    })
}
