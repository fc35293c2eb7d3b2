//! A line of segments with inertia and friction (M7.2).

use crate::dual::Dual;
use crate::oil::Oil;
use crate::real::Real;
use crate::smooth::smooth_step;

/// Reynolds number up to which the flow is laminar.
const LAMINAR_END: f64 = 2000.0;

/// Width of the passage to turbulent flow, in Reynolds number.
const PASSAGE: f64 = 2000.0;

/// Blasius' factor, `lambda = 0.3164 Re^-0.25`.
const BLASIUS: f64 = 0.3164;

/// A hose or tube.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Line {
    /// Length, m.
    pub length: f64,
    /// Bore, m.
    pub bore: f64,
    /// Loss factor of fittings, bends and strainers, referred to the velocity in the bore.
    pub fitting_loss: f64,
    /// Number of equal segments, at least 1.
    pub segments: usize,
}

impl Line {
    /// Flow area, m2.
    #[inline(always)]
    #[must_use]
    pub fn area(&self) -> f64 {
        std::f64::consts::FRAC_PI_4 * self.bore * self.bore
    }

    /// Volume of the whole line, m3.
    #[must_use]
    pub fn volume(&self) -> f64 {
        self.area() * self.length
    }

    /// Inertance of one segment, kg/m4: pressure per rate of flow.
    #[inline(always)]
    #[must_use]
    pub fn segment_inertance(&self, oil: &Oil) -> f64 {
        oil.density * self.length / (self.area() * self.count())
    }

    #[inline(always)]
    fn count(&self) -> f64 {
        // A line has a handful of segments; the conversion is exact.
        self.segments as f64
    }

    /// Pressure that one segment loses at a flow in m3/s (M7.2), Pa; odd in the flow.
    ///
    /// # Source
    /// Laminar: Hagen-Poiseuille. Turbulent: Blasius, *Das Aehnlichkeitsgesetz bei
    /// Reibungsvorgaengen*, 1913, smooth walls, Re up to 1e5.
    #[inline(always)]
    pub fn segment_drop<S: Real>(&self, oil: &Oil, flow: S) -> S {
        flow.widen(self.segment_drop_at(oil, Dual::variable(flow.value(), 0)))
    }

    #[inline(always)]
    fn segment_drop_at<S: Real>(&self, oil: &Oil, flow: S) -> S {
        let share = 1.0 / self.count();
        let velocity = flow * (1.0 / self.area());
        let speed = velocity.abs();
        let reynolds = speed * (self.bore / oil.kinematic_viscosity);
        let laminar = 32.0 * oil.dynamic_viscosity() * self.length / (self.bore * self.bore);
        let friction = velocity * (laminar * share);
        let fittings = velocity * speed * (0.5 * oil.density * self.fitting_loss * share);
        if reynolds.value() <= LAMINAR_END {
            return friction + fittings;
        }
        let turbulent = (reynolds + 1.0).powf(0.75) * (BLASIUS / 64.0) - 1.0;
        let passage = smooth_step((reynolds - LAMINAR_END) * (1.0 / PASSAGE));
        friction * (passage * turbulent + 1.0) + fittings
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn oil() -> Oil {
        Oil {
            density: 850.0,
            kinematic_viscosity: 30e-6,
            air: 1e-5,
            polytropic_exponent: 1.2,
            liquid_bulk_modulus: 1.5e9,
        }
    }

    #[test]
    fn segments_add_up_to_the_whole_line() {
        let whole = Line {
            length: 2.0,
            bore: 0.01,
            fitting_loss: 3.0,
            segments: 1,
        };
        let parts = Line {
            segments: 7,
            ..whole
        };
        for q in [-1e-3, -1e-4, 2.5e-4, 9e-4] {
            let sum = parts.segment_drop(&oil(), q) * 7.0;
            let one = whole.segment_drop(&oil(), q);
            assert!((sum / one - 1.0).abs() < 1e-12, "at {q}");
        }
    }

    #[test]
    fn is_odd_in_the_flow() {
        let line = Line {
            length: 2.0,
            bore: 0.01,
            fitting_loss: 3.0,
            segments: 1,
        };
        for q in [1e-6, 2.5e-4, 2e-3] {
            let sum = line.segment_drop(&oil(), q) + line.segment_drop(&oil(), -q);
            assert!(sum.abs() < 1e-9, "at {q}");
        }
    }
}
