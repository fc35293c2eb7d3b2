//! Completions for a shell, and the manual page.

use clap::CommandFactory;

use crate::args::Arguments;
use crate::exit::{ExitStatus, Failure};
use crate::output::print;

pub(super) fn completions(shell: clap_complete::Shell) -> Result<ExitStatus, Failure> {
    let mut text = Vec::new();
    clap_complete::generate(shell, &mut Arguments::command(), "helmsplit", &mut text);
    print(&String::from_utf8_lossy(&text))?;
    Ok(ExitStatus::Done)
}

pub(super) fn man() -> Result<ExitStatus, Failure> {
    let mut text = Vec::new();
    clap_mangen::Man::new(Arguments::command()).render(&mut text)?;
    print(&String::from_utf8_lossy(&text))?;
    Ok(ExitStatus::Done)
}
