//! Figures of invented data, for tests and for the gallery.

use helmsplit_view::plot::{Figure, Limit, Mark, Panel, Reach, Series, Shade, ValueRange, Where};
use helmsplit_view::style::{Dash, Fill, Meaning};

/// A second-order step of size `step` at `at`, with some ringing.
fn step(t: f64, at: f64, step: f64) -> f64 {
    if t < at {
        return 0.0;
    }
    let s = t - at;
    step * (1.0 - (-6.0 * s).exp() * (38.0 * s).cos())
}

fn sampled(f: impl Fn(f64) -> f64) -> Vec<[f64; 2]> {
    (0..=20_000)
        .map(|i| f64::from(i) * 5e-4)
        .map(|t| [t, f(t)])
        .collect()
}

fn line(label: &str, at: f64) -> Limit {
    Limit {
        label: label.to_owned(),
        at: Where::Line(at),
        reach: Reach::IfInView,
    }
}

fn panel(label: &str, unit: &str, weight: f64, series: Vec<Series>) -> Panel {
    Panel {
        series,
        weight,
        range: ValueRange::Including(0.0, 0.0),
        ..Panel::new(label, unit)
    }
}

fn speed(t: f64) -> f64 {
    match t {
        t if t < 1.0 => 900.0,
        t if t < 2.0 => 900.0 + 1500.0 * (t - 1.0),
        t if t < 7.0 => 2400.0,
        t if t < 7.5 => 2400.0 - 3000.0 * (t - 7.0),
        _ => 900.0,
    }
}

fn wheel(t: f64) -> f64 {
    match t {
        t if (3.0..4.0).contains(&t) || (8.0..9.0).contains(&t) => 90.0,
        t if (5.0..6.0).contains(&t) => -90.0,
        _ => 0.0,
    }
}

fn reached(t: f64) -> f64 {
    let asked = wheel(t);
    let since = [3.0, 5.0, 8.0]
        .iter()
        .map(|at| t - at)
        .filter(|s| *s >= 0.0);
    let since = since.fold(f64::INFINITY, f64::min);
    if asked == 0.0 {
        0.0
    } else {
        asked * (1.0 - (-since * 5.0).exp())
    }
}

/// Seven panels over ten seconds, shaped like a run.
#[allow(clippy::too_many_lines, reason = "a table of panels")]
pub(crate) fn run() -> Figure {
    let steps = |t| step(t, 3.0, 60.0) + step(t, 4.0, -60.0) + step(t, 5.0, 58.0);
    let steps = move |t| steps(t) + step(t, 6.0, -58.0) + step(t, 8.0, 40.0) + step(t, 9.0, -40.0);
    let inlet = move |t| 18.0 + 0.004 * speed(t) + steps(t);
    let priority = move |t: f64| 14.6 + 0.2 * step(t, 3.0, 1.0) + 0.02 * steps(t);
    let mut spool = panel(
        "Spool travel",
        "mm",
        0.9,
        vec![Series::new(
            "Spool travel",
            Meaning::Spool,
            sampled(|t| 1.5 + speed(t) / 2600.0 + 0.012 * steps(t)),
        )],
    );
    let band = Limit {
        label: "priority holes throttle".to_owned(),
        at: Where::Band(3.0, 6.0),
        reach: Reach::IfInView,
    };
    let stop = Limit {
        reach: Reach::Widen,
        ..line("stop", 8.0)
    };
    spool.limits = vec![line("land opens", 1.5), band, stop];
    let mut pressures = panel(
        "Pressure",
        "bar",
        1.3,
        vec![
            Series::new("Inlet", Meaning::Inlet, sampled(inlet)),
            Series::new(
                "Priority port",
                Meaning::Priority,
                sampled(move |t| inlet(t) - 6.2),
            ),
            Series::new(
                "Excess port",
                Meaning::Excess,
                sampled(|t| speed(t) * speed(t) * 6e-6),
            ),
            Series::new(
                "Steering load",
                Meaning::Steering,
                sampled(move |t| steps(t).max(0.0)),
            ),
        ],
    );
    pressures.limits = vec![
        line("main relief cracks", 165.0),
        line("priority relief cracks", 80.0),
    ];
    let flows = panel(
        "Flow",
        "L/min",
        1.3,
        vec![
            Series::new("Pump", Meaning::Inlet, sampled(|t| speed(t) * 0.0192)),
            Series::new("Priority port", Meaning::Priority, sampled(priority)),
            Series::new(
                "Excess port",
                Meaning::Excess,
                sampled(move |t| speed(t) * 0.0192 - priority(t)),
            ),
            Series::new(
                "Wheel demand",
                Meaning::Steering,
                sampled(|t| wheel(t).abs() * 0.125),
            ),
        ],
    );
    let mut steering = panel(
        "Steering wheel rate",
        "rpm",
        0.9,
        vec![
            Series::new("Reached", Meaning::Steering, sampled(reached)).dashed(Dash::Solid),
            Series::new("Commanded", Meaning::Drive, sampled(wheel)).dashed(Dash::Short),
        ],
    );
    let shortfall = sampled(wheel).into_iter().map(|[t, asked]| {
        let got = reached(t);
        [t, got.min(asked), got.max(asked)]
    });
    steering.shades.push(Shade {
        label: "shortfall".to_owned(),
        fill: Fill::Shortfall,
        points: shortfall.collect(),
    });
    let single = |name: &str, unit: &str, weight, meaning, points| {
        panel(
            name,
            unit,
            weight,
            vec![Series::new(name, meaning, points).dashed(Dash::Solid)],
        )
    };
    let mark = |time, label: &str| Mark {
        time,
        label: label.to_owned(),
    };
    Figure {
        title: "Orchard carrier: run-up, turns both ways, lug-down".to_owned(),
        subtitle: "Invented data, shaped like a run".to_owned(),
        panels: vec![
            single("Engine speed", "rpm", 0.5, Meaning::Drive, sampled(speed)),
            spool,
            pressures,
            flows,
            steering,
            single(
                "Steering cylinder travel",
                "mm",
                0.6,
                Meaning::Steering,
                sampled(|t| 30.0 * (t - 5.0).sin()),
            ),
            single(
                "Excess motor speed",
                "rpm",
                0.6,
                Meaning::Consumer,
                sampled(|t| speed(t) * 0.6),
            ),
        ],
        marks: vec![
            mark(3.02, "wheel starts"),
            mark(3.1, "priority relief cracks"),
            mark(5.35, "stop reached"),
            mark(9.6, "steering drops out for 0.34 s"),
        ],
        notes: vec!["Volume audit 2e-9, energy audit 4e-8".to_owned()],
        ..Figure::default()
    }
}

/// Data that break layouts.
#[allow(clippy::too_many_lines, reason = "a table of panels")]
pub(crate) fn awkward() -> Figure {
    let nan = f64::NAN;
    let one = |name: &str, points: Vec<[f64; 2]>| {
        let mut panel = panel(
            name,
            "bar",
            0.6,
            vec![Series::new(name, Meaning::Inlet, points)],
        );
        panel.range = ValueRange::Data;
        panel
    };
    let gaps = sampled(|t| {
        if (t * 1.3).fract() < 0.3 {
            nan
        } else {
            (3.0 * t).sin()
        }
    });
    let spike = sampled(|t| {
        if (t - 4.0).abs() < 2e-4 {
            500.0
        } else {
            t.cos()
        }
    });
    let mut crowded = panel("Crowded", "L/min", 0.8, Vec::new());
    for (index, meaning) in Meaning::ALL.into_iter().enumerate() {
        let label = format!("{meaning:?} with a long name < & >");
        crowded.series.push(Series::new(
            label,
            meaning,
            sampled(|t| t + index as f64 * 0.4),
        ));
    }
    let mut pa = panel("Pascals", "Pa", 0.8, Vec::new());
    pa.series.push(Series::new(
        "Inlet",
        Meaning::Inlet,
        sampled(|t| 1.7e7 * (t / 3.0).sin()),
    ));
    pa.series.push(Series::new(
        "Ends early",
        Meaning::Excess,
        vec![[0.0, 1e7], [4.0, -1e7]],
    ));
    let mut limits = one(
        "Limits close together",
        sampled(|t| 100.0 + 30.0 * (2.0 * t).sin()),
    );
    limits.limits = (0..4)
        .map(|i| line(&format!("relief {i} cracks"), 108.0 + 3.0 * f64::from(i)))
        .collect();
    let burst = (0..60).map(|i| Mark {
        time: 6.0 + 0.02 * f64::from(i),
        label: format!("relief chatters {i}"),
    });
    Figure {
        title: "Awkward data with a title that is far too long to stand in a single line of the sheet and therefore breaks & <wraps>".to_owned(),
        panels: vec![
            one("Constant", vec![[0.0, 50.0], [10.0, 50.0]]),
            one("Constant zero", vec![[0.0, 0.0], [10.0, 0.0]]),
            one("Rounding noise", sampled(|t| 50.0 + 1e-12 * t.sin())),
            one("Gaps", gaps),
            one("One sample of 20,000", spike),
            one("Single point", vec![[5.0, 3.0]]),
            one("Empty", vec![]),
            one("Huge range", sampled(|t| 10_f64.powf(3.0 * t - 12.0))),
            one("Tiny", sampled(|t| 2.5e-4 + 1e-5 * t.sin())),
            pa,
            limits,
            crowded,
        ],
        marks: burst.chain([Mark { time: 2.0, label: "alone".to_owned() }]).collect(),
        notes: vec!["A note that goes on and on. ".repeat(12)],
        ..Figure::default()
    }
}
