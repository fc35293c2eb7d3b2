//! Every parameter reaches the circuit, the checks or the solver; and none where it has no part.

use helmsplit_model::{Parts, Quantity};

use super::*;
use crate::choice::{CHOICES, Condition};
use crate::parameter::{Parameter, parameters};
use crate::settings::{Limits, Ratings, SolverSettings};

/// Everything that a scenario hands on.
type Outcome = (Parts, Limits, Ratings, SolverSettings);

fn outcome(scenario: &Scenario) -> Outcome {
    let parts = scenario
        .parts()
        .expect("the changed values still give parts");
    (
        parts,
        scenario.limits(),
        scenario.ratings(),
        scenario.solver(),
    )
}

fn under(conditions: &[Condition]) -> Scenario {
    let mut scenario = Scenario::default();
    for condition in conditions {
        scenario
            .choose(condition.choice, condition.any_of[0])
            .unwrap();
    }
    assert!(scenario.meets(conditions), "conditions can hold together");
    scenario
}

/// Another allowed value near the present one.
fn change(scenario: &mut Scenario, row: &Parameter) {
    let old = scenario.si(row.id);
    let unit = row.unit();
    let usual = unit.si_from_value(row.usual.low)
        + 0.1 * unit.si_from_difference(row.usual.high - row.usual.low);
    let tries = if row.path == "oil.iso_grade" {
        vec![68.0]
    } else if row.quantity == Quantity::Count {
        vec![old + 1.0]
    } else {
        vec![old * 1.01, old * 0.99, usual]
    };
    for si in tries {
        let changed = (si - old).abs() > 0.0;
        if changed && scenario.set_si(row.id, si).is_ok() {
            return;
        }
    }
    panic!("{} takes no other value", row.path);
}

#[test]
fn no_parameter_is_dead() {
    for row in parameters() {
        let mut scenario = under(row.when);
        // The viscosity at which a leakage holds matters where there is one.
        scenario
            .set("steering.supply_leakage", "1 cm3/(min bar)")
            .unwrap();
        let before = outcome(&scenario);
        change(&mut scenario, row);
        assert!(outcome(&scenario) != before, "{} changes nothing", row.path);
    }
}

#[test]
fn a_parameter_acts_only_under_its_choices() {
    for row in parameters() {
        for (place, condition) in row.when.iter().enumerate() {
            let mut scenario = under(&row.when[..place]);
            let count = condition.choice.choice().options.len() as u8;
            let Some(other) = (0..count).find(|option| !condition.any_of.contains(option)) else {
                continue;
            };
            scenario.choose(condition.choice, other).unwrap();
            let before = outcome(&scenario);
            change(&mut scenario, row);
            assert!(
                outcome(&scenario) == before,
                "{} acts although {} is {}",
                row.path,
                condition.choice.choice().path,
                scenario.option_key(condition.choice)
            );
        }
    }
}

#[test]
fn no_option_is_dead() {
    for choice in CHOICES {
        let mut seen: Vec<(Outcome, bool)> = Vec::new();
        for option in 0..choice.options.len() as u8 {
            let mut scenario = under(choice.when);
            scenario.choose(choice.id, option).unwrap();
            // Something to start from, so that positions show.
            scenario.set("start.cylinder_position", "10 mm").unwrap();
            let now = outcome(&scenario);
            let settles = scenario.option_key(choice.id) == "settled";
            let alike = seen
                .iter()
                .any(|(other, other_settles)| *other == now && *other_settles == settles);
            assert!(
                !alike,
                "{} = {} changes nothing",
                choice.path,
                scenario.option_key(choice.id)
            );
            seen.push((now, settles));
        }
    }
}

#[test]
fn the_land_table_reaches_the_valve() {
    let mut scenario = Scenario::default();
    scenario.set("valve.land", "table").unwrap();
    let before = scenario.parts().unwrap();
    scenario.land_table.points.pop();
    assert!(scenario.parts().unwrap() != before, "one point less");
}

#[test]
fn default_is_a_circuit() {
    let circuit = Scenario::default().circuit().unwrap();
    assert_eq!(circuit.state_count(), 19, "states of the orchard carrier");
}

/// Wilson slip of a measurement at the data sheet's own point is the data sheet's slip.
#[test]
fn measured_efficiency_and_wear_say_the_same() {
    let mut sheet = Scenario::default();
    sheet.set("pump.wear", "2").unwrap();
    let mut measured = Scenario::default();
    measured
        .set("pump.condition", "measured efficiency")
        .unwrap();
    measured.set("pump.measured_efficiency", "90 %").unwrap();
    let (a, b) = (
        sheet.parts().unwrap().pump.slip,
        measured.parts().unwrap().pump.slip,
    );
    assert!((a / b - 1.0).abs() < 1e-13, "{a} against {b}");
}

/// At the stated flow, filter and cooler together cost the sum of their drops.
#[test]
fn filter_and_cooler_add_up() {
    let mut scenario = Scenario::default();
    scenario.set("return_line.kind", "restricted").unwrap();
    let parts = scenario.parts().unwrap();
    let ReturnSide::Restricted { area, edge, .. } = parts.return_side else {
        panic!("restricted was chosen");
    };
    let flow = 50.0 / 6e4;
    let velocity = flow / (area * edge.discharge);
    let drop = 0.5 * parts.oil.density * velocity * velocity;
    assert!((drop / 1.5e5 - 1.0).abs() < 1e-12, "{drop} Pa");
}
