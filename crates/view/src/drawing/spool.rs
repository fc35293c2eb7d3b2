//! The spool, what is in it, and the spring.

use kurbo::{Ellipse, Shape};

use super::proportions::EdgeShape;
use super::sheet::Sheet;
use crate::scene::{Line, Paint, Part, PartPen, Prim, Stroke};

/// Depth of notches, as a share of the radius; the record has none.
const NOTCH_DEPTH: f64 = 0.25;

/// Of holes and notches, those that lie at least this far behind the section plane are dashed, as
/// a share of the radius.
const BEHIND: f64 = 0.1;

impl Sheet<'_> {
    pub(super) fn moving(&self, parts: &mut Vec<Part>) {
        parts.push(self.spool());
        parts.push(self.disc());
        parts.push(self.spring());
        parts.push(self.bore_walls());
        parts.push(self.behind());
    }

    /// The outline of the spool on one side of the axis, from left to right, heights positive;
    /// with the notch that is cut there, if one is.
    fn half_outline(&self, cut: bool) -> Vec<(f64, f64)> {
        let s = &self.shape;
        let (r, neck) = (s.radius, s.neck_radius);
        let mut points = vec![(0.0, r), (s.neck_start, r), (s.neck_start, neck)];
        let face = s.shoulder - s.edge.length();
        points.push((face, neck));
        match s.edge {
            EdgeShape::Chamfer { drop, .. } => points.push((face, r - drop)),
            EdgeShape::Notches { .. } if cut => {
                let floor = (r * (1.0 - NOTCH_DEPTH)).max(neck);
                points.extend([(face, floor), (s.shoulder, floor)]);
            }
            EdgeShape::Notches { .. } => points.push((face, r)),
            EdgeShape::Sharp | EdgeShape::Holes { .. } => {}
        }
        points.extend([(s.shoulder, r), (s.spool_end, r)]);
        points
    }

    fn spool(&self) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new("valve.spool", "Spool");
        let upper = self.half_outline(true);
        let lower = self.half_outline(s.edge.is_cut_below());
        let lower = lower.iter().rev().map(|&(x, y)| (x, -y));
        let outline: Vec<_> = upper.iter().copied().chain(lower).collect();
        self.steel(&mut pen, &outline);
        let (inlet, bore, spring) = (self.oil("p_in"), self.oil("p_b"), self.oil("p_s"));
        let (r, b, neck) = (s.radius, s.bore_radius, s.neck_radius);
        let (cross, wall, disc) = (s.cross_holes, s.orifice_wall, s.disc);
        let hole = 0.5 * s.fixed_orifice;
        // A little beyond the outline, so that holes have no lid.
        let open = 1.2 / self.px_per_mm;
        self.fill_spool(&mut pen, cross, (-neck - open, neck + open), inlet);
        self.fill_spool(&mut pen, (cross.0, wall.0), (-b, b), inlet);
        self.fill_spool(&mut pen, wall, (-hole, hole), inlet);
        self.fill_spool(&mut pen, (wall.1, disc.0), (-b, b), bore);
        for sign in [-1.0, 1.0] {
            let heights = (sign * b, sign * (r + open));
            let heights = (heights.0.min(heights.1), heights.0.max(heights.1));
            self.fill_spool(&mut pen, s.priority_holes, heights, bore);
        }
        let recess = s.recess_radius;
        let mouth = (disc.0, s.spool_end + open);
        self.fill_spool(&mut pen, mouth, (-recess, recess), spring);
        self.spool_edges(&mut pen, hole);
        pen.done()
    }

    /// Edges of everything drilled into the spool.
    fn spool_edges(&self, pen: &mut PartPen, hole: f64) {
        let s = &self.shape;
        let (r, b, neck) = (s.radius, s.bore_radius, s.neck_radius);
        let (cross, wall, disc) = (s.cross_holes, s.orifice_wall, s.disc);
        let holes = s.priority_holes;
        for sign in [-1.0, 1.0] {
            let up = |y: f64| sign * y;
            self.spool_edge(pen, &[(cross.0, up(neck)), (cross.0, up(0.0))]);
            self.spool_edge(
                pen,
                &[
                    (cross.1, up(neck)),
                    (cross.1, up(b)),
                    (wall.0, up(b)),
                    (wall.0, up(hole)),
                    (wall.1, up(hole)),
                    (wall.1, up(b)),
                    (holes.0, up(b)),
                    (holes.0, up(r)),
                ],
            );
            self.spool_edge(
                pen,
                &[
                    (holes.1, up(r)),
                    (holes.1, up(b)),
                    (disc.0, up(b)),
                    (disc.0, up(s.recess_radius)),
                    (s.spool_end, up(s.recess_radius)),
                ],
            );
            // The rim of what is cut open.
            self.spool_edge(
                pen,
                &[(s.spool_end, up(s.recess_radius)), (s.spool_end, up(r))],
            );
        }
    }

    fn disc(&self) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new("valve.disc", "Disc with the disc hole");
        let small = 0.5 * s.disc_hole;
        for sign in [-1.0, 1.0] {
            let corners = [
                (s.disc.0, sign * small),
                (s.disc.1, sign * small),
                (s.disc.1, sign * s.recess_radius),
                (s.disc.0, sign * s.recess_radius),
            ];
            self.steel(&mut pen, &corners);
        }
        let oil = self.oil("p_b");
        self.fill_spool(&mut pen, s.disc, (-small, small), oil);
        pen.done()
    }

    fn spring(&self) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new("valve.spring", "Spring");
        let spring = &s.spring;
        let start = s.disc.1 + self.travel;
        let length = self.shape.spring_length(self.travel);
        let turns = spring.coils + 1;
        let pitch = (length - spring.wire) / f64::from(turns);
        let place = |turn: f64| start + 0.5 * spring.wire + pitch * turn;
        let half = 0.5 * spring.wire;
        let (up, down) = (spring.radius, -spring.radius);
        for turn in 0..turns {
            let (from, to) = (place(f64::from(turn)), place(f64::from(turn) + 0.5));
            let wire = [
                self.at(from - half, up),
                self.at(from + half, up),
                self.at(to + half, down),
                self.at(to - half, down),
            ];
            pen.area(&wire, Paint::Steel, Some(Line::Spring));
        }
        for (turn, y) in (0..=2 * turns).map(|i| (i, if i % 2 == 0 { up } else { down })) {
            let centre = self.at(place(0.5 * f64::from(turn)), y);
            pen.push(Prim::Circle {
                centre: centre.into(),
                radius: half * self.px_per_mm,
                stroke: Some(Stroke::plain(Line::Spring)),
                fill: Some(Paint::Steel),
            });
        }
        pen.done()
    }

    /// Centre line, and what lies behind the section plane: holes of the sleeve, notches.
    fn behind(&self) -> Part {
        let s = &self.shape;
        let mut pen = PartPen::new("valve.land", "Metering edge of the excess land");
        let axis = [
            self.at(self.left - 1.0, 0.0),
            self.at(self.right + 1.0, 0.0),
        ];
        pen.line(&axis, Stroke::plain(Line::Centre));
        let hidden = Some(Stroke::plain(Line::Hidden));
        let angles = |count: u32| {
            (0..count)
                .map(move |i| std::f64::consts::TAU * f64::from(i) / f64::from(count))
                .filter(|angle| angle.sin() > BEHIND)
        };
        match s.edge {
            EdgeShape::Holes { count, diameter } => {
                for angle in angles(count) {
                    let middle = self.at(s.excess_core.0 + 0.5 * diameter, s.radius * angle.cos());
                    let half = 0.5 * diameter * self.px_per_mm;
                    let ellipse = Ellipse::new(middle, (half, half * angle.sin()), 0.0);
                    pen.path(ellipse.to_path(0.05), hidden, None);
                }
            }
            EdgeShape::Notches {
                count,
                angle,
                length,
            } => {
                let half = length * (0.5 * angle).tan() / s.radius;
                for middle in angles(count) {
                    let y = |angle: f64| s.radius * angle.cos();
                    let tip = self.spool_at(s.shoulder, y(middle));
                    let base = s.shoulder - length;
                    let (a, b) = (
                        self.spool_at(base, y(middle - half)),
                        self.spool_at(base, y(middle + half)),
                    );
                    pen.line(&[a, tip, b], Stroke::plain(Line::Hidden));
                }
            }
            EdgeShape::Chamfer { .. } | EdgeShape::Sharp => {}
        }
        pen.done()
    }
}
