//! Oil (M1).

use super::{ALWAYS, over, rows, usual, within};
use crate::choice::{ChoiceId, Condition, OilViscosity, when};

const TWO_POINTS: &[Condition] = &[when(
    ChoiceId::OilViscosity,
    &[OilViscosity::TwoPoints as u8],
)];
const ISO_GRADE: &[Condition] = &[when(
    ChoiceId::OilViscosity,
    &[OilViscosity::IsoGrade as u8],
)];

rows! { "oil" from super::prime_mover::END;
    VISCOSITY_AT_40C "viscosity_at_40c" "Viscosity at 40 degC" "nu_40"
        KinematicViscosity "46 mm2/s",
        within(2.0, 5000.0), usual(15.0, 150.0), TWO_POINTS,
        "First point of the line of viscosity over temperature.",
        "M1.1, ASTM D341";
    VISCOSITY_AT_100C "viscosity_at_100c" "Viscosity at 100 degC" "nu_100"
        KinematicViscosity "6.8 mm2/s",
        within(2.0, 500.0), usual(3.0, 20.0), TWO_POINTS,
        "Second point of that line; the closer to the first, the less the oil thins when hot.",
        "M1.1, ASTM D341";
    ISO_GRADE_NUMBER "iso_grade" "ISO viscosity grade" "VG" Count "46",
        within(2.0, 3200.0), usual(15.0, 150.0), ISO_GRADE,
        "Grade of ISO 3448: the viscosity at 40 degC in mm2/s, rounded.",
        "ISO 3448";
    VISCOSITY_INDEX "viscosity_index" "Viscosity index" "VI" Ratio "100",
        within(0.0, 400.0), usual(80.0, 220.0), ISO_GRADE,
        "How little the viscosity falls with temperature; gives the viscosity at 100 degC.",
        "ASTM D2270";
    DENSITY_AT_15C "density_at_15c" "Density at 15 degC" "rho_15" Density "872 kg/m3",
        within(500.0, 1500.0), usual(820.0, 930.0), ALWAYS,
        "Density of the oil; orifice flow falls with its square root.",
        "M1.2";
    TEMPERATURE "temperature" "Oil temperature" "T" Temperature "50 degC",
        within(-50.0, 150.0), usual(-20.0, 100.0), ALWAYS,
        "One temperature for the whole circuit; sets viscosity and density.",
        "M1.1, M1.2";
    ENTRAINED_AIR "entrained_air" "Entrained air" "phi" Ratio "0.5 %",
        within(0.0, 30.0), usual(0.1, 5.0), ALWAYS,
        "Volume of undissolved air at 0 gauge relative to the oil; makes the oil soft.",
        "M1.4";
    POLYTROPIC_EXPONENT "polytropic_exponent" "Polytropic exponent" "n" Ratio "1.2",
        within(1.0, 1.4), usual(1.0, 1.4), ALWAYS,
        "How the air bubbles are compressed: 1 slowly, 1.4 suddenly.",
        "M1.4";
    LIQUID_BULK_MODULUS "liquid_bulk_modulus" "Bulk modulus of the liquid" "B_l"
        BulkModulus "1.5 GPa",
        over(0.01, 10.0), usual(1.2, 2.2), ALWAYS,
        "Stiffness of the oil without air; stiffer oil surges higher and rings faster.",
        "M1.4; 1.5 to 2.0 GPa: Rabie, Fluid Power Engineering, 2009";
}
