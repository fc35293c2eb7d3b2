//! Bad files and what is said about each.

use crate::finding::Severity;
use crate::scenario::Scenario;

struct Bad {
    text: &'static str,
    place: (usize, usize),
    path: &'static str,
    value: Option<&'static str>,
    message: &'static str,
    hint: &'static str,
}

const fn bad(
    text: &'static str,
    place: (usize, usize),
    path: &'static str,
    value: Option<&'static str>,
    message: &'static str,
    hint: &'static str,
) -> Bad {
    Bad {
        text,
        place,
        path,
        value,
        message,
        hint,
    }
}

const BAD: &[Bad] = &[
    bad(
        "(\n  pump: (displacment: \"20 cm3/rev\"))",
        (2, 10),
        "pump.displacment",
        None,
        "pump has no such field",
        "did you mean displacement?",
    ),
    bad(
        "(\n  pmp: (displacement: \"20 cm3/rev\"))",
        (2, 3),
        "pmp",
        None,
        "no such section",
        "did you mean pump?",
    ),
    bad(
        "(spool_mass: \"110 g\")",
        (1, 2),
        "spool_mass",
        None,
        "no such section",
        "spool_mass belongs into the section valve",
    ),
    bad(
        "(valve: (displacement: \"20 cm3/rev\"))",
        (1, 10),
        "valve.displacement",
        None,
        "valve has no such field",
        "did you mean pump.displacement?",
    ),
    bad(
        "(valve: (\n    spool_diameter: \"20 bar\"))",
        (2, 21),
        "valve.spool_diameter",
        Some("20 bar"),
        "bar is a pressure, but a length is wanted",
        "such as \"20 mm\"",
    ),
    bad(
        "(valve: (spool_diameter: \"20\"))",
        (1, 26),
        "valve.spool_diameter",
        Some("20"),
        "needs a unit",
        "20 mm",
    ),
    bad(
        "(valve: (spool_diameter: 20))",
        (1, 26),
        "valve.spool_diameter",
        Some("20"),
        "needs a unit",
        "20 mm",
    ),
    bad(
        "(valve: (spool_diameter: \"3,7 mm\"))",
        (1, 26),
        "valve.spool_diameter",
        Some("3,7 mm"),
        "comma",
        "3.7",
    ),
    bad(
        "(valve: (spool_diameter: \"20 mn\"))",
        (1, 26),
        "valve.spool_diameter",
        Some("20 mn"),
        "not a unit of length",
        "did you mean mm?",
    ),
    bad(
        "(valve: (spool_diameter: \"0 mm\"))",
        (1, 26),
        "valve.spool_diameter",
        Some("0 mm"),
        "too small",
        "above 1, up to 150 mm",
    ),
    bad(
        "(valve: (spool_diameter: \"1 m\"))",
        (1, 26),
        "valve.spool_diameter",
        Some("1 m"),
        "too large",
        "above 1, up to 150 mm",
    ),
    bad(
        "(valve: (spool_diameter: \"nan mm\"))",
        (1, 26),
        "valve.spool_diameter",
        Some("nan mm"),
        "finite",
        "20 mm",
    ),
    bad(
        "(valve: (spool_diameter: [1]))",
        (1, 26),
        "valve.spool_diameter",
        Some("[1]"),
        "this is a list",
        "",
    ),
    bad(
        "(valve: (land: chamfer))",
        (1, 16),
        "valve.land",
        Some("chamfer"),
        "a word without quotes",
        "write \"chamfer\"",
    ),
    bad(
        "(valve: (land: \"chamfered\"))",
        (1, 16),
        "valve.land",
        Some("chamfered"),
        "no such option",
        "did you mean \"chamfer\"?",
    ),
    bad(
        "(valve: \"large\")",
        (1, 9),
        "valve",
        Some("\"large\""),
        "this is a text",
        "",
    ),
    bad(
        "(pump: (teeth: \"11.5\"))",
        (1, 16),
        "pump.teeth",
        Some("11.5"),
        "whole number",
        "",
    ),
    bad(
        "(format: 7)",
        (1, 10),
        "format",
        Some("7"),
        "newer",
        "newer version",
    ),
    bad(
        "(format: \"1\")",
        (1, 10),
        "format",
        Some("\"1\""),
        "bare number",
        "format: 1",
    ),
    bad(
        "(name: 5)",
        (1, 8),
        "name",
        Some("5"),
        "a text in quotes is wanted",
        "",
    ),
    bad(
        "(pump: (wear: \"1\"),\n pump: (wear: \"2\"))",
        (2, 2),
        "pump",
        None,
        "already given in line 1",
        "keep one",
    ),
    bad(
        "(manoeuvre: (\n  wheel_rate: [(\"0 s\", \"0 rpm\"), (\"2 s\", \"9 rpm\"), (\"1 s\", \"0 rpm\")]))",
        (2, 52),
        "manoeuvre.wheel_rate[2]",
        Some("1 s"),
        "before the point ahead",
        "in the order of time",
    ),
    bad(
        "(manoeuvre: (wheel_rate: [(\"0 s\")]))",
        (1, 27),
        "manoeuvre.wheel_rate[0]",
        Some("(\"0 s\")"),
        "two quantities",
        "",
    ),
    bad(
        "(manoeuvre: (wheel_rate: [(\"0 s\", \"9 bar\")]))",
        (1, 27),
        "manoeuvre.wheel_rate[0]",
        Some("9 bar"),
        "bar is a pressure",
        "1800 rpm",
    ),
    bad(
        "(manoeuvre: (wheel_rate: \"9 rpm\"))",
        (1, 26),
        "manoeuvre.wheel_rate",
        Some("\"9 rpm\""),
        "a list of breakpoints",
        "",
    ),
    bad(
        "(manoeuvre: (templates: [(kind: \"wheel stp\", at: \"1 s\")]))",
        (1, 33),
        "manoeuvre.templates[0].kind",
        Some("wheel stp"),
        "no such template",
        "did you mean \"wheel step\"?",
    ),
    bad(
        "(manoeuvre: (templates: [(at: \"1 s\")]))",
        (1, 26),
        "manoeuvre.templates[0].kind",
        None,
        "missing",
        "wheel step",
    ),
    bad(
        "(manoeuvre: (templates: [(kind: \"wheel step\", att: \"1 s\")]))",
        (1, 47),
        "manoeuvre.templates[0].att",
        None,
        "no such field",
        "did you mean at?",
    ),
    bad(
        "(manoeuvre: (templates: [(kind: \"wheel step\", rate: \"1 s\")]))",
        (1, 53),
        "manoeuvre.templates[0].rate",
        Some("1 s"),
        "s is a time",
        "rpm",
    ),
    bad(
        "(valve: (land: \"table\", table: [(\"1 mm\", \"2 mm2\"), (\"0 mm\", \"3 mm2\")]))",
        (1, 52),
        "valve.table[1]",
        Some("0 mm, 3 mm2"),
        "travel must rise",
        "points such as",
    ),
    bad(
        "(valve: (spring_volume: \"2 cm3\"))",
        (1, 25),
        "valve.spring_volume",
        Some("2 cm3"),
        "sweeps",
        "more than",
    ),
    bad(
        "(steering: (bypass_shut: \"1 deg\"))",
        (1, 2),
        "steering.dead_band",
        Some("1 deg"),
        "shut before the edges open",
        "bypass_shut",
    ),
];

#[test]
fn bad_input_is_named_and_placed() {
    for case in BAD {
        let (scenario, findings) = Scenario::from_text("bad.circuit.ron", case.text);
        assert!(scenario.is_none(), "{}", case.text);
        let found = findings
            .iter()
            .find(|f| f.severity == Severity::Error && f.path == case.path);
        let Some(finding) = found else {
            panic!("{}: nothing about {} in\n{findings}", case.text, case.path);
        };
        assert_eq!(
            (finding.line, finding.column),
            (Some(case.place.0), Some(case.place.1)),
            "place of {finding} in {}",
            case.text
        );
        assert_eq!(finding.value.as_deref(), case.value, "{finding}");
        assert!(finding.message.contains(case.message), "message: {finding}");
        assert!(finding.hint.contains(case.hint), "hint: {finding}");
        let line = format!("bad.circuit.ron:{}:{}: error", case.place.0, case.place.1);
        assert!(findings.to_string().contains(&line), "{findings}");
    }
}
