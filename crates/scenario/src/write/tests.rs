//! Edits and fresh files, read back with our own reader.

use proptest::prelude::*;

use super::*;
use crate::document::{Document, Kind, Node};

fn read(text: &str) -> Document {
    Document::from_text("a.ron", text).unwrap_or_else(|error| panic!("{error}\n{text}"))
}

fn add(text: &str, path: &str, key: &str, value: &str) -> String {
    let document = read(text);
    let section = if path.is_empty() {
        document.root()
    } else {
        document.get(path).expect("a section")
    };
    let edits = added_field(&document, section, key, value).expect("a section and a key");
    replace_values(text, edits).expect("edits that fit")
}

#[test]
fn replacing_keeps_all_around() {
    let text = "// head\n(\n    a: \"1 mm\", // of µ\n    b: r#\"x\"#, /* keep */\n)\n";
    let document = read(text);
    let edit = |key: &str, new: &str| {
        (
            document.get(key).expect("there").span.clone(),
            new.to_owned(),
        )
    };
    let changed =
        replace_values(text, vec![edit("b", "\"yy\""), edit("a", "\"20 mm\"")]).expect("fits");
    assert_eq!(
        changed, "// head\n(\n    a: \"20 mm\", // of µ\n    b: \"yy\", /* keep */\n)\n",
        "in any order"
    );
    assert_eq!(
        replace_values(text, Vec::new()).as_deref(),
        Ok(text),
        "no edit, no change"
    );
}

#[test]
#[allow(clippy::reversed_empty_ranges, reason = "a bad range is the case")]
fn edits_that_do_not_fit_are_refused() {
    let new = || "x".to_owned();
    let outside = |range: std::ops::Range<usize>| Err(EditError::Outside { range });
    assert_eq!(
        replace_values("aµb", vec![(0..9, new())]),
        outside(0..9),
        "beyond the end"
    );
    assert_eq!(
        replace_values("aµb", vec![(2..3, new())]),
        outside(2..3),
        "inside a character"
    );
    assert_eq!(
        replace_values("aµb", vec![(3..1, new())]),
        outside(3..1),
        "backwards"
    );
    let meeting = replace_values("abcdef", vec![(0..3, new()), (2..4, new())]);
    assert_eq!(meeting, Err(EditError::Overlap { at: 2 }), "overlapping");
    let two = replace_values("ab", vec![(1..1, "1".to_owned()), (1..1, "2".to_owned())]);
    assert_eq!(two.as_deref(), Ok("a12b"), "insertions keep their order");
}

#[test]
#[allow(clippy::too_many_lines, reason = "a table")]
fn an_added_field_is_laid_out_like_the_others() {
    for (text, path, expected) in [
        ("()", "", "(k: \"v\")"),
        ("(a: 1)", "", "(a: 1, k: \"v\")"),
        ("(a: 1,)", "", "(a: 1, k: \"v\",)"),
        ("(\n    a: 1\n)", "", "(\n    a: 1,\n    k: \"v\",\n)"),
        (
            "(\n    a: 1, // one\n)\n",
            "",
            "(\n    a: 1, // one\n    k: \"v\",\n)\n",
        ),
        (
            "(\n    a: 1 // one\n)\n",
            "",
            "(\n    a: 1, // one\n    k: \"v\",\n)\n",
        ),
        (
            "(\n\ta: (b: 2),\n\t// last\n)",
            "a",
            "(\n\ta: (b: 2, k: \"v\"),\n\t// last\n)",
        ),
        (
            "(\n\ta: (b: 2),\n\t// last\n)",
            "",
            "(\n\ta: (b: 2),\n\tk: \"v\",\n\t// last\n)",
        ),
        ("(a: 1 // one\n)", "", "(a: 1, // one\nk: \"v\",\n)"),
        ("(a: 1 /* one */)", "", "(a: 1, /* one */ k: \"v\")"),
        ("(a: Some(1))", "", "(a: Some(1), k: \"v\")"),
        (
            "(a: Some(1,) /* c */)",
            "",
            "(a: Some(1,), /* c */ k: \"v\")",
        ),
        ("(a: ( // empty\n ))", "a", "(a: ( // empty\n k: \"v\"))"),
    ] {
        let changed = add(text, path, "k", "\"v\"");
        assert_eq!(changed, expected, "{text:?}");
        let path = if path.is_empty() {
            "k".to_owned()
        } else {
            format!("{path}.k")
        };
        assert_eq!(
            read(&changed).get(&path).and_then(Node::text),
            Some("v"),
            "{changed:?} must read"
        );
    }
    let document = read("(a: 1)");
    let number = document.get("a").expect("there");
    assert_eq!(
        added_field(&document, number, "k", "1"),
        Err(EditError::NotASection),
        "a number"
    );
    let bad = added_field(&document, document.root(), "a-b", "1");
    assert_eq!(
        bad,
        Err(EditError::InvalidKey {
            key: "a-b".to_owned()
        }),
        "no key"
    );
}

#[test]
#[allow(clippy::too_many_lines, reason = "a table")]
fn a_fresh_file_is_pleasant_to_read() {
    let point = |time: &str, speed: &str| Value::Tuple(vec![Value::text(time), Value::text(speed)]);
    let step = vec![
        ("kind".to_owned(), Value::text("wheel step")),
        ("at".to_owned(), Value::text("3 s")),
    ];
    let valve = vec![
        Entry::commented("spool_diameter", Value::text("20 mm"), "bore of the spool"),
        Entry::commented("preload", Value::text("176 N"), "at x = 0"),
        Entry::field("land", Value::text("chamfer")),
        Entry::commented(
            "a_very_long_name_of_a_parameter_that_fills",
            Value::text("1234.5 cm3/rev"),
            "above",
        ),
    ];
    let root = [
        Entry::Comment("Orchard carrier\nAn invented machine.".to_owned()),
        Entry::field("format", Value::Integer(1)),
        Entry::field("notes", Value::text("Hold the wheel\nand \"watch\".")),
        Entry::Blank,
        Entry::Comment("The valve".to_owned()),
        Entry::field("valve", Value::Section(valve)),
        Entry::field("line", Value::Section(Vec::new())),
        Entry::field("templates", Value::List(vec![Value::Inline(step)])),
        Entry::field(
            "points",
            Value::List((0..5).map(|_| point("0.25 s", "2200 rpm")).collect()),
        ),
        Entry::field("fitted", Value::Bool(true)),
    ];
    let expected = r##"// Orchard carrier
// An invented machine.
(
    format: 1,
    notes: r#"Hold the wheel
and "watch"."#,

    // The valve
    valve: (
        spool_diameter: "20 mm", // bore of the spool
        preload: "176 N",        // at x = 0
        land: "chamfer",
        // above
        a_very_long_name_of_a_parameter_that_fills: "1234.5 cm3/rev",
    ),
    line: (),
    templates: [(kind: "wheel step", at: "3 s")],
    points: [
        ("0.25 s", "2200 rpm"),
        ("0.25 s", "2200 rpm"),
        ("0.25 s", "2200 rpm"),
        ("0.25 s", "2200 rpm"),
        ("0.25 s", "2200 rpm"),
    ],
    fitted: true,
)
"##;
    let text = emit(&root).expect("good keys");
    assert_eq!(text, expected, "the layout");
    assert_eq!(
        read(&text).get("valve.preload").and_then(Node::text),
        Some("176 N"),
        "and it reads"
    );
    let bad = emit(&[Entry::field("no key", Value::Bool(true))]);
    assert_eq!(
        bad,
        Err(EditError::InvalidKey {
            key: "no key".to_owned()
        }),
        "a bad key"
    );
}

fn value() -> impl Strategy<Value = Value> {
    let leaf = prop_oneof![
        any::<String>().prop_map(Value::Text),
        "[ -~\n\"#]{0,40}".prop_map(Value::Text),
        any::<i64>().prop_map(Value::Integer),
        any::<bool>().prop_map(Value::Bool),
    ];
    leaf.prop_recursive(3, 24, 5, |inner| {
        let key = "[a-z_][a-z0-9_]{0,8}";
        let entry = (key, inner.clone(), any::<String>())
            .prop_map(|(key, value, comment)| Entry::Field { key, value, comment });
        let entry = prop_oneof![4 => entry, 1 => any::<String>().prop_map(Entry::Comment), 1 => Just(Entry::Blank)];
        prop_oneof![
            prop::collection::vec(entry, 0..5).prop_map(Value::Section),
            prop::collection::vec((key, inner.clone()), 0..4).prop_map(Value::Inline),
            prop::collection::vec(inner.clone(), 1..4).prop_map(Value::Tuple),
            prop::collection::vec(inner, 0..6).prop_map(Value::List),
        ]
    })
}

/// Whether a node holds what was written.
fn same(node: &Node, value: &Value) -> bool {
    let all = |nodes: &[Node], values: &[Value]| {
        nodes.len() == values.len()
            && nodes
                .iter()
                .zip(values)
                .all(|(node, value)| same(node, value))
    };
    match (&node.kind, value) {
        (Kind::Text(read), Value::Text(text)) => read == text,
        (Kind::Bool(read), Value::Bool(value)) => read == value,
        // Whole numbers beyond 2^53 lose digits in reading, as documented.
        (Kind::Number(read), Value::Integer(number)) => (*read - *number as f64).abs() < 1.0,
        (Kind::List(nodes), Value::List(values)) | (Kind::Tuple(nodes), Value::Tuple(values)) => {
            all(nodes, values)
        }
        (Kind::Struct(fields), Value::Inline(values)) => {
            fields.len() == values.len()
                && fields
                    .iter()
                    .zip(values)
                    .all(|(f, (key, v))| f.key.text == *key && same(&f.value, v))
        }
        (Kind::Struct(fields), Value::Section(entries)) => {
            let written: Vec<_> = entries
                .iter()
                .filter_map(|entry| match entry {
                    Entry::Field { key, value, .. } => Some((key, value)),
                    _ => None,
                })
                .collect();
            fields.len() == written.len()
                && fields
                    .iter()
                    .zip(written)
                    .all(|(f, (key, v))| f.key.text == *key && same(&f.value, v))
        }
        _ => false,
    }
}

proptest! {
    #[test]
    fn what_is_written_reads_back(value in value(), comment in any::<String>()) {
        let root = [Entry::Comment(comment.clone()), Entry::commented("a", value.clone(), comment)];
        let text = emit(&root).map_err(|error| TestCaseError::fail(error.to_string()))?;
        let document = Document::from_text("a.ron", text.clone());
        let document = document.map_err(|error| TestCaseError::fail(format!("{error}\n{text}")))?;
        let node = document.get("a").ok_or_else(|| TestCaseError::fail(text.clone()))?;
        prop_assert!(same(node, &value), "{}", text);
    }

    #[test]
    fn a_replaced_value_changes_nothing_else(value in value(), new in "[ -~]{0,20}") {
        let root = [
            Entry::commented("a", Value::text("1 mm"), "one"),
            Entry::commented("b", value.clone(), "two"),
        ];
        let text = emit(&root).map_err(|error| TestCaseError::fail(error.to_string()))?;
        let document = Document::from_text("a.ron", text.clone());
        let document = document.map_err(|error| TestCaseError::fail(format!("{error}\n{text}")))?;
        let span = document.get("a").map(|node| node.span.clone());
        let span = span.ok_or_else(|| TestCaseError::fail(text.clone()))?;
        let changed = replace_values(&text, vec![(span, text_literal(&new))])
            .map_err(|error| TestCaseError::fail(error.to_string()))?;
        let again = Document::from_text("a.ron", changed.clone());
        let again = again.map_err(|error| TestCaseError::fail(format!("{error}\n{changed}")))?;
        prop_assert_eq!(again.get("a").and_then(Node::text), Some(new.as_str()));
        prop_assert!(again.get("b").is_some_and(|node| same(node, &value)), "{}", changed);
    }
}
