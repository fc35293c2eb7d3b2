//! Why a window does not open, in sentences that help; and faults of the libraries of a window,
//! some of which end in a panic instead of an error.

use std::any::Any;
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::sync::Once;
use std::sync::atomic::{AtomicBool, Ordering};

use crate::error::AppError;

/// Whether a frame was shown: from then on a panic is a fault of ours and is told as such.
static SHOWN: AtomicBool = AtomicBool::new(false);

/// A frame is being shown.
pub(super) fn shown() {
    SHOWN.store(true, Ordering::Relaxed);
}

/// Does what opens a window; a panic becomes an error. As long as nothing is shown, panics print
/// nothing: the sentence that comes of them says it all.
pub(super) fn caught<T>(open: impl FnOnce() -> T) -> Result<T, AppError> {
    static HOOK: Once = Once::new();
    HOOK.call_once(|| {
        let usual = std::panic::take_hook();
        std::panic::set_hook(Box::new(move |panic| {
            let thread = std::thread::current();
            if SHOWN.load(Ordering::Relaxed) || thread.name() != Some("main") {
                usual(panic);
            }
        }));
    });
    catch_unwind(AssertUnwindSafe(open)).map_err(|panic| {
        let cause = text_of(panic.as_ref());
        if SHOWN.load(Ordering::Relaxed) {
            AppError::Broken { cause }
        } else {
            of_text(cause)
        }
    })
}

fn text_of(panic: &(dyn Any + Send)) -> String {
    panic
        .downcast_ref::<String>()
        .cloned()
        .or_else(|| panic.downcast_ref::<&str>().map(|text| (*text).to_owned()))
        .unwrap_or_else(|| "a fault without a message".to_owned())
}

/// Sorts what the libraries of a window say by what the user can do about it.
pub(super) fn of_text(cause: String) -> AppError {
    let says = |part: &str| cause.contains(part);
    if says("DISPLAY") || says("open connection to X server") || says("XOpenDisplay") {
        AppError::NoDisplay { cause }
    } else if says("shared librar") || says("xkbcommon") || says("libX") || says("libwayland") {
        AppError::MissingLibrary { cause }
    } else if says("glutin") || says("OpenGL") || says("EGL") {
        AppError::NoOpenGl { cause }
    } else {
        AppError::Window { cause }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn raw_errors_become_sentences_that_help() {
        let cases = [
            (
                "neither WAYLAND_DISPLAY nor WAYLAND_SOCKET nor DISPLAY is set",
                "no display",
            ),
            ("Failed to open connection to X server", "no display"),
            (
                "Failed to load one of xlib's shared libraries",
                "libxkbcommon-x11-0",
            ),
            ("Found no glutin configs", "libegl1"),
            ("something else", "something else"),
        ];
        for (raw, helpful) in cases {
            let text = of_text(raw.to_owned()).to_string();
            assert!(text.contains(helpful), "{raw}: {text}");
            assert!(text.contains("helmsplit run"), "{raw}: {text}");
        }
    }

    #[test]
    fn a_panic_while_opening_is_an_error() {
        let result = caught(|| {
            assert!(
                false_for_the_test(),
                "Library libxkbcommon-x11.so could not be loaded."
            );
        });
        let error = result.unwrap_err();
        assert!(matches!(error, AppError::MissingLibrary { .. }), "{error}");
    }

    fn false_for_the_test() -> bool {
        false
    }
}
