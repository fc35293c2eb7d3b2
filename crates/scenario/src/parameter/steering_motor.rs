//! Hydraulic motor on the priority port (M8.3).

use super::{over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, SteeringKind, when};

const MOTOR: &[Condition] = &[when(ChoiceId::SteeringKind, &[SteeringKind::Motor as u8])];

rows! { "steering" from super::cylinder::END;
    MOTOR_VALVE_AREA "motor_valve_area" "Area of the on/off valve" "A_on" Area "30 mm2",
        over(0.0, 5000.0), usual(5.0, 500.0), MOTOR,
        "Area of the valve ahead of the motor at full command.",
        "M8.3";
    MOTOR_VALVE_DISCHARGE "motor_valve_discharge" "Discharge coefficient of the on/off valve"
        "Cd_on" Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), MOTOR,
        "Turbulent discharge coefficient of the on/off valve.",
        "M2.1";
    MOTOR_VALVE_TRANSITION "motor_valve_transition" "Transition of the on/off valve" "Re_t,on"
        Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), MOTOR,
        "Reynolds number of transition of the on/off valve.",
        "M2.3";
    MOTOR_VOLUME "motor_volume" "Volume between valve and motor" "V_m" Volume "50 cm3",
        over(0.0, 10000.0), usual(5.0, 1000.0), MOTOR,
        "Volume of hose and motor inlet.",
        "M8.3";
    MOTOR_WALL_MODULUS "motor_wall_modulus" "Wall stiffness of the motor hose" "B_w,m"
        BulkModulus "0.6 GPa",
        over(0.0, 1e6), usual(0.1, 50.0), MOTOR,
        "Bulk modulus that the hose wall adds in series with the oil.",
        "M1.5";
    MOTOR_DISPLACEMENT "motor_displacement" "Motor displacement" "D_m"
        Displacement "12 cm3/rev",
        over(0.0, 5000.0), usual(4.0, 1000.0), MOTOR,
        "Volume that the motor takes in one turn.",
        "M8.3";
    MOTOR_SLIP "motor_slip" "Slip coefficient of the motor" "C_sm" Ratio "2e-8",
        within(0.0, 1e-4), usual(1e-9, 1e-6), MOTOR,
        "Wilson's slip coefficient, without unit; wear raises it.",
        "M8.3; Wilson 1950";
    MOTOR_EFFICIENCY "motor_efficiency" "Hydromechanical efficiency of the motor" "eta_m"
        Ratio "88 %",
        over(10.0, 100.0), usual(70.0, 97.0), MOTOR,
        "Shaft torque over torque without losses.",
        "M8.3";
    MOTOR_INERTIA "motor_inertia" "Inertia of motor and load" "J" Inertia "0.02 kg m2",
        over(0.0, 100.0), usual(0.001, 10.0), MOTOR,
        "What must be spun up; a large one surges when the valve opens.",
        "M8.3";
    MOTOR_DRY_TORQUE "motor_dry_torque" "Dry friction torque" "T_0" Torque "2 N m",
        within(0.0, 5000.0), usual(0.0, 200.0), MOTOR,
        "Torque at any speed.",
        "M8.3";
    MOTOR_DRY_SPEED "motor_dry_speed" "Speed of dry friction" "w_s" AngularVelocity "2 rad/s",
        over(0.0, 100.0), usual(0.1, 20.0), MOTOR,
        "Speed at which dry friction has grown to 76 %.",
        "M8.3";
    MOTOR_VISCOUS "motor_viscous" "Viscous torque" "T_1" TorsionalDamping "0.005 N m s",
        within(0.0, 1000.0), usual(0.0, 10.0), MOTOR,
        "Torque in proportion to speed.",
        "M8.3";
    MOTOR_FAN_TORQUE "motor_fan_torque" "Fan torque" "T_2" Torque "8 N m",
        within(0.0, 20000.0), usual(0.0, 500.0), MOTOR,
        "Torque of fan, blower or rotor at the speed below; grows with the square of speed.",
        "M8.3";
    MOTOR_FAN_SPEED "motor_fan_speed" "Speed of that torque" "n_2" AngularVelocity "1000 rpm",
        over(0.0, 20000.0), usual(50.0, 4000.0), MOTOR,
        "Speed at which the fan torque holds.",
        "M8.3";
    MOTOR_CHECK_AREA "motor_check_area" "Area of the anti-cavitation check" "A_acv"
        Area "30 mm2",
        within(0.0, 5000.0), usual(5.0, 500.0), MOTOR,
        "Feeds the coasting motor from the return when its valve shuts.",
        "M8.3";
    MOTOR_CHECK_DISCHARGE "motor_check_discharge"
        "Discharge coefficient of the anti-cavitation check" "Cd_acv" Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), MOTOR,
        "Turbulent discharge coefficient of the anti-cavitation check.",
        "M2.1";
    MOTOR_CHECK_TRANSITION "motor_check_transition" "Transition of the anti-cavitation check"
        "Re_t,acv" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), MOTOR,
        "Reynolds number of transition of the anti-cavitation check.",
        "M2.3";
}
