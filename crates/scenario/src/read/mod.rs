//! From a circuit file to a scenario, with every problem found on the way.

mod manoeuvre;
mod section;
mod unused;

use std::collections::BTreeMap;
use std::path::Path;

use crate::document::{Document, Kind, Node};
use crate::error::FileError;
use crate::finding::{Finding, Findings};
use crate::migrate;
use crate::nearest;
use crate::scenario::Scenario;

pub(crate) use section::{known_names, sections};

impl Scenario {
    /// Reads a circuit file and checks it.
    ///
    /// The scenario is there whenever no finding is an error; the findings name file, line,
    /// column, field and value, and what would do.
    #[must_use]
    pub fn load(path: impl AsRef<Path>) -> (Option<Self>, Findings) {
        let path = path.as_ref();
        finish(&path.display().to_string(), Document::read(path))
    }

    /// Reads the text of a circuit file; `path` names it in findings.
    #[must_use]
    pub fn from_text(path: &str, text: &str) -> (Option<Self>, Findings) {
        finish(path, Document::from_text(path, text))
    }

    /// Reads a document that was read before.
    #[must_use]
    pub fn from_document(document: &Document) -> (Option<Self>, Findings) {
        let mut reader = Reader::new(document);
        reader.root();
        reader.finish()
    }
}

fn finish(path: &str, document: Result<Document, FileError>) -> (Option<Scenario>, Findings) {
    match document {
        Ok(document) => Scenario::from_document(&document),
        Err(error) => {
            let mut findings = Findings::of(path);
            findings.push(error.to_finding());
            (None, findings)
        }
    }
}

/// Collects values and findings while it walks through the tree.
struct Reader<'a> {
    document: &'a Document,
    scenario: Scenario,
    findings: Findings,
    /// Where each path stands, by byte.
    places: BTreeMap<String, usize>,
}

impl<'a> Reader<'a> {
    fn new(document: &'a Document) -> Self {
        Self {
            document,
            scenario: Scenario::default(),
            findings: Findings::of(document.path().display().to_string()),
            places: BTreeMap::new(),
        }
    }

    fn root(&mut self) {
        for finding in self.document.doubled_keys() {
            self.findings.push(finding);
        }
        let document = self.document;
        if !self.format(document.root().get(migrate::KEY)) {
            return;
        }
        for field in document.root().fields().unwrap_or(&[]) {
            let key = field.key.text.as_str();
            self.places.insert(key.to_owned(), field.key.span.start);
            match key {
                migrate::KEY => {}
                "name" => {
                    if let Some(text) = self.free_text(key, &field.value) {
                        self.scenario.name = text;
                    }
                }
                "notes" => {
                    if let Some(text) = self.free_text(key, &field.value) {
                        self.scenario.notes = text;
                    }
                }
                _ if sections().any(|section| section == key) => self.section(key, &field.value),
                _ => self.unknown_section(key, field.key.span.start),
            }
        }
    }

    /// Whether the file has a format that can be read.
    fn format(&mut self, node: Option<&Node>) -> bool {
        // Without a version it is taken for the present one: a short file stays short.
        let Some(node) = node else {
            return true;
        };
        let written = self.document.written(node);
        let number = match node.kind {
            Kind::Number(number) => Some(number),
            _ => None,
        };
        match migrate::check(number) {
            Ok(()) => true,
            Err((message, hint)) => {
                let finding = Finding::error(migrate::KEY, message, hint).with_value(written);
                self.push_at(finding, node.span.start);
                false
            }
        }
    }

    fn unknown_section(&mut self, key: &str, at: usize) {
        let known = ["format", "name", "notes"].into_iter().chain(sections());
        let mut hint = match nearest(key, known) {
            Some(near) => format!("did you mean {near}?"),
            None => format!("sections: {}", sections().collect::<Vec<_>>().join(", ")),
        };
        // A field that slipped out of its section.
        let home = sections().find(|section| known_names(section).contains(&key));
        if let Some(home) = home {
            hint = format!("{key} belongs into the section {home}");
        }
        self.push_at(Finding::error(key, "there is no such section", hint), at);
    }

    /// A text for people.
    fn free_text(&mut self, path: &str, node: &Node) -> Option<String> {
        match node.text() {
            Some(text) => Some(text.to_owned()),
            None => {
                self.wrong_kind(path, node, "a text in quotes");
                None
            }
        }
    }

    /// The text of a quantity: quoted, or a bare number where no unit is needed.
    fn quantity_text(&mut self, path: &str, node: &Node) -> Option<String> {
        self.places.insert(path.to_owned(), node.span.start);
        match &node.kind {
            Kind::Text(text) => Some(text.clone()),
            Kind::Number(_) => Some(self.document.written(node).to_owned()),
            _ => {
                self.wrong_kind(path, node, "a quantity in quotes");
                None
            }
        }
    }

    fn wrong_kind(&mut self, path: &str, node: &Node, wanted: &str) {
        let message = format!("this is {}, but {wanted} is wanted", node.describe());
        let written = self.document.written(node);
        let hint = match &node.kind {
            Kind::Word(word) => format!("write \"{word}\""),
            _ => String::new(),
        };
        let finding = Finding::error(path, message, hint).with_value(written);
        self.push_at(finding, node.span.start);
    }

    fn push_at(&mut self, finding: Finding, at: usize) {
        self.findings.push(finding.at(self.document.place(at)));
    }

    /// Takes the outcome of a setter: a finding gets its place.
    fn take<T>(&mut self, result: Result<T, Finding>, at: usize) -> Option<T> {
        match result {
            Ok(value) => Some(value),
            Err(finding) => {
                self.push_at(finding, at);
                None
            }
        }
    }

    /// The place of a path, or of the nearest part of the file around it.
    fn place_of(&self, path: &str) -> Option<usize> {
        let mut path = path;
        loop {
            if let Some(at) = self.places.get(path) {
                return Some(*at);
            }
            path = &path[..path.rfind(['.', '['])?];
        }
    }

    fn finish(mut self) -> (Option<Scenario>, Findings) {
        self.unused();
        // What was refused stands at its default here: judging that against the rest would only
        // repeat or invent problems.
        if !self.findings.has_errors() {
            for finding in self.scenario.validate() {
                let at = self.place_of(&finding.path);
                self.findings.push(match at {
                    Some(at) => finding.at(self.document.place(at)),
                    None => finding,
                });
            }
        }
        let findings = self.findings.sorted();
        let scenario = (!findings.has_errors()).then_some(self.scenario);
        (scenario, findings)
    }
}

#[cfg(test)]
mod tests;
