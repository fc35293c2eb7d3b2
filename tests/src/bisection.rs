//! Roots of monotone functions by bisection.

/// Halvings: the interval shrinks below the last bit of any sensible pair of ends.
const HALVINGS: u32 = 200;

/// The argument between `low` and `high` at which `f` changes sign; not a number when both ends
/// have one sign.
pub fn root(low: f64, high: f64, f: impl Fn(f64) -> f64) -> f64 {
    let (mut low, mut high) = (low, high);
    let rising = f(low) < 0.0;
    if rising == (f(high) < 0.0) {
        return f64::NAN;
    }
    for _ in 0..HALVINGS {
        let middle = 0.5 * (low + high);
        if (f(middle) < 0.0) == rising {
            low = middle;
        } else {
            high = middle;
        }
    }
    0.5 * (low + high)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn finds_a_root_and_refuses_an_interval_without_one() {
        assert!(
            (root(0.0, 2.0, |x| x * x - 2.0) - 2f64.sqrt()).abs() < 1e-15,
            "square root of 2"
        );
        assert!(root(2.0, 3.0, |x| x * x - 2.0).is_nan(), "no root");
    }
}
