//! How wide a text will be, without a font at hand.

use crate::style::TextSize;

/// Advance widths of the printable ASCII characters from the space on, in hundredths of the text
/// size. Measured on the face `DejaVu Sans`, the widest face that the type family may fall back to, so that
/// what is laid out with them fits in every face.
const WIDTHS: [u8; 95] = [
    32, 40, 46, 84, 64, 95, 78, 27, 39, 39, 50, 84, 32, 36, 32, 34, 64, 64, 64, 64, 64, 64, 64, 64,
    64, 64, 34, 34, 84, 84, 84, 53, 100, 68, 69, 70, 77, 63, 58, 77, 75, 29, 29, 66, 56, 86, 75,
    79, 60, 79, 69, 63, 61, 73, 68, 99, 69, 61, 69, 39, 34, 39, 84, 50, 50, 61, 63, 55, 63, 62, 35,
    63, 63, 28, 28, 58, 28, 97, 63, 61, 63, 63, 41, 52, 39, 63, 59, 82, 59, 59, 52, 64, 34, 64, 84,
];

/// Width of other characters, in hundredths: most are narrower, ideographs are as wide.
const OTHER: u8 = 100;

/// What bold adds.
const BOLD: f64 = 1.1;

/// At most this wide, px.
pub(super) fn text_width(text: &str, size: TextSize) -> f64 {
    let hundredths: f64 = text.chars().map(|c| f64::from(advance(c))).sum();
    hundredths / 100.0 * size.px()
}

/// At most this wide in bold, px.
pub(super) fn bold_width(text: &str, size: TextSize) -> f64 {
    text_width(text, size) * BOLD
}

fn advance(character: char) -> u8 {
    match character {
        ' '..='~' => WIDTHS[character as usize - ' ' as usize],
        '\u{2009}' | '\u{202f}' => 20,
        '²' | '³' | '·' | '⁰'..='⁹' | '⁻' => 45,
        '\u{2212}' => 84,
        'À'..='ÿ' | '°' | '–' => 79,
        _ => OTHER,
    }
}

/// Breaks a text at spaces into lines no wider than `width` px; a single longer word stands alone.
pub(super) fn wrapped(text: &str, size: TextSize, width: f64) -> Vec<String> {
    let mut lines: Vec<String> = Vec::new();
    for word in text.split_whitespace() {
        match lines.last_mut() {
            Some(line) if text_width(&format!("{line} {word}"), size) <= width => {
                line.push(' ');
                line.push_str(word);
            }
            _ => lines.push(word.to_owned()),
        }
    }
    lines
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn digits_are_equally_wide_and_m_is_wider_than_i() {
        let width = |text| text_width(text, TextSize::Label);
        assert!((width("1111") - width("0890")).abs() < 1e-12, "tabular");
        assert!(width("mmm") > 3.0 * width("iii"), "letters differ");
        assert!(
            (width("~") - 0.84 * 12.0).abs() < 1e-12,
            "the table ends at the tilde"
        );
    }

    #[test]
    fn wraps_at_spaces_only() {
        let lines = wrapped("steering held at the lock", TextSize::Small, 90.0);
        assert!(lines.len() > 1, "{lines:?}");
        assert_eq!(
            lines.join(" "),
            "steering held at the lock",
            "no word is lost"
        );
        assert_eq!(
            wrapped("unbreakable", TextSize::Small, 1.0),
            ["unbreakable"],
            "one word"
        );
        assert!(
            wrapped("  ", TextSize::Small, 50.0).is_empty(),
            "no word, no line"
        );
    }
}
