//! The response itself: `y = (C (i w - A)^-1 B + D) u` (Merritt, *Hydraulic Control Systems*,
//! 1967, writes the same for each of his valves by hand).

use std::f64::consts::TAU;

use helmsplit_model::Quantity;
use nalgebra::{Complex, DMatrix, DVector};

use super::excitation::Excitation;
use super::outputs::{Output, column, output};
use crate::equilibrium::Equilibrium;
use crate::error::StudyError;
use crate::modes::{Linear, ModesError};
use crate::operating::PointError;

/// Response of one signal to one excitation.
#[derive(Debug, Clone, PartialEq)]
pub struct FrequencyResponse {
    /// What shakes.
    pub excitation: Excitation,
    /// Kind of quantity of the excitation.
    pub input: Quantity,
    /// Short name of what is read.
    pub name: String,
    /// What a person calls it.
    pub label: String,
    /// Its kind of quantity.
    pub output: Quantity,
    /// Frequencies, Hz.
    pub frequencies: Vec<f64>,
    /// Response at each frequency: real and imaginary part, SI unit of the output over that of
    /// the excitation.
    pub values: Vec<(f64, f64)>,
}

impl FrequencyResponse {
    /// Size of the response at each frequency, SI unit of the output over that of the excitation.
    pub fn magnitude(&self) -> impl Iterator<Item = f64> {
        self.values.iter().map(|&(re, im)| re.hypot(im))
    }

    /// Phase at each frequency, rad, without jumps; negative when it lags.
    #[must_use]
    pub fn phase(&self) -> Vec<f64> {
        let mut phases: Vec<f64> = Vec::with_capacity(self.values.len());
        for &(re, im) in &self.values {
            let raw = im.atan2(re);
            let turns = phases
                .last()
                .map_or(0.0, |last| ((last - raw) / TAU).round());
            phases.push(raw + turns * TAU);
        }
        phases
    }

    /// Largest response with its frequency, Hz.
    #[must_use]
    pub fn peak(&self) -> Option<(f64, f64)> {
        self.magnitude()
            .zip(&self.frequencies)
            .map(|(size, &frequency)| (size, frequency))
            .max_by(|a, b| a.0.total_cmp(&b.0))
    }
}

/// `count` frequencies from `from` to `to` (Hz), spread evenly on a logarithmic scale, and the
/// frequency of each mode of the equilibrium that swings between them.
#[must_use]
pub fn spread_frequencies(equilibrium: &Equilibrium, from: f64, to: f64, count: usize) -> Vec<f64> {
    let last = count.saturating_sub(1).max(1) as f64;
    let mut all: Vec<f64> = (0..count)
        .map(|i| from * (to / from).powf(i as f64 / last))
        .collect();
    let modes = equilibrium.stability.eigenvalues.iter();
    all.extend(
        modes
            .filter(|(_, im)| *im > 0.0)
            .map(|(_, im)| im / TAU)
            .filter(|f| (from..=to).contains(f)),
    );
    all.sort_by(f64::total_cmp);
    all.dedup_by(|a, b| (*a - *b).abs() < 1e-9 * *b);
    all
}

/// Response of the signals and states `names` (short names) of an equilibrium to an excitation,
/// at `frequencies` (Hz). Linear: it holds for vibrations that are small against everything that
/// bends, and dry friction at rest is left out.
///
/// # Errors
/// [`StudyError::Point`] for a name that the circuit does not have, or an excitation without
/// occasion; [`StudyError::Modes`] where the equations cannot be solved.
pub fn frequency_response(
    equilibrium: &Equilibrium,
    excitation: Excitation,
    names: &[&str],
    frequencies: &[f64],
) -> Result<Vec<FrequencyResponse>, StudyError> {
    let linear = Linear::at(&equilibrium.frozen, &equilibrium.state)?;
    let input = excitation.quantity(equilibrium)?;
    let column = column(equilibrium, &linear, excitation)?;
    let mut outputs = Vec::with_capacity(names.len());
    for name in names {
        outputs.push(
            output(equilibrium, &linear, excitation, name)?.ok_or_else(|| {
                PointError::NoSuchVariable {
                    variable: (*name).to_owned(),
                    reason: "the circuit has no signal or moving state of that name",
                }
            })?,
        );
    }
    let mut responses: Vec<FrequencyResponse> = outputs
        .iter()
        .map(|output| empty(excitation, input, output, frequencies))
        .collect();
    for &frequency in frequencies {
        let motion = solve(&linear, &column, frequency)?;
        for (response, output) in responses.iter_mut().zip(&outputs) {
            let sum: Complex<f64> = output
                .row
                .iter()
                .zip(motion.iter())
                .map(|(c, z)| z * *c)
                .sum();
            let value = sum + output.direct;
            response.values.push((value.re, value.im));
        }
    }
    Ok(responses)
}

fn empty(
    excitation: Excitation,
    input: Quantity,
    output: &Output,
    frequencies: &[f64],
) -> FrequencyResponse {
    FrequencyResponse {
        excitation,
        input,
        name: output.name.clone(),
        label: output.label.clone(),
        output: output.quantity,
        frequencies: frequencies.to_vec(),
        values: Vec::with_capacity(frequencies.len()),
    }
}

/// Motion of the free states in balanced units under an excitation of size 1.
fn solve(
    linear: &Linear,
    column: &[f64],
    frequency: f64,
) -> Result<DVector<Complex<f64>>, ModesError> {
    let size = linear.free.len();
    let swing = Complex::new(0.0, TAU * frequency);
    let matrix = DMatrix::from_fn(size, size, |i, j| {
        let own = if i == j { swing } else { Complex::from(0.0) };
        own - linear.matrix[(i, j)]
    });
    let right = DVector::from_iterator(size, column.iter().map(|&b| Complex::from(b)));
    matrix
        .lu()
        .solve(&right)
        .ok_or(ModesError::NoConvergence { size })
}
