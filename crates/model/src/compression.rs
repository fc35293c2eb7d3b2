//! Integrals of the oil's compressibility over pressure, tabled once per oil (M12).

use crate::oil::{ATMOSPHERE, Oil};
use crate::real::Real;

/// Absolute pressure from which the table holds, Pa. Below it the stiffness fades towards vacuum
/// and is integrated afresh each time; a sound circuit is hardly ever there.
const TABLE_START: f64 = 1000.0;

/// Absolute pressure at which the table ends, Pa: 10 000 bar, beyond any run that makes sense;
/// further up the compressibility is taken as constant.
const TABLE_END: f64 = 1e9;

/// Intervals of the table, even in the logarithm of absolute pressure. Cubic Hermite pieces this
/// wide are off by some 1e-10 of the integral.
const INTERVALS: usize = 1024;

/// Panels for the integral below the table.
const VACUUM_PANELS: usize = 400;

/// `G(p) = int_0^p dp/B` and `W(p) = int_0^p p dp/B` of one oil, p gauge.
#[derive(Debug, Clone)]
pub(crate) struct Compression {
    oil: Oil,
    step: f64,
    /// Values and slopes with respect to ln(absolute pressure): G, dG, W, dW.
    table: Vec<[f64; 4]>,
}

/// Nodes and weights of three-point Gauss-Legendre on -1..1.
const GAUSS: [(f64, f64); 3] = [
    (-0.774_596_669_241_483_4, 5.0 / 9.0),
    (0.0, 8.0 / 9.0),
    (0.774_596_669_241_483_4, 5.0 / 9.0),
];

impl Compression {
    pub(crate) fn new(oil: &Oil) -> Self {
        let step = (TABLE_END / TABLE_START).ln() / INTERVALS as f64;
        let mut compression = Self {
            oil: *oil,
            step,
            table: Vec::with_capacity(INTERVALS + 1),
        };
        let (mut g, mut w) = (0.0, 0.0);
        let start = TABLE_START.ln();
        for i in 0..=INTERVALS {
            let u = start + step * i as f64;
            let [dg, dw] = compression.slopes(u);
            compression.table.push([g, dg, w, dw]);
            for (node, weight) in GAUSS {
                let at = compression.slopes(u + 0.5 * step * (1.0 + node));
                g += 0.5 * step * weight * at[0];
                w += 0.5 * step * weight * at[1];
            }
        }
        // Refer both integrals to 0 gauge.
        let [g0, w0] = compression.tabled(ATMOSPHERE.ln());
        for row in &mut compression.table {
            row[0] -= g0;
            row[2] -= w0;
        }
        compression
    }

    /// Slopes of G and W with respect to the logarithm of absolute pressure.
    fn slopes(&self, u: f64) -> [f64; 2] {
        let absolute = u.exp();
        let gauge = absolute - ATMOSPHERE;
        let dg = self.oil.compressibility(gauge) * absolute;
        [dg, dg * gauge]
    }

    fn tabled(&self, u: f64) -> [f64; 2] {
        let position = ((u - TABLE_START.ln()) / self.step).max(0.0);
        let i = (position as usize).min(INTERVALS - 1);
        let t = position - i as f64;
        let (a, b) = (self.table[i], self.table[i + 1]);
        let h = self.step;
        let cubic = |y0: f64, m0: f64, y1: f64, m1: f64| {
            let (m0, m1) = (m0 * h, m1 * h);
            let c2 = 3.0 * (y1 - y0) - 2.0 * m0 - m1;
            let c3 = 2.0 * (y0 - y1) + m0 + m1;
            ((c3 * t + c2) * t + m0) * t + y0
        };
        [cubic(a[0], a[1], b[0], b[1]), cubic(a[2], a[3], b[2], b[3])]
    }

    /// Both integrals at a gauge pressure in Pa: G without unit, W in J/m3.
    fn both(&self, gauge: f64) -> [f64; 2] {
        let absolute = gauge + ATMOSPHERE;
        if absolute > TABLE_END {
            let last = self.table[INTERVALS];
            let c = self.oil.compressibility(TABLE_END - ATMOSPHERE);
            let (p0, p1) = (TABLE_END - ATMOSPHERE, gauge);
            return [
                last[0] + c * (p1 - p0),
                last[2] + 0.5 * c * (p1 * p1 - p0 * p0),
            ];
        }
        if absolute >= TABLE_START {
            return self.tabled(absolute.ln());
        }
        // Towards vacuum: panels even in pressure, from the start of the table down.
        let first = self.table[0];
        let (mut g, mut w) = (first[0], first[2]);
        let h = (absolute - TABLE_START) / VACUUM_PANELS as f64;
        for panel in 0..VACUUM_PANELS {
            for (node, weight) in GAUSS {
                let p = TABLE_START - ATMOSPHERE + h * (panel as f64 + 0.5 * (1.0 + node));
                let c = self.oil.compressibility(p) * 0.5 * h * weight;
                g += c;
                w += c * p;
            }
        }
        [g, w]
    }

    /// Relative volume packed in by compression, `G(p)`; p in Pa gauge.
    pub(crate) fn volume<S: Real>(&self, pressure: S) -> S {
        let p = pressure.value();
        pressure.chain(self.both(p)[0], self.oil.compressibility(p))
    }

    /// Energy of compression per volume, `W(p)`, J/m3; p in Pa gauge.
    pub(crate) fn energy<S: Real>(&self, pressure: S) -> S {
        let p = pressure.value();
        pressure.chain(self.both(p)[1], p * self.oil.compressibility(p))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Without the fade near vacuum, `G = -ln(D(p) / D(0))` in closed form, D the relative volume.
    #[test]
    fn packed_volume_follows_its_closed_form() {
        for air in [1e-5, 0.005, 0.05] {
            let oil = Oil {
                density: 850.0,
                kinematic_viscosity: 30e-6,
                air,
                polytropic_exponent: 1.2,
                liquid_bulk_modulus: 1.5e9,
            };
            let compression = Compression::new(&oil);
            for bar in [-0.9, -0.3, 0.0, 0.5, 7.0, 150.0, 400.0] {
                let p = bar * 1e5;
                let exact = -(oil.relative_volume(p) / oil.relative_volume(0.0)).ln();
                let got = compression.volume(p);
                assert!(
                    (got - exact).abs() < 1e-9 * exact.abs().max(1e-3),
                    "air {air}, {bar} bar: {got} against {exact}"
                );
            }
        }
    }
}
