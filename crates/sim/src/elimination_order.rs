//! In which order to eliminate the unknowns of a mostly empty matrix.

/// Unknowns in the order of their elimination, each with the later ones that it is coupled to by
/// then, those that elimination itself couples included.
#[derive(Debug, Default, Clone, PartialEq, Eq)]
pub(crate) struct EliminationOrder {
    /// The unknowns in order.
    pub(crate) order: Vec<usize>,
    /// Where the partners of the unknown eliminated in step `k` start; one more for the end.
    starts: Vec<usize>,
    partners: Vec<usize>,
}

impl EliminationOrder {
    /// Orders the unknowns of a square matrix, whose entry in row `i` and column `j` may be other
    /// than zero where `coupled[i * size + j]`, by least degree: each step takes the unknown with
    /// the fewest partners left, the first of equals.
    ///
    /// # Source
    /// W. F. Tinney & J. W. Walker, Direct solutions of sparse network equations by optimally
    /// ordered triangular factorization, Proceedings of the IEEE 55 (1967) 1801-1809, scheme 2.
    pub(crate) fn of_least_degree(size: usize, coupled: &[bool]) -> Self {
        let mut graph = vec![false; size * size];
        for i in 0..size {
            for j in 0..size {
                graph[i * size + j] = coupled[i * size + j] || coupled[j * size + i];
            }
        }
        let mut left = vec![true; size];
        let mut found = Self {
            order: Vec::with_capacity(size),
            starts: vec![0],
            partners: Vec::new(),
        };
        for _ in 0..size {
            let partners = |unknown: usize| {
                let (graph, left) = (&graph, &left);
                (0..size).filter(move |&j| j != unknown && left[j] && graph[unknown * size + j])
            };
            let least = (0..size)
                .filter(|&unknown| left[unknown])
                .min_by_key(|&unknown| partners(unknown).count());
            let Some(unknown) = least else { break };
            let clique: Vec<usize> = partners(unknown).collect();
            for &i in &clique {
                for &j in &clique {
                    graph[i * size + j] = true;
                }
            }
            left[unknown] = false;
            found.order.push(unknown);
            found.partners.extend(clique);
            found.starts.push(found.partners.len());
        }
        found
    }

    /// Places of the partners of step `step`, in [`Self::partners`] and in any list kept beside.
    #[inline]
    pub(crate) fn places(&self, step: usize) -> std::ops::Range<usize> {
        self.starts[step]..self.starts[step + 1]
    }

    /// All partners, step by step.
    #[inline]
    pub(crate) fn partners(&self) -> &[usize] {
        &self.partners
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn an_arrow_is_eliminated_from_its_tip_back_without_fill() {
        // The first unknown is coupled to all others, and they to nothing else.
        let size = 6;
        let mut coupled = vec![false; size * size];
        for i in 0..size {
            coupled[i * size] = true;
            coupled[i * size + i] = true;
        }
        let found = EliminationOrder::of_least_degree(size, &coupled);
        assert_eq!(
            found.partners().len(),
            size - 1,
            "one partner each: {found:?}"
        );
        let mut all = found.order.clone();
        all.sort_unstable();
        assert_eq!(all, (0..size).collect::<Vec<_>>(), "each unknown once");
    }
}
