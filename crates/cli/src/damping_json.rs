//! An equilibrium and its modes for machines, SI.

use helmsplit_scenario::UnitSystem;
use helmsplit_study::{Border, Equilibrium, KickOutcome, Mode, ModeKind, ModePath, Share};
use helmsplit_view::figures::point_text;
use serde::Serialize;

use crate::commands::Told;
use crate::exit::Failure;
use crate::input::Loaded;

/// Layout of the report; a reader that knows this number knows the fields.
const FORMAT: u32 = 1;

/// Everything in SI but frequencies, which are in Hz.
#[derive(Serialize)]
struct Report<'a> {
    format: u32,
    version: &'static str,
    circuit: &'a str,
    source: &'a str,
    circuit_hash: String,
    point: String,
    equilibria: Vec<EquilibriumNote<'a>>,
    modes: Vec<ModeNote<'a>>,
    sweep: Option<SweepNote<'a>>,
    response: ResponseNote<'a>,
    ripple: &'a [helmsplit_study::RippleBand],
    kick: Option<KickNote>,
    files: &'a [String],
}

#[derive(Serialize)]
struct EquilibriumNote<'a> {
    stands: &'static str,
    damping_ratio: Option<f64>,
    frequency_hz: Option<f64>,
    growth_per_s: f64,
    residual_per_s: f64,
    states: Vec<Named<'a>>,
    flows_m3_per_s: Vec<Named<'a>>,
    forces_n: Vec<Named<'a>>,
    losses_w: Vec<Named<'a>>,
    left_out: Vec<Named<'a>>,
    stroke_reserve: f64,
}

#[derive(Serialize)]
struct Named<'a> {
    name: std::borrow::Cow<'a, str>,
    value: f64,
}

#[derive(Serialize)]
struct ModeNote<'a> {
    kind: ModeKind,
    name: String,
    growth_per_s: f64,
    angular_frequency_rad_per_s: f64,
    frequency_hz: Option<f64>,
    damping_ratio: Option<f64>,
    /// `None` where it is infinite.
    time_constant_s: Option<f64>,
    shares: &'a [Share],
}

#[derive(Serialize)]
struct SweepNote<'a> {
    variable: &'static str,
    unit: &'static str,
    values: &'a [f64],
    pathways: Vec<PathNote<'a>>,
    borders: Vec<BorderNote>,
    lost_at: Option<f64>,
}

#[derive(Serialize)]
struct PathNote<'a> {
    name: &'a str,
    eigenvalues: &'a [(f64, f64)],
}

#[derive(Serialize)]
struct BorderNote {
    value: f64,
    kind: helmsplit_study::BorderKind,
    frequency_hz: Option<f64>,
    stable_below: bool,
}

#[derive(Serialize)]
struct ResponseNote<'a> {
    from: &'static str,
    to: &'a str,
    unit: String,
    frequencies_hz: &'a [f64],
    magnitude: Vec<f64>,
    phase_rad: Vec<f64>,
}

#[derive(Serialize)]
struct KickNote {
    predicted_frequency_hz: f64,
    predicted_growth_per_s: f64,
    without_friction: KickOutcome,
    with_friction: KickOutcome,
    measured_frequency_hz: Option<f64>,
    measured_growth_per_s: Option<f64>,
    friction_hides_hunting: bool,
}

fn named<'a>(name: impl Into<std::borrow::Cow<'a, str>>, value: f64) -> Named<'a> {
    Named {
        name: name.into(),
        value,
    }
}

/// The report as JSON text.
pub(crate) fn report(
    loaded: &Loaded,
    told: &Told,
    units: UnitSystem,
    files: &[String],
) -> Result<String, Failure> {
    let response = &told.response;
    let report = Report {
        format: FORMAT,
        version: env!("CARGO_PKG_VERSION"),
        circuit: &loaded.scenario.name,
        source: &loaded.source,
        circuit_hash: loaded.scenario.hash(),
        point: point_text(&loaded.scenario, &told.equilibrium().point, units),
        equilibria: told.all.iter().map(equilibrium).collect(),
        modes: told.modes.all.iter().map(mode).collect(),
        sweep: told.path.as_ref().map(|path| sweep(path, &told.borders)),
        response: ResponseNote {
            from: response.excitation.name(),
            to: &response.name,
            unit: format!(
                "{} per {}",
                response.output.si_symbol(),
                response.input.si_symbol()
            ),
            frequencies_hz: &response.frequencies,
            magnitude: response.magnitude().collect(),
            phase_rad: response.phase(),
        },
        ripple: &told.ripple,
        kick: told.kick.as_ref().map(|test| KickNote {
            predicted_frequency_hz: test.without.predicted_frequency,
            predicted_growth_per_s: test.without.predicted_growth,
            without_friction: test.without.outcome,
            with_friction: test.with.outcome,
            measured_frequency_hz: test.without.frequency,
            measured_growth_per_s: test.without.growth,
            friction_hides_hunting: test.hides_hunting,
        }),
        files,
    };
    Ok(format!("{}\n", serde_json::to_string_pretty(&report)?))
}

fn equilibrium(rest: &Equilibrium) -> EquilibriumNote<'_> {
    let stability = &rest.stability;
    let states = rest.circuit().states().iter().zip(&rest.state);
    EquilibriumNote {
        stands: stability.word(),
        damping_ratio: stability.damping,
        frequency_hz: stability.frequency,
        growth_per_s: stability.growth,
        residual_per_s: rest.residual,
        states: states
            .map(|(info, &value)| named(info.name.as_str(), value))
            .collect(),
        flows_m3_per_s: rest
            .flows()
            .into_iter()
            .map(|flow| named(flow.name, flow.value.si))
            .collect(),
        forces_n: rest
            .forces()
            .iter()
            .map(|force| named(force.kind.label(), force.force))
            .collect(),
        losses_w: rest
            .losses()
            .iter()
            .map(|loss| named(loss.signal.name(), loss.power))
            .collect(),
        left_out: rest
            .left_out()
            .iter()
            .map(|left| named(left.label(), left.measure().si))
            .collect(),
        stroke_reserve: rest.stroke_reserve(),
    }
}

fn mode(mode: &Mode) -> ModeNote<'_> {
    let time_constant = mode.time_constant();
    ModeNote {
        kind: mode.kind,
        name: mode.name(),
        growth_per_s: mode.eigenvalue.0,
        angular_frequency_rad_per_s: mode.eigenvalue.1,
        frequency_hz: mode.frequency(),
        damping_ratio: mode.damping(),
        time_constant_s: time_constant.is_finite().then_some(time_constant),
        shares: &mode.shares,
    }
}

fn sweep<'a>(path: &'a ModePath, borders: &[Border]) -> SweepNote<'a> {
    SweepNote {
        variable: path.variable.name(),
        unit: path.variable.quantity().si_symbol(),
        values: &path.values,
        pathways: path
            .pathways
            .iter()
            .map(|way| PathNote {
                name: &way.name,
                eigenvalues: &way.eigenvalues,
            })
            .collect(),
        borders: borders
            .iter()
            .map(|border| BorderNote {
                value: border.value,
                kind: border.kind,
                frequency_hz: border.frequency,
                stable_below: border.stable_below,
            })
            .collect(),
        lost_at: path.lost.as_ref().map(|(value, _)| *value),
    }
}
