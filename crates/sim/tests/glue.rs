//! Stops, jumps, endings: the solver glue on systems whose answers are known.

use std::cell::Cell;
use std::sync::atomic::{AtomicBool, Ordering};

use helmsplit_sim::{
    Flow, GiveUp, Integration, Method, Piece, Recorder, RunEnd, SimError, SolverOptions, Step,
    System, Watch, integrate,
};

/// `y' = slope (u - y)`, `u` given for each piece.
struct Lag {
    rate: f64,
    target: f64,
}

impl System for Lag {
    fn size(&self) -> usize {
        1
    }
    fn scales(&self) -> &[f64] {
        &[1.0]
    }
    fn derivatives(&self, _t: f64, y: &[f64], dy: &mut [f64]) {
        dy[0] = self.rate * (self.target - y[0]);
    }
    fn jacobian(&self, _t: f64, _y: &[f64], j: &mut [f64]) {
        j[0] = -self.rate;
    }
}

/// `y' = f(t, y)` of one state, for systems that misbehave.
struct Odd<F: Fn(f64, f64) -> f64>(F);

impl<F: Fn(f64, f64) -> f64> System for Odd<F> {
    fn size(&self) -> usize {
        1
    }
    fn scales(&self) -> &[f64] {
        &[1.0]
    }
    fn derivatives(&self, t: f64, y: &[f64], dy: &mut [f64]) {
        dy[0] = (self.0)(t, y[0]);
    }
    fn jacobian(&self, t: f64, y: &[f64], j: &mut [f64]) {
        let h = 1e-6;
        j[0] = ((self.0)(t, y[0] + h) - (self.0)(t, y[0] - h)) / (2.0 * h);
    }
    fn state_name(&self, _index: usize) -> String {
        "odd state".to_owned()
    }
}

/// Keeps times, states and the middles of steps.
#[derive(Default)]
struct Log {
    begins: Vec<(usize, f64)>,
    steps: Vec<(f64, f64)>,
    middles: Vec<(f64, f64)>,
}

impl Recorder for Log {
    fn begin(&mut self, piece: usize, time: f64, _y: &[f64]) {
        self.begins.push((piece, time));
    }
    fn step(&mut self, step: &mut Step<'_>) -> Result<Flow, GiveUp> {
        let middle = 0.5 * (step.from + step.time);
        let mut y = [0.0];
        step.at(middle, &mut y)?;
        self.middles.push((middle, y[0]));
        self.steps.push((step.time, step.y[0]));
        Ok(Flow::Continue)
    }
}

fn one(system: &dyn System, end: f64) -> Vec<Piece<'_>> {
    vec![Piece {
        system,
        end,
        jump: false,
    }]
}

fn go(pieces: &[Piece<'_>], start: f64, options: &SolverOptions) -> (Integration, Log) {
    let mut log = Log::default();
    let result = integrate(pieces, 0.0, &[start], options, &mut log, &mut Watch::none());
    (result.expect("pieces and start fit"), log)
}

#[test]
fn stops_exactly_where_an_input_jumps_and_starts_anew() {
    let (up, down) = (
        Lag {
            rate: 50.0,
            target: 1.0,
        },
        Lag {
            rate: 50.0,
            target: -1.0,
        },
    );
    let pieces = [
        Piece {
            system: &up,
            end: 0.1234,
            jump: false,
        },
        Piece {
            system: &down,
            end: 0.3,
            jump: true,
        },
    ];
    for method in [Method::Bdf, Method::Esdirk34] {
        let options = SolverOptions {
            method,
            ..SolverOptions::with_tolerance(1e-8)
        };
        let (result, log) = go(&pieces, 0.0, &options);
        assert!(result.end.is_finished(), "{method:?}: {}", result.end);
        assert_eq!(log.begins, [(0, 0.0), (1, 0.1234)], "{method:?}: pieces");
        assert_eq!(result.statistics.starts, 2, "{method:?}: one jump");
        let exact = |t: f64| {
            let rise = |t: f64| 1.0 - (-50.0 * t).exp();
            if t <= 0.1234 {
                rise(t)
            } else {
                -1.0 + (rise(0.1234) + 1.0) * (-50.0 * (t - 0.1234)).exp()
            }
        };
        for &(t, y) in log.steps.iter().chain(&log.middles) {
            let error = (y - exact(t)).abs();
            assert!(error < 1e-6, "{method:?}: {error:e} at {t}");
        }
        assert!(
            (result.time - 0.3).abs() < 1e-15,
            "{method:?}: {}",
            result.time
        );
    }
}

#[test]
fn goes_on_over_a_bend_with_its_history() {
    // y' = ramp input: y is a parabola on each side, which order 2 integrates exactly.
    let rising = Odd(|t, _| t);
    let level = Odd(|_, _| 1.0);
    let pieces = [
        Piece {
            system: &rising as &dyn System,
            end: 1.0,
            jump: false,
        },
        Piece {
            system: &level,
            end: 3.0,
            jump: false,
        },
    ];
    let (result, log) = go(&pieces, 0.0, &SolverOptions::default());
    assert_eq!(result.statistics.starts, 1, "no restart at a bend");
    assert!((result.state[0] - 2.5).abs() < 1e-5, "{:?}", result.state);
    assert!(
        log.steps.iter().any(|&(t, _)| (t - 1.0).abs() < 1e-15),
        "a step ends on the bend"
    );
}

#[test]
fn names_time_and_state_where_the_equations_give_no_number() {
    let broken = Odd(|t, y| if t < 0.5 { -y } else { f64::NAN });
    for method in [Method::Bdf, Method::Esdirk34] {
        let options = SolverOptions {
            method,
            ..SolverOptions::default()
        };
        let (result, log) = go(&one(&broken, 1.0), 1.0, &options);
        let RunEnd::GaveUp {
            time,
            state,
            reason,
        } = &result.end
        else {
            panic!("{method:?}: {}", result.end);
        };
        assert_eq!(*reason, GiveUp::NotFinite, "{method:?}");
        assert_eq!(state, "odd state", "{method:?}");
        assert!((time - 0.5).abs() < 1e-3, "{method:?}: {time}");
        assert!(!log.steps.is_empty(), "{method:?}: what was solved is kept");
    }
}

#[test]
fn not_a_number_from_the_start_ends_at_once() {
    let broken = Odd(|_, _| f64::NAN);
    let (result, _) = go(&one(&broken, 1.0), 1.0, &SolverOptions::default());
    let text = result.end.to_string();
    assert!(text.contains("not a finite number"), "{text}");
    assert!(
        result.statistics.rhs_calls < 100_000,
        "{:?}",
        result.statistics
    );
}

#[test]
fn a_solution_that_runs_away_is_given_up() {
    let explosive = Odd(|_, y| y * y);
    let (result, _) = go(&one(&explosive, 2.0), 1.0, &SolverOptions::default());
    let RunEnd::GaveUp { time, .. } = result.end else {
        panic!("y' = y^2 from 1 has no solution beyond 1 s: {}", result.end);
    };
    assert!((time - 1.0).abs() < 1e-3, "{time}");
}

#[test]
fn a_crawl_and_too_many_steps_are_ended() {
    let fast = Odd(|t: f64, _| 1e9 * (1e9 * t).sin());
    let options = SolverOptions {
        crawl_steps: 2000,
        ..SolverOptions::default()
    };
    let (result, _) = go(&one(&fast, 1.0), 0.0, &options);
    let text = result.end.to_string();
    assert!(text.contains("last 2000 steps"), "{text}");
    let options = SolverOptions {
        max_steps: 500,
        ..SolverOptions::default()
    };
    let (result, log) = go(&one(&fast, 1.0), 0.0, &options);
    assert!(
        result.end.to_string().contains("500 steps"),
        "{}",
        result.end
    );
    assert_eq!(log.steps.len(), 500, "steps kept");
}

#[test]
fn cancels_soon_and_reports_progress() {
    let flag = AtomicBool::new(false);
    let reports = Cell::new(0);
    let wave = Odd(|t: f64, _| (500.0 * t).cos());
    let mut report = |time: f64| {
        reports.set(reports.get() + 1);
        if time > 0.5 {
            flag.store(true, Ordering::Relaxed);
        }
    };
    let mut watch = Watch::none().with_cancel(&flag).with_progress(&mut report);
    let mut log = Log::default();
    let result = integrate(
        &one(&wave, 10.0),
        0.0,
        &[0.0],
        &SolverOptions::default(),
        &mut log,
        &mut watch,
    )
    .unwrap();
    let RunEnd::Cancelled { time } = result.end else {
        panic!("{}", result.end);
    };
    assert!(time > 0.5 && time < 2.0, "{time}");
    assert!(reports.get() > 1, "progress was reported");
    assert!(
        (log.steps.last().unwrap().0 - time).abs() < 1e-15,
        "kept up to there"
    );
}

#[test]
fn refuses_starts_that_do_not_fit() {
    let lag = Lag {
        rate: 1.0,
        target: 0.0,
    };
    let mut log = Log::default();
    let mut go = |start: &[f64], end: f64| {
        let options = SolverOptions::default();
        integrate(
            &one(&lag, end),
            0.0,
            start,
            &options,
            &mut log,
            &mut Watch::none(),
        )
    };
    let error = go(&[1.0, 2.0], 1.0).unwrap_err();
    assert!(matches!(error, SimError::StartLength { .. }), "{error}");
    let error = go(&[f64::NAN], 1.0).unwrap_err();
    assert!(matches!(error, SimError::StartNotFinite { .. }), "{error}");
    let error = go(&[1.0], 0.0).unwrap_err();
    assert!(matches!(error, SimError::Span { .. }), "{error}");
}
