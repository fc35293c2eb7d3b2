//! Monotone cubic interpolation of a table, for land areas measured over travel.

use crate::real::Real;

/// A table of (abscissa, ordinate) with a monotone piecewise cubic through it, held constant
/// outside.
///
/// # Source
/// Fritsch & Carlson, *Monotone Piecewise Cubic Interpolation*, SIAM J. Numer. Anal. 17(2), 1980;
/// slopes by the harmonic mean of Fritsch & Butland, SIAM J. Sci. Stat. Comput. 5(2), 1984.
#[derive(Debug, Clone, PartialEq)]
pub struct MonotoneCubic {
    points: Vec<(f64, f64)>,
    slopes: Vec<f64>,
}

impl MonotoneCubic {
    /// Through at least two points with rising abscissas and ordinates that never fall; SI.
    ///
    /// # Errors
    /// The position (from 0) of the first point that does not fit.
    pub fn new(points: Vec<(f64, f64)>) -> Result<Self, usize> {
        if points.len() < 2 {
            return Err(points.len());
        }
        for (index, pair) in points.windows(2).enumerate() {
            let rises = pair[1].0 > pair[0].0 && pair[1].1 >= pair[0].1;
            let finite = pair.iter().all(|p| p.0.is_finite() && p.1.is_finite());
            if !(rises && finite) {
                return Err(index + 1);
            }
        }
        let slopes = slopes_of(&points);
        Ok(Self { points, slopes })
    }

    /// The table.
    #[must_use]
    pub fn points(&self) -> &[(f64, f64)] {
        &self.points
    }

    /// Ordinate and slope at `x`.
    #[inline(always)]
    pub fn at<S: Real>(&self, x: S) -> (S, S) {
        let (first, last) = (self.points[0], self.points[self.points.len() - 1]);
        if x.value() <= first.0 {
            return (S::constant_here(first.1, [x]), S::constant_here(0.0, [x]));
        }
        if x.value() >= last.0 {
            return (S::constant_here(last.1, [x]), S::constant_here(0.0, [x]));
        }
        let right = self.points.partition_point(|p| p.0 <= x.value());
        let ((x0, y0), (x1, y1)) = (self.points[right - 1], self.points[right]);
        let (m0, m1) = (self.slopes[right - 1], self.slopes[right]);
        let h = x1 - x0;
        let t = (x - x0) * (1.0 / h);
        let c2 = 3.0 * (y1 - y0) - h * (2.0 * m0 + m1);
        let c3 = 2.0 * (y0 - y1) + h * (m0 + m1);
        let value = ((t * c3 + c2) * t + h * m0) * t + y0;
        let slope = ((t * (3.0 * c3) + 2.0 * c2) * t + h * m0) * (1.0 / h);
        (value, slope)
    }
}

/// Slopes that keep the cubic monotone; flat at both ends, where it meets the constants outside.
fn slopes_of(points: &[(f64, f64)]) -> Vec<f64> {
    let secants: Vec<(f64, f64)> = points
        .windows(2)
        .map(|p| (p[1].0 - p[0].0, (p[1].1 - p[0].1) / (p[1].0 - p[0].0)))
        .collect();
    let mut slopes = vec![0.0; points.len()];
    for (slope, pair) in slopes.iter_mut().skip(1).zip(secants.windows(2)) {
        let ((h0, d0), (h1, d1)) = (pair[0], pair[1]);
        if d0 > 0.0 && d1 > 0.0 {
            let (w0, w1) = (2.0 * h1 + h0, h1 + 2.0 * h0);
            *slope = (w0 + w1) / (w0 / d0 + w1 / d1);
        }
    }
    slopes
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn passes_through_its_points_and_never_falls() {
        let points = vec![(0.0, 0.0), (1.0, 0.1), (2.0, 5.0), (3.0, 5.0), (4.0, 6.0)];
        let table = MonotoneCubic::new(points.clone()).unwrap();
        for (x, y) in points {
            assert!((table.at(x).0 - y).abs() < 1e-12, "at {x}");
        }
        let mut before = -1.0;
        for i in 0..500 {
            let y = table.at(f64::from(i) * 0.01 - 0.5).0;
            assert!(y >= before - 1e-14, "falls at {i}");
            before = y;
        }
    }

    #[test]
    fn refuses_a_falling_table() {
        let e = MonotoneCubic::new(vec![(0.0, 1.0), (1.0, 2.0), (2.0, 1.5)]);
        assert_eq!(e, Err(2), "third point falls");
    }
}
