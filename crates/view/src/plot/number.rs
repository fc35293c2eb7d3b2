//! Numbers as a person reads them: a real minus and thousands kept apart.

/// The minus sign, U+2212: as wide as a plus, unlike the hyphen.
pub const MINUS: char = '\u{2212}';

/// Narrow no-break space between groups of three digits, U+202F.
pub const NARROW_SPACE: char = '\u{202f}';

/// Digits before the point from which they are grouped; four stay together (ISO 80000-1, 7.3.1
/// allows both).
const GROUPED_FROM: usize = 5;

/// A number with so many digits behind the point, as `−12 500.0`. What is not finite is a dash.
///
/// # Examples
/// ```
/// use helmsplit_view::plot::number_text;
///
/// assert_eq!(number_text(-0.04, 1), "0.0");
/// assert_eq!(number_text(-12_500.0, 0), "\u{2212}12\u{202f}500");
/// ```
#[must_use]
pub fn number_text(value: f64, places: usize) -> String {
    if !value.is_finite() {
        return "\u{2013}".to_owned();
    }
    let digits = format!("{:.places$}", value.abs());
    let is_zero = digits.bytes().all(|byte| byte == b'0' || byte == b'.');
    let (whole, fraction) = match digits.split_once('.') {
        Some((whole, fraction)) => (whole, Some(fraction)),
        None => (digits.as_str(), None),
    };
    let mut text = String::with_capacity(digits.len() + 8);
    if value < 0.0 && !is_zero {
        text.push(MINUS);
    }
    let grouped = whole.len() >= GROUPED_FROM;
    for (position, digit) in whole.chars().enumerate() {
        if grouped && position > 0 && (whole.len() - position).is_multiple_of(3) {
            text.push(NARROW_SPACE);
        }
        text.push(digit);
    }
    if let Some(fraction) = fraction {
        text.push('.');
        text.push_str(fraction);
    }
    text
}

/// A number with one digit behind the point and a power of ten, as `2.1×10⁻⁹`. Zero and what is
/// not finite are as in [`number_text`].
#[must_use]
pub fn power_text(value: f64) -> String {
    let scientific = format!("{value:.1e}");
    let parts = scientific.split_once('e');
    let parts = parts.and_then(|(lead, power)| Some((lead.parse().ok()?, power.parse().ok()?)));
    match parts {
        Some((lead, power)) if value != 0.0 => {
            format!("{}×10{}", number_text(lead, 1), superscript(power))
        }
        _ => number_text(value, 0),
    }
}

/// A whole number in superscript digits, as `⁻³`.
#[must_use]
pub fn superscript(number: i32) -> String {
    const DIGITS: [char; 10] = ['⁰', '¹', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'];
    number
        .to_string()
        .bytes()
        .map(|byte| match byte {
            b'0'..=b'9' => DIGITS[usize::from(byte - b'0')],
            _ => '⁻',
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn groups_signs_and_places() {
        for (value, places, text) in [
            (0.0, 0, "0"),
            (-0.0, 2, "0.00"),
            (-0.004, 2, "0.00"),
            (2400.0, 0, "2400"),
            (12_500.0, 0, "12\u{202f}500"),
            (1_234_567.891, 2, "1\u{202f}234\u{202f}567.89"),
            (-165.0, 0, "\u{2212}165"),
            (99_999.96, 1, "100\u{202f}000.0"),
            (f64::NAN, 1, "\u{2013}"),
            (f64::INFINITY, 1, "\u{2013}"),
        ] {
            assert_eq!(
                number_text(value, places),
                text,
                "{value} to {places} places"
            );
        }
    }

    #[test]
    fn powers_of_ten() {
        for (value, text) in [
            (2.14e-9, "2.1×10⁻⁹"),
            (-9.96e7, "\u{2212}1.0×10⁸"),
            (0.0, "0"),
            (f64::NAN, "\u{2013}"),
        ] {
            assert_eq!(power_text(value), text, "{value:e}");
        }
    }

    #[test]
    fn superscripts() {
        assert_eq!(superscript(-12), "⁻¹²", "negative");
        assert_eq!(superscript(306), "³⁰⁶", "positive");
    }
}
