//! Tests of the circuits that come with the program.

use std::collections::BTreeSet;

use super::*;
use crate::choice::{CHOICES, ChoiceId, StartKind};
use crate::manoeuvre::TEMPLATES;
use crate::{Findings, Scenario, UnitSystem, convert_units, document::Document};

fn all() -> Vec<(&'static str, Scenario, Findings)> {
    let read = |preset: &Preset| {
        let (scenario, findings) = Scenario::from_text(&preset.file_name(), preset.text);
        let scenario = scenario.unwrap_or_else(|| panic!("{findings}"));
        (preset.key, scenario, findings)
    };
    PRESETS.iter().map(read).collect()
}

#[test]
fn every_preset_is_a_circuit_with_a_manoeuvre() {
    for (key, scenario, findings) in all() {
        assert!(scenario.circuit().is_ok(), "{key}: {findings}");
        assert!(
            scenario.notes.contains("Look at"),
            "{key} says what to look at"
        );
        let moves = helmsplit_model::Input::ALL
            .iter()
            .any(|i| scenario.manoeuvre.moves(*i));
        assert!(moves, "{key} has a manoeuvre");
        assert_eq!(
            Preset::from_key(key).map(|p| p.key),
            Some(key),
            "{key} is found"
        );
    }
    assert_eq!(
        Preset::from_key("Orchard-Carrier").map(|p| p.key),
        Some("orchard_carrier"),
        "loose"
    );
}

/// One circuit is there to show a steering that is lost; it alone warns, and only of that.
#[test]
fn only_the_pilot_relief_earns_a_warning() {
    for (key, _, findings) in all() {
        let paths: Vec<_> = findings.iter().map(|f| f.path.as_str()).collect();
        if key == "depot_tug" {
            assert_eq!(paths, ["priority_relief.cracking_pressure"], "{findings}");
            assert!(
                findings.to_string().contains("steering is lost"),
                "{findings}"
            );
        } else {
            assert!(findings.is_empty(), "{findings}");
        }
    }
}

#[test]
fn every_option_and_template_is_used_by_one_of_them() {
    let scenarios = all();
    for choice in CHOICES {
        for (place, option) in choice.options.iter().enumerate() {
            // A saved state is a file of the user's own.
            if choice.id == ChoiceId::StartKind && place == StartKind::FromState as usize {
                continue;
            }
            let used = scenarios.iter().any(|(_, scenario, _)| {
                scenario.uses_choice(choice.id) && usize::from(scenario.option(choice.id)) == place
            });
            assert!(used, "{} = {}", choice.path, option.key);
        }
    }
    let kinds: BTreeSet<_> = scenarios
        .iter()
        .flat_map(|(_, scenario, _)| scenario.manoeuvre.templates.iter().map(|t| t.kind.key()))
        .collect();
    for template in TEMPLATES {
        assert!(kinds.contains(template.key), "template {}", template.key);
    }
}

#[test]
fn files_are_written_as_the_program_writes_them() {
    for (preset, (key, scenario, _)) in PRESETS.iter().zip(all()) {
        assert!(
            scenario.to_text(true) == preset.text,
            "{key}: `new` would write another text"
        );
    }
}

#[test]
fn other_units_keep_every_bit() {
    for (preset, (key, scenario, _)) in PRESETS.iter().zip(all()) {
        for system in UnitSystem::ALL {
            let document = Document::from_text(preset.file_name(), preset.text).unwrap();
            let text = convert_units(&document, system).unwrap();
            let (back, findings) = Scenario::from_text("converted.ron", &text);
            let back = back.unwrap_or_else(|| panic!("{findings}"));
            assert!(back == scenario, "{key} in {system:?}");
            assert_eq!(back.hash(), scenario.hash(), "{key} in {system:?}");
        }
    }
}

#[test]
fn every_cut_of_a_preset_is_refused() {
    let text = PRESETS[0].text;
    let closed = text.trim_end().len();
    for end in (0..closed)
        .filter(|end| text.is_char_boundary(*end))
        .step_by(7)
    {
        let (scenario, findings) = Scenario::from_text("cut.ron", &text[..end]);
        assert!(scenario.is_none() && findings.has_errors(), "cut at {end}");
    }
}
