"""Eigenvalues and frequency responses of the circuit by LAPACK, through numpy and scipy.

    python3 -m venv venv && venv/bin/pip install numpy==2.4.6 scipy==1.17.1
    cargo run -p helmsplit-acceptance --example linear_matrices > matrices.json
    venv/bin/python tests/reference/linear_reference.py matrices.json > tests/reference/linear_reference.json

The matrices come from the program (exact Jacobian, SI); everything that is done with them here is
not the program's: scaling by powers of two (scipy.linalg.matrix_balance, LAPACK gebal), eigenvalues
(scipy.linalg.eigvals, LAPACK geev), response (numpy.linalg.solve, LAPACK gesv).
"""

import json
import sys

import numpy as np
import scipy
import scipy.linalg

WANTED = {"numpy": "2.4.6", "scipy": "1.17.1"}


def main() -> None:
    have = {"numpy": np.__version__, "scipy": scipy.__version__}
    if have != WANTED:
        sys.exit(f"written for {WANTED}, found {have}")
    with open(sys.argv[1], encoding="utf-8") as file:
        matrices = json.load(file)
    points = [point(p, matrices["frequencies"], matrices["outputs"]) for p in matrices["points"]]
    json.dump({"made_with": have, "points": points}, sys.stdout, indent=1)
    print()


def point(given: dict, frequencies: list, outputs: list) -> dict:
    a = np.array(given["a"])
    b = np.array(given["b"]).T
    balanced, (scale, _) = scipy.linalg.matrix_balance(a, permute=False, separate=True)
    values = scipy.linalg.eigvals(balanced)
    order = np.lexsort((values.imag, values.real))
    rows = [given["states"].index(name) for name in outputs]
    responses = np.zeros((b.shape[1], len(rows), len(frequencies)), dtype=complex)
    for k, frequency in enumerate(frequencies):
        shifted = 2j * np.pi * frequency * np.eye(len(a)) - balanced
        motion = np.linalg.solve(shifted, b / scale[:, None]) * scale[:, None]
        responses[:, :, k] = motion[rows, :].T
    pair = lambda v: [float(v.real), float(v.imag)]
    return {
        "name": given["name"],
        "eigenvalues": [pair(values[i]) for i in order],
        "responses": [[[pair(v) for v in line] for line in block] for block in responses],
    }


main()
