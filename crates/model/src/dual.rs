//! A dual number of fixed width: one value and `N` partial derivatives.
//!
//! One pass of the equations with as many columns as there are states gives the exact Jacobian.

use std::ops::{Add, AddAssign, Div, DivAssign, Mul, MulAssign, Neg, Sub, SubAssign};

use crate::real::Real;

/// Value and `N` partial derivatives (forward-mode automatic differentiation).
///
/// # Source
/// Griewank & Walther, *Evaluating Derivatives*, 2nd ed. 2008, ch. 3 (forward mode).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Dual<const N: usize> {
    /// The value.
    pub value: f64,
    /// The partial derivatives.
    pub slopes: [f64; N],
}

impl<const N: usize> Dual<N> {
    /// A variable: derivative 1 in column `column`, 0 elsewhere. A column outside the width gives
    /// a constant, so that a pass over some of the columns needs no special case.
    #[inline(always)]
    #[must_use]
    pub fn variable(value: f64, column: usize) -> Self {
        let mut slopes = [0.0; N];
        if let Some(slope) = slopes.get_mut(column) {
            *slope = 1.0;
        }
        Self { value, slopes }
    }

    #[inline(always)]
    fn map(self, value: f64, f: impl Fn(f64) -> f64) -> Self {
        Self {
            value,
            slopes: std::array::from_fn(|i| f(self.slopes[i])),
        }
    }

    #[inline(always)]
    fn zip(self, other: Self, value: f64, f: impl Fn(f64, f64) -> f64) -> Self {
        Self {
            value,
            slopes: std::array::from_fn(|i| f(self.slopes[i], other.slopes[i])),
        }
    }
}

impl<const N: usize> Add for Dual<N> {
    type Output = Self;
    #[inline(always)]
    fn add(self, other: Self) -> Self {
        self.zip(other, self.value + other.value, |a, b| a + b)
    }
}

impl<const N: usize> Sub for Dual<N> {
    type Output = Self;
    #[inline(always)]
    fn sub(self, other: Self) -> Self {
        self.zip(other, self.value - other.value, |a, b| a - b)
    }
}

impl<const N: usize> Mul for Dual<N> {
    type Output = Self;
    #[inline(always)]
    #[allow(clippy::suspicious_arithmetic_impl, reason = "the product rule adds")]
    fn mul(self, other: Self) -> Self {
        let (x, y) = (self.value, other.value);
        self.zip(other, x * y, |a, b| a * y + b * x)
    }
}

impl<const N: usize> Div for Dual<N> {
    type Output = Self;
    #[inline(always)]
    fn div(self, other: Self) -> Self {
        let inverse = 1.0 / other.value;
        let quotient = self.value * inverse;
        self.zip(other, quotient, |a, b| (a - b * quotient) * inverse)
    }
}

impl<const N: usize> Neg for Dual<N> {
    type Output = Self;
    #[inline(always)]
    fn neg(self) -> Self {
        self.map(-self.value, |a| -a)
    }
}

impl<const N: usize> Add<f64> for Dual<N> {
    type Output = Self;
    #[inline(always)]
    fn add(self, other: f64) -> Self {
        Self {
            value: self.value + other,
            ..self
        }
    }
}

impl<const N: usize> Sub<f64> for Dual<N> {
    type Output = Self;
    #[inline(always)]
    fn sub(self, other: f64) -> Self {
        Self {
            value: self.value - other,
            ..self
        }
    }
}

impl<const N: usize> Mul<f64> for Dual<N> {
    type Output = Self;
    #[inline(always)]
    fn mul(self, other: f64) -> Self {
        self.map(self.value * other, |a| a * other)
    }
}

impl<const N: usize> Div<f64> for Dual<N> {
    type Output = Self;
    #[inline(always)]
    fn div(self, other: f64) -> Self {
        let inverse = 1.0 / other;
        self.map(self.value / other, |a| a * inverse)
    }
}

impl<const N: usize> AddAssign for Dual<N> {
    #[inline(always)]
    fn add_assign(&mut self, other: Self) {
        *self = *self + other;
    }
}

impl<const N: usize> SubAssign for Dual<N> {
    #[inline(always)]
    fn sub_assign(&mut self, other: Self) {
        *self = *self - other;
    }
}

impl<const N: usize> MulAssign for Dual<N> {
    #[inline(always)]
    fn mul_assign(&mut self, other: Self) {
        *self = *self * other;
    }
}

impl<const N: usize> DivAssign for Dual<N> {
    #[inline(always)]
    fn div_assign(&mut self, other: Self) {
        *self = *self / other;
    }
}

impl<const N: usize> Real for Dual<N> {
    #[inline(always)]
    fn constant(value: f64) -> Self {
        Self {
            value,
            slopes: [0.0; N],
        }
    }

    #[inline(always)]
    fn value(self) -> f64 {
        self.value
    }

    #[inline(always)]
    fn chain(self, f: f64, df: f64) -> Self {
        self.map(f, |a| a * df)
    }

    #[inline(always)]
    fn chain2(self, other: Self, f: f64, by_self: f64, by_other: f64) -> Self {
        self.zip(other, f, |a, b| a * by_self + b * by_other)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A function that touches every operation, with its derivative by central differences.
    fn every_operation<S: Real>(x: S) -> S {
        let mut y = (x * x + 1.0).sqrt() / (x.exp() + 2.0) - (x * 0.5).tanh();
        y += (x + 3.0).ln() * (x * 0.3).cos();
        y -= (x + 2.0).powf(1.7) / 4.0;
        y *= -x;
        y /= (x - 9.0).abs() + x.max_with(0.5).min_with(4.0);
        y
    }

    #[test]
    fn slopes_agree_with_central_differences() {
        for x in [0.21, 0.77, 1.9, 3.3] {
            let dual = every_operation(Dual::<3>::variable(x, 1));
            let h = 1e-6;
            let slope = (every_operation(x + h) - every_operation(x - h)) / (2.0 * h);
            assert!(
                (dual.value - every_operation(x)).abs() < 1e-15,
                "value at {x}"
            );
            assert!((dual.slopes[1] - slope).abs() < 1e-8, "slope at {x}");
            assert!(
                dual.slopes[0].abs() + dual.slopes[2].abs() < 1e-300,
                "other columns stay 0"
            );
        }
    }

    #[test]
    fn a_column_outside_the_width_is_a_constant() {
        let dual = Dual::<2>::variable(4.0, 7);
        assert_eq!(dual, Dual::constant(4.0), "no column to seed");
    }
}
