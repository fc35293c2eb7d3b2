//! Spellings of one unit brought to one form, so that `L/min`, `mm²` and `N·m` need no own entry.

/// The form in which symbols and aliases are compared: superscripts as plain digits, micro as
/// `u`, the degree sign as `deg`, product signs and hyphens as one space, no space around `/`
/// and inside brackets. Upper and lower case stay, because `mPa` is not `MPa`.
pub(crate) fn plain_spelling(text: &str) -> String {
    let mut plain = String::with_capacity(text.len());
    for letter in text.trim().chars() {
        match letter {
            '²' => plain.push('2'),
            '³' => plain.push('3'),
            'µ' | 'μ' => plain.push('u'),
            '°' | 'º' => plain.push_str("deg"),
            '^' => {}
            '·' | '⋅' | '*' | '×' | '-' | '\u{2010}' | '\u{2011}' => push_space(&mut plain),
            other if other.is_whitespace() => push_space(&mut plain),
            '/' | ')' => {
                plain.truncate(plain.trim_end().len());
                plain.push(letter);
            }
            other => plain.push(other),
        }
    }
    plain.truncate(plain.trim_end().len());
    plain
}

/// One space between two parts: none after a slash, a bracket or another space.
fn push_space(plain: &mut String) {
    if !plain.is_empty() && !plain.ends_with([' ', '/', '(']) {
        plain.push(' ');
    }
}

#[cfg(test)]
mod tests {
    use super::plain_spelling;

    #[test]
    fn spellings_meet_in_one_form() {
        for (typed, plain) in [
            (" mm² ", "mm2"),
            ("mm^2", "mm2"),
            ("µm", "um"),
            ("°C", "degC"),
            ("N·m", "N m"),
            ("N * m", "N m"),
            ("lbf-ft", "lbf ft"),
            ("m3 / ( s  Pa )", "m3/(s Pa)"),
            ("kg m^2", "kg m2"),
            ("L / min", "L/min"),
            ("mPa", "mPa"),
        ] {
            assert_eq!(plain_spelling(typed), plain, "{typed:?}");
        }
    }
}
