//! Tables as CSV files.

use std::path::Path;

use helmsplit_scenario::write::save_atomically;

use crate::exit::Failure;

/// Writes a table: heads, then rows of numbers; what is not finite leaves its cell empty.
pub(crate) fn write_table(
    file: &Path,
    heads: &[String],
    rows: impl Iterator<Item = Vec<f64>>,
) -> Result<(), Failure> {
    let mut text = heads.join(",");
    text.push('\n');
    for row in rows {
        let cells: Vec<String> = row
            .iter()
            .map(|value| {
                if value.is_finite() {
                    value.to_string()
                } else {
                    String::new()
                }
            })
            .collect();
        text.push_str(&cells.join(","));
        text.push('\n');
    }
    save_atomically(file, &text)?;
    Ok(())
}
