//! Reliefs: settings with their spacing.

use helmsplit_model::Quantity;
use helmsplit_scenario::choice::{MainReliefKind, PriorityReliefKind};
use helmsplit_scenario::parameter::{limits, main_relief, priority_relief, ratings};

use super::sheet::Sheet;
use super::sizes::{Rounding, Series};
use super::step::Step;
use super::supply::Supply;
use super::wheel::Wheel;
use crate::check::Measure;

const SHARE: &str = "sizing pages of a maker of steering units, published: the load at about 75 % \
                     of the relief";
const PRACTICE: &str = "common practice, no source";

/// Factor on the set flow that the priority relief must pass.
const PASSING: f64 = 1.2;

pub(super) fn steps(sheet: &mut Sheet<'_>, wheel: &Wheel, supply: &Supply) {
    let has_priority = sheet.scenario.chosen::<PriorityReliefKind>() != PriorityReliefKind::None;
    let has_main = sheet.scenario.chosen::<MainReliefKind>() == MainReliefKind::Direct;
    let top = if has_priority {
        priority(sheet, wheel)
    } else {
        wheel.load_pressure / sheet.demand.relief_share
    };
    if has_main {
        main(sheet, supply, top);
    } else {
        sheet.warn("the circuit has no main relief: fit one");
    }
}

fn against_rating(sheet: &mut Sheet<'_>, what: &str, pressure: f64, rating: f64) {
    if pressure > rating {
        sheet.warn(format!(
            "{what} would lie above the rating of its side: a larger cylinder, not a higher setting"
        ));
    }
}

/// Full-flow pressure of the priority relief, Pa.
fn priority(sheet: &mut Sheet<'_>, wheel: &Wheel) -> f64 {
    let share = sheet.demand.relief_share;
    let load = wheel.load_pressure;
    let step = Step::new(
        "priority-relief",
        "Cracking pressure of the priority relief",
        "p_p",
        "p_L / s",
        Measure::new(load / share, Quantity::Pressure),
    )
    .term("p_L", "pressure of the load", load, Quantity::Pressure)
    .term("s", "share that the load may take", share, Quantity::Count)
    .from(SHARE)
    .into_parameter(priority_relief::CRACKING_PRESSURE);
    let cracking = sheet.push_sized(step, Series::Settings, Rounding::Up);
    let override_ = sheet.si(priority_relief::FULL_FLOW_PRESSURE)
        - sheet.si(priority_relief::CRACKING_PRESSURE);
    let step = Step::new(
        "priority-relief-full",
        "Its full-flow pressure",
        "p_pf",
        "p_p + o_p",
        Measure::new(cracking + override_, Quantity::Pressure),
    )
    .term("p_p", "cracking pressure", cracking, Quantity::Pressure)
    .term(
        "o_p",
        "override, as the circuit's relief has it",
        override_,
        Quantity::Pressure,
    )
    .from("data of the relief")
    .into_parameter(priority_relief::FULL_FLOW_PRESSURE);
    let full = sheet.push(step);
    let rating = sheet.si(ratings::PRIORITY_PRESSURE);
    against_rating(sheet, "the priority relief at full flow", full, rating);
    let pilot = sheet.scenario.chosen::<PriorityReliefKind>() == PriorityReliefKind::Pilot;
    if !pilot {
        let step = Step::new(
            "priority-relief-flow",
            "Flow that it must pass",
            "Q_pf",
            "f_q * Q_set",
            Measure::new(PASSING * wheel.set_flow, Quantity::Flow),
        )
        .term("f_q", "factor on the set flow", PASSING, Quantity::Count)
        .term("Q_set", "set flow", wheel.set_flow, Quantity::Flow)
        .from(PRACTICE)
        .into_parameter(priority_relief::FULL_FLOW);
        sheet.push(step);
    }
    full
}

fn main(sheet: &mut Sheet<'_>, supply: &Supply, top: f64) {
    let drop = sheet.demand.spring_drop;
    let gap = sheet.si(limits::STEERING_LIMIT);
    let consumer = sheet.demand.consumer_pressure;
    let step = Step::new(
        "main-relief",
        "Cracking pressure of the main relief",
        "p_m",
        "max(p_pf + dp, p_con) + gap",
        Measure::new((top + drop).max(consumer) + gap, Quantity::Pressure),
    )
    .term(
        "p_pf",
        "priority relief at full flow",
        top,
        Quantity::Pressure,
    )
    .term(
        "dp",
        "drop over the fixed orifice",
        drop,
        Quantity::Pressure,
    )
    .term(
        "p_con",
        "pressure of the consumer",
        consumer,
        Quantity::Pressure,
    )
    .term(
        "gap",
        "least gap that the limits ask",
        gap,
        Quantity::Pressure,
    )
    .from(PRACTICE)
    .noted("it serves the consumer only if its pressure stands in the demand")
    .into_parameter(main_relief::CRACKING_PRESSURE);
    let cracking = sheet.push_sized(step, Series::Settings, Rounding::Up);
    main_full(sheet, supply, cracking);
}

/// Full-flow pressure and full flow of the main relief.
fn main_full(sheet: &mut Sheet<'_>, supply: &Supply, cracking: f64) {
    let override_ =
        sheet.si(main_relief::FULL_FLOW_PRESSURE) - sheet.si(main_relief::CRACKING_PRESSURE);
    let step = Step::new(
        "main-relief-full",
        "Its full-flow pressure",
        "p_mf",
        "p_m + o_m",
        Measure::new(cracking + override_, Quantity::Pressure),
    )
    .term("p_m", "cracking pressure", cracking, Quantity::Pressure)
    .term(
        "o_m",
        "override, as the circuit's relief has it",
        override_,
        Quantity::Pressure,
    )
    .from("data of the relief")
    .into_parameter(main_relief::FULL_FLOW_PRESSURE);
    let full = sheet.push(step);
    let rating = sheet.si(ratings::INLET_PRESSURE);
    against_rating(sheet, "the main relief at full flow", full, rating);
    let step = Step::new(
        "main-relief-flow",
        "Flow that it must pass",
        "Q_mf",
        "Q_top",
        Measure::new(supply.top_flow, Quantity::Flow),
    )
    .term(
        "Q_top",
        "pump flow at top speed",
        supply.top_flow,
        Quantity::Flow,
    )
    .from("with both ports blocked the whole pump flow goes over it")
    .into_parameter(main_relief::FULL_FLOW);
    sheet.push(step);
}
