//! A scene as one mesh, ready to be painted, and what moves or has letters beside it.

use std::sync::Arc;

use egui::epaint::{TessellationOptions, Tessellator};
use egui::{Color32, Mesh, Pos2, Shape, Stroke, Vec2};
use helmsplit_view::Colour;
use helmsplit_view::scene::{Anchor, Line, Paint, Prim, Scene, Stroke as SceneStroke, Tone};
use helmsplit_view::style::TextSize;
use kurbo::{BezPath, PathEl};

use super::fill::fill;
use super::flow::{FlowArrow, reach};
use super::place::Place;
use crate::look::Look;
use crate::text::on_screen;

/// Lines get no thinner than this share of their width, and no wider than so many times.
const PEN: std::ops::RangeInclusive<f32> = 0.72..=2.0;

/// Heads of arrows get no smaller than this share of their size: in symbols, and where oil flows.
const LEAST_HEAD: f32 = 0.6;
const LEAST_FLOW_ARROW: f32 = 0.8;

/// Accuracy of curves, points.
const CURVE: f64 = 0.1;

/// Colours of a drawing, pale if it is out of date.
pub(super) struct Ink<'a> {
    pub(super) look: &'a Look,
    pub(super) pale: bool,
}

impl Ink<'_> {
    fn colour(&self, colour: Colour) -> Color32 {
        let colour = crate::look::egui_colour(colour);
        if self.pale {
            self.look.paled(colour)
        } else {
            colour
        }
    }

    fn paint(&self, paint: Paint) -> Color32 {
        self.colour(self.look.theme.paint(paint))
    }

    /// The colour of a text.
    pub(super) fn tone(&self, tone: Tone) -> Color32 {
        self.colour(match tone {
            Tone::Ink => self.look.theme.text.ink,
            Tone::Quiet => self.look.theme.text.quiet,
        })
    }
}

/// A text of a scene, on the screen.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct SceneText {
    /// Index of its part.
    pub(super) part: usize,
    /// Start, middle or end of its baseline.
    pub(super) at: Pos2,
    pub(super) content: String,
    pub(super) size: TextSize,
    pub(super) tone: Tone,
    pub(super) anchor: Anchor,
}

/// A straight piece of a line, with the index of its part.
pub(super) type Piece = (usize, [Pos2; 2]);

/// A scene on the screen.
pub(super) struct Painted {
    pub(super) mesh: Arc<Mesh>,
    pub(super) arrows: Vec<FlowArrow>,
    pub(super) texts: Vec<SceneText>,
    pub(super) pieces: Vec<Piece>,
}

impl Painted {
    pub(super) fn new(scene: &Scene, place: &Place, ink: &Ink<'_>, pixels_per_point: f32) -> Self {
        // Round dots from the font's texture would go stale with it.
        let options = TessellationOptions {
            prerasterized_discs: false,
            ..TessellationOptions::default()
        };
        let mut pen = Pen {
            place,
            ink,
            width: place.scale.clamp(*PEN.start(), *PEN.end()),
            tessellator: Tessellator::new(pixels_per_point, options, [1, 1], Vec::new()),
            mesh: Mesh::default(),
            arrows: Vec::new(),
            texts: Vec::new(),
            pieces: Vec::new(),
        };
        for (index, part) in scene.parts.iter().enumerate() {
            let from = pen.pieces.len();
            for prim in &part.prims {
                pen.prim(index, prim);
            }
            let own: Vec<[Pos2; 2]> = pen.pieces[from..].iter().map(|piece| piece.1).collect();
            let arrows = pen.arrows.iter_mut().filter(|arrow| arrow.name.0 == index);
            for arrow in arrows {
                let free = reach(&own, arrow.middle, arrow.direction);
                arrow.reach = (free - 0.5 * arrow.length).max(0.0);
            }
        }
        Self {
            mesh: Arc::new(pen.mesh),
            arrows: pen.arrows,
            texts: pen.texts,
            pieces: pen.pieces,
        }
    }
}

struct Pen<'a> {
    place: &'a Place,
    ink: &'a Ink<'a>,
    /// What widths of lines are multiplied by.
    width: f32,
    tessellator: Tessellator,
    mesh: Mesh,
    arrows: Vec<FlowArrow>,
    texts: Vec<SceneText>,
    pieces: Vec<Piece>,
}

/// A flattened stretch of a path.
struct Stretch {
    points: Vec<Pos2>,
    closed: bool,
}

impl Pen<'_> {
    fn prim(&mut self, part: usize, prim: &Prim) {
        match prim {
            Prim::Path {
                outline,
                stroke,
                fill: paint,
            } => {
                let stretches = self.flattened(outline);
                if let Some(paint) = paint {
                    let colour = self.ink.paint(*paint);
                    for stretch in &stretches {
                        let (pen, mesh) = (&mut self.tessellator, &mut self.mesh);
                        fill(&stretch.points, colour, pen, mesh);
                    }
                }
                if let Some(stroke) = stroke {
                    self.stroke(&stretches, *stroke);
                    self.note_pieces(part, &stretches);
                }
            }
            Prim::Circle {
                centre,
                radius,
                stroke,
                fill: paint,
            } => self.circle(part, (*centre, *radius), *stroke, *paint),
            Prim::Text {
                at,
                content,
                size,
                tone,
                anchor,
            } => self.texts.push(SceneText {
                part,
                at: self.place.on_screen(*at),
                content: on_screen(content),
                size: *size,
                tone: *tone,
                anchor: *anchor,
            }),
            Prim::Arrow { .. } => self.arrow(part, prim),
        }
    }

    fn circle(
        &mut self,
        part: usize,
        (centre, radius): (kurbo::Point, f64),
        stroke: Option<SceneStroke>,
        paint: Option<Paint>,
    ) {
        let circle = kurbo::Circle::new(centre, radius);
        let outline = kurbo::Shape::to_path(&circle, CURVE / f64::from(self.place.scale));
        let stretches = self.flattened(&outline);
        self.note_pieces(part, &stretches);
        let radius = radius as f32 * self.place.scale;
        self.add(Shape::Circle(egui::epaint::CircleShape {
            center: self.place.on_screen(centre),
            // Dots stay dots in a small drawing.
            radius: if stroke.is_none() {
                radius.max(1.8)
            } else {
                radius
            },
            fill: paint.map_or(Color32::TRANSPARENT, |paint| self.ink.paint(paint)),
            stroke: stroke.map_or(Stroke::NONE, |stroke| self.plain(stroke.line)),
        }));
    }

    fn arrow(&mut self, part: usize, prim: &Prim) {
        let Prim::Arrow {
            tip,
            direction,
            length,
            paint,
            pace,
        } = prim
        else {
            return;
        };
        let scale = self.place.scale;
        let direction = Vec2::new(direction.x as f32, direction.y as f32);
        let fill = self.ink.paint(*paint);
        let outline = self.plain(Line::Fine);
        let tip = self.place.on_screen(*tip);
        let length = *length as f32;
        if *pace > 0.0 {
            let middle = tip - direction * (0.5 * length * scale);
            self.arrows.push(FlowArrow {
                name: (part, middle.x.round() as i32, middle.y.round() as i32),
                middle,
                direction,
                length: length * scale.clamp(LEAST_FLOW_ARROW, *PEN.end()),
                pace: *pace as f32,
                reach: 0.0,
                fill,
                outline,
            });
            return;
        }
        let length = length * scale.max(LEAST_HEAD);
        let base = tip - direction * length;
        let side = direction.rot90() * (0.42 * length);
        let corners = vec![tip, base + side, base - side];
        self.add(Shape::convex_polygon(corners, fill, outline));
    }

    fn add(&mut self, shape: Shape) {
        self.tessellator.tessellate_shape(shape, &mut self.mesh);
    }

    fn plain(&self, line: Line) -> Stroke {
        let (colour, width) = self.ink.look.theme.pen(line);
        Stroke::new(width as f32 * self.width, self.ink.colour(colour))
    }

    /// One line, or two where the oil inside is shaded: a wider one in ink around it.
    fn stroke(&mut self, stretches: &[Stretch], stroke: SceneStroke) {
        let Some(share) = stroke.oil else {
            let pen = self.plain(stroke.line);
            self.draw(stretches, pen, stroke.line.dash());
            return;
        };
        let theme = &self.ink.look.theme;
        let wide = |width: f64, colour: Colour| {
            Stroke::new(width as f32 * self.width, self.ink.colour(colour))
        };
        let casing = wide(theme.casing_width(stroke.line), theme.text.ink);
        let ground = wide(theme.oil_width(stroke.line), theme.background);
        let core = wide(theme.oil_width(stroke.line), theme.pressure.at(share));
        self.draw(stretches, casing, &[]);
        if stroke.line == Line::Pilot {
            // Behind dashes the casing is whole, so that colour and ground both have an edge.
            self.draw(stretches, ground, &[]);
        }
        self.draw(stretches, core, stroke.line.dash());
    }

    fn draw(&mut self, stretches: &[Stretch], pen: Stroke, dash: &[f64]) {
        for stretch in stretches {
            let points = &stretch.points;
            if points.len() < 2 {
                continue;
            }
            if dash.is_empty() {
                self.add(match (stretch.closed, &points[..]) {
                    (true, _) => Shape::closed_line(points.clone(), pen),
                    (false, &[from, to]) => Shape::line_segment([from, to], pen),
                    (false, _) => Shape::line(points.clone(), pen),
                });
                continue;
            }
            let mut way = points.clone();
            if stretch.closed {
                way.push(points[0]);
            }
            let lengths = |first: usize| -> Vec<f32> {
                let every_other = dash.iter().skip(first).step_by(2);
                every_other
                    .map(|&length| length as f32 * self.width)
                    .collect()
            };
            let dashes = Shape::dashed_line_with_offset(&way, pen, &lengths(0), &lengths(1), 0.0);
            for dash in dashes {
                self.add(dash);
            }
        }
    }

    fn flattened(&self, path: &BezPath) -> Vec<Stretch> {
        let mut stretches: Vec<Stretch> = Vec::new();
        let accuracy = CURVE / f64::from(self.place.scale);
        kurbo::flatten(path, accuracy, |element| match element {
            PathEl::MoveTo(at) => stretches.push(Stretch {
                points: vec![self.place.on_screen(at)],
                closed: false,
            }),
            PathEl::LineTo(at) => {
                if let Some(stretch) = stretches.last_mut() {
                    stretch.points.push(self.place.on_screen(at));
                }
            }
            // Flattened paths have no curves; what is left closes.
            _ => {
                if let Some(stretch) = stretches.last_mut() {
                    stretch.closed = true;
                }
            }
        });
        for stretch in &mut stretches {
            // A closed outline that comes back to its start has that corner twice.
            let ends = (stretch.points.first(), stretch.points.last());
            if let (true, (Some(first), Some(last))) = (stretch.closed, ends)
                && stretch.points.len() > 1
                && first.distance(*last) < 1e-3
            {
                stretch.points.pop();
            }
        }
        stretches
    }

    fn note_pieces(&mut self, part: usize, stretches: &[Stretch]) {
        for stretch in stretches {
            let points = &stretch.points;
            let pairs = points.windows(2).map(|pair| (part, [pair[0], pair[1]]));
            self.pieces.extend(pairs);
            if let (true, Some(&first), Some(&last)) =
                (stretch.closed, points.first(), points.last())
            {
                self.pieces.push((part, [last, first]));
            }
        }
    }
}
