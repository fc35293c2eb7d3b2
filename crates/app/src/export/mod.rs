//! What can be taken out of the window: traces as SVG and PNG, data as CSV, readings as text.

mod dialog;
mod error;
mod page;
mod picture;
mod write;

use std::path::{Path, PathBuf};

use helmsplit_view::BuiltInTheme;

use crate::action::Action;
use crate::document::Document;
use crate::files::ask_path::{AskPath, FileKind};

pub(crate) use dialog::export_dialog;
pub(crate) use error::ExportError;
pub(crate) use page::page_figure;
pub(crate) use write::{Source, write};

/// Names of the two that go to the clipboard.
pub(crate) const COPY_VALUES: &str = "Copy values at the cursor";
pub(crate) const COPY_TABLE: &str = "Copy the readout table";

/// What can be written to a file.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum ExportKind {
    /// The traces as a drawing.
    Svg,
    /// The traces as a picture.
    Png,
    /// All states and signals as numbers.
    Csv,
}

impl ExportKind {
    /// Every kind, in the order of the menus.
    pub(crate) const ALL: [Self; 3] = [Self::Svg, Self::Png, Self::Csv];

    /// Its name in menus.
    pub(crate) fn item(self) -> &'static str {
        match self {
            Self::Svg => "Traces as SVG...",
            Self::Png => "Traces as PNG...",
            Self::Csv => "Data as CSV...",
        }
    }

    /// How its file names end.
    fn ending(self) -> &'static str {
        match self {
            Self::Svg => "svg",
            Self::Png => "png",
            Self::Csv => "traces.csv",
        }
    }

    fn file_kind(self) -> FileKind {
        match self {
            Self::Svg => FileKind::SVG,
            Self::Png => FileKind {
                name: "PNG pictures",
                ending: "png",
            },
            Self::Csv => FileKind {
                name: "CSV tables",
                ending: "csv",
            },
        }
    }

    /// The question for the file; it proposes one beside that of the circuit.
    pub(crate) fn ask(self, document: &Document) -> AskPath {
        let title = match self {
            Self::Svg => "Export the traces as SVG",
            Self::Png => "Export the traces as PNG",
            Self::Csv => "Export the data as CSV, with a description beside them",
        };
        let then: fn(PathBuf) -> Action = match self {
            Self::Svg => |path| Action::ExportTraces(Self::Svg, path),
            Self::Png => |path| Action::ExportTraces(Self::Png, path),
            Self::Csv => |path| Action::ExportTraces(Self::Csv, path),
        };
        AskPath::save(title, self.file_kind(), proposal(self, document), then)
    }
}

/// Smallest and largest picture, points and pixels per point.
const WIDTHS: std::ops::RangeInclusive<u16> = 480..=4000;
const HEIGHTS: std::ops::RangeInclusive<u16> = 320..=4000;
const SCALES: [u8; 3] = [1, 2, 3];

/// How an export looks.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct ExportForm {
    pub(crate) kind: ExportKind,
    /// Colours of the drawing.
    pub(crate) theme: BuiltInTheme,
    /// Size of the picture, points; a drawing takes its width from it.
    pub(crate) width: u16,
    /// Least height of the picture, points: it grows if the traces need more.
    pub(crate) height: u16,
    /// Pixels per point.
    pub(crate) scale: u8,
}

impl ExportForm {
    /// A usual size, in the colours of the window.
    pub(crate) fn new(kind: ExportKind, dark: bool) -> Self {
        Self {
            kind,
            theme: if dark {
                BuiltInTheme::Dark
            } else {
                BuiltInTheme::Light
            },
            width: 1280,
            height: 960,
            scale: 2,
        }
    }
}

fn proposal(kind: ExportKind, document: &Document) -> PathBuf {
    let own = document.path().and_then(Path::file_name);
    let stem = own.map_or_else(
        || document.scenario().name.to_lowercase().replace(' ', "_"),
        |name| name.to_string_lossy().into_owned(),
    );
    let stem = stem.trim_end_matches(".ron").trim_end_matches(".circuit");
    // A name of a circuit may hold anything, a file name may not.
    let stem = stem.replace(['/', '\\'], "-");
    let name = format!("{stem}.{}", kind.ending());
    document
        .folder()
        .map_or_else(|| PathBuf::from(&name), |folder| folder.join(&name))
}

/// The description that goes beside exported data: `a.run.json` beside `a.traces.csv`.
pub(crate) fn sidecar_path(path: &Path) -> PathBuf {
    let name = path.file_name().unwrap_or_default().to_string_lossy();
    let stem = name.trim_end_matches(".csv").trim_end_matches(".traces");
    path.with_file_name(format!("{stem}.run.json"))
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::PRESETS;

    #[test]
    fn names_are_proposed_after_the_circuit() {
        let document = Document::from_preset(&PRESETS[0]).unwrap();
        let stem = document.scenario().name.to_lowercase().replace(' ', "_");
        let path = proposal(ExportKind::Csv, &document);
        assert_eq!(
            path,
            PathBuf::from(format!("{stem}.traces.csv")),
            "no file yet"
        );
        let folder = tempfile::tempdir().unwrap();
        let mut document = document;
        document
            .save_as(&folder.path().join("mine.circuit.ron"))
            .unwrap();
        let path = proposal(ExportKind::Png, &document);
        assert_eq!(path, folder.path().join("mine.png"), "beside the file");
    }

    #[test]
    fn descriptions_stand_beside_their_data() {
        for (csv, json) in [
            ("a/b.traces.csv", "a/b.run.json"),
            ("b.csv", "b.run.json"),
            ("b", "b.run.json"),
        ] {
            assert_eq!(sidecar_path(Path::new(csv)), PathBuf::from(json), "{csv}");
        }
    }
}
