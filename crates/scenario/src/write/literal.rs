//! Texts and keys as RON spells them.

/// Raw texts with more hashes than this are harder to read than escapes.
const MOST_HASHES: usize = 4;

/// A text in quotes that reads back unchanged. Texts with line ends, quotes or backslashes become
/// raw texts where that is possible, so that notes stay readable.
///
/// # Examples
/// ```
/// use helmsplit_scenario::write::text_literal;
///
/// assert_eq!(text_literal("20 mm"), "\"20 mm\"");
/// assert_eq!(text_literal("a \"small\" hole"), "r#\"a \"small\" hole\"#");
/// ```
#[must_use]
pub fn text_literal(text: &str) -> String {
    let has_control = text
        .chars()
        .any(|letter| letter.is_control() && letter != '\n' && letter != '\t');
    let is_plain = !text.contains(['\n', '\t', '"', '\\']);
    if is_plain && !has_control {
        return format!("\"{text}\"");
    }
    let hashes = hashes_needed(text);
    if has_control || hashes > MOST_HASHES {
        return escaped(text);
    }
    let hashes = "#".repeat(hashes);
    format!("r{hashes}\"{text}\"{hashes}")
}

/// The least number of hashes whose closing mark does not occur in the text.
fn hashes_needed(text: &str) -> usize {
    let mut needed = 0;
    for (at, _) in text.match_indices('"') {
        let tail = &text[at + 1..];
        let hashes = tail.len() - tail.trim_start_matches('#').len();
        needed = needed.max(hashes + 1);
    }
    needed
}

fn escaped(text: &str) -> String {
    let mut literal = String::from("\"");
    for letter in text.chars() {
        match letter {
            '"' => literal.push_str("\\\""),
            '\\' => literal.push_str("\\\\"),
            '\n' => literal.push_str("\\n"),
            '\t' => literal.push_str("\\t"),
            '\r' => literal.push_str("\\r"),
            other if other.is_control() => literal.extend(other.escape_unicode()),
            other => literal.push(other),
        }
    }
    literal.push('"');
    literal
}

/// Whether a key can stand in a file as it is: letters, digits and `_`, no digit first.
#[must_use]
pub fn is_key(text: &str) -> bool {
    !text.starts_with(|letter: char| letter.is_ascii_digit())
        && !text.is_empty()
        && text
            .chars()
            .all(|letter| letter.is_ascii_alphanumeric() || letter == '_')
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;

    fn back(literal: &str) -> String {
        ron::from_str(literal).unwrap_or_else(|error| panic!("{literal}: {error}"))
    }

    #[test]
    fn each_text_gets_its_gentlest_form() {
        for (text, literal) in [
            ("", "\"\""),
            ("20 mm", "\"20 mm\""),
            ("µ °", "\"µ °\""),
            ("two\nlines", "r\"two\nlines\""),
            ("a \"b\"", "r#\"a \"b\"\"#"),
            ("a \"# b", "r##\"a \"# b\"##"),
            ("C:\\dir", "r\"C:\\dir\""),
            ("bell\u{7}\"", "\"bell\\u{7}\\\"\""),
            ("a\r\nb", "\"a\\r\\nb\""),
            ("\"#####", "\"\\\"#####\""),
        ] {
            assert_eq!(text_literal(text), literal, "{text:?}");
            assert_eq!(back(literal), text, "{literal} must read back");
        }
    }

    #[test]
    fn keys_are_plain_words() {
        for (text, is) in [
            ("spool_mass", true),
            ("_a1", true),
            ("", false),
            ("1a", false),
            ("a-b", false),
            ("µ", false),
        ] {
            assert_eq!(is_key(text), is, "{text:?}");
        }
    }

    proptest! {
        #[test]
        fn any_text_reads_back(text in any::<String>()) {
            prop_assert_eq!(back(&text_literal(&text)), text);
        }

        #[test]
        fn texts_of_marks_read_back(text in "[\"#\\\\r\n\t\r a]{0,20}") {
            prop_assert_eq!(back(&text_literal(&text)), text);
        }
    }
}
