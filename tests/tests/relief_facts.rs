//! What reliefs, a blocked excess port and a plugged hole do to steering and consumer: common
//! practice, no source. Every fact is asked of the orchard carrier.

use helmsplit_acceptance::rig::{Rig, last, mean, range};
use helmsplit_acceptance::trouble::Tried;
use helmsplit_model::Input;
use helmsplit_sim::{RunResult, Start};

/// L/min in 1 m3/s.
const LPM: f64 = 6e4;

/// rpm in 1 rad/s.
const RPM: f64 = 30.0 / std::f64::consts::PI;

fn held_at_the_lock(relief: &str) -> Tried<RunResult> {
    let run = Rig::preset("orchard_carrier")?
        .set("priority_relief.kind", relief)?
        .hold(Input::EngineSpeed, "1800 rpm")?
        .drive(
            Input::WheelRate,
            &[
                ("0.5 s", "0 rpm"),
                ("0.55 s", "90 rpm"),
                ("3 s", "90 rpm"),
                ("3.05 s", "30 rpm"),
            ],
        )?
        .run(&Start::Settled, 5.0)?;
    assert!(
        last(&run, "y_c") > 0.1,
        "{relief}: the cylinder stands at its stop"
    );
    Ok(run)
}

/// Common practice, no source.
#[test]
fn the_relief_decides_what_the_consumer_gets_at_the_lock() -> Tried<()> {
    let fan = |run: &RunResult| mean(run, "w_m", 4.5, 5.0) * RPM;
    let main = |run: &RunResult| mean(run, "q_main", 4.5, 5.0) * LPM;
    let before = mean(&held_at_the_lock("none")?, "w_m", 0.0, 0.5) * RPM;

    let none = held_at_the_lock("none")?;
    assert!(
        fan(&none) < 0.02 * before,
        "no priority relief: fan at {} rpm",
        fan(&none)
    );
    assert!(
        main(&none) > 25.0,
        "the main relief takes the pump: {} L/min",
        main(&none)
    );

    let port = held_at_the_lock("on the priority port")?;
    assert!(
        fan(&port) > 0.8 * before,
        "relief on the port: fan at {} rpm",
        fan(&port)
    );
    assert!(
        main(&port) < 0.01,
        "the main relief stays shut: {} L/min",
        main(&port)
    );

    let pilot = held_at_the_lock("pilot on the spring chamber")?;
    assert!(
        fan(&pilot) > 1.3 * before,
        "pilot: fan at {} rpm, before {before}",
        fan(&pilot)
    );
    assert!(
        main(&pilot) < 0.01,
        "the main relief stays shut: {} L/min",
        main(&pilot)
    );
    Ok(())
}

fn turn_with_blocked_port(relief: &str) -> Tried<RunResult> {
    Rig::preset("orchard_carrier")?
        .set("priority_relief.kind", relief)?
        .set("excess.kind", "blocked")?
        .hold(Input::EngineSpeed, "2000 rpm")?
        .drive(
            Input::WheelRate,
            &[
                ("0.5 s", "0 rpm"),
                ("0.55 s", "90 rpm"),
                ("1.4 s", "90 rpm"),
                ("1.45 s", "0 rpm"),
            ],
        )?
        .run(&Start::Settled, 2.0)
}

/// Common practice, no source.
#[test]
fn a_blocked_excess_port_ends_at_the_main_relief_and_leaves_the_steering_alone() -> Tried<()> {
    let run = turn_with_blocked_port("on the priority port")?;
    assert!(
        mean(&run, "q_main", 0.1, 0.5) * LPM > 15.0,
        "the main relief takes the excess oil"
    );
    let inlet = mean(&run, "p_in", 0.1, 0.5) / 1e5;
    assert!(
        (165.0..175.0).contains(&inlet),
        "inlet between cracking and full flow: {inlet} bar"
    );
    let (_, short) = range(&run, "w_short", 0.5, 1.45);
    assert!(short < 1e-3, "the wheel gets its oil: {short} rad/s short");
    assert!(
        last(&run, "y_c") > 60e-3,
        "and the cylinder moves: {} m",
        last(&run, "y_c")
    );
    Ok(())
}

/// A property of the pilot on the spring chamber that the tool must warn of: common practice, no
/// source.
#[test]
fn with_a_pilot_on_the_spring_chamber_a_blocked_excess_port_loses_the_steering() -> Tried<()> {
    let run = turn_with_blocked_port("pilot on the spring chamber")?;
    let most = range(&run, "q_priority", 0.1, 1.5).1 * LPM;
    assert!(most < 0.5, "hardly any oil for the steering: {most} L/min");
    assert!(
        last(&run, "y_c").abs() < 1e-3,
        "the cylinder stands: {} m",
        last(&run, "y_c")
    );
    let (short, _) = range(&run, "w_short", 0.8, 1.2);
    assert!(
        short > 0.9 * 90.0 / RPM,
        "the wheel is stuck: {short} rad/s short"
    );
    let warned = Rig::preset("orchard_carrier")?
        .set("priority_relief.kind", "pilot on the spring chamber")?
        .set("excess.kind", "blocked")?
        .scenario
        .validate();
    assert!(
        warned
            .findings
            .iter()
            .any(|finding| finding.message.contains("steering is lost")),
        "the scenario warns of it: {warned}"
    );
    Ok(())
}

/// Common practice, no source.
#[test]
fn without_a_main_relief_a_blocked_port_has_no_limit_and_the_file_is_warned_of() -> Tried<()> {
    let rig = Rig::preset("orchard_carrier")?
        .set("main_relief.kind", "none")?
        .set("excess.kind", "blocked")?
        .hold(Input::EngineSpeed, "2000 rpm")?;
    let warned = rig.scenario.validate();
    assert!(
        warned
            .findings
            .iter()
            .any(|finding| finding.path == "main_relief.kind"),
        "a warning: {warned}"
    );
    let run = rig.run(&Start::Cold, 1.0)?;
    assert!(
        last(&run, "p_in") > 1000e5,
        "no limit: {} Pa",
        last(&run, "p_in")
    );
    Ok(())
}

/// Where a plugged disc hole leaves the steering depends on where it starts: the trapped spring
/// chamber holds the spool. Common practice, no source.
#[test]
fn a_plugged_disc_hole_leaves_the_spool_where_it_was() -> Tried<()> {
    let healthy = Rig::preset("orchard_carrier")?.hold(Input::EngineSpeed, "2400 rpm")?;
    let plugged = healthy.clone().set("valve.disc_hole_diameter", "0 mm")?;
    let cold = plugged.run(&Start::Cold, 2.0)?;
    let flow = last(&cold, "q_priority") * LPM;
    assert!(
        flow > 44.0,
        "from cold nearly all oil goes to the steering: {flow} L/min"
    );
    let running = plugged.run(&Start::From(healthy.rest()?.state), 2.0)?;
    let flow = last(&running, "q_priority") * LPM;
    assert!(flow < 1.0, "plugged while it runs: {flow} L/min are left");
    Ok(())
}

/// The time constant of a pilot on the spring chamber decides whether it is calm at the lock, in
/// hot oil. Common practice, no source.
#[test]
fn a_sluggish_pilot_rings_at_the_lock() -> Tried<()> {
    let swing = |time_constant: &str| -> Tried<f64> {
        let run = Rig::preset("orchard_carrier")?
            .set("priority_relief.kind", "pilot on the spring chamber")?
            .set("priority_relief.time_constant", time_constant)?
            .set("oil.temperature", "80 degC")?
            .set("excess.kind", "tank")?
            .hold(Input::EngineSpeed, "900 rpm")?
            .drive(
                Input::WheelRate,
                &[("0.1 s", "0 rpm"), ("0.15 s", "90 rpm")],
            )?
            .run(&Start::Settled, 5.0)?;
        let (low, high) = range(&run, "p_in", 4.5, 5.0);
        Ok((high - low) / 1e5)
    };
    let (slow, quick) = (swing("3 ms")?, swing("1 ms")?);
    assert!(slow > 2.0, "3 ms: {slow} bar peak to peak");
    assert!(quick < 0.1, "1 ms: {quick} bar peak to peak");
    Ok(())
}
