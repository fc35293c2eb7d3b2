//! Overshoot and settling of a signal after a change of the inputs.

use crate::window::Window;

/// Share of the quiet time at its end over which the settled value is taken.
const TAIL: f64 = 0.2;

/// Longest tail, s: a mean over seconds would hide a slow drift.
const LONGEST_TAIL: f64 = 0.2;

/// What a signal did after a change of the inputs.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Response {
    /// The settled value: time mean over the tail of the quiet time.
    pub settled: f64,
    /// Whether it stayed in the band all through the tail.
    pub calm: bool,
    /// Largest excess over the larger of the values before and after, relative to the settled
    /// value; at least 0.
    pub overshoot: f64,
    /// When that was, s.
    pub peak_time: f64,
    /// Largest value, in the signal's unit.
    pub peak: f64,
    /// Time from the end of the change until it stayed within the band, s; the whole quiet time
    /// if it did not.
    pub settling: f64,
    /// When it last left the band, s.
    pub settled_at: f64,
}

/// Response of a signal (`times` in s not decreasing, `values` beside them) to the change in
/// `window`, with a relative `band` around the settled value. `None` where there are fewer than
/// three points in the quiet time, or the settled value is below `least` (a port that is shut has
/// no flow to settle).
#[must_use]
pub fn response_after(
    times: &[f64],
    values: &[f64],
    window: &Window,
    band: f64,
    least: f64,
) -> Option<Response> {
    let first = times.partition_point(|&t| t < window.begins);
    let quiet = times.partition_point(|&t| t < window.quiet);
    let end = times.partition_point(|&t| t <= window.ends);
    // Where an input jumps the time stands twice; the second row belongs to the next window.
    let end = if end >= 2 && end < times.len() && times[end - 1] <= times[end - 2] {
        end - 1
    } else {
        end
    };
    if end < quiet + 3 {
        return None;
    }
    let tail_length = (TAIL * (window.ends - window.quiet)).min(LONGEST_TAIL);
    let tail = times.partition_point(|&t| t < window.ends - tail_length);
    let tail = tail.min(end - 2).max(quiet);
    let settled = mean(&times[tail..end], &values[tail..end]);
    if settled < least {
        return None;
    }
    let inside = |v: f64| (v - settled).abs() <= band * settled.abs();
    let calm = values[tail..end].iter().all(|&v| inside(v));
    let before = values[first.saturating_sub(1)];
    let (mut peak, mut peak_time) = (f64::MIN, window.begins);
    for i in first..end {
        if values[i] > peak {
            peak = values[i];
            peak_time = times[i];
        }
    }
    let overshoot = ((peak - before.max(settled)) / settled).max(0.0);
    let last_outside = (quiet..end).rev().find(|&i| !inside(values[i]));
    let settled_at = match last_outside {
        Some(i) if i + 1 < end => crossing(times, values, i, settled, band),
        Some(_) => window.ends,
        None => window.quiet,
    };
    Some(Response {
        settled,
        calm,
        overshoot,
        peak_time,
        peak,
        settling: settled_at - window.quiet,
        settled_at,
    })
}

/// Time mean by the trapezoidal rule; plain mean where no time passes.
pub(crate) fn mean(times: &[f64], values: &[f64]) -> f64 {
    let span = times[times.len() - 1] - times[0];
    if span <= 0.0 {
        return values.iter().sum::<f64>() / values.len() as f64;
    }
    let area: f64 = (1..times.len())
        .map(|i| 0.5 * (values[i] + values[i - 1]) * (times[i] - times[i - 1]))
        .sum();
    area / span
}

/// When the straight line from point `i` (outside the band) to the next (inside) enters it.
fn crossing(times: &[f64], values: &[f64], i: usize, settled: f64, band: f64) -> f64 {
    let edge = settled + (band * settled.abs()).copysign(values[i] - settled);
    let share = (edge - values[i]) / (values[i + 1] - values[i]);
    times[i] + share.clamp(0.0, 1.0) * (times[i + 1] - times[i])
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Step response of a second-order lag: overshoot `exp(-pi z / sqrt(1 - z^2))`; Ogata,
    /// *Modern Control Engineering* (value from memory of the place; formula checked in closed
    /// form here).
    #[test]
    fn overshoot_and_settling_of_a_second_order_lag() {
        let (z, w): (f64, f64) = (0.5, 10.0);
        let wd = w * (1.0 - z * z).sqrt();
        let step =
            |t: f64| 1.0 - (-z * w * t).exp() * ((wd * t).cos() + z * w / wd * (wd * t).sin());
        let times: Vec<f64> = (0..=40_000).map(|i| f64::from(i) * 1e-4).collect();
        let values: Vec<f64> = times
            .iter()
            .map(|&t| if t < 1.0 { 1.0 } else { 1.0 + step(t - 1.0) })
            .collect();
        let window = Window {
            begins: 1.0,
            quiet: 1.0,
            ends: 4.0,
        };
        let r = response_after(&times, &values, &window, 0.05, 0.0).unwrap();
        // From 1 to 2: the overshoot of 16.303 % of the step is half of that of the end value.
        assert!((r.overshoot - 0.163_033_5 / 2.0).abs() < 1e-5, "{r:?}");
        assert!(
            (r.peak_time - 1.0 - std::f64::consts::PI / wd).abs() < 2e-4,
            "{r:?}"
        );
        assert!(r.calm, "at rest in the end");
        // Last exit from +-0.1 around 2, found by bisection on the closed form.
        let (mut a, mut b) = (0.2, 0.6);
        let outside = |t: f64| (step(t) - 1.0).abs() > 0.1;
        for i in 0..6000 {
            let t = f64::from(i) * 1e-4;
            if outside(t) {
                a = t;
                b = t + 1e-4;
            }
        }
        assert!(
            r.settling >= a - 1e-4 && r.settling <= b + 1e-4,
            "{r:?}, {a} to {b}"
        );
    }

    #[test]
    fn hunting_is_not_calm_and_takes_the_whole_quiet_time() {
        let times: Vec<f64> = (0..2000).map(|i| f64::from(i) * 1e-3).collect();
        let values: Vec<f64> = times.iter().map(|t| 1.0 + 0.3 * (60.0 * t).sin()).collect();
        let window = Window {
            begins: 0.0,
            quiet: 0.0,
            ends: 1.999,
        };
        let r = response_after(&times, &values, &window, 0.05, 0.0).unwrap();
        assert!(!r.calm, "{r:?}");
        assert!(r.settling > 1.9, "{r:?}");
    }

    #[test]
    fn a_falling_flow_has_no_overshoot() {
        let times: Vec<f64> = (0..1000).map(|i| f64::from(i) * 1e-3).collect();
        let values: Vec<f64> = times.iter().map(|t| 1.0 + (-20.0 * t).exp()).collect();
        let window = Window {
            begins: 0.0,
            quiet: 0.0,
            ends: 0.999,
        };
        let r = response_after(&times, &values, &window, 0.05, 0.0).unwrap();
        assert!(r.overshoot < 1e-12, "{r:?}");
    }

    #[test]
    fn a_shut_port_gives_nothing() {
        let times: Vec<f64> = (0..100).map(f64::from).collect();
        let values = vec![1e-9; 100];
        let window = Window {
            begins: 0.0,
            quiet: 1.0,
            ends: 99.0,
        };
        assert!(
            response_after(&times, &values, &window, 0.05, 1e-6).is_none(),
            "no flow"
        );
    }
}
