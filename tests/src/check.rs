//! One outside check: what is expected, from where, and how to obtain it from the engine.

/// How sure an expected value is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Mark {
    /// The value or the figure itself was read in the published source.
    Published,
    /// Worked out in double precision from the formula that the source states.
    Computed,
    /// The formula or value of the source is quoted from memory.
    Memory,
    /// A fact of the trade that nobody publishes.
    CommonPractice,
}

impl Mark {
    /// The words for a reader.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Published => "published",
            Self::Computed => "computed from the stated formula",
            Self::Memory => "value from memory",
            Self::CommonPractice => "common practice, no source",
        }
    }
}

/// Where an expected value comes from.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Source {
    /// Book, paper or standard; empty for common practice.
    pub text: &'static str,
    /// How sure it is.
    pub mark: Mark,
}

impl Source {
    /// A source whose value or figure was read there.
    #[must_use]
    pub const fn published(text: &'static str) -> Self {
        Self {
            text,
            mark: Mark::Published,
        }
    }

    /// A source that states the formula; the number was worked out from it.
    #[must_use]
    pub const fn computed(text: &'static str) -> Self {
        Self {
            text,
            mark: Mark::Computed,
        }
    }

    /// A source quoted from memory.
    #[must_use]
    pub const fn memory(text: &'static str) -> Self {
        Self {
            text,
            mark: Mark::Memory,
        }
    }
}

/// How far the obtained value may lie from the expected one.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Tolerance {
    /// Relative to the expected value.
    Relative(f64),
    /// In the unit of the check.
    Absolute(f64),
}

/// How finely an obtained value is the same on every machine, and so how finely it is printed.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Repeatability {
    /// A closed form or a fixed sequence of operations: differs in the last bits only.
    Rounding,
    /// The outcome of a solver with step control: differs within its tolerance.
    Solver,
}

/// One outside check.
pub struct Check {
    /// Short unique name.
    pub id: String,
    /// What the check is about; checks of one subject form one table.
    pub subject: &'static str,
    /// The case: inputs and what is asked.
    pub what: String,
    /// Where the expected value comes from.
    pub source: Source,
    /// Expected value in `unit`.
    pub expected: f64,
    /// Unit of the expected and of the obtained value, for the reader.
    pub unit: &'static str,
    /// Permitted deviation.
    pub tolerance: Tolerance,
    /// How finely the obtained value repeats.
    pub repeats: Repeatability,
    obtain: Box<dyn Fn() -> f64 + Send + Sync>,
}

impl Check {
    /// What the engine gives, in `unit`; not a number where it gives nothing.
    #[must_use]
    pub fn obtained(&self) -> f64 {
        (self.obtain)()
    }

    /// The same check, marked as the outcome of a solver with step control.
    #[must_use]
    pub fn by_solver(self) -> Self {
        Self {
            repeats: Repeatability::Solver,
            ..self
        }
    }
}

/// A subject with its source: makes the checks of one table.
#[derive(Debug, Clone, Copy)]
pub struct Subject {
    /// Heading of the table.
    pub title: &'static str,
    /// Where its values come from.
    pub source: Source,
    /// Unit of its values.
    pub unit: &'static str,
}

impl Subject {
    /// One check of this subject.
    pub fn check(
        &self,
        id: impl Into<String>,
        what: impl Into<String>,
        expected: f64,
        tolerance: Tolerance,
        obtain: impl Fn() -> f64 + Send + Sync + 'static,
    ) -> Check {
        Check {
            id: id.into(),
            subject: self.title,
            what: what.into(),
            source: self.source,
            expected,
            unit: self.unit,
            tolerance,
            repeats: Repeatability::Rounding,
            obtain: Box::new(obtain),
        }
    }

    /// The same subject with another source.
    #[must_use]
    pub const fn from(self, source: Source) -> Self {
        Self { source, ..self }
    }

    /// The same subject with another unit.
    #[must_use]
    pub const fn in_unit(self, unit: &'static str) -> Self {
        Self { unit, ..self }
    }
}
