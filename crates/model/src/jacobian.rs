//! The exact Jacobian of a circuit: dual numbers with one column for each group of states.

use crate::circuit::{Circuit, MOST_STATES};
use crate::dependence::Dependence;
use crate::dual::Dual;
use crate::profile::Inputs;
use crate::real::Real;
use crate::signal::Unobserved;
use crate::sparsity::Sparsity;

/// Widths of the dual number: the smallest that holds all groups is used in one pass, and the
/// larger in several passes beyond. The widest row is the spool's: eight states act on it with
/// smooth friction, and a few more groups are needed where the friction has a state or the return
/// has a pressure of its own.
const NARROW: usize = 8;
const WIDE: usize = 12;

/// States that the working space of most circuits holds: clearing that for [`MOST_STATES`] would
/// take as long as the rest.
const USUAL_STATES: usize = 24;

const _: () = assert!(
    MOST_STATES <= u128::BITS as usize,
    "a bit for each state in a row of the pattern"
);

impl Circuit {
    /// Exact Jacobian, column by column: `d rate_i / d state_j` at `j * n + i` of a slice of
    /// `n * n`, with `n` from [`Self::state_count`].
    pub fn jacobian(&self, inputs: &Inputs, states: &[f64], column_major: &mut [f64]) {
        column_major.fill(0.0);
        let usual = self.state_count() <= USUAL_STATES;
        match (self.sparsity.groups, usual) {
            (..=NARROW, true) => {
                self.group_entries::<NARROW, USUAL_STATES>(inputs, states, 0, column_major);
            }
            (..=NARROW, false) => {
                self.group_entries::<NARROW, MOST_STATES>(inputs, states, 0, column_major);
            }
            (..=WIDE, true) => {
                self.group_entries::<WIDE, USUAL_STATES>(inputs, states, 0, column_major);
            }
            (groups, _) => {
                for first in (0..groups).step_by(WIDE) {
                    self.group_entries::<WIDE, MOST_STATES>(inputs, states, first, column_major);
                }
            }
        }
    }

    /// Entries of the groups `first .. first + N` by one pass of the dual number; `ROOM` is at
    /// least the number of states.
    fn group_entries<const N: usize, const ROOM: usize>(
        &self,
        inputs: &Inputs,
        states: &[f64],
        first: usize,
        column_major: &mut [f64],
    ) {
        let n = self.state_count();
        let mut y = [Dual::<N>::constant(0.0); ROOM];
        for ((y, &value), &group) in y.iter_mut().zip(states).zip(&self.sparsity.group_of) {
            y.value = value;
            // A group outside this pass, also one that lies before it, is a constant.
            if let Some(slope) = y.slopes.get_mut(group.wrapping_sub(first)) {
                *slope = 1.0;
            }
        }
        let mut dy = [Dual::<N>::constant(0.0); ROOM];
        self.slopes(inputs, &y[..n], &mut dy[..n]);
        for entry in &self.sparsity.entries {
            if let Some(&slope) = dy[entry.row].slopes.get(entry.group.wrapping_sub(first)) {
                column_major[entry.place] = slope;
            }
        }
    }

    /// The pass itself, once for each width and not for each size of the working space.
    #[inline(never)]
    fn slopes<const N: usize>(&self, inputs: &Inputs, y: &[Dual<N>], dy: &mut [Dual<N>]) {
        self.evaluate(inputs, y, dy, &mut Unobserved);
    }

    /// Where the Jacobian can be other than zero, at whatever states and inputs.
    pub(crate) fn find_sparsity(&self) -> Sparsity {
        let n = self.state_count();
        let inputs = Inputs::default();
        let y: Vec<Dependence> = self
            .cold_state(&inputs)
            .iter()
            .enumerate()
            .map(|(state, &value)| Dependence::state(value, state))
            .collect();
        let mut dy = vec![Dependence::constant(0.0); n];
        self.evaluate(&inputs, &y, &mut dy, &mut Unobserved);
        let rows: Vec<u128> = dy.iter().map(|rate| rate.states).collect();
        Sparsity::new(&rows)
    }
}

#[cfg(test)]
#[path = "../tests/fixture/mod.rs"]
mod fixture;

#[cfg(test)]
mod tests {
    use super::fixture::{Dice, variants, working_inputs, working_state};
    use super::*;

    /// The dense Jacobian, one column a pass.
    fn column_by_column(circuit: &Circuit, inputs: &Inputs, states: &[f64]) -> Vec<f64> {
        let n = circuit.state_count();
        (0..n)
            .flat_map(|column| {
                let y: Vec<Dual<1>> = (0..n)
                    .map(|i| Dual::variable(states[i], i.wrapping_sub(column)))
                    .collect();
                let mut dy = vec![Dual::constant(0.0); n];
                circuit.evaluate(inputs, &y, &mut dy, &mut Unobserved);
                dy.into_iter().map(|rate| rate.slopes[0])
            })
            .collect()
    }

    /// Widths are chosen for these: a part that joins what stood apart shows here first.
    #[test]
    fn circuits_fit_the_widths() {
        for (name, mut parts) in variants() {
            let few = Circuit::new(parts.clone()).unwrap().sparsity.groups;
            assert!(few <= WIDE, "{name} takes {few} groups");
            if name == "orchard carrier" {
                assert!(few <= NARROW, "{name} takes {few} groups");
            }
            parts.line.line.segments = 50;
            let long = Circuit::new(parts).unwrap().sparsity.groups;
            assert!(long <= few.max(NARROW), "{name}, long line: {long} groups");
        }
    }

    /// The same by passes too narrow for all groups.
    fn in_narrow_passes(circuit: &Circuit, inputs: &Inputs, states: &[f64]) -> Vec<f64> {
        let n = circuit.state_count();
        let mut jacobian = vec![0.0; n * n];
        for first in (0..circuit.sparsity.groups).step_by(3) {
            circuit.group_entries::<3, MOST_STATES>(inputs, states, first, &mut jacobian);
        }
        jacobian
    }

    /// The same operations on each slope, so not even the rounding may differ.
    #[test]
    fn groups_give_what_single_columns_give() {
        for (name, parts) in variants() {
            let c = Circuit::new(parts).unwrap();
            let n = c.state_count();
            let mut dice = Dice(17);
            let mut jacobian = vec![f64::NAN; n * n];
            for sample in 0..500 {
                let y = working_state(&c, &mut dice);
                let inputs = working_inputs(&mut dice);
                c.jacobian(&inputs, &y, &mut jacobian);
                let single = column_by_column(&c, &inputs, &y);
                let narrow = in_narrow_passes(&c, &inputs, &y);
                for place in 0..n * n {
                    let (got, passes, want) = (jacobian[place], narrow[place], single[place]);
                    let (row, column) = (place % n, place / n);
                    let same = |other: f64| (other - want).abs() < f64::MIN_POSITIVE;
                    assert!(
                        same(got) && same(passes),
                        "{name}, sample {sample}: d {} / d {}: {got} in one pass and {passes} in \
                         several against {want}",
                        c.states()[row].name,
                        c.states()[column].name
                    );
                }
            }
        }
    }
}
