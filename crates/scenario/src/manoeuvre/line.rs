//! One input over time as the run sees it, and who wrote which breakpoint.

use helmsplit_model::{Profile, ProfileError};

use super::expand::breakpoints;
use super::{InputRow, Manoeuvre, TemplateUse};
use crate::finding::{Finding, Findings};

/// Who wrote a breakpoint of a line.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Origin {
    /// The free breakpoint at this position of its list.
    Free(usize),
    /// The template at this position of the manoeuvre.
    Template(usize),
}

/// A breakpoint of a line.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LinePoint {
    /// Time, s.
    pub time: f64,
    /// Value of the input, SI.
    pub value: f64,
    /// Who wrote it.
    pub origin: Origin,
}

/// The stretch of a line that a template writes.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Span {
    /// Position of the template in the manoeuvre.
    pub template: usize,
    /// First moment, s.
    pub begin: f64,
    /// Last moment, s.
    pub end: f64,
}

/// One input over time: free breakpoints with the stretches of the templates among them.
#[derive(Debug, Clone, PartialEq)]
pub struct Line {
    level: f64,
    points: Vec<LinePoint>,
    spans: Vec<Span>,
}

impl Line {
    /// The breakpoints in the order of time; none for an input that rests at its level.
    #[must_use]
    pub fn points(&self) -> &[LinePoint] {
        &self.points
    }

    /// The stretches of templates in the order of time.
    #[must_use]
    pub fn spans(&self) -> &[Span] {
        &self.spans
    }

    /// The stretch that holds a time strictly inside.
    #[must_use]
    pub fn span_around(&self, time: f64) -> Option<&Span> {
        let around = |span: &&Span| span.begin < time && time < span.end;
        self.spans.iter().find(around)
    }

    /// The value at a time, SI: held before the first and behind the last breakpoint; at a jump
    /// the value after it.
    #[must_use]
    pub fn value_at(&self, time: f64) -> f64 {
        let behind = self.points.partition_point(|point| point.time <= time);
        let ahead = behind.checked_sub(1).map(|place| self.points[place]);
        match (ahead, self.points.get(behind)) {
            (None, None) => self.level,
            (None, Some(next)) => next.value,
            (Some(last), None) => last.value,
            (Some(from), Some(to)) => {
                let share = (time - from.time) / (to.time - from.time);
                from.value + (to.value - from.value) * share
            }
        }
    }

    /// The profile for the model.
    pub(super) fn profile(&self) -> Result<Profile, ProfileError> {
        if self.points.is_empty() {
            return Ok(Profile::constant(self.level));
        }
        Profile::new(self.points.iter().map(|p| (p.time, p.value)).collect())
    }

    /// Whether both run through the same breakpoints, whoever wrote them.
    pub(super) fn runs_as(&self, other: &Self) -> bool {
        let bits = |point: &LinePoint| (point.time.to_bits(), point.value.to_bits());
        let same = |(own, other): (&LinePoint, &LinePoint)| bits(own) == bits(other);
        self.points.len() == other.points.len() && self.points.iter().zip(&other.points).all(same)
    }

    /// Puts the stretch of a template in. `place` is its position in the manoeuvre.
    fn insert(
        &mut self,
        place: usize,
        template: &TemplateUse,
        row: &InputRow,
    ) -> Result<(), Finding> {
        let at = template.si("at").unwrap_or(f64::NAN);
        let written = breakpoints(template, self.value_at(at));
        let (Some(first), Some(last)) = (written.first(), written.last()) else {
            return Ok(());
        };
        let span = Span {
            template: place,
            begin: first.0,
            end: last.0,
        };
        let refused = |field: &str, message: String, hint: String| {
            let path = format!("manoeuvre.templates[{place}].{field}");
            let text = template.value(field).map(crate::value::Value::text);
            Err(Finding::error(path, message, hint).with_value(&text.unwrap_or_default()))
        };
        let key = template.kind.key();
        // A stretch shorter than its ramp would run backwards.
        if written.windows(2).any(|pair| pair[1].0 < pair[0].0) {
            let message = format!("\"{key}\" has a stretch shorter than its ramp");
            return refused("ramp", message, "shorten the ramp".to_owned());
        }
        let label = row.label.to_lowercase();
        let (begin, end) = (span.begin, span.end);
        if let Some(other) = self.spans.iter().find(|o| begin < o.end && o.begin < end) {
            let message = format!(
                "\"{key}\" begins at {begin} s, but {label} already moves until {} s",
                other.end
            );
            return refused("at", message, format!("begin at {} s or later", other.end));
        }
        let inside = |point: &&LinePoint| begin < point.time && point.time < end;
        if let Some(point) = self.points.iter().find(inside) {
            let message = format!(
                "\"{key}\" runs from {begin} s to {end} s, but {label} has a breakpoint at {} s",
                point.time
            );
            let hint = "move one of them, or take the breakpoint out".to_owned();
            return refused("at", message, hint);
        }
        let points = self.spliced(&written, span);
        if points
            .windows(3)
            .any(|three| three[2].time <= three[0].time)
        {
            let message = format!("\"{key}\" meets a jump of {label} at {begin} s or {end} s");
            let hint = "a jump takes two breakpoints at one time, no more".to_owned();
            return refused("at", message, hint);
        }
        self.points = points;
        let behind = self.spans.partition_point(|other| other.begin <= begin);
        self.spans.insert(behind, span);
        Ok(())
    }

    /// The breakpoints with those of a template among them. Where it begins or ends at a point
    /// that is there, both give the same one.
    fn spliced(&self, written: &[(f64, f64)], span: Span) -> Vec<LinePoint> {
        let behind = self
            .points
            .partition_point(|point| point.time <= span.begin);
        let (ahead, rest) = self.points.split_at(behind);
        let mut points = ahead.to_vec();
        for &(time, value) in written {
            let there = |point: &LinePoint| (point.time, point.value) == (time, value);
            let doubled = points.last().is_some_and(there);
            let next = time >= span.end && rest.first().is_some_and(there);
            if !doubled && !next {
                let origin = Origin::Template(span.template);
                points.push(LinePoint {
                    time,
                    value,
                    origin,
                });
            }
        }
        points.extend_from_slice(rest);
        points
    }
}

impl Manoeuvre {
    /// One input over time, with the stretches of its templates: each begins from the value that
    /// the input has then.
    ///
    /// # Errors
    /// Findings for breakpoints out of order and for templates that do not fit in.
    pub fn line(&self, row: &InputRow) -> Result<Line, Findings> {
        let point = |(place, point): (usize, &super::Breakpoint)| LinePoint {
            time: point.time.si(),
            value: point.value.si(),
            origin: Origin::Free(place),
        };
        let free = self.free(row.input).iter().enumerate().map(point);
        let mut line = Line {
            level: row.level(),
            points: free.collect(),
            spans: Vec::new(),
        };
        let mut findings = Findings::default();
        if let Err(error) = line.profile() {
            findings.push(out_of_order(row, &line, &error));
            return Err(findings);
        }
        for place in self.templates_of(row) {
            if let Err(finding) = line.insert(place, &self.templates[place], row) {
                findings.push(finding);
            }
        }
        if findings.is_empty() {
            Ok(line)
        } else {
            Err(findings)
        }
    }

    /// Positions of the templates that drive an input, in the order of their begin.
    #[must_use]
    pub fn templates_of(&self, row: &InputRow) -> Vec<usize> {
        let drives = |&place: &usize| self.templates[place].kind.template().drives == row.input;
        let mut places: Vec<usize> = (0..self.templates.len()).filter(drives).collect();
        let at = |place: &usize| self.templates[*place].si("at").unwrap_or(f64::NAN);
        places.sort_by(|a, b| at(a).total_cmp(&at(b)));
        places
    }
}

/// Why free breakpoints are no line.
fn out_of_order(row: &InputRow, line: &Line, error: &ProfileError) -> Finding {
    let (index, hint) = match *error {
        ProfileError::OutOfOrder { index } => (index, "give breakpoints in the order of time"),
        ProfileError::TripleTime { index } => {
            (index, "a jump takes two breakpoints at one time, no more")
        }
        ProfileError::NotFinite { index } => (index, "give finite numbers"),
        ProfileError::Empty => (0, "give at least one breakpoint"),
    };
    let shown = line.points.get(index);
    let shown = shown.map_or(String::new(), |point| format!("{} s", point.time));
    Finding::error(format!("{}[{index}]", row.path), error.to_string(), hint).with_value(&shown)
}
