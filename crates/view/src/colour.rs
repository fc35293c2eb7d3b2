//! A colour, as theme files write it.

use std::fmt;
use std::str::FromStr;

use serde::{Deserialize, Serialize};

/// A colour without transparency, sRGB, eight bits a channel. Written `#rrggbb`.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize)]
#[serde(try_from = "String", into = "String")]
pub struct Colour {
    /// Red.
    pub red: u8,
    /// Green.
    pub green: u8,
    /// Blue.
    pub blue: u8,
}

/// A text that is no colour.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
#[error("\"{text}\" is no colour; write it as \"#rrggbb\"")]
pub struct ColourError {
    text: String,
}

impl FromStr for Colour {
    type Err = ColourError;

    fn from_str(text: &str) -> Result<Self, ColourError> {
        let error = || ColourError {
            text: text.to_owned(),
        };
        let hex = text.strip_prefix('#').ok_or_else(error)?;
        if hex.len() != 6 || !hex.bytes().all(|byte| byte.is_ascii_hexdigit()) {
            return Err(error());
        }
        let value = u32::from_str_radix(hex, 16).ok().ok_or_else(error)?;
        let [_, red, green, blue] = value.to_be_bytes();
        Ok(Self { red, green, blue })
    }
}

impl TryFrom<String> for Colour {
    type Error = ColourError;

    fn try_from(text: String) -> Result<Self, ColourError> {
        text.parse()
    }
}

impl From<Colour> for String {
    fn from(colour: Colour) -> Self {
        colour.to_string()
    }
}

impl fmt::Display for Colour {
    fn fmt(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        let Self { red, green, blue } = self;
        write!(formatter, "#{red:02x}{green:02x}{blue:02x}")
    }
}

impl Colour {
    /// Contrast against another colour, 1 (none) to 21 (black on white).
    ///
    /// # Source
    /// W3C, Web Content Accessibility Guidelines 2.2, "contrast ratio" and "relative luminance".
    #[must_use]
    pub fn contrast(self, other: Self) -> f64 {
        let (a, b) = (self.luminance(), other.luminance());
        (a.max(b) + 0.05) / (a.min(b) + 0.05)
    }

    /// This colour with `share` (0 to 1) of another one in it, mixed channel by channel.
    #[must_use]
    pub fn mixed(self, other: Self, share: f64) -> Self {
        let share = share.clamp(0.0, 1.0);
        let mix = |a: u8, b: u8| {
            let value = f64::from(a) + (f64::from(b) - f64::from(a)) * share;
            value.round() as u8
        };
        Self {
            red: mix(self.red, other.red),
            green: mix(self.green, other.green),
            blue: mix(self.blue, other.blue),
        }
    }

    fn luminance(self) -> f64 {
        let linear = |channel: u8| {
            let share = f64::from(channel) / 255.0;
            if share <= 0.04045 {
                share / 12.92
            } else {
                ((share + 0.055) / 1.055).powf(2.4)
            }
        };
        0.2126 * linear(self.red) + 0.7152 * linear(self.green) + 0.0722 * linear(self.blue)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn contrast_has_its_published_ends() {
        let [black, white] = ["#000000", "#ffffff"].map(|text| text.parse::<Colour>().unwrap());
        assert!(
            (black.contrast(white) - 21.0).abs() < 1e-12,
            "black on white is 21"
        );
        assert!(
            (white.contrast(white) - 1.0).abs() < 1e-12,
            "no contrast is 1"
        );
    }

    #[test]
    fn mixing_goes_from_one_colour_to_the_other() {
        let [black, white] = ["#000000", "#ffffff"].map(|text| text.parse::<Colour>().unwrap());
        for (share, mixed) in [
            (0.0, "#000000"),
            (0.2, "#333333"),
            (1.0, "#ffffff"),
            (7.0, "#ffffff"),
        ] {
            assert_eq!(black.mixed(white, share).to_string(), mixed, "{share}");
        }
    }

    #[test]
    fn colours_survive_text() {
        for text in ["#000000", "#e69f00", "#56b4e9", "#ffffff"] {
            assert_eq!(
                text.parse::<Colour>().unwrap().to_string(),
                text,
                "round trip"
            );
        }
        for bad in [
            "", "#", "ffffff", "#fffff", "#ggffff", "#fffffff", "#+fffff",
        ] {
            assert!(bad.parse::<Colour>().is_err(), "{bad:?} is no colour");
        }
    }
}
