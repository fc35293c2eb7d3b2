//! What things mean, before anybody says how they look.

use serde::{Deserialize, Serialize};

/// What a line stands for, the same through the whole program. Each meaning has one colour
/// ([`crate::Theme::series_colour`]) and one dash ([`Meaning::dash`]), and its label repeats both.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
pub enum Meaning {
    /// Prime mover, pump shaft, and what the driver commands.
    Drive,
    /// Pump and valve inlet.
    Inlet,
    /// Priority port and its line.
    Priority,
    /// Excess port and its line.
    Excess,
    /// Spool of the valve.
    Spool,
    /// Steering unit, steering cylinder, steering wheel.
    Steering,
    /// The consumer on the excess port.
    Consumer,
    /// Power turned to heat.
    Heat,
}

impl Meaning {
    /// Every meaning.
    pub const ALL: [Self; 8] = [
        Self::Drive,
        Self::Inlet,
        Self::Priority,
        Self::Excess,
        Self::Spool,
        Self::Steering,
        Self::Consumer,
        Self::Heat,
    ];

    /// The dash that repeats the meaning wherever lines of several meanings share a panel. A line
    /// that is alone in its panel is solid.
    #[must_use]
    pub fn dash(self) -> Dash {
        match self {
            Self::Drive | Self::Inlet | Self::Spool => Dash::Solid,
            Self::Priority => Dash::Long,
            Self::Excess => Dash::Short,
            Self::Steering => Dash::DashDot,
            Self::Consumer | Self::Heat => Dash::Dot,
        }
    }
}

/// How a line is broken.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize)]
pub enum Dash {
    /// Unbroken.
    Solid,
    /// Long dashes, hardly broken.
    Long,
    /// Short dashes.
    Short,
    /// Dash and dot in turn.
    DashDot,
    /// Dots.
    Dot,
}

impl Dash {
    /// Every dash.
    pub const ALL: [Self; 5] = [
        Self::Solid,
        Self::Long,
        Self::Short,
        Self::DashDot,
        Self::Dot,
    ];

    /// Lengths of line and gap in turn, px; empty for an unbroken line.
    #[must_use]
    pub fn pattern(self) -> &'static [f64] {
        match self {
            Self::Solid => &[],
            Self::Long => &[11.0, 2.5],
            Self::Short => &[5.0, 2.5],
            Self::DashDot => &[8.0, 2.5, 1.6, 2.5],
            Self::Dot => &[1.6, 2.4],
        }
    }
}

/// How many kept runs can be told apart.
pub const MOST_KEPT: usize = 5;

/// Lengths of line and gap in turn, px, of the lines of a kept run: one for each place.
const KEPT_PATTERNS: [&[f64]; MOST_KEPT] = [
    &[3.0, 3.0],
    &[9.0, 4.0],
    &[9.0, 3.0, 2.0, 3.0],
    &[1.2, 3.6],
    &[9.0, 3.0, 2.0, 3.0, 2.0, 3.0],
];

/// How pale the lines of kept runs are: this much of them covers.
pub const KEPT_OPACITY: f64 = 0.62;

/// How wide the lines of kept runs are against those of the run itself.
pub const KEPT_WIDTH: f64 = 0.7;

/// The pattern of the lines of the kept run at `place`, from 0; places repeat beyond the last.
#[must_use]
pub fn kept_pattern(place: usize) -> &'static [f64] {
    KEPT_PATTERNS[place % MOST_KEPT]
}

/// A shaded area.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize)]
pub enum Fill {
    /// What the driver asked for and did not get.
    Shortfall,
    /// A range of values that a limit marks.
    Band,
}

/// Sizes of text, px: there are three.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum TextSize {
    /// The title of a figure.
    Title,
    /// Names of panels and series.
    Label,
    /// Numbers on axes, limits, events, notes.
    Small,
}

impl TextSize {
    /// The size in px.
    #[must_use]
    pub fn px(self) -> f64 {
        match self {
            Self::Title => 17.0,
            Self::Label => 12.0,
            Self::Small => 10.5,
        }
    }
}

/// The one type family, most wanted first. All of them have tabular figures.
pub const FONT_FAMILY: &str =
    "Inter, 'Source Sans 3', 'Noto Sans', 'Segoe UI', 'Helvetica Neue', Arial, sans-serif";
