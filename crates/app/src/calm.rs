//! Keeps the window from blinking: what comes and goes within a moment is not shown at all.

use std::time::Duration;

use egui::Context;

/// Something that shows once it has lasted.
#[derive(Debug, Default)]
pub(crate) struct Lasting {
    /// When it began, s.
    since: Option<f64>,
    shows: bool,
}

impl Lasting {
    /// Takes note of whether it `holds` now; it shows from `least` s on, and asks for the frame
    /// that it begins to show in.
    pub(crate) fn follow(&mut self, context: &Context, holds: bool, least: f64) {
        let now = context.input(|input| input.time);
        self.shows = match self.left(holds, now, least) {
            Some(left) if left > 0.0 => {
                context.request_repaint_after(Duration::from_secs_f64(left));
                // What shows already goes on showing.
                self.shows
            }
            Some(_) => true,
            None => false,
        };
    }

    /// Time left until it shows, s; `None` if it does not hold.
    fn left(&mut self, holds: bool, now: f64, least: f64) -> Option<f64> {
        if !holds {
            self.since = None;
            return None;
        }
        let since = *self.since.get_or_insert(now);
        Some(least - (now - since))
    }

    /// Whether it shows.
    pub(crate) fn shows(&self) -> bool {
        self.shows
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Whether it shows in frames of 0.1 s.
    fn frames(least: f64, holds: &[bool]) -> Vec<bool> {
        let context = Context::default();
        let mut lasting = Lasting::default();
        let mut seen = Vec::new();
        for (frame, &holds) in holds.iter().enumerate() {
            let input = egui::RawInput {
                time: Some(frame as f64 * 0.1),
                ..egui::RawInput::default()
            };
            let mut output = context.run_ui(input, |ui| lasting.follow(ui.ctx(), holds, least));
            // Nothing paints here.
            output.textures_delta.clear();
            seen.push(lasting.shows());
        }
        seen
    }

    #[test]
    fn what_comes_and_goes_is_never_shown() {
        let seen = frames(0.35, &[true, true, false, true, false, true, true]);
        assert_eq!(seen, [false; 7], "never 0.35 s in one piece");
    }

    #[test]
    fn what_lasts_is_shown_until_it_ends() {
        let seen = frames(0.15, &[true, true, true, true, false, true]);
        assert_eq!(seen, [false, false, true, true, false, false], "in between");
    }

    #[test]
    fn without_a_wait_it_shows_at_once() {
        assert_eq!(frames(0.0, &[true, false]), [true, false], "at once");
    }
}
