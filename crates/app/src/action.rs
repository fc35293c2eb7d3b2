//! What the parts of the window ask the app to do. They draw and ask; only the app changes things.

use std::path::PathBuf;

use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::presets::Preset;
use helmsplit_study::CheckId;

use crate::command::{Command, Stage};
use crate::dialogs::Dialog;
use crate::drawing::Export;
use crate::files::ask_path::AskPath;
use crate::parts::Part;
use crate::settings::Appearance;
use crate::spot::Spot;

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
    /// Ask for a path, and do what the question says with it.
    AskPath(AskPath),
    /// Something with files.
    Filing(Filing),
    /// Stop the solve.
    Cancel,
    Units(UnitSystem),
    Appearance(Appearance),
    /// Per cent.
    Scale(u16),
    Show(Dialog),
    CloseDialog,
    /// Open the finder.
    Find,
    /// Open the card of a field, with the field focused and marked.
    GoTo(Spot),
    /// Show the panel of the traces that has this name.
    ShowTrace(String),
    /// Show the first hints again.
    FirstSteps,
    SkipHint,
    NoMoreHints,
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

/// One wish about files.
#[derive(Debug, Clone)]
pub(crate) enum Filing {
    /// Save, and if that is done, this.
    SaveThen(Box<Action>),
    /// A path was chosen: close the dialog and do this.
    PathChosen(Box<Action>),
    /// Ask with our own dialog instead of the desktop's.
    OwnDialog,
    /// Take what the file holds now.
    Reload,
    /// Stay with the circuit although the file was changed or removed.
    KeepMine,
    /// Write the circuit over what another program made of the file.
    ReplaceTheirs,
    /// Show what earlier windows did not save.
    ShowOffers,
    /// Take one of these.
    Restore(usize),
    /// Throw one of these away.
    DiscardOffer(usize),
    /// Take a file off the list of files used lately.
    ForgetRecent(PathBuf),
    /// Empty that list.
    ForgetAllRecent,
}
