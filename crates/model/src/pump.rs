//! Fixed-displacement pump: slip, wear, torque, ripple, filling (M4).

use std::f64::consts::{PI, TAU};

use crate::oil::Oil;
use crate::real::Real;
use crate::smooth::smooth_step;

/// A fixed-displacement pump.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Pump {
    /// Displacement per radian, m3/rad.
    pub displacement_rad: f64,
    /// Wilson's slip coefficient times wear, dimensionless (M4.2).
    pub slip: f64,
    /// Hydromechanical efficiency.
    pub hydromechanical_efficiency: f64,
    /// Share of the delivery lost to aeration: 1 counts the oil's compression (M4.1), 0 does not.
    pub aeration_loss: f64,
    /// Ripple of the delivery.
    pub ripple: Ripple,
}

/// Flows of the pump at one moment, m3/s.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PumpFlows<S> {
    /// Delivered into the outlet.
    pub delivered: S,
    /// Drawn from the inlet, at inlet pressure.
    pub drawn: S,
    /// Slip from outlet to inlet.
    pub slip: S,
}

impl Pump {
    /// Wilson's slip coefficient from one point of a data sheet (M4.2), dimensionless:
    /// volumetric efficiency, dynamic viscosity (Pa s), speed (rad/s), pressure (Pa).
    ///
    /// # Source
    /// Wilson, *Positive-Displacement Pumps and Fluid Motors*, 1950.
    #[must_use]
    pub fn wilson_slip(efficiency: f64, viscosity: f64, speed: f64, pressure: f64) -> f64 {
        (1.0 - efficiency) * viscosity * speed / pressure
    }

    /// Flows at a shaft speed (rad/s), outlet and inlet pressure (Pa gauge), ripple factor and
    /// fill (M4.1).
    #[inline(always)]
    pub fn flows<S: Real>(
        &self,
        oil: &Oil,
        speed: S,
        outlet: S,
        inlet: S,
        ripple: S,
        fill: S,
    ) -> PumpFlows<S> {
        let swept = speed * ripple * fill * self.displacement_rad;
        let slip = (outlet - inlet) * (self.slip * self.displacement_rad / oil.dynamic_viscosity());
        let volume = |pressure: S| (oil.relative_volume(pressure) - 1.0) * self.aeration_loss + 1.0;
        PumpFlows {
            delivered: swept * volume(outlet) - slip,
            drawn: swept * volume(inlet) - slip,
            slip,
        }
    }

    /// Shaft torque (M4.3), N m, from outlet and inlet pressure in Pa.
    #[inline(always)]
    pub fn torque<S: Real>(&self, outlet: S, inlet: S) -> S {
        (outlet - inlet) * (self.displacement_rad / self.hydromechanical_efficiency)
    }
}

/// Ripple of the delivery over the shaft angle (M4.4).
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Ripple {
    /// None: the mean flow.
    None,
    /// Parabolic arcs of an external gear pump, one a tooth.
    Gear {
        /// Number of teeth of each gear.
        teeth: f64,
        /// Peak to peak relative to the mean.
        peak_to_peak: f64,
    },
    /// Half-sine strokes of pistons.
    Piston {
        /// Number of pistons, at least 3.
        pistons: u32,
        /// Factor on the kinematic ripple; 1 is kinematics alone.
        factor: f64,
    },
}

impl Ripple {
    /// Peak to peak of a gear pump with `teeth` and pressure angle (rad), equal gears, standard
    /// addendum, relieved mesh: `(pi^2 cos^2 a / 4) / ((z + 1) - pi^2 cos^2 a / 12)`.
    ///
    /// # Source
    /// General treatment: Manring & Kasaragadda, *The Theoretical Flow Ripple of an External Gear
    /// Pump*, J. Dyn. Sys. Meas. Control 125(3), 2003; the special case worked out.
    #[must_use]
    pub fn gear_peak_to_peak(teeth: f64, pressure_angle: f64) -> f64 {
        let c = (PI * pressure_angle.cos()).powi(2);
        (c / 4.0) / ((teeth + 1.0) - c / 12.0)
    }

    /// Whether the shaft angle matters.
    #[must_use]
    pub fn needs_angle(&self) -> bool {
        !matches!(self, Self::None)
    }

    /// Strokes of delivery in one revolution: the frequency is this times the speed.
    #[must_use]
    pub fn per_revolution(&self) -> f64 {
        match *self {
            Self::None => 0.0,
            Self::Gear { teeth, .. } => teeth,
            Self::Piston { pistons, .. } if pistons % 2 == 1 => 2.0 * f64::from(pistons),
            Self::Piston { pistons, .. } => f64::from(pistons),
        }
    }

    /// Factor on the mean delivery at a shaft angle in rad; its mean over a turn is 1.
    #[inline(always)]
    pub fn factor<S: Real>(&self, angle: S) -> S {
        angle.univariate(|angle| self.factor_at(angle))
    }

    #[inline(always)]
    fn factor_at<S: Real>(&self, angle: S) -> S {
        match *self {
            Self::None => S::constant(1.0),
            Self::Gear {
                teeth,
                peak_to_peak,
            } => {
                let u = centred(angle * (teeth / TAU));
                // Parabola of height 1/4 over one pitch, shifted to mean zero.
                (-(u * u) + 1.0 / 12.0) * (4.0 * peak_to_peak) + 1.0
            }
            Self::Piston { pistons, factor } => {
                let n = f64::from(pistons);
                let strokes = self.per_revolution();
                let half = PI / strokes;
                let u = centred(angle * (strokes / TAU)) * (2.0 * half);
                // Sum of the half sines over their mean N/pi, within one stroke.
                let kinematic = u.cos() * (half / half.sin());
                debug_assert!(n >= 3.0, "fewer pistons do not deliver all the time");
                (kinematic - 1.0) * factor + 1.0
            }
        }
    }
}

/// The number minus its nearest integer, in -0.5..0.5.
#[inline(always)]
fn centred<S: Real>(u: S) -> S {
    u - u.value().round()
}

/// What stands between tank and pump (M4.5).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Filling {
    /// Absolute pressure at which the pump gets nothing, Pa.
    pub empty: f64,
    /// Absolute pressure from which on it fills, Pa, above `empty`.
    pub full: f64,
}

impl Filling {
    /// Filled share of the displacement at an inlet pressure in Pa gauge.
    #[inline(always)]
    pub fn share<S: Real>(&self, inlet: S) -> S {
        let absolute = inlet + crate::oil::ATMOSPHERE;
        smooth_step((absolute - self.empty) * (1.0 / (self.full - self.empty)))
    }
}

/// A governed prime mover (M4.6); its speed is a state.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct GovernedEngine {
    /// Inertia with all that turns along, kg m2.
    pub inertia: f64,
    /// Torque at full load, N m.
    pub full_torque: f64,
    /// Droop: speed lost from no load to full load, relative to the set speed.
    pub droop: f64,
    /// Torque of other consumers, N m.
    pub other_torque: f64,
}

impl GovernedEngine {
    /// Torque at a set speed and a speed in rad/s (M4.6), N m.
    #[inline(always)]
    pub fn torque<S: Real>(&self, set_speed: f64, speed: S) -> S {
        // At a set speed of zero the governor shuts off instead of dividing by nothing.
        let span = self.droop * set_speed.max(LEAST_SET_SPEED);
        let demand = (-speed + set_speed) * (1.0 / span);
        demand.max_with(0.0).min_with(1.0) * self.full_torque
    }

    /// Acceleration in rad/s2 under a pump torque in N m.
    #[inline(always)]
    pub fn acceleration<S: Real>(&self, set_speed: f64, speed: S, pump_torque: S) -> S {
        // Other consumers brake a turning shaft only.
        let other = smooth_step(speed * (1.0 / ENGINE_CREEP)) * self.other_torque;
        (self.torque(set_speed, speed) - pump_torque - other) * (1.0 / self.inertia)
    }
}

/// Set speed below which the droop is no longer a share of it, rad/s.
const LEAST_SET_SPEED: f64 = 1.0;

/// Speed below which other consumers let go of a stalling engine, rad/s (about 50 rpm): without
/// it a stalled engine would be driven backwards by a load that only exists while it turns.
const ENGINE_CREEP: f64 = 5.0;

#[cfg(test)]
mod tests {
    use super::*;

    fn swing(ripple: &Ripple) -> (f64, f64) {
        // Samples that fall on both the tops and the cusps of every stroke.
        let n = 2 * ripple.per_revolution() as u32 * 2000;
        let (mut low, mut high, mut sum) = (f64::MAX, f64::MIN, 0.0);
        for i in 0..n {
            let q = ripple.factor(TAU * f64::from(i) / f64::from(n));
            low = low.min(q);
            high = high.max(q);
            sum += q;
        }
        (high - low, sum / f64::from(n))
    }

    /// Kinematic ripple of piston pumps: odd `(pi/2N) tan(pi/4N)`, even `(pi/N) tan(pi/2N)`
    /// relative to the mean; Rabie, *Fluid Power Engineering*, 2009, table 4.9 gives the same
    /// relative to the maximum.
    #[test]
    fn piston_ripple_is_kinematic() {
        for n in 5..=11u32 {
            let nf = f64::from(n);
            let expected = if n % 2 == 1 {
                PI / (2.0 * nf) * (PI / (4.0 * nf)).tan()
            } else {
                PI / nf * (PI / (2.0 * nf)).tan()
            };
            let (p2p, mean) = swing(&Ripple::Piston {
                pistons: n,
                factor: 1.0,
            });
            assert!(
                (p2p / expected - 1.0).abs() < 1e-6,
                "N = {n}: {p2p} against {expected}"
            );
            assert!((mean - 1.0).abs() < 1e-7, "mean of N = {n}");
        }
    }

    #[test]
    fn gear_ripple_has_its_peak_to_peak_and_mean_one() {
        let p2p = Ripple::gear_peak_to_peak(12.0, 20f64.to_radians());
        let (seen, mean) = swing(&Ripple::Gear {
            teeth: 12.0,
            peak_to_peak: p2p,
        });
        assert!((seen / p2p - 1.0).abs() < 1e-6, "peak to peak");
        assert!((mean - 1.0).abs() < 1e-7, "mean");
    }
}
