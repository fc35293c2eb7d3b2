//! Which unit a value is shown in under a unit system.

use helmsplit_model::Quantity;

use crate::UnitSystem;
use crate::manoeuvre::{InputRow, TemplateParameter};
use crate::parameter::Parameter;
use crate::units::{Unit, unit};

/// The unit in which a parameter is shown and written under a unit system.
#[must_use]
pub fn display_unit(row: &Parameter, system: UnitSystem) -> &'static Unit {
    unit_in_system(row.quantity, row.unit(), system)
}

/// The unit in which an input is shown and written under a unit system.
#[must_use]
pub fn input_unit(row: &InputRow, system: UnitSystem) -> &'static Unit {
    unit_in_system(row.quantity, row.unit(), system)
}

/// The unit in which a number of a template is shown and written under a unit system.
#[must_use]
pub fn template_unit(row: &TemplateParameter, system: UnitSystem) -> &'static Unit {
    unit_in_system(row.quantity, row.unit(), system)
}

/// The unit of a unit system beside a preferred metric unit, whose size it follows.
pub(crate) fn unit_in_system(
    quantity: Quantity,
    metric: &'static Unit,
    system: UnitSystem,
) -> &'static Unit {
    // A share in per cent and a bare factor are both at home everywhere.
    if quantity == Quantity::Ratio || system == UnitSystem::Metric {
        return metric;
    }
    let small = system == UnitSystem::Us && metric.symbol() == "um";
    small
        .then(|| unit(Quantity::Length, "thou"))
        .flatten()
        .unwrap_or_else(|| system.unit(quantity))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::parameter::{pump, valve, valve_edges};

    #[test]
    fn units_follow_the_size_of_the_parameter() {
        let cases = [
            (valve::CLEARANCE, UnitSystem::Metric, "um"),
            (valve::CLEARANCE, UnitSystem::Us, "thou"),
            (valve_edges::FIXED_ORIFICE_DIAMETER, UnitSystem::Us, "in"),
            (valve::SPOOL_MASS, UnitSystem::Metric, "g"),
            (valve::SPOOL_MASS, UnitSystem::Si, "kg"),
            (pump::VOLUMETRIC_EFFICIENCY, UnitSystem::Us, "%"),
            (pump::WEAR, UnitSystem::Si, "1"),
        ];
        for (id, system, expected) in cases {
            let row = id.parameter();
            assert_eq!(
                display_unit(row, system).symbol(),
                expected,
                "{} in {system:?}",
                row.path
            );
        }
    }
}
