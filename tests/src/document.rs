//! The verification document: every check with what was expected and what was obtained.

use std::fmt::Write;

use crate::check::{Mark, Tolerance};
use crate::outcome::Outcome;

/// One group of outcomes under its heading.
pub struct Chapter {
    /// Heading.
    pub title: &'static str,
    /// What the reader should know about the group.
    pub about: &'static str,
    /// Its outcomes, in order.
    pub outcomes: Vec<Outcome>,
}

const OPENING: &str = "\
# Verification

Every value below comes from outside this program: a book, a standard, a paper, a closed form worked
out from the formula that the source states, or, for whole circuits, an independent implementation
of the same equations. The tests of the package `helmsplit-acceptance` assert all of them. This page is written by

    cargo run -p helmsplit-acceptance --example verification

and a test fails when it is out of date; do not edit it by hand. Equation numbers such as M2.1 are
those of [model.md](model.md).

How to read the tables:

- *expected* stands as in its source, *obtained* is what the engine's own functions give;
- *deviation* and *tolerance* are relative to the expected value unless a unit stands behind them;
- the last column names the source and how sure the value is: **published** (the value or figure
  was read there), **computed from the stated formula** (the source gives the formula, the number
  was worked out from it in double precision), **value from memory** (formula or value quoted from
  memory of the source named), **common practice, no source**.

A check at component level shows that an equation is programmed as its source states it. It does
not show that a real valve behaves like the equation: see what is not modelled in
[model.md](model.md). Results support, and never replace, tests on the machine.
";

/// The whole document.
#[must_use]
pub fn write(chapters: &[Chapter]) -> String {
    let mut text = String::from(OPENING);
    push_summary(&mut text, chapters);
    for chapter in chapters {
        push(&mut text, format_args!("\n## {}\n\n", chapter.title));
        push(&mut text, format_args!("{}\n", chapter.about));
        let mut subject = "";
        for outcome in &chapter.outcomes {
            if outcome.check.subject != subject {
                subject = outcome.check.subject;
                push_head(&mut text, subject);
            }
            push_row(&mut text, outcome);
        }
    }
    text
}

/// Writing into a `String` cannot fail.
fn push(text: &mut String, arguments: std::fmt::Arguments<'_>) {
    let written = text.write_fmt(arguments);
    debug_assert!(written.is_ok(), "a String takes every text");
}

fn push_summary(text: &mut String, chapters: &[Chapter]) {
    push(
        text,
        format_args!(
            "\n## Summary\n\n| group | checks | met | closest to its tolerance |\n|---|--:|--:|---|\n"
        ),
    );
    let (mut all, mut all_met) = (0, 0);
    for chapter in chapters {
        let met = chapter.outcomes.iter().filter(|o| o.is_met()).count();
        let closest = chapter
            .outcomes
            .iter()
            .max_by(|a, b| a.share_of_tolerance().total_cmp(&b.share_of_tolerance()));
        let closest = closest.map_or("", |o| o.check.id.as_str());
        let count = chapter.outcomes.len();
        push(
            text,
            format_args!("| {} | {count} | {met} | {closest} |\n", chapter.title),
        );
        all += count;
        all_met += met;
    }
    push(text, format_args!("| **all** | {all} | {all_met} | |\n"));
}

fn push_head(text: &mut String, subject: &str) {
    push(text, format_args!("\n### {subject}\n\n"));
    push(
        text,
        format_args!(
            "| id | case | expected | obtained | deviation | tolerance | source |\n\
             |---|---|--:|--:|--:|--:|---|\n"
        ),
    );
}

fn push_row(text: &mut String, outcome: &Outcome) {
    let check = &outcome.check;
    let unit = if check.unit.is_empty() {
        String::new()
    } else {
        format!(" {}", check.unit)
    };
    let source = match (check.source.text, check.source.mark) {
        ("", mark) => mark.words().to_owned(),
        (named, Mark::Published) => format!("{named}; **published**"),
        (named, mark) => format!("{named}; {}", mark.words()),
    };
    push(
        text,
        format_args!(
            "| {} | {} | {}{unit} | {}{unit} | {} | {} | {source} |\n",
            check.id,
            check.what,
            shortest(check.expected),
            significant(outcome.obtained, outcome.digits()),
            deviation(outcome),
            tolerance(check.tolerance, &unit),
        ),
    );
}

fn tolerance(tolerance: Tolerance, unit: &str) -> String {
    match tolerance {
        Tolerance::Relative(limit) => shortest(limit),
        Tolerance::Absolute(limit) => format!("{}{unit}", shortest(limit)),
    }
}

fn deviation(outcome: &Outcome) -> String {
    let size = outcome.deviation();
    let (floor, unit) = match outcome.check.tolerance {
        Tolerance::Relative(_) => (outcome.floor(), String::new()),
        Tolerance::Absolute(_) => {
            let scale = outcome.check.expected.abs().max(f64::MIN_POSITIVE);
            (outcome.floor() * scale, format!(" {}", outcome.check.unit))
        }
    };
    if size < floor {
        // The floor rounded up to a power of ten, so that it reads as a bound.
        let bound = 10f64.powi(floor.log10().ceil() as i32);
        format!("< {}{}", shortest(bound), unit.trim_end())
    } else {
        format!("{}{}", significant(size, 2), unit.trim_end())
    }
}

/// The fewest digits that give the number back.
fn shortest(number: f64) -> String {
    let size = number.abs();
    let plain = number.abs() < f64::MIN_POSITIVE || (1e-3..1e7).contains(&size);
    if plain {
        format!("{number}")
    } else {
        format!("{number:e}")
    }
}

/// A number with a fixed count of significant digits.
fn significant(number: f64, digits: usize) -> String {
    if !number.is_finite() {
        return format!("{number}");
    }
    let rounded = format!("{number:.*e}", digits - 1);
    let exponent = rounded
        .split_once('e')
        .and_then(|(_, e)| e.parse::<i32>().ok())
        .unwrap_or(0);
    if (-3..7).contains(&exponent) {
        let decimals = (digits as i32 - 1 - exponent).max(0) as usize;
        format!("{number:.decimals$}")
    } else {
        rounded
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_keep_their_significant_digits() {
        for (number, text) in [
            (29.972_989_84, "29.9730"),
            (0.019_291_5, "0.0192915"),
            (3.946_497_4e-10, "3.94650e-10"),
            (1_427_400_000.0, "1.42740e9"),
            (999_999.96, "1000000"),
            (0.0, "0.00000"),
        ] {
            assert_eq!(significant(number, 6), text, "{number}");
        }
        assert_eq!(significant(0.000_234, 2), "2.3e-4", "two digits");
    }

    #[test]
    fn expected_values_stand_as_written() {
        for (number, text) in [
            (29.972_989_84, "29.97298984"),
            (1e-6, "1e-6"),
            (0.0, "0"),
            (1.0, "1"),
        ] {
            assert_eq!(shortest(number), text, "{number}");
        }
    }
}
