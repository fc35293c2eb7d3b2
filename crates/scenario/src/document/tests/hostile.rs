//! Files made to break the reader.

use std::fmt::Write as _;
use std::path::PathBuf;

use proptest::prelude::*;

use super::super::{Document, not_utf8, reader};
use super::refusals::refusal;
use super::{SAMPLE, read};

#[test]
fn deep_nesting_is_refused_before_any_recursion() {
    for depth in [reader::MAX_DEPTH + 1, 200, 500_000] {
        let text = format!("{}1{}", "(a: ".repeat(depth), ")".repeat(depth));
        let message = refusal(&text);
        let column = 4 * reader::MAX_DEPTH + 1;
        assert_eq!(
            message,
            format!("a.ron:1:{column}: brackets are nested more than 24 deep"),
            "{depth}"
        );
        refusal(&"[".repeat(depth));
    }
    let depth = reader::MAX_DEPTH;
    read(&format!("{}1{}", "(a: ".repeat(depth), ")".repeat(depth)));
    read(&format!(
        "(a: {}1{})",
        "Some(".repeat(depth - 1),
        ")".repeat(depth - 1)
    ));
    read(&format!(
        "(a: {}1{})",
        "[".repeat(depth - 1),
        "]".repeat(depth - 1)
    ));
}

#[test]
fn a_flood_of_values_is_refused() {
    let mut text = "(a: [".to_owned();
    for index in 0..=reader::MAX_NODES {
        write!(text, "{},", index % 10).expect("memory");
    }
    text.push_str("])");
    assert_eq!(
        refusal(&text),
        "a.ron: the file has more than 100000 values",
        "too many"
    );
    let text = "x".repeat(5_000_000);
    assert!(
        refusal(&text).starts_with("a.ron: the file has 5000000 bytes"),
        "too long"
    );
}

/// Pieces from which nasty but nearly right files are made.
fn pieces() -> impl Strategy<Value = String> {
    let piece = prop::sample::select(vec![
        "(",
        ")",
        "[",
        "]",
        "{",
        "}",
        ",",
        ":",
        "a",
        "b: ",
        "\"x\"",
        "\"",
        "r#\"",
        "\"#",
        "//",
        "\n",
        "/*",
        "*/",
        "1",
        "-",
        ".5",
        "1e",
        "'",
        "'('",
        "\\",
        "Some(",
        "None",
        "true",
        "..",
        "b\"",
        "µ",
        " ",
        "#![enable(implicit_some)]",
        "#![",
        "a: (",
        "),",
        "r#a",
        "_",
        "0x1F",
        "1_0u8",
        "\u{2028}",
        "\0",
    ]);
    prop::collection::vec(piece, 0..40).prop_map(|pieces| pieces.concat())
}

/// Reads and, if it is RON, checks that every span is the text of its value.
fn read_any(text: &str) -> Result<(), TestCaseError> {
    let Ok(document) = Document::from_text("a.ron", text) else {
        return Ok(());
    };
    let mut open = vec![document.root()];
    while let Some(node) = open.pop() {
        let written = document.written(node);
        prop_assert!(
            !written.is_empty() && written.trim() == written,
            "{:?} of {:?}",
            written,
            text
        );
        let again: Result<ron::Value, _> = ron::from_str(written);
        prop_assert!(
            again.is_ok(),
            "{:?} of {:?} must be a value: {:?}",
            written,
            text,
            again
        );
        open.extend(
            node.fields()
                .unwrap_or(&[])
                .iter()
                .map(|field| &field.value),
        );
        open.extend(node.elements().unwrap_or(&[]));
    }
    Ok(())
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(2000))]

    #[test]
    fn random_pieces_never_panic(text in pieces()) {
        read_any(&text)?;
        read_any(&format!("(a: {text})"))?;
        read_any(&format!("(a: [{text}], b: \"x\")"))?;
    }

    #[test]
    fn random_letters_never_panic(text in "\\PC{0,80}") {
        read_any(&text)?;
    }

    #[test]
    fn random_bytes_never_panic(bytes in prop::collection::vec(any::<u8>(), 0..200)) {
        read_any(&String::from_utf8_lossy(&bytes))?;
        if let Err(error) = String::from_utf8(bytes) {
            let refused = not_utf8(PathBuf::from("a.ron"), &error);
            prop_assert!(refused.place().is_some(), "{}", refused);
        }
    }

    #[test]
    fn a_sample_with_one_change_never_panics(at in 0..SAMPLE.len(), letter in "[(){}\\[\\]\"',:/*\\\\r#a0 \\n]") {
        let at = (at..SAMPLE.len()).find(|at| SAMPLE.is_char_boundary(*at)).unwrap_or(0);
        let mut text = SAMPLE.to_owned();
        text.insert_str(at, &letter);
        read_any(&text)?;
        let end = at + text[at..].chars().next().map_or(0, char::len_utf8);
        text.replace_range(at..end, "");
        text.replace_range(at..at + text[at..].chars().next().map_or(0, char::len_utf8), &letter);
        read_any(&text)?;
    }
}
