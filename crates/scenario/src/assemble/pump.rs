//! Pump and what feeds it (M4).

use helmsplit_model::{Chamber, Filling, Line, Pump, Ripple, Suction};

use crate::choice::{PumpCondition, PumpInlet, PumpRipple};
use crate::parameter::{ParameterId, pump};
use crate::scenario::Scenario;

impl Scenario {
    pub(super) fn pump(&self) -> Pump {
        Pump {
            displacement_rad: self.si(pump::DISPLACEMENT) / std::f64::consts::TAU,
            slip: self.pump_slip(),
            hydromechanical_efficiency: self.si(pump::HYDROMECHANICAL_EFFICIENCY),
            aeration_loss: self.si(pump::AERATION_LOSS),
            ripple: self.ripple(),
        }
    }

    /// Present slip of the pump (M4.2).
    fn pump_slip(&self) -> f64 {
        let slip = |efficiency, viscosity, density, speed, pressure| {
            let s = |id: ParameterId| self.si(id);
            Pump::wilson_slip(
                s(efficiency),
                s(viscosity) * s(density),
                s(speed),
                s(pressure),
            )
        };
        match self.chosen::<PumpCondition>() {
            PumpCondition::WearFactor => {
                let new = slip(
                    pump::VOLUMETRIC_EFFICIENCY,
                    pump::REFERENCE_VISCOSITY,
                    pump::REFERENCE_DENSITY,
                    pump::REFERENCE_SPEED,
                    pump::REFERENCE_PRESSURE,
                );
                new * self.si(pump::WEAR)
            }
            PumpCondition::MeasuredEfficiency => slip(
                pump::MEASURED_EFFICIENCY,
                pump::MEASURED_VISCOSITY,
                pump::MEASURED_DENSITY,
                pump::MEASURED_SPEED,
                pump::MEASURED_PRESSURE,
            ),
        }
    }

    fn ripple(&self) -> Ripple {
        let factor = self.si(pump::RIPPLE_FACTOR);
        match self.chosen::<PumpRipple>() {
            PumpRipple::None => Ripple::None,
            PumpRipple::Gear => {
                let teeth = self.si(pump::TEETH);
                let angle = self.si(pump::PRESSURE_ANGLE);
                Ripple::Gear {
                    teeth,
                    peak_to_peak: factor * Ripple::gear_peak_to_peak(teeth, angle),
                }
            }
            PumpRipple::Piston => Ripple::Piston {
                pistons: self.si(pump::PISTONS) as u32,
                factor,
            },
        }
    }

    pub(super) fn suction(&self) -> Suction {
        match self.chosen::<PumpInlet>() {
            PumpInlet::Flooded => Suction::Flooded,
            PumpInlet::SuctionLine => Suction::Line {
                line: Line {
                    length: self.si(pump::SUCTION_LENGTH),
                    bore: self.si(pump::SUCTION_BORE),
                    fitting_loss: self.si(pump::SUCTION_LOSS),
                    segments: 1,
                },
                chamber: Chamber::with_wall(
                    self.si(pump::SUCTION_VOLUME),
                    self.si(pump::SUCTION_WALL_MODULUS),
                ),
                filling: Filling {
                    empty: self.si(pump::EMPTY_PRESSURE),
                    full: self.si(pump::FULL_PRESSURE),
                },
            },
        }
    }
}
