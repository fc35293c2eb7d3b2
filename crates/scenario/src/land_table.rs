//! The table of travel and area for the land shape "table".

use helmsplit_model::{MonotoneCubic, Quantity};

use crate::UnitSystem;
use crate::finding::Finding;
use crate::manoeuvre::{pairs_from_text, pairs_text};
use crate::quantity_text::{Digits, text_from_si};
use crate::value::Value;

/// Path of the table in the circuit file.
pub(crate) const PATH: &str = "valve.table";

/// Opening travel behind the overlap and area of the land, from a drawing or a measurement.
#[derive(Debug, Clone, PartialEq)]
pub struct LandTable {
    /// Points of (travel, area), travel rising, area never falling.
    pub points: Vec<(Value, Value)>,
}

/// Points of the default: invented, a land that opens gently and then widens.
const DEFAULT: [(&str, &str); 5] = [
    ("0 mm", "0 mm2"),
    ("1 mm", "8 mm2"),
    ("2 mm", "26 mm2"),
    ("3.5 mm", "75 mm2"),
    ("5 mm", "140 mm2"),
];

impl Default for LandTable {
    fn default() -> Self {
        let read = |text, quantity| {
            Value::from_text(PATH, text, quantity)
                .unwrap_or_else(|finding| unreachable!("a test holds that these read: {finding}"))
        };
        Self {
            points: DEFAULT
                .iter()
                .map(|(z, a)| (read(z, Quantity::Length), read(a, Quantity::Area)))
                .collect(),
        }
    }
}

impl LandTable {
    /// The curve through the points, SI.
    ///
    /// # Errors
    /// A finding that names the first point that does not fit.
    pub fn curve(&self) -> Result<MonotoneCubic, Finding> {
        let points: Vec<_> = self.points.iter().map(|(z, a)| (z.si(), a.si())).collect();
        if let Some(place) = points.iter().position(|p| p.0 < 0.0 || p.1 < 0.0) {
            let path = format!("{PATH}[{place}]");
            return Err(Finding::error(
                path,
                "travel and area are never negative",
                HINT,
            ));
        }
        if points.len() < 2 {
            let message = format!(
                "a table needs two points or more, this one has {}",
                points.len()
            );
            return Err(Finding::error(PATH, message, HINT));
        }
        MonotoneCubic::new(points).map_err(|place| {
            let (z, a) = &self.points[place];
            let message = "travel must rise and area must not fall from point to point";
            Finding::error(format!("{PATH}[{place}]"), message, HINT).with_value(&format!(
                "{}, {}",
                z.text(),
                a.text()
            ))
        })
    }

    /// The points in one line: `0 mm: 0 mm2, 2 mm: 30 mm2`.
    #[must_use]
    pub fn text(&self) -> String {
        pairs_text(self.points.iter().map(|(z, a)| (z, a)))
    }

    /// The table of a text such as `0 mm: 0 mm2, 2 mm: 30 mm2`.
    ///
    /// # Errors
    /// A finding that names the first point that does not read or does not fit.
    pub fn from_text(text: &str) -> Result<Self, Finding> {
        let pairs = pairs_from_text(PATH, text, "\"0 mm: 0 mm2, 2 mm: 30 mm2\"")?;
        let read = |(place, (travel, area)): (usize, &(&str, &str))| {
            let path = format!("{PATH}[{place}]");
            let travel = Value::from_text(&path, travel, Quantity::Length)?;
            Ok((travel, Value::from_text(&path, area, Quantity::Area)?))
        };
        let points = pairs.iter().enumerate().map(read);
        Self::checked(points.collect::<Result<_, Finding>>()?)
    }

    fn checked(points: Vec<(Value, Value)>) -> Result<Self, Finding> {
        let table = Self { points };
        table.curve()?;
        Ok(table)
    }

    /// Sets travel, area or both of a point from texts such as `2 mm` and `30 mm2`.
    ///
    /// # Errors
    /// A finding when there is no such point, a text does not read, or the travel no longer rises
    /// or the area falls; nothing is changed then.
    pub fn set_point(
        &mut self,
        place: usize,
        travel: Option<&str>,
        area: Option<&str>,
    ) -> Result<(), Finding> {
        let path = format!("{PATH}[{place}]");
        let mut points = self.points.clone();
        let Some(point) = points.get_mut(place) else {
            return Err(self.no_point(path));
        };
        if let Some(travel) = travel {
            point.0 = Value::from_text(&path, travel, Quantity::Length)?;
        }
        if let Some(area) = area {
            point.1 = Value::from_text(&path, area, Quantity::Area)?;
        }
        // Whichever neighbour the rule names, this point is the one that was changed.
        let typed = travel.or(area).unwrap_or_default();
        *self = Self::checked(points).map_err(|finding| Finding {
            path,
            ..finding.with_value(typed)
        })?;
        Ok(())
    }

    fn no_point(&self, path: String) -> Finding {
        let message = format!("the table has {} points, counted from 0", self.points.len());
        Finding::error(path, message, "add the point first")
    }

    /// Adds a point behind another: half way to the next, behind the last as far again as the
    /// last stretch. Its place is `place + 1`.
    ///
    /// # Errors
    /// A finding when there is no point at `place`.
    pub fn add_point(&mut self, place: usize) -> Result<(), Finding> {
        let Some(own) = self.points.get(place) else {
            return Err(self.no_point(format!("{PATH}[{place}]")));
        };
        let between = |pick: fn(&(Value, Value)) -> &Value| {
            let here = pick(own);
            let si = match (self.points.get(place + 1), place.checked_sub(1)) {
                (Some(next), _) => f64::midpoint(here.si(), pick(next).si()),
                (None, Some(ahead)) => 2.0 * here.si() - pick(&self.points[ahead]).si(),
                (None, None) => here.si(),
            };
            // Six digits are finer than any drawing.
            let text = text_from_si(si, here.unit(), Digits::Significant(6));
            Value::from_text(PATH, &text, here.unit().quantity())
        };
        let point = (between(|point| &point.0)?, between(|point| &point.1)?);
        let mut points = self.points.clone();
        points.insert(place + 1, point);
        *self = Self::checked(points)?;
        Ok(())
    }

    /// Takes a point out.
    ///
    /// # Errors
    /// A finding when there is no such point, or only two are left.
    pub fn remove_point(&mut self, place: usize) -> Result<(), Finding> {
        if place >= self.points.len() {
            return Err(self.no_point(format!("{PATH}[{place}]")));
        }
        let mut points = self.points.clone();
        points.remove(place);
        *self = Self::checked(points)?;
        Ok(())
    }

    pub(crate) fn rewrite_units(&mut self, system: UnitSystem) {
        for (z, a) in &mut self.points {
            *z = z.in_unit(system.unit(Quantity::Length));
            *a = a.in_unit(system.unit(Quantity::Area));
        }
    }
}

const HINT: &str = "write points such as (\"0 mm\", \"0 mm2\"), (\"2 mm\", \"30 mm2\")";

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn default_is_a_curve() {
        let curve = LandTable::default().curve().unwrap();
        let (area, _) = curve.at(2e-3);
        assert!((area - 26e-6).abs() < 1e-12, "passes its points: {area}");
    }

    #[test]
    fn edits_keep_the_table_a_curve() {
        let mut table = LandTable::default();
        table.add_point(1).unwrap();
        assert_eq!(table.points[2].0.text(), "1.5 mm", "half way");
        assert_eq!(table.points[2].1.text(), "17 mm2", "half way");
        table.add_point(5).unwrap();
        assert_eq!(table.points[6].0.text(), "6.5 mm", "as far again");
        table.set_point(2, Some("0.06 in"), None).unwrap();
        assert_eq!(table.points[2].0.text(), "0.06 in", "as typed");
        let before = table.clone();
        for (travel, area) in [
            (Some("3 mm"), None),
            (None, Some("90 mm2")),
            (Some("4 bar"), None),
            (Some("wide"), None),
        ] {
            let finding = table.set_point(2, travel, area).unwrap_err();
            assert_eq!(finding.path, "valve.table[2]", "{finding}");
            assert_eq!(finding.value.as_deref(), travel.or(area), "{finding}");
        }
        assert_eq!(table, before, "as it was");
        for _ in 0..5 {
            table.remove_point(1).unwrap();
        }
        let finding = table.remove_point(0).unwrap_err();
        assert!(finding.message.contains("two points"), "{finding}");
        assert!(table.set_point(9, None, None).is_err(), "no such point");
    }

    #[test]
    fn points_that_do_not_rise_are_named() {
        let mut table = LandTable::default();
        table.points.swap(1, 2);
        let finding = table.curve().unwrap_err();
        assert_eq!(finding.path, "valve.table[2]", "the point that falls back");
        table.points.truncate(1);
        let finding = table.curve().unwrap_err();
        assert!(finding.message.contains("two points"), "{finding}");
    }
}
