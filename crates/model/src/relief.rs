//! Direct-acting relief valves with a lag (M6).

use crate::oil::Oil;
use crate::orifice::Edge;
use crate::real::Real;
use crate::smooth::ramp;

/// A relief valve; its opening `y` (0 shut, 1 at full flow) is a state.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Relief {
    /// Pressure difference at which it cracks, Pa.
    pub cracking: f64,
    /// Pressure difference at which it passes its full flow, Pa, above `cracking`.
    pub full_flow_pressure: f64,
    /// Flow area at full opening, m2.
    pub full_area: f64,
    /// Time constant, s, positive.
    pub time_constant: f64,
    /// Width over which it begins to open, Pa.
    pub opening_width: f64,
    /// Opening that it never closes below: leaking or stuck open, 0 when sound.
    pub least_opening: f64,
    /// Its metering edge.
    pub edge: Edge,
}

impl Relief {
    /// Area that passes `full_flow` (m3/s) at `full_flow_pressure` (Pa), turbulent (M6.1); m2.
    #[must_use]
    pub fn full_area(full_flow: f64, full_flow_pressure: f64, edge: &Edge, density: f64) -> f64 {
        full_flow / (edge.discharge * (2.0 * full_flow_pressure / density).sqrt())
    }

    /// Opening that `dp` asks for, 0 when shut.
    #[inline(always)]
    fn wanted<S: Real>(&self, dp: S) -> S {
        dp.univariate(|dp| {
            ramp(dp - self.cracking, self.opening_width)
                * (1.0 / (self.full_flow_pressure - self.cracking))
        })
    }

    /// Rate of the opening, 1/s, from the opening and the pressure difference in Pa (M6.1).
    #[inline(always)]
    pub fn rate<S: Real>(&self, opening: S, dp: S) -> S {
        (self.wanted(dp) - opening) * (1.0 / self.time_constant)
    }

    /// Flow in m3/s at an opening and a pressure difference in Pa (M6.1).
    #[inline(always)]
    pub fn flow<S: Real>(&self, oil: &Oil, opening: S, dp: S) -> S {
        let area = opening.max_with(self.least_opening) * self.full_area;
        self.edge.flow_round(oil, area, dp)
    }

    /// Flow in m3/s of a relief that follows at once, without a state of its own.
    #[inline(always)]
    pub fn flow_at_once<S: Real>(&self, oil: &Oil, dp: S) -> S {
        let opening = self.wanted(dp);
        self.flow(oil, opening, dp)
    }
}
