//! Pump and its inlet (M4).

use super::{ALWAYS, over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, PumpCondition, PumpInlet, PumpRipple, when};

const WEAR_FACTOR: &[Condition] = &[when(
    ChoiceId::PumpCondition,
    &[PumpCondition::WearFactor as u8],
)];
const MEASURED: &[Condition] = &[when(
    ChoiceId::PumpCondition,
    &[PumpCondition::MeasuredEfficiency as u8],
)];
const GEAR: &[Condition] = &[when(ChoiceId::PumpRipple, &[PumpRipple::Gear as u8])];
const PISTON: &[Condition] = &[when(ChoiceId::PumpRipple, &[PumpRipple::Piston as u8])];
const RIPPLE: &[Condition] = &[when(
    ChoiceId::PumpRipple,
    &[PumpRipple::Gear as u8, PumpRipple::Piston as u8],
)];
const SUCTION: &[Condition] = &[when(ChoiceId::PumpInlet, &[PumpInlet::SuctionLine as u8])];

rows! { "pump" from super::oil::END;
    DISPLACEMENT "displacement" "Displacement" "D" Displacement "20 cm3/rev",
        over(0.0, 2000.0), usual(2.0, 250.0), ALWAYS,
        "Volume delivered in one turn, without slip.",
        "M4.1";
    VOLUMETRIC_EFFICIENCY "volumetric_efficiency" "Volumetric efficiency when new" "eta_v"
        Ratio "95 %",
        over(10.0, 100.0), usual(80.0, 99.0), WEAR_FACTOR,
        "One point of the data sheet, from which the slip follows.",
        "M4.2";
    REFERENCE_PRESSURE "reference_pressure" "Pressure of that point" "p_ref" Pressure "150 bar",
        over(0.0, 1000.0), usual(50.0, 350.0), WEAR_FACTOR,
        "Pressure at which the volumetric efficiency holds.",
        "M4.2";
    REFERENCE_SPEED "reference_speed" "Speed of that point" "n_ref" AngularVelocity "1500 rpm",
        over(0.0, 20000.0), usual(500.0, 4000.0), WEAR_FACTOR,
        "Speed at which the volumetric efficiency holds.",
        "M4.2";
    REFERENCE_VISCOSITY "reference_viscosity" "Viscosity of that point" "nu_ref"
        KinematicViscosity "36 mm2/s",
        within(1.0, 2000.0), usual(10.0, 100.0), WEAR_FACTOR,
        "Viscosity at which the volumetric efficiency holds; slip grows as the oil thins.",
        "M4.2";
    REFERENCE_DENSITY "reference_density" "Density of that point" "rho_ref" Density "850 kg/m3",
        within(500.0, 1500.0), usual(820.0, 930.0), WEAR_FACTOR,
        "Density of the oil at the point of the data sheet.",
        "M4.2";
    WEAR "wear" "Wear factor" "" Ratio "1",
        within(1.0, 100.0), usual(1.0, 10.0), WEAR_FACTOR,
        "Multiplies the slip: 1 is a new pump, 3 a pump well used.",
        "M4.2";
    MEASURED_EFFICIENCY "measured_efficiency" "Measured volumetric efficiency" "eta_v"
        Ratio "90 %",
        over(10.0, 100.0), usual(60.0, 99.0), MEASURED,
        "Flow measured under pressure over flow measured without.",
        "M4.2";
    MEASURED_PRESSURE "measured_pressure" "Pressure of the measurement" "p_ref"
        Pressure "150 bar",
        over(0.0, 1000.0), usual(30.0, 350.0), MEASURED,
        "Pressure at which the efficiency was measured.",
        "M4.2";
    MEASURED_SPEED "measured_speed" "Speed of the measurement" "n_ref"
        AngularVelocity "1500 rpm",
        over(0.0, 20000.0), usual(500.0, 4000.0), MEASURED,
        "Speed at which the efficiency was measured.",
        "M4.2";
    MEASURED_VISCOSITY "measured_viscosity" "Viscosity of the measurement" "nu_ref"
        KinematicViscosity "36 mm2/s",
        within(1.0, 2000.0), usual(8.0, 200.0), MEASURED,
        "Viscosity of the oil while the efficiency was measured.",
        "M4.2";
    MEASURED_DENSITY "measured_density" "Density of the measurement" "rho_ref"
        Density "850 kg/m3",
        within(500.0, 1500.0), usual(820.0, 930.0), MEASURED,
        "Density of the oil while the efficiency was measured.",
        "M4.2";
    HYDROMECHANICAL_EFFICIENCY "hydromechanical_efficiency" "Hydromechanical efficiency" "eta_hm"
        Ratio "90 %",
        over(10.0, 100.0), usual(80.0, 97.0), ALWAYS,
        "Torque without losses over shaft torque; sets the load on the prime mover.",
        "M4.3";
    AERATION_LOSS "aeration_loss" "Delivery lost to compression" "aer" Ratio "1",
        within(0.0, 1.0), usual(0.0, 1.0), ALWAYS,
        "1 counts the compression of the aerated oil as lost delivery, 0 does not.",
        "M4.1";
    TEETH "teeth" "Teeth" "z" Count "12",
        within(6.0, 60.0), usual(8.0, 20.0), GEAR,
        "Teeth of each gear; sets frequency and size of the ripple.",
        "M4.4";
    PRESSURE_ANGLE "pressure_angle" "Pressure angle of the teeth" "alpha_z" Angle "20 deg",
        within(10.0, 35.0), usual(14.5, 28.0), GEAR,
        "Pressure angle of the gears in mesh; a larger one ripples less.",
        "M4.4; Manring & Kasaragadda 2003";
    PISTONS "pistons" "Pistons" "N" Count "9",
        within(3.0, 31.0), usual(5.0, 13.0), PISTON,
        "Number of pistons; an odd number ripples less.",
        "M4.4";
    RIPPLE_FACTOR "ripple_factor" "Factor on the ripple" "rip" Ratio "1",
        within(0.0, 10.0), usual(0.2, 3.0), RIPPLE,
        "Measured ripple over kinematic ripple; 1 is kinematics alone.",
        "M4.4";
    SUCTION_LENGTH "suction_length" "Suction hose length" "l_suc" Length "1.2 m",
        over(0.0, 20.0), usual(0.2, 4.0), SUCTION,
        "Length of the hose from tank to pump.",
        "M4.5";
    SUCTION_BORE "suction_bore" "Suction hose bore" "d_suc" Length "32 mm",
        over(1.0, 200.0), usual(15.0, 80.0), SUCTION,
        "Bore of that hose; a narrow one starves the pump in cold oil.",
        "M4.5";
    SUCTION_LOSS "suction_loss" "Loss factor of fittings and strainer" "K_suc" Ratio "4",
        within(0.0, 1000.0), usual(1.0, 30.0), SUCTION,
        "Sum of loss factors, referred to the velocity in the hose.",
        "M4.5";
    SUCTION_VOLUME "suction_volume" "Volume ahead of the pump" "V_suc" Volume "300 cm3",
        over(0.0, 20000.0), usual(20.0, 5000.0), SUCTION,
        "Volume of the node between hose and pump.",
        "M4.5";
    SUCTION_WALL_MODULUS "suction_wall_modulus" "Wall stiffness of the suction hose" "B_w,suc"
        BulkModulus "0.1 GPa",
        over(0.0, 1e6), usual(0.01, 10.0), SUCTION,
        "Bulk modulus that the hose wall adds in series with the oil.",
        "M1.5, M4.5";
    EMPTY_PRESSURE "empty_pressure" "Absolute pressure of no filling" "p_empty"
        Pressure "0.2 bar",
        within(0.0, 1.0), usual(0.02, 0.5), SUCTION,
        "Absolute inlet pressure at which the pump gets only vapour and air.",
        "M4.5; common practice, no source";
    FULL_PRESSURE "full_pressure" "Absolute pressure of full filling" "p_full"
        Pressure "0.8 bar",
        over(0.0, 2.0), usual(0.5, 1.0), SUCTION,
        "Absolute inlet pressure from which on the pump fills.",
        "M4.5; common practice, no source";
}
