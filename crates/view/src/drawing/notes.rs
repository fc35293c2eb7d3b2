//! Names and sizes around the section.

use helmsplit_model::{LandShape, PriorityValve, Quantity};
use helmsplit_scenario::UnitSystem;

use super::sheet::Sheet;
use crate::diagram::{DrawingOptions, Notes, size_text, value_text};
use crate::scene::{Anchor, LINE_SPACING, Line, Paint, Part, PartPen, Prim, Stroke, Tone};
use crate::style::TextSize;
use crate::svg::label_width;

/// Least distance between two notes of a row, px.
const GAP: f64 = 16.0;

/// From the housing to the nearer edge of a row of notes, px: with details, and of names alone.
const DISTANCE: (f64, f64) = (22.0, 14.0);

/// Between two rows, px.
const ROW_GAP: f64 = 10.0;

/// Size of the rows of notes.
#[derive(Debug, Clone, Copy)]
struct Rows {
    /// Height of a row, px.
    height: f64,
    /// From the housing to the nearer row, px.
    distance: f64,
}

impl Rows {
    fn of(notes: Notes) -> Self {
        match notes {
            Notes::Full => Self {
                height: 2.0 * LINE_SPACING,
                distance: DISTANCE.0,
            },
            Notes::Names | Notes::None => Self {
                height: LINE_SPACING,
                distance: DISTANCE.1,
            },
        }
    }
}

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

/// Where a note stands.
#[derive(Debug, Clone, Copy, PartialEq)]
struct Place {
    /// Middle of its text, px.
    middle: f64,
    /// Where its leader leaves the text, px.
    leader: f64,
    /// Whether it stands in the further row.
    far: bool,
}

/// Middles for texts side by side, in order, near what they want; each is a middle and a width.
fn side_by_side(texts: &[(f64, f64)], (low, high): (f64, f64)) -> Vec<f64> {
    let mut middles: Vec<f64> = texts.iter().map(|text| text.0).collect();
    let mut edge = low;
    for (middle, (_, width)) in middles.iter_mut().zip(texts) {
        *middle = middle.max(edge + 0.5 * width);
        edge = *middle + 0.5 * width + GAP;
    }
    let mut edge = high;
    for (middle, (_, width)) in middles.iter_mut().zip(texts).rev() {
        *middle = middle.min(edge - 0.5 * width);
        edge = *middle - 0.5 * width - GAP;
    }
    middles
}

/// Places for notes: all in one row if there is room, else every other one in a further row, whose
/// leaders pass between the notes of the nearer one.
fn places(notes: &[Note], room: (f64, f64)) -> Vec<Place> {
    let widths: Vec<f64> = notes.iter().map(Note::width).collect();
    let needed = widths.iter().sum::<f64>() + GAP * widths.len().saturating_sub(1) as f64;
    let two_rows = needed > room.1 - room.0;
    let is_far = |index: usize| two_rows && index % 2 == 1;
    let near: Vec<(f64, f64)> = (0..notes.len())
        .map(|index| {
            let width = if is_far(index) { 0.0 } else { widths[index] };
            (notes[index].target.0, width)
        })
        .collect();
    let leaders = side_by_side(&near, room);
    let far: Vec<(f64, f64)> = (0..notes.len())
        .filter(|&index| is_far(index))
        .map(|index| (leaders[index], widths[index]))
        .collect();
    let mut far = side_by_side(&far, room).into_iter();
    let place = |(index, leader): (usize, f64)| match is_far(index) {
        true => Place {
            middle: far.next().unwrap_or(leader),
            leader,
            far: true,
        },
        false => Place {
            middle: leader,
            leader,
            far: false,
        },
    };
    leaders.into_iter().enumerate().map(place).collect()
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
        let rows = Rows::of(options.notes);
        let told = |mut notes: Vec<Note>| {
            if options.notes != Notes::Full {
                notes.iter_mut().for_each(|note| note.detail.clear());
            }
            notes
        };
        let above = told(self.notes_above(valve, options));
        for (note, place) in above.iter().zip(places(&above, room)) {
            parts.push(drawn(note, place, rows, (top - rows.distance, -1.0)));
        }
        let below = told(self.notes_below(valve, options));
        let places = places(&below, room);
        for (note, place) in below.iter().zip(&places) {
            parts.push(drawn(note, *place, rows, (foot + rows.distance, 1.0)));
        }
        let further = if places.iter().any(|place| place.far) {
            rows.height + ROW_GAP
        } else {
            0.0
        };
        foot + rows.distance + rows.height + further
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

/// Name and detail with a leader to the target. `edge` is the edge of the nearer row that faces the
/// section; `outward` is 1 if the rows go down from there, -1 if up.
fn drawn(note: &Note, place: Place, rows: Rows, (edge, outward): (f64, f64)) -> Part {
    let mut pen = PartPen::new(note.id, note.name);
    let height = rows.height;
    let shift = if place.far { height + ROW_GAP } else { 0.0 };
    let own_edge = edge + outward * shift;
    let top = if outward > 0.0 {
        own_edge
    } else {
        own_edge - height
    };
    let at = (place.middle, top + TextSize::Label.px() * 0.8);
    pen.label(at, &note.detail, Anchor::Middle);
    let from = |edge: f64| (place.leader, edge - outward * 4.0);
    let mut leader = vec![from(own_edge)];
    if place.far {
        leader.push(from(edge));
    }
    leader.push(note.target);
    pen.line(&leader, Stroke::plain(Line::Fine));
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
