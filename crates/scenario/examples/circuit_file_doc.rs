//! Writes docs/circuit-file.md from the tables of parameters, choices, templates and units.

use std::error::Error;
use std::path::Path;

use helmsplit_scenario::describe_markdown;
use helmsplit_scenario::write::save_atomically;

fn main() -> Result<(), Box<dyn Error>> {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("../../docs/circuit-file.md");
    save_atomically(&path, &describe_markdown())?;
    Ok(())
}
