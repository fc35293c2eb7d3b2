//! Decimal numbers as people type and read them, held exactly.

use num_bigint::{BigInt, BigUint, Sign};

/// A decimal number `digits * 10^ten`, exact.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct Decimal {
    /// Sign of a typed zero, which the integer cannot carry.
    pub(super) negative: bool,
    pub(super) digits: BigUint,
    pub(super) ten: i32,
}

impl Decimal {
    /// Reads a plain decimal such as `3.7`, `-0.5`, `.25` or `1.2e-3`.
    /// Returns `None` when the text is anything else, or its exponent has over six digits.
    pub(crate) fn from_text(text: &str) -> Option<Self> {
        let (negative, body) = match text.strip_prefix('-') {
            Some(rest) => (true, rest),
            None => (false, text.strip_prefix('+').unwrap_or(text)),
        };
        let (mantissa, exponent) = match body.split_once(['e', 'E']) {
            Some((mantissa, exponent)) => (mantissa, exponent_from_text(exponent)?),
            None => (body, 0),
        };
        let (whole, fraction) = mantissa.split_once('.').unwrap_or((mantissa, ""));
        let digits = format!("{whole}{fraction}");
        if digits.is_empty() || !digits.bytes().all(|byte| byte.is_ascii_digit()) {
            return None;
        }
        let ten = exponent - i32::try_from(fraction.len()).ok()?;
        let digits = BigUint::parse_bytes(digits.as_bytes(), 10)?;
        // The power of ten of a zero says nothing, however large it is.
        let ten = if digits == BigUint::ZERO { 0 } else { ten };
        Some(Self {
            negative,
            digits,
            ten,
        })
    }

    pub(crate) fn new(negative: bool, digits: BigUint, ten: i32) -> Self {
        Self {
            negative,
            digits,
            ten,
        }
    }

    pub(crate) fn is_zero(&self) -> bool {
        self.digits == BigUint::ZERO
    }

    /// Whether the number has no part behind the point.
    pub(crate) fn is_whole(&self) -> bool {
        let one_over = self.ten.unsigned_abs();
        // A hostile exponent must not build a huge power: past the digit count it cannot divide.
        self.ten >= 0
            || self.is_zero()
            || (u64::from(one_over) <= self.digits.bits()
                && &self.digits % power_of_ten(one_over) == BigUint::ZERO)
    }

    /// Position of the decimal point: the number lies in `[10^(m-1), 10^m)`. Zero gives 0.
    pub(crate) fn magnitude(&self) -> i64 {
        if self.is_zero() {
            return 0;
        }
        i64::from(digit_count(&self.digits)) + i64::from(self.ten)
    }

    pub(super) fn signed(&self) -> BigInt {
        let sign = if self.negative {
            Sign::Minus
        } else {
            Sign::Plus
        };
        BigInt::from_biguint(sign, self.digits.clone())
    }

    /// The plain text of the number: `20`, `0.0037`, `1.5e-9`. Trailing zeros are dropped unless
    /// `places` asks for a fixed number of digits behind the point.
    pub(crate) fn to_text(&self, places: Option<u32>) -> String {
        let digits = self.digits.to_string();
        let significant = digits.trim_end_matches('0');
        let sign = if self.negative { "-" } else { "" };
        let point = i64::try_from(digits.len()).unwrap_or(i64::MAX) + i64::from(self.ten);
        if let Some(places) = places {
            return format!("{sign}{}", fixed_point(&digits, self.ten, places));
        }
        if significant.is_empty() {
            return format!("{sign}0");
        }
        // Plain notation while it is easy to read, powers of ten beyond.
        if !(-3..=15).contains(&point) {
            let (head, tail) = significant.split_at(1);
            let dot = if tail.is_empty() { "" } else { "." };
            return format!("{sign}{head}{dot}{tail}e{}", point - 1);
        }
        if point <= 0 {
            let zeros = "0".repeat(usize::try_from(-point).unwrap_or(0));
            return format!("{sign}0.{zeros}{significant}");
        }
        let point = usize::try_from(point).unwrap_or(0);
        if significant.len() <= point {
            let zeros = "0".repeat(point - significant.len());
            return format!("{sign}{significant}{zeros}");
        }
        let (whole, fraction) = significant.split_at(point);
        format!("{sign}{whole}.{fraction}")
    }
}

/// `digits * 10^ten` with exactly `places` digits behind the point; `ten` is `-places`.
fn fixed_point(digits: &str, ten: i32, places: u32) -> String {
    debug_assert_eq!(
        i64::from(ten),
        -i64::from(places),
        "rounded to the places it is shown with"
    );
    let places = places as usize;
    let padded = format!("{digits:0>width$}", width = places + 1);
    let (whole, fraction) = padded.split_at(padded.len() - places);
    if fraction.is_empty() {
        whole.to_owned()
    } else {
        format!("{whole}.{fraction}")
    }
}

fn exponent_from_text(text: &str) -> Option<i32> {
    let digits = text.strip_prefix(['+', '-']).unwrap_or(text);
    if digits.is_empty() || digits.len() > 6 || !digits.bytes().all(|b| b.is_ascii_digit()) {
        return None;
    }
    text.parse().ok()
}

pub(super) fn power_of_ten(exponent: u32) -> BigUint {
    BigUint::from(10_u8).pow(exponent)
}

/// Number of decimal digits; zero has one.
pub(super) fn digit_count(number: &BigUint) -> u32 {
    u32::try_from(number.to_string().len()).unwrap_or(u32::MAX)
}

#[cfg(test)]
mod tests {
    use super::Decimal;

    #[test]
    fn non_decimals_are_refused() {
        for text in [
            "",
            "-",
            ".",
            "e3",
            "1e",
            "1e+",
            "0x10",
            "1_0",
            "1 0",
            "inf",
            "NaN",
            "1e1234567",
        ] {
            assert_eq!(Decimal::from_text(text), None, "{text:?} is not a decimal");
        }
    }

    #[test]
    fn whole_numbers_are_recognised() {
        for (text, whole) in [
            ("13", true),
            ("13.0", true),
            ("1e3", true),
            ("1300e-2", true),
            ("0.5", false),
            ("1e-400", false),
            ("0e-9", true),
        ] {
            let decimal = Decimal::from_text(text).expect("a decimal");
            assert_eq!(decimal.is_whole(), whole, "{text}");
        }
    }
}
