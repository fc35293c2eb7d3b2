//! Every outside check is met, and the document about them is the present one.

use std::collections::BTreeSet;
use std::path::Path;

use helmsplit_acceptance::check::{Mark, Repeatability};
use helmsplit_acceptance::document;
use helmsplit_acceptance::verification::{GROUPS, chapters};

/// One test, since asking the engine for every value takes seconds.
#[test]
fn every_check_is_met_and_the_document_says_so() {
    let chapters = chapters();
    let missed: Vec<String> = chapters
        .iter()
        .flat_map(|chapter| &chapter.outcomes)
        .filter(|outcome| !outcome.is_met())
        .map(|outcome| {
            let check = &outcome.check;
            format!(
                "{}: {}, {}: expected {} {} within {:?}, obtained {} (deviation {:e})",
                check.id,
                check.subject,
                check.what,
                check.expected,
                check.unit,
                check.tolerance,
                outcome.obtained,
                outcome.deviation()
            )
        })
        .collect();
    assert!(missed.is_empty(), "not met:\n{}", missed.join("\n"));

    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("../docs/verification.md");
    let on_disk = std::fs::read_to_string(&path).expect("docs/verification.md is there");
    let present = document::write(&chapters);
    let solved: BTreeSet<&str> = chapters
        .iter()
        .flat_map(|chapter| &chapter.outcomes)
        .filter(|outcome| outcome.check.repeats == Repeatability::Solver)
        .map(|outcome| outcome.check.id.as_str())
        .collect();
    for (number, (old, new)) in on_disk.lines().zip(present.lines()).enumerate() {
        assert_eq!(
            repeatable(old, &solved),
            repeatable(new, &solved),
            "docs/verification.md is out of date in line {}; write it with \
             cargo run -p helmsplit-acceptance --example verification",
            number + 1
        );
    }
    assert_eq!(
        on_disk.lines().count(),
        present.lines().count(),
        "docs/verification.md is out of date; write it with \
         cargo run -p helmsplit-acceptance --example verification"
    );
}

/// The cells of a line that are the same on every machine. What a solver obtained, and how far off
/// it is, differs in its last digits, and with it which check comes closest to its tolerance; that
/// it is met is asserted apart from the document.
fn repeatable<'a>(line: &'a str, solved: &BTreeSet<&str>) -> Vec<&'a str> {
    let mut cells: Vec<&str> = line.split('|').map(str::trim).collect();
    match cells.len() {
        // id, case, expected, obtained, deviation, tolerance, source, between bars.
        9 if solved.contains(cells[1]) => {
            cells.drain(4..6);
        }
        // group, checks, met, closest, between bars.
        6 => {
            cells.remove(4);
        }
        _ => {}
    }
    cells
}

#[test]
fn every_check_has_a_name_of_its_own_and_a_source() {
    let mut names = BTreeSet::new();
    for group in GROUPS {
        for check in (group.checks)() {
            assert!(
                names.insert(check.id.clone()),
                "{} stands for two checks",
                check.id
            );
            let common = check.source.mark == Mark::CommonPractice;
            assert!(
                common == check.source.text.is_empty(),
                "{}: a source is named, or it is common practice",
                check.id
            );
            assert!(
                !check.what.contains('|') && !check.source.text.contains('|'),
                "{}: a bar would break the table",
                check.id
            );
        }
    }
}

/// A subject makes one table, so its checks must stand together.
#[test]
fn checks_of_one_subject_stand_together() {
    for group in GROUPS {
        let mut seen: Vec<&str> = Vec::new();
        for check in (group.checks)() {
            if seen.last() != Some(&check.subject) {
                assert!(
                    !seen.contains(&check.subject),
                    "{}: {} comes back after another subject",
                    group.title,
                    check.subject
                );
                seen.push(check.subject);
            }
        }
    }
}
