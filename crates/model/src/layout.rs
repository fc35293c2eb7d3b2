//! Which state stands where in the solver's vector. A circuit without a part has no state for it.

use crate::friction::Friction;
use crate::parts::{
    ExcessSide, Parts, PrimeMover, PriorityRelief, ReturnSide, SteeringSide, Suction,
};
use crate::quantity::Quantity;
use crate::state::StateInfo;

/// Marks a state that the circuit does not have; reading it would be a fault in the equations and
/// fails the bounds check.
pub(crate) const ABSENT: usize = usize::MAX;

/// Position of each state.
#[derive(Debug, Clone, PartialEq)]
#[allow(
    missing_docs,
    reason = "named as in docs/model.md; labels are in `states`"
)]
pub(crate) struct Layout {
    pub(crate) x: usize,
    pub(crate) v: usize,
    pub(crate) bristle: usize,
    pub(crate) p_h: usize,
    pub(crate) p_s: usize,
    pub(crate) p_b: usize,
    pub(crate) p_in: usize,
    pub(crate) y_main: usize,
    pub(crate) y_pri: usize,
    pub(crate) p_c: usize,
    /// Flow of the first segment; flows and inner pressures alternate from here.
    pub(crate) q_line: usize,
    pub(crate) p_su: usize,
    pub(crate) d: usize,
    pub(crate) p_a: usize,
    pub(crate) p_bc: usize,
    pub(crate) y_c: usize,
    pub(crate) v_c: usize,
    pub(crate) scrub: usize,
    pub(crate) p_pm: usize,
    pub(crate) w_pm: usize,
    pub(crate) p_e: usize,
    pub(crate) p_m: usize,
    pub(crate) w_m: usize,
    pub(crate) p_cap: usize,
    pub(crate) p_rod: usize,
    pub(crate) y_l: usize,
    pub(crate) v_l: usize,
    pub(crate) y_exr: usize,
    pub(crate) p_ret: usize,
    pub(crate) p_suc: usize,
    pub(crate) q_suc: usize,
    pub(crate) w_eng: usize,
    pub(crate) angle: usize,
    pub(crate) states: Vec<StateInfo>,
    pub(crate) drifting: Vec<usize>,
}

/// Collects states in order.
struct Builder {
    states: Vec<StateInfo>,
}

impl Builder {
    fn add(&mut self, name: &str, label: &str, quantity: Quantity, scale: f64) -> usize {
        self.states.push(StateInfo {
            name: name.to_owned(),
            label: label.to_owned(),
            quantity,
            scale,
        });
        self.states.len() - 1
    }

    fn add_if(
        &mut self,
        wanted: bool,
        name: &str,
        label: &str,
        quantity: Quantity,
        scale: f64,
    ) -> usize {
        if wanted {
            self.add(name, label, quantity, scale)
        } else {
            ABSENT
        }
    }

    fn pressure(&mut self, wanted: bool, name: &str, label: &str) -> usize {
        self.add_if(wanted, name, label, Quantity::Pressure, PRESSURE_SCALE)
    }

    fn opening(&mut self, wanted: bool, name: &str, label: &str) -> usize {
        self.add_if(wanted, name, label, Quantity::Ratio, OPENING_SCALE)
    }
}

/// Typical sizes, SI: absolute tolerances follow them.
const PRESSURE_SCALE: f64 = 1e6;
const TRAVEL_SCALE: f64 = 1e-3;
const VELOCITY_SCALE: f64 = 0.1;
const OPENING_SCALE: f64 = 0.1;
const FLOW_SCALE: f64 = 1e-4;
const ANGLE_SCALE: f64 = 0.1;
const CYLINDER_SCALE: f64 = 0.1;
const SPEED_SCALE: f64 = 100.0;
const BRISTLE_SCALE: f64 = 1e-5;

impl Layout {
    #[allow(clippy::too_many_lines, reason = "one table of all states")]
    pub(crate) fn new(parts: &Parts) -> Self {
        let mut b = Builder { states: Vec::new() };
        let gear = match &parts.steering {
            SteeringSide::Unit(gear) => Some(gear),
            _ => None,
        };
        let unit = gear.is_some();
        let pri_motor = matches!(parts.steering, SteeringSide::Motor(_));
        let motor = matches!(parts.excess, ExcessSide::Motor(_));
        let lift = matches!(parts.excess, ExcessSide::Lift(_));
        let suction = matches!(parts.suction, Suction::Line { .. });
        let has_bristle = |f: &Friction| f.has_state();
        let scrub = gear.is_some_and(|g| has_bristle(&g.scrub));
        let governed = matches!(parts.prime_mover, PrimeMover::Governed(_));
        let restricted = matches!(parts.return_side, ReturnSide::Restricted { .. });

        use Quantity::{Angle, AngularVelocity, Flow, Length, Velocity};
        let x = b.add("x", "Spool travel", Length, TRAVEL_SCALE);
        let v = b.add("v", "Spool velocity", Velocity, VELOCITY_SCALE);
        let bristle = b.add_if(
            has_bristle(&parts.valve.friction),
            "z",
            "Bristle deflection, spool",
            Length,
            BRISTLE_SCALE,
        );
        let p_h = b.pressure(true, "p_h", "Head-end pressure");
        let p_s = b.pressure(true, "p_s", "Spring-end pressure");
        let p_b = b.pressure(true, "p_b", "Bore pressure");
        let p_in = b.pressure(true, "p_in", "Inlet pressure");
        let y_main = b.opening(parts.main_relief.is_some(), "y_main", "Main relief opening");
        let has_priority_relief = !matches!(parts.priority_relief, PriorityRelief::None);
        let y_pri = b.opening(has_priority_relief, "y_pri", "Priority relief opening");
        let p_c = b.pressure(true, "p_c", "Priority port pressure");
        let q_line = b.add("q_l", "Priority line flow, first segment", Flow, FLOW_SCALE);
        for segment in 1..parts.line.line.segments {
            b.pressure(
                true,
                &format!("p_l{segment}"),
                &format!("Priority line pressure behind segment {segment}"),
            );
            let next = segment + 1;
            b.add(
                &format!("q_l{next}"),
                &format!("Priority line flow, segment {next}"),
                Flow,
                FLOW_SCALE,
            );
        }
        let p_su = b.pressure(true, "p_su", "Steering supply pressure");
        let d = b.add_if(unit, "d", "Steering unit deflection", Angle, ANGLE_SCALE);
        let p_a = b.pressure(unit, "p_A", "Steering cylinder pressure A");
        let p_bc = b.pressure(unit, "p_B", "Steering cylinder pressure B");
        let y_c = b.add_if(
            unit,
            "y_c",
            "Steering cylinder travel",
            Length,
            CYLINDER_SCALE,
        );
        let v_c = b.add_if(
            unit,
            "v_c",
            "Steering cylinder velocity",
            Velocity,
            VELOCITY_SCALE,
        );
        let scrub = b.add_if(
            scrub,
            "z_t",
            "Bristle deflection, tyre",
            Length,
            TRAVEL_SCALE,
        );
        let p_pm = b.pressure(pri_motor, "p_pm", "Priority motor pressure");
        let w_pm = b.add_if(
            pri_motor,
            "w_pm",
            "Priority motor speed",
            AngularVelocity,
            SPEED_SCALE,
        );
        let p_e = b.pressure(true, "p_e", "Excess port pressure");
        let p_m = b.pressure(motor, "p_m", "Excess motor pressure");
        let w_m = b.add_if(
            motor,
            "w_m",
            "Excess motor speed",
            AngularVelocity,
            SPEED_SCALE,
        );
        let p_cap = b.pressure(lift, "p_cap", "Lift cylinder pressure, cap end");
        let p_rod = b.pressure(lift, "p_rod", "Lift cylinder pressure, rod end");
        let y_l = b.add_if(lift, "y_l", "Lift cylinder travel", Length, CYLINDER_SCALE);
        let v_l = b.add_if(
            lift,
            "v_l",
            "Lift cylinder velocity",
            Velocity,
            VELOCITY_SCALE,
        );
        let y_exr = b.opening(
            parts.excess_relief.is_some(),
            "y_exr",
            "Excess relief opening",
        );
        let p_ret = b.pressure(restricted, "p_ret", "Return pressure");
        let p_suc = b.pressure(suction, "p_suc", "Pump inlet pressure");
        let q_suc = b.add_if(suction, "q_suc", "Suction line flow", Flow, FLOW_SCALE);
        let w_eng = b.add_if(
            governed,
            "w_eng",
            "Engine speed",
            AngularVelocity,
            SPEED_SCALE,
        );
        let ripple = parts.pump.ripple.needs_angle();
        let angle = b.add_if(ripple, "angle", "Pump shaft angle", Angle, ANGLE_SCALE);
        let drifting = [y_c, y_l, angle]
            .into_iter()
            .filter(|&i| i != ABSENT)
            .collect();
        Self {
            x,
            v,
            bristle,
            p_h,
            p_s,
            p_b,
            p_in,
            y_main,
            y_pri,
            p_c,
            q_line,
            p_su,
            d,
            p_a,
            p_bc,
            y_c,
            v_c,
            scrub,
            p_pm,
            w_pm,
            p_e,
            p_m,
            w_m,
            p_cap,
            p_rod,
            y_l,
            v_l,
            y_exr,
            p_ret,
            p_suc,
            q_suc,
            w_eng,
            angle,
            states: b.states,
            drifting,
        }
    }
}
