//! Return line (M9).

use super::{over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, ReturnKind, when};

const CONSTANT: &[Condition] = &[when(ChoiceId::ReturnKind, &[ReturnKind::Constant as u8])];
const RESTRICTED: &[Condition] = &[when(ChoiceId::ReturnKind, &[ReturnKind::Restricted as u8])];

rows! { "return_line" from super::excess_relief::END;
    PRESSURE "pressure" "Back pressure" "p_t" Pressure "0 bar",
        within(-0.5, 50.0), usual(0.0, 10.0), CONSTANT,
        "Gauge pressure of the return, whatever flows.",
        "M9";
    FILTER_DROP "filter_drop" "Pressure drop of the filter" "dp_f" Pressure "0.5 bar",
        over(0.0, 50.0), usual(0.05, 5.0), RESTRICTED,
        "Drop at the flow below; a clogged element raises it.",
        "M9";
    FILTER_FLOW "filter_flow" "Flow of that drop" "Q_f" Flow "50 L/min",
        over(0.0, 5000.0), usual(5.0, 500.0), RESTRICTED,
        "Flow at which the filter's drop holds.",
        "M9";
    COOLER_DROP "cooler_drop" "Pressure drop of the cooler" "dp_c" Pressure "1 bar",
        over(0.0, 50.0), usual(0.05, 10.0), RESTRICTED,
        "Drop at the flow below.",
        "M9";
    COOLER_FLOW "cooler_flow" "Flow of that drop" "Q_c" Flow "50 L/min",
        over(0.0, 5000.0), usual(5.0, 500.0), RESTRICTED,
        "Flow at which the cooler's drop holds.",
        "M9";
    DISCHARGE "discharge" "Discharge coefficient" "Cd_ret" Ratio "0.62",
        over(0.0, 1.0), usual(0.55, 0.85), RESTRICTED,
        "Turbulent discharge coefficient of filter and cooler taken as one orifice.",
        "M2.1, M9";
    TRANSITION "transition" "Transition" "Re_t,ret" Ratio "60",
        within(0.001, 10000.0), usual(5.0, 2000.0), RESTRICTED,
        "Reynolds number of transition of that orifice; filters stay laminar longer.",
        "M2.3, M9";
    VOLUME "volume" "Volume of the return" "V_ret" Volume "500 cm3",
        over(0.0, 100_000.0), usual(50.0, 10000.0), RESTRICTED,
        "Volume of the return lines up to filter and cooler.",
        "M9";
    WALL_MODULUS "wall_modulus" "Wall stiffness" "B_w,ret" BulkModulus "0.2 GPa",
        over(0.0, 1e6), usual(0.01, 50.0), RESTRICTED,
        "Bulk modulus that the return hoses add in series with the oil.",
        "M1.5, M9";
}
