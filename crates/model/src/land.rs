//! The excess land: how the opening grows with travel (M5.3).

use std::f64::consts::PI;

use crate::dual::Dual;
use crate::monotone_cubic::MonotoneCubic;
use crate::real::Real;
use crate::smooth::{ramp, ramp_slope};

/// Width over which the edge begins to open, m (M5.3).
const OPENING_WIDTH: f64 = 5e-6;

/// Width over which one stretch of the edge hands over to the next, m (M5.3).
const HANDOVER_WIDTH: f64 = 20e-6;

/// The shape of the metering edge.
#[derive(Debug, Clone, PartialEq)]
pub enum LandShape {
    /// A conical chamfer at the spool's edge, then the sharp full edge.
    Chamfer {
        /// Angle of the cone to the axis, rad.
        angle: f64,
        /// Axial length of the chamfer, m.
        length: f64,
    },
    /// The sharp edge around the whole spool.
    Sharp,
    /// Round holes in the sleeve, uncovered one by one depth.
    RoundHoles {
        /// Number of holes.
        count: f64,
        /// Diameter of each, m.
        diameter: f64,
    },
    /// V-shaped notches in the spool's edge, then the sharp full edge.
    Notches {
        /// Number of notches.
        count: f64,
        /// Full angle at the tip, rad.
        angle: f64,
        /// Axial length of each, m.
        length: f64,
    },
    /// Area over opening travel from a table.
    Table(MonotoneCubic),
}

/// The metering land between inlet and excess port.
#[derive(Debug, Clone, PartialEq)]
pub struct MeteringLand {
    /// Shape of the edge.
    pub shape: LandShape,
    /// Spool diameter, m.
    pub diameter: f64,
    /// Travel before the land opens, m.
    pub overlap: f64,
    /// Area of the port behind the land, m2: no opening is larger.
    pub port_area: f64,
}

/// The opening at one travel.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Opening<S> {
    /// Flow area, m2.
    pub area: S,
    /// Change of the area with travel, m.
    pub slope: S,
    /// Gap that the oil passes, m; half the hydraulic diameter.
    pub gap: S,
}

impl MeteringLand {
    /// Opening at a travel in m (M5.3).
    ///
    /// # Source
    /// Frustum area of a conical gap: Merritt, *Hydraulic Control Systems*, 1967, ch. 10, poppet
    /// with cone angle; circular segment and triangle: plane geometry.
    #[inline(always)]
    pub fn opening<S: Real>(&self, travel: S) -> Opening<S> {
        let narrow = self.opening_at(Dual::<1>::variable(travel.value(), 0));
        let widen = |n: Dual<1>| travel.chain(n.value, n.slopes[0]);
        Opening {
            area: widen(narrow.area),
            slope: widen(narrow.slope),
            gap: widen(narrow.gap),
        }
    }

    #[inline(always)]
    fn opening_at<S: Real>(&self, travel: S) -> Opening<S> {
        let reach = travel - self.overlap;
        let z = ramp(reach, OPENING_WIDTH);
        let dz = ramp_slope(reach, OPENING_WIDTH);
        let raw = self.raw_opening(z, dz);
        let ratio = raw.area * (1.0 / self.port_area);
        let r2 = ratio * ratio;
        let r4 = r2 * r2;
        let base = r4 * r4 + 1.0;
        // The port limits the area by an eighth-power mean, exact near zero, where a square-root
        // soft minimum would go negative. base^(-1/8): three square roots instead of a power.
        let root = S::constant(1.0) / base.sqrt().sqrt().sqrt();
        Opening {
            area: raw.area * root,
            slope: raw.slope * root / base,
            gap: raw.gap,
        }
    }

    /// Opening without the limit of the port; `z` opening travel in m, `dz` its slope.
    #[inline(always)]
    fn raw_opening<S: Real>(&self, z: S, dz: S) -> Opening<S> {
        let edge = PI * self.diameter;
        match &self.shape {
            LandShape::Chamfer { angle, length } => {
                let (sin, cos) = angle.sin_cos();
                let (z1, z2, share) = split(z, *length);
                let cone = z1 * sin;
                let dcone = (z1 * (-2.0 * sin * cos) + self.diameter) * (PI * sin);
                Opening {
                    area: cone * (cone * (-cos) + self.diameter) * PI + z2 * edge,
                    slope: (dcone * (-share + 1.0) + share * edge) * dz,
                    gap: z * sin,
                }
            }
            LandShape::Sharp => Opening {
                area: z * edge,
                slope: dz * edge,
                gap: z,
            },
            LandShape::RoundHoles { count, diameter } => {
                let (z1, _, share) = split(z, *diameter);
                let depth = z1.min_with(*diameter);
                let (area, chord) = segment(depth, *diameter);
                let total = area * *count;
                Opening {
                    area: total,
                    slope: chord * (-share + 1.0) * dz * *count,
                    gap: (area * (1.0 / PI)).sqrt(),
                }
            }
            LandShape::Notches {
                count,
                angle,
                length,
            } => {
                let half = 0.5 * angle;
                let (z1, z2, share) = split(z, *length);
                let widen = count * half.tan();
                Opening {
                    area: z1 * z1 * widen + z2 * edge,
                    slope: (z1 * (-share + 1.0) * (2.0 * widen) + share * edge) * dz,
                    gap: z1 * half.sin() + z2,
                }
            }
            LandShape::Table(table) => {
                let (area, slope) = table.at(z);
                Opening {
                    area,
                    slope: slope * dz,
                    gap: area * (1.0 / edge),
                }
            }
        }
    }
}

/// Splits opening travel into the part on the first stretch and the part beyond it, with the
/// share of further travel that goes beyond (M5.3).
#[inline(always)]
fn split<S: Real>(z: S, length: f64) -> (S, S, S) {
    let beyond = z - length;
    let z2 = ramp(beyond, HANDOVER_WIDTH) - ramp(-length, HANDOVER_WIDTH);
    (z - z2, z2, ramp_slope(beyond, HANDOVER_WIDTH))
}

/// Area (m2) and chord (m) of a circle of `diameter` uncovered to `depth` from one side.
#[inline(always)]
fn segment<S: Real>(depth: S, diameter: f64) -> (S, S) {
    let radius = 0.5 * diameter;
    let h = depth.value().max(0.0);
    let chord_squared = (4.0 * h * (diameter - h)).max(0.0);
    let half_angle = ((radius - h) / radius).clamp(-1.0, 1.0).acos();
    let area = radius * radius * half_angle - (radius - h) * 0.5 * chord_squared.sqrt();
    // The area's derivative is the chord itself; going through acos would divide by zero.
    let area = depth.chain(area, chord_squared.sqrt());
    let c2 = (depth * (-depth + diameter) * 4.0).max_with(f64::MIN_POSITIVE);
    (area, c2.sqrt())
}

#[cfg(test)]
mod tests {
    use super::*;

    fn shapes() -> Vec<LandShape> {
        let table =
            MonotoneCubic::new(vec![(0.0, 0.0), (1e-3, 5e-6), (2e-3, 40e-6), (5e-3, 90e-6)])
                .unwrap();
        vec![
            LandShape::Chamfer {
                angle: 10f64.to_radians(),
                length: 4e-3,
            },
            LandShape::Sharp,
            LandShape::RoundHoles {
                count: 4.0,
                diameter: 5e-3,
            },
            LandShape::Notches {
                count: 4.0,
                angle: 60f64.to_radians(),
                length: 2e-3,
            },
            LandShape::Table(table),
        ]
    }

    fn land(shape: LandShape) -> MeteringLand {
        MeteringLand {
            shape,
            diameter: 20e-3,
            overlap: 1.5e-3,
            port_area: 150e-6,
        }
    }

    #[test]
    fn area_is_never_negative_and_never_shrinks() {
        for shape in shapes() {
            let land = land(shape);
            let mut before = 0.0;
            for step in -200..1200 {
                let x = f64::from(step) * 1e-5;
                let o = land.opening(x);
                assert!(o.area >= 0.0, "{:?} at {x}: {}", land.shape, o.area);
                assert!(
                    o.area >= before - 1e-15,
                    "{:?} shrinks at {x}: {before} to {}",
                    land.shape,
                    o.area
                );
                assert!(o.area <= 150e-6 * (1.0 + 1e-12), "larger than its port");
                before = o.area;
            }
        }
    }

    #[test]
    fn slope_is_the_derivative_of_the_area() {
        for shape in shapes() {
            let land = land(shape);
            for step in 1..60 {
                let x = f64::from(step) * 1.37e-4;
                let dual = land.opening(Dual::<1>::variable(x, 0));
                let exact = dual.area.slopes[0];
                assert!(
                    (dual.slope.value - exact).abs() <= 1e-9 + 1e-6 * exact.abs(),
                    "{:?} at {x}: slope {} against {exact}",
                    land.shape,
                    dual.slope.value
                );
            }
        }
    }

    /// Plane geometry: half a hole uncovered is half its area, a hole fully uncovered all of it.
    #[test]
    fn round_holes_uncover_half_and_whole() {
        let d = 4e-3;
        let whole = PI * d * d / 4.0;
        let (half, _) = segment(d / 2.0, d);
        assert!((half / whole - 0.5).abs() < 1e-12, "half");
        let (all, _) = segment(d, d);
        assert!((all / whole - 1.0).abs() < 1e-12, "all");
    }
}
