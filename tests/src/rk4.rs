//! Classical Runge-Kutta method of fourth order with a fixed step: an integrator that owes
//! nothing to the engine's own solver.
//!
//! # Source
//! Kutta, *Beitrag zur naeherungsweisen Integration totaler Differentialgleichungen*, 1901.

/// Work space of the method for one system.
#[derive(Debug, Clone)]
pub struct Rk4 {
    slopes: [Vec<f64>; 4],
    trial: Vec<f64>,
}

impl Rk4 {
    /// For a system of `size` states.
    #[must_use]
    pub fn new(size: usize) -> Self {
        Self {
            slopes: std::array::from_fn(|_| vec![0.0; size]),
            trial: vec![0.0; size],
        }
    }

    /// Advances `y` by `dt` seconds; `rates` writes the time derivatives of its first argument
    /// into its second.
    pub fn step(&mut self, y: &mut [f64], dt: f64, rates: &mut impl FnMut(&[f64], &mut [f64])) {
        const SHARES: [f64; 4] = [0.0, 0.5, 0.5, 1.0];
        for (stage, share) in SHARES.into_iter().enumerate() {
            self.trial.copy_from_slice(y);
            if let Some(before) = stage.checked_sub(1) {
                for (trial, slope) in self.trial.iter_mut().zip(&self.slopes[before]) {
                    *trial += share * dt * slope;
                }
            }
            rates(&self.trial, &mut self.slopes[stage]);
        }
        let [a, b, c, d] = &self.slopes;
        for (i, y) in y.iter_mut().enumerate() {
            *y += dt / 6.0 * (a[i] + 2.0 * (b[i] + c[i]) + d[i]);
        }
    }
}

/// Time at which `event` first turns from positive to not positive, s, by linear interpolation
/// inside the step of `dt`; `None` when it has not by `end`. `y` is left at the step behind it.
pub fn time_of_event(
    y: &mut [f64],
    dt: f64,
    end: f64,
    mut rates: impl FnMut(&[f64], &mut [f64]),
    event: impl Fn(&[f64]) -> f64,
) -> Option<f64> {
    let mut method = Rk4::new(y.len());
    let mut before = event(y);
    let mut steps = 0.0;
    while steps * dt < end {
        method.step(y, dt, &mut rates);
        let after = event(y);
        if before > 0.0 && after <= 0.0 {
            return Some((steps + before / (before - after)) * dt);
        }
        before = after;
        steps += 1.0;
    }
    None
}

/// Integrates to `end` and hands every state to `see`, the first included.
pub fn integrate(
    y: &mut [f64],
    dt: f64,
    end: f64,
    mut rates: impl FnMut(&[f64], &mut [f64]),
    mut see: impl FnMut(f64, &[f64]),
) {
    let mut method = Rk4::new(y.len());
    let steps = (end / dt).round() as u64;
    see(0.0, y);
    for step in 1..=steps {
        method.step(y, dt, &mut rates);
        see(step as f64 * dt, y);
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Harmonic oscillator: halving the step divides the error by 16 (order 4).
    #[test]
    fn error_falls_with_the_fourth_power() {
        let error = |dt: f64| {
            let mut y = [1.0, 0.0];
            let oscillate = |y: &[f64], dy: &mut [f64]| {
                dy[0] = y[1];
                dy[1] = -y[0];
            };
            integrate(&mut y, dt, 1.0, oscillate, |_, _| {});
            (y[0] - 1f64.cos()).abs()
        };
        let order = (error(0.02) / error(0.01)).log2();
        assert!((order - 4.0).abs() < 0.05, "order {order}");
    }

    #[test]
    fn event_is_found_inside_a_step() {
        let mut y = [1.0];
        let fall = |_: &[f64], dy: &mut [f64]| dy[0] = -1.0;
        let t = time_of_event(&mut y, 0.3, 5.0, fall, |y| y[0]);
        assert!((t.unwrap() - 1.0).abs() < 1e-12, "{t:?}");
    }
}
