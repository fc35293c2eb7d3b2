//! Drawings as SVG files.

use helmsplit_model::Circuit;
use helmsplit_view::Moment;
use helmsplit_view::diagram::DrawingOptions;
use helmsplit_view::{Theme, circuit_scene, svg_from_scene, valve_scene};

/// Which drawing.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Export {
    /// The circuit in symbols.
    Circuit,
    /// The valve in section.
    Section,
}

impl Export {
    /// Both.
    pub(crate) const ALL: [Self; 2] = [Self::Circuit, Self::Section];

    /// Its name in the menu.
    pub(crate) fn name(self) -> &'static str {
        match self {
            Self::Circuit => "Circuit drawing as SVG",
            Self::Section => "Valve section as SVG",
        }
    }

    /// What the name of its file ends with.
    pub(crate) fn suffix(self) -> &'static str {
        match self {
            Self::Circuit => "circuit.svg",
            Self::Section => "valve.svg",
        }
    }
}

/// The drawing of a circuit of that name, at a moment, as an SVG document.
pub(crate) fn svg(
    export: Export,
    name: &str,
    (circuit, moment): (&Circuit, Option<&Moment>),
    options: DrawingOptions,
    theme: &Theme,
) -> String {
    let (mut scene, id) = match export {
        Export::Circuit => (circuit_scene(circuit, moment, options), "circuit"),
        Export::Section => (valve_scene(circuit, moment, None, options), "valve"),
    };
    scene.title = format!("{name}: {}", scene.title);
    svg_from_scene(&scene, theme, id)
}
