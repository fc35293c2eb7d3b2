//! Solves a circuit and prints every check with its evidence, those that take the operating map
//! among them.

use helmsplit_sim::RunEnd;

use super::run::{answer_by_map, solve_watched, status};
use crate::args::CheckArguments;
use crate::exit::{ExitStatus, Failure};
use crate::input::load;
use crate::output::{print, say};
use crate::{report_json, verdict};

pub(super) fn check(arguments: &CheckArguments) -> Result<ExitStatus, Failure> {
    let loaded = load(&arguments.circuit)?;
    let mut solved = solve_watched(&loaded)?;
    if let RunEnd::Cancelled { .. } = solved.run.end {
        say(&solved.run.end.to_string());
        return Ok(ExitStatus::Cancelled);
    }
    if !arguments.no_map && !answer_by_map(&loaded, &mut solved)? {
        say("cancelled");
        return Ok(ExitStatus::Cancelled);
    }
    let units = arguments.circuit.units;
    let text = if arguments.json {
        report_json::report(&loaded, &solved, units, &[])?
    } else {
        verdict::evidence(&loaded, &solved, units)
    };
    print(&text)?;
    Ok(status(&solved))
}
