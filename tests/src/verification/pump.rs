//! Slip, torque and ripple of pumps.

use std::f64::consts::TAU;

use helmsplit_model::{Orifice, Pump, PumpFlows, Ripple};

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::{linear_chamber, stiff, thin_oil, viscous_oil};
use crate::rk4::integrate;
use crate::test_valve::CD;

pub(super) const ABOUT: &str = "\
Slip from one point of a data sheet (M4.1, M4.2), torque (M4.3), kinematic ripple (M4.4). The slip
coefficients of the first rows are those of machines of the 1940s and say nothing of pumps made
since. Ripple is that of the kinematics alone: what an outlet volume, compression in the chambers
and leakage make of it is not in these rows.";

const SLIP: Subject = Subject {
    title: "Slip",
    source: Source::memory("Wilson 1950, slip coefficients through Merritt 1967"),
    unit: "%",
};

const TEST: Subject = Subject {
    title: "Pump on a test stand",
    source: Source::published("service data: 11.69 gpm unloaded, 10.0 gpm at 3000 psi, 1500 rpm"),
    unit: "gpm",
};

const TORQUE: Subject = Subject {
    title: "Ideal torque",
    source: Source::computed("T = D dp / (2 pi); N m = cm3 bar / (20 pi)"),
    unit: "N m",
};

const PISTON: Subject = Subject {
    title: "Ripple of piston pumps, peak to peak over the mean",
    source: Source::computed(
        "sum of half sines: odd (pi / 2N) tan(pi / 4N), even (pi / N) tan(pi / 2N)",
    ),
    unit: "%",
};

const PISTON_TOP: Subject = Subject {
    title: "Ripple of piston pumps, peak to peak over the top",
    source: Source::published("Rabie, Fluid Power Engineering, 2009, table 4.9"),
    unit: "%",
};

const GEAR: Subject = Subject {
    title: "Ripple of external gear pumps, equal gears, 20 deg, peak to peak over the mean",
    source: Source::computed(
        "flow as the square of the contact's distance from the pitch point; general treatment: \
         Manring & Kasaragadda, J. Dyn. Sys. Meas. Control 125(3), 2003",
    ),
    unit: "%",
};

const HARMONIC: Subject = Subject {
    title: "Harmonics of gear ripple, amplitude over peak to peak",
    source: Source::computed("Fourier series of parabolic arcs, 4 / (pi k)^2"),
    unit: "",
};

const FREQUENCY: Subject = Subject {
    title: "Ripple frequency",
    source: Source::computed("z n / 60 for gears, 2 N n / 60 for an odd number of pistons"),
    unit: "Hz",
};

const THROTTLE: Subject = Subject {
    title: "Ripple into a fixed throttle, pressure peak to peak over the mean's",
    source: Source::published("Rabie 2009, p. 100: flow between 0.90 and 1.04 of the mean"),
    unit: "%",
};

/// 1500 rpm in rad/s.
const SPEED: f64 = 1500.0 * TAU / 60.0;

fn pump(displacement: f64, slip: f64) -> Pump {
    Pump {
        displacement_rad: displacement / TAU,
        slip,
        hydromechanical_efficiency: 1.0,
        aeration_loss: 0.0,
        ripple: Ripple::None,
    }
}

/// Flows at 1500 rpm and a pressure in Pa with an oil of dynamic viscosity `mu` in Pa s.
fn at_test_point(pump: &Pump, mu: f64, pressure: f64) -> PumpFlows<f64> {
    let oil = viscous_oil(850.0, mu / 850.0);
    pump.flows(&oil, SPEED, pressure, 0.0, 1.0, 1.0)
}

fn slip_checks() -> Vec<Check> {
    let mut all: Vec<Check> = [
        ("piston", 0.15e-7, 6.37, 5e-3),
        ("vane", 0.477e-7, 20.2, 0.05),
        ("gear", 0.48e-7, 20.4, 0.05),
    ]
    .into_iter()
    .map(|(kind, coefficient, expected, rounding)| {
        SLIP.check(
            format!("D1.{kind}"),
            format!("{kind} pump, Cs {coefficient:e}, 200 bar, 1500 rpm, 30 mPa s"),
            expected,
            Absolute(rounding),
            move || {
                let flows = at_test_point(&pump(20e-6, coefficient), 0.03, 200e5);
                flows.slip / (flows.delivered + flows.slip) * 100.0
            },
        )
    })
    .collect();
    let wilson = SLIP.from(Source::computed("Wilson 1950, Cs = (1 - eta_v) mu w / dp"));
    all.push(wilson.in_unit("").check(
        "D1.cs",
        "Cs from 0.92 at 200 bar, 1500 rpm, 25.5 mPa s",
        1.6022e-8,
        Relative(5e-5),
        || Pump::wilson_slip(0.92, 25.5e-3, SPEED, 200e5),
    ));
    all.push(wilson.check(
        "D1.back",
        "volumetric efficiency at that point again",
        92.0,
        Relative(1e-12),
        || {
            let slip = Pump::wilson_slip(0.92, 25.5e-3, SPEED, 200e5);
            let flows = at_test_point(&pump(20e-6, slip), 25.5e-3, 200e5);
            flows.delivered / (flows.delivered + flows.slip) * 100.0
        },
    ));
    all.push(TEST.check(
        "D2.flow",
        "delivery at 3000 psi of a pump with 85.54 % there",
        10.0,
        Relative(1e-4),
        || {
            let (gpm, psi) = (231.0 * 0.0254f64.powi(3) / 60.0, 6_894.757_293);
            let displacement = 11.69 * gpm / 25.0;
            let slip = Pump::wilson_slip(0.8554, 25.5e-3, SPEED, 3000.0 * psi);
            at_test_point(&pump(displacement, slip), 25.5e-3, 3000.0 * psi).delivered / gpm
        },
    ));
    all.push(TORQUE.check(
        "B6.torque",
        "20 cm3/rev, 175 bar",
        55.704,
        Absolute(5e-4),
        || pump(20e-6, 0.0).torque(175e5, 0.0),
    ));
    all
}

/// Lowest, highest and mean factor of a ripple over one turn, sampled on tops and cusps.
fn swing(ripple: &Ripple) -> (f64, f64, f64) {
    let samples = 4000 * ripple.per_revolution() as u32;
    let (mut low, mut high, mut sum) = (f64::MAX, f64::MIN, 0.0);
    for sample in 0..samples {
        let factor = ripple.factor(TAU * f64::from(sample) / f64::from(samples));
        low = low.min(factor);
        high = high.max(factor);
        sum += factor;
    }
    (low, high, sum / f64::from(samples))
}

fn piston(pistons: u32) -> Ripple {
    Ripple::Piston {
        pistons,
        factor: 1.0,
    }
}

fn gear(teeth: f64) -> Ripple {
    Ripple::Gear {
        teeth,
        peak_to_peak: Ripple::gear_peak_to_peak(teeth, 20f64.to_radians()),
    }
}

fn ripple_checks() -> Vec<Check> {
    let table = [
        (5, 4.976, 4.9),
        (6, 14.030, 13.4),
        (7, 2.528_374_859, 2.5),
        (8, 7.811, 7.6),
        (9, 1.527, 1.5),
        (10, 4.976, 4.9),
        (11, 1.021, 1.0),
    ];
    let mut all = Vec::new();
    for (pistons, mean, _) in table {
        all.push(PISTON.check(
            format!("D3.piston.{pistons}"),
            format!("{pistons} pistons"),
            mean,
            Absolute(5.1e-4),
            move || {
                let (low, high, mean) = swing(&piston(pistons));
                (high - low) / mean * 100.0
            },
        ));
    }
    for (pistons, _, top) in table {
        all.push(PISTON_TOP.check(
            format!("D3.top.{pistons}"),
            format!("{pistons} pistons"),
            top,
            Absolute(0.051),
            move || {
                let (low, high, _) = swing(&piston(pistons));
                (high - low) / high * 100.0
            },
        ));
    }
    for (teeth, expected) in [
        (6.0, 34.73),
        (8.0, 26.33),
        (10.0, 21.21),
        (12.0, 17.751_471_1),
        (14.0, 15.26),
        (16.0, 13.39),
        (20.0, 10.75),
    ] {
        all.push(GEAR.check(
            format!("D3.gear.{teeth}"),
            format!("{teeth} teeth"),
            expected,
            Absolute(5.1e-3),
            move || {
                let (low, high, mean) = swing(&gear(teeth));
                (high - low) / mean * 100.0
            },
        ));
    }
    all
}

/// Amplitude of harmonic `k` of the tooth frequency over peak to peak.
fn harmonic(k: f64) -> f64 {
    const SAMPLES: u32 = 20_000;
    let ripple = gear(12.0);
    let (low, high, _) = swing(&ripple);
    let sum: f64 = (0..SAMPLES)
        .map(|sample| {
            let tooth = f64::from(sample) / f64::from(SAMPLES);
            ripple.factor(tooth * TAU / 12.0) * (k * TAU * tooth).cos()
        })
        .sum();
    (2.0 * sum / f64::from(SAMPLES)).abs() / (high - low)
}

fn spectrum_checks() -> Vec<Check> {
    let mut all: Vec<Check> = [(1.0, 0.4053), (2.0, 0.1013), (3.0, 0.0450)]
        .into_iter()
        .map(|(k, expected)| {
            HARMONIC.check(
                format!("D3.harmonic.{k}"),
                format!("harmonic {k}"),
                expected,
                Absolute(5.1e-5),
                move || harmonic(k),
            )
        })
        .collect();
    for (id, what, ripple, expected) in [
        ("D3.hz.gear", "12 teeth, 1500 rpm", gear(12.0), 300.0),
        ("D3.hz.piston", "9 pistons, 1500 rpm", piston(9), 450.0),
        ("D3.hz.even", "8 pistons, 1500 rpm", piston(8), 200.0),
    ] {
        all.push(
            FREQUENCY.check(id, what, expected, Relative(1e-12), move || {
                ripple.per_revolution() * 25.0
            }),
        );
    }
    all
}

/// Pressure over the throttle, peak to peak in per cent of that at the mean flow, of a gear pump
/// of 12 teeth with hardly any volume between.
fn pressure_ripple() -> f64 {
    let oil = stiff(thin_oil(850.0));
    let ripple = gear(12.0);
    let pump = Pump {
        ripple,
        ..pump(20e-6, 0.0)
    };
    let throttle = Orifice::round(2.4e-3, CD, 60.0);
    let chamber = linear_chamber(1e-9, 1.5e9);
    let delivered = |angle: f64, p: f64| {
        pump.flows(&oil, SPEED, p, 0.0, ripple.factor(angle), 1.0)
            .delivered
    };
    let rates = |y: &[f64], dy: &mut [f64]| {
        let net = delivered(y[0], y[1]) - throttle.flow(&oil, y[1]);
        dy[0] = SPEED;
        dy[1] = chamber.pressure_rate(&oil, y[1], net);
    };
    let mean = crate::bisection::root(0.0, 1e9, |p| {
        throttle.flow(&oil, p) - SPEED * pump.displacement_rad
    });
    let (mut low, mut high) = (f64::MAX, f64::MIN);
    let tooth = 1.0 / 300.0;
    integrate(&mut [0.0, mean], 5e-8, 2.0 * tooth, rates, |t, y| {
        if t > tooth {
            low = low.min(y[1]);
            high = high.max(y[1]);
        }
    });
    (high - low) / mean * 100.0
}

fn throttle_checks() -> Vec<Check> {
    vec![
        THROTTLE.check("D3.throttle", "as stated", 27.16, Relative(1e-6), || {
            let (throttle, oil) = (Orifice::round(2.4e-3, CD, 60.0), thin_oil(850.0));
            let mean = 30.0 / 6e4;
            let drop = |share: f64| {
                crate::bisection::root(0.0, 1e9, |p| throttle.flow(&oil, p) - share * mean)
            };
            (drop(1.04) - drop(0.90)) / drop(1.0) * 100.0
        }),
        THROTTLE
            .from(Source::computed(
                "the same law for parabolic arcs of peak to peak r: (1 + r/3)^2 - (1 - 2r/3)^2",
            ))
            .check(
                "D3.stiff",
                "gear pump of 12 teeth, stiff volume, integrated over time",
                34.452_56,
                Relative(1e-4),
                pressure_ripple,
            ),
    ]
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = slip_checks();
    all.extend(ripple_checks());
    all.extend(spectrum_checks());
    all.extend(throttle_checks());
    all
}
