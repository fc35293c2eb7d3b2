//! Labels that want a place and must not overlap.

/// Moves `wanted` places apart until they stand at least `gap` from each other and inside `low`
/// to `high`, with the least sum of squared moves. `None` if they do not fit. Order among equals
/// is the order given.
///
/// # Source
/// Pool adjacent violators: Ayer et al. (1955), Annals of Mathematical Statistics 26, 641-647.
pub(super) fn spread(wanted: &[f64], gap: f64, (low, high): (f64, f64)) -> Option<Vec<f64>> {
    let count = wanted.len();
    let span = gap * count.saturating_sub(1) as f64;
    if span > high - low {
        return None;
    }
    let mut order: Vec<usize> = (0..count).collect();
    order.sort_by(|&a, &b| wanted[a].total_cmp(&wanted[b]));
    // With the gaps taken out, "apart" becomes "never falling".
    let mut pools: Vec<Pool> = Vec::new();
    for (rank, &index) in order.iter().enumerate() {
        let mut pool = Pool {
            sum: wanted[index] - gap * rank as f64,
            count: 1,
        };
        while let Some(before) = pools.pop_if(|before| before.mean() > pool.mean()) {
            pool.sum += before.sum;
            pool.count += before.count;
        }
        pools.push(pool);
    }
    let means = pools
        .iter()
        .flat_map(|pool| std::iter::repeat_n(pool.mean(), pool.count));
    let mut placed = vec![0.0; count];
    for (rank, (mean, index)) in means.zip(order).enumerate() {
        placed[index] = mean.clamp(low, high - span) + gap * rank as f64;
    }
    Some(placed)
}

/// Labels that stand side by side.
struct Pool {
    sum: f64,
    count: usize,
}

impl Pool {
    fn mean(&self) -> f64 {
        self.sum / self.count as f64
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use proptest::prelude::*;

    #[test]
    fn leaves_what_fits_and_centres_what_meets() {
        assert_eq!(
            spread(&[80.0, 10.0], 13.0, (0.0, 100.0)),
            Some(vec![80.0, 10.0]),
            "apart"
        );
        let placed = spread(&[50.0, 50.0, 50.0], 10.0, (0.0, 100.0));
        assert_eq!(placed, Some(vec![40.0, 50.0, 60.0]), "in the order given");
        let placed = spread(&[100.0, 100.0], 10.0, (0.0, 100.0));
        assert_eq!(placed, Some(vec![90.0, 100.0]), "pushed back in");
        assert_eq!(spread(&[1.0; 5], 13.0, (0.0, 50.0)), None, "too many");
        assert_eq!(spread(&[], 13.0, (0.0, 50.0)), Some(vec![]), "none");
    }

    proptest! {
        #[test]
        fn never_overlaps_never_leaves(
            wanted in prop::collection::vec(-20.0..220.0_f64, 0..12),
            gap in 1.0..15.0_f64,
        ) {
            let placed = spread(&wanted, gap, (0.0, 200.0)).unwrap();
            let mut sorted = placed.clone();
            sorted.sort_by(f64::total_cmp);
            prop_assert!(sorted.windows(2).all(|p| p[1] - p[0] >= gap - 1e-9), "overlap: {sorted:?}");
            prop_assert!(placed.iter().all(|p| (-1e-9..=200.0 + 1e-9).contains(p)), "outside");
            for (a, b) in (0..wanted.len()).flat_map(|a| (0..wanted.len()).map(move |b| (a, b))) {
                if wanted[a] < wanted[b] {
                    prop_assert!(placed[a] < placed[b], "labels crossed");
                }
            }
        }
    }
}
