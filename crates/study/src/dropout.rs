//! Steering dropout: the wheel asks for more oil than there is.

/// The longest stretch in which the wheel fell short.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Dropout {
    /// When it began, s.
    pub start: f64,
    /// How long it lasted, s.
    pub duration: f64,
    /// Mean shortfall over it, as a share of the commanded rate.
    pub share: f64,
}

/// One moment of the steering.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct WheelSample {
    /// Time, s.
    pub(crate) time: f64,
    /// Commanded wheel rate, rad/s.
    pub(crate) commanded: f64,
    /// Commanded less reached, rad/s.
    pub(crate) shortfall: f64,
    /// Whether the cylinder rests in the end stop that the wheel pushes it into: no fault then.
    pub(crate) locked: bool,
}

/// Wheel rate below which nobody would feel a shortfall, rad/s (about 1 rpm).
const FEELABLE: f64 = 0.1;

/// The longest dropout in `samples` (time order): the time over which the shortfall stays above
/// `threshold` as a share of the commanded rate. Between samples the excess over the threshold is
/// taken as linear. `None` if it never was.
#[must_use]
pub(crate) fn longest_of(samples: &[WheelSample], threshold: f64) -> Option<Dropout> {
    let excess = |s: &WheelSample| {
        if s.locked || s.commanded.abs() < FEELABLE {
            // Far below the threshold, but finite, so that a crossing can be placed.
            -threshold
        } else {
            s.shortfall / s.commanded - threshold
        }
    };
    let mut best: Option<Dropout> = None;
    let mut open: Option<(f64, f64, f64)> = None;
    for pair in samples.windows(2) {
        let (a, b) = (excess(&pair[0]), excess(&pair[1]));
        let (t0, t1) = (pair[0].time, pair[1].time);
        if a <= 0.0 && b <= 0.0 {
            continue;
        }
        let cross = if (a > 0.0) == (b > 0.0) {
            t0
        } else {
            t0 + (t1 - t0) * a / (a - b)
        };
        let from = if a > 0.0 { t0 } else { cross };
        let to = if b > 0.0 { t1 } else { cross };
        let (start, lost, asked) = open.unwrap_or((from, 0.0, 0.0));
        let part = if t1 > t0 { to - from } else { 0.0 };
        let lost = lost + 0.5 * part * (pair[0].shortfall.abs() + pair[1].shortfall.abs());
        let asked = asked + 0.5 * part * (pair[0].commanded.abs() + pair[1].commanded.abs());
        let dropout = Dropout {
            start,
            duration: to - start,
            share: if asked > 0.0 { lost / asked } else { 0.0 },
        };
        if best.is_none_or(|b| dropout.duration > b.duration) {
            best = Some(dropout);
        }
        open = (b > 0.0).then_some((start, lost, asked));
    }
    best.filter(|b| b.duration > 0.0)
}

/// The longest dropout of a steering wheel: times (s), commanded rate and shortfall (rad/s), and
/// whether the cylinder rests in the stop that the wheel pushes it into. `threshold` is the share
/// of the commanded rate that counts. The slices have one length.
#[must_use]
pub fn longest_dropout(
    times: &[f64],
    commanded: &[f64],
    shortfall: &[f64],
    locked: &[bool],
    threshold: f64,
) -> Option<Dropout> {
    let samples: Vec<_> = (0..times.len())
        .map(|i| WheelSample {
            time: times[i],
            commanded: commanded[i],
            shortfall: shortfall[i],
            locked: locked[i],
        })
        .collect();
    longest_of(&samples, threshold)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn finds_the_longest_stretch_and_its_share() {
        let times: Vec<f64> = (0..=1000).map(|i| f64::from(i) * 1e-3).collect();
        let commanded = vec![10.0; 1001];
        // Short by a fifth from 0.2 to 0.25 s and by half from 0.5 to 0.8 s.
        let shortfall: Vec<f64> = times
            .iter()
            .map(|&t| {
                if (0.2..=0.25).contains(&t) {
                    2.0
                } else if (0.5..=0.8).contains(&t) {
                    5.0
                } else {
                    0.0
                }
            })
            .collect();
        let free = vec![false; 1001];
        let d = longest_dropout(&times, &commanded, &shortfall, &free, 0.05).unwrap();
        assert!((d.start - 0.5).abs() < 2e-3, "{d:?}");
        assert!((d.duration - 0.3).abs() < 3e-3, "{d:?}");
        assert!((d.share - 0.5).abs() < 5e-3, "{d:?}");
    }

    #[test]
    fn at_the_lock_the_wheel_may_stop() {
        let times = [0.0, 1.0, 2.0];
        let d = longest_dropout(&times, &[9.0; 3], &[9.0; 3], &[true; 3], 0.05);
        assert_eq!(d, None, "resting in the stop is no dropout");
    }
}
