//! Dry friction of the spool and of the tyre's scrub: smooth, or with bristles that stick (M5.9b).

use crate::real::Real;

/// Velocity below which the bristle law sees no sliding, m/s: rounds the kink of `|v|` at 0.
const BRISTLE_VELOCITY: f64 = 1e-6;

/// A law of dry friction.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Friction {
    /// `F tanh(v / v_s)`: cheap, creeps under a steady load (M5.9).
    Smooth {
        /// Coulomb force, N.
        coulomb: f64,
        /// Velocity at which the force has grown to 76 % of the Coulomb force, m/s, positive.
        velocity: f64,
    },
    /// Bristles with one state: really sticks (M5.9b).
    Bristle(Bristle),
}

/// The bristle law of Canudas de Wit et al.; with `damping` and `viscous` 0 and `breakaway` equal
/// to `coulomb` it is Dahl's.
///
/// # Source
/// Canudas de Wit, Olsson, Astrom & Lischinsky, *A New Model for Control of Systems with
/// Friction*, IEEE Trans. Automatic Control 40(3), 1995; Dahl, *A Solid Friction Model*, 1968.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Bristle {
    /// Coulomb force, N, positive.
    pub coulomb: f64,
    /// Breakaway force, N, at least `coulomb`.
    pub breakaway: f64,
    /// Stribeck velocity, m/s, positive.
    pub stribeck_velocity: f64,
    /// Bristle stiffness `sigma_0`, N/m, positive.
    pub stiffness: f64,
    /// Bristle damping `sigma_1`, N s/m.
    pub damping: f64,
    /// Viscous coefficient `sigma_2`, N s/m.
    pub viscous: f64,
}

impl Bristle {
    /// Force in N against the motion and rate of the bristle deflection in m/s, from velocity
    /// (m/s) and deflection (m).
    #[inline(always)]
    pub fn force<S: Real>(&self, velocity: S, deflection: S) -> (S, S) {
        let rate = velocity.bivariate(deflection, |v, z| self.rate(v, z));
        let force = deflection * self.stiffness + rate * self.damping + velocity * self.viscous;
        (force, rate)
    }

    #[inline(always)]
    fn rate<S: Real>(&self, velocity: S, deflection: S) -> S {
        let w = BRISTLE_VELOCITY;
        let speed = (velocity * velocity + w * w).sqrt() - w;
        let relative = velocity * (1.0 / self.stribeck_velocity);
        let bound = (-(relative * relative)).exp() * (self.breakaway - self.coulomb) + self.coulomb;
        velocity - speed * deflection * self.stiffness / bound
    }
}

impl Friction {
    /// Whether the law has a state of its own.
    #[must_use]
    pub fn has_state(&self) -> bool {
        matches!(self, Self::Bristle(_))
    }

    /// The same law without any dry friction: what linear analysis uses (M11).
    #[must_use]
    pub fn removed() -> Self {
        Self::Smooth {
            coulomb: 0.0,
            velocity: 1.0,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Closed form over a first displacement `s` (M5.9b): `F = F_c (1 - exp(-sigma_0 s / F_c))`,
    /// Dahl 1968.
    #[test]
    fn first_displacement_follows_dahl() {
        let law = Bristle {
            coulomb: 40.0,
            breakaway: 40.0,
            stribeck_velocity: 1e-3,
            stiffness: 8e6,
            damping: 0.0,
            viscous: 0.0,
        };
        // Slow enough to be quasi-static, fast enough that the rounding of |v| does not show.
        let v = 0.01;
        let (mut z, dt) = (0.0, 1e-8);
        let mut s = 0.0;
        for step in 1..=200_000 {
            let (_, k1) = law.force(v, z);
            let (_, k2) = law.force(v, z + 0.5 * dt * k1);
            z += dt * k2;
            s += v * dt;
            if step % 50_000 == 0 {
                let expected = law.coulomb * (1.0 - (-law.stiffness * s / law.coulomb).exp());
                let (force, _) = law.force(v, z);
                assert!(
                    (force / expected - 1.0).abs() < 2e-4,
                    "after {s} m: {force} against {expected}"
                );
            }
        }
    }
}
