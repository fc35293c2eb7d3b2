//! The priority valve in section, at true proportions and at a given travel.
//!
//! The head end is on the left, the spring on the right; the spool moves right as it opens the
//! excess land. Faces that are cut are hatched, housing and spool in opposite directions; what
//! lies behind the section plane is dashed. Which dimensions are true and which only hold them
//! together is said in `proportions.rs`: in short, everything that the valve's record gives, but
//! not wall thicknesses, core widths and the number of coils. Volumes are not to scale, and neither
//! is the clearance, which would be too thin to see.

mod hatch;
mod housing;
mod notes;
mod proportions;
mod sheet;
mod spool;
#[cfg(test)]
mod tests;
mod travel_scale;

use helmsplit_model::{Circuit, Quantity};

use crate::diagram::{DrawingOptions, Notes, value_text};
use crate::moment::Moment;
use crate::ramp::PressureScale;
use crate::scale_bar::scale_bar;
use crate::scene::{Part, Scene};
use proportions::Proportions;
use sheet::Sheet;

/// From the lower row of notes down to the travel scale, px.
const TO_TRAVEL: f64 = 64.0;

/// From the travel scale down to the pressure scale, px.
const TO_PRESSURE: f64 = 76.0;

/// Left ends of both scales, as a share of the length of the section, and at least this far from
/// its left end, px: their names stand there.
const SCALES_X: (f64, f64) = (0.225, 112.0);

/// No section is shorter, px.
const SHORTEST: f64 = 120.0;

/// The valve of a circuit in section, with the spool at `travel` (m), or at that of the moment, or
/// sprung shut. With a moment, the oil is shaded by pressure on the scale of the whole circuit.
///
/// Part ids begin with `valve.`; the scale is `pressure_scale`.
///
/// # Examples
/// ```
/// use helmsplit_scenario::presets::Preset;
/// use helmsplit_view::diagram::DrawingOptions;
/// use helmsplit_view::valve_scene;
///
/// let preset = Preset::from_key("orchard_carrier").unwrap();
/// let circuit = preset.scenario().unwrap().circuit().unwrap();
/// let scene = valve_scene(&circuit, None, Some(0.0023), DrawingOptions::default());
/// assert!(scene.description.contains("2.30 mm"));
/// ```
#[must_use]
pub fn valve_scene(
    circuit: &Circuit,
    moment: Option<&Moment>,
    travel: Option<f64>,
    options: DrawingOptions,
) -> Scene {
    let valve = &circuit.parts().valve;
    let travel = travel.or(moment.map(Moment::travel)).unwrap_or(0.0);
    let scale = PressureScale::of(circuit.parts());
    let length = options.section_length.max(SHORTEST);
    let shape = Proportions::of(valve);
    let sheet = Sheet::new(shape, travel * 1000.0, moment, (scale, length));
    let mut parts: Vec<Part> = Vec::new();
    sheet.body(&mut parts);
    sheet.moving(&mut parts);
    let x = (SCALES_X.0 * length).max(SCALES_X.1);
    let mut foot = sheet.at(0.0, -sheet.half_height).1;
    if options.notes != Notes::None {
        foot = sheet.notes(&mut parts, valve, options) + TO_TRAVEL;
        parts.push(sheet.travel_scale((x, foot), options));
    }
    if let (Some(moment), true) = (moment, options.scale_bar) {
        let at = (x, foot + TO_PRESSURE);
        parts.push(scale_bar(at, scale, options.units, moment.time));
    }
    let description = described(&sheet, options);
    Scene::new("Priority valve in section".to_owned(), description, parts)
}

fn described(sheet: &Sheet<'_>, options: DrawingOptions) -> String {
    let length = |mm: f64| value_text(mm / 1000.0, Quantity::Length, options.units);
    let gap = sheet.shape.land_gap(sheet.travel);
    let land = if gap > 0.0 {
        format!("is open by {}", length(gap))
    } else {
        format!("is shut, overlapping by {}", length(-gap))
    };
    format!(
        "Section along the spool: head end left, spring right. The spool stands at {} of {}; the \
         excess land {land}.",
        length(sheet.travel),
        length(sheet.shape.stroke)
    )
}
