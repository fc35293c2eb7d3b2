//! The kinds of quantity in words, as messages need them.

use helmsplit_model::Quantity;

/// Every kind of quantity, in the order of the model.
pub const QUANTITIES: [Quantity; 28] = [
    Quantity::Time,
    Quantity::Length,
    Quantity::Area,
    Quantity::Volume,
    Quantity::Angle,
    Quantity::Velocity,
    Quantity::AngularVelocity,
    Quantity::Mass,
    Quantity::Inertia,
    Quantity::Force,
    Quantity::Torque,
    Quantity::Pressure,
    Quantity::Flow,
    Quantity::Power,
    Quantity::Energy,
    Quantity::Density,
    Quantity::KinematicViscosity,
    Quantity::Temperature,
    Quantity::BulkModulus,
    Quantity::SpringRate,
    Quantity::Damping,
    Quantity::TorsionalDamping,
    Quantity::FanDrag,
    Quantity::Displacement,
    Quantity::LeakageCoefficient,
    Quantity::ContactLoss,
    Quantity::Ratio,
    Quantity::Count,
];

/// The name of a kind of quantity, such as `length`.
#[must_use]
pub fn quantity_name(quantity: Quantity) -> &'static str {
    words(quantity).0
}

/// The name with its article, such as `a length` or `an area`.
#[must_use]
pub fn quantity_with_article(quantity: Quantity) -> String {
    let name = quantity_name(quantity);
    let article = if name.starts_with(['a', 'e', 'i', 'o', 'u']) {
        "an"
    } else {
        "a"
    };
    format!("{article} {name}")
}

/// A text that would do for the quantity, such as `20 mm`: the end of a hint.
#[must_use]
pub fn sample_text(quantity: Quantity) -> &'static str {
    words(quantity).1
}

/// Name and sample of a kind of quantity.
fn words(quantity: Quantity) -> (&'static str, &'static str) {
    match quantity {
        Quantity::Time => ("time", "0.5 s"),
        Quantity::Length => ("length", "20 mm"),
        Quantity::Area => ("area", "12 mm2"),
        Quantity::Volume => ("volume", "40 cm3"),
        Quantity::Angle => ("angle", "15 deg"),
        Quantity::Velocity => ("velocity", "0.2 m/s"),
        Quantity::AngularVelocity => ("rotational speed", "1800 rpm"),
        Quantity::Mass => ("mass", "110 g"),
        Quantity::Inertia => ("moment of inertia", "0.02 kg m2"),
        Quantity::Force => ("force", "120 N"),
        Quantity::Torque => ("torque", "40 N m"),
        Quantity::Pressure => ("pressure", "175 bar"),
        Quantity::Flow => ("flow", "15 L/min"),
        Quantity::Power => ("power", "20 kW"),
        Quantity::Energy => ("energy", "500 J"),
        Quantity::Density => ("density", "870 kg/m3"),
        Quantity::KinematicViscosity => ("kinematic viscosity", "46 mm2/s"),
        Quantity::Temperature => ("temperature", "50 degC"),
        Quantity::BulkModulus => ("bulk modulus", "1.5 GPa"),
        Quantity::SpringRate => ("spring rate", "8 N/mm"),
        Quantity::Damping => ("damping", "20 N s/m"),
        Quantity::TorsionalDamping => ("rotational damping", "0.05 N m s"),
        Quantity::FanDrag => ("fan drag", "0.0002 N m s2"),
        Quantity::Displacement => ("displacement", "16 cm3/rev"),
        Quantity::LeakageCoefficient => ("leakage per pressure", "2 cm3/(min bar)"),
        Quantity::ContactLoss => ("contact loss", "1 s/m"),
        Quantity::Ratio => ("ratio", "90 %"),
        Quantity::Count => ("count", "13"),
    }
}
