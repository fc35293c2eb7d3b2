//! Names and sizes around the section.

use helmsplit_model::{LandShape, PriorityValve, Quantity};
use helmsplit_scenario::UnitSystem;

use super::sheet::Sheet;
use crate::diagram::{DrawingOptions, size_text, value_text};
use crate::scene::{Anchor, LINE_SPACING, Line, Paint, Part, PartPen, Prim, Stroke, Tone};
use crate::style::TextSize;
use crate::svg::label_width;

/// Least distance between two notes of a row, px.
const GAP: f64 = 16.0;

/// From the housing to the nearer edge of a row of notes, px.
const DISTANCE: f64 = 22.0;

/// Height of a row: name and detail, px.
pub(super) const ROW: f64 = 2.0 * LINE_SPACING;

/// A note: what it names, and where that is.
struct Note {
    id: &'static str,
    name: &'static str,
    detail: String,
    /// What it points at, px.
    target: (f64, f64),
}

impl Note {
    fn width(&self) -> f64 {
        let name = label_width(self.name, TextSize::Label);
        name.max(label_width(&self.detail, TextSize::Small))
    }
}

/// Middles for notes side by side, in order, near what they point at.
fn places(notes: &[Note], (low, high): (f64, f64)) -> Vec<f64> {
    let widths: Vec<f64> = notes.iter().map(Note::width).collect();
    let mut middles: Vec<f64> = notes.iter().map(|note| note.target.0).collect();
    let mut edge = low;
    for (middle, width) in middles.iter_mut().zip(&widths) {
        *middle = middle.max(edge + 0.5 * width);
        edge = *middle + 0.5 * width + GAP;
    }
    let mut edge = high;
    for (middle, width) in middles.iter_mut().zip(&widths).rev() {
        *middle = middle.min(edge - 0.5 * width);
        edge = *middle - 0.5 * width - GAP;
    }
    middles
}

impl Sheet<'_> {
    /// Both rows of notes; gives the lower edge of the lower one, px.
    pub(super) fn notes(
        &self,
        parts: &mut Vec<Part>,
        valve: &PriorityValve,
        options: DrawingOptions,
    ) -> f64 {
        let (_, foot) = self.at(0.0, -self.half_height);
        let (_, top) = self.at(0.0, self.half_height);
        let room = (
            self.at(self.left, 0.0).0 - 40.0,
            self.at(self.right, 0.0).0 + 40.0,
        );
        let above = self.notes_above(valve, options);
        for (note, x) in above.iter().zip(places(&above, room)) {
            parts.push(drawn(note, (x, top - DISTANCE - ROW), top - DISTANCE));
        }
        let below = self.notes_below(valve, options);
        for (note, x) in below.iter().zip(places(&below, room)) {
            parts.push(drawn(note, (x, foot + DISTANCE), foot + DISTANCE));
        }
        foot + DISTANCE + ROW
    }

    /// The pressure of that name, if it is known and wanted.
    fn pressure(&self, name: &str, options: DrawingOptions) -> String {
        let pressure = self.moment.and_then(|moment| moment.state(name));
        match pressure {
            Some(pressure) if options.values => {
                value_text(pressure, Quantity::Pressure, options.units)
            }
            _ => String::new(),
        }
    }

    fn notes_above(&self, valve: &PriorityValve, options: DrawingOptions) -> Vec<Note> {
        let s = &self.shape;
        let middle = |span: (f64, f64)| 0.5 * (span.0 + span.1);
        let hole = 0.4 * s.inlet_core.0 + 0.15 * s.radius;
        let passage = 0.5 * (s.radius + s.core_radius);
        vec![
            Note {
                id: "valve.head_hole",
                name: "Head hole",
                detail: millimetres(s.head_hole, options.units),
                target: self.at(hole, passage),
            },
            Note {
                id: "valve.land_note",
                name: "Metering edge",
                detail: edge_text(&valve.land.shape, options.units),
                target: self.spool_at(s.shoulder, s.radius),
            },
            Note {
                id: "valve.excess_note",
                name: "Excess port",
                detail: self.pressure("p_e", options),
                target: self.at(middle(s.excess_core), self.half_height),
            },
            Note {
                id: "valve.priority_note",
                name: "Priority port",
                detail: self.pressure("p_c", options),
                target: self.at(middle(s.priority_core), self.half_height),
            },
            Note {
                id: "valve.spring_end_note",
                name: "Spring end",
                detail: self.pressure("p_s", options),
                target: self.at(s.spring_end - 0.06 * s.radius, 0.3 * s.radius),
            },
        ]
    }

    fn notes_below(&self, valve: &PriorityValve, options: DrawingOptions) -> Vec<Note> {
        let s = &self.shape;
        let middle = |span: (f64, f64)| 0.5 * (span.0 + span.1);
        let size = |mm: f64| millimetres(mm, options.units);
        let preload = s.spring.preload_compression + self.travel;
        vec![
            Note {
                id: "valve.head_end_note",
                name: "Head end",
                detail: self.pressure("p_h", options),
                target: self.at(0.5 * s.head_end, -0.7 * s.radius),
            },
            Note {
                id: "valve.inlet_note",
                name: "Inlet",
                detail: self.pressure("p_in", options),
                target: self.at(middle(s.inlet_core), -self.half_height),
            },
            Note {
                id: "valve.fixed_orifice",
                name: "Fixed orifice",
                detail: size(s.fixed_orifice),
                target: self.spool_at(middle(s.orifice_wall), 0.0),
            },
            Note {
                id: "valve.bore_note",
                name: "Bore",
                detail: self.pressure("p_b", options),
                target: self.spool_at(
                    0.5 * (s.orifice_wall.1 + s.priority_holes.0),
                    -0.6 * s.bore_radius,
                ),
            },
            Note {
                id: "valve.priority_holes",
                name: "Priority holes",
                detail: size_text(valve.holes_area, Quantity::Area, options.units),
                target: self.spool_at(middle(s.priority_holes), -0.75 * s.radius),
            },
            Note {
                id: "valve.disc_hole",
                name: "Disc hole",
                detail: size(s.disc_hole),
                target: self.spool_at(middle(s.disc), 0.0),
            },
            Note {
                id: "valve.spring_note",
                name: "Spring",
                detail: format!("compressed {}", size(preload)),
                target: self.at(
                    s.spring_end - 0.5 * self.shape.spring_length(self.travel)
                        + 0.5 * s.spring.wire,
                    -s.spring.radius,
                ),
            },
        ]
    }
}

/// A length given in mm.
pub(super) fn millimetres(mm: f64, units: UnitSystem) -> String {
    size_text(mm / 1000.0, Quantity::Length, units)
}

/// The metering edge in words.
fn edge_text(shape: &LandShape, units: UnitSystem) -> String {
    match shape {
        LandShape::Chamfer { angle, .. } => {
            format!("chamfer {}", size_text(*angle, Quantity::Angle, units))
        }
        LandShape::Sharp => "sharp".to_owned(),
        LandShape::RoundHoles { count, diameter } => format!(
            "{count:.0} holes of {}",
            size_text(*diameter, Quantity::Length, units)
        ),
        LandShape::Notches { count, angle, .. } => format!(
            "{count:.0} notches of {}",
            size_text(*angle, Quantity::Angle, units)
        ),
        LandShape::Table(_) => "opening by table".to_owned(),
    }
}

/// Name and detail with a leader from the edge at `leader_y` to the target.
fn drawn(note: &Note, top: (f64, f64), leader_y: f64) -> Part {
    let mut pen = PartPen::new(note.id, note.name);
    let first = TextSize::Label.px() * 0.8;
    let at = (top.0, top.1 + first);
    pen.label(at, &note.detail, Anchor::Middle);
    let outward = if leader_y > note.target.1 { -4.0 } else { 4.0 };
    let start = (top.0, leader_y + outward);
    pen.line(&[start, note.target], Stroke::plain(Line::Fine));
    pen.push(Prim::Circle {
        centre: note.target.into(),
        radius: 2.0,
        stroke: None,
        fill: Some(Paint::Ink),
    });
    pen.done()
}

/// The quiet small text of scales.
pub(super) const QUIET: (TextSize, Tone) = (TextSize::Small, Tone::Quiet);
