//! The window of Helmsplit: edit a circuit and see it solved at once.
//!
//! Start with [`run`]. [`HelmsplitApp`] owns everything and is shown by one of two windows, which
//! it does not know: one drawn by OpenGL, one by the processor; the parts of the window draw and ask
//! (private `Action`s), and only the app changes things: the circuit through [`Command`]s on its
//! [`Document`], the solving through the [`Worker`].
//!
//! # Conventions
//! The thread of the window never solves. Colours come from theme files through one module.
//! Every control has a name that a screen reader and a test can find.

mod about;
mod action;
mod app;
mod calm;
mod card;
mod command;
mod dialogs;
mod document;
mod drawing;
mod error;
mod evidence;
mod field_states;
mod files;
mod find;
mod first_steps;
mod look;
mod manoeuvre;
mod menu;
mod parts;
mod quantity_field;
mod quantity_step;
mod response_page;
mod ribbon;
mod select_all;
mod settings;
mod solver;
mod spot;
mod start;
mod status;
mod text;
mod traces;
mod window;
mod worker;

pub use app::HelmsplitApp;
pub use command::{Command, Stage, Target};
pub use document::{Comments, Document};
pub use error::AppError;
pub use files::{Home, Kept, WindowPlace};
pub use first_steps::FirstSteps;
pub use manoeuvre::{ListEdit, ListTarget};
pub use settings::{Appearance, Settings};
pub use start::{Opening, run};
pub use window::Renderer;
pub use worker::{Answer, Failure, Job, Quality, Worker};
