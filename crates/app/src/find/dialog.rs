//! The dialog: what was typed, the matches, and what the chosen one means.

use egui::accesskit::Role;
use egui::{
    Align, Align2, Context, Id, Key, Modal, Modifiers, Rect, RichText, ScrollArea, Sense, TextEdit,
    TextStyle, Ui, WidgetInfo, pos2, vec2,
};

use super::rank::{Found, ranked};
use super::thing::Thing;
use crate::action::Action;
use crate::look::{Look, SMALL};

/// Rows that are seen without scrolling, at most.
const ROWS: usize = 12;

const ROW: f32 = 22.0;

/// Distance from the upper edge of the window, and from the others, points.
const TOP: f32 = 56.0;
const MARGIN: f32 = 24.0;

const WIDEST: f32 = 640.0;

/// What is being looked for.
#[derive(Debug, Clone)]
pub(crate) struct Finder {
    things: Vec<Thing>,
    typed: String,
    /// Place of the chosen one among the matches.
    chosen: usize,
    /// The chosen row is to come into view.
    reveal: bool,
}

impl Finder {
    /// Looks among these.
    pub(crate) fn new(things: Vec<Thing>) -> Self {
        Self {
            things,
            typed: String::new(),
            chosen: 0,
            reveal: false,
        }
    }
}

/// Draws the dialog.
pub(crate) fn finder(
    context: &Context,
    state: &mut Finder,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    let id = Id::unique("find");
    let room = context.content_rect().size();
    let area = Modal::default_area(id).anchor(Align2::CENTER_TOP, vec2(0.0, TOP.min(room.y / 8.0)));
    let response = Modal::new(id).area(area).show(context, |ui| {
        ui.set_width(WIDEST.min(room.x - 2.0 * MARGIN));
        let found = ranked(&state.things, &state.typed);
        keys(ui, &found, state);
        let entered = field(ui, state);
        let clicked = rows(ui, &found, state, look);
        foot(ui, &found, state, look);
        let chosen = clicked.or_else(|| entered.then_some(state.chosen));
        if let Some(place) = chosen.and_then(|chosen| found.places.get(chosen)) {
            actions.push(Action::CloseDialog);
            actions.push(state.things[*place].action.clone());
        }
    });
    if response.should_close() {
        actions.push(Action::CloseDialog);
    }
}

/// Arrow and page keys choose among the matches.
fn keys(ui: &Ui, found: &Found, state: &mut Finder) {
    let last = found.places.len().saturating_sub(1);
    let page = isize::try_from(ROWS).unwrap_or(1) - 1;
    for (key, by) in [
        (Key::ArrowDown, 1),
        (Key::ArrowUp, -1),
        (Key::PageDown, page),
        (Key::PageUp, -page),
    ] {
        if ui.input_mut(|input| input.consume_key(Modifiers::NONE, key)) {
            state.chosen = state.chosen.saturating_add_signed(by).min(last);
            state.reveal = true;
        }
    }
}

/// Draws the text field; says whether Enter was pressed in it.
fn field(ui: &mut Ui, state: &mut Finder) -> bool {
    let label = ui.label("Find a parameter, a choice, a verdict, a trace or a command");
    let width = ui.available_width();
    let edit = TextEdit::singleline(&mut state.typed)
        .id(Id::unique("find field"))
        .hint_text("A word, a symbol or a path, such as: orifice")
        .desired_width(width);
    let response = ui.add(edit).labelled_by(label.id);
    if response.changed() {
        state.chosen = 0;
        state.reveal = true;
    }
    let entered = response.lost_focus() && ui.input(|input| input.key_pressed(Key::Enter));
    // A row that has the focus keeps it.
    if entered || ui.memory(|memory| memory.focused().is_none()) {
        response.request_focus();
    }
    entered
}

/// Draws the matches; gives the one that was clicked.
fn rows(ui: &mut Ui, found: &Found, state: &mut Finder, look: &Look) -> Option<usize> {
    let mut clicked = None;
    let room = ui.ctx().content_rect().height() - 220.0;
    let height = (ROWS as f32 * ROW).min(room.max(3.0 * ROW));
    ui.add_space(4.0);
    ScrollArea::vertical()
        .max_height(height)
        .auto_shrink([false, true])
        .show(ui, |ui| {
            ui.spacing_mut().item_spacing.y = 0.0;
            for (at, &place) in found.places.iter().enumerate() {
                let chosen = at == state.chosen;
                let response = row(ui, &state.things[place], chosen, look);
                if chosen && std::mem::take(&mut state.reveal) {
                    response.scroll_to_me(None);
                }
                if response.has_focus() {
                    state.chosen = at;
                }
                if response.clicked() {
                    clicked = Some(at);
                }
            }
        });
    clicked
}

fn row(ui: &mut Ui, thing: &Thing, chosen: bool, look: &Look) -> egui::Response {
    let (rect, response) = ui.allocate_exact_size(vec2(ui.available_width(), ROW), Sense::click());
    let spoken = [
        thing.label.as_str(),
        thing.group.as_str(),
        thing.shown.as_str(),
    ];
    let spoken: Vec<_> = spoken.into_iter().filter(|text| !text.is_empty()).collect();
    let spoken = spoken.join(", ");
    response.widget_info(|| WidgetInfo::selected(Role::Button, true, chosen, &spoken));
    if !ui.is_rect_visible(rect) {
        return response;
    }
    let painter = ui.painter();
    if chosen || response.hovered() {
        painter.rect_filled(rect, 3.0, look.hover());
    }
    if chosen || response.has_focus() {
        let bar = Rect::from_min_size(rect.min, vec2(3.0, rect.height()));
        painter.rect_filled(bar, 1.0, look.accent());
    }
    let font = TextStyle::Body.resolve(ui.style());
    let small = TextStyle::Small.resolve(ui.style());
    let tone = if thing.in_use {
        look.ink()
    } else {
        look.quiet()
    };
    let mid = rect.center().y;
    let shown = painter.layout_no_wrap(thing.shown.clone(), font.clone(), tone);
    let right = rect.right() - 8.0;
    let left = rect.left() + 10.0;
    let label_room = (right - shown.size().x - 12.0 - left).max(40.0);
    let at = |x: f32, height: f32| pos2(x, mid - height / 2.0);
    painter.galley(at(right - shown.size().x, shown.size().y), shown, tone);
    let mut x = left;
    for (text, font, tone) in [
        (thing.label.as_str(), font, tone),
        (thing.symbol, small.clone(), look.quiet()),
        (thing.group.as_str(), small, look.quiet()),
    ] {
        if text.is_empty() {
            continue;
        }
        let galley = painter.layout_no_wrap(text.to_owned(), font, tone);
        // The label always; the rest where it fits.
        if x > left && x + galley.size().x > left + label_room {
            break;
        }
        let (width, height) = (galley.size().x, galley.size().y);
        painter.galley(at(x, height), galley, tone);
        x += width + 8.0;
    }
    response
}

/// What the chosen one means, and how many there are.
fn foot(ui: &mut Ui, found: &Found, state: &Finder, look: &Look) {
    ui.add_space(4.0);
    ui.separator();
    let quiet = |text: String| RichText::new(text).size(SMALL).color(look.quiet());
    if let Some(instead) = &found.instead {
        let typed = state.typed.trim();
        ui.label(quiet(format!(
            "Nothing holds \"{typed}\"; found for \"{instead}\"."
        )));
    }
    let chosen = found.places.get(state.chosen);
    match chosen.map(|&place| &state.things[place]) {
        Some(thing) => {
            ui.label(RichText::new(&thing.note).size(SMALL));
            ui.horizontal_wrapped(|ui| {
                if !thing.path.is_empty() {
                    ui.label(quiet(format!("In the file: {}", thing.path)));
                }
                ui.with_layout(egui::Layout::right_to_left(Align::Center), |ui| {
                    let place = state.chosen + 1;
                    let count = found.places.len();
                    ui.label(quiet(format!("{place} of {count}; Enter takes it")));
                });
            });
        }
        None => {
            let typed = state.typed.trim();
            ui.label(format!("Nothing holds \"{typed}\", nor anything near it."));
        }
    }
}
