//! Prints the matrices of the linear equations at several operating points as JSON, for
//! `tests/reference/linear_reference.py`.

use std::io::Write;

use helmsplit_acceptance::linear_points::{FREQUENCIES, OUTPUTS, linear_points, matrices};
use helmsplit_acceptance::trouble::Tried;

fn main() -> Tried<()> {
    let points: Vec<_> = linear_points()
        .iter()
        .map(matrices)
        .collect::<Tried<Vec<_>>>()?;
    let all = serde_json::json!({
        "frequencies": FREQUENCIES,
        "outputs": OUTPUTS,
        "points": points,
    });
    writeln!(std::io::stdout().lock(), "{}", serde_json::to_string(&all)?)?;
    Ok(())
}
