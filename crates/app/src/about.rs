//! What the program is, what it leaves out, what to beware of, and its keys.

use egui::{Grid, RichText, ScrollArea, Ui};

use crate::look::Look;

/// Cautions, one paragraph each.
const CAUTIONS: [&str; 5] = [
    "Steering is safety-critical: results support, never replace, tests on the machine, the maker's \
     instructions, local codes and standards (ISO 5010, ISO 10998, ISO 4413 as they apply) and \
     licensed or competent practice.",
    "Oil under pressure injects through skin: never feel for leaks; go to a doctor at once.",
    "Release stored energy (accumulators, raised loads, articulated frames) and lock out before \
     opening a line.",
    "Hot oil burns.",
    "Never raise a relief setting to hide a fault.",
];

/// What the equations leave out: the list of docs/model.md, shortened.
const NOT_MODELLED: [&str; 11] = [
    "Temperature: one for the whole circuit and the whole run; no heating, no cold plug of oil.",
    "Waves inside a line segment; friction that depends on frequency.",
    "Air that goes into solution and out of it, foam; what cavitation does to parts.",
    "Side forces on the spool, its eccentricity, lock and silting; deformation of the body; \
     clearances that change with pressure.",
    "Inertia of the oil in holes and chambers of the valve; losses of its passages beside the \
     restrictions named.",
    "The reliefs' own mass and spring.",
    "Engine: torque curve, governor lag, clutch, hydrostatic transmission.",
    "Machine: linkage geometry, articulation, tyre dynamics, path of the vehicle.",
    "Driver: the wheel rate is given, and the torque at the wheel is not computed.",
    "Steering unit: slip past the meter, timing grooves, emergency steering, reaction types.",
    "Electronics, sensors, load-sensing pumps.",
];

/// Keys and what they do.
const KEYS: &[(&str, &str)] = &[
    ("Ctrl+O", "Open a circuit"),
    ("Ctrl+S", "Save"),
    ("Ctrl+Shift+S", "Save as"),
    ("Ctrl+Z", "Undo"),
    ("Ctrl+Shift+Z, Ctrl+Y", "Redo"),
    (
        "Ctrl+F",
        "Find a parameter, a choice, a verdict, a trace or a command",
    ),
    ("Ctrl+Q", "Quit"),
    ("F1", "This list"),
    (
        "Escape",
        "Close a dialog; leave a field and keep the last good value",
    ),
    ("Tab, Shift+Tab", "Next and previous control"),
    ("Enter", "Press the button; take the value that was typed"),
    ("Up, Down", "In a field: one step more or less"),
    ("Page up, Page down", "In a field: ten steps more or less"),
    ("Wheel", "In a field: one step more or less"),
    ("Drag a name", "The value beside it"),
    ("Ctrl+K", "Keep this run under a name"),
    (
        "Left, Right",
        "In the traces: cursor A by a pixel, with Shift by twenty",
    ),
    (
        "Alt+Left, Alt+Right",
        "In the traces: cursor B by a pixel, with Shift by twenty",
    ),
    ("Home, End", "In the traces: cursor A to start or end"),
    ("B, X", "In the traces: cursor B to A; change the two over"),
    ("Escape", "In the traces: take cursor B away"),
    (
        "N, Shift+N",
        "In the traces: cursor A to the next, the last event",
    ),
    ("Up, Down", "In the traces: pick a panel; with Alt move it"),
    (
        "H, Shift+H",
        "In the traces: hide the picked panel; show everything",
    ),
    (
        "Y, T",
        "In the traces: value axes follow the zoom or stay; table of readings",
    ),
    ("Ctrl+C", "In the traces: copy the values at cursor A"),
    (
        "Plus, Minus, 0",
        "In the traces: zoom in, zoom out, whole run",
    ),
    ("Ctrl+wheel", "Over the traces: zoom around the pointer"),
    ("Shift+wheel", "Over the traces: move along"),
    (
        "Click or drag",
        "In the traces: put cursor A, with Shift cursor B",
    ),
    (
        "Drag names",
        "Beside the traces: move the panel to another place",
    ),
    ("Click, other button", "On traces and names: their menus"),
    ("Drag, other button", "In the traces: zoom to the stretch"),
    ("Double click", "In the traces: whole run"),
    (
        "Space",
        "In the traces and the drawing: play the run, and stop",
    ),
    (
        "Left, Right",
        "In the drawing: cursor by a step, with Shift by twenty; on a part: the next part",
    ),
    ("Enter", "On a part of the drawing: its card"),
    ("Plus, Minus, 0", "In the drawing: larger, smaller, all"),
    ("Ctrl+wheel", "Over the drawing: zoom around the pointer"),
    ("Drag", "In a drawing that is zoomed: move it"),
    ("Drag a point", "On the manoeuvre: its time and value"),
    (
        "Ctrl, Shift",
        "While dragging: no snapping; in time or in value alone",
    ),
    ("Double click", "On the manoeuvre: a new point"),
    (
        "Arrow keys",
        "At a point or a template: one step, with Shift ten, with Ctrl a fine one",
    ),
    ("J", "At a point: a jump"),
    (
        "Insert, Delete",
        "At a point: a new one behind it; take it out",
    ),
    ("Enter", "At a point or a template: its numbers"),
];

/// Draws the about page.
pub(crate) fn about(ui: &mut Ui, look: &Look) {
    ui.heading(format!("Helmsplit {}", env!("CARGO_PKG_VERSION")));
    ui.label(
        "Simulator of steering circuits for mobile machines: fixed-displacement pump, priority \
         flow control valve, steering, and what the excess port feeds.",
    );
    ui.label(RichText::new("Licence: MIT or Apache-2.0, as you choose.").color(look.quiet()));
    ScrollArea::vertical().max_height(400.0).show(ui, |ui| {
        ui.add_space(6.0);
        ui.label(RichText::new("Cautions").strong());
        for caution in CAUTIONS {
            ui.label(caution);
        }
        ui.add_space(6.0);
        ui.label(RichText::new("Not modelled").strong());
        for left_out in NOT_MODELLED {
            ui.label(left_out);
        }
        ui.label("In full, with the limits of each equation: docs/model.md of the source.");
        ui.add_space(6.0);
        ui.label(RichText::new("Licences of the libraries").strong());
        ui.label(
            "The program is built from open-source libraries under licences that allow it; \
             docs/libraries.md of the source lists each with its version and licence.",
        );
    });
}

/// Draws the list of keys.
pub(crate) fn keys(ui: &mut Ui, look: &Look) {
    ui.heading("Keys and gestures");
    ScrollArea::vertical().max_height(460.0).show(ui, |ui| {
        Grid::new("keys")
            .num_columns(2)
            .spacing([24.0, 4.0])
            .show(ui, |ui| {
                for &(key, what) in KEYS {
                    ui.label(RichText::new(key).strong());
                    ui.label(RichText::new(what).color(look.ink()));
                    ui.end_row();
                }
            });
    });
}
