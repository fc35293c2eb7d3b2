//! A scene laid out on the screen, kept until something changes.

use egui::{Painter, Pos2, Rect, Ui, Vec2};
use helmsplit_view::scene::{Anchor, Part, Scene};
use kurbo::{ParamCurve, Point};

use super::canvas::Subject;
use super::ink::{Ink, Painted};
use super::labels::{self, Label};
use super::names::{is_control, meant, spoken_name};
use super::place::Place;

/// Pointing reaches so far, points.
const REACH: f32 = 7.0;

/// A part that covers more of the drawing than this is meant on its lines only.
const LARGE_PART: f64 = 0.12;

/// Side of the frame of a control that stands on a line, points.
const ON_LINE: f32 = 22.0;

/// What the mesh depends on.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct SheetKey {
    /// Number of the scene.
    made: u64,
    pub(super) place: Place,
    pub(super) frame: Rect,
    pixels_per_point: f32,
    dark: bool,
    pale: bool,
}

/// What the places of texts depend on: not on what they say, so that they stand still while values
/// change.
#[derive(Debug, Clone, PartialEq)]
struct LabelKey {
    place: Place,
    frame: Rect,
    texts: Vec<(usize, Anchor, i32, i32)>,
}

/// A part that can be reached and read out.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Control {
    pub(super) part_id: String,
    pub(super) name: String,
    /// Pointing at the middle of it means this part.
    pub(super) frame: Rect,
}

/// A scene on the screen.
pub(super) struct Sheet {
    pub(super) key: SheetKey,
    pub(super) painted: Painted,
    pub(super) controls: Vec<Control>,
    label_key: LabelKey,
    labels: Vec<Option<Label>>,
}

impl Sheet {
    /// Lays a scene out anew if something changed.
    pub(super) fn renew(
        sheet: &mut Option<Self>,
        ui: &Ui,
        scene: &Scene,
        (subject, made): (Subject, u64),
        ink: &Ink<'_>,
        (place, frame): (Place, Rect),
    ) {
        let key = SheetKey {
            made,
            place,
            frame,
            pixels_per_point: ui.pixels_per_point(),
            dark: ink.look.is_dark(),
            pale: ink.pale,
        };
        if sheet.as_ref().is_some_and(|sheet| sheet.key == key) {
            return;
        }
        let painted = Painted::new(scene, &place, ink, key.pixels_per_point);
        let texts = painted.texts.iter().map(|text| {
            let (x, y) = (text.at.x.round() as i32, text.at.y.round() as i32);
            (text.part, text.anchor, x, y)
        });
        let label_key = LabelKey {
            place,
            frame,
            texts: texts.collect(),
        };
        let kept = sheet.take().filter(|sheet| sheet.label_key == label_key);
        let labels = kept.map_or_else(
            || {
                let mut width = |text: &str, size: f32| galley(ui.painter(), text, size).size().x;
                let space = (place.scale, frame);
                labels::placed(&painted.texts, &painted.pieces, space, &mut width)
            },
            |sheet| sheet.labels,
        );
        *sheet = Some(Self {
            controls: controls(scene, subject, &place),
            key,
            painted,
            label_key,
            labels,
        });
    }

    /// Paints the texts.
    pub(super) fn write(&self, painter: &Painter, ink: &Ink<'_>) {
        for (text, label) in self.painted.texts.iter().zip(&self.labels) {
            let Some(label) = label else { continue };
            let galley = galley(painter, &text.content, label.size);
            let glyphs = galley.rows.first().and_then(|row| {
                let glyph = row.glyphs.first()?;
                Some(row.pos.y + glyph.pos.y)
            });
            let left = match text.anchor {
                Anchor::Start => 0.0,
                Anchor::Middle => 0.5 * galley.size().x,
                Anchor::End => galley.size().x,
            };
            let at = label.at - Vec2::new(left, glyphs.unwrap_or(0.0));
            let colour = ink.tone(text.tone);
            painter.galley_with_override_text_color(at, galley, colour);
        }
    }

    /// The part that is meant by pointing at `at`, as its index.
    pub(super) fn hit(&self, scene: &Scene, at: Pos2) -> Option<usize> {
        hit(scene, &self.key.place, at)
    }
}

fn hit(scene: &Scene, place: &Place, at: Pos2) -> Option<usize> {
    let reach = f64::from(REACH / place.scale);
    let hit = scene.hit(place.in_scene(at), reach)?;
    let share = hit.part.bounds.area() / scene.bounds.area().max(1.0);
    if hit.distance > reach && share > LARGE_PART {
        return None;
    }
    let target = meant(&hit.part.id);
    let index = |id: &str| scene.parts.iter().position(|part| part.id == id);
    index(target).or_else(|| index(&hit.part.id))
}

fn galley(painter: &Painter, text: &str, size: f32) -> std::sync::Arc<egui::Galley> {
    let font = egui::FontId::proportional(size);
    painter.layout_no_wrap(text.to_owned(), font, egui::Color32::PLACEHOLDER)
}

/// The controls of a scene, in its order.
fn controls(scene: &Scene, subject: Subject, place: &Place) -> Vec<Control> {
    let parts = scene.parts.iter().enumerate();
    parts
        .filter(|(_, part)| is_control(scene, &part.id))
        .map(|(index, part)| Control {
            part_id: part.id.clone(),
            name: spoken_name(subject, &part.label),
            frame: control_frame(scene, index, place),
        })
        .collect()
}

/// The frame of a part, if pointing at its middle means this part; else a small one on one of its
/// lines where it does, the longest first, or else anywhere inside.
fn control_frame(scene: &Scene, index: usize, place: &Place) -> Rect {
    let part = &scene.parts[index];
    let whole = place.frame(part.bounds);
    let means_it = |at: Pos2| hit(scene, place, at) == Some(index);
    if means_it(whole.center()) {
        return whole;
    }
    let mut lines: Vec<(f64, Point)> = pieces(part);
    lines.sort_by(|a, b| b.0.total_cmp(&a.0));
    let on_lines = lines.into_iter().map(|(_, at)| place.on_screen(at));
    let within = (1..20_u8).flat_map(|x| (1..20_u8).map(move |y| [x, y]));
    let within = within.map(|share| {
        let [x, y] = share.map(|share| f32::from(share) / 20.0);
        whole.lerp_inside(Vec2::new(x, y))
    });
    let found = on_lines.chain(within).find(|&at| means_it(at));
    found.map_or(whole, |at| Rect::from_center_size(at, Vec2::splat(ON_LINE)))
}

/// Length, and points, of the straight pieces of a part.
fn pieces(part: &Part) -> Vec<(f64, Point)> {
    let mut all = Vec::new();
    for prim in &part.prims {
        let helmsplit_view::scene::Prim::Path {
            outline,
            stroke: Some(_),
            ..
        } = prim
        else {
            continue;
        };
        for segment in outline.segments() {
            let length = (segment.end() - segment.start()).hypot();
            for share in [0.5, 0.3, 0.7] {
                all.push((length, segment.eval(share)));
            }
        }
    }
    all
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::drawing::place::Zoom;
    use egui::{pos2, vec2};
    use helmsplit_scenario::presets::PRESETS;
    use helmsplit_view::diagram::DrawingOptions;
    use helmsplit_view::{circuit_scene, valve_scene};

    #[test]
    fn pointing_at_the_middle_of_a_control_means_its_part() {
        for preset in PRESETS {
            let circuit = preset.scenario().unwrap().circuit().unwrap();
            let options = DrawingOptions::default();
            let scenes = [
                (Subject::Circuit, circuit_scene(&circuit, None, options)),
                (Subject::Section, valve_scene(&circuit, None, None, options)),
            ];
            for (subject, scene) in &scenes {
                for size in [vec2(420.0, 330.0), vec2(900.0, 700.0)] {
                    let frame = Rect::from_min_size(pos2(10.0, 90.0), size);
                    let place = Zoom::default().place(scene.bounds, frame);
                    for control in controls(scene, *subject, &place) {
                        let found = hit(scene, &place, control.frame.center());
                        let id = found.map(|index| scene.parts[index].id.as_str());
                        let what = format!("{} of {}, {size:?}", control.part_id, preset.key);
                        assert_eq!(id, Some(control.part_id.as_str()), "{what}");
                    }
                }
            }
        }
    }
}
