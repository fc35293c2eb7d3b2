//! Every parameter of the reference traces can be set in a circuit file, and the orchard carrier
//! that comes with the program has exactly theirs.
//!
//! The reference traces were computed by an independent implementation in another language; each
//! comes with its parameters in SI, as JSON.

use std::f64::consts::{PI, TAU};
use std::path::PathBuf;

use helmsplit_model::{ExcessSide, Input, Parts, PriorityRelief, ReturnSide, SteeringSide};
use helmsplit_scenario::{PRESETS, Scenario};
use serde_json::Value;

/// Symbol of the reference, path in the circuit file, SI unit.
const PATHS: &[(&str, &str, &str)] = &[
    ("nu40", "oil.viscosity_at_40c", "m2/s"),
    ("nu100", "oil.viscosity_at_100c", "m2/s"),
    ("rho15", "oil.density_at_15c", "kg/m3"),
    ("T_C", "oil.temperature", "degC"),
    ("phi", "oil.entrained_air", ""),
    ("n_poly", "oil.polytropic_exponent", ""),
    ("B_l", "oil.liquid_bulk_modulus", "Pa"),
    ("D", "pump.displacement", "m3/rev"),
    ("eta_v", "pump.volumetric_efficiency", ""),
    ("p_ref", "pump.reference_pressure", "Pa"),
    ("n_ref", "pump.reference_speed", "rpm"),
    ("nu_ref", "pump.reference_viscosity", "m2/s"),
    ("rho_ref", "pump.reference_density", "kg/m3"),
    ("wear", "pump.wear", ""),
    ("eta_hm", "pump.hydromechanical_efficiency", ""),
    ("rip", "pump.ripple_factor", ""),
    ("z_teeth", "pump.teeth", ""),
    ("aer_pump", "pump.aeration_loss", ""),
    ("d", "valve.spool_diameter", "m"),
    ("m", "valve.spool_mass", "kg"),
    ("F0", "valve.spring_preload", "N"),
    ("k", "valve.spring_rate", "N/m"),
    ("d_o", "valve.fixed_orifice_diameter", "m"),
    ("d_h", "valve.head_hole_diameter", "m"),
    ("L_h", "valve.head_hole_length", "m"),
    ("d_s", "valve.disc_hole_diameter", "m"),
    ("L_s", "valve.disc_hole_length", "m"),
    ("x_ov", "valve.overlap", "m"),
    ("x_max", "valve.stroke", "m"),
    ("alpha", "valve.chamfer_angle", "rad"),
    ("Lc", "valve.chamfer_length", "m"),
    ("A_port", "valve.port_area", "m2"),
    ("x_c1", "valve.holes_throttle_start", "m"),
    ("x_c2", "valve.holes_throttle_end", "m"),
    ("A_c0", "valve.holes_open_area", "m2"),
    ("A_c_leak", "valve.holes_leak_area", "m2"),
    ("c_r", "valve.clearance", "m"),
    ("L_land", "valve.land_length", "m"),
    ("L_end", "valve.end_land_length", "m"),
    ("c_extra", "valve.extra_damping", "N s/m"),
    ("F_coul", "valve.coulomb_friction", "N"),
    ("v_s", "valve.friction_velocity", "m/s"),
    ("L_d", "valve.damping_length", "m"),
    ("k_stop", "valve.stop_stiffness", "N/m"),
    ("a_stop", "valve.stop_loss", "s/m"),
    ("fflow", "valve.jet_force_factor", ""),
    ("V_in", "valve.inlet_volume", "m3"),
    ("B_w_in", "valve.inlet_wall_modulus", "Pa"),
    ("V_b", "valve.bore_volume", "m3"),
    ("V_h0", "valve.head_volume", "m3"),
    ("V_s0", "valve.spring_volume", "m3"),
    ("V_c", "valve.priority_volume", "m3"),
    ("pm_cr", "main_relief.cracking_pressure", "Pa"),
    ("pm_full", "main_relief.full_flow_pressure", "Pa"),
    ("Qm_full", "main_relief.full_flow", "m3/s"),
    ("tau_m", "main_relief.time_constant", "s"),
    ("w_rel", "main_relief.opening_width", "Pa"),
    ("pp_cr", "priority_relief.cracking_pressure", "Pa"),
    ("pp_full", "priority_relief.full_flow_pressure", "Pa"),
    ("Qp_full", "priority_relief.full_flow", "m3/s"),
    ("tau_p", "priority_relief.time_constant", "s"),
    ("w_rel", "priority_relief.opening_width", "Pa"),
    ("pe_cr", "excess_relief.cracking_pressure", "Pa"),
    ("pe_full", "excess_relief.full_flow_pressure", "Pa"),
    ("Qe_full", "excess_relief.full_flow", "m3/s"),
    ("tau_e", "excess_relief.time_constant", "s"),
    ("w_rel", "excess_relief.opening_width", "Pa"),
    ("l_line", "line.length", "m"),
    ("d_line", "line.bore", "m"),
    ("B_w_line", "line.wall_modulus", "Pa"),
    ("V_su0", "line.end_volume", "m3"),
    ("K_loc", "line.fitting_loss", ""),
    ("p_chk", "steering.check_opening_pressure", "Pa"),
    ("p_chk", "excess.check_opening_pressure", "Pa"),
    ("D_su", "steering.displacement", "m3/rev"),
    ("A_n0", "steering.bypass_area", "m2"),
    ("d_n", "steering.bypass_shut", "rad"),
    ("A_n_leak", "steering.bypass_leak_area", "m2"),
    ("A_1", "steering.supply_area", "m2"),
    ("A_4", "steering.return_area", "m2"),
    ("d_d", "steering.dead_band", "rad"),
    ("d_f", "steering.full_deflection", "rad"),
    ("d_stop", "steering.stop_deflection", "rad"),
    ("d_band", "steering.stop_band", "rad"),
    ("tau_cen", "steering.centring_time", "s"),
    ("w_cen", "steering.centring_rate", "rad/s"),
    ("A_suc", "steering.suction_check_area", "m2"),
    ("A_A", "steering.cylinder_area_a", "m2"),
    ("A_B", "steering.cylinder_area_b", "m2"),
    ("V_A0", "steering.cylinder_dead_volume_a", "m3"),
    ("V_B0", "steering.cylinder_dead_volume_b", "m3"),
    ("B_w_cyl", "steering.cylinder_wall_modulus", "Pa"),
    ("stroke", "steering.cylinder_stroke", "m"),
    ("M", "steering.load_mass", "kg"),
    ("k_t", "steering.tyre_rate", "N/m"),
    ("F_t", "steering.tyre_friction_force", "N"),
    ("v_t", "steering.tyre_friction_velocity", "m/s"),
    ("c_t", "steering.load_damping", "N s/m"),
    ("k_end", "steering.end_stiffness", "N/m"),
    ("a_end", "steering.end_loss", "s/m"),
    ("K_cyl", "steering.piston_leakage", "m3/(s Pa)"),
    ("A_bp", "excess.outlet_area", "m2"),
    ("A_on", "excess.motor_valve_area", "m2"),
    ("V_e", "excess.port_volume", "m3"),
    ("B_w_e", "excess.port_wall_modulus", "Pa"),
    ("V_m", "excess.motor_volume", "m3"),
    ("D_m", "excess.motor_displacement", "m3/rev"),
    ("Csm", "excess.motor_slip", ""),
    ("eta_m", "excess.motor_efficiency", ""),
    ("J", "excess.motor_inertia", "kg m2"),
    ("T0", "excess.motor_dry_torque", "N m"),
    ("w_s", "excess.motor_dry_speed", "rad/s"),
    ("T1", "excess.motor_viscous", "N m s"),
    ("A_acv", "excess.motor_check_area", "m2"),
    ("p_t", "return_line.pressure", "Pa"),
];

/// Symbols that reach the circuit by another way, handled in [`set_all`].
const OTHERS: &[&str] = &[
    "Cd", "Re_t", "cosj_e", "cosj_c", "T2", "main_on", "pri_mode", "exr_on", "st_mode", "ex_mode",
];

fn reference(name: &str) -> Value {
    let file = PathBuf::from(env!("CARGO_MANIFEST_DIR"))
        .join("../../tests/reference")
        .join(format!("{name}.json"));
    let text = std::fs::read_to_string(&file).unwrap_or_else(|e| panic!("{}: {e}", file.display()));
    serde_json::from_str(&text).expect("JSON")
}

fn number(parameters: &Value, symbol: &str) -> f64 {
    parameters[symbol]
        .as_f64()
        .unwrap_or_else(|| panic!("no number for {symbol}"))
}

/// A scenario with every parameter of a reference.
fn set_all(parameters: &Value) -> Scenario {
    let mut scenario = Scenario::default();
    let mut set = |path: &str, text: String| {
        scenario
            .set(path, &text)
            .unwrap_or_else(|finding| panic!("{finding}"));
    };
    for (symbol, path, unit) in PATHS {
        set(path, format!("{} {unit}", number(parameters, symbol)));
    }
    for path in helmsplit_scenario::paths() {
        if path.ends_with("discharge") {
            set(path, number(parameters, "Cd").to_string());
        } else if path.ends_with("transition") {
            set(path, number(parameters, "Re_t").to_string());
        }
    }
    for (symbol, path) in [
        ("cosj_e", "valve.excess_jet_angle"),
        ("cosj_c", "valve.priority_jet_angle"),
    ] {
        set(path, format!("{} rad", number(parameters, symbol).acos()));
    }
    // A drag of T2 is a torque of T2 at one radian per second.
    set(
        "excess.motor_fan_torque",
        format!("{} N m", number(parameters, "T2")),
    );
    set("excess.motor_fan_speed", "1 rad/s".to_owned());
    let option = |symbol: &str, keys: &[&str]| keys[number(parameters, symbol) as usize].to_owned();
    set("main_relief.kind", option("main_on", &["none", "direct"]));
    let priority = [
        "none",
        "on the priority port",
        "pilot on the spring chamber",
    ];
    set("priority_relief.kind", option("pri_mode", &priority));
    set("excess_relief.kind", option("exr_on", &["none", "direct"]));
    set(
        "steering.kind",
        option("st_mode", &["bench throttle", "steering unit"]),
    );
    set(
        "excess.kind",
        option("ex_mode", &["tank", "bench throttle", "motor", "blocked"]),
    );
    scenario
}

#[track_caller]
fn same(what: &str, got: f64, expected: f64) {
    let error = (got - expected).abs();
    // One rounding on either side.
    assert!(
        error <= 4e-16 * expected.abs(),
        "{what}: {got} against {expected}"
    );
}

/// What a reference's numbers become, in every part that it has.
fn check_parts(parts: &Parts, p: &Value) {
    let n = |symbol: &str| number(p, symbol);
    let valve = &parts.valve;
    same("d", valve.diameter, n("d"));
    same("m", valve.mass, n("m"));
    same("F0", valve.preload, n("F0"));
    same("k", valve.spring_rate, n("k"));
    same(
        "A_o",
        valve.fixed_orifice.area,
        PI / 4.0 * n("d_o") * n("d_o"),
    );
    same("A_c0", valve.holes_area, n("A_c0"));
    same("V_s0", valve.spring.volume, n("V_s0"));
    same(
        "B_w_in",
        1.0 / valve.inlet.wall_compressibility,
        n("B_w_in"),
    );
    assert!(
        (valve.land_jet_cosine - n("cosj_e")).abs() < 3e-16,
        "cosj_e"
    );
    let hole = n("Re_t") + 64.0 * n("Cd") * n("Cd") * n("L_h") / n("d_h");
    same("head hole", valve.head_hole.transition_reynolds, hole);
    same("D", parts.pump.displacement_rad * TAU, n("D"));
    let slip = (1.0 - n("eta_v")) * n("nu_ref") * n("rho_ref") * (n("n_ref") * TAU / 60.0)
        / n("p_ref")
        * n("wear");
    assert!((parts.pump.slip / slip - 1.0).abs() < 1e-14, "slip");
    let main = parts.main_relief.expect("all three have one");
    same("pm_cr", main.cracking, n("pm_cr"));
    same("tau_m", main.time_constant, n("tau_m"));
    same("l_line", parts.line.line.length, n("l_line"));
    if let SteeringSide::Unit(gear) = &parts.steering {
        same("D_su", gear.unit.displacement, n("D_su"));
        same("d_n", gear.unit.bypass_shut, n("d_n"));
        same("A_B", gear.cylinder.area_b, n("A_B"));
        same("K_cyl", gear.cylinder.piston_leak, n("K_cyl"));
    }
    match &parts.excess {
        ExcessSide::Motor(motor) => {
            same("D_m", motor.displacement_rad * TAU, n("D_m"));
            same("Csm", motor.slip, n("Csm"));
            assert!(
                (motor.fan_drag / n("T2") - 1.0).abs() < 1e-14,
                "T2: {}",
                motor.fan_drag
            );
        }
        ExcessSide::Tank { area, .. } => same("A_bp", *area, n("A_bp")),
        other => panic!("no reference has {other:?}"),
    }
    match (n("pri_mode") as usize, &parts.priority_relief) {
        (0, PriorityRelief::None) => {}
        (1, PriorityRelief::OnPort(relief)) | (2, PriorityRelief::Pilot(relief)) => {
            same("pp_full", relief.full_flow_pressure, n("pp_full"));
        }
        (mode, other) => panic!("mode {mode} became {other:?}"),
    }
    assert!(parts.return_side == ReturnSide::Constant(n("p_t")), "p_t");
}

#[test]
fn every_reference_parameter_can_be_set() {
    for name in [
        "orchard_carrier",
        "c1_small_bench_tank",
        "c3_steer_lock_pilot",
    ] {
        let reference = reference(name);
        let parameters = &reference["parameters"];
        for symbol in parameters.as_object().expect("an object").keys() {
            let known = PATHS.iter().any(|(known, ..)| known == symbol)
                || OTHERS.contains(&symbol.as_str());
            assert!(known, "{symbol} has no path");
        }
        let scenario = set_all(parameters);
        let circuit = scenario
            .circuit()
            .unwrap_or_else(|findings| panic!("{name}: {findings}"));
        check_parts(circuit.parts(), parameters);
    }
}

#[test]
fn the_orchard_carrier_is_the_reference() {
    let reference = reference("orchard_carrier");
    let preset = PRESETS[0]
        .scenario()
        .unwrap_or_else(|findings| panic!("{findings}"));
    let expected = set_all(&reference["parameters"])
        .circuit()
        .expect("checked above");
    let got = preset.circuit().expect("checked elsewhere");
    check_parts(got.parts(), &reference["parameters"]);
    // Angles, and the fan's torque at its speed, may differ in the last bit.
    let text = |parts: &Parts| {
        let rounded = |word: &str| match word.trim_end_matches([',', ')']).parse::<f64>() {
            Ok(number) => format!("{number:.12e}"),
            Err(_) => word.to_owned(),
        };
        format!("{parts:?}")
            .split(' ')
            .map(rounded)
            .collect::<Vec<_>>()
            .join(" ")
    };
    assert_eq!(text(got.parts()), text(expected.parts()), "every part");
    let profiles = preset.inputs().expect("they fit");
    for (input, symbol, factor) in [
        (Input::EngineSpeed, "n_rpm", PI / 30.0),
        (Input::WheelRate, "w_wheel", 1.0),
    ] {
        let points = reference["inputs"][symbol].as_array().expect("a list");
        for point in points {
            let (time, value) = (
                point[0].as_f64().unwrap(),
                factor * point[1].as_f64().unwrap(),
            );
            let got = profiles.get(input).at(time);
            assert!(
                (got - value).abs() < 1e-9,
                "{symbol} at {time}: {got} against {value}"
            );
        }
        let last = profiles.get(input).points().last().expect("points").0;
        same(
            symbol,
            last,
            points.last().expect("points")[0].as_f64().unwrap(),
        );
    }
    assert!(
        (preset.solver().duration - reference["t_end"].as_f64().unwrap()).abs() < 1e-12,
        "end"
    );
}
