"""Reference transforms F(q)/q^2 and potentials of extended charges, to 30 digits, for server/physics/potentials/extended-charge.ts.

Run:  python3 scripts/reference/potentials/extended_charge.py        (Debian package: python3-mpmath)
Writes tests/reference/potentials/extendedCharge.json. Form factors come from the textbook form; where the oscillations allow it
they are compared with mpmath's quadrature of the charge density. Potentials are integrals of the density, by quadrature.
A value is kept as two doubles, high + low.
"""

import json
import pathlib

from mpmath import cos, erf, exp, inf, mp, mpf, pi, quad, sin, sinh, coth, sqrt

mp.dps = 60
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "potentials"
X = [1e-6, 1e-3, 0.1, 0.7, 1.0, 2.5, 4.4934094579, 10.0, 30.0, 137.3, 1000.0]
RADII = [1e-3, 0.05, 0.5, 0.97, 1.0, 1.3, 2.0]


def split(value):
    high = float(value)
    return {"high": high, "low": float(value - mpf(high))}


def alternating(term, count=110):
    """Sum of (-1)^k term(k), k >= 0, by Cohen, Rodriguez Villegas and Zagier, Exp. Math. 9 (2000) 3, algorithm 1."""
    d = (3 + sqrt(mpf(8))) ** count
    d = (d + 1 / d) / 2
    b, c, s = mpf(-1), -d, mpf(0)
    for k in range(count):
        c = b - c
        s += c * term(k)
        b = b * (k + count) * (k - count) / ((k + mpf(1) / 2) * (k + 1))
    return s / d


def woods_saxon(q, c, a):
    rest = 2 * a**3 * alternating(lambda k: (k + 1) * exp(-(k + 1) * c / a) / ((k + 1) ** 2 + (q * a) ** 2) ** 2)
    if q == 0:
        return c**3 / 3 + pi**2 * a**2 * c / 3 + rest
    p = pi * q * a
    return pi * a / (q * sinh(p)) * (pi * a * coth(p) * sin(q * c) - c * cos(q * c)) + rest


def ball(q, R):
    return 3 * (sin(q * R) - q * R * cos(q * R)) / (q * R) ** 3


def smeared(r, R, s):
    """Density of a uniform sphere smeared with a normal distribution, times 4 pi R^3/3."""
    w = sqrt(mpf(2)) * s
    if r == 0:
        return erf(R / w) - 2 * R / (sqrt(pi) * w) * exp(-((R / w) ** 2))
    bells = exp(-(((r - R) / w) ** 2)) - exp(-(((r + R) / w) ** 2))
    return (erf((R + r) / w) + erf((R - r) / w)) / 2 - w / (2 * sqrt(pi) * r) * bells


# Form factor, density without its norm, cuts of the radial integral, scale.
KINDS = {
    "uniformSphere": (lambda q, R: ball(q, R), lambda r, R: mpf(1), lambda R: [0, R], lambda R: R),
    "gaussian": (lambda q, R: exp(-((q * R) ** 2) / 6), lambda r, R: exp(-3 * r * r / (2 * R * R)), lambda R: [k * R for k in (0, 1, 2, 3, 5, 9)], lambda R: R),
    "dipole": (
        lambda q, R: (1 + (q * R) ** 2 / 12) ** -2,
        lambda r, R: exp(-r * sqrt(mpf(12)) / R),
        lambda R: [k * R for k in (0, 0.5, 1, 2, 4, 8, 24)],
        lambda R: R,
    ),
    "fermi": (
        lambda q, c, a: woods_saxon(q, c, a) / woods_saxon(mpf(0), c, a),
        lambda r, c, a: 1 / (1 + exp((r - c) / a)),
        lambda c, a: sorted({mpf(0), c} | {max(mpf(0), c + k * a) for k in (*range(-40, 41, 4), 60, 90)}),
        lambda c, a: max(c, a),
    ),
    "helm": (
        lambda q, R, s: ball(q, R) * exp(-((q * s) ** 2) / 2),
        smeared,
        lambda R, s: sorted({mpf(0), R} | {max(mpf(0), R + k * s) for k in (-12, -8, -5, -3, -1.5, 1.5, 3, 5, 8, 12, 14)}),
        lambda R, s: max(R, s),
    ),
}


def integral(f, cuts, q=0):
    points = {mpf(cut) for cut in cuts}
    if q > 0:
        step = 2 * pi / q
        points |= {n * step for n in range(1, int(mpf(cuts[-1]) / step) + 1)}
    return quad(f, sorted(points), method="gauss-legendre")


def rows_of(kind, parameters):
    form_factor, density, cuts_of, scale_of = KINDS[kind]
    exact = [mpf(p) for p in parameters]
    cuts, scale = cuts_of(*exact), scale_of(*exact)
    names = dict(zip(("radius", "diffuseness"), parameters))
    with mp.workdps(35):
        norm = integral(lambda r: r * r * density(r, *exact), cuts)
    for x in X:
        q = x / float(scale)
        value = form_factor(mpf(q), *exact)
        checked = mpf(q) * cuts[-1] < 300
        if checked:
            with mp.workdps(35):
                direct = integral(lambda r: r * density(r, *exact) * sin(mpf(q) * r) / mpf(q), cuts, mpf(q)) / norm
                assert abs(direct - value) < mpf(10) ** -22, (kind, parameters, x, direct, value)
        yield {"kind": kind, **names, "q": q, **split(value / mpf(q) ** 2), "quadrature": bool(checked)}


def potentials_of(kind, parameters):
    _, density, cuts_of, scale_of = KINDS[kind]
    exact = [mpf(p) for p in parameters]
    cuts, scale = cuts_of(*exact), scale_of(*exact)
    names = dict(zip(("radius", "diffuseness"), parameters))
    with mp.workdps(35):
        norm = integral(lambda t: t * t * density(t, *exact), cuts)
        for x in RADII:
            r = x * float(scale)
            inner = [c for c in cuts if c < r] + [min(mpf(r), mpf(cuts[-1]))]
            outer = [mpf(r)] + [c for c in cuts if c > r]
            inside = integral(lambda t: t * t * density(t, *exact), inner if inner[0] == 0 else [0] + inner)
            outside = integral(lambda t: t * density(t, *exact), outer) if len(outer) > 1 else 0
            yield {"kind": kind, **names, "r": r, **split((inside / mpf(r) + outside) / norm)}


def main():
    sets = [("uniformSphere", (1.0,)), ("uniformSphere", (6.6e-5,)), ("gaussian", (1.0,)), ("gaussian", (1.7e-5,)), ("dipole", (1.0,)), ("dipole", (8.1124e-6,))]
    sets += [("fermi", pair) for pair in ((6.38e-5, 0.535e-5), (1.0, 0.01), (1.0, 0.5), (0.3, 1.0), (7.0, 2.0))]
    sets += [("helm", pair) for pair in ((5.6e-5, 0.9e-5), (1.0, 0.01), (1.0, 0.3), (1.0, 0.36), (0.5, 1.0), (0.02, 1.0))]
    transforms = [row for kind, parameters in sets for row in rows_of(kind, parameters)]
    potentials = [row for kind, parameters in sets for row in potentials_of(kind, parameters)]
    head = {
        "form": "extendedCharge",
        "generator": "scripts/reference/potentials/extended_charge.py",
        "quantity": "S(q) = F(q)/q² and s(r) = high + low; lengths in angstrom, q in 1/angstrom; quadrature: also confirmed by mpmath.quad over the density",
    }
    text = json.dumps(head, indent=2)[:-2]
    for name, rows in (("transforms", transforms), ("potentials", potentials)):
        text += f',\n  "{name}": [\n    ' + ",\n    ".join(json.dumps(row) for row in rows) + "\n  ]"
        print(name, len(rows), "rows")
    OUT.mkdir(parents=True, exist_ok=True)
    (OUT / "extendedCharge.json").write_text(text + "\n}\n")


main()
