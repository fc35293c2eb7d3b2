//! Start of a run.

use super::{rows, usual, within};
use crate::choice::{ChoiceId, Condition, ExcessKind, StartKind, SteeringKind, when};

const CYLINDER: &[Condition] = &[
    when(ChoiceId::SteeringKind, &[SteeringKind::SteeringUnit as u8]),
    when(
        ChoiceId::StartKind,
        &[StartKind::Settled as u8, StartKind::Cold as u8],
    ),
];
const LIFT: &[Condition] = &[
    when(ChoiceId::ExcessKind, &[ExcessKind::LiftCylinder as u8]),
    when(
        ChoiceId::StartKind,
        &[StartKind::Settled as u8, StartKind::Cold as u8],
    ),
];

rows! { "start" from super::return_line::END;
    CYLINDER_POSITION "cylinder_position" "Position of the steering cylinder" "y" Length "0 mm",
        within(-5000.0, 5000.0), usual(-500.0, 500.0), CYLINDER,
        "Travel of the steering cylinder from mid-stroke when the run starts.",
        "M7.7";
    LIFT_POSITION "lift_position" "Position of the lift cylinder" "y_l" Length "-150 mm",
        within(-10000.0, 10000.0), usual(-1500.0, 1500.0), LIFT,
        "Travel of the lift cylinder from mid-stroke when the run starts.",
        "M8.4";
}
