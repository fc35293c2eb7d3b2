//! Times and sizes of files in words.

use std::time::SystemTime;

/// How long ago a time is: `just now`, `12 minutes ago`.
pub(crate) fn age(time: SystemTime, now: SystemTime) -> String {
    // A clock that was set back makes files of the future.
    let Ok(gone) = now.duration_since(time) else {
        return "just now".to_owned();
    };
    let seconds = gone.as_secs();
    let steps = [
        (365 * 86_400, "year"),
        (30 * 86_400, "month"),
        (86_400, "day"),
        (3_600, "hour"),
        (60, "minute"),
    ];
    for (length, word) in steps {
        let count = seconds / length;
        if count > 0 {
            let plural = if count == 1 { "" } else { "s" };
            return format!("{count} {word}{plural} ago");
        }
    }
    "just now".to_owned()
}

/// The size of a file: `812 B`, `4.1 kB`.
pub(crate) fn file_size(bytes: u64) -> String {
    let sizes = [(1e9, "GB"), (1e6, "MB"), (1e3, "kB")];
    let size = bytes as f64;
    match sizes.iter().find(|(least, _)| size >= *least) {
        Some((least, unit)) => format!("{:.1} {unit}", size / least),
        None => format!("{bytes} B"),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::time::Duration;

    #[test]
    fn ages_and_sizes_read_well() {
        let now = SystemTime::now();
        for (seconds, words) in [
            (5, "just now"),
            (60, "1 minute ago"),
            (7_300, "2 hours ago"),
            (200_000, "2 days ago"),
            (40_000_000, "1 year ago"),
        ] {
            assert_eq!(
                age(now - Duration::from_secs(seconds), now),
                words,
                "{seconds}"
            );
        }
        assert_eq!(
            age(now + Duration::from_secs(90), now),
            "just now",
            "the future"
        );
        assert_eq!(file_size(812), "812 B", "bytes");
        assert_eq!(file_size(4_123), "4.1 kB", "thousands");
    }
}
