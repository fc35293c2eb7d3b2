//! The solver glue on published stiff test problems.
//!
//! Source of problems and end values: Test Set for Initial Value Problem Solvers (University of
//! Bari, F. Mazzia & C. Magherini; earlier CWI, W. M. Lioen & J. J. B. de Swart): ROBER, HIRES,
//! VDPOL (here unscaled, mu = 1000), OREGO.

use helmsplit_sim::{
    Flow, GiveUp, Integration, Method, Piece, Recorder, SolverOptions, Step, System, Watch,
    integrate,
};

/// Reaction network of Robertson (1966): rates over nine decades, end time over eleven.
struct Robertson;

impl System for Robertson {
    fn size(&self) -> usize {
        3
    }
    fn scales(&self) -> &[f64] {
        // y1 and y2 are wanted to four digits at 2e-8 and 8e-14: the absolute part must lie below.
        &[1e-8, 1e-13, 1.0]
    }
    fn derivatives(&self, _t: f64, y: &[f64], dy: &mut [f64]) {
        dy[0] = -0.04 * y[0] + 1e4 * y[1] * y[2];
        dy[2] = 3e7 * y[1] * y[1];
        dy[1] = -dy[0] - dy[2];
    }
    fn jacobian(&self, _t: f64, y: &[f64], j: &mut [f64]) {
        j.copy_from_slice(&[
            -0.04,
            0.04,
            0.0,
            1e4 * y[2],
            -1e4 * y[2] - 6e7 * y[1],
            6e7 * y[1],
            1e4 * y[1],
            -1e4 * y[1],
            0.0,
        ]);
    }
}

/// High irradiance responses of photomorphogenesis (Schaefer 1975), eight states.
struct Hires;

impl System for Hires {
    fn size(&self) -> usize {
        8
    }
    fn scales(&self) -> &[f64] {
        // The smallest end value is 6e-5; the absolute part of the tolerance must lie below it.
        &[1e-4; 8]
    }
    fn derivatives(&self, _t: f64, y: &[f64], dy: &mut [f64]) {
        let bind = 280.0 * y[5] * y[7];
        dy[0] = -1.71 * y[0] + 0.43 * y[1] + 8.32 * y[2] + 0.0007;
        dy[1] = 1.71 * y[0] - 8.75 * y[1];
        dy[2] = -10.03 * y[2] + 0.43 * y[3] + 0.035 * y[4];
        dy[3] = 8.32 * y[1] + 1.71 * y[2] - 1.12 * y[3];
        dy[4] = -1.745 * y[4] + 0.43 * (y[5] + y[6]);
        dy[5] = -bind + 0.69 * y[3] + 1.71 * y[4] - 0.43 * y[5] + 0.69 * y[6];
        dy[6] = bind - 1.81 * y[6];
        dy[7] = -dy[6];
    }
    fn jacobian(&self, _t: f64, y: &[f64], j: &mut [f64]) {
        j.fill(0.0);
        let mut set = |row: usize, column: usize, value: f64| j[column * 8 + row] = value;
        let (b6, b8) = (280.0 * y[7], 280.0 * y[5]);
        for (row, column, value) in [
            (0, 0, -1.71),
            (0, 1, 0.43),
            (0, 2, 8.32),
            (1, 0, 1.71),
            (1, 1, -8.75),
            (2, 2, -10.03),
            (2, 3, 0.43),
            (2, 4, 0.035),
            (3, 1, 8.32),
            (3, 2, 1.71),
            (3, 3, -1.12),
            (4, 4, -1.745),
            (4, 5, 0.43),
            (4, 6, 0.43),
            (5, 3, 0.69),
            (5, 4, 1.71),
            (5, 5, -0.43 - b6),
            (5, 6, 0.69),
            (5, 7, -b8),
            (6, 5, b6),
            (6, 6, -1.81),
            (6, 7, b8),
            (7, 5, -b6),
            (7, 6, 1.81),
            (7, 7, -b8),
        ] {
            set(row, column, value);
        }
    }
}

/// Van der Pol's oscillator with mu = 1000: long crawls and sudden jumps.
struct VanDerPol;

impl System for VanDerPol {
    fn size(&self) -> usize {
        2
    }
    fn scales(&self) -> &[f64] {
        // The wanted end value of the slope is 9e-4.
        &[1.0, 1e-3]
    }
    fn derivatives(&self, _t: f64, y: &[f64], dy: &mut [f64]) {
        dy[0] = y[1];
        dy[1] = 1000.0 * (1.0 - y[0] * y[0]) * y[1] - y[0];
    }
    fn jacobian(&self, _t: f64, y: &[f64], j: &mut [f64]) {
        j.copy_from_slice(&[
            0.0,
            -2000.0 * y[0] * y[1] - 1.0,
            1.0,
            1000.0 * (1.0 - y[0] * y[0]),
        ]);
    }
}

/// The Oregonator (Field & Noyes 1974): pulses over five decades.
struct Oregonator;

impl System for Oregonator {
    fn size(&self) -> usize {
        3
    }
    fn scales(&self) -> &[f64] {
        &[1.0, 1.0, 1.0]
    }
    fn derivatives(&self, _t: f64, y: &[f64], dy: &mut [f64]) {
        dy[0] = 77.27 * (y[1] + y[0] * (1.0 - 8.375e-6 * y[0] - y[1]));
        dy[1] = (y[2] - (1.0 + y[0]) * y[1]) / 77.27;
        dy[2] = 0.161 * (y[0] - y[2]);
    }
    fn jacobian(&self, _t: f64, y: &[f64], j: &mut [f64]) {
        j.copy_from_slice(&[
            77.27 * (1.0 - 2.0 * 8.375e-6 * y[0] - y[1]),
            -y[1] / 77.27,
            0.161,
            77.27 * (1.0 - y[0]),
            -(1.0 + y[0]) / 77.27,
            0.0,
            0.0,
            1.0 / 77.27,
            -0.161,
        ]);
    }
}

struct Nothing;

impl Recorder for Nothing {
    fn begin(&mut self, _piece: usize, _time: f64, _y: &[f64]) {}
    fn step(&mut self, _step: &mut Step<'_>) -> Result<Flow, GiveUp> {
        Ok(Flow::Continue)
    }
}

fn run(system: &dyn System, start: &[f64], end: f64, options: &SolverOptions) -> Integration {
    let piece = Piece {
        system,
        end,
        jump: false,
    };
    integrate(
        &[piece],
        0.0,
        start,
        options,
        &mut Nothing,
        &mut Watch::none(),
    )
    .expect("a published problem is well posed")
}

fn largest_deviation(got: &[f64], expected: &[f64]) -> f64 {
    got.iter()
        .zip(expected)
        .map(|(g, e)| ((g - e) / e).abs())
        .fold(0.0, f64::max)
}

fn check(name: &str, result: &Integration, expected: &[f64], max_steps: usize) {
    let deviation = largest_deviation(&result.state, expected);
    let counts = &result.statistics;
    assert!(result.end.is_finished(), "{name}: {}", result.end);
    assert!(
        deviation < 1e-4,
        "{name}: off by {deviation:.1e}, got {:?}; {counts:?}",
        result.state
    );
    assert!(counts.steps < max_steps, "{name}: {counts:?}");
    assert!(
        counts.steps + counts.rejected_accuracy <= counts.newton_iterations,
        "{name}: each attempt takes an iteration: {counts:?}"
    );
}

const ROBERTSON_END: [f64; 3] = [
    0.2083340149701255e-7,
    0.8333360770334713e-13,
    0.999_999_979_166_505,
];

const HIRES_END: [f64; 8] = [
    0.7371312573325668e-3,
    0.1442485726316185e-3,
    0.5888729740967575e-4,
    0.1175651343283149e-2,
    0.2386356198831331e-2,
    0.6238968252742796e-2,
    0.2849998395185769e-2,
    0.2850001604814231e-2,
];

const VAN_DER_POL_END: [f64; 2] = [1.706_167_732_170_469, -0.8928097010248125e-3];

const OREGONATOR_END: [f64; 3] = [
    1.000_814_870_318_523,
    1_228.178_521_549_917,
    132.055_494_284_670_6,
];

/// Tolerance and largest step count for each problem, in the order of the functions above.
fn all_problems(method: Method, limits: [(f64, usize); 4]) {
    let with = |relative_tolerance: f64| SolverOptions {
        method,
        highest_order: 5,
        ..SolverOptions::with_tolerance(relative_tolerance)
    };
    let r = run(&Robertson, &[1.0, 0.0, 0.0], 1e11, &with(limits[0].0));
    check("Robertson", &r, &ROBERTSON_END, limits[0].1);
    let start = [1.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0057];
    let r = run(&Hires, &start, 321.8122, &with(limits[1].0));
    check("HIRES", &r, &HIRES_END, limits[1].1);
    let r = run(&VanDerPol, &[2.0, 0.0], 2000.0, &with(limits[2].0));
    check("van der Pol", &r, &VAN_DER_POL_END, limits[2].1);
    let r = run(&Oregonator, &[1.0, 2.0, 3.0], 360.0, &with(limits[3].0));
    check("Oregonator", &r, &OREGONATOR_END, limits[3].1);
}

// Step limits lie a fifth above the counts measured (926, 354, 1180, 1323): more is a loss of
// speed that somebody should explain.
#[test]
fn bdf_meets_the_published_end_values() {
    let limits = [(1e-6, 1110), (1e-6, 425), (1e-6, 1420), (1e-6, 1590)];
    all_problems(Method::Bdf, limits);
}

// A one-step method of order 3 lets the period of the oscillators drift more than the local
// tolerance says: HIRES reaches 9.3e-5 and the Oregonator 1.1e-4 at 1e-6, so both are run at 1e-7.
#[test]
fn esdirk_meets_the_published_end_values() {
    let limits = [(1e-6, 1020), (1e-7, 850), (1e-6, 1480), (1e-7, 3400)];
    all_problems(Method::Esdirk34, limits);
}

#[test]
fn the_order_stays_below_its_cap() {
    let steps_by_order = |highest_order: usize| {
        let options = SolverOptions {
            highest_order,
            ..SolverOptions::default()
        };
        let r = run(&Oregonator, &[1.0, 2.0, 3.0], 360.0, &options);
        let deviation = largest_deviation(&r.state, &OREGONATOR_END);
        assert!(
            deviation < 2e-3,
            "order {highest_order}: off by {deviation:.1e}"
        );
        r.statistics.steps_by_order
    };
    for highest_order in 2..=5 {
        let counts = steps_by_order(highest_order);
        assert!(
            counts[highest_order - 1] > 0,
            "order {highest_order} is used: {counts:?}"
        );
        let above: usize = counts[highest_order..].iter().sum();
        assert_eq!(above, 0, "nothing above order {highest_order}: {counts:?}");
    }
}
