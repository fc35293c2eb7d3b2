//! Bores of the lines.

use std::f64::consts::PI;

use helmsplit_model::Quantity;
use helmsplit_scenario::ParameterId;
use helmsplit_scenario::choice::PumpInlet;
use helmsplit_scenario::parameter::{limits, line, pump, ratings};

use super::sheet::Sheet;
use super::sizes::{Rounding, Series};
use super::step::Step;
use super::supply::Supply;
use super::wheel::Wheel;
use crate::check::Measure;

const SOURCE: &str = "continuity; velocity: line-sizing tables of fluid power handbooks";

/// A line with what sizes it.
struct Line {
    id: &'static str,
    label: &'static str,
    flow: f64,
    velocity: ParameterId,
    bore: ParameterId,
}

pub(super) fn steps(sheet: &mut Sheet<'_>, wheel: &Wheel, supply: &Supply) {
    let suction = match sheet.scenario.chosen::<PumpInlet>() {
        PumpInlet::Flooded => ratings::SUCTION_BORE,
        PumpInlet::SuctionLine => pump::SUCTION_BORE,
    };
    let top = supply.top_flow;
    let lines = [
        Line {
            id: "suction-bore",
            label: "Bore of the suction line",
            flow: top,
            velocity: limits::SUCTION_VELOCITY,
            bore: suction,
        },
        Line {
            id: "pressure-bore",
            label: "Bore of the pump line",
            flow: top,
            velocity: limits::PRESSURE_VELOCITY,
            bore: ratings::PRESSURE_BORE,
        },
        Line {
            id: "priority-bore",
            label: "Bore of the priority line",
            flow: wheel.set_flow,
            velocity: limits::PRESSURE_VELOCITY,
            bore: line::BORE,
        },
        Line {
            id: "return-bore",
            label: "Bore of the return line",
            flow: top,
            velocity: limits::RETURN_VELOCITY,
            bore: ratings::RETURN_BORE,
        },
    ];
    for line in lines {
        bore(sheet, &line);
    }
}

fn bore(sheet: &mut Sheet<'_>, line: &Line) {
    let velocity = sheet.si(line.velocity);
    let step = Step::new(
        line.id,
        line.label,
        "d",
        "sqrt(4 * Q / (pi * v))",
        Measure::new((4.0 * line.flow / (PI * velocity)).sqrt(), Quantity::Length),
    )
    .term("Q", "largest flow", line.flow, Quantity::Flow)
    .term(
        "v",
        "velocity that the limits allow",
        velocity,
        Quantity::Velocity,
    )
    .from(SOURCE)
    .into_parameter(line.bore);
    sheet.push_sized(step, Series::HoseBores, Rounding::Up);
}
