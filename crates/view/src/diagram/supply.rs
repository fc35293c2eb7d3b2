//! Prime mover, pump, its inlet, and the line to the valve with the main relief.

use std::f64::consts::TAU;

use helmsplit_model::{PrimeMover, Quantity, Relief, Signal, Suction};
use kurbo::Rect;

use super::context::Context;
use super::frame::{DOWN, Frame, RIGHT, UP};
use super::places::{
    INLET_Y, MAIN_RELIEF, PRIME_MOVER, PRIORITY_X, PUMP, RETURN_Y, SUCTION_TANK_Y, VALVE,
};
use super::symbols::{DIAMOND, MACHINE, RELIEF, filter, letter, pump, relief, shaft, tank};
use crate::scene::{Anchor, Part, PartPen, Tone};
use crate::style::TextSize;

impl Context<'_> {
    pub(super) fn supply(&self, parts: &mut Vec<Part>) {
        parts.push(self.prime_mover());
        parts.push(self.pump_inlet());
        parts.push(self.pump());
        parts.push(self.inlet());
        if let Some(main) = &self.parts.main_relief {
            parts.push(self.main_relief(main));
        }
    }

    fn prime_mover(&self) -> Part {
        let (x, y) = PRIME_MOVER;
        let governed = matches!(self.parts.prime_mover, PrimeMover::Governed(_));
        let name = if governed { "Engine" } else { "Drive" };
        let mut pen = PartPen::new("prime_mover", name);
        shaft(&mut pen, (x + MACHINE, y), PUMP.0 - MACHINE);
        if governed {
            // A prime mover that is no electric motor has a square.
            pen.frame(Rect::from_center_size(
                PRIME_MOVER,
                (2.0 * MACHINE, 2.0 * MACHINE),
            ));
        } else {
            pen.circle(PRIME_MOVER, MACHINE);
        }
        letter(&mut pen, PRIME_MOVER, "M");
        let detail = if governed { "governed" } else { "given speed" };
        pen.label((x, y + MACHINE + 16.0), detail, Anchor::Middle);
        let above = (x, y - MACHINE - 8.0);
        self.show_signal(&mut pen, above, Anchor::Middle, Signal::EngineSpeed);
        pen.done()
    }

    fn pump_inlet(&self) -> Part {
        let x = PUMP.0;
        let top = PUMP.1 + MACHINE;
        let Suction::Line { .. } = self.parts.suction else {
            let mut pen = PartPen::new("suction", "Pump inlet, flooded");
            pen.line(&[(x, SUCTION_TANK_Y), (x, top)], self.working("suction"));
            tank(&mut pen, (x, SUCTION_TANK_Y));
            return pen.done();
        };
        let mut pen = PartPen::new("suction", "Suction line");
        let strainer = (x, 0.5 * (top + SUCTION_TANK_Y) - 5.0);
        pen.line(
            &[(x, SUCTION_TANK_Y), (x, strainer.1)],
            self.working("tank"),
        );
        pen.line(&[(x, strainer.1), (x, top)], self.working("suction"));
        filter(&mut pen, &Frame::new(strainer, UP, RIGHT));
        tank(&mut pen, (x, SUCTION_TANK_Y));
        let beside = (x + DIAMOND + 8.0, strainer.1 + 4.0);
        pen.text(
            beside,
            "Suction line",
            (TextSize::Label, Tone::Ink),
            Anchor::Start,
        );
        let below = (beside.0, beside.1 + 14.0);
        self.show_pressure(&mut pen, below, Anchor::Start, "suction");
        pen.done()
    }

    fn pump(&self) -> Part {
        let mut pen = PartPen::new("pump", "Pump");
        pump(&mut pen, &Frame::new(PUMP, UP, RIGHT));
        let displacement = self.parts.pump.displacement_rad * TAU;
        let detail = format!("{}/rev", self.size(displacement, Quantity::Volume));
        let at = (PUMP.0 + MACHINE + 6.0, PUMP.1 - 4.0);
        pen.label(at, &detail, Anchor::Start);
        pen.done()
    }

    fn inlet(&self) -> Part {
        let mut pen = PartPen::new("inlet", "Pump line and valve inlet");
        let stroke = self.working("p_in");
        let top = PUMP.1 - MACHINE;
        pen.line(
            &[(PUMP.0, top), (PUMP.0, INLET_Y), (VALVE.0, INLET_Y)],
            stroke,
        );
        let middle = (PUMP.0, 0.5 * (top + INLET_Y));
        self.arrow(&mut pen, middle, UP, Signal::PumpFlow);
        self.show_signal(
            &mut pen,
            (PUMP.0 + 10.0, middle.1 + 4.0),
            Anchor::Start,
            Signal::PumpFlow,
        );
        let above = (PUMP.0, INLET_Y - 8.0);
        self.show_pressure(&mut pen, above, Anchor::Start, "p_in");
        pen.done()
    }

    fn main_relief(&self, main: &Relief) -> Part {
        let (x, y) = MAIN_RELIEF;
        let mut pen = PartPen::new("main_relief", "Main relief");
        let inlet = self.working("p_in");
        pen.line(&[(x, INLET_Y), (x, y - RELIEF)], inlet);
        pen.line(&[(x, y + RELIEF), (x, RETURN_Y)], self.working("return"));
        pen.junction((x, INLET_Y));
        pen.junction((x, RETURN_Y));
        relief(
            &mut pen,
            &Frame::new(MAIN_RELIEF, DOWN, RIGHT),
            self.pilot("p_in"),
        );
        self.arrow(&mut pen, (x, y + 50.0), DOWN, Signal::MainReliefFlow);
        let label = (x + 10.0, y + RELIEF + 16.0);
        pen.label(label, &self.cracking(main), Anchor::Start);
        pen.done()
    }

    /// What a relief's label says below its name.
    pub(super) fn cracking(&self, relief: &Relief) -> String {
        format!(
            "cracks at {}",
            self.size(relief.cracking, Quantity::Pressure)
        )
    }

    /// The inlet's line inside the valve, to the port at `x`.
    pub(super) fn inlet_inside(&self, pen: &mut PartPen, x: f64, port_y: f64) {
        let stroke = self.working("p_in");
        pen.line(&[(VALVE.0, INLET_Y), (x, INLET_Y), (x, port_y)], stroke);
        pen.junction((PRIORITY_X, INLET_Y));
    }
}
