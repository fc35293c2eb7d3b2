//! Properties that hold for any numbers: orifices, openings, aerated oil, reliefs, lines.

use helmsplit_model::{
    Bristle, Edge, EndStop, LandShape, Line, MeteringLand, Oil, Orifice, Pump, Relief, Ripple,
    WaltherLine,
};
use proptest::prelude::*;

/// Any oil that a circuit may hold.
fn oils() -> impl Strategy<Value = Oil> {
    (
        700.0..1100.0,
        -6.0..-2.0,
        -5.0..-0.7,
        1.0..1.4,
        0.8e9..2.5e9,
    )
        .prop_map(
            |(density, log_nu, log_air, exponent, modulus): (f64, f64, f64, f64, f64)| Oil {
                density,
                kinematic_viscosity: 10f64.powf(log_nu),
                air: 10f64.powf(log_air),
                polytropic_exponent: exponent,
                liquid_bulk_modulus: modulus,
            },
        )
}

/// Any orifice from a pinhole to a port.
fn orifices() -> impl Strategy<Value = Orifice> {
    (0.05e-3..30e-3, 0.4..0.95, 1.0..500.0).prop_map(|(diameter, discharge, transition)| {
        Orifice::round(diameter, discharge, transition)
    })
}

fn shapes() -> impl Strategy<Value = LandShape> {
    prop_oneof![
        (0.05..1.2, 0.5e-3..5e-3).prop_map(|(angle, length)| LandShape::Chamfer { angle, length }),
        Just(LandShape::Sharp),
        (1.0..12.0, 1e-3..8e-3).prop_map(|(count, diameter): (f64, f64)| LandShape::RoundHoles {
            count: count.floor(),
            diameter
        }),
        (1.0..12.0, 0.3..2.0, 0.5e-3..5e-3).prop_map(|(count, angle, length): (f64, f64, f64)| {
            LandShape::Notches {
                count: count.floor(),
                angle,
                length,
            }
        }),
    ]
}

/// A pressure difference of either sign over twelve decades, Pa.
fn differences() -> impl Strategy<Value = f64> {
    (-4.0..8.0, any::<bool>()).prop_map(|(log, back): (f64, bool)| {
        let size = 10f64.powf(log);
        if back { -size } else { size }
    })
}

proptest! {
    #[test]
    fn orifice_flow_is_odd(orifice in orifices(), oil in oils(), dp in differences()) {
        let (to, fro) = (orifice.flow(&oil, dp), orifice.flow(&oil, -dp));
        prop_assert!((to + fro).abs() <= 1e-15 * to.abs(), "{to} and {fro}");
        prop_assert!(to * dp > 0.0, "oil runs down the pressure");
    }

    #[test]
    fn orifice_flow_grows_with_pressure(
        orifice in orifices(), oil in oils(), dp in differences(), more in 1e-3..1e7f64,
    ) {
        let (less, greater) = (orifice.flow(&oil, dp), orifice.flow(&oil, dp + more));
        prop_assert!(greater >= less, "{less} at {dp}, {greater} at {more} more");
    }

    #[test]
    fn orifice_flow_stays_below_its_turbulent_limit(
        orifice in orifices(), oil in oils(), dp in 1e-4..1e8f64,
    ) {
        let turbulent = orifice.discharge * orifice.area * (2.0 * dp / oil.density).sqrt();
        prop_assert!(orifice.flow(&oil, dp) <= turbulent * (1.0 + 1e-12), "above its limit");
    }

    #[test]
    fn check_valve_never_lets_oil_back(
        oil in oils(), area in 0.0..1e-3f64, opening in 1.0..1e6f64, dp in -1e8..1e8f64,
    ) {
        let edge = Edge { discharge: 0.62, transition_reynolds: 10.0 };
        let flow = edge.flow_checked(&oil, area, opening, dp);
        if dp <= 0.0 {
            prop_assert!(flow.abs() < f64::MIN_POSITIVE, "{flow} backwards");
        } else {
            prop_assert!(flow >= 0.0, "{flow} forwards");
        }
    }

    #[test]
    fn opening_is_never_negative_and_never_shrinks(
        shape in shapes(), x in -5e-3..12e-3f64, further in 0.0..5e-3f64, port in 10e-6..1e-3f64,
    ) {
        let land = MeteringLand { shape, diameter: 20e-3, overlap: 1.5e-3, port_area: port };
        let (near, far) = (land.opening(x), land.opening(x + further));
        prop_assert!(near.area >= 0.0, "area {}", near.area);
        prop_assert!(near.gap >= 0.0, "gap {}", near.gap);
        prop_assert!(near.slope >= 0.0, "slope {}", near.slope);
        prop_assert!(far.area >= near.area * (1.0 - 1e-12), "shrinks");
        prop_assert!(far.area <= port * (1.0 + 1e-12), "larger than its port");
    }

    /// The law ends where the liquid would be pressed to nothing, at `p = B_l`.
    #[test]
    fn bulk_modulus_is_positive_and_below_the_liquids_swell(
        oil in oils(), p in -1e6..0.5e9f64,
    ) {
        let modulus = oil.bulk_modulus(p);
        prop_assert!(modulus > 0.0 && modulus.is_finite(), "{modulus} at {p}");
        // Air swells what is compressed, so the mixture may be stiffer by its share at most.
        let swell = 1.0 + oil.air * 700.0;
        prop_assert!(modulus <= oil.liquid_bulk_modulus * swell, "{modulus} at {p}");
    }

    #[test]
    fn relative_volume_falls_with_pressure(
        oil in oils(), p in -101_000.0..6e7f64, more in 1.0..1e7f64,
    ) {
        let (before, after) = (oil.relative_volume(p), oil.relative_volume(p + more));
        prop_assert!(after < before, "{before} at {p}, {after} at {more} more");
        prop_assert!((oil.relative_volume(0.0) - 1.0).abs() < 1e-12, "1 at 0 gauge");
    }

    /// Tangent modulus and volume are one law: `dS/dp = -S/B` wherever the air is not yet spread
    /// thin by the vacuum.
    #[test]
    fn modulus_is_the_slope_of_the_volume(oil in oils(), p in 0.0..4e7f64) {
        let h = 1e-4 * (p + 1e5);
        let slope = (oil.relative_volume(p + h) - oil.relative_volume(p - h)) / (2.0 * h);
        let modulus = -oil.relative_volume(p) / slope;
        let exact = oil.bulk_modulus(p);
        prop_assert!((modulus / exact - 1.0).abs() < 1e-5, "{modulus} against {exact}");
    }

    #[test]
    fn viscosity_falls_with_temperature(
        at_40 in 10.0..700.0f64, share in 0.05..0.5f64, t in 250.0..400.0f64, more in 0.1..50.0f64,
    ) {
        // Below 2 mm2/s the line leaves its range.
        prop_assume!(share * at_40 > 2.0);
        let line = WaltherLine::through((at_40 * 1e-6, 313.15), (share * at_40 * 1e-6, 373.15));
        prop_assert!(line.viscosity(t + more) < line.viscosity(t), "rises at {t} K");
    }

    #[test]
    fn line_loses_pressure_against_the_flow(
        oil in oils(), length in 0.1..30.0f64, bore in 4e-3..60e-3f64, k in 0.0..20.0f64,
        q in 1e-7..5e-3f64, more in 1e-9..1e-3f64,
    ) {
        let line = Line { length, bore, fitting_loss: k, segments: 3 };
        let (less, greater) = (line.segment_drop(&oil, q), line.segment_drop(&oil, q + more));
        prop_assert!(less > 0.0, "{less}");
        prop_assert!(greater > less, "{less}, then {greater}");
        let back = line.segment_drop(&oil, -q);
        prop_assert!((back + less).abs() <= 1e-12 * less, "not odd: {less} and {back}");
    }

    #[test]
    fn relief_settles_between_shut_and_its_line(
        oil in oils(), over in -50e5..50e5f64, y in 0.0..2.0f64,
    ) {
        let edge = Edge { discharge: 0.62, transition_reynolds: 60.0 };
        let (cracking, full) = (140e5, 150e5);
        let relief = Relief {
            cracking,
            full_flow_pressure: full,
            full_area: Relief::full_area(18.0 / 6e4, full, &edge, oil.density),
            time_constant: 3e-3,
            opening_width: 0.2e5,
            least_opening: 0.0,
            edge,
        };
        let dp = cracking + over;
        // The opening moves towards the straight line from cracking to full flow.
        let line = (over / (full - cracking)).max(0.0);
        let settled = y + relief.rate(y, dp) * relief.time_constant;
        prop_assert!((settled - line).abs() <= 0.011, "wants {settled}, line {line}");
        prop_assert!(relief.flow(&oil, y, dp) >= 0.0, "flows back");
    }

    #[test]
    fn end_stop_never_pulls_and_never_gives_power(
        s in -1e-3..2e-3f64, v in -10.0..10.0f64, a in 0.0..3.0f64,
    ) {
        let stop = EndStop { stiffness: 2e7, loss: a };
        prop_assert!(stop.force(s, v) >= 0.0, "pulls");
        let loss = stop.loss(s, v);
        prop_assert!(loss >= -1e-12 * stop.stiffness * s.abs() * v.abs(), "gives {loss} W");
    }

    /// A bristle deflection within its bound stays within it: the dry part of the force is at most
    /// the breakaway force.
    #[test]
    fn bristles_never_hold_more_than_breakaway(v in -1.0..1.0f64, share in -1.0..1.0f64) {
        let law = Bristle {
            coulomb: 12.0, breakaway: 15.6, stribeck_velocity: 5e-3, stiffness: 2e6,
            damping: 40.0, viscous: 3.0,
        };
        let bound = law.breakaway / law.stiffness;
        let (_, rate) = law.force(v, bound);
        // The rounding of |v| over 1 um/s lets the deflection creep on by that much at most.
        prop_assert!(rate <= 1.1e-6, "grows beyond at {rate} m/s");
        let (_, rate) = law.force(v, -bound);
        prop_assert!(rate >= -1.1e-6, "grows beyond at {rate} m/s");
        let (_, rate) = law.force(v, share * bound);
        prop_assert!(rate * v >= -v.abs() * v.abs(), "runs against the motion");
    }

    #[test]
    fn ripple_averages_to_one(teeth in 5u32..25, pistons in 3u32..12, r in 0.0..0.5f64) {
        let gear = Ripple::Gear { teeth: f64::from(teeth), peak_to_peak: r };
        let piston = Ripple::Piston { pistons, factor: 1.0 };
        for ripple in [gear, piston] {
            let n = 4000;
            let mean = (0..n)
                .map(|i| {
                    let turn = (f64::from(i) + 0.5) / f64::from(n);
                    ripple.factor(turn * std::f64::consts::TAU / ripple.per_revolution())
                })
                .sum::<f64>() / f64::from(n);
            prop_assert!((mean - 1.0).abs() < 1e-6, "{ripple:?}: {mean}");
        }
    }

    /// What the pump delivers and what slips add up to what it sweeps, and it loses power only.
    #[test]
    fn pump_gives_no_more_than_its_shaft(
        oil in oils(), p in 0.0..250e5f64, w in 10.0..300.0f64, eta in 0.7..0.99f64,
    ) {
        let slip = Pump::wilson_slip(eta, oil.dynamic_viscosity(), 157.0, 150e5);
        let pump = Pump {
            displacement_rad: 20e-6 / std::f64::consts::TAU,
            slip,
            hydromechanical_efficiency: 0.9,
            aeration_loss: 0.0,
            ripple: Ripple::None,
        };
        let flows = pump.flows(&oil, w, p, 0.0, 1.0, 1.0);
        let swept = pump.displacement_rad * w;
        prop_assert!((flows.delivered + flows.slip - swept).abs() < 1e-12 * swept, "adds up");
        prop_assert!(flows.delivered * p <= pump.torque(p, 0.0) * w, "gives more than it takes");
    }
}
