//! Smooth stand-ins for kinks (M3).

use crate::real::Real;

/// M3: smooth positive part, `0.5 (z + sqrt(z^2 + w^2))`; `width` in the unit of `z`, positive.
#[inline(always)]
pub fn ramp<S: Real>(z: S, width: f64) -> S {
    (z + (z * z + width * width).sqrt()) * 0.5
}

/// Derivative of [`ramp`] with respect to `z`, `0.5 (1 + z / sqrt(z^2 + w^2))`.
#[inline(always)]
pub fn ramp_slope<S: Real>(z: S, width: f64) -> S {
    (z / (z * z + width * width).sqrt() + 1.0) * 0.5
}

/// M3: quintic smooth step, 0 below `u = 0`, 1 above `u = 1`, first and second derivative 0 at
/// both ends.
///
/// # Source
/// Perlin, *Improving Noise*, ACM Trans. Graphics 21(3), 2002: `6 u^5 - 15 u^4 + 10 u^3`.
#[inline(always)]
pub fn smooth_step<S: Real>(u: S) -> S {
    let v = u.value();
    if v <= 0.0 {
        S::constant_here(0.0, [u])
    } else if v >= 1.0 {
        S::constant_here(1.0, [u])
    } else {
        let value = v * v * v * (v * (v * 6.0 - 15.0) + 10.0);
        let w = v * (1.0 - v);
        u.chain(value, 30.0 * w * w)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::dual::Dual;

    #[test]
    fn ramp_is_half_its_width_at_zero_and_never_negative() {
        assert!((ramp(0.0, 4.0) - 2.0).abs() < 1e-15, "half the width");
        for z in [-1e3, -1.0, -1e-3] {
            assert!(ramp(z, 1e-3) >= 0.0, "at {z}");
        }
    }

    #[test]
    fn smooth_step_is_odd_about_its_middle() {
        for u in [0.1, 0.25, 0.4] {
            assert!(
                (smooth_step(u) + smooth_step(1.0 - u) - 1.0).abs() < 1e-14,
                "at {u}"
            );
        }
        let d = smooth_step(Dual::<1>::variable(0.5, 0));
        assert!((d.slopes[0] - 1.875).abs() < 1e-14, "largest slope 15/8");
    }
}
