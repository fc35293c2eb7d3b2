//! A window to test.

use std::time::{Duration, Instant};

use egui::accesskit::Role;
use egui::{Key, Modifiers, Rect};
use egui_kittest::Harness;
use egui_kittest::kittest::{NodeT, Queryable};
use helmsplit_app::{Appearance, Document, FirstSteps, HelmsplitApp, Home, Kept, Settings};
use helmsplit_scenario::presets::{PRESETS, Preset};
use helmsplit_scenario::{ParameterId, UnitSystem};

use crate::cpu_renderer::CpuRenderer;
use crate::seen::{SeenNode, nodes};

/// A solve that takes longer than this on any machine is stuck.
const PATIENCE: Duration = Duration::from_secs(120);

pub(crate) struct Rig {
    pub(crate) harness: Harness<'static, HelmsplitApp>,
}

impl Rig {
    /// The orchard carrier, solved, in a usual window.
    pub(crate) fn new() -> Self {
        Self::with([1280.0, 800.0], Appearance::Light, "orchard carrier")
    }

    pub(crate) fn with(size: [f32; 2], appearance: Appearance, preset: &str) -> Self {
        Self::scaled(size, 100, appearance, preset)
    }

    /// A window of `size` (px) in which everything is drawn at `scale` (per cent).
    pub(crate) fn scaled(size: [f32; 2], scale: u16, appearance: Appearance, preset: &str) -> Self {
        let preset = Preset::from_key(preset).expect("a preset of that name");
        let document = Document::from_preset(&preset).expect("presets read");
        let settings = Settings {
            appearance,
            units: UnitSystem::Metric,
            scale,
            first_steps: FirstSteps::over(),
        };
        // The harness counts in points, whatever the scale.
        let points = egui::Vec2::from(size) * 100.0 / f32::from(scale);
        Self::of(points.into(), |context| {
            HelmsplitApp::with_settings(context, document, settings).expect("a window")
        })
    }

    /// The orchard carrier, solved, as a new user sees it.
    pub(crate) fn at_first(size: [f32; 2]) -> Self {
        let document = Document::from_preset(&PRESETS[0]).expect("presets read");
        Self::of(size, |context| {
            HelmsplitApp::with_settings(context, document, Settings::default()).expect("a window")
        })
    }

    /// A usual window on a circuit, solved.
    pub(crate) fn on(document: Document) -> Self {
        Self::of([1280.0, 800.0], |context| {
            HelmsplitApp::with_settings(context, document, Settings::default()).expect("a window")
        })
    }

    /// A usual window on a circuit, solved, that keeps its things at `home`.
    pub(crate) fn at(home: &Home, document: Document) -> Self {
        let home = home.clone();
        let (kept, notice) = Kept::read_or_put_aside(&home.settings_file());
        Self::of([1280.0, 800.0], |context| {
            HelmsplitApp::at_home(context, document, Some(home), kept, notice).expect("a window")
        })
    }

    fn of(size: [f32; 2], make: impl FnOnce(&egui::Context) -> HelmsplitApp) -> Self {
        let harness = Harness::builder()
            .with_size(size)
            .with_step_dt(1.0 / 60.0)
            .renderer(CpuRenderer::default())
            .build_eframe(move |creation| make(&creation.egui_ctx));
        let mut rig = Self { harness };
        rig.harness.set_size(size.into());
        rig.solve();
        rig
    }

    /// Closes the window in order, as the system does.
    pub(crate) fn close(mut self) {
        self.harness.state_mut().closed();
    }

    /// Waits until something on the screen says so.
    pub(crate) fn wait_for(&mut self, text: &str) {
        let begun = Instant::now();
        while !self.says(text) {
            assert!(begun.elapsed() < PATIENCE, "nobody says {text}");
            std::thread::sleep(Duration::from_millis(20));
            self.harness.step();
        }
        self.settle();
    }

    pub(crate) fn app(&self) -> &HelmsplitApp {
        self.harness.state()
    }

    /// Waits until the present circuit is solved at full accuracy.
    pub(crate) fn solve(&mut self) {
        let begun = Instant::now();
        loop {
            self.harness.step();
            if self.app().is_up_to_date() && !self.app().document().in_gesture() {
                break;
            }
            assert!(
                begun.elapsed() < PATIENCE,
                "not solved: {:?}",
                self.app().failure()
            );
            std::thread::sleep(Duration::from_millis(2));
        }
        self.settle();
    }

    /// A few frames more, for what opens and closes.
    pub(crate) fn settle(&mut self) {
        self.harness.run_steps(4);
    }

    pub(crate) fn click(&mut self, label: &str) {
        self.harness.get_by_label(label).click();
        self.settle();
    }

    /// Opens a menu and clicks an entry that begins with `entry`.
    pub(crate) fn menu(&mut self, menu: &str, entry: &str) {
        self.click(menu);
        self.click_beginning(entry);
    }

    /// Clicks the one control whose name begins so.
    pub(crate) fn click_beginning(&mut self, beginning: &str) {
        let wanted = beginning.to_owned();
        self.harness
            .get_by(move |node| {
                node.role() != Role::Label
                    && node.label().is_some_and(|label| label.starts_with(&wanted))
            })
            .click();
        self.settle();
    }

    /// Types a value into the field of a parameter and presses Enter.
    pub(crate) fn enter(&mut self, label: &str, text: &str) {
        self.harness
            .get_by_role_and_label(Role::TextInput, label)
            .focus();
        self.settle();
        self.harness.key_press_modifiers(Modifiers::COMMAND, Key::A);
        self.settle();
        self.harness
            .get_by_role_and_label(Role::TextInput, label)
            .type_text(text);
        self.settle();
        self.harness.key_press(Key::Enter);
        self.settle();
    }

    /// Presses a key and lets it act.
    pub(crate) fn press(&mut self, modifiers: Modifiers, key: Key) {
        self.harness.key_press_modifiers(modifiers, key);
        self.settle();
    }

    /// Keeps the present run under a name.
    pub(crate) fn keep(&mut self, name: &str) {
        self.press(Modifiers::COMMAND, Key::K);
        self.enter("Name of the run", name);
    }

    /// The names of the kept runs.
    pub(crate) fn kept(&self) -> Vec<&str> {
        self.app()
            .kept()
            .runs()
            .iter()
            .map(|run| run.name())
            .collect()
    }

    /// Clicks at a share (0 to 1) of the width of the traces.
    pub(crate) fn click_trace(&mut self, share: f32, modifiers: Modifiers) {
        let area = self.harness.get_by_label("Traces over time").rect();
        let at = egui::pos2(area.left() + share * area.width(), area.center().y);
        self.harness.hover_at(at);
        self.settle();
        for pressed in [true, false] {
            let event = egui::Event::PointerButton {
                pos: at,
                button: egui::PointerButton::Primary,
                pressed,
                modifiers,
            };
            self.harness.event_modifiers(event, modifiers);
        }
        self.settle();
    }

    /// Steps until something is put on the clipboard; gives it.
    pub(crate) fn copied(&mut self) -> String {
        for _ in 0..6 {
            self.harness.step();
            let commands = &self.harness.output().platform_output.commands;
            let text = commands.iter().find_map(|command| match command {
                egui::OutputCommand::CopyText(text) => Some(text.clone()),
                _ => None,
            });
            if let Some(text) = text {
                return text;
            }
        }
        panic!("nothing was copied");
    }

    /// Opens the finder and types into it.
    pub(crate) fn open_finder(&mut self, text: &str) {
        self.harness.key_press_modifiers(Modifiers::COMMAND, Key::F);
        self.settle();
        self.harness.event(egui::Event::Text(text.to_owned()));
        self.settle();
    }

    /// Goes to the best match of a text.
    pub(crate) fn find(&mut self, text: &str) {
        self.open_finder(text);
        self.harness.key_press(Key::Enter);
        self.settle();
    }

    /// What has the focus.
    pub(crate) fn focused(&self) -> Option<SeenNode> {
        let focused = self.harness.query_by(|node| node.is_focused())?;
        let seen = nodes(self).into_iter();
        let rect = focused.rect();
        seen.filter(|node| node.interactive)
            .find(|node| node.role == focused.accesskit_node().role() && node.rect == rect)
    }

    /// The window, points.
    pub(crate) fn window(&self) -> Rect {
        self.harness.ctx.content_rect()
    }

    /// The value of a parameter as the circuit file writes it.
    pub(crate) fn text_of(&self, path: &str) -> String {
        let id = ParameterId::from_path(path).expect("a parameter");
        self.app().document().scenario().value(id).text()
    }

    /// Whether the name or value of something on the screen holds the text.
    pub(crate) fn says(&self, text: &str) -> bool {
        let text = text.to_owned();
        let holds = move |found: Option<String>| found.is_some_and(|found| found.contains(&text));
        self.harness
            .query_all_by(move |node| holds(node.label()) || holds(node.value()))
            .next()
            .is_some()
    }

    /// Some value of each line at one moment, to tell runs apart.
    pub(crate) fn fingerprint(&self) -> Vec<f64> {
        let panels = self.app().figure().panels.iter();
        let series = panels.flat_map(|panel| &panel.series);
        series
            .map(|series| series.points.iter().map(|point| point[1]).sum::<f64>())
            .collect()
    }
}
