//! Values at the cursors, as numbers: what the page, the table and the clipboard show.

use helmsplit_view::plot::{number_text, superscript};

use super::{Shown, TraceView};
use crate::text::on_screen;

/// Digits of a number on the clipboard: more than any run is accurate.
const DIGITS: usize = 7;

/// Digits of a time: a pixel is wider.
const TIME_DIGITS: usize = 5;

/// The readings of one panel.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct PanelReading {
    /// Place of the panel in the figure.
    pub(crate) place: usize,
    /// Its name.
    pub(crate) label: String,
    /// Unit of its values; empty for plain numbers.
    pub(crate) unit: String,
    /// Its lines that are shown.
    pub(crate) lines: Vec<LineReading>,
}

/// The readings of one line, in the unit of its panel. `None` where it has no value.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct LineReading {
    /// Position in the panel.
    pub(crate) line: usize,
    /// Its name.
    pub(crate) label: String,
    /// At cursor A.
    pub(crate) a: Option<f64>,
    /// At cursor B.
    pub(crate) b: Option<f64>,
    /// At cursor A in each kept run, in their order.
    pub(crate) kept: Vec<Option<f64>>,
}

/// Everything that is shown, read.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Readings {
    /// Cursor A, s.
    pub(crate) a: f64,
    /// Cursor B, s.
    pub(crate) b: Option<f64>,
    /// Number and name of each kept run, in their order.
    pub(crate) kept: Vec<(usize, String)>,
    /// Which of them is compared with, as a position in `kept`.
    pub(crate) chosen: Option<usize>,
    /// Panels in the order shown.
    pub(crate) panels: Vec<PanelReading>,
}

impl LineReading {
    /// B less A.
    pub(crate) fn step(&self) -> Option<f64> {
        Some(self.b? - self.a?)
    }

    /// A less the kept run at a position.
    pub(crate) fn against(&self, chosen: Option<usize>) -> Option<f64> {
        Some(self.a? - (*self.kept.get(chosen?)?)?)
    }
}

impl Readings {
    /// Reads all that is shown.
    pub(crate) fn take(shown: &Shown<'_>, view: &TraceView) -> Self {
        let runs = shown.kept.runs();
        let chosen = shown.kept.chosen();
        let panels = view.arrangement.shown(shown.figure);
        let panel = |place: usize| {
            let panel = &shown.figure.panels[place];
            let line = |line: usize| {
                let series = &panel.series[line];
                let kept = runs.iter().map(|run| {
                    let series = run.figure().counterpart(panel, series)?;
                    value_at(&series.points, view.cursor)
                });
                LineReading {
                    line,
                    label: series.label.clone(),
                    a: value_at(&series.points, view.cursor),
                    b: view.second.and_then(|b| value_at(&series.points, b)),
                    kept: kept.collect(),
                }
            };
            PanelReading {
                place,
                label: panel.label.clone(),
                unit: panel.unit.clone(),
                lines: view
                    .arrangement
                    .lines(panel)
                    .into_iter()
                    .map(line)
                    .collect(),
            }
        };
        Self {
            a: view.cursor,
            b: view.second,
            kept: runs
                .iter()
                .map(|run| (run.number(), run.name().to_owned()))
                .collect(),
            chosen: chosen.and_then(|place| runs.iter().position(|run| run.place() == place)),
            panels: panels.into_iter().map(panel).collect(),
        }
    }

    /// From A to B, s; `None` without B.
    pub(crate) fn span(&self) -> Option<f64> {
        Some(self.b? - self.a)
    }

    /// Change of a line from A to B over the time between, in its unit per second; `None` without
    /// B or with both at one moment.
    pub(crate) fn rate(&self, line: &LineReading) -> Option<f64> {
        let span = self.span().filter(|span| span.abs() > f64::EPSILON)?;
        Some(line.step()? / span)
    }

    /// Names of the columns of numbers, in their order.
    pub(crate) fn columns(&self) -> Vec<String> {
        let mut columns = vec![format!("A, {} s", moment(self.a))];
        if let (Some(b), Some(span)) = (self.b, self.span()) {
            columns.push(format!("B, {} s", moment(b)));
            columns.push(format!("B - A, {} s", moment(span)));
            columns.push("(B - A) per s".to_owned());
        }
        for (number, name) in &self.kept {
            columns.push(format!("({number}) {name}"));
        }
        if let Some((number, _)) = self.chosen.and_then(|chosen| self.kept.get(chosen)) {
            columns.push(format!("A - ({number})"));
        }
        columns
    }

    /// The numbers of a line, one for each of [`Self::columns`].
    pub(crate) fn numbers(&self, line: &LineReading) -> Vec<Option<f64>> {
        let mut numbers = vec![line.a];
        if self.b.is_some() {
            numbers.extend([line.b, line.step(), self.rate(line)]);
        }
        numbers.extend(line.kept.iter().copied());
        if self.chosen.is_some() {
            numbers.push(line.against(self.chosen));
        }
        numbers
    }

    /// Values at cursor A as lines of tab-separated text: panel, line, unit, value.
    pub(crate) fn values_text(&self) -> String {
        let mut text = format!("Panel\tTrace\tUnit\tAt {} s\n", moment(self.a));
        for (panel, line) in self.lines() {
            let value = plain(line.a);
            let fields = [panel.label.as_str(), &line.label, &panel.unit, &value];
            text += &tabbed(&fields);
        }
        text
    }

    /// The whole table as tab-separated text.
    pub(crate) fn table_text(&self) -> String {
        let columns = self.columns();
        let mut heads = vec!["Panel", "Trace", "Unit"];
        heads.extend(columns.iter().map(String::as_str));
        let mut text = tabbed(&heads);
        for (panel, line) in self.lines() {
            let numbers: Vec<String> = self.numbers(line).into_iter().map(plain).collect();
            let mut fields = vec![panel.label.as_str(), &line.label, &panel.unit];
            fields.extend(numbers.iter().map(String::as_str));
            text += &tabbed(&fields);
        }
        text
    }

    fn lines(&self) -> impl Iterator<Item = (&PanelReading, &LineReading)> {
        let panels = self.panels.iter();
        panels.flat_map(|panel| panel.lines.iter().map(move |line| (panel, line)))
    }
}

/// One row; names of kept runs are the user's own and may hold anything.
fn tabbed(fields: &[&str]) -> String {
    let clean = |field: &&str| field.replace(['\t', '\n', '\r'], " ");
    let fields: Vec<String> = fields.iter().map(clean).collect();
    format!("{}\n", fields.join("\t"))
}

/// A number as spreadsheets read it; empty for none.
fn plain(value: Option<f64>) -> String {
    value.map_or_else(String::new, |value| rounded(value, DIGITS))
}

/// A time, s.
fn moment(time: f64) -> String {
    rounded(time, TIME_DIGITS)
}

fn rounded(value: f64, digits: usize) -> String {
    let rounded = format!("{value:.precision$e}", precision = digits - 1);
    // What was just written reads back.
    match rounded.parse::<f64>() {
        // Nothing has no sign.
        Ok(rounded) => (rounded + 0.0).to_string(),
        Err(_) => rounded,
    }
}

/// How the numbers of a panel are written on the screen.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) struct Digits {
    /// Values are divided by ten to this power.
    pub(crate) exponent: i32,
    /// Digits behind the point.
    pub(crate) places: usize,
}

impl Digits {
    /// A value; a dash for none.
    pub(crate) fn value(self, value: Option<f64>) -> String {
        let Some(value) = value else {
            return "\u{2013}".to_owned();
        };
        let scale = 10f64.powi(self.exponent);
        on_screen(&number_text(value / scale, self.places))
    }

    /// A difference: with its sign.
    pub(crate) fn difference(self, value: Option<f64>) -> String {
        let text = self.value(value);
        let rises = value.is_some_and(|value| value > 0.0)
            && text.contains(|c: char| ('1'..='9').contains(&c));
        if rises { format!("+{text}") } else { text }
    }

    /// The unit with the power of ten.
    pub(crate) fn unit(self, unit: &str) -> String {
        match self.exponent {
            0 => unit.to_owned(),
            power => on_screen(&format!("×10{} {unit}", superscript(power))),
        }
    }
}

/// The value of a line at a time, between its points; `None` outside and in a gap.
pub(crate) fn value_at(points: &[[f64; 2]], time: f64) -> Option<f64> {
    let behind = points.partition_point(|point| point[0] <= time);
    let before = points.get(behind.checked_sub(1)?)?;
    let value = match points.get(behind) {
        None if before[0] < time => return None,
        None => before[1],
        Some(next) => {
            let share = (time - before[0]) / (next[0] - before[0]);
            before[1] + share * (next[1] - before[1])
        }
    };
    value.is_finite().then_some(value)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn values_lie_between_points() {
        let points = [[0.0, 1.0], [1.0, 3.0], [1.0, 9.0], [2.0, f64::NAN]];
        for (time, value) in [
            (-0.1, None),
            (0.0, Some(1.0)),
            (0.5, Some(2.0)),
            // At a jump, what comes after it.
            (1.5, None),
            (2.5, None),
        ] {
            assert_eq!(value_at(&points, time), value, "at {time}");
        }
        let jump = [[0.0, 1.0], [1.0, 3.0], [1.0, 9.0], [2.0, 9.0]];
        assert_eq!(value_at(&jump, 1.0), Some(9.0), "after the jump");
        assert_eq!(value_at(&jump, 2.0), Some(9.0), "at the end");
    }

    fn readings() -> Readings {
        let line = LineReading {
            line: 0,
            label: "Inlet".to_owned(),
            a: Some(30.0),
            b: Some(29.5),
            kept: vec![Some(31.0), None],
        };
        Readings {
            a: 1.0,
            b: Some(1.25),
            kept: vec![(1, "as\tdrawn".to_owned()), (3, "wide".to_owned())],
            chosen: Some(0),
            panels: vec![PanelReading {
                place: 0,
                label: "Pressure".to_owned(),
                unit: "bar".to_owned(),
                lines: vec![line],
            }],
        }
    }

    #[test]
    fn the_table_holds_values_differences_and_rate() {
        let text = readings().table_text();
        let mut lines = text.lines();
        assert_eq!(
            lines.next(),
            Some(
                "Panel\tTrace\tUnit\tA, 1 s\tB, 1.25 s\tB - A, 0.25 s\t(B - A) per s\
                 \t(1) as drawn\t(3) wide\tA - (1)"
            ),
            "heads"
        );
        assert_eq!(
            lines.next(),
            Some("Pressure\tInlet\tbar\t30\t29.5\t-0.5\t-2\t31\t\t-1"),
            "numbers with a plain minus, nothing where there is no value"
        );
        assert_eq!(lines.next(), None, "one line is shown");
        let values = readings().values_text();
        assert_eq!(
            values.lines().nth(1),
            Some("Pressure\tInlet\tbar\t30"),
            "values alone"
        );
    }

    #[test]
    fn no_rate_at_one_moment() {
        let mut readings = readings();
        readings.b = Some(1.0);
        let line = readings.panels[0].lines[0].clone();
        assert_eq!(readings.rate(&line), None, "no time passes");
        readings.b = None;
        assert_eq!(
            readings.columns().len(),
            4,
            "A, two kept runs, one difference"
        );
        assert_eq!(readings.numbers(&line).len(), 4, "as many numbers");
    }

    #[test]
    fn differences_have_signs() {
        let digits = Digits {
            exponent: 0,
            places: 1,
        };
        for (value, text) in [
            (Some(0.26), "+0.3"),
            (Some(-2.0), "\u{2212}2.0"),
            (Some(0.01), "0.0"),
            (None, "\u{2013}"),
        ] {
            assert_eq!(digits.difference(value), text, "{value:?}");
        }
    }
}
