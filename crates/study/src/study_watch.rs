//! Watching a study of many runs from outside: cancel it, hear how far it is.

use std::sync::atomic::{AtomicBool, AtomicUsize, Ordering};

use helmsplit_sim::Watch;
use rayon::prelude::*;

use crate::map::MapWatch;

/// How far a study is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Progress {
    /// What it does now, in a few words.
    pub stage: &'static str,
    /// Runs done of this stage.
    pub done: usize,
    /// Runs of this stage; a search that ends by itself names the most it may take.
    pub total: usize,
}

/// Cancel flag and progress report of a study; the default has neither. Runs of a study go on in
/// parallel, so the report is called from several threads.
#[derive(Clone, Copy, Default)]
pub struct StudyWatch<'a> {
    cancel: Option<&'a AtomicBool>,
    progress: Option<&'a (dyn Fn(Progress) + Sync)>,
}

impl<'a> StudyWatch<'a> {
    /// Nobody watches.
    #[must_use]
    pub fn none() -> Self {
        Self::default()
    }

    /// The study stops soon after `flag` becomes true, within a step of each run.
    #[must_use]
    pub fn with_cancel(mut self, flag: &'a AtomicBool) -> Self {
        self.cancel = Some(flag);
        self
    }

    /// `report` hears of each run that is done.
    #[must_use]
    pub fn with_progress(mut self, report: &'a (dyn Fn(Progress) + Sync)) -> Self {
        self.progress = Some(report);
        self
    }

    /// Whether the study shall stop.
    #[must_use]
    pub fn is_cancelled(&self) -> bool {
        self.cancel.is_some_and(|flag| flag.load(Ordering::Relaxed))
    }

    /// A watch for one run of the study.
    pub(crate) fn run_watch(&self) -> Watch<'a> {
        match self.cancel {
            Some(flag) => Watch::none().with_cancel(flag),
            None => Watch::none(),
        }
    }

    /// A watch for maps inside the study.
    pub(crate) fn map_watch(&self) -> MapWatch<'a> {
        match self.cancel {
            Some(flag) => MapWatch::none().with_cancel(flag),
            None => MapWatch::none(),
        }
    }

    /// Reports that `done` of `total` runs of a stage are done.
    pub(crate) fn report(&self, stage: &'static str, done: usize, total: usize) {
        if let Some(report) = self.progress {
            report(Progress { stage, done, total });
        }
    }

    /// Does `work` on every item in parallel, in the order of the items; each item that is done
    /// is reported. Items after a cancellation still reach `work`, whose runs then end at once.
    pub(crate) fn each<T: Sync, R: Send>(
        &self,
        stage: &'static str,
        items: &[T],
        work: impl Fn(&T) -> R + Sync,
    ) -> Vec<R> {
        let done = AtomicUsize::new(0);
        self.report(stage, 0, items.len());
        items
            .par_iter()
            .map(|item| {
                let result = work(item);
                let count = done.fetch_add(1, Ordering::Relaxed) + 1;
                self.report(stage, count, items.len());
                result
            })
            .collect()
    }
}

#[cfg(test)]
mod tests {
    use std::sync::Mutex;

    use super::*;

    #[test]
    fn results_keep_their_order_and_every_item_is_reported() {
        let heard = Mutex::new(Vec::new());
        let report = |progress: Progress| heard.lock().unwrap().push(progress.done);
        let watch = StudyWatch::none().with_progress(&report);
        let items: Vec<u32> = (0..100).collect();
        let squares = watch.each("squares", &items, |n| n * n);
        assert_eq!(squares[9], 81, "in order");
        let mut heard = heard.into_inner().unwrap();
        heard.sort_unstable();
        assert_eq!(heard, (0..=100).collect::<Vec<_>>(), "each once");
    }

    #[test]
    fn the_flag_is_seen() {
        let flag = AtomicBool::new(false);
        let watch = StudyWatch::none().with_cancel(&flag);
        assert!(!watch.is_cancelled(), "not yet");
        flag.store(true, Ordering::Relaxed);
        assert!(watch.is_cancelled(), "now");
    }
}
