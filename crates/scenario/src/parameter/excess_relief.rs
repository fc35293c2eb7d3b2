//! Relief at the excess port (M6).

use super::{over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, ExcessReliefKind, when};

const FITTED: &[Condition] = &[when(
    ChoiceId::ExcessReliefKind,
    &[ExcessReliefKind::Direct as u8],
)];

rows! { "excess_relief" from super::lift::END;
    CRACKING_PRESSURE "cracking_pressure" "Cracking pressure" "p_crack" Pressure "180 bar",
        over(0.0, 1000.0), usual(20.0, 400.0), FITTED,
        "Pressure of the excess port over tank at which it begins to open.",
        "M6.1";
    FULL_FLOW_PRESSURE "full_flow_pressure" "Full-flow pressure" "p_full" Pressure "190 bar",
        over(0.0, 1500.0), usual(20.0, 450.0), FITTED,
        "Pressure at which it passes its full flow; the gap to cracking is the override.",
        "M6.1";
    FULL_FLOW "full_flow" "Full flow" "Q_full" Flow "50 L/min",
        over(0.0, 5000.0), usual(5.0, 500.0), FITTED,
        "Flow at the full-flow pressure; sets its full area.",
        "M6.1";
    TIME_CONSTANT "time_constant" "Time constant" "tau" Time "3 ms",
        over(0.0, 1000.0), usual(0.3, 30.0), FITTED,
        "Lag of the opening; a sluggish relief rings with a small excess volume.",
        "M6.1";
    OPENING_WIDTH "opening_width" "Width of first opening" "w_rel" Pressure "0.2 bar",
        over(0.0, 50.0), usual(0.02, 2.0), FITTED,
        "Pressure over which the first opening is rounded; numbers, not hardware.",
        "M6.1";
    LEAST_OPENING "least_opening" "Least opening" "y_min" Ratio "0",
        within(0.0, 1.0), usual(0.0, 1.0), FITTED,
        "Opening that it never closes below: 0 sound, more leaking or stuck open.",
        "M6.1";
    DISCHARGE "discharge" "Discharge coefficient" "Cd" Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), FITTED,
        "Turbulent discharge coefficient of its edge.",
        "M2.1";
    TRANSITION "transition" "Transition" "Re_t" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), FITTED,
        "Reynolds number of transition of its edge.",
        "M2.3";
}
