//! Where a breakpoint may go: between its neighbours, within what is allowed, on round numbers.

use helmsplit_model::Quantity;
use helmsplit_scenario::manoeuvre::{Line, LinePoint, Origin};
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_scenario::units::si_unit;

use super::edit::ListEdit;
use super::stage::Stage;

/// Longest time that a breakpoint may have, s.
const LATEST: f64 = 3600.0;

/// What moves: a free breakpoint, alone or with the other one of its jump.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Moved {
    pub(super) place: usize,
    pub(super) twin: Option<usize>,
}

/// Where a breakpoint shall go.
#[derive(Debug, Clone, PartialEq, Default)]
pub(super) struct Aim {
    /// The text of its time; `None` to leave it.
    pub(super) time: Option<String>,
    /// The text of its value; `None` to leave it.
    pub(super) value: Option<String>,
    /// The limit that holds it.
    pub(super) limit: Option<String>,
}

/// The stretch of time that a point can move in, s, with who stands at its ends.
#[derive(Debug, Clone, PartialEq)]
struct Room {
    low: (f64, &'static str),
    high: (f64, &'static str),
}

impl Aim {
    /// The aim of a breakpoint for wanted numbers, each in the unit on the screen.
    pub(super) fn at(
        stage: &Stage<'_>,
        moved: Moved,
        time: Option<f64>,
        value: Option<f64>,
        snap: bool,
    ) -> Self {
        let mut aim = Self::default();
        if let Some(time) = time {
            aim.take_time(stage, moved, time, snap);
        }
        if let Some(value) = value {
            aim.take_value(stage, value, snap);
        }
        aim
    }

    fn take_time(&mut self, stage: &Stage<'_>, moved: Moved, time: f64, snap: bool) {
        let second = si_unit(Quantity::Time);
        let room = stage.line.as_ref().map_or_else(free_room, |line| {
            let own: Vec<usize> = std::iter::once(moved.place).chain(moved.twin).collect();
            room(line, &own)
        });
        let exact = |time: f64| text_from_si(time, second, Digits::Exact);
        let text = stage.time_steps(snap).text(time, second);
        let rounded = helmsplit_scenario::quantity_text::parse(&text, Quantity::Time);
        let rounded = rounded.map_or(time, |parsed| parsed.si);
        let (held, text) = if time < room.low.0 || rounded < room.low.0 {
            (time < room.low.0, exact(room.low.0))
        } else if time > room.high.0 || rounded > room.high.0 {
            (time > room.high.0, exact(room.high.0))
        } else {
            (false, text)
        };
        if held {
            let (at, who) = if time < room.low.0 {
                room.low
            } else {
                room.high
            };
            self.limit = Some(format!("held at {} by {who}", exact(at)));
        }
        self.time = Some(text);
    }

    fn take_value(&mut self, stage: &Stage<'_>, value: f64, snap: bool) {
        let (low, high) = stage.allowed();
        let own = |number: f64| {
            text_from_si(
                stage.row.unit().si_from_value(number),
                stage.row.unit(),
                Digits::Exact,
            )
        };
        let range = stage.row.allowed;
        let text = if value <= low {
            self.limit = Some(format!("least value allowed: {}", own(range.low)));
            own(range.low)
        } else if value >= high {
            self.limit = Some(format!("greatest value allowed: {}", own(range.high)));
            own(range.high)
        } else {
            stage.value_steps(snap).text(value, stage.unit)
        };
        self.value = Some(text);
    }

    /// The edit that takes a breakpoint there; `None` if that changes nothing.
    pub(super) fn edit(self, stage: &Stage<'_>, moved: Moved) -> Option<ListEdit> {
        let (input, place) = (stage.input(), moved.place);
        let lines = &stage.scenario.manoeuvre;
        let point = lines.free(input).get(place)?;
        let reads = |text: &String, quantity, si: f64| {
            let parsed = helmsplit_scenario::quantity_text::parse(text, quantity);
            parsed.is_ok_and(|parsed| parsed.si.to_bits() != si.to_bits())
        };
        let time = self.time;
        let time = time.filter(|text| reads(text, Quantity::Time, point.time.si()));
        let value = self.value;
        let value = value.filter(|text| reads(text, stage.row.quantity, point.value.si()));
        match (time, value) {
            (None, None) => None,
            (Some(time), value) if moved.twin.is_some() => Some(ListEdit::MoveJump {
                input,
                place,
                time,
                value,
            }),
            (time, value) => Some(ListEdit::SetPoint {
                input,
                place,
                time,
                value,
            }),
        }
    }
}

fn free_room() -> Room {
    Room {
        low: (0.0, "the start of the run"),
        high: (LATEST, "the longest run"),
    }
}

/// The room of some free breakpoints that move together.
fn room(line: &Line, own: &[usize]) -> Room {
    let points = line.points();
    let is_own = |point: &LinePoint| match point.origin {
        Origin::Free(place) => own.contains(&place),
        Origin::Template(_) => false,
    };
    let mut room = free_room();
    let Some(first) = points.iter().position(is_own) else {
        return room;
    };
    let last = points.iter().rposition(is_own).unwrap_or(first);
    let who = |point: &LinePoint| match point.origin {
        Origin::Free(_) => "the next breakpoint",
        Origin::Template(_) => "a template",
    };
    if let Some(point) = first.checked_sub(1).map(|ahead| &points[ahead]) {
        room.low = (point.time, who(point));
    }
    if let Some(point) = points.get(last + 1) {
        room.high = (point.time, who(point));
    }
    room
}
