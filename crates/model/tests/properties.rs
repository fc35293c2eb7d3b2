//! Properties that hold for every circuit: exact Jacobian, closed balances, symmetry.

mod fixture;

use fixture::{Dice, orchard, variants, working_inputs, working_state};
use helmsplit_model::{Circuit, Dual, Input, Inputs, Readings, Real, Signal};

/// Fourth-order central difference of one column.
fn difference_column(c: &Circuit, inputs: &Inputs, y: &[f64], j: usize, h: f64) -> Vec<f64> {
    let n = y.len();
    let rates = |shift: f64| {
        let mut y = y.to_vec();
        y[j] += shift;
        let mut dy = vec![0.0; n];
        c.derivatives(inputs, &y, &mut dy);
        dy
    };
    let (a, b, d, e) = (rates(-2.0 * h), rates(-h), rates(h), rates(2.0 * h));
    (0..n)
        .map(|i| (a[i] - e[i] + 8.0 * (d[i] - b[i])) / (12.0 * h))
        .collect()
}

#[test]
fn jacobian_agrees_with_differences_in_every_component() {
    for (name, parts) in variants() {
        let c = Circuit::new(parts).unwrap();
        let n = c.state_count();
        let mut dice = Dice(7);
        let mut jac = vec![0.0; n * n];
        let mut touched = vec![false; n];
        for sample in 0..60 {
            let y = working_state(&c, &mut dice);
            let inputs = working_inputs(&mut dice);
            c.jacobian(&inputs, &y, &mut jac);
            for j in 0..n {
                // Two widths: the better one decides, since bends of the equations (checks,
                // stops) and rounding each spoil one of them somewhere.
                let wide = difference_column(&c, &inputs, &y, j, 1e-4 * c.states()[j].scale);
                let narrow = difference_column(&c, &inputs, &y, j, 3e-6 * c.states()[j].scale);
                for i in 0..n {
                    let exact = jac[j * n + i];
                    let miss = (exact - wide[i]).abs().min((exact - narrow[i]).abs());
                    let column = c.states()[j].scale;
                    let size = exact.abs() * column + c.states()[i].scale * 1e2;
                    assert!(
                        miss * column <= 2e-5 * size,
                        "{name}, sample {sample}: d {} / d {}: {exact} against {} and {}",
                        c.states()[i].name,
                        c.states()[j].name,
                        wide[i],
                        narrow[i]
                    );
                    touched[j] |= exact != 0.0;
                }
            }
        }
        for (j, touched) in touched.iter().enumerate() {
            let free = ["angle"].contains(&c.states()[j].name.as_str());
            assert!(
                *touched || free,
                "{name}: {} acts on nothing",
                c.states()[j].name
            );
        }
    }
}

/// Volume and energy balance hold to rounding at any state whatever (M12): the rate of what is
/// stored, by the chain rule from the rates, equals what goes in, out, and is lost.
#[test]
fn balances_close_at_any_state() {
    for (name, parts) in variants() {
        let c = Circuit::new(parts).unwrap();
        let n = c.state_count();
        let accounts = c.accounts();
        let mut dice = Dice(11);
        let mut r = Readings::default();
        for sample in 0..200 {
            let y = working_state(&c, &mut dice);
            let inputs = working_inputs(&mut dice);
            let mut dy = vec![0.0; n];
            c.derivatives(&inputs, &y, &mut dy);
            c.observe(&inputs, &y, &mut r);
            let along: Vec<Dual<1>> = y
                .iter()
                .zip(&dy)
                .map(|(&value, &slope)| Dual {
                    value,
                    slopes: [slope],
                })
                .collect();
            let (walls_v, walls_e) = accounts.moving_walls(&y);

            let stored = accounts.stored_volume(&along).slopes[0];
            let net = r.get(Signal::VolumeIn) - r.get(Signal::VolumeOut) + walls_v;
            let turnover = 1e-3;
            assert!(
                (net - stored).abs() < 1e-11 * turnover + 1e-12 * stored.abs(),
                "{name}, sample {sample}: volume {net} against {stored}"
            );

            let stored = accounts.stored_energy(&along).slopes[0];
            let lost = r.get(Signal::EnergyLost);
            let work = r.get(Signal::WorkOut);
            let net = r.get(Signal::EnergyIn) - lost - work + walls_e;
            // Large terms cancel (a spool thrown about at random, say), so rounding is measured
            // against their size.
            let size: f64 = Signal::ALL
                .iter()
                .filter(|s| s.quantity() == helmsplit_model::Quantity::Power)
                .map(|&s| r.get(s).abs())
                .sum::<f64>()
                + y.iter()
                    .zip(&dy)
                    .map(|(a, b)| (a * b).abs() * 1e-6)
                    .sum::<f64>();
            assert!(
                (net - stored).abs() < 1e-10 * size,
                "{name}, sample {sample}: energy {net} against {stored}, size {size}"
            );
        }
    }
}

/// With an even cylinder the machine steers to either side alike.
#[test]
fn steering_is_symmetric() {
    let c = Circuit::new(orchard()).unwrap();
    let n = c.state_count();
    let at = |name: &str| c.state_index(name).unwrap();
    let mirror = |y: &[f64]| {
        let mut m = y.to_vec();
        m.swap(at("p_A"), at("p_B"));
        for name in ["d", "y_c", "v_c"] {
            m[at(name)] = -m[at(name)];
        }
        m
    };
    let mut dice = Dice(3);
    for _ in 0..100 {
        let y = working_state(&c, &mut dice);
        let inputs = working_inputs(&mut dice);
        let mut other = inputs;
        other.set(Input::WheelRate, -inputs.get(Input::WheelRate));
        other.set(Input::ExternalForce, -inputs.get(Input::ExternalForce));
        let (mut a, mut b) = (vec![0.0; n], vec![0.0; n]);
        c.derivatives(&inputs, &y, &mut a);
        c.derivatives(&other, &mirror(&y), &mut b);
        let a = mirror(&a);
        for i in 0..n {
            assert!(
                (a[i] - b[i]).abs() <= 1e-12 * a[i].abs().max(1e-9),
                "rate of {} is not mirrored: {} and {}",
                c.states()[i].name,
                a[i],
                b[i]
            );
        }
    }
}

#[test]
fn pressure_cannot_fall_below_vacuum() {
    let c = Circuit::new(orchard()).unwrap();
    let n = c.state_count();
    let mut dice = Dice(5);
    for _ in 0..200 {
        let mut y = working_state(&c, &mut dice);
        let inputs = working_inputs(&mut dice);
        for i in 0..n {
            if c.states()[i].name.starts_with("p_") {
                let before = y[i];
                // 1 Pa above absolute vacuum the stiffness is all but gone.
                y[i] = 1.0 - helmsplit_model::ATMOSPHERE;
                let mut dy = vec![0.0; n];
                c.derivatives(&inputs, &y, &mut dy);
                assert!(
                    dy[i] > -1e8,
                    "{} falls at {} Pa/s next to vacuum",
                    c.states()[i].name,
                    dy[i]
                );
                y[i] = before;
            }
        }
    }
}

#[test]
fn states_beyond_any_sense_stay_finite() {
    for (name, parts) in variants() {
        let c = Circuit::new(parts).unwrap();
        let n = c.state_count();
        let mut dice = Dice(13);
        for _ in 0..300 {
            let y: Vec<f64> = c
                .states()
                .iter()
                .map(|s| 300.0 * dice.roll() * s.scale)
                .collect();
            let inputs = working_inputs(&mut dice);
            let mut dy = vec![0.0; n];
            c.derivatives(&inputs, &y, &mut dy);
            let mut jac = vec![0.0; n * n];
            c.jacobian(&inputs, &y, &mut jac);
            for (rate, state) in dy.iter().zip(c.states()) {
                assert!(rate.is_finite(), "{name}: rate of {} at {y:?}", state.name);
            }
            assert!(
                jac.iter().all(|j| j.is_finite()),
                "{name}: Jacobian at {y:?}"
            );
        }
    }
}

#[test]
fn dual_carries_its_value_unchanged() {
    assert!(
        (Dual::<2>::constant(3.5).value() - 3.5).abs() < 1e-300,
        "value"
    );
}
