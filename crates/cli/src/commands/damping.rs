//! Finds an equilibrium and its modes.

use helmsplit_model::Signal;
use helmsplit_scenario::write::save_atomically;
use helmsplit_sim::Watch;
use helmsplit_study::{
    Border, Equilibrium, Excitation, FrequencyResponse, FrictionTest, KickOptions, ModePath, Modes,
    OperatingPoint, RippleBand, Sweep, borders, equilibria, frequency_response, friction_test,
    mode_path, ripple_bands, spread_frequencies,
};
use helmsplit_view::chart::Chart;
use helmsplit_view::figures::{
    bode_panels, damping_panels, force_panel, plane_panel, point_text, stability_text,
};
use helmsplit_view::{SvgOptions, svg_from_chart};

use crate::args::DampingArguments;
use crate::exit::{ExitStatus, Failure};
use crate::input::{Loaded, load};
use crate::output::print;
use crate::point::{point, ranged};
use crate::{damping_json, damping_text};

/// Range of the frequency response, Hz, and its points.
const FROM: f64 = 0.5;
const TO: f64 = 1000.0;
const POINTS: usize = 240;

/// Everything that is told.
pub(crate) struct Told {
    /// Every equilibrium that was met; the first is looked at.
    pub(crate) all: Vec<Equilibrium>,
    pub(crate) modes: Modes,
    pub(crate) path: Option<ModePath>,
    pub(crate) borders: Vec<Border>,
    pub(crate) response: FrequencyResponse,
    pub(crate) ripple: Vec<RippleBand>,
    pub(crate) kick: Option<FrictionTest>,
}

impl Told {
    pub(crate) fn equilibrium(&self) -> &Equilibrium {
        &self.all[0]
    }
}

pub(super) fn damping(arguments: &DampingArguments) -> Result<ExitStatus, Failure> {
    let loaded = load(&arguments.circuit)?;
    let told = tell(&loaded, arguments)?;
    let units = arguments.circuit.units;
    let mut files = Vec::new();
    if let Some(file) = &arguments.csv {
        damping_text::csv(file, &told, units)?;
        files.push(file.display().to_string());
    }
    if let Some(file) = &arguments.svg {
        let theme = arguments.theme.theme().load()?;
        let chart = chart(&loaded, &told, arguments);
        save_atomically(file, &svg_from_chart(&chart, &SvgOptions::new(&theme)))?;
        files.push(file.display().to_string());
    }
    let text = if arguments.json {
        damping_json::report(&loaded, &told, units, &files)?
    } else {
        damping_text::report(&loaded, &told, units, &files)
    };
    print(&text)?;
    Ok(ExitStatus::Done)
}

fn tell(loaded: &Loaded, arguments: &DampingArguments) -> Result<Told, Failure> {
    let scenario = &loaded.scenario;
    let base = OperatingPoint::at(scenario, 0.0).map_err(Failure::Findings)?;
    let point = point(scenario, base, &arguments.point)?;
    let all = equilibria(scenario, &point)?;
    let modes = all[0].modes()?;
    let (mut path, mut found) = (None, Vec::new());
    if let Some(text) = &arguments.sweep {
        let (variable, from, to) = ranged(scenario, text, "--sweep")?;
        if !(2..=1000).contains(&arguments.values) {
            let message = "--values: a sweep has 2 to 1000 values";
            return Err(Failure::Input(message.to_owned()));
        }
        let sweep = Sweep::even(variable, from, to, arguments.values);
        path = Some(mode_path(scenario, &point, &sweep)?);
        found = borders(scenario, &point, &sweep)?;
    }
    let kick = if arguments.kick {
        let options = KickOptions::default();
        friction_test(scenario, &all[0], &options, &mut Watch::none())?
    } else {
        None
    };
    let response = response(&all[0], &arguments.response)?;
    Ok(Told {
        modes,
        path,
        borders: found,
        response,
        ripple: ripple_bands(scenario)?,
        kick,
        all,
    })
}

fn response(equilibrium: &Equilibrium, text: &str) -> Result<FrequencyResponse, Failure> {
    let excitations: Vec<_> = Excitation::ALL.iter().map(|e| e.name()).collect();
    let names = excitations.join(", ");
    let Some((from, to)) = text.split_once(':') else {
        return Err(Failure::Input(format!(
            "--response: write FROM:TO, such as pump-flow:p_in; FROM is one of {names}"
        )));
    };
    let known = Excitation::ALL
        .into_iter()
        .find(|e| e.name() == from.trim());
    let Some(excitation) = known else {
        return Err(Failure::Input(format!(
            "--response: \"{from}\" shakes nothing; write one of {names}"
        )));
    };
    let frequencies = spread_frequencies(equilibrium, FROM, TO, POINTS);
    let mut all = frequency_response(equilibrium, excitation, &[to.trim()], &frequencies)
        .map_err(|error| Failure::Input(format!("--response: {error}{}", signals(equilibrium))))?;
    // One name gives one response.
    Ok(all.remove(0))
}

fn signals(equilibrium: &Equilibrium) -> String {
    let circuit = equilibrium.circuit();
    let states = circuit.states().iter().map(|state| state.name.as_str());
    let signals = circuit
        .signals()
        .iter()
        .map(|&signal: &Signal| signal.name());
    let names: Vec<_> = states.chain(signals).collect();
    format!("; there are {}", names.join(", "))
}

/// Forces, modes, the sweep, and the response, below each other.
fn chart(loaded: &Loaded, told: &Told, arguments: &DampingArguments) -> Chart {
    let scenario = &loaded.scenario;
    let units = arguments.circuit.units;
    let rest = told.equilibrium();
    let mut panels = vec![
        force_panel(rest, units),
        plane_panel(&told.modes, told.path.as_ref()),
    ];
    if let Some(path) = &told.path {
        let wanted = scenario.limits().damping;
        panels.extend(damping_panels(path, &told.borders, wanted, units));
    }
    panels.extend(bode_panels(&told.response, &told.ripple, units));
    let mut notes: Vec<String> = rest
        .left_out()
        .iter()
        .map(|left| {
            let size = crate::measure_text::measure(left.measure(), units);
            format!("Left out: {} ({size}).", left.label())
        })
        .collect();
    notes
        .push("Linear: holds for small disturbances. Modes above 500 Hz are not drawn.".to_owned());
    Chart {
        title: format!("{}: {}", scenario.name, stability_text(rest)),
        subtitle: point_text(scenario, &rest.point, units),
        panels,
        notes,
    }
}
