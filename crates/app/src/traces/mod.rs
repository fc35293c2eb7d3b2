//! Stacked traces over one time axis, with two cursors through all of them.
//!
//! What is drawn comes from the figure alone: the same panels, ticks and thinning as on paper.
//!
//! The lines are painted here and not by a plot widget. Panels that share one time axis, a column
//! of readings and one pair of cursors would each be a widget that has to be kept in step with the
//! others; a widget lays its lines out anew in every frame, while these stand until something
//! changes; it thins lines by bands that look coarse beside dashes, and its dashes may hide a peak.
//! Pages whose plots stand alone are better served by the widget.

mod arrangement;
mod axes;
mod cursors;
mod curves;
mod dash;
mod drawn;
mod events;
mod gutter;
mod input;
mod kept_lines;
mod menu;
mod paper;
mod reading;
mod readout;
mod table;
mod view;

use egui::{FontId, Rect, Response, ScrollArea, Sense, Ui, WidgetInfo, pos2, vec2};
use helmsplit_view::plot::{Figure, number_text};

use crate::action::Action;
use crate::evidence_marks::EvidenceMarks;
use crate::kept::KeptRuns;
use crate::look::{Look, SMALL};
use crate::text::on_screen;

pub(crate) use arrangement::Rearrange;
pub(crate) use curves::Curves;
pub(crate) use dash::dashed;
pub(crate) use menu::traces_menu;
pub(crate) use reading::{Readings, value_at};
pub(crate) use view::TraceView;

use drawn::{Drawn, Height, Key, Measure};
use gutter::Gutter;
use input::Field;

/// Room for the numbers of the value axes, points.
const LEFT: f32 = 52.0;
/// Room for the names of the columns of readings, points.
const HEAD: f32 = 16.0;
/// Height of a row of names of events, points.
const MARK_ROW: f32 = 14.0;
/// Between the names of events and the first panel, points.
const UNDER_MARKS: f32 = 5.0;
/// Room for the numbers of the time axis, points.
const FOOT: f32 = 22.0;
/// Between panels, points.
const GAP: f32 = 13.0;
/// Least height of a panel of weight 1, points.
const LEAST: f32 = 44.0;
/// Length of line and gap of limits, points.
const LIMIT_DASH: [f32; 2] = [6.0, 4.0];
/// Room for the bar that scrolls, points.
const SCROLL: f32 = 8.0;
/// A plot narrower than this shows nothing, points.
const NARROWEST: f32 = 60.0;

/// What the traces show.
pub(crate) struct Shown<'a> {
    /// The figure.
    pub(crate) figure: &'a Figure,
    /// Counts up with each figure.
    pub(crate) generation: u64,
    /// Whether it is out of date, so drawn pale.
    pub(crate) pale: bool,
    /// Runs to compare with.
    pub(crate) kept: &'a KeptRuns,
    /// What the open evidence points at.
    pub(crate) evidence: Option<&'a EvidenceMarks>,
    /// Colours.
    pub(crate) look: &'a Look,
}

/// Draws the traces into what is left of `ui`, with the table of readings below if it is open.
pub(crate) fn traces(
    ui: &mut Ui,
    shown: &Shown<'_>,
    view: &mut TraceView,
    actions: &mut Vec<Action>,
) {
    let Some(whole) = shown.figure.time_range() else {
        ui.weak("The run has nothing to show.");
        return;
    };
    if view.table {
        egui::Panel::bottom("table of readings")
            .resizable(true)
            .default_size(190.0)
            .size_range(90.0..=420.0)
            .show(ui, |ui| table::table(ui, shown, view, actions));
    }
    ScrollArea::vertical()
        .id_salt("traces")
        .auto_shrink([false, false])
        .scroll_source(egui::scroll_area::ScrollSource::SCROLL_BAR)
        .show(ui, |ui| panels(ui, shown, view, whole, actions));
}

/// Height that the traces need at least, points.
pub(crate) fn least_height(shown: &Shown<'_>, view: &TraceView) -> f32 {
    let figure = shown.figure;
    let panels = view.arrangement.shown(figure).into_iter();
    let names = |place: usize| {
        let panel = &figure.panels[place];
        let rows = view.arrangement.lines(panel).len() + 1;
        (LEAST * panel.weight as f32).max(rows as f32 * 14.0) + GAP
    };
    let rows = events::MOST_ROWS as f32 * MARK_ROW;
    panels.map(names).sum::<f32>() + HEAD + rows + UNDER_MARKS + FOOT
}

fn panels(
    ui: &mut Ui,
    shown: &Shown<'_>,
    view: &mut TraceView,
    whole: (f64, f64),
    actions: &mut Vec<Action>,
) {
    let painter = ui.painter().clone();
    let ink = shown.look.ink();
    let measure = |text: &str| {
        let font = FontId::proportional(SMALL);
        let galley = painter.layout_no_wrap(text.to_owned(), font, ink);
        f64::from(galley.size().x)
    };
    let width = ui.available_width() - SCROLL;
    let gutter = Gutter::new(shown, view, width);
    let ends = (0.0, f64::from(width - LEFT - gutter.width));
    let mark_rows = events::rows(shown.figure, whole, ends, &measure);
    let over = HEAD + mark_rows as f32 * MARK_ROW + UNDER_MARKS;
    let room = ui.available_height() - over - FOOT;
    let mut heights = self::heights(shown.figure, view, gutter, room, &measure);
    let total = over + heights.iter().map(|h| h.whole + GAP).sum::<f32>() + FOOT;
    let (rect, _) = ui.allocate_exact_size(vec2(width, total), Sense::hover());
    let plot = Rect::from_min_max(
        pos2(rect.left() + LEFT, rect.top()),
        pos2(rect.right() - gutter.width, rect.bottom()),
    );
    if plot.width() < NARROWEST {
        return;
    }
    let id = ui.scope_id().with("trace area");
    let response = ui.interact(plot, id, Sense::click_and_drag());
    let field = Field {
        figure: shown.figure,
        plot,
        whole,
    };
    view.focused = response.has_focus();
    let arranged = view.arrangement.clone();
    input::take(ui, &response, &field, view, actions);
    if view.arrangement != arranged {
        // Room was made for the panels of before.
        heights = self::heights(shown.figure, view, gutter, room, &measure);
        ui.ctx().request_repaint();
    }
    tell(&response, view);
    response.context_menu(|ui| menu::plot_menu(ui, view, actions));
    let key = Key {
        generation: shown.generation,
        kept: shown.kept.generation(),
        plot,
        top: plot.top() + over,
        mark_rows: mark_rows.max(1),
        range: view.range(whole),
        whole,
        pale: shown.pale,
        dark: shown.look.is_dark(),
        follow: view.follow,
        arrangement: view.arrangement.clone(),
        heights,
        evidence: shown.evidence.cloned(),
    };
    lay_out(shown, view, key, &measure);
    paint(ui, shown, view, gutter, response.has_focus(), whole);
}

/// Lays the panels out anew if anything has changed.
fn lay_out(shown: &Shown<'_>, view: &mut TraceView, key: Key, measure: Measure<'_>) {
    if view.drawn.as_ref().is_some_and(|drawn| drawn.key == key) {
        return;
    }
    let known = view.curves.take();
    let known = known.filter(|(generation, _)| *generation == shown.generation);
    let (_, curves) = view
        .curves
        .insert(known.unwrap_or_else(|| (shown.generation, Curves::of(shown.figure))));
    view.drawn = Some(Drawn::new(shown, curves, key, measure));
}

fn paint(
    ui: &Ui,
    shown: &Shown<'_>,
    view: &mut TraceView,
    gutter: Gutter,
    focused: bool,
    whole: (f64, f64),
) {
    let Some(drawn) = view.drawn.take() else {
        return;
    };
    let mut changes = Vec::new();
    axes::paint(ui, shown, &drawn, focused);
    cursors::evidence(ui, shown, &drawn);
    cursors::paint(ui, shown, &drawn, view);
    let picked = readout::paint(ui, shown, &drawn, view, gutter, &mut changes);
    let event = events::paint(ui, shown, &drawn);
    if let Some(label) = view.reveal.take() {
        let panel = |place: usize| shown.figure.panels[place].label == label;
        if let Some(panel) = drawn.panels.iter().find(|drawn| panel(drawn.place)) {
            ui.scroll_to_rect(panel.rect, None);
        }
    }
    view.drawn = Some(drawn);
    if let Some(time) = event {
        view.jump(time, whole);
    }
    if picked.is_some() {
        view.picked = picked;
    }
    for change in &changes {
        view.arrangement.apply(shown.figure, change);
    }
    if event.is_some() || !changes.is_empty() {
        ui.ctx().request_repaint();
    }
}

/// Tells where the cursors stand to those who hear it.
fn tell(response: &Response, view: &TraceView) {
    let at = |time: f64| on_screen(&number_text(time, 4));
    let first = format!("cursor A at {} s", at(view.cursor));
    let spoken = match view.second {
        Some(second) => format!("{first}, cursor B at {} s", at(second)),
        None => first,
    };
    response.widget_info(|| {
        let mut info = WidgetInfo::labeled(egui::Role::GraphicsDocument, true, "Traces over time");
        info.current_text_value = Some(spoken.clone());
        info
    });
}

/// Heights of the panels: by weight, but high enough for the names beside them.
fn heights(
    figure: &Figure,
    view: &TraceView,
    gutter: Gutter,
    room: f32,
    measure: Measure<'_>,
) -> Vec<Height> {
    let panels = view.arrangement.shown(figure);
    let room = room - GAP * panels.len() as f32;
    let needed: Vec<(f32, f32)> = panels
        .into_iter()
        .map(|place| {
            let panel = &figure.panels[place];
            let lines = view.arrangement.lines(panel);
            (panel.weight as f32, gutter.height(panel, &lines, measure))
        })
        .collect();
    let all = |unit: f32| {
        needed
            .iter()
            .map(move |(weight, least)| (unit * weight).max(*least))
    };
    // The sum rises with the unit: halve the interval until it fits to the point.
    let (mut low, mut high) = (LEAST, room.max(LEAST) * 4.0);
    for _ in 0..16 {
        let middle = f32::midpoint(low, high);
        if all(middle).sum::<f32>() > room {
            high = middle;
        } else {
            low = middle;
        }
    }
    let heights = all(low).map(f32::floor).zip(&needed);
    heights
        .map(|(whole, &(_, names))| Height { whole, names })
        .collect()
}
