//! Hydrostatic steering unit, open centre, non-reaction (M7.5).

use std::f64::consts::TAU;

use crate::oil::Oil;
use crate::orifice::Edge;
use crate::real::Real;
use crate::smooth::smooth_step;

/// A steering unit: valve edges that open with the deflection between wheel and meter, and a
/// meter that turns with the oil.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct SteeringUnit {
    /// Displacement of the meter, m3/rev.
    pub displacement: f64,
    /// Area of the neutral bypass at no deflection, m2.
    pub bypass_area: f64,
    /// What stays of the neutral bypass when shut, m2.
    pub bypass_leak: f64,
    /// Deflection at which the neutral bypass is shut, rad.
    pub bypass_shut: f64,
    /// Full area from supply to cylinder, m2.
    pub supply_area: f64,
    /// Full area from cylinder to return, m2.
    pub return_area: f64,
    /// Deflection at which the edges begin to open, rad, below `bypass_shut`.
    pub dead_band: f64,
    /// Deflection at which the edges are fully open, rad.
    pub full_deflection: f64,
    /// Deflection that the wheel cannot exceed, rad.
    pub stop_deflection: f64,
    /// Width over which the wheel meets that limit, rad.
    pub stop_band: f64,
    /// Time constant of the centring springs, s.
    pub centring_time: f64,
    /// Wheel rate above which the springs do not show, rad/s.
    pub centring_rate: f64,
    /// Pressure over which its check valves open, Pa.
    pub check_pressure: f64,
    /// Leakage from supply to return at the present viscosity, m3/(s Pa).
    pub supply_leak: f64,
    /// Leakage from each cylinder port to return at the present viscosity, m3/(s Pa).
    pub port_leak: f64,
    /// Edge of the neutral bypass.
    pub bypass_edge: Edge,
    /// Edges to and from the cylinder.
    pub port_edge: Edge,
}

/// What a steering unit does at one moment: flows in m3/s, rates in rad/s, areas in m2.
#[derive(Debug, Clone, Copy)]
pub struct SteeringFlows<S> {
    /// Supply to return through the neutral bypass.
    pub bypass: S,
    /// Supply to cylinder through the meter, at least 0.
    pub metered: S,
    /// Cylinder to return.
    pub returned: S,
    /// Whether chamber A is the one supplied.
    pub to_a: bool,
    /// Rate that the wheel reaches.
    pub wheel_reached: S,
    /// Rate of the deflection.
    pub deflection_rate: S,
    /// Opening of the neutral bypass.
    pub bypass_area: S,
    /// Opening to the cylinder.
    pub supply_area: S,
}

impl SteeringUnit {
    /// Flows and rates at a deflection (rad), a commanded wheel rate (rad/s) and the pressures of
    /// supply, both chambers and return (Pa).
    #[inline(always)]
    pub fn flows<S: Real>(
        &self,
        oil: &Oil,
        deflection: S,
        wheel_rate: f64,
        supply: S,
        chambers: (S, S),
        ret: S,
    ) -> SteeringFlows<S> {
        let size = deflection.abs();
        let bypass_area = size.univariate(|d| {
            (-smooth_step(d * (1.0 / self.bypass_shut)) + 1.0) * self.bypass_area + self.bypass_leak
        });
        let bypass = self.bypass_edge.flow_round(oil, bypass_area, supply - ret);
        let open = size.univariate(|d| {
            smooth_step((d - self.dead_band) * (1.0 / (self.full_deflection - self.dead_band)))
        });
        let to_a = deflection.value() >= 0.0;
        let fed = S::choose(to_a, chambers.0, chambers.1);
        let emptied = S::choose(to_a, chambers.1, chambers.0);
        let supply_area = open * self.supply_area;
        let metered =
            self.port_edge
                .flow_checked(oil, supply_area, self.check_pressure, supply - fed);
        let returned = self
            .port_edge
            .flow_round(oil, open * self.return_area, emptied - ret);
        let wheel_reached = self.wheel_reached(deflection, wheel_rate);
        let meter_rate = metered * (TAU / self.displacement);
        let meter_rate = if to_a { meter_rate } else { -meter_rate };
        let at_rest = 1.0 - smooth_step(wheel_rate.abs() / self.centring_rate);
        let deflection_rate =
            wheel_reached - meter_rate - deflection * (at_rest / self.centring_time);
        SteeringFlows {
            bypass,
            metered,
            returned,
            to_a,
            wheel_reached,
            deflection_rate,
            bypass_area,
            supply_area,
        }
    }

    /// Rate that the wheel reaches: it cannot outrun the oil once the deflection is at its limit.
    #[inline(always)]
    fn wheel_reached<S: Real>(&self, deflection: S, wheel_rate: f64) -> S {
        let pushing = wheel_rate * deflection.value() > 0.0;
        if !pushing {
            return S::constant_here(wheel_rate, [deflection]);
        }
        deflection.univariate(|d| {
            let inside = d.abs() - (self.stop_deflection - self.stop_band);
            (-smooth_step(inside * (1.0 / self.stop_band)) + 1.0) * wheel_rate
        })
    }

    /// Flow that a wheel rate (rad/s) asks for, m3/s.
    #[must_use]
    pub fn demand(&self, wheel_rate: f64) -> f64 {
        wheel_rate.abs() * self.displacement / TAU
    }
}
