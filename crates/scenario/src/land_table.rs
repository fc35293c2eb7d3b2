//! The table of travel and area for the land shape "table".

use helmsplit_model::{MonotoneCubic, Quantity};

use crate::UnitSystem;
use crate::finding::Finding;
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
