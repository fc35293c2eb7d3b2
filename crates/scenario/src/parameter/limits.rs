//! Limits of the checks. Defaults are common practice, no source, unless one is named.

use super::{ALWAYS, over, rows, usual, within};

const PRACTICE: &str = "common practice, no source";
const GUIDES: &str = "line-sizing tables of fluid power handbooks";

rows! { "limits" from super::manoeuvre::END;
    PRIORITY_AT_IDLE "priority_at_idle" "Priority flow at low idle" "" Ratio "100 %",
        within(0.0, 500.0), usual(80.0, 150.0), ALWAYS,
        "Least settled priority flow at low idle, relative to the demand of the steering.",
        PRACTICE;
    REGULATION "regulation" "Spread of the priority flow" "" Ratio "10 %",
        over(0.0, 100.0), usual(2.0, 25.0), ALWAYS,
        "Largest deviation of the settled priority flow from the set flow over the map.",
        PRACTICE;
    OVERSHOOT "overshoot" "Overshoot" "" Ratio "25 %",
        within(0.0, 500.0), usual(5.0, 60.0), ALWAYS,
        "Largest excess of the priority flow over its settled value after an event.",
        PRACTICE;
    SETTLING "settling" "Settling time" "" Time "0.3 s",
        over(0.0, 60.0), usual(0.05, 2.0), ALWAYS,
        "Time after an event until the priority flow stays within the band below.",
        PRACTICE;
    SETTLING_BAND "settling_band" "Settling band" "" Ratio "5 %",
        over(0.0, 50.0), usual(1.0, 10.0), ALWAYS,
        "Band around the settled priority flow that counts as settled.",
        PRACTICE;
    DAMPING "damping" "Least damping ratio" "" Ratio "0.2",
        within(0.0, 1.0), usual(0.05, 0.5), ALWAYS,
        "Least damping ratio of an oscillating mode over the operating map.",
        PRACTICE;
    DROPOUT "dropout" "Steering dropout" "" Time "0.1 s",
        within(0.0, 60.0), usual(0.02, 1.0), ALWAYS,
        "Longest time for which the wheel may be short of oil.",
        PRACTICE;
    DROPOUT_SHORTFALL "dropout_shortfall" "Shortfall that counts" "" Ratio "5 %",
        over(0.0, 100.0), usual(1.0, 20.0), ALWAYS,
        "Shortfall of the wheel rate from which on the driver feels it.",
        PRACTICE;
    STEERING_LIMIT "steering_limit" "Priority relief below main relief" "" Pressure "10 bar",
        within(0.0, 200.0), usual(3.0, 50.0), ALWAYS,
        "Least gap from full flow of the priority relief, with the spring's drop, to the main relief.",
        PRACTICE;
    CONSUMER_AT_LOCK "consumer_at_lock" "Consumer flow at the lock" "" Ratio "80 %",
        within(0.0, 150.0), usual(30.0, 100.0), ALWAYS,
        "Flow of the excess consumer while the steering is held at the lock, relative to before.",
        PRACTICE;
    PILOT_CLEARANCE "pilot_clearance" "Excess side below the pilot" "" Pressure "10 bar",
        within(0.0, 200.0), usual(3.0, 50.0), ALWAYS,
        "Least gap from the highest excess pressure to a pilot relief: beyond it the steering can be lost.",
        PRACTICE;
    PEAK_PRESSURE "peak_pressure" "Peak pressure" "" Ratio "100 %",
        over(0.0, 300.0), usual(70.0, 150.0), ALWAYS,
        "Largest pressure at each rated point, relative to its rating.",
        PRACTICE;
    STROKE_RESERVE "stroke_reserve" "Stroke in reserve" "" Ratio "10 %",
        within(0.0, 100.0), usual(2.0, 40.0), ALWAYS,
        "Distance of the regulating spool from its stop at top speed, relative to the stroke.",
        PRACTICE;
    SUCTION_VELOCITY "suction_velocity" "Velocity in the suction line" "" Velocity "1.2 m/s",
        over(0.0, 50.0), usual(0.5, 1.5), ALWAYS,
        "Largest mean velocity in the suction line.",
        GUIDES;
    PRESSURE_VELOCITY "pressure_velocity" "Velocity in pressure lines" "" Velocity "6 m/s",
        over(0.0, 50.0), usual(3.0, 10.0), ALWAYS,
        "Largest mean velocity in pressure lines.",
        GUIDES;
    RETURN_VELOCITY "return_velocity" "Velocity in the return line" "" Velocity "4 m/s",
        over(0.0, 50.0), usual(2.0, 4.6), ALWAYS,
        "Largest mean velocity in the return line.",
        GUIDES;
    RIPPLE_CLEARANCE "ripple_clearance" "Ripple apart from modes" "" Ratio "20 %",
        within(0.0, 300.0), usual(5.0, 60.0), ALWAYS,
        "Least distance of ripple frequencies from lightly damped modes, relative to the mode.",
        PRACTICE;
    HEAT "heat" "Heat against the cooler" "" Ratio "100 %",
        over(0.0, 500.0), usual(50.0, 120.0), ALWAYS,
        "Mean power turned to heat, relative to the cooler's capacity.",
        PRACTICE;
    AUDIT "audit" "Audit residual" "" Ratio "0.1 %",
        over(0.0, 100.0), usual(0.001, 1.0), ALWAYS,
        "Largest residual of the volume and energy balances of a run.",
        "M12";
}
