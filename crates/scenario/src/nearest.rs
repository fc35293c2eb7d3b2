//! The nearest known name to a mistyped one.

/// Names longer than this are not compared: the cost grows with the product of both lengths, and
/// no name of ours is near this long.
const LONGEST_NAME: usize = 64;

/// Similarity from which a suggestion helps more than it misleads (0 = nothing shared, 1 = equal).
const LEAST_SIMILARITY: f64 = 0.6;

/// The candidate most like `name`, or `None` when none is near enough to be meant.
///
/// Upper and lower case, hyphens and spaces do not count. Of equally near candidates the first
/// wins, so that the answer does not depend on anything but the order given.
pub fn nearest<'a, I>(name: &str, candidates: I) -> Option<&'a str>
where
    I: IntoIterator<Item = &'a str>,
{
    if name.is_empty() || name.len() > LONGEST_NAME {
        return None;
    }
    let name = comparable(name);
    let mut best: Option<(&'a str, (f64, usize))> = None;
    for candidate in candidates {
        let similarity = similarity(&name, &comparable(candidate));
        // A wrong letter is likelier than a missing one, so equal length decides a draw.
        let same_length = usize::MAX - name.len().abs_diff(candidate.len());
        let rank = (similarity, same_length);
        if similarity >= LEAST_SIMILARITY && best.is_none_or(|(_, high)| rank > high) {
            best = Some((candidate, rank));
        }
    }
    best.map(|(candidate, _)| candidate)
}

fn comparable(name: &str) -> String {
    name.trim().to_lowercase().replace(['-', ' '], "_")
}

/// Share of letters that need no edit; a part of the name that stands whole also counts.
fn similarity(name: &str, candidate: &str) -> f64 {
    let edits = strsim::damerau_levenshtein(name, candidate);
    let letters = name.chars().count().max(candidate.chars().count());
    if edits == 0 {
        return 1.0;
    }
    // One slip in a word of two letters ("mn" for "mm") is still most likely a slip.
    let short_slip = if edits == 1 && letters >= 2 {
        LEAST_SIMILARITY
    } else {
        0.0
    };
    // "orifice_diameter" for "fixed_orifice_diameter": an omitted word, not a wrong one.
    let (long, short) = if name.len() > candidate.len() {
        (name, candidate)
    } else {
        (candidate, name)
    };
    let part = if short.len() >= 4 && long.contains(short) {
        LEAST_SIMILARITY
    } else {
        0.0
    };
    // Lengths are below a few hundred, so both conversions are exact.
    let share = 1.0 - edits as f64 / letters as f64;
    share.max(short_slip).max(part)
}

#[cfg(test)]
mod tests {
    use super::nearest;

    const FIELDS: [&str; 5] = [
        "spool_diameter",
        "spool_mass",
        "spring_rate",
        "spring_preload",
        "fixed_orifice_diameter",
    ];

    #[test]
    fn slips_find_the_field() {
        for (typed, meant) in [
            ("spool_diamter", "spool_diameter"),
            ("Spool-Diameter", "spool_diameter"),
            ("spring_raet", "spring_rate"),
            ("orifice_diameter", "fixed_orifice_diameter"),
            ("preload", "spring_preload"),
        ] {
            assert_eq!(nearest(typed, FIELDS), Some(meant), "{typed}");
        }
        assert_eq!(
            nearest("mn", ["m", "mm", "in"]),
            Some("mm"),
            "a wrong letter before a missing one"
        );
        assert_eq!(
            nearest("psj", ["Pa", "bar", "psi"]),
            Some("psi"),
            "a short slip"
        );
    }

    #[test]
    fn strangers_and_monsters_find_nothing() {
        assert_eq!(nearest("colour", FIELDS), None, "nothing like it");
        assert_eq!(nearest("", FIELDS), None, "no name");
        assert_eq!(
            nearest(&"spool_".repeat(1_000_000), FIELDS),
            None,
            "far too long"
        );
        assert_eq!(nearest("spool", std::iter::empty()), None, "no candidates");
    }
}
