//! How the window looks: tokens from theme files, turned into egui's terms. No other file makes
//! a colour.

use egui::{Color32, CornerRadius, FontFamily, FontId, Margin, Stroke, TextStyle, Visuals, vec2};
use helmsplit_study::Status;
use helmsplit_view::style::{KEPT_OPACITY, Meaning};
use helmsplit_view::{BuiltInTheme, Colour, Theme, ViewError, Wash};
use serde::Deserialize;

/// Colours that only a window needs.
#[derive(Debug, Clone, Copy, Deserialize)]
#[serde(deny_unknown_fields)]
pub(crate) struct WindowColours {
    /// Behind controls.
    panel: Colour,
    /// Behind text that can be edited.
    field: Colour,
    /// A control at rest.
    control: Colour,
    /// A control under the pointer.
    hover: Colour,
    /// A control being used.
    pressed: Colour,
    /// Verdicts.
    verdicts: VerdictColours,
}

/// One colour for each verdict.
#[derive(Debug, Clone, Copy, Deserialize)]
#[serde(deny_unknown_fields)]
struct VerdictColours {
    pass: Colour,
    near: Colour,
    fail: Colour,
    open: Colour,
}

/// Theme and window colours together.
#[derive(Debug, Clone)]
pub(crate) struct Look {
    /// Colours and strokes of everything that is drawn.
    pub(crate) theme: Theme,
    window: WindowColours,
    dark: bool,
}

/// Sizes of text, points.
pub(crate) const TITLE: f32 = 15.0;
pub(crate) const BODY: f32 = 13.0;
pub(crate) const SMALL: f32 = 11.0;

/// How much of a colour is left where something is out of date.
const PALE: f32 = 0.4;

/// A theme colour as egui takes it.
pub(crate) fn egui_colour(colour: Colour) -> Color32 {
    Color32::from_rgb(colour.red, colour.green, colour.blue)
}

/// A wash as egui takes it.
pub(crate) fn egui_wash(wash: Wash) -> Color32 {
    egui_colour(wash.colour).gamma_multiply(wash.opacity as f32)
}

impl Look {
    /// The light or the dark look.
    ///
    /// # Errors
    /// [`ViewError::Theme`] if a theme file does not read; a test holds that each does.
    pub(crate) fn load(dark: bool) -> Result<Self, ViewError> {
        let (theme, name, text) = if dark {
            let text = include_str!("../../../assets/theme/window/dark.ron");
            (BuiltInTheme::Dark, "window/dark", text)
        } else {
            let text = include_str!("../../../assets/theme/window/light.ron");
            (BuiltInTheme::Light, "window/light", text)
        };
        let window = ron::from_str(text).map_err(|cause| ViewError::Theme {
            name: name.to_owned(),
            cause: Box::new(cause),
        })?;
        Ok(Self {
            theme: theme.load()?,
            window,
            dark,
        })
    }

    /// Whether this is the dark look.
    pub(crate) fn is_dark(&self) -> bool {
        self.dark
    }

    /// Names and values.
    pub(crate) fn ink(&self) -> Color32 {
        egui_colour(self.theme.text.ink)
    }

    /// Units, numbers on axes, notes.
    pub(crate) fn quiet(&self) -> Color32 {
        egui_colour(self.theme.text.quiet)
    }

    /// Selection and focus.
    pub(crate) fn accent(&self) -> Color32 {
        egui_colour(self.theme.accent)
    }

    /// What is wrong.
    pub(crate) fn error(&self) -> Color32 {
        egui_colour(self.window.verdicts.fail)
    }

    /// What is doubtful.
    pub(crate) fn warning(&self) -> Color32 {
        egui_colour(self.window.verdicts.near)
    }

    /// Behind a control under the pointer.
    pub(crate) fn hover(&self) -> Color32 {
        egui_colour(self.window.hover)
    }

    /// Behind a control at rest.
    pub(crate) fn control(&self) -> Color32 {
        egui_colour(self.window.control)
    }

    /// A colour of something that is out of date: nearer to the ground.
    pub(crate) fn paled(&self, colour: Color32) -> Color32 {
        egui_colour(self.theme.background).lerp_to_gamma(colour, PALE)
    }

    /// The colour of a verdict.
    pub(crate) fn verdict(&self, status: &Status) -> Color32 {
        let colours = &self.window.verdicts;
        egui_colour(match status {
            Status::Pass => colours.pass,
            Status::Near => colours.near,
            Status::Fail => colours.fail,
            Status::NeedsMap | Status::NotApplicable(_) => colours.open,
        })
    }

    /// Behind traces.
    pub(crate) fn ground(&self) -> Color32 {
        egui_colour(self.theme.background)
    }

    /// Text upon the accent.
    pub(crate) fn on_accent(&self) -> Color32 {
        egui_colour(self.theme.text.on_accent)
    }

    /// The lines of a kept run.
    pub(crate) fn kept(&self, meaning: Meaning) -> Color32 {
        let colour = self.theme.series_colour(meaning);
        egui_colour(colour.mixed(self.theme.background, 1.0 - KEPT_OPACITY))
    }

    /// Hands the look to egui.
    pub(crate) fn apply(&self, context: &egui::Context) {
        context.set_theme(if self.dark {
            egui::Theme::Dark
        } else {
            egui::Theme::Light
        });
        let visuals = self.visuals();
        context.all_styles_mut(|style| {
            style.visuals = visuals.clone();
            style.spacing.item_spacing = vec2(8.0, 4.0);
            style.spacing.button_padding = vec2(8.0, 3.0);
            style.spacing.interact_size = vec2(32.0, 22.0);
            style.spacing.menu_margin = Margin::same(6);
            style.animation_time = 0.0;
            style.interaction.tooltip_delay = 0.35;
            let font = |size| FontId::new(size, FontFamily::Proportional);
            style.text_styles = [
                (TextStyle::Heading, font(TITLE)),
                (TextStyle::Body, font(BODY)),
                (TextStyle::Button, font(BODY)),
                (TextStyle::Small, font(SMALL)),
                (
                    TextStyle::Monospace,
                    FontId::new(BODY, FontFamily::Monospace),
                ),
            ]
            .into();
        });
    }

    fn visuals(&self) -> Visuals {
        let mut visuals = if self.dark {
            Visuals::dark()
        } else {
            Visuals::light()
        };
        let window = &self.window;
        let rule = Stroke::new(1.0, egui_colour(self.theme.rules.grid));
        let ink = Stroke::new(1.0, self.ink());
        visuals.panel_fill = egui_colour(window.panel);
        visuals.window_fill = egui_colour(window.panel);
        visuals.window_stroke = Stroke::new(1.0, egui_colour(self.theme.rules.zero));
        visuals.extreme_bg_color = egui_colour(window.field);
        visuals.text_edit_bg_color = Some(egui_colour(window.field));
        visuals.faint_bg_color = egui_colour(window.control);
        visuals.weak_text_color = Some(self.quiet());
        visuals.error_fg_color = self.error();
        visuals.warn_fg_color = self.warning();
        visuals.hyperlink_color = self.accent();
        visuals.selection.bg_fill = self.accent().gamma_multiply(0.35);
        visuals.selection.stroke = Stroke::new(1.5, self.accent());
        let fills = [
            (&mut visuals.widgets.noninteractive, window.panel),
            (&mut visuals.widgets.inactive, window.control),
            (&mut visuals.widgets.hovered, window.hover),
            (&mut visuals.widgets.active, window.pressed),
            (&mut visuals.widgets.open, window.hover),
        ];
        for (widget, fill) in fills {
            widget.bg_fill = egui_colour(fill);
            widget.weak_bg_fill = egui_colour(fill);
            widget.bg_stroke = rule;
            widget.fg_stroke = ink;
            widget.corner_radius = CornerRadius::same(3);
            widget.expansion = 0.0;
        }
        // A control at rest has an outline that shows on its ground.
        visuals.widgets.inactive.bg_stroke = Stroke::new(1.0, egui_colour(self.theme.rules.zero));
        visuals.widgets.hovered.bg_stroke = Stroke::new(1.0, self.quiet());
        visuals.widgets.active.bg_stroke = Stroke::new(1.5, self.accent());
        visuals
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn both_looks_read_and_their_verdicts_stand_out() {
        // WCAG 2.2 success criterion 1.4.3: 4.5 for text.
        for dark in [false, true] {
            let look = Look::load(dark).unwrap();
            let verdicts = &look.window.verdicts;
            for colour in [verdicts.pass, verdicts.near, verdicts.fail, verdicts.open] {
                for ground in [look.theme.background, look.window.panel] {
                    let contrast = colour.contrast(ground);
                    assert!(contrast >= 4.5, "{colour} on {ground}: {contrast}");
                }
            }
            for ground in [look.window.panel, look.window.control, look.window.field] {
                for tone in [look.theme.text.ink, look.theme.text.quiet] {
                    let contrast = tone.contrast(ground);
                    assert!(contrast >= 4.5, "text {tone} on {ground}: {contrast}");
                }
            }
        }
    }
}
