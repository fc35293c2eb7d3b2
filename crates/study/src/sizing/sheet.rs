//! A sizing in the making.

use helmsplit_model::Parts;
use helmsplit_scenario::quantity_text::{Digits, parse, text_from_si};
use helmsplit_scenario::{Findings, ParameterId, Scenario};

use super::Sizing;
use super::demand::{Demand, Load, Scrub};
use super::sizes::{Offer, Rounding, Series};
use super::step::Step;
use crate::error::StudyError;

/// Collects the steps.
pub(super) struct Sheet<'a> {
    pub(super) scenario: &'a Scenario,
    pub(super) demand: &'a Demand,
    /// The circuit as it stands, for oil and stiffness.
    pub(super) parts: Parts,
    steps: Vec<Step>,
    warnings: Vec<String>,
}

impl<'a> Sheet<'a> {
    pub(super) fn new(scenario: &'a Scenario, demand: &'a Demand) -> Result<Self, StudyError> {
        check(demand)?;
        let parts = scenario.parts().map_err(|finding| {
            StudyError::Scenario(Findings {
                findings: vec![finding],
                ..Findings::default()
            })
        })?;
        Ok(Self {
            scenario,
            demand,
            parts,
            steps: Vec::new(),
            warnings: Vec::new(),
        })
    }

    /// The value of a parameter, SI.
    pub(super) fn si(&self, id: ParameterId) -> f64 {
        self.scenario.si(id)
    }

    /// Adds a step and gives the value that it chose. What goes into a parameter without a series
    /// of standard sizes is rounded as a drawing would.
    pub(super) fn push(&mut self, mut step: Step) -> f64 {
        if self.demand.standard_sizes
            && step.offer.is_none()
            && let Some(id) = step.writes
        {
            step.chosen = rounded(id, step.chosen);
        }
        let chosen = step.chosen;
        self.steps.push(step);
        chosen
    }

    /// Adds a step that may take a standard size.
    pub(super) fn push_sized(&mut self, step: Step, series: Series, rounding: Rounding) -> f64 {
        let offer: Offer = series.beside(step.result.si, rounding);
        let take = self.demand.standard_sizes;
        self.push(step.offering(offer, take))
    }

    /// What an earlier step chose, SI; not a number if there is no such step.
    pub(super) fn result(&self, id: &str) -> f64 {
        let step = self.steps.iter().find(|step| step.id == id);
        step.map_or(f64::NAN, |step| step.chosen)
    }

    pub(super) fn warn(&mut self, text: impl Into<String>) {
        self.warnings.push(text.into());
    }

    pub(super) fn finish(self) -> Sizing {
        Sizing {
            demand: *self.demand,
            steps: self.steps,
            warnings: self.warnings,
        }
    }
}

/// Digits of a dimension on a drawing.
const DIGITS: Digits = Digits::Significant(4);

/// A value (SI) with as many digits as a drawing has, in the parameter's own unit.
fn rounded(id: ParameterId, si: f64) -> f64 {
    let row = id.parameter();
    let text = text_from_si(si, row.unit(), DIGITS);
    parse(&text, row.quantity).map_or(si, |parsed| parsed.si)
}

/// Lower end, upper end, and both in words.
type Span = (f64, f64, &'static str);

const ABOVE_ZERO: Span = (f64::MIN_POSITIVE, f64::MAX, "above 0");

const NOT_NEGATIVE: Span = (0.0, f64::MAX, "not negative");

fn scrub_rows(scrub: &Scrub) -> [(&'static str, f64, Span); 5] {
    let &Scrub {
        axle_load,
        friction,
        tyre_width,
        kingpin_offset,
        arm,
        driven: _,
    } = scrub;
    let friction_span = (1e-3, 2.0, "above 0, up to 2");
    [
        ("axle load", axle_load, ABOVE_ZERO),
        ("friction of the tyre", friction, friction_span),
        ("tyre width", tyre_width, ABOVE_ZERO),
        ("kingpin offset", kingpin_offset, NOT_NEGATIVE),
        ("arm of the cylinder", arm, ABOVE_ZERO),
    ]
}

/// Every value of a demand with the range that it must lie in.
fn check(demand: &Demand) -> Result<(), StudyError> {
    let Demand {
        load,
        turns,
        wheel_rate,
        idle_wheel_rate,
        relief_share,
        spring_drop,
        band,
        land_drop,
        damping_ratio,
        head_share,
        wear,
        consumer_flow,
        consumer_pressure,
        standard_sizes: _,
    } = *demand;
    let share = (1e-3, 1.0, "above 0, up to 1");
    let mut rows = vec![
        ("turns from lock to lock", turns, ABOVE_ZERO),
        ("wheel rate", wheel_rate, ABOVE_ZERO),
        ("wheel rate at idle", idle_wheel_rate, ABOVE_ZERO),
        ("load's share of the relief", relief_share, share),
        ("spring drop", spring_drop, ABOVE_ZERO),
        ("band", band, share),
        ("drop over the land", land_drop, ABOVE_ZERO),
        ("damping ratio", damping_ratio, share),
        (
            "head hole's share",
            head_share,
            (0.01, 0.99, "0.01 to 0.99"),
        ),
        ("wear", wear, (1.0, 1000.0, "1 to 1000")),
        ("flow of the consumer", consumer_flow, NOT_NEGATIVE),
        ("pressure of the consumer", consumer_pressure, NOT_NEGATIVE),
    ];
    match load {
        Load::Scrub(scrub) => rows.extend(scrub_rows(&scrub)),
        Load::Force(force) => rows.push(("cylinder force", force, ABOVE_ZERO)),
        Load::Circuit => {}
    }
    for (name, value, (low, high, allowed)) in rows {
        if !(low..=high).contains(&value) {
            return Err(StudyError::Demand {
                name,
                value,
                allowed,
            });
        }
    }
    Ok(())
}
