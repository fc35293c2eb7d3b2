//! Each contradiction is found, with the field, its value and what would do.

mod cases;

use super::*;
use cases::CASES;

fn with(settings: &[(&str, &str)]) -> Scenario {
    let mut scenario = Scenario::default();
    for (path, text) in settings {
        scenario
            .set(path, text)
            .unwrap_or_else(|finding| panic!("{finding}"));
    }
    scenario
}

#[test]
fn each_contradiction_is_found() {
    for case in CASES {
        let findings = with(case.settings).validate();
        let found = findings
            .iter()
            .find(|f| f.path == case.path && f.message.contains(case.message));
        let Some(finding) = found else {
            panic!(
                "{:?}: nothing about {} in\n{findings}",
                case.settings, case.path
            );
        };
        assert_eq!(finding.severity, case.severity, "{finding}");
        assert_eq!(finding.value.as_deref(), Some(case.value), "{finding}");
        assert!(finding.hint.contains(case.hint), "hint of {finding}");
        let refused = with(case.settings).circuit().is_err();
        assert_eq!(refused, case.severity == Severity::Error, "{finding}");
    }
}

#[test]
fn a_sound_circuit_has_no_findings() {
    let findings = Scenario::default().validate();
    assert!(findings.is_empty(), "{findings}");
}

#[test]
fn several_findings_come_in_one_pass() {
    let findings = with(&[
        ("valve.spring_volume", "1 cm3"),
        ("steering.dead_band", "6 deg"),
        ("main_relief.cracking_pressure", "180 bar"),
    ])
    .validate();
    let errors = findings
        .iter()
        .filter(|f| f.severity == Severity::Error)
        .count();
    assert_eq!(errors, 3, "{findings}");
}

#[test]
fn a_governed_engine_must_not_be_set_to_stand() {
    let mut scenario = with(&[("prime_mover.kind", "governed")]);
    scenario
        .manoeuvre
        .set_free(
            helmsplit_model::Input::EngineSpeed,
            &[("0 s", "0 rpm"), ("1 s", "900 rpm")],
        )
        .unwrap();
    let findings = scenario.validate();
    assert!(findings.has_errors(), "{findings}");
    assert_eq!(
        findings.findings[0].path, "manoeuvre.engine_speed",
        "{findings}"
    );
}
