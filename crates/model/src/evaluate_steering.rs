//! The steering side of the right-hand side: line, bench, steering unit and cylinder, motor (M7).

use crate::circuit::Circuit;
use crate::evaluate::Sums;
use crate::friction::Friction;
use crate::motor::{HydraulicMotor, MotorFlows};
use crate::parts::{BenchThrottle, SteeringGear, SteeringSide};
use crate::profile::{Input, Inputs};
use crate::real::Real;
use crate::signal::{Observer, Signal};
use crate::steering_unit::{SteeringFlows, SteeringUnit};

impl Circuit {
    /// Priority port, line, and what it feeds; `inflow` is what the valve puts into the port.
    #[inline(always)]
    #[allow(
        clippy::too_many_arguments,
        reason = "states, rates and sums of one evaluation"
    )]
    pub(crate) fn evaluate_line<S: Real, O: Observer<S>>(
        &self,
        inputs: &Inputs,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        inflow: S,
        ret: S,
        sums: &mut Sums<S>,
    ) {
        let ix = &self.layout;
        let oil = &self.parts.oil;
        let line = &self.parts.line;
        let segments = line.line.segments;
        let p_c = y[ix.p_c];
        let first = y[ix.q_line];
        dy[ix.p_c] = self
            .parts
            .valve
            .priority_port
            .pressure_rate(oil, p_c, inflow - first);
        let inertance = 1.0 / line.line.segment_inertance(oil);
        let chamber = line.segment_chamber();
        let mut ahead = p_c;
        let mut flow = first;
        for segment in 0..segments {
            let at = ix.q_line + 2 * segment;
            flow = y[at];
            // The last segment ends at the steering supply, which follows it in the layout.
            let behind = y[at + 1];
            let drop = line.line.segment_drop(oil, flow);
            dy[at] = (ahead - behind - drop) * inertance;
            o.add(Signal::LineLoss, flow * drop);
            if segment + 1 < segments {
                dy[at + 1] = chamber.pressure_rate(oil, behind, flow - y[at + 2]);
            }
            ahead = behind;
        }
        o.put(Signal::LineFlow, first);
        o.put(Signal::LineEndFlow, flow);
        o.put(Signal::LinePressureDrop, p_c - y[ix.p_su]);
        let taken = match &self.parts.steering {
            SteeringSide::Bench(bench) => self.evaluate_bench(inputs, y, o, bench),
            SteeringSide::Unit(gear) => self.evaluate_gear(inputs, y, dy, o, gear, ret, sums),
            SteeringSide::Motor(motor) => {
                self.evaluate_priority_motor(inputs, y, dy, o, motor, ret, sums)
            }
        };
        dy[ix.p_su] = line
            .end_chamber()
            .pressure_rate(oil, y[ix.p_su], flow - taken);
    }

    #[inline(always)]
    fn evaluate_bench<S: Real, O: Observer<S>>(
        &self,
        inputs: &Inputs,
        y: &[S],
        o: &mut O,
        bench: &BenchThrottle,
    ) -> S {
        let area = S::constant(inputs.get(Input::BenchArea));
        let behind = inputs.get(Input::BenchPressure);
        let dp = y[self.layout.p_su] - behind;
        let flow = bench
            .edge
            .flow_checked(&self.parts.oil, area, bench.check_pressure, dp);
        o.put(Signal::BenchArea, area);
        o.put(Signal::BenchPressure, S::constant(behind));
        o.put(Signal::BenchFlow, flow);
        o.add(Signal::SteeringLoss, flow * dp);
        o.add(Signal::WorkOut, flow * behind);
        o.add(Signal::VolumeOut, flow);
        flow
    }

    #[inline(always)]
    #[allow(
        clippy::too_many_arguments,
        reason = "states, rates and sums of one evaluation"
    )]
    fn evaluate_priority_motor<S: Real, O: Observer<S>>(
        &self,
        inputs: &Inputs,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        motor: &HydraulicMotor,
        ret: S,
        sums: &mut Sums<S>,
    ) -> S {
        let ix = &self.layout;
        let command = inputs.get(Input::PriorityCommand);
        let m: MotorFlows<S> = motor.flows(
            &self.parts.oil,
            command,
            y[ix.p_su],
            y[ix.p_pm],
            ret,
            y[ix.w_pm],
        );
        dy[ix.p_pm] = m.pressure_rate;
        dy[ix.w_pm] = m.acceleration;
        sums.to_return += m.through - m.check;
        o.put(Signal::PriorityCommand, S::constant(command));
        o.put(Signal::PriorityMotorFlow, m.through);
        o.add(Signal::SteeringLoss, m.lost);
        o.add(Signal::WorkOut, m.work);
        m.valve
    }

    /// Steering unit and cylinder; gives the flow taken from the supply, m3/s.
    #[inline(always)]
    #[allow(
        clippy::too_many_arguments,
        reason = "states, rates and sums of one evaluation"
    )]
    fn evaluate_gear<S: Real, O: Observer<S>>(
        &self,
        inputs: &Inputs,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        gear: &SteeringGear,
        ret: S,
        sums: &mut Sums<S>,
    ) -> S {
        let ix = &self.layout;
        let oil = &self.parts.oil;
        let unit = &gear.unit;
        let wheel = inputs.get(Input::WheelRate);
        let (p_su, p_a, p_b) = (y[ix.p_su], y[ix.p_a], y[ix.p_bc]);
        let u = unit.flows(oil, y[ix.d], wheel, p_su, (p_a, p_b), ret);
        dy[ix.d] = u.deflection_rate;
        let supply_leak = (p_su - ret) * unit.supply_leak;
        let leak_a = (p_a - ret) * unit.port_leak;
        let leak_b = (p_b - ret) * unit.port_leak;
        let area = S::constant(gear.suction_area);
        let check = |p: S| {
            gear.suction_edge
                .flow_checked(oil, area, unit.check_pressure, ret - p)
        };
        let (suction_a, suction_b) = (check(p_a), check(p_b));
        let shock = |p: S| match &gear.shock_relief {
            Some(relief) => relief.flow_at_once(oil, p - ret),
            None => S::constant(0.0),
        };
        let (shock_a, shock_b) = (shock(p_a), shock(p_b));
        let in_a = S::choose(u.to_a, u.metered, -u.returned);
        let in_b = S::choose(u.to_a, -u.returned, u.metered);
        self.evaluate_cylinder(
            inputs,
            y,
            dy,
            o,
            gear,
            in_a + suction_a - leak_a - shock_a,
            in_b + suction_b - leak_b - shock_b,
        );
        sums.to_return += u.bypass + supply_leak + u.returned + leak_a + leak_b + shock_a + shock_b
            - suction_a
            - suction_b;
        let (fed, emptied) = if u.to_a { (p_a, p_b) } else { (p_b, p_a) };
        o.add(
            Signal::SteeringLoss,
            (u.bypass + supply_leak) * (p_su - ret)
                + u.metered * (p_su - fed)
                + u.returned * (emptied - ret)
                + (leak_a + shock_a - suction_a) * (p_a - ret)
                + (leak_b + shock_b - suction_b) * (p_b - ret),
        );
        o.put(Signal::SteeringUnitLeakage, supply_leak + leak_a + leak_b);
        o.put(Signal::SuctionCheckFlow, suction_a + suction_b);
        if gear.shock_relief.is_some() {
            o.put(Signal::ShockReliefFlow, shock_a + shock_b);
        }
        o.put(Signal::SteeringLoadPressure, p_a - p_b);
        observe_unit(o, unit, wheel, &u);
        u.bypass + u.metered + supply_leak
    }

    /// Steering cylinder with its tyre load (M7.6, M7.7), from the net inflows of its chambers.
    #[inline(always)]
    #[allow(
        clippy::too_many_arguments,
        reason = "states, rates and sums of one evaluation"
    )]
    fn evaluate_cylinder<S: Real, O: Observer<S>>(
        &self,
        inputs: &Inputs,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        gear: &SteeringGear,
        in_a: S,
        in_b: S,
    ) {
        let ix = &self.layout;
        let cylinder = &gear.cylinder;
        let (p_a, p_b) = (y[ix.p_a], y[ix.p_bc]);
        let (travel, velocity) = (y[ix.y_c], y[ix.v_c]);
        let (rate_a, rate_b, leak) =
            cylinder.pressure_rates(&self.parts.oil, (p_a, p_b), (in_a, in_b), travel, velocity);
        dy[ix.p_a] = rate_a;
        dy[ix.p_bc] = rate_b;
        let (scrub, scrub_loss) = match &gear.scrub {
            Friction::Smooth {
                coulomb,
                velocity: width,
            } => {
                let force = velocity.univariate(|v| (v * (1.0 / width)).tanh() * *coulomb);
                (force, force * velocity)
            }
            Friction::Bristle(law) => {
                let z = y[ix.scrub];
                let (force, rate) = law.force(velocity, z);
                dy[ix.scrub] = rate;
                (force, force * velocity - z * rate * law.stiffness)
            }
        };
        let external = inputs.get(Input::ExternalForce);
        let oil_force = cylinder.oil_force(p_a, p_b);
        let tyre = travel * gear.tyre_rate + scrub;
        let drag = velocity * cylinder.damping;
        let stops = cylinder.stop_force(travel, velocity);
        dy[ix.y_c] = velocity;
        dy[ix.v_c] = (oil_force - external - tyre - drag + stops) * (1.0 / cylinder.mass);
        o.put(Signal::ExternalForce, S::constant(external));
        o.put(Signal::CylinderForce, oil_force);
        o.put(Signal::TyreForce, tyre);
        o.put(Signal::PistonLeakage, leak);
        o.add(Signal::SteeringLoss, leak * (p_a - p_b));
        o.add(
            Signal::FrictionLoss,
            scrub_loss + drag * velocity + cylinder.stop_loss(travel, velocity),
        );
        o.add(Signal::WorkOut, velocity * external);
    }
}

/// What the steering unit does, for people.
#[inline(always)]
fn observe_unit<S: Real, O: Observer<S>>(
    o: &mut O,
    unit: &SteeringUnit,
    wheel: f64,
    u: &SteeringFlows<S>,
) {
    let signed = if u.to_a { u.metered } else { -u.metered };
    o.put(Signal::WheelRate, S::constant(wheel));
    o.put(Signal::WheelRateEffective, u.wheel_reached);
    o.put(Signal::WheelShortfall, -u.wheel_reached + wheel);
    o.put(Signal::NeutralBypassFlow, u.bypass);
    o.put(Signal::MeterFlow, signed);
    o.put(Signal::SteeringDemand, S::constant(unit.demand(wheel)));
    o.put(Signal::SteeringReturnFlow, u.returned);
    o.put(Signal::BypassArea, u.bypass_area);
    o.put(Signal::MeterArea, u.supply_area);
}
