//! A user's way through the window, written down as mouse and key events, so that `tests/window`
//! can walk it in a real window too: the controls of the same page at the same size stand at the
//! same places.

use std::fmt::Write as _;

use egui::accesskit::Role;
use egui::{Event, Key, Modifiers, PointerButton, Pos2, Vec2};
use egui_kittest::kittest::Queryable;

use crate::rig::Rig;

/// Size of the window on the way, points and pixels.
const SIZE: [f32; 2] = [1280.0, 720.0];

/// A way through the window: each step is done here and written down.
struct Journey {
    rig: Rig,
    events: String,
}

impl Journey {
    fn new() -> Self {
        let mut journey = Self {
            rig: Rig::at_first(SIZE),
            events: String::new(),
        };
        journey.note("wait 2");
        journey
    }

    fn note(&mut self, line: &str) {
        writeln!(self.events, "{line}").expect("text takes any line");
    }

    /// The events so far, one a line.
    fn events(&self) -> &str {
        &self.events
    }

    /// Says what the next steps are for.
    fn say(&mut self, what: &str) {
        self.note(&format!("say {what}"));
    }

    /// Middle of the one control whose name begins so; labels do not count.
    fn middle(&self, beginning: &str) -> Pos2 {
        let wanted = beginning.to_owned();
        let node = self.rig.harness.get_by(move |node| {
            node.role() != Role::Label
                && node.label().is_some_and(|label| label.starts_with(&wanted))
        });
        node.rect().center()
    }

    fn press(&mut self, at: Pos2, pressed: bool) {
        self.rig.harness.event(Event::PointerButton {
            pos: at,
            button: PointerButton::Primary,
            pressed,
            modifiers: Modifiers::NONE,
        });
    }

    /// Clicks the control whose name begins so.
    fn click(&mut self, beginning: &str) {
        let at = self.middle(beginning);
        self.note(&format!("click {:.0} {:.0}", at.x, at.y));
        self.rig.harness.hover_at(at);
        self.rig.settle();
        self.press(at, true);
        self.rig.harness.step();
        self.press(at, false);
        self.rig.settle();
    }

    /// Drags the name of a field.
    fn drag_name(&mut self, name: &str, by: Vec2) {
        let node = self.rig.harness.get_by_role_and_label(Role::Label, name);
        let from = node.rect().left_center() + Vec2::new(20.0, 0.0);
        self.note(&format!(
            "drag {:.0} {:.0} {:.0} {:.0}",
            from.x,
            from.y,
            from.x + by.x,
            from.y + by.y
        ));
        self.rig.harness.hover_at(from);
        self.rig.settle();
        self.press(from, true);
        self.rig.harness.step();
        for part in 1..=10_u8 {
            let at = from + by * (f32::from(part) / 10.0);
            self.rig.harness.hover_at(at);
            self.rig.harness.step();
        }
        self.press(from + by, false);
        self.rig.settle();
        self.solve();
    }

    /// Waits for words on the screen.
    fn expect(&mut self, text: &str) {
        assert!(self.rig.says(text), "nobody says {text}");
    }

    /// Types into what has the focus.
    fn text(&mut self, text: &str) {
        self.note(&format!("type {text}"));
        self.rig.harness.event(Event::Text(text.to_owned()));
        self.rig.settle();
    }

    /// Types the path of a file; the real window has a folder of its own.
    fn path(&mut self, folder: &str, name: &str) {
        self.note(&format!("type @FOLDER@/{name}"));
        self.rig
            .harness
            .event(Event::Text(format!("{folder}/{name}")));
        self.rig.settle();
    }

    /// Holds a file to its content.
    fn holds(&mut self, folder: &str, name: &str, text: &str) {
        self.note("wait 0.5");
        self.note(&format!("holds {name} {text}"));
        let path = std::path::Path::new(folder).join(name);
        let content = std::fs::read_to_string(&path).expect("the file is there");
        assert!(content.contains(text), "{name} does not hold {text}");
    }

    /// Presses a key; `name` is what the display server calls it, such as `ctrl+z`.
    fn key(&mut self, name: &str, modifiers: Modifiers, key: Key) {
        self.note(&format!("key {name}"));
        self.rig.harness.key_press_modifiers(modifiers, key);
        self.rig.settle();
    }

    /// Waits for the solver.
    fn solve(&mut self) {
        self.note("wait 1.5");
        self.rig.solve();
    }

    /// Takes a picture of the real window.
    fn shot(&mut self, name: &str) {
        self.note("wait 0.5");
        self.note(&format!("shot {name}"));
    }
}

/// Looks, opens a verdict, keeps the run, makes the spool hunt, takes it back, drags a name.
fn look_and_try(way: &mut Journey) {
    way.say("the orchard carrier is open and solved");
    way.shot("response-light");

    way.say("a verdict opens its evidence");
    way.click("overshoot ");
    way.expect("Evidence: overshoot");
    way.shot("evidence-light");
    way.click("Close");

    way.say("the run is kept");
    way.key("ctrl+k", Modifiers::COMMAND, Key::K);
    way.key("ctrl+a", Modifiers::COMMAND, Key::A);
    way.text("as drawn");
    way.key("Return", Modifiers::NONE, Key::Enter);
    way.expect("as drawn");

    way.say("a wide disc hole makes the spool hunt");
    way.key("ctrl+f", Modifiers::COMMAND, Key::F);
    way.text("disc hole");
    way.key("Return", Modifiers::NONE, Key::Enter);
    way.text("1.5 mm");
    way.key("Return", Modifiers::NONE, Key::Enter);
    way.solve();
    assert_eq!(way.rig.text_of("valve.disc_hole_diameter"), "1.5 mm", "set");
    way.shot("hunting-light");

    way.say("undo");
    way.key("ctrl+z", Modifiers::COMMAND, Key::Z);
    way.solve();
    assert!(!way.rig.app().document().is_edited(), "as it was");

    way.say("a name is dragged, and it is taken back");
    way.drag_name("Disc hole diameter", Vec2::new(60.0, 0.0));
    assert!(way.rig.app().document().is_edited(), "changed by dragging");
    way.key("ctrl+z", Modifiers::COMMAND, Key::Z);
    way.solve();
}

/// Someone who knows hydraulics and not this program: looks, opens a verdict, keeps the run, makes
/// the spool hunt, takes it back, sets an orifice, saves, exports, goes to the dark side, leaves.
#[test]
fn a_first_user_finds_the_way() {
    let folder = tempfile::tempdir().expect("a folder");
    let place = folder.path().to_str().expect("plain text").to_owned();
    let mut way = Journey::new();
    look_and_try(&mut way);

    way.say("an orifice is set and the circuit saved");
    way.key("ctrl+f", Modifiers::COMMAND, Key::F);
    way.text("fixed orifice diameter");
    way.key("Return", Modifiers::NONE, Key::Enter);
    way.text("3.5 mm");
    way.key("Return", Modifiers::NONE, Key::Enter);
    way.solve();
    way.key(
        "ctrl+shift+s",
        Modifiers::COMMAND | Modifiers::SHIFT,
        Key::S,
    );
    way.key("ctrl+a", Modifiers::COMMAND, Key::A);
    way.path(&place, "mine.circuit.ron");
    way.key("Return", Modifiers::NONE, Key::Enter);
    way.holds(&place, "mine.circuit.ron", "3.5 mm");

    way.say("the traces go to a file");
    way.click("File");
    way.click("Export");
    way.click("Traces as SVG");
    way.click("Choose the file");
    way.key("ctrl+a", Modifiers::COMMAND, Key::A);
    way.path(&place, "traces.svg");
    way.key("Return", Modifiers::NONE, Key::Enter);
    way.holds(&place, "traces.svg", "</svg>");

    way.say("dark");
    way.click("View");
    way.click("Dark");
    way.shot("response-dark");
    way.click("overshoot ");
    way.shot("evidence-dark");
    way.click("Close");
    way.click("Valve in section");
    way.shot("section-dark");

    way.key("ctrl+q", Modifiers::COMMAND, Key::Q);
    way.note("ended");
    if let Ok(file) = std::env::var("HELMSPLIT_JOURNEY") {
        std::fs::write(&file, way.events()).expect("the events are written");
    }
}
