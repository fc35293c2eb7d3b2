//! The only place that writes to standard output and standard error.

use std::io::Write;

use crate::exit::{ExitStatus, Failure};

/// Writes text to standard output.
pub(crate) fn print(text: &str) -> Result<(), Failure> {
    let mut out = std::io::stdout().lock();
    out.write_all(text.as_bytes())?;
    out.flush()?;
    Ok(())
}

/// Writes a message to standard error. If that is closed there is nobody left to tell.
pub(crate) fn say(text: &str) {
    let _ = writeln!(std::io::stderr().lock(), "{text}");
}

/// Tells of a failure on standard error, unless the reader just went away.
pub(crate) fn complain(failure: &Failure) {
    if failure.status() == ExitStatus::Done {
        return;
    }
    let text = failure.to_string();
    // Findings say "error" themselves, each with its place; what keeps a window
    // shut is a sentence or findings.
    let speaks_for_itself = matches!(
        failure,
        Failure::Findings(_) | Failure::Finding(_) | Failure::Window(_)
    );
    if speaks_for_itself {
        say(text.trim_end());
    } else {
        say(&format!("error: {}", text.trim_end()));
    }
}
