//! The way back to tank, and the scale of pressures.

use helmsplit_model::{ExcessSide, Quantity, ReturnSide, Signal};

use super::context::Context;
use super::frame::{Frame, RIGHT, UP};
use super::places::{
    CONSUMER_X, EXCESS_RELIEF, LIFT_X, MAIN_RELIEF, RETURN_END_X, RETURN_Y, RISER_STUB, RISER_X,
};
use super::symbols::{cooler, filter, tank};
use crate::scene::{Anchor, Part, PartPen};

impl Context<'_> {
    /// The return line, if anything returns.
    pub(super) fn return_side(&self, parts: &mut Vec<Part>) {
        let riser = self.riser_top();
        let main = self.parts.main_relief.map(|_| MAIN_RELIEF.0);
        let excess = self.parts.excess_relief.map(|_| EXCESS_RELIEF.0);
        let consumer = match self.parts.excess {
            ExcessSide::Tank { .. } | ExcessSide::Motor(_) => Some(CONSUMER_X),
            ExcessSide::Lift(_) => Some(LIFT_X + 10.0),
            ExcessSide::Bench { .. } | ExcessSide::Blocked => None,
        };
        let ends = [riser.map(|_| RISER_X), main, excess, consumer];
        let Some(start) = ends.into_iter().flatten().reduce(f64::min) else {
            return;
        };
        let mut pen = PartPen::new("return_line", "Return");
        let back = self.working("return");
        let mut way = match riser {
            Some(top) => vec![
                (RISER_X + RISER_STUB, top),
                (RISER_X, top),
                (RISER_X, RETURN_Y),
            ],
            None => vec![(start, RETURN_Y)],
        };
        let x = RETURN_END_X;
        let foot = RETURN_Y + 26.0;
        match self.parts.return_side {
            ReturnSide::Constant(pressure) => {
                way.extend([(x, RETURN_Y), (x, foot)]);
                pen.line(&way, back);
                tank(&mut pen, (x, foot));
                let detail = format!("at {}", self.size(pressure, Quantity::Pressure));
                pen.label((x + 24.0, foot - 12.0), &detail, Anchor::Start);
            }
            ReturnSide::Restricted { .. } => {
                let (clean, cool, end) = (x + 30.0, x + 80.0, x + 126.0);
                way.push((cool, RETURN_Y));
                pen.line(&way, back);
                let last = self.working("tank");
                pen.line(&[(cool, RETURN_Y), (end, RETURN_Y), (end, foot)], last);
                filter(&mut pen, &Frame::new((clean, RETURN_Y), RIGHT, UP));
                cooler(&mut pen, &Frame::new((cool, RETURN_Y), RIGHT, UP));
                tank(&mut pen, (end, foot));
                pen.label(
                    (x + 16.0, RETURN_Y - 38.0),
                    "filter and cooler",
                    Anchor::Start,
                );
                let at = (x - 10.0, RETURN_Y + 16.0);
                self.show_pressure(&mut pen, at, Anchor::End, "return");
            }
        }
        let arrow = (x - 14.0, RETURN_Y);
        self.arrow(&mut pen, arrow, RIGHT, Signal::ReturnFlow);
        parts.push(pen.done());
    }
}
