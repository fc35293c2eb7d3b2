//! Viscosity and density over temperature.

use helmsplit_model::{ICE_POINT, WaltherLine, density_at};
use helmsplit_scenario::viscosity_of_grade;

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::thin_oil;

pub(super) const ABOUT: &str = "\
Kinematic viscosity by the Walther line (M1.1) and density (M1.2). The density law is one straight
line with 7e-4 per K for every mineral oil; against the petroleum tables it is right within 0.3 %
up to 100 degC, which is what the tolerance of those rows says.";

const WALTHER: Subject = Subject {
    title: "Viscosity over temperature",
    source: Source::computed("ASTM D341, log10 log10(nu + 0.7) = A - B log10 T"),
    unit: "mm2/s",
};

const WALTHER_EXAMPLE: Source =
    Source::published("ASTM D341, worked example with T = t + 273 (32 and 5.4 mm2/s)");

const DENSITY: Subject = Subject {
    title: "Density over temperature",
    source: Source::computed("API MPMS 11.1 / ASTM D1250-04, lubricating oils"),
    unit: "kg/m3",
};

const GRADE: Subject = Subject {
    title: "Viscosity grades, mid-point at 40 degC",
    source: Source::published("ISO 3448"),
    unit: "mm2/s",
};

const TRAPPED: Subject = Subject {
    title: "Pressure of trapped oil that warms up",
    source: Source::published("rule of the trade press for oil in a shut line: 11 bar per K"),
    unit: "bar/K",
};

/// The line through viscosities (mm2/s) at 40 and 100 degC; `zero` is 0 degC in K.
fn line(at_40: f64, at_100: f64, zero: f64) -> WaltherLine {
    WaltherLine::through((at_40 * 1e-6, 40.0 + zero), (at_100 * 1e-6, 100.0 + zero))
}

#[allow(clippy::too_many_lines, reason = "a table")]
fn viscosity_checks() -> Vec<Check> {
    let mut all = Vec::new();
    let constants = WALTHER.in_unit("");
    for (id, what, source, zero, a, b, tolerance) in [
        (
            "A2.32",
            "32 / 5.4 mm2/s, T = t + 273.15",
            WALTHER.source,
            ICE_POINT,
            9.530_815,
            3.746_578,
            1e-6,
        ),
        (
            "A2.32p",
            "32 / 5.4 mm2/s, T = t + 273",
            WALTHER_EXAMPLE,
            273.0,
            9.5259,
            3.7449,
            5e-5,
        ),
    ] {
        let table = constants.from(source);
        all.push(table.check(
            format!("{id}.A"),
            format!("{what}: A"),
            a,
            Absolute(tolerance),
            move || line(32.0, 5.4, zero).constants().0,
        ));
        all.push(table.check(
            format!("{id}.B"),
            format!("{what}: B"),
            b,
            Absolute(tolerance),
            move || line(32.0, 5.4, zero).constants().1,
        ));
    }
    all.push(constants.check(
        "A2.46.A",
        "46 / 6.8 mm2/s: A",
        9.417_993,
        Absolute(1e-6),
        || line(46.0, 6.8, ICE_POINT).constants().0,
    ));
    all.push(constants.check(
        "A2.46.B",
        "46 / 6.8 mm2/s: B",
        3.684_441,
        Absolute(1e-6),
        || line(46.0, 6.8, ICE_POINT).constants().1,
    ));
    all.push(WALTHER.from(WALTHER_EXAMPLE).check(
        "A2.32p.80",
        "32 / 5.4 mm2/s, T = t + 273, at 80 degC",
        8.5,
        Absolute(0.05),
        || line(32.0, 5.4, 273.0).viscosity(353.0) * 1e6,
    ));
    all.push(WALTHER.check(
        "A2.32.80",
        "32 / 5.4 mm2/s, T = t + 273, at 80 degC, all digits",
        8.533_104_057,
        Relative(1e-6),
        || line(32.0, 5.4, 273.0).viscosity(353.0) * 1e6,
    ));
    for (celsius, expected, tolerance) in [
        (-20.0, 4_517.840_804, 1e-6),
        (-10.0, 1474.3, 1e-4),
        (0.0, 577.32, 1e-5),
        (20.0, 133.838, 1e-5),
        (50.0, 29.972_989_84, 1e-6),
        (60.0, 20.622_75, 1e-6),
        (80.0, 11.102_61, 1e-6),
        (120.0, 4.571_43, 1e-5),
    ] {
        all.push(WALTHER.check(
            format!("A2.46.{celsius}"),
            format!("46 / 6.8 mm2/s at {celsius} degC"),
            expected,
            Relative(tolerance),
            move || line(46.0, 6.8, ICE_POINT).viscosity(celsius + ICE_POINT) * 1e6,
        ));
    }
    all
}

fn grade_checks() -> Vec<Check> {
    let memory = GRADE.from(Source::memory("ISO 3448"));
    [
        (2.0, 2.2, memory),
        (3.0, 3.2, memory),
        (5.0, 4.6, memory),
        (7.0, 6.8, memory),
        (10.0, 10.0, memory),
        (15.0, 15.0, memory),
        (22.0, 22.0, GRADE),
        (32.0, 32.0, GRADE),
        (46.0, 46.0, GRADE),
        (68.0, 68.0, GRADE),
        (100.0, 100.0, GRADE),
        (150.0, 150.0, GRADE),
        (220.0, 220.0, GRADE),
        (320.0, 320.0, GRADE),
        (460.0, 460.0, GRADE),
        (680.0, 680.0, GRADE),
        (1000.0, 1000.0, GRADE),
        (1500.0, 1500.0, GRADE),
        (2200.0, 2200.0, memory),
        (3200.0, 3200.0, memory),
    ]
    .into_iter()
    .map(|(grade, expected, table)| {
        table.check(
            format!("A1.{grade}"),
            format!("VG {grade}"),
            expected,
            Relative(1e-12),
            move || viscosity_of_grade(grade).map_or(f64::NAN, |nu| nu * 1e6),
        )
    })
    .collect()
}

fn density_checks() -> Vec<Check> {
    let mut all: Vec<Check> = [
        (0.0, 879.39),
        (40.0, 854.22),
        (50.0, 847.869),
        (80.0, 828.68),
        (100.0, 815.78),
    ]
    .into_iter()
    .map(|(celsius, expected)| {
        DENSITY.check(
            format!("A3.{celsius}"),
            format!("870 kg/m3 at 15 degC, at {celsius} degC"),
            expected,
            Relative(3.1e-3),
            move || density_at(870.0, celsius + ICE_POINT),
        )
    })
    .collect();
    all.push(
        DENSITY
            .from(Source::computed("linear expansion of 7e-4 per K"))
            .check(
                "A3.lin",
                "870 kg/m3 at 15 degC, at 50 degC",
                848.685,
                Relative(1e-12),
                || density_at(870.0, 50.0 + ICE_POINT),
            ),
    );
    // Shut in, the oil answers to its expansion with pressure: alpha times bulk modulus.
    all.push(
        TRAPPED.check("A3.trap", "liquid of 1.5 GPa", 11.0, Relative(0.1), || {
            let (cold, warm) = (
                density_at(870.0, 15.0 + ICE_POINT),
                density_at(870.0, 16.0 + ICE_POINT),
            );
            let expansion = (cold - warm) / cold;
            expansion * thin_oil(870.0).bulk_modulus(100e5) * 1e-5
        }),
    );
    all
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = viscosity_checks();
    all.extend(grade_checks());
    all.extend(density_checks());
    all
}
