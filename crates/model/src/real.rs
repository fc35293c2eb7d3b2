//! The scalar that every equation is written for.
//!
//! States and everything computed from them are generic; parameters stay `f64`, which is why
//! mixed operators with `f64` on the right are part of the trait. Write `x * 2.0`.

use crate::dual::Dual;

use std::ops::{Add, AddAssign, Div, DivAssign, Mul, MulAssign, Neg, Sub, SubAssign};

/// A real number that carries its value and, where it is a dual number, its derivatives.
pub trait Real:
    Copy
    + Add<Output = Self>
    + Sub<Output = Self>
    + Mul<Output = Self>
    + Div<Output = Self>
    + Neg<Output = Self>
    + AddAssign
    + SubAssign
    + MulAssign
    + DivAssign
    + Add<f64, Output = Self>
    + Sub<f64, Output = Self>
    + Mul<f64, Output = Self>
    + Div<f64, Output = Self>
{
    /// A constant: derivatives are zero.
    fn constant(value: f64) -> Self;

    /// A constant here, where a branch on values gives one, though these numbers decide elsewhere:
    /// a shut check valve, a stop that is not touched. Derivatives are zero, but who asks what
    /// depends on what ([`crate::Circuit::jacobian`] does, once a circuit) must hear of them.
    #[inline(always)]
    #[must_use]
    fn constant_here<const K: usize>(value: f64, _of: [Self; K]) -> Self {
        Self::constant(value)
    }

    /// One of two numbers, chosen by values or inputs. Write this and no `if` where the two depend
    /// on different states, for the same reason as [`Self::constant_here`].
    #[inline(always)]
    #[must_use]
    fn choose(first: bool, one: Self, other: Self) -> Self {
        if first { one } else { other }
    }

    /// The value without derivatives.
    fn value(self) -> f64;

    /// `f(x)` by the chain rule, from the value of `f` and of its derivative at `self.value()`.
    #[must_use]
    fn chain(self, f: f64, df: f64) -> Self;

    /// `f(x, y)` by the chain rule, from the value of `f` and of both partial derivatives.
    #[must_use]
    fn chain2(self, other: Self, f: f64, by_self: f64, by_other: f64) -> Self;

    /// Takes over a function of this number that was computed in a narrow dual number, seeded with
    /// [`Dual::variable`] in column 0.
    #[inline(always)]
    #[must_use]
    fn widen(self, narrow: Dual<1>) -> Self {
        self.chain(narrow.value, narrow.slopes[0])
    }

    /// Same for a function of this number (column 0) and another (column 1).
    #[inline(always)]
    #[must_use]
    fn widen2(self, other: Self, narrow: Dual<2>) -> Self {
        self.chain2(other, narrow.value, narrow.slopes[0], narrow.slopes[1])
    }

    /// A function of this number alone, differentiated once in a narrow dual number instead of in
    /// every column: what a leaf of the equations should use when it takes several operations.
    /// A closure that grows large and is called from several places may not be inlined, and then
    /// computes its derivative for `f64` too; such leaves call [`Self::widen`] themselves.
    #[inline(always)]
    #[must_use]
    fn univariate(self, f: impl FnOnce(Dual<1>) -> Dual<1>) -> Self {
        self.widen(f(Dual::variable(self.value(), 0)))
    }

    /// Same for a function of two numbers.
    #[inline(always)]
    #[must_use]
    fn bivariate(self, other: Self, f: impl FnOnce(Dual<2>, Dual<2>) -> Dual<2>) -> Self {
        let (x, y) = (
            Dual::variable(self.value(), 0),
            Dual::variable(other.value(), 1),
        );
        self.widen2(other, f(x, y))
    }

    /// Square root; the derivative at 0 is infinite, so call sites keep the argument positive.
    #[inline(always)]
    #[must_use]
    fn sqrt(self) -> Self {
        let root = self.value().sqrt();
        self.chain(root, 0.5 / root)
    }

    /// Natural exponential.
    #[inline(always)]
    #[must_use]
    fn exp(self) -> Self {
        let e = self.value().exp();
        self.chain(e, e)
    }

    /// Natural logarithm.
    #[inline(always)]
    #[must_use]
    fn ln(self) -> Self {
        let x = self.value();
        self.chain(x.ln(), 1.0 / x)
    }

    /// Power with a constant exponent; the base must be positive.
    #[inline(always)]
    #[must_use]
    fn powf(self, exponent: f64) -> Self {
        let power = self.value().powf(exponent);
        self.chain(power, exponent * power / self.value())
    }

    /// Hyperbolic tangent.
    #[inline(always)]
    #[must_use]
    fn tanh(self) -> Self {
        let t = self.value().tanh();
        self.chain(t, 1.0 - t * t)
    }

    /// Cosine of an angle in rad.
    #[inline(always)]
    #[must_use]
    fn cos(self) -> Self {
        let (sin, cos) = self.value().sin_cos();
        self.chain(cos, -sin)
    }

    /// Absolute value; the derivative at 0 is taken from the right.
    #[inline(always)]
    #[must_use]
    fn abs(self) -> Self {
        if self.value() < 0.0 { -self } else { self }
    }

    /// The larger of the value and a constant; the derivative follows the chosen side.
    #[inline(always)]
    #[must_use]
    fn max_with(self, floor: f64) -> Self {
        if self.value() < floor {
            Self::constant_here(floor, [self])
        } else {
            self
        }
    }

    /// The smaller of the value and a constant; the derivative follows the chosen side.
    #[inline(always)]
    #[must_use]
    fn min_with(self, ceiling: f64) -> Self {
        if self.value() > ceiling {
            Self::constant_here(ceiling, [self])
        } else {
            self
        }
    }
}

impl Real for f64 {
    #[inline(always)]
    fn constant(value: f64) -> Self {
        value
    }

    #[inline(always)]
    fn value(self) -> f64 {
        self
    }

    #[inline(always)]
    fn chain(self, f: f64, _df: f64) -> Self {
        f
    }

    #[inline(always)]
    fn chain2(self, _other: Self, f: f64, _by_self: f64, _by_other: f64) -> Self {
        f
    }
}
