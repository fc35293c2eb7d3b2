//! A guard against runs that do not get on.

use crate::ending::GiveUp;
use crate::options::SolverOptions;

/// Ends runs that only crawl: a finite but hopeless run is worse than a message.
pub(crate) struct CrawlGuard {
    max_steps: usize,
    window: usize,
    least_advance: f64,
    window_start: f64,
    next_look: usize,
}

impl CrawlGuard {
    /// Starts to watch at `time` (s).
    pub(crate) fn new(options: &SolverOptions, time: f64) -> Self {
        Self {
            max_steps: options.max_steps,
            window: options.crawl_steps,
            least_advance: options.crawl_advance,
            window_start: time,
            next_look: options.crawl_steps,
        }
    }

    /// Looks after each step, with `steps` taken so far and `time` (s) reached.
    pub(crate) fn check(&mut self, steps: usize, time: f64) -> Option<GiveUp> {
        if steps >= self.max_steps {
            return Some(GiveUp::TooManySteps { steps });
        }
        if steps < self.next_look {
            return None;
        }
        let advance = time - self.window_start;
        if advance < self.least_advance {
            return Some(GiveUp::Crawl {
                steps: self.window,
                advance,
            });
        }
        self.window_start = time;
        self.next_look = steps + self.window;
        None
    }
}
