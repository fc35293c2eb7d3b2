//! Cursors, readings, events, and which panels are shown.

use egui::accesskit::Role;
use egui::{Key, Modifiers};
use egui_kittest::kittest::Queryable;

use crate::rig::Rig;

/// The panels whose readings are on the screen, from the top.
fn panels(rig: &Rig) -> Vec<String> {
    let figure = rig.app().figure();
    let mut found: Vec<(f32, String)> = figure
        .panels
        .iter()
        .filter_map(|panel| Some((names_of(rig, &panel.label)?.top(), panel.label.clone())))
        .collect();
    found.sort_by(|a, b| a.0.total_cmp(&b.0));
    found.into_iter().map(|(_, label)| label).collect()
}

/// Where the names and values of a panel stand.
fn names_of(rig: &Rig, panel: &str) -> Option<egui::Rect> {
    let begins = format!("{panel}, ");
    let node = rig.harness.query_by(move |node| {
        node.value()
            .is_some_and(|text| text.starts_with(&begins) && text.contains("; "))
    })?;
    Some(node.rect())
}

#[test]
fn a_click_puts_cursor_a_and_shift_click_cursor_b() {
    let mut rig = Rig::new();
    let (from, to) = rig.app().figure().time_range().expect("a run");
    rig.click_trace(0.25, Modifiers::NONE);
    let quarter = from + 0.25 * (to - from);
    assert!(
        (rig.app().cursor() - quarter).abs() < 0.01 * (to - from),
        "A at a quarter"
    );
    assert_eq!(rig.app().second_cursor(), None, "no B yet");
    rig.click_trace(0.75, Modifiers::SHIFT);
    let second = rig.app().second_cursor().expect("B is set");
    assert!(
        (second - quarter - 0.5 * (to - from)).abs() < 0.01 * (to - from),
        "B at three quarters"
    );
    assert!(
        (rig.app().cursor() - quarter).abs() < 0.01 * (to - from),
        "A stays"
    );
    assert!(rig.says(", at B "), "values at B are read");
    assert!(rig.says("cursor B at"), "and told");
}

#[test]
fn keys_move_both_cursors_and_change_them_over() {
    let mut rig = Rig::new();
    rig.click_trace(0.5, Modifiers::NONE);
    let first = rig.app().cursor();
    rig.press(Modifiers::NONE, Key::B);
    assert_eq!(rig.app().second_cursor(), Some(first), "B at A");
    for _ in 0..3 {
        rig.press(Modifiers::ALT | Modifiers::SHIFT, Key::ArrowRight);
    }
    let second = rig.app().second_cursor().expect("B is set");
    assert!(second > first, "B moved");
    assert!((rig.app().cursor() - first).abs() < 1e-12, "A did not");
    rig.press(Modifiers::NONE, Key::ArrowLeft);
    let moved = rig.app().cursor();
    assert!(moved < first, "A moved");
    rig.press(Modifiers::NONE, Key::X);
    assert!(
        (rig.app().cursor() - second).abs() < 1e-12,
        "A is where B was"
    );
    assert_eq!(rig.app().second_cursor(), Some(moved), "B is where A was");
    rig.press(Modifiers::NONE, Key::Escape);
    assert_eq!(rig.app().second_cursor(), None, "B is gone");
}

#[test]
fn the_table_shows_values_differences_and_rates() {
    let mut rig = Rig::new();
    rig.keep("as drawn");
    rig.click_trace(0.3, Modifiers::NONE);
    rig.click_trace(0.5, Modifiers::SHIFT);
    rig.press(Modifiers::NONE, Key::T);
    for head in [
        "B \u{2212} A, ",
        "(B \u{2212} A) per s",
        "(1) as drawn",
        "A \u{2212} (1)",
    ] {
        assert!(rig.says(head), "a column {head}");
    }
    assert!(rig.says("Pressure: Inlet"), "a row for each line");
    rig.click("Close the table");
    assert!(!rig.says("(B \u{2212} A) per s"), "closed");
}

#[test]
fn an_event_is_a_button_that_puts_the_cursor() {
    let mut rig = Rig::new();
    let mark = rig.app().figure().marks.first().expect("an event").clone();
    let begins = format!("Event: {}", mark.label);
    let events = rig.harness.query_all_by(move |node| {
        node.role() == Role::Button && node.label().is_some_and(|label| label.starts_with(&begins))
    });
    let first = events.min_by(|a, b| a.rect().left().total_cmp(&b.rect().left()));
    first.expect("a name over the traces").click();
    rig.settle();
    assert!((rig.app().cursor() - mark.time).abs() < 1e-9, "there");
    rig.click_trace(0.0, Modifiers::NONE);
    rig.press(Modifiers::NONE, Key::N);
    assert!(
        (rig.app().cursor() - mark.time).abs() < 1e-9,
        "the next one by key"
    );
}

#[test]
fn names_of_events_do_not_overlap() {
    let rig = Rig::new();
    let nodes = rig.harness.query_all_by(|node| {
        node.label()
            .is_some_and(|label| label.starts_with("Event: "))
    });
    let named: Vec<egui::Rect> = nodes
        .map(|node| node.rect())
        // Ticks of events without a name are narrow.
        .filter(|rect| rect.width() > 10.0)
        .collect();
    assert!(!named.is_empty(), "the orchard carrier has events");
    for (index, rect) in named.iter().enumerate() {
        for other in &named[..index] {
            let shared = rect.intersect(*other);
            assert!(
                shared.width() < 5.0 || shared.height() <= 0.5,
                "{rect:?} and {other:?}"
            );
        }
    }
}

#[test]
fn panels_are_hidden_moved_and_shown_by_keys() {
    let mut rig = Rig::new();
    let before = panels(&rig);
    assert!(before.len() > 4, "{before:?}");
    rig.click_trace(0.4, Modifiers::NONE);
    rig.press(Modifiers::NONE, Key::ArrowDown);
    rig.press(Modifiers::NONE, Key::ArrowDown);
    rig.press(Modifiers::ALT, Key::ArrowUp);
    let mut moved = before.clone();
    moved.swap(0, 1);
    assert_eq!(panels(&rig), moved, "the second goes up");
    rig.press(Modifiers::NONE, Key::H);
    assert_eq!(panels(&rig), moved[1..], "and is hidden");
    rig.press(Modifiers::SHIFT, Key::H);
    assert_eq!(panels(&rig), moved, "all again");
}

#[test]
fn the_menu_hides_panels_and_single_traces_and_moves_panels() {
    let mut rig = Rig::new();
    let before = panels(&rig);
    rig.click("Traces");
    rig.harness
        .get_by_role_and_label(Role::CheckBox, "Pressure: Inlet")
        .click();
    rig.settle();
    rig.click(&format!("Down: {}", before[0]));
    rig.harness
        .get_by_role_and_label(Role::CheckBox, "Flow")
        .click();
    rig.settle();
    rig.press(Modifiers::NONE, Key::Escape);
    let after = panels(&rig);
    assert_eq!(after[1], before[0], "moved down");
    assert!(!after.contains(&"Flow".to_owned()), "a panel is hidden");
    let pressures = |rig: &Rig| rig.says("Pressure, bar; Priority port");
    assert!(pressures(&rig), "a trace is hidden");
    rig.click("Traces");
    rig.click("Show everything");
    rig.click("Usual order");
    rig.press(Modifiers::NONE, Key::Escape);
    assert_eq!(panels(&rig), before, "as before");
    assert!(!pressures(&rig), "with every trace");
}

#[test]
fn a_panel_is_dragged_by_its_names() {
    let mut rig = Rig::new();
    let before = panels(&rig);
    let place = |rig: &Rig, label: &str| names_of(rig, label).expect("names").center();
    let (from, to) = (place(&rig, &before[0]), place(&rig, &before[3]));
    rig.harness.hover_at(from);
    rig.settle();
    rig.harness.drag_at(from);
    rig.settle();
    for step in 1..=4 {
        let at = from + (to - from) * (step as f32 / 4.0);
        rig.harness.hover_at(at);
        rig.settle();
    }
    rig.harness.drop_at(to);
    rig.settle();
    assert_eq!(panels(&rig)[3], before[0], "dropped there");
}

#[test]
fn value_axes_follow_the_zoom_or_stay() {
    let mut rig = Rig::new();
    rig.click_trace(0.1, Modifiers::NONE);
    for _ in 0..6 {
        rig.press(Modifiers::NONE, Key::Plus);
    }
    let following = rig.harness.render().expect("a picture");
    rig.press(Modifiers::NONE, Key::Y);
    let fixed = rig.harness.render().expect("a picture");
    let differ = following
        .pixels()
        .zip(fixed.pixels())
        .filter(|(a, b)| a != b)
        .count();
    assert!(differ > 200, "{differ} pixels differ");
}

#[test]
fn an_idle_window_asks_for_no_frame() {
    let mut rig = Rig::new();
    rig.keep("as drawn");
    rig.click_trace(0.5, Modifiers::NONE);
    rig.click_trace(0.7, Modifiers::SHIFT);
    rig.press(Modifiers::NONE, Key::T);
    rig.harness.run_steps(20);
    let output = rig.harness.output();
    let root = &output.viewport_output[&egui::ViewportId::ROOT];
    assert_eq!(
        root.repaint_delay,
        std::time::Duration::MAX,
        "nothing moves"
    );
}
