//! Double-acting cylinders: chambers, piston, end stops (M7.6, M7.7, M8.4).

use crate::end_stop::{EndStop, pair_force};
use crate::node::Chamber;
use crate::oil::Oil;
use crate::real::Real;

/// A double-acting cylinder with the mass that moves along; travel `y` from mid-stroke, m.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Cylinder {
    /// Piston area of chamber A, which extends, m2.
    pub area_a: f64,
    /// Piston area of chamber B, m2.
    pub area_b: f64,
    /// Dead volume of chamber A with its hose, m3.
    pub dead_a: f64,
    /// Dead volume of chamber B with its hose, m3.
    pub dead_b: f64,
    /// Compressibility of the walls, 1/Pa.
    pub wall_compressibility: f64,
    /// Stroke, m.
    pub stroke: f64,
    /// Moving mass, referred to the piston, kg.
    pub mass: f64,
    /// Viscous damping of the load, N s/m.
    pub damping: f64,
    /// End stops.
    pub stop: EndStop,
    /// Leakage across the piston, m3/(s Pa).
    pub piston_leak: f64,
}

impl Cylinder {
    /// Chamber A with the piston at one end, growing by `area_a (stroke/2 + y)`.
    #[inline(always)]
    #[must_use]
    pub fn chamber_a(&self) -> Chamber {
        Chamber {
            volume: self.dead_a + 0.5 * self.area_a * self.stroke,
            wall_compressibility: self.wall_compressibility,
        }
    }

    /// Chamber B at mid-stroke, shrinking by `area_b y`.
    #[inline(always)]
    #[must_use]
    pub fn chamber_b(&self) -> Chamber {
        Chamber {
            volume: self.dead_b + 0.5 * self.area_b * self.stroke,
            wall_compressibility: self.wall_compressibility,
        }
    }

    /// Rates of the pressures in chambers A and B (Pa/s) and the leakage across the piston from A
    /// to B (m3/s) (M7.6), from the pressures (Pa), what flows into each chamber (m3/s), travel
    /// (m) and velocity (m/s).
    #[inline(always)]
    pub fn pressure_rates<S: Real>(
        &self,
        oil: &Oil,
        pressures: (S, S),
        inflows: (S, S),
        travel: S,
        velocity: S,
    ) -> (S, S, S) {
        let (p_a, p_b) = pressures;
        let leak = (p_a - p_b) * self.piston_leak;
        let rate_a = self.chamber_a().pressure_rate_moving(
            oil,
            p_a,
            inflows.0 - leak - velocity * self.area_a,
            travel * self.area_a,
        );
        let rate_b = self.chamber_b().pressure_rate_moving(
            oil,
            p_b,
            inflows.1 + leak + velocity * self.area_b,
            travel * -self.area_b,
        );
        (rate_a, rate_b, leak)
    }

    /// Force of the oil towards positive travel, N.
    #[inline(always)]
    pub fn oil_force<S: Real>(&self, p_a: S, p_b: S) -> S {
        p_a * self.area_a - p_b * self.area_b
    }

    /// Penetration into the lower and the upper stop, m, positive inside.
    #[inline(always)]
    pub fn penetrations<S: Real>(&self, travel: S) -> (S, S) {
        let half = 0.5 * self.stroke;
        (-travel - half, travel - half)
    }

    /// Force of the stops in the direction of positive travel, N.
    #[inline(always)]
    pub fn stop_force<S: Real>(&self, travel: S, velocity: S) -> S {
        let (below, above) = self.penetrations(travel);
        pair_force(&self.stop, below, above, velocity)
    }

    /// Power lost in the stops, W.
    #[inline(always)]
    pub fn stop_loss<S: Real>(&self, travel: S, velocity: S) -> S {
        let (below, above) = self.penetrations(travel);
        self.stop.loss(below, -velocity) + self.stop.loss(above, velocity)
    }
}
