//! Reading good files; bad and hostile ones in the files beside.

mod hostile;
mod refusals;

use super::*;

const SAMPLE: &str = r##"// An invented machine.
(
    format: 1,
    name: "Orchard carrier", // a name
    notes: r#"Holds "quotes",
and lines."#,
    valve: Valve(
        spool_diameter: "20 mm", /* inner */
        spool_mass: /* before */ "110 g" /* behind */,
        label: "tab\tand µ",
        fitted: true,
    ),
    points: [("0 s", "800 rpm"), ("0.5 s", "2200 rpm"),],
    steps: 2_000,
    kind: none, // bare
    line: (),
    empty: ( ),
    more: Some("x"),
)
"##;

fn read(text: &str) -> Document {
    Document::from_text("a.ron", text).unwrap_or_else(|error| panic!("{error}"))
}

#[test]
fn values_come_with_their_kind_and_their_bytes() {
    let document = read(SAMPLE);
    for (path, written, kind) in [
        ("format", "1", Kind::Number(1.0)),
        (
            "name",
            "\"Orchard carrier\"",
            Kind::Text("Orchard carrier".to_owned()),
        ),
        (
            "notes",
            "r#\"Holds \"quotes\",\nand lines.\"#",
            Kind::Text("Holds \"quotes\",\nand lines.".to_owned()),
        ),
        (
            "valve.spool_diameter",
            "\"20 mm\"",
            Kind::Text("20 mm".to_owned()),
        ),
        (
            "valve.spool_mass",
            "\"110 g\"",
            Kind::Text("110 g".to_owned()),
        ),
        (
            "valve.label",
            "\"tab\\tand µ\"",
            Kind::Text("tab\tand µ".to_owned()),
        ),
        ("valve.fitted", "true", Kind::Bool(true)),
        ("steps", "2_000", Kind::Number(2000.0)),
        ("kind", "none", Kind::Word("none".to_owned())),
        ("line", "()", Kind::Struct(Vec::new())),
        ("empty", "( )", Kind::Struct(Vec::new())),
        ("more", "\"x\"", Kind::Text("x".to_owned())),
    ] {
        let node = document
            .get(path)
            .unwrap_or_else(|| panic!("{path} must be found"));
        assert_eq!(document.written(node), written, "bytes of {path}");
        assert_eq!(node.kind, kind, "kind of {path}");
    }
    assert_eq!(document.get("valve.nothing"), None, "no such key");
    assert_eq!(document.get("format.deeper"), None, "a number has no keys");
    let valve = document.get("valve").expect("the valve");
    assert_eq!(valve.name.as_deref(), Some("Valve"), "a name is kept");
    assert!(
        document.written(valve).starts_with("Valve(") && document.written(valve).ends_with(')'),
        "whole section"
    );
}

#[test]
fn lists_and_groups_keep_the_place_of_each_element() {
    let document = read(SAMPLE);
    let points = document.get("points").expect("the points");
    assert_eq!(points.describe(), "a list", "brackets make a list");
    let points = points.elements().expect("a list");
    assert_eq!(points.len(), 2, "two points");
    assert_eq!(
        points[1].describe(),
        "a group without keys",
        "parentheses make a group"
    );
    let last = &points[1].elements().expect("a group")[1];
    assert_eq!(last.text(), Some("2200 rpm"), "its text");
    assert_eq!(
        document.place(last.span.start),
        Place {
            line: 13,
            column: 44
        },
        "its place"
    );
    let nested = document.get("valve.spool_mass").expect("the mass");
    assert_eq!(
        document.place(nested.span.start),
        Place {
            line: 9,
            column: 34
        },
        "behind a comment"
    );
}

#[test]
fn keys_know_their_place() {
    let document = read(SAMPLE);
    for field in document.root().fields().expect("a section") {
        assert_eq!(
            &document.source()[field.key.span.clone()],
            field.key.text,
            "key bytes"
        );
    }
}

#[test]
fn what_circuits_do_not_use_is_named() {
    let document = read("(a: {\"k\": 1}, b: 'x', c: 1..2, d: b\"x\", e: ..5, f: inf)");
    for (key, words) in [
        ("a", "a map"),
        ("b", "a single character"),
        ("c", "a range"),
        ("d", "a text of bytes"),
        ("e", "a range"),
    ] {
        let node = document.get(key).expect("it is there");
        assert_eq!(node.describe(), words, "{key}");
    }
    assert_eq!(
        document.get("f").map(|node| &node.kind),
        Some(&Kind::Number(f64::INFINITY)),
        "inf"
    );
    assert_eq!(
        document.written(document.get("a").expect("the map")),
        "{\"k\": 1}",
        "bytes of a map"
    );
    assert_eq!(
        document.written(document.get("c").expect("the range")),
        "1..2",
        "bytes of a range"
    );
}

#[test]
fn doubled_keys_are_found_at_every_level() {
    let text = "(\n    a: 1,\n    b: (c: 1, d: 2, c: 3),\n    a: 2,\n    e: [(f: 1, f: 2)],\n)";
    let found: Vec<_> = read(text)
        .doubled_keys()
        .iter()
        .map(|finding| (finding.to_string(), finding.path.clone()))
        .collect();
    let expected = [
        (
            "3:21: error: b.c: this key was already given in line 3; keep one of the two",
            "b.c",
        ),
        (
            "4:5: error: a: this key was already given in line 2; keep one of the two",
            "a",
        ),
        (
            "5:16: error: e[0].f: this key was already given in line 5; keep one of the two",
            "e[0].f",
        ),
    ]
    .map(|(line, path)| (line.to_owned(), path.to_owned()));
    assert_eq!(found, expected, "each second key");
    assert_eq!(
        read(SAMPLE).doubled_keys(),
        Vec::new(),
        "none in the sample"
    );
}

#[test]
fn a_byte_order_mark_is_passed_over() {
    let document = read("\u{feff}(a: 1)");
    let node = document.get("a").expect("it is there");
    assert_eq!(
        document.place(node.span.start),
        Place { line: 1, column: 5 },
        "columns as editors count"
    );
}
