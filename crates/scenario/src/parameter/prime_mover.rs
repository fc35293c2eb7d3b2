//! Prime mover (M4.6).

use super::{over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, PrimeMoverKind, when};

const GOVERNED: &[Condition] = &[when(
    ChoiceId::PrimeMoverKind,
    &[PrimeMoverKind::Governed as u8],
)];

rows! { "prime_mover" from 0;
    INERTIA "inertia" "Inertia" "J_e" Inertia "0.8 kg m2",
        over(0.0, 100.0), usual(0.05, 10.0), GOVERNED,
        "Inertia of the engine with all that turns along; a small one sags quickly under load.",
        "M4.6";
    FULL_LOAD_TORQUE "full_load_torque" "Full-load torque" "T_max" Torque "260 N m",
        over(0.0, 20000.0), usual(20.0, 3000.0), GOVERNED,
        "Torque at full fuel; a load beyond it stalls the engine.",
        "M4.6";
    DROOP "droop" "Governor droop" "R" Ratio "6 %",
        over(0.0, 50.0), usual(1.0, 15.0), GOVERNED,
        "Speed lost from no load to full load, relative to the set speed.",
        "M4.6";
    OTHER_TORQUE "other_torque" "Torque of other consumers" "T_other" Torque "20 N m",
        within(0.0, 20000.0), usual(0.0, 3000.0), GOVERNED,
        "Torque that drive, fan and other pumps take beside this pump.",
        "M4.6";
}
