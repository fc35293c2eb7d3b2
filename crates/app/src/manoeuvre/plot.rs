//! The lines of the strip, drawn by the plotting library on the time axis of the traces.

use egui::{Align2, Color32, FontId, Response, Sense, Stroke, Ui, UiBuilder, WidgetInfo, pos2};
use egui_plot::{HLine, Line as PlotLine, LineStyle, Plot, PlotPoints, PlotTransform, VLine};
use helmsplit_model::Input;
use helmsplit_scenario::manoeuvre::{Line, LinePoint, input_row};
use helmsplit_view::plot::Axis;
use helmsplit_view::style::Meaning;

use super::stage::{Stage, value_range};
use crate::look::{Look, SMALL, egui_colour};
use crate::text::on_screen;

/// Opacity of lines that are not edited.
const PALE: f32 = 0.45;

/// What a line stands for.
pub(super) fn meaning(input: Input) -> Meaning {
    match input {
        Input::EngineSpeed => Meaning::Drive,
        Input::WheelRate | Input::ExternalForce => Meaning::Steering,
        Input::BenchArea | Input::BenchPressure | Input::PriorityCommand => Meaning::Priority,
        Input::ExcessPressure => Meaning::Excess,
        Input::ExcessCommand => Meaning::Consumer,
    }
}

/// How the line of an input is broken: no two lines of one circuit are told apart by colour alone.
pub(super) fn style(input: Input) -> LineStyle {
    match input {
        Input::EngineSpeed => LineStyle::Solid,
        Input::WheelRate | Input::BenchArea | Input::PriorityCommand => {
            LineStyle::Dashed { length: 9.0 }
        }
        Input::ExternalForce | Input::BenchPressure => LineStyle::Dotted { spacing: 3.5 },
        Input::ExcessPressure | Input::ExcessCommand => LineStyle::Dashed { length: 4.0 },
    }
}

pub(super) fn colour(input: Input, look: &Look) -> Color32 {
    egui_colour(look.theme.series_colour(meaning(input)))
}

/// The other lines, each scaled to its own range.
pub(super) struct Pale {
    pub(super) input: Input,
    /// Time in s; height in the unit of the line that is edited.
    pub(super) points: Vec<[f64; 2]>,
}

/// Draws the lines; gives the response of the ground and the way from numbers to the screen.
pub(super) fn draw(
    ui: &mut Ui,
    stage: &Stage<'_>,
    pale: &[Pale],
    cursor: f64,
    look: &Look,
) -> (Response, PlotTransform) {
    let mut ground = ui.new_child(
        UiBuilder::new()
            .max_rect(stage.rect)
            .id_salt("lines of the manoeuvre"),
    );
    let rule = Stroke::new(
        look.theme.strokes.rule as f32,
        egui_colour(look.theme.rules.grid),
    );
    let zero = Stroke::new(rule.width, egui_colour(look.theme.rules.zero));
    let shown = Plot::new("lines")
        .width(stage.rect.width())
        .height(stage.rect.height())
        .show_axes(false)
        .show_grid(false)
        .show_background(false)
        .show_x(false)
        .show_y(false)
        .allow_drag(false)
        .allow_zoom(false)
        .allow_scroll(false)
        .allow_boxed_zoom(false)
        .allow_axis_zoom_drag(false)
        .allow_double_click_reset(false)
        .sense(Sense::click())
        .show(&mut ground, |plot| {
            // The very ends of the traces, so that one moment stands on one vertical line.
            plot.set_plot_bounds_x(stage.time.low..=stage.time.high);
            plot.set_plot_bounds_y(stage.value.low..=stage.value.high);
            for &time in &stage.time.ticks.major {
                plot.vline(VLine::new("", time).stroke(rule).allow_hover(false));
            }
            for &value in &stage.value.ticks.major {
                let at_zero = value.abs() < stage.value.ticks.step * 1e-6;
                let stroke = if at_zero { zero } else { rule };
                plot.hline(HLine::new("", value).stroke(stroke).allow_hover(false));
            }
            for line in pale {
                let colour = colour(line.input, look).gamma_multiply(PALE);
                plot.line(thin(line.points.clone(), colour).style(style(line.input)));
            }
            let own = points_of(stage.line.as_ref(), stage);
            let colour = colour(stage.input(), look);
            plot.line(thin(own, colour).width(2.0));
            let cursor = VLine::new("", cursor).stroke(Stroke::new(1.2, look.accent()));
            plot.vline(cursor.allow_hover(false));
        });
    let name = format!("Line of {}", stage.row.label.to_lowercase());
    let response = shown.response;
    response.widget_info(|| WidgetInfo::labeled(egui::Role::GraphicsDocument, true, &name));
    (response, shown.transform)
}

fn thin(points: Vec<[f64; 2]>, colour: Color32) -> PlotLine<'static> {
    PlotLine::new("", PlotPoints::from(points))
        .stroke(Stroke::new(1.3, colour))
        .allow_hover(false)
        .allow_band(false)
}

/// The line that is edited; free breakpoints alone where it is out of order.
fn points_of(line: Option<&Line>, stage: &Stage<'_>) -> Vec<[f64; 2]> {
    let shown = |time: f64, si: f64| [time, stage.unit.value_from_si(si)];
    match line {
        Some(line) => course(line, stage.time.low, stage.time.high)
            .map(|(time, si)| shown(time, si))
            .collect(),
        None => {
            let free = stage.scenario.manoeuvre.free(stage.input()).iter();
            free.map(|point| shown(point.time.si(), point.value.si()))
                .collect()
        }
    }
}

/// A line from one time to another: held before its first and behind its last breakpoint.
fn course(line: &Line, from: f64, to: f64) -> impl Iterator<Item = (f64, f64)> {
    let points = line.points();
    let first = points.first().map_or(from, |point| point.time.min(from));
    let last = points.last().map_or(to, |point| point.time.max(to));
    let inner = points
        .iter()
        .map(|point: &LinePoint| (point.time, point.value));
    // At a jump at the very begin, the value before it is the first of the two.
    let held = points
        .first()
        .map_or(line.value_at(from), |point| point.value);
    std::iter::once((first, held))
        .chain(inner)
        .chain(std::iter::once((last, line.value_at(last))))
}

/// The other lines, on the axis of the one that is edited.
pub(super) fn pale_lines(stage: &Stage<'_>, shown: &[Input]) -> Vec<Pale> {
    let others = shown.iter().filter(|input| **input != stage.input());
    let pale = |input: &Input| {
        let row = input_row(*input);
        let line = stage.scenario.manoeuvre.line(row).ok()?;
        let (low, high) = value_range(Some(&line), row, row.unit());
        let height = |si: f64| {
            let share = (row.unit().value_from_si(si) - low) / (high - low);
            stage.value.low + share * (stage.value.high - stage.value.low)
        };
        let points = course(&line, stage.time.low, stage.time.high)
            .map(|(time, si)| [time, height(si)])
            .collect();
        Some(Pale {
            input: *input,
            points,
        })
    };
    others.filter_map(pale).collect()
}

/// Numbers of both axes: of the value to the left of the plot, of the time under it.
pub(super) fn numbers(ui: &Ui, stage: &Stage<'_>, look: &Look) {
    let axis: &Axis = &stage.value;
    let painter = ui.painter();
    let font = FontId::proportional(SMALL);
    for &value in &axis.ticks.major {
        let y = axis.position(value) as f32;
        let at = pos2(stage.rect.left() - 6.0, y);
        let text = on_screen(&axis.ticks.label(value));
        painter.text(at, Align2::RIGHT_CENTER, text, font.clone(), look.quiet());
    }
    for &time in &stage.time.ticks.major {
        let at = pos2(stage.time.position(time) as f32, stage.rect.bottom() + 2.0);
        let text = on_screen(&stage.time.ticks.label(time));
        painter.text(at, Align2::CENTER_TOP, text, font.clone(), look.quiet());
    }
    let at = pos2(stage.rect.right() + 10.0, stage.rect.bottom() + 2.0);
    painter.text(at, Align2::LEFT_TOP, "s", font.clone(), look.quiet());
    let left = egui_colour(look.theme.rules.zero);
    let stroke = Stroke::new(look.theme.strokes.rule as f32, left);
    painter.vline(stage.rect.left(), stage.rect.y_range(), stroke);
}
