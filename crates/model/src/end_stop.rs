//! End stops by Hunt and Crossley (M5.10).

use crate::real::Real;

/// A stop that pushes back with `k s (1 + a s')` over penetration `s` and never pulls.
///
/// # Source
/// Hunt & Crossley, *Coefficient of Restitution Interpreted as Damping in Vibroimpact*,
/// J. Applied Mechanics 42(2), 1975, with exponent 1.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct EndStop {
    /// Stiffness, N/m.
    pub stiffness: f64,
    /// Loss factor a, s/m.
    pub loss: f64,
}

impl EndStop {
    /// Force against the penetration in N (at least 0), from penetration in m (positive inside)
    /// and its rate in m/s.
    #[inline(always)]
    pub fn force<S: Real>(&self, penetration: S, rate: S) -> S {
        if penetration.value() <= 0.0 {
            return S::constant_here(0.0, [penetration, rate]);
        }
        penetration.bivariate(rate, |s, rate| {
            (s * self.stiffness * (rate * self.loss + 1.0)).max_with(0.0)
        })
    }

    /// Energy held by the stop's spring, J.
    #[inline(always)]
    pub fn stored<S: Real>(&self, penetration: S) -> S {
        let s = penetration.max_with(0.0);
        s * s * (0.5 * self.stiffness)
    }

    /// Power lost in the stop, W: what it takes beyond its spring.
    #[inline(always)]
    pub fn loss<S: Real>(&self, penetration: S, rate: S) -> S {
        let s = penetration.max_with(0.0);
        (self.force(penetration, rate) - s * self.stiffness) * rate
    }
}

/// A pair of stops around a travel: force in the direction of positive travel, N.
#[inline(always)]
pub fn pair_force<S: Real>(stop: &EndStop, below: S, above: S, velocity: S) -> S {
    stop.force(below, -velocity) - stop.force(above, velocity)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Rebound of a free mass: `a (v + e v) = ln[(1 + a v) / (1 - a e v)]` (Hunt & Crossley 1975;
    /// e = 0.748435 at a v = 0.5).
    #[test]
    fn rebound_follows_the_closed_form() {
        for (av, expected) in [(0.5, 0.748_435), (0.1, 0.937_476), (0.05, 0.967_739)] {
            let stop = EndStop {
                stiffness: 1e6,
                loss: 1.0,
            };
            let (mut s, mut v) = (0.0, av);
            let dt = 1e-6;
            let acceleration = |s: f64, v: f64| -stop.force(s, v) / 0.1;
            loop {
                let (k1s, k1v) = (v, acceleration(s, v));
                let (k2s, k2v) = (
                    v + 0.5 * dt * k1v,
                    acceleration(s + 0.5 * dt * k1s, v + 0.5 * dt * k1v),
                );
                let (k3s, k3v) = (
                    v + 0.5 * dt * k2v,
                    acceleration(s + 0.5 * dt * k2s, v + 0.5 * dt * k2v),
                );
                let (k4s, k4v) = (v + dt * k3v, acceleration(s + dt * k3s, v + dt * k3v));
                s += dt / 6.0 * (k1s + 2.0 * k2s + 2.0 * k3s + k4s);
                v += dt / 6.0 * (k1v + 2.0 * k2v + 2.0 * k3v + k4v);
                if s <= 0.0 && v < 0.0 {
                    break;
                }
            }
            assert!((-v / av - expected).abs() < 1e-5, "a v {av}: {}", -v / av);
        }
    }
}
