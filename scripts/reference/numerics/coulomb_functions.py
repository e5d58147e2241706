"""Reference values of Coulomb functions for server/physics/numerics, to 30 digits.

Run:  python3 scripts/reference/numerics/coulomb_functions.py        (Debian packages: python3-mpmath, libgsl27; some minutes)
Writes tests/reference/numerics/coulomb-functions.json; each value is (high + low)·2^power. F comes from Kummer's function, G from
Tricomi's (DLMF 33.2.3, 33.2.7), derivatives from the recurrence 33.4.4; a row is written only where F'G - FG' = 1 to 25 digits. The
GNU Scientific Library is asked for the same functions, and its deviation is kept beside.
"""

import json
import pathlib

from coulomb_by_series import coulomb_values, from_gsl
from mpmath import frexp, mp, mpf, sqrt

OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "numerics"
ETA = [0.0, 0.1, -0.1, 1.0, -1.0, 5.0, -5.0, 30.0, -30.0]
RHO = [1e-3, 0.3, 2.0, 10.0, 60.0, 200.0]
ORDERS = [0, 3, 40]
# Strong charges: behind the barrier, about the turning point 2 eta, beyond it.
STRONG = [(100.0, 20.0), (100.0, 201.0), (-100.0, 0.5), (-100.0, 90.0), (250.0, 500.5), (-250.0, 30.0), (300.0, 1200.0)]

def split(value):
    mantissa, power = frexp(value)
    high = float(mantissa)
    return {"high": high, "low": float(mantissa - mpf(high)), "power": int(power)}


def row(l, eta, rho):
    mp.dps = 50
    exact = coulomb_values(l, eta, rho)
    entry = {"l": l, "eta": eta, "rho": rho, **{name: split(v) for name, v in zip(("f", "df", "g", "dg"), exact)}}
    given = from_gsl(l, eta, rho)
    if given is not None:
        far = rho * rho > l * (l + 1) + 2 * eta * rho
        f, df, g, dg = exact
        sizes = [sqrt(f * f + g * g), sqrt(df * df + dg * dg)] * 2 if far else [abs(v) for v in exact]
        entry["gsl"] = float(max(abs(mpf(a) - b) / s for a, b, s in zip(given, exact, sizes)))
    return entry


def main():
    points = [(l, eta, rho) for eta in ETA for rho in RHO for l in ORDERS] + [(l, eta, rho) for eta, rho in STRONG for l in (0, 40)]
    entries = []
    for point in points:
        entries.append(row(*point))
        print(point, entries[-1].get("gsl"), flush=True)
    head = {
        "generator": "scripts/reference/numerics/coulomb_functions.py",
        "quantity": "Coulomb functions F, G and derivatives by rho, (high + low)·2^power; gsl: largest deviation of the GNU Scientific Library 2.7.1, of itself behind the turning point, of sqrt(F² + G²) or of the derivatives beyond it; absent where it refuses or scales",
    }
    lines = ",\n    ".join(json.dumps(entry, allow_nan=False) for entry in entries)
    OUT.mkdir(parents=True, exist_ok=True)
    (OUT / "coulomb-functions.json").write_text(json.dumps(head, indent=2, ensure_ascii=False)[:-2] + ',\n  "rows": [\n    ' + lines + "\n  ]\n}\n")
    print(len(entries), "rows")


main()
