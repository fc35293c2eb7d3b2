//! Pump: displacement for the demand at low idle, flow at top speed, what is left for the excess
//! port.

use std::f64::consts::TAU;

use helmsplit_model::Quantity;
use helmsplit_scenario::choice::PumpCondition;
use helmsplit_scenario::parameter::{limits, pump, ratings};

use super::sheet::Sheet;
use super::sizes::{Rounding, Series};
use super::step::Step;
use super::wheel::Wheel;
use crate::check::Measure;

const WILSON: &str = "Wilson, Positive-Displacement Pumps and Fluid Motors, 1950, value from \
                      memory; slip from the data sheet; allowance for wear: common practice, no \
                      source";
const CONTINUITY: &str = "displacement times speed";

/// What the pump hands on.
pub(super) struct Supply {
    /// Flow at top speed without slip, m3/s.
    pub(super) top_flow: f64,
    /// What is left at top speed for the excess port, m3/s.
    pub(super) excess_flow: f64,
}

/// Wilson's slip coefficient of the pump when new; a measured one as it is.
fn slip_when_new(sheet: &Sheet<'_>) -> f64 {
    let now = sheet.parts.pump.slip;
    match sheet.scenario.chosen::<PumpCondition>() {
        PumpCondition::WearFactor => now / sheet.si(pump::WEAR),
        PumpCondition::MeasuredEfficiency => now,
    }
}

pub(super) fn steps(sheet: &mut Sheet<'_>, wheel: &Wheel) -> Supply {
    let displacement = displacement(sheet, wheel);
    let top_speed = sheet.si(ratings::TOP_SPEED);
    let step = Step::new(
        "top-flow",
        "Pump flow at top speed without slip",
        "Q_top",
        "D * n_top",
        Measure::new(displacement * top_speed / TAU, Quantity::Flow),
    )
    .term(
        "D",
        "displacement of the pump",
        displacement,
        Quantity::Displacement,
    )
    .term(
        "n_top",
        "governed speed",
        top_speed,
        Quantity::AngularVelocity,
    )
    .from(CONTINUITY);
    let top_flow = sheet.push(step);
    let step = Step::new(
        "excess-flow",
        "Most flow for the excess port",
        "Q_ex",
        "Q_top - Q_set",
        Measure::new(top_flow - wheel.set_flow, Quantity::Flow),
    )
    .term("Q_top", "pump flow at top speed", top_flow, Quantity::Flow)
    .term("Q_set", "set flow", wheel.set_flow, Quantity::Flow)
    .from("the valve passes on what the steering leaves");
    let excess_flow = sheet.push(step);
    if excess_flow <= 0.0 {
        sheet.warn(
            "at top speed the pump gives less than the set flow: nothing is left for the excess \
             port, so land, spring rate and damping holes were not sized",
        );
    } else if excess_flow < sheet.demand.consumer_flow {
        sheet.warn("the consumer gets less than its flow at top speed: take a larger pump");
    }
    Supply {
        top_flow,
        excess_flow,
    }
}

fn displacement(sheet: &mut Sheet<'_>, wheel: &Wheel) -> f64 {
    let share = sheet.si(limits::PRIORITY_AT_IDLE);
    let idle_speed = sheet.si(ratings::LOW_IDLE_SPEED);
    let pressure = wheel.load_pressure + sheet.demand.spring_drop;
    let slip = slip_when_new(sheet);
    let (nu, rho) = (sheet.parts.oil.kinematic_viscosity, sheet.parts.oil.density);
    let wear = sheet.demand.wear;
    let lost = wear * slip * pressure / (TAU * nu * rho);
    let speed = idle_speed / TAU;
    let kept = speed - lost;
    let idle = share * wheel.idle_flow / kept;
    let consumer = sheet.demand.consumer_flow;
    let top_speed = sheet.si(ratings::TOP_SPEED);
    let top = (wheel.set_flow + consumer) * TAU / top_speed;
    let result = if kept > 0.0 { idle.max(top) } else { f64::NAN };
    if kept <= 0.0 {
        sheet.warn("at low idle the worn pump slips all it displaces: no pump is large enough");
        return sheet.si(pump::DISPLACEMENT);
    }
    let step = Step::new(
        "pump-displacement",
        "Displacement of the pump",
        "D",
        "max(s * Q_idle / (n_idle - wear * C_s * p / (2 * pi * nu * rho)), (Q_set + Q_con) / n_top)",
        Measure::new(result, Quantity::Displacement),
    )
    .term("s", "share of the demand at idle that the limits ask", share, Quantity::Count)
    .term("Q_idle", "flow that low idle must give", wheel.idle_flow, Quantity::Flow)
    .term("n_idle", "low idle", idle_speed, Quantity::AngularVelocity)
    .term("wear", "factor on the slip when new", wear, Quantity::Count)
    .term("C_s", "slip coefficient when new", slip, Quantity::Count)
    .term("p", "load with the spring's drop", pressure, Quantity::Pressure)
    .term("nu", "viscosity of the oil", nu, Quantity::KinematicViscosity)
    .term("rho", "density of the oil", rho, Quantity::Density)
    .term("Q_set", "set flow", wheel.set_flow, Quantity::Flow)
    .term("Q_con", "flow of the consumer at top speed", consumer, Quantity::Flow)
    .term("n_top", "governed speed", top_speed, Quantity::AngularVelocity)
    .from(WILSON)
    .noted("without a flow of the consumer the steering alone sizes it")
    .into_parameter(pump::DISPLACEMENT);
    sheet.push_sized(step, Series::Displacements, Rounding::Up)
}
