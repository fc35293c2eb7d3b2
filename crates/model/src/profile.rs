//! Inputs over time: piecewise linear, a repeated time is a jump (M10).

/// What acts on a circuit from outside, as a function of time.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub enum Input {
    /// Speed of the pump shaft, or the set speed of a governed prime mover, rad/s.
    EngineSpeed,
    /// Rate at which the driver turns the steering wheel, rad/s, positive to extend chamber A.
    WheelRate,
    /// Force on the steering cylinder against positive travel, N.
    ExternalForce,
    /// Area of the bench throttle on the priority port, m2.
    BenchArea,
    /// Pressure behind the bench throttle on the priority port, Pa gauge.
    BenchPressure,
    /// Pressure behind the bench throttle on the excess port, Pa gauge.
    ExcessPressure,
    /// Command of the excess consumer: 0 off to 1 fully on; -1 to 1 for the lift cylinder.
    ExcessCommand,
    /// Command of a hydraulic motor on the priority port, 0 off to 1 fully on.
    PriorityCommand,
}

impl Input {
    /// Every input, in the order of [`Inputs`].
    pub const ALL: [Self; 8] = [
        Self::EngineSpeed,
        Self::WheelRate,
        Self::ExternalForce,
        Self::BenchArea,
        Self::BenchPressure,
        Self::ExcessPressure,
        Self::ExcessCommand,
        Self::PriorityCommand,
    ];
}

/// The value of every input at one moment, SI.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Inputs {
    values: [f64; Input::ALL.len()],
}

impl Inputs {
    /// The value of one input.
    #[inline(always)]
    #[must_use]
    pub fn get(&self, input: Input) -> f64 {
        self.values[input as usize]
    }

    /// Sets one input.
    pub fn set(&mut self, input: Input, value: f64) {
        self.values[input as usize] = value;
    }
}

/// One input over time: linear between points, held before the first and after the last.
#[derive(Debug, Clone, PartialEq)]
pub struct Profile {
    points: Vec<(f64, f64)>,
}

/// Why a list of points is no profile.
#[derive(Debug, Clone, PartialEq)]
pub enum ProfileError {
    /// There is no point at all.
    Empty,
    /// Point `index` lies before the point ahead of it.
    OutOfOrder {
        /// Position in the list, from 0.
        index: usize,
    },
    /// Point `index` has a time or value that is not finite.
    NotFinite {
        /// Position in the list, from 0.
        index: usize,
    },
    /// More than two points share one time.
    TripleTime {
        /// Position of the third, from 0.
        index: usize,
    },
}

impl std::fmt::Display for ProfileError {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        match self {
            Self::Empty => write!(f, "a profile needs at least one point"),
            Self::OutOfOrder { index } => {
                write!(f, "point {} lies before the point ahead of it", index + 1)
            }
            Self::NotFinite { index } => write!(f, "point {} is not a finite number", index + 1),
            Self::TripleTime { index } => {
                write!(
                    f,
                    "point {} is the third at one time; a jump takes two",
                    index + 1
                )
            }
        }
    }
}

impl std::error::Error for ProfileError {}

impl Profile {
    /// A profile through `points` of (time in s, value in SI), times not decreasing; two points
    /// at one time are a jump.
    ///
    /// # Errors
    /// [`ProfileError`] names the first point that does not fit.
    pub fn new(points: Vec<(f64, f64)>) -> Result<Self, ProfileError> {
        if points.is_empty() {
            return Err(ProfileError::Empty);
        }
        for (index, &(time, value)) in points.iter().enumerate() {
            if !(time.is_finite() && value.is_finite()) {
                return Err(ProfileError::NotFinite { index });
            }
        }
        for index in 1..points.len() {
            if points[index].0 < points[index - 1].0 {
                return Err(ProfileError::OutOfOrder { index });
            }
            if index >= 2 && points[index].0 <= points[index - 2].0 {
                return Err(ProfileError::TripleTime { index });
            }
        }
        Ok(Self { points })
    }

    /// A value that never changes.
    #[must_use]
    pub fn constant(value: f64) -> Self {
        Self {
            points: vec![(0.0, value)],
        }
    }

    /// The points (time in s, value in SI).
    #[must_use]
    pub fn points(&self) -> &[(f64, f64)] {
        &self.points
    }

    /// The value at `time`; at a jump the value after it.
    #[must_use]
    pub fn at(&self, time: f64) -> f64 {
        let after = self.points.partition_point(|p| p.0 <= time);
        if after == 0 {
            return self.points[0].1;
        }
        let (t0, v0) = self.points[after - 1];
        match self.points.get(after) {
            Some(&(t1, v1)) => v0 + (v1 - v0) * ((time - t0) / (t1 - t0)),
            None => v0,
        }
    }

    /// Value at `from` (after a jump there) and slope on the piece that follows `from`.
    fn piece(&self, from: f64) -> (f64, f64) {
        let after = self.points.partition_point(|p| p.0 <= from);
        let slope = match (after.checked_sub(1), self.points.get(after)) {
            (Some(before), Some(&(t1, v1))) => {
                let (t0, v0) = self.points[before];
                (v1 - v0) / (t1 - t0)
            }
            _ => 0.0,
        };
        (self.at(from), slope)
    }
}

/// All inputs over time.
#[derive(Debug, Clone, PartialEq)]
pub struct InputProfiles {
    profiles: [Profile; Input::ALL.len()],
}

impl Default for InputProfiles {
    fn default() -> Self {
        Self {
            profiles: std::array::from_fn(|_| Profile::constant(0.0)),
        }
    }
}

/// A moment at which the inputs bend or jump.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Breakpoint {
    /// Time, s.
    pub time: f64,
    /// Whether an input jumps here; else it only bends.
    pub jump: bool,
}

/// Breakpoints closer than this (s) are one: no machine is driven that finely, and the solver
/// cannot stop twice at one time.
pub const BREAKPOINT_SPACING: f64 = 1e-9;

impl InputProfiles {
    /// The profile of one input.
    #[must_use]
    pub fn get(&self, input: Input) -> &Profile {
        &self.profiles[input as usize]
    }

    /// Replaces the profile of one input.
    pub fn set(&mut self, input: Input, profile: Profile) {
        self.profiles[input as usize] = profile;
    }

    /// All inputs at `time`; at a jump the values after it.
    #[must_use]
    pub fn at(&self, time: f64) -> Inputs {
        let mut inputs = Inputs::default();
        for input in Input::ALL {
            inputs.set(input, self.get(input).at(time));
        }
        inputs
    }

    /// Breakpoints strictly between `start` and `end`, in order, merged where they are closer
    /// than [`BREAKPOINT_SPACING`].
    #[must_use]
    pub fn breakpoints(&self, start: f64, end: f64) -> Vec<Breakpoint> {
        let mut all: Vec<Breakpoint> = Vec::new();
        for profile in &self.profiles {
            for (index, &(time, value)) in profile.points.iter().enumerate() {
                let inside = time > start + BREAKPOINT_SPACING && time < end - BREAKPOINT_SPACING;
                if !inside {
                    continue;
                }
                let jump = index > 0
                    && time - profile.points[index - 1].0 < BREAKPOINT_SPACING
                    && (value - profile.points[index - 1].1).abs() > 0.0;
                all.push(Breakpoint { time, jump });
            }
        }
        all.sort_by(|a, b| a.time.total_cmp(&b.time));
        let mut merged: Vec<Breakpoint> = Vec::new();
        for point in all {
            match merged.last_mut() {
                Some(last) if point.time - last.time < BREAKPOINT_SPACING => {
                    last.jump |= point.jump;
                }
                _ => merged.push(point),
            }
        }
        merged
    }

    /// The straight pieces that hold from `from` to the next breakpoint. The solver evaluates
    /// these and never the profiles, so that a step that ends on a breakpoint sees one side only.
    #[must_use]
    pub fn segment(&self, from: f64) -> InputSegment {
        // Half a spacing later: a point merged into this breakpoint must not be missed.
        let inside = from + 0.5 * BREAKPOINT_SPACING;
        let mut values = Inputs::default();
        let mut slopes = Inputs::default();
        for input in Input::ALL {
            let (value, slope) = self.get(input).piece(inside);
            values.set(input, value - slope * (inside - from));
            slopes.set(input, slope);
        }
        InputSegment {
            start: from,
            values,
            slopes,
        }
    }
}

/// Inputs that change linearly from a start time on.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct InputSegment {
    start: f64,
    values: Inputs,
    slopes: Inputs,
}

impl InputSegment {
    /// Inputs that never change.
    #[must_use]
    pub fn frozen(values: Inputs) -> Self {
        Self {
            start: 0.0,
            values,
            slopes: Inputs::default(),
        }
    }

    /// The inputs at `time` (s).
    #[inline(always)]
    #[must_use]
    pub fn at(&self, time: f64) -> Inputs {
        let dt = time - self.start;
        let mut out = self.values;
        for (value, slope) in out.values.iter_mut().zip(self.slopes.values) {
            *value += slope * dt;
        }
        out
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn close(a: f64, b: f64) -> bool {
        (a - b).abs() < 1e-12
    }

    #[test]
    fn holds_outside_and_is_linear_between() {
        let p = Profile::new(vec![(1.0, 2.0), (3.0, 6.0)]).unwrap();
        assert!(close(p.at(0.0), 2.0), "held before");
        assert!(close(p.at(2.0), 4.0), "between");
        assert!(close(p.at(9.0), 6.0), "held after");
    }

    #[test]
    fn a_jump_shows_one_side_to_each_segment() {
        let p = Profile::new(vec![(0.0, 0.0), (1.0, 0.0), (1.0, 5.0), (2.0, 7.0)]).unwrap();
        let mut all = InputProfiles::default();
        all.set(Input::WheelRate, p);
        let before = all.segment(0.0);
        let after = all.segment(1.0);
        assert!(
            close(before.at(1.0).get(Input::WheelRate), 0.0),
            "left side"
        );
        assert!(
            close(after.at(1.0).get(Input::WheelRate), 5.0),
            "right side"
        );
        assert!(
            close(after.at(1.5).get(Input::WheelRate), 6.0),
            "slope after the jump"
        );
        let stops = all.breakpoints(0.0, 2.0);
        assert_eq!(stops.len(), 1, "the repeated time is one stop");
        assert!(stops[0].jump, "and it jumps");
    }

    #[test]
    fn refuses_points_out_of_order() {
        let e = Profile::new(vec![(1.0, 0.0), (0.5, 0.0)]).unwrap_err();
        assert_eq!(e, ProfileError::OutOfOrder { index: 1 }, "second point");
        assert!(Profile::new(vec![(0.0, f64::NAN)]).is_err(), "not a number");
    }
}
