//! Solving beside the window: one thread, the newest job wins.
//!
//! A job waits in a slot of one place, so a newer one replaces it. A draft that is running is let
//! finish, for otherwise a long drag would never show anything; a job for a finished value cancels
//! whatever runs.

use std::panic::{AssertUnwindSafe, catch_unwind};
use std::path::PathBuf;
use std::sync::atomic::{AtomicBool, AtomicU64, Ordering};
use std::sync::mpsc::{Receiver, Sender, channel};
use std::sync::{Arc, Condvar, Mutex, MutexGuard, PoisonError};
use std::thread::JoinHandle;
use std::time::{Duration, Instant};

use helmsplit_scenario::{Scenario, UnitSystem};
use helmsplit_study::Solved;
use helmsplit_view::figures::solved_figure;
use helmsplit_view::plot::Figure;

use crate::solver::{Refusal, Solver};

/// How well to solve.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Quality {
    /// Relative tolerance 1e-5, for a value that is being dragged.
    Draft,
    /// What the circuit asks for; 1e-6 if it asks for nothing.
    Final,
}

/// What to solve.
#[derive(Debug, Clone)]
pub struct Job {
    /// Revision of the document.
    pub revision: u64,
    /// The circuit.
    pub scenario: Scenario,
    /// Folder that the name of a saved state is relative to.
    pub folder: Option<PathBuf>,
    /// How well.
    pub quality: Quality,
    /// Units of the figure.
    pub units: UnitSystem,
}

/// A solved job.
#[derive(Debug)]
pub struct Answer {
    /// Revision of the document that it answers.
    pub revision: u64,
    /// The circuit that was solved.
    pub scenario: Scenario,
    /// How well.
    pub quality: Quality,
    /// The run and its verdicts.
    pub solved: Solved,
    /// Its figure.
    pub figure: Figure,
    /// Units of the figure.
    pub units: UnitSystem,
    /// From job to answer, without waiting in the slot.
    pub took: Duration,
}

/// Why a job has no answer.
#[derive(Debug, Clone, PartialEq)]
pub struct Failure {
    /// Revision of the document.
    pub revision: u64,
    /// The reason, in a sentence.
    pub reason: String,
}

/// The end of a job. What was cancelled by a newer job is not reported.
type News = Result<Answer, Failure>;

/// The slot that window and thread share.
#[derive(Default)]
struct Slot {
    waiting: Option<Job>,
    running: Option<(Quality, Arc<AtomicBool>)>,
    quit: bool,
}

struct Shared {
    slot: Mutex<Slot>,
    wake: Condvar,
    /// Time the running job has reached, s, as bits.
    progress: AtomicU64,
}

impl Shared {
    /// The slot holds no half-made state, so a panic elsewhere does not spoil it.
    fn slot(&self) -> MutexGuard<'_, Slot> {
        self.slot.lock().unwrap_or_else(PoisonError::into_inner)
    }
}

/// The solving thread.
pub struct Worker {
    shared: Arc<Shared>,
    news: Receiver<News>,
    thread: Option<JoinHandle<()>>,
}

impl Worker {
    /// Starts the thread. `wake_window` is called from it whenever there is something to show.
    ///
    /// # Errors
    /// What the system said if it has no thread to give.
    pub fn start(wake_window: impl Fn() + Send + 'static) -> std::io::Result<Self> {
        let shared = Arc::new(Shared {
            slot: Mutex::default(),
            wake: Condvar::new(),
            progress: AtomicU64::new(0),
        });
        let (sender, news) = channel();
        let theirs = Arc::clone(&shared);
        let thread = std::thread::Builder::new()
            .name("solver".to_owned())
            .spawn(move || work(&theirs, &sender, &wake_window))?;
        Ok(Self {
            shared,
            news,
            thread: Some(thread),
        })
    }

    /// Hands a job over; it replaces one that waits.
    pub fn submit(&self, job: Job) {
        let mut slot = self.shared.slot();
        if let Some((running, cancel)) = &slot.running {
            let both_drafts = *running == Quality::Draft && job.quality == Quality::Draft;
            if !both_drafts {
                cancel.store(true, Ordering::Relaxed);
            }
        }
        slot.waiting = Some(job);
        self.shared.wake.notify_one();
    }

    /// Stops what runs and what waits.
    pub fn cancel(&self) {
        let mut slot = self.shared.slot();
        slot.waiting = None;
        if let Some((_, cancel)) = &slot.running {
            cancel.store(true, Ordering::Relaxed);
        }
    }

    /// Whether a job runs or waits.
    #[must_use]
    pub fn is_busy(&self) -> bool {
        let slot = self.shared.slot();
        slot.waiting.is_some() || slot.running.is_some()
    }

    /// The time that the running job has reached, s.
    #[must_use]
    pub fn progress(&self) -> f64 {
        f64::from_bits(self.shared.progress.load(Ordering::Relaxed))
    }

    /// The next end of a job, if there is one.
    #[must_use]
    pub fn news(&self) -> Option<News> {
        self.news.try_recv().ok()
    }
}

impl Drop for Worker {
    fn drop(&mut self) {
        self.cancel();
        self.shared.slot().quit = true;
        self.shared.wake.notify_one();
        if let Some(thread) = self.thread.take() {
            // A thread that panicked has nothing left to say.
            let _ = thread.join();
        }
    }
}

fn work(shared: &Shared, sender: &Sender<News>, wake_window: &impl Fn()) {
    let mut solver = Solver::default();
    while let Some((job, cancel)) = next_job(shared) {
        let report = || wake_window();
        let news = answer(&mut solver, &job, &cancel, &shared.progress, &report);
        shared.slot().running = None;
        // A window that is gone wants no news.
        if let Some(news) = news
            && sender.send(news).is_err()
        {
            return;
        }
        wake_window();
    }
}

/// Waits for a job; `None` when the window closes.
fn next_job(shared: &Shared) -> Option<(Job, Arc<AtomicBool>)> {
    let mut slot = shared.slot();
    loop {
        if slot.quit {
            return None;
        }
        if let Some(job) = slot.waiting.take() {
            let cancel = Arc::new(AtomicBool::new(false));
            slot.running = Some((job.quality, Arc::clone(&cancel)));
            shared.progress.store(0, Ordering::Relaxed);
            return Some((job, cancel));
        }
        let woken = shared.wake.wait(slot);
        slot = woken.unwrap_or_else(PoisonError::into_inner);
    }
}

/// The end of one job; `None` if it was cancelled.
fn answer(
    solver: &mut Solver,
    job: &Job,
    cancel: &AtomicBool,
    progress: &AtomicU64,
    wake_window: &dyn Fn(),
) -> Option<News> {
    let begun = Instant::now();
    let mut shown = begun;
    let mut report = |time: f64| {
        progress.store(time.to_bits(), Ordering::Relaxed);
        if shown.elapsed() > Duration::from_millis(100) {
            shown = Instant::now();
            wake_window();
        }
    };
    let mut solve = || solver.solve(job, cancel, &mut report);
    let failure = |reason: String| {
        let revision = job.revision;
        Some(Err(Failure { revision, reason }))
    };
    match catch_unwind(AssertUnwindSafe(&mut solve)) {
        Ok(Ok(solved)) => Some(Ok(Answer {
            revision: job.revision,
            figure: solved_figure(&job.scenario, &solved, job.units),
            scenario: job.scenario.clone(),
            quality: job.quality,
            solved,
            units: job.units,
            took: begun.elapsed(),
        })),
        Ok(Err(Refusal::Cancelled)) => None,
        Ok(Err(Refusal::Because(reason))) => failure(reason),
        Err(_) => failure(
            "The solver stopped at a fault of its own; please report the circuit.".to_owned(),
        ),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::PRESETS;

    fn job(revision: u64, quality: Quality) -> Job {
        Job {
            revision,
            scenario: PRESETS[0].scenario().unwrap(),
            folder: None,
            quality,
            units: UnitSystem::Metric,
        }
    }

    fn wait(worker: &Worker) -> News {
        for _ in 0..6000 {
            if let Some(news) = worker.news() {
                return news;
            }
            std::thread::sleep(Duration::from_millis(10));
        }
        panic!("no news in a minute");
    }

    #[test]
    fn the_newest_final_job_wins() {
        let worker = Worker::start(|| ()).unwrap();
        for revision in 1..=5 {
            worker.submit(job(revision, Quality::Final));
        }
        let answer = wait(&worker).unwrap();
        assert_eq!(answer.revision, 5, "older ones were dropped or cancelled");
        assert!(!answer.figure.panels.is_empty(), "with its figure");
        assert!(!worker.is_busy(), "nothing left to do");
        assert!(worker.news().is_none(), "one answer");
    }

    #[test]
    fn a_second_solve_starts_from_the_settled_state_of_the_first() {
        let worker = Worker::start(|| ()).unwrap();
        let settled = |revision, quality| {
            let mut job = job(revision, quality);
            job.scenario.set("start.kind", "settled").unwrap();
            job
        };
        worker.submit(settled(1, Quality::Draft));
        let first = wait(&worker).unwrap();
        worker.submit(settled(2, Quality::Final));
        let second = wait(&worker).unwrap();
        let waited = |answer: &Answer| {
            let settled = answer.solved.run.settled.as_ref();
            settled.map(|settled| settled.waited)
        };
        assert!(waited(&first).unwrap() > 0.0, "it had to settle");
        assert_eq!(waited(&second), Some(0.0), "no waiting the second time");
        let steps = |answer: &Answer| answer.solved.run.statistics.steps;
        assert!(
            steps(&first) < steps(&second),
            "a draft takes fewer steps: {} against {}",
            steps(&first),
            steps(&second)
        );
    }

    #[test]
    fn what_cannot_be_solved_says_why() {
        let worker = Worker::start(|| ()).unwrap();
        let mut job = job(7, Quality::Final);
        job.scenario
            .set("start.kind", "from state")
            .expect("a kind of start");
        job.scenario.start_state = Some("nowhere.json".to_owned());
        worker.submit(job);
        let failure = wait(&worker).unwrap_err();
        assert_eq!(failure.revision, 7, "of this job");
        assert!(failure.reason.contains("nowhere.json"), "{failure:?}");
    }
}
