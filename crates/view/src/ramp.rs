//! The one colour ramp of pressures, and the scale that pressures are shown on.

use helmsplit_model::{ExcessSide, Parts, PriorityRelief};
use serde::{Deserialize, Serialize};

use crate::colour::Colour;

/// Colours from none to the most, in even steps for the eye. A theme's ramp begins near its
/// background, so that more pressure always stands out more.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, Deserialize)]
#[serde(try_from = "Vec<Colour>", into = "Vec<Colour>")]
pub struct Ramp {
    stops: Vec<Colour>,
}

/// A ramp that is none.
#[derive(Debug, Clone, Copy, PartialEq, Eq, thiserror::Error)]
#[error("a ramp needs at least two colours")]
pub struct RampError;

impl TryFrom<Vec<Colour>> for Ramp {
    type Error = RampError;

    fn try_from(stops: Vec<Colour>) -> Result<Self, RampError> {
        if stops.len() < 2 {
            return Err(RampError);
        }
        Ok(Self { stops })
    }
}

impl From<Ramp> for Vec<Colour> {
    fn from(ramp: Ramp) -> Self {
        ramp.stops
    }
}

impl Ramp {
    /// The colours, evenly spaced from none to the most.
    #[must_use]
    pub fn stops(&self) -> &[Colour] {
        &self.stops
    }

    /// The colour at a share of the scale, 0 to 1; beyond, that of the nearer end.
    #[must_use]
    pub fn at(&self, share: f64) -> Colour {
        let last = self.stops.len() - 1;
        let place = share.clamp(0.0, 1.0) * last as f64;
        let below = (place.floor() as usize).min(last.saturating_sub(1));
        let part = place - below as f64;
        let (from, to) = (self.stops[below], self.stops[below + 1]);
        let mix = |from: u8, to: u8| {
            let value = f64::from(from) + part * (f64::from(to) - f64::from(from));
            value.round() as u8
        };
        Colour {
            red: mix(from.red, to.red),
            green: mix(from.green, to.green),
            blue: mix(from.blue, to.blue),
        }
    }
}

/// The pressures from 0 to which the ramp is stretched.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PressureScale {
    /// Pressure at the end of the ramp, Pa.
    pub most: f64,
}

/// End of the scale where no relief says how far pressures go, Pa.
const WITHOUT_RELIEF: f64 = 200e5;

/// The scale ends at a multiple of this, Pa.
const STEP: f64 = 50e5;

impl PressureScale {
    /// The scale of a circuit: to the highest full-flow pressure of its reliefs, rounded up. It
    /// does not depend on a run, so that two runs of a circuit can be compared by eye.
    #[must_use]
    pub fn of(parts: &Parts) -> Self {
        let priority = match &parts.priority_relief {
            PriorityRelief::None => None,
            PriorityRelief::OnPort(relief) | PriorityRelief::Pilot(relief) => Some(relief),
        };
        let reliefs = [
            parts.main_relief.as_ref(),
            priority,
            parts.excess_relief.as_ref(),
        ];
        let highest = reliefs
            .into_iter()
            .flatten()
            .map(|relief| relief.full_flow_pressure)
            .fold(0.0, f64::max);
        let unlimited = parts.main_relief.is_none()
            && parts.excess_relief.is_none()
            && !matches!(parts.excess, ExcessSide::Tank { .. });
        let most = if unlimited {
            highest.max(WITHOUT_RELIEF)
        } else {
            highest.max(STEP)
        };
        Self {
            most: (most / STEP).ceil() * STEP,
        }
    }

    /// Where a pressure (Pa gauge) lies on the scale, 0 to 1.
    #[must_use]
    pub fn share(&self, pressure: f64) -> f64 {
        (pressure / self.most).clamp(0.0, 1.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::theme::BuiltInTheme;

    /// CIE 1976 L*a*b* of an sRGB colour under D65 (ISO/CIE 11664-4; IEC 61966-2-1).
    fn lab(colour: Colour) -> [f64; 3] {
        let linear = |channel: u8| {
            let share = f64::from(channel) / 255.0;
            if share <= 0.040_45 {
                share / 12.92
            } else {
                ((share + 0.055) / 1.055).powf(2.4)
            }
        };
        let [r, g, b] = [colour.red, colour.green, colour.blue].map(linear);
        let x = 0.412_456_4 * r + 0.357_576_1 * g + 0.180_437_5 * b;
        let y = 0.212_672_9 * r + 0.715_152_2 * g + 0.072_175 * b;
        let z = 0.019_333_9 * r + 0.119_192 * g + 0.950_304_1 * b;
        let f = |t: f64| {
            if t > 216.0 / 24389.0 {
                t.cbrt()
            } else {
                (24389.0 / 27.0 * t + 16.0) / 116.0
            }
        };
        let (x, y, z) = (f(x / 0.950_47), f(y), f(z / 1.088_83));
        [116.0 * y - 16.0, 500.0 * (x - y), 200.0 * (y - z)]
    }

    #[test]
    fn steps_are_even_and_lightness_never_turns() {
        for built_in in BuiltInTheme::ALL {
            let theme = built_in.load().unwrap();
            let colours: Vec<_> = (0..=16)
                .map(|i| theme.pressure.at(f64::from(i) / 16.0))
                .collect();
            let labs: Vec<_> = colours.into_iter().map(lab).collect();
            let steps: Vec<f64> = labs
                .windows(2)
                .map(|pair| {
                    let squares = (0..3).map(|i| (pair[1][i] - pair[0][i]).powi(2));
                    squares.sum::<f64>().sqrt()
                })
                .collect();
            let mean = steps.iter().sum::<f64>() / steps.len() as f64;
            for step in &steps {
                // 8-bit channels and straight lines between stops cost some evenness.
                let off = (step / mean - 1.0).abs();
                assert!(off < 0.2, "{}: {steps:?}", theme.name);
            }
            let rises = labs[16][0] > labs[0][0];
            for pair in labs.windows(2) {
                assert_eq!(pair[1][0] > pair[0][0], rises, "{} turns", theme.name);
            }
        }
    }

    #[test]
    fn no_pressure_lies_nearer_to_the_background_than_much() {
        for built_in in BuiltInTheme::ALL {
            let theme = built_in.load().unwrap();
            let contrast = |share| theme.pressure.at(share).contrast(theme.background);
            assert!(contrast(0.0) < contrast(0.5), "{}", theme.name);
            assert!(contrast(0.5) < contrast(1.0), "{}", theme.name);
        }
    }

    #[test]
    fn ends_and_middles() {
        let ramp: Ramp = vec!["#000000", "#ff8000"]
            .into_iter()
            .map(|text| text.parse::<Colour>().unwrap())
            .collect::<Vec<_>>()
            .try_into()
            .unwrap();
        assert_eq!(ramp.at(0.5).to_string(), "#804000", "half way");
        assert_eq!(ramp.at(-3.0).to_string(), "#000000", "below");
        assert_eq!(ramp.at(7.0).to_string(), "#ff8000", "above");
        assert!(Ramp::try_from(Vec::new()).is_err(), "no colours, no ramp");
        let scale = PressureScale { most: 200e5 };
        assert!((scale.share(50e5) - 0.25).abs() < 1e-12, "a quarter");
        assert!(scale.share(-1e5).abs() < 1e-12, "suction is the low end");
    }
}
