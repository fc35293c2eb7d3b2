//! What the app writes and copies.

use std::path::Path;

use egui::Context;

use super::HelmsplitApp;
use crate::dialogs::Dialog;
use crate::evidence_marks::EvidenceMarks;
use crate::export::{ExportError, ExportForm, ExportKind, Source, write};
use crate::traces::{Readings, Shown};

impl HelmsplitApp {
    /// Asks how an export is to look, where that is a question, and then where to write it.
    pub(super) fn ask_export(&mut self, context: &Context, kind: ExportKind) {
        if self.answer.is_none() {
            self.notice = format!("Not exported: {}", ExportError::NoRun);
        } else if kind == ExportKind::Csv {
            self.ask(context, kind.ask(&self.document));
        } else {
            let known = self.export_form.take();
            let form = known.unwrap_or_else(|| ExportForm::new(kind, self.look.is_dark()));
            self.dialog = Some(Dialog::ExportTraces(ExportForm { kind, ..form }));
        }
    }

    /// Remembers how it is to look, and asks where to write it.
    pub(super) fn ask_export_file(&mut self, context: &Context, form: ExportForm) {
        let ask = form.kind.ask(&self.document);
        self.export_form = Some(form);
        self.ask(context, ask);
    }

    /// Writes the file, or says why not.
    pub(super) fn export_traces(&mut self, kind: ExportKind, path: &Path) {
        match self.written(kind, path) {
            Ok(()) => {
                self.dialog = None;
                self.notice = format!("Exported to {}", path.display());
            }
            Err(error) => {
                self.dialog = Some(Dialog::problem("The file was not exported", error));
            }
        }
    }

    fn written(&self, kind: ExportKind, path: &Path) -> Result<(), ExportError> {
        let answer = self.answer.as_deref().ok_or(ExportError::NoRun)?;
        let marks = self.marks();
        let source = Source {
            shown: &self.shown(marks.as_ref()),
            view: &self.view,
            answer,
            units: self.settings.units,
        };
        let form = self.export_form.clone();
        let form = form.unwrap_or_else(|| ExportForm::new(kind, self.look.is_dark()));
        write(&source, &ExportForm { kind, ..form }, path)
    }

    /// Puts readings on the clipboard as tab-separated text.
    pub(super) fn copy(&mut self, context: &Context, text: fn(&Readings) -> String) {
        if self.answer.is_none() {
            self.notice = format!("Not copied: {}", ExportError::NoRun);
            return;
        }
        let readings = Readings::take(&self.shown(None), &self.view);
        context.copy_text(text(&readings));
        "Copied to the clipboard".clone_into(&mut self.notice);
    }

    /// What the traces show.
    pub(super) fn shown<'a>(&'a self, evidence: Option<&'a EvidenceMarks>) -> Shown<'a> {
        Shown {
            figure: &self.figure,
            generation: self.generation,
            pale: self.failure.is_some(),
            kept: &self.kept,
            evidence,
            look: &self.look,
        }
    }
}
