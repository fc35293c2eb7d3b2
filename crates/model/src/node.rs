//! A volume of oil: how its pressure answers to flow (M1.5, M1.6).

use crate::dual::Dual;
use crate::oil::Oil;
use crate::real::Real;

/// A volume with walls that may give.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Chamber {
    /// Volume at rest, m3.
    pub volume: f64,
    /// Compressibility of the walls, 1/Pa; 0 for a rigid body.
    pub wall_compressibility: f64,
}

impl Chamber {
    /// A chamber in a rigid body; `volume` in m3.
    #[must_use]
    pub fn rigid(volume: f64) -> Self {
        Self {
            volume,
            wall_compressibility: 0.0,
        }
    }

    /// A chamber whose wall has the bulk modulus `wall` in Pa.
    #[must_use]
    pub fn with_wall(volume: f64, wall: f64) -> Self {
        Self {
            volume,
            wall_compressibility: 1.0 / wall,
        }
    }

    /// Rate of pressure in Pa/s from the net inflow in m3/s (M1.6).
    #[inline(always)]
    pub fn pressure_rate<S: Real>(&self, oil: &Oil, pressure: S, net_inflow: S) -> S {
        let p = Dual::<1>::variable(pressure.value(), 0);
        let compressibility = oil.compressibility_at(p) + self.wall_compressibility;
        let stiffness = Dual::constant(1.0) / (compressibility * self.volume);
        let stiffness = pressure.widen(stiffness);
        net_inflow * stiffness
    }

    /// Same for a chamber that grows: `extra` (m3) adds to the volume at rest, and the net inflow
    /// already counts what the moving wall makes room for.
    #[inline(always)]
    pub fn pressure_rate_moving<S: Real>(
        &self,
        oil: &Oil,
        pressure: S,
        net_inflow: S,
        extra: S,
    ) -> S {
        let (p, size) = (
            Dual::<2>::variable(pressure.value(), 0),
            Dual::<2>::variable(extra.value(), 1),
        );
        let compressibility = oil.compressibility_at(p) + self.wall_compressibility;
        let stiffness = Dual::constant(1.0) / (compressibility * (size + self.volume));
        let stiffness = pressure.widen2(extra, stiffness);
        net_inflow * stiffness
    }
}
