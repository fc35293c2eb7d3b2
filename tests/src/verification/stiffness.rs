//! Bulk modulus and volume of aerated oil.

use helmsplit_model::{ATMOSPHERE, Chamber, Oil};

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::thin_oil;

pub(super) const ABOUT: &str = "\
Bulk modulus of oil with entrained air (M1.4), walls in series (M1.5), volume under pressure
(M1.7). The values are *tangent* moduli with the local air fraction; the often quoted drop to half
at 0.5 % air and 50 bar is a *secant* modulus, listed separately. The liquid's compressibility is
constant, so the modulus peaks near 150 to 200 bar instead of rising on: under 1.5 % of it.";

const TANGENT: Subject = Subject {
    title: "Tangent bulk modulus, liquid 1.5 GPa, n = 1.2",
    source: Source::computed(
        "Rabie, Fluid Power Engineering, 2009, eq. 2.50-2.57, with the local air fraction",
    ),
    unit: "MPa",
};

const SECANT: Subject = Subject {
    title: "Secant bulk modulus from 0 gauge",
    source: TANGENT.source,
    unit: "GPa",
};

const BUBBLE: Subject = Subject {
    title: "Volume of a bubble, sudden compression from 0.1 MPa, n = 1.4",
    source: Source::computed("Rabie, Fluid Power Engineering, 2009, eq. 2.86-2.89"),
    unit: "",
};

const WALL: Subject = Subject {
    title: "Oil and wall in series, oil 1.5 GPa",
    source: Source::computed("1/B = 1/B_oil + 1/B_wall; Merritt, Hydraulic Control Systems, 1967"),
    unit: "GPa",
};

/// Gauge pressures of the table, bar.
const PRESSURES: [f64; 8] = [0.0, 1.0, 5.0, 10.0, 20.0, 50.0, 100.0, 200.0];

/// Air in per cent and the moduli at [`PRESSURES`] in `MPa`.
const TABLE: [(f64, [f64; 8]); 4] = [
    (
        0.1,
        [
            112.59, 333.23, 1019.4, 1297.5, 1430.1, 1481.2, 1486.1, 1478.9,
        ],
    ),
    (
        0.5,
        [
            24.050, 81.223, 447.25, 844.10, 1210.8, 1428.5, 1470.5, 1474.5,
        ],
    ),
    (
        1.0,
        [
            12.182, 41.856, 263.06, 587.69, 1016.1, 1367.664, 1451.5, 1469.1,
        ],
    ),
    (
        5.0,
        [2.549, 8.753, 61.733, 172.08, 445.33, 1020.6, 1315.8, 1426.9],
    ),
];

fn aerated(percent: f64) -> Oil {
    Oil {
        air: percent * 0.01,
        ..thin_oil(850.0)
    }
}

/// Volume of the air alone relative to 0.1 `MPa` absolute, with so much air that the liquid is lost
/// in rounding.
fn bubble(absolute: f64) -> f64 {
    let foam = Oil {
        air: 1e14,
        polytropic_exponent: 1.4,
        ..thin_oil(850.0)
    };
    foam.relative_volume(absolute - ATMOSPHERE) / foam.relative_volume(1e5 - ATMOSPHERE)
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = Vec::new();
    for (percent, row) in TABLE {
        for (bar, expected) in PRESSURES.into_iter().zip(row) {
            all.push(TANGENT.check(
                format!("A4.{percent}.{bar}"),
                format!("{percent} % air, {bar} bar"),
                expected,
                Relative(2e-4),
                move || aerated(percent).bulk_modulus(bar * 1e5) * 1e-6,
            ));
        }
    }
    all.push(SECANT.check(
        "A4.sec",
        "0.5 % air, 0 to 50 bar",
        0.61,
        Relative(0.02),
        || {
            let oil = aerated(0.5);
            let shrunk = oil.relative_volume(0.0) - oil.relative_volume(50e5);
            50e5 / (shrunk / oil.relative_volume(0.0)) * 1e-9
        },
    ));
    for (mpa, expected) in [(1.0, 0.193_07), (10.0, 0.037_276), (20.0, 0.022_720)] {
        all.push(BUBBLE.check(
            format!("A4.bubble.{mpa}"),
            format!("to {mpa} MPa absolute"),
            expected,
            Relative(3e-5),
            move || bubble(mpa * 1e6),
        ));
    }
    for (wall, expected) in [(0.5, 0.375), (1.0, 0.600)] {
        all.push(WALL.check(
            format!("A4.wall.{wall}"),
            format!("wall {wall} GPa"),
            expected,
            Absolute(1e-12),
            move || {
                let oil = Oil {
                    air: 0.0,
                    ..thin_oil(850.0)
                };
                // Pressure rate of 1 m3 under an inflow of 1 m3/s is the modulus itself.
                Chamber::with_wall(1.0, wall * 1e9).pressure_rate(&oil, 0.0, 1.0) * 1e-9
            },
        ));
    }
    all
}
