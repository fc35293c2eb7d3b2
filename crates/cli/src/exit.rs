//! Exit status and the failures that lead to it.

use helmsplit_scenario::{FileError, Finding, Findings};
use helmsplit_study::StudyError;

use crate::window::NoWindow;

/// How the program ended, for the shell.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum ExitStatus {
    /// Done, and every check that has a figure is met.
    Done,
    /// Done, and a check fails.
    CheckFailed,
    /// The input was bad.
    BadInput,
    /// The solver gave up.
    GaveUp,
    /// No window could be opened.
    NoWindow,
    /// The user cancelled.
    Cancelled,
}

impl ExitStatus {
    /// The number for the shell.
    #[must_use]
    pub fn code(self) -> u8 {
        match self {
            Self::Done => 0,
            Self::CheckFailed => 1,
            Self::BadInput => 2,
            Self::GaveUp => 3,
            Self::NoWindow => 4,
            Self::Cancelled => 130,
        }
    }
}

/// Why a command could not do its work.
#[derive(Debug, thiserror::Error)]
pub(crate) enum Failure {
    /// A file could not be read or written.
    #[error(transparent)]
    File(#[from] FileError),
    /// The circuit has errors.
    #[error("{0}")]
    Findings(Findings),
    /// One value has an error.
    #[error("{0}")]
    Finding(Box<Finding>),
    /// The scenario could not be solved.
    #[error(transparent)]
    Study(#[from] StudyError),
    /// Results could not be written.
    #[error(transparent)]
    Export(#[from] helmsplit_sim::SimError),
    /// A figure could not be drawn.
    #[error(transparent)]
    View(#[from] helmsplit_view::ViewError),
    /// There is no window.
    #[error("{}", .0.reason)]
    Window(NoWindow),
    /// Anything else that the user can mend.
    #[error("{0}")]
    Input(String),
    /// Standard output is closed or full.
    #[error("cannot write the output: {0}")]
    Output(#[from] std::io::Error),
    /// Results could not be put into JSON.
    #[error("cannot write JSON: {0}")]
    Json(#[from] serde_json::Error),
}

impl From<Finding> for Failure {
    fn from(finding: Finding) -> Self {
        Self::Finding(Box::new(finding))
    }
}

impl Failure {
    pub(crate) fn status(&self) -> ExitStatus {
        match self {
            // A reader that went away (`| head`) is no failure of ours.
            Self::Output(error) if error.kind() == std::io::ErrorKind::BrokenPipe => {
                ExitStatus::Done
            }
            Self::Window(refused) => refused.status,
            // The circuit is sound, but it does not come to rest or its modes do not come out.
            Self::Study(StudyError::Equilibrium(_) | StudyError::Modes(_)) => ExitStatus::GaveUp,
            _ => ExitStatus::BadInput,
        }
    }
}
