//! The app: owns the circuit, the solver and what is in view; everything else draws and asks.

mod acting;
mod bars;
mod calming;
mod draft;
mod filing;
mod leading;
mod safety;

use std::sync::Arc;
use std::time::Duration;

use egui::{Context, Ui, ViewportCommand};
use helmsplit_model::Circuit;
use helmsplit_scenario::Severity;
use helmsplit_study::{Check, CheckId};
use helmsplit_view::figures::solved_figure;
use helmsplit_view::plot::Figure;

use crate::action::Action;
use crate::calm::Lasting;
use crate::dialogs::{Dialog, dialog};
use crate::document::Document;
use crate::drawing::{Drawable, DrawingState};
use crate::error::AppError;
use crate::files::{DiskNews, Files, Home, Kept, WindowPlace};
use crate::look::Look;
use crate::menu;
use crate::parts::{PARTS, Part};
use crate::quantity_field::{FieldContext, FieldStates};
use crate::response_page::{Page, response_page};
use crate::ribbon::ribbon;
use crate::settings::{Appearance, Settings};
use crate::status::{StatusLine, status_line};
use crate::traces::{Shown, TraceView};
use crate::worker::{Answer, Failure, Job, Quality, Worker};

/// Stepping a value counts as finished after this pause, s.
const PAUSE: f64 = 0.4;

/// The window.
pub struct HelmsplitApp {
    document: Document,
    worker: Worker,
    answer: Option<Arc<Answer>>,
    figure: Figure,
    /// Counts up with each figure.
    generation: u64,
    failure: Option<Failure>,
    /// The failure, as far as it is shown.
    trouble: Lasting,
    /// The solve that runs, as far as it is shown.
    solving: Lasting,
    requested: Option<(u64, Quality)>,
    last_edit: f64,
    settings: Settings,
    look: Look,
    view: TraceView,
    drawing: DrawingState,
    /// The circuit of a revision, drawn while there is no run; `None` if it cannot be made.
    draft: Option<(u64, Option<Circuit>)>,
    fields: FieldStates,
    selected: Part,
    evidence: Option<CheckId>,
    dialog: Option<Dialog>,
    notice: String,
    leaving: bool,
    context: Context,
    files: Files,
    /// The settings as they were kept last.
    settings_kept: Settings,
    /// What to do once the circuit is saved.
    after_save: Option<Action>,
    title: String,
    place: WindowPlace,
    /// What another program did to the file.
    disk_news: Option<DiskNews>,
}

impl HelmsplitApp {
    /// A window on a circuit that keeps nothing: no settings, no list of files. The solving begins
    /// at once.
    ///
    /// # Errors
    /// [`AppError`] if a theme does not read or the system has no thread for the solver.
    pub fn with_settings(
        context: &Context,
        document: Document,
        settings: Settings,
    ) -> Result<Self, AppError> {
        let kept = Kept {
            settings,
            ..Kept::default()
        };
        Self::at_home(context, document, None, kept, None)
    }

    /// A window on a circuit with what was kept at `home`; `notice` is shown first. The solving
    /// begins at once.
    ///
    /// # Errors
    /// [`AppError`] if a theme does not read or the system has no thread for the solver.
    pub fn at_home(
        context: &Context,
        document: Document,
        home: Option<Home>,
        kept: Kept,
        notice: Option<String>,
    ) -> Result<Self, AppError> {
        let settings = kept.settings;
        let place = kept.window;
        let (news, wake_for_files) = (context.clone(), context.clone());
        let wake = move || news.request_repaint();
        let (files, problems) = Files::new(home, kept, move || wake_for_files.request_repaint());
        let notices: Vec<_> = notice.into_iter().chain(problems).collect();
        let mut app = Self {
            document,
            worker: Worker::start(wake)?,
            answer: None,
            figure: Figure::default(),
            generation: 0,
            failure: None,
            trouble: Lasting::default(),
            solving: Lasting::default(),
            requested: None,
            last_edit: 0.0,
            settings,
            look: Look::load(false)?,
            view: TraceView::default(),
            drawing: DrawingState::default(),
            draft: None,
            fields: FieldStates::default(),
            selected: PARTS[3],
            evidence: None,
            dialog: None,
            notice: notices.join("; "),
            leaving: false,
            context: context.clone(),
            place,
            files,
            disk_news: None,
            settings_kept: settings,
            after_save: None,
            title: String::new(),
        };
        app.restore_layout(context);
        app.look.apply(context);
        app.follow_settings(context);
        if let Some(path) = app.document.path().map(std::path::Path::to_owned) {
            app.used(&path);
        }
        app.show_offers();
        app.request(Quality::Final);
        Ok(app)
    }

    /// The circuit being edited.
    #[must_use]
    pub fn document(&self) -> &Document {
        &self.document
    }

    /// The title of the window.
    #[must_use]
    pub fn title(&self) -> &str {
        &self.title
    }

    /// What the user prefers.
    #[must_use]
    pub fn settings(&self) -> &Settings {
        &self.settings
    }

    /// The last good result.
    #[must_use]
    pub fn answer(&self) -> Option<&Answer> {
        self.answer.as_deref()
    }

    /// Whether the last good result is that of the present circuit, at full accuracy.
    #[must_use]
    pub fn is_up_to_date(&self) -> bool {
        let fits = |answer: &Arc<Answer>| {
            answer.revision == self.document.revision() && answer.quality == Quality::Final
        };
        self.answer.as_ref().is_some_and(fits) && !self.worker.is_busy()
    }

    /// Why the present circuit has no result, if that is so.
    #[must_use]
    pub fn failure(&self) -> Option<&Failure> {
        self.failure.as_ref()
    }

    /// The moment of the cursor, s.
    #[must_use]
    pub fn cursor(&self) -> f64 {
        self.view.cursor
    }

    /// The figure being shown.
    #[must_use]
    pub fn figure(&self) -> &Figure {
        &self.figure
    }

    fn checks(&self) -> &[Check] {
        self.answer
            .as_ref()
            .map_or(&[], |answer| &answer.solved.checks)
    }

    /// Hands the present circuit to the solver, unless it is known not to be one.
    fn request(&mut self, quality: Quality) {
        let revision = self.document.revision();
        self.requested = Some((revision, quality));
        let errors: Vec<String> = self
            .document
            .findings()
            .iter()
            .filter(|finding| finding.severity == Severity::Error)
            .map(ToString::to_string)
            .collect();
        if !errors.is_empty() {
            self.worker.cancel();
            let reason = format!(
                "Not solved, the traces are of the last good values. {}",
                errors.join("\n")
            );
            self.failure = Some(Failure { revision, reason });
            return;
        }
        self.worker.submit(Job {
            revision,
            scenario: self.document.scenario().clone(),
            folder: self.document.folder(),
            quality,
            units: self.settings.units,
        });
    }

    fn take_news(&mut self) {
        while let Some(news) = self.worker.news() {
            match news {
                Ok(answer) => {
                    self.failure = None;
                    self.figure = if answer.units == self.settings.units {
                        answer.figure.clone()
                    } else {
                        solved_figure(&answer.scenario, &answer.solved, self.settings.units)
                    };
                    self.generation += 1;
                    self.answer = Some(Arc::new(answer));
                }
                Err(failure) => self.failure = Some(failure),
            }
        }
    }

    /// Asks for what the present circuit still lacks: a draft in a gesture, all of it after.
    fn follow_document(&mut self, context: &Context) {
        let revision = self.document.revision();
        let quality = if self.document.in_gesture() {
            Quality::Draft
        } else {
            Quality::Final
        };
        let wanted = (revision, quality);
        let better = (revision, Quality::Final);
        if self.requested != Some(wanted) && self.requested != Some(better) {
            self.request(quality);
        }
        if self.document.in_gesture() && !context.input(|input| input.pointer.any_down()) {
            let left = PAUSE - (context.input(|input| input.time) - self.last_edit);
            if left <= 0.0 {
                self.document.finish_gesture();
                context.request_repaint();
            } else {
                context.request_repaint_after(Duration::from_secs_f64(left));
            }
        }
    }

    fn follow_settings(&mut self, context: &Context) {
        let dark = match self.settings.appearance {
            Appearance::Light => false,
            Appearance::Dark => true,
            Appearance::System => context
                .system_theme()
                .is_some_and(|theme| theme == egui::Theme::Dark),
        };
        if dark != self.look.is_dark() {
            match Look::load(dark) {
                Ok(look) => {
                    self.look = look;
                    self.look.apply(context);
                }
                Err(error) => self.dialog = Some(Dialog::problem("The theme", error)),
            }
        }
        let zoom = f32::from(self.settings.scale) / 100.0;
        if (context.zoom_factor() - zoom).abs() > 1e-3 {
            context.set_zoom_factor(zoom);
        }
    }

    fn guard_closing(&mut self, context: &Context) {
        let closing = context.input(|input| input.viewport().close_requested());
        if closing && !self.leaving && self.document.is_edited() {
            context.send_viewport_cmd(ViewportCommand::CancelClose);
            let next = Box::new(Action::Quit);
            self.dialog = Some(Dialog::Unsaved { next });
        }
    }

    fn draw(&mut self, ui: &mut Ui, actions: &mut Vec<Action>) {
        self.make_draft();
        let answer = self.answer.clone();
        let checks: &[Check] = answer.as_ref().map_or(&[], |answer| &answer.solved.checks);
        let solving = self.solving.shows();
        let end = self.document.scenario().solver().duration;
        let failure = self.failure.as_ref().filter(|_| self.trouble.shows());
        let stale = failure.is_some();
        self.menu_bar(ui, actions);
        self.disk_bar(ui, actions);
        egui::Panel::top("verdicts").show(ui, |ui| {
            let units = self.settings.units;
            ribbon(ui, checks, self.evidence, units, &self.look, actions);
        });
        self.hints_bar(ui, actions);
        egui::Panel::bottom("status").show(ui, |ui| {
            let status = StatusLine {
                answer: answer.as_deref(),
                progress: solving.then(|| (self.worker.progress(), end)),
                document: &self.document,
                notice: &self.notice,
                look: &self.look,
            };
            status_line(ui, &status, actions);
        });
        let solved = answer.as_ref().map(|answer| &answer.solved);
        let page = Page {
            drawn: Drawable::new(self.generation, solved, self.draft.as_ref()),
            fields: FieldContext {
                scenario: self.document.scenario(),
                findings: self.document.findings(),
                units: self.settings.units,
                look: &self.look,
            },
            selected: self.selected,
            evidence: self.evidence,
            checks,
            shown: answer.as_ref().map(|_| Shown {
                figure: &self.figure,
                generation: self.generation,
                pale: stale,
                look: &self.look,
            }),
            trouble: failure.map(|failure| failure.reason.as_str()),
        };
        let views = (&mut self.view, &mut self.drawing);
        response_page(ui, &page, &mut self.fields, views, actions);
        if let Some(open) = &mut self.dialog {
            dialog(ui.ctx(), open, &self.look, actions);
        }
    }

    /// Shows one frame. Whoever draws the window calls this for each; `ui` is the whole of it.
    pub fn show(&mut self, ui: &mut Ui) {
        let context = ui.ctx().clone();
        self.take_news();
        self.follow_settings(&context);
        self.guard_closing(&context);
        self.calm(&context);
        let mut actions = Vec::new();
        self.follow_files(&context, &mut actions);
        if self.dialog.is_none() {
            menu::shortcuts(&context, &self.document, &mut actions);
        }
        self.draw(ui, &mut actions);
        let acted = !actions.is_empty();
        for action in actions {
            self.act(&context, action);
        }
        self.keep_settings();
        self.follow_safety();
        self.follow_document(&context);
        if acted {
            context.request_repaint();
        }
    }
}
