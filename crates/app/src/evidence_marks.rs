//! What the evidence of a check points at in the traces: a limit, a value, a stretch of time.

use helmsplit_model::Quantity;
use helmsplit_scenario::UnitSystem;
use helmsplit_study::{Check, CheckId, Evidence, Limit as CheckLimit};
use helmsplit_view::plot::{Figure, Limit, Panel, Reach, Where};

use crate::text::{check_name, limit, measure, with_unit};
use crate::traces::value_at;

/// Marks in one panel, in the unit of the panel.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct EvidenceMarks {
    /// The name of the panel.
    pub(crate) panel: String,
    /// The moment (s) and the value to look at.
    pub(crate) point: Option<(f64, f64)>,
    /// What stands beside the value.
    pub(crate) text: String,
    /// Where the limit lies.
    pub(crate) limits: Vec<Limit>,
    /// The time that the limit allows, s: start and end.
    pub(crate) stretch: Option<(f64, f64)>,
}

/// Makes the marks of a check.
struct Maker<'a> {
    check: &'a Check,
    evidence: &'a Evidence,
    /// The value at the moment, SI; `None` without a moment.
    value: Option<f64>,
    quantity: Quantity,
    units: UnitSystem,
}

/// What a check points at; `None` if it has no evidence in a trace of the figure.
pub(crate) fn evidence_marks(
    check: &Check,
    figure: &Figure,
    units: UnitSystem,
) -> Option<EvidenceMarks> {
    let evidence = check.evidence.as_ref()?;
    let column = evidence.column.as_deref()?;
    let (panel, points, shown) = found(figure, column)?;
    let point = evidence
        .time
        .and_then(|time| Some((time, value_at(points, time)?)));
    let quantity = quantity_of(check.id);
    let unit = units.unit(quantity);
    let maker = Maker {
        check,
        evidence,
        value: point.map(|(_, value)| unit.si_from_value(value)),
        quantity,
        units,
    };
    let figure_text = check.figure.map(|figure| measure(figure, units, 3));
    Some(EvidenceMarks {
        panel: panel.label.clone(),
        point,
        text: format!(
            "{} {}",
            check_name(check.id),
            figure_text.unwrap_or_default()
        ),
        // A line that shows something else of the same matter has no place for the limit.
        limits: if shown { maker.limits() } else { Vec::new() },
        stretch: maker.stretch(),
    })
}

/// The panel and points of a column; for one that is not drawn, of a line that shows the same
/// matter. The last says whether it is the column itself.
fn found<'a>(figure: &'a Figure, column: &str) -> Option<(&'a Panel, &'a [[f64; 2]], bool)> {
    let line = |name: &str| {
        figure.panels.iter().find_map(|panel| {
            let of =
                |series: &&helmsplit_view::plot::Series| series.column.as_deref() == Some(name);
            let series = panel.series.iter().find(of)?;
            Some((panel, series.points.as_slice()))
        })
    };
    if let Some((panel, points)) = line(column) {
        return Some((panel, points, true));
    }
    let stand_in = stand_in(column)?;
    line(stand_in).map(|(panel, points)| (panel, points, false))
}

/// The line that shows what a column without a line of its own is about.
fn stand_in(column: &str) -> Option<&'static str> {
    use helmsplit_model::Signal;
    let is = |signal: Signal| column == signal.name();
    if is(Signal::WheelShortfall) {
        Some(Signal::WheelRateEffective.name())
    } else if is(Signal::ExcessOutFlow) {
        Some(Signal::ExcessFlow.name())
    } else {
        None
    }
}

/// The kind of quantity of the trace that a check looks at.
fn quantity_of(id: CheckId) -> Quantity {
    match id {
        CheckId::Overshoot
        | CheckId::Settling
        | CheckId::ConsumerAtLock
        | CheckId::LineVelocity
        | CheckId::PriorityAtIdle
        | CheckId::Regulation => Quantity::Flow,
        CheckId::PilotClearance | CheckId::PeakPressure | CheckId::SteeringLimit => {
            Quantity::Pressure
        }
        CheckId::Dropout => Quantity::AngularVelocity,
        CheckId::StrokeReserve => Quantity::Length,
        CheckId::Heat => Quantity::Power,
        CheckId::Damping | CheckId::ViscosityWindow | CheckId::RippleClearance | CheckId::Audit => {
            Quantity::Ratio
        }
    }
}

impl Maker<'_> {
    /// A number of the evidence by its name, SI.
    fn operand(&self, name: &str) -> Option<f64> {
        let mut operands = self.evidence.operands.iter();
        let operand = operands.find(|operand| operand.name == name)?;
        Some(operand.value.si)
    }

    /// The bound that the figure is held against, and the figure.
    fn bound(&self) -> Option<(f64, f64)> {
        let bound = match self.check.limit? {
            CheckLimit::AtLeast(bound) | CheckLimit::AtMost(bound) => bound,
            CheckLimit::Inside(..) => return None,
        };
        Some((bound, self.check.figure?.si))
    }

    /// A line at a value (SI) with the limit in words.
    fn line(&self, si: f64) -> Vec<Limit> {
        let unit = self.units.unit(self.quantity);
        let value = with_unit(si, unit, 4);
        let words = limit(self.check, self.units).unwrap_or_default();
        vec![Limit {
            label: format!("limit {words}: {value}"),
            at: Where::Line(unit.value_from_si(si)),
            reach: Reach::Widen,
        }]
    }

    /// Where the limit lies on the trace, turned from the figure's unit into that of the trace by
    /// the formula of the check. Nothing where that cannot be told.
    fn limits(&self) -> Vec<Limit> {
        let lines = || {
            let (bound, figure) = self.bound()?;
            match self.check.id {
                CheckId::Overshoot if figure > 0.0 => {
                    // figure = (largest - base) / settled, so the base follows.
                    let (largest, settled) = (
                        self.operand("largest flow")?,
                        self.operand("flow after the event")?,
                    );
                    Some(self.line(largest + (bound - figure) * settled))
                }
                CheckId::Settling => Some(self.band()?),
                CheckId::PeakPressure => Some(self.line(self.operand("rating")? * bound)),
                CheckId::PilotClearance => Some(self.line(self.operand("pilot cracking")? - bound)),
                // Velocity goes with flow through one bore.
                CheckId::LineVelocity if figure > 0.0 => {
                    Some(self.line(self.value? * bound / figure))
                }
                CheckId::Heat => Some(self.line(self.operand("cooler capacity")? * bound)),
                _ => None,
            }
        };
        lines().unwrap_or_default()
    }

    /// The band that the flow has to stay in.
    fn band(&self) -> Option<Vec<Limit>> {
        let (settled, band) = (self.operand("flow after the event")?, self.operand("band")?);
        let unit = self.units.unit(self.quantity);
        let at = |share: f64| unit.value_from_si(settled * share);
        Some(vec![Limit {
            label: "settling band".to_owned(),
            at: Where::Band(at(1.0 - band), at(1.0 + band)),
            reach: Reach::IfInView,
        }])
    }

    /// The time that a limit on a duration allows.
    fn stretch(&self) -> Option<(f64, f64)> {
        let time = self.evidence.time?;
        let (bound, figure) = self.bound()?;
        match self.check.id {
            // The moment is when it settled; it began to count the figure before.
            CheckId::Settling => Some((time - figure, time - figure + bound)),
            CheckId::Dropout if figure > 0.0 => Some((time, time + bound)),
            _ => None,
        }
    }
}
