//! Progress on a terminal, and Ctrl-C.

use std::io::IsTerminal;
use std::sync::Once;
use std::sync::atomic::{AtomicBool, Ordering};
use std::time::Duration;

use helmsplit_sim::Watch;
use helmsplit_study::{MapNews, MapWatch, Progress, StudyWatch};
use indicatif::{ProgressBar, ProgressDrawTarget, ProgressStyle};

use crate::output::say;

/// Parts of a second that the bar counts in.
const TICKS: f64 = 1000.0;

/// Set by Ctrl-C. One flag for the whole program: a handler can be installed once only, and a
/// command that runs first and maps then must stop in either.
static CANCEL: AtomicBool = AtomicBool::new(false);

/// The flag that Ctrl-C sets.
fn cancel_flag() -> &'static AtomicBool {
    static INSTALLED: Once = Once::new();
    INSTALLED.call_once(|| {
        let handler = ctrlc::set_handler(|| CANCEL.store(true, Ordering::Relaxed));
        if let Err(error) = handler {
            say(&format!(
                "warning: Ctrl-C ends the program at once: {error}"
            ));
        }
    });
    &CANCEL
}

/// Calls `work` with a watch that shows progress over `duration` (s) where standard error is a
/// terminal, and that stops on Ctrl-C.
pub(crate) fn watched<T>(duration: f64, work: impl FnOnce(&mut Watch<'_>) -> T) -> T {
    let cancel = cancel_flag();
    let bar = bar(duration);
    let mut report = |time: f64| bar.set_position((time * TICKS).max(0.0) as u64);
    let mut watch = Watch::none().with_cancel(cancel).with_progress(&mut report);
    let result = work(&mut watch);
    bar.finish_and_clear();
    result
}

/// Calls `work` with a watch of a map that shows progress where standard error is a terminal, and
/// that stops on Ctrl-C.
pub(crate) fn watched_map<T>(work: impl FnOnce(MapWatch<'_>) -> T) -> T {
    let cancel = cancel_flag();
    let bar = bar(1.0);
    let hear = |news: &MapNews<'_>| {
        let share = news.done as f64 / news.total.max(1) as f64;
        bar.set_position((share * TICKS) as u64);
    };
    let watch = MapWatch::none().with_cancel(cancel).with_news(&hear);
    let result = work(watch);
    bar.finish_and_clear();
    result
}

/// Calls `work` with a watch that counts the runs of a study where standard error is a terminal,
/// and that stops on Ctrl-C.
pub(crate) fn studied<T>(work: impl FnOnce(&StudyWatch<'_>) -> T) -> T {
    let cancel = cancel_flag();
    let bar = if std::io::stderr().is_terminal() {
        ProgressBar::with_draw_target(None, ProgressDrawTarget::stderr_with_hz(10))
    } else {
        ProgressBar::hidden()
    };
    let style = ProgressStyle::with_template("{msg} {bar:40} {pos} of {len} runs  {elapsed}")
        .unwrap_or_else(|_template| ProgressStyle::default_bar());
    bar.set_style(style);
    let report = |progress: Progress| {
        bar.set_message(progress.stage);
        bar.set_length(progress.total as u64);
        bar.set_position(progress.done as u64);
    };
    let watch = StudyWatch::none()
        .with_cancel(cancel)
        .with_progress(&report);
    let result = work(&watch);
    bar.finish_and_clear();
    result
}

fn bar(duration: f64) -> ProgressBar {
    if !std::io::stderr().is_terminal() {
        return ProgressBar::hidden();
    }
    let bar = ProgressBar::with_draw_target(
        Some((duration * TICKS) as u64),
        ProgressDrawTarget::stderr_with_hz(10),
    );
    let style = ProgressStyle::with_template("solving {bar:40} {percent} %  {elapsed}")
        .unwrap_or_else(|_template| ProgressStyle::default_bar());
    bar.set_style(style);
    bar.enable_steady_tick(Duration::from_millis(200));
    bar
}
