//! Frequency response: magnitude and phase, with the bands of the pump's ripple.

use helmsplit_scenario::UnitSystem;
use helmsplit_study::{FrequencyResponse, RippleBand};

use crate::chart::{ChartAxis, ChartBand, ChartLine, ChartPanel, LineRole};
use crate::style::{Dash, Meaning};
use crate::unit_text::unit_text;

/// Heights, px.
const MAGNITUDE: f64 = 220.0;
const PHASE: f64 = 150.0;

/// Magnitude and phase of one response, the unit of the output over that of the excitation.
#[must_use]
pub fn bode_panels(
    response: &FrequencyResponse,
    ripple: &[RippleBand],
    units: UnitSystem,
) -> Vec<ChartPanel> {
    let (output, input) = (units.unit(response.output), units.unit(response.input));
    // Differences: an offset of a unit, as of degrees Celsius, does not count.
    let scale = difference(output, 1.0) / difference(input, 1.0);
    let unit = match (unit_text(output), unit_text(input)) {
        (output, input) if input.is_empty() => output,
        (output, input) if output.is_empty() => format!("1/({input})"),
        (output, input) => format!("{output} per {input}"),
    };
    let x = || {
        let axis = ChartAxis::logarithmic("Frequency", "Hz");
        match (response.frequencies.first(), response.frequencies.last()) {
            (Some(&from), Some(&to)) if from < to => axis.from_to(from, to),
            _ => axis,
        }
    };
    let name = format!(
        "{} per {}",
        response.label,
        response.excitation.label().to_lowercase()
    );
    let line = |points: Vec<[f64; 2]>| ChartLine {
        label: String::new(),
        role: LineRole::Data(Meaning::Inlet, Dash::Solid),
        points,
    };
    let mut magnitude = ChartPanel::new(x(), ChartAxis::logarithmic(name, unit), MAGNITUDE);
    let sizes = response.magnitude().map(|size| size * scale);
    let points = response
        .frequencies
        .iter()
        .zip(sizes)
        .map(|(&f, size)| [f, size]);
    magnitude.lines.push(line(points.collect()));
    let mut phase = ChartPanel::new(x(), ChartAxis::linear("Phase", "°"), PHASE);
    let phases = response.phase();
    let points = response
        .frequencies
        .iter()
        .zip(phases)
        .map(|(&f, p)| [f, p.to_degrees()]);
    phase.lines.push(line(points.collect()));
    for band in ripple {
        let shown = |label: String| ChartBand {
            label,
            range: (band.low, band.high),
        };
        magnitude
            .bands
            .push(shown(format!("ripple, harmonic {}", band.harmonic)));
        phase.bands.push(shown(String::new()));
    }
    vec![magnitude, phase]
}

/// What a difference in SI is in a unit.
fn difference(unit: &helmsplit_scenario::units::Unit, si: f64) -> f64 {
    unit.value_from_si(si) - unit.value_from_si(0.0)
}
