//! Equilibria and their linear equations: eigenvalues, responses, and borders of stability.

use std::f64::consts::TAU;

use helmsplit_model::SpoolPressures;
use helmsplit_scenario::Scenario;
use helmsplit_scenario::parameter::{excess, line, steering, valve, valve_edges};
use helmsplit_study::{Equilibrium, OperatingPoint, SteeringDuty, Variable, border, equilibrium};

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::equilibria::{RPM, bench};
use crate::linear_points::{
    eigenvalue_deviation, linear_points, linear_reference, response_deviation,
};
use crate::trouble::Tried;

pub(super) const ABOUT: &str = "\
The circuit is brought to rest at an operating point and its exact Jacobian taken there (M11).
Eigenvalues and frequency responses are held against LAPACK, which is handed the same matrices by
tests/reference/linear_reference.py; that the matrices are right is the business of the derivative
tests of each component. A spool that meets nothing but spring, viscous damping and a compressible
inlet volume is held against the Routh-Hurwitz criterion in closed form.";

const LAPACK: Source = Source::computed(
    "LAPACK geev and gesv through scipy 1.17.1 and numpy 2.4.6, tests/reference/linear_reference.py",
);

const EIGENVALUES: Subject = Subject {
    title: "All eigenvalues of an operating point: largest distance from LAPACK's, relative to each",
    source: LAPACK,
    unit: "",
};

const RESPONSES: Subject = Subject {
    title: "Responses of inlet pressure, spool travel and steering supply to pump flow, steering \
            load and engine speed at 1 to 600 Hz: largest distance from LAPACK's, relative to the \
            largest",
    source: LAPACK,
    unit: "",
};

const LEAST: Subject = Subject {
    title: "Least damped mode below 500 Hz of an operating point",
    source: LAPACK,
    unit: "Hz",
};

const ROUTH: Subject = Subject {
    title: "Border of hunting of a spool between spring, viscous damping and a compressible inlet \
            volume: viscous damping",
    source: Source::computed(
        "(c + m G B)(k + c G B + A^2 B) = m B (k G + A K), Routh-Hurwitz criterion of third order; \
         Hurwitz, Mathematische Annalen 46 (1895) 273",
    ),
    unit: "N s/m",
};

fn number(value: Tried<f64>) -> f64 {
    value.unwrap_or(f64::NAN)
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = Vec::new();
    let names: Vec<&'static str> = linear_points().iter().map(|point| point.name).collect();
    for (place, name) in names.iter().copied().enumerate() {
        all.push(EIGENVALUES.check(
            format!("linear-eigen-{}", place + 1),
            name,
            0.0,
            Absolute(1e-7),
            move || number(eigenvalue_deviation(name)),
        ));
    }
    for (place, name) in names.iter().copied().enumerate() {
        all.push(RESPONSES.check(
            format!("linear-response-{}", place + 1),
            name,
            0.0,
            Absolute(1e-6),
            move || number(response_deviation(name)),
        ));
    }
    for (place, name) in names.iter().copied().enumerate() {
        let Ok((frequency, damping)) = least_by_lapack(name) else {
            continue;
        };
        all.push(LEAST.check(
            format!("linear-frequency-{}", place + 1),
            format!("{name}: frequency"),
            rounded(frequency),
            Relative(1e-6),
            move || number(least_damped(name).map(|(frequency, _)| frequency)),
        ));
        all.push(LEAST.in_unit("").check(
            format!("linear-damping-{}", place + 1),
            format!("{name}: damping ratio"),
            rounded(damping),
            Absolute(1e-7),
            move || number(least_damped(name).map(|(_, damping)| damping)),
        ));
    }
    for (place, inlet) in [150e-6, 400e-6, 1500e-6].into_iter().enumerate() {
        let reduced = Reduced { inlet };
        let what = format!("inlet volume {} cm3", (inlet * 1e6).round());
        all.push(ROUTH.check(
            format!("linear-routh-{}", place + 1),
            what,
            rounded(number(reduced.by_hand())),
            Relative(5e-3),
            move || number(reduced.by_engine()),
        ));
    }
    all.into_iter().map(Check::by_solver).collect()
}

/// To nine digits: what the table can show and the tolerance does not see.
fn rounded(value: f64) -> f64 {
    format!("{value:.8e}").parse().unwrap_or(value)
}

/// Frequency (Hz) and damping ratio of the least damped mode below 500 Hz in the reference.
fn least_by_lapack(name: &str) -> Tried<(f64, f64)> {
    let points = linear_reference()?.points;
    let point = points.iter().find(|point| point.name == name);
    let values = &point.ok_or("no reference for the point")?.eigenvalues;
    let swinging = values.iter().filter(|(_, im)| *im > 1.0).map(|&(re, im)| {
        let size = re.hypot(im);
        (size / TAU, -re / size)
    });
    let least = swinging
        .filter(|(frequency, _)| *frequency < 500.0)
        .min_by(|a, b| a.1.total_cmp(&b.1));
    Ok(least.ok_or("nothing swings")?)
}

fn least_damped(name: &str) -> Tried<(f64, f64)> {
    let points = linear_points();
    let linear = points.iter().find(|point| point.name == name);
    let linear = linear.ok_or("no such point")?;
    let rest = equilibrium(&linear.scenario, &linear.point)?;
    let modes = rest.modes()?;
    let slow = modes.oscillations().find_map(|mode| {
        let frequency = mode.frequency().filter(|f| *f < 500.0)?;
        Some((frequency, mode.damping()?))
    });
    Ok(slow.ok_or("nothing swings")?)
}

/// A circuit that is a spool of third order but for chambers that are far too quick to matter:
/// wide damping holes and priority holes, tiny volumes, no jets, a line without length.
#[derive(Clone, Copy)]
struct Reduced {
    /// Inlet volume, m3.
    inlet: f64,
}

impl Reduced {
    fn scenario(self) -> Tried<Scenario> {
        let mut scenario = bench();
        for (id, si) in [
            (valve::INLET_VOLUME, self.inlet),
            (valve::JET_FORCE_FACTOR, 0.0),
            (valve_edges::HEAD_HOLE_DIAMETER, 10e-3),
            (valve_edges::DISC_HOLE_DIAMETER, 10e-3),
            (valve_edges::HOLES_OPEN_AREA, 400e-6),
            // Wide laminar zones: hardly any drop, but none that bends at once either.
            (valve_edges::HEAD_HOLE_TRANSITION, 300.0),
            (valve_edges::DISC_HOLE_TRANSITION, 300.0),
            (valve_edges::HOLES_TRANSITION, 100.0),
            (steering::CHECK_OPENING_PRESSURE, 1000.0),
            (excess::CHECK_OPENING_PRESSURE, 1000.0),
            (valve_edges::HOLES_THROTTLE_START, 0.09),
            (valve_edges::HOLES_THROTTLE_END, 0.9),
            (valve::HEAD_VOLUME, 0.5e-6),
            (valve::BORE_VOLUME, 0.5e-6),
            (valve::SPRING_VOLUME, 2.6e-6),
            (valve::PRIORITY_VOLUME, 0.5e-6),
            (valve::PORT_AREA, 5000e-6),
            (excess::OUTLET_AREA, 1000e-6),
            (line::LENGTH, 0.01),
            (line::BORE, 0.1),
            (line::FITTING_LOSS, 0.0),
            (line::END_VOLUME, 0.5e-6),
        ] {
            scenario.set_si(id, si)?;
        }
        scenario.set("main_relief.kind", "none")?;
        scenario.set("priority_relief.kind", "none")?;
        Ok(scenario)
    }

    fn point(scenario: &Scenario) -> OperatingPoint {
        OperatingPoint::resting(scenario)
            .at_speed(1800.0 * RPM)
            .steering(SteeringDuty::Bench {
                pressure: 60e5,
                area: 1000e-6,
            })
            .excess_pressure(2e5)
    }

    /// Viscous damping at which the engine finds the border, N s/m.
    fn by_engine(self) -> Tried<f64> {
        let scenario = self.scenario()?;
        let point = Self::point(&scenario);
        let extra = Variable::Parameter(valve::EXTRA_DAMPING);
        let found = border(&scenario, &point, extra, 0.0, 5000.0)?;
        Ok(found.equilibrium.circuit().parts().valve.viscous)
    }

    /// Viscous damping at which the criterion is just met, N s/m. The equilibrium, which does not
    /// depend on the damping, comes from the engine; slopes come from the flow formulas.
    fn by_hand(self) -> Tried<f64> {
        let scenario = self.scenario()?;
        let rest = equilibrium(&scenario, &Self::point(&scenario))?;
        let slopes = Slopes::of(&rest);
        let valve = &rest.circuit().parts().valve;
        let (m, k, a) = (valve.mass, valve.spring_rate, valve.end_area());
        let Slopes {
            g,
            gain,
            stiffness,
            holes,
        } = slopes;
        // (c + m g b)(k + c g b + a^2 b) - m b (k g + a K) = 0, a quadratic in c.
        let b = stiffness;
        let second = g * b;
        let first = k + a * a * b + m * (g * b).powi(2);
        let rest = m * g * b * (k + a * a * b) - m * b * (k * g + a * gain);
        let needed = (-first + (first * first - 4.0 * second * rest).sqrt()) / (2.0 * second);
        // What the wide damping holes add of their own: a spool that moves drives its oil through.
        Ok(needed - a * a * holes)
    }
}

/// Slopes about an equilibrium, SI.
struct Slopes {
    /// Flow out of the inlet over its pressure, m3/(s Pa).
    g: f64,
    /// Excess flow over spool travel, m2/s.
    gain: f64,
    /// Pressure rate of the inlet over flow, Pa/m3.
    stiffness: f64,
    /// Pressure over flow of both damping holes one after the other, about no flow, Pa s/m3.
    holes: f64,
}

impl Slopes {
    fn of(rest: &Equilibrium) -> Self {
        let circuit = rest.circuit();
        let parts = circuit.parts();
        let state = |name: &str| rest.named(name).unwrap_or(f64::NAN);
        let (x, inlet) = (state("x"), state("p_in"));
        let flows = |x: f64, inlet: f64| {
            let pressures = SpoolPressures {
                inlet,
                bore: state("p_b"),
                head: inlet,
                spring: state("p_s"),
                priority: state("p_c"),
                excess: state("p_e"),
            };
            let q = parts.valve.flows(&parts.oil, x, 0.0, &pressures);
            (q.orifice, q.excess)
        };
        let speed = rest.point.engine_speed;
        let pumped = |inlet: f64| {
            let pump = &parts.pump;
            pump.flows(&parts.oil, speed, inlet, 0.0, 1.0, 1.0)
                .delivered
        };
        let (dp, dx) = (100.0, 1e-8);
        let out = |inlet: f64| {
            let (orifice, excess) = flows(x, inlet);
            orifice + excess - pumped(inlet)
        };
        let chamber = parts.valve.inlet;
        let small = 1.0;
        let resistance = |hole: &helmsplit_model::Orifice| small / hole.flow(&parts.oil, small);
        Self {
            holes: resistance(&parts.valve.head_hole) + resistance(&parts.valve.disc_hole),
            g: (out(inlet + dp) - out(inlet - dp)) / (2.0 * dp),
            gain: (flows(x + dx, inlet).1 - flows(x - dx, inlet).1) / (2.0 * dx),
            stiffness: chamber.pressure_rate(&parts.oil, inlet, 1.0)
                - chamber.pressure_rate(&parts.oil, inlet, 0.0),
        }
    }
}
