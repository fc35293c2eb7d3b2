//! The housing: body, bore, cores, ports, head passage, stops.

use super::proportions::{EdgeShape, Span};
use super::sheet::Sheet;
use crate::scene::{Paint, Part, PartPen, Prim};
use helmsplit_model::Signal;
use kurbo::Vec2;

/// Wall of the sleeve between bore and core where the land uncovers holes, as a share of the
/// radius.
const SLEEVE: f64 = 0.2;

/// Length of the drilled head hole that is drawn, as a share of the radius.
const HEAD_HOLE_LENGTH: f64 = 0.3;

/// Half the length of the arrow for a large flow, px, and that flow, m3/s; what hardly flows has
/// no arrow.
const ARROW: f64 = 11.0;
const LARGE_FLOW: f64 = 5e-4;
const LEAST_FLOW: f64 = 2e-6;

impl Sheet<'_> {
    /// Body and oil spaces, all behind the spool.
    pub(super) fn body(&self, parts: &mut Vec<Part>) {
        let (h, s) = (self.half_height, &self.shape);
        let mut pen = PartPen::new("valve.housing", "Housing");
        let corners = [
            (self.left, -h),
            (self.right, -h),
            (self.right, h),
            (self.left, h),
        ];
        self.housing(&mut pen, &corners);
        let mut closed = corners.to_vec();
        closed.push(corners[0]);
        self.edge(&mut pen, &closed);
        parts.push(pen.done());
        parts.push(self.inlet());
        parts.push(self.core("valve.excess_port", "Excess port", s.excess_core, "p_e"));
        parts.push(self.core(
            "valve.priority_port",
            "Priority port",
            s.priority_core,
            "p_c",
        ));
        parts.push(self.head_chamber());
        parts.push(self.spring_chamber());
    }

    /// A port: from the core out of the housing.
    fn port(&self, pen: &mut PartPen, core: Span, pressure: &str, sign: f64) -> Span {
        let signal = match pressure {
            "p_in" => Signal::PumpFlow,
            "p_c" => Signal::PriorityFlow,
            _ => Signal::ExcessFlow,
        };
        let s = &self.shape;
        let half = (0.42 * (core.1 - core.0)).min(0.55 * s.radius);
        let middle = 0.5 * (core.0 + core.1);
        let port = (middle - half, middle + half);
        let (from, to) = (sign * s.core_radius, sign * self.half_height);
        // A little into the core, so that no seam shows.
        let inside = from - sign / self.px_per_mm;
        let heights = (inside.min(to), inside.max(to));
        self.fill(pen, port, heights, self.oil(pressure));
        for x in [port.0, port.1] {
            self.edge(pen, &[(x, from), (x, to)]);
        }
        // Into the inlet and out of the others: up, either way.
        let middle = self.at(middle, 0.5 * (from + to));
        let room = 0.42 * (self.half_height - s.core_radius) * self.px_per_mm;
        self.flow_arrow(pen, middle, (signal, room));
        port
    }

    /// An arrow up if a flow is positive, down if negative, at most `room` px to both sides.
    fn flow_arrow(&self, pen: &mut PartPen, (x, y): (f64, f64), (signal, room): (Signal, f64)) {
        let flow = self.moment.and_then(|moment| moment.signal(signal));
        let Some(flow) = flow.filter(|flow| flow.abs() > LEAST_FLOW) else {
            return;
        };
        let up = flow.signum();
        let half = ARROW.min(room) * (flow.abs() / LARGE_FLOW).sqrt().clamp(0.4, 1.0);
        pen.push(Prim::Arrow {
            tip: (x, y - up * half).into(),
            direction: Vec2::new(0.0, -up),
            length: 2.0 * half,
            // Light or dark, it stands out against the oil around it.
            paint: Paint::Ground,
            pace: (flow.abs() / LARGE_FLOW).min(1.0),
        });
    }

    /// Walls of a core on one side, open towards its port.
    fn core_walls(&self, pen: &mut PartPen, core: Span, sign: f64, port: Option<Span>, foot: f64) {
        let out = sign * self.shape.core_radius;
        let foot = sign * foot;
        match port {
            Some(port) => {
                self.edge(pen, &[(core.0, foot), (core.0, out), (port.0, out)]);
                self.edge(pen, &[(port.1, out), (core.1, out), (core.1, foot)]);
            }
            None => self.edge(
                pen,
                &[(core.0, foot), (core.0, out), (core.1, out), (core.1, foot)],
            ),
        }
    }

    fn inlet(&self) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new("valve.inlet", "Inlet");
        let oil = self.oil("p_in");
        let core = s.inlet_core;
        self.fill(&mut pen, core, (-s.core_radius, s.core_radius), oil);
        let port = self.port(&mut pen, core, "p_in", -1.0);
        self.core_walls(&mut pen, core, -1.0, Some(port), s.radius);
        self.core_walls(&mut pen, core, 1.0, None, s.radius);
        // Around the neck of the spool, and along its chamfer.
        let neck = (s.neck_start + self.travel, s.shoulder + self.travel);
        self.fill(&mut pen, neck, (-s.radius, s.radius), oil);
        pen.done()
    }

    fn core(&self, id: &str, name: &str, core: Span, pressure: &str) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new(id, name);
        let oil = self.oil(pressure);
        let holes = match s.edge {
            EdgeShape::Holes { diameter, .. } if pressure == "p_e" => Some(diameter),
            _ => None,
        };
        let foot = match holes {
            Some(_) => s.radius * (1.0 + SLEEVE),
            None => s.radius,
        };
        let port = self.port(&mut pen, core, pressure, 1.0);
        for sign in [-1.0, 1.0] {
            let holes = holes.filter(|_| sign > 0.0 || s.edge.is_cut_below());
            let heights = (sign * foot, sign * s.core_radius);
            let heights = (heights.0.min(heights.1), heights.0.max(heights.1));
            self.fill(&mut pen, core, heights, oil);
            let open = (sign > 0.0).then_some(port);
            self.core_walls(&mut pen, core, sign, open, foot);
            if let Some(diameter) = holes {
                self.sleeve_hole(&mut pen, (core.0, core.0 + diameter), sign, foot);
                let (left, right) = (core.0 + diameter, core.1);
                self.edge(&mut pen, &[(left, sign * foot), (right, sign * foot)]);
            } else if foot > s.radius {
                self.edge(&mut pen, &[(core.0, sign * foot), (core.1, sign * foot)]);
            }
        }
        pen.done()
    }

    /// A hole of the sleeve in the section plane.
    fn sleeve_hole(&self, pen: &mut PartPen, hole: Span, sign: f64, foot: f64) {
        let (from, to) = (sign * self.shape.radius, sign * foot);
        let oil = self.oil("p_e");
        self.fill(pen, hole, (from.min(to), from.max(to)), oil);
        for x in [hole.0, hole.1] {
            self.edge(pen, &[(x, from), (x, to)]);
        }
    }

    fn head_chamber(&self) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new("valve.head_end", "Head end");
        let oil = self.oil("p_h");
        let chamber = (s.head_end, self.travel);
        self.fill(&mut pen, chamber, (-s.radius, s.radius), oil);
        self.head_passage(&mut pen);
        // The stop at zero travel.
        let pin = 0.4 * s.radius;
        self.housing(
            &mut pen,
            &[
                (s.head_end, -pin),
                (0.0, -pin),
                (0.0, pin),
                (s.head_end, pin),
            ],
        );
        self.edge(
            &mut pen,
            &[
                (s.head_end, -pin),
                (0.0, -pin),
                (0.0, pin),
                (s.head_end, pin),
            ],
        );
        pen.done()
    }

    /// The passage from the inlet core to the head chamber, with the head hole in it.
    fn head_passage(&self, pen: &mut PartPen) {
        let s = &self.shape;
        let (oil, inlet) = (self.oil("p_h"), self.oil("p_in"));
        let (wide, small) = (0.09 * s.radius, 0.5 * s.head_hole);
        let y = 0.5 * (s.radius + s.core_radius);
        let down = 0.5 * s.head_end;
        let length = HEAD_HOLE_LENGTH * s.radius;
        let hole = (0.4 * s.inlet_core.0, 0.4 * s.inlet_core.0 + length);
        self.fill(pen, (down - wide, hole.0), (y - wide, y + wide), oil);
        self.fill(pen, (down - wide, down + wide), (s.radius, y), oil);
        self.fill(pen, (hole.1, s.inlet_core.0), (y - wide, y + wide), inlet);
        self.fill(pen, hole, (y - small, y + small), inlet);
        let end = s.inlet_core.0;
        self.edge(
            pen,
            &[
                (down - wide, s.radius),
                (down - wide, y + wide),
                (hole.0, y + wide),
                (hole.0, y + small),
                (hole.1, y + small),
                (hole.1, y + wide),
                (end, y + wide),
            ],
        );
        self.edge(
            pen,
            &[
                (down + wide, s.radius),
                (down + wide, y - wide),
                (hole.0, y - wide),
                (hole.0, y - small),
                (hole.1, y - small),
                (hole.1, y - wide),
                (end, y - wide),
            ],
        );
    }

    fn spring_chamber(&self) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new("valve.spring_end", "Spring end");
        let chamber = (s.spool_end + self.travel, s.spring_end);
        self.fill(&mut pen, chamber, (-s.radius, s.radius), self.oil("p_s"));
        // The stop at full travel: a ring around the spring.
        let stop = s.spool_end + s.stroke;
        let inner = s.recess_radius;
        for sign in [-1.0, 1.0] {
            let corners = [
                (stop, sign * inner),
                (s.spring_end, sign * inner),
                (s.spring_end, sign * s.radius),
                (stop, sign * s.radius),
            ];
            self.housing(&mut pen, &corners);
            self.edge(&mut pen, &[corners[1], corners[0], corners[3]]);
        }
        pen.done()
    }

    /// The bore between the cores, and its ends.
    pub(super) fn bore_walls(&self) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new("valve.bore", "Bore of the housing");
        let passage = 0.09 * s.radius;
        let down = 0.5 * s.head_end;
        for sign in [-1.0, 1.0] {
            let y = sign * s.radius;
            let mut walls = vec![
                (down + passage, s.inlet_core.0),
                (s.inlet_core.1, s.excess_core.0),
                (s.excess_core.1, s.priority_core.0),
                (s.priority_core.1, s.spring_end),
            ];
            if sign > 0.0 {
                walls.push((s.head_end, down - passage));
            } else {
                walls[0].0 = s.head_end;
            }
            if let EdgeShape::Holes { diameter, .. } = s.edge {
                let cut = sign > 0.0 || s.edge.is_cut_below();
                let from = if cut { diameter } else { 0.0 };
                walls.push((s.excess_core.0 + from, s.excess_core.1));
            }
            for (from, to) in walls {
                self.edge(&mut pen, &[(from, y), (to, y)]);
            }
        }
        for x in [s.head_end, s.spring_end] {
            self.edge(&mut pen, &[(x, -s.radius), (x, s.radius)]);
        }
        pen.done()
    }
}
