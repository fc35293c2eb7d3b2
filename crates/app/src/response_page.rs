//! The response page: the drawing and the card of a part on the left, traces on the right, evidence on demand.

use egui::containers::menu::{MenuButton, MenuConfig};
use egui::{
    CentralPanel, Frame, Margin, Panel, PopupCloseBehavior, RichText, Sense, Ui, UiBuilder,
};
use helmsplit_study::{Check, CheckId};

use crate::action::Action;
use crate::card::{card, parts_row};
use crate::drawing::{Drawable, DrawingState, Source, drawings};
use crate::evidence::evidence;
use crate::kept::{KeptAction, strip};
use crate::look::SMALL;
use crate::manoeuvre;
use crate::parts::Part;
use crate::quantity_field::{FieldContext, FieldStates};
use crate::text::on_screen;
use crate::traces::{Shown, TraceView, traces, traces_menu};

/// Narrowest pane of the drawing, and what is left to the traces, points.
const DRAWING_WIDTH: f32 = 340.0;
const TRACES_WIDTH: f32 = 460.0;

/// Share of the width that the drawing takes at first, and at most so much, points.
const DRAWING_SHARE: f32 = 0.42;
const WIDEST_AT_FIRST: f32 = 820.0;

/// Narrowest and widest pane of evidence, points.
const EVIDENCE_WIDTH: std::ops::RangeInclusive<f32> = 290.0..=520.0;

/// Least width of a window, points, in which evidence stands beside the traces: a narrower one would
/// leave too little of them.
const EVIDENCE_BESIDE: f32 = 1500.0;

/// What the page shows.
pub(crate) struct Page<'a> {
    pub(crate) fields: FieldContext<'a>,
    /// `None` if the present circuit cannot be made and there is no run.
    pub(crate) drawn: Option<Drawable<'a>>,
    pub(crate) selected: Part,
    /// The check whose evidence is open.
    pub(crate) evidence: Option<CheckId>,
    pub(crate) checks: &'a [Check],
    /// `None` until the first solve is done.
    pub(crate) shown: Option<Shown<'a>>,
    /// Why the traces are not those of the present circuit.
    pub(crate) trouble: Option<&'a str>,
}

impl Page<'_> {
    /// The check whose evidence is open.
    fn open_check(&self) -> Option<&Check> {
        let id = self.evidence?;
        self.checks.iter().find(|check| check.id == id)
    }
}

/// Draws the page.
pub(crate) fn response_page(
    ui: &mut Ui,
    page: &Page<'_>,
    states: &mut FieldStates,
    (view, drawing): (&mut TraceView, &mut DrawingState),
    actions: &mut Vec<Action>,
) {
    let look = page.fields.look;
    let narrow = ui.available_width() < EVIDENCE_BESIDE;
    let widest = (ui.available_width() - TRACES_WIDTH).max(DRAWING_WIDTH + 1.0);
    let frame = Frame::NONE
        .fill(ui.visuals().panel_fill)
        .inner_margin(Margin::symmetric(10, 6));
    let at_first = (DRAWING_SHARE * ui.available_width()).min(WIDEST_AT_FIRST);
    // The scale of the window takes effect after its first frame: each has its own width.
    let scale = (100.0 * ui.ctx().zoom_factor()).round() as u32;
    Panel::left(("drawing", scale))
        .frame(frame)
        .default_size(at_first.clamp(DRAWING_WIDTH, widest))
        .size_range(DRAWING_WIDTH..=widest)
        .show(ui, |ui| {
            // A row that is a little too wide must not widen the pane, frame by frame.
            let room = ui.available_rect_before_wrap();
            let mut inside = ui.new_child(UiBuilder::new().max_rect(room));
            inside.set_clip_rect(room.expand(2.0).intersect(ui.clip_rect()));
            left_pane(
                &mut inside,
                (page, narrow),
                states,
                (view, drawing),
                actions,
            );
            ui.allocate_rect(room, Sense::hover());
        });
    if let (Some(check), false) = (page.open_check(), narrow) {
        Panel::right("evidence")
            .frame(frame)
            .default_size(304.0)
            .size_range(EVIDENCE_WIDTH)
            .show(ui, |ui| {
                evidence(ui, check, &page.fields, states, actions);
            });
    }
    let ground = crate::look::egui_colour(look.theme.background);
    let frame = Frame::NONE
        .fill(ground)
        .inner_margin(Margin::symmetric(10, 6));
    CentralPanel::default().frame(frame).show(ui, |ui| {
        let foot = manoeuvre::reserve(ui, &states.lists);
        toolbar(ui, page, view, actions);
        if let Some(trouble) = page.trouble {
            ui.label(RichText::new(on_screen(trouble)).color(look.error()));
        }
        match &page.shown {
            Some(shown) => {
                strip(ui, shown.kept, Some(shown.figure), look, actions);
                traces(ui, shown, view, actions);
            }
            None if page.trouble.is_none() => {
                ui.weak("The circuit is being solved.");
            }
            None => {}
        }
        let whole = page.shown.as_ref().and_then(|s| s.figure.time_range());
        manoeuvre::strip(ui, (foot, whole), &page.fields, states, view, actions);
    });
}

/// The drawing, the row of parts, the card; in a narrow window evidence takes the place of the card.
fn left_pane(
    ui: &mut Ui,
    (page, narrow): (&Page<'_>, bool),
    states: &mut FieldStates,
    (view, drawing): (&mut TraceView, &mut DrawingState),
    actions: &mut Vec<Action>,
) {
    let whole = page
        .shown
        .as_ref()
        .and_then(|shown| shown.figure.time_range());
    match page.drawn {
        Some(of) => {
            let source = Source {
                of,
                units: page.fields.units,
                look: page.fields.look,
                pale: page.trouble.is_some(),
                selected: page.selected,
                findings: page.fields.findings,
            };
            drawings(ui, &source, drawing, (view, whole), actions);
        }
        None => {
            ui.weak("The circuit cannot be drawn: see what its cards say.");
        }
    }
    parts_row(ui, page.selected, &drawing.undrawn(), &page.fields, actions);
    ui.separator();
    match page.open_check() {
        Some(check) if narrow => evidence(ui, check, &page.fields, states, actions),
        _ => card(ui, page.selected, &page.fields, states, actions),
    }
}

/// What the page answers, what can be kept, zoom and panels.
fn toolbar(ui: &mut Ui, page: &Page<'_>, view: &mut TraceView, actions: &mut Vec<Action>) {
    let look = page.fields.look;
    ui.horizontal(|ui| {
        ui.label(RichText::new("Response").strong());
        let room = ui.available_width() > 800.0;
        if room {
            let question = "What the circuit does over the manoeuvre.";
            ui.label(RichText::new(question).color(look.quiet()));
        }
        ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
            let Some(shown) = &page.shown else { return };
            let Some(whole) = shown.figure.time_range() else {
                return;
            };
            let stays = MenuConfig::new().close_behavior(PopupCloseBehavior::CloseOnClickOutside);
            MenuButton::new("Traces").config(stays).ui(ui, |ui| {
                traces_menu(ui, shown.figure, view);
                for note in &shown.figure.notes {
                    let text = RichText::new(on_screen(note)).size(SMALL);
                    ui.label(text.color(look.quiet()));
                }
            });
            ui.toggle_value(&mut view.table, "Readings")
                .on_hover_text("The table of readings: values, differences, kept runs.");
            ui.add_enabled_ui(!view.is_whole(), |ui| {
                if ui.button("Whole run").clicked() {
                    view.show_whole();
                }
            });
            for (text, factor) in [("Zoom out", 2.0), ("Zoom in", 0.5)] {
                if ui.button(text).clicked() {
                    view.scale(factor, view.cursor, whole);
                }
            }
            ui.add_enabled_ui(!shown.kept.is_full(), |ui| {
                let keep = ui.button("Keep run...");
                let keep = keep.on_disabled_hover_text("Five runs are kept: drop one first.");
                if keep.clicked() {
                    actions.push(Action::Kept(KeptAction::AskToKeep));
                }
            });
        });
    });
}
