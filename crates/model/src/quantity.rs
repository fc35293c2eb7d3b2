//! Kinds of quantity, each with its SI symbol. Conversions live in the crate `scenario`.

/// The kind of a physical quantity. Two numbers of one kind share an SI unit and may be compared.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
#[allow(
    missing_docs,
    reason = "the names are the documentation; `si_symbol` gives the unit"
)]
pub enum Quantity {
    Time,
    Length,
    Area,
    Volume,
    Angle,
    Velocity,
    /// Rotational speed of shafts and wheels, rad/s.
    AngularVelocity,
    Mass,
    Inertia,
    Force,
    Torque,
    Pressure,
    /// Volume flow, m3/s.
    Flow,
    Power,
    Energy,
    Density,
    KinematicViscosity,
    /// Absolute temperature, K.
    Temperature,
    BulkModulus,
    SpringRate,
    /// Linear viscous damping, N s/m.
    Damping,
    /// Rotational viscous damping, N m s.
    TorsionalDamping,
    /// Quadratic drag of a fan or propeller, N m s2.
    FanDrag,
    /// Volume a shaft displaces in one revolution, m3/rev.
    Displacement,
    /// Leakage flow per pressure, m3/(s Pa).
    LeakageCoefficient,
    /// Hunt-Crossley loss factor, s/m.
    ContactLoss,
    /// A number without unit.
    Ratio,
    /// A count of things.
    Count,
}

impl Quantity {
    /// The symbol of the SI unit, in plain characters.
    #[must_use]
    pub fn si_symbol(self) -> &'static str {
        match self {
            Self::Time => "s",
            Self::Length => "m",
            Self::Area => "m2",
            Self::Volume => "m3",
            Self::Angle => "rad",
            Self::Velocity => "m/s",
            Self::AngularVelocity => "rad/s",
            Self::Mass => "kg",
            Self::Inertia => "kg m2",
            Self::Force => "N",
            Self::Torque => "N m",
            Self::Pressure | Self::BulkModulus => "Pa",
            Self::Flow => "m3/s",
            Self::Power => "W",
            Self::Energy => "J",
            Self::Density => "kg/m3",
            Self::KinematicViscosity => "m2/s",
            Self::Temperature => "K",
            Self::SpringRate => "N/m",
            Self::Damping => "N s/m",
            Self::TorsionalDamping => "N m s",
            Self::FanDrag => "N m s2",
            Self::Displacement => "m3/rev",
            Self::LeakageCoefficient => "m3/(s Pa)",
            Self::ContactLoss => "s/m",
            Self::Ratio | Self::Count => "1",
        }
    }
}
