"""Reference transforms S(q) = integral of r^2 s(r) j0(qr) dr over r, to 30 digits, for the tests of server/physics/potentials.

Run:  python3 scripts/reference/potentials/transforms.py        (Debian packages: python3-mpmath)
Writes tests/reference/potentials/<form>.json. Every value is computed by the textbook form with 60 to 120 digits, written
down here without regard to cancellation, and every one whose oscillations allow it (q times the reach below 1,500) is
compared with mpmath's own quadrature of r s(r) sin(qr)/q to 25 digits of the norm before it is written.

A value is kept as two doubles, high + low, so that a test can form (computed - high) - low without losing it.
"""

import json
import pathlib

from mpmath import cos, coth, exp, findroot, inf, mp, mpf, pi, quad, sin, sinh, sqrt

mp.dps = 120
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "potentials"
X = [0, 1e-6, 1e-3, 0.1, 0.7, 1.0, 1.4999, 1.5, 2.5, 10.0, 30.0, 137.3, 1000.0, 2000.0]
LENGTHS = [4e-5, 0.37, 1.0, 7.25]


def alternating(term, count=230):
    """Sum of (-1)^k term(k), k >= 0, by Cohen, Rodriguez Villegas and Zagier, Exp. Math. 9 (2000) 3, algorithm 1."""
    d = (3 + sqrt(mpf(8))) ** count
    d = (d + 1 / d) / 2
    b, c, s = mpf(-1), -d, mpf(0)
    for k in range(count):
        c = b - c
        s += c * term(k)
        b = b * (k + count) * (k - count) / ((k + mpf(1) / 2) * (k + 1))
    return s / d


def tail_sum(ratio, y):
    z = exp(-ratio)
    term = lambda n: n * z**n / (n * n + y * y) ** 2
    if ratio > 1:
        return sum((-1) ** (n - 1) * term(n) for n in range(1, int(300 / ratio) + 10))
    return alternating(lambda k: term(k + 1))


def woods_saxon(q, R, a):
    if q == 0:
        main = R**3 / 3 + pi**2 * a**2 * R / 3
    else:
        p = pi * q * a
        main = pi * a / (q * sinh(p)) * (pi * a * coth(p) * sin(q * R) - R * cos(q * R))
    return main + 2 * a**3 * tail_sum(R / a, q * a)


def ball(q, R):
    return R**3 / 3 if q == 0 else (sin(q * R) - q * R * cos(q * R)) / q**3


FORMS = {
    "yukawa": (lambda q, a: a**3 / (1 + (q * a) ** 2), lambda r, a: a * exp(-r / a), lambda a: ([k * a for k in (0, 3, 9, 18, 36, 76)], a)),
    "screenedCoulomb": (lambda q, a: a**2 / (1 + (q * a) ** 2), lambda r, a: exp(-r / a), lambda a: ([k * a for k in (0, 3, 9, 18, 36, 76)], a)),
    "exponential": (lambda q, a: 2 * a**3 / (1 + (q * a) ** 2) ** 2, lambda r, a: r * exp(-r / a), lambda a: ([k * a for k in (0, 3, 9, 18, 36, 76)], a)),
    "gaussian": (lambda q, a: sqrt(pi) / 4 * a**3 * exp(-((q * a) ** 2) / 4), lambda r, a: r * exp(-((r / a) ** 2)), lambda a: ([k * a for k in (0, 1.5, 3, 5, 8.5)], a)),
    "squareWell": (ball, lambda r, R: r, lambda R: ([0, R], R)),
    "deltaShell": (lambda q, R: R**2 if q == 0 else R * sin(q * R) / q, None, lambda R: ([0, R], R)),
    "woodsSaxon": (
        woods_saxon,
        lambda r, R, a: r / (1 + exp((r - R) / a)),
        lambda R, a: (sorted({mpf(0), R} | {max(mpf(0), R + k * a) for k in (-76, -36, -18, *range(-10, 11, 2), 18, 36, 76)}), max(R, a)),
    ),
}


def by_quadrature(g, edges, q, parameters, norm):
    """The integral of g(r) sin(qr)/(q norm) by mpmath, cut at the edges and every period. (Its tolerance is absolute.)"""
    g, unscaled = (lambda r, *rest: unscaled(r, *rest) / norm), g
    cuts = {mpf(edge) for edge in edges}
    if q > 0:
        step = 2 * pi / q
        cuts |= {n * step for n in range(1, int(edges[-1] / step) + 1)}
    f = (lambda r: r * g(r, *parameters)) if q == 0 else (lambda r: g(r, *parameters) * sin(q * r) / q)
    return quad(f, sorted(cuts), method="gauss-legendre")


def row(name, keys, parameters, q):
    closed, g, extent = FORMS[name]
    exact = [mpf(p) for p in parameters]
    value = closed(mpf(q), *exact)
    edges, scale = extent(*exact)
    checked = False
    if g is not None and q * edges[-1] < 1500:
        with mp.workdps(40):
            norm = closed(mpf(0), *exact)
            checked = abs(by_quadrature(g, edges, mpf(q), exact, norm) - value / norm) < mpf(10) ** -25
        assert checked, (name, parameters, q)
    high = float(value)
    low = float(value - mpf(high))
    return {**dict(zip(keys, parameters)), "q": q, "high": high, "low": low, "quadrature": bool(checked)}


def zeros(name, parameters, starts):
    """Doubles next to zeros of the transform, found near the given q."""
    closed = FORMS[name][0]
    exact = [mpf(p) for p in parameters]
    return [float(findroot(lambda q: closed(q, *exact), mpf(start), tol=1e-60)) for start in starts]


def write(name, keys, rows):
    OUT.mkdir(parents=True, exist_ok=True)
    document = {
        "form": name,
        "generator": "scripts/reference/potentials/transforms.py",
        "quantity": "S(q) = high + low; lengths in angstrom, q in 1/angstrom; quadrature: also confirmed by mpmath.quad to 1e-25 of S(0)",
        "rows": rows,
    }
    lines = ",\n    ".join(json.dumps(entry) for entry in rows)
    head = {key: document[key] for key in ("form", "generator", "quantity")}
    text = json.dumps(head, indent=2)[:-2] + ',\n  "rows": [\n    ' + lines + "\n  ]\n}\n"
    (OUT / f"{name}.json").write_text(text)
    print(name, len(rows), "rows,", sum(entry["quadrature"] for entry in rows), "confirmed by quadrature")


def main():
    for name in ("yukawa", "screenedCoulomb", "exponential", "gaussian"):
        write(name, ["a"], [row(name, ["a"], [a], x / a) for a in LENGTHS for x in X])
    for name, nodes in (("squareWell", [4.4934094579, 7.7252518369, 1000.596]), ("deltaShell", [3.14159, 9.42477, 999.0265])):
        rows = [row(name, ["R"], [R], x / R) for R in LENGTHS for x in X]
        rows += [row(name, ["R"], [R], q) for R in LENGTHS for q in zeros(name, [R], [x / R for x in nodes])]
        write(name, ["R"], rows)
    pairs = [(0.0, 1.0), (0.0, 3e-5), (1.0, 1e-6), (1.0, 1e-3), (1.0, 0.05), (4e-5, 0.65e-5), (1.0, 0.4), (1.0, 0.99), (1.0, 1.01), (1.0, 4.0), (0.37, 30.0), (7.25, 0.6)]
    rows = [row("woodsSaxon", ["R", "a"], [R, a], x / max(R, a)) for R, a in pairs for x in X]
    for R, a, starts in ((1.0, 1e-3, [4.49, 7.72, 20.37]), (1.0, 0.05, [4.4, 7.6]), (4e-5, 0.65e-5, [0.95e5, 1.6e5]), (7.25, 0.6, [0.57, 0.97])):
        rows += [row("woodsSaxon", ["R", "a"], [R, a], q) for q in zeros("woodsSaxon", [R, a], starts)]
    write("woodsSaxon", ["R", "a"], rows)


main()
