//! The evidence of one check: figure, limit, formula with its numbers, source.

use egui::{RichText, ScrollArea, Ui};
use helmsplit_scenario::{ParameterId, UnitSystem};
use helmsplit_study::{Check, CheckId, Status};

use crate::action::Action;
use crate::look::{Look, SMALL};
use crate::quantity_field::{FieldContext, FieldStates, quantity_field};
use crate::ribbon::draw_icon;
use crate::text::{check_name, limit, measure, on_screen};

/// Draws the panel.
pub(crate) fn evidence(
    ui: &mut Ui,
    check: &Check,
    context: &FieldContext<'_>,
    states: &mut FieldStates,
    actions: &mut Vec<Action>,
) {
    let (look, units) = (context.look, context.units);
    ui.horizontal(|ui| {
        ui.heading(format!("Evidence: {}", check_name(check.id)));
        ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
            if ui.button("Close").clicked() {
                actions.push(Action::CloseEvidence);
            }
        });
    });
    ScrollArea::vertical()
        .id_salt("evidence")
        .auto_shrink([false, false])
        .show(ui, |ui| {
            ui.label(check.id.label());
            verdict(ui, check, units, look);
            if !check.note.is_empty() {
                ui.label(on_screen(&check.note));
            }
            numbers(ui, check, units, look, actions);
            let limits = limits_of(check.id);
            if !limits.is_empty() {
                ui.add_space(6.0);
                ui.separator();
                ui.label(RichText::new("Limits, yours to set").strong());
                for row in limits
                    .iter()
                    .filter_map(|path| ParameterId::from_path(path))
                {
                    quantity_field(ui, row.parameter(), context, states, actions);
                }
            }
        });
}

fn verdict(ui: &mut Ui, check: &Check, units: UnitSystem, look: &Look) {
    let colour = look.verdict(&check.status);
    ui.horizontal_wrapped(|ui| {
        let (rect, _) = ui.allocate_exact_size(egui::vec2(16.0, 16.0), egui::Sense::hover());
        let ground = ui.visuals().panel_fill;
        draw_icon(ui.painter(), rect.center(), &check.status, colour, ground);
        ui.label(RichText::new(check.status.word()).color(colour).strong());
        if let Some(figure) = check.figure {
            ui.label(RichText::new(measure(figure, units, 4)).strong());
        }
        if let Some(limit) = limit(check, units) {
            ui.label(RichText::new(format!("limit {limit}")).color(look.quiet()));
        }
    });
    if let Status::NotApplicable(reason) = &check.status {
        ui.label(on_screen(reason));
    }
    if check.status == Status::NeedsMap {
        ui.label("One run cannot tell: it takes many working points.");
    }
}

fn numbers(ui: &mut Ui, check: &Check, units: UnitSystem, look: &Look, actions: &mut Vec<Action>) {
    let Some(evidence) = &check.evidence else {
        return;
    };
    ui.add_space(6.0);
    ui.separator();
    ui.label(RichText::new("Formula").strong());
    ui.label(on_screen(evidence.formula));
    egui::Grid::new(("operands", check.id.name()))
        .num_columns(2)
        .show(ui, |ui| {
            for operand in &evidence.operands {
                ui.label(RichText::new(on_screen(&operand.name)).color(look.quiet()));
                ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
                    ui.label(measure(operand.value, units, 5));
                });
                ui.end_row();
            }
        });
    ui.label(
        RichText::new(format!("Source: {}", on_screen(evidence.source)))
            .size(SMALL)
            .color(look.quiet()),
    );
    if let Some(time) = evidence.time
        && ui.button(format!("Show the moment, {time:.3} s")).clicked()
    {
        actions.push(Action::Evidence(check.id));
    }
}

/// The limits and ratings that a check is held against.
fn limits_of(id: CheckId) -> &'static [&'static str] {
    match id {
        CheckId::PriorityAtIdle => &["limits.priority_at_idle", "ratings.low_idle_speed"],
        CheckId::Regulation => &["limits.regulation"],
        CheckId::Overshoot => &["limits.overshoot"],
        CheckId::Settling => &["limits.settling", "limits.settling_band"],
        CheckId::Damping => &["limits.damping"],
        CheckId::Dropout => &["limits.dropout", "limits.dropout_shortfall"],
        CheckId::SteeringLimit => &["limits.steering_limit"],
        CheckId::ConsumerAtLock => &["limits.consumer_at_lock"],
        CheckId::PilotClearance => &["limits.pilot_clearance"],
        CheckId::PeakPressure => &[
            "limits.peak_pressure",
            "ratings.inlet_pressure",
            "ratings.priority_pressure",
            "ratings.excess_pressure",
        ],
        CheckId::StrokeReserve => &["limits.stroke_reserve", "ratings.top_speed"],
        CheckId::LineVelocity => &[
            "limits.suction_velocity",
            "limits.pressure_velocity",
            "limits.return_velocity",
        ],
        CheckId::ViscosityWindow => &["ratings.least_viscosity", "ratings.greatest_viscosity"],
        CheckId::RippleClearance => &["limits.ripple_clearance"],
        CheckId::Heat => &["limits.heat", "ratings.cooler_capacity"],
        CheckId::Audit => &["limits.audit"],
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn limits_stand_in_the_parameter_table() {
        for id in CheckId::ALL {
            assert!(!limits_of(id).is_empty(), "{} has a limit", id.name());
            for path in limits_of(id) {
                assert!(ParameterId::from_path(path).is_some(), "{path}");
            }
        }
    }
}
