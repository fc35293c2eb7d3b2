//! Openings of the excess land.

use std::f64::consts::{FRAC_PI_4, PI};

use helmsplit_model::{LandShape, MeteringLand, MonotoneCubic};

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::test_valve::OVERLAP;

pub(super) const ABOUT: &str = "\
Area over travel of the land's shapes (M5.3), spool of 20 mm. One stretch of the edge hands over to
the next over 20 um with an algebraic tail: at these travels the full edge behind a chamfer, notch
or hole already adds or takes up to 0.004 mm2, which sets the tolerance.";

/// What the tail of the handover is worth, mm2.
const TAIL: f64 = 0.005;

const GEOMETRY: Subject = Subject {
    title: "Area of the opening",
    source: Source::computed("plane geometry"),
    unit: "mm2",
};

const CONE: Source = Source::computed(
    "lateral area of the frustum, pi z sin a (d - z sin a cos a); Merritt 1967, ch. 10",
);

/// Area in mm2 at a travel beyond the overlap in m.
fn area(shape: LandShape, reach: f64) -> f64 {
    let land = MeteringLand {
        shape,
        diameter: 20e-3,
        overlap: OVERLAP,
        port_area: 1.0,
    };
    land.opening(OVERLAP + reach).area * 1e6
}

fn chamfer() -> LandShape {
    LandShape::Chamfer {
        angle: 10f64.to_radians(),
        length: 4e-3,
    }
}

#[allow(clippy::too_many_lines, reason = "a table")]
pub(super) fn checks() -> Vec<Check> {
    let holes = || LandShape::RoundHoles {
        count: 4.0,
        diameter: 4e-3,
    };
    vec![
        GEOMETRY.from(CONE).check(
            "L.cone.1",
            "chamfer of 10 deg, 1 mm open",
            10.817_345_346,
            Absolute(TAIL),
            || area(chamfer(), 1e-3),
        ),
        GEOMETRY.from(CONE).check(
            "L.cone.3",
            "chamfer of 10 deg, 3 mm open",
            31.892_287_406,
            Absolute(TAIL),
            || area(chamfer(), 3e-3),
        ),
        GEOMETRY.check(
            "L.sharp",
            "sharp edge, 0.5 mm open",
            PI * 20.0 * 0.5,
            Absolute(TAIL),
            || area(LandShape::Sharp, 0.5e-3),
        ),
        GEOMETRY.check(
            "L.holes.half",
            "4 holes of 4 mm, uncovered by half",
            4.0 * FRAC_PI_4 * 16.0 / 2.0,
            Absolute(TAIL),
            move || area(holes(), 2e-3),
        ),
        GEOMETRY
            .from(Source::computed(
                "circular segment, r^2 (pi / 3 - sqrt(3) / 4) at a quarter of the diameter",
            ))
            .check(
                "L.holes.quarter",
                "4 holes of 4 mm, uncovered by a quarter of the diameter",
                9.826_957_59,
                Absolute(TAIL),
                move || area(holes(), 1e-3),
            ),
        GEOMETRY.check(
            "L.notch",
            "4 notches of 60 deg, 1.5 mm deep",
            4.0 * 1.5 * 1.5 * 0.577_350_269,
            Absolute(TAIL),
            || {
                let notches = LandShape::Notches {
                    count: 4.0,
                    angle: 60f64.to_radians(),
                    length: 3e-3,
                };
                area(notches, 1.5e-3)
            },
        ),
        GEOMETRY
            .from(Source::computed(
                "Fritsch & Butland, SIAM J. Sci. Stat. Comput. 5(2), 1984, flat at both ends: \
                 slope 4/3 at the knee of the points (0, 0), (1, 1), (2, 3)",
            ))
            .in_unit("")
            .check(
                "L.table",
                "table: value half way up the first interval",
                1.0 / 3.0,
                Relative(1e-12),
                || {
                    MonotoneCubic::new(vec![(0.0, 0.0), (1.0, 1.0), (2.0, 3.0)])
                        .map_or(f64::NAN, |table| table.at(0.5).0)
                },
            ),
    ]
}
