//! Circuits that come with the program. All machines are invented.

/// A circuit file that comes with the program.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Preset {
    /// Its name on the command line.
    pub key: &'static str,
    /// The text of its circuit file.
    pub text: &'static str,
}

macro_rules! presets {
    ($( $key:literal ),* $(,)?) => {
        /// Every preset; the first is the demo.
        pub static PRESETS: &[Preset] = &[ $( Preset {
            key: $key,
            text: include_str!(
                concat!("../../../assets/circuits/", $key, ".circuit.ron")
            ),
        } ),* ];
    };
}

presets![
    "orchard_carrier",
    "vineyard_sprayer",
    "nursery_loader",
    "depot_tug",
    "frost_pruner",
    "workshop_bench",
];

impl Preset {
    /// The preset of that name; hyphens count as underscores.
    #[must_use]
    pub fn from_key(key: &str) -> Option<Self> {
        let key = key.trim().to_lowercase().replace(['-', ' '], "_");
        PRESETS.iter().copied().find(|preset| preset.key == key)
    }

    /// The name of its circuit file.
    #[must_use]
    pub fn file_name(&self) -> String {
        format!("{}.circuit.ron", self.key)
    }

    /// The scenario in it.
    ///
    /// # Errors
    /// The findings of reading it; a test holds that there are none that prevent its use.
    pub fn scenario(&self) -> Result<crate::Scenario, crate::Findings> {
        let (scenario, findings) = crate::Scenario::from_text(&self.file_name(), self.text);
        scenario.ok_or(findings)
    }
}

#[cfg(test)]
mod tests;
