//! Where a scene lies on the screen: fitted into its frame, zoomed, moved.

use egui::{Pos2, Rect, Vec2, pos2};
use kurbo::Point;

/// Largest zoom against the drawing that just fits.
const LARGEST: f32 = 12.0;

/// From a scene to the screen: points of a px, and the place of the scene's origin.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Place {
    pub(super) scale: f32,
    origin: Vec2,
}

impl Place {
    /// A point of the scene on the screen.
    pub(super) fn on_screen(&self, at: Point) -> Pos2 {
        pos2(at.x as f32, at.y as f32) * self.scale + self.origin
    }

    /// A point of the screen in the scene.
    pub(super) fn in_scene(&self, at: Pos2) -> Point {
        let at = (at - self.origin) / self.scale;
        Point::new(f64::from(at.x), f64::from(at.y))
    }

    /// A frame of the scene on the screen.
    pub(super) fn frame(&self, frame: kurbo::Rect) -> Rect {
        let corner = |x, y| self.on_screen(Point::new(x, y));
        Rect::from_min_max(corner(frame.x0, frame.y0), corner(frame.x1, frame.y1))
    }
}

/// How a scene is looked at.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Zoom {
    /// 1 where the scene just fits.
    factor: f32,
    /// The point of the scene in the middle of the frame, as a share of its bounds.
    middle: Vec2,
}

impl Default for Zoom {
    fn default() -> Self {
        Self {
            factor: 1.0,
            middle: Vec2::splat(0.5),
        }
    }
}

impl Zoom {
    /// Whether the whole scene is in view.
    pub(super) fn is_fit(&self) -> bool {
        self.factor <= 1.0
    }

    /// Where a scene of these bounds lies in a frame.
    pub(super) fn place(&self, bounds: kurbo::Rect, frame: Rect) -> Place {
        let size = Vec2::new(bounds.width() as f32, bounds.height() as f32).max(Vec2::splat(1.0));
        let fit = (frame.width() / size.x).min(frame.height() / size.y);
        let scale = fit.max(1e-3) * self.factor;
        let corner = Vec2::new(bounds.x0 as f32, bounds.y0 as f32);
        let middle = corner + self.middle * size;
        Place {
            scale,
            origin: frame.center().to_vec2() - middle * scale,
        }
    }

    /// Zooms by a factor; what lies under `at` stays there.
    pub(super) fn zoom(&mut self, by: f32, at: Pos2, bounds: kurbo::Rect, frame: Rect) {
        let kept = self.place(bounds, frame).in_scene(at);
        self.factor = (self.factor * by).clamp(1.0, LARGEST);
        let now = self.place(bounds, frame).on_screen(kept);
        self.pan(at - now, bounds, frame);
    }

    /// Moves the drawing by so many points, as far as something of it is to be seen.
    pub(super) fn pan(&mut self, by: Vec2, bounds: kurbo::Rect, frame: Rect) {
        if self.is_fit() {
            *self = Self::default();
            return;
        }
        let size = Vec2::new(bounds.width() as f32, bounds.height() as f32);
        let scale = self.place(bounds, frame).scale;
        let middle = self.middle - by / (scale * size);
        // Half a frame of the drawing's edge at most is left empty.
        self.middle = middle.clamp(Vec2::ZERO, Vec2::splat(1.0));
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use egui::vec2;

    const BOUNDS: kurbo::Rect = kurbo::Rect::new(-16.0, -10.0, 784.0, 590.0);

    fn frame() -> Rect {
        Rect::from_min_size(pos2(100.0, 50.0), vec2(400.0, 400.0))
    }

    #[test]
    fn a_scene_fits_and_stands_in_the_middle() {
        let place = Zoom::default().place(BOUNDS, frame());
        assert!((place.scale - 0.5).abs() < 1e-6, "{place:?}");
        let shown = place.frame(BOUNDS);
        assert!(frame().expand(0.01).contains_rect(shown), "{shown:?}");
        assert!(
            (shown.center() - frame().center()).length() < 1e-3,
            "{shown:?}"
        );
        let there = Point::new(200.0, 100.0);
        let back = place.in_scene(place.on_screen(there));
        assert!((back - there).hypot() < 1e-3, "there and back: {back:?}");
    }

    #[test]
    fn zoom_keeps_the_point_under_the_pointer() {
        let mut zoom = Zoom::default();
        let pointer = pos2(260.0, 300.0);
        let before = zoom.place(BOUNDS, frame()).in_scene(pointer);
        zoom.zoom(3.0, pointer, BOUNDS, frame());
        let after = zoom.place(BOUNDS, frame());
        assert!((after.scale - 1.5).abs() < 1e-6, "three times as large");
        assert!(
            (after.in_scene(pointer) - before).hypot() < 0.01,
            "it stays"
        );
        zoom.zoom(0.1, pointer, BOUNDS, frame());
        assert_eq!(
            zoom,
            Zoom::default(),
            "out again: the whole of it, in the middle"
        );
    }
}
