//! The best change of two dimensions together.

use super::search::Direction;
use super::{Fault, is_usable};
use crate::influence::Influence;

/// Of all pairs, the one whose linear guess is smallest: with sensitivities `S_i` and `S_j` the
/// smallest `a^2 + b^2` with `S_i a + S_j b = gap` is `gap / sqrt(S_i^2 + S_j^2)`, so it is the
/// two largest sensitivities, each moved in proportion to its own.
pub(super) fn best_pair(influence: &Influence, fault: &Fault, gap: f64) -> Option<Direction> {
    // Rows stand in the order of their sensitivities.
    let mut rows = influence.rows.iter().filter(|row| is_usable(row));
    let (first, second) = (rows.next()?, rows.next()?);
    let size = first.sensitivity.hypot(second.sensitivity);
    let leg = |row: &crate::influence::Row| {
        let share = gap.signum() * row.sensitivity / size;
        (row.parameter, row.value, share)
    };
    Some(Direction {
        legs: vec![leg(first), leg(second)],
        guess: gap.abs() / size,
        reach: fault.largest_ratio.ln(),
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::check::CheckId;
    use crate::figure::Figure;
    use crate::influence::{Row, Scale};
    use helmsplit_scenario::parameter::{valve, valve_edges};

    #[test]
    fn the_pair_moves_along_the_gradient() {
        let row = |parameter, sensitivity| Row {
            parameter,
            value: 1.0,
            scale: Scale::Value,
            sensitivity,
            uncertainty: 0.01,
            step: 0.01,
            resolved: true,
            missing: None,
        };
        let influence = Influence {
            figure: Figure::Check(CheckId::Overshoot),
            base: 0.3,
            noise: 1e-5,
            rows: vec![
                row(valve_edges::DISC_HOLE_DIAMETER, 4.0),
                row(valve::SPRING_RATE, -3.0),
                row(valve::SPOOL_DIAMETER, 0.5),
            ],
        };
        let fault = Fault::new(CheckId::Overshoot, Vec::new());
        let way = best_pair(&influence, &fault, -0.5).unwrap();
        assert!((way.guess - 0.1).abs() < 1e-12, "0.5 / 5: {way:?}");
        let shares: Vec<f64> = way.legs.iter().map(|leg| leg.2).collect();
        assert!((shares[0] + 0.8).abs() < 1e-12, "{shares:?}");
        assert!((shares[1] - 0.6).abs() < 1e-12, "{shares:?}");
    }
}
