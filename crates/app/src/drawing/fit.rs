//! The valve in section as long as its frame has room for, with letters at their own size.

use egui::Vec2;
use helmsplit_view::diagram::{DrawingOptions, Notes};
use helmsplit_view::scene::Scene;
use helmsplit_view::valve_scene;

use super::canvas::Drawn;

/// Room around the section for names that reach beyond it, and for margins, px.
const AROUND_NOTES: f64 = 114.0;
const AROUND_BARE: f64 = 36.0;

/// The section is drawn no shorter and no longer, px.
const LENGTHS: std::ops::RangeInclusive<f64> = 240.0..=1400.0;

/// Where notes leave less than this share of the length that there is room for, sizes are left to
/// pointing.
const ENOUGH: f64 = 0.85;

/// The section of a valve for a frame of that size, points; with fewer notes than `options` ask
/// for where the frame is low.
pub(super) fn fitted_section(room: Vec2, drawn: &Drawn<'_>, options: DrawingOptions) -> Scene {
    let (around, fewer) = match options.notes {
        Notes::None => (AROUND_BARE, None),
        Notes::Names => (AROUND_NOTES, None),
        Notes::Full => (AROUND_NOTES, Some(Notes::Names)),
    };
    let wanted = f64::from(room.x) - around;
    let (scene, length) = fitted(wanted, room, drawn, options);
    match fewer {
        Some(notes) if length < ENOUGH * wanted => {
            fitted(wanted, room, drawn, DrawingOptions { notes, ..options }).0
        }
        _ => scene,
    }
}

/// The section at most so long that it fits, and its length, px.
fn fitted(wanted: f64, room: Vec2, drawn: &Drawn<'_>, options: DrawingOptions) -> (Scene, f64) {
    let made = |length: f64| {
        let section_length = length.clamp(*LENGTHS.start(), *LENGTHS.end());
        let options = DrawingOptions {
            section_length,
            ..options
        };
        let scene = valve_scene(drawn.circuit, drawn.moment, None, options);
        (scene, section_length)
    };
    let (scene, length) = made(wanted);
    let excess = scene.bounds.height() - f64::from(room.y);
    let housing = scene.part("valve.housing").filter(|_| excess > 0.0);
    let Some(slope) = housing.map(|part| part.bounds.height() / part.bounds.width()) else {
        return (scene, length);
    };
    made(length - excess / slope)
}
