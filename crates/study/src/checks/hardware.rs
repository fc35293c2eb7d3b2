//! Checks of settings, pressures, lines, oil, heat, and of the run itself.

use std::f64::consts::FRAC_PI_4;

use helmsplit_model::{PriorityRelief, Quantity, Signal};

use super::response::operand;
use super::{EMPTY, Subject};
use crate::check::{Check, CheckId, Evidence, Limit, Measure};
use crate::response::mean;

const PRACTICE: &str = "common practice, no source";

pub(super) fn steering_limit(subject: &Subject<'_>) -> Check {
    let id = CheckId::SteeringLimit;
    let parts = subject.circuit.parts();
    let Some(main) = &parts.main_relief else {
        return Check::not_applicable(id, "the circuit has no main relief");
    };
    let (PriorityRelief::OnPort(relief) | PriorityRelief::Pilot(relief)) = &parts.priority_relief
    else {
        return Check::not_applicable(id, "the circuit has no priority relief");
    };
    let valve = &parts.valve;
    // The spool regulates beyond its overlap, so the spring is compressed by that much.
    let spring = valve.preload + valve.spring_rate * valve.land.overlap;
    let drop = spring / valve.end_area();
    let gap = main.cracking - relief.full_flow_pressure - drop;
    let evidence = Evidence {
        time: None,
        column: None,
        formula: "main relief cracking - (priority relief at full flow + spring force / spool area)",
        operands: vec![
            operand("main relief cracking", main.cracking, Quantity::Pressure),
            operand(
                "priority relief at full flow",
                relief.full_flow_pressure,
                Quantity::Pressure,
            ),
            operand("spring drop", drop, Quantity::Pressure),
        ],
        source: PRACTICE,
    };
    Check::measured(
        id,
        Measure::new(gap, Quantity::Pressure),
        Limit::AtLeast(subject.limits.steering_limit),
        evidence,
    )
}

pub(super) fn pilot_clearance(subject: &Subject<'_>) -> Check {
    let id = CheckId::PilotClearance;
    let PriorityRelief::Pilot(pilot) = &subject.circuit.parts().priority_relief else {
        return Check::not_applicable(id, "the circuit has no pilot relief");
    };
    let Some((highest, time)) = subject.largest("p_e") else {
        return Check::not_applicable(id, EMPTY);
    };
    let evidence = Evidence {
        time: Some(time),
        column: Some("p_e".to_owned()),
        formula: "pilot cracking - highest pressure at the excess port",
        operands: vec![
            operand("pilot cracking", pilot.cracking, Quantity::Pressure),
            operand("highest excess pressure", highest, Quantity::Pressure),
        ],
        source: PRACTICE,
    };
    let check = Check::measured(
        id,
        Measure::new(pilot.cracking - highest, Quantity::Pressure),
        Limit::AtLeast(subject.limits.pilot_clearance),
        evidence,
    );
    if highest > pilot.cracking {
        check.with_note(
            "above the pilot the spool is driven to its stop and the priority holes shut: \
             the steering can be lost",
        )
    } else {
        check
    }
}

pub(super) fn peak_pressure(subject: &Subject<'_>) -> Check {
    let id = CheckId::PeakPressure;
    let ratings = &subject.ratings;
    let points = [
        ("p_in", ratings.inlet_pressure),
        ("p_c", ratings.priority_pressure),
        ("p_su", ratings.priority_pressure),
        ("p_A", ratings.priority_pressure),
        ("p_B", ratings.priority_pressure),
        ("p_pm", ratings.priority_pressure),
        ("p_e", ratings.excess_pressure),
        ("p_m", ratings.excess_pressure),
        ("p_cap", ratings.excess_pressure),
        ("p_rod", ratings.excess_pressure),
    ];
    let worst = points
        .iter()
        .filter_map(|&(name, rating)| {
            let (peak, time) = subject.largest(name)?;
            Some((name, rating, peak, time))
        })
        .max_by(|a, b| (a.2 / a.1).total_cmp(&(b.2 / b.1)));
    let Some((name, rating, peak, time)) = worst else {
        return Check::not_applicable(id, EMPTY);
    };
    let label = subject
        .circuit
        .states()
        .iter()
        .find(|s| s.name == name)
        .map_or_else(|| name.to_owned(), |s| s.label.clone());
    let evidence = Evidence {
        time: Some(time),
        column: Some(name.to_owned()),
        formula: "highest pressure / rating, the worst of all rated points",
        operands: vec![
            operand("highest pressure", peak, Quantity::Pressure),
            operand("rating", rating, Quantity::Pressure),
        ],
        source: "the makers' ratings as entered",
    };
    Check::measured(
        id,
        Measure::ratio(peak / rating),
        Limit::AtMost(subject.limits.peak_pressure),
        evidence,
    )
    .with_note(label)
}

pub(super) fn line_velocity(subject: &Subject<'_>) -> Check {
    let id = CheckId::LineVelocity;
    let (ratings, limits) = (&subject.ratings, &subject.limits);
    let line = subject.circuit.parts().line.line.bore;
    let lines = [
        (
            "suction line",
            "q_suction",
            ratings.suction_bore,
            limits.suction_velocity,
        ),
        (
            "suction line",
            "q_pump",
            ratings.suction_bore,
            limits.suction_velocity,
        ),
        (
            "pressure line",
            "q_pump",
            ratings.pressure_bore,
            limits.pressure_velocity,
        ),
        ("priority line", "q_l", line, limits.pressure_velocity),
        (
            "return line",
            "q_return",
            ratings.return_bore,
            limits.return_velocity,
        ),
    ];
    let mut worst: Option<(&str, &str, f64, f64, f64)> = None;
    for (label, name, bore, limit) in lines {
        let Some((flow, time)) = subject.largest(name) else {
            continue;
        };
        let velocity = flow / (FRAC_PI_4 * bore * bore);
        if worst.is_none_or(|w| velocity / limit > w.3 / w.4) {
            worst = Some((label, name, time, velocity, limit));
        }
    }
    let Some((label, name, time, velocity, limit)) = worst else {
        return Check::not_applicable(id, EMPTY);
    };
    let evidence = Evidence {
        time: Some(time),
        column: Some(name.to_owned()),
        formula: "highest flow / (pi/4 bore^2), the line nearest to its limit",
        operands: vec![operand("velocity", velocity, Quantity::Velocity)],
        source: "limits: line-sizing tables of fluid power handbooks",
    };
    Check::measured(
        id,
        Measure::new(velocity, Quantity::Velocity),
        Limit::AtMost(limit),
        evidence,
    )
    .with_note(label)
}

pub(super) fn viscosity_window(subject: &Subject<'_>) -> Check {
    let nu = subject.circuit.parts().oil.kinematic_viscosity;
    let evidence = Evidence {
        time: None,
        column: None,
        formula: "log10 log10(nu + 0.7) = A - B log10 T through two viscosities",
        operands: vec![operand("viscosity", nu, Quantity::KinematicViscosity)],
        source: "ASTM D341; window: the pump maker's figures as entered",
    };
    Check::measured(
        CheckId::ViscosityWindow,
        Measure::new(nu, Quantity::KinematicViscosity),
        Limit::Inside(
            subject.ratings.least_viscosity,
            subject.ratings.greatest_viscosity,
        ),
        evidence,
    )
}

pub(super) fn heat(subject: &Subject<'_>) -> Check {
    let id = CheckId::Heat;
    let Some(heat) = subject.signal(Signal::HeatPower) else {
        return Check::not_applicable(id, EMPTY);
    };
    let average = mean(subject.times(), &heat);
    let capacity = subject.ratings.cooler_capacity;
    let evidence = Evidence {
        time: None,
        column: Some(Signal::HeatPower.name().to_owned()),
        formula: "time mean of (pump losses + all throttling and friction) / cooler capacity",
        operands: vec![
            operand("mean heat", average, Quantity::Power),
            operand("cooler capacity", capacity, Quantity::Power),
        ],
        source: "energy balance of the run; capacity as entered",
    };
    Check::measured(
        id,
        Measure::ratio(average / capacity),
        Limit::AtMost(subject.limits.heat),
        evidence,
    )
}

pub(super) fn audit(subject: &Subject<'_>) -> Check {
    let id = CheckId::Audit;
    let Some(audit) = &subject.run.audit else {
        return Check::not_applicable(id, "the run was solved without audits");
    };
    let (volume, energy) = (audit.volume.relative, audit.energy.relative);
    let evidence = Evidence {
        time: None,
        column: None,
        formula: "larger of |in - out - stored| / turnover for volume and for energy",
        operands: vec![
            operand("volume residual", volume, Quantity::Ratio),
            operand("energy residual", energy, Quantity::Ratio),
        ],
        source: "conservation of volume at local pressure and of energy (docs/model.md, M12)",
    };
    Check::measured(
        id,
        Measure::ratio(volume.max(energy)),
        Limit::AtMost(subject.limits.audit),
        evidence,
    )
}
