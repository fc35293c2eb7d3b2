//! Sizes a circuit from its demand.

use std::path::Path;

use helmsplit_model::Quantity;
use helmsplit_scenario::Scenario;
use helmsplit_scenario::write::save_atomically;
use helmsplit_study::sizing::{self, Change, Comparison, Demand, Load, Scrub, Sizing, adopt};
use helmsplit_view::{change_table, comparison_table, sizing_table, worked_steps};

use crate::exit::{ExitStatus, Failure};
use crate::input::load;
use crate::output::print;
use crate::progress::studied;
use crate::size_json;
use crate::study_args::{LoadArguments, SizeArguments};
use crate::typed::{quantity, quantity_or};
use crate::verdict::width;

/// A sizing with what it changes and how the full model sees it.
pub(crate) struct Sized<'a> {
    pub(crate) scenario: &'a Scenario,
    pub(crate) sizing: Sizing,
    pub(crate) changes: Vec<Change>,
    pub(crate) comparisons: Vec<Comparison>,
}

pub(super) fn size(arguments: &SizeArguments) -> Result<ExitStatus, Failure> {
    let loaded = load(&arguments.circuit)?;
    let scenario = &loaded.scenario;
    let demand = demand(arguments, scenario)?;
    let sizing = sizing::size(scenario, &demand)?;
    let changes = sizing.changes(scenario);
    let mut adopted = scenario.clone();
    adopt(&mut adopted, &changes).map_err(Failure::Finding)?;
    let (comparisons, cancelled) = studied(|watch| {
        (
            sizing::verify(&adopted, &sizing, watch),
            watch.is_cancelled(),
        )
    });
    if cancelled {
        return Ok(ExitStatus::Cancelled);
    }
    let sized = Sized {
        scenario,
        sizing,
        changes,
        comparisons,
    };
    let units = arguments.circuit.units;
    let mut text = if arguments.json {
        size_json::text(&sized, units)?
    } else {
        report(&sized, &loaded.source, arguments)
    };
    if let Some(file) = &arguments.adopt {
        write_adopted(&adopted, file, arguments.force)?;
        if !arguments.json {
            text.push_str(&format!("\nWrote {}.\n", file.display()));
        }
    }
    print(&text)?;
    Ok(ExitStatus::Done)
}

/// Writes a changed circuit; never over a file that is there unless told.
pub(super) fn write_adopted(scenario: &Scenario, file: &Path, force: bool) -> Result<(), Failure> {
    if file.exists() && !force {
        return Err(Failure::Input(format!(
            "{} is there already; name another file with --adopt, or overwrite it with --force",
            file.display()
        )));
    }
    save_atomically(file, &scenario.to_text(true))?;
    Ok(())
}

fn report(sized: &Sized<'_>, source: &str, arguments: &SizeArguments) -> String {
    let units = arguments.circuit.units;
    let mut text = format!("Sizing of {} ({source})\n\n", sized.scenario.name);
    text.push_str(&sizing_table(&sized.sizing, units).to_text(width()));
    text.push_str(&worked_steps(&sized.sizing, units));
    if sized.changes.is_empty() {
        text.push_str("\nThe circuit has these sizes already.\n");
    } else {
        text.push_str("\nChanges to adopt\n\n");
        text.push_str(&change_table(&sized.changes, units).to_text(width()));
    }
    text.push_str("\nBy hand against the full model with the changes\n\n");
    text.push_str(&comparison_table(&sized.comparisons, units).to_text(width()));
    for warning in &sized.sizing.warnings {
        text.push_str(&format!("\nwarning: {warning}\n"));
    }
    text.push_str(
        "\nA sizing is a start, not a proof: run the adopted circuit and look at its checks. \
         Never raise a\nrelief beyond the ratings.\n",
    );
    text
}

/// The demand of the options; what is not given is what the circuit implies.
fn demand(arguments: &SizeArguments, scenario: &Scenario) -> Result<Demand, Failure> {
    let own = Demand::of(scenario);
    let a = arguments;
    let speed = Quantity::AngularVelocity;
    let (ratio, pressure) = (Quantity::Ratio, Quantity::Pressure);
    Ok(Demand {
        load: load_of(&a.load)?,
        turns: quantity_or(a.turns.as_ref(), "--turns", ratio, own.turns)?,
        wheel_rate: quantity_or(a.wheel_rate.as_ref(), "--wheel-rate", speed, own.wheel_rate)?,
        idle_wheel_rate: quantity_or(
            a.idle_wheel_rate.as_ref(),
            "--idle-wheel-rate",
            speed,
            own.idle_wheel_rate,
        )?,
        relief_share: quantity_or(
            a.relief_share.as_ref(),
            "--relief-share",
            ratio,
            own.relief_share,
        )?,
        spring_drop: quantity_or(
            a.spring_drop.as_ref(),
            "--spring-drop",
            pressure,
            own.spring_drop,
        )?,
        band: quantity_or(a.band.as_ref(), "--band", ratio, own.band)?,
        land_drop: quantity_or(a.land_drop.as_ref(), "--land-drop", pressure, own.land_drop)?,
        damping_ratio: quantity_or(a.damping.as_ref(), "--damping", ratio, own.damping_ratio)?,
        head_share: quantity_or(a.head_share.as_ref(), "--head-share", ratio, own.head_share)?,
        wear: quantity_or(a.wear.as_ref(), "--wear", ratio, own.wear)?,
        consumer_flow: quantity_or(
            a.consumer_flow.as_ref(),
            "--consumer-flow",
            Quantity::Flow,
            own.consumer_flow,
        )?,
        consumer_pressure: quantity_or(
            a.consumer_pressure.as_ref(),
            "--consumer-pressure",
            pressure,
            own.consumer_pressure,
        )?,
        standard_sizes: !a.exact,
    })
}

/// Friction of a tyre on dry concrete: the most that is usual.
const TYRE_FRICTION: f64 = 0.7;

fn load_of(arguments: &LoadArguments) -> Result<Load, Failure> {
    if let Some(force) = &arguments.cylinder_force {
        let force = quantity(force, "--cylinder-force", Quantity::Force)?;
        return Ok(Load::Force(force));
    }
    let (Some(axle_load), Some(width), Some(arm)) =
        (&arguments.axle_load, &arguments.tyre_width, &arguments.arm)
    else {
        return Ok(Load::Circuit);
    };
    let length = Quantity::Length;
    Ok(Load::Scrub(Scrub {
        axle_load: quantity(axle_load, "--axle-load", Quantity::Force)?,
        friction: quantity_or(
            arguments.tyre_friction.as_ref(),
            "--tyre-friction",
            Quantity::Ratio,
            TYRE_FRICTION,
        )?,
        tyre_width: quantity(width, "--tyre-width", length)?,
        kingpin_offset: quantity_or(
            arguments.kingpin_offset.as_ref(),
            "--kingpin-offset",
            length,
            0.0,
        )?,
        arm: quantity(arm, "--arm", length)?,
        driven: arguments.driven,
    }))
}
