//! Completions for a shell, and the manual page.

use crate::args::command;
use crate::exit::{ExitStatus, Failure};
use crate::output::print;

pub(super) fn completions(
    shell: clap_complete::Shell,
    has_window: bool,
) -> Result<ExitStatus, Failure> {
    let mut text = Vec::new();
    clap_complete::generate(shell, &mut command(has_window), "helmsplit", &mut text);
    print(&String::from_utf8_lossy(&text))?;
    Ok(ExitStatus::Done)
}

pub(super) fn man(has_window: bool) -> Result<ExitStatus, Failure> {
    let mut text = Vec::new();
    clap_mangen::Man::new(command(has_window)).render(&mut text)?;
    print(&String::from_utf8_lossy(&text))?;
    Ok(ExitStatus::Done)
}
