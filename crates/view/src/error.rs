//! What can go wrong in this crate.

/// Why a view could not be made.
#[derive(Debug, thiserror::Error)]
pub enum ViewError {
    /// A theme does not read: place and cause are in `cause`.
    #[error("theme {name} does not read: {cause}")]
    Theme {
        /// Name of the theme or its file.
        name: String,
        /// Line, column and cause.
        cause: Box<ron::error::SpannedError>,
    },
}
