//! The description of the circuit file, drawn from the tables.

use std::fmt::Write as _;

use crate::choice::{CHOICES, Condition};
use crate::manoeuvre::{INPUTS, TEMPLATES};
use crate::parameter::{Parameter, parameters};
use crate::read::sections;
use crate::units::{QUANTITIES, Unit, quantity_name, units_of};
use crate::value::range_text;

const INTRODUCTION: &str = "\
# The circuit file

This page is written by `cargo run -p helmsplit-scenario --example circuit_file_doc` from the \
tables that also read and check the files. Do not edit it by hand.

A circuit is one text file, `NAME.circuit.ron`, in RON (Rusty Object Notation, an open format). \
It holds one section in round brackets; each part of the circuit is a section of its own:

```ron
(
    format: 1,
    name: \"Orchard carrier\",
    pump: (displacement: \"20 cm3/rev\"), // a comment runs to the end of its line
    priority_relief: (kind: \"on the priority port\", cracking_pressure: \"140 bar\"),
    manoeuvre: (
        duration: \"10 s\",
        engine_speed: [(\"0 s\", \"900 rpm\"), (\"1 s\", \"900 rpm\"), (\"2 s\", \"2400 rpm\")],
        templates: [(kind: \"wheel step\", at: \"3 s\", rate: \"90 rpm\")],
    ),
)
```

- Quantities are texts with a unit, in any unit of the right kind (last table). Ratios and counts \
may stand without one, also as bare numbers.
- What is left out takes the default given here. Defaults are invented data of the orchard \
carrier, or invented to go with it.
- What is not known is an error that names the nearest known name. Values outside the allowed \
range are errors, values outside the usual range warnings. Usual ranges are common practice, no \
source, unless one is named.
- Values that the present choices do not use are kept and named in a warning.
- `format` is the version of the file, a bare number: 1. `name` and `notes` are free texts; notes \
of several lines stand in raw quotes `r\"...\"`.
- Equation numbers such as M5.3 refer to [model.md](model.md).

Pressures are gauge unless a row says absolute. Results support tests on the machine and never \
replace them; steering is safety-critical.
";

/// The whole description as Markdown: the content of docs/circuit-file.md.
#[must_use]
pub fn describe_markdown() -> String {
    let mut out = INTRODUCTION.to_owned();
    for section in sections() {
        let _ = writeln!(out, "\n## {section}\n");
        describe_section(&mut out, section);
    }
    describe_units(&mut out);
    out
}

fn describe_section(out: &mut String, section: &str) {
    for choice in CHOICES.iter().filter(|choice| choice.section() == section) {
        let _ = writeln!(
            out,
            "`{}`: {}{} Default \"{}\".\n",
            choice.name(),
            choice.note,
            condition_text(choice.when),
            choice.options[usize::from(choice.default)].key
        );
        for option in choice.options {
            let _ = writeln!(out, "- \"{}\": {}", option.key, option.note);
        }
        out.push('\n');
    }
    out.push_str("| name | meaning | default | allowed | usual | source |\n");
    out.push_str("|---|---|---|---|---|---|\n");
    for row in parameters().iter().filter(|row| row.section() == section) {
        describe_row(out, row);
    }
    match section {
        "valve" => out.push_str(
            "\n`table`, used while land is \"table\": a list of (travel behind the overlap, area), \
             such as `[(\"0 mm\", \"0 mm2\"), (\"2 mm\", \"30 mm2\")]`; travel rises, area never \
             falls. Between the points runs a monotone cubic.\n",
        ),
        "start" => out.push_str(
            "\n`state`, used while kind is \"from state\": the name of a file with a saved state, \
             beside the circuit file.\n",
        ),
        "manoeuvre" => describe_manoeuvre(out),
        _ => {}
    }
}

fn describe_row(out: &mut String, row: &Parameter) {
    let symbol = if row.symbol.is_empty() {
        String::new()
    } else {
        format!(" ({})", row.symbol)
    };
    let _ = writeln!(
        out,
        "| `{}` | **{}**{symbol}. {}{} | {} | {} | {} | {} |",
        row.name(),
        row.label,
        row.note,
        condition_text(row.when),
        row.default,
        range_text(&row.allowed, row.unit()),
        range_text(&row.usual, row.unit()),
        row.source
    );
}

/// ` Used while land is "chamfer".`
fn condition_text(conditions: &[Condition]) -> String {
    if conditions.is_empty() {
        return String::new();
    }
    let one = |condition: &Condition| {
        let choice = condition.choice.choice();
        let keys: Vec<_> = condition
            .any_of
            .iter()
            .map(|&option| format!("\"{}\"", choice.options[usize::from(option)].key))
            .collect();
        format!("{} is {}", choice.path, keys.join(" or "))
    };
    let all: Vec<_> = conditions.iter().map(one).collect();
    format!(" Used while {}.", all.join(" and "))
}

fn describe_manoeuvre(out: &mut String) {
    out.push_str(
        "\nInputs are lists of breakpoints (time, value). Between them an input runs in a straight \
         line, before the first and after the last it is held; two breakpoints at one time are a \
         jump. An input without breakpoints stays at its level. The command line takes such a list \
         as one text: `--set 'manoeuvre.wheel_rate=0 s: 0 rpm, 1 s: 60 rpm'`.\n\n\
         | name | meaning | level | allowed |\n|---|---|---|---|\n",
    );
    for row in &INPUTS {
        let _ = writeln!(
            out,
            "| `{}` | **{}**. {} | {} | {} |",
            row.name(),
            row.label,
            row.note,
            row.default,
            range_text(&row.allowed, row.unit())
        );
    }
    out.push_str(
        "\n`templates` is a list of ready manoeuvres, such as `(kind: \"wheel step\", at: \"3 s\")`. \
         Each writes a stretch of its input's line, from the value that the input has where it \
         begins; breakpoints may stand ahead of it and behind it, not inside.\n",
    );
    for template in TEMPLATES {
        let _ = writeln!(out, "\n### \"{}\"\n\n{}\n", template.key, template.note);
        out.push_str("| name | meaning | default | allowed |\n|---|---|---|---|\n");
        for row in template.parameters {
            let _ = writeln!(
                out,
                "| `{}` | **{}**. {} | {} | {} |",
                row.name,
                row.label,
                row.note,
                row.default,
                range_text(&row.allowed, row.unit())
            );
        }
    }
}

fn describe_units(out: &mut String) {
    out.push_str("\n## Units\n\n| quantity | units |\n|---|---|\n");
    for quantity in QUANTITIES {
        let symbols: Vec<_> = units_of(quantity)
            .map(Unit::symbol)
            .map(|symbol| if symbol == "1" { "no unit" } else { symbol })
            .collect();
        let _ = writeln!(
            out,
            "| {} | {} |",
            quantity_name(quantity),
            symbols.join(", ")
        );
    }
    out.push_str(
        "\nOther common spellings are understood, such as l/min, mm², µm, °C, cc/rev and N·m.\n",
    );
}

#[cfg(test)]
mod tests {
    use super::*;

    const FILE: &str = concat!(env!("CARGO_MANIFEST_DIR"), "/../../docs/circuit-file.md");

    #[test]
    fn the_file_in_docs_is_up_to_date() {
        let written = std::fs::read_to_string(FILE).expect("docs/circuit-file.md is there");
        assert!(
            written == describe_markdown(),
            "docs/circuit-file.md is out of date: \
             cargo run -p helmsplit-scenario --example circuit_file_doc"
        );
    }

    #[test]
    fn every_name_is_described() {
        let text = describe_markdown();
        for row in parameters() {
            assert!(
                text.contains(&format!("| `{}` |", row.name())),
                "{}",
                row.path
            );
        }
        for choice in CHOICES {
            for option in choice.options {
                assert!(
                    text.contains(&format!("- \"{}\":", option.key)),
                    "{}",
                    choice.path
                );
            }
        }
        // A stray bar would break a table.
        for line in text.lines().filter(|line| line.starts_with("| `")) {
            let cells = line.matches(" | ").count();
            assert!(cells == 5 || cells == 3, "{line}");
        }
    }
}
