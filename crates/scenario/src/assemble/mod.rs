//! From a scenario to a circuit: the only place where a diameter becomes an area.

mod excess;
mod oil;
mod pump;
mod steering;
mod valve;

use helmsplit_model::{
    Chamber, Circuit, Edge, InputProfiles, Line, Oil, Parts, PrimeMover, PriorityLine,
    PriorityRelief, Relief, ReturnSide,
};

use crate::choice::{
    ExcessReliefKind, MainReliefKind, PrimeMoverKind, PriorityReliefKind, ReturnKind,
};
use crate::finding::{Finding, Findings};
use crate::parameter::{
    ParameterId, excess_relief, line, main_relief, prime_mover, priority_relief, return_line,
};
use crate::scenario::Scenario;

impl Scenario {
    /// The circuit, ready to be integrated.
    ///
    /// # Errors
    /// The findings of [`Scenario::validate`] when any of them is an error.
    pub fn circuit(&self) -> Result<Circuit, Findings> {
        let findings = self.validate();
        if findings.has_errors() {
            return Err(findings);
        }
        let one = |finding: Finding| Findings {
            findings: vec![finding],
            ..Findings::default()
        };
        let parts = self.parts().map_err(one)?;
        Circuit::new(parts).map_err(|error| {
            let hint = "use fewer segments";
            one(Finding::error(
                line::SEGMENTS.parameter().path,
                error.to_string(),
                hint,
            ))
        })
    }

    /// Inputs over time, SI.
    ///
    /// # Errors
    /// Findings for breakpoints out of order and templates that do not fit.
    pub fn inputs(&self) -> Result<InputProfiles, Findings> {
        self.manoeuvre.profiles()
    }

    /// The parts of the circuit without any check of how they go together.
    ///
    /// # Errors
    /// A finding when the oil or the table of the land is none at all.
    pub fn parts(&self) -> Result<Parts, Finding> {
        let oil = self.oil()?;
        Ok(Parts {
            oil,
            prime_mover: self.prime_mover(),
            pump: self.pump(),
            suction: self.suction(),
            valve: self.valve(&oil)?,
            main_relief: match self.chosen::<MainReliefKind>() {
                MainReliefKind::None => None,
                MainReliefKind::Direct => Some(self.relief(&oil, &MAIN)),
            },
            priority_relief: match self.chosen::<PriorityReliefKind>() {
                PriorityReliefKind::None => PriorityRelief::None,
                PriorityReliefKind::OnPort => PriorityRelief::OnPort(self.relief(&oil, &PRIORITY)),
                PriorityReliefKind::Pilot => PriorityRelief::Pilot(self.relief(&oil, &PRIORITY)),
            },
            line: self.line(),
            steering: self.steering(&oil),
            excess: self.excess(),
            excess_relief: match self.chosen::<ExcessReliefKind>() {
                ExcessReliefKind::None => None,
                ExcessReliefKind::Direct => Some(self.relief(&oil, &EXCESS)),
            },
            return_side: self.return_side(&oil),
            cylinder_start: self.start_travel().steering,
        })
    }

    fn prime_mover(&self) -> PrimeMover {
        match self.chosen::<PrimeMoverKind>() {
            PrimeMoverKind::SpeedProfile => PrimeMover::SpeedProfile,
            PrimeMoverKind::Governed => PrimeMover::Governed(helmsplit_model::GovernedEngine {
                inertia: self.si(prime_mover::INERTIA),
                full_torque: self.si(prime_mover::FULL_LOAD_TORQUE),
                droop: self.si(prime_mover::DROOP),
                other_torque: self.si(prime_mover::OTHER_TORQUE),
            }),
        }
    }

    /// An edge from its discharge coefficient and transition Reynolds number.
    fn edge(&self, discharge: ParameterId, transition: ParameterId) -> Edge {
        Edge {
            discharge: self.si(discharge),
            transition_reynolds: self.si(transition),
        }
    }

    /// A chamber from its volume and the stiffness of its walls.
    fn chamber(&self, volume: ParameterId, wall: ParameterId) -> Chamber {
        Chamber::with_wall(self.si(volume), self.si(wall))
    }

    fn relief(&self, oil: &Oil, rows: &ReliefRows) -> Relief {
        let edge = self.edge(rows.discharge, rows.transition);
        let full_flow_pressure = self.si(rows.full_flow_pressure);
        Relief {
            cracking: self.si(rows.cracking_pressure),
            full_flow_pressure,
            full_area: Relief::full_area(
                self.si(rows.full_flow),
                full_flow_pressure,
                &edge,
                oil.density,
            ),
            time_constant: self.si(rows.time_constant),
            opening_width: self.si(rows.opening_width),
            least_opening: self.si(rows.least_opening),
            edge,
        }
    }

    fn line(&self) -> PriorityLine {
        PriorityLine {
            line: Line {
                length: self.si(line::LENGTH),
                bore: self.si(line::BORE),
                fitting_loss: self.si(line::FITTING_LOSS),
                segments: self.si(line::SEGMENTS) as usize,
            },
            wall_compressibility: 1.0 / self.si(line::WALL_MODULUS),
            end_volume: self.si(line::END_VOLUME),
        }
    }

    /// Filter and cooler in series as one orifice: their inverse squared areas add (M9).
    fn return_side(&self, oil: &Oil) -> ReturnSide {
        match self.chosen::<ReturnKind>() {
            ReturnKind::Constant => ReturnSide::Constant(self.si(return_line::PRESSURE)),
            ReturnKind::Restricted => {
                let edge = self.edge(return_line::DISCHARGE, return_line::TRANSITION);
                let area = |flow, drop| {
                    Relief::full_area(self.si(flow), self.si(drop), &edge, oil.density)
                };
                let filter = area(return_line::FILTER_FLOW, return_line::FILTER_DROP);
                let cooler = area(return_line::COOLER_FLOW, return_line::COOLER_DROP);
                ReturnSide::Restricted {
                    chamber: self.chamber(return_line::VOLUME, return_line::WALL_MODULUS),
                    area: (filter.powi(-2) + cooler.powi(-2)).powf(-0.5),
                    edge,
                }
            }
        }
    }
}

/// The rows of one relief.
struct ReliefRows {
    cracking_pressure: ParameterId,
    full_flow_pressure: ParameterId,
    full_flow: ParameterId,
    time_constant: ParameterId,
    opening_width: ParameterId,
    least_opening: ParameterId,
    discharge: ParameterId,
    transition: ParameterId,
}

macro_rules! relief_rows {
    ($section:ident) => {
        ReliefRows {
            cracking_pressure: $section::CRACKING_PRESSURE,
            full_flow_pressure: $section::FULL_FLOW_PRESSURE,
            full_flow: $section::FULL_FLOW,
            time_constant: $section::TIME_CONSTANT,
            opening_width: $section::OPENING_WIDTH,
            least_opening: $section::LEAST_OPENING,
            discharge: $section::DISCHARGE,
            transition: $section::TRANSITION,
        }
    };
}

const MAIN: ReliefRows = relief_rows!(main_relief);
const PRIORITY: ReliefRows = relief_rows!(priority_relief);
const EXCESS: ReliefRows = relief_rows!(excess_relief);

#[cfg(test)]
mod tests;
