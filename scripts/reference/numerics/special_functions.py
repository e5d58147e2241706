"""Reference values of the special functions in server/physics/numerics, to 30 digits.

Run:  python3 scripts/reference/numerics/special_functions.py        (Debian package: python3-mpmath)
Writes tests/reference/numerics/special-functions.json; a value is high + low, two doubles.

E1 and P_l by mpmath. j_l by mpmath's Bessel function of half-integer order where x is at most 60, by Miller's downward
recurrence with 90 digits for all x; where both are at hand they must agree to 40 digits.
"""

import json
import pathlib

from mpmath import besselj, expint, legendre, mp, mpf, pi, sin, sqrt

mp.dps = 90
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "numerics"


def split(value):
    high = float(value)
    return {"high": high, "low": float(value - mpf(high))}


def miller(x, orders):
    """j_l(x) for the given orders, started far above the largest."""
    top = int(max(max(orders), x) * 1.1) + 500
    above, here = mpf(0), mpf(10) ** -2000
    values = {}
    for l in range(top, -1, -1):
        if l in orders:
            values[l] = here
        above, here = here, (2 * l + 1) / x * here - above
    # `here` is now j_{-1}, `above` j_0.
    scale = sin(x) / x / above
    return {l: value * scale for l, value in values.items()}


def spherical_bessel():
    rows = []
    for argument in [1e-9, 1e-4, 9.99e-4, 1.001e-3, 0.03, 0.5, 1.0, 4.4934094579, 7.7252518369, 10.0, 55.5, 314.159, 1000.3, 9999.7]:
        x = mpf(argument)
        orders = {0, 1, 2, 3, 5, 10, 20, 60, 300, 1000, 1200, 9990, 10100, 10500}
        if argument < 100:
            orders = {l for l in orders if l <= 300}
        for l, value in sorted(miller(x, orders).items()):
            if argument <= 60 and l <= 60:
                direct = sqrt(pi / (2 * x)) * besselj(l + mpf(1) / 2, x)
                assert abs(direct - value) <= mpf(10) ** -40 * (abs(direct) + mpf(10) ** -30 * (l < x)), (l, x)
            if abs(value) > 1e-280:
                rows.append({"l": l, "x": argument, **split(value)})
    return rows


def main():
    arguments = [1e-300, 1e-10, 1e-3, 0.1, 0.5, 0.9, 1.0, 1.0000001, 1.5, 2.0, 5.0, 10.0, 39.2, 100.0, 650.0]
    e1 = [{"x": x, **split(expint(1, mpf(x)))} for x in arguments]
    degrees = [0, 1, 2, 5, 10, 100, 1000]
    cosines = [-1.0, -0.9999, -0.3, 0.0, 0.5, 0.9, 0.99999, 1 - 2.0**-40, 1.0]
    polynomials = [{"l": l, "x": x, **split(legendre(l, mpf(x)))} for x in cosines for l in degrees]
    tables = {"exponentialIntegral": e1, "legendre": polynomials, "sphericalBessel": spherical_bessel()}
    head = {"generator": "scripts/reference/numerics/special_functions.py", "quantity": "value = high + low"}
    parts = [json.dumps(head, indent=2)[:-2]]
    for name, rows in tables.items():
        parts.append(f'  "{name}": [\n    ' + ",\n    ".join(json.dumps(row) for row in rows) + "\n  ]")
        print(name, len(rows))
    OUT.mkdir(parents=True, exist_ok=True)
    (OUT / "special-functions.json").write_text(",\n".join(parts) + "\n}\n")


main()
