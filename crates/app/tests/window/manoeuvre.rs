//! The manoeuvre: strip, tables, templates, keys.

use egui::{Key, Modifiers, Pos2, Vec2, vec2};
use egui_kittest::kittest::Queryable;
use helmsplit_app::Appearance;
use helmsplit_model::Input;

use crate::rig::Rig;

/// The free breakpoints of a line as one text.
pub(crate) fn points(rig: &Rig, input: Input) -> String {
    rig.app().document().scenario().manoeuvre.free_text(input)
}

pub(crate) fn undo_name(rig: &Rig) -> String {
    let name = rig.app().document().undo_name();
    name.map_or_else(|| "nothing to undo".to_owned(), str::to_owned)
}

/// The middle of the one control whose name begins so.
pub(crate) fn middle(rig: &Rig, beginning: &str) -> Pos2 {
    let wanted = beginning.to_owned();
    let begins = move |label: Option<String>| label.is_some_and(|l| l.starts_with(&wanted));
    let node = rig.harness.get_by(move |node| begins(node.label()));
    node.rect().center()
}

pub(crate) fn has(rig: &Rig, beginning: &str) -> bool {
    let wanted = beginning.to_owned();
    let begins = move |label: Option<String>| label.is_some_and(|l| l.starts_with(&wanted));
    rig.harness
        .query_all_by(move |node| begins(node.label()))
        .next()
        .is_some()
}

fn focus(rig: &mut Rig, beginning: &str) {
    let wanted = beginning.to_owned();
    let begins = move |label: Option<String>| label.is_some_and(|l| l.starts_with(&wanted));
    rig.harness.get_by(move |node| begins(node.label())).focus();
    rig.settle();
}

fn press(rig: &mut Rig, key: Key) {
    rig.harness.key_press(key);
    rig.settle();
}

/// Clicks a control of a card, which may have to be scrolled to.
pub(crate) fn tap(rig: &mut Rig, label: &str) {
    rig.harness.get_by_label(label).scroll_to_me();
    rig.settle();
    rig.click(label);
}

/// Drags from one place in steps; the button stays down.
pub(crate) fn drag(rig: &mut Rig, from: Pos2, way: Vec2) {
    rig.harness.hover_at(from);
    rig.settle();
    rig.harness.drag_at(from);
    rig.settle();
    for share in [0.3, 0.7, 1.0] {
        rig.harness.hover_at(from + way * share);
        rig.settle();
    }
}

pub(crate) fn drop_at(rig: &mut Rig, at: Pos2) {
    rig.harness.drop_at(at);
    rig.settle();
}

fn click_at(rig: &mut Rig, at: Pos2) {
    rig.harness.hover_at(at);
    rig.harness.drag_at(at);
    rig.harness.drop_at(at);
    rig.harness.run_steps(2);
}

fn double_click(rig: &mut Rig, at: Pos2) {
    click_at(rig, at);
    click_at(rig, at);
    rig.settle();
}

/// Where a moment lies on the traces.
fn moment(rig: &Rig, time: f64) -> f32 {
    let traces = rig.harness.get_by_label("Traces over time").rect();
    let duration = rig.app().document().scenario().solver().duration;
    traces.left() + traces.width() * (time / duration) as f32
}

pub(crate) fn on_engine_speed() -> Rig {
    let mut rig = Rig::new();
    rig.click_beginning("Edit engine speed");
    rig
}

#[test]
fn points_stand_at_their_moment_on_the_traces() {
    let mut rig = on_engine_speed();
    for (point, time) in [
        ("point 1 of 5", 0.0),
        ("point 3 of 5", 2.0),
        ("point 5 of 5", 7.5),
    ] {
        let at = middle(&rig, &format!("engine speed, {point}"));
        let expected = moment(&rig, time);
        assert!(
            (at.x - expected).abs() < 0.05,
            "{point}: {} for {expected}",
            at.x
        );
    }
    // The zoom is shared, too.
    rig.click("Zoom in");
    rig.settle();
    assert!(has(&rig, "engine speed, point 3 of 5"), "2 s is in view");
    assert!(!has(&rig, "engine speed, point 5 of 5"), "7.5 s is not");
}

#[test]
fn dragging_a_point_is_solved_live_and_is_one_named_step() {
    let mut rig = on_engine_speed();
    let before = rig.fingerprint();
    let at = middle(&rig, "engine speed, point 3 of 5, 2 s, 2400 rpm");
    let way = vec2(moment(&rig, 3.0) - moment(&rig, 2.0), 12.0);
    drag(&mut rig, at, way);
    let text = points(&rig, Input::EngineSpeed);
    assert!(text.contains(" 3 s: "), "a second later: {text}");
    assert_eq!(undo_name(&rig), "nothing to undo", "while dragging");
    assert!(rig.app().document().in_gesture(), "a gesture");
    drop_at(&mut rig, at + way);
    rig.solve();
    let name = undo_name(&rig);
    assert!(
        name.starts_with("engine speed, point 3: 2 s, 2400 rpm to 3 s, "),
        "{name}"
    );
    assert_ne!(rig.fingerprint(), before, "other traces");
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::Z);
    rig.solve();
    assert!(!rig.app().document().is_edited(), "all of it is taken back");
}

#[test]
fn a_point_is_held_by_its_neighbour_and_by_what_is_allowed() {
    let mut rig = on_engine_speed();
    let at = middle(&rig, "engine speed, point 2 of 5");
    let way = vec2(moment(&rig, 5.0) - moment(&rig, 1.0), 300.0);
    drag(&mut rig, at, way);
    drop_at(&mut rig, at + way);
    rig.solve();
    let text = points(&rig, Input::EngineSpeed);
    assert!(
        text.starts_with("0 s: 900 rpm, 2 s: 0 rpm, 2 s: 2400 rpm"),
        "{text}"
    );
    // Two points at one time are a jump, and said to be one.
    assert!(
        has(&rig, "engine speed, point 2 of 5, jump from, 2 s, 0 rpm"),
        "from"
    );
    assert!(
        has(&rig, "engine speed, point 3 of 5, jump to, 2 s, 2400 rpm"),
        "to"
    );
}

#[test]
fn a_double_click_adds_a_point_and_delete_takes_it_out() {
    let mut rig = on_engine_speed();
    let point = middle(&rig, "engine speed, point 4 of 5");
    let at = Pos2::new(moment(&rig, 5.0), point.y + 30.0);
    double_click(&mut rig, at);
    rig.solve();
    let text = points(&rig, Input::EngineSpeed);
    assert!(text.contains(" 5 s: "), "{text}");
    let name = undo_name(&rig);
    assert!(
        name.starts_with("engine speed, point 4 added: 5 s, "),
        "{name}"
    );
    // It has the focus.
    press(&mut rig, Key::Delete);
    rig.solve();
    let name = undo_name(&rig);
    assert!(
        name.starts_with("engine speed, point 4 removed: 5 s, "),
        "{name}"
    );
    assert!(!rig.app().document().is_edited(), "as before");
}

#[test]
fn a_template_writes_its_own_stretch_until_it_is_turned_into_breakpoints() {
    let mut rig = Rig::new();
    assert!(
        has(
            &rig,
            "steering wheel rate, template 1 of 3: Wheel step, 3 s to 4.05 s"
        ),
        "its bar"
    );
    let bar = middle(&rig, "steering wheel rate, template 1 of 3");
    let at = Pos2::new(moment(&rig, 3.5), bar.y + 40.0);
    double_click(&mut rig, at);
    assert!(
        rig.says("\"wheel step\" writes this line from 3 s to 4.05 s"),
        "said"
    );
    assert!(!rig.app().document().is_edited(), "nothing was added");
    // Its bar moves as a whole, up to what is ahead of it.
    let way = vec2(moment(&rig, 2.0) - moment(&rig, 3.0), 0.0);
    drag(&mut rig, bar, way);
    drop_at(&mut rig, bar + way);
    rig.solve();
    assert_eq!(
        undo_name(&rig),
        "wheel step, starts at: 3 s to 2 s",
        "one step"
    );
    let before = rig.app().document().scenario().manoeuvre.profiles();
    rig.click("Numbers");
    tap(&mut rig, "Turn into breakpoints: wheel step at 2 s");
    rig.solve();
    let scenario = rig.app().document().scenario();
    assert_eq!(scenario.manoeuvre.templates.len(), 2, "two are left");
    assert_eq!(scenario.manoeuvre.profiles(), before, "the same manoeuvre");
    assert_eq!(
        undo_name(&rig),
        "wheel step at 2 s turned into breakpoints",
        "named"
    );
    assert!(
        has(&rig, "steering wheel rate, point 2 of 4, 2.05 s, 90 rpm"),
        "to drag"
    );
}

#[test]
fn a_line_is_edited_by_keys_alone() {
    let mut rig = on_engine_speed();
    focus(&mut rig, "engine speed, point 4 of 5");
    press(&mut rig, Key::ArrowRight);
    press(&mut rig, Key::ArrowDown);
    rig.solve();
    let text = points(&rig, Input::EngineSpeed);
    assert!(!text.contains("7 s: 2400 rpm"), "both have moved: {text}");
    let name = undo_name(&rig);
    assert!(
        name.starts_with("engine speed, point 4: 7 s, 2400 rpm to 7."),
        "{name}"
    );
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::Z);
    rig.solve();
    assert!(!rig.app().document().is_edited(), "one step for both keys");
    // The focus stays where it was: a jump, and the new point has the focus.
    focus(&mut rig, "engine speed, point 2 of 5");
    press(&mut rig, Key::J);
    let text = points(&rig, Input::EngineSpeed);
    assert!(text.contains("1 s: 900 rpm, 1 s: 2400 rpm"), "{text}");
    // A jump moves as one.
    press(&mut rig, Key::ArrowRight);
    rig.solve();
    let lines = &rig.app().document().scenario().manoeuvre;
    let times: Vec<f64> = lines.free(Input::EngineSpeed)[1..3]
        .iter()
        .map(|point| point.time.si())
        .collect();
    assert!(times[0] > 1.0, "later: {times:?}");
    assert!((times[0] - times[1]).abs() <= 0.0, "both: {times:?}");
    press(&mut rig, Key::Insert);
    assert!(
        has(&rig, "engine speed, point 4 of 7"),
        "between the jump and the next"
    );
    press(&mut rig, Key::Delete);
    press(&mut rig, Key::Delete);
    rig.solve();
    assert!(has(&rig, "engine speed, point 5 of 5"), "two are out");
}

#[test]
fn a_resting_line_begins_from_its_level() {
    let mut rig = Rig::new();
    rig.click_beginning("Edit external force");
    let at = middle(&rig, "Line of external force");
    let at = Pos2::new(moment(&rig, 2.0), at.y - 20.0);
    double_click(&mut rig, at);
    rig.solve();
    let text = points(&rig, Input::ExternalForce);
    assert!(text.starts_with("0 s: 0 N, 2 s: "), "{text}");
    let name = undo_name(&rig);
    assert!(
        name.starts_with("external force, point 2 added: 2 s, "),
        "{name}"
    );
}

#[test]
fn the_strip_folds_and_comes_back() {
    let mut rig = Rig::new();
    let traces = |rig: &Rig| rig.harness.get_by_label("Traces over time").rect();
    let before = traces(&rig);
    rig.click("Fold the manoeuvre");
    rig.settle();
    assert!(!has(&rig, "Line of"), "folded");
    rig.click("Show the manoeuvre");
    rig.settle();
    assert!(has(&rig, "Line of steering wheel rate"), "back");
    assert_eq!(traces(&rig), before, "as high as before");
}

/// Writes the strip and its cards as PNG into the folder named by `HELMSPLIT_SHOTS`.
#[test]
#[ignore = "writes pictures to look at"]
fn pictures_of_the_manoeuvre() {
    let Ok(folder) = std::env::var("HELMSPLIT_SHOTS") else {
        panic!("name a folder in HELMSPLIT_SHOTS");
    };
    for (size, dimensions) in [("small", [1280.0, 720.0]), ("large", [1920.0, 1080.0])] {
        for (name, appearance) in [("light", Appearance::Light), ("dark", Appearance::Dark)] {
            let mut rig = Rig::with(dimensions, appearance, "orchard carrier");
            let shoot = |rig: &mut Rig, page: &str| {
                let picture = rig.harness.render().expect("a picture");
                let path = format!("{folder}/manoeuvre-{page}-{size}-{name}.png");
                picture.save(&path).expect("written");
            };
            rig.click("Numbers");
            shoot(&mut rig, "wheel");
            rig.click_beginning("Edit engine speed");
            let at = middle(&rig, "engine speed, point 2 of 5");
            let way = vec2(moment(&rig, 5.0) - moment(&rig, 1.0), 12.0);
            drag(&mut rig, at, way);
            shoot(&mut rig, "drag");
            drop_at(&mut rig, at + way);
            rig.enter("engine speed, point 3, value", "90 bar");
            rig.solve();
            shoot(&mut rig, "table");
            rig.click("Add template");
            shoot(&mut rig, "menu");
        }
    }
}
