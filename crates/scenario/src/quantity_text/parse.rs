//! Text to SI: the only conversion on the way in.

use helmsplit_model::Quantity;

use super::QuantityError;
use crate::nearest::nearest;
use crate::units::{Decimal, Unit, unit, units_of, units_spelled};

/// No sensible quantity is longer; what is would only waste time.
const LONGEST_TEXT: usize = 100;

/// Powers of ten beyond which no `f64` follows, whatever the unit.
const LARGEST_POWER: i64 = 400;

/// A quantity read from text.
#[derive(Debug, Clone, PartialEq)]
pub struct Parsed {
    /// The value in SI units, rounded once.
    pub si: f64,
    /// The number as written, with a plain minus sign.
    pub number: String,
    /// The unit as found in the table.
    pub unit: &'static Unit,
}

/// Reads a quantity such as `3.7 mm`, `175 bar` or `90 %`.
///
/// The space before the unit may be missing, a real minus sign is understood, and ratios and
/// counts may stand without a unit. The exact product of number and factor is rounded once, so
/// `3.7 mm` has the bits of `0.0037`.
///
/// # Errors
/// [`QuantityError`] says what is wrong with the text: no number, a decimal comma, a missing,
/// unknown or foreign unit, a number that does not fit, a count that is not whole, a temperature
/// below absolute zero.
///
/// # Examples
/// ```
/// use helmsplit_model::Quantity;
/// use helmsplit_scenario::quantity_text::parse;
///
/// let diameter = parse("3.7 mm", Quantity::Length)?;
/// assert_eq!(diameter.si, 0.0037);
/// let refused = parse("20 bar", Quantity::Length).unwrap_err();
/// assert_eq!(refused.to_string(), "bar is a pressure, but a length is wanted");
/// # Ok::<(), helmsplit_scenario::quantity_text::QuantityError>(())
/// ```
pub fn parse(text: &str, wanted: Quantity) -> Result<Parsed, QuantityError> {
    if text.len() > LONGEST_TEXT {
        return Err(QuantityError::TooLong { wanted });
    }
    let text = text.trim().replace('−', "-");
    if text.is_empty() {
        return Err(QuantityError::Empty { wanted });
    }
    let length = number_length(&text);
    let (number, rest) = text.split_at(length);
    let Some(decimal) = Decimal::from_text(number) else {
        return Err(no_number(&text, wanted));
    };
    broken_number(number, rest, wanted)?;
    let unit = find_unit(number, rest.trim(), wanted)?;
    let si = si_value(&decimal, unit)?;
    Ok(Parsed {
        si,
        number: number.to_owned(),
        unit,
    })
}

/// Bytes of the longest number at the start: sign, digits, point, digits, exponent.
fn number_length(text: &str) -> usize {
    let bytes = text.as_bytes();
    let digits = |from: usize| {
        bytes[from..]
            .iter()
            .take_while(|byte| byte.is_ascii_digit())
            .count()
    };
    let is = |at: usize, set: &[u8]| bytes.get(at).is_some_and(|byte| set.contains(byte));
    let mut end = usize::from(is(0, b"+-"));
    let whole = digits(end);
    end += whole;
    let mut fraction = 0;
    if is(end, b".") {
        fraction = digits(end + 1);
        end += 1 + fraction;
    }
    if whole + fraction == 0 {
        return 0;
    }
    if is(end, b"eE") {
        let sign = usize::from(is(end + 1, b"+-"));
        let exponent = digits(end + 1 + sign);
        if exponent > 0 {
            end += 1 + sign + exponent;
        }
    }
    end
}

/// The error for a text without a number at its start.
fn no_number(text: &str, wanted: Quantity) -> QuantityError {
    let word = text.trim_start_matches(['+', '-']).to_ascii_lowercase();
    let starts_number = word.starts_with(|letter: char| letter.is_ascii_digit());
    if word.starts_with("inf") || word.starts_with("nan") {
        QuantityError::NotFinite { wanted }
    } else if starts_number {
        // Only an exponent of more than six digits is refused once digits were seen.
        let small = text.contains("e-") || text.contains("E-");
        if small {
            QuantityError::TooSmall { wanted }
        } else {
            QuantityError::TooLarge { wanted }
        }
    } else if let Some(digits) = word
        .strip_prefix(',')
        .filter(|digits| digits.starts_with(|d: char| d.is_ascii_digit()))
    {
        QuantityError::DecimalComma {
            with_point: format!("0.{digits}"),
        }
    } else {
        QuantityError::NoNumber { wanted }
    }
}

/// Catches numbers that go on behind what was read: `3,7 mm`, `1 000 mm`, `3/8 in`.
fn broken_number(number: &str, rest: &str, wanted: Quantity) -> Result<(), QuantityError> {
    let follows = |rest: &str| rest.starts_with(|letter: char| letter.is_ascii_digit());
    if let Some(tail) = rest.strip_prefix(',').filter(|tail| follows(tail)) {
        return Err(QuantityError::DecimalComma {
            with_point: format!("{number}.{tail}"),
        });
    }
    let gap = rest.trim_start_matches([' ', '_', '\'', '\u{a0}', '\u{2009}', '\u{202f}']);
    // A unit may itself begin with a digit: 1 for ratios, 1/min for speeds.
    if gap.len() < rest.len() && follows(gap) && unit(wanted, gap).is_none() {
        return Err(QuantityError::BrokenNumber {
            joined: format!("{number}{gap}"),
        });
    }
    if rest
        .trim_start()
        .strip_prefix('/')
        .is_some_and(|tail| follows(tail.trim_start()))
    {
        return Err(QuantityError::Fraction { wanted });
    }
    Ok(())
}

fn find_unit(number: &str, text: &str, wanted: Quantity) -> Result<&'static Unit, QuantityError> {
    if let Some(unit) = unit(wanted, text) {
        return Ok(unit);
    }
    if text.is_empty() {
        return Err(QuantityError::MissingUnit {
            wanted,
            number: number.to_owned(),
        });
    }
    if let Some(other) = units_spelled(text).next() {
        let unit = text.to_owned();
        return Err(QuantityError::WrongKind {
            wanted,
            found: other.quantity(),
            unit,
        });
    }
    let names = units_of(wanted).flat_map(|unit| {
        let spellings = std::iter::once(unit.symbol()).chain(unit.aliases().iter().copied());
        spellings.filter(|spelling| !spelling.is_empty())
    });
    let nearest = nearest(text, names);
    Err(QuantityError::UnknownUnit {
        wanted,
        unit: text.to_owned(),
        nearest,
    })
}

fn si_value(decimal: &Decimal, unit: &'static Unit) -> Result<f64, QuantityError> {
    let wanted = unit.quantity();
    if wanted == Quantity::Count && !decimal.is_whole() {
        return Err(QuantityError::NotWhole);
    }
    if decimal.magnitude() > LARGEST_POWER {
        return Err(QuantityError::TooLarge { wanted });
    }
    if decimal.magnitude() < -LARGEST_POWER {
        return Err(QuantityError::TooSmall { wanted });
    }
    let si = unit.scale().si_from_decimal(decimal);
    if !si.is_finite() {
        return Err(QuantityError::TooLarge { wanted });
    }
    // A temperature may well be 0 K; elsewhere only a zero gives zero.
    if si == 0.0 && !decimal.is_zero() && !unit.scale().has_shift() {
        return Err(QuantityError::TooSmall { wanted });
    }
    if wanted == Quantity::Temperature && si < 0.0 {
        return Err(QuantityError::BelowAbsoluteZero);
    }
    Ok(si)
}
