//! The pressure scale beside a shaded drawing.

use helmsplit_model::Quantity;
use helmsplit_scenario::UnitSystem;
use kurbo::{Rect, Shape};

use crate::plot::{number_text, power_text};
use crate::ramp::PressureScale;
use crate::scene::{Anchor, Line, Paint, Part, PartPen, Stroke, Tone};
use crate::style::TextSize;
use crate::unit_text::unit_text;

/// Size of the bar, px.
const WIDTH: f64 = 240.0;
const HEIGHT: f64 = 10.0;

/// Fields of the bar: enough that the eye sees no steps.
const FIELDS: u32 = 48;

/// Numbers below the bar stand this far apart, Pa; twice as far on long scales.
const INTERVAL: f64 = 50e5;
const MOST_INTERVALS: f64 = 6.0;

/// From here on numbers have a power of ten.
const LARGE: f64 = 1e5;

/// The scale with its ends, in the unit of the system; `at` is the left end of the bar.
pub(crate) fn scale_bar(
    at: (f64, f64),
    scale: PressureScale,
    units: UnitSystem,
    time: f64,
) -> Part {
    let mut pen = PartPen::new("pressure_scale", "Pressure scale");
    let (x, y) = at;
    for field in 0..FIELDS {
        let share = f64::from(field) / f64::from(FIELDS);
        let next = f64::from(field + 1) / f64::from(FIELDS);
        let middle = 0.5 * (share + next);
        // A little wider than its share: no seams.
        let right = (x + WIDTH * next + 0.5).min(x + WIDTH);
        let frame = Rect::new(x + WIDTH * share, y, right, y + HEIGHT);
        pen.block(frame, Paint::Oil(Some(middle)));
    }
    let outline = Rect::new(x, y, x + WIDTH, y + HEIGHT).to_path(0.1);
    pen.path(outline, Some(Stroke::plain(Line::Fine)), None);
    let unit = units.unit(Quantity::Pressure);
    let step = if scale.most > MOST_INTERVALS * INTERVAL {
        2.0 * INTERVAL
    } else {
        INTERVAL
    };
    for tick in 0..=(scale.most / step).floor() as u32 {
        let share = f64::from(tick) * step / scale.most;
        let value = unit.value_from_si(scale.most * share);
        let place = (x + WIDTH * share, y + HEIGHT);
        pen.line(
            &[place, (place.0, place.1 + 3.0)],
            Stroke::plain(Line::Fine),
        );
        let below = (place.0, place.1 + 14.0);
        let number = if value < LARGE {
            number_text(value, usize::from(value < 20.0 && tick > 0))
        } else {
            power_text(value)
        };
        pen.text(
            below,
            number,
            (TextSize::Small, Tone::Quiet),
            Anchor::Middle,
        );
    }
    let name = format!("Pressure, {}", unit_text(unit));
    let small = (TextSize::Small, Tone::Ink);
    pen.text((x - 18.0, y + 9.0), name, small, Anchor::End);
    let time = format!("at {} s", number_text(time, 3));
    pen.text((x + WIDTH + 24.0, y + 9.0), time, small, Anchor::Start);
    pen.done()
}
