//! One scene in the window: painted, pointed at, reached by keyboard.

use egui::accesskit::{Action as SpokenAction, Role};
use egui::{EventFilter, Id, Key, Rect, Response, Sense, Ui, Vec2, WidgetInfo};
use helmsplit_model::Circuit;
use helmsplit_scenario::{Findings, UnitSystem};
use helmsplit_view::diagram::{DrawingOptions, Notes};
use helmsplit_view::scene::Scene;
use helmsplit_view::{Moment, circuit_scene};

use super::fit::fitted_section;
use super::flow::{self, Phases};
use super::ink::Ink;
use super::names::{meant, section_of};
use super::place::Zoom;
use super::sheet::{Control, Sheet};
use super::{marks, told};
use crate::look::Look;
use crate::parts::Part;

/// What a scene shows.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Subject {
    Circuit,
    Section,
}

impl Subject {
    /// Its name for screen readers.
    pub(super) fn name(self) -> &'static str {
        match self {
            Self::Circuit => "Circuit drawing",
            Self::Section => "Valve in section",
        }
    }
}

/// What there is to draw.
pub(crate) struct Drawn<'a> {
    /// The circuit.
    pub(crate) circuit: &'a Circuit,
    /// Its state at the cursor; `None` before the first solve.
    pub(crate) moment: Option<&'a Moment>,
    /// Changes with the circuit and with its run.
    pub(crate) generation: u64,
    pub(crate) units: UnitSystem,
    pub(crate) look: &'a Look,
    /// Whether it is out of date.
    pub(crate) pale: bool,
    /// The part whose card is shown.
    pub(crate) selected: Part,
    /// What is wrong with the present circuit.
    pub(crate) findings: &'a Findings,
}

/// What a scene depends on.
#[derive(Debug, Clone, PartialEq)]
struct SceneKey {
    generation: u64,
    time: Option<u64>,
    units: UnitSystem,
    values: bool,
    notes: bool,
    frame: Option<(u32, u32)>,
}

/// One scene in the window.
pub(super) struct Canvas {
    subject: Subject,
    zoom: Zoom,
    scene: Option<(SceneKey, Scene)>,
    /// Counts up with each scene.
    made: u64,
    sheet: Option<Sheet>,
    phases: Phases,
    id: Option<Id>,
    controls: Vec<Id>,
}

/// Who has the focus.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Focus {
    /// Neither the drawing nor one of its parts.
    Elsewhere,
    /// The drawing as a whole: arrows step through time.
    Drawing,
    /// One of its parts: arrows go to the next.
    Part,
}

impl Canvas {
    pub(super) fn new(subject: Subject) -> Self {
        Self {
            subject,
            zoom: Zoom::default(),
            scene: None,
            made: 0,
            sheet: None,
            phases: Phases::default(),
            id: None,
            controls: Vec::new(),
        }
    }

    /// Where the focus was at the end of the last frame.
    pub(super) fn focus(&self, ui: &Ui) -> Focus {
        let focused = ui.memory(egui::Memory::focused);
        match focused {
            None => Focus::Elsewhere,
            _ if focused == self.id => Focus::Drawing,
            Some(id) if self.controls.contains(&id) => Focus::Part,
            Some(_) => Focus::Elsewhere,
        }
    }

    /// Lets the arrows move for so many seconds, or puts them back.
    pub(super) fn flow(&mut self, seconds: Option<f64>) {
        match (seconds, &self.sheet) {
            (Some(seconds), Some(sheet)) => {
                self.phases.advance(&sheet.painted.arrows, seconds as f32);
            }
            _ => self.phases.rest(),
        }
    }

    /// Makes the drawing larger or smaller around its middle.
    pub(super) fn scale(&mut self, by: f32) {
        if let (Some((_, scene)), Some(sheet)) = (&self.scene, &self.sheet) {
            let frame = sheet.key.frame;
            self.zoom.zoom(by, frame.center(), scene.bounds, frame);
        }
    }

    /// Shows the whole drawing.
    pub(super) fn fit(&mut self) {
        self.zoom = Zoom::default();
    }

    /// Whether the whole drawing is in view.
    pub(super) fn is_fit(&self) -> bool {
        self.zoom.is_fit()
    }

    /// Draws; gives the part that was chosen.
    pub(super) fn show(
        &mut self,
        ui: &mut Ui,
        size: Vec2,
        drawn: &Drawn<'_>,
        (values, notes): (bool, bool),
    ) -> Option<Part> {
        let (frame, _) = ui.allocate_exact_size(size, Sense::hover());
        let id = ui.scope_id().with(("drawing", self.subject.name()));
        let response = ui.interact(frame, id, Sense::click_and_drag());
        self.id = Some(id);
        self.make_scene(frame, drawn, values, notes);
        let (_, scene) = self.scene.take()?;
        let key = self.scene_key(frame, drawn, values, notes);
        self.take_gestures(ui, &response, &scene);
        let ink = Ink {
            look: drawn.look,
            pale: drawn.pale,
        };
        let place = self.zoom.place(scene.bounds, frame);
        Sheet::renew(
            &mut self.sheet,
            ui,
            &scene,
            (self.subject, self.made),
            &ink,
            (place, frame),
        );
        response
            .widget_info(|| WidgetInfo::labeled(Role::GraphicsDocument, true, self.subject.name()));
        let chosen = self.sheet.as_ref().and_then(|sheet| {
            describe(ui, id, &scene.description);
            let pointed = pointed_at(&scene, &response, sheet);
            let keyed = self.controls_of(ui, sheet, &scene, drawn);
            let focused = keyed.focused.map(|index| scene.parts[index].id.as_str());
            self.paint(ui, (sheet, &scene), &response, (pointed, focused), drawn);
            if let (Some(response), Some(index)) = (&keyed.response, keyed.focused) {
                told::tell_beside(response, drawn, &scene.parts[index]);
            }
            let clicked = pointed.filter(|_| response.clicked());
            let clicked = clicked.and_then(|index| section_of(&scene.parts[index].id));
            clicked.or(keyed.chosen)
        });
        self.controls = self.sheet.as_ref().map_or_else(Vec::new, |sheet| {
            let id = |control: &Control| control_id(ui, self.subject, &control.part_id);
            sheet.controls.iter().map(id).collect()
        });
        self.scene = Some((key, scene));
        chosen
    }

    fn scene_key(&self, frame: Rect, drawn: &Drawn<'_>, values: bool, notes: bool) -> SceneKey {
        let size = (frame.width().round() as u32, frame.height().round() as u32);
        SceneKey {
            generation: drawn.generation,
            time: drawn.moment.map(|moment| moment.time.to_bits()),
            units: drawn.units,
            values,
            notes,
            // The section is as long as there is room.
            frame: (self.subject == Subject::Section).then_some(size),
        }
    }

    fn make_scene(&mut self, frame: Rect, drawn: &Drawn<'_>, values: bool, notes: bool) {
        let key = self.scene_key(frame, drawn, values, notes);
        if self.scene.as_ref().is_some_and(|(old, _)| *old == key) {
            return;
        }
        let options = DrawingOptions {
            units: drawn.units,
            values,
            scale_bar: false,
            notes: if notes { Notes::Full } else { Notes::None },
            ..DrawingOptions::default()
        };
        let scene = match self.subject {
            Subject::Circuit => circuit_scene(drawn.circuit, drawn.moment, options),
            Subject::Section => fitted_section(frame.size(), drawn, options),
        };
        self.scene = Some((key, scene));
        self.made += 1;
    }

    /// Zoom with Ctrl and the wheel or two fingers, or with plus, minus and zero; pan by dragging.
    fn take_gestures(&mut self, ui: &Ui, response: &Response, scene: &Scene) {
        let frame = response.rect;
        if response.dragged() {
            self.zoom.pan(response.drag_delta(), scene.bounds, frame);
        }
        if response.double_clicked() {
            self.fit();
        }
        if response.clicked() {
            response.request_focus();
        }
        if let Some(pointer) = response.hover_pos() {
            let zoom = ui.input(egui::InputState::zoom_delta);
            if (zoom - 1.0).abs() > 1e-4 {
                self.zoom.zoom(zoom, pointer, scene.bounds, frame);
            }
        }
        if response.has_focus() {
            let arrows = EventFilter {
                horizontal_arrows: true,
                ..EventFilter::default()
            };
            ui.memory_mut(|memory| memory.set_focus_lock_filter(response.id, arrows));
            let pressed = |key| ui.input(|input| input.key_pressed(key));
            if pressed(Key::Plus) || pressed(Key::Equals) {
                self.zoom.zoom(1.25, frame.center(), scene.bounds, frame);
            }
            if pressed(Key::Minus) {
                self.zoom.zoom(0.8, frame.center(), scene.bounds, frame);
            }
            if pressed(Key::Num0) {
                self.fit();
            }
        }
    }

    /// The parts as controls that can be reached and read out.
    fn controls_of(&self, ui: &Ui, sheet: &Sheet, scene: &Scene, drawn: &Drawn<'_>) -> Keyed {
        let mut keyed = Keyed::default();
        for control in &sheet.controls {
            let id = control_id(ui, self.subject, &control.part_id);
            let place = control.frame.intersect(sheet.key.frame);
            let place = if place.is_positive() {
                place
            } else {
                control.frame
            };
            let response = ui.interact(place, id, Sense::focusable_noninteractive());
            let section = section_of(&control.part_id);
            let selected = section == Some(drawn.selected);
            response
                .widget_info(|| WidgetInfo::selected(Role::Button, true, selected, &control.name));
            if ui.ctx().has_accesskit_node(id) {
                let told = told::in_words(drawn, &control.part_id);
                ui.ctx().accesskit_node_builder(id, |node| {
                    node.set_description(told);
                    node.add_action(SpokenAction::Click);
                });
            }
            let focused = response.has_focus();
            let asked = ui.input(|input| {
                input.has_accesskit_action_request(id, SpokenAction::Click)
                    || (focused && input.key_pressed(Key::Enter))
            });
            if asked {
                keyed.chosen = section;
            }
            if focused {
                keyed.focused = scene.parts.iter().position(|p| p.id == control.part_id);
                keyed.response = Some(response);
            }
        }
        keyed
    }

    fn paint(
        &self,
        ui: &Ui,
        (sheet, scene): (&Sheet, &Scene),
        response: &Response,
        (pointed, focused): (Option<usize>, Option<&str>),
        drawn: &Drawn<'_>,
    ) {
        let frame = sheet.key.frame;
        let painter = ui.painter().with_clip_rect(frame.intersect(ui.clip_rect()));
        let look = drawn.look;
        painter.rect_filled(frame, 0.0, crate::look::egui_colour(look.theme.background));
        let section = (self.subject == Subject::Circuit).then_some(drawn.selected);
        marks::under(&painter, sheet, scene, (pointed, section), look);
        painter.add(egui::Shape::mesh(std::sync::Arc::clone(
            &sheet.painted.mesh,
        )));
        flow::paint(&painter, &sheet.painted.arrows, &self.phases);
        let ink = Ink {
            look,
            pale: drawn.pale,
        };
        sheet.write(&painter, &ink);
        marks::over(&painter, sheet, (focused, section), drawn);
        if response.has_focus() {
            marks::focus_frame(&painter, frame, look);
        }
        if let Some(index) = pointed.filter(|_| !response.dragged()) {
            let part = &scene.parts[index];
            response.clone().on_hover_ui_at_pointer(|ui| {
                told::tell(ui, drawn, meant(&part.id), &part.label);
            });
        }
    }
}

/// What was done by keyboard or by a screen reader.
#[derive(Default)]
struct Keyed {
    chosen: Option<Part>,
    focused: Option<usize>,
    response: Option<Response>,
}

fn control_id(ui: &Ui, subject: Subject, part: &str) -> Id {
    ui.scope_id().with(("part", subject.name(), part))
}

fn describe(ui: &Ui, id: Id, text: &str) {
    if ui.ctx().has_accesskit_node(id) {
        let text = text.to_owned();
        ui.ctx()
            .accesskit_node_builder(id, |node| node.set_description(text));
    }
}

/// The part under the pointer, as its index.
fn pointed_at(scene: &Scene, response: &Response, sheet: &Sheet) -> Option<usize> {
    let at = response.hover_pos()?;
    sheet.hit(scene, at)
}
