//! SI to text: the only conversion on the way out.

use crate::units::{Decimal, Ratio, Unit};

/// Decimal digits that always suffice for a unit without shift. Numbers that give the same `f64`
/// fill an interval of at least 1.1e-16 of their size, and decimals of 17 digits stand at most
/// 1.0e-16 of their size apart, so one of them lies inside, whatever the factor.
const ENOUGH_DIGITS: u32 = 17;

/// Temperatures near absolute zero need more digits, because the shift hides them:
/// 40 reach down to 1e-20 K.
const ENOUGH_SHIFTED_DIGITS: u32 = 40;

/// How many digits a text shows.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Digits {
    /// The shortest number that reads back to the same bits. This is what files hold.
    Exact,
    /// At most so many significant digits, trailing zeros dropped.
    Significant(u32),
    /// Exactly so many digits behind the point, for columns. Above 30 it means 30.
    Places(u32),
}

/// The text of an SI value in `unit`, such as `3.7 mm`. A bare number has no symbol.
///
/// With [`Digits::Exact`], [`super::parse`] of the text gives back the same bits, for every finite
/// value in every unit; only temperatures below 1e-20 K come back as their nearest neighbour.
/// A value that is not finite becomes `NaN`, `inf` or `-inf`, which `parse` refuses.
///
/// # Examples
/// ```
/// use helmsplit_model::Quantity;
/// use helmsplit_scenario::quantity_text::{Digits, text_from_si};
/// use helmsplit_scenario::units::unit;
///
/// let mm = unit(Quantity::Length, "mm").unwrap();
/// assert_eq!(text_from_si(0.0037, mm, Digits::Exact), "3.7 mm");
/// assert_eq!(text_from_si(0.0037, mm, Digits::Places(3)), "3.700 mm");
/// ```
#[must_use]
pub fn text_from_si(si: f64, unit: &Unit, digits: Digits) -> String {
    let number = number_from_si(si, unit, digits);
    if unit.is_bare() {
        number
    } else {
        format!("{number} {unit}")
    }
}

/// As [`text_from_si`], without the unit: for tables that name it in the head of the column.
#[must_use]
pub fn number_from_si(si: f64, unit: &Unit, digits: Digits) -> String {
    if !si.is_finite() {
        return si.to_string();
    }
    let ratio = unit.scale().ratio_from_si(si);
    match digits {
        Digits::Exact => shortest(&ratio, si, unit).to_text(None),
        Digits::Significant(count) => ratio
            .significant(count.clamp(1, ENOUGH_SHIFTED_DIGITS))
            .to_text(None),
        Digits::Places(places) => {
            let places = places.min(30);
            ratio.places(places).to_text(Some(places))
        }
    }
}

/// The shortest decimal that reads back to the bits of `si`.
fn shortest(ratio: &Ratio, si: f64, unit: &Unit) -> Decimal {
    let reads_back =
        |decimal: &Decimal| unit.scale().si_from_decimal(decimal).to_bits() == si.to_bits();
    let last = if unit.scale().has_shift() {
        ENOUGH_SHIFTED_DIGITS
    } else {
        ENOUGH_DIGITS
    };
    for count in 1..=last {
        let decimal = ratio.significant(count);
        if reads_back(&decimal) {
            return decimal;
        }
        // At a power of two the interval is lopsided, and a neighbour may be the one inside.
        if count >= ENOUGH_DIGITS - 1
            && let Some(decimal) = Ratio::neighbours(&decimal).into_iter().find(reads_back)
        {
            return decimal;
        }
    }
    ratio.significant(last)
}
