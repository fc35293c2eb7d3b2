//! The line at the foot: what the last solve cost and how far it can be trusted.

use egui::{RichText, Ui};
use helmsplit_view::plot::number_text;

use crate::action::Action;
use crate::document::Document;
use crate::look::{Look, SMALL};
use crate::text::{on_screen, real_minus};
use crate::worker::{Answer, Quality};

/// What the line shows.
pub(crate) struct StatusLine<'a> {
    pub(crate) answer: Option<&'a Answer>,
    /// Time reached by a solve that runs, and the end of the run, s.
    pub(crate) progress: Option<(f64, f64)>,
    pub(crate) document: &'a Document,
    /// The kept run that is compared with.
    pub(crate) compared: Option<&'a str>,
    pub(crate) notice: &'a str,
    pub(crate) look: &'a Look,
}

/// Draws the line.
pub(crate) fn status_line(ui: &mut Ui, status: &StatusLine<'_>, actions: &mut Vec<Action>) {
    let look = status.look;
    let small = |text: String| RichText::new(text).size(SMALL).color(look.quiet());
    ui.horizontal(|ui| {
        ui.spacing_mut().item_spacing.x = 14.0;
        if let Some((time, end)) = status.progress {
            ui.label(small(format!("Solving: {time:.1} of {end:.1} s")));
            if ui.small_button("Cancel the solve").clicked() {
                actions.push(Action::Cancel);
            }
        } else if let Some(answer) = status.answer {
            ui.label(small(solved(answer)));
        }
        if let Some(audit) = status
            .answer
            .and_then(|answer| answer.solved.run.audit.as_ref())
        {
            let share = |relative: f64| real_minus(&format!("{relative:.1e}"));
            ui.label(small(format!(
                "Volume audit {}",
                share(audit.volume.relative)
            )));
            ui.label(small(format!(
                "Energy audit {}",
                share(audit.energy.relative)
            )));
        }
        if let Some(name) = status.compared {
            ui.label(small(format!("Compared with \"{name}\"")));
        }
        ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
            let state = if status.document.is_edited() {
                "Edited, not saved"
            } else if status.document.path().is_some() {
                "Saved"
            } else {
                "As the preset"
            };
            ui.label(small(state.to_owned()));
            if !status.notice.is_empty() {
                ui.label(RichText::new(status.notice).size(SMALL).color(look.ink()));
            }
        });
    });
}

fn solved(answer: &Answer) -> String {
    let steps = number_text(answer.solved.run.statistics.steps as f64, 0);
    let draft = match answer.quality {
        Quality::Draft => ", draft",
        Quality::Final => "",
    };
    let milliseconds = answer.took.as_secs_f64() * 1e3;
    on_screen(&format!(
        "Solved in {} ms, {steps} steps{draft}",
        real_minus(&format!("{milliseconds:.0}"))
    ))
}
