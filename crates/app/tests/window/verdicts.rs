//! The ribbon and the evidence.

use egui_kittest::kittest::Queryable;

use crate::rig::Rig;

#[test]
fn each_judged_check_has_a_chip_with_figure_and_word() {
    let rig = Rig::new();
    let answer = rig.app().answer().expect("solved");
    let judged: Vec<_> = answer
        .solved
        .checks
        .iter()
        .filter(|check| check.figure.is_some())
        .collect();
    assert!(judged.len() > 4, "the orchard carrier is judged");
    for check in judged {
        let name = check.id.name().replace('-', " ");
        let word = check.status.word();
        let begins = name.clone();
        let chip = rig.harness.query_by(move |node| {
            node.label()
                .is_some_and(|label| label.starts_with(&begins) && label.ends_with(word))
        });
        assert!(chip.is_some(), "no chip for {name}, {word}");
    }
}

#[test]
fn a_chip_jumps_to_its_moment_and_opens_its_evidence() {
    let mut rig = Rig::new();
    let answer = rig.app().answer().expect("solved");
    let with_moment = answer.solved.checks.iter().find_map(|check| {
        let evidence = check.evidence.as_ref()?;
        let time = evidence.time.filter(|time| *time > 0.1)?;
        Some((check.id.name().replace('-', " "), time, evidence.formula))
    });
    let (name, time, formula) = with_moment.expect("a check with a moment");
    rig.click_beginning(&format!("{name} "));
    assert!(
        (rig.app().cursor() - time).abs() < 1e-9,
        "the cursor stands at {} s, not at {time} s",
        rig.app().cursor()
    );
    assert!(rig.says(&format!("Evidence: {name}")), "the panel is open");
    assert!(rig.says(formula), "with the formula");
    assert!(rig.says("Source: "), "and its source");
    rig.click("Close");
    assert!(!rig.says("Evidence: "), "closed again");
}

#[test]
fn a_limit_edited_in_the_evidence_changes_the_verdict() {
    let mut rig = Rig::new();
    rig.click_beginning("overshoot ");
    let word = |rig: &Rig| {
        let checks = &rig.app().answer().expect("solved").solved.checks;
        let check = checks.iter().find(|c| c.id.name() == "overshoot");
        check.expect("an overshoot").status.word()
    };
    rig.enter("Overshoot", "400 %");
    rig.solve();
    assert_eq!(word(&rig), "pass", "a wide limit");
    rig.enter("Overshoot", "0.1 %");
    rig.solve();
    assert_eq!(word(&rig), "FAIL", "a narrow one");
}
