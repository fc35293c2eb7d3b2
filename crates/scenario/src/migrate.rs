//! Versions of the circuit file.
//!
//! There has been one so far. A later version keeps this check, and turns an older tree into the
//! present one before it is read.

/// The key that holds the version.
pub(crate) const KEY: &str = "format";

/// The present version.
pub const FORMAT: i64 = 1;

/// Whether a file of that version can be read; `None` stands for a version that is no number.
///
/// # Errors
/// Message and hint of the finding.
pub(crate) fn check(version: Option<f64>) -> Result<(), (String, String)> {
    let this = format!("write {KEY}: {FORMAT}");
    let Some(version) = version.filter(|version| !version.is_nan()) else {
        return Err(("the version of the file is a bare number".to_owned(), this));
    };
    let present = FORMAT as f64;
    if version > present {
        let message = format!("this file is newer: this program reads format {FORMAT}");
        Err((message, "use a newer version of the program".to_owned()))
    } else if version < present {
        Err(("there has been no such format".to_owned(), this))
    } else {
        Ok(())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn only_the_present_version_is_read() {
        assert!(check(Some(1.0)).is_ok(), "present");
        for (version, part) in [
            (Some(2.0), "newer"),
            (Some(1.5), "newer"),
            (Some(0.0), "no such"),
            (Some(f64::NAN), "bare number"),
            (None, "bare number"),
        ] {
            let (message, _) = check(version).unwrap_err();
            assert!(message.contains(part), "{version:?}: {message}");
        }
    }
}
