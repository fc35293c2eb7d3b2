//! Progress on a terminal, and Ctrl-C.

use std::io::IsTerminal;
use std::sync::Arc;
use std::sync::atomic::{AtomicBool, Ordering};
use std::time::Duration;

use helmsplit_sim::Watch;
use indicatif::{ProgressBar, ProgressDrawTarget, ProgressStyle};

use crate::output::say;

/// Parts of a second that the bar counts in.
const TICKS: f64 = 1000.0;

/// Calls `work` with a watch that shows progress over `duration` (s) where standard error is a
/// terminal, and that stops on Ctrl-C.
pub(crate) fn watched<T>(duration: f64, work: impl FnOnce(&mut Watch<'_>) -> T) -> T {
    let cancel = Arc::new(AtomicBool::new(false));
    let flag = Arc::clone(&cancel);
    let handler = ctrlc::set_handler(move || flag.store(true, Ordering::Relaxed));
    if let Err(error) = handler {
        say(&format!(
            "warning: Ctrl-C ends the program at once: {error}"
        ));
    }
    let bar = bar(duration);
    let mut report = |time: f64| bar.set_position((time * TICKS).max(0.0) as u64);
    let mut watch = Watch::none()
        .with_cancel(&cancel)
        .with_progress(&mut report);
    let result = work(&mut watch);
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
