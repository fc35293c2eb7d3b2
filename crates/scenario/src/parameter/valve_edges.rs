//! The valve's restrictions: fixed orifice, damping holes, edges, priority holes (M2, M5).

use super::{ALWAYS, over, rows, usual, within};

rows! { "valve" from super::valve::END;
    FIXED_ORIFICE_DIAMETER "fixed_orifice_diameter" "Fixed orifice diameter" "d_o"
        Length "3.67 mm",
        over(0.05, 50.0), usual(1.0, 12.0), ALWAYS,
        "Diameter of the orifice in the spool; with the spring it sets the priority flow.",
        "M5.1";
    FIXED_ORIFICE_DISCHARGE "fixed_orifice_discharge" "Discharge coefficient of the fixed orifice"
        "Cd_o" Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), ALWAYS,
        "Turbulent discharge coefficient; a sharp edge gives about 0.61.",
        "M2.1; Merritt, Hydraulic Control Systems, 1967";
    FIXED_ORIFICE_TRANSITION "fixed_orifice_transition" "Transition of the fixed orifice" "Re_t,o"
        Ratio "60",
        within(0.001, 10000.0), usual(5.0, 200.0), ALWAYS,
        "Reynolds number at which laminar flow hands over to turbulent; matters in cold oil.",
        "M2.3; thin sharp edge about 10: Wuest 1954";
    HEAD_HOLE_DIAMETER "head_hole_diameter" "Head hole diameter" "d_h" Length "0.6 mm",
        within(0.0, 10.0), usual(0.3, 2.0), ALWAYS,
        "Damping hole from the inlet to the head end; 0 is plugged.",
        "M5.5";
    HEAD_HOLE_LENGTH "head_hole_length" "Head hole length" "L_h" Length "3 mm",
        within(0.0, 100.0), usual(0.5, 10.0), ALWAYS,
        "Length of the head hole: adds laminar friction, which grows in cold oil.",
        "M2.4";
    HEAD_HOLE_DISCHARGE "head_hole_discharge" "Discharge coefficient of the head hole" "Cd_h"
        Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), ALWAYS,
        "Turbulent discharge coefficient of the head hole.",
        "M2.1";
    HEAD_HOLE_TRANSITION "head_hole_transition" "Transition of the head hole" "Re_t,h"
        Ratio "60",
        within(0.001, 10000.0), usual(5.0, 200.0), ALWAYS,
        "Reynolds number of transition at the ends of the head hole.",
        "M2.3, M2.4";
    DISC_HOLE_DIAMETER "disc_hole_diameter" "Disc hole diameter" "d_s" Length "0.5 mm",
        within(0.0, 10.0), usual(0.3, 2.0), ALWAYS,
        "Damping hole from the bore to the spring end: small damps, 0 is plugged.",
        "M5.5";
    DISC_HOLE_LENGTH "disc_hole_length" "Disc hole length" "L_s" Length "1.5 mm",
        within(0.0, 100.0), usual(0.3, 10.0), ALWAYS,
        "Thickness of the disc: adds laminar friction, which grows in cold oil.",
        "M2.4";
    DISC_HOLE_DISCHARGE "disc_hole_discharge" "Discharge coefficient of the disc hole" "Cd_s"
        Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), ALWAYS,
        "Turbulent discharge coefficient of the disc hole.",
        "M2.1";
    DISC_HOLE_TRANSITION "disc_hole_transition" "Transition of the disc hole" "Re_t,s"
        Ratio "60",
        within(0.001, 10000.0), usual(5.0, 200.0), ALWAYS,
        "Reynolds number of transition at the ends of the disc hole.",
        "M2.3, M2.4";
    LAND_DISCHARGE "land_discharge" "Discharge coefficient of the excess land" "Cd_e"
        Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), ALWAYS,
        "Turbulent discharge coefficient of the metering edge.",
        "M2.1";
    LAND_TRANSITION "land_transition" "Transition of the excess land" "Re_t,e" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), ALWAYS,
        "Reynolds number of transition of the metering edge.",
        "M2.3; thin sharp edge about 10: Wuest 1954";
    HOLES_OPEN_AREA "holes_open_area" "Open area of the priority holes" "A_c0" Area "40 mm2",
        over(0.0, 5000.0), usual(5.0, 500.0), ALWAYS,
        "Area of the priority holes while they are not throttled.",
        "M5.2";
    HOLES_LEAK_AREA "holes_leak_area" "Shut area of the priority holes" "A_c,leak"
        Area "0.02 mm2",
        within(0.0, 100.0), usual(0.0, 1.0), ALWAYS,
        "Area that stays open when the priority holes are shut.",
        "M5.2";
    HOLES_THROTTLE_START "holes_throttle_start" "Travel where throttling starts" "x_c1"
        Length "3 mm",
        within(0.0, 100.0), usual(0.5, 20.0), ALWAYS,
        "Travel from which on the priority holes are throttled, when the excess side is loaded.",
        "M5.2";
    HOLES_THROTTLE_END "holes_throttle_end" "Travel where the holes are shut" "x_c2"
        Length "6 mm",
        over(0.0, 1000.0), usual(1.0, 1000.0), ALWAYS,
        "Travel at which the priority holes are shut; far beyond the stroke means never.",
        "M5.2";
    HOLES_DISCHARGE "holes_discharge" "Discharge coefficient of the priority holes" "Cd_c"
        Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), ALWAYS,
        "Turbulent discharge coefficient of the priority holes.",
        "M2.1";
    HOLES_TRANSITION "holes_transition" "Transition of the priority holes" "Re_t,c" Ratio "10",
        within(0.001, 10000.0), usual(5.0, 200.0), ALWAYS,
        "Reynolds number of transition of the priority holes.",
        "M2.3";
}
