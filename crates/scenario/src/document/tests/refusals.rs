//! Bad files, with the words a person gets to read.

use std::fs;
use std::path::Path;

use super::super::Document;
use super::{SAMPLE, read};
use crate::error::FileError;

pub(super) fn refusal(text: &str) -> String {
    match Document::from_text("a.ron", text) {
        Ok(_) => panic!("{text:?} must be refused"),
        Err(error) => error.to_string(),
    }
}

#[test]
#[allow(clippy::too_many_lines, reason = "a table")]
fn syntax_errors_say_where_and_what() {
    for (text, message) in [
        (
            "(a: \"1\"\n b: \"2\")",
            "a.ron:2:2: a comma is missing before this",
        ),
        (
            "(a: 3.7 mm)",
            "a.ron:1:9: a quantity stands in double quotes, such as \"3.7 mm\"",
        ),
        (
            "(a: 50 %)",
            "a.ron:1:8: a quantity stands in double quotes, such as \"3.7 mm\"",
        ),
        (
            "(a \"1\")",
            "a.ron:1:4: a colon is expected after the name of the field",
        ),
        (
            "(b: 1, a \"1\")",
            "a.ron:1:10: a colon is expected after the name of the field",
        ),
        (
            "(b: 1, spool-mass: 1)",
            "a.ron:1:8: \"spool-mass\" cannot be a name; names have letters, digits and _",
        ),
        ("(a: “x”)", "a.ron:1:5: use straight double quotes"),
        (
            "(a: ?)",
            "a.ron:1:5: '?' cannot stand here; texts stand in double quotes",
        ),
        (
            "(a: \"x\",\n b: [1, 2),\n)",
            "a.ron:2:10: `[` of line 2 is closed by `)`",
        ),
        (
            "(a: 1) (b: 2)",
            "a.ron:1:8: something follows after the closing bracket of the file",
        ),
        (
            "(\n a: \"20 mm,\n b: \"x\",\n)",
            "a.ron:2:5: the text that begins here runs over the end of its line; its closing quote seems to be missing",
        ),
        (
            "(\n a: (\n  b: 1,\n c: 2,\n)",
            "a.ron:1:1: the file ends before `(` of line 1 is closed; by the indentation, the bracket opened in line 2 was forgotten",
        ),
        (
            "[1, 2]",
            "a.ron:1:1: a circuit file is one section `( ... )`, but this is a list",
        ),
        (
            "hello",
            "a.ron:1:1: a circuit file is one section `( ... )`, but this is a word without quotes",
        ),
        (
            "\"hello\"",
            "a.ron:1:1: a circuit file is one section `( ... )`, but this is a text",
        ),
        (
            "(\"a\", \"b\")",
            "a.ron:1:1: a circuit file is one section `( ... )`, but this is a group without keys",
        ),
        ("", "a.ron: the file is empty"),
        ("  \n// only words\n/* more */", "a.ron: the file is empty"),
        (
            "(a: [1, (2",
            "a.ron:1:9: the file ends before `(` of line 1 is closed",
        ),
        (
            "(\na: \"20 m",
            "a.ron:2:4: the file ends before the text of line 2 is closed",
        ),
        (
            "(a: 1, /* never",
            "a.ron:1:8: the file ends before the comment of line 1 is closed",
        ),
    ] {
        assert_eq!(refusal(text), message, "{text:?}");
    }
    let escape = refusal("(a: \"C:\\dir\")");
    assert!(
        escape.starts_with("a.ron:1:") && escape.contains("a backslash in a text begins an escape"),
        "{escape}"
    );
}

#[test]
fn a_sample_cut_at_any_byte_is_refused_in_words() {
    let whole = SAMPLE.trim_end().len();
    for end in (0..whole).filter(|end| SAMPLE.is_char_boundary(*end)) {
        let error = Document::from_text("a.ron", &SAMPLE[..end]).expect_err("a cut file");
        let slash = error.to_string() == "a.ron:1:2: the file ends too early";
        let known = slash || matches!(error, FileError::Truncated { .. } | FileError::Empty { .. });
        assert!(known, "cut after {end} bytes: {error}");
    }
    read(&SAMPLE[..whole]);
}

#[test]
fn files_that_are_none_are_told_apart() {
    let folder = tempfile::tempdir().expect("a folder");
    let message = |name: &str| {
        let path = folder.path().join(name);
        let error = Document::read(&path).expect_err(name);
        assert!(
            error.to_string().starts_with(&path.display().to_string()),
            "the path comes first: {error}"
        );
        error
            .to_string()
            .replacen(&path.display().to_string(), "", 1)
    };
    assert_eq!(message("none.ron"), ": there is no such file", "missing");
    assert_eq!(
        message("."),
        ": this is a folder, but a file is wanted",
        "folder"
    );
    fs::write(folder.path().join("empty.ron"), "").expect("written");
    assert_eq!(message("empty.ron"), ": the file is empty", "empty");
    fs::write(folder.path().join("latin.ron"), b"(\n  name: \"\xb5m\")").expect("written");
    assert_eq!(
        message("latin.ron"),
        ":2:10: the file is not UTF-8 text (after 11 bytes); save it as UTF-8",
        "not UTF-8"
    );
    fs::write(folder.path().join("wide.ron"), b"\xff\xfe(\0a\0").expect("written");
    assert_eq!(
        message("wide.ron"),
        ":1:1: the file is not UTF-8 text (after 0 bytes); it looks like UTF-16: save it as UTF-8",
        "UTF-16"
    );
    let huge = fs::File::create(folder.path().join("huge.ron")).expect("created");
    huge.set_len(100 * 1024 * 1024).expect("a hole of 100 MB");
    let text = message("huge.ron");
    assert!(
        text.starts_with(": the file has 104857600 bytes; a circuit has a few thousand"),
        "{text}"
    );
    let path = folder.path().join("good.ron");
    fs::write(&path, SAMPLE).expect("written");
    assert_eq!(
        Document::read(&path).expect("good").source(),
        SAMPLE,
        "a good file is read as it is"
    );
}

#[test]
fn refusals_of_the_system_keep_their_kind() {
    let error = |kind: std::io::ErrorKind| {
        FileError::from_read(Path::new("a.ron"), kind.into()).to_string()
    };
    assert_eq!(
        error(std::io::ErrorKind::PermissionDenied),
        "a.ron: there is no permission for this file",
        "denied"
    );
    let other = error(std::io::ErrorKind::TimedOut);
    assert!(
        other.starts_with("a.ron: the file cannot be read: "),
        "{other}"
    );
}

#[test]
fn an_error_turns_into_a_finding() {
    let error = Document::from_text("a.ron", "(a: 3.7 mm)").expect_err("no quotes");
    let finding = error.to_finding();
    assert_eq!(
        (finding.line, finding.column),
        (Some(1), Some(9)),
        "its place"
    );
    assert_eq!(finding.message, error.message(), "its words");
}
