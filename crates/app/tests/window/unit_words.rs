//! Units switch everywhere at once.

use egui_kittest::kittest::Queryable;

use crate::rig::Rig;
use crate::seen::words;
use crate::states::each_state;

const METRIC: [&str; 9] = [
    "bar", "L/min", "mm", "cm3/rev", "cm³/rev", "mm²", "mm³", "°C", "kN",
];
const US: [&str; 6] = ["psi", "gpm", "in", "in³/rev", "°F", "lbf"];

/// What holds one of the units as a word of its own behind a number or alone.
fn holding(rig: &Rig, units: &[&str]) -> Vec<String> {
    let has = |text: &str, unit: &str| {
        let words: Vec<&str> = text
            .split(|letter: char| letter.is_whitespace() || ",;()[]".contains(letter))
            .collect();
        words.iter().enumerate().any(|(place, word)| {
            let behind_number =
                place > 0 && words[place - 1].ends_with(|letter: char| letter.is_ascii_digit());
            *word == unit && (behind_number || words.len() == 1)
        })
    };
    let mut found = words(rig);
    found.retain(|text| units.iter().any(|unit| has(text, unit)));
    // The menu that switches units names them.
    found.retain(|text| !text.contains(": bar, L/min") && !text.contains(": psi, gpm"));
    found
}

#[test]
fn every_text_follows_the_units() {
    let mut rig = Rig::new();
    assert!(!holding(&rig, &METRIC).is_empty(), "metric at first");
    for (entry, wrong, right) in [
        ("US: psi", &METRIC[..], &US[..]),
        ("Metric: bar", &US[..], &METRIC[..]),
    ] {
        rig.menu("View", entry);
        let mut left = Vec::new();
        each_state(&mut rig, |rig, state| {
            for text in holding(rig, wrong) {
                left.push(format!("{state}: {text}"));
            }
        });
        left.sort();
        left.dedup();
        assert!(left.is_empty(), "{entry}, yet:\n{}", left.join("\n"));
        assert!(!holding(&rig, right).is_empty(), "{entry}");
    }
    assert!(
        rig.harness.query_by_label("Close").is_some(),
        "evidence is open"
    );
}
