//! Names of the lines beside each panel, with their values at the cursor and what they are
//! compared with.

use std::sync::Arc;

use egui::text::LayoutJob;
use egui::{Align2, Color32, FontId, Galley, Painter, Rect, Sense, Shape, Stroke, Ui, pos2, vec2};
use helmsplit_view::plot::{Series, Where, number_text};
use helmsplit_view::style::Fill;

use super::arrangement::Rearrange;
use super::dash::dashed;
use super::drawn::{Drawn, DrawnPanel};
use super::gutter::{BASE, COLUMN, Gutter, INSET, Other, ROW, SAMPLE, is_single};
use super::menu::panel_menu;
use super::reading::{Digits, LineReading, PanelReading, Readings};
use super::view::TraceView;
use super::{HEAD, LIMIT_DASH, Shown};
use crate::look::{SMALL, egui_colour, egui_wash};
use crate::text::on_screen;

/// Paints names and values to the right of each panel; adds what was asked of the panels.
pub(super) fn paint(
    ui: &Ui,
    shown: &Shown<'_>,
    drawn: &Drawn,
    view: &TraceView,
    gutter: Gutter,
    changes: &mut Vec<Rearrange>,
) -> Option<String> {
    let readings = Readings::take(shown, view);
    let left = drawn.key.plot.right() + INSET;
    let right = drawn.key.plot.right() + gutter.width - 4.0;
    let writer = Writer {
        painter: ui.painter().clone(),
        shown,
        readings: &readings,
        gutter,
        left,
        right,
    };
    writer.heads(drawn.key.plot.top());
    let mut picked = None;
    for (panel, reading) in drawn.panels.iter().zip(&readings.panels) {
        let area = Rect::from_min_max(
            pos2(left - 4.0, panel.rect.top()),
            pos2(right, panel.rect.bottom()),
        );
        let (spoken, is_cut) = writer.rows(panel, reading);
        // One node for each panel, so that the values can be read out and tested.
        let id = ui.scope_id().with(("readout", panel.place));
        let response = ui.interact(area, id, Sense::click_and_drag());
        response.widget_info(|| egui::WidgetInfo::labeled(egui::Role::Label, true, &spoken));
        if response.clicked() {
            picked = Some(reading.label.clone());
        }
        if view.picked.as_ref() == Some(&reading.label) {
            let bar = Rect::from_min_max(area.min, pos2(area.left() + 2.0, area.bottom()));
            writer.painter.rect_filled(bar, 0.0, shown.look.accent());
        }
        drag(
            ui,
            &writer.painter,
            &response,
            drawn,
            shown,
            reading,
            changes,
        );
        response.context_menu(|ui| {
            panel_menu(
                ui,
                shown.figure,
                &shown.figure.panels[panel.place],
                view,
                changes,
            );
        });
        if is_cut {
            response.on_hover_text(spoken.replace("; ", "\n"));
        }
    }
    picked
}

/// A panel dragged by its names goes to the place where it is dropped.
fn drag(
    ui: &Ui,
    painter: &Painter,
    response: &egui::Response,
    drawn: &Drawn,
    shown: &Shown<'_>,
    reading: &PanelReading,
    changes: &mut Vec<Rearrange>,
) {
    if !(response.dragged() || response.drag_stopped()) {
        return;
    }
    let pointer = ui.input(|input| input.pointer.latest_pos());
    let over = |y: f32| {
        let mut panels = drawn.panels.iter();
        panels.find(|panel| panel.rect.y_range().expand(6.0).contains(y))
    };
    let Some(target) = pointer.and_then(|pointer| over(pointer.y)) else {
        return;
    };
    let label = &shown.figure.panels[target.place].label;
    if *label == reading.label {
        return;
    }
    if response.drag_stopped() {
        changes.push(Rearrange::To(reading.label.clone(), label.clone()));
        return;
    }
    let y = if target.rect.top() < response.rect.top() {
        target.rect.top() - 3.0
    } else {
        target.rect.bottom() + 3.0
    };
    let across = target.rect.left()..=response.rect.right();
    painter.hline(across, y, Stroke::new(2.0, shown.look.accent()));
}

/// Writes the rows beside the panels.
struct Writer<'a> {
    painter: Painter,
    shown: &'a Shown<'a>,
    readings: &'a Readings,
    gutter: Gutter,
    left: f32,
    right: f32,
}

impl Writer<'_> {
    /// Right edge of a column of numbers, counted from the first.
    fn edge(&self, column: usize) -> f32 {
        self.right - (self.gutter.further - column) as f32 * COLUMN
    }

    /// Names of the columns.
    fn heads(&self, top: f32) {
        let seconds = |time: f64| on_screen(&number_text(time, 4));
        let readings = self.readings;
        let mut heads = vec![format!("A at {} s", seconds(readings.a))];
        match (self.gutter.other, readings.b, readings.chosen) {
            (Some(Other::Second), Some(b), _) => {
                heads.push(format!("B at {}", seconds(b)));
                heads.push("B \u{2212} A".to_owned());
            }
            (Some(Other::Kept), _, Some(chosen)) => {
                let number = readings.kept[chosen].0;
                heads.push(format!("kept ({number})"));
                heads.push(format!("A \u{2212} ({number})"));
            }
            _ => {}
        }
        if self.gutter.further == 1 && heads.len() == 3 {
            heads.remove(1);
        }
        for (column, head) in heads.iter().take(self.gutter.further + 1).enumerate() {
            let colour = if column == 0 {
                self.shown.look.accent()
            } else {
                self.shown.look.quiet()
            };
            self.right_aligned(self.edge(column), top + (HEAD - ROW) / 2.0, head, colour);
        }
    }

    fn right_aligned(&self, x: f32, y: f32, text: &str, colour: Color32) {
        let font = FontId::proportional(SMALL);
        self.painter
            .text(pos2(x, y), Align2::RIGHT_TOP, text, font, colour);
    }

    /// A name cut to the room it has; gives whether it was cut.
    fn name(&self, x: f32, y: f32, text: &str, room: f32) -> bool {
        let galley = one_line(&self.painter, text, self.shown.look.ink(), room);
        let cut = galley.elided;
        self.painter
            .galley(pos2(x, y), galley, self.shown.look.ink());
        cut
    }

    /// Writes the rows of one panel; gives them as a sentence, and whether a name is cut.
    fn rows(&self, drawn: &DrawnPanel, reading: &PanelReading) -> (String, bool) {
        let panel = &self.shown.figure.panels[drawn.place];
        let digits = digits_of(drawn);
        let unit = digits.unit(&panel.unit);
        let mut y = drawn.rect.top();
        let mut spoken = format!("{}, {unit}", panel.label);
        let mut cut = false;
        let single = is_single(panel);
        if !single {
            let quiet = self.shown.look.quiet();
            let unit = one_line(&self.painter, &unit, quiet, BASE);
            let room = self.right - self.left - unit.size().x - 8.0;
            cut |= self.name(self.left, y, &panel.label, room);
            let at = pos2(self.right - unit.size().x, y);
            self.painter.galley(at, unit, quiet);
            y += ROW;
        }
        for line in &reading.lines {
            let series = &panel.series[line.line];
            sample(&self.painter, self.shown, series, self.left, y + ROW / 2.0);
            let (name, unit) = if single {
                (self.gutter.single_name(panel), unit.as_str())
            } else {
                (series.label.clone(), "")
            };
            let left = self.left + SAMPLE + 6.0;
            let whole = one_line(&self.painter, &name, Color32::PLACEHOLDER, f32::INFINITY);
            if single && whole.size().x > self.gutter.name_room() {
                cut |= self.name(left, y, &name, self.right - left);
                y += ROW;
            } else {
                cut |= self.name(left, y, &name, self.gutter.name_room());
            }
            let values = self.values(y, line, digits, unit);
            spoken.push_str(&format!("; {} {values}", series.label));
            y += ROW;
        }
        self.limits(drawn, digits, y);
        (spoken, cut)
    }

    /// Writes the value of a line and what it is compared with; gives them in words.
    fn values(&self, y: f32, line: &LineReading, digits: Digits, unit: &str) -> String {
        let (ink, quiet) = (self.shown.look.ink(), self.shown.look.quiet());
        let value = digits.value(line.a);
        if self.gutter.further == 0 && !unit.is_empty() {
            self.right_aligned(self.edge(0), y, &format!("{value} {unit}"), ink);
        } else {
            self.right_aligned(self.edge(0), y, &value, ink);
        }
        let chosen = self.readings.chosen;
        let (other, difference, word) = match self.gutter.other {
            Some(Other::Second) => (line.b, line.step(), "at B"),
            Some(Other::Kept) => {
                let kept = chosen.and_then(|chosen| line.kept[chosen]);
                (kept, line.against(chosen), "kept")
            }
            None => return value,
        };
        let (other, difference) = (digits.value(other), digits.difference(difference));
        if self.gutter.further == 2 {
            self.right_aligned(self.edge(1), y, &other, quiet);
        }
        if self.gutter.further > 0 {
            self.right_aligned(self.edge(self.gutter.further), y, &difference, ink);
        }
        format!("{value}, {word} {other}, difference {difference}")
    }

    /// Limits whose names would lie on a line, with their values.
    fn limits(&self, drawn: &DrawnPanel, digits: Digits, mut y: f32) {
        let look = self.shown.look;
        let left = self.left + SAMPLE + 6.0;
        for &limit in &drawn.aside {
            let (limit, _) = &drawn.limits[limit];
            let middle = y + ROW / 2.0;
            let ends = [pos2(self.left, middle), pos2(self.left + SAMPLE, middle)];
            let text = match limit.at {
                Where::Line(value) => {
                    let colour = egui_colour(look.theme.rules.limit);
                    let stroke = Stroke::new(look.theme.strokes.limit as f32, colour);
                    let dashes = Shape::dashed_line(&ends, stroke, LIMIT_DASH[0], LIMIT_DASH[1]);
                    self.painter.extend(dashes);
                    digits.value(Some(value))
                }
                Where::Band(low, high) => {
                    let band = Rect::from_two_pos(ends[0], ends[1]).expand2(vec2(0.0, 4.0));
                    let wash = egui_wash(look.theme.wash(Fill::Band));
                    self.painter.rect_filled(band, 0.0, wash);
                    format!(
                        "{}\u{2013}{}",
                        digits.value(Some(low)),
                        digits.value(Some(high))
                    )
                }
            };
            let value = one_line(&self.painter, &text, look.quiet(), f32::INFINITY);
            let edge = self.edge(0);
            let room = edge - value.size().x - 6.0 - left;
            let name = one_line(&self.painter, &limit.label, look.quiet(), room);
            self.painter.galley(pos2(left, y), name, look.quiet());
            self.painter
                .galley(pos2(edge - value.size().x, y), value, look.quiet());
            y += ROW;
        }
    }
}

/// How the numbers of a panel are written: one digit more than its axis has.
pub(super) fn digits_of(drawn: &DrawnPanel) -> Digits {
    let axis = drawn.axis.as_ref();
    axis.map_or(
        Digits {
            exponent: 0,
            places: 2,
        },
        |axis| Digits {
            exponent: axis.ticks.exponent,
            places: axis.ticks.places + 1,
        },
    )
}

/// A text in one line, cut with an ellipsis where it has no room.
fn one_line(painter: &Painter, text: &str, colour: Color32, room: f32) -> Arc<Galley> {
    let font = FontId::proportional(SMALL);
    let mut job = LayoutJob::simple_singleline(text.to_owned(), font, colour);
    job.wrap.max_width = room.max(0.0);
    job.wrap.max_rows = 1;
    job.wrap.break_anywhere = true;
    painter.layout_job(job)
}

fn sample(painter: &Painter, shown: &Shown<'_>, series: &Series, left: f32, y: f32) {
    let theme = &shown.look.theme;
    let colour = egui_colour(theme.series_colour(series.meaning));
    let stroke = Stroke::new(theme.strokes.series as f32, colour);
    let ends = [pos2(left, y), pos2(left + SAMPLE, y)];
    painter.extend(dashed(&ends, series.dash.pattern(), stroke));
}
