"""Reference transforms S(q) = integral of r^2 s(r) j0(qr) dr over r, to 30 digits, of the screened, Hulthen and polarization forms.

Run:  python3 scripts/reference/potentials/further_forms.py        (Debian package: python3-mpmath)
Writes tests/reference/potentials/<name>.json. Values come from the textbook form with 60 digits and more; every one whose
oscillations allow it (q times the reach below 1,500) is compared with mpmath's own quadrature of r s(r) sin(qr)/q before it
is written. A value is kept as two doubles, high + low.
"""

import json
import pathlib

from mpmath import exp, expm1, mp, mpc, mpf, pi, psi, quad, quadosc, sin, zeta

mp.dps = 60
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "potentials"
X = [0, 1e-6, 1e-3, 0.1, 0.7, 1.0, 2.5, 10.0, 30.0, 137.3, 1000.0, 2000.0]
LENGTHS = [4e-5, 0.37, 1.0, 7.25]
EDGES = (0, 3, 9, 18, 36, 76)

SCREENS = {
    "moliere": [(0.1, 6.0), (0.55, 1.2), (0.35, 0.3)],
    "krc": [(0.335381, 1.919249), (0.473674, 0.637174), (0.190945, 0.278544)],
    "universalIon": [(0.1818, 3.2), (0.5099, 0.9423), (0.2802, 0.4029), (0.02817, 0.2016)],
}


def split(value):
    high = float(value)
    return {"high": high, "low": float(value - mpf(high))}


def by_quadrature(g, edges, q):
    """Integral of g(r) sin(qr)/q by mpmath, cut at the edges and every period."""
    cuts = {mpf(edge) for edge in edges}
    if q > 0:
        step = 2 * pi / q
        cuts |= {n * step for n in range(1, int(edges[-1] / step) + 1)}
    f = (lambda r: r * g(r)) if q == 0 else (lambda r: g(r) * sin(q * r) / q)
    return quad(f, sorted(cuts), method="gauss-legendre")


def checked_by(g, edges, q, value, norm):
    if q * edges[-1] >= 1500:
        return False
    with mp.workdps(40):
        assert abs(by_quadrature(lambda r: g(r) / norm, edges, q) - value / norm) < mpf(10) ** -25, (q, value)
    return True


def screened(screens):
    exact = [(mpf(c), mpf(b)) for c, b in screens]
    for length in LENGTHS:
        a = mpf(length)
        closed = lambda q: sum(c * a * a / (b * b + (q * a) ** 2) for c, b in exact)
        edges = sorted({k * a / b for k in EDGES for _, b in exact})
        for x in X:
            q = x / length
            value = closed(mpf(q))
            g = lambda r: sum(c * exp(-b * r / a) for c, b in exact)
            yield {"a": length, "q": q, **split(value), "quadrature": checked_by(g, edges, mpf(q), value, closed(mpf(0)))}


def hulthen():
    for length in LENGTHS:
        a = mpf(length)
        for x in X:
            q = mpf(x / length)
            y = q * a
            value = 2 * a**3 * zeta(3) if y == 0 else a**3 * psi(1, mpc(1, -y)).imag / y
            g = lambda r: r / expm1(r / a) if r else a
            edges = [k * a for k in EDGES]
            yield {"a": length, "q": x / length, **split(value), "quadrature": checked_by(g, edges, q, value, 2 * a**3 * zeta(3))}


def polarization():
    for length in LENGTHS:
        d = mpf(length)
        for x in X:
            q = mpf(x / length)
            value = pi / (4 * d) * exp(-q * d)
            f = lambda r: r * sin(q * r) / (r * r + d * d) ** 2
            checked = x == 0 or 0.1 <= x <= 10
            with mp.workdps(30):
                if x == 0:
                    # r = d tan(u)
                    direct = quad(lambda u: sin(u) ** 2 / d, [0, pi / 2])
                    assert abs(direct / value - 1) < mpf(10) ** -25
                elif checked:
                    direct = quadosc(f, [0, mp.inf], omega=q) / q
                    assert abs(direct * d - value * d) < mpf(10) ** -22, (x, direct, value)
            yield {"d": length, "q": x / length, **split(value), "quadrature": checked}


def write(name, rows):
    head = {
        "form": name,
        "generator": "scripts/reference/potentials/further_forms.py",
        "quantity": "S(q) = high + low; lengths in angstrom, q in 1/angstrom; quadrature: also confirmed by mpmath's quadrature",
    }
    lines = ",\n    ".join(json.dumps(entry) for entry in rows)
    OUT.mkdir(parents=True, exist_ok=True)
    (OUT / f"{name}.json").write_text(json.dumps(head, indent=2)[:-2] + ',\n  "rows": [\n    ' + lines + "\n  ]\n}\n")
    print(name, len(rows), "rows,", sum(row["quadrature"] for row in rows), "confirmed by quadrature")


def main():
    for name, screens in SCREENS.items():
        write(name, list(screened(screens)))
    write("hulthen", list(hulthen()))
    write("polarization", list(polarization()))


main()
