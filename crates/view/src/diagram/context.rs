//! What every part of the diagram needs to know.

use helmsplit_model::{Parts, Quantity, ReturnSide, Signal};
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::units::{Unit, unit};
use kurbo::Vec2;

use crate::moment::Moment;
use crate::plot::{number_text, power_text};
use crate::ramp::PressureScale;
use crate::scene::{Anchor, Line, Paint, PartPen, Prim, Stroke, Tone};
use crate::style::TextSize;
use crate::unit_text::unit_text;

/// What is shown beside the symbols.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct DrawingOptions {
    /// Units of all values. Default: metric.
    pub units: UnitSystem,
    /// Whether pressures, flows and speeds of the moment stand beside the lines. Default: yes.
    pub values: bool,
    /// Whether a drawing that is shaded by pressure has the scale of the shades below it. Default:
    /// yes.
    pub scale_bar: bool,
    /// Length of the valve in section, px at 100 %; texts and lines keep their size. Default: 800.
    pub section_length: f64,
    /// What stands around the section. Default: everything.
    pub notes: Notes,
}

/// What stands around the valve in section.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Notes {
    /// Nothing: the bodies alone.
    None,
    /// Names, and the scale of travel.
    Names,
    /// Names with sizes and pressures, and the scale of travel.
    #[default]
    Full,
}

impl Default for DrawingOptions {
    fn default() -> Self {
        Self {
            units: UnitSystem::Metric,
            values: true,
            scale_bar: true,
            section_length: 800.0,
            notes: Notes::Full,
        }
    }
}

/// A value with its unit, three significant digits.
pub(crate) fn value_text(si: f64, quantity: Quantity, units: UnitSystem) -> String {
    let unit = units.unit(quantity);
    with_unit(&number_of(unit.value_from_si(si), units), unit)
}

/// Three significant digits, two places at most; in SI, where values are very large and small,
/// with a power of ten.
fn number_of(value: f64, units: UnitSystem) -> String {
    let plain = 0.005..1e5;
    if units == UnitSystem::Si && value.abs() > 1e-12 && !plain.contains(&value.abs()) {
        return power_text(value);
    }
    let size = value.abs().max(1e-3).log10().floor() as i32;
    let places = usize::try_from((2 - size).clamp(0, 2)).unwrap_or(0);
    number_text(value, places)
}

fn with_unit(number: &str, unit: &Unit) -> String {
    match unit_text(unit) {
        symbol if symbol.is_empty() => number.to_owned(),
        symbol if symbol == "°" => format!("{number}°"),
        symbol => format!("{number} {symbol}"),
    }
}

/// A dimension with its unit: as short as three digits allow, `20 cm³`, lengths from a metre on in
/// metres or feet.
pub(crate) fn size_text(si: f64, quantity: Quantity, units: UnitSystem) -> String {
    let long = match units {
        UnitSystem::Us => "ft",
        _ => "m",
    };
    let unit = match quantity {
        Quantity::Length if si >= LONG => unit(quantity, long),
        _ => None,
    };
    let unit = unit.unwrap_or_else(|| units.unit(quantity));
    let number = number_of(unit.value_from_si(si), units);
    let short = if number.contains('.') {
        number.trim_end_matches('0').trim_end_matches('.')
    } else {
        &number
    };
    with_unit(short, unit)
}

/// From here on lengths are told in the longer unit, m.
const LONG: f64 = 1.0;

/// Least flow that has an arrow, as a share of the reference flow.
const LEAST_FLOW: f64 = 0.003;

/// Speed at which the pump's delivery is the reference of arrow sizes, rad/s.
const REFERENCE_SPEED: f64 = 220.0;

/// The circuit, its moment and how to show it.
pub(super) struct Context<'a> {
    pub(super) parts: &'a Parts,
    pub(super) moment: Option<&'a Moment>,
    pub(super) options: DrawingOptions,
    pub(super) scale: PressureScale,
}

impl<'a> Context<'a> {
    /// A pressure by the name of its state, or the return pressure as `return`, or the pressure at
    /// the pump inlet as `suction`; Pa.
    pub(super) fn pressure(&self, name: &str) -> Option<f64> {
        let moment = self.moment?;
        match name {
            "return" => match self.parts.return_side {
                ReturnSide::Constant(pressure) => Some(pressure),
                ReturnSide::Restricted { .. } => moment.state("p_ret"),
            },
            "suction" => moment.state("p_suc").or(Some(0.0)),
            "tank" => Some(0.0),
            name => moment.state(name),
        }
    }

    /// A line, shaded by the pressure of that name.
    pub(super) fn stroke(&self, line: Line, pressure: &str) -> Stroke {
        Stroke {
            line,
            oil: self.pressure(pressure).map(|p| self.scale.share(p)),
        }
    }

    /// A working line under that pressure.
    pub(super) fn working(&self, pressure: &str) -> Stroke {
        self.stroke(Line::Working, pressure)
    }

    /// A pilot line under that pressure.
    pub(super) fn pilot(&self, pressure: &str) -> Stroke {
        self.stroke(Line::Pilot, pressure)
    }

    /// An arrow on a line: along `direction` if the flow is positive, against it if negative,
    /// larger for more; none if hardly anything flows.
    pub(super) fn arrow(
        &self,
        pen: &mut PartPen,
        centre: (f64, f64),
        direction: Vec2,
        signal: Signal,
    ) {
        let flow = self.moment.and_then(|moment| moment.signal(signal));
        let Some(flow) = flow else {
            return;
        };
        let reference = self.parts.pump.displacement_rad * REFERENCE_SPEED;
        let share = flow.abs() / reference;
        if share < LEAST_FLOW {
            return;
        }
        let direction = direction * flow.signum();
        let length = 7.0 + 8.0 * share.min(1.0).sqrt();
        let tip = (
            centre.0 + 0.5 * length * direction.x,
            centre.1 + 0.5 * length * direction.y,
        );
        pen.push(Prim::Arrow {
            tip: tip.into(),
            direction,
            length,
            paint: Paint::Ink,
            pace: share.min(1.0),
        });
    }

    /// A value with its unit.
    pub(super) fn text(&self, si: f64, quantity: Quantity) -> String {
        value_text(si, quantity, self.options.units)
    }

    /// A dimension with its unit.
    pub(super) fn size(&self, si: f64, quantity: Quantity) -> String {
        size_text(si, quantity, self.options.units)
    }

    /// The pressure of that name beside a line, if values are wanted.
    pub(super) fn show_pressure(
        &self,
        pen: &mut PartPen,
        at: (f64, f64),
        anchor: Anchor,
        name: &str,
    ) {
        if let (true, Some(pressure)) = (self.options.values, self.pressure(name)) {
            let text = self.text(pressure, Quantity::Pressure);
            pen.text(at, text, (TextSize::Small, Tone::Ink), anchor);
        }
    }

    /// A signal beside a line, if values are wanted.
    pub(super) fn show_signal(
        &self,
        pen: &mut PartPen,
        at: (f64, f64),
        anchor: Anchor,
        signal: Signal,
    ) {
        let value = self.moment.and_then(|moment| moment.signal(signal));
        if let (true, Some(value)) = (self.options.values, value) {
            let text = self.text(value, signal.quantity());
            pen.text(at, text, (TextSize::Small, Tone::Ink), anchor);
        }
    }
}

impl Context<'_> {
    /// A speed of a state beside a shaft, if values are wanted.
    pub(super) fn show_state(
        &self,
        pen: &mut PartPen,
        at: (f64, f64),
        anchor: Anchor,
        (state, quantity): (&str, Quantity),
    ) {
        let value = self.moment.and_then(|moment| moment.state(state));
        if let (true, Some(value)) = (self.options.values, value) {
            let text = self.text(value, quantity);
            pen.text(at, text, (TextSize::Small, Tone::Ink), anchor);
        }
    }
}
