//! How things look: the only place where colours and stroke widths live.

use serde::{Deserialize, Serialize};

use crate::colour::Colour;
use crate::error::ViewError;
use crate::ramp::Ramp;
use crate::style::{Fill, Meaning};

/// Colours and strokes of everything that is drawn.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Theme {
    /// Its name: `light`, `dark`, `print`.
    pub name: String,
    /// Behind everything.
    pub background: Colour,
    /// Tones of text.
    pub text: TextTones,
    /// Thin lines.
    pub rules: RuleColours,
    /// One colour for each meaning.
    pub series: SeriesColours,
    /// Shaded areas.
    pub fills: FillColours,
    /// The one accent: selection, focus.
    pub accent: Colour,
    /// Stroke widths, px.
    pub strokes: Strokes,
    /// Bodies in drawings.
    pub bodies: BodyColours,
    /// Oil by pressure, from none to the most.
    pub pressure: Ramp,
}

/// Colours of bodies in drawings.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct BodyColours {
    /// Steel that moves.
    pub steel: Colour,
    /// Cut face of the housing.
    pub housing: Colour,
    /// Hatching of cut faces.
    pub hatch: Colour,
    /// Springs.
    pub spring: Colour,
}

/// Tones of text.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct TextTones {
    /// Names and values.
    pub ink: Colour,
    /// Units, numbers on axes, notes.
    pub quiet: Colour,
    /// Text upon the accent.
    pub on_accent: Colour,
}

/// Colours of thin lines.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct RuleColours {
    /// Grid.
    pub grid: Colour,
    /// Line at zero.
    pub zero: Colour,
    /// Axis at the foot of the figure.
    pub frame: Colour,
    /// Limits and set values.
    pub limit: Colour,
    /// Events.
    pub mark: Colour,
}

/// One colour for each [`Meaning`].
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
#[allow(missing_docs, reason = "named and explained in `Meaning`")]
pub struct SeriesColours {
    pub drive: Colour,
    pub inlet: Colour,
    pub priority: Colour,
    pub excess: Colour,
    pub spool: Colour,
    pub steering: Colour,
    pub consumer: Colour,
    pub heat: Colour,
}

/// One wash for each [`Fill`].
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
#[allow(missing_docs, reason = "named and explained in `Fill`")]
pub struct FillColours {
    pub shortfall: Wash,
    pub band: Wash,
}

/// A colour laid over what is behind it.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Wash {
    /// Colour.
    pub colour: Colour,
    /// How much of it covers, 0 to 1.
    pub opacity: f64,
}

/// Stroke widths, px.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Strokes {
    /// Series.
    pub series: f64,
    /// Grid, zero line and axis.
    pub rule: f64,
    /// Limits.
    pub limit: f64,
    /// Events.
    pub mark: f64,
}

/// The themes that come with the program.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum BuiltInTheme {
    /// Dark on white.
    #[default]
    Light,
    /// Light on nearly black.
    Dark,
    /// Black on paper, heavier lines.
    Print,
}

impl BuiltInTheme {
    /// Every theme.
    pub const ALL: [Self; 3] = [Self::Light, Self::Dark, Self::Print];

    /// The word for it: `light`, `dark` or `print`.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Light => "light",
            Self::Dark => "dark",
            Self::Print => "print",
        }
    }

    /// Reads the theme.
    ///
    /// # Errors
    /// [`ViewError::Theme`] if its file does not read; a test holds that each does.
    pub fn load(self) -> Result<Theme, ViewError> {
        let text = match self {
            Self::Light => include_str!("../../../assets/theme/light.ron"),
            Self::Dark => include_str!("../../../assets/theme/dark.ron"),
            Self::Print => include_str!("../../../assets/theme/print.ron"),
        };
        Theme::from_ron(self.name(), text)
    }
}

impl Theme {
    /// Reads a theme from RON.
    ///
    /// # Errors
    /// [`ViewError::Theme`] with line, column and cause, under the `name` given.
    pub fn from_ron(name: &str, text: &str) -> Result<Self, ViewError> {
        ron::from_str(text).map_err(|cause| ViewError::Theme {
            name: name.to_owned(),
            cause: Box::new(cause),
        })
    }

    /// The colour of a meaning.
    #[must_use]
    pub fn series_colour(&self, meaning: Meaning) -> Colour {
        match meaning {
            Meaning::Drive => self.series.drive,
            Meaning::Inlet => self.series.inlet,
            Meaning::Priority => self.series.priority,
            Meaning::Excess => self.series.excess,
            Meaning::Spool => self.series.spool,
            Meaning::Steering => self.series.steering,
            Meaning::Consumer => self.series.consumer,
            Meaning::Heat => self.series.heat,
        }
    }

    /// The wash of a shaded area.
    #[must_use]
    pub fn wash(&self, fill: Fill) -> Wash {
        match fill {
            Fill::Shortfall => self.fills.shortfall,
            Fill::Band => self.fills.band,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Okabe & Ito (2008), "Color universal design": the eight colours, sRGB, and white for black
    /// on a dark ground.
    const OKABE_ITO: [&str; 9] = [
        "#000000", "#e69f00", "#56b4e9", "#009e73", "#f0e442", "#0072b2", "#d55e00", "#cc79a7",
        "#ffffff",
    ];

    #[test]
    fn each_theme_reads_and_has_its_name() {
        for built_in in BuiltInTheme::ALL {
            let theme = built_in.load().unwrap();
            assert_eq!(theme.name, built_in.name(), "{built_in:?}");
        }
    }

    #[test]
    fn hydraulic_meanings_have_their_own_published_colour() {
        for built_in in BuiltInTheme::ALL {
            let theme = built_in.load().unwrap();
            let mut seen = Vec::new();
            for meaning in Meaning::ALL {
                let colour = theme.series_colour(meaning).to_string();
                assert!(!seen.contains(&colour), "{meaning:?} in {}", theme.name);
                // Shafts and heat are neutral greys: they are not oil.
                if !matches!(meaning, Meaning::Drive | Meaning::Heat) {
                    assert!(
                        OKABE_ITO.contains(&colour.as_str()),
                        "{meaning:?} in {}: {colour}",
                        theme.name
                    );
                }
                seen.push(colour);
            }
        }
    }

    #[test]
    fn text_and_lines_stand_out() {
        // Text: WCAG 2.2 success criterion 1.4.3, 4.5. Lines cannot all reach the 3 of 1.4.11:
        // the set's orange has 2.2 on white, which is why dash and label repeat the meaning.
        for built_in in BuiltInTheme::ALL {
            let theme = built_in.load().unwrap();
            let ground = theme.background;
            for tone in [theme.text.ink, theme.text.quiet] {
                let contrast = tone.contrast(ground);
                assert!(contrast >= 4.5, "text {tone} in {}: {contrast}", theme.name);
            }
            for meaning in Meaning::ALL {
                let contrast = theme.series_colour(meaning).contrast(ground);
                assert!(contrast >= 2.2, "{meaning:?} in {}: {contrast}", theme.name);
            }
        }
    }

    #[test]
    fn a_bad_theme_says_where() {
        let text = include_str!("../../../assets/theme/light.ron");
        let broken = text.replace("#e69f00", "#e69f0");
        let error = Theme::from_ron("mine", &broken).unwrap_err().to_string();
        assert!(error.contains("theme mine"), "{error}");
        assert!(error.contains("\"#e69f0\" is no colour"), "{error}");
        let line = 1 + text
            .lines()
            .position(|line| line.contains("excess"))
            .unwrap();
        assert!(error.contains(&format!(" {line}:")), "line {line}: {error}");
        let unknown = text.replace("accent:", "acent:");
        let error = Theme::from_ron("mine", &unknown).unwrap_err().to_string();
        assert!(error.contains("acent"), "{error}");
    }
}
