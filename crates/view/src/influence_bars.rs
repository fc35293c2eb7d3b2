//! Influence as bars: who moves a figure, to which side, and how much.

use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_study::influence::{Influence, Row, Scale};
use kurbo::Rect;

use crate::scene::{Anchor, Line, Paint, PartPen, Scene, Stroke, Tone};
use crate::style::TextSize;
use crate::svg::label_width;

/// From one bar to the next, px.
const PITCH: f64 = 22.0;

/// Height of a bar, px.
const HEIGHT: f64 = 12.0;

/// Room for the bars to both sides of zero, px.
const HALF: f64 = 220.0;

/// Between texts and bars, px.
const GAP: f64 = 10.0;

/// Sensitivities smaller than this share of the largest get no bar worth looking at.
const SHORTEST: f64 = 1e-3;

/// The `most` largest influences on a figure as bars: to the right where more of the parameter
/// makes more of the figure. What is not resolved is drawn as an outline and says so.
#[must_use]
pub fn influence_scene(
    influence: &Influence,
    title: &str,
    most: usize,
    units: UnitSystem,
) -> Scene {
    let rows: Vec<&Row> = influence
        .rows
        .iter()
        .filter(|row| row.sensitivity.is_finite())
        .take(most)
        .collect();
    let largest = rows.iter().map(|r| r.sensitivity.abs()).fold(0.0, f64::max);
    let names = rows
        .iter()
        .map(|row| label_width(row.parameter.parameter().label, TextSize::Label))
        .fold(0.0, f64::max);
    let zero = names + GAP + HALF + GAP * 5.0;
    let mut parts = vec![axis(zero, rows.len(), title)];
    for (place, row) in rows.iter().enumerate() {
        parts.push(bar(row, place, (zero, largest), units));
    }
    Scene::new(title.to_owned(), description(&rows), parts)
}

/// The zero line with its heading.
fn axis(zero: f64, count: usize, title: &str) -> crate::scene::Part {
    let mut pen = PartPen::new("axis", "Zero line");
    let heading = (TextSize::Label, Tone::Ink);
    pen.text((0.0, -34.0), title, heading, Anchor::Start);
    let quiet = (TextSize::Small, Tone::Quiet);
    let words = "per cent of the figure for one per cent of the parameter";
    pen.text((0.0, -18.0), words, quiet, Anchor::Start);
    let foot = count as f64 * PITCH;
    pen.line(&[(zero, -8.0), (zero, foot)], Stroke::plain(Line::Fine));
    pen.done()
}

fn bar(
    row: &Row,
    place: usize,
    (zero, largest): (f64, f64),
    units: UnitSystem,
) -> crate::scene::Part {
    let parameter = row.parameter.parameter();
    let mut pen = PartPen::new(parameter.path, parameter.label);
    let middle = (place as f64 + 0.5) * PITCH;
    let baseline = middle + 4.0;
    let ink = (TextSize::Label, Tone::Ink);
    pen.text((0.0, baseline), parameter.label, ink, Anchor::Start);
    let share = if largest > 0.0 {
        row.sensitivity / largest
    } else {
        0.0
    };
    let end = zero + share * HALF;
    if share.abs() > SHORTEST {
        let (left, right) = (zero.min(end), zero.max(end));
        let (top, bottom) = (middle - HEIGHT / 2.0, middle + HEIGHT / 2.0);
        if row.resolved {
            pen.block(Rect::new(left, top, right, bottom), Paint::Ink);
        } else {
            let corners = [(left, top), (right, top), (right, bottom), (left, bottom)];
            let outline = [corners[0], corners[1], corners[2], corners[3], corners[0]];
            pen.line(&outline, Stroke::plain(Line::Hidden));
        }
    }
    let number = sensitivity_text(row);
    let (x, anchor) = if share >= 0.0 {
        (end + 5.0, Anchor::Start)
    } else {
        (end - 5.0, Anchor::End)
    };
    pen.text((x, baseline), number, ink, anchor);
    let value = text_from_si(
        row.value,
        display_unit(parameter, units),
        Digits::Significant(4),
    );
    let column = zero + HALF + 12.0 * GAP;
    let quiet = (TextSize::Small, Tone::Quiet);
    pen.text((column, baseline), value, quiet, Anchor::Start);
    pen.done()
}

/// The sensitivity as a person reads it, with a word where it is not resolved.
#[must_use]
pub fn sensitivity_text(row: &Row) -> String {
    if !row.sensitivity.is_finite() {
        return "none".to_owned();
    }
    let number = format!("{:+.2}", row.sensitivity).replace('-', &crate::plot::MINUS.to_string());
    let of = match row.scale {
        Scale::Value => "",
        Scale::UsualRange => " of range",
    };
    let word = if row.resolved { "" } else { ", not resolved" };
    format!("{number}{of}{word}")
}

fn description(rows: &[&Row]) -> String {
    let one = |row: &&Row| {
        format!(
            "{} {}",
            row.parameter.parameter().label,
            sensitivity_text(row)
        )
    };
    let all: Vec<_> = rows.iter().map(one).collect();
    format!(
        "Relative sensitivities, the largest first: {}.",
        all.join("; ")
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::scene::collisions;
    use helmsplit_scenario::parameter::{oil, valve, valve_edges};
    use helmsplit_study::CheckId;
    use helmsplit_study::figure::Figure;

    fn row(parameter: helmsplit_scenario::ParameterId, sensitivity: f64) -> Row {
        Row {
            parameter,
            value: parameter.parameter().default_si(),
            scale: if parameter == oil::TEMPERATURE {
                Scale::UsualRange
            } else {
                Scale::Value
            },
            sensitivity,
            uncertainty: 0.3,
            step: 0.01,
            resolved: sensitivity.abs() > 1.0,
            missing: None,
        }
    }

    fn influence() -> Influence {
        Influence {
            figure: Figure::Check(CheckId::Overshoot),
            base: 0.24,
            noise: 1e-4,
            rows: vec![
                row(valve::SPOOL_DIAMETER, 2.29),
                row(valve_edges::FIXED_ORIFICE_DISCHARGE, -2.2),
                row(oil::TEMPERATURE, -1.7),
                row(valve::CLEARANCE, -0.4),
                row(valve::SPRING_RATE, 0.0),
                row(valve::STROKE, f64::NAN),
            ],
        }
    }

    #[test]
    fn bars_stand_beside_their_words() {
        let scene = influence_scene(&influence(), "Overshoot", 10, UnitSystem::Metric);
        let wrong = collisions(&scene);
        assert!(wrong.is_empty(), "{wrong:?}");
        assert_eq!(scene.parts.len(), 6, "axis and five bars");
        assert!(
            scene.description.contains("not resolved"),
            "{}",
            scene.description
        );
        let few = influence_scene(&influence(), "Overshoot", 2, UnitSystem::Us);
        assert_eq!(few.parts.len(), 3, "axis and two bars");
    }

    #[test]
    fn numbers_say_what_they_refer_to() {
        let all = influence().rows;
        let texts: Vec<String> = all.iter().map(sensitivity_text).collect();
        assert_eq!(texts[0], "+2.29", "plain");
        assert_eq!(texts[2], "\u{2212}1.70 of range", "of the usual range");
        assert_eq!(texts[3], "\u{2212}0.40, not resolved", "not resolved");
        assert_eq!(texts[5], "none", "no sensitivity");
    }
}
