//! The excess land: width for the excess flow at top speed, and the shape that has it.

use std::f64::consts::{FRAC_PI_4, PI};

use helmsplit_model::Quantity;
use helmsplit_scenario::choice::ValveLand;
use helmsplit_scenario::parameter::{limits, valve, valve_edges};

use super::sheet::Sheet;
use super::sizes::{Rounding, Series};
use super::step::Step;
use super::wheel::Wheel;
use crate::check::Measure;

const ORIFICE: &str = "Q = Cd A sqrt(2 dp / rho): Merritt, Hydraulic Control Systems, 1967";
const GEOMETRY: &str = "geometry; the land is taken as equally wide over its travel";
const PRACTICE: &str = "common practice, no source";

/// The land with its two working points: nobody steers and the consumer runs free, and the
/// steering is loaded while the consumer runs free.
pub(super) struct Land {
    /// Excess flow at top speed, m3/s.
    pub(super) flow: f64,
    /// Drop over the land while nobody steers, Pa.
    pub(super) free_drop: f64,
    /// Opening travel then, m.
    pub(super) free_travel: f64,
    /// Drop over the land while the steering is loaded, Pa.
    pub(super) loaded_drop: f64,
    /// Opening travel then, m.
    pub(super) loaded_travel: f64,
}

pub(super) fn steps(sheet: &mut Sheet<'_>, wheel: &Wheel, flow: f64) -> Land {
    let free_drop = sheet.demand.land_drop;
    let names = (
        "land-area",
        "Opening of the land at top speed, nobody steers",
        "A_1",
    );
    let free_area = sheet.push(area_step(sheet, names, flow, free_drop));
    let travel = travel_step(sheet);
    let width = width(sheet, free_area, travel);
    shape(sheet, width, travel);
    port(sheet, free_area);
    let loaded_drop = wheel.load_pressure + sheet.demand.spring_drop;
    let names = (
        "land-area-loaded",
        "Opening of the land with the steering loaded",
        "A_2",
    );
    let loaded_area = sheet.push(area_step(sheet, names, flow, loaded_drop));
    let step = Step::new(
        "land-travel-loaded",
        "Opening travel with the steering loaded",
        "dx_2",
        "A_2 / w",
        Measure::new(loaded_area / width, Quantity::Length),
    )
    .term(
        "A_2",
        "opening with the steering loaded",
        loaded_area,
        Quantity::Area,
    )
    .term("w", "width of the land", width, Quantity::Length)
    .from(GEOMETRY);
    Land {
        flow,
        free_drop,
        free_travel: free_area / width,
        loaded_drop,
        loaded_travel: sheet.push(step),
    }
}

fn area_step(
    sheet: &Sheet<'_>,
    (id, label, symbol): (&'static str, &'static str, &'static str),
    flow: f64,
    drop: f64,
) -> Step {
    let cd = sheet.si(valve_edges::LAND_DISCHARGE);
    let rho = sheet.parts.oil.density;
    Step::new(
        id,
        label,
        symbol,
        "Q_ex / (Cd_e * sqrt(2 * dp_e / rho))",
        Measure::new(flow / (cd * (2.0 * drop / rho).sqrt()), Quantity::Area),
    )
    .term("Q_ex", "excess flow", flow, Quantity::Flow)
    .term(
        "Cd_e",
        "discharge coefficient of the land",
        cd,
        Quantity::Count,
    )
    .term("dp_e", "drop over the land", drop, Quantity::Pressure)
    .term("rho", "density of the oil", rho, Quantity::Density)
    .from(ORIFICE)
}

/// Length of the gentle part of the land, m; `None` for an edge without one.
fn gentle_length(sheet: &Sheet<'_>) -> Option<f64> {
    match sheet.scenario.chosen::<ValveLand>() {
        ValveLand::Chamfer => Some(sheet.si(valve::CHAMFER_LENGTH)),
        ValveLand::RoundHoles => Some(sheet.si(valve::LAND_HOLE_DIAMETER)),
        ValveLand::Notches => Some(sheet.si(valve::NOTCH_LENGTH)),
        ValveLand::SharpEdge | ValveLand::Table => None,
    }
}

/// Travel that the land may take: neither into the stop's reserve, nor beyond its gentle part, nor
/// to where the priority holes begin to shut.
fn travel_step(sheet: &mut Sheet<'_>) -> f64 {
    let stroke = sheet.si(valve::STROKE);
    let reserve = sheet.si(limits::STROKE_RESERVE);
    let overlap = sheet.si(valve::OVERLAP).max(0.0);
    let holes = sheet.si(valve_edges::HOLES_THROTTLE_START);
    let gentle = gentle_length(sheet).unwrap_or(stroke);
    let travel = (stroke * (1.0 - reserve) - overlap)
        .min(holes - overlap)
        .min(gentle);
    if travel <= 0.0 {
        sheet.warn(
            "overlap, stroke and priority holes leave the excess land no travel; the land is \
             sized for a tenth of the stroke",
        );
    }
    let step = Step::new(
        "land-travel",
        "Opening travel that may be used",
        "dx",
        "max(min(x_max * (1 - r) - x_ov, x_c1 - x_ov, L), x_max / 10)",
        Measure::new(travel.max(stroke / 10.0), Quantity::Length),
    )
    .term("x_max", "stroke", stroke, Quantity::Length)
    .term("r", "reserve of the stroke", reserve, Quantity::Ratio)
    .term("x_ov", "overlap", overlap, Quantity::Length)
    .term(
        "x_c1",
        "travel where the priority holes begin to shut",
        holes,
        Quantity::Length,
    )
    .term(
        "L",
        "length of the gentle part of the land, or the stroke",
        gentle,
        Quantity::Length,
    )
    .from(PRACTICE);
    sheet.push(step)
}

/// Width that the travel asks for; a sharp edge has the one that the spool gives it.
fn width(sheet: &mut Sheet<'_>, area: f64, travel: f64) -> f64 {
    let diameter = sheet.si(valve::SPOOL_DIAMETER);
    if sheet.scenario.chosen::<ValveLand>() == ValveLand::SharpEdge {
        let step = Step::new(
            "land-width",
            "Width of the land: the whole edge",
            "w",
            "pi * d",
            Measure::new(PI * diameter, Quantity::Length),
        )
        .term("d", "spool diameter", diameter, Quantity::Length)
        .from(GEOMETRY);
        return sheet.push(step);
    }
    let step = Step::new(
        "land-width",
        "Width of the land",
        "w",
        "A_1 / dx",
        Measure::new(area / travel, Quantity::Length),
    )
    .term("A_1", "opening at top speed", area, Quantity::Area)
    .term("dx", "opening travel", travel, Quantity::Length)
    .from(GEOMETRY);
    let width = sheet.push(step);
    if width > PI * diameter {
        sheet.warn("the land would be wider than the spool's edge: more travel or a larger spool");
    }
    width
}

/// The shape that has the width, for the kind of land that the circuit has.
fn shape(sheet: &mut Sheet<'_>, width: f64, travel: f64) {
    match sheet.scenario.chosen::<ValveLand>() {
        ValveLand::Chamfer => chamfer(sheet, width),
        ValveLand::RoundHoles => holes(sheet, width),
        ValveLand::Notches => notches(sheet, width, travel),
        ValveLand::SharpEdge | ValveLand::Table => {}
    }
}

fn chamfer(sheet: &mut Sheet<'_>, width: f64) {
    let diameter = sheet.si(valve::SPOOL_DIAMETER);
    let share = width / (PI * diameter);
    if share >= 1.0 {
        return;
    }
    let step = Step::new(
        "chamfer-angle",
        "Chamfer angle",
        "al",
        "asin(w / (pi * d))",
        Measure::new(share.asin(), Quantity::Angle),
    )
    .term("w", "width of the land", width, Quantity::Length)
    .term("d", "spool diameter", diameter, Quantity::Length)
    .from("geometry of a slender cone (M5.3)")
    .into_parameter(valve::CHAMFER_ANGLE);
    sheet.push_sized(step, Series::Angles, Rounding::Nearest);
}

fn holes(sheet: &mut Sheet<'_>, width: f64) {
    let diameter = sheet.si(valve::LAND_HOLE_DIAMETER);
    let step = Step::new(
        "land-holes",
        "Number of holes of the land",
        "N_e",
        "w / (pi / 4 * d_e)",
        Measure::new(width / (FRAC_PI_4 * diameter), Quantity::Count),
    )
    .term("w", "mean width of the land", width, Quantity::Length)
    .term("d_e", "diameter of each hole", diameter, Quantity::Length)
    .from("geometry: mean width of a circle over its diameter (M5.3)")
    .into_parameter(valve::LAND_HOLE_COUNT);
    let series = Series::Counts;
    let offer = series.beside(step.result.si, Rounding::Up);
    // There is no part of a hole, whatever the sizes.
    sheet.push(step.offering(offer, true));
}

fn notches(sheet: &mut Sheet<'_>, width: f64, travel: f64) {
    let count = sheet.si(valve::NOTCH_COUNT);
    let angle = 2.0 * (width / (count * travel)).atan();
    let step = Step::new(
        "notch-angle",
        "Notch angle",
        "beta_n",
        "2 * atan(w / (N_n * dx))",
        Measure::new(angle, Quantity::Angle),
    )
    .term("w", "mean width of the land", width, Quantity::Length)
    .term("N_n", "notches", count, Quantity::Count)
    .term("dx", "opening travel", travel, Quantity::Length)
    .from("geometry of a triangle (M5.3)")
    .into_parameter(valve::NOTCH_ANGLE);
    sheet.push_sized(step, Series::Angles, Rounding::Nearest);
}

/// Passage behind the land over the largest opening.
const PORT_FACTOR: f64 = 4.0;

fn port(sheet: &mut Sheet<'_>, area: f64) {
    let step = Step::new(
        "port-area",
        "Passage behind the land",
        "A_port",
        "f_p * A_1",
        Measure::new(PORT_FACTOR * area, Quantity::Area),
    )
    .term(
        "f_p",
        "factor, so that the edge and not the port meters",
        PORT_FACTOR,
        Quantity::Count,
    )
    .term("A_1", "opening at top speed", area, Quantity::Area)
    .from(PRACTICE)
    .noted("a larger port does no harm: the circuit's is kept if it is larger");
    let present = sheet.si(valve::PORT_AREA);
    if step.result.si > present {
        sheet.push(step.into_parameter(valve::PORT_AREA));
    } else {
        sheet.push(step);
    }
}
