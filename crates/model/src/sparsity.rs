//! Which entries of the Jacobian can be other than zero, and which of its columns share a pass.
//!
//! A state acts on a handful of rates. Columns that no row has in common are put into one group
//! and differentiated together: a group's slope of a row is the entry of the one column that the
//! row has in that group. That is exact, not an estimate.

/// The pattern of a Jacobian with its columns grouped.
///
/// # Source
/// Curtis, Powell & Reid, *On the Estimation of Sparse Jacobian Matrices*, J. Inst. Mathematics
/// and its Applications 13, 1974; Griewank & Walther, *Evaluating Derivatives*, 2nd ed. 2008, ch. 8.
#[derive(Debug, Clone, Default, PartialEq)]
pub(crate) struct Sparsity {
    /// Number of groups.
    pub(crate) groups: usize,
    /// Group of each column.
    pub(crate) group_of: Vec<usize>,
    /// Every entry that can be other than zero.
    pub(crate) entries: Vec<Entry>,
}

/// One entry of the Jacobian.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) struct Entry {
    /// Row.
    pub(crate) row: usize,
    /// Group of its column.
    pub(crate) group: usize,
    /// Place in the column-major matrix.
    pub(crate) place: usize,
}

impl Sparsity {
    /// From the columns that each row has entries in: bit `j` of row `i` stands for the entry
    /// `i, j`.
    pub(crate) fn new(rows: &[u128]) -> Self {
        let n = rows.len();
        let group_of = group(&clashes(rows));
        let entries = (0..n)
            .flat_map(|column| (0..n).map(move |row| (row, column)))
            .filter(|&(row, column)| has(rows[row], column))
            .map(|(row, column)| Entry {
                row,
                group: group_of[column],
                place: column * n + row,
            })
            .collect();
        Self {
            groups: group_of.iter().max().map_or(0, |last| last + 1),
            group_of,
            entries,
        }
    }
}

fn has(set: u128, member: usize) -> bool {
    set >> member & 1 == 1
}

/// The columns that share a row with each column, itself left out.
fn clashes(rows: &[u128]) -> Vec<u128> {
    (0..rows.len())
        .map(|column| {
            let with: u128 = rows
                .iter()
                .filter(|&&row| has(row, column))
                .fold(0, |all, row| all | row);
            with & !(1 << column)
        })
        .collect()
}

/// Groups without a clash inside, few of them: next comes always the column whose clashes already
/// sit in the most groups, into the first group that is free for it.
///
/// # Source
/// Brelaz, *New Methods to Color the Vertices of a Graph*, Communications of the ACM 22(4), 1979.
fn group(clashes: &[u128]) -> Vec<usize> {
    let n = clashes.len();
    let mut group_of = vec![0; n];
    // Groups that each column cannot join.
    let mut barred = vec![0u128; n];
    let mut left: Vec<usize> = (0..n).collect();
    while let Some(next) = (0..left.len()).max_by_key(|&at| {
        let column = left[at];
        // Of equals the first, so that the order is the same on every machine.
        let first = n - column;
        (
            barred[column].count_ones(),
            clashes[column].count_ones(),
            first,
        )
    }) {
        let column = left.swap_remove(next);
        let chosen = barred[column].trailing_ones() as usize;
        group_of[column] = chosen;
        for other in (0..n).filter(|&other| has(clashes[column], other)) {
            barred[other] |= 1 << chosen;
        }
    }
    group_of
}

#[cfg(test)]
mod tests {
    use super::*;

    fn assert_sound(rows: &[u128], sparsity: &Sparsity) {
        for (i, &row) in rows.iter().enumerate() {
            let mut taken = 0u128;
            for column in (0..rows.len()).filter(|&j| has(row, j)) {
                let group = sparsity.group_of[column];
                assert!(!has(taken, group), "row {i} has two columns of {group}");
                taken |= 1 << group;
            }
        }
    }

    #[test]
    fn a_band_takes_as_many_groups_as_it_is_wide() {
        let n = 128;
        let rows: Vec<u128> = (0..n)
            .map(|i: usize| (i.saturating_sub(1)..(i + 2).min(n)).fold(0, |row, j| row | (1 << j)))
            .collect();
        let sparsity = Sparsity::new(&rows);
        assert_sound(&rows, &sparsity);
        assert_eq!(sparsity.groups, 3, "tridiagonal");
        assert_eq!(sparsity.entries.len(), 3 * n - 2, "every entry");
        let last = sparsity.entries[3 * n - 3];
        assert_eq!((last.row, last.place), (n - 1, n * n - 1), "column-major");
    }

    #[test]
    fn one_full_row_takes_a_group_for_each_column() {
        let n = 128;
        let mut rows: Vec<u128> = (0..n).map(|i| 1 << i).collect();
        rows[5] = u128::MAX;
        let sparsity = Sparsity::new(&rows);
        assert_sound(&rows, &sparsity);
        assert_eq!(sparsity.groups, n, "nothing to share");
    }

    #[test]
    fn columns_without_entries_share_a_group() {
        assert_eq!(Sparsity::new(&[0, 0, 1]).groups, 1, "one for all");
    }
}
