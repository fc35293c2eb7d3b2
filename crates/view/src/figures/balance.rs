//! The balance of forces on the spool as bars.

use helmsplit_model::Quantity;
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_study::{Equilibrium, ForceKind};

use crate::chart::{ChartAxis, ChartBar, ChartPanel};
use crate::plot::MINUS;
use crate::style::Meaning;
use crate::unit_text::unit_text;

/// Height of a bar's row, px.
const ROW: f64 = 22.0;

/// Every force on the spool at rest, positive towards opening the excess land; the dry friction
/// that was left out as an outline either way.
#[must_use]
pub fn force_panel(equilibrium: &Equilibrium, units: UnitSystem) -> ChartPanel {
    let unit = units.unit(Quantity::Force);
    let bars: Vec<ChartBar> = equilibrium
        .forces()
        .into_iter()
        .map(|force| ChartBar {
            label: force.kind.label().to_owned(),
            meaning: match force.kind {
                ForceKind::Pressure => Meaning::Inlet,
                ForceKind::Spring | ForceKind::Stop => Meaning::Spool,
                ForceKind::ExcessJet => Meaning::Excess,
                ForceKind::PriorityJet => Meaning::Priority,
                ForceKind::Sum | ForceKind::Friction => Meaning::Drive,
            },
            value: unit.value_from_si(force.force),
            text: text(force.kind, force.force, unit),
            either_way: force.kind == ForceKind::Friction,
        })
        .collect();
    let height = ROW * bars.len() as f64;
    let mut panel = ChartPanel::new(
        ChartAxis::linear("Force towards opening the excess land", unit_text(unit)),
        ChartAxis::linear("Forces on the spool", ""),
        height,
    );
    panel.bars = bars;
    panel
}

fn text(kind: ForceKind, si: f64, unit: &helmsplit_scenario::units::Unit) -> String {
    /// Less than this is rounding of forces of hundreds of newtons, N.
    const NOTHING: f64 = 1e-4;
    let si = if si.abs() < NOTHING { 0.0 } else { si };
    let text = text_from_si(si, unit, Digits::Significant(4));
    match kind {
        ForceKind::Friction => format!("up to {text} either way"),
        // A real minus, as on the axis below.
        _ => text.replacen('-', &MINUS.to_string(), 1),
    }
}
