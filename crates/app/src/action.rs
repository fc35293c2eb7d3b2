//! What the parts of the window ask the app to do. They draw and ask; only the app changes things.

use std::path::PathBuf;

use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::presets::Preset;
use helmsplit_study::CheckId;

use crate::command::{Command, Stage};
use crate::dialogs::Dialog;
use crate::drawing::Export;
use crate::parts::Part;
use crate::settings::Appearance;

/// One wish.
#[derive(Debug, Clone)]
pub(crate) enum Action {
    /// Change the circuit.
    Edit(Command, Stage),
    /// The gesture is over.
    FinishGesture,
    Undo,
    Redo,
    New(&'static Preset),
    Open(PathBuf),
    Save,
    SaveAs(PathBuf),
    /// Write a drawing.
    Export(Export, PathBuf),
    /// Stop the solve.
    Cancel,
    Units(UnitSystem),
    Appearance(Appearance),
    /// Per cent.
    Scale(u16),
    Show(Dialog),
    CloseDialog,
    /// Show the card of a part.
    Select(Part),
    /// Open the evidence of a check and jump to its moment.
    Evidence(CheckId),
    CloseEvidence,
    /// Close the window.
    Quit,
    /// Do this although changes are not saved.
    Discarding(Box<Self>),
}
