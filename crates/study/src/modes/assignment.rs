//! Matching two sets of equal size at the least total cost.

/// Costs beyond this, and those that are no number, count as this: every row finds a column.
const DEAREST: f64 = 1e100;

/// For each row of a square matrix of costs (row by row) the column it is matched to, so that the
/// sum of the costs is least.
///
/// # Source
/// Kuhn, *The Hungarian Method for the Assignment Problem*, Naval Research Logistics Quarterly 2
/// (1955) 83, in the form with potentials and shortest augmenting paths.
pub(super) fn assign(costs: &[f64], size: usize) -> Vec<usize> {
    // Rows and columns are counted from 1 inside; 0 stands for none.
    let (mut of_row, mut of_column) = (vec![0.0; size + 1], vec![0.0; size + 1]);
    let mut row_of = vec![0; size + 1];
    let mut came_from = vec![0; size + 1];
    for row in 1..=size {
        row_of[0] = row;
        let mut column = 0;
        let mut least = vec![f64::INFINITY; size + 1];
        let mut done = vec![false; size + 1];
        while row_of[column] != 0 {
            done[column] = true;
            let here = row_of[column];
            let (mut step, mut next) = (f64::INFINITY, 0);
            for j in (1..=size).filter(|&j| !done[j]) {
                let cost =
                    costs[(here - 1) * size + j - 1].min(DEAREST) - of_row[here] - of_column[j];
                if cost < least[j] {
                    least[j] = cost;
                    came_from[j] = column;
                }
                if least[j] < step {
                    step = least[j];
                    next = j;
                }
            }
            for j in 0..=size {
                if done[j] {
                    of_row[row_of[j]] += step;
                    of_column[j] -= step;
                } else {
                    least[j] -= step;
                }
            }
            column = next;
        }
        while column != 0 {
            let before = came_from[column];
            row_of[column] = row_of[before];
            column = before;
        }
    }
    let mut columns = vec![0; size];
    for column in 1..=size {
        columns[row_of[column] - 1] = column - 1;
    }
    columns
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Every permutation of four tried by hand.
    #[test]
    fn finds_the_cheapest_of_all_permutations() {
        let mut seed = 7_u64;
        let mut random = || {
            seed = seed.wrapping_mul(6_364_136_223_846_793_005).wrapping_add(1);
            (seed >> 40) as f64
        };
        for _ in 0..50 {
            let costs: Vec<f64> = (0..16).map(|_| random()).collect();
            let total = |columns: &[usize]| -> f64 {
                columns
                    .iter()
                    .enumerate()
                    .map(|(r, &c)| costs[4 * r + c])
                    .sum()
            };
            let found = assign(&costs, 4);
            let mut best = f64::INFINITY;
            for a in 0..4 {
                for b in (0..4).filter(|&b| b != a) {
                    for c in (0..4).filter(|&c| c != a && c != b) {
                        best = best.min(total(&[a, b, c, 6 - a - b - c]));
                    }
                }
            }
            assert!(
                (total(&found) - best).abs() < 1e-9,
                "{found:?} of {costs:?}"
            );
        }
    }
}
