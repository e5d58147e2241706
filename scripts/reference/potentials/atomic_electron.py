"""Reference values of the electron scattering factor with its Mott-Bethe tail, for server/physics/potentials/atomic-electron.ts.

Run:  python3 scripts/reference/potentials/atomic_electron.py        (Debian package: python3-mpmath)
Reads the coefficients in server/physics/tables, writes tests/reference/potentials/atomicElectron.json; a value is high + low.
Below s = 2 per angstrom every value is compared with mpmath's quadrature of the radial Gaussians before it is written.
"""

import json
import pathlib

from mpmath import exp, mp, mpf, pi, quad, sin, sqrt

mp.dps = 50
ROOT = pathlib.Path(__file__).resolve().parents[3]
TABLES = ROOT / "server" / "physics" / "tables"
OUT = ROOT / "tests" / "reference" / "potentials"
BOHR = mpf("0.529177210544")
S = [0.0, 1e-4, 0.05, 0.1, 0.5, 1.0, 1.5, 1.99, 2.01, 2.2, 2.49, 2.99, 3.01, 4.0, 5.9, 6.1, 20.0]


def atoms(path):
    return {row[0]: row[1:] for row in json.loads((TABLES / path).read_text())["atoms"]}


ELECTRON = atoms("electron-scattering/itc-c-4.3.2.2.json")
XRAY = atoms("xray-form-factors/waasmaier-kirfel-1995.json")
ORDER = list(ELECTRON)


def gaussians(a, b, s):
    return sum(mpf(x) * exp(-mpf(y) * s * s) for x, y in zip(a, b))


def fit(symbol, s):
    return gaussians(*ELECTRON[symbol][:2], s)


def mott_bethe(symbol, s):
    a, b, c = XRAY[symbol][:3]
    electrons = gaussians(a, b, min(s, mpf(6))) + mpf(c)
    if s > 6:
        electrons *= (6 / s) ** 2
    return (ORDER.index(symbol) + 1 - electrons) / (8 * pi**2 * BOHR * s * s)


def factor(symbol, s):
    if s <= 2:
        return fit(symbol, s)
    x = min(mpf(1), s - 2)
    ratio = fit(symbol, mpf(2)) / mott_bethe(symbol, mpf(2))
    return mott_bethe(symbol, s) * (ratio + (1 - ratio) * x * x * (3 - 2 * x))


def by_quadrature(symbol, q):
    with mp.workdps(30):
        total = mpf(0)
        for a, b in zip(*ELECTRON[symbol][:2]):
            w = sqrt(mpf(b)) / (2 * pi)
            g = lambda r: exp(-((r / w) ** 2)) * (r * r if q == 0 else r * sin(q * r) / q)
            cuts = [k * w for k in (0, 0.5, 1, 1.5, 2, 3, 4, 6, 9)]
            total += 4 * mpf(a) / (sqrt(pi) * w**3) * quad(g, cuts)
        return total


def main():
    rows = []
    for symbol in ("H", "C", "Al", "Cu", "Au", "Cf"):
        for argument in S:
            q = float(4 * pi * mpf(argument))
            s = mpf(q) / (4 * pi)
            value = factor(symbol, s)
            if argument < 2:
                assert abs(by_quadrature(symbol, mpf(q)) - value) < mpf(10) ** -20, (symbol, argument)
            high = float(value)
            rows.append({"element": symbol, "q": q, "high": high, "low": float(value - mpf(high))})
    head = {"form": "atomicElectron", "generator": "scripts/reference/potentials/atomic_electron.py", "quantity": "f_e(q/4π) = high + low in angstrom; q in 1/angstrom"}
    lines = ",\n    ".join(json.dumps(row) for row in rows)
    (OUT / "atomicElectron.json").write_text(json.dumps(head, indent=2)[:-2] + ',\n  "rows": [\n    ' + lines + "\n  ]\n}\n")
    print(len(rows), "rows")


main()
