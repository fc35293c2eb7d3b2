//! Tests of the edits.

use super::super::{TemplateKind, input_row};
use super::*;

fn speed() -> Manoeuvre {
    let mut manoeuvre = Manoeuvre::default();
    let points = [
        ("0 s", "900 rpm"),
        ("1 s", "900 rpm"),
        ("3 s", "2400 rpm"),
        ("8 s", "2400 rpm"),
    ];
    manoeuvre.set_free(Input::EngineSpeed, &points).unwrap();
    manoeuvre
}

fn with(kind: TemplateKind, at: &str) -> TemplateUse {
    let mut template = TemplateUse::new(kind);
    template.set("t", "at", at).unwrap();
    template
}

fn texts(manoeuvre: &Manoeuvre, input: Input) -> String {
    manoeuvre.free_text(input)
}

#[test]
fn points_move_between_their_neighbours() {
    let mut manoeuvre = speed();
    let input = Input::EngineSpeed;
    manoeuvre
        .set_point(input, 1, Some("1500 ms"), Some("15 rev/s"))
        .unwrap();
    let expected = "0 s: 900 rpm, 1500 ms: 15 rev/s, 3 s: 2400 rpm, 8 s: 2400 rpm";
    assert_eq!(texts(&manoeuvre, input), expected, "as typed");
    // Onto its neighbour makes a jump.
    manoeuvre.set_point(input, 1, Some("3 s"), None).unwrap();
    let before = manoeuvre.clone();
    for (time, value, hint) in [
        (Some("4 s"), None, "from 0 s to 3 s"),
        (Some("-1 s"), None, "allowed: 0 to 3600 s"),
        (None, Some("3e4 rpm"), "allowed: 0 to 20000 rpm"),
        (None, Some("3 bar"), ""),
        (Some("soon"), None, ""),
    ] {
        let finding = manoeuvre.set_point(input, 1, time, value).unwrap_err();
        assert_eq!(finding.path, "manoeuvre.engine_speed[1]", "{finding}");
        assert!(finding.hint.contains(hint), "{finding}");
    }
    assert_eq!(manoeuvre, before, "as it was");
}

#[test]
fn points_are_added_in_the_order_of_time() {
    let mut manoeuvre = speed();
    let input = Input::EngineSpeed;
    assert_eq!(
        manoeuvre.add_point(input, "2 s", "1000 rpm"),
        Ok(2),
        "between"
    );
    assert_eq!(manoeuvre.add_point(input, "9 s", "1000 rpm"), Ok(5), "last");
    assert_eq!(
        manoeuvre.add_point(input, "2 s", "1200 rpm"),
        Ok(3),
        "a jump"
    );
    let before = manoeuvre.clone();
    let finding = manoeuvre.add_point(input, "2 s", "0 rpm").unwrap_err();
    assert!(finding.message.contains("third"), "{finding}");
    manoeuvre
        .add_template(with(TemplateKind::LugDown, "5 s"))
        .unwrap();
    let finding = manoeuvre.add_point(input, "5.2 s", "0 rpm").unwrap_err();
    assert!(finding.message.contains("lug-down to idle"), "{finding}");
    manoeuvre.remove_template(0).unwrap();
    assert_eq!(manoeuvre, before, "as it was");
    manoeuvre.remove_point(input, 2).unwrap();
    let finding = manoeuvre.remove_point(input, 9).unwrap_err();
    assert!(finding.message.contains("has 6 breakpoints"), "{finding}");
}

#[test]
fn a_jump_makes_a_ramp_a_step() {
    let mut manoeuvre = speed();
    let input = Input::EngineSpeed;
    assert_eq!(manoeuvre.add_jump(input, 1, "0 rpm"), Ok(2), "behind it");
    let expected = "0 s: 900 rpm, 1 s: 900 rpm, 1 s: 2400 rpm, 3 s: 2400 rpm, 8 s: 2400 rpm";
    assert_eq!(texts(&manoeuvre, input), expected, "the value of the next");
    assert!(
        manoeuvre.add_jump(input, 1, "0 rpm").is_err(),
        "one is there"
    );
    manoeuvre.add_jump(input, 4, "900 rpm").unwrap();
    let last = manoeuvre.free(input)[5].value.text();
    assert_eq!(last, "900 rpm", "behind the last, what was given");
}

#[test]
fn a_jump_moves_as_one() {
    let mut manoeuvre = speed();
    let input = Input::EngineSpeed;
    assert_eq!(manoeuvre.twin(input, 1), None, "no jump yet");
    assert!(manoeuvre.move_jump(input, 1, "2 s").is_err(), "no jump yet");
    manoeuvre.add_jump(input, 1, "0 rpm").unwrap();
    assert_eq!(manoeuvre.twin(input, 1), Some(2), "the later");
    assert_eq!(manoeuvre.twin(input, 2), Some(1), "the earlier");
    for place in [1, 2] {
        manoeuvre.move_jump(input, place, "2.5 s").unwrap();
        let expected =
            "0 s: 900 rpm, 2.5 s: 900 rpm, 2.5 s: 2400 rpm, 3 s: 2400 rpm, 8 s: 2400 rpm";
        assert_eq!(texts(&manoeuvre, input), expected, "both");
        let finding = manoeuvre.move_jump(input, place, "3.5 s").unwrap_err();
        assert!(finding.message.contains("neighbouring"), "{finding}");
        manoeuvre.move_jump(input, place, "0.5 s").unwrap();
    }
}

#[test]
fn templates_stand_among_free_points() {
    let mut manoeuvre = speed();
    let row = input_row(Input::EngineSpeed);
    manoeuvre
        .add_template(with(TemplateKind::LugDown, "4 s"))
        .unwrap();
    let line = manoeuvre.line(row).unwrap();
    let times: Vec<f64> = line.points().iter().map(|point| point.time).collect();
    assert_eq!(
        times,
        [0.0, 1.0, 3.0, 4.0, 4.5, 8.0],
        "in the order of time"
    );
    let span = line.span_around(4.2).copied().unwrap();
    assert_eq!((span.begin, span.end), (4.0, 4.5), "its stretch");
    assert!(line.span_around(4.0).is_none(), "its ends are free");
    let finding = manoeuvre.set_template(0, "at", "2.8 s").unwrap_err();
    assert!(finding.message.contains("breakpoint at 3 s"), "{finding}");
    assert_eq!(finding.path, "manoeuvre.templates[0].at", "{finding}");
    let finding = manoeuvre.set_template(0, "ramp", "5 s").unwrap_err();
    assert_eq!(finding.path, "manoeuvre.templates[0].ramp", "{finding}");
    assert_eq!(finding.value.as_deref(), Some("5 s"), "{finding}");
    manoeuvre.set_template(0, "ramp", "4 s").unwrap();
}

#[test]
fn a_template_on_a_ramp_begins_from_the_value_there() {
    let mut manoeuvre = speed();
    let row = input_row(Input::EngineSpeed);
    manoeuvre
        .add_template(with(TemplateKind::EngineRunUp, "2 s"))
        .unwrap();
    let before = manoeuvre.clone();
    let line = manoeuvre.line(row).unwrap();
    let rpm = std::f64::consts::PI / 30.0;
    assert!(
        (line.points()[2].value - 1650.0 * rpm).abs() < 1e-9,
        "half way up the ramp: {:?}",
        line.points()[2]
    );
    // It ends where a free breakpoint with the same value lies: one point, not two.
    assert_eq!(line.points().len(), 5, "{:?}", line.points());
    assert_eq!(manoeuvre.dissolve(0), Ok(1), "itself");
    assert!(manoeuvre.line(row).unwrap().runs_as(&line), "bit for bit");
    assert_eq!(
        manoeuvre.profiles().unwrap(),
        before.profiles().unwrap(),
        "the same run"
    );
}

#[test]
fn dissolving_takes_those_along_that_would_run_otherwise() {
    let mut manoeuvre = speed();
    let row = input_row(Input::EngineSpeed);
    let points = [("0 s", "0 rpm"), ("10 s", "1000 rpm")];
    manoeuvre.set_free(Input::EngineSpeed, &points).unwrap();
    for (kind, at) in [
        (TemplateKind::LugDown, "8 s"),
        (TemplateKind::LugDown, "2 s"),
        (TemplateKind::EngineRunUp, "5 s"),
    ] {
        manoeuvre.add_template(with(kind, at)).unwrap();
    }
    let before = manoeuvre.line(row).unwrap();
    let mut first = manoeuvre.clone();
    assert_eq!(first.dissolve(1), Ok(1), "the first stands on its own");
    assert!(first.line(row).unwrap().runs_as(&before), "the same line");
    assert_eq!(manoeuvre.dissolve(2), Ok(2), "the one ahead of it, too");
    assert!(
        manoeuvre.line(row).unwrap().runs_as(&before),
        "the same line"
    );
    assert_eq!(manoeuvre.templates.len(), 1, "the last is left");
}

#[test]
fn exchanged_templates_keep_their_pause() {
    let mut manoeuvre = Manoeuvre::default();
    for (kind, at) in [
        (TemplateKind::WheelStep, "1 s"),
        (TemplateKind::KerbStrike, "1.2 s"),
        (TemplateKind::WheelReversal, "2.55 s"),
    ] {
        manoeuvre.add_template(with(kind, at)).unwrap();
    }
    manoeuvre.exchange_with_next(0).unwrap();
    let at = |place: usize| manoeuvre.templates[place].value("at").unwrap().text();
    assert_eq!(
        manoeuvre.templates[0].kind,
        TemplateKind::WheelReversal,
        "first"
    );
    assert_eq!(at(0), "1 s", "begins where the other began");
    // 1 s, two turns of 0.8 s, two ramps of 50 ms, and the pause of half a second.
    assert_eq!(at(2), "3.2 s", "behind it, after the pause");
    let finding = manoeuvre.exchange_with_next(2).unwrap_err();
    assert!(finding.message.contains("no template follows"), "{finding}");
    assert!(manoeuvre.exchange_with_next(7).is_err(), "no such template");
}

#[test]
fn edits_stay_bit_for_bit_in_a_file() {
    let mut scenario = crate::Scenario::default();
    scenario.manoeuvre = speed();
    let manoeuvre = &mut scenario.manoeuvre;
    for (kind, at) in [
        (TemplateKind::SineSteering, "1.1 s"),
        (TemplateKind::LugDown, "4 s"),
    ] {
        manoeuvre.add_template(with(kind, at)).unwrap();
    }
    manoeuvre.dissolve(0).unwrap();
    manoeuvre
        .add_jump(Input::EngineSpeed, 3, "0.1 rad/s")
        .unwrap();
    let (read, findings) = crate::Scenario::from_text("test", &scenario.to_text(true));
    assert_eq!(read.as_ref(), Some(&scenario), "{findings}");
}
