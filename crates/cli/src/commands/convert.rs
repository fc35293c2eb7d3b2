//! Rewrites a circuit file in another unit system, keeping its comments.

use helmsplit_scenario::document::Document;
use helmsplit_scenario::write::save_atomically;
use helmsplit_scenario::{Findings, Scenario};

use crate::args::ConvertArguments;
use crate::exit::{ExitStatus, Failure};
use crate::output::{print, say};

pub(super) fn convert(arguments: &ConvertArguments) -> Result<ExitStatus, Failure> {
    let document = Document::read(&arguments.file)?;
    let (scenario, findings) = Scenario::from_document(&document);
    if scenario.is_none() || findings.has_errors() {
        return Err(Failure::Findings(findings));
    }
    warn(&findings);
    let text =
        helmsplit_scenario::convert_units(&document, arguments.to).map_err(Failure::Findings)?;
    let target = if arguments.in_place {
        Some(&arguments.file)
    } else {
        arguments.output.as_ref()
    };
    match target {
        Some(file) => {
            save_atomically(file, &text)?;
            print(&format!("Wrote {}.\n", file.display()))?;
        }
        None => print(&text)?,
    }
    Ok(ExitStatus::Done)
}

fn warn(findings: &Findings) {
    if !findings.is_empty() {
        say(findings.to_string().trim_end());
    }
}
