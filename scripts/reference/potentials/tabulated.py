"""Reference splines and their transforms for server/physics/potentials/tabulated.ts, to 30 digits.

Run:  python3 scripts/reference/potentials/tabulated.py        (Debian package: python3-mpmath)
Writes tests/reference/potentials/tabulated.json. The spline is solved for its second derivatives (another unknown than the
program's slopes) with 60 digits; each transform is an antiderivative of polynomial times sine, compared with mpmath's quadrature
where q times the table is below 300. A value is kept as two doubles, high + low.
"""

import json
import pathlib
import random

from mpmath import cos, exp, log, lu_solve, matrix, mp, mpc, mpf, pi, quad, sin

mp.dps = 60
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "potentials"
X = [0.0, 1e-6, 1e-3, 0.1, 0.7, 2.5, 10.0, 30.0, 137.3, 1000.0]


def split(value):
    high = float(value)
    return {"high": high, "low": float(value - mpf(high))}


def spline(r, v):
    """Pieces [(start, end, [c0, c1, c2, c3])] of the not-a-knot spline, by its second derivatives."""
    n = len(r)
    h = [r[i + 1] - r[i] for i in range(n - 1)]
    A, b = matrix(n, n), matrix(n, 1)
    for i in range(1, n - 1):
        A[i, i - 1], A[i, i], A[i, i + 1] = h[i - 1] / 6, (h[i - 1] + h[i]) / 3, h[i] / 6
        b[i] = (v[i + 1] - v[i]) / h[i] - (v[i] - v[i - 1]) / h[i - 1]
    # Third derivatives (M[i+1] - M[i])/h[i] meet at the second and the last but one point.
    A[0, 0], A[0, 1], A[0, 2] = -1 / h[0], 1 / h[0] + 1 / h[1], -1 / h[1]
    A[n - 1, n - 3], A[n - 1, n - 2], A[n - 1, n - 1] = -1 / h[n - 3], 1 / h[n - 3] + 1 / h[n - 2], -1 / h[n - 2]
    M = lu_solve(A, b)
    pieces = [] if r[0] == 0 else [(mpf(0), r[0], [v[0], mpf(0), mpf(0), mpf(0)])]
    for i in range(n - 1):
        slope = (v[i + 1] - v[i]) / h[i] - h[i] * (2 * M[i] + M[i + 1]) / 6
        pieces.append((r[i], r[i + 1], [v[i], slope, M[i] / 2, (M[i + 1] - M[i]) / (6 * h[i])]))
    return pieces


def antiderivative(c, x, q):
    """Of polynomial(x) sin(qx), by parts; c in powers of x."""
    total, sign = mpf(0), -1
    derivative = list(c)
    for order in range(len(c)):
        value = sum(k * x**j for j, k in enumerate(derivative))
        wave = cos(q * x) if order % 2 == 0 else sin(q * x)
        total += sign * value * wave / q ** (order + 1)
        if order % 2 == 0:
            sign = -sign
        derivative = [j * k for j, k in enumerate(derivative)][1:]
    return total


def shifted(c, start):
    """Coefficients in powers of x of sum c_k (x - start)^k, times x."""
    from mpmath import binomial

    out = [mpf(0)] * 5
    for k, value in enumerate(c):
        for j in range(k + 1):
            out[j + 1] += value * binomial(k, j) * (-start) ** (k - j)
    return out


def transform(pieces, tail, r, v, q):
    end = r[-1]
    if q == 0:
        inner = sum(quad(lambda x: x * x * sum(k * (x - a) ** j for j, k in enumerate(c)), [a, b]) for a, b, c in pieces)
    else:
        with mp.workdps(110):
            inner = sum(antiderivative(shifted(c, a), b, q) - antiderivative(shifted(c, a), a, q) for a, b, c in pieces) / q
        if q * end < 300:
            with mp.workdps(30):
                direct = sum(quad(lambda x: x * sin(q * x) / q * sum(k * (x - a) ** j for j, k in enumerate(c)), [a + (b - a) * i / 8 for i in range(9)]) for a, b, c in pieces)
                size = sum(abs(v[i]) for i in range(len(v))) * end**3
                assert abs(direct - inner) < size * mpf(10) ** -22, (q, direct, inner)
    if tail == "coulomb":
        return inner + v[-1] * end * cos(q * end) / q**2
    if tail == "exponential":
        w = (end - r[-2]) / log(v[-2] / v[-1])
        z = 1 / mpc(1 / w, -q)
        moment = (end * z + z * z) * mp.expjpi(q * end / pi)
        return inner + (v[-1] * w * (end**2 + 2 * end * w + 2 * w * w) if q == 0 else v[-1] * moment.imag / q)
    return inner


def tables():
    step = [i / 4 for i in range(17)]
    yield "smooth", step, [-10 * float(exp(-mpf(x) ** 2)) for x in step]
    uneven = [0.05 * 1.23**i for i in range(24)]
    yield "screened", uneven, [float(-30 * exp(-mpf(x)) / x) for x in uneven]
    random.seed(7)
    rough = [0.0]
    while len(rough) < 30:
        rough.append(rough[-1] + random.uniform(0.02, 0.4))
    yield "rough", rough, [random.uniform(-5, 5) for _ in rough[:-2]] + [0.7, 0.4]
    fermi = [i * 0.4e-5 for i in range(31)]
    yield "nuclear", fermi, [float(-50e6 / (1 + exp((mpf(x) - 4e-5) / 0.65e-5))) for x in fermi]
    yield "four", [0.5, 1.0, 1.5, 3.0], [-4.0, -3.0, -2.0, -0.5]


def main():
    shapes, rows, values = {}, [], []
    for name, r, v in tables():
        shapes[name] = list(zip(r, v))
        exact_r, exact_v = [mpf(x) for x in r], [mpf(x) for x in v]
        pieces = spline(exact_r, exact_v)
        for tail in ("zero", "exponential", "coulomb"):
            for x in X:
                q = x / r[-1] * 4
                if q == 0 and tail == "coulomb":
                    continue
                rows.append({"table": name, "tail": tail, "q": q, **split(transform(pieces, tail, exact_r, exact_v, mpf(q)))})
        for a, b, c in pieces:
            x = float(a + (b - a) / 3)
            values.append({"table": name, "r": x, **split(sum(k * (mpf(x) - a) ** j for j, k in enumerate(c)))})
    head = {"form": "tabulated", "generator": "scripts/reference/potentials/tabulated.py", "quantity": "S(q) in eV·angstrom³ and V(r) in eV = high + low; lengths in angstrom"}
    text = json.dumps(head, indent=2)[:-2] + ',\n  "points": ' + json.dumps(shapes)
    for name, entries in (("transforms", rows), ("values", values)):
        text += f',\n  "{name}": [\n    ' + ",\n    ".join(json.dumps(entry) for entry in entries) + "\n  ]"
        print(name, len(entries), "rows")
    (OUT / "tabulated.json").write_text(text + "\n}\n")


main()
