//! Lift cylinder on the excess side (M8.4).

use super::{over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, ExcessKind, when};

const LIFT: &[Condition] = &[when(
    ChoiceId::ExcessKind,
    &[ExcessKind::LiftCylinder as u8],
)];

rows! { "excess" from super::excess::END;
    LIFT_VALVE_AREA "lift_valve_area" "Area of the directional valve" "A_dv" Area "15 mm2",
        over(0.0, 2000.0), usual(1.0, 300.0), LIFT,
        "Area of each working edge at full command.",
        "M8.4";
    LIFT_NEUTRAL_AREA "lift_neutral_area" "Neutral passage" "A_nb" Area "40 mm2",
        within(0.0, 2000.0), usual(0.0, 300.0), LIFT,
        "Passage to return while nothing is commanded; 0 is a closed centre.",
        "M8.4";
    LIFT_VALVE_DISCHARGE "lift_valve_discharge" "Discharge coefficient of the directional valve"
        "Cd_dv" Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), LIFT,
        "Turbulent discharge coefficient of the directional valve.",
        "M2.1";
    LIFT_VALVE_TRANSITION "lift_valve_transition" "Transition of the directional valve"
        "Re_t,dv" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), LIFT,
        "Reynolds number of transition of the directional valve.",
        "M2.3";
    LIFT_CHECK_AREA "lift_check_area" "Area of the anti-cavitation checks" "A_acv" Area "30 mm2",
        within(0.0, 2000.0), usual(2.0, 300.0), LIFT,
        "Feeds a chamber from the return when the load runs ahead of the oil.",
        "M8.4";
    LIFT_CAP_AREA "lift_cap_area" "Cap area" "A_cap" Area "20 cm2",
        over(0.0, 2000.0), usual(2.0, 300.0), LIFT,
        "Piston area that lifts; for two cylinders the sum.",
        "M8.4";
    LIFT_ROD_AREA "lift_rod_area" "Rod-side area" "A_rod" Area "13 cm2",
        over(0.0, 2000.0), usual(1.0, 300.0), LIFT,
        "Piston area that lowers; for two cylinders the sum.",
        "M8.4";
    LIFT_CAP_DEAD_VOLUME "lift_cap_dead_volume" "Dead volume of the cap end" "V_cap0"
        Volume "80 cm3",
        over(0.0, 20000.0), usual(5.0, 2000.0), LIFT,
        "Volume of hose and cap end with the piston at its end.",
        "M8.4";
    LIFT_ROD_DEAD_VOLUME "lift_rod_dead_volume" "Dead volume of the rod end" "V_rod0"
        Volume "80 cm3",
        over(0.0, 20000.0), usual(5.0, 2000.0), LIFT,
        "Volume of hose and rod end with the piston at its end.",
        "M8.4";
    LIFT_WALL_MODULUS "lift_wall_modulus" "Wall stiffness of cylinder and hoses" "B_w,l"
        BulkModulus "0.8 GPa",
        over(0.0, 1e6), usual(0.1, 50.0), LIFT,
        "Bulk modulus that the walls add in series with the oil.",
        "M1.5";
    LIFT_STROKE "lift_stroke" "Lift stroke" "stroke" Length "400 mm",
        over(1.0, 10000.0), usual(50.0, 3000.0), LIFT,
        "Travel of the lift cylinder.",
        "M8.4";
    LIFT_PISTON_LEAKAGE "lift_piston_leakage" "Leakage across the piston" "K_cyl"
        LeakageCoefficient "0.06 cm3/(min bar)",
        over(0.0, 5000.0), usual(0.001, 100.0), LIFT,
        "Leakage of the piston seal; above 0, else shut ports leave the pressure undetermined.",
        "M7.6, M8.4";
    LIFT_MASS "lift_mass" "Moving mass" "M_l" Mass "600 kg",
        over(0.0, 200_000.0), usual(20.0, 20000.0), LIFT,
        "Load and arm, referred to the piston.",
        "M8.4";
    LIFT_LOAD "lift_load" "Steady load" "F_l" Force "9 kN",
        within(-2000.0, 2000.0), usual(-100.0, 300.0), LIFT,
        "Weight and other steady force against lifting.",
        "M8.4";
    LIFT_DAMPING "lift_damping" "Viscous damping" "c_l" Damping "6 kN s/m",
        within(0.0, 10000.0), usual(0.1, 500.0), LIFT,
        "Damping of joints and seals, referred to the piston.",
        "M8.4";
    LIFT_DRY_FRICTION "lift_dry_friction" "Dry friction" "F_d" Force "300 N",
        within(0.0, 500_000.0), usual(0.0, 10000.0), LIFT,
        "Dry friction of joints and seals.",
        "M8.4";
    LIFT_DRY_VELOCITY "lift_dry_velocity" "Velocity of dry friction" "v_d" Velocity "2 mm/s",
        over(0.0, 1000.0), usual(0.2, 50.0), LIFT,
        "Velocity at which dry friction has grown to 76 %.",
        "M8.4";
    LIFT_END_STIFFNESS "lift_end_stiffness" "Stiffness of the ends" "k_end"
        SpringRate "50000 N/mm",
        over(0.0, 1e7), usual(1000.0, 500_000.0), LIFT,
        "Contact stiffness at both ends of the stroke.",
        "M8.4; Hunt & Crossley 1975";
    LIFT_END_LOSS "lift_end_loss" "Loss of the ends" "a_end" ContactLoss "1 s/m",
        within(0.0, 100.0), usual(0.05, 5.0), LIFT,
        "Loss factor at both ends: how little the cylinder rebounds.",
        "M8.4; Hunt & Crossley 1975";
}
