//! The priority flow control valve: spool, spring, lands, volumes (M5).

use super::{ALWAYS, over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, ValveFriction, ValveLand, when};

const CHAMFER: &[Condition] = &[when(ChoiceId::ValveLand, &[ValveLand::Chamfer as u8])];
const HOLES: &[Condition] = &[when(ChoiceId::ValveLand, &[ValveLand::RoundHoles as u8])];
const NOTCHES: &[Condition] = &[when(ChoiceId::ValveLand, &[ValveLand::Notches as u8])];
const SMOOTH: &[Condition] = &[when(
    ChoiceId::ValveFriction,
    &[ValveFriction::Smooth as u8],
)];
const BRISTLE: &[Condition] = &[when(
    ChoiceId::ValveFriction,
    &[ValveFriction::Bristle as u8],
)];

rows! { "valve" from super::pump::END;
    SPOOL_DIAMETER "spool_diameter" "Spool diameter" "d" Length "20 mm",
        over(1.0, 150.0), usual(8.0, 50.0), ALWAYS,
        "Diameter of the spool; sets the end areas and the width of the land.",
        "M5.3, M5.9";
    SPOOL_MASS "spool_mass" "Spool mass" "m" Mass "110 g",
        over(0.0, 20000.0), usual(10.0, 2000.0), ALWAYS,
        "Mass of the spool with a third of the spring.",
        "M5.9";
    SPRING_PRELOAD "spring_preload" "Spring preload" "F_0" Force "176 N",
        over(0.0, 20000.0), usual(20.0, 1000.0), ALWAYS,
        "Spring force with the excess land shut; over the end area it is the pressure margin.",
        "M5.9";
    SPRING_RATE "spring_rate" "Spring rate" "k" SpringRate "6 N/mm",
        over(0.0, 1000.0), usual(0.5, 50.0), ALWAYS,
        "Stiffness of the spring; a stiff one lets the priority flow rise with excess flow.",
        "M5.9";
    OVERLAP "overlap" "Overlap of the excess land" "x_ov" Length "1.5 mm",
        within(-10.0, 30.0), usual(0.0, 6.0), ALWAYS,
        "Travel before the excess land opens.",
        "M5.3";
    STROKE "stroke" "Stroke" "x_max" Length "8 mm",
        over(0.0, 100.0), usual(2.0, 25.0), ALWAYS,
        "Travel at which the spool meets its stop on the spring side.",
        "M5.10";
    CHAMFER_ANGLE "chamfer_angle" "Chamfer angle" "al" Angle "10 deg",
        over(0.5, 89.0), usual(3.0, 45.0), CHAMFER,
        "Angle of the chamfer to the axis; a slender one opens gently and damps.",
        "M5.3";
    CHAMFER_LENGTH "chamfer_length" "Chamfer length" "L_c" Length "4 mm",
        over(0.0, 50.0), usual(0.3, 10.0), CHAMFER,
        "Axial length of the chamfer; beyond it the sharp edge opens.",
        "M5.3";
    LAND_HOLE_COUNT "land_hole_count" "Holes of the excess land" "N_e" Count "6",
        within(1.0, 64.0), usual(2.0, 16.0), HOLES,
        "Number of round holes that the land uncovers.",
        "M5.3";
    LAND_HOLE_DIAMETER "land_hole_diameter" "Diameter of these holes" "d_e" Length "5 mm",
        over(0.1, 50.0), usual(1.0, 15.0), HOLES,
        "Diameter of each hole; also the travel from first opening to fully open.",
        "M5.3";
    NOTCH_COUNT "notch_count" "Notches of the excess land" "N_n" Count "4",
        within(1.0, 64.0), usual(2.0, 12.0), NOTCHES,
        "Number of V-shaped notches in the land.",
        "M5.3";
    NOTCH_ANGLE "notch_angle" "Notch angle" "beta_n" Angle "60 deg",
        over(1.0, 170.0), usual(20.0, 120.0), NOTCHES,
        "Full angle at the tip of each notch; a narrow one opens gently.",
        "M5.3";
    NOTCH_LENGTH "notch_length" "Notch length" "L_n" Length "2.5 mm",
        over(0.0, 50.0), usual(0.3, 10.0), NOTCHES,
        "Axial length of each notch; beyond it the sharp edge opens.",
        "M5.3";
    PORT_AREA "port_area" "Area of the excess port" "A_port" Area "150 mm2",
        over(0.0, 10000.0), usual(20.0, 1500.0), ALWAYS,
        "Area of the passage behind the land: no opening is larger.",
        "M5.3";
    CLEARANCE "clearance" "Radial clearance" "c" Length "8 um",
        over(0.0, 200.0), usual(3.0, 25.0), ALWAYS,
        "Radial gap of the spool; leakage grows with its cube.",
        "M5.4, M5.6";
    LAND_LENGTH "land_length" "Length of the oil film" "L_land" Length "30 mm",
        over(0.0, 500.0), usual(5.0, 100.0), ALWAYS,
        "Length of all lands that slide; sets the viscous damping of the spool.",
        "M5.9";
    END_LAND_LENGTH "end_land_length" "Length of an end land" "L_end" Length "8 mm",
        over(0.0, 200.0), usual(2.0, 30.0), ALWAYS,
        "Sealing length between a port and the end chamber beside it.",
        "M5.6";
    EXTRA_DAMPING "extra_damping" "Extra damping" "c_x" Damping "0 N s/m",
        within(0.0, 100000.0), usual(0.0, 500.0), ALWAYS,
        "Viscous damping beyond the oil film, such as a damper on the spool.",
        "M5.9";
    COULOMB_FRICTION "coulomb_friction" "Coulomb friction" "F_coul" Force "1 N",
        within(0.0, 5000.0), usual(0.0, 150.0), ALWAYS,
        "Dry friction of the spool; dirt or a bent spool raises it.",
        "M5.9, M5.9b";
    FRICTION_VELOCITY "friction_velocity" "Velocity of smooth friction" "v_s" Velocity "2 mm/s",
        over(0.0, 1000.0), usual(0.2, 20.0), SMOOTH,
        "Velocity at which smooth friction has grown to 76 % of the Coulomb friction.",
        "M5.9";
    BREAKAWAY_FRICTION "breakaway_friction" "Breakaway friction" "F_s" Force "1.5 N",
        over(0.0, 10000.0), usual(0.1, 300.0), BRISTLE,
        "Force that sets the spool sliding; at least the Coulomb friction.",
        "M5.9b; Canudas de Wit et al. 1995";
    STRIBECK_VELOCITY "stribeck_velocity" "Stribeck velocity" "v_st" Velocity "5 mm/s",
        over(0.0, 1000.0), usual(0.5, 100.0), BRISTLE,
        "Velocity over which friction falls from breakaway to Coulomb.",
        "M5.9b; Canudas de Wit et al. 1995";
    BRISTLE_STIFFNESS "bristle_stiffness" "Bristle stiffness" "sigma_0" SpringRate "200 N/mm",
        over(0.0, 1e6), usual(10.0, 1e5), BRISTLE,
        "Stiffness before sliding begins; some 5 um of travel should reach the friction.",
        "M5.9b; Canudas de Wit et al. 1995";
    BRISTLE_DAMPING "bristle_damping" "Bristle damping" "sigma_1" Damping "5 N s/m",
        within(0.0, 100000.0), usual(0.0, 1000.0), BRISTLE,
        "Damping before sliding begins.",
        "M5.9b; Canudas de Wit et al. 1995";
    BRISTLE_VISCOUS "bristle_viscous" "Viscous part of the friction" "sigma_2" Damping "0 N s/m",
        within(0.0, 100000.0), usual(0.0, 500.0), BRISTLE,
        "Viscous friction beyond that of the oil film.",
        "M5.9b; Canudas de Wit et al. 1995";
    EXCESS_JET_ANGLE "excess_jet_angle" "Jet angle of the excess land" "th_e" Angle "69 deg",
        within(0.0, 90.0), usual(15.0, 90.0), ALWAYS,
        "Angle of the jet to the axis: a sharp edge gives 69 deg, a chamfer lies nearer its own.",
        "M5.7; von Mises 1917";
    PRIORITY_JET_ANGLE "priority_jet_angle" "Jet angle of the priority holes" "th_c"
        Angle "69 deg",
        within(0.0, 90.0), usual(15.0, 90.0), ALWAYS,
        "Angle of the jet to the axis where the priority holes are throttled.",
        "M5.7; von Mises 1917";
    JET_FORCE_FACTOR "jet_force_factor" "Factor on the jet forces" "f_jet" Ratio "1",
        within(0.0, 3.0), usual(0.0, 1.2), ALWAYS,
        "1 is the theory of steady jet forces, 0 leaves them out.",
        "M5.7; Merritt, Hydraulic Control Systems, 1967";
    DAMPING_LENGTH "damping_length" "Damping length of the jet" "L_d" Length "0 mm",
        within(-100.0, 100.0), usual(-30.0, 30.0), ALWAYS,
        "Length of the accelerated oil column; positive damps the spool, negative excites it.",
        "M5.8; Merritt, Hydraulic Control Systems, 1967, ch. 5";
    STOP_STIFFNESS "stop_stiffness" "Stiffness of the stops" "k_stop" SpringRate "20000 N/mm",
        over(0.0, 1e7), usual(1000.0, 200_000.0), ALWAYS,
        "Contact stiffness of both end stops of the spool.",
        "M5.10; Hunt & Crossley 1975";
    STOP_LOSS "stop_loss" "Loss of the stops" "a_stop" ContactLoss "1 s/m",
        within(0.0, 100.0), usual(0.05, 5.0), ALWAYS,
        "Loss factor of the stops: how little the spool rebounds.",
        "M5.10; Hunt & Crossley 1975";
    INLET_VOLUME "inlet_volume" "Volume from pump to valve" "V_in" Volume "150 cm3",
        over(0.0, 20000.0), usual(10.0, 2000.0), ALWAYS,
        "Volume of pump hose and inlet gallery; a small one makes the pressure quick.",
        "M5.12";
    INLET_WALL_MODULUS "inlet_wall_modulus" "Wall stiffness of the pump hose" "B_w,in"
        BulkModulus "0.6 GPa",
        over(0.0, 1e6), usual(0.1, 50.0), ALWAYS,
        "Bulk modulus that the hose wall adds in series with the oil.",
        "M1.5";
    BORE_VOLUME "bore_volume" "Volume of the spool's bore" "V_b" Volume "1.5 cm3",
        over(0.0, 1000.0), usual(0.1, 100.0), ALWAYS,
        "Volume behind the fixed orifice, up to the priority holes.",
        "M5.11";
    HEAD_VOLUME "head_volume" "Volume of the head end" "V_h0" Volume "2 cm3",
        over(0.0, 1000.0), usual(0.1, 100.0), ALWAYS,
        "Volume at the head end with the spool at zero travel; grows as the spool opens.",
        "M5.11";
    SPRING_VOLUME "spring_volume" "Volume of the spring end" "V_s0" Volume "4 cm3",
        over(0.0, 1000.0), usual(0.3, 150.0), ALWAYS,
        "Volume of the spring chamber at zero travel; must exceed end area times stroke.",
        "M5.11";
    PRIORITY_VOLUME "priority_volume" "Volume of the priority port" "V_c" Volume "20 cm3",
        over(0.0, 5000.0), usual(1.0, 300.0), ALWAYS,
        "Volume from the priority holes to the start of the line.",
        "M7.1";
}
