//! Steering: load, cylinder, displacement, priority flow.

use std::f64::consts::TAU;

use helmsplit_model::Quantity;
use helmsplit_scenario::choice::{PriorityReliefKind, SteeringKind};
use helmsplit_scenario::parameter::{cylinder, priority_relief, ratings, steering};

use super::demand::{Load, Scrub};
use super::sheet::Sheet;
use super::sizes::{Rounding, Series};
use super::step::Step;
use crate::check::Measure;

const SCRUB: &str = "sizing pages of a maker of steering units, published; friction 0.7 on dry \
                     concrete, twice the torque for driven axles";
const TURNS: &str = "sizing practice for steering units, published 2006: 2.5 to 5.5 turns";
const RATE: &str = "sizing practice for steering units, published 2006: laid out for 120 rpm, at \
                    least 60 rpm at low idle";
const PRACTICE: &str = "common practice, no source";

/// What the steering hands on.
pub(super) struct Wheel {
    /// Pressure of the load, Pa.
    pub(super) load_pressure: f64,
    /// Priority flow that the valve is made for, m3/s.
    pub(super) set_flow: f64,
    /// Flow that must be met at low idle, m3/s.
    pub(super) idle_flow: f64,
}

pub(super) fn steps(sheet: &mut Sheet<'_>) -> Wheel {
    if sheet.scenario.chosen::<SteeringKind>() == SteeringKind::SteeringUnit {
        let load_pressure = load(sheet);
        let (set_flow, idle_flow) = flows(sheet);
        Wheel {
            load_pressure,
            set_flow,
            idle_flow,
        }
    } else {
        without_wheel(sheet)
    }
}

/// A bench or a motor at the priority port states its flow itself.
fn without_wheel(sheet: &mut Sheet<'_>) -> Wheel {
    let set = sheet.si(ratings::SET_FLOW);
    let idle = sheet.si(ratings::PRIORITY_DEMAND);
    let top = if sheet.scenario.chosen::<PriorityReliefKind>() == PriorityReliefKind::None {
        sheet.si(ratings::PRIORITY_PRESSURE)
    } else {
        sheet.si(priority_relief::CRACKING_PRESSURE)
    };
    let share = sheet.demand.relief_share;
    let step = Step::new(
        "load-pressure",
        "Pressure of the priority consumer",
        "p_L",
        "s * p_top",
        Measure::new(share * top, Quantity::Pressure),
    )
    .term("s", "share of the limit", share, Quantity::Ratio)
    .term(
        "p_top",
        "cracking of the priority relief, or the rating",
        top,
        Quantity::Pressure,
    )
    .from(PRACTICE)
    .noted("no steering unit: flow and pressure are those of the circuit");
    Wheel {
        load_pressure: sheet.push(step),
        set_flow: set,
        idle_flow: idle,
    }
}

/// Force at the piston and the pressure that it takes.
fn load(sheet: &mut Sheet<'_>) -> f64 {
    let force = match sheet.demand.load {
        Load::Scrub(scrub) => scrub_force(sheet, &scrub),
        Load::Force(force) => force,
        Load::Circuit => circuit_force(sheet),
    };
    if sheet.demand.load != Load::Circuit {
        model_friction(sheet, force);
    }
    let area = sheet.si(cylinder::AREA_A).min(sheet.si(cylinder::AREA_B));
    let step = Step::new(
        "load-pressure",
        "Pressure that the load takes",
        "p_L",
        "F / A_cyl",
        Measure::new(force / area, Quantity::Pressure),
    )
    .term("F", "force at the piston", force, Quantity::Force)
    .term("A_cyl", "smaller piston area", area, Quantity::Area)
    .from("pressure is force over area")
    .noted("without the drops in unit and lines, which the reserve to the relief must hold");
    sheet.push(step)
}

fn scrub_force(sheet: &mut Sheet<'_>, scrub: &Scrub) -> f64 {
    let &Scrub {
        axle_load,
        friction,
        tyre_width,
        kingpin_offset,
        arm,
        driven,
    } = scrub;
    let factor = if driven { 2.0 } else { 1.0 };
    let lever = (tyre_width * tyre_width / 8.0 + kingpin_offset * kingpin_offset).sqrt();
    let torque = factor * axle_load * friction * lever;
    let step = Step::new(
        "scrub-torque",
        "Torque to turn the axle on the spot",
        "T",
        "k_d * W * mu_t * sqrt(B^2 / 8 + E^2)",
        Measure::new(torque, Quantity::Torque),
    )
    .term(
        "k_d",
        "2 for a driven axle, else 1",
        factor,
        Quantity::Count,
    )
    .term("W", "weight on the axle", axle_load, Quantity::Force)
    .term("mu_t", "friction of the tyre", friction, Quantity::Count)
    .term("B", "width of the tyre", tyre_width, Quantity::Length)
    .term("E", "kingpin offset", kingpin_offset, Quantity::Length)
    .from(SCRUB);
    let torque = sheet.push(step);
    let step = Step::new(
        "cylinder-force",
        "Force at the piston",
        "F",
        "T / r",
        Measure::new(torque / arm, Quantity::Force),
    )
    .term("T", "torque on the kingpins", torque, Quantity::Torque)
    .term("r", "least arm of the cylinder", arm, Quantity::Length)
    .from("lever");
    sheet.push(step)
}

/// The load of the circuit itself: scrub friction and tyre spring at the lock.
fn circuit_force(sheet: &mut Sheet<'_>) -> f64 {
    let friction = sheet.si(cylinder::TYRE_FRICTION_FORCE);
    let rate = sheet.si(cylinder::TYRE_RATE);
    let stroke = sheet.si(cylinder::STROKE);
    let step = Step::new(
        "cylinder-force",
        "Force at the piston",
        "F",
        "F_t + k_t * stroke / 2",
        Measure::new(friction + rate * stroke / 2.0, Quantity::Force),
    )
    .term("F_t", "scrub friction", friction, Quantity::Force)
    .term(
        "k_t",
        "spring rate of the tyres",
        rate,
        Quantity::SpringRate,
    )
    .term("stroke", "cylinder stroke", stroke, Quantity::Length)
    .from("M7.7: the circuit's own tyres at the lock");
    sheet.push(step)
}

/// The circuit's tyres shall hold against the demanded force at the lock.
fn model_friction(sheet: &mut Sheet<'_>, force: f64) {
    let rate = sheet.si(cylinder::TYRE_RATE);
    let stroke = sheet.si(cylinder::STROKE);
    let step = Step::new(
        "scrub-friction",
        "Scrub friction of the circuit's tyres",
        "F_t",
        "max(F - k_t * stroke / 2, 0)",
        Measure::new((force - rate * stroke / 2.0).max(0.0), Quantity::Force),
    )
    .term("F", "force at the piston", force, Quantity::Force)
    .term(
        "k_t",
        "spring rate of the tyres",
        rate,
        Quantity::SpringRate,
    )
    .term("stroke", "cylinder stroke", stroke, Quantity::Length)
    .from("M7.7, so that the circuit is loaded as demanded")
    .into_parameter(cylinder::TYRE_FRICTION_FORCE);
    sheet.push(step);
}

/// Displacement of the unit, set flow and flow at idle.
fn flows(sheet: &mut Sheet<'_>) -> (f64, f64) {
    let volume = swept(sheet);
    let turns = sheet.demand.turns;
    let step = Step::new(
        "displacement",
        "Displacement of the steering unit",
        "D_su",
        "V_cyl / n_l",
        Measure::new(volume / turns, Quantity::Displacement),
    )
    .term("V_cyl", "volume of the cylinder", volume, Quantity::Volume)
    .term("n_l", "turns from lock to lock", turns, Quantity::Count)
    .from(TURNS)
    .into_parameter(steering::DISPLACEMENT);
    let displacement = sheet.push_sized(step, Series::Displacements, Rounding::Nearest);
    let step = Step::new(
        "turns",
        "Turns from lock to lock with it",
        "n_l",
        "V_cyl / D_su",
        Measure::new(volume / displacement, Quantity::Count),
    )
    .term("V_cyl", "volume of the cylinder", volume, Quantity::Volume)
    .term("D_su", "displacement", displacement, Quantity::Displacement)
    .from(TURNS)
    .usually(2.5, 5.5);
    sheet.push(step);
    let (rate, idle) = (sheet.demand.wheel_rate, sheet.demand.idle_wheel_rate);
    let flow = |id, label, symbol, rate: f64| {
        let result = Measure::new(displacement * rate / TAU, Quantity::Flow);
        Step::new(id, label, symbol, "D_su * n_w", result)
            .term("D_su", "displacement", displacement, Quantity::Displacement)
            .term("n_w", "wheel rate", rate, Quantity::AngularVelocity)
            .from(RATE)
    };
    let set = flow(
        "set-flow",
        "Priority flow that the valve is made for",
        "Q_set",
        rate,
    );
    let set_flow = sheet.push(set.into_parameter(ratings::SET_FLOW));
    let at_idle = flow(
        "idle-flow",
        "Priority flow that low idle must give",
        "Q_idle",
        idle,
    );
    let idle_flow = sheet.push(at_idle);
    let step = Step::new(
        "lock-time",
        "Time from lock to lock at the set flow",
        "t_l",
        "V_cyl / Q_set",
        Measure::new(volume / set_flow, Quantity::Time),
    )
    .term("V_cyl", "volume of the cylinder", volume, Quantity::Volume)
    .term("Q_set", "set flow", set_flow, Quantity::Flow)
    .from("volume over flow");
    sheet.push(step);
    (set_flow, idle_flow)
}

fn swept(sheet: &mut Sheet<'_>) -> f64 {
    let area = sheet.si(cylinder::AREA_A).max(sheet.si(cylinder::AREA_B));
    let stroke = sheet.si(cylinder::STROKE);
    let step = Step::new(
        "cylinder-volume",
        "Volume of the cylinder from lock to lock",
        "V_cyl",
        "A_cyl * stroke",
        Measure::new(area * stroke, Quantity::Volume),
    )
    .term("A_cyl", "larger piston area", area, Quantity::Area)
    .term("stroke", "cylinder stroke", stroke, Quantity::Length)
    .from("geometry");
    sheet.push(step)
}
