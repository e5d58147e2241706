"""Reference values of digamma and trigamma of complex argument for server/physics/numerics, to 30 digits.

Run:  python3 scripts/reference/numerics/complex_polygamma.py        (Debian package: python3-mpmath)
Writes tests/reference/numerics/complex-polygamma.json; each part is high + low, two doubles. mpmath's values are compared with
the series of the functions, summed with the rest by Euler-Maclaurin, before they are written.
"""

import json
import pathlib

from mpmath import mp, mpc, mpf, nsum, inf, psi, euler

mp.dps = 60
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "numerics"
REAL = [1e-3, 0.25, 1.0, 1.5, 7.0, 14.9, 15.1, 200.0]
IMAGINARY = [0.0, 1e-12, 1e-3, 0.5, 1.0, -1.0, 4.0, -14.9, 15.1, 60.0, -1e4]


def split(value):
    high = float(value)
    return {"high": high, "low": float(value - mpf(high))}


def confirmed(x, y):
    """The series, where Euler-Maclaurin sums them quickly."""
    z = mpc(x, y)
    with mp.workdps(25):
        first = nsum(lambda k: 1 / (k + 1) - 1 / (k + z), [0, inf], method="e") - euler
        second = nsum(lambda k: 1 / (k + z) ** 2, [0, inf], method="e")
    assert abs(first - psi(0, z)) < 1e-18 * (1 + abs(psi(0, z))), (x, y)
    assert abs(second - psi(1, z)) < 1e-18 * abs(psi(1, z)), (x, y)


def rows():
    for x in REAL:
        for y in IMAGINARY:
            z = mpc(mpf(x), mpf(y))
            if abs(y) <= 4 and x < 20:
                confirmed(mpf(x), mpf(y))
            values = {"digamma": psi(0, z), "trigamma": psi(1, z)}
            yield {"x": x, "y": y, **{name: {"re": split(v.real), "im": split(v.imag)} for name, v in values.items()}}


def main():
    entries = list(rows())
    head = {"generator": "scripts/reference/numerics/complex_polygamma.py", "quantity": "psi(x + iy) and psi'(x + iy); each part is high + low"}
    lines = ",\n    ".join(json.dumps(entry) for entry in entries)
    OUT.mkdir(parents=True, exist_ok=True)
    (OUT / "complex-polygamma.json").write_text(json.dumps(head, indent=2)[:-2] + ',\n  "rows": [\n    ' + lines + "\n  ]\n}\n")
    print(len(entries), "rows")


main()
