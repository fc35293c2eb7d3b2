//! Writes `docs/verification.md`: every outside check with what was expected and obtained.

use std::io::Write;
use std::path::Path;
use std::process::ExitCode;

use helmsplit_acceptance::{document, verification};

fn main() -> std::io::Result<ExitCode> {
    let chapters = verification::chapters();
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("../docs/verification.md");
    std::fs::write(&path, document::write(&chapters))?;
    let mut out = std::io::stdout().lock();
    let all: Vec<_> = chapters.iter().flat_map(|c| &c.outcomes).collect();
    let missed: Vec<_> = all.iter().filter(|o| !o.is_met()).collect();
    writeln!(out, "{} checks written to docs/verification.md", all.len())?;
    for outcome in &missed {
        let check = &outcome.check;
        writeln!(
            out,
            "not met: {} ({}): expected {} {}, obtained {}",
            check.id, check.what, check.expected, check.unit, outcome.obtained
        )?;
    }
    Ok(if missed.is_empty() {
        ExitCode::SUCCESS
    } else {
        ExitCode::FAILURE
    })
}
