//! The priority flow control valve: flows and forces of its spool (M5).

use std::f64::consts::PI;

use crate::end_stop::{EndStop, pair_force};
use crate::friction::Friction;
use crate::land::MeteringLand;
use crate::node::Chamber;
use crate::oil::Oil;
use crate::orifice::{Edge, Orifice};
use crate::real::Real;
use crate::smooth::{ramp, smooth_step};

/// Travel over which the leakage of the closed land fades out and its sealing length is floored,
/// m (M5.4).
const LEAK_WIDTH: f64 = 50e-6;

/// The valve. Travel `x` is 0 with the spool sprung shut on the excess side and opens the excess
/// land when positive.
#[derive(Debug, Clone, PartialEq)]
pub struct PriorityValve {
    /// Spool diameter, m.
    pub diameter: f64,
    /// Spool mass with a third of the spring, kg.
    pub mass: f64,
    /// Spring force at `x = 0`, N.
    pub preload: f64,
    /// Spring rate, N/m.
    pub spring_rate: f64,
    /// Dry friction of the spool.
    pub friction: Friction,
    /// Viscous damping of the spool, N s/m: film and extra.
    pub viscous: f64,
    /// Fixed orifice, inlet to bore.
    pub fixed_orifice: Orifice,
    /// Head hole, inlet to head end.
    pub head_hole: Orifice,
    /// Disc hole, bore to spring end.
    pub disc_hole: Orifice,
    /// Excess land.
    pub land: MeteringLand,
    /// Edge of the excess land.
    pub land_edge: Edge,
    /// Open area of the priority holes, m2.
    pub holes_area: f64,
    /// What stays open of the priority holes when shut, m2.
    pub holes_leak: f64,
    /// Travel at which the priority holes begin to shut, m.
    pub holes_start: f64,
    /// Travel at which the priority holes are shut, m, beyond `holes_start`.
    pub holes_end: f64,
    /// Edge of the priority holes.
    pub holes_edge: Edge,
    /// Leakage factor of the spool's clearance, flow times length per pressure, m4/(s Pa).
    pub clearance_factor: f64,
    /// Conductance of an end land, m3/(s Pa).
    pub end_conductance: f64,
    /// Cosine of the jet angle at the excess land.
    pub land_jet_cosine: f64,
    /// Cosine of the jet angle at the priority holes.
    pub holes_jet_cosine: f64,
    /// Factor on both steady jet forces; 1 is the theory, 0 leaves them out.
    pub jet_factor: f64,
    /// Damping length of the transient jet force, m, signed (M5.8).
    pub damping_length: f64,
    /// End stops at `x = 0` and at the stroke.
    pub stop: EndStop,
    /// Stroke, m.
    pub stroke: f64,
    /// Volume from pump to valve, with the gallery.
    pub inlet: Chamber,
    /// Volume of the spool's bore behind the fixed orifice.
    pub bore: Chamber,
    /// Head-end volume at `x = 0`; grows with travel.
    pub head: Chamber,
    /// Spring-end volume at `x = 0`; shrinks with travel.
    pub spring: Chamber,
    /// Volume of the priority port.
    pub priority_port: Chamber,
    /// Volume of the excess port with its line.
    pub excess_port: Chamber,
}

/// Pressures around the spool, Pa gauge.
#[derive(Debug, Clone, Copy)]
pub struct SpoolPressures<S> {
    /// Inlet.
    pub inlet: S,
    /// Bore.
    pub bore: S,
    /// Head end.
    pub head: S,
    /// Spring end.
    pub spring: S,
    /// Priority port.
    pub priority: S,
    /// Excess port.
    pub excess: S,
}

/// Flows through the valve, m3/s, with the openings, m2.
#[derive(Debug, Clone, Copy)]
pub struct ValveFlows<S> {
    /// Fixed orifice, inlet to bore.
    pub orifice: S,
    /// Priority holes, bore to priority port.
    pub holes: S,
    /// Inlet to excess port, leakage included.
    pub excess: S,
    /// Leakage of the closed land alone.
    pub land_leak: S,
    /// Head hole, inlet to head end.
    pub head: S,
    /// Disc hole, bore to spring end.
    pub disc: S,
    /// End land, inlet to head end.
    pub head_leak: S,
    /// End land, priority port to spring end.
    pub spring_leak: S,
    /// Opening of the excess land.
    pub land_area: S,
    /// Opening of the priority holes.
    pub holes_area: S,
    /// Steady jet force of the land, towards shutting, N.
    pub land_jet: S,
    /// Steady jet force of the priority holes, towards +x, N.
    pub holes_jet: S,
    /// Transient jet force against the motion, N.
    pub transient_jet: S,
}

/// Forces on the spool, N, and what follows.
#[derive(Debug, Clone, Copy)]
pub struct SpoolForces<S> {
    /// Pressure on both ends, towards +x.
    pub ends: S,
    /// Spring, against +x.
    pub spring: S,
    /// Dry friction, against the motion.
    pub friction: S,
    /// Rate of the bristle deflection, m/s; 0 without one.
    pub bristle_rate: S,
    /// Viscous force, against the motion.
    pub viscous: S,
    /// End stops, towards +x.
    pub stop: S,
    /// Sum, towards +x.
    pub sum: S,
}

impl PriorityValve {
    /// Area of the spool's end, m2.
    #[inline(always)]
    #[must_use]
    pub fn end_area(&self) -> f64 {
        PI * 0.25 * self.diameter * self.diameter
    }

    /// Leakage factor of a concentric clearance, `pi d c^3 / (12 mu)`, m4/(s Pa); diameter and
    /// clearance in m, viscosity in Pa s.
    ///
    /// # Source
    /// Plane Couette-Poiseuille flow; Merritt, *Hydraulic Control Systems*, 1967, ch. 3.
    #[must_use]
    pub fn clearance_factor(diameter: f64, clearance: f64, viscosity: f64) -> f64 {
        PI * diameter * clearance.powi(3) / (12.0 * viscosity)
    }

    /// Viscous damping of the oil film, `mu pi d L / c`, N s/m.
    ///
    /// # Source
    /// Couette flow in a concentric clearance; Merritt 1967, ch. 3.
    #[must_use]
    pub fn film_damping(diameter: f64, length: f64, clearance: f64, viscosity: f64) -> f64 {
        viscosity * PI * diameter * length / clearance
    }

    /// Flows and jet forces at a travel (m) and velocity (m/s) (M5.1 to M5.8).
    #[inline(always)]
    pub fn flows<S: Real>(
        &self,
        oil: &Oil,
        travel: S,
        velocity: S,
        p: &SpoolPressures<S>,
    ) -> ValveFlows<S> {
        let orifice = self.fixed_orifice.flow(oil, p.inlet - p.bore);

        let shut = travel.univariate(|x| {
            smooth_step((x - self.holes_start) * (1.0 / (self.holes_end - self.holes_start)))
        });
        let holes_area = (-shut + 1.0) * self.holes_area + self.holes_leak;
        let holes_velocity = self
            .holes_edge
            .velocity_round(oil, holes_area, p.bore - p.priority);

        let opening = self.land.opening(travel);
        let land_drop = p.inlet - p.excess;
        let land_velocity = self.land_edge.velocity_slit(oil, opening.gap, land_drop);
        let land_leak = self.land_leak(travel, land_drop);

        let jet = |area: S, v: S, edge: &Edge, cosine: f64| {
            let factor = oil.density * cosine * self.jet_factor / edge.discharge;
            area.bivariate(v, |area, v| area * v * v * factor)
        };
        let transient_jet = if self.damping_length == 0.0 {
            S::constant(0.0)
        } else {
            land_velocity.abs() * opening.slope * velocity * (self.damping_length * oil.density)
        };
        ValveFlows {
            orifice,
            holes: holes_velocity * holes_area,
            excess: land_velocity * opening.area + land_leak,
            land_leak,
            head: self.head_hole.flow(oil, p.inlet - p.head),
            disc: self.disc_hole.flow(oil, p.bore - p.spring),
            head_leak: (p.inlet - p.head) * self.end_conductance,
            spring_leak: (p.priority - p.spring) * self.end_conductance,
            land_area: opening.area,
            holes_area,
            land_jet: jet(
                opening.area,
                land_velocity,
                &self.land_edge,
                self.land_jet_cosine,
            ),
            holes_jet: jet(
                holes_area,
                holes_velocity,
                &self.holes_edge,
                self.holes_jet_cosine,
            ) * shut,
            transient_jet,
        }
    }

    /// Leakage over the land while it is shut (M5.4), m3/s; fades as it opens.
    #[inline(always)]
    fn land_leak<S: Real>(&self, travel: S, dp: S) -> S {
        if travel.value() - self.land.overlap >= LEAK_WIDTH {
            return S::constant_here(0.0, [travel, dp]);
        }
        travel.bivariate(dp, |travel, dp| {
            let closed = -travel + self.land.overlap;
            let fade = smooth_step(-closed * (1.0 / LEAK_WIDTH));
            let length = ramp(closed, LEAK_WIDTH) + LEAK_WIDTH;
            dp * self.clearance_factor / length * (-fade + 1.0)
        })
    }

    /// Forces on the spool (M5.9, M5.10) at a travel, velocity and bristle deflection.
    #[inline(always)]
    pub fn forces<S: Real>(
        &self,
        travel: S,
        velocity: S,
        bristle: S,
        p: &SpoolPressures<S>,
        flows: &ValveFlows<S>,
    ) -> SpoolForces<S> {
        let ends = (p.head - p.spring) * self.end_area();
        let spring = travel * self.spring_rate + self.preload;
        let (friction, bristle_rate) = match &self.friction {
            Friction::Smooth {
                coulomb,
                velocity: width,
            } => (
                velocity.univariate(|v| (v * (1.0 / width)).tanh() * *coulomb),
                S::constant(0.0),
            ),
            Friction::Bristle(law) => law.force(velocity, bristle),
        };
        let viscous = velocity * self.viscous;
        let stop = pair_force(&self.stop, -travel, travel - self.stroke, velocity);
        let sum = ends - spring - friction - viscous - flows.land_jet + flows.holes_jet
            - flows.transient_jet
            + stop;
        SpoolForces {
            ends,
            spring,
            friction,
            bristle_rate,
            viscous,
            stop,
            sum,
        }
    }

    /// Travel at rest without pressure: the spring presses the spool into its stop (M5.10), m.
    #[must_use]
    pub fn rest_travel(&self) -> f64 {
        -self.preload / self.stop.stiffness
    }

    /// Power lost to friction, film and stops, W.
    #[inline(always)]
    pub fn mechanical_loss<S: Real>(
        &self,
        travel: S,
        velocity: S,
        bristle: S,
        forces: &SpoolForces<S>,
    ) -> S {
        let dry = match &self.friction {
            Friction::Smooth { .. } => forces.friction * velocity,
            Friction::Bristle(law) => {
                forces.friction * velocity - bristle * forces.bristle_rate * law.stiffness
            }
        };
        dry + forces.viscous * velocity
            + self.stop.loss(-travel, -velocity)
            + self.stop.loss(travel - self.stroke, velocity)
    }
}
