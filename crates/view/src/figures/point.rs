//! An operating point in words.

use helmsplit_model::Quantity;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_scenario::{Scenario, UnitSystem};
use helmsplit_study::{OperatingPoint, SteeringDuty, Variable};

/// Figures of a point are shown with this many digits.
const DIGITS: Digits = Digits::Significant(4);

/// An operating point in one line: "2400 rpm, bench throttle into 130 bar, excess 2 bar".
#[must_use]
pub fn point_text(scenario: &Scenario, point: &OperatingPoint, units: UnitSystem) -> String {
    let text = |si: f64, quantity: Quantity| text_from_si(si, units.unit(quantity), DIGITS);
    let speed = |si: f64| text(si, Quantity::AngularVelocity);
    let mut parts = vec![speed(point.engine_speed)];
    parts.push(match point.steering {
        SteeringDuty::Rest => "wheel at rest".to_owned(),
        SteeringDuty::Turning { wheel_rate, load } => format!(
            "wheel turning at {} against {}",
            speed(wheel_rate),
            text(load, Quantity::Pressure)
        ),
        SteeringDuty::AtLock { wheel_rate } => {
            format!("held at the lock with {}", speed(wheel_rate))
        }
        SteeringDuty::Bench { pressure, area } => format!(
            "bench throttle of {} into {}",
            text(area, Quantity::Area),
            text(pressure, Quantity::Pressure)
        ),
        SteeringDuty::Motor { command } => {
            format!(
                "priority motor at command {}",
                text(command, Quantity::Ratio)
            )
        }
    });
    match Variable::excess_load(scenario) {
        Some(Variable::ExcessPressure) => parts.push(format!(
            "excess bench into {}",
            text(point.excess.pressure, Quantity::Pressure)
        )),
        Some(_) => parts.push(format!(
            "excess command {}",
            text(point.excess.command, Quantity::Ratio)
        )),
        None => parts.push("excess port blocked".to_owned()),
    }
    for &(id, si) in &point.settings {
        let row = id.parameter();
        parts.push(format!(
            "{} {}",
            row.label.to_lowercase(),
            text(si, row.quantity)
        ));
    }
    parts.join(", ")
}
