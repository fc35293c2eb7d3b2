//! Integrals over time of what the solver's steps sample.

/// Samples looked at together.
const WINDOW: usize = 4;

/// Integrates `N` quantities sampled at uneven times: between each two samples the cubic through
/// them and their neighbours is integrated exactly. Where a quantity bends or jumps, call
/// [`Quadrature::interrupt`], so that no cubic reaches across.
#[derive(Debug, Clone)]
pub(crate) struct Quadrature<const N: usize> {
    times: [f64; WINDOW],
    samples: [[f64; N]; WINDOW],
    /// Samples in the window since the last interruption.
    filled: usize,
    /// Whether the intervals at the start of the smooth piece are summed already.
    under_way: bool,
    sums: [f64; N],
    /// What rounding took from the sums (Kahan's compensated summation).
    lost: [f64; N],
}

impl<const N: usize> Quadrature<N> {
    pub(crate) fn new() -> Self {
        Self {
            times: [0.0; WINDOW],
            samples: [[0.0; N]; WINDOW],
            filled: 0,
            under_way: false,
            sums: [0.0; N],
            lost: [0.0; N],
        }
    }

    /// Takes the sample at `time`, later than the one before.
    pub(crate) fn push(&mut self, time: f64, sample: [f64; N]) {
        if self.filled == WINDOW {
            self.times.rotate_left(1);
            self.samples.rotate_left(1);
            self.filled -= 1;
        }
        self.times[self.filled] = time;
        self.samples[self.filled] = sample;
        self.filled += 1;
        if self.filled == WINDOW {
            if !self.under_way {
                self.add(0);
                self.under_way = true;
            }
            self.add(1);
        }
    }

    /// Ends a smooth piece.
    pub(crate) fn interrupt(&mut self) {
        if self.under_way {
            self.add(WINDOW - 2);
        } else {
            for interval in 1..self.filled {
                self.add(interval - 1);
            }
        }
        self.filled = 0;
        self.under_way = false;
    }

    /// The integrals so far, up to the last interruption.
    pub(crate) fn sums(&self) -> [f64; N] {
        self.sums
    }

    /// Adds the integral between samples `interval` and `interval + 1` of the polynomial through
    /// all samples of the window.
    fn add(&mut self, interval: usize) {
        let weights = self.weights(interval);
        for quantity in 0..N {
            let mut part = -self.lost[quantity];
            for (weight, sample) in weights.iter().zip(&self.samples).take(self.filled) {
                part += weight * sample[quantity];
            }
            let sum = self.sums[quantity] + part;
            self.lost[quantity] = (sum - self.sums[quantity]) - part;
            self.sums[quantity] = sum;
        }
    }

    /// Weights of the samples: the two-point rule of Gauss, exact for cubics, applied to the
    /// polynomials of Lagrange.
    fn weights(&self, interval: usize) -> [f64; WINDOW] {
        let (a, b) = (self.times[interval], self.times[interval + 1]);
        let (middle, half) = (0.5 * (a + b), 0.5 * (b - a));
        let offset = half / 3f64.sqrt();
        let mut weights = [0.0; WINDOW];
        for point in [middle - offset, middle + offset] {
            for (i, weight) in weights.iter_mut().enumerate().take(self.filled) {
                let mut value = half;
                for j in 0..self.filled {
                    if j != i {
                        value *= (point - self.times[j]) / (self.times[i] - self.times[j]);
                    }
                }
                *weight += value;
            }
        }
        weights
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn integrate(times: &[f64], f: impl Fn(f64) -> f64) -> f64 {
        let mut quadrature = Quadrature::<1>::new();
        for &t in times {
            quadrature.push(t, [f(t)]);
        }
        quadrature.interrupt();
        quadrature.sums()[0]
    }

    #[test]
    fn exact_for_cubics_on_uneven_times() {
        let cubic = |t: f64| 1.0 - 2.0 * t + 3.0 * t * t - 4.0 * t * t * t;
        let primitive = |t: f64| t - t * t + t.powi(3) - t.powi(4);
        for times in [
            vec![0.0, 0.1, 0.35, 0.4, 1.0, 1.7],
            vec![0.0, 0.5, 0.6, 2.0],
        ] {
            let end = times[times.len() - 1];
            let error = integrate(&times, cubic) - primitive(end);
            assert!(error.abs() < 1e-12, "{times:?}: {error:e}");
        }
    }

    #[test]
    fn exact_for_what_few_samples_allow() {
        assert!(integrate(&[1.0], |t| t).abs() < 1e-15, "no interval");
        assert!(
            (integrate(&[0.0, 2.0], |t| t) - 2.0).abs() < 1e-14,
            "a line"
        );
        let parabola = integrate(&[0.0, 0.3, 2.0], |t| t * t);
        assert!(
            (parabola - 8.0 / 3.0).abs() < 1e-14,
            "a parabola: {parabola}"
        );
    }

    #[test]
    fn a_jump_is_not_smeared() {
        let mut quadrature = Quadrature::<1>::new();
        for i in 0..=10 {
            quadrature.push(0.1 * f64::from(i), [1.0]);
        }
        quadrature.interrupt();
        for i in 10..=20 {
            quadrature.push(0.1 * f64::from(i), [5.0]);
        }
        quadrature.interrupt();
        assert!(
            (quadrature.sums()[0] - 6.0).abs() < 1e-13,
            "1 s of 1 and 1 s of 5"
        );
    }

    #[test]
    fn fourth_order_on_smooth_curves() {
        let error = |n: u32| {
            let times: Vec<f64> = (0..=n).map(|i| 2.0 * f64::from(i) / f64::from(n)).collect();
            (integrate(&times, f64::exp) - 2f64.exp_m1()).abs()
        };
        let order = (error(80) / error(160)).log2();
        assert!(order > 3.7, "order {order}");
    }
}
