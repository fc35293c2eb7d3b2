//! A figure in words, for those who cannot see it.

use std::fmt::Write as _;

use crate::plot::{Figure, number_text, power_text};

/// Significant digits of the values in the description.
const DIGITS: i32 = 3;

/// What the figure shows, with the range of each series.
pub(super) fn described(figure: &Figure) -> String {
    let mut text = String::new();
    if !figure.subtitle.is_empty() {
        text += &sentence(&figure.subtitle);
    }
    if let Some((from, to)) = figure.time_range() {
        let (from, to) = (rounded(from), rounded(to));
        // Writing into a string cannot fail.
        let _ = write!(
            text,
            "{} from {from} to {to} {}. ",
            figure.time.label, figure.time.unit
        );
    }
    for panel in &figure.panels {
        let series: Vec<String> = panel
            .series
            .iter()
            .map(|series| match series.extent() {
                Some((low, high)) => {
                    format!("{} {} to {}", series.label, rounded(low), rounded(high))
                }
                None => format!("{} without data", series.label),
            })
            .collect();
        let unit = match panel.unit.as_str() {
            "" => String::new(),
            unit => format!(" in {unit}"),
        };
        let _ = write!(text, "{}{unit}: {}. ", panel.label, series.join(", "));
    }
    for mark in &figure.marks {
        let _ = write!(
            text,
            "{} at {} {}. ",
            mark.label,
            rounded(mark.time),
            figure.time.unit
        );
    }
    text.trim_end().to_owned()
}

fn sentence(text: &str) -> String {
    format!("{}. ", text.trim_end_matches('.'))
}

/// A number with a few digits.
fn rounded(value: f64) -> String {
    if value == 0.0 || !value.is_finite() {
        return number_text(value, 0);
    }
    let power = value.abs().log10().floor() as i32;
    if !(-4..9).contains(&power) {
        return power_text(value);
    }
    number_text(value, usize::try_from(DIGITS - 1 - power).unwrap_or(0))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::plot::{Mark, Panel, Series};
    use crate::style::Meaning;

    #[test]
    fn says_what_is_to_be_seen() {
        let mut panel = Panel::new("Pressure", "bar");
        panel.series = vec![
            Series::new("Inlet", Meaning::Inlet, vec![[0.0, -0.5], [2.0, 93.26]]),
            Series::new("Excess", Meaning::Excess, vec![]),
        ];
        let figure = Figure {
            subtitle: "Cold start.".to_owned(),
            panels: vec![panel],
            marks: vec![Mark {
                time: 1.25,
                label: "main relief cracks".to_owned(),
            }],
            ..Figure::default()
        };
        assert_eq!(
            described(&figure),
            "Cold start. Time from 0 to 2.00 s. Pressure in bar: Inlet −0.500 to 93.3, \
             Excess without data. main relief cracks at 1.25 s.",
            "in words"
        );
    }
}
