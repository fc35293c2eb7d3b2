//! Length of the manoeuvre; its breakpoints are lists of their own.

use super::{ALWAYS, over, rows, usual};

rows! { "manoeuvre" from super::start::END;
    DURATION "duration" "Duration" "t_end" Time "10 s",
        over(0.0, 3600.0), usual(0.1, 120.0), ALWAYS,
        "Time at which the run ends.",
        "M10";
}
