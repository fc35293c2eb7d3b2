//! What the app does when it is asked.

use std::path::Path;

use egui::{Context, ViewportCommand};
use helmsplit_scenario::write::save_atomically;
use helmsplit_study::CheckId;
use helmsplit_view::Moment;
use helmsplit_view::diagram::DrawingOptions;
use helmsplit_view::figures::solved_figure;

use super::HelmsplitApp;
use crate::action::{Action, Filing};
use crate::command::{Command, Stage, Target};
use crate::dialogs::Dialog;
use crate::document::Document;
use crate::drawing::{self, Export};
use crate::first_steps::FirstSteps;
use crate::traces::TraceView;
use crate::worker::{Failure, Quality};

impl HelmsplitApp {
    /// Does what a part of the window asked for.
    pub(super) fn act(&mut self, context: &Context, action: Action) {
        self.settings.first_steps.follow(&action);
        match action {
            Action::Edit(command, stage) => self.edit(context, &command, stage),
            Action::FinishGesture => self.document.finish_gesture(),
            Action::Undo => self.step("Undone", Document::undo),
            Action::Redo => self.step("Redone", Document::redo),
            Action::New(_) | Action::Open(_) | Action::Quit if self.document.is_edited() => {
                let next = Box::new(action);
                self.dialog = Some(Dialog::Unsaved { next });
            }
            Action::New(_) | Action::Open(_) | Action::Quit => self.replace(context, action),
            Action::Discarding(next) => match *next {
                Action::Filing(Filing::Restore(offer)) => self.restore(offer),
                next => self.replace(context, next),
            },
            Action::Save => self.save(context),
            Action::SaveAs(path) => self.save_as(context, &path),
            Action::AskPath(ask) => self.ask(context, ask),
            Action::Filing(filing) => self.file(context, filing),
            Action::Export(export, path) => self.export(export, &path),
            Action::Cancel => {
                self.worker.cancel();
                self.failure = Some(Failure {
                    revision: self.document.revision(),
                    reason: "Cancelled; the traces are of the last good values.".to_owned(),
                });
            }
            Action::Units(units) => {
                self.settings.units = units;
                self.fields.clear();
                if let Some(answer) = &self.answer {
                    self.figure = solved_figure(&answer.scenario, &answer.solved, units);
                    self.generation += 1;
                }
            }
            Action::Appearance(appearance) => self.settings.appearance = appearance,
            Action::Scale(scale) => self.settings.scale = scale,
            Action::Show(dialog) => self.dialog = Some(dialog),
            Action::CloseDialog => self.close_dialog(),
            Action::Find => self.find(),
            Action::GoTo(spot) => self.go_to(spot),
            Action::ShowTrace(panel) => self.view.set_shown(&panel, true),
            Action::FirstSteps => self.settings.first_steps = FirstSteps::default(),
            Action::SkipHint => self.settings.first_steps.skip(),
            Action::NoMoreHints => self.settings.first_steps = FirstSteps::over(),
            Action::Select(part) => self.selected = part,
            Action::Evidence(id) => self.open_evidence(id),
            Action::CloseEvidence => self.evidence = None,
        }
    }

    fn edit(&mut self, context: &Context, command: &Command, stage: Stage) {
        self.notice.clear();
        self.last_edit = context.input(|input| input.time);
        let result = self.document.apply(command, stage);
        if let Command::List(edit) = command {
            let lists = &mut self.fields.lists;
            match &result {
                Ok(()) => lists.accept(edit, self.document.scenario()),
                Err(finding) => lists.refuse(edit, stage, finding),
            }
        }
        let Target::Parameter(id) = command.target() else {
            return;
        };
        match (result, command) {
            (Err(finding), Command::SetText { text, .. }) if stage == Stage::Finished => {
                let hint = if finding.hint.is_empty() {
                    String::new()
                } else {
                    format!("; {}", finding.hint)
                };
                let reason = format!("{}{hint}", finding.message);
                self.fields.refuse(id, text.clone(), reason);
            }
            // A step beyond the range stays where it was: the field shows that.
            (Err(_), _) => {}
            (Ok(()), _) => self.fields.accept(id),
        }
    }

    fn step(&mut self, word: &str, step: fn(&mut Document) -> bool) {
        let name = if word == "Undone" {
            self.document.undo_name()
        } else {
            self.document.redo_name()
        };
        let name = name.map(str::to_owned);
        self.fields.clear();
        if step(&mut self.document)
            && let Some(name) = name
        {
            self.notice = format!("{word}: {name}");
        }
    }

    fn replace(&mut self, context: &Context, action: Action) {
        let file = match &action {
            Action::Open(path) => Some(path.clone()),
            _ => None,
        };
        let document = match action {
            Action::New(preset) => Document::from_preset(preset),
            Action::Open(path) => Document::open(&path),
            Action::Quit => {
                self.leaving = true;
                context.send_viewport_cmd(ViewportCommand::Close);
                return;
            }
            other => return self.act(context, other),
        };
        match document {
            Ok(document) => {
                self.take_document(document);
                if let Some(file) = file {
                    self.used(&file);
                }
            }
            Err(findings) => self.not_opened(&file.unwrap_or_default(), findings),
        }
    }

    /// Another circuit in place of this one.
    pub(super) fn take_document(&mut self, document: Document) {
        self.dialog = None;
        self.document = document;
        self.new_document();
        self.fields.clear();
        self.view = TraceView::default();
        self.drawing.stop();
        self.evidence = None;
        self.failure = None;
        self.notice.clear();
        self.request(Quality::Final);
    }

    /// Writes a drawing at the cursor, in the colours of the window.
    fn export(&mut self, export: Export, path: &Path) {
        let circuit = match &self.answer {
            Some(answer) => Ok(answer.solved.circuit.clone()),
            None => self.document.scenario().circuit(),
        };
        let circuit = match circuit {
            Ok(circuit) => circuit,
            Err(findings) => {
                let findings: Vec<_> = findings.iter().map(ToString::to_string).collect();
                let title = "The circuit cannot be drawn";
                self.dialog = Some(Dialog::problem(title, findings.join("\n")));
                return;
            }
        };
        let trace = self.answer.as_ref().map(|answer| &answer.solved.run.trace);
        let moment = trace.and_then(|trace| Moment::of(trace, self.view.cursor));
        let options = DrawingOptions {
            units: self.settings.units,
            values: self.drawing.shows_values(),
            ..DrawingOptions::default()
        };
        let name = &self.document.scenario().name;
        let shown = (&circuit, moment.as_ref());
        let svg = drawing::svg(export, name, shown, options, &self.look.theme);
        match save_atomically(path, &svg) {
            Ok(()) => {
                self.dialog = None;
                self.notice = format!("Wrote {}", path.display());
            }
            Err(error) => {
                self.dialog = Some(Dialog::problem("The drawing was not written", error));
            }
        }
    }

    fn open_evidence(&mut self, id: CheckId) {
        self.evidence = Some(id);
        let check = self.checks().iter().find(|check| check.id == id);
        let time = check.and_then(|check| check.evidence.as_ref()?.time);
        if let (Some(time), Some(whole)) = (time, self.figure.time_range()) {
            self.view.jump(time, whole);
        }
    }
}
