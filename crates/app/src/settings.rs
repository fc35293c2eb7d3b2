//! What the user prefers; kept from one start to the next.

use helmsplit_scenario::UnitSystem;
use serde::{Deserialize, Serialize};

use crate::first_steps::FirstSteps;

/// Light, dark, or whatever the system has.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default, Serialize, Deserialize)]
pub enum Appearance {
    /// As the system.
    #[default]
    System,
    /// Dark on white.
    Light,
    /// Light on nearly black.
    Dark,
}

impl Appearance {
    /// Every appearance with its name in the menu.
    pub const ALL: [(Self, &'static str); 3] = [
        (Self::System, "As the system"),
        (Self::Light, "Light"),
        (Self::Dark, "Dark"),
    ];
}

/// Scales to choose from, per cent.
pub(crate) const SCALES: [u16; 7] = [80, 90, 100, 125, 150, 175, 200];

/// What the user prefers.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(default)]
pub struct Settings {
    /// Units on the screen.
    pub units: UnitSystem,
    /// Light or dark.
    pub appearance: Appearance,
    /// Scale of everything, per cent.
    pub scale: u16,
    /// Hints for a new user.
    pub first_steps: FirstSteps,
}

impl Default for Settings {
    fn default() -> Self {
        Self {
            units: UnitSystem::Metric,
            appearance: Appearance::System,
            scale: 100,
            first_steps: FirstSteps::default(),
        }
    }
}

/// The name of a unit system in the menu.
#[must_use]
pub(crate) fn units_name(units: UnitSystem) -> &'static str {
    match units {
        UnitSystem::Metric => "Metric: bar, L/min, mm",
        UnitSystem::Us => "US: psi, gpm, in",
        UnitSystem::Si => "SI: Pa, m³/s, m",
    }
}
