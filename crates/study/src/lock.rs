//! Stretches in which the steering is held at the lock.

/// The wheel pushes the cylinder into its stop.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LockHold {
    /// When the wheel was first turned towards the lock, s.
    pub pushed: f64,
    /// When the cylinder reached the stop, s.
    pub reached: f64,
    /// When it left the stop or the wheel let go, s.
    pub released: f64,
}

/// Distance from the stop within which the cylinder rests in it, m.
pub(crate) const LOCK_MARGIN: f64 = 0.5e-3;

/// Wheel rate below which the wheel is not pushed, rad/s (about 1 rpm).
const PUSHED: f64 = 0.1;

/// Whether a wheel turned at `rate` (rad/s) pushes a cylinder at `travel` (m from the middle) of
/// `stroke` (m) into the stop that it rests in.
#[must_use]
pub(crate) fn is_locked(rate: f64, travel: f64, stroke: f64) -> bool {
    rate.abs() > PUSHED && travel * rate.signum() > 0.5 * stroke - LOCK_MARGIN
}

/// The holds of a run that last at least `shortest` (s): times (s), commanded wheel rates
/// (rad/s), cylinder travels (m). The slices have one length.
#[must_use]
pub fn lock_holds(
    times: &[f64],
    rates: &[f64],
    travels: &[f64],
    stroke: f64,
    shortest: f64,
) -> Vec<LockHold> {
    let mut holds = Vec::new();
    let mut pushed: Option<f64> = None;
    let mut reached: Option<f64> = None;
    let mut side = 0.0;
    for i in 0..times.len() {
        let turning = rates[i].abs() > PUSHED;
        if !turning || (pushed.is_some() && (rates[i].signum() - side).abs() > 0.5) {
            close(&mut holds, pushed, reached.take(), times[i], shortest);
            pushed = None;
        }
        if turning && pushed.is_none() {
            pushed = Some(times[i]);
            side = rates[i].signum();
        }
        match (is_locked(rates[i], travels[i], stroke), reached) {
            (true, None) => reached = Some(times[i]),
            (false, Some(_)) => close(&mut holds, pushed, reached.take(), times[i], shortest),
            _ => {}
        }
    }
    if let Some(&last) = times.last() {
        close(&mut holds, pushed, reached, last, shortest);
    }
    holds
}

fn close(
    holds: &mut Vec<LockHold>,
    pushed: Option<f64>,
    reached: Option<f64>,
    released: f64,
    shortest: f64,
) {
    if let (Some(pushed), Some(reached)) = (pushed, reached)
        && released - reached >= shortest
    {
        holds.push(LockHold {
            pushed,
            reached,
            released,
        });
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn finds_a_hold_and_not_a_touch() {
        let times: Vec<f64> = (0..=500).map(|i| f64::from(i) * 0.01).collect();
        let rates: Vec<f64> = times
            .iter()
            .map(|&t| match t {
                t if t < 1.0 => 0.0,
                t if t < 3.0 => 9.0,
                t if t < 3.5 => 0.0,
                _ => -9.0,
            })
            .collect();
        let travels: Vec<f64> = times
            .iter()
            .map(|&t| (0.1 * (t - 1.0)).clamp(0.0, 0.1))
            .collect();
        let holds = lock_holds(&times, &rates, &travels, 0.2, 0.2);
        assert_eq!(holds.len(), 1, "{holds:?}");
        assert!((holds[0].pushed - 1.0).abs() < 0.02, "{holds:?}");
        assert!((holds[0].reached - 2.0).abs() < 0.02, "{holds:?}");
        assert!((holds[0].released - 3.0).abs() < 0.02, "{holds:?}");
        assert!(
            lock_holds(&times, &rates, &travels, 0.2, 5.0).is_empty(),
            "too short"
        );
    }
}
