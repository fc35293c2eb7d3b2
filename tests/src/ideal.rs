//! Oils that leave one effect standing alone, so that a closed form applies.

use helmsplit_model::{Chamber, LEAST_AIR, Oil};

/// So thin that every orifice is turbulent to all digits, m2/s.
const INVISCID: f64 = 1e-16;

/// So stiff that a wall alone sets the compliance of a chamber, Pa.
const INCOMPRESSIBLE: f64 = 1e22;

/// An oil without viscosity; density in kg/m3. Stiffness as in the orchard carrier.
#[must_use]
pub fn thin_oil(density: f64) -> Oil {
    viscous_oil(density, INVISCID)
}

/// An oil of given density (kg/m3) and kinematic viscosity (m2/s) with hardly any air.
#[must_use]
pub fn viscous_oil(density: f64, kinematic_viscosity: f64) -> Oil {
    Oil {
        density,
        kinematic_viscosity,
        air: LEAST_AIR,
        polytropic_exponent: 1.2,
        liquid_bulk_modulus: 1.5e9,
    }
}

/// The same oil, stiff: what gives way is the wall of a chamber, by the same amount at every
/// pressure, as linear closed forms assume.
#[must_use]
pub fn stiff(oil: Oil) -> Oil {
    Oil {
        air: 0.0,
        liquid_bulk_modulus: INCOMPRESSIBLE,
        ..oil
    }
}

/// A chamber for a [`stiff`] oil: `volume` in m3, `bulk_modulus` in Pa at every pressure.
#[must_use]
pub fn linear_chamber(volume: f64, bulk_modulus: f64) -> Chamber {
    Chamber::with_wall(volume, bulk_modulus)
}
