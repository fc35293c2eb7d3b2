//! The panels of a run, from the top: what is asked, what the valve does, what comes of it.

use helmsplit_model::{Circuit, PriorityRelief, Quantity, Relief, ReturnSide, Signal};
use helmsplit_scenario::quantity_text::{Digits, number_from_si};

use super::columns::Columns;
use crate::plot::{Limit, MINUS, Panel, Reach, Series, Shade, Where};
use crate::style::{Dash, Fill, Meaning};
use crate::unit_text::unit_text;

/// A relief that never passes more than this share of the pump's flow is shut.
const SHUT: f64 = 2e-3;

/// A shortfall below this share of the commanded rate is the solver's, not the driver's.
const NO_SHORTFALL: f64 = 5e-3;

/// Heights of panels against the panel of pressures.
const INPUT: f64 = 0.5;
const COMMAND: f64 = 0.35;
const TRAVEL: f64 = 0.6;
const MIDDLE: f64 = 0.9;
const LARGE: f64 = 1.35;

/// Makes the panels of a run, and notes on what it leaves out.
pub(super) struct RunPanels<'a> {
    pub(super) circuit: &'a Circuit,
    pub(super) columns: Columns<'a>,
    pub(super) notes: Vec<String>,
}

impl RunPanels<'_> {
    /// Every panel that the circuit has signals for.
    pub(super) fn all(&mut self) -> Vec<Panel> {
        let mut panels = vec![self.engine()];
        panels.extend(self.commands());
        panels.push(Some(self.spool()));
        panels.push(Some(self.pressures()));
        panels.push(Some(self.flows()));
        panels.push(self.wheel());
        panels.push(self.single(
            "Steering cylinder, from mid-stroke",
            Meaning::Steering,
            "y_c",
            TRAVEL,
        ));
        panels.push(self.single("Priority motor speed", Meaning::Steering, "w_pm", TRAVEL));
        panels.push(self.single("Excess motor speed", Meaning::Consumer, "w_m", TRAVEL));
        panels.push(self.single(
            "Lift cylinder, from mid-stroke",
            Meaning::Consumer,
            "y_l",
            TRAVEL,
        ));
        panels.push(Some(self.power()));
        panels.into_iter().flatten().collect()
    }

    fn single(&self, label: &str, meaning: Meaning, name: &str, weight: f64) -> Option<Panel> {
        let panel = self.columns.single(label, meaning, name)?;
        Some(Panel { weight, ..panel })
    }

    fn engine(&self) -> Option<Panel> {
        let columns = &self.columns;
        let mut panel = self.single(
            "Engine speed",
            Meaning::Drive,
            Signal::EngineSpeed.name(),
            INPUT,
        )?;
        let set = columns.series("Set speed", Meaning::Drive, Signal::EngineSetSpeed.name());
        if let Some(set) = set {
            panel.series.push(set.dashed(Dash::Short));
        }
        Some(panel)
    }

    /// Inputs beside engine and wheel: a panel for each that changes, a note for each that stays.
    fn commands(&mut self) -> Vec<Option<Panel>> {
        let inputs = [
            (
                "Command of the excess consumer",
                Meaning::Consumer,
                Signal::ExcessCommand,
            ),
            (
                "Command of the priority consumer",
                Meaning::Steering,
                Signal::PriorityCommand,
            ),
            (
                "Bench throttle opening",
                Meaning::Steering,
                Signal::BenchArea,
            ),
            (
                "External force on the steering cylinder",
                Meaning::Steering,
                Signal::ExternalForce,
            ),
        ];
        let mut panels = Vec::new();
        for (label, meaning, signal) in inputs {
            let name = signal.name();
            let Some(constant) = self.columns.constant(name) else {
                panels.push(self.single(label, meaning, name, COMMAND));
                continue;
            };
            if constant != 0.0 || signal == Signal::ExcessCommand {
                let unit = self.columns.unit(signal.quantity());
                let text = number_from_si(constant, unit, Digits::Significant(3));
                let text = text.replace('-', &MINUS.to_string());
                let symbol = unit_text(unit);
                self.notes
                    .push(format!("{label}: {text} {symbol} throughout."));
            }
        }
        panels
    }

    fn spool(&self) -> Panel {
        let columns = &self.columns;
        let valve = &self.circuit.parts().valve;
        let unit = columns.unit(Quantity::Length);
        let at = |travel: f64| Where::Line(unit.value_from_si(travel));
        let limit = |label: &str, at, reach| Limit {
            label: label.to_owned(),
            at,
            reach,
        };
        let series = columns.series("Spool travel", Meaning::Spool, "x");
        let mut panel = columns.panel(
            "Spool travel",
            Quantity::Length,
            series.into_iter().collect(),
        );
        panel.weight = MIDDLE;
        let [from, to] = [valve.holes_start, valve.holes_end].map(|x| unit.value_from_si(x));
        panel.limits = vec![
            limit("stop", at(valve.stroke), Reach::Widen),
            limit(
                "priority holes throttle",
                Where::Band(from, to),
                Reach::IfInView,
            ),
            limit("excess land opens", at(valve.land.overlap), Reach::Widen),
        ];
        panel
    }

    fn pressures(&self) -> Panel {
        use Meaning::{Consumer, Excess, Inlet, Priority, Steering};
        let columns = &self.columns;
        let line =
            |(label, meaning, name): (&str, Meaning, &str)| columns.series(label, meaning, name);
        let ports = [
            ("Inlet", Inlet, "p_in"),
            ("Priority port", Priority, "p_c"),
            ("Excess port", Excess, "p_e"),
        ];
        let loads = [
            ("Bench load", Steering, Signal::BenchPressure.name()),
            ("Priority motor", Steering, "p_pm"),
            (
                "Excess bench load",
                Consumer,
                Signal::ExcessBenchPressure.name(),
            ),
            ("Excess motor", Consumer, "p_m"),
            ("Lift, cap end", Consumer, "p_cap"),
        ];
        // What the steering takes from the port, whichever way it turns.
        let load = columns.size(
            "Steering load",
            Steering,
            Signal::SteeringLoadPressure.name(),
        );
        let series = ports.into_iter().filter_map(line).chain(load);
        let series = series.chain(loads.into_iter().filter_map(line)).collect();
        let mut panel = columns.panel("Pressure", Quantity::Pressure, series);
        panel.weight = LARGE;
        panel.limits = self.cracking_pressures();
        panel
    }

    /// Where the reliefs crack, on top of a constant back pressure.
    fn cracking_pressures(&self) -> Vec<Limit> {
        let parts = self.circuit.parts();
        let back = match parts.return_side {
            ReturnSide::Constant(pressure) => pressure,
            ReturnSide::Restricted { .. } => 0.0,
        };
        let priority = match &parts.priority_relief {
            PriorityRelief::None => None,
            PriorityRelief::OnPort(relief) => Some(("priority relief cracks", relief)),
            PriorityRelief::Pilot(relief) => Some(("pilot relief cracks", relief)),
        };
        let main = parts
            .main_relief
            .as_ref()
            .map(|relief| ("main relief cracks", relief));
        let excess = parts
            .excess_relief
            .as_ref()
            .map(|relief| ("excess relief cracks", relief));
        let unit = self.columns.unit(Quantity::Pressure);
        let limit = |(label, relief): (&str, &Relief)| Limit {
            label: label.to_owned(),
            at: Where::Line(unit.value_from_si(relief.cracking + back)),
            reach: Reach::IfInView,
        };
        [main, priority, excess]
            .into_iter()
            .flatten()
            .map(limit)
            .collect()
    }

    fn flows(&mut self) -> Panel {
        let columns = &self.columns;
        let always = [
            ("Pump", Meaning::Inlet, Signal::PumpFlow),
            ("Priority", Meaning::Priority, Signal::PriorityFlow),
            ("Excess", Meaning::Excess, Signal::ExcessFlow),
        ];
        let reliefs = [
            ("Main relief", Meaning::Inlet, Signal::MainReliefFlow),
            (
                "Priority relief",
                Meaning::Priority,
                Signal::PriorityReliefFlow,
            ),
            ("Pilot relief", Meaning::Priority, Signal::PilotReliefFlow),
            ("Excess relief", Meaning::Excess, Signal::ExcessReliefFlow),
        ];
        let line = |(label, meaning, signal): (&str, Meaning, Signal)| {
            columns.series(label, meaning, signal.name())
        };
        let mut series: Vec<Series> = always.into_iter().filter_map(line).collect();
        // The port gives oil whichever way the wheel turns.
        let demand = Signal::SteeringDemand.name();
        series.extend(columns.size("Wheel demand", Meaning::Steering, demand));
        let shut_below = SHUT * columns.largest(Signal::PumpFlow.name());
        let mut shut = Vec::new();
        for relief in reliefs {
            let Some(line) = line(relief) else { continue };
            if columns.largest(relief.2.name()) > shut_below {
                series.push(line.dashed(Dash::Dot));
            } else {
                shut.push(relief.0.to_lowercase());
            }
        }
        let mut panel = columns.panel("Flow", Quantity::Flow, series);
        panel.weight = LARGE;
        if !shut.is_empty() {
            self.notes.push(format!(
                "Shut throughout and not drawn: {}.",
                shut.join(", ")
            ));
        }
        panel
    }

    fn wheel(&self) -> Option<Panel> {
        let columns = &self.columns;
        let [asked, got, short] = [
            Signal::WheelRate,
            Signal::WheelRateEffective,
            Signal::WheelShortfall,
        ]
        .map(Signal::name);
        let commanded = columns.series("Commanded", Meaning::Drive, asked)?;
        let reached = columns.series("Reached", Meaning::Steering, got)?;
        let mut panel = columns.panel("Steering wheel rate", Quantity::AngularVelocity, Vec::new());
        panel.weight = MIDDLE;
        if columns.largest(short) > NO_SHORTFALL * columns.largest(asked) {
            let pairs = commanded.points.iter().zip(&reached.points);
            panel.shades.push(Shade {
                label: "shortfall".to_owned(),
                fill: Fill::Shortfall,
                points: pairs
                    .map(|(a, b)| [a[0], a[1].min(b[1]), a[1].max(b[1])])
                    .collect(),
            });
        }
        panel.series = vec![reached.dashed(Dash::Solid), commanded.dashed(Dash::Short)];
        Some(panel)
    }

    fn power(&self) -> Panel {
        let columns = &self.columns;
        let lines = [
            ("Pump shaft", Meaning::Drive, Signal::PumpShaftPower),
            ("Priority port", Meaning::Priority, Signal::SteeringPower),
            ("Excess port", Meaning::Excess, Signal::ExcessPower),
            ("Turned to heat", Meaning::Heat, Signal::HeatPower),
        ];
        let series = lines
            .into_iter()
            .filter_map(|(label, meaning, signal)| columns.series(label, meaning, signal.name()));
        let mut panel = columns.panel("Power", Quantity::Power, series.collect());
        panel.weight = MIDDLE;
        panel
    }
}
