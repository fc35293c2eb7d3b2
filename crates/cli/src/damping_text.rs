//! An equilibrium and its modes for people, and as a table.

use std::f64::consts::TAU;
use std::path::Path;

use helmsplit_model::Quantity;
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_sim::column_heading;
use helmsplit_study::{
    Equilibrium, ForceKind, FrictionTest, Kick, KickOutcome, Measure, Mode, ModeKind, ModePath,
    Modes, Reading,
};
use helmsplit_view::figures::{point_text, stability_text};
use helmsplit_view::{Column, TextTable};

use crate::commands::Told;
use crate::exit::Failure;
use crate::input::Loaded;
use crate::measure_text::measure;
use crate::table_csv::write_table;
use crate::verdict::width;

/// Figures are shown with this many digits.
const DIGITS: Digits = Digits::Significant(4);

/// Rows of the sweep that are printed; the whole goes into the file.
const SWEEP_ROWS: usize = 12;

/// Flows below this, m3/s, are not listed: a ten-thousandth of a litre a minute.
const NO_FLOW: f64 = 1e-9 / 6.0;

/// Everything in words.
pub(crate) fn report(loaded: &Loaded, told: &Told, units: UnitSystem, files: &[String]) -> String {
    let rest = told.equilibrium();
    let scenario = &loaded.scenario;
    let mut text = format!("{}  ({})\n", scenario.name, loaded.source);
    text.push_str(&format!("{}\n", point_text(scenario, &rest.point, units)));
    text.push_str(&format!("{}\n", stability_text(rest)));
    text.push_str(&several(&told.all, units));
    text.push_str(&left_out(rest, units));
    text.push_str("\nForces on the spool, positive towards opening the excess land\n");
    text.push_str(&forces(rest, units));
    text.push_str(&travel(rest, units));
    text.push_str("\nPressures\n");
    text.push_str(&readings(&rest.pressures(), units));
    text.push_str("\nFlows\n");
    let flows = rest
        .flows()
        .into_iter()
        .filter(|r| r.value.si.abs() > NO_FLOW);
    text.push_str(&readings(&flows.collect::<Vec<_>>(), units));
    text.push_str("\nLosses\n");
    text.push_str(&losses(rest, units));
    text.push_str("\nModes\n");
    text.push_str(&modes(&told.modes));
    if let Some(path) = &told.path {
        text.push_str(&sweep(path, told, units));
    }
    text.push_str(&response(told, units));
    if let Some(kick) = &told.kick {
        text.push_str(&kicks(kick, units));
    }
    for file in files {
        text.push_str(&format!("\nWrote {file}"));
    }
    if !files.is_empty() {
        text.push('\n');
    }
    text
}

fn several(all: &[Equilibrium], units: UnitSystem) -> String {
    if all.len() < 2 {
        return "the same equilibrium is reached from the shut and from the open spool\n"
            .to_owned();
    }
    let mut text = format!(
        "{} equilibria: where the circuit came from decides; the first is shown\n",
        all.len()
    );
    for one in all {
        text.push_str(&format!(
            "  spool at {}, priority flow {}, {}\n",
            text_from_si(one.travel(), units.unit(Quantity::Length), DIGITS),
            text_from_si(
                one.signal(helmsplit_model::Signal::PriorityFlow),
                units.unit(Quantity::Flow),
                DIGITS
            ),
            stability_text(one)
        ));
    }
    text
}

fn left_out(rest: &Equilibrium, units: UnitSystem) -> String {
    rest.left_out()
        .iter()
        .map(|left| {
            format!(
                "left out: {} ({})\n",
                left.label(),
                measure(left.measure(), units)
            )
        })
        .collect()
}

fn forces(rest: &Equilibrium, units: UnitSystem) -> String {
    /// Less than this is rounding, N.
    const NOTHING: f64 = 1e-4;
    let mut table = TextTable::new(vec![Column::left("force"), Column::right("size")]);
    for force in rest.forces() {
        let size = if force.force.abs() < NOTHING {
            0.0
        } else {
            force.force
        };
        let text = measure(Measure::new(size, Quantity::Force), units);
        let text = match force.kind {
            ForceKind::Friction => format!("up to {text} either way"),
            _ => text,
        };
        table.push([force.kind.label().to_owned(), text]);
    }
    table.to_text(width())
}

fn travel(rest: &Equilibrium, units: UnitSystem) -> String {
    let length = |si: f64| text_from_si(si, units.unit(Quantity::Length), DIGITS);
    let stroke = rest.circuit().parts().valve.stroke;
    format!(
        "spool at {} of {}, {:.1} % of the stroke in reserve\n",
        length(rest.travel()),
        length(stroke),
        100.0 * rest.stroke_reserve()
    )
}

fn readings(all: &[Reading], units: UnitSystem) -> String {
    let mut table = TextTable::new(vec![
        Column::left("name"),
        Column::right("value"),
        Column::left("what"),
    ]);
    for reading in all {
        table.push([
            reading.name.clone(),
            measure(reading.value, units),
            reading.label.clone(),
        ]);
    }
    table.to_text(width())
}

fn losses(rest: &Equilibrium, units: UnitSystem) -> String {
    let mut table = TextTable::new(vec![
        Column::left("where"),
        Column::right("power"),
        Column::right("share of the heat"),
    ]);
    for loss in rest.losses() {
        table.push([
            loss.signal.label().to_owned(),
            measure(Measure::new(loss.power, Quantity::Power), units),
            format!("{:.1} %", 100.0 * loss.share),
        ]);
    }
    table.to_text(width())
}

fn modes(modes: &Modes) -> String {
    let mut table = TextTable::new(vec![
        Column::right("frequency"),
        Column::right("damping ratio"),
        Column::right("time constant"),
        Column::left("does"),
        Column::wrapped("who takes part"),
    ]);
    for mode in &modes.all {
        table.push([
            mode.frequency()
                .map_or_else(String::new, |f| format!("{f:.2} Hz")),
            mode.damping()
                .map_or_else(String::new, |d| format!("{d:.4}")),
            time_text(mode),
            does(mode).to_owned(),
            participation(mode),
        ]);
    }
    table.to_text(width())
}

fn time_text(mode: &Mode) -> String {
    match mode.time_constant() {
        t if t.is_infinite() => "none".to_owned(),
        t if t.abs() < 1e-4 => format!("{:.3} us", 1e6 * t),
        t if t.abs() < 1.0 => format!("{:.3} ms", 1e3 * t),
        t if t.abs() < 600.0 => format!("{t:.2} s"),
        t => format!("{t:.0} s"),
    }
}

fn does(mode: &Mode) -> &'static str {
    match mode.kind {
        ModeKind::Oscillation if mode.grows() => "HUNTS",
        ModeKind::Oscillation => "swings",
        ModeKind::Decay => "dies out",
        ModeKind::Growth => "RUNS AWAY",
        ModeKind::Neutral => "stays",
    }
}

/// Parts with at least a twentieth, the largest first.
fn participation(mode: &Mode) -> String {
    let parts = mode.shares.iter().filter(|share| share.share >= 0.05);
    let parts: Vec<_> = parts
        .map(|share| format!("{} {:.0} %", share.part.label(), 100.0 * share.share))
        .collect();
    parts.join(", ")
}

fn sweep(path: &ModePath, told: &Told, units: UnitSystem) -> String {
    let unit = units.unit(path.variable.quantity());
    let value = |si: f64| text_from_si(si, unit, DIGITS);
    let mut text = format!("\nSweep of {}\n", path.variable.label().to_lowercase());
    let mut table = TextTable::new(vec![
        Column::right("value"),
        Column::right("damping ratio"),
        Column::right("frequency"),
        Column::left("stands"),
    ]);
    let count = path.values.len();
    let shown = count.min(SWEEP_ROWS);
    for row in 0..shown {
        let at = row * (count - 1) / (shown - 1).max(1);
        let stability = &path.equilibria[at].stability;
        let least = stability.damping_below(500.0);
        table.push([
            value(path.values[at]),
            least.map_or_else(String::new, |(d, _)| format!("{d:.4}")),
            least.map_or_else(String::new, |(_, f)| format!("{f:.2} Hz")),
            stability.word().to_owned(),
        ]);
    }
    text.push_str(&table.to_text(width()));
    for border in &told.borders {
        let frequency = border
            .frequency
            .map_or_else(|| "runs away".to_owned(), |f| format!("hunts at {f:.2} Hz"));
        let side = if border.stable_below {
            "above"
        } else {
            "below"
        };
        text.push_str(&format!(
            "border at {}: {side} it {frequency}\n",
            text_from_si(border.value, unit, Digits::Significant(5))
        ));
    }
    if told.borders.is_empty() {
        text.push_str("no border of hunting on the way\n");
    }
    if let Some((lost, why)) = &path.lost {
        text.push_str(&format!("the sweep ends before {}: {why}\n", value(*lost)));
    }
    text
}

fn response(told: &Told, units: UnitSystem) -> String {
    let response = &told.response;
    let Some((size, frequency)) = response.peak() else {
        return String::new();
    };
    let (output, input) = (units.unit(response.output), units.unit(response.input));
    let per =
        |unit: &helmsplit_scenario::units::Unit| unit.value_from_si(1.0) - unit.value_from_si(0.0);
    let mut text = format!(
        "\nResponse of {} to {}: at most {:.4} {} per {}, at {frequency:.2} Hz\n",
        response.label.to_lowercase(),
        response.excitation.label().to_lowercase(),
        size * per(output) / per(input),
        output.symbol(),
        input.symbol()
    );
    for band in &told.ripple {
        text.push_str(&format!(
            "pump ripple, harmonic {}: {:.1} to {:.1} Hz over the speed range\n",
            band.harmonic, band.low, band.high
        ));
    }
    text
}

fn kicks(test: &FrictionTest, units: UnitSystem) -> String {
    let mut text = String::from("\nKick of the least damped mode\n");
    for kick in [&test.without, &test.with] {
        text.push_str(&one_kick(kick, units));
    }
    if test.hides_hunting {
        text.push_str(
            "dry friction hides a hunt: a small kick dies out, a larger one can set it going\n",
        );
    }
    text
}

fn one_kick(kick: &Kick, units: UnitSystem) -> String {
    let head = if kick.friction {
        "with dry friction"
    } else {
        "without dry friction"
    };
    let measured = match (kick.frequency, kick.growth) {
        (Some(f), Some(g)) => format!(
            "{f:.2} Hz (predicted {:.2}), growth {g:.2} 1/s (predicted {:.2})",
            kick.predicted_frequency, kick.predicted_growth
        ),
        _ => format!(
            "no steady swing (predicted {:.2} Hz)",
            kick.predicted_frequency
        ),
    };
    let outcome = match kick.outcome {
        KickOutcome::DiesOut => "dies out".to_owned(),
        KickOutcome::Lingers => "goes on as it was".to_owned(),
        KickOutcome::Grows => "grows".to_owned(),
        KickOutcome::GaveUp => "the solver gave up".to_owned(),
        KickOutcome::LimitCycle {
            travel,
            inlet_pressure,
            frequency,
        } => format!(
            "hunts steadily: {} of spool travel and {} of inlet pressure peak to peak at \
             {frequency:.2} Hz",
            measure(Measure::new(travel, Quantity::Length), units),
            measure(Measure::new(inlet_pressure, Quantity::Pressure), units)
        ),
    };
    format!("  {head}: {outcome}; {measured}\n")
}

/// The modes as a table: over the sweep each pathway, else every mode.
pub(crate) fn csv(file: &Path, told: &Told, units: UnitSystem) -> Result<(), Failure> {
    match &told.path {
        None => {
            let heads = [
                "growth_per_s",
                "frequency_Hz",
                "damping_ratio",
                "undamped_frequency_Hz",
                "time_constant_s",
            ];
            let rows = told.modes.all.iter().map(|mode| {
                vec![
                    mode.eigenvalue.0,
                    mode.eigenvalue.1 / TAU,
                    mode.damping().unwrap_or(f64::NAN),
                    mode.frequency().unwrap_or(f64::NAN),
                    mode.time_constant(),
                ]
            });
            write_table(file, &heads.map(str::to_owned), rows)
        }
        Some(path) => {
            let unit = units.unit(path.variable.quantity());
            let name = path.variable.name().replace(['-', '.'], "_");
            let mut heads = vec![column_heading(&name, unit)];
            for number in 1..=path.pathways.len() {
                heads.push(format!("mode_{number}_growth_per_s"));
                heads.push(format!("mode_{number}_frequency_Hz"));
                heads.push(format!("mode_{number}_damping_ratio"));
            }
            let damping: Vec<Vec<Option<f64>>> = path
                .pathways
                .iter()
                .map(|way| way.damping().collect())
                .collect();
            let rows = path.values.iter().enumerate().map(|(at, &si)| {
                let mut row = vec![unit.value_from_si(si)];
                for (way, damping) in path.pathways.iter().zip(&damping) {
                    let (re, im) = way.eigenvalues[at];
                    row.extend([re, im.abs() / TAU, damping[at].unwrap_or(f64::NAN)]);
                }
                row
            });
            write_table(file, &heads, rows)
        }
    }
}
