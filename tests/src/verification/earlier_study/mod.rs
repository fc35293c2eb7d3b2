//! Figures of whole circuits that an earlier implementation of the same equations gave.

mod bench;
mod machine;

use crate::check::{Check, Source};
use crate::trouble::Tried;

pub(in crate::verification) const ABOUT: &str = "\
Figures of the orchard carrier and of its valve on a test bench, some healthy, some with a fault,
that an earlier independent implementation of the same equations gave. They are written down to two
or three digits, without every detail of how they were reached; where a detail had to be guessed,
the case says so. They show how the circuits behave, and that nothing has drifted since.";

const EARLIER: Source =
    Source::computed("an earlier independent implementation of the same equations, M1 to M10");

/// L/min in 1 m3/s.
const LPM: f64 = 6e4;

/// A value, or not a number: the check fails then.
fn number(value: Tried<f64>) -> f64 {
    value.unwrap_or(f64::NAN)
}

pub(in crate::verification) fn checks() -> Vec<Check> {
    let mut all = Vec::new();
    bench::push(&mut all);
    machine::push_lock(&mut all);
    machine::push_faults(&mut all);
    all.into_iter().map(Check::by_solver).collect()
}
