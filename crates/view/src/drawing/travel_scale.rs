//! The travel of the spool on a scale, with what happens where.

use kurbo::Vec2;

use super::notes::{QUIET, millimetres};
use super::sheet::Sheet;
use crate::diagram::{DrawingOptions, value_text};
use crate::plot::number_text;
use crate::scene::{Anchor, Line, Paint, Part, PartPen, Prim, Stroke, Tone};
use crate::style::TextSize;
use crate::svg::label_width;
use helmsplit_model::Quantity;

/// Length of the scale as a share of that of the section.
const LENGTH: f64 = 0.575;

/// Least distance of the marks on a scale, px.
const TICK_SPACING: f64 = 51.0;

impl Sheet<'_> {
    /// The scale; `at` is its zero on the axis, px.
    pub(super) fn travel_scale(&self, at: (f64, f64), options: DrawingOptions) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new("valve.travel", "Spool travel");
        let (x0, y) = at;
        let length = LENGTH * self.length;
        let place = |travel: f64| x0 + length * (travel / s.stroke).clamp(0.0, 1.0);
        pen.text(
            (x0 - 18.0, y + 4.0),
            "Spool travel",
            (TextSize::Label, Tone::Ink),
            Anchor::End,
        );
        if let Some((from, to)) = s.throttling {
            let (left, right) = (place(from), place(to));
            let band = [(left, y - 6.0), (right, y - 6.0), (right, y), (left, y)];
            pen.area(&band, Paint::Band, None);
            let text = if to <= s.stroke {
                let (from, to) = (
                    millimetres(from, options.units),
                    millimetres(to, options.units),
                );
                format!("priority holes throttle, {from} to {to}")
            } else {
                format!(
                    "priority holes throttle from {}",
                    millimetres(from, options.units)
                )
            };
            let text = if label_width(&text, TextSize::Small) > 0.8 * length {
                "priority holes throttle".to_owned()
            } else {
                text
            };
            let opening = place(s.overlap);
            let (x, anchor) = beside(&text, (left, right), opening, (x0, x0 + length));
            let small = (TextSize::Small, Tone::Ink);
            pen.text((x, y - 12.0), text, small, anchor);
        }
        let fine = Stroke::plain(Line::Fine);
        pen.line(&[(x0, y), (x0 + length, y)], fine);
        for stop in [x0, x0 + length] {
            pen.line(
                &[(stop, y - 8.0), (stop, y + 8.0)],
                Stroke::plain(Line::Symbol),
            );
        }
        self.ticks(&mut pen, at, options);
        if (0.0..=s.stroke).contains(&s.overlap) {
            let x = place(s.overlap);
            pen.line(&[(x, y - 26.0), (x, y)], fine);
            let text = format!("land opens at {}", millimetres(s.overlap, options.units));
            pen.text(
                (x, y - 30.0),
                text,
                (TextSize::Small, Tone::Ink),
                Anchor::Start,
            );
        }
        self.pointer(&mut pen, (place(self.travel), y), options);
        pen.text((x0 + length + 26.0, y + 4.0), "stop", QUIET, Anchor::Start);
        pen.done()
    }

    fn ticks(&self, pen: &mut PartPen, (x0, y): (f64, f64), options: DrawingOptions) {
        let stroke = self.shape.stroke;
        let unit = options.units.unit(Quantity::Length);
        let most = unit.value_from_si(stroke / 1000.0);
        let length = LENGTH * self.length;
        let step = nice_step(most * TICK_SPACING / length);
        let places = usize::try_from((-step.log10().floor()) as i64).unwrap_or(0);
        let count = (most / step + 1e-9).floor() as u32;
        for tick in 0..=count {
            let value = step * f64::from(tick);
            let x = x0 + length * value / most;
            pen.line(&[(x, y), (x, y + 5.0)], Stroke::plain(Line::Fine));
            pen.text(
                (x, y + 18.0),
                number_text(value, places),
                QUIET,
                Anchor::Middle,
            );
        }
        let symbol = crate::unit_text::unit_text(unit);
        pen.text((x0 + length + 26.0, y + 18.0), symbol, QUIET, Anchor::Start);
    }

    /// Where the spool stands.
    fn pointer(&self, pen: &mut PartPen, at: (f64, f64), options: DrawingOptions) {
        pen.push(Prim::Arrow {
            tip: (at.0, at.1 + 24.0).into(),
            direction: Vec2::new(0.0, -1.0),
            length: 9.0,
            paint: Paint::Accent,
            pace: 0.0,
        });
        let text = value_text(self.travel / 1000.0, Quantity::Length, options.units);
        let below = (at.0, at.1 + 44.0);
        pen.text(below, text, (TextSize::Label, Tone::Ink), Anchor::Middle);
    }
}

/// Where the text of a band stands: above the band, on its left or right end, whichever keeps it
/// on the scale and clear of the mark at `mark`; else beside it.
fn beside(
    text: &str,
    (left, right): (f64, f64),
    mark: f64,
    (low, high): (f64, f64),
) -> (f64, Anchor) {
    const CLEAR: f64 = 4.0;
    let width = label_width(text, TextSize::Small);
    let places = [
        (left, Anchor::Start, left),
        (right, Anchor::End, right - width),
        (mark + 2.0 * CLEAR, Anchor::Start, mark + 2.0 * CLEAR),
    ];
    let fits = |start: f64| {
        let inside = start >= low && start + width <= high;
        inside && !(start - CLEAR..start + width + CLEAR).contains(&mark)
    };
    let found = places.iter().find(|(_, _, start)| fits(*start));
    found.map_or((mark - 2.0 * CLEAR, Anchor::End), |&(x, anchor, _)| {
        (x, anchor)
    })
}

/// The least of 1, 2, 5 times a power of ten that is no less than `least`.
fn nice_step(least: f64) -> f64 {
    let power = 10_f64.powf(least.log10().floor());
    [1.0, 2.0, 5.0, 10.0]
        .into_iter()
        .map(|factor| factor * power)
        .find(|&step| step >= least * (1.0 - 1e-9))
        .unwrap_or(10.0 * power)
}
