//! Find anything by a word of it: a parameter, a choice, a verdict, a trace, a command.
//!
//! [`things`] lists what can be found, [`ranked`] puts the best matches first, [`finder`] draws
//! the dialog.

mod commands;
mod dialog;
mod rank;
mod thing;

pub(crate) use dialog::{Finder, finder};
pub(crate) use thing::{Findable, things};
