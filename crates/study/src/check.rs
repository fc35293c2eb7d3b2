//! A check: a figure, the limit that the user owns, and the evidence.

use helmsplit_model::Quantity;
use serde::Serialize;

/// The checks, in the order of the verdict table.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize)]
#[serde(rename_all = "kebab-case")]
#[allow(missing_docs, reason = "`label` says what each asks")]
pub enum CheckId {
    PriorityAtIdle,
    Regulation,
    Overshoot,
    Settling,
    Damping,
    Dropout,
    SteeringLimit,
    ConsumerAtLock,
    PilotClearance,
    PeakPressure,
    StrokeReserve,
    LineVelocity,
    ViscosityWindow,
    RippleClearance,
    Heat,
    Audit,
}

impl CheckId {
    /// Every check, in order.
    pub const ALL: [Self; 16] = [
        Self::PriorityAtIdle,
        Self::Regulation,
        Self::Overshoot,
        Self::Settling,
        Self::Damping,
        Self::Dropout,
        Self::SteeringLimit,
        Self::ConsumerAtLock,
        Self::PilotClearance,
        Self::PeakPressure,
        Self::StrokeReserve,
        Self::LineVelocity,
        Self::ViscosityWindow,
        Self::RippleClearance,
        Self::Heat,
        Self::Audit,
    ];

    /// Its name in files and on the command line.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::PriorityAtIdle => "priority-at-idle",
            Self::Regulation => "regulation",
            Self::Overshoot => "overshoot",
            Self::Settling => "settling",
            Self::Damping => "damping",
            Self::Dropout => "dropout",
            Self::SteeringLimit => "steering-limit",
            Self::ConsumerAtLock => "consumer-at-lock",
            Self::PilotClearance => "pilot-clearance",
            Self::PeakPressure => "peak-pressure",
            Self::StrokeReserve => "stroke-reserve",
            Self::LineVelocity => "line-velocity",
            Self::ViscosityWindow => "viscosity-window",
            Self::RippleClearance => "ripple-clearance",
            Self::Heat => "heat",
            Self::Audit => "audit",
        }
    }

    /// What it asks, in a few words.
    #[must_use]
    pub fn label(self) -> &'static str {
        match self {
            Self::PriorityAtIdle => "Priority flow at low idle against the demand",
            Self::Regulation => "Spread of the settled priority flow",
            Self::Overshoot => "Priority flow beyond its settled value after an event",
            Self::Settling => "Time until the priority flow stays settled",
            Self::Damping => "Least damping ratio",
            Self::Dropout => "Longest time with the wheel short of oil",
            Self::SteeringLimit => "Priority relief below the main relief",
            Self::ConsumerAtLock => "Consumer's flow with the steering held at the lock",
            Self::PilotClearance => "Excess side below the pilot relief",
            Self::PeakPressure => "Highest pressure against its rating",
            Self::StrokeReserve => "Stroke in reserve at top speed",
            Self::LineVelocity => "Oil velocity in the lines",
            Self::ViscosityWindow => "Viscosity inside the pump's window",
            Self::RippleClearance => "Pump ripple apart from modes",
            Self::Heat => "Heat against the cooler",
            Self::Audit => "Volume and energy balance of the run",
        }
    }
}

/// How a check stands.
#[derive(Debug, Clone, PartialEq, Serialize)]
#[serde(rename_all = "snake_case", tag = "status", content = "reason")]
pub enum Status {
    /// Met with margin.
    Pass,
    /// Met, but within a tenth of the limit.
    Near,
    /// Not met.
    Fail,
    /// One run cannot tell: it takes the operating map.
    NeedsMap,
    /// The circuit or the manoeuvre gives no occasion, and why.
    NotApplicable(String),
}

impl Status {
    /// The word in the verdict table.
    #[must_use]
    pub fn word(&self) -> &'static str {
        match self {
            Self::Pass => "pass",
            Self::Near => "near",
            Self::Fail => "FAIL",
            Self::NeedsMap => "needs the map",
            Self::NotApplicable(_) => "not applicable",
        }
    }
}

/// A number with its kind.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Measure {
    /// Value, SI.
    pub si: f64,
    /// Kind.
    pub quantity: Quantity,
}

impl Measure {
    /// A value of a kind.
    #[must_use]
    pub fn new(si: f64, quantity: Quantity) -> Self {
        Self { si, quantity }
    }

    /// A number without unit.
    #[must_use]
    pub fn ratio(value: f64) -> Self {
        Self::new(value, Quantity::Ratio)
    }
}

/// What a figure is held against, SI.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Limit {
    /// The figure must not be below.
    AtLeast(f64),
    /// The figure must not be above.
    AtMost(f64),
    /// The figure must lie inside.
    Inside(f64, f64),
}

/// Share of the limit within which a met limit is called near.
const NEAR: f64 = 0.1;

impl Limit {
    /// Margin of a figure to the limit, positive when met, in the figure's unit.
    #[must_use]
    pub fn margin(&self, figure: f64) -> f64 {
        match *self {
            Self::AtLeast(limit) => figure - limit,
            Self::AtMost(limit) => limit - figure,
            Self::Inside(low, high) => (figure - low).min(high - figure),
        }
    }

    /// How a figure stands against the limit. What is not a number fails.
    #[must_use]
    pub fn status(&self, figure: f64) -> Status {
        let margin = self.margin(figure);
        let size = match *self {
            Self::AtLeast(limit) | Self::AtMost(limit) => limit.abs(),
            Self::Inside(low, high) => {
                if figure - low < high - figure {
                    low.abs()
                } else {
                    high.abs()
                }
            }
        };
        if margin >= 0.0 && margin < NEAR * size {
            Status::Near
        } else if margin >= 0.0 {
            Status::Pass
        } else {
            Status::Fail
        }
    }
}

/// A number that went into a figure.
#[derive(Debug, Clone, PartialEq)]
pub struct Operand {
    /// What it is.
    pub name: String,
    /// How much.
    pub value: Measure,
}

/// Where a figure comes from.
#[derive(Debug, Clone, PartialEq)]
pub struct Evidence {
    /// The moment to look at, s.
    pub time: Option<f64>,
    /// The trace to look at, by its short name.
    pub column: Option<String>,
    /// The formula, in words and symbols.
    pub formula: &'static str,
    /// The numbers in it.
    pub operands: Vec<Operand>,
    /// Where formula and limit come from.
    pub source: &'static str,
}

/// One line of the verdict table.
#[derive(Debug, Clone, PartialEq)]
pub struct Check {
    /// Which.
    pub id: CheckId,
    /// How it stands.
    pub status: Status,
    /// The figure, if there is one.
    pub figure: Option<Measure>,
    /// The limit, in the figure's unit.
    pub limit: Option<Limit>,
    /// One more thing that a reader should know.
    pub note: String,
    /// Where the figure comes from.
    pub evidence: Option<Evidence>,
}

impl Check {
    /// A check with a figure: the status follows from the limit.
    #[must_use]
    pub fn measured(id: CheckId, figure: Measure, limit: Limit, evidence: Evidence) -> Self {
        Self {
            id,
            status: limit.status(figure.si),
            figure: Some(figure),
            limit: Some(limit),
            note: String::new(),
            evidence: Some(evidence),
        }
    }

    /// A check that has no occasion.
    #[must_use]
    pub fn not_applicable(id: CheckId, reason: &str) -> Self {
        Self {
            id,
            status: Status::NotApplicable(reason.to_owned()),
            figure: None,
            limit: None,
            note: String::new(),
            evidence: None,
        }
    }

    /// A check that takes the operating map.
    #[must_use]
    pub fn needs_map(id: CheckId) -> Self {
        Self {
            id,
            status: Status::NeedsMap,
            figure: None,
            limit: None,
            note: String::new(),
            evidence: None,
        }
    }

    /// The same with a note.
    #[must_use]
    pub fn with_note(mut self, note: impl Into<String>) -> Self {
        self.note = note.into();
        self
    }

    /// Margin to the limit in the figure's unit, positive when met.
    #[must_use]
    pub fn margin(&self) -> Option<f64> {
        Some(self.limit?.margin(self.figure?.si))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn status_follows_the_margin() {
        for (limit, figure, status) in [
            (Limit::AtMost(0.25), 0.1, Status::Pass),
            (Limit::AtMost(0.25), 0.24, Status::Near),
            (Limit::AtMost(0.25), 0.26, Status::Fail),
            (Limit::AtLeast(1.0), 1.2, Status::Pass),
            (Limit::AtLeast(1.0), 1.05, Status::Near),
            (Limit::AtLeast(1.0), 0.99, Status::Fail),
            (Limit::Inside(10.0, 100.0), 50.0, Status::Pass),
            (Limit::Inside(10.0, 100.0), 10.5, Status::Near),
            (Limit::Inside(10.0, 100.0), 101.0, Status::Fail),
            (Limit::AtMost(0.25), f64::NAN, Status::Fail),
        ] {
            assert_eq!(limit.status(figure), status, "{figure} against {limit:?}");
        }
    }

    #[test]
    fn names_are_unique() {
        let mut names: Vec<_> = CheckId::ALL.iter().map(|c| c.name()).collect();
        names.sort_unstable();
        names.dedup();
        assert_eq!(names.len(), CheckId::ALL.len(), "one name each");
    }
}
