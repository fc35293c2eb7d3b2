//! Whole runs against the reference traces.

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::reference::{GRID, NAMES, Reference};
use crate::trouble::Tried;

pub(super) const ABOUT: &str = "\
Three whole runs of 3 to 10 s from a cold start against the traces in `tests/reference`: an
independent implementation of the same equations in another language, integrated with another
method at a relative tolerance of 1e-9. Every parameter is set by its path in the circuit file. A
deviation is the largest of any state at any of the 602 to 2004 times, over the state's typical
size (10 bar, 1 mm, 0.1 m/s, 6 L/min ...), rounded up to 1, 2 or 5. It sits at a sharp event; the
rest of a trace is ten to thirty times closer.";

const REFERENCE: Source = Source::computed(
    "independent implementation of docs/model.md, Radau IIA of order 5; Hairer & Wanner, Solving \
     Ordinary Differential Equations II, 1996, ch. IV.8",
);

const TIGHT: Subject = Subject {
    title: "Largest deviation of any state over its size, solver at 1e-8",
    source: REFERENCE,
    unit: "",
};

const DEFAULT: Subject = Subject {
    title: "Largest deviation of any state over its size, solver at its default of 1e-6",
    source: REFERENCE,
    unit: "",
};

const ENDS: Subject = Subject {
    title: "States at the last time of the references, solver at its default of 1e-6",
    source: REFERENCE,
    unit: "bar",
};

/// What a run is worth telling at its end: name, state, unit, and SI over that unit.
const END_STATES: [(&str, &str, &str, f64); 6] = [
    ("orchard_carrier", "p_in", "bar", 1e5),
    ("orchard_carrier", "y_c", "mm", 1e-3),
    ("orchard_carrier", "w_m", "rad/s", 1.0),
    ("c1_small_bench_tank", "x", "mm", 1e-3),
    ("c1_small_bench_tank", "p_in", "bar", 1e5),
    ("c3_steer_lock_pilot", "y_c", "mm", 1e-3),
];

/// The next of 1, 2, 5 times a power of ten that is not below: a deviation differs from machine
/// to machine in its first digits already.
fn rounded_up(size: f64) -> f64 {
    if size <= 0.0 {
        return size;
    }
    let exponent = size.log10().floor() as i32;
    let power = |exponent: i32| format!("1e{exponent}").parse::<f64>().unwrap_or(f64::NAN);
    let above = [1.0, 2.0, 5.0]
        .into_iter()
        .find(|step| size <= step * power(exponent));
    match above {
        // Divided, so that the result is the nearest number to the short decimal.
        Some(step) => step / power(-exponent),
        None => power(exponent + 1),
    }
}

fn largest(name: &'static str, tolerance: f64) -> Tried<f64> {
    let reference = Reference::load(name)?;
    let run = reference.run(tolerance)?;
    if !run.end.is_finished() {
        return Err(run.end.into());
    }
    Ok(rounded_up(reference.largest_deviation(&run)?.size))
}

fn end(name: &'static str, state: &str) -> Tried<f64> {
    let reference = Reference::load(name)?;
    let run = reference.run(1e-6)?;
    let (Some(grid), Some(position)) = (run.trace.grid(), run.trace.position(state)) else {
        return Err("no such trace".into());
    };
    let time = reference.times().last().ok_or("no rows")?;
    let row = (time / GRID).round() as usize;
    if row < grid.len() {
        Ok(grid.row(row)[position])
    } else {
        Err("ended early".into())
    }
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = Vec::new();
    for (subject, tolerance, permitted, id) in [
        (TIGHT, 1e-8, 1e-4, "tight"),
        (DEFAULT, 1e-6, 2e-3, "default"),
    ] {
        for name in NAMES {
            all.push(subject.check(
                format!("reference-{id}-{name}"),
                name.replace('_', " "),
                0.0,
                Absolute(permitted),
                move || largest(name, tolerance).unwrap_or(f64::NAN),
            ));
        }
    }
    for (name, state, unit, size) in END_STATES {
        // What is expected is read from the file here; a file that does not read is no number.
        let expected = Reference::load(name)
            .ok()
            .and_then(|r| r.column(state)?.last().copied());
        all.push(ENDS.in_unit(unit).check(
            format!("reference-end-{name}-{state}"),
            format!("{}: {state}", name.replace('_', " ")),
            expected.unwrap_or(f64::NAN) / size,
            Relative(1e-4),
            move || end(name, state).map_or(f64::NAN, |got| got / size),
        ));
    }
    all.into_iter().map(Check::by_solver).collect()
}

#[cfg(test)]
mod tests {
    use super::rounded_up;

    #[test]
    fn a_deviation_is_rounded_up() {
        for (size, expected) in [(3.4e-5, 5e-5), (5.1e-5, 1e-4), (1.0e-3, 1e-3), (0.0, 0.0)] {
            let got = rounded_up(size);
            assert!((got - expected).abs() <= 1e-9 * expected, "{size}: {got}");
        }
    }
}
