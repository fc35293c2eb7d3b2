//! Differences whose step follows the noise.

use helmsplit_scenario::ParameterId;

use super::{Scale, reference_size};
use crate::figure::Missing;
use crate::parameter_scale::is_allowed;

/// Smallest and largest relative step.
const STEPS: (f64, f64) = (2e-3, 5e-2);

/// Both steps agree if their difference is below this share of the sensitivity.
const AGREE: f64 = 0.15;

/// A sensitivity below this is as good as none; differences below it do not matter.
const NONE: f64 = 0.02;

/// Where the differences of one parameter are taken.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Plan {
    pub(super) id: ParameterId,
    pub(super) scale: Scale,
    /// Relative step.
    pub(super) step: f64,
    value: f64,
    /// The step in SI, towards the side where there is room.
    size: f64,
    side: Side,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Side {
    Both,
    Up,
    Down,
}

/// A relative sensitivity.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Sensitivity {
    pub(super) value: f64,
    pub(super) uncertainty: f64,
    pub(super) resolved: bool,
}

impl Plan {
    /// The error of a central difference is noise over step plus the square of the step: least
    /// near the cube root of the noise (Press et al., *Numerical Recipes*, section 5.7).
    pub(super) fn new(id: ParameterId, value: f64, scale: Scale, noise: f64) -> Self {
        let step = noise.cbrt().clamp(STEPS.0, STEPS.1);
        let size = step * reference_size(id, scale, value);
        let up = is_allowed(id, value + size);
        let down = is_allowed(id, value - size);
        let side = match (up, down) {
            (true, false) => Side::Up,
            (false, true) => Side::Down,
            // Where neither is allowed, the variants say so themselves.
            _ => Side::Both,
        };
        Self {
            id,
            scale,
            step,
            value,
            size,
            side,
        }
    }

    /// The values at which the figure is asked, SI: the step and half of it, to both sides; at an
    /// end of the allowed range four steps to the one side.
    pub(super) fn values(&self) -> std::array::IntoIter<f64, 4> {
        let shares = match self.side {
            Side::Both => [1.0, -1.0, 0.5, -0.5],
            Side::Up => [1.0, 2.0, 0.5, 0.25],
            Side::Down => [-1.0, -2.0, -0.5, -0.25],
        };
        shares
            .map(|share| self.value + share * self.size)
            .into_iter()
    }

    /// The sensitivity from the figures at [`Self::values`], from the base and its relative noise.
    pub(super) fn sensitivity(
        &self,
        base: f64,
        noise: f64,
        figures: [Result<f64, Missing>; 4],
    ) -> Result<Sensitivity, Missing> {
        let [a, b, c, d] = figures;
        // Relative changes of the figure.
        let change = |figure: Result<f64, Missing>| Ok((figure? - base) / base.abs());
        let (a, b, c, d) = (change(a)?, change(b)?, change(c)?, change(d)?);
        let h = self.step;
        let (whole, half) = match self.side {
            Side::Both => ((a - b) / (2.0 * h), (c - d) / h),
            // Three-point formulas to one side: at h and 2h, then at h/4 and h/2.
            Side::Up => ((4.0 * a - b) / (2.0 * h), (4.0 * d - c) / (0.5 * h)),
            Side::Down => (-(4.0 * a - b) / (2.0 * h), -(4.0 * d - c) / (0.5 * h)),
        };
        let uncertainty = (half - whole).abs() + noise / h;
        // The larger step has the smaller noise; where both agree, it counts.
        Ok(Sensitivity {
            value: whole,
            uncertainty,
            resolved: uncertainty <= (AGREE * whole.abs()).max(NONE),
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::parameter::{pump, valve_edges};

    fn found(id: ParameterId, value: f64, noise: f64, figure: impl Fn(f64) -> f64) -> Sensitivity {
        let plan = Plan::new(id, value, Scale::Value, noise);
        let mut values = plan.values();
        let figures = std::array::from_fn(|_| Ok(figure(values.next().unwrap())));
        plan.sensitivity(figure(value), noise, figures).unwrap()
    }

    #[test]
    fn a_power_law_gives_its_exponent() {
        let orifice = valve_edges::FIXED_ORIFICE_DIAMETER;
        for exponent in [-3.0, -0.5, 0.5, 1.0, 2.0] {
            let s = found(orifice, 3.7e-3, 1e-6, |d| 7.0 * d.powf(exponent));
            assert!((s.value - exponent).abs() < 2e-3, "{exponent}: {s:?}");
            assert!(s.resolved, "{exponent}: {s:?}");
        }
    }

    #[test]
    fn at_the_end_of_the_allowed_range_one_side_serves() {
        // A wear of 1 is the least allowed.
        let s = found(pump::WEAR, 1.0, 1e-6, |w| 3.0 + w * w);
        assert!((s.value - 0.5).abs() < 2e-3, "{s:?}");
        assert!(s.resolved, "{s:?}");
    }

    #[test]
    fn what_drowns_in_noise_is_not_resolved() {
        let orifice = valve_edges::FIXED_ORIFICE_DIAMETER;
        // A figure that jitters by a per cent on a scale far below the step.
        let jitter = |d: f64| 1.0 + 0.01 * (d * 1e9).sin();
        let s = found(orifice, 3.7e-3, 1e-2, jitter);
        assert!(!s.resolved, "{s:?}");
    }
}
