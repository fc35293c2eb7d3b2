//! Settings of the solver.

use super::{ALWAYS, rows, usual, within};

rows! { "solver" from super::ratings::END;
    RELATIVE_TOLERANCE "relative_tolerance" "Relative tolerance" "" Ratio "1e-6",
        within(1e-12, 1e-2), usual(1e-9, 1e-3), ALWAYS,
        "Error allowed in each step, relative to the size of each state.",
        "error test of the solver";
    OUTPUT_STEP "output_step" "Output step" "" Time "10 ms",
        within(0.001, 60000.0), usual(0.05, 1000.0), ALWAYS,
        "Spacing of exported traces; has no influence on the solution.",
        "choice of the user";
    MAX_STEPS "max_steps" "Most steps" "" Count "2000000",
        within(100.0, 1e9), usual(1e4, 1e8), ALWAYS,
        "Steps after which a run is given up.",
        "choice of the user";
}
