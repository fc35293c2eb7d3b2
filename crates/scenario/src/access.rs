//! Values by their path, as the command line and scripts name them.

use helmsplit_model::Input;

use crate::choice::{CHOICES, ChoiceId};
use crate::finding::Finding;
use crate::land_table::{self, LandTable};
use crate::manoeuvre::INPUTS;
use crate::nearest;
use crate::parameter::{ParameterId, parameters};
use crate::scenario::Scenario;
use crate::validate::STATE_PATH;

/// Start of the path of a template's number, such as `manoeuvre.templates[0].at`.
const TEMPLATES: &str = "manoeuvre.templates[";

impl Scenario {
    /// Sets a value by its path: a parameter from text with a unit (`valve.spool_diameter`,
    /// `20 mm`), a choice by its option (`excess.kind`, `tank`), a template's number
    /// (`manoeuvre.templates[0].at`, `2 s`), a list of points (`manoeuvre.wheel_rate`,
    /// `0 s: 0 rpm, 1 s: 60 rpm`; `valve.table` likewise), `name`, `notes` or `start.state`.
    ///
    /// # Errors
    /// A finding when there is no such path (it names the nearest), or the value does not fit;
    /// nothing is changed then.
    ///
    /// # Examples
    /// ```
    /// use helmsplit_scenario::Scenario;
    ///
    /// let mut scenario = Scenario::default();
    /// scenario.set("valve.fixed_orifice_diameter", "3.5 mm")?;
    /// scenario.set("priority_relief.kind", "pilot on the spring chamber")?;
    /// assert_eq!(scenario.get("valve.fixed_orifice_diameter")?, "3.5 mm");
    ///
    /// let wrong = scenario.set("valve.fixed_orifice_diamter", "3.5 mm").unwrap_err();
    /// assert_eq!(wrong.hint, "did you mean valve.fixed_orifice_diameter?");
    /// # Ok::<(), helmsplit_scenario::Finding>(())
    /// ```
    pub fn set(&mut self, path: &str, text: &str) -> Result<(), Finding> {
        if let Some(id) = ParameterId::from_path(path) {
            return self.set_text(id, text);
        }
        if let Some(id) = ChoiceId::from_path(path) {
            return self.choose_key(id, text);
        }
        if let Some((place, name)) = template_path(path) {
            let known = self.manoeuvre.templates.len();
            let Some(template) = self.manoeuvre.templates.get_mut(place) else {
                let message = format!("the manoeuvre has {known} templates, counted from 0");
                return Err(Finding::error(path, message, "add the template first"));
            };
            return template.set(&format!("{TEMPLATES}{place}]"), name, text);
        }
        if let Some(input) = input_of(path) {
            return self.manoeuvre.set_free_text(input, text);
        }
        match path {
            land_table::PATH => self.land_table = LandTable::from_text(text)?,
            "name" => text.clone_into(&mut self.name),
            "notes" => text.clone_into(&mut self.notes),
            STATE_PATH => self.start_state = (!text.is_empty()).then(|| text.to_owned()),
            _ => return Err(unknown(path)),
        }
        Ok(())
    }

    /// The value at a path as the circuit file writes it.
    ///
    /// # Errors
    /// A finding when there is no such path; it names the nearest.
    pub fn get(&self, path: &str) -> Result<String, Finding> {
        if let Some(id) = ParameterId::from_path(path) {
            return Ok(self.value(id).text());
        }
        if let Some(id) = ChoiceId::from_path(path) {
            return Ok(self.option_key(id).to_owned());
        }
        if let Some((place, name)) = template_path(path) {
            let template = self.manoeuvre.templates.get(place);
            let value = template.and_then(|template| template.value(name));
            return value.map(crate::Value::text).ok_or_else(|| unknown(path));
        }
        if let Some(input) = input_of(path) {
            return Ok(self.manoeuvre.free_text(input));
        }
        match path {
            land_table::PATH => Ok(self.land_table.text()),
            "name" => Ok(self.name.clone()),
            "notes" => Ok(self.notes.clone()),
            STATE_PATH => Ok(self.start_state.clone().unwrap_or_default()),
            _ => Err(unknown(path)),
        }
    }
}

/// Every path that [`Scenario::set`] takes beside those of templates.
pub fn paths() -> impl Iterator<Item = &'static str> {
    let choices = CHOICES.iter().map(|choice| choice.path);
    let rows = parameters().iter().map(|row| row.path);
    let lists = INPUTS.iter().map(|row| row.path).chain([land_table::PATH]);
    let texts = ["name", "notes", STATE_PATH];
    choices.chain(rows).chain(lists).chain(texts)
}

/// The input whose breakpoints have that path.
fn input_of(path: &str) -> Option<Input> {
    let row = INPUTS.iter().find(|row| row.path == path)?;
    Some(row.input)
}

/// Position and name of a template's number.
fn template_path(path: &str) -> Option<(usize, &str)> {
    let (place, rest) = path.strip_prefix(TEMPLATES)?.split_once(']')?;
    Some((place.parse().ok()?, rest.strip_prefix('.')?))
}

fn unknown(path: &str) -> Finding {
    let hint = match nearest_path(path) {
        Some(near) => format!("did you mean {near}?"),
        None => "the command `parameters` lists every path".to_owned(),
    };
    Finding::error(path, "there is no such parameter", hint)
}

/// The nearest path. Names are compared within their section first, since sections are few and
/// long names differ in little.
fn nearest_path(path: &str) -> Option<String> {
    let (section, name) = path.split_once('.').unwrap_or(("", path));
    let all: Vec<_> = paths().filter_map(|path| path.split_once('.')).collect();
    let home = nearest(section, all.iter().map(|(home, _)| *home));
    let within = home.and_then(|home| {
        let names = all
            .iter()
            .filter(|(other, _)| *other == home)
            .map(|(_, name)| *name);
        nearest(name, names).map(|name| format!("{home}.{name}"))
    });
    within.or_else(|| {
        let near = nearest(name, all.iter().map(|(_, name)| *name))?;
        let (home, name) = all.iter().find(|(_, name)| *name == near)?;
        Some(format!("{home}.{name}"))
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::manoeuvre::{TemplateKind, TemplateUse};

    #[test]
    fn every_path_is_set_and_got() {
        let mut scenario = Scenario::default();
        for path in paths() {
            let text = scenario.get(path).unwrap();
            scenario.set(path, &text).unwrap();
            assert_eq!(scenario.get(path).unwrap(), text, "{path}");
        }
        assert_eq!(scenario, Scenario::default(), "nothing changed");
    }

    #[test]
    fn template_numbers_have_paths() {
        let mut scenario = Scenario::default();
        scenario
            .manoeuvre
            .templates
            .push(TemplateUse::new(TemplateKind::KerbStrike));
        scenario
            .set("manoeuvre.templates[0].force", "12 kN")
            .unwrap();
        assert_eq!(
            scenario.get("manoeuvre.templates[0].force").unwrap(),
            "12 kN",
            "kept"
        );
        let finding = scenario
            .set("manoeuvre.templates[0].at", "2 bar")
            .unwrap_err();
        assert_eq!(finding.path, "manoeuvre.templates[0].at", "{finding}");
        let finding = scenario
            .set("manoeuvre.templates[3].at", "2 s")
            .unwrap_err();
        assert!(finding.message.contains("has 1 templates"), "{finding}");
    }

    #[test]
    fn lists_of_points_are_one_text() {
        let mut scenario = Scenario::default();
        let wheel = "0 s: 0 rpm, 500 ms: 0.5 rev/s, 1 s: -60 rpm";
        scenario.set("manoeuvre.wheel_rate", wheel).unwrap();
        assert_eq!(scenario.get("manoeuvre.wheel_rate").unwrap(), wheel, "kept");
        let input = helmsplit_model::Input::WheelRate;
        assert_eq!(scenario.manoeuvre.free(input).len(), 3, "three points");
        for (text, place) in [
            ("0 s: 0 rpm, 1 s", 1),
            ("0 s: 0 rpm, 1 s: 6 bar", 1),
            ("1: 2: 3", 0),
        ] {
            let finding = scenario.set("manoeuvre.wheel_rate", text).unwrap_err();
            let path = format!("manoeuvre.wheel_rate[{place}]");
            assert_eq!(finding.path, path, "{finding}");
            assert!(!finding.hint.is_empty(), "{finding}");
        }
        assert_eq!(
            scenario.get("manoeuvre.wheel_rate").unwrap(),
            wheel,
            "as it was"
        );
        scenario.set("manoeuvre.wheel_rate", "").unwrap();
        assert!(scenario.manoeuvre.free(input).is_empty(), "all out");

        scenario
            .set("valve.table", "0 mm: 0 mm2, 2 mm: 30 mm2")
            .unwrap();
        let table = scenario.get("valve.table").unwrap();
        assert_eq!(table, "0 mm: 0 mm2, 2 mm: 30 mm2", "two points");
        let finding = scenario
            .set("valve.table", "0 mm: 9 mm2, 1 mm: 2 mm2")
            .unwrap_err();
        assert_eq!(finding.path, "valve.table[1]", "{finding}");
        assert_eq!(scenario.get("valve.table").unwrap(), table, "as it was");
    }

    #[test]
    fn unknown_paths_name_the_nearest() {
        let mut scenario = Scenario::default();
        for (path, near) in [
            ("valve.disc_hole_diametre", "valve.disc_hole_diameter"),
            ("pumps.displacement", "pump.displacement"),
            ("displacement", "pump.displacement"),
            ("spool_mass", "valve.spool_mass"),
            ("solver.tolerance", "solver.relative_tolerance"),
        ] {
            let finding = scenario.set(path, "1").unwrap_err();
            assert_eq!(finding.hint, format!("did you mean {near}?"), "{path}");
        }
    }

    #[test]
    fn refused_values_change_nothing() {
        let mut scenario = Scenario::default();
        for (path, text) in [
            ("valve.spool_diameter", "20 bar"),
            ("valve.spool_diameter", "0 mm"),
            ("valve.spool_diameter", "-3 mm"),
            ("excess.kind", "tanks"),
            ("pump.teeth", "12.5"),
        ] {
            let finding = scenario.set(path, text).unwrap_err();
            assert_eq!(finding.path, path, "{finding}");
            assert_eq!(finding.value.as_deref(), Some(text), "{finding}");
            assert!(!finding.hint.is_empty(), "{finding}");
        }
        assert_eq!(scenario, Scenario::default(), "unchanged");
    }
}
