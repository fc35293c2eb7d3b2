//! Plays the run: the cursor moves by itself, slower than real time if wanted.

use std::time::Duration;

use egui::{Button, Context, Key, Modifiers, RichText, Slider, Ui, WidgetInfo};
use helmsplit_view::plot::number_text;

use crate::look::{Look, SMALL};
use crate::text::on_screen;
use crate::traces::TraceView;

/// Time between two pictures, s: enough for the eye, and half the work of every frame of a screen.
const FRAME: f64 = 1.0 / 30.0;

/// After a longer pause, such as a window that was hidden, the cursor does not jump, s.
const LONGEST: f64 = 0.25;

/// One step, as a share of the time in view.
const STEP: f64 = 1.0 / 400.0;

/// With Shift, so many steps at once.
const STRIDE: f64 = 20.0;

/// Speeds to choose from: run time per second, and its name.
const SPEEDS: [(f64, &str); 7] = [
    (1.0, "real time"),
    (0.5, "1/2 speed"),
    (0.2, "1/5 speed"),
    (0.1, "1/10 speed"),
    (0.05, "1/20 speed"),
    (0.01, "1/100 speed"),
    (0.001, "1/1000 speed"),
];

/// Whether the run is played, and how fast.
#[derive(Debug, Default)]
pub(crate) struct Player {
    /// When the cursor was last moved, by the clock of the window, s; `None` while it rests.
    playing_since: Option<f64>,
    /// Place among the speeds; real time at first.
    speed: usize,
}

/// What the run is and how it is looked at.
pub(super) struct Run<'a> {
    /// First and last time, s.
    pub(super) whole: (f64, f64),
    pub(super) view: &'a mut TraceView,
}

impl Run<'_> {
    /// Moves the cursor by so many steps.
    pub(super) fn step(&mut self, steps: f64) {
        let (from, to) = self.view.range(self.whole);
        let time = self.view.cursor + steps * STEP * (to - from);
        self.view.jump(time, self.whole);
    }

    fn is_at_end(&self) -> bool {
        self.view.cursor >= self.whole.1 - 1e-9
    }
}

impl Player {
    /// Whether the run is played.
    pub(crate) fn is_playing(&self) -> bool {
        self.playing_since.is_some()
    }

    /// Stops.
    pub(crate) fn stop(&mut self) {
        self.playing_since = None;
    }

    /// Plays or stops; at the end of the run it begins again.
    pub(super) fn toggle(&mut self, now: f64, run: &mut Run<'_>) {
        if self.is_playing() {
            self.stop();
            return;
        }
        if run.is_at_end() {
            run.view.jump(run.whole.0, run.whole);
        }
        self.playing_since = Some(now);
    }

    /// Moves the cursor on while the run is played, and asks for the next picture. Gives the time
    /// that passed on the clock, s.
    pub(super) fn advance(&mut self, context: &Context, run: &mut Run<'_>) -> f64 {
        let Some(last) = self.playing_since else {
            return 0.0;
        };
        let now = context.input(|input| input.time);
        let passed = (now - last).clamp(0.0, LONGEST);
        let time = run.view.cursor + passed * SPEEDS[self.speed].0;
        run.view.jump(time, run.whole);
        if run.is_at_end() {
            self.stop();
            // One picture more, with everything at rest.
            context.request_repaint();
        } else {
            self.playing_since = Some(now);
            context.request_repaint_after(Duration::from_secs_f64(FRAME));
        }
        passed
    }

    /// Takes the keys of the drawing and of the traces: Space plays and stops. Arrows step where
    /// `steps` says so.
    pub(super) fn keys(&mut self, ui: &Ui, steps: bool, run: &mut Run<'_>) {
        let pressed = |modifiers, key| ui.input_mut(|input| input.consume_key(modifiers, key));
        if pressed(Modifiers::NONE, Key::Space) {
            let now = ui.input(|input| input.time);
            self.toggle(now, run);
        }
        if !steps {
            return;
        }
        for (modifiers, key, by) in [
            (Modifiers::SHIFT, Key::ArrowLeft, -STRIDE),
            (Modifiers::SHIFT, Key::ArrowRight, STRIDE),
            (Modifiers::NONE, Key::ArrowLeft, -1.0),
            (Modifiers::NONE, Key::ArrowRight, 1.0),
        ] {
            if pressed(modifiers, key) {
                run.step(by);
            }
        }
        if pressed(Modifiers::NONE, Key::Home) {
            run.view.jump(run.whole.0, run.whole);
        }
        if pressed(Modifiers::NONE, Key::End) {
            run.view.jump(run.whole.1, run.whole);
        }
    }

    /// Draws the row of controls.
    pub(super) fn row(&mut self, ui: &mut Ui, look: &Look, run: &mut Run<'_>) {
        ui.horizontal(|ui| {
            ui.spacing_mut().item_spacing.x = 4.0;
            let word = if self.is_playing() { "Pause" } else { "Play" };
            let wide = egui::vec2(50.0, ui.spacing().interact_size.y);
            let hint = "Space, while the drawing or the traces have the focus";
            if ui
                .add(Button::new(word).min_size(wide))
                .on_hover_text(hint)
                .clicked()
            {
                let now = ui.input(|input| input.time);
                self.toggle(now, run);
            }
            for (word, by) in [("Step back", -1.0), ("Step on", 1.0)] {
                let hint = "Left and right arrow; with Shift, twenty steps";
                if ui.button(word).on_hover_text(hint).clicked() {
                    self.stop();
                    run.step(by);
                }
            }
            let text = format!("{} s", on_screen(&number_text(run.view.cursor, 4)));
            ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
                let chosen = SPEEDS[self.speed].1;
                ui.menu_button(chosen, |ui| {
                    for (index, (_, name)) in SPEEDS.iter().enumerate() {
                        if ui.radio(self.speed == index, *name).clicked() {
                            self.speed = index;
                            ui.close();
                        }
                    }
                });
                // As wide as any time, so that the slider keeps its length.
                let size = egui::vec2(62.0, ui.spacing().interact_size.y);
                ui.add_sized(
                    size,
                    egui::Label::new(RichText::new(text).size(SMALL).color(look.ink())),
                );
                self.slider(ui, run);
            });
        });
    }

    fn slider(&mut self, ui: &mut Ui, run: &mut Run<'_>) {
        ui.spacing_mut().slider_width = (ui.available_width() - 8.0).max(40.0);
        let mut time = run.view.cursor;
        let slider = Slider::new(&mut time, run.whole.0..=run.whole.1)
            .show_value(false)
            .smart_aim(false);
        let response = ui.add(slider);
        response.widget_info(|| WidgetInfo::slider(true, run.view.cursor, "Time of the cursor, s"));
        if response.changed() {
            self.stop();
            run.view.jump(time, run.whole);
        }
    }
}
