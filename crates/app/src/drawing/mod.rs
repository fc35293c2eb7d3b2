//! The circuit and its valve, drawn live at the cursor; the player of the run; the way from a part
//! to its card.
//!
//! A scene is made when the moment changes, its mesh when the scene or its place changes; a frame
//! in which nothing changed paints what is there.

mod canvas;
mod export;
mod fill;
mod fit;
mod flow;
mod ink;
mod labels;
mod marks;
mod names;
mod place;
mod player;
mod scale;
mod sheet;
mod told;

use egui::{Panel, RichText, Ui, vec2};
use helmsplit_model::Circuit;
use helmsplit_scenario::{Findings, UnitSystem};
use helmsplit_sim::Trace;
use helmsplit_study::Solved;
use helmsplit_view::Moment;

use crate::action::Action;
use crate::look::Look;
use crate::parts::{PARTS, Part};
use crate::traces::TraceView;

use canvas::{Canvas, Focus, Subject};
use player::{Player, Run};

pub(crate) use canvas::Drawn;
pub(crate) use export::{Export, svg};

/// What of the two drawings is shown.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Choice {
    Circuit,
    Section,
    Both,
}

impl Choice {
    const ALL: [(Self, &'static str); 3] = [
        (Self::Circuit, "Circuit"),
        (Self::Section, "Valve in section"),
        (Self::Both, "Both"),
    ];
}

/// Share of the height of the pane that the drawings take at first: one of them, and both.
const HEIGHT_OF_ONE: f32 = 0.56;
const HEIGHT_OF_BOTH: f32 = 0.7;

/// Share of the height that the section takes beside the circuit.
const SECTION_SHARE: f32 = 0.3;

/// Between the two drawings, points.
const GAP: f32 = 4.0;

/// A circuit, and its run if there is one.
#[derive(Clone, Copy)]
pub(crate) struct Drawable<'a> {
    circuit: &'a Circuit,
    trace: Option<&'a Trace>,
    /// Changes with the circuit and with its run.
    generation: u64,
}

impl<'a> Drawable<'a> {
    /// The last good run, or as long as there is none the circuit of a revision of the document.
    pub(crate) fn new(
        generation: u64,
        solved: Option<&'a Solved>,
        draft: Option<&'a (u64, Option<Circuit>)>,
    ) -> Option<Self> {
        let Some(solved) = solved else {
            let (revision, circuit) = draft?;
            return Some(Self {
                circuit: circuit.as_ref()?,
                trace: None,
                // Runs count up from 1: no draft is taken for a run.
                generation: u64::MAX - *revision,
            });
        };
        Some(Self {
            circuit: &solved.circuit,
            trace: Some(&solved.run.trace),
            generation,
        })
    }
}

/// What there is to draw, before a moment is taken from it.
pub(crate) struct Source<'a> {
    pub(crate) of: Drawable<'a>,
    pub(crate) units: UnitSystem,
    pub(crate) look: &'a Look,
    /// Whether the run is not that of the present circuit.
    pub(crate) pale: bool,
    pub(crate) selected: Part,
    pub(crate) findings: &'a Findings,
}

/// What of the drawings is kept from one frame to the next.
pub(crate) struct DrawingState {
    choice: Choice,
    values: bool,
    circuit: Canvas,
    section: Canvas,
    player: Player,
    moment: Option<((u64, u64), Moment)>,
    /// The parts that are drawn, of which circuit.
    parts: Option<(u64, Vec<Part>)>,
}

impl Default for DrawingState {
    fn default() -> Self {
        Self {
            choice: Choice::Circuit,
            values: true,
            circuit: Canvas::new(Subject::Circuit),
            section: Canvas::new(Subject::Section),
            player: Player::default(),
            moment: None,
            parts: None,
        }
    }
}

impl DrawingState {
    /// Whether values stand beside the parts.
    pub(crate) fn shows_values(&self) -> bool {
        self.values
    }

    /// The parts that the drawing of the circuit does not show.
    pub(crate) fn undrawn(&self) -> Vec<Part> {
        let shown: &[Part] = self.parts.as_ref().map_or(&[], |(_, parts)| parts);
        PARTS
            .into_iter()
            .filter(|part| !shown.contains(part))
            .collect()
    }

    /// Stops the player.
    pub(crate) fn stop(&mut self) {
        self.player.stop();
    }

    fn canvases(&mut self) -> impl Iterator<Item = &mut Canvas> {
        let (circuit, section) = match self.choice {
            Choice::Circuit => (true, false),
            Choice::Section => (false, true),
            Choice::Both => (true, true),
        };
        let circuit = Some(&mut self.circuit).filter(|_| circuit);
        let section = Some(&mut self.section).filter(|_| section);
        circuit.into_iter().chain(section)
    }

    /// The moment at the cursor.
    fn make_moment(&mut self, source: &Source<'_>, cursor: f64) {
        let key = (source.of.generation, cursor.to_bits());
        if self.moment.as_ref().is_none_or(|(old, _)| *old != key) {
            let moment = source.of.trace.and_then(|trace| Moment::of(trace, cursor));
            self.moment = moment.map(|moment| (key, moment));
        }
    }
}

/// Draws the drawings, resizable against what is below, and the row that plays the run.
pub(crate) fn drawings(
    ui: &mut Ui,
    source: &Source<'_>,
    state: &mut DrawingState,
    (view, whole): (&mut TraceView, Option<(f64, f64)>),
    actions: &mut Vec<Action>,
) {
    let traces_focused = view.focused;
    if let Some(whole) = whole {
        let mut run = Run { whole, view };
        let focus = state.canvases().map(|canvas| canvas.focus(ui));
        let focus = focus.fold(Focus::Elsewhere, |all, one| match one {
            Focus::Elsewhere => all,
            _ => one,
        });
        if focus != Focus::Elsewhere || traces_focused {
            state.player.keys(ui, focus == Focus::Drawing, &mut run);
        }
        let passed = state.player.advance(ui.ctx(), &mut run);
        let flow = state.player.is_playing().then_some(passed);
        state.canvases().for_each(|canvas| canvas.flow(flow));
    } else {
        state.player.stop();
    }
    toolbar(ui, state, source);
    let room = ui.available_height();
    let scale = (100.0 * ui.ctx().zoom_factor()).round() as u32;
    let both = state.choice == Choice::Both;
    let share = if both { HEIGHT_OF_BOTH } else { HEIGHT_OF_ONE };
    Panel::top(("drawings", scale, both))
        .resizable(true)
        .default_size(share * room)
        .size_range(120.0..=(room - 120.0).max(121.0))
        .frame(egui::Frame::NONE)
        .show(ui, |ui| sheets(ui, source, state, view.cursor, actions));
    if let Some(whole) = whole {
        let mut run = Run { whole, view };
        state.player.row(ui, source.look, &mut run);
    }
}

/// What is shown, values, zoom, the scale of pressures.
fn toolbar(ui: &mut Ui, state: &mut DrawingState, source: &Source<'_>) {
    ui.horizontal(|ui| {
        ui.spacing_mut().item_spacing.x = 4.0;
        for (choice, name) in Choice::ALL {
            if ui.selectable_label(state.choice == choice, name).clicked() {
                state.choice = choice;
            }
        }
        ui.add_space(6.0);
        ui.checkbox(&mut state.values, "Values")
            .on_hover_text("Pressures, flows and speeds at the cursor beside the parts");
        ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
            let fit = state.canvases().all(|canvas| canvas.is_fit());
            ui.add_enabled_ui(!fit, |ui| {
                let hint = "The whole drawing: double click, or 0";
                if ui.button("Fit").on_hover_text(hint).clicked() {
                    state.canvases().for_each(Canvas::fit);
                }
            });
            for (word, by) in [("Larger", 1.25), ("Smaller", 0.8)] {
                let text = RichText::new(if by > 1.0 { "+" } else { "\u{2212}" });
                let hint = format!("{word}: Ctrl and the wheel, or plus and minus. Drag to move.");
                let response = ui.button(text).on_hover_text(hint);
                response.widget_info(|| {
                    egui::WidgetInfo::labeled(egui::accesskit::Role::Button, true, word)
                });
                if response.clicked() {
                    state.canvases().for_each(|canvas| canvas.scale(by));
                }
            }
        });
    });
    if source.of.trace.is_some() {
        scale::bar(ui, source);
    }
}

fn sheets(
    ui: &mut Ui,
    source: &Source<'_>,
    state: &mut DrawingState,
    cursor: f64,
    actions: &mut Vec<Action>,
) {
    state.make_moment(source, cursor);
    if state
        .parts
        .as_ref()
        .is_none_or(|(old, _)| *old != source.of.generation)
    {
        state.parts = Some((source.of.generation, names::drawn_parts(source.of.circuit)));
    }
    let DrawingState {
        choice,
        values,
        circuit,
        section,
        moment,
        ..
    } = state;
    let drawn = Drawn {
        circuit: source.of.circuit,
        moment: moment.as_ref().map(|(_, moment)| moment),
        generation: source.of.generation,
        units: source.units,
        look: source.look,
        pale: source.pale,
        selected: source.selected,
        findings: source.findings,
    };
    let size = ui.available_size().floor();
    let chosen = match choice {
        Choice::Circuit => circuit.show(ui, size, &drawn, (*values, true)),
        Choice::Section => section.show(ui, size, &drawn, (*values, true)),
        Choice::Both => {
            ui.spacing_mut().item_spacing.y = GAP;
            let low = (SECTION_SHARE * size.y).round();
            let high = size.y - low - GAP;
            let above = circuit.show(ui, vec2(size.x, high), &drawn, (*values, true));
            let below = section.show(ui, vec2(size.x, low), &drawn, (*values, false));
            above.or(below)
        }
    };
    if let Some(part) = chosen {
        actions.push(Action::Select(part));
    }
}
