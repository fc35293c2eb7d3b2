//! The way between a unit and SI, exact up to one rounding.
//!
//! A typed number is a decimal, a factor is a ratio of integers, and an `f64` is an integer times
//! a power of two: all three are rational, so their product is formed without any rounding and is
//! rounded once, at the very end.

use num_bigint::{BigInt, BigUint, Sign};

use super::decimal::{Decimal, digit_count, power_of_ten};
use super::ratio::Ratio;

/// Digits kept beyond the point where a quotient is cut. The cut is marked by a last digit, so
/// only a quotient closer than one part in 10^45 to the middle of two `f64` could round wrongly.
const QUOTIENT_DIGITS: u32 = 45;

/// `si = (value + shift) * top / bottom * 10^ten`: the way from a unit into SI, without rounding.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct Scale {
    top: BigUint,
    bottom: BigUint,
    ten: i32,
    shift: Decimal,
}

impl Scale {
    /// Builds a scale from decimal texts: the product of `times` over the product of `over`.
    /// Returns `None` when a text is not a decimal or a divisor is zero.
    pub(crate) fn from_texts(times: &[&str], over: &[&str], shift: &str) -> Option<Self> {
        let (top, top_ten) = product(times)?;
        let (bottom, bottom_ten) = product(over)?;
        if top == BigUint::ZERO || bottom == BigUint::ZERO {
            return None;
        }
        let shift = Decimal::from_text(shift)?;
        Some(Self {
            top,
            bottom,
            ten: top_ten - bottom_ten,
            shift,
        })
    }

    pub(crate) fn has_shift(&self) -> bool {
        !self.shift.is_zero()
    }

    /// The factor alone, rounded once.
    pub(crate) fn factor(&self) -> f64 {
        rounded_quotient(&self.top, &self.bottom, self.ten)
    }

    /// One over the factor, rounded once.
    pub(crate) fn inverse(&self) -> f64 {
        rounded_quotient(&self.bottom, &self.top, -self.ten)
    }

    /// What is added before the factor applies, rounded once.
    pub(crate) fn shift(&self) -> f64 {
        rounded_quotient(&self.shift.digits, &BigUint::from(1_u8), self.shift.ten)
    }

    /// The SI value of a decimal in this unit, rounded once to the nearest `f64`.
    /// Infinite when it does not fit.
    pub(crate) fn si_from_decimal(&self, value: &Decimal) -> f64 {
        if !self.has_shift() {
            let top = &value.digits * &self.top;
            let size = rounded_quotient(&top, &self.bottom, value.ten.saturating_add(self.ten));
            return if value.negative { -size } else { size };
        }
        let ten = value.ten.min(self.shift.ten);
        let raised =
            |part: &Decimal| part.signed() * BigInt::from(power_of_ten(part.ten.abs_diff(ten)));
        let sum = raised(value) + raised(&self.shift);
        let top = sum.magnitude() * &self.top;
        let size = rounded_quotient(&top, &self.bottom, ten.saturating_add(self.ten));
        if sum.sign() == Sign::Minus {
            -size
        } else {
            size
        }
    }

    /// The value in this unit of a finite SI number, exact.
    pub(crate) fn ratio_from_si(&self, si: f64) -> Ratio {
        let (mantissa, two) = parts(si);
        let mut top = BigInt::from(mantissa) * BigInt::from(self.bottom.clone());
        let mut bottom = self.top.clone();
        shift_two(&mut top, &mut bottom, two);
        if self.ten > 0 {
            bottom *= power_of_ten(self.ten.unsigned_abs());
        } else {
            top *= BigInt::from(power_of_ten(self.ten.unsigned_abs()));
        }
        let negative_zero = mantissa == 0 && si.is_sign_negative();
        if self.has_shift() {
            let down = power_of_ten(self.shift.ten.unsigned_abs());
            top = top * BigInt::from(down.clone())
                - self.shift.signed() * BigInt::from(bottom.clone());
            bottom *= down;
        }
        let negative = top.sign() == Sign::Minus || (negative_zero && !self.has_shift());
        Ratio {
            negative,
            top: top.into_parts().1,
            bottom,
        }
    }
}

/// `top / bottom * 10^ten` as the nearest `f64`; infinite when too large, zero when too small.
fn rounded_quotient(top: &BigUint, bottom: &BigUint, ten: i32) -> f64 {
    let missing = (QUOTIENT_DIGITS + digit_count(bottom)).saturating_sub(digit_count(top));
    let raised = top * power_of_ten(missing);
    let mut quotient = &raised / bottom;
    let mut ten = i64::from(ten) - i64::from(missing);
    if &quotient * bottom != raised {
        quotient = quotient * 10_u8 + 1_u8;
        ten -= 1;
    }
    // The standard library rounds any decimal text to the nearest f64, however long it is.
    format!("{quotient}e{ten}").parse().unwrap_or(f64::NAN)
}

fn product(texts: &[&str]) -> Option<(BigUint, i32)> {
    let mut digits = BigUint::from(1_u8);
    let mut ten = 0;
    for text in texts {
        let factor = Decimal::from_text(text)?;
        digits *= factor.digits;
        ten += factor.ten;
    }
    Some((digits, ten))
}

/// Integer and power of two of a finite `f64`: `si = mantissa * 2^two`, exact.
fn parts(si: f64) -> (i64, i32) {
    const FRACTION_BITS: u32 = 52;
    const BIAS: i32 = 1075;
    let bits = si.to_bits();
    // Masks leave 11 and 52 bits, so neither conversion can lose anything.
    let exponent = ((bits >> FRACTION_BITS) & 0x7ff) as i32;
    let fraction = (bits & ((1 << FRACTION_BITS) - 1)) as i64;
    let (mantissa, two) = if exponent == 0 {
        (fraction, 1 - BIAS)
    } else {
        (fraction | (1 << FRACTION_BITS), exponent - BIAS)
    };
    if si.is_sign_negative() {
        (-mantissa, two)
    } else {
        (mantissa, two)
    }
}

fn shift_two(top: &mut BigInt, bottom: &mut BigUint, two: i32) {
    if two >= 0 {
        *top <<= two.unsigned_abs();
    } else {
        *bottom <<= two.unsigned_abs();
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn scale(times: &[&str], over: &[&str], shift: &str) -> Scale {
        Scale::from_texts(times, over, shift).expect("a valid scale")
    }

    #[test]
    fn a_decimal_factor_gives_the_bits_of_the_literal() {
        let mm = scale(&["0.001"], &[], "0");
        for (text, literal) in [
            ("3.7", 0.0037_f64),
            ("0.45", 0.00045),
            ("20", 0.02),
            ("1e-3", 1e-6),
        ] {
            let decimal = Decimal::from_text(text).expect("a decimal");
            let si = mm.si_from_decimal(&decimal);
            assert_eq!(
                si.to_bits(),
                literal.to_bits(),
                "{text} mm must be the literal {literal}"
            );
        }
    }

    #[test]
    fn every_bit_pattern_is_taken_apart_exactly() {
        for si in [
            1.0_f64,
            -0.1,
            5e-324,
            f64::MIN_POSITIVE,
            f64::MAX,
            1.5e-310,
            0.0,
        ] {
            let (mantissa, two) = parts(si);
            let half = two / 2;
            // Two steps, because 2^-1074 alone would underflow the power function's range.
            let back = (mantissa as f64) * 2_f64.powi(half) * 2_f64.powi(two - half);
            assert_eq!(back.to_bits(), si.to_bits(), "{si:e} must come back");
        }
    }
}
