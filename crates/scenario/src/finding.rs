//! Findings: what is wrong or doubtful in an input, where it stands and what would do.
//!
//! Reading goes on after a finding, so that one pass shows every problem.

use std::cmp::Reverse;
use std::fmt;

use serde::Serialize;

use crate::document::Place;

/// Longer values are cut in messages; the place tells where the whole one stands.
const LONGEST_VALUE: usize = 60;

/// How bad a finding is. Errors order after warnings.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize)]
#[serde(rename_all = "lowercase")]
pub enum Severity {
    /// Doubtful, but it can be used.
    Warning,
    /// It cannot be used.
    Error,
}

impl fmt::Display for Severity {
    fn fmt(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        formatter.write_str(match self {
            Self::Warning => "warning",
            Self::Error => "error",
        })
    }
}

/// One finding about an input.
#[derive(Debug, Clone, PartialEq, Eq, Serialize)]
pub struct Finding {
    /// Whether the input can still be used.
    pub severity: Severity,
    /// The field, such as `valve.spool_diameter`; empty for the input as a whole.
    pub path: String,
    /// Line in the file, from 1.
    pub line: Option<usize>,
    /// Column in the line, in characters, from 1.
    pub column: Option<usize>,
    /// The value as written, without quotes.
    pub value: Option<String>,
    /// What is wrong: lower case, no full stop.
    pub message: String,
    /// What would do: lower case, no full stop; may be empty.
    pub hint: String,
}

impl Finding {
    /// A finding that prevents the use of the input.
    #[must_use]
    pub fn error(
        path: impl Into<String>,
        message: impl Into<String>,
        hint: impl Into<String>,
    ) -> Self {
        Self::new(Severity::Error, path.into(), message.into(), hint.into())
    }

    /// A finding that only casts doubt.
    #[must_use]
    pub fn warning(
        path: impl Into<String>,
        message: impl Into<String>,
        hint: impl Into<String>,
    ) -> Self {
        Self::new(Severity::Warning, path.into(), message.into(), hint.into())
    }

    fn new(severity: Severity, path: String, message: String, hint: String) -> Self {
        Self {
            severity,
            path,
            line: None,
            column: None,
            value: None,
            message,
            hint,
        }
    }

    /// Adds the place in the file.
    #[must_use]
    pub fn at(mut self, place: Place) -> Self {
        self.line = Some(place.line);
        self.column = Some(place.column);
        self
    }

    /// Adds the value as written; a long one is cut.
    #[must_use]
    pub fn with_value(mut self, value: &str) -> Self {
        let mut shown: String = value.chars().take(LONGEST_VALUE).collect();
        if shown.len() < value.len() {
            shown.push('…');
        }
        self.value = Some(shown);
        self
    }
}

/// Without the file name; [`Findings`] adds it.
impl fmt::Display for Finding {
    fn fmt(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        if let Some(line) = self.line {
            write!(formatter, "{line}:")?;
            if let Some(column) = self.column {
                write!(formatter, "{column}:")?;
            }
            formatter.write_str(" ")?;
        }
        write!(formatter, "{}: ", self.severity)?;
        let mut subject = printable(&self.path);
        if let Some(value) = &self.value {
            let equals = if subject.is_empty() { "" } else { " = " };
            subject = format!("{subject}{equals}\"{}\"", printable(value));
        }
        if !subject.is_empty() {
            write!(formatter, "{subject}: ")?;
        }
        formatter.write_str(&self.message)?;
        if !self.hint.is_empty() {
            write!(formatter, "; {}", self.hint)?;
        }
        Ok(())
    }
}

/// Control characters spelled out, so that a file cannot steer the reader's terminal.
fn printable(text: &str) -> String {
    let spell = |letter: char| {
        if letter.is_control() {
            letter.escape_default().collect::<String>()
        } else {
            letter.into()
        }
    };
    text.chars().map(spell).collect()
}

/// All findings about one input.
#[derive(Debug, Clone, PartialEq, Eq, Default, Serialize)]
pub struct Findings {
    /// The file they are about, as the user named it; empty for values typed elsewhere.
    pub file: String,
    /// The findings, in the order of [`Findings::sorted`] once that was called.
    pub findings: Vec<Finding>,
}

impl Findings {
    /// No findings yet about `file`.
    #[must_use]
    pub fn of(file: impl Into<String>) -> Self {
        Self {
            file: file.into(),
            findings: Vec::new(),
        }
    }

    /// Adds one finding.
    pub fn push(&mut self, finding: Finding) {
        self.findings.push(finding);
    }

    /// Whether there is nothing to report.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        self.findings.is_empty()
    }

    /// Number of findings.
    #[must_use]
    pub fn len(&self) -> usize {
        self.findings.len()
    }

    /// Whether any finding prevents the use of the input.
    #[must_use]
    pub fn has_errors(&self) -> bool {
        self.findings
            .iter()
            .any(|finding| finding.severity == Severity::Error)
    }

    /// The findings one after the other.
    pub fn iter(&self) -> std::slice::Iter<'_, Finding> {
        self.findings.iter()
    }

    /// In the order of the file; findings without a place come last, errors before warnings.
    #[must_use]
    pub fn sorted(mut self) -> Self {
        self.findings.sort_by_key(|finding| {
            let nowhere = finding.line.is_none();
            (
                nowhere,
                finding.line,
                finding.column,
                Reverse(finding.severity),
            )
        });
        self
    }
}

impl Extend<Finding> for Findings {
    fn extend<I: IntoIterator<Item = Finding>>(&mut self, iter: I) {
        self.findings.extend(iter);
    }
}

impl<'a> IntoIterator for &'a Findings {
    type Item = &'a Finding;
    type IntoIter = std::slice::Iter<'a, Finding>;

    fn into_iter(self) -> Self::IntoIter {
        self.iter()
    }
}

impl IntoIterator for Findings {
    type Item = Finding;
    type IntoIter = std::vec::IntoIter<Finding>;

    fn into_iter(self) -> Self::IntoIter {
        self.findings.into_iter()
    }
}

/// One line per finding: `circuit.ron:12:23: error: valve.spool_diameter = "20 bar": ...`.
impl fmt::Display for Findings {
    fn fmt(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        for (index, finding) in self.findings.iter().enumerate() {
            if index > 0 {
                formatter.write_str("\n")?;
            }
            if !self.file.is_empty() {
                let gap = if finding.line.is_some() { "" } else { " " };
                write!(formatter, "{}:{gap}", self.file)?;
            }
            write!(formatter, "{finding}")?;
        }
        Ok(())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn wrong_kind() -> Finding {
        Finding::error(
            "valve.spool_diameter",
            "bar is a pressure, but a length is wanted",
            "write a length such as \"20 mm\"",
        )
        .with_value("20 bar")
        .at(Place {
            line: 12,
            column: 23,
        })
    }

    #[test]
    fn a_finding_reads_as_one_line() {
        let mut findings = Findings::of("circuit.ron");
        findings.push(wrong_kind());
        assert_eq!(
            findings.to_string(),
            "circuit.ron:12:23: error: valve.spool_diameter = \"20 bar\": bar is a pressure, \
             but a length is wanted; write a length such as \"20 mm\"",
            "the line for people"
        );
        let mut findings = Findings::of("circuit.ron");
        findings.push(Finding::warning("", "no relief at all", ""));
        assert_eq!(
            findings.to_string(),
            "circuit.ron: warning: no relief at all",
            "no place, no path"
        );
        assert_eq!(
            Finding::error("a.b", "is missing", "").to_string(),
            "error: a.b: is missing",
            "bare"
        );
    }

    #[test]
    fn order_follows_the_file() {
        let at = |severity: Severity, place: Option<(usize, usize)>| {
            let finding = Finding::new(severity, String::new(), String::new(), String::new());
            match place {
                Some((line, column)) => finding.at(Place { line, column }),
                None => finding,
            }
        };
        let mut findings = Findings::default();
        findings.push(at(Severity::Warning, None));
        findings.push(at(Severity::Error, None));
        findings.push(at(Severity::Warning, Some((2, 5))));
        findings.push(at(Severity::Error, Some((2, 5))));
        findings.push(at(Severity::Error, Some((1, 9))));
        let order: Vec<_> = findings
            .sorted()
            .iter()
            .map(|f| (f.severity, f.line, f.column))
            .collect();
        let expected = vec![
            (Severity::Error, Some(1), Some(9)),
            (Severity::Error, Some(2), Some(5)),
            (Severity::Warning, Some(2), Some(5)),
            (Severity::Error, None, None),
            (Severity::Warning, None, None),
        ];
        assert_eq!(
            order, expected,
            "by line, column, then severity; no place last"
        );
    }

    #[test]
    fn errors_are_told_from_warnings() {
        let mut findings = Findings::default();
        assert!(!findings.has_errors() && findings.is_empty(), "nothing yet");
        findings.push(Finding::warning("a", "odd", ""));
        assert!(!findings.has_errors(), "a warning is no error");
        findings.push(wrong_kind());
        assert!(
            findings.has_errors() && findings.len() == 2,
            "now there is one"
        );
    }

    #[test]
    fn long_and_hostile_values_are_tamed() {
        let long = Finding::error("a", "too long", "").with_value(&"é".repeat(10_000));
        let shown = long
            .value
            .as_deref()
            .map_or(0, |value| value.chars().count());
        assert_eq!(shown, LONGEST_VALUE + 1, "cut, with a mark");
        let hostile = Finding::error("a", "odd", "").with_value("\u{1b}[2J\n");
        assert!(
            !hostile.to_string().contains(['\u{1b}', '\n']),
            "control characters are spelled"
        );
    }

    #[test]
    fn json_carries_every_part() {
        let mut findings = Findings::of("circuit.ron");
        findings.push(wrong_kind());
        let json = serde_json::to_value(&findings).expect("plain data");
        assert_eq!(json["file"], "circuit.ron", "file");
        let first = &json["findings"][0];
        assert_eq!(first["severity"], "error", "severity");
        assert_eq!(first["line"], 12, "line");
        assert_eq!(first["column"], 23, "column");
        assert_eq!(first["value"], "20 bar", "value");
        assert_eq!(first["path"], "valve.spool_diameter", "path");
    }
}
