//! Which things match what was typed, the best first.

use helmsplit_scenario::nearest;

use super::thing::Thing;

/// What a word is worth where it is found: the more a person would look for the thing under it,
/// the more.
const PATH: u32 = 400;
const SYMBOL: u32 = 300;
const SYMBOL_ANY_CASE: u32 = 200;
const LABEL_WORD: u32 = 90;
const LABEL_BEGINNING: u32 = 70;
const LABEL_INSIDE: u32 = 40;
const OTHER_BEGINNING: u32 = 30;
const OTHER_INSIDE: u32 = 15;
const NOTE: u32 = 5;

/// The whole of what was typed is the label, or begins it.
const IS_LABEL: u32 = 80;
const BEGINS_LABEL: u32 = 60;

/// The thing counts in the present circuit.
const IN_USE: u32 = 10;

/// What was found.
#[derive(Debug, Default, PartialEq)]
pub(super) struct Found {
    /// Places of the matches among the things, the best first.
    pub(super) places: Vec<usize>,
    /// What was looked for instead, when nothing has a word that was typed.
    pub(super) instead: Option<String>,
}

/// Finds what holds every word of `typed`, or of the nearest known words where one is unknown. With
/// nothing typed that is everything.
pub(super) fn ranked(things: &[Thing], typed: &str) -> Found {
    let places = matches(things, typed);
    if !places.is_empty() {
        return Found {
            places,
            instead: None,
        };
    }
    let mended = mended(things, typed);
    let places = matches(things, &mended);
    let instead = (!places.is_empty()).then_some(mended);
    Found { places, instead }
}

fn matches(things: &[Thing], typed: &str) -> Vec<usize> {
    let scores = things.iter().enumerate();
    let mut hits: Vec<(u32, usize)> = scores
        .filter_map(|(place, thing)| Some((score(thing, typed)?, place)))
        .collect();
    // Equal ones stay in the order of the circuit.
    hits.sort_by_key(|&(score, place)| (std::cmp::Reverse(score), place));
    hits.into_iter().map(|(_, place)| place).collect()
}

/// What was typed, with each word that no label holds replaced by the nearest that one does.
fn mended(things: &[Thing], typed: &str) -> String {
    let words: Vec<&str> = things
        .iter()
        .flat_map(|thing| thing.label.split_whitespace())
        .collect();
    let known = |word: &str| things.iter().any(|thing| score(thing, word).is_some());
    let near = |word: &str| nearest(word, words.iter().copied()).map(str::to_lowercase);
    let parts: Vec<String> = typed
        .split_whitespace()
        .map(|word| match known(word) {
            true => word.to_owned(),
            false => near(word).unwrap_or_else(|| word.to_owned()),
        })
        .collect();
    parts.join(" ")
}

/// How well a thing answers; `None` if it lacks a word.
fn score(thing: &Thing, typed: &str) -> Option<u32> {
    let mut sum = 0;
    for word in typed.split_whitespace() {
        sum += word_score(thing, word)?;
    }
    let typed = typed.trim().to_lowercase();
    let label = thing.label.to_lowercase();
    if label == typed {
        sum += IS_LABEL;
    } else if !typed.is_empty() && label.starts_with(&typed) {
        sum += BEGINS_LABEL;
    }
    Some(sum + if thing.in_use { IN_USE } else { 0 })
}

fn word_score(thing: &Thing, typed: &str) -> Option<u32> {
    let word = typed.to_lowercase();
    let label = thing.label.to_lowercase();
    let mut label_words = label.split(|letter: char| !letter.is_alphanumeric());
    let others = [thing.path, thing.group.as_str(), thing.shown.as_str()];
    let others = || others.iter().map(|text| text.to_lowercase());
    let begins = |text: &str| {
        text.split(|letter: char| !letter.is_alphanumeric())
            .any(|part| part.starts_with(&word))
    };
    if thing.path == word && !word.is_empty() {
        Some(PATH)
    } else if thing.symbol == typed {
        Some(SYMBOL)
    } else if thing.symbol.to_lowercase() == word {
        Some(SYMBOL_ANY_CASE)
    } else if label_words.any(|part| part == word) {
        Some(LABEL_WORD)
    } else if begins(&label) {
        Some(LABEL_BEGINNING)
    } else if label.contains(&word) {
        Some(LABEL_INSIDE)
    } else if others().any(|text| begins(&text)) {
        Some(OTHER_BEGINNING)
    } else if others().any(|text| text.contains(&word)) {
        Some(OTHER_INSIDE)
    } else if thing.note.to_lowercase().contains(&word) {
        Some(NOTE)
    } else {
        None
    }
}

#[cfg(test)]
mod tests {
    use super::super::thing::tests::of_the_orchard_carrier;
    use super::*;

    fn first(typed: &str) -> String {
        let things = of_the_orchard_carrier();
        let found = ranked(&things, typed);
        let place = found.places.first();
        place.map_or_else(String::new, |&place| things[place].label.clone())
    }

    #[test]
    fn label_symbol_path_and_note_lead_to_a_parameter() {
        for (typed, label) in [
            ("fixed orifice", "Fixed orifice diameter"),
            ("FIXED ORIFICE DIAM", "Fixed orifice diameter"),
            ("orifice fixed", "Fixed orifice diameter"),
            ("valve.spool_diameter", "Spool diameter"),
            ("spool_diameter", "Spool diameter"),
        ] {
            assert_eq!(first(typed), label, "{typed}");
        }
    }

    #[test]
    fn every_parameter_is_found_by_its_path_and_by_its_label() {
        let things = of_the_orchard_carrier();
        for row in helmsplit_scenario::parameters() {
            for typed in [row.path, row.label] {
                let found = ranked(&things, typed).places;
                let place = found
                    .iter()
                    .position(|&place| things[place].path == row.path);
                // Several parts may have a number of the same label; a path is one row's own.
                let within = if typed == row.path { 1 } else { 12 };
                let place = place.unwrap_or(usize::MAX);
                assert!(place < within, "{typed}: {} stands at {place}", row.path);
            }
        }
    }

    #[test]
    fn a_symbol_leads_to_what_it_stands_for() {
        let things = of_the_orchard_carrier();
        for row in helmsplit_scenario::parameters() {
            if row.symbol.is_empty() {
                continue;
            }
            let found = ranked(&things, row.symbol);
            let best = found.places.first().map(|&place| things[place].symbol);
            assert_eq!(best, Some(row.symbol), "{}", row.path);
        }
    }

    #[test]
    fn choices_verdicts_and_commands_are_found() {
        for (typed, label) in [
            ("overshoot", "Overshoot"),
            ("undo", "Undo"),
            ("psi", "Units, US: psi, gpm, in"),
            ("dark", "Appearance, dark"),
        ] {
            assert_eq!(first(typed), label, "{typed}");
        }
    }

    #[test]
    fn a_slip_of_the_key_is_mended_and_said() {
        let things = of_the_orchard_carrier();
        let found = ranked(&things, "oriffice");
        assert_eq!(found.instead.as_deref(), Some("orifice"), "the nearest");
        assert!(!found.places.is_empty(), "and what has it");
        assert_eq!(ranked(&things, "qqqq"), Found::default(), "nothing near");
    }

    #[test]
    fn nothing_typed_is_everything_in_order() {
        let things = of_the_orchard_carrier();
        let found = ranked(&things, "  ");
        assert_eq!(found.places.len(), things.len(), "all");
    }
}
