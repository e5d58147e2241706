"""Eikonal amplitudes to 16 digits and more: square well, exponential, Yukawa, Woods-Saxon, a uniform charge, delta shells, and the functions K0, K1 they need.

Run:  python3 scripts/reference/methods/eikonal.py        (Debian package: python3-mpmath)
Writes tests/reference/methods/eikonal.json.

f = -ik int b J0(qb) (exp(i chi) - 1) db, integrated as it stands, without first order taken apart; chi = -(1/2k) int U dz from closed forms
of the textbooks, for Woods-Saxon by quadrature. U = c s(r), c complex. The uniform charge has the phase of the point charge, 2 eta ln(kb), outside
its radius, and stands without the amplitude of the point charge.
A value is kept as two doubles, high + low.
"""

import json
import pathlib

from mpmath import besselj, besselk, cosh, exp, expint, expm1, log, mp, mpc, mpf, pi, quad, sqrt

mp.dps = 20
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "methods"


def split(value):
    high = float(value)
    return {"high": high, "low": float(value - mpf(high))}


def panels(q, edges):
    """Cut at the edges and every two periods of J0."""
    last = edges[-1]
    cuts = {mpf(edge) for edge in edges}
    if q > 0:
        step = 4 * pi / q
        cuts |= {n * step for n in range(1, int(last / step) + 1)}
    return sorted(cuts)


def amplitude(phase, k, q, edges, past=lambda b: 1, method="tanh-sinh"):
    g = lambda b: b * besselj(0, q * b) * past(b) * expm1(mpc(0, 1) * phase(b)) if b else mpf(0)
    return -mpc(0, 1) * k * quad(g, panels(q, edges), method=method)


def line(form, lengths):
    if form == "squareWell":
        (R,) = lengths
        return lambda b: 2 * sqrt(R * R - b * b) if b < R else mpf(0)
    if form == "exponential":
        (a,) = lengths
        return lambda b: 2 * b * besselk(1, b / a)
    if form == "yukawa":
        (a,) = lengths
        return lambda b: 2 * a * besselk(0, b / a)
    R, a = lengths
    known = {}

    def woods_saxon(b):
        if b not in known:
            s = lambda z: 1 / (1 + exp((sqrt(b * b + z * z) - R) / a))
            middle = sqrt(abs(R * R - b * b))
            cuts = sorted({mpf(0), middle / 2, middle, middle + 3 * a, middle + 10 * a, middle + 25 * a, R + b + 60 * a})
            known[b] = 2 * quad(s, cuts, method="gauss-legendre")
        return known[b]

    return woods_saxon


CASES = [
    ("squareWell", [1.3], [0, 1.3], [(-2, 0), (40, -15)]),
    ("exponential", [0.5], [0, 0.25, 1, 3, 8, 21], [(3, 0), (-60, 0)]),
    ("yukawa", [0.8], [0, 1e-6, 1e-3, 0.05, 0.4, 2, 8, 33], [(-2, 0), (50, 0)]),
    ("woodsSaxon", [3.0, 0.4], [0, 2, 3, 4, 6, 10, 20], [(-1.5, -1)]),
]


# Of 2k, at the lower and the higher wave number: K0, K1 and the quadrature of Woods-Saxon are slow.
SHARES = {
    "squareWell": ([0.0, 0.05, 0.3, 1.0], [0.0, 0.1, 0.4]),
    "exponential": ([0.0, 0.3], [0.1]),
    "yukawa": ([0.0, 0.3], [0.1]),
    "woodsSaxon": ([0.3], []),
}


def short_range():
    for form, lengths, edges, strengths in CASES:
        of = line(form, [mpf(length) for length in lengths])
        for re, im in strengths:
            for k in [2.0, 15.0]:
                factor = -mpc(re, im) / (2 * mpf(k))
                shares = SHARES[form][0 if k < 10 else 1]
                for share in shares:
                    q = share * 2 * k
                    f = amplitude(lambda b: factor * of(b), mpf(k), mpf(q), [mpf(edge) for edge in edges], method="gauss-legendre" if form == "woodsSaxon" else "tanh-sinh")
                    yield {"form": form, "lengths": lengths, "u": [re, im], "k": k, "q": q, "re": split(f.real), "im": split(f.imag)}


def uniform_charge():
    """chi without the tail: inside R, -(eta) int (3 - r^2/R^2)/(2R) dz + what 1/r has there; zero outside."""
    R = mpf(1)
    for eta in [0.4, -3.0]:
        for k in [2.0, 15.0]:

            def phase(b):
                if b >= R:
                    return mpf(0)
                z = sqrt(R * R - b * b)
                inside = (3 * z - (b * b * z + z**3 / 3) / (R * R)) / R
                return -mpf(eta) * (inside - 2 * log((R + z) / b))

            past = lambda b: exp(2j * mpf(eta) * log(k * b))
            for share in [0.0, 0.05, 0.3]:
                q = share * 2 * k
                f = amplitude(phase, mpf(k), mpf(q), [0, mpf(10) ** -6, mpf(10) ** -3, 0.05, 0.3, R], past)
                yield {"eta": eta, "R": 1.0, "k": k, "q": q, "re": split(f.real), "im": split(f.imag)}


def delta_shells():
    """U = g delta(r - R): chi = -A/y, A = gR/k, y = sqrt(R^2 - b^2). With s = 1/y the path is turned into the complex plane, where exp(-iAs) falls."""
    R = mpf(1)
    for g in [0.5, -6.0, 80.0]:
        for k in [2.0, 15.0]:
            A = mpf(g) * R / k
            turn = mpc(0, -1) if A > 0 else mpc(0, 1)
            for share in [0.0, 0.05, 0.4]:
                q = mpf(share * 2 * k)

                def turning(x):
                    s = 1 / R + turn * x
                    return turn * s**-3 * besselj(0, q * sqrt(R * R - s**-2)) * exp(-1j * A * s)

                disc = R * besselj(1, q * R) / q if q else R * R / 2
                scale = 1 / abs(A)
                tail = quad(turning, [0, scale / 4, scale, 4 * scale, 16 * scale, 60 * scale]) + quad(turning, [60 * scale, 120 * scale])
                f = -mpc(0, 1) * k * (tail - disc)
                if share == 0:
                    assert abs(tail / (R * R * expint(3, mpc(0, 1) * A / R)) - 1) < mpf(10) ** -15
                yield {"g": g, "R": 1.0, "k": k, "q": float(q), "re": split(f.real), "im": split(f.imag)}


def modified_bessel():
    for x in [1e-12, 1e-6, 0.01, 0.3, 1.0, 2.7, 15.0, 120.0, 690.0]:
        integral = quad(lambda t: exp(-mpf(x) * (cosh(t) - 1)), [0, 1, 4, 16, 40]) * exp(-mpf(x))
        assert abs(integral / besselk(0, mpf(x)) - 1) < mpf(10) ** -15
        yield {"x": x, "k0": split(besselk(0, mpf(x))), "k1": split(besselk(1, mpf(x)))}


def main():
    tables = {"shortRange": list(short_range()), "uniformCharge": list(uniform_charge()), "deltaShell": list(delta_shells()), "modifiedBessel": list(modified_bessel())}
    head = {
        "generator": "scripts/reference/methods/eikonal.py",
        "quantity": "eikonal amplitudes in angstrom of U = u s(r) in 1/angstrom^2; lengths in angstrom, k and q in 1/angstrom; value = high + low",
    }
    parts = [f'  "{key}": {json.dumps(value)}' for key, value in head.items()]
    for name, entries in tables.items():
        lines = ",\n    ".join(json.dumps(entry) for entry in entries)
        parts.append(f'  "{name}": [\n    {lines}\n  ]')
    OUT.mkdir(parents=True, exist_ok=True)
    (OUT / "eikonal.json").write_text("{\n" + ",\n".join(parts) + "\n}\n")
    print({name: len(entries) for name, entries in tables.items()})


main()
