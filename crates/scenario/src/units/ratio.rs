//! An exact fraction on its way to a decimal text.

use num_bigint::BigUint;

use super::decimal::{Decimal, digit_count, power_of_ten};

/// An exact fraction, ready to be rounded to a decimal.
#[derive(Debug, Clone)]
pub(crate) struct Ratio {
    pub(super) negative: bool,
    pub(super) top: BigUint,
    pub(super) bottom: BigUint,
}

impl Ratio {
    /// The nearest decimal with at most `count` significant digits (halves away from zero).
    pub(crate) fn significant(&self, count: u32) -> Decimal {
        if self.top == BigUint::ZERO {
            return Decimal::new(self.negative, BigUint::ZERO, 0);
        }
        let limit = power_of_ten(count);
        let size = |number: &BigUint| i64::from(digit_count(number));
        let estimate = size(&self.top) - size(&self.bottom) - i64::from(count);
        // An f64 spans 10^-324 to 10^309 and factors a few tens more, so this always fits.
        let mut ten = i32::try_from(estimate).unwrap_or(0);
        loop {
            let digits = self.rounded(ten);
            if digits <= limit {
                return Decimal::new(self.negative, digits, ten);
            }
            ten += 1;
        }
    }

    /// The nearest decimal with exactly `places` digits behind the point.
    pub(crate) fn places(&self, places: u32) -> Decimal {
        let ten = -i32::try_from(places.min(400)).unwrap_or(400);
        let digits = self.rounded(ten);
        // A value that rounds to zero is shown without a sign.
        let negative = self.negative && digits != BigUint::ZERO;
        Decimal::new(negative, digits, ten)
    }

    /// The decimals one step below and above `decimal` in its last place.
    pub(crate) fn neighbours(decimal: &Decimal) -> [Decimal; 2] {
        let one = BigUint::from(1_u8);
        let less = if decimal.is_zero() {
            BigUint::ZERO
        } else {
            &decimal.digits - &one
        };
        let more = &decimal.digits + one;
        [less, more].map(|digits| Decimal::new(decimal.negative, digits, decimal.ten))
    }

    /// `top / bottom / 10^ten`, rounded to the nearest integer.
    fn rounded(&self, ten: i32) -> BigUint {
        let power = power_of_ten(ten.unsigned_abs());
        let (top, bottom) = if ten >= 0 {
            (self.top.clone(), &self.bottom * power)
        } else {
            (&self.top * power, self.bottom.clone())
        };
        (top * 2_u8 + &bottom) / (bottom * 2_u8)
    }
}

#[cfg(test)]
mod tests {
    use crate::units::Scale;

    fn plain() -> Scale {
        Scale::from_texts(&["1"], &[], "0").expect("a valid scale")
    }

    #[test]
    fn significant_rounding_carries() {
        let one = plain();
        let text = |si: f64, count| one.ratio_from_si(si).significant(count).to_text(None);
        assert_eq!(text(999.6, 3), "1000", "rounding up adds a digit");
        assert_eq!(text(999.4, 3), "999", "rounding down keeps three digits");
        assert_eq!(
            text(-0.000_123_456, 2),
            "-0.00012",
            "leading zeros are not digits"
        );
        assert_eq!(
            text(1.234e-9, 3),
            "1.23e-9",
            "small values use a power of ten"
        );
        assert_eq!(text(5.0e20, 3), "5e20", "large values use a power of ten");
    }

    #[test]
    fn places_keep_their_zeros() {
        let one = plain();
        let text = |si: f64, places| one.ratio_from_si(si).places(places).to_text(Some(places));
        assert_eq!(text(20.0, 2), "20.00", "zeros stay");
        assert_eq!(text(0.004, 2), "0.00", "small values show as zero");
        assert_eq!(text(-0.004, 2), "0.00", "no sign on a shown zero");
        assert_eq!(text(9.999, 1), "10.0", "carry into the whole part");
        assert_eq!(text(12.5, 0), "13", "no point without places");
    }
}
