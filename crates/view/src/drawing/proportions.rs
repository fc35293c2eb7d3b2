//! Where everything in the section lies.
//!
//! What the valve's record gives is drawn true: diameter, travel, stroke, overlap, metering edge,
//! priority holes, fixed orifice, damping holes, spring compression, sealing length of the end
//! lands. The rest (core widths, wall thicknesses, coils) follows common practice, no source, and
//! serves only to hold it.

use helmsplit_model::{LandShape, PriorityValve};

/// Millimetres in a metre.
const MM: f64 = 1000.0;

/// Shear modulus of patented cold-drawn spring wire, Pa (EN 10270-1; value from memory).
const SHEAR_MODULUS: f64 = 81.5e9;

/// Fewest and most working coils that are drawn.
const FEWEST_COILS: u32 = 2;
const MOST_COILS: u32 = 9;

/// Share of the room at full travel that the closed coils may fill.
const CLOSED_COILS: f64 = 0.85;

/// A stretch of the axis, mm from the stop of the head end.
pub(super) type Span = (f64, f64);

/// The metering edge as it is drawn.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum EdgeShape {
    /// A cone: axial length and how far it falls, mm.
    Chamfer { length: f64, drop: f64 },
    /// A plain edge.
    Sharp,
    /// Holes in the sleeve: number, diameter in mm.
    Holes { count: u32, diameter: f64 },
    /// Notches: number, full angle in rad, length in mm.
    Notches { count: u32, angle: f64, length: f64 },
}

/// The spring as it is drawn.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct SpringShape {
    /// Length without a load, mm.
    pub(super) free_length: f64,
    /// Compression at zero travel, mm: preload over rate.
    pub(super) preload_compression: f64,
    /// Mean radius of the coils, mm.
    pub(super) radius: f64,
    /// Diameter of the wire, mm.
    pub(super) wire: f64,
    /// Working coils.
    pub(super) coils: u32,
}

/// The section at zero travel, mm. Spans of the spool move right by the travel.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Proportions {
    /// Radius of the spool.
    pub(super) radius: f64,
    /// Radius of its neck between head land and metering land.
    pub(super) neck_radius: f64,
    /// Radius of its bore.
    pub(super) bore_radius: f64,
    /// Radius of the recess that holds the spring.
    pub(super) recess_radius: f64,
    /// Radius of the cores in the housing.
    pub(super) core_radius: f64,
    pub(super) stroke: f64,
    pub(super) overlap: f64,
    /// Left end of the head chamber.
    pub(super) head_end: f64,
    /// Housing: cores of the three ports.
    pub(super) inlet_core: Span,
    pub(super) excess_core: Span,
    pub(super) priority_core: Span,
    /// Right end of the spring chamber.
    pub(super) spring_end: f64,
    /// Spool: left end of the neck, shoulder of the metering edge, right end.
    pub(super) neck_start: f64,
    pub(super) shoulder: f64,
    pub(super) spool_end: f64,
    pub(super) edge: EdgeShape,
    /// Spool: cross holes in the neck, the wall with the fixed orifice, the disc.
    pub(super) cross_holes: Span,
    pub(super) orifice_wall: Span,
    pub(super) disc: Span,
    /// Spool: priority holes; as long as the travel over which they are throttled.
    pub(super) priority_holes: Span,
    /// Travel where throttling starts and where it ends; `None` if not within the stroke.
    pub(super) throttling: Option<Span>,
    /// Diameters of the restrictions.
    pub(super) fixed_orifice: f64,
    pub(super) head_hole: f64,
    pub(super) disc_hole: f64,
    pub(super) spring: SpringShape,
}

fn diameter_from_area(area: f64) -> f64 {
    (4.0 * area / std::f64::consts::PI).sqrt()
}

fn edge_shape(shape: &LandShape, room: f64) -> EdgeShape {
    match shape {
        LandShape::Chamfer { angle, length } => {
            let whole = length * MM;
            // A steep cone ends at the neck; its angle stays true.
            let drawn = whole.min(room / angle.tan());
            EdgeShape::Chamfer {
                length: drawn,
                drop: drawn * angle.tan(),
            }
        }
        LandShape::Sharp | LandShape::Table(_) => EdgeShape::Sharp,
        LandShape::RoundHoles { count, diameter } => EdgeShape::Holes {
            count: count.round().max(1.0) as u32,
            diameter: diameter * MM,
        },
        LandShape::Notches {
            count,
            angle,
            length,
        } => EdgeShape::Notches {
            count: count.round().max(1.0) as u32,
            angle: *angle,
            length: length * MM,
        },
    }
}

impl EdgeShape {
    /// Whether a hole or notch lies opposite to the one that is cut at the top.
    pub(super) fn is_cut_below(&self) -> bool {
        match *self {
            Self::Holes { count, .. } | Self::Notches { count, .. } => count % 2 == 0,
            Self::Chamfer { .. } | Self::Sharp => true,
        }
    }

    /// How far the edge reaches left of the shoulder, mm.
    pub(super) fn length(&self) -> f64 {
        match *self {
            Self::Chamfer { length, .. } | Self::Notches { length, .. } => length,
            Self::Sharp | Self::Holes { .. } => 0.0,
        }
    }
}

impl Proportions {
    #[allow(clippy::too_many_lines, reason = "one table of places, left to right")]
    pub(super) fn of(valve: &PriorityValve) -> Self {
        let d = valve.diameter * MM;
        let radius = 0.5 * d;
        let fixed_orifice = valve.fixed_orifice.hydraulic_diameter * MM;
        // A large orifice takes a wide bore.
        let bore_radius = (0.42 * radius).max(0.62 * fixed_orifice).min(0.66 * radius);
        let neck_radius = (0.60 * radius).max(bore_radius + 0.12 * radius);
        let edge = edge_shape(&valve.land.shape, 0.85 * (radius - neck_radius));
        let (stroke, overlap) = (valve.stroke * MM, valve.land.overlap * MM);
        let area = valve.end_area();
        let sealing = (MM * valve.clearance_factor / valve.end_conductance).clamp(0.1 * d, d);
        let head_length = (MM * valve.head.volume / area).clamp(0.2 * d, 0.8 * d);
        // Housing, from left to right.
        let bridge = (overlap.max(0.0) + 0.08 * d).max(0.22 * d);
        let inlet_left = sealing + stroke;
        let inlet_width = (stroke + 0.25 * d).max(edge.length() + overlap - bridge + 0.42 * d);
        let inlet_core = (inlet_left, inlet_left + inlet_width);
        let excess_left = inlet_core.1 + bridge;
        let port = diameter_from_area(valve.land.port_area) * MM;
        let mut excess_width = (stroke - overlap + 0.1 * d).max(port.min(0.8 * d));
        if let EdgeShape::Holes { diameter, .. } = edge {
            excess_width = excess_width.max(diameter + 0.1 * d);
        }
        let excess_core = (excess_left, excess_left + excess_width);
        let shoulder = excess_left - overlap;
        // Priority holes: shut while the spool travels by their length.
        let start = (valve.holes_start * MM).min(1.1 * stroke);
        let throttles = valve.holes_start * MM < stroke;
        let length = if throttles {
            ((valve.holes_end - valve.holes_start) * MM).min(0.5 * d)
        } else {
            // Nothing says how long they are: as four round holes.
            (diameter_from_area(0.25 * valve.holes_area) * MM).min(0.4 * d)
        };
        let core_left = excess_core.1 + 0.22 * d;
        let priority_core = (core_left, core_left + start + length + 0.05 * d);
        let holes_right = priority_core.1 - start;
        let spool_end = priority_core.1 + sealing.max(stroke - start + 0.1 * d);
        let disc_left = holes_right + 0.06 * d;
        let disc = (disc_left, disc_left + 0.075 * d);
        let chamber = (MM * valve.spring.volume / area).clamp(stroke + 0.12 * d, stroke + 1.2 * d);
        let spring_end = spool_end + chamber;
        let recess_radius = 0.78 * radius;
        let neck = (inlet_left, shoulder - edge.length());
        let middle = 0.5 * (neck.0 + neck.1);
        let half = (0.13 * d).min(0.3 * (neck.1 - neck.0));
        let wall = shoulder + 0.05 * d;
        let room = spring_end - disc.1;
        Self {
            radius,
            neck_radius,
            bore_radius,
            recess_radius,
            core_radius: radius + 0.30 * d,
            stroke,
            overlap,
            head_end: -head_length,
            inlet_core,
            excess_core,
            priority_core,
            spring_end,
            neck_start: inlet_left,
            shoulder,
            spool_end,
            edge,
            cross_holes: (middle - half, middle + half),
            orifice_wall: (wall, wall + 0.08 * d),
            disc,
            priority_holes: (holes_right - length, holes_right),
            throttling: throttles.then_some((valve.holes_start * MM, valve.holes_end * MM)),
            fixed_orifice: fixed_orifice.min(1.9 * bore_radius),
            head_hole: diameter_from_area(valve.head_hole.area) * MM,
            disc_hole: diameter_from_area(valve.disc_hole.area) * MM,
            spring: spring_shape(valve, recess_radius, room, stroke),
        }
    }

    /// Length of the spring at a travel (mm), mm.
    pub(super) fn spring_length(&self, travel: f64) -> f64 {
        self.spring.free_length - self.spring.preload_compression - travel
    }

    /// Axial gap between shoulder and the edge of the excess core at a travel (mm), mm; negative
    /// while the land overlaps.
    pub(super) fn land_gap(&self, travel: f64) -> f64 {
        self.shoulder + travel - self.excess_core.0
    }
}

/// A steel spring of the valve's rate that fits: rate `G w^4 / (8 D^3 n)`.
///
/// # Source
/// EN 13906-1, cylindrical helical compression springs of round wire.
fn spring_shape(valve: &PriorityValve, recess: f64, room: f64, stroke: f64) -> SpringShape {
    let wire_of = |mean: f64, coils: u32| {
        let term = 8.0 * valve.spring_rate * (mean / MM).powi(3) * f64::from(coils);
        (term / SHEAR_MODULUS).powf(0.25) * MM
    };
    let mut chosen = (FEWEST_COILS, wire_of(1.6 * recess, FEWEST_COILS));
    for coils in FEWEST_COILS..=MOST_COILS {
        let wire = wire_of(1.6 * recess, coils);
        if (f64::from(coils) + 1.5) * wire <= CLOSED_COILS * (room - stroke) {
            chosen = (coils, wire);
        }
    }
    let compression = MM * valve.preload / valve.spring_rate;
    SpringShape {
        free_length: room + compression,
        preload_compression: compression,
        radius: 0.8 * recess,
        wire: chosen.1.min(0.35 * recess),
        coils: chosen.0,
    }
}
