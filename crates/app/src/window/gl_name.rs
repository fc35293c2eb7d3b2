//! The name of what draws OpenGL, such as a graphics card or a software rasteriser.
//!
//! Asking OpenGL itself takes code that the compiler cannot check. The library that draws our
//! window asks it once at its start and writes the answer to the log, so we read it there. If that
//! ever changes, the name stays unknown, and OpenGL is used as if a card drew it.

use std::sync::{Mutex, PoisonError};

use log::{LevelFilter, Log, Metadata, Record};

/// Names of software that draws OpenGL on the processor, in small letters.
const SOFTWARE: [&str; 6] = [
    "llvmpipe",
    "softpipe",
    "swrast",
    "software rasterizer",
    "swiftshader",
    "gdi generic",
];

/// Who writes the name, and what stands before it.
const TARGET: &str = "egui_glow";
const MARK: &str = "opengl renderer: ";

struct Listener;

static LISTENER: Listener = Listener;
static NAME: Mutex<Option<String>> = Mutex::new(None);

impl Log for Listener {
    fn enabled(&self, metadata: &Metadata<'_>) -> bool {
        metadata.target().starts_with(TARGET)
    }

    fn log(&self, record: &Record<'_>) {
        if self.enabled(record.metadata())
            && let Some(name) = name_in(&record.args().to_string())
        {
            *NAME.lock().unwrap_or_else(PoisonError::into_inner) = Some(name);
        }
    }

    fn flush(&self) {}
}

/// Listens from now on.
pub(super) fn listen() {
    // Somebody else may have the log; then the name stays unknown.
    if log::set_logger(&LISTENER).is_ok() {
        log::set_max_level(LevelFilter::Debug);
    }
}

/// The name that was heard; nothing is listened to any more.
pub(super) fn heard() -> Option<String> {
    log::set_max_level(LevelFilter::Off);
    NAME.lock().unwrap_or_else(PoisonError::into_inner).take()
}

/// Whether a name is that of software.
pub(super) fn is_software(name: &str) -> bool {
    let name = name.to_lowercase();
    SOFTWARE.iter().any(|software| name.contains(software))
}

fn name_in(text: &str) -> Option<String> {
    let line = text.lines().find_map(|line| line.strip_prefix(MARK))?;
    Some(line.trim().to_owned())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_name_is_found_and_sorted() {
        let text = "\nopengl version: 4.5\nopengl renderer: llvmpipe (LLVM 15.0.6, 256 bits)\nopengl vendor: Mesa";
        let name = name_in(text).unwrap();
        assert_eq!(name, "llvmpipe (LLVM 15.0.6, 256 bits)", "its line");
        assert_eq!(name_in("Shader header: none"), None, "another message");
        for (name, software) in [
            (name.as_str(), true),
            ("virgl (LLVMPIPE)", true),
            ("Software Rasterizer", true),
            ("SomeCard 5000/PCIe/SSE2", false),
        ] {
            assert_eq!(is_software(name), software, "{name}");
        }
    }
}
