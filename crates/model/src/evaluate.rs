//! The right-hand side of a whole circuit, and every signal on the way (M4 to M9).
//!
//! Generic over the scalar and the observer; marked to be inlined throughout, since the optimiser
//! then removes what nobody observes and keeps the dual number's columns in registers.

use crate::circuit::Circuit;
use crate::parts::{PrimeMover, PriorityRelief, ReturnSide, Suction};
use crate::priority_valve::{SpoolPressures, ValveFlows};
use crate::profile::{Input, Inputs};
use crate::real::Real;
use crate::relief::Relief;
use crate::signal::{Observer, Signal};

/// Sums that several parts add to.
pub(crate) struct Sums<S> {
    /// Net flow into the return, m3/s.
    pub(crate) to_return: S,
}

impl Circuit {
    /// Rates of all states into `dy`, signals to `o`.
    #[inline(always)]
    pub(crate) fn evaluate<S: Real, O: Observer<S>>(
        &self,
        inputs: &Inputs,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
    ) {
        // One bounds check here spares the optimiser the others.
        let y = &y[..self.layout.states.len()];
        let dy = &mut dy[..self.layout.states.len()];
        let mut sums = Sums {
            to_return: S::constant(0.0),
        };
        let ret = match self.parts.return_side {
            ReturnSide::Constant(pressure) => S::constant(pressure),
            ReturnSide::Restricted { .. } => y[self.layout.p_ret],
        };
        let pumped = self.evaluate_pump(inputs, y, dy, o);
        let (to_line, from_excess) = self.evaluate_valve(y, dy, o, pumped, ret, &mut sums);
        self.evaluate_line(inputs, y, dy, o, to_line, ret, &mut sums);
        self.evaluate_excess(inputs, y, dy, o, from_excess, ret, &mut sums);
        self.evaluate_return(y, dy, o, ret, &sums);
    }

    /// Prime mover, pump and suction; gives the delivered flow, m3/s.
    #[inline(always)]
    fn evaluate_pump<S: Real, O: Observer<S>>(
        &self,
        inputs: &Inputs,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
    ) -> S {
        let ix = &self.layout;
        let pump = &self.parts.pump;
        let p_in = y[ix.p_in];
        let set_speed = inputs.get(Input::EngineSpeed);
        let speed = match self.parts.prime_mover {
            PrimeMover::SpeedProfile => S::constant(set_speed),
            PrimeMover::Governed(_) => y[ix.w_eng],
        };
        let ripple = if pump.ripple.needs_angle() {
            dy[ix.angle] = speed;
            pump.ripple.factor(y[ix.angle])
        } else {
            S::constant(1.0)
        };
        let (inlet, fill) = match &self.parts.suction {
            Suction::Flooded => (S::constant(0.0), S::constant(1.0)),
            Suction::Line { filling, .. } => (y[ix.p_suc], filling.share(y[ix.p_suc])),
        };
        let flows = pump.flows(&self.parts.oil, speed, p_in, inlet, ripple, fill);
        let torque = pump.torque(p_in, inlet);
        o.add(Signal::VolumeIn, flows.delivered);
        if let Suction::Line { line, chamber, .. } = &self.parts.suction {
            let q = y[ix.q_suc];
            let drop = line.segment_drop(&self.parts.oil, q);
            dy[ix.q_suc] = (-inlet - drop) * (1.0 / line.segment_inertance(&self.parts.oil));
            dy[ix.p_suc] = chamber.pressure_rate(&self.parts.oil, inlet, q - flows.drawn);
            o.add(Signal::VolumeIn, q - flows.drawn);
            o.add(Signal::ReturnLoss, q * drop);
            o.put(Signal::SuctionFlow, q);
            o.put(Signal::PumpFill, fill);
        }
        if let PrimeMover::Governed(engine) = &self.parts.prime_mover {
            dy[ix.w_eng] = engine.acceleration(set_speed, speed, torque);
            o.put(Signal::EngineSetSpeed, S::constant(set_speed));
            o.put(Signal::EngineTorque, engine.torque(set_speed, speed));
        }
        let power = flows.delivered * p_in - flows.drawn * inlet;
        o.put(Signal::EngineSpeed, speed);
        o.put(Signal::PumpFlow, flows.delivered);
        o.put(Signal::PumpSlip, flows.slip);
        o.put(Signal::PumpTorque, torque);
        o.put(Signal::PumpShaftPower, torque * speed);
        o.put(Signal::PumpPower, power);
        o.put(Signal::EnergyIn, power);
        flows.delivered
    }

    /// Valve with the reliefs at its ports; gives the flow into the priority port and the flow
    /// into the excess port, m3/s.
    #[inline(always)]
    fn evaluate_valve<S: Real, O: Observer<S>>(
        &self,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        pumped: S,
        ret: S,
        sums: &mut Sums<S>,
    ) -> (S, S) {
        let ix = &self.layout;
        let oil = &self.parts.oil;
        let valve = &self.parts.valve;
        let x = y[ix.x];
        let p = SpoolPressures {
            inlet: y[ix.p_in],
            bore: y[ix.p_b],
            head: y[ix.p_h],
            spring: y[ix.p_s],
            priority: y[ix.p_c],
            excess: y[ix.p_e],
        };
        let q = valve.flows(oil, x, y[ix.v], &p);
        let mut relieved = S::constant(0.0);
        if let Some(relief) = &self.parts.main_relief {
            o.put(Signal::MainReliefOpening, y[ix.y_main]);
            relieved = self.relieve(relief, ix.y_main, p.inlet - ret, y, dy, o, sums);
            o.put(Signal::MainReliefFlow, relieved);
        }
        let (priority_relieved, pilot) = self.evaluate_priority_relief(y, dy, o, &p, ret, sums);
        self.evaluate_spool(y, dy, o, &p, &q);

        let displaced = y[ix.v] * valve.end_area();
        let swept = x * valve.end_area();
        dy[ix.p_h] =
            valve
                .head
                .pressure_rate_moving(oil, p.head, q.head + q.head_leak - displaced, swept);
        dy[ix.p_s] = valve.spring.pressure_rate_moving(
            oil,
            p.spring,
            q.disc + q.spring_leak + displaced - pilot,
            -swept,
        );
        dy[ix.p_b] = valve
            .bore
            .pressure_rate(oil, p.bore, q.orifice - q.holes - q.disc);
        dy[ix.p_in] = valve.inlet.pressure_rate(
            oil,
            p.inlet,
            pumped - q.orifice - q.excess - q.head - q.head_leak - relieved,
        );
        observe_valve(o, &p, &q);
        (q.holes - q.spring_leak - priority_relieved, q.excess)
    }

    /// Relief of the steering side; gives its flow from the priority port and from the spring
    /// end, m3/s.
    #[inline(always)]
    fn evaluate_priority_relief<S: Real, O: Observer<S>>(
        &self,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        p: &SpoolPressures<S>,
        ret: S,
        sums: &mut Sums<S>,
    ) -> (S, S) {
        let at = self.layout.y_pri;
        let none = S::constant(0.0);
        match &self.parts.priority_relief {
            PriorityRelief::None => (none, none),
            PriorityRelief::OnPort(relief) => {
                let flow = self.relieve(relief, at, p.priority - ret, y, dy, o, sums);
                o.put(Signal::PriorityReliefFlow, flow);
                o.put(Signal::PriorityReliefOpening, y[at]);
                (flow, none)
            }
            PriorityRelief::Pilot(relief) => {
                let flow = self.relieve(relief, at, p.spring - ret, y, dy, o, sums);
                o.put(Signal::PilotReliefFlow, flow);
                o.put(Signal::PriorityReliefOpening, y[at]);
                (none, flow)
            }
        }
    }

    /// Motion of the spool.
    #[inline(always)]
    fn evaluate_spool<S: Real, O: Observer<S>>(
        &self,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        p: &SpoolPressures<S>,
        q: &ValveFlows<S>,
    ) {
        let ix = &self.layout;
        let valve = &self.parts.valve;
        let (x, v) = (y[ix.x], y[ix.v]);
        let bristle = if valve.friction.has_state() {
            y[ix.bristle]
        } else {
            S::constant(0.0)
        };
        let f = valve.forces(x, v, bristle, p, q);
        if valve.friction.has_state() {
            dy[ix.bristle] = f.bristle_rate;
        }
        dy[ix.x] = v;
        dy[ix.v] = f.sum * (1.0 / valve.mass);
        o.put(Signal::EndPressureForce, f.ends);
        o.put(Signal::SpringForce, f.spring);
        o.put(Signal::SpoolFriction, f.friction);
        o.put(Signal::SpoolViscous, f.viscous);
        o.put(Signal::StopForce, f.stop);
        o.put(Signal::SpoolForce, f.sum);
        o.put(
            Signal::JetExchange,
            (q.land_jet - q.holes_jet + q.transient_jet) * v,
        );
        o.add(
            Signal::FrictionLoss,
            valve.mechanical_loss(x, v, bristle, &f),
        );
    }

    /// One relief valve into the return; gives its flow, m3/s.
    #[inline(always)]
    #[allow(
        clippy::too_many_arguments,
        reason = "states, rates and sums of one evaluation"
    )]
    pub(crate) fn relieve<S: Real, O: Observer<S>>(
        &self,
        relief: &Relief,
        state: usize,
        dp: S,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        sums: &mut Sums<S>,
    ) -> S {
        dy[state] = relief.rate(y[state], dp);
        let flow = relief.flow(&self.parts.oil, y[state], dp);
        sums.to_return += flow;
        o.add(Signal::ReliefLoss, flow * dp);
        flow
    }

    /// The way back to tank.
    #[inline(always)]
    fn evaluate_return<S: Real, O: Observer<S>>(
        &self,
        _y: &[S],
        dy: &mut [S],
        o: &mut O,
        ret: S,
        sums: &Sums<S>,
    ) {
        let oil = &self.parts.oil;
        let out = match &self.parts.return_side {
            ReturnSide::Constant(_) => sums.to_return,
            ReturnSide::Restricted {
                chamber,
                area,
                edge,
            } => {
                let out = edge.flow_given(oil, *area, ret);
                dy[self.layout.p_ret] = chamber.pressure_rate(oil, ret, sums.to_return - out);
                out
            }
        };
        o.add(Signal::VolumeOut, out);
        o.add(Signal::ReturnLoss, out * ret);
        o.put(Signal::ReturnFlow, out);
    }
}

/// Flows, openings and losses of the valve.
#[inline(always)]
fn observe_valve<S: Real, O: Observer<S>>(o: &mut O, p: &SpoolPressures<S>, q: &ValveFlows<S>) {
    let priority = q.holes - q.spring_leak;
    o.put(Signal::FixedOrificeFlow, q.orifice);
    o.put(Signal::PriorityHolesFlow, q.holes);
    o.put(Signal::PriorityFlow, priority);
    o.put(Signal::ExcessFlow, q.excess);
    o.put(Signal::LandLeakage, q.land_leak);
    o.put(Signal::HeadHoleFlow, q.head);
    o.put(Signal::DiscHoleFlow, q.disc);
    o.put(Signal::HeadEndLeakage, q.head_leak);
    o.put(Signal::SpringEndLeakage, q.spring_leak);
    o.put(Signal::LandArea, q.land_area);
    o.put(Signal::HolesArea, q.holes_area);
    o.put(Signal::PressureMargin, p.inlet - p.bore);
    o.put(Signal::ExcessJetForce, q.land_jet);
    o.put(Signal::PriorityJetForce, q.holes_jet);
    o.put(Signal::TransientJetForce, q.transient_jet);
    o.put(Signal::SteeringPower, p.priority * priority);
    o.put(Signal::ExcessPower, p.excess * q.excess);
    o.put(Signal::FixedOrificeLoss, q.orifice * (p.inlet - p.bore));
    o.put(Signal::HolesLoss, q.holes * (p.bore - p.priority));
    o.put(Signal::LandLoss, q.excess * (p.inlet - p.excess));
    o.put(
        Signal::DampingLoss,
        (q.head + q.head_leak) * (p.inlet - p.head)
            + q.disc * (p.bore - p.spring)
            + q.spring_leak * (p.priority - p.spring),
    );
}
