//! Watching a run from outside: cancel it, hear how far it is.

use std::sync::atomic::{AtomicBool, Ordering};

/// A run looks here after each step, and reports each this many steps.
const STEPS_PER_REPORT: usize = 64;

/// Cancel flag and progress report of a run; the default has neither.
#[derive(Default)]
pub struct Watch<'a> {
    cancel: Option<&'a AtomicBool>,
    progress: Option<&'a mut dyn FnMut(f64)>,
    steps: usize,
}

impl<'a> Watch<'a> {
    /// Nobody watches.
    #[must_use]
    pub fn none() -> Self {
        Self::default()
    }

    /// The run stops soon after `flag` becomes true.
    #[must_use]
    pub fn with_cancel(mut self, flag: &'a AtomicBool) -> Self {
        self.cancel = Some(flag);
        self
    }

    /// `report` hears the time reached (s) every few steps.
    #[must_use]
    pub fn with_progress(mut self, report: &'a mut dyn FnMut(f64)) -> Self {
        self.progress = Some(report);
        self
    }

    /// Reports the time reached and says whether the run shall stop.
    pub(crate) fn cancelled_at(&mut self, time: f64) -> bool {
        self.steps += 1;
        if self.steps.is_multiple_of(STEPS_PER_REPORT)
            && let Some(report) = self.progress.as_mut()
        {
            report(time);
        }
        self.cancel.is_some_and(|flag| flag.load(Ordering::Relaxed))
    }
}
