//! Oil, pump and ratings.

use helmsplit_model::{ATMOSPHERE, Quantity};

use super::shown;
use crate::choice::PumpInlet;
use crate::finding::Findings;
use crate::parameter::{oil, pump, ratings};
use crate::scenario::Scenario;

/// Viscosity above which the Walther line of ASTM D341 holds in its short form, m2/s.
const WALTHER_FROM: f64 = 2e-6;

impl Scenario {
    pub(super) fn check_supply(&self, out: &mut Findings) {
        match self.oil() {
            Err(finding) => out.push(finding),
            Ok(oil) if oil.kinematic_viscosity < WALTHER_FROM => {
                let now = shown(
                    oil.kinematic_viscosity,
                    Quantity::KinematicViscosity,
                    "mm2/s",
                );
                let message = format!(
                    "the oil would have only {now}, where the line of ASTM D341 no longer holds"
                );
                out.push(self.warning_at(
                    oil::TEMPERATURE,
                    &message,
                    "use a cooler or thicker oil",
                ));
            }
            Ok(_) => {}
        }
        if self.chosen::<PumpInlet>() == PumpInlet::SuctionLine {
            let why = "the pump would be full before it is empty";
            self.must_lie_below(pump::EMPTY_PRESSURE, pump::FULL_PRESSURE, why, out);
            if self.si(pump::FULL_PRESSURE) > ATMOSPHERE {
                let message = "the pump never fills: this lies above the pressure of the air";
                out.push(self.warning_at(pump::FULL_PRESSURE, message, "common: 0.8 bar absolute"));
            }
        }
        let why = "low idle is the lower end of the operating map";
        self.must_lie_below(ratings::LOW_IDLE_SPEED, ratings::TOP_SPEED, why, out);
        let why = "the pump's window of viscosity is empty";
        self.must_lie_below(
            ratings::LEAST_VISCOSITY,
            ratings::GREATEST_VISCOSITY,
            why,
            out,
        );
    }
}
