//! Orifices, from creeping to turbulent flow in one formula (M2).

use crate::dual::Dual;
use crate::oil::Oil;
use crate::real::Real;
use crate::smooth::smooth_step;

/// Added to a damping hole's diameter inside the hydraulic diameter, m (M2.2): a plugged hole
/// stays finite.
const HOLE_DIAMETER_FLOOR: f64 = 1e-6;

/// Hydraulic diameter floor of variable openings, m (M2.2).
const OPENING_FLOOR: f64 = 10e-6;

/// Smallest transition Reynolds number that the formula can take.
pub const LEAST_TRANSITION: f64 = 1e-3;

/// Mean velocity scale `V` of M2.1 in m/s: the flow is area times this.
///
/// `transition` is `Re_t nu / (2 D_h)` in m/s, `dp` in Pa, `discharge` the turbulent discharge
/// coefficient. Odd in `dp`, monotone, finite slope at 0.
///
/// # Source
/// Borutzky, Barnard & Thoma, *An orifice flow model for laminar and turbulent conditions*,
/// Simulation Modelling Practice and Theory 10, 2002; solved for the flow, M2.1.
#[inline(always)]
pub fn velocity<S: Real>(dp: S, transition: S, discharge: f64, density: f64) -> S {
    let head = dp * (2.0 * discharge * discharge / density);
    let root = (transition * transition + head.abs()).sqrt();
    head / (root + transition)
}

/// Same, with a transition that does not vary.
#[inline(always)]
pub(crate) fn velocity_fixed<S: Real>(dp: S, transition: f64, discharge: f64, density: f64) -> S {
    let head = dp * (2.0 * discharge * discharge / density);
    let root = (head.abs() + transition * transition).sqrt();
    head / (root + transition)
}

/// Discharge coefficient at a Reynolds number, `Cd sqrt(Re / (Re + Re_t))` (M2.1).
#[must_use]
pub fn effective_discharge(discharge: f64, reynolds: f64, transition_reynolds: f64) -> f64 {
    discharge * (reynolds / (reynolds + transition_reynolds)).sqrt()
}

/// An orifice of fixed size.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Orifice {
    /// Flow area, m2.
    pub area: f64,
    /// Hydraulic diameter, m, positive.
    pub hydraulic_diameter: f64,
    /// Turbulent discharge coefficient.
    pub discharge: f64,
    /// Reynolds number at which laminar and turbulent asymptotes meet.
    pub transition_reynolds: f64,
}

impl Orifice {
    /// A round sharp-edged orifice; `diameter` in m, positive.
    #[must_use]
    pub fn round(diameter: f64, discharge: f64, transition_reynolds: f64) -> Self {
        Self {
            area: std::f64::consts::FRAC_PI_4 * diameter * diameter,
            hydraulic_diameter: diameter,
            discharge,
            transition_reynolds,
        }
    }

    /// A drilled damping hole, a short tube (M2.4): `Re_t' = Re_t + 64 Cd^2 L / d`. A diameter of
    /// 0 is a plugged hole.
    #[must_use]
    pub fn damping_hole(
        diameter: f64,
        length: f64,
        discharge: f64,
        transition_reynolds: f64,
    ) -> Self {
        let friction = if diameter > 0.0 {
            64.0 * discharge * discharge * length / diameter
        } else {
            0.0
        };
        Self {
            area: std::f64::consts::FRAC_PI_4 * diameter * diameter,
            hydraulic_diameter: diameter + HOLE_DIAMETER_FLOOR,
            discharge,
            transition_reynolds: transition_reynolds + friction,
        }
    }

    /// Flow in m3/s for a pressure difference in Pa.
    #[inline(always)]
    pub fn flow<S: Real>(&self, oil: &Oil, dp: S) -> S {
        let transition =
            self.transition_reynolds * oil.kinematic_viscosity / (2.0 * self.hydraulic_diameter);
        dp.univariate(|dp| velocity_fixed(dp, transition, self.discharge, oil.density) * self.area)
    }
}

/// The edge of a variable opening: what does not change while it opens.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Edge {
    /// Turbulent discharge coefficient.
    pub discharge: f64,
    /// Reynolds number at which laminar and turbulent asymptotes meet.
    pub transition_reynolds: f64,
}

impl Edge {
    /// Velocity scale for a round opening of variable area (M2.2); m/s. `area` in m2, `dp` in Pa.
    #[inline(always)]
    pub fn velocity_round<S: Real>(&self, oil: &Oil, area: S, dp: S) -> S {
        area.bivariate(dp, |area, dp| self.round(oil, area, dp))
    }

    /// Velocity scale for a slit of variable gap (M2.2); m/s. `gap` in m, `dp` in Pa.
    #[inline(always)]
    pub fn velocity_slit<S: Real>(&self, oil: &Oil, gap: S, dp: S) -> S {
        gap.bivariate(dp, |gap, dp| {
            self.velocity(oil, gap * 2.0 + OPENING_FLOOR, dp)
        })
    }

    #[inline(always)]
    fn round<S: Real>(&self, oil: &Oil, area: S, dp: S) -> S {
        let diameter = (area * (4.0 / std::f64::consts::PI) + OPENING_FLOOR * OPENING_FLOOR).sqrt();
        self.velocity(oil, diameter, dp)
    }

    #[inline(always)]
    fn velocity<S: Real>(&self, oil: &Oil, hydraulic_diameter: S, dp: S) -> S {
        let transition = S::constant(0.5 * self.transition_reynolds * oil.kinematic_viscosity)
            / hydraulic_diameter;
        velocity(dp, transition, self.discharge, oil.density)
    }

    /// Flow through a round opening of variable area, m3/s.
    #[inline(always)]
    pub fn flow_round<S: Real>(&self, oil: &Oil, area: S, dp: S) -> S {
        area.bivariate(dp, |area, dp| self.round(oil, area, dp) * area)
    }

    /// Flow through a round opening whose area does not change with the states, m3/s.
    #[inline(always)]
    pub fn flow_given<S: Real>(&self, oil: &Oil, area: f64, dp: S) -> S {
        let diameter = (area * (4.0 / std::f64::consts::PI) + OPENING_FLOOR * OPENING_FLOOR).sqrt();
        let transition = 0.5 * self.transition_reynolds * oil.kinematic_viscosity / diameter;
        dp.univariate(|dp| velocity_fixed(dp, transition, self.discharge, oil.density) * area)
    }

    /// Flow through a check valve (M2.5): the area opens over `opening_pressure` (Pa) and is
    /// exactly zero backwards. `area` in m2.
    #[inline(always)]
    pub fn flow_checked<S: Real>(&self, oil: &Oil, area: S, opening_pressure: f64, dp: S) -> S {
        if dp.value() <= 0.0 {
            return S::constant_here(0.0, [area, dp]);
        }
        let (opening, drop) = (
            Dual::<2>::variable(area.value(), 0),
            Dual::<2>::variable(dp.value(), 1),
        );
        let open = opening * smooth_step(drop * (1.0 / opening_pressure));
        area.widen2(dp, self.round(oil, open, drop) * open)
    }
}
