//! The inputs that a manoeuvre drives.

use std::sync::LazyLock;

use helmsplit_model::{Input, Quantity};

use crate::finding::Finding;
use crate::parameter::{Range, within};
use crate::quantity_text;
use crate::units::{Unit, si_unit};
use crate::value::{Allowed, Value};

/// One input of the manoeuvre.
#[derive(Debug)]
pub struct InputRow {
    /// Which input of the model.
    pub input: Input,
    /// Path of its free breakpoints in the circuit file.
    pub path: &'static str,
    /// What a person calls it.
    pub label: &'static str,
    /// Kind of quantity.
    pub quantity: Quantity,
    /// Level where nothing moves it; its unit is the preferred metric unit.
    pub default: &'static str,
    /// What is allowed, in the unit of the default.
    pub allowed: Range,
    /// Meaning in one sentence.
    pub note: &'static str,
}

/// Every input, in the order of [`Input::ALL`].
pub static INPUTS: [InputRow; Input::ALL.len()] = [
    InputRow {
        input: Input::EngineSpeed,
        path: "manoeuvre.engine_speed",
        label: "Engine speed",
        quantity: Quantity::AngularVelocity,
        default: "900 rpm",
        allowed: within(0.0, 20000.0),
        note: "Speed of the pump shaft; with a governed engine its set speed.",
    },
    InputRow {
        input: Input::WheelRate,
        path: "manoeuvre.wheel_rate",
        label: "Steering wheel rate",
        quantity: Quantity::AngularVelocity,
        default: "0 rpm",
        allowed: within(-400.0, 400.0),
        note: "Rate at which the driver turns the wheel; positive extends chamber A.",
    },
    InputRow {
        input: Input::ExternalForce,
        path: "manoeuvre.external_force",
        label: "External force",
        quantity: Quantity::Force,
        default: "0 N",
        allowed: within(-5e6, 5e6),
        note: "Force on the steering cylinder against positive travel.",
    },
    InputRow {
        input: Input::BenchArea,
        path: "manoeuvre.bench_area",
        label: "Bench throttle area",
        quantity: Quantity::Area,
        default: "100 mm2",
        allowed: within(0.0, 10000.0),
        note: "Area of the bench throttle on the priority port.",
    },
    InputRow {
        input: Input::BenchPressure,
        path: "manoeuvre.bench_pressure",
        label: "Bench pressure",
        quantity: Quantity::Pressure,
        default: "20 bar",
        allowed: within(0.0, 1000.0),
        note: "Pressure behind the bench throttle on the priority port.",
    },
    InputRow {
        input: Input::ExcessPressure,
        path: "manoeuvre.excess_pressure",
        label: "Excess bench pressure",
        quantity: Quantity::Pressure,
        default: "20 bar",
        allowed: within(0.0, 1000.0),
        note: "Pressure behind the bench throttle on the excess port.",
    },
    InputRow {
        input: Input::ExcessCommand,
        path: "manoeuvre.excess_command",
        label: "Excess command",
        quantity: Quantity::Ratio,
        default: "1",
        allowed: within(-1.0, 1.0),
        note: "Command of the excess consumer: 0 off to 1 fully on; -1 lowers a lift cylinder.",
    },
    InputRow {
        input: Input::PriorityCommand,
        path: "manoeuvre.priority_command",
        label: "Priority command",
        quantity: Quantity::Ratio,
        default: "1",
        allowed: within(0.0, 1.0),
        note: "Command of a hydraulic motor on the priority port: 0 off to 1 fully on.",
    },
];

impl InputRow {
    /// Its name inside the section.
    #[must_use]
    pub fn name(&self) -> &'static str {
        crate::choice::name_of(self.path)
    }

    /// Its preferred metric unit.
    #[must_use]
    pub fn unit(&self) -> &'static Unit {
        LEVELS[self.input as usize].1
    }

    /// Its level where nothing moves it, SI.
    #[must_use]
    pub fn level(&self) -> f64 {
        LEVELS[self.input as usize].0
    }
}

/// Level in SI and its unit, for each input.
static LEVELS: LazyLock<[(f64, &'static Unit); Input::ALL.len()]> = LazyLock::new(|| {
    std::array::from_fn(|place| {
        let row = &INPUTS[place];
        quantity_text::parse(row.default, row.quantity)
            .map(|parsed| (parsed.si, parsed.unit))
            .unwrap_or_else(|error| unreachable!("level of {}: {error}", row.path))
    })
});

/// The row of an input.
#[must_use]
pub fn input_row(input: Input) -> &'static InputRow {
    &INPUTS[input as usize]
}

/// The input whose breakpoints have that name in the section `manoeuvre`.
#[must_use]
pub fn input_from_name(name: &str) -> Option<Input> {
    INPUTS
        .iter()
        .find(|row| row.name() == name)
        .map(|row| row.input)
}

/// Longest time that a breakpoint may have, s.
const LATEST: f64 = 3600.0;

/// The second, in which times are written.
pub(super) fn second() -> &'static Unit {
    si_unit(Quantity::Time)
}

/// Reads a time from the start of the run on.
pub(super) fn time_value(path: &str, text: &str) -> Result<Value, Finding> {
    let allowed = Allowed {
        range: within(0.0, LATEST),
        unit: second(),
    };
    Value::from_text(path, text, Quantity::Time)?.within(path, &allowed)
}

/// Reads a value of an input.
pub(super) fn input_value(path: &str, row: &InputRow, text: &str) -> Result<Value, Finding> {
    let allowed = Allowed {
        range: row.allowed,
        unit: row.unit(),
    };
    Value::from_text(path, text, row.quantity)?.within(path, &allowed)
}
