//! Equation numbers: what the code cites stands in docs/model.md, and what docs/model.md states is
//! cited in the code.

use std::collections::{BTreeMap, BTreeSet};
use std::path::{Path, PathBuf};

use helmsplit_scenario::PRESETS;

/// The folder of the repository.
fn root() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("..")
}

/// The equation number at the start of `text`, if there is one: `M`, digits, then perhaps a dot,
/// digits and one small letter.
fn number_at(text: &str) -> Option<&str> {
    let digits = |from: usize| text[from..].bytes().take_while(u8::is_ascii_digit).count();
    if !text.starts_with('M') {
        return None;
    }
    let whole = digits(1);
    if whole == 0 || whole > 2 {
        return None;
    }
    let mut end = 1 + whole;
    if text[end..].starts_with('.') {
        let part = digits(end + 1);
        if part > 0 {
            end += 1 + part;
            let letter = text[end..].bytes().next();
            if letter.is_some_and(|b| b.is_ascii_lowercase()) {
                end += 1;
            }
        }
    }
    let next = text[end..].chars().next();
    let is_word = next.is_some_and(|c| c.is_ascii_alphanumeric() || c == '_');
    (!is_word).then(|| &text[..end])
}

/// All equation numbers in a text.
fn numbers(text: &str) -> BTreeSet<String> {
    let mut found = BTreeSet::new();
    let mut before = ' ';
    for (index, character) in text.char_indices() {
        let starts_word = !(before.is_ascii_alphanumeric() || before == '_' || before == '.');
        if character == 'M' && starts_word {
            found.extend(number_at(&text[index..]).map(str::to_owned));
        }
        before = character;
    }
    found
}

/// Every Rust file below a folder.
fn rust_files(folder: &Path, files: &mut Vec<PathBuf>) {
    for entry in std::fs::read_dir(folder).expect("the folder can be read") {
        let path = entry.expect("the entry can be read").path();
        if path.is_dir() {
            rust_files(&path, files);
        } else if path.extension().is_some_and(|extension| extension == "rs") {
            files.push(path);
        }
    }
}

/// Numbers cited in the code, with the first file that cites each.
fn cited() -> BTreeMap<String, PathBuf> {
    let mut files = Vec::new();
    rust_files(&root().join("crates"), &mut files);
    files.sort();
    assert!(files.len() > 20, "the walk over the crates finds the code");
    let mut cited = BTreeMap::new();
    for file in files {
        let text = std::fs::read_to_string(&file).expect("source is text");
        for number in numbers(&text) {
            cited.entry(number).or_insert_with(|| file.clone());
        }
    }
    cited
}

/// Numbers that head a section of docs/model.md, and whether the section states an equation: a
/// block of formulas.
fn stated() -> BTreeMap<String, bool> {
    let text =
        std::fs::read_to_string(root().join("docs/model.md")).expect("docs/model.md is there");
    let mut stated = BTreeMap::new();
    let mut current: Option<String> = None;
    for line in text.lines() {
        if line.starts_with('#') {
            let title = line.trim_start_matches('#').trim_start();
            current = number_at(title).map(str::to_owned);
            if let Some(number) = &current {
                let before = stated.insert(number.clone(), false);
                assert!(before.is_none(), "{number} heads two sections");
            }
        } else if line.starts_with("```")
            && let Some(number) = &current
        {
            stated.insert(number.clone(), true);
        }
    }
    stated
}

#[test]
fn numbers_are_told_from_other_words() {
    let text = "M2.1 (M5.9b), M10; not MP3, xM1, M12x, M123, f.M4 or M.2; M7.5.";
    let expected = ["M2.1", "M5.9b", "M10", "M7.5"].map(str::to_owned);
    assert_eq!(numbers(text), BTreeSet::from(expected), "{text}");
}

#[test]
fn every_cited_number_stands_in_the_document() {
    let stated = stated();
    let missing: Vec<String> = cited()
        .into_iter()
        .filter(|(number, _)| !stated.contains_key(number))
        .map(|(number, file)| format!("{number} in {}", file.display()))
        .collect();
    assert!(
        missing.is_empty(),
        "not in docs/model.md: {}",
        missing.join(", ")
    );
}

#[test]
fn every_stated_equation_is_cited_in_the_code() {
    let cited = cited();
    let stated = stated();
    let equations = stated.values().filter(|states| **states).count();
    assert!(equations > 40, "only {equations} equations found");
    let idle: Vec<&str> = stated
        .iter()
        .filter(|(number, states)| **states && !cited.contains_key(*number))
        .map(|(number, _)| number.as_str())
        .collect();
    assert!(idle.is_empty(), "stated but cited nowhere: {idle:?}");
}

/// References inside the document, and from the verification document, lead somewhere.
#[test]
fn references_between_documents_resolve() {
    let stated = stated();
    for name in ["model.md", "verification.md"] {
        let text = std::fs::read_to_string(root().join("docs").join(name)).expect("it is there");
        for number in numbers(&text) {
            assert!(
                stated.contains_key(&number),
                "{name} refers to {number}, which docs/model.md does not have"
            );
        }
    }
}

/// Names of states in traces and messages are those of the document.
#[test]
fn states_are_named_as_in_the_document() {
    let text = std::fs::read_to_string(root().join("docs/model.md")).expect("it is there");
    for preset in PRESETS {
        let scenario = preset.scenario().expect("presets are scenarios");
        let circuit = scenario.circuit().expect("presets are circuits");
        for state in circuit.states() {
            // Further segments of the line are named by example.
            let is_segment = state.name.starts_with("p_l") || state.name.starts_with("q_l");
            assert!(
                is_segment || text.contains(&format!("`{}`", state.name)),
                "{}: docs/model.md does not name the state {}",
                preset.key,
                state.name
            );
        }
    }
}
