//! Steering side: bench throttle and steering unit (M7.4 to M7.6).

use super::{over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, ShockReliefs, SteeringKind, when};

const BENCH: &[Condition] = &[when(
    ChoiceId::SteeringKind,
    &[SteeringKind::BenchThrottle as u8],
)];
const UNIT: &[Condition] = &[when(
    ChoiceId::SteeringKind,
    &[SteeringKind::SteeringUnit as u8],
)];
const SHOCK: &[Condition] = &[
    when(ChoiceId::SteeringKind, &[SteeringKind::SteeringUnit as u8]),
    when(ChoiceId::ShockReliefs, &[ShockReliefs::Fitted as u8]),
];
const ANY: &[Condition] = super::ALWAYS;

rows! { "steering" from super::line::END;
    CHECK_OPENING_PRESSURE "check_opening_pressure" "Opening pressure of check valves" "p_chk"
        Pressure "0.3 bar",
        over(0.0, 50.0), usual(0.05, 3.0), ANY,
        "Pressure over which the check valves of the steering side open.",
        "M2.5";
    BENCH_DISCHARGE "bench_discharge" "Discharge coefficient of the bench throttle" "Cd_st"
        Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), BENCH,
        "Turbulent discharge coefficient; its area and the pressure behind are inputs.",
        "M7.4";
    BENCH_TRANSITION "bench_transition" "Transition of the bench throttle" "Re_t,st" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), BENCH,
        "Reynolds number of transition of the bench throttle.",
        "M2.3";
    DISPLACEMENT "displacement" "Displacement of the steering unit" "D_su"
        Displacement "125 cm3/rev",
        over(0.0, 5000.0), usual(40.0, 1000.0), UNIT,
        "Oil metered for each turn of the wheel; with the wheel rate it is the demand.",
        "M7.5";
    BYPASS_AREA "bypass_area" "Neutral bypass area" "A_n0" Area "45 mm2",
        over(0.0, 2000.0), usual(5.0, 300.0), UNIT,
        "Passage from supply to return while nobody steers.",
        "M7.5";
    BYPASS_LEAK_AREA "bypass_leak_area" "Shut area of the neutral bypass" "A_n,leak" Area "0 mm2",
        within(0.0, 100.0), usual(0.0, 1.0), UNIT,
        "Area that stays open when the neutral bypass is shut.",
        "M7.5";
    BYPASS_SHUT "bypass_shut" "Deflection that shuts the bypass" "d_n" Angle "5 deg",
        over(0.0, 45.0), usual(1.0, 15.0), UNIT,
        "Deflection between wheel and meter at which the neutral bypass is shut.",
        "M7.5";
    BYPASS_DISCHARGE "bypass_discharge" "Discharge coefficient of the neutral bypass" "Cd_n"
        Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), UNIT,
        "Turbulent discharge coefficient of the neutral bypass.",
        "M2.1";
    BYPASS_TRANSITION "bypass_transition" "Transition of the neutral bypass" "Re_t,n" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), UNIT,
        "Reynolds number of transition of the neutral bypass.",
        "M2.3";
    SUPPLY_AREA "supply_area" "Area from supply to cylinder" "A_1" Area "18 mm2",
        over(0.0, 2000.0), usual(3.0, 200.0), UNIT,
        "Full area of the edges on the way to the cylinder.",
        "M7.5";
    RETURN_AREA "return_area" "Area from cylinder to return" "A_4" Area "22 mm2",
        over(0.0, 2000.0), usual(3.0, 200.0), UNIT,
        "Full area of the edge on the way back from the cylinder.",
        "M7.5";
    DEAD_BAND "dead_band" "Deflection that opens the edges" "d_d" Angle "1 deg",
        within(0.0, 45.0), usual(0.2, 5.0), UNIT,
        "Deflection from which on the edges open; must lie below the shutting of the bypass.",
        "M7.5";
    FULL_DEFLECTION "full_deflection" "Deflection of full opening" "d_f" Angle "8 deg",
        over(0.0, 90.0), usual(3.0, 20.0), UNIT,
        "Deflection at which the edges are fully open.",
        "M7.5";
    STOP_DEFLECTION "stop_deflection" "Largest deflection" "d_stop" Angle "10 deg",
        over(0.0, 90.0), usual(4.0, 25.0), UNIT,
        "Deflection at which the wheel can no longer outrun the oil.",
        "M7.5";
    STOP_BAND "stop_band" "Band ahead of it" "d_band" Angle "2 deg",
        over(0.0, 45.0), usual(0.3, 5.0), UNIT,
        "Deflection over which the wheel meets that limit.",
        "M7.5";
    EDGE_DISCHARGE "edge_discharge" "Discharge coefficient of the edges" "Cd_1" Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), UNIT,
        "Turbulent discharge coefficient of the edges to and from the cylinder.",
        "M2.1";
    EDGE_TRANSITION "edge_transition" "Transition of the edges" "Re_t,1" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), UNIT,
        "Reynolds number of transition of the edges to and from the cylinder.",
        "M2.3";
    CENTRING_TIME "centring_time" "Time constant of the centring springs" "tau_c" Time "50 ms",
        over(0.0, 5000.0), usual(10.0, 300.0), UNIT,
        "How quickly the deflection goes back to zero when the wheel rests.",
        "M7.5";
    CENTRING_RATE "centring_rate" "Wheel rate of rest" "w_c" AngularVelocity "0.2 rad/s",
        over(0.0, 10.0), usual(0.02, 1.0), UNIT,
        "Wheel rate below which the centring springs show.",
        "M7.5";
    SUPPLY_LEAKAGE "supply_leakage" "Leakage from supply to return" "K_u"
        LeakageCoefficient "0 cm3/(min bar)",
        within(0.0, 5000.0), usual(0.0, 100.0), UNIT,
        "Internal leakage of a worn unit: oil that never reaches the cylinder.",
        "M7.5";
    PORT_LEAKAGE "port_leakage" "Leakage from a cylinder port" "K_d"
        LeakageCoefficient "0 cm3/(min bar)",
        within(0.0, 5000.0), usual(0.0, 100.0), UNIT,
        "Leakage from each cylinder port to return: the wheels drift.",
        "M7.5";
    LEAKAGE_VISCOSITY "leakage_viscosity" "Viscosity of these leakages" "nu_ref"
        KinematicViscosity "36 mm2/s",
        within(1.0, 2000.0), usual(8.0, 200.0), UNIT,
        "Viscosity at which both leakages hold; they grow as the oil thins.",
        "M7.5";
    SUCTION_CHECK_AREA "suction_check_area" "Area of the suction checks" "A_suc" Area "40 mm2",
        within(0.0, 2000.0), usual(5.0, 300.0), UNIT,
        "Area of each suction check valve, from return to a cylinder port.",
        "M7.6";
    SUCTION_CHECK_DISCHARGE "suction_check_discharge" "Discharge coefficient of the suction checks"
        "Cd_suc" Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), UNIT,
        "Turbulent discharge coefficient of the suction checks.",
        "M2.1";
    SUCTION_CHECK_TRANSITION "suction_check_transition" "Transition of the suction checks"
        "Re_t,suc" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), UNIT,
        "Reynolds number of transition of the suction checks.",
        "M2.3";
    SHOCK_CRACKING_PRESSURE "shock_cracking_pressure" "Cracking pressure of the shock reliefs"
        "p_crack" Pressure "200 bar",
        over(0.0, 1000.0), usual(50.0, 350.0), SHOCK,
        "Pressure of a cylinder port over return at which its shock relief opens.",
        "M7.6";
    SHOCK_FULL_FLOW_PRESSURE "shock_full_flow_pressure" "Full-flow pressure of the shock reliefs"
        "p_full" Pressure "225 bar",
        over(0.0, 1500.0), usual(50.0, 400.0), SHOCK,
        "Pressure at which a shock relief passes its full flow.",
        "M7.6";
    SHOCK_FULL_FLOW "shock_full_flow" "Full flow of the shock reliefs" "Q_full" Flow "25 L/min",
        over(0.0, 2000.0), usual(2.0, 300.0), SHOCK,
        "Flow of a shock relief at its full-flow pressure.",
        "M7.6";
    SHOCK_OPENING_WIDTH "shock_opening_width" "Width of first opening of the shock reliefs"
        "w_rel" Pressure "0.2 bar",
        over(0.0, 50.0), usual(0.02, 2.0), SHOCK,
        "Pressure over which the first opening is rounded; they follow at once.",
        "M6.1, M7.6";
    SHOCK_LEAST_OPENING "shock_least_opening" "Least opening of the shock reliefs" "y_min"
        Ratio "0",
        within(0.0, 1.0), usual(0.0, 1.0), SHOCK,
        "Opening that they never close below: 0 sound, more leaking.",
        "M6.1";
    SHOCK_DISCHARGE "shock_discharge" "Discharge coefficient of the shock reliefs" "Cd"
        Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), SHOCK,
        "Turbulent discharge coefficient of the shock reliefs.",
        "M2.1";
    SHOCK_TRANSITION "shock_transition" "Transition of the shock reliefs" "Re_t" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), SHOCK,
        "Reynolds number of transition of the shock reliefs.",
        "M2.3";
}
