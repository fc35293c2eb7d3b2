//! Operating points, variables and ranges from the command line.

use helmsplit_model::Quantity;
use helmsplit_scenario::Scenario;
use helmsplit_scenario::choice::SteeringKind;
use helmsplit_scenario::quantity_text::parse;
use helmsplit_study::{OperatingPoint, PointError, StudyError, Variable};

use crate::args::PointArguments;
use crate::exit::Failure;

/// Between the ends of a range.
const TO: &str = "..";

/// A quantity of the command line, SI.
pub(crate) fn number(text: &str, option: &str, quantity: Quantity) -> Result<f64, Failure> {
    let parsed = parse(text, quantity);
    let parsed = parsed.map_err(|error| {
        Failure::Input(format!(
            "{option}: \"{}\": {error}; {}",
            text.trim(),
            error.hint()
        ))
    })?;
    Ok(parsed.si)
}

/// `base` with what the options change in it.
pub(crate) fn point(
    scenario: &Scenario,
    base: OperatingPoint,
    arguments: &PointArguments,
) -> Result<OperatingPoint, Failure> {
    let mut point = match &arguments.time {
        Some(time) => {
            let time = number(time, "--time", Quantity::Time)?;
            OperatingPoint::at(scenario, time).map_err(Failure::Findings)?
        }
        None => base,
    };
    let rate = Quantity::AngularVelocity;
    let steps: [(&str, &Option<String>, Quantity, Variable); 5] = [
        ("--speed", &arguments.speed, rate, Variable::EngineSpeed),
        ("--wheel", &arguments.wheel, rate, Variable::WheelRate),
        (
            "--steering-pressure",
            &arguments.steering_pressure,
            Quantity::Pressure,
            Variable::SteeringPressure,
        ),
        (
            "--excess-pressure",
            &arguments.excess_pressure,
            Quantity::Pressure,
            Variable::ExcessPressure,
        ),
        (
            "--excess-command",
            &arguments.excess_command,
            Quantity::Ratio,
            Variable::ExcessCommand,
        ),
    ];
    for (option, text, quantity, variable) in steps {
        let Some(text) = text else { continue };
        let si = number(text, option, quantity)?;
        variable
            .apply(scenario, &mut point, si)
            .map_err(|error| Failure::Input(format!("{option}: {error}")))?;
    }
    if let Some(text) = &arguments.at_lock {
        if scenario.chosen::<SteeringKind>() != SteeringKind::SteeringUnit {
            let message = "--at-lock: the circuit has no steering wheel";
            return Err(Failure::Input(message.to_owned()));
        }
        let wheel_rate = number(text, "--at-lock", rate)?;
        point = point.steering(helmsplit_study::SteeringDuty::AtLock { wheel_rate });
    }
    Ok(point)
}

/// A variable with its range, SI: `wear=1..4`, or a name alone for the range worth a look.
pub(crate) fn ranged(
    scenario: &Scenario,
    text: &str,
    option: &str,
) -> Result<(Variable, f64, f64), Failure> {
    let (name, range) = match text.split_once('=') {
        Some((name, range)) => (name, Some(range)),
        None => (text, None),
    };
    let variable =
        Variable::from_name(name).map_err(|error| Failure::Input(format!("{option}: {error}")))?;
    let Some(range) = range else {
        let (from, to) = variable.usual_range(scenario);
        return Ok((variable, from, to));
    };
    let Some((from, to)) = range.split_once(TO) else {
        let message = format!(
            "{option}: \"{range}\" is no range; write {}=FROM{TO}TO, such as engine-speed=\"900 \
             rpm..2400 rpm\"",
            name.trim()
        );
        return Err(Failure::Input(message));
    };
    let from = number(from, option, variable.quantity())?;
    let to = number(to, option, variable.quantity())?;
    if from < to {
        Ok((variable, from, to))
    } else {
        Err(Failure::Input(format!(
            "{option}: the range of {} must grow from its first value to its last",
            variable.name()
        )))
    }
}

impl From<PointError> for Failure {
    fn from(error: PointError) -> Self {
        Self::Study(StudyError::Point(error))
    }
}
