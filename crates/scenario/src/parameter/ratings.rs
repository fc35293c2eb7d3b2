//! Ratings and demands that the checks measure against.

use super::{ALWAYS, over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, PumpInlet, SteeringKind, when};

const UNIT: &[Condition] = &[when(
    ChoiceId::SteeringKind,
    &[SteeringKind::SteeringUnit as u8],
)];
const OTHER: &[Condition] = &[when(
    ChoiceId::SteeringKind,
    &[SteeringKind::BenchThrottle as u8, SteeringKind::Motor as u8],
)];
const FLOODED: &[Condition] = &[when(ChoiceId::PumpInlet, &[PumpInlet::Flooded as u8])];
const DATA: &str = "data of the machine";

rows! { "ratings" from super::limits::END;
    LOW_IDLE_SPEED "low_idle_speed" "Low idle" "n_idle" AngularVelocity "900 rpm",
        over(0.0, 10000.0), usual(400.0, 1500.0), ALWAYS,
        "Speed at which the steering must still get its oil.",
        DATA;
    TOP_SPEED "top_speed" "Governed speed" "n_top" AngularVelocity "2400 rpm",
        over(0.0, 20000.0), usual(1000.0, 4500.0), ALWAYS,
        "Highest speed of the prime mover; upper end of the operating map.",
        DATA;
    WHEEL_RATE "wheel_rate" "Wheel rate to be met" "w_dem" AngularVelocity "100 rpm",
        over(0.0, 300.0), usual(50.0, 150.0), UNIT,
        "Wheel rate whose oil the priority port must give; with the displacement it is the demand.",
        "common practice, no source: 100 to 120 rpm";
    PRIORITY_DEMAND "priority_demand" "Flow that the priority consumer needs" "Q_dem"
        Flow "12 L/min",
        over(0.0, 2000.0), usual(2.0, 200.0), OTHER,
        "Flow that the priority port must give where no steering unit states it.",
        DATA;
    SET_FLOW "set_flow" "Set priority flow" "Q_set" Flow "15 L/min",
        over(0.0, 2000.0), usual(2.0, 200.0), ALWAYS,
        "Priority flow that the valve is made for.",
        DATA;
    INLET_PRESSURE "inlet_pressure" "Rating of pump and inlet" "" Pressure "210 bar",
        over(0.0, 2000.0), usual(80.0, 450.0), ALWAYS,
        "Highest pressure that pump and inlet may see.",
        DATA;
    PRIORITY_PRESSURE "priority_pressure" "Rating of the steering side" "" Pressure "175 bar",
        over(0.0, 2000.0), usual(80.0, 450.0), ALWAYS,
        "Highest pressure that line and steering unit may see.",
        DATA;
    EXCESS_PRESSURE "excess_pressure" "Rating of the excess side" "" Pressure "210 bar",
        over(0.0, 2000.0), usual(80.0, 450.0), ALWAYS,
        "Highest pressure that the excess side may see.",
        DATA;
    COOLER_CAPACITY "cooler_capacity" "Capacity of the cooler" "" Power "8 kW",
        over(0.0, 1000.0), usual(0.3, 100.0), ALWAYS,
        "Heat that tank and cooler carry away at the run's temperature.",
        DATA;
    LEAST_VISCOSITY "least_viscosity" "Least viscosity of the pump" "" KinematicViscosity
        "10 mm2/s",
        within(1.0, 500.0), usual(5.0, 30.0), ALWAYS,
        "Viscosity below which the pump wears.",
        DATA;
    GREATEST_VISCOSITY "greatest_viscosity" "Greatest viscosity of the pump" ""
        KinematicViscosity "1000 mm2/s",
        within(10.0, 20000.0), usual(100.0, 5000.0), ALWAYS,
        "Viscosity above which the pump no longer fills.",
        DATA;
    SUCTION_BORE "suction_bore" "Bore of the suction line" "" Length "32 mm",
        over(1.0, 300.0), usual(10.0, 100.0), FLOODED,
        "Bore for the velocity check; with a suction line its own bore counts.",
        DATA;
    PRESSURE_BORE "pressure_bore" "Bore of the pump line" "" Length "16 mm",
        over(1.0, 200.0), usual(5.0, 60.0), ALWAYS,
        "Bore of the line from pump to valve.",
        DATA;
    RETURN_BORE "return_bore" "Bore of the return line" "" Length "20 mm",
        over(1.0, 300.0), usual(8.0, 100.0), ALWAYS,
        "Bore of the common return line.",
        DATA;
}
