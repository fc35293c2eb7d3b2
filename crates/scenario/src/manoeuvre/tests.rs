//! Tests of manoeuvres and templates.

use super::*;
use crate::value::Allowed;

fn rpm(value: f64) -> f64 {
    value * std::f64::consts::PI / 30.0
}

fn template(kind: TemplateKind, fields: &[(&str, &str)]) -> TemplateUse {
    let mut template = TemplateUse::new(kind);
    for (name, text) in fields {
        template.set("manoeuvre.templates[0]", name, text).unwrap();
    }
    template
}

fn with(templates: Vec<TemplateUse>) -> Manoeuvre {
    Manoeuvre {
        templates,
        ..Manoeuvre::default()
    }
}

fn wheel(manoeuvre: &Manoeuvre) -> Vec<(f64, f64)> {
    manoeuvre
        .profiles()
        .unwrap()
        .get(Input::WheelRate)
        .points()
        .to_vec()
}

#[test]
fn tables_read_and_stand_in_order() {
    for (place, row) in INPUTS.iter().enumerate() {
        assert_eq!(row.input as usize, place, "{}", row.path);
        let level = Value::from_text(row.path, row.default, row.quantity).unwrap();
        let allowed = Allowed {
            range: row.allowed,
            unit: row.unit(),
        };
        assert!(level.within(row.path, &allowed).is_ok(), "{}", row.path);
    }
    for (place, row) in TEMPLATES.iter().enumerate() {
        assert_eq!(row.kind as usize, place, "{}", row.key);
        assert_eq!(
            row.parameters[0].name, "at",
            "{} begins with its time",
            row.key
        );
        assert_eq!(
            TemplateKind::from_key(row.key),
            Some(row.kind),
            "{}",
            row.key
        );
        let mut fresh = TemplateUse::new(row.kind);
        for number in row.parameters {
            let result = fresh.set("t", number.name, number.default);
            assert!(result.is_ok(), "{}: {result:?}", row.key);
        }
    }
}

#[test]
fn every_template_expands_and_moves_its_input() {
    for row in TEMPLATES {
        let mut manoeuvre = with(vec![TemplateUse::new(row.kind)]);
        // Off and on show only against the other state.
        let start = if row.kind == TemplateKind::ConsumerOn {
            "0"
        } else {
            "1"
        };
        manoeuvre
            .set_free(Input::ExcessCommand, &[("0 s", start)])
            .unwrap();
        if row.kind == TemplateKind::LugDown {
            manoeuvre
                .set_free(Input::EngineSpeed, &[("0 s", "2000 rpm")])
                .unwrap();
        }
        let profiles = manoeuvre.profiles().unwrap();
        let points = profiles.get(row.drives).points();
        assert!(points.len() >= 2, "{}: {points:?}", row.key);
        let moves = points.iter().any(|p| (p.1 - points[0].1).abs() > 0.0);
        assert!(moves, "{} changes its input: {points:?}", row.key);
        for other in INPUTS.iter().filter(|other| other.input != row.drives) {
            let still = profiles.get(other.input).points().len();
            assert_eq!(still, 1, "{} leaves {} alone", row.key, other.label);
        }
    }
}

#[test]
fn wheel_steps_chain_with_exact_times() {
    let manoeuvre = with(vec![
        template(TemplateKind::WheelStep, &[("at", "3 s")]),
        template(
            TemplateKind::WheelStep,
            &[("at", "5 s"), ("rate", "-90 rpm")],
        ),
    ]);
    let expected = [
        (3.0, 0.0),
        (3.05, rpm(90.0)),
        (4.0, rpm(90.0)),
        (4.05, 0.0),
        (5.0, 0.0),
        (5.05, -rpm(90.0)),
        (6.0, -rpm(90.0)),
        (6.05, 0.0),
    ];
    let got = wheel(&manoeuvre);
    assert_eq!(got.len(), expected.len(), "{got:?}");
    for (g, e) in got.iter().zip(expected) {
        assert!(
            (g.0 - e.0).abs() < 1e-15 && (g.1 - e.1).abs() < 1e-14,
            "{g:?} against {e:?}"
        );
    }
}

#[test]
fn templates_begin_from_what_is_there() {
    let mut manoeuvre = with(vec![template(TemplateKind::EngineRunUp, &[("at", "2 s")])]);
    manoeuvre
        .set_free(Input::EngineSpeed, &[("0 s", "0 rpm"), ("1 s", "1200 rpm")])
        .unwrap();
    let profiles = manoeuvre.profiles().unwrap();
    let speed = profiles.get(Input::EngineSpeed);
    assert!(
        (speed.at(1.5) - rpm(1200.0)).abs() < 1e-9,
        "holds the free level"
    );
    assert!(
        (speed.at(2.5) - rpm(1800.0)).abs() < 1e-9,
        "half way up the ramp"
    );
}

#[test]
fn a_template_that_overlaps_is_refused() {
    let manoeuvre = with(vec![
        template(TemplateKind::WheelStep, &[("at", "3 s")]),
        template(TemplateKind::WheelStep, &[("at", "3.5 s")]),
    ]);
    let findings = manoeuvre.profiles().unwrap_err();
    let finding = &findings.findings[0];
    assert_eq!(finding.path, "manoeuvre.templates[1].at", "{finding}");
    assert_eq!(finding.value.as_deref(), Some("3.5 s"), "{finding}");
    assert!(finding.hint.contains("4.05 s or later"), "{finding}");
}

#[test]
fn a_ramp_longer_than_its_stretch_is_refused() {
    let step = template(
        TemplateKind::WheelStep,
        &[("turn", "0.1 s"), ("ramp", "200 ms")],
    );
    let findings = with(vec![step]).profiles().unwrap_err();
    assert_eq!(
        findings.findings[0].path, "manoeuvre.templates[0].ramp",
        "{findings}"
    );
}

#[test]
fn breakpoints_out_of_order_are_named() {
    let mut manoeuvre = Manoeuvre::default();
    let points = [("0 s", "0 rpm"), ("2 s", "10 rpm"), ("1 s", "0 rpm")];
    manoeuvre.set_free(Input::WheelRate, &points).unwrap();
    let findings = manoeuvre.profiles().unwrap_err();
    assert_eq!(
        findings.findings[0].path, "manoeuvre.wheel_rate[2]",
        "{findings}"
    );
}

#[test]
fn lock_to_lock_ends_in_the_middle() {
    let manoeuvre = with(vec![TemplateUse::new(TemplateKind::SlowLockToLock)]);
    let points = wheel(&manoeuvre);
    let (mut angle, mut least, mut most) = (0.0f64, 0.0f64, 0.0f64);
    for pair in points.windows(2) {
        angle += 0.5 * (pair[0].1 + pair[1].1) * (pair[1].0 - pair[0].0);
        least = least.min(angle);
        most = most.max(angle);
    }
    let turns = std::f64::consts::TAU;
    assert!(angle.abs() < 1e-9, "back in the middle: {angle}");
    assert!(
        (most - 2.0 * turns).abs() < 1e-9,
        "two turns one way: {}",
        most / turns
    );
    assert!(
        (least + 2.0 * turns).abs() < 1e-9,
        "two turns the other way: {}",
        least / turns
    );
}

#[test]
fn sine_swings_about_the_base() {
    let manoeuvre = with(vec![TemplateUse::new(TemplateKind::SineSteering)]);
    let points = wheel(&manoeuvre);
    assert_eq!(points.len(), 3 * 24 + 1, "three cycles of 24 pieces");
    let peak = points.iter().map(|p| p.1).fold(0.0, f64::max);
    assert!((peak - rpm(60.0)).abs() < 1e-9, "amplitude {peak}");
    assert!(
        points[72].1.abs() < 1e-15 && (points[72].0 - 7.0).abs() < 1e-12,
        "ends at the base"
    );
}

#[test]
fn dissolving_keeps_the_profiles() {
    let mut manoeuvre = with(vec![
        TemplateUse::new(TemplateKind::SineSteering),
        template(TemplateKind::WheelStep, &[("at", "8 s")]),
        TemplateUse::new(TemplateKind::KerbStrike),
    ]);
    let before = manoeuvre.profiles().unwrap();
    manoeuvre.dissolve_templates().unwrap();
    assert!(manoeuvre.templates.is_empty(), "none left");
    assert_eq!(manoeuvre.profiles().unwrap(), before, "same inputs");
}

#[test]
fn unknown_fields_name_the_nearest() {
    let mut step = TemplateUse::new(TemplateKind::WheelStep);
    let finding = step
        .set("manoeuvre.templates[4]", "rat", "5 rpm")
        .unwrap_err();
    assert_eq!(finding.path, "manoeuvre.templates[4].rat", "{finding}");
    assert_eq!(finding.hint, "did you mean rate?", "{finding}");
}
