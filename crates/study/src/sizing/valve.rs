//! The valve: spring force, fixed orifice, land, spring rate and preload.

use std::f64::consts::{FRAC_PI_4, PI};

use helmsplit_model::Quantity;
use helmsplit_scenario::parameter::{valve, valve_edges};

use super::land::{self, Land};
use super::sheet::Sheet;
use super::sizes::{Rounding, Series};
use super::step::Step;
use super::supply::Supply;
use super::wheel::Wheel;
use crate::check::Measure;

const ORIFICE: &str = "Q = Cd A sqrt(2 dp / rho): Merritt, Hydraulic Control Systems, 1967";
const TRANSITION: &str = "Borutzky, Barnard & Thoma, Simulation Modelling Practice and Theory 10, \
                          2002 (M2.1)";
const JET: &str = "rho Q v cos(th): Merritt 1967; 69 deg: von Mises 1917";
const DROOP: &str = "dQ / Q = (k dx + F_jet) / (2 F), first order, from Q ~ sqrt(F)";

/// What the valve hands on to its damping holes.
pub(super) struct Valve {
    /// End area of the spool, m2.
    pub(super) end_area: f64,
    /// Spring rate, N/m.
    pub(super) rate: f64,
    /// Set flow, m3/s.
    pub(super) set_flow: f64,
    /// The land, if there is excess flow.
    pub(super) land: Option<Land>,
}

pub(super) fn steps(sheet: &mut Sheet<'_>, wheel: &Wheel, supply: &Supply) -> Valve {
    let (end_area, force) = spring_force(sheet);
    fixed_orifice(sheet, wheel.set_flow);
    let land = (supply.excess_flow > 0.0).then(|| land::steps(sheet, wheel, supply.excess_flow));
    let present = sheet.si(valve::SPRING_RATE);
    let rate = match &land {
        Some(land) => spring_rate(sheet, land, force).unwrap_or(present),
        None => present,
    };
    preload(sheet, force, rate);
    Valve {
        end_area,
        rate,
        set_flow: wheel.set_flow,
        land,
    }
}

/// End area and the force that balances the wanted drop on it.
fn spring_force(sheet: &mut Sheet<'_>) -> (f64, f64) {
    let diameter = sheet.si(valve::SPOOL_DIAMETER);
    let step = Step::new(
        "end-area",
        "Area of the spool's end",
        "A",
        "pi / 4 * d^2",
        Measure::new(FRAC_PI_4 * diameter * diameter, Quantity::Area),
    )
    .term("d", "spool diameter", diameter, Quantity::Length)
    .from("geometry");
    let area = sheet.push(step);
    let drop = sheet.demand.spring_drop;
    let step = Step::new(
        "spring-force",
        "Spring force while it regulates",
        "F",
        "dp * A",
        Measure::new(drop * area, Quantity::Force),
    )
    .term(
        "dp",
        "drop over the fixed orifice",
        drop,
        Quantity::Pressure,
    )
    .term("A", "end area", area, Quantity::Area)
    .from("balance of the spool at the first opening of the excess land (M5.9)");
    (area, sheet.push(step))
}

/// The orifice in turbulent flow, then with the laminar part that its Reynolds number leaves.
fn fixed_orifice(sheet: &mut Sheet<'_>, flow: f64) {
    let cd = sheet.si(valve_edges::FIXED_ORIFICE_DISCHARGE);
    let names = (
        "orifice-turbulent",
        "Fixed orifice in turbulent flow",
        "d_1",
    );
    let formula = "sqrt(4 * Q_set / (pi * Cd_o * sqrt(2 * dp / rho)))";
    let turbulent = orifice_step(sheet, names, formula, ("Cd_o", cd), flow);
    let first = sheet.push(turbulent);
    let effective = orifice_discharge(sheet, flow, first, cd);
    let names = ("fixed-orifice", "Fixed orifice diameter", "d_o");
    let formula = "sqrt(4 * Q_set / (pi * Cd * sqrt(2 * dp / rho)))";
    let whole = orifice_step(sheet, names, formula, ("Cd", effective), flow)
        .into_parameter(valve_edges::FIXED_ORIFICE_DIAMETER);
    sheet.push_sized(whole, Series::Drills, Rounding::Nearest);
}

/// The diameter that passes the flow at the spring's drop with a discharge coefficient.
fn orifice_step(
    sheet: &Sheet<'_>,
    (id, label, symbol): (&'static str, &'static str, &'static str),
    formula: &'static str,
    (cd_symbol, cd): (&'static str, f64),
    flow: f64,
) -> Step {
    let (drop, rho) = (sheet.demand.spring_drop, sheet.parts.oil.density);
    let diameter = (4.0 * flow / (PI * cd * (2.0 * drop / rho).sqrt())).sqrt();
    let result = Measure::new(diameter, Quantity::Length);
    Step::new(id, label, symbol, formula, result)
        .term("Q_set", "set flow", flow, Quantity::Flow)
        .term(cd_symbol, "discharge coefficient", cd, Quantity::Count)
        .term(
            "dp",
            "drop over the fixed orifice",
            drop,
            Quantity::Pressure,
        )
        .term("rho", "density of the oil", rho, Quantity::Density)
        .from(ORIFICE)
}

/// Discharge coefficient at the Reynolds number of the set flow.
fn orifice_discharge(sheet: &mut Sheet<'_>, flow: f64, first: f64, cd: f64) -> f64 {
    let transition = sheet.si(valve_edges::FIXED_ORIFICE_TRANSITION);
    let nu = sheet.parts.oil.kinematic_viscosity;
    let reynolds = 4.0 * flow / (PI * first * nu);
    let effective = cd / (1.0 + transition / reynolds).sqrt();
    let step = Step::new(
        "orifice-discharge",
        "Its discharge coefficient at this Reynolds number",
        "Cd",
        "Cd_o / sqrt(1 + Re_t * pi * d_1 * nu / (4 * Q_set))",
        Measure::new(effective, Quantity::Count),
    )
    .term(
        "Cd_o",
        "turbulent discharge coefficient",
        cd,
        Quantity::Count,
    )
    .term("Re_t", "transition", transition, Quantity::Count)
    .term("d_1", "diameter in turbulent flow", first, Quantity::Length)
    .term(
        "nu",
        "viscosity of the oil",
        nu,
        Quantity::KinematicViscosity,
    )
    .term("Q_set", "set flow", flow, Quantity::Flow)
    .from(TRANSITION);
    sheet.push(step)
}

/// Jet force at a drop over the land, N.
fn jet_step(
    sheet: &Sheet<'_>,
    (id, label, symbol): (&'static str, &'static str, &'static str),
    flow: f64,
    drop: f64,
) -> Step {
    let angle = sheet.si(valve::EXCESS_JET_ANGLE);
    let factor = sheet.si(valve::JET_FORCE_FACTOR);
    let rho = sheet.parts.oil.density;
    let force = factor * rho * flow * (2.0 * drop / rho).sqrt() * angle.cos();
    Step::new(
        id,
        label,
        symbol,
        "f_jet * rho * Q_ex * sqrt(2 * dp_e / rho) * cos(th_e)",
        Measure::new(force, Quantity::Force),
    )
    .term("f_jet", "factor on jet forces", factor, Quantity::Count)
    .term("rho", "density of the oil", rho, Quantity::Density)
    .term("Q_ex", "excess flow", flow, Quantity::Flow)
    .term("dp_e", "drop over the land", drop, Quantity::Pressure)
    .term("th_e", "jet angle", angle, Quantity::Angle)
    .from(JET)
}

/// The largest rate that the band allows while the priority holes throttle, because the consumer
/// takes more pressure than the steering; infinite where they never do.
fn throttled_rate(sheet: &mut Sheet<'_>, force: f64) -> f64 {
    let band = sheet.demand.band;
    let end = sheet.si(valve_edges::HOLES_THROTTLE_END);
    let overlap = sheet.si(valve::OVERLAP).max(0.0);
    let reach = end.min(sheet.si(valve::STROKE));
    if end > sheet.si(valve::STROKE) || reach <= overlap {
        return f64::INFINITY;
    }
    let step = Step::new(
        "rate-throttled",
        "Spring rate that the band allows while the priority holes throttle",
        "k_3",
        "2 * b * F / (x_c2 - x_ov)",
        Measure::new(2.0 * band * force / (end - overlap), Quantity::SpringRate),
    )
    .term(
        "b",
        "rise allowed up to full excess flow",
        band,
        Quantity::Ratio,
    )
    .term("F", "spring force", force, Quantity::Force)
    .term(
        "x_c2",
        "travel where the priority holes are shut",
        end,
        Quantity::Length,
    )
    .term(
        "x_ov",
        "overlap of the excess land",
        overlap,
        Quantity::Length,
    )
    .from(DROOP)
    .noted(
        "a consumer that takes more pressure than the steering drives the spool this far; the jet \
         of the holes, which helps, is left out",
    );
    sheet.push(step)
}

/// Jet force and allowed rate at one working point of the land; gives the rate, N/m.
fn rate_at(
    sheet: &mut Sheet<'_>,
    jet_names: (&'static str, &'static str, &'static str),
    (id, label, symbol): (&'static str, &'static str, &'static str),
    (flow, drop, travel): (f64, f64, f64),
    force: f64,
) -> f64 {
    let band = sheet.demand.band;
    let jet = jet_step(sheet, jet_names, flow, drop);
    let jet = sheet.push(jet);
    let result = Measure::new((2.0 * band * force - jet) / travel, Quantity::SpringRate);
    let step = Step::new(id, label, symbol, "(2 * b * F - F_jet) / dx", result)
        .term(
            "b",
            "rise allowed up to full excess flow",
            band,
            Quantity::Ratio,
        )
        .term("F", "spring force", force, Quantity::Force)
        .term("F_jet", "jet force", jet, Quantity::Force)
        .term("dx", "opening travel", travel, Quantity::Length)
        .from(DROOP);
    sheet.push(step)
}

/// The largest rate that keeps the rise of the priority flow within the band: steering unloaded,
/// loaded, and throttled; `None` where the jet alone takes the band.
fn spring_rate(sheet: &mut Sheet<'_>, land: &Land, force: f64) -> Option<f64> {
    let allowed = "Spring rate that the band allows there";
    let k_1 = rate_at(
        sheet,
        (
            "jet-free",
            "Jet force on the land, steering unloaded",
            "F_j1",
        ),
        ("rate-free", allowed, "k_1"),
        (land.flow, land.free_drop, land.free_travel),
        force,
    );
    let k_2 = rate_at(
        sheet,
        (
            "jet-loaded",
            "Jet force on the land, steering loaded",
            "F_j2",
        ),
        ("rate-loaded", allowed, "k_2"),
        (land.flow, land.loaded_drop, land.loaded_travel),
        force,
    );
    let k_3 = throttled_rate(sheet, force);
    let largest = k_1.min(k_2).min(k_3);
    if largest <= 0.0 {
        sheet.warn(
            "the jet force alone lifts the priority flow beyond the band: take a larger spring \
             drop or spool; the spring rate stays as it is",
        );
        return None;
    }
    Some(smallest_rate(sheet, [k_1, k_2, k_3]))
}

fn smallest_rate(sheet: &mut Sheet<'_>, [k_1, k_2, k_3]: [f64; 3]) -> f64 {
    let throttles = k_3.is_finite();
    let formula = if throttles {
        "min(k_1, k_2, k_3)"
    } else {
        "min(k_1, k_2)"
    };
    let result = Measure::new(k_1.min(k_2).min(k_3), Quantity::SpringRate);
    let mut step = Step::new("spring-rate", "Largest spring rate", "k", formula, result)
        .term("k_1", "steering unloaded", k_1, Quantity::SpringRate)
        .term("k_2", "steering loaded", k_2, Quantity::SpringRate);
    if throttles {
        step = step.term("k_3", "throttled", k_3, Quantity::SpringRate);
    }
    let step = step
        .from(DROOP)
        .noted("a softer spring holds the flow closer; a stiffer one shortens the valve")
        .into_parameter(valve::SPRING_RATE);
    sheet.push(step)
}

fn preload(sheet: &mut Sheet<'_>, force: f64, rate: f64) {
    let overlap = sheet.si(valve::OVERLAP).max(0.0);
    let preload = force - rate * overlap;
    if preload <= 0.0 {
        sheet.warn("the spring would have no preload: less overlap, a softer spring or more drop");
        return;
    }
    let step = Step::new(
        "spring-preload",
        "Spring preload",
        "F_0",
        "F - k * x_ov",
        Measure::new(preload, Quantity::Force),
    )
    .term(
        "F",
        "spring force while it regulates",
        force,
        Quantity::Force,
    )
    .term("k", "spring rate", rate, Quantity::SpringRate)
    .term(
        "x_ov",
        "overlap of the excess land",
        overlap,
        Quantity::Length,
    )
    .from("balance of the spool at the first opening of the excess land (M5.9)")
    .into_parameter(valve::SPRING_PRELOAD);
    sheet.push(step);
}
