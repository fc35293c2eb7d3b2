//! Traces as comma-separated values.

use std::io::Write;
use std::path::Path;

use helmsplit_model::Quantity;
use helmsplit_scenario::units::{Unit, UnitSystem};
use helmsplit_scenario::write::save_atomically;

use crate::error::SimError;
use crate::table::Table;
use crate::trace::{ColumnInfo, Trace};

/// Significant digits of an exported number: far finer than any run is accurate.
const DIGITS: usize = 10;

/// Which rows of a trace to write.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Rows {
    /// The solver's own steps.
    #[default]
    Steps,
    /// The uniform output grid; the solver's steps if none was asked for.
    Grid,
}

impl Trace {
    /// The rows that `rows` names.
    #[must_use]
    pub fn rows(&self, rows: Rows) -> &Table {
        match (rows, self.grid()) {
            (Rows::Grid, Some(grid)) => grid,
            _ => self.steps(),
        }
    }
}

/// The name of a column with its unit, for a file: `p_in_bar`, `q_priority_lpm`, `a_land_mm2`;
/// a plain number has no suffix.
#[must_use]
pub fn column_heading(name: &str, unit: &Unit) -> String {
    let suffix = unit_suffix(unit.symbol());
    if suffix.is_empty() {
        name.to_owned()
    } else {
        format!("{name}_{suffix}")
    }
}

/// A unit's symbol in letters, digits and underscores.
fn unit_suffix(symbol: &str) -> String {
    match symbol {
        "1" => return String::new(),
        "%" => return "percent".to_owned(),
        "L/min" => return "lpm".to_owned(),
        _ => {}
    }
    let mut suffix = String::new();
    for character in symbol.chars() {
        match character {
            '/' => suffix.push_str("_per_"),
            ' ' => suffix.push('_'),
            c if c.is_ascii_alphanumeric() => suffix.push(c),
            _ => {}
        }
    }
    suffix
}

/// Writes the rows of a trace as CSV: the time in s, then every state and signal in the units of
/// `units`, with the unit in each heading. The file appears whole or not at all.
///
/// # Errors
/// [`SimError::Write`] names the file and what the system said.
pub fn write_csv(
    path: &Path,
    trace: &Trace,
    rows: Rows,
    units: UnitSystem,
) -> Result<(), SimError> {
    let mut text = Vec::new();
    // Writing into memory cannot fail, and the digits, letters and commas written are UTF-8.
    write_rows(&mut text, trace.columns(), trace.rows(rows), units).map_err(SimError::Format)?;
    Ok(save_atomically(path, &String::from_utf8_lossy(&text))?)
}

fn write_rows(
    out: &mut impl Write,
    columns: &[ColumnInfo],
    table: &Table,
    units: UnitSystem,
) -> std::io::Result<()> {
    let units: Vec<&Unit> = columns.iter().map(|c| units.unit(c.quantity)).collect();
    let mut writer = csv::Writer::from_writer(out);
    let time = UnitSystem::Si.unit(Quantity::Time);
    let headings = columns
        .iter()
        .zip(&units)
        .map(|(column, unit)| column_heading(&column.name, unit));
    writer.write_record(std::iter::once(column_heading("t", time)).chain(headings))?;
    for (row, &time) in table.times().iter().enumerate() {
        writer.write_field(number(time))?;
        for (&value, unit) in table.row(row).iter().zip(&units) {
            writer.write_field(number(unit.value_from_si(value)))?;
        }
        writer.write_record(None::<&[u8]>)?;
    }
    writer.flush()
}

/// A number with at most [`DIGITS`] significant digits and no superfluous zeros.
fn number(value: f64) -> String {
    let rounded = format!("{value:.precision$e}", precision = DIGITS - 1);
    // Reading back what was just written cannot fail; NaN and infinity read back too.
    let value: f64 = rounded.parse().unwrap_or(value);
    let size = value.abs();
    if size < f64::MIN_POSITIVE {
        "0".to_owned()
    } else if (1e-4..1e12).contains(&size) {
        format!("{value}")
    } else {
        format!("{value:e}")
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::extremes::Extremes;

    #[test]
    fn headings_carry_units_in_plain_letters() {
        let metric = |q| UnitSystem::Metric.unit(q);
        for (quantity, heading) in [
            (Quantity::Pressure, "a_bar"),
            (Quantity::Flow, "a_lpm"),
            (Quantity::Ratio, "a_percent"),
            (Quantity::Velocity, "a_m_per_s"),
            (Quantity::LeakageCoefficient, "a_cm3_per_min_bar"),
            (Quantity::Torque, "a_N_m"),
            (Quantity::Count, "a"),
        ] {
            assert_eq!(
                column_heading("a", metric(quantity)),
                heading,
                "{quantity:?}"
            );
        }
    }

    #[test]
    fn numbers_are_short_and_exact_enough() {
        for (value, text) in [
            (0.1 + 0.2, "0.3"),
            (-0.0, "0"),
            (14.5, "14.5"),
            (1.23e-7, "1.23e-7"),
            (-2.5e13, "-2.5e13"),
            (123_456.789_012_34, "123456.789"),
        ] {
            assert_eq!(number(value), text, "{value:?}");
        }
    }

    #[test]
    fn writes_units_rows_and_nothing_on_failure() {
        let column = |name: &str, quantity| ColumnInfo {
            name: name.to_owned(),
            label: name.to_owned(),
            quantity,
            signal: None,
        };
        let mut table = Table::new(2);
        table.push(0.0, &[1e5, 1.0 / 6e4]);
        table.push(0.5, &[2.5e5, 0.0]);
        let trace = Trace::new(
            vec![
                column("p_in", Quantity::Pressure),
                column("q_o", Quantity::Flow),
            ],
            table,
            None,
            Extremes::new(2),
        );
        let folder = tempfile::tempdir().unwrap();
        let path = folder.path().join("run.csv");
        write_csv(&path, &trace, Rows::Grid, UnitSystem::Metric).unwrap();
        let text = std::fs::read_to_string(&path).unwrap();
        assert_eq!(
            text, "t_s,p_in_bar,q_o_lpm\n0,1,1\n0.5,2.5,0\n",
            "metric file"
        );
        let lost = folder.path().join("missing").join("run.csv");
        let error = write_csv(&lost, &trace, Rows::Steps, UnitSystem::Si).unwrap_err();
        assert!(error.to_string().contains("run.csv"), "{error}");
    }
}
