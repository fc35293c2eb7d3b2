//! The excess side of the right-hand side (M8).

use crate::circuit::Circuit;
use crate::evaluate::Sums;
use crate::motor::{HydraulicMotor, MotorFlows};
use crate::parts::{ExcessSide, LiftGear};
use crate::profile::{Input, Inputs};
use crate::real::Real;
use crate::signal::{Observer, Signal};

impl Circuit {
    /// Excess port, its relief and its consumer; `inflow` is what comes over the land.
    #[inline(always)]
    #[allow(
        clippy::too_many_arguments,
        reason = "states, rates and sums of one evaluation"
    )]
    pub(crate) fn evaluate_excess<S: Real, O: Observer<S>>(
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
        let p_e = y[ix.p_e];
        let command = inputs.get(Input::ExcessCommand);
        let mut relieved = S::constant(0.0);
        if let Some(relief) = &self.parts.excess_relief {
            relieved = self.relieve(relief, ix.y_exr, p_e - ret, y, dy, o, sums);
            o.put(Signal::ExcessReliefFlow, relieved);
            o.put(Signal::ExcessReliefOpening, y[ix.y_exr]);
        }
        let out = match &self.parts.excess {
            ExcessSide::Blocked => S::constant(0.0),
            ExcessSide::Tank { area, edge } => {
                let flow = edge.flow_given(oil, area * command.max(0.0), p_e - ret);
                sums.to_return += flow;
                o.add(Signal::ConsumerLoss, flow * (p_e - ret));
                flow
            }
            ExcessSide::Bench { area, throttle } => {
                let behind = inputs.get(Input::ExcessPressure);
                let dp = p_e - behind;
                let flow = throttle.edge.flow_checked(
                    oil,
                    S::constant(area * command.max(0.0)),
                    throttle.check_pressure,
                    dp,
                );
                o.put(Signal::ExcessBenchPressure, S::constant(behind));
                o.add(Signal::ConsumerLoss, flow * dp);
                o.add(Signal::WorkOut, flow * behind);
                o.add(Signal::VolumeOut, flow);
                flow
            }
            ExcessSide::Motor(motor) => {
                self.evaluate_excess_motor(command, y, dy, o, motor, ret, sums)
            }
            ExcessSide::Lift(gear) => self.evaluate_lift(command, y, dy, o, gear, ret, sums),
        };
        if !matches!(self.parts.excess, ExcessSide::Blocked) {
            o.put(Signal::ExcessCommand, S::constant(command));
        }
        o.put(Signal::ExcessOutFlow, out);
        dy[ix.p_e] = self
            .parts
            .valve
            .excess_port
            .pressure_rate(oil, p_e, inflow - out - relieved);
    }

    #[inline(always)]
    #[allow(
        clippy::too_many_arguments,
        reason = "states, rates and sums of one evaluation"
    )]
    fn evaluate_excess_motor<S: Real, O: Observer<S>>(
        &self,
        command: f64,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        motor: &HydraulicMotor,
        ret: S,
        sums: &mut Sums<S>,
    ) -> S {
        let ix = &self.layout;
        let m: MotorFlows<S> = motor.flows(
            &self.parts.oil,
            command,
            y[ix.p_e],
            y[ix.p_m],
            ret,
            y[ix.w_m],
        );
        dy[ix.p_m] = m.pressure_rate;
        dy[ix.w_m] = m.acceleration;
        sums.to_return += m.through - m.check;
        o.put(Signal::MotorFlow, m.through);
        o.put(Signal::AntiCavitationFlow, m.check);
        o.put(Signal::MotorTorque, m.torque);
        o.put(Signal::MotorLoadTorque, m.load);
        o.add(Signal::ConsumerLoss, m.lost);
        o.add(Signal::WorkOut, m.work);
        m.valve
    }

    /// Lift cylinder behind its directional valve (M8.4); gives the flow taken, m3/s.
    #[inline(always)]
    #[allow(
        clippy::too_many_arguments,
        reason = "states, rates and sums of one evaluation"
    )]
    fn evaluate_lift<S: Real, O: Observer<S>>(
        &self,
        command: f64,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        gear: &LiftGear,
        ret: S,
        sums: &mut Sums<S>,
    ) -> S {
        let ix = &self.layout;
        let oil = &self.parts.oil;
        let u = command.clamp(-1.0, 1.0);
        let p_e = y[ix.p_e];
        let (p_cap, p_rod) = (y[ix.p_cap], y[ix.p_rod]);
        let open = gear.valve_area * u.abs();
        let neutral = gear
            .edge
            .flow_given(oil, gear.neutral_area * (1.0 - u.abs()), p_e - ret);
        let lifting = u >= 0.0;
        let fed = S::choose(lifting, p_cap, p_rod);
        let emptied = S::choose(lifting, p_rod, p_cap);
        let supplied =
            gear.edge
                .flow_checked(oil, S::constant(open), gear.check_pressure, p_e - fed);
        let returned = gear.edge.flow_given(oil, open, emptied - ret);
        let check = |p: S| {
            gear.edge.flow_checked(
                oil,
                S::constant(gear.check_area),
                gear.check_pressure,
                ret - p,
            )
        };
        let (suction_cap, suction_rod) = (check(p_cap), check(p_rod));
        let in_cap = S::choose(lifting, supplied, -returned);
        let in_rod = S::choose(lifting, -returned, supplied);
        self.evaluate_lift_cylinder(y, dy, o, gear, in_cap + suction_cap, in_rod + suction_rod);
        sums.to_return += neutral + returned - suction_cap - suction_rod;
        o.add(
            Signal::ConsumerLoss,
            neutral * (p_e - ret)
                + supplied * (p_e - fed)
                + returned * (emptied - ret)
                + suction_cap * (ret - p_cap)
                + suction_rod * (ret - p_rod),
        );
        neutral + supplied
    }

    /// Cylinder of the lift, from the net inflows of its chambers.
    #[inline(always)]
    fn evaluate_lift_cylinder<S: Real, O: Observer<S>>(
        &self,
        y: &[S],
        dy: &mut [S],
        o: &mut O,
        gear: &LiftGear,
        in_cap: S,
        in_rod: S,
    ) {
        let ix = &self.layout;
        let cylinder = &gear.cylinder;
        let (p_cap, p_rod) = (y[ix.p_cap], y[ix.p_rod]);
        let (travel, velocity) = (y[ix.y_l], y[ix.v_l]);
        let (rate_cap, rate_rod, leak) = cylinder.pressure_rates(
            &self.parts.oil,
            (p_cap, p_rod),
            (in_cap, in_rod),
            travel,
            velocity,
        );
        dy[ix.p_cap] = rate_cap;
        dy[ix.p_rod] = rate_rod;
        let oil_force = cylinder.oil_force(p_cap, p_rod);
        let dry =
            velocity.univariate(|v| (v * (1.0 / gear.dry_velocity)).tanh() * gear.dry_friction);
        let drag = velocity * cylinder.damping;
        let stops = cylinder.stop_force(travel, velocity);
        dy[ix.y_l] = velocity;
        dy[ix.v_l] = (oil_force - gear.load - dry - drag + stops) * (1.0 / cylinder.mass);
        o.put(Signal::LiftFlow, in_cap);
        o.put(Signal::LiftForce, oil_force);
        o.add(Signal::ConsumerLoss, leak * (p_cap - p_rod));
        o.add(
            Signal::FrictionLoss,
            (dry + drag) * velocity + cylinder.stop_loss(travel, velocity),
        );
        o.add(Signal::WorkOut, velocity * gear.load);
    }
}
