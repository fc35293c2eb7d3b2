//! Eigenvalues and eigenvectors of the exact Jacobian, scaled and balanced.

use nalgebra::linalg::Schur;
use nalgebra::linalg::balancing::balance_parlett_reinsch;
use nalgebra::{Complex, DMatrix, DVector};

use super::error::ModesError;
use crate::operating::Frozen;

/// Sweeps that the iteration for the eigenvalues may take; it needs two or three a state.
const MOST_SWEEPS: usize = 20_000;

/// Inverse iterations: the shift is an eigenvalue already, so that one does nearly all.
const INVERSE_ITERATIONS: usize = 3;

/// Distance of the shift from the eigenvalue, relative to the size of the matrix: keeps the
/// equations solvable, and is far below the distance of any two modes that can be told apart.
const SHIFT: f64 = 1e-14;

/// The equations of a circuit near an equilibrium: `z' = A z` in balanced units, states that are
/// held left out.
#[derive(Debug, Clone)]
pub(crate) struct Linear {
    /// Indices in the circuit of the states that are free.
    pub(crate) free: Vec<usize>,
    /// Size of each balanced unit, SI: state = unit times balanced state.
    pub(crate) units: Vec<f64>,
    /// The balanced matrix, 1/s.
    pub(crate) matrix: DMatrix<f64>,
}

impl Linear {
    /// The equations near `state`.
    ///
    /// States are measured in their typical sizes first, then balanced (Parlett & Reinsch):
    /// pascals beside metres would leave the small eigenvalues to rounding.
    pub(crate) fn at(frozen: &Frozen, state: &[f64]) -> Result<Self, ModesError> {
        let circuit = frozen.circuit();
        let n = circuit.state_count();
        let mut jacobian = vec![0.0; n * n];
        circuit.jacobian(frozen.inputs(), state, &mut jacobian);
        let free: Vec<usize> = (0..n).filter(|i| !frozen.held().contains(i)).collect();
        let infos = circuit.states();
        let mut matrix = DMatrix::from_fn(free.len(), free.len(), |i, j| {
            let (row, column) = (free[i], free[j]);
            jacobian[column * n + row] * infos[column].scale / infos[row].scale
        });
        if let Some(row) = (0..free.len()).find(|&i| matrix.row(i).iter().any(|v| !v.is_finite())) {
            return Err(ModesError::NotFinite {
                state: infos[free[row]].label.clone(),
            });
        }
        let balance = balance_parlett_reinsch(&mut matrix);
        let units = free
            .iter()
            .zip(balance.iter())
            .map(|(&i, factor)| infos[i].scale * factor)
            .collect();
        Ok(Self {
            free,
            units,
            matrix,
        })
    }

    /// All eigenvalues, 1/s; complex ones come in conjugate pairs.
    pub(crate) fn eigenvalues(&self) -> Result<Vec<Complex<f64>>, ModesError> {
        let size = self.free.len();
        let schur = Schur::try_new(self.matrix.clone(), f64::EPSILON, MOST_SWEEPS)
            .ok_or(ModesError::NoConvergence { size })?;
        Ok(schur.complex_eigenvalues().iter().copied().collect())
    }

    /// Right and left eigenvector of an eigenvalue in balanced units, each of length 1, and the
    /// eigenvalue improved by both (the two-sided Rayleigh quotient).
    ///
    /// # Source
    /// Inverse iteration: Wilkinson, *The Algebraic Eigenvalue Problem*, 1965, ch. 9; two-sided
    /// quotient: Ostrowski, Arch. Rational Mech. Anal. 3 (1959) 325.
    pub(crate) fn vectors(&self, eigenvalue: Complex<f64>) -> Vectors {
        let size = self.free.len();
        let largest = self.matrix.amax().max(f64::MIN_POSITIVE);
        let shift = eigenvalue + Complex::new(SHIFT * largest, SHIFT * largest);
        let shifted = DMatrix::from_fn(size, size, |i, j| {
            Complex::from(self.matrix[(i, j)]) - if i == j { shift } else { Complex::from(0.0) }
        });
        let right = inverse_iteration(&shifted);
        let left = inverse_iteration(&shifted.transpose());
        let moved = self.matrix.map(Complex::from) * &right;
        // Not conjugated: left eigenvectors of a real matrix go with `w A = lambda w`.
        let (above, below) = (left.dot(&moved), left.dot(&right));
        let improved = above / below;
        let near = (improved - eigenvalue).norm() <= 1e-6 * largest;
        Vectors {
            right,
            left,
            eigenvalue: if near && improved.is_finite() {
                improved
            } else {
                eigenvalue
            },
        }
    }
}

/// An eigenvalue with its vectors.
#[derive(Debug, Clone)]
pub(crate) struct Vectors {
    pub(crate) right: DVector<Complex<f64>>,
    pub(crate) left: DVector<Complex<f64>>,
    pub(crate) eigenvalue: Complex<f64>,
}

fn inverse_iteration(shifted: &DMatrix<Complex<f64>>) -> DVector<Complex<f64>> {
    let size = shifted.nrows();
    let lu = shifted.clone().lu();
    // No special direction: components that differ, so that none is orthogonal by symmetry.
    let mut vector = DVector::from_fn(size, |i, _| {
        Complex::new(1.0 + 0.37 * (i as f64).sin(), 0.21 * (i as f64).cos())
    });
    for _ in 0..INVERSE_ITERATIONS {
        match lu.solve(&vector) {
            Some(next) if next.iter().all(|v| v.is_finite()) => {
                let norm = next.norm();
                vector = next.unscale(norm);
            }
            // Exactly singular: the vector of the step before is as good as it gets.
            _ => break,
        }
    }
    let norm = vector.norm();
    vector.unscale(norm)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn linear(rows: &[f64], size: usize) -> Linear {
        Linear {
            free: (0..size).collect(),
            units: vec![1.0; size],
            matrix: DMatrix::from_row_slice(size, size, rows),
        }
    }

    /// Companion matrix of `(s + 1)(s^2 + 2 s + 26)`: roots -1 and -1 +- 5i.
    #[test]
    fn eigenvalues_and_vectors_of_a_companion_matrix() {
        let linear = linear(&[-3.0, -28.0, -26.0, 1.0, 0.0, 0.0, 0.0, 1.0, 0.0], 3);
        let mut found = linear.eigenvalues().unwrap();
        found.sort_by(|a, b| a.im.total_cmp(&b.im));
        for (value, (re, im)) in found.iter().zip([(-1.0, -5.0), (-1.0, 0.0), (-1.0, 5.0)]) {
            assert!((value - Complex::new(re, im)).norm() < 1e-12, "{value}");
            let vectors = linear.vectors(*value);
            assert!((vectors.eigenvalue - value).norm() < 1e-12, "{vectors:?}");
            // The right vector of a companion matrix is (s^2, s, 1).
            let v = &vectors.right;
            assert!((v[0] / v[1] - value).norm() < 1e-9, "{v}");
            assert!((v[1] / v[2] - value).norm() < 1e-9, "{v}");
        }
    }

    #[test]
    fn rows_of_zeros_give_neutral_modes() {
        let linear = linear(&[0.0, 0.0, 1.0, -2.0], 2);
        let mut found = linear.eigenvalues().unwrap();
        found.sort_by(|a, b| a.re.total_cmp(&b.re));
        assert!((found[0].re + 2.0).abs() < 1e-14, "{found:?}");
        assert!(found[1].norm() < 1e-14, "{found:?}");
    }
}
