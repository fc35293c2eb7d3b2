//! A scalar that knows which states it is computed from, whatever their values.
//!
//! One pass of the equations gives the places where the Jacobian can be other than zero at all.

use std::ops::{Add, AddAssign, Div, DivAssign, Mul, MulAssign, Neg, Sub, SubAssign};

use crate::real::Real;

/// A value and the states that it depends on. A part that rests (a shut check valve, a stop that is
/// not touched) counts as depending on what could wake it; see [`Real::constant_here`].
///
/// # Source
/// Griewank & Walther, *Evaluating Derivatives*, 2nd ed. 2008, ch. 7 (index domains).
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Dependence {
    value: f64,
    /// Bit `j` stands for state `j`.
    pub(crate) states: u128,
}

impl Dependence {
    /// State number `state`, below 128.
    pub(crate) fn state(value: f64, state: usize) -> Self {
        Self {
            value,
            states: 1 << state,
        }
    }

    fn join(self, other: Self, value: f64) -> Self {
        Self {
            value,
            states: self.states | other.states,
        }
    }

    fn map(self, value: f64) -> Self {
        Self { value, ..self }
    }
}

/// Operators with another dependence and with a parameter.
macro_rules! operators {
    ($($operator:ident $function:ident $assign:ident $assign_function:ident $sign:tt),*) => {$(
        impl $operator for Dependence {
            type Output = Self;
            fn $function(self, other: Self) -> Self {
                self.join(other, self.value $sign other.value)
            }
        }

        impl $operator<f64> for Dependence {
            type Output = Self;
            fn $function(self, other: f64) -> Self {
                self.map(self.value $sign other)
            }
        }

        impl $assign for Dependence {
            fn $assign_function(&mut self, other: Self) {
                *self = *self $sign other;
            }
        }
    )*};
}

operators!(
    Add add AddAssign add_assign +,
    Sub sub SubAssign sub_assign -,
    Mul mul MulAssign mul_assign *,
    Div div DivAssign div_assign /
);

impl Neg for Dependence {
    type Output = Self;
    fn neg(self) -> Self {
        self.map(-self.value)
    }
}

impl Real for Dependence {
    fn constant(value: f64) -> Self {
        Self { value, states: 0 }
    }

    fn constant_here<const K: usize>(value: f64, of: [Self; K]) -> Self {
        of.into_iter()
            .fold(Self::constant(value), |all, one| all.join(one, value))
    }

    fn choose(first: bool, one: Self, other: Self) -> Self {
        one.join(other, if first { one.value } else { other.value })
    }

    fn value(self) -> f64 {
        self.value
    }

    fn chain(self, f: f64, _df: f64) -> Self {
        self.map(f)
    }

    fn chain2(self, other: Self, f: f64, _by_self: f64, _by_other: f64) -> Self {
        self.join(other, f)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn branches_not_taken_count() {
        let (a, b) = (Dependence::state(-2.0, 3), Dependence::state(5.0, 7));
        assert_eq!((a * 2.0).max_with(0.0).states, 1 << 3, "held at its floor");
        assert_eq!(
            (b - 1.0).min_with(0.0).states,
            1 << 7,
            "held at its ceiling"
        );
        let chosen = Dependence::choose(true, a, b);
        assert_eq!(chosen.states, (1 << 3) | (1 << 7), "either side");
        assert!((chosen.value - a.value).abs() < 1e-300, "value of one");
        let shut = Dependence::constant_here(0.0, [a, b]);
        assert_eq!(shut.states, (1 << 3) | (1 << 7), "what could open it");
        assert_eq!(Dependence::constant(4.0).states, 0, "parameters");
    }

    #[test]
    fn operations_carry_the_states_of_both_sides() {
        let (a, b) = (Dependence::state(2.0, 0), Dependence::state(5.0, 127));
        let both = 1 | (1 << 127);
        for (result, value) in [(a + b, 7.0), (a - b, -3.0), (a * b, 10.0), (a / b, 0.4)] {
            assert_eq!(result.states, both, "at {value}");
            assert!((result.value - value).abs() < 1e-15, "{value}");
        }
        let mut sum = -a * 3.0;
        sum += b.sqrt();
        assert_eq!(sum.states, both, "assigned");
        assert_eq!(a.bivariate(b, |x, _| x).states, both, "leaves");
    }
}
