//! Line from priority port to steering (M7.2).

use super::{ALWAYS, over, rows, usual, within};

rows! { "line" from super::priority_relief::END;
    LENGTH "length" "Length" "l" Length "2 m",
        over(0.0, 100.0), usual(0.2, 15.0), ALWAYS,
        "Length of the line from valve to steering; a long one rings slowly.",
        "M7.2";
    BORE "bore" "Bore" "d_l" Length "10 mm",
        over(1.0, 100.0), usual(5.0, 40.0), ALWAYS,
        "Bore of the line; a narrow one costs pressure and surges higher.",
        "M7.2";
    WALL_MODULUS "wall_modulus" "Wall stiffness" "B_w,l" BulkModulus "0.5 GPa",
        over(0.0, 1e6), usual(0.1, 50.0), ALWAYS,
        "Bulk modulus that the wall adds in series with the oil; hoses are soft.",
        "M1.5, M7.2";
    FITTING_LOSS "fitting_loss" "Loss factor of fittings" "K" Ratio "3",
        within(0.0, 1000.0), usual(0.0, 30.0), ALWAYS,
        "Sum of loss factors, referred to the velocity in the bore.",
        "M7.2";
    SEGMENTS "segments" "Segments" "N" Count "1",
        within(1.0, 40.0), usual(1.0, 20.0), ALWAYS,
        "One segment gives a surge its height but rings 36 % too low; more come closer.",
        "M7.2; Joukowsky 1898";
    END_VOLUME "end_volume" "Volume at the steering end" "V_su0" Volume "30 cm3",
        over(0.0, 5000.0), usual(1.0, 300.0), ALWAYS,
        "Volume at the steering end beside the line's own.",
        "M7.3";
}
