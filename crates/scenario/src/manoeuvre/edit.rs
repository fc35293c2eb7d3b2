//! Edits of a manoeuvre: each keeps every line in order, or changes nothing and says why.

use helmsplit_model::Input;

use super::{Breakpoint, InputRow, Line, Manoeuvre, Origin, TemplateUse, input_row};
use crate::finding::{Finding, Findings, Severity};
use crate::quantity_text::{Digits, text_from_si};
use crate::value::Value;

/// Times that follow from others are rounded to this many digits behind the second.
const TIME_PLACES: u32 = 9;

impl Manoeuvre {
    /// Takes an edited manoeuvre, unless the edit brought a line into disorder.
    fn take(&mut self, edited: Self, row: &InputRow) -> Result<(), Finding> {
        if let Err(findings) = edited.line(row)
            && self.line(row).is_ok()
        {
            return Err(first_error(findings, row));
        }
        *self = edited;
        Ok(())
    }

    /// Moves a free breakpoint in time, value or both, from texts such as `2 s` and `60 rpm`. Its
    /// place in the list stays.
    ///
    /// # Errors
    /// A finding when there is no such breakpoint, a text does not read or is not allowed, or the
    /// time is not between those of its neighbours.
    pub fn set_point(
        &mut self,
        input: Input,
        place: usize,
        time: Option<&str>,
        value: Option<&str>,
    ) -> Result<(), Finding> {
        let row = input_row(input);
        let path = format!("{}[{place}]", row.path);
        let mut point = self.free_point(row, place)?.clone();
        if let Some(time) = time {
            point.time = super::inputs::time_value(&path, time)?;
            self.between_neighbours(row, place, &point, &path)?;
        }
        if let Some(value) = value {
            point.value = super::inputs::input_value(&path, row, value)?;
        }
        let mut edited = self.clone();
        edited.free_mut(input)[place] = point;
        self.take(edited, row)
    }

    fn free_point(&self, row: &InputRow, place: usize) -> Result<&Breakpoint, Finding> {
        let points = self.free(row.input);
        points.get(place).ok_or_else(|| {
            let message = format!(
                "{} has {} breakpoints, counted from 0",
                row.label.to_lowercase(),
                points.len()
            );
            let path = format!("{}[{place}]", row.path);
            Finding::error(path, message, "add the breakpoint first")
        })
    }

    fn between_neighbours(
        &self,
        row: &InputRow,
        place: usize,
        point: &Breakpoint,
        path: &str,
    ) -> Result<(), Finding> {
        let points = self.free(row.input);
        let ahead = place.checked_sub(1).and_then(|place| points.get(place));
        let behind = points.get(place + 1);
        let time = point.time.si();
        let early = ahead.is_some_and(|ahead| time < ahead.time.si());
        let late = behind.is_some_and(|behind| time > behind.time.si());
        if !early && !late {
            return Ok(());
        }
        let hint = match (ahead, behind) {
            (Some(a), Some(b)) => {
                format!("give a time from {} to {}", a.time.text(), b.time.text())
            }
            (Some(a), None) => format!("give {} or later", a.time.text()),
            (None, Some(b)) => format!("give {} or earlier", b.time.text()),
            (None, None) => String::new(),
        };
        let message = "the time passes a neighbouring breakpoint";
        Err(Finding::error(path, message, hint).with_value(&point.time.text()))
    }

    /// Adds a free breakpoint, behind those that are not later. Gives its place.
    ///
    /// # Errors
    /// A finding when a text does not read or is not allowed, when two breakpoints stand at that
    /// time already, or when a template writes there.
    pub fn add_point(&mut self, input: Input, time: &str, value: &str) -> Result<usize, Finding> {
        let row = input_row(input);
        let point = Breakpoint::from_texts(row.path, row, time, value)?;
        let si = point.time.si();
        if let Ok(line) = self.line(row)
            && let Some(span) = line.span_around(si)
        {
            let key = self.templates[span.template].kind.key();
            let message = format!(
                "\"{key}\" writes this line from {} s to {} s",
                span.begin, span.end
            );
            let hint = "turn it into breakpoints first, or give another time";
            return Err(Finding::error(row.path, message, hint).with_value(&point.time.text()));
        }
        let mut edited = self.clone();
        let points = edited.free_mut(input);
        let place = points.partition_point(|other| other.time.si() <= si);
        points.insert(place, point);
        self.take(edited, row)?;
        Ok(place)
    }

    /// Takes a free breakpoint out.
    ///
    /// # Errors
    /// A finding when there is no such breakpoint, or a template would not fit in any more.
    pub fn remove_point(&mut self, input: Input, place: usize) -> Result<(), Finding> {
        let row = input_row(input);
        self.free_point(row, place)?;
        let mut edited = self.clone();
        edited.free_mut(input).remove(place);
        self.take(edited, row)
    }

    /// Makes a jump at a free breakpoint: a second one at its time, with the value of the next
    /// breakpoint of the line, so that a ramp becomes a step. Where the next has the same value,
    /// and behind the last, it takes `value`. Gives the place of the new one.
    ///
    /// # Errors
    /// A finding when there is no such breakpoint, `value` does not read or is not allowed, or
    /// there is a jump already.
    pub fn add_jump(&mut self, input: Input, place: usize, value: &str) -> Result<usize, Finding> {
        let row = input_row(input);
        let path = format!("{}[{place}]", row.path);
        let first = self.free_point(row, place)?.clone();
        let mut second = Breakpoint {
            time: first.time.clone(),
            value: super::inputs::input_value(&path, row, value)?,
        };
        if let Some(next) = self.free(input).get(place + 1)
            && next.value != first.value
        {
            second.value = next.value.clone();
        }
        let mut edited = self.clone();
        edited.free_mut(input).insert(place + 1, second);
        self.take(edited, row)?;
        Ok(place + 1)
    }

    /// The other breakpoint of the jump that a free breakpoint belongs to.
    #[must_use]
    pub fn twin(&self, input: Input, place: usize) -> Option<usize> {
        let points = self.free(input);
        let own = &points.get(place)?.time;
        let same = |other: &usize| points.get(*other).is_some_and(|p| p.time == *own);
        let ahead = place.checked_sub(1).filter(same);
        ahead.or_else(|| Some(place + 1).filter(same))
    }

    /// Moves both breakpoints of a jump in time. `place` is one of them.
    ///
    /// # Errors
    /// A finding when there is no jump at `place`, the text does not read or is not allowed, or
    /// the time is not between those of the neighbours.
    pub fn move_jump(&mut self, input: Input, place: usize, time: &str) -> Result<(), Finding> {
        let row = input_row(input);
        let path = format!("{}[{place}]", row.path);
        let Some(twin) = self.twin(input, place) else {
            self.free_point(row, place)?;
            let hint = "make a jump there first";
            return Err(Finding::error(
                path,
                "there is no jump at this breakpoint",
                hint,
            ));
        };
        let time = super::inputs::time_value(&path, time)?;
        let mut edited = self.clone();
        let points = edited.free_mut(input);
        for place in [place, twin] {
            points[place].time = time.clone();
        }
        let first = place.min(twin);
        for (place, outer) in [(first, first.checked_sub(1)), (first + 1, Some(first + 2))] {
            // Only the neighbours outside of the jump stand still.
            let still = outer.is_some_and(|outer| outer < edited.free(input).len());
            if still {
                edited.between_neighbours(row, place, &edited.free(input)[place].clone(), &path)?;
            }
        }
        self.take(edited, row)
    }

    /// Adds a template behind the others. Gives its place.
    ///
    /// # Errors
    /// A finding when it does not fit in where it begins.
    pub fn add_template(&mut self, template: TemplateUse) -> Result<usize, Finding> {
        let row = input_row(template.kind.template().drives);
        let mut edited = self.clone();
        edited.templates.push(template);
        self.take(edited, row)?;
        Ok(self.templates.len() - 1)
    }

    /// Sets a number of a template from text.
    ///
    /// # Errors
    /// A finding when there is no such template or number, the text does not read or is not
    /// allowed, or the template does not fit in any more.
    pub fn set_template(&mut self, place: usize, name: &str, text: &str) -> Result<(), Finding> {
        let row = self.template_row(place)?;
        let mut edited = self.clone();
        edited.templates[place].set(&format!("manoeuvre.templates[{place}]"), name, text)?;
        let result = self.take(edited, row);
        // The field that was typed is what does not do, whatever the rule names.
        result.map_err(|finding| Finding {
            path: format!("manoeuvre.templates[{place}].{name}"),
            ..finding.with_value(text)
        })
    }

    fn template_row(&self, place: usize) -> Result<&'static InputRow, Finding> {
        match self.templates.get(place) {
            Some(template) => Ok(input_row(template.kind.template().drives)),
            None => Err(Finding::error(
                format!("manoeuvre.templates[{place}]"),
                format!(
                    "the manoeuvre has {} templates, counted from 0",
                    self.templates.len()
                ),
                "add the template first",
            )),
        }
    }

    /// Takes a template out.
    ///
    /// # Errors
    /// A finding when there is no such template, or another would not fit in any more.
    pub fn remove_template(&mut self, place: usize) -> Result<(), Finding> {
        let row = self.template_row(place)?;
        let mut edited = self.clone();
        edited.templates.remove(place);
        self.take(edited, row)
    }

    /// Exchanges a template with the next one on its line. The next begins where this one began,
    /// and this one follows it after the pause that lay between them.
    ///
    /// # Errors
    /// A finding when there is no next template on the line, or the two do not fit in so.
    pub fn exchange_with_next(&mut self, place: usize) -> Result<(), Finding> {
        let row = self.template_row(place)?;
        let path = format!("manoeuvre.templates[{place}]");
        let line = self.line(row).map_err(|found| first_error(found, row))?;
        let spans = line.spans();
        let own = spans.iter().position(|span| span.template == place);
        let pair = own.and_then(|own| Some((spans[own], *spans.get(own + 1)?)));
        let Some((first, second)) = pair else {
            let message = format!(
                "no template follows on the line of {}",
                row.label.to_lowercase()
            );
            return Err(Finding::error(path, message, "add another template first"));
        };
        let pause = second.begin - first.end;
        let mut edited = self.clone();
        edited.set_begin(second.template, first.begin);
        // The line is made anew without this one, for the length may depend on what is ahead.
        let mut alone = edited.clone();
        alone.templates.remove(place);
        let line = alone.line(row).map_err(|found| first_error(found, row))?;
        let moved = second.template - usize::from(second.template > place);
        let end = line.spans().iter().find(|span| span.template == moved);
        let end = end.map_or(first.begin, |span| span.end);
        edited.set_begin(place, end + pause);
        edited.templates.swap(place, second.template);
        self.take(edited, row)
    }

    fn set_begin(&mut self, place: usize, begin: f64) {
        let second = super::inputs::second();
        let rounded = text_from_si(begin, second, Digits::Places(TIME_PLACES));
        let value = Value::from_text("at", &rounded, helmsplit_model::Quantity::Time);
        // Rounded down it would overlap what is ahead; then every digit counts.
        let value = match value {
            Ok(value) if value.si() >= begin => Value::from_si(value.si(), second),
            _ => Value::from_si(begin, second),
        };
        self.templates[place].set_begin(value);
    }

    /// Turns a template into free breakpoints that run the same. Where one ahead of it on its line
    /// would run otherwise then, that one is turned too. Gives how many were turned.
    ///
    /// # Errors
    /// A finding when there is no such template; findings as of [`Manoeuvre::line`].
    pub fn dissolve(&mut self, place: usize) -> Result<usize, Finding> {
        let row = self.template_row(place)?;
        let line = self.line(row).map_err(|found| first_error(found, row))?;
        let alone = self.without(&[place], &line, row);
        if alone.line(row).is_ok_and(|other| other.runs_as(&line)) {
            *self = alone;
            return Ok(1);
        }
        let spans = line.spans().iter().map(|span| span.template);
        let own = spans.clone().position(|template| template == place);
        let places: Vec<usize> = spans.take(own.map_or(0, |own| own + 1)).collect();
        *self = self.without(&places, &line, row);
        Ok(places.len())
    }

    /// Turns every template into free breakpoints, so that each point can be edited alone.
    ///
    /// # Errors
    /// As [`Manoeuvre::profiles`]; nothing is changed then.
    pub fn dissolve_templates(&mut self) -> Result<(), Findings> {
        self.profiles()?;
        for row in &super::INPUTS {
            let places = self.templates_of(row);
            let line = self.line(row)?;
            *self = self.without(&places, &line, row);
        }
        Ok(())
    }

    /// The manoeuvre with the breakpoints of some templates of a line as free ones.
    fn without(&self, places: &[usize], line: &Line, row: &InputRow) -> Self {
        let own = self.free(row.input);
        let point = |point: &super::LinePoint| match point.origin {
            Origin::Free(place) => own.get(place).cloned(),
            Origin::Template(place) => places.contains(&place).then(|| Breakpoint {
                time: Value::from_si(point.time, super::inputs::second()),
                value: Value::from_si(point.value, row.unit()),
            }),
        };
        let mut edited = self.clone();
        *edited.free_mut(row.input) = line.points().iter().filter_map(point).collect();
        let mut kept = 0..;
        edited
            .templates
            .retain(|_| kept.next().is_some_and(|place| !places.contains(&place)));
        edited
    }

    /// The free breakpoints of an input in one line: `0 s: 0 rpm, 1 s: 60 rpm`.
    #[must_use]
    pub fn free_text(&self, input: Input) -> String {
        let points = self.free(input).iter();
        super::pairs_text(points.map(|point| (&point.time, &point.value)))
    }

    /// Replaces the free breakpoints of an input by those of a text such as
    /// `0 s: 0 rpm, 1 s: 60 rpm`; an empty text takes them all out.
    ///
    /// # Errors
    /// A finding that names the first point that does not read; nothing is changed then.
    pub fn set_free_text(&mut self, input: Input, text: &str) -> Result<(), Finding> {
        let row = input_row(input);
        let example = format!("\"0 s: {0}, 1 s: {0}\"", row.default);
        let points = super::pairs_from_text(row.path, text, &example)?;
        self.set_free(input, &points)
    }
}

/// What prevents a line, as one finding.
fn first_error(findings: Findings, row: &InputRow) -> Finding {
    let mut findings = findings.into_iter();
    let error = findings.find(|finding| finding.severity == Severity::Error);
    error.unwrap_or_else(|| Finding::error(row.path, "the line is out of order", ""))
}

#[cfg(test)]
mod tests;
