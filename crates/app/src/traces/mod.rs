//! Stacked traces over one time axis, with one cursor through all of them.
//!
//! What is drawn comes from the figure alone: the same panels, ticks and thinning as on paper.

mod axes;
mod dash;
mod drawn;
mod input;
mod readout;
mod view;

use egui::{Rect, ScrollArea, Sense, Ui, WidgetInfo, pos2, vec2};
use helmsplit_view::plot::Figure;

use crate::look::Look;

pub(crate) use view::TraceView;

use drawn::{Drawn, Key};

/// Room for the numbers of the value axes, points.
const LEFT: f32 = 52.0;
/// Room for names and values, points.
const RIGHT: f32 = 216.0;
/// Room for the names of events, points.
const TOP: f32 = 18.0;
/// Room for the numbers of the time axis, points.
const FOOT: f32 = 22.0;
/// Between panels, points.
const GAP: f32 = 13.0;
/// Least height of a panel of weight 1, points.
const LEAST: f32 = 44.0;

/// What the traces show.
pub(crate) struct Shown<'a> {
    /// The figure.
    pub(crate) figure: &'a Figure,
    /// Counts up with each figure.
    pub(crate) generation: u64,
    /// Whether it is out of date, so drawn pale.
    pub(crate) pale: bool,
    /// Colours.
    pub(crate) look: &'a Look,
}

/// Draws the traces into what is left of `ui`.
pub(crate) fn traces(ui: &mut Ui, shown: &Shown<'_>, view: &mut TraceView) {
    let Some(whole) = shown.figure.time_range() else {
        ui.weak("The run has nothing to show.");
        return;
    };
    let panels: Vec<usize> = (0..shown.figure.panels.len())
        .filter(|&place| view.shows(&shown.figure.panels[place].label))
        .collect();
    ScrollArea::vertical()
        .id_salt("traces")
        .auto_shrink([false, false])
        .scroll_source(egui::scroll_area::ScrollSource::SCROLL_BAR)
        .show(ui, |ui| {
            let width = ui.available_width();
            let heights = heights(shown.figure, &panels, ui.available_height());
            let total = TOP + heights.iter().map(|h| h + GAP).sum::<f32>() + FOOT;
            let (rect, _) = ui.allocate_exact_size(vec2(width, total), Sense::hover());
            let plot = Rect::from_min_max(
                pos2(rect.left() + LEFT, rect.top()),
                pos2(rect.right() - RIGHT, rect.bottom()),
            );
            if plot.width() < 60.0 {
                return;
            }
            let id = ui.scope_id().with("trace area");
            let response = ui.interact(plot, id, Sense::click_and_drag());
            response.widget_info(|| {
                WidgetInfo::labeled(egui::Role::GraphicsDocument, true, "Traces over time")
            });
            view.focused = response.has_focus();
            input::take(ui, &response, plot, whole, view);
            let range = view.range(whole);
            let key = Key {
                generation: shown.generation,
                plot,
                range,
                pale: shown.pale,
                dark: shown.look.is_dark(),
                follow: view.follow,
                panels: panels.clone(),
            };
            if view.drawn.as_ref().is_none_or(|drawn| drawn.key != key) {
                view.drawn = Some(Drawn::new(shown, key, &heights, whole));
            }
            if let Some(drawn) = &view.drawn {
                axes::paint(ui, shown, drawn, response.has_focus());
                axes::paint_cursor(ui, shown, drawn, view);
                readout::paint(ui, shown, drawn, view, rect);
            }
        });
}

/// Heights of the panels: by weight, but high enough for the names beside them.
fn heights(figure: &Figure, panels: &[usize], room: f32) -> Vec<f32> {
    let room = room - TOP - FOOT - GAP * panels.len() as f32;
    let height = |place: usize, unit: f32| {
        let panel = &figure.panels[place];
        (unit * panel.weight as f32).max(readout::height(panel))
    };
    let all = |unit: f32| panels.iter().map(move |&place| height(place, unit));
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
    all(low).map(f32::floor).collect()
}
