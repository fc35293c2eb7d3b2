//! A list of points in one line of text: `0 s: 0 rpm, 1 s: 60 rpm`.

use crate::finding::Finding;
use crate::value::Value;

/// The points as one text.
pub(crate) fn pairs_text<'a>(pairs: impl Iterator<Item = (&'a Value, &'a Value)>) -> String {
    let pairs: Vec<_> = pairs
        .map(|(first, second)| format!("{}: {}", first.text(), second.text()))
        .collect();
    pairs.join(", ")
}

/// The texts of each point; an empty text is no point. `path` names the list in findings and
/// `example` is what would do.
pub(crate) fn pairs_from_text<'a>(
    path: &str,
    text: &'a str,
    example: &str,
) -> Result<Vec<(&'a str, &'a str)>, Finding> {
    if text.trim().is_empty() {
        return Ok(Vec::new());
    }
    let pair = |(place, part): (usize, &'a str)| {
        let pair = part.split_once(':').filter(|(_, second)| {
            // A second colon means a forgotten comma.
            !second.contains(':')
        });
        pair.map(|(first, second)| (first.trim(), second.trim()))
            .ok_or_else(|| {
                let message = "a point is two quantities with a colon between them";
                let hint = format!("write points with commas between them, such as {example}");
                Finding::error(format!("{path}[{place}]"), message, hint).with_value(part.trim())
            })
    };
    text.split(',').enumerate().map(pair).collect()
}
