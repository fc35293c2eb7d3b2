//! Standard sizes.

/// A series of standard sizes.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Series {
    /// Twist drills.
    Drills,
    /// Displacements of pumps and steering units.
    Displacements,
    /// Bores of hoses.
    HoseBores,
    /// Settings of reliefs.
    Settings,
    /// Angles of chamfers and notches.
    Angles,
    /// Whole numbers.
    Counts,
}

/// Which of the sizes beside a result is meant.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Rounding {
    Nearest,
    Up,
}

/// The standard sizes beside a result.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Offer {
    /// The series.
    pub series: Series,
    /// Largest size not above the result, SI.
    pub below: Option<f64>,
    /// Smallest size not below the result, SI.
    pub above: Option<f64>,
    /// The one of both that the step is after; `None` beyond the series.
    pub pick: Option<f64>,
}

/// Bores of hoses, mm.
const BORES: [f64; 13] = [
    5.0, 6.3, 8.0, 10.0, 12.5, 16.0, 19.0, 25.0, 31.5, 38.0, 51.0, 63.0, 76.0,
];

/// Series R10 of preferred numbers, one decade.
const R10: [f64; 10] = [1.0, 1.25, 1.6, 2.0, 2.5, 3.15, 4.0, 5.0, 6.3, 8.0];

/// A size this near (relative) to a result is the result: two conversions may have rounded it.
const SAME: f64 = 1e-9;

impl Series {
    /// Where the series comes from.
    #[must_use]
    pub fn source(self) -> &'static str {
        match self {
            Self::Drills => "ISO 235 twist drills, value from memory",
            Self::Displacements => {
                "ISO 3662 displacements in series R10 of ISO 3, value from memory"
            }
            Self::HoseBores => "ISO 4397 nominal bores of hoses, value from memory",
            Self::Settings => "steps of 5 bar: common practice, no source",
            Self::Angles => "steps of half a degree: common practice, no source",
            Self::Counts => "whole numbers",
        }
    }

    /// Every size in SI, rising.
    fn sizes(self) -> Vec<f64> {
        // Whole numbers over whole numbers, so that each size is the nearest `f64` to its decimal.
        let steps = |from: u32, to: u32, step: usize, over: f64| {
            (from..=to)
                .step_by(step)
                .map(move |n| f64::from(n) / over)
                .collect::<Vec<f64>>()
        };
        match self {
            // mm: 0.2 to 3 by 0.05, to 14 by 0.1, to 32 by 0.25.
            Self::Drills => [
                steps(20, 300, 5, 1e5),
                steps(31, 140, 1, 1e4),
                steps(1425, 3200, 25, 1e5),
            ]
            .concat(),
            Self::Displacements => [1e-6, 1e-5, 1e-4, 1e-3]
                .iter()
                .flat_map(|decade| R10.map(|number| number * decade))
                .collect(),
            Self::HoseBores => BORES.iter().map(|mm| mm * 1e-3).collect(),
            Self::Settings => steps(1, 100, 1, 1.0).iter().map(|n| n * 5e5).collect(),
            Self::Angles => steps(1, 178, 1, 2.0)
                .iter()
                .map(|n| n.to_radians())
                .collect(),
            Self::Counts => steps(1, 64, 1, 1.0),
        }
    }

    /// The sizes beside a result in SI.
    pub(crate) fn beside(self, result: f64, rounding: Rounding) -> Offer {
        let sizes = self.sizes();
        let (low, high) = (result * (1.0 + SAME), result * (1.0 - SAME));
        let below = sizes.iter().copied().rev().find(|&size| size <= low);
        let above = sizes.iter().copied().find(|&size| size >= high);
        let pick = match (rounding, below, above) {
            (Rounding::Up, _, above) => above,
            (Rounding::Nearest, Some(below), Some(above)) => {
                Some(if result / below < above / result {
                    below
                } else {
                    above
                })
            }
            (Rounding::Nearest, _, _) => None,
        };
        Offer {
            series: self,
            below,
            above,
            pick,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const ALL: [Series; 6] = [
        Series::Drills,
        Series::Displacements,
        Series::HoseBores,
        Series::Settings,
        Series::Angles,
        Series::Counts,
    ];

    #[test]
    fn every_series_rises() {
        for series in ALL {
            let sizes = series.sizes();
            assert!(sizes.windows(2).all(|w| w[0] < w[1]), "{series:?}");
            assert!(sizes[0] > 0.0, "{series:?}");
        }
    }

    #[test]
    fn sizes_beside_a_result() {
        let close = |a: Option<f64>, b: f64| a.is_some_and(|a| (a / b - 1.0).abs() < 1e-12);
        let drill = Series::Drills.beside(3.67e-3, Rounding::Nearest);
        assert!(close(drill.below, 3.6e-3), "{drill:?}");
        assert!(close(drill.above, 3.7e-3), "{drill:?}");
        assert!(close(drill.pick, 3.7e-3), "{drill:?}");
        let hole = Series::Drills.beside(0.52e-3, Rounding::Nearest);
        assert!(close(hole.pick, 0.5e-3), "{hole:?}");
        let pump = Series::Displacements.beside(16.1e-6, Rounding::Up);
        assert!(close(pump.pick, 20e-6), "{pump:?}");
        let same = Series::Displacements.beside(125.000_000_01e-6, Rounding::Up);
        assert!(close(same.pick, 125e-6), "{same:?}");
        let bore = Series::HoseBores.beside(12.0e-3, Rounding::Up);
        assert!(close(bore.pick, 12.5e-3), "{bore:?}");
        let far = Series::HoseBores.beside(0.2, Rounding::Up);
        assert_eq!(far.pick, None, "beyond the series");
    }
}
