//! How large the window is.

use egui::{IconData, Vec2, ViewportBuilder, vec2};
use winit::event_loop::ActiveEventLoop;

use crate::files::WindowPlace;

/// Smallest window that everything fits into, points.
const LEAST_SIZE: [f32; 2] = [960.0, 600.0];

/// The window as it opens: as it was left.
pub(crate) fn viewport(place: WindowPlace) -> ViewportBuilder {
    ViewportBuilder::default()
        .with_title("Helmsplit")
        .with_app_id("helmsplit")
        // An empty picture: without one the window library shows its own.
        .with_icon(IconData::default())
        .with_inner_size(place.size)
        .with_maximized(place.maximized)
        .with_min_inner_size(LEAST_SIZE)
}

/// The window not larger than the largest screen: some systems refuse or hide larger ones.
pub(super) fn within_screens(
    viewport: ViewportBuilder,
    zoom: f32,
    event_loop: &ActiveEventLoop,
) -> ViewportBuilder {
    let mut largest = Vec2::ZERO;
    for monitor in event_loop.available_monitors() {
        let size = monitor.size();
        // Points are pixels over the scale of the screen and ours.
        let scale = monitor.scale_factor() as f32 * zoom;
        largest = largest.max(vec2(size.width as f32, size.height as f32) / scale);
    }
    match viewport.inner_size {
        Some(size) if largest.x > 0.0 && largest.y > 0.0 => {
            viewport.with_inner_size(size.min(largest))
        }
        _ => viewport,
    }
}
