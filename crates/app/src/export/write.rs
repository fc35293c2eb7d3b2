//! Writing an export, whole or not at all.

use std::path::Path;

use helmsplit_raster::png_bytes;
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::write::{save_atomically, save_bytes_atomically};
use helmsplit_sim::{Origin, Rows, Sidecar, SolverOptions, write_csv};
use helmsplit_view::{SvgOptions, svg_from_figure};

use super::picture::picture;
use super::{ExportError, ExportForm, ExportKind, page_figure, sidecar_path};
use crate::traces::{Shown, TraceView};
use crate::worker::{Answer, Quality};

/// What an export is made from.
pub(crate) struct Source<'a> {
    pub(crate) shown: &'a Shown<'a>,
    pub(crate) view: &'a TraceView,
    pub(crate) answer: &'a Answer,
    pub(crate) units: UnitSystem,
}

/// Writes what the form asks for.
///
/// # Errors
/// [`ExportError`] with the reason; an older file of that name is as it was then.
pub(crate) fn write(
    source: &Source<'_>,
    form: &ExportForm,
    path: &Path,
) -> Result<(), ExportError> {
    match form.kind {
        ExportKind::Svg => {
            let theme = form.theme.load()?;
            let options = SvgOptions {
                width: f64::from(form.width),
                ..SvgOptions::new(&theme)
            };
            let figure = page_figure(source.shown, source.view);
            save_atomically(path, &svg_from_figure(&figure, &options))?;
        }
        ExportKind::Png => {
            let picture = picture(source.shown, source.view, form)?;
            save_bytes_atomically(path, &png_bytes(&picture)?)?;
        }
        ExportKind::Csv => data(source, path)?,
    }
    Ok(())
}

fn data(source: &Source<'_>, path: &Path) -> Result<(), ExportError> {
    let answer = source.answer;
    if answer.quality == Quality::Draft {
        return Err(ExportError::Draft);
    }
    let run = &answer.solved.run;
    write_csv(path, &run.trace, Rows::Steps, source.units)?;
    let origin = Origin {
        circuit: &answer.scenario.name,
        circuit_hash: &answer.scenario.hash(),
        version: env!("CARGO_PKG_VERSION"),
    };
    let options = SolverOptions::from(&answer.scenario.solver());
    Sidecar::new(origin, run, &options, source.units).write(&sidecar_path(path))?;
    Ok(())
}
