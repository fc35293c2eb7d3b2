//! How circuits with a priority flow control valve behave: common practice, no source. Every
//! fact is asked of the orchard carrier or of its valve on a test bench.

use helmsplit_acceptance::rig::{AtRest, Rig, last, mean};
use helmsplit_acceptance::trouble::Tried;
use helmsplit_model::{Input, Signal};
use helmsplit_sim::{Rest, Start};

/// L/min in 1 m3/s.
const LPM: f64 = 6e4;

fn bench(speed: &str, steering: &str, excess: &str) -> Tried<AtRest> {
    let rest = Rig::bench(speed, steering, excess)?.rest()?;
    assert_eq!(
        rest.rest,
        Rest::DiedOut,
        "{speed}, {steering}, {excess}: comes to rest"
    );
    Ok(rest)
}

/// Force that the pressures on the spool's ends must overcome before the land opens, N.
fn opening_force(rest: &AtRest) -> f64 {
    let valve = &rest.circuit.parts().valve;
    valve.preload + valve.spring_rate * valve.land.overlap
}

/// Common practice, no source.
#[test]
fn without_flow_the_spool_is_sprung_shut() -> Tried<()> {
    let rest = bench("0 rpm", "0 bar", "0 bar")?;
    assert!(
        rest.state("x") < 0.0,
        "pressed into its stop: {} m",
        rest.state("x")
    );
    assert!(
        rest.signal(Signal::LandArea) < 1e-9,
        "land: {} m2",
        rest.signal(Signal::LandArea)
    );

    // And it goes back there when the engine stops.
    let rig = Rig::preset("orchard_carrier")?.drive(
        Input::EngineSpeed,
        &[("0.2 s", "2000 rpm"), ("0.5 s", "0 rpm")],
    )?;
    let run = rig.run(&Start::Settled, 3.0)?;
    assert!(mean(&run, "x", 0.0, 0.2) > 1.5e-3, "open while it runs");
    assert!(
        last(&run, "x") < 1e-6,
        "shut when it stands: {} m",
        last(&run, "x")
    );
    Ok(())
}

/// Common practice, no source.
#[test]
fn what_little_flow_there_is_goes_to_the_steering() -> Tried<()> {
    for speed in ["200 rpm", "400 rpm", "600 rpm", "700 rpm"] {
        let rest = bench(speed, "70 bar", "2 bar")?;
        let pumped = rest.signal(Signal::PumpFlow);
        // What leaks over the shut land on the way, at 70 bar some 0.03 L/min.
        assert!(
            rest.excess_flow() * LPM < 0.05,
            "{speed}: {} m3/s",
            rest.excess_flow()
        );
        let rest_of_it = pumped - rest.excess_flow();
        assert!(
            (rest.priority_flow() - rest_of_it).abs() < 1e-4 * pumped,
            "{speed}: {} of {pumped} m3/s",
            rest.priority_flow()
        );
        assert!(
            rest.state("x") < 1e-6,
            "{speed}: the spool stays at its stop"
        );
    }
    Ok(())
}

/// Common practice, no source.
#[test]
fn the_excess_port_opens_only_once_pressure_has_moved_the_spool() -> Tried<()> {
    let mut opened = 0;
    for speed in [
        "700 rpm", "760 rpm", "800 rpm", "850 rpm", "900 rpm", "1200 rpm", "2400 rpm",
    ] {
        let rest = bench(speed, "70 bar", "2 bar")?;
        let force = rest.signal(Signal::EndPressureForce);
        let open = rest.excess_flow() * LPM > 0.5;
        let moved = rest.state("x") > rest.circuit.parts().valve.land.overlap;
        assert_eq!(
            open,
            moved,
            "{speed}: flow and travel {} m",
            rest.state("x")
        );
        // The jet through the land only adds to what has to be overcome.
        assert_eq!(
            open,
            force > opening_force(&rest),
            "{speed}: flow and force {force} N"
        );
        opened += usize::from(open);
    }
    assert_eq!(opened, 4, "both sides of the opening are seen");

    // The same on the way there. Half of the overlap still seals; what leaks over it is left.
    let rig = Rig::bench("900 rpm", "70 bar", "2 bar")?;
    let run = rig.run(&Start::Cold, 1.0)?;
    let (x, flow) = (run.trace.named("x")?, run.trace.named("q_excess")?);
    let overlap = rig.scenario.circuit()?.parts().valve.land.overlap;
    let early = x
        .iter()
        .zip(flow.iter())
        .filter(|(x, _)| *x < 0.5 * overlap);
    let most = early.map(|(_, flow)| flow * LPM).fold(0.0, f64::max);
    assert!(most < 0.1, "{most} L/min ahead of the overlap");
    assert!(last(&run, "q_excess") * LPM > 1.0, "open in the end");
    Ok(())
}

/// Common practice, no source. 4 %: spring rate and jet forces leave that much droop.
#[test]
fn loading_the_excess_side_leaves_the_priority_flow_alone() -> Tried<()> {
    for steering in ["30 bar", "70 bar", "120 bar"] {
        let light = bench("2400 rpm", steering, "2 bar")?.priority_flow();
        for excess in ["40 bar", "90 bar", "150 bar"] {
            let loaded = bench("2400 rpm", steering, excess)?.priority_flow();
            let change = loaded / light - 1.0;
            assert!(
                change.abs() < 0.04,
                "{steering}, {excess}: {:+.1} %",
                100.0 * change
            );
        }
    }
    // Without throttled priority holes the oil takes the easier way and the excess port starves.
    let starved = Rig::bench("2400 rpm", "30 bar", "150 bar")?
        .set("valve.holes_throttle_end", "1000 mm")?
        .set("valve.holes_throttle_start", "100 mm")?
        .rest()?;
    assert!(
        starved.excess_flow() * LPM < 0.1,
        "{} m3/s",
        starved.excess_flow()
    );
    assert!(
        starved.priority_flow() * LPM > 40.0,
        "{} m3/s",
        starved.priority_flow()
    );
    Ok(())
}

/// Common practice, no source.
#[test]
fn a_larger_pump_hides_wear_until_its_margin_is_used_up() -> Tried<()> {
    let flow = |pump: &str, wear: &str| -> Tried<(f64, f64)> {
        let rest = Rig::bench("900 rpm", "100 bar", "2 bar")?
            .set("pump.displacement", pump)?
            .set("pump.wear", wear)?
            .rest()?;
        Ok((rest.priority_flow(), rest.excess_flow() * LPM))
    };
    for (pump, hidden, shows) in [
        ("20 cm3/rev", &["2"][..], &["3", "5"][..]),
        ("28 cm3/rev", &["2", "3", "4", "5"], &["7", "9"]),
    ] {
        let (new, _) = flow(pump, "1")?;
        for wear in hidden {
            let (worn, excess) = flow(pump, wear)?;
            assert!(
                worn > 0.98 * new,
                "{pump}, wear {wear}: {} of new",
                worn / new
            );
            assert!(
                excess > 0.5,
                "{pump}, wear {wear}: {excess} L/min in reserve"
            );
        }
        for wear in shows {
            let (worn, excess) = flow(pump, wear)?;
            assert!(
                worn < 0.97 * new,
                "{pump}, wear {wear}: {} of new",
                worn / new
            );
            assert!(
                excess < 0.1,
                "{pump}, wear {wear}: no oil left, {excess} L/min"
            );
        }
    }
    Ok(())
}
