//! Bad files are refused with file, line, column, field, value and what would do; good ones keep
//! every value.

mod bad_input;

use super::*;
use crate::choice::PriorityReliefKind;
use crate::finding::Severity;
use crate::manoeuvre::TemplateKind;
use crate::parameter::{pump, valve_edges};

#[test]
fn all_findings_come_in_one_pass() {
    let text = "(\n pump: (displacement: \"20 mm\", wear: \"0.5\"),\n valve: (land: \"cone\", sprng: \"1 N\"),\n)";
    let (_, findings) = Scenario::from_text("a.ron", text);
    let lines: Vec<_> = findings.iter().filter_map(|f| f.line).collect();
    assert_eq!(lines, [2, 2, 3, 3], "{findings}");
}

#[test]
fn unreadable_files_become_findings() {
    let (scenario, findings) = Scenario::load("/no/such/file.circuit.ron");
    assert!(scenario.is_none() && findings.has_errors(), "{findings}");
    assert!(
        findings.to_string().contains("/no/such/file.circuit.ron"),
        "{findings}"
    );
    let (scenario, findings) =
        Scenario::from_text("cut.ron", "(pump: (displacement: \"20 cm3/rev\"");
    assert!(scenario.is_none() && findings.has_errors(), "{findings}");
}

#[test]
fn a_short_file_is_enough() {
    let text = "(priority_relief: (kind: \"none\"), valve: (fixed_orifice_diameter: \"3.5 mm\"))";
    let (scenario, findings) = Scenario::from_text("a.ron", text);
    let scenario = scenario.expect("it reads");
    assert!(findings.is_empty(), "{findings}");
    assert_eq!(
        scenario.chosen::<PriorityReliefKind>(),
        PriorityReliefKind::None,
        "choice"
    );
    let id = valve_edges::FIXED_ORIFICE_DIAMETER;
    assert_eq!(scenario.si(id).to_bits(), 0.0035f64.to_bits(), "value");
    assert!(
        scenario.is_default(pump::DISPLACEMENT),
        "the rest at its default"
    );
}

#[test]
fn values_without_effect_are_named_once() {
    let text = "(priority_relief: (kind: \"none\", cracking_pressure: \"120 bar\", full_flow: \"9 L/min\"))";
    let (scenario, findings) = Scenario::from_text("a.ron", text);
    assert!(scenario.is_some(), "{findings}");
    assert_eq!(findings.len(), 1, "{findings}");
    let finding = &findings.findings[0];
    assert_eq!(finding.severity, Severity::Warning, "{finding}");
    assert!(
        finding.message.contains("priority_relief.kind is \"none\""),
        "{finding}"
    );
}

#[test]
fn written_text_reads_back_equal() {
    let mut scenario = Scenario::default();
    scenario.notes = "two\nlines with a \"quote\"".to_owned();
    scenario.set("valve.land", "table").unwrap();
    scenario.set("oil.temperature", "122 degF").unwrap();
    scenario.set("pump.teeth", "9").unwrap();
    scenario
        .set_si(valve_edges::FIXED_ORIFICE_DIAMETER, 0.1 + 0.2 - 0.296)
        .unwrap();
    let mut template = crate::manoeuvre::TemplateUse::new(TemplateKind::KerbStrike);
    template.set("t", "force", "4500 lbf").unwrap();
    scenario.manoeuvre.templates.push(template);
    let points = [("0 s", "600 rpm"), ("500 ms", "1200 rpm")];
    scenario
        .manoeuvre
        .set_free(helmsplit_model::Input::EngineSpeed, &points)
        .unwrap();
    for comments in [false, true] {
        let text = scenario.to_text(comments);
        let (back, findings) = Scenario::from_text("a.ron", &text);
        assert_eq!(back.as_ref(), Some(&scenario), "{findings}\n{text}");
        assert_eq!(
            back.expect("read").to_text(comments),
            text,
            "and writes the same"
        );
    }
}

proptest::proptest! {
    #[test]
    fn any_text_is_refused_without_panic(text in "[(){}\\[\\]a-z_:,\" 0-9]{0,120}") {
        let (scenario, findings) = Scenario::from_text("a.ron", &text);
        proptest::prop_assert!(scenario.is_some() || findings.has_errors());
    }

    #[test]
    fn any_field_value_is_refused_without_panic(
        place in 0usize..crate::parameter::COUNT,
        text in "\\PC{0,30}",
    ) {
        let row = crate::parameters()[place];
        let mut scenario = Scenario::default();
        if let Err(finding) = scenario.set(row.path, &text) {
            proptest::prop_assert!(finding.path == row.path);
        }
    }
}
