//! The circuit with the symbols of ISO 1219-1: exactly what sits in its slots.
//!
//! Conventions of ISO 1219-1 that the drawing keeps: continuous lines are working lines, dashed
//! lines pilot lines, a frame of dashes and dots joins symbols that are one body; valves are drawn
//! at rest, their lines meet the position that the spring holds; lines join only at a dot. The
//! steering unit is simplified to its directional valve, meter and wheel.

mod context;
mod excess;
mod frame;
mod lift;
mod places;
mod return_side;
mod steering;
mod steering_unit;
mod supply;
mod symbols;
#[cfg(test)]
mod tests;
mod valve;

pub use context::{DrawingOptions, Notes};
pub(crate) use context::{size_text, value_text};

use helmsplit_model::{Circuit, ExcessSide, PriorityRelief, SteeringSide};

use crate::moment::Moment;
use crate::ramp::PressureScale;
use crate::scale_bar::scale_bar;
use crate::scene::{Part, Scene};
use context::Context;

/// Where the pressure scale stands, px.
const SCALE_BAR: (f64, f64) = (400.0, 742.0);

/// The circuit as a drawing. With a moment, lines are shaded by pressure on one scale
/// ([`PressureScale::of`]), arrows show flows by direction and size, cylinders stand where they
/// are, and values stand beside the lines if `options` want them.
///
/// Part ids are `prime_mover`, `suction`, `pump`, `inlet`, `main_relief`, `valve`,
/// `priority_relief`, `line`, `steering.*`, `excess_port`, `excess_relief`, `excess.*`,
/// `return_line`, `pressure_scale`.
///
/// # Examples
/// ```
/// use helmsplit_scenario::presets::Preset;
/// use helmsplit_view::diagram::DrawingOptions;
/// use helmsplit_view::{BuiltInTheme, circuit_scene, svg_from_scene};
///
/// let preset = Preset::from_key("orchard_carrier").unwrap();
/// let circuit = preset.scenario().unwrap().circuit().unwrap();
/// let scene = circuit_scene(&circuit, None, DrawingOptions::default());
/// assert!(scene.part("excess.motor").is_some());
/// let svg = svg_from_scene(&scene, &BuiltInTheme::Dark.load()?, "circuit");
/// assert!(svg.starts_with("<svg"));
/// # Ok::<(), helmsplit_view::ViewError>(())
/// ```
#[must_use]
pub fn circuit_scene(circuit: &Circuit, moment: Option<&Moment>, options: DrawingOptions) -> Scene {
    let context = Context {
        parts: circuit.parts(),
        moment,
        options,
        scale: PressureScale::of(circuit.parts()),
    };
    let mut parts = Vec::new();
    context.return_side(&mut parts);
    context.supply(&mut parts);
    context.valve(&mut parts);
    context.steering(&mut parts);
    context.priority_relief(&mut parts);
    context.excess(&mut parts);
    let description = described(&context, &parts);
    if let (Some(moment), true) = (moment, options.scale_bar) {
        parts.push(scale_bar(
            SCALE_BAR,
            context.scale,
            options.units,
            moment.time,
        ));
    }
    Scene::new("Steering circuit".to_owned(), description, parts)
}

/// The drawing in words.
fn described(context: &Context<'_>, parts: &[Part]) -> String {
    let names: Vec<_> = parts.iter().map(|part| part.label.as_str()).collect();
    let steering = match context.parts.steering {
        SteeringSide::Bench(_) => "a bench throttle",
        SteeringSide::Unit(_) => "a hydrostatic steering unit with cylinder",
        SteeringSide::Motor(_) => "a hydraulic motor",
    };
    let excess = match context.parts.excess {
        ExcessSide::Tank { .. } => "goes to tank through an orifice",
        ExcessSide::Bench { .. } => "feeds a bench throttle",
        ExcessSide::Motor(_) => "feeds a hydraulic motor",
        ExcessSide::Lift(_) => "feeds a lift cylinder",
        ExcessSide::Blocked => "is blocked",
    };
    let relief = match context.parts.priority_relief {
        PriorityRelief::None => "no relief of its own",
        PriorityRelief::OnPort(_) => "a relief on the priority port",
        PriorityRelief::Pilot(_) => "a pilot relief on the spring chamber",
    };
    let mut text = format!(
        "Circuit in symbols of ISO 1219-1. A pump feeds a priority valve; its priority port feeds \
         {steering} and has {relief}; its excess port {excess}. Parts: {}.",
        names.join(", ")
    );
    let values = ["p_in", "p_c", "p_e"].map(|name| context.pressure(name));
    if let (Some(moment), [Some(inlet), Some(priority), Some(excess)]) = (context.moment, values) {
        let show = |si| context.text(si, helmsplit_model::Quantity::Pressure);
        text += &format!(
            " At {}: inlet {}, priority port {}, excess port {}.",
            context.text(moment.time, helmsplit_model::Quantity::Time),
            show(inlet),
            show(priority),
            show(excess)
        );
    }
    text
}
