//! How the lines and fillings of a scene look in a theme.

use crate::colour::Colour;
use crate::scene::{Line, Paint};
use crate::theme::Theme;

impl Theme {
    /// Colour and width (px) of a line whose oil is not shaded.
    #[must_use]
    pub fn pen(&self, line: Line) -> (Colour, f64) {
        let ink = self.text.ink;
        // Working lines twice as heavy as the rest, as in ISO 1219-1's own figures.
        match line {
            Line::Working => (ink, self.strokes.series * 1.1),
            Line::Pilot => (ink, self.strokes.series * 0.75),
            Line::Symbol => (ink, self.strokes.series * 0.8),
            Line::Envelope => (self.text.quiet, self.strokes.series * 0.6),
            Line::Spring => (self.bodies.spring, self.strokes.series * 0.8),
            Line::Hatch => (self.bodies.hatch, self.strokes.rule * 0.8),
            Line::Centre | Line::Hidden | Line::Fine => (self.text.quiet, self.strokes.rule),
            Line::Accent => (self.accent, self.strokes.series * 1.1),
        }
    }

    /// Width of the oil inside a line that is shaded by pressure, px.
    #[must_use]
    pub fn oil_width(&self, line: Line) -> f64 {
        match line {
            Line::Pilot => self.strokes.series,
            _ => self.strokes.series * 2.0,
        }
    }

    /// Width of the ink around the oil of a line that is shaded by pressure, px: it also keeps that
    /// end of the ramp in sight that is near the background.
    #[must_use]
    pub fn casing_width(&self, line: Line) -> f64 {
        const CASING: f64 = 1.6;
        self.oil_width(line) + CASING
    }

    /// The colour of a filling.
    #[must_use]
    pub fn paint(&self, paint: Paint) -> Colour {
        match paint {
            Paint::Ground | Paint::Oil(None) => self.background,
            Paint::Ink => self.text.ink,
            Paint::Oil(Some(share)) => self.pressure.at(share),
            Paint::Steel => self.bodies.steel,
            Paint::Housing => self.bodies.housing,
            Paint::Band => self.rules.zero,
            Paint::Accent => self.accent,
        }
    }
}
