//! Unit systems: which unit a person sees for which quantity.

use helmsplit_model::Quantity;
use serde::{Deserialize, Serialize};

use super::{Unit, unit};

/// A family of display units.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum UnitSystem {
    /// bar, L/min, mm, cm3/rev, rpm, degC, N: the trade's metric units.
    #[default]
    Metric,
    /// psi, gpm, in, in3/rev, rpm, degF, lbf: US customary units.
    Us,
    /// Pa, m3/s, m, rad/s, K: coherent SI units without prefixes.
    Si,
}

impl UnitSystem {
    /// All systems, for menus and arguments.
    pub const ALL: [Self; 3] = [Self::Metric, Self::Us, Self::Si];

    /// The word for the system: `metric`, `us` or `si`.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Metric => "metric",
            Self::Us => "us",
            Self::Si => "si",
        }
    }

    /// The system of that name, in any case.
    #[must_use]
    pub fn from_name(name: &str) -> Option<Self> {
        Self::ALL
            .into_iter()
            .find(|system| system.name().eq_ignore_ascii_case(name))
    }

    /// The unit this system prefers for a quantity. Parameters far from the usual size (a spool
    /// of 110 g, a clearance of 8 um) name a unit of their own instead.
    #[must_use]
    pub fn unit(self, quantity: Quantity) -> &'static Unit {
        let symbol = match self {
            Self::Metric => metric_symbol(quantity),
            Self::Us => us_symbol(quantity),
            Self::Si => quantity.si_symbol(),
        };
        // Every quantity has its SI unit first; a test holds that no symbol above is missing.
        unit(quantity, symbol).unwrap_or_else(|| super::si_unit(quantity))
    }
}

fn metric_symbol(quantity: Quantity) -> &'static str {
    match quantity {
        Quantity::Length => "mm",
        Quantity::Area => "mm2",
        Quantity::Volume => "cm3",
        Quantity::Angle => "deg",
        Quantity::AngularVelocity => "rpm",
        Quantity::Pressure => "bar",
        Quantity::Flow => "L/min",
        Quantity::Power => "kW",
        Quantity::KinematicViscosity => "mm2/s",
        Quantity::Temperature => "degC",
        Quantity::BulkModulus => "GPa",
        Quantity::SpringRate => "N/mm",
        Quantity::Displacement => "cm3/rev",
        Quantity::LeakageCoefficient => "cm3/(min bar)",
        Quantity::Ratio => "%",
        Quantity::Time
        | Quantity::Velocity
        | Quantity::Mass
        | Quantity::Inertia
        | Quantity::Force
        | Quantity::Torque
        | Quantity::Energy
        | Quantity::Density
        | Quantity::Damping
        | Quantity::TorsionalDamping
        | Quantity::FanDrag
        | Quantity::ContactLoss
        | Quantity::Count => quantity.si_symbol(),
    }
}

fn us_symbol(quantity: Quantity) -> &'static str {
    match quantity {
        Quantity::Length => "in",
        Quantity::Area => "in2",
        Quantity::Volume => "in3",
        Quantity::Velocity => "in/s",
        Quantity::Mass => "lb",
        Quantity::Inertia => "lb ft2",
        Quantity::Force => "lbf",
        Quantity::Torque => "lbf ft",
        Quantity::Pressure | Quantity::BulkModulus => "psi",
        Quantity::Flow => "gpm",
        Quantity::Power => "hp",
        Quantity::Energy => "ft lbf",
        Quantity::Density => "lb/ft3",
        Quantity::KinematicViscosity => "cSt",
        Quantity::Temperature => "degF",
        Quantity::SpringRate => "lbf/in",
        Quantity::Damping => "lbf s/in",
        Quantity::TorsionalDamping => "lbf in s",
        Quantity::FanDrag => "lbf in s2",
        Quantity::Displacement => "in3/rev",
        Quantity::LeakageCoefficient => "in3/(min psi)",
        Quantity::ContactLoss => "s/in",
        Quantity::Time
        | Quantity::Angle
        | Quantity::AngularVelocity
        | Quantity::Ratio
        | Quantity::Count => metric_symbol(quantity),
    }
}

#[cfg(test)]
mod tests {
    use super::super::QUANTITIES;
    use super::*;

    #[test]
    fn every_preferred_symbol_is_in_the_table() {
        for quantity in QUANTITIES {
            for system in UnitSystem::ALL {
                let wanted = match system {
                    UnitSystem::Metric => metric_symbol(quantity),
                    UnitSystem::Us => us_symbol(quantity),
                    UnitSystem::Si => quantity.si_symbol(),
                };
                let got = system.unit(quantity);
                assert_eq!(got.symbol(), wanted, "{quantity:?} in {system:?}");
                assert_eq!(got.quantity(), quantity, "{quantity:?} in {system:?}");
            }
        }
    }

    #[test]
    fn names_are_found_again() {
        for system in UnitSystem::ALL {
            assert_eq!(
                UnitSystem::from_name(system.name()),
                Some(system),
                "{system:?}"
            );
        }
        assert_eq!(
            UnitSystem::from_name("US"),
            Some(UnitSystem::Us),
            "any case"
        );
        assert_eq!(UnitSystem::from_name("imperial"), None, "unknown name");
    }
}
