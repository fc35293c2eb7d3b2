//! Where things stand on the sheet, px. Steering above, valve in the middle, pump at the lower
//! left, consumer at the right, return along the foot: so no line needs to cross another between
//! the parts, whatever sits in the slots.

/// The return line along the foot.
pub(super) const RETURN_Y: f64 = 690.0;

/// The return line of the steering side, down the left edge.
pub(super) const RISER_X: f64 = 30.0;

/// What lies at its top turns the corner this far ahead of it, so that the corner joins.
pub(super) const RISER_STUB: f64 = 12.0;

/// Prime mover and pump.
pub(super) const PRIME_MOVER: (f64, f64) = (86.0, 562.0);
pub(super) const PUMP: (f64, f64) = (166.0, 562.0);
pub(super) const SUCTION_TANK_Y: f64 = 656.0;

/// The line from the pump to the valve.
pub(super) const INLET_Y: f64 = 500.0;
pub(super) const MAIN_RELIEF: (f64, f64) = (330.0, 580.0);

/// Frame of the priority valve: left, top, right, foot.
pub(super) const VALVE: (f64, f64, f64, f64) = (340.0, 364.0, 524.0, 516.0);

/// The priority port.
pub(super) const PRIORITY_X: f64 = 396.0;
/// Height at which the port's relief branches off.
pub(super) const PRIORITY_RELIEF_Y: f64 = 336.0;
/// The pilot relief's line.
pub(super) const PILOT_Y: f64 = 440.0;
/// Where the relief of the steering side stands.
pub(super) const PRIORITY_RELIEF_X: f64 = 220.0;

/// The excess port's line.
pub(super) const EXCESS_Y: f64 = 384.0;
pub(super) const EXCESS_RELIEF: (f64, f64) = (572.0, 470.0);
/// The consumer, and where a lift's directional valve stands.
pub(super) const CONSUMER_X: f64 = 730.0;
pub(super) const LIFT_X: f64 = 776.0;

/// Where the return line turns into filter, cooler and tank.
pub(super) const RETURN_END_X: f64 = 812.0;
