//! Oil: viscosity, density, stiffness with entrained air (M1).

use crate::real::Real;
use crate::smooth::smooth_step;

/// Standard atmosphere, Pa: gauge plus this is absolute.
pub const ATMOSPHERE: f64 = 101_325.0;

/// 0 degC in K.
pub const ICE_POINT: f64 = 273.15;

/// Air never falls below this fraction, so that the stiffness stays finite near vacuum (M1.4).
pub const LEAST_AIR: f64 = 1e-5;

/// Absolute pressure floor inside the air fraction, Pa (M1.4): a Newton trial below vacuum must
/// not give a negative base of a power.
const AIR_FLOOR: f64 = 200.0;

/// Absolute pressure over which the stiffness fades to nothing, Pa (M1.4): the pressure stops at
/// vacuum instead of running negative.
const VACUUM_BAND: f64 = 1000.0;

/// Least volume of the oil relative to 0 gauge inside the stiffness. The linear law of the liquid
/// would reach zero at a pressure of one bulk modulus; a circuit without relief, or a wild trial of
/// the solver, must find stiff oil there and not the far side of a pole.
const LEAST_VOLUME: f64 = 0.2;

/// What stays of the stiffness at vacuum, relative (M1.4).
const VACUUM_REST: f64 = 1e-6;

/// Relative change of density per K, referred to 15 degC (M1.2). API MPMS 11.1 gives 7.2e-4 for a
/// lubricating oil of 870 kg/m3.
const EXPANSION: f64 = 7e-4;

/// Kinematic viscosity over temperature by the Walther line of ASTM D341 (M1.1).
///
/// # Source
/// ASTM D341, `log10 log10(nu + 0.7) = A - B log10 T`, nu in mm2/s, T in K; good above 2 mm2/s.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct WaltherLine {
    a: f64,
    b: f64,
}

impl WaltherLine {
    /// Through two points (viscosity in m2/s, temperature in K), different temperatures.
    #[must_use]
    pub fn through(first: (f64, f64), second: (f64, f64)) -> Self {
        let loglog = |nu: f64| (nu * 1e6 + 0.7).log10().log10();
        let (y1, y2) = (loglog(first.0), loglog(second.0));
        let (x1, x2) = (first.1.log10(), second.1.log10());
        let b = (y1 - y2) / (x2 - x1);
        Self { a: y1 + b * x1, b }
    }

    /// The constants A and B of the line.
    #[must_use]
    pub fn constants(&self) -> (f64, f64) {
        (self.a, self.b)
    }

    /// Kinematic viscosity at a temperature in K; m2/s.
    #[must_use]
    pub fn viscosity(&self, temperature: f64) -> f64 {
        let loglog = self.a - self.b * temperature.log10();
        (10f64.powf(10f64.powf(loglog)) - 0.7) * 1e-6
    }
}

/// Density at a temperature from the density at 15 degC (M1.2); kg/m3, K.
#[must_use]
pub fn density_at(density_15: f64, temperature: f64) -> f64 {
    density_15 * (1.0 - EXPANSION * (temperature - ICE_POINT - 15.0))
}

/// The oil of a circuit at its one temperature.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Oil {
    /// Density, kg/m3.
    pub density: f64,
    /// Kinematic viscosity, m2/s.
    pub kinematic_viscosity: f64,
    /// Volume of entrained air at 0 gauge relative to the liquid, at least [`LEAST_AIR`].
    pub air: f64,
    /// Polytropic exponent of the air, 1 to 1.4.
    pub polytropic_exponent: f64,
    /// Bulk modulus of the liquid, Pa.
    pub liquid_bulk_modulus: f64,
}

impl Oil {
    /// Dynamic viscosity `mu = rho nu` (M1.3), Pa s.
    #[inline(always)]
    #[must_use]
    pub fn dynamic_viscosity(&self) -> f64 {
        self.density * self.kinematic_viscosity
    }

    /// Volume of the air relative to its volume at 0 gauge, `r` of M1.4; `pressure` in Pa gauge.
    #[inline(always)]
    fn air_ratio<S: Real>(&self, pressure: S) -> (S, S) {
        let absolute = (pressure + ATMOSPHERE).max_with(AIR_FLOOR);
        let inverse = S::constant(ATMOSPHERE) / absolute;
        // One exponential and one logarithm: cheaper than a general power for a dual number.
        let ratio = (inverse.ln() * (1.0 / self.polytropic_exponent)).exp();
        (ratio, absolute)
    }

    /// Compressibility `1/B_e` of the aerated oil without walls (M1.4), 1/Pa.
    ///
    /// # Source
    /// Rabie, *Fluid Power Engineering*, 2009, eq. 2.50-2.57, with the local air fraction.
    #[inline(always)]
    pub fn compressibility<S: Real>(&self, pressure: S) -> S {
        pressure.univariate(|p| self.compressibility_at(p))
    }

    #[inline(always)]
    pub(crate) fn compressibility_at<S: Real>(&self, pressure: S) -> S {
        let (ratio, absolute) = self.air_ratio(pressure);
        let air = ratio * self.air;
        let volume =
            (pressure * (-1.0 / self.liquid_bulk_modulus) + 1.0 + air).max_with(LEAST_VOLUME);
        let slope =
            air / absolute * (1.0 / self.polytropic_exponent) + 1.0 / self.liquid_bulk_modulus;
        let p_abs = pressure + ATMOSPHERE;
        if p_abs.value() >= VACUUM_BAND {
            slope / volume
        } else {
            let stiff =
                smooth_step(p_abs * (1.0 / VACUUM_BAND)) * (1.0 - VACUUM_REST) + VACUUM_REST;
            slope / (volume * stiff)
        }
    }

    /// Bulk modulus `B_e` of the aerated oil without walls (M1.4), Pa; tangent value.
    #[inline(always)]
    pub fn bulk_modulus<S: Real>(&self, pressure: S) -> S {
        S::constant(1.0) / self.compressibility(pressure)
    }

    /// Volume of the aerated oil relative to its volume at 0 gauge, `S(p)` of M1.7.
    #[inline(always)]
    pub fn relative_volume<S: Real>(&self, pressure: S) -> S {
        pressure.univariate(|p| {
            let (ratio, _) = self.air_ratio(p);
            (p * (-1.0 / self.liquid_bulk_modulus) + 1.0 + ratio * self.air)
                * (1.0 / (1.0 + self.air))
        })
    }
}
