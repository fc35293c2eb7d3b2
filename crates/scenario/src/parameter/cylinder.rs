//! Steering cylinder and tyres (M7.7).

use super::{over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, SteeringKind, TyreFriction, when};

const UNIT: &[Condition] = &[when(
    ChoiceId::SteeringKind,
    &[SteeringKind::SteeringUnit as u8],
)];
const SMOOTH: &[Condition] = &[
    when(ChoiceId::SteeringKind, &[SteeringKind::SteeringUnit as u8]),
    when(ChoiceId::TyreFriction, &[TyreFriction::Smooth as u8]),
];
const BRISTLE: &[Condition] = &[
    when(ChoiceId::SteeringKind, &[SteeringKind::SteeringUnit as u8]),
    when(ChoiceId::TyreFriction, &[TyreFriction::Bristle as u8]),
];

rows! { "steering" from super::steering::END;
    AREA_A "cylinder_area_a" "Piston area of chamber A" "A_A" Area "25 cm2",
        over(0.0, 1000.0), usual(3.0, 200.0), UNIT,
        "Area that extends the cylinder; for two cylinders the sum.",
        "M7.7";
    AREA_B "cylinder_area_b" "Piston area of chamber B" "A_B" Area "25 cm2",
        over(0.0, 1000.0), usual(3.0, 200.0), UNIT,
        "Area that retracts the cylinder; for two cylinders the sum.",
        "M7.7";
    DEAD_VOLUME_A "cylinder_dead_volume_a" "Dead volume of chamber A" "V_A0" Volume "60 cm3",
        over(0.0, 20000.0), usual(5.0, 2000.0), UNIT,
        "Volume of hose and chamber A with the piston at its end.",
        "M7.7";
    DEAD_VOLUME_B "cylinder_dead_volume_b" "Dead volume of chamber B" "V_B0" Volume "60 cm3",
        over(0.0, 20000.0), usual(5.0, 2000.0), UNIT,
        "Volume of hose and chamber B with the piston at its end.",
        "M7.7";
    WALL_MODULUS "cylinder_wall_modulus" "Wall stiffness of cylinder and hoses" "B_w,cyl"
        BulkModulus "0.8 GPa",
        over(0.0, 1e6), usual(0.1, 50.0), UNIT,
        "Bulk modulus that the walls add in series with the oil.",
        "M1.5";
    STROKE "cylinder_stroke" "Cylinder stroke" "stroke" Length "200 mm",
        over(1.0, 5000.0), usual(50.0, 1000.0), UNIT,
        "Travel from lock to lock.",
        "M7.7";
    PISTON_LEAKAGE "piston_leakage" "Leakage across the piston" "K_cyl"
        LeakageCoefficient "0.06 cm3/(min bar)",
        over(0.0, 5000.0), usual(0.001, 100.0), UNIT,
        "Leakage of the piston seal; above 0, else shut ports leave the pressure undetermined.",
        "M7.6";
    LOAD_MASS "load_mass" "Moving mass" "M" Mass "800 kg",
        over(0.0, 200_000.0), usual(50.0, 20000.0), UNIT,
        "Wheels, links and frame, referred to the piston.",
        "M7.7";
    DAMPING "load_damping" "Viscous damping of the load" "c_t" Damping "30 kN s/m",
        within(0.0, 10000.0), usual(1.0, 500.0), UNIT,
        "Damping of tyres and joints, referred to the piston.",
        "M7.7";
    TYRE_RATE "tyre_rate" "Spring rate of the tyres" "k_t" SpringRate "40 N/mm",
        within(0.0, 10000.0), usual(0.0, 1000.0), UNIT,
        "Restoring stiffness of the tyres, referred to the piston.",
        "M7.7";
    TYRE_FRICTION_FORCE "tyre_friction_force" "Scrub friction of the tyres" "F_t" Force "10 kN",
        within(0.0, 2000.0), usual(0.5, 200.0), UNIT,
        "Dry friction of the tyres on the ground, referred to the piston.",
        "M7.7, M5.9b";
    TYRE_FRICTION_VELOCITY "tyre_friction_velocity" "Velocity of smooth scrub friction" "v_t"
        Velocity "2 mm/s",
        over(0.0, 1000.0), usual(0.2, 50.0), SMOOTH,
        "Velocity at which smooth friction has grown to 76 % of the scrub friction.",
        "M7.7";
    TYRE_BREAKAWAY "tyre_breakaway" "Breakaway force of the tyres" "F_s" Force "11 kN",
        over(0.0, 4000.0), usual(0.5, 400.0), BRISTLE,
        "Force that sets the tyres sliding; at least the scrub friction.",
        "M5.9b";
    TYRE_STRIBECK_VELOCITY "tyre_stribeck_velocity" "Stribeck velocity of the tyres" "v_st"
        Velocity "10 mm/s",
        over(0.0, 1000.0), usual(0.5, 100.0), BRISTLE,
        "Velocity over which the scrub friction falls from breakaway to its sliding value.",
        "M5.9b";
    TYRE_BRISTLE_STIFFNESS "tyre_bristle_stiffness" "Wind-up stiffness of the tyres" "sigma_0"
        SpringRate "5000 N/mm",
        over(0.0, 1e6), usual(100.0, 1e5), BRISTLE,
        "Stiffness with which the tyres wind up before they slide.",
        "M5.9b";
    TYRE_BRISTLE_DAMPING "tyre_bristle_damping" "Wind-up damping of the tyres" "sigma_1"
        Damping "10 kN s/m",
        within(0.0, 10000.0), usual(0.0, 500.0), BRISTLE,
        "Damping while the tyres wind up.",
        "M5.9b";
    TYRE_BRISTLE_VISCOUS "tyre_bristle_viscous" "Viscous part of the scrub friction" "sigma_2"
        Damping "0 kN s/m",
        within(0.0, 10000.0), usual(0.0, 500.0), BRISTLE,
        "Viscous friction of sliding tyres.",
        "M5.9b";
    STOP_STIFFNESS "end_stiffness" "Stiffness of the locks" "k_end" SpringRate "50000 N/mm",
        over(0.0, 1e7), usual(1000.0, 500_000.0), UNIT,
        "Contact stiffness at both ends of the cylinder.",
        "M7.7; Hunt & Crossley 1975";
    STOP_LOSS "end_loss" "Loss of the locks" "a_end" ContactLoss "1 s/m",
        within(0.0, 100.0), usual(0.05, 5.0), UNIT,
        "Loss factor at both ends: how little the cylinder rebounds.",
        "M7.7; Hunt & Crossley 1975";
}
