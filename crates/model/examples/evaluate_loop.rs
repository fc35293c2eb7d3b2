//! Repeats the right-hand side or the Jacobian of the orchard carrier, to be measured from
//! outside: `evaluate_loop rhs 100000`.

use helmsplit_model::Circuit;

#[path = "../tests/fixture/mod.rs"]
mod fixture;

fn main() {
    let mut arguments = std::env::args().skip(1);
    let what = arguments.next().unwrap_or_else(|| "rhs".to_owned());
    let count: usize = arguments
        .next()
        .and_then(|n| n.parse().ok())
        .unwrap_or(1000);
    let circuit = Circuit::new(fixture::orchard()).expect("the fixture is a circuit");
    let n = circuit.state_count();
    let mut dice = fixture::Dice(1);
    let states: Vec<_> = (0..64)
        .map(|_| fixture::working_state(&circuit, &mut dice))
        .collect();
    let inputs = fixture::working_inputs(&mut dice);
    let mut dy = vec![0.0; n];
    let mut jacobian = vec![0.0; n * n];
    let mut sum = 0.0;
    for i in 0..count {
        let y = &states[i % states.len()];
        if what == "rhs" {
            circuit.derivatives(&inputs, y, &mut dy);
        } else {
            circuit.jacobian(&inputs, y, &mut jacobian);
        }
        sum += dy[0] + jacobian[0];
    }
    std::hint::black_box(sum);
}
