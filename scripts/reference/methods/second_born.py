"""Second Born amplitudes of a Gaussian, an exponential and two Yukawa potentials, to 16 digits and more, from the integral over intermediate momenta.

Run:  python3 scripts/reference/methods/second_born.py        (Debian package: python3-mpmath)
Writes tests/reference/methods/second-born.json.

f2 = -(1/4 pi) int d3p/(2 pi)^3 W(k_f - p) W(p - k_i)/(k^2 - p^2 + i0), W the transform of U. The integral over the directions of p is done in
closed form (for the exponential and the Yukawa potentials after Feynman's parameter joins the two denominators), that over p as a principal
value with the pole subtracted. No partial wave, radial integral or closed form of the amplitude enters.
A value is kept as two doubles, high + low.
"""

import json
import pathlib

from mpmath import exp, inf, mp, mpf, pi, quad, sinh, sqrt

mp.dps = 24
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "methods"
K = [0.05, 0.8, 2.5, 6.0]
SHARES = [0.0, 0.4, 1.0]


def split(value):
    high = float(value)
    return {"high": high, "low": float(value - mpf(high))}


def amplitude(angular, k, scale):
    """angular(p) = integral over directions of W W; scale: momentum over which it changes."""
    g = lambda p: p * p * angular(p)
    pole = g(k)
    edges = sorted({mpf(0), k / 2, k, 3 * k / 2, 2 * k, k + scale, k + 4 * scale, k + 16 * scale})
    slope = (g(k * (1 + mpf(10) ** -12)) - g(k * (1 - mpf(10) ** -12))) / (2 * k * mpf(10) ** -12)
    integrand = lambda p: (g(p) - pole) / (k * k - p * p) if abs(p / k - 1) > mpf(10) ** -20 else -slope / (2 * k)
    # int_0^inf dp/(k^2 - p^2) = 0 as a principal value.
    principal = quad(integrand, edges, method="gauss-legendre") + quad(integrand, [edges[-1], inf])
    factor = -1 / (4 * pi * (2 * pi) ** 3)
    return factor * principal, -factor * pi * pole / (2 * k)


def gaussian(a, k, q):
    K2 = sqrt(4 * k * k - q * q)
    weight = (pi ** (mpf(3) / 2) * a**3) ** 2 * exp(-a * a * k * k / 2)

    def angular(p):
        x = a * a * p * K2 / 2
        return weight * exp(-a * a * p * p / 2) * 4 * pi * (sinh(x) / x if x else 1)

    return amplitude(angular, k, 1 / a)


def exponential(a, k, q):
    mu = 1 / a

    def angular(p):
        A = p * p + k * k + mu * mu

        def joined(x):
            v = 2 * p * sqrt(k * k - x * (1 - x) * q * q)
            if v < mpf(10) ** -12 * A:
                return 6 * x * (1 - x) * 4 * pi / A**4
            return 6 * x * (1 - x) * 2 * pi / (3 * v) * ((A - v) ** -3 - (A + v) ** -3)

        return (8 * pi * mu) ** 2 * 2 * quad(joined, [0, mpf(1) / 2], method="gauss-legendre")

    return amplitude(angular, k, mu)


def yukawas(a1, a2, k, q):
    """U = exp(-r/a1)/r left, exp(-r/a2)/r right."""
    mu1, mu2 = 1 / a1, 1 / a2

    def angular(p):
        def joined(x):
            A = p * p + k * k + x * mu1 * mu1 + (1 - x) * mu2 * mu2
            return 4 * pi / (A * A - 4 * p * p * (k * k - x * (1 - x) * q * q))

        return (4 * pi) ** 2 * quad(joined, [0, mpf(1) / 2, 1], method="gauss-legendre")

    return amplitude(angular, k, mu1 + mu2)


def rows(lengths, f, momenta):
    for k in momenta:
        for share in SHARES:
            q = share * 2 * k
            re, im = f(*(mpf(length) for length in lengths), mpf(k), mpf(q))
            yield {"lengths": lengths, "k": k, "q": q, "re": split(re), "im": split(im)}


def main():
    tables = {
        "gaussian": [*rows([1.0], gaussian, K), *rows([0.37], gaussian, K)],
        "exponential": list(rows([1.0], exponential, K[1:3])),
        "yukawas": [*rows([1.0, 1.0], yukawas, K[1:2]), *rows([1.0, 0.25], yukawas, K[1:3])],
    }
    head = {
        "generator": "scripts/reference/methods/second_born.py",
        "quantity": "f2 of unit shapes U = s(r) in 1/angstrom^2 (exp(-(r/a)^2), exp(-r/a)) or pairs of exp(-r/a)/r, angstrom; value = high + low",
    }
    parts = [f'  "{key}": {json.dumps(value)}' for key, value in head.items()]
    for name, entries in tables.items():
        lines = ",\n    ".join(json.dumps(entry) for entry in entries)
        parts.append(f'  "{name}": [\n    {lines}\n  ]')
    OUT.mkdir(parents=True, exist_ok=True)
    (OUT / "second-born.json").write_text("{\n" + ",\n".join(parts) + "\n}\n")
    print({name: len(entries) for name, entries in tables.items()})


main()
