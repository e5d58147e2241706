"""Reference partial waves for server/physics/methods/partial-waves.

Run:  python3 scripts/reference/methods/phase_shifts.py        (python3-numpy, python3-scipy, python3-mpmath; libgsl27; x86 for its 80-bit floats)
Writes tests/reference/methods/phase-shifts.json: T_l = (S_l - 1)/2i wave by wave, and amplitudes f(q).

Smooth potentials: u'' = (l(l+1)/r² + U - k²) u by Taylor series about many centres, from a Frobenius series at the origin, in 80-bit
arithmetic, twice: short steps of order 48 and long ones of order 36, matched at two radii. `difference` is the largest |ΔT_l| of the
two. scipy's DOP853 is asked for a few waves and must agree to 1e-10. Square well, delta shell and hard
sphere: closed forms, 40 digits. The charge: mpmath's Coulomb functions; those of the GNU Scientific Library, where it answers, give T_l off by `gsl`.

Lengths are angstrom, energies eV, U = twoMuOverHbar2·V; every input is a double, taken exactly.
"""

import json
import pathlib
import sys

import numpy as np
from mpmath import besselj, bessely, conj, exp, log, loggamma, mp, mpc, mpf, pi, quad, sqrt
from scipy.integrate import solve_ivp

sys.path.insert(0, str(pathlib.Path(__file__).resolve().parents[1] / "numerics"))
from coulomb_by_series import coulomb_rows, from_gsl  # noqa: E402

mp.dps = 40
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "methods"
TWO_MU = 0.25
REAL, COMPLEX = np.longdouble, np.clongdouble
NOTHING = 1e-18


# Taylor coefficients about c of r²·U(r), n of them; strengths are already times twoMuOverHbar2.


def product(a, b):
    n = len(a)
    return np.array([np.dot(a[: i + 1], b[i::-1]) for i in range(n)])


def quotient(a, b):
    out = np.zeros(len(a), dtype=REAL)
    for i in range(len(a)):
        out[i] = (a[i] - np.dot(b[1 : i + 1], out[i - 1 :: -1] if i else out[:0])) / b[0]
    return out


def power_of_r(c, n, first, second=0):
    """first·r + second·r² about c."""
    out = np.zeros(n, dtype=REAL)
    out[0], out[1], out[2] = c * (first + second * c), first + 2 * second * c, second
    return out


def decay(c, n, a):
    """exp(-r/a)"""
    out = np.zeros(n, dtype=REAL)
    out[0] = np.exp(-c / a)
    for i in range(1, n):
        out[i] = -out[i - 1] / (a * i)
    return out


def bell(c, n, a):
    """exp(-(r/a)²)"""
    out = np.zeros(n, dtype=REAL)
    out[0] = np.exp(-((c / a) ** 2))
    for i in range(1, n):
        before = out[i - 2] if i > 1 else REAL(0)
        out[i] = -2 * (c * out[i - 1] + before) / (a * a * i)
    return out


def step(c, n, R, a):
    """1/(1 + exp((r-R)/a)): f' = -f (1-f)/a"""
    out = np.zeros(n, dtype=REAL)
    z = np.exp((c - R) / a)
    out[0] = 1 / (1 + z)
    rest = np.zeros(n, dtype=REAL)
    rest[0] = z / (1 + z)
    for i in range(1, n):
        out[i] = -np.dot(out[:i], rest[i - 1 :: -1] if i > 1 else rest[:1]) / (a * i)
        rest[i] = -out[i]
    return out


class Form:
    """One term: its series, how far it is felt, and the length over which it is analytic about a point."""

    def __init__(self, key, values, series, reach, radius):
        self.key, self.values, self.series, self.reach, self.radius = key, values, series, reach, radius


def wood(V0, R, a, W0=None):
    strength = TWO_MU * complex(V0, W0 or 0)
    L = REAL
    values = {"V0": V0, "R": R, "a": a} if W0 is None else {"V0": V0, "W0": W0, "R": R, "a": a}
    return Form("woodsSaxon", values, lambda c, n: strength * product(power_of_r(c, n, 0, 1), step(c, n, L(R), L(a))), R + 50 * a, lambda c: float(np.hypot(c - R, np.pi * a)))


def yukawa(V0, a):
    return Form("yukawa", {"V0": V0, "a": a}, lambda c, n: TWO_MU * V0 * a * product(power_of_r(c, n, 1), decay(c, n, REAL(a))), 50 * a, lambda c: 8 * a)


def gaussian(V0, a, W0=None):
    strength = TWO_MU * complex(V0, W0 or 0)
    values = {"V0": V0, "a": a} if W0 is None else {"V0": V0, "W0": W0, "a": a}
    return Form("gaussian", values, lambda c, n: strength * product(power_of_r(c, n, 0, 1), bell(c, n, REAL(a))), 7.2 * a, lambda c: 3 * a)


def exponential(V0, a):
    return Form("exponential", {"V0": V0, "a": a}, lambda c, n: TWO_MU * V0 * product(power_of_r(c, n, 0, 1), decay(c, n, REAL(a))), 55 * a, lambda c: 8 * a)


def hulthen(V0, a):
    def series(c, n):
        # exp(-r/a)/(1 - exp(-r/a)) = E/(1-E); r/(1-E) is analytic at the origin.
        e = decay(c, n + 1, REAL(a))
        rest = -e
        rest[0] += 1
        if c == 0:
            lower = rest[1:]
            one = np.zeros(n, dtype=REAL)
            one[0] = 1
            return TWO_MU * V0 * product(power_of_r(c, n, 1), product(e[:n], quotient(one, lower)))
        return TWO_MU * V0 * product(power_of_r(c, n, 0, 1), quotient(e[:n], rest[:n]))

    return Form("hulthen", {"V0": V0, "a": a}, series, 55 * a, lambda c: float(np.hypot(c, 2 * np.pi * a)))


def polarization(alpha, d):
    # -(alpha e²/2)/(r² + d²)², e² = alpha hbar c of CODATA 2022 in eV angstrom
    e2 = 14.39964546860267
    strength = REAL(TWO_MU) * REAL(alpha) * REAL(e2) / 2

    def series(c, n):
        base = power_of_r(c, n, 0, 1)
        below = base.copy()
        below[0] += REAL(d) ** 2
        return -strength * quotient(quotient(base, below), below)

    form = Form("polarization", {"alpha": alpha, "d": d}, series, None, lambda c: float(np.hypot(c, d)))
    form.tail = lambda r: -mpf(TWO_MU) * mpf(alpha) * mpf(e2) / 2 / (r * r + mpf(d) ** 2) ** 2
    return form


def surface(Vso, R, a):
    """r² times the spin-orbit shape (2 fm²) (1/r) d/dr f, without l·sigma."""

    def series(c, n):
        slope = step(c, n + 1, REAL(R), REAL(a))[1:] * np.arange(1, n + 1)
        return REAL(TWO_MU) * REAL(Vso) * REAL(2e-10) * product(power_of_r(c, n, 1), slope)

    return Form("spinOrbit", {"Vso": Vso, "R": R, "a": a}, series, R + 50 * a, lambda c: float(np.hypot(c - R, np.pi * a)))


# The radial equation


def total(forms, k, c, n, charge):
    out = np.zeros(n, dtype=COMPLEX)
    for form in forms:
        out = out + form.series(c, n)
    return out + power_of_r(c, n, charge, -REAL(k) ** 2)


def march(forms, k, lmax, end, order, share, charge, spin=None):
    """u and u' at `end` for all l, each pair up to a factor; `spin` is a form that stands times l·sigma, and 2(j - l)."""
    l = np.arange(lmax + 1).astype(REAL)
    turned = (l if spin[1] > 0 else -(l + 1)) if spin else 0 * l

    def field(c):
        w = np.zeros((order + 1, lmax + 1), dtype=COMPLEX)
        w[:] = total(forms, k, c, order + 1, charge)[:, None]
        return w + spin[0].series(c, order + 1)[:, None] * turned if spin else w

    centrifugal = l * (l + 1)
    radius = lambda c: min(form.radius(c) for form in forms)
    r = REAL(min(share * radius(0.0), 2 / k, float(end)))
    w = field(REAL(0))
    c = np.zeros((order + 1, lmax + 1), dtype=COMPLEX)
    c[0] = 1
    for n in range(1, order + 1):
        c[n] = np.sum(w[1 : n + 1] * (c[n - 1 :: -1] if n > 1 else c[:1]), axis=0) / (n * (n + 2 * l + 1))
    powers = r ** np.arange(order + 1).astype(REAL)
    u = np.tensordot(powers, c, axes=(0, 0))
    du = np.tensordot(powers, c * (np.arange(order + 1)[:, None] + l + 1), axes=(0, 0)) / r
    while r < end:
        w = field(r)
        local = float(np.sqrt(max(np.max(np.abs(w[0])) / r**2, k * k)))
        h = REAL(min(share * radius(float(r)), share * float(r), 4 * share / local * 2))
        h = end - r if r + 1.2 * h > end else h
        size = np.abs(u) + np.abs(du) * r
        c[0], c[1] = u / size, du / size
        base = w
        base[0] = base[0] + centrifugal
        for n in range(2, order + 1):
            m = n - 2
            # (r+t)² u'' = (l(l+1) + w(t)) u
            known = np.sum(base[: m + 1] * c[m::-1], axis=0)
            known = known - 2 * r * (m + 1) * m * c[m + 1] - m * (m - 1) * c[m]
            c[n] = known / (r * r * n * (n - 1))
        powers = h ** np.arange(order + 1).astype(REAL)
        u = np.tensordot(powers, c, axes=(0, 0))
        du = np.tensordot(powers[:-1], c[1:] * np.arange(1, order + 1)[:, None], axes=(0, 0))
        r = r + h
    return u, du


def exact(value):
    def part(x):
        high = float(x)
        return mpf(high) + mpf(float(x - REAL(high)))

    return mpc(part(value.real), part(value.imag))


def riccati(l, x):
    """F, F', G, G' of a free wave."""
    x = mpf(x)
    root = sqrt(pi * x / 2)
    f, g = root * besselj(l + mpf(1) / 2, x), -root * bessely(l + mpf(1) / 2, x)
    f1, g1 = root * besselj(l + mpf(3) / 2, x), -root * bessely(l + mpf(3) / 2, x)
    slope = (l + 1) / x
    return f, slope * f - f1, g, slope * g - g1


def transition(u, du, k, functions):
    f, df, g, dg = functions
    u, du = exact(u), exact(du) / mpf(k)
    over, under = df * u - f * du, dg * u - g * du
    # K = -over/under, T = K/(1 - iK)
    return -over / (under + 1j * over)


def beyond(form, k, l, T, r):
    """What a tail of r^-4 adds to T beyond r, first order about the wave reached there; the second is below 1e-16."""
    k, r = mpf(k), mpf(r)
    S = 1 + 2j * T

    def hankel(z):
        total, term = mpc(0), mpc(1)
        for m in range(l + 1):
            total += term
            term *= 1j * mpf((l - m) * (l + m + 1)) / (2 * (m + 1)) / z
        return total * exp(1j * (z - l * pi / 2))

    # u = (i/2)(H- - S H+) up to i; u² = -(H-² - 2 S H- H+ + S² H+²)/4, H± = G ± iF
    turned = quad(lambda s: form.tail(r + 1j * s) * hankel(k * (r + 1j * s)) ** 2 * 1j, [0, 1 / k, 4 / k, 12 / k, 50 / k])
    level = quad(lambda x: form.tail(r / x) * abs(hankel(k * r / x)) ** 2 * r / x**2, [0, 0.5, 1])
    square = -(conj(turned) - 2 * S * level + S * S * turned) / 4
    return -square / k


def waves(forms, k, lmax, charge=0.0, coulomb=None, spin=None):
    """T_l by two settings."""
    answers = []
    power = any(form.reach is None for form in forms)
    reach = 240.0 / k if power else max(form.reach for form in forms)
    for order, share, far in ((48, 0.22, 1.0), (36, 0.16, 1.07)):
        end = REAL(float(reach * far))
        u, du = march(forms, k, lmax, end, order, share, charge, spin)
        row = []
        x = mpf(k) * mpf(float(end))
        functions = coulomb(x) if coulomb else [riccati(l, x) for l in range(lmax + 1)]
        for l in range(lmax + 1):
            T = transition(u[l], du[l], k, functions[l])
            row.append(T + beyond(forms[0], k, l, T, float(end)) if power else T)
        answers.append(row)
    difference = max(abs(a - b) for a, b in zip(*answers))
    return answers[0], float(difference)


def witness(forms, k, l):
    """scipy's DOP853 for one wave, matched to free waves; potentials of a neutral pair."""
    end = max(form.reach for form in forms)

    def slope(r, y):
        w = sum(form.series(REAL(r), 3)[0] for form in forms)
        return [y[1], (l * (l + 1) + complex(w) - (k * r) ** 2) / r**2 * y[0]]

    start = 1e-6 if l == 0 else 1e-3 if l < 3 else 0.05 * l / k
    y = solve_ivp(slope, (start, end), [complex(start), complex(l + 1)], method="DOP853", rtol=2e-13, atol=1e-30).y[:, -1]
    return transition(COMPLEX(y[0]), COMPLEX(y[1]), k, riccati(l, mpf(k) * mpf(float(end))))


# Closed forms


def square_well(k, V0, R, W0=0.0):
    def T(l):
        kappa = sqrt(mpf(k) ** 2 - mpf(TWO_MU) * mpc(V0, W0))
        x = kappa * mpf(R)
        u = sqrt(pi * x / 2) * besselj(l + mpf(1) / 2, x)
        du = (l + 1) / x * u - sqrt(pi * x / 2) * besselj(l + mpf(3) / 2, x)
        f, df, g, dg = riccati(l, mpf(k) * mpf(R))
        over, under = df * u - f * du * kappa / k, dg * u - g * du * kappa / k
        return -over / (under + 1j * over)

    return T


def delta_shell(k, g0, R):
    def T(l):
        f, _, g, _ = riccati(l, mpf(k) * mpf(R))
        U = mpf(TWO_MU) * mpf(g0)
        K = -U * f * f / (k + U * f * g)
        return K / (1 - 1j * K)

    return T


def hard_sphere(k, R):
    def T(l):
        f, _, g, _ = riccati(l, mpf(k) * mpf(R))
        return -f / (g + 1j * f)

    return T


def closed(T):
    out = []
    while len(out) < 4 or max(abs(t) for t in out[-3:]) > NOTHING:
        out.append(T(len(out)))
    return out


# Amplitudes

Q_OF_2K = [0.0, 1e-3, 0.05, 0.2, 0.5, 0.7071, 0.9, 1.0]


def amplitude(T, k, q, eta=0.0):
    k, s = mpf(k), mpf(q) / (2 * mpf(k))
    x = 1 - 2 * s * s
    total, before, p = mpc(0), mpf(0), mpf(1)
    sigma = loggamma(mpc(1, eta)).imag
    for l, t in enumerate(T):
        total += (2 * l + 1) * exp(2j * sigma) * t * p
        before, p = p, ((2 * l + 1) * x * p - l * before) / (l + 1)
        sigma += mp.atan2(mpf(eta), l + 1)
    total /= k
    if eta:
        total += -eta / (2 * k * s * s) * exp(2j * (loggamma(mpc(1, eta)).imag - eta * log(s)))
    return total


def written(z):
    return [float(z.real), float(z.imag)]


def entry(name, terms, k, T, difference, eta=0.0, sums=True, gsl=None):
    out = {"name": name, "terms": terms, "twoMuOverHbar2": TWO_MU, "k": k, "difference": difference}
    if eta:
        out["eta"] = eta
    out["T"] = [written(t) for t in T]
    if sums:
        points = [2 * k * share for share in Q_OF_2K if share or not eta]
        out["f"] = [[q, *written(amplitude(T, k, q, eta))] for q in points]
    if gsl is not None:
        out["gsl"] = gsl
    print(name, len(T), "waves, difference", difference, "gsl" if gsl else "", gsl or "", flush=True)
    return out


def smooth(name, forms, k, lmax, sums=True, look=(0, 1)):
    T, difference = waves(forms, k, lmax)
    for l in look:
        apart = float(abs(witness(forms, k, l) - T[l]))
        print("   DOP853 differs by", apart, "at l =", l)
        assert apart < 1e-10, (name, l)
    terms = [{"form": form.key, "values": form.values} for form in forms]
    while len(T) > 4 and sums and abs(T[-1]) < NOTHING:
        T.pop()
    assert not sums or abs(T[-1]) < 1e-15, (name, T[-1])
    return entry(name, terms, k, T, difference, sums=sums)


def spinning(name, forms, so, k, lmax):
    """T of j = l + 1/2 and of j = l - 1/2; f = Σ ((l+1) T+ + l T-) P_l/k and |g| = |Σ (T+ - T-) sin(theta) P_l'|/k."""
    (up, first), (down, second) = (waves(forms, k, lmax, spin=(so, sign)) for sign in (1, -1))
    assert abs(up[-1]) < 1e-15 > abs(down[-1]), name
    rows = []
    for share in Q_OF_2K:
        x, k_ = 1 - 2 * mpf(share) ** 2, mpf(k)
        f, g, p, before, slope, slope_before = mpc(0), mpc(0), mpf(1), mpf(0), mpf(0), mpf(0)
        for l in range(lmax + 1):
            f += ((l + 1) * up[l] + l * down[l]) * p
            g += (up[l] - down[l]) * sqrt(1 - x * x) * slope
            slope_before, slope = slope, slope_before + (2 * l + 1) * p
            before, p = p, ((2 * l + 1) * x * p - l * before) / (l + 1)
        rows.append([2 * k * share, *written(f / k_), float(abs(g / k_))])
    terms = [{"form": form.key, "values": form.values} for form in [*forms, so]]
    print(name, lmax + 1, "waves, difference", max(first, second), flush=True)
    out = {"name": name, "terms": terms, "twoMuOverHbar2": TWO_MU, "k": k, "difference": max(first, second)}
    return {**out, "up": [written(t) for t in up], "down": [written(t) for t in down], "f": rows}


def charged(name, forms, k, lmax, eta):
    """A point charge beside a short-range form; the strength of the term is 2 eta k / twoMuOverHbar2 over r, as an expression."""
    charge = REAL(2) * REAL(eta) * REAL(k)
    T, difference = waves(forms, k, lmax, charge, lambda x: coulomb_rows(lmax, eta, x))
    end = REAL(max(form.reach for form in forms))
    u, du = march(forms, k, lmax, end, 48, 0.22, charge)
    given = [from_gsl(l, eta, float(mpf(k) * mpf(float(end)))) for l in range(lmax + 1)]
    gsl = float(max(abs(T[l] - transition(u[l], du[l], k, [mpf(v) for v in row])) for l, row in enumerate(given) if row))
    while len(T) > 4 and abs(T[-1]) < NOTHING:
        T.pop()
    assert abs(T[-1]) < 1e-15, (name, T[-1])
    terms = [{"form": form.key, "values": form.values} for form in forms]
    return entry(name, terms, k, T, difference, eta, gsl=gsl)


def main():
    well, deep = {"V0": -8.0, "R": 5.0}, {"V0": -32.0, "R": 5.0}
    rows = []
    for k, lmax in ((0.2, 24), (1.0, 44), (4.0, 140)):
        rows.append(smooth(f"woodsSaxon, kR = {5 * k:g}", [wood(-8.0 if k < 4 else -32.0, 5.0, 0.6)], k, lmax))
        rows.append(smooth(f"woodsSaxon with absorption, kR = {5 * k:g}", [wood(-8.0, 5.0, 0.6, W0=-3.0)], k, lmax))
    rows.append(smooth("woodsSaxon that repels, kR = 5", [wood(12.0, 5.0, 0.6)], 1.0, 40))
    rows.append(smooth("yukawa, ka = 1", [yukawa(-6.0, 1.0)], 1.0, 70))
    rows.append(smooth("yukawa, ka = 0.05", [yukawa(-6.0, 1.0)], 0.05, 16))
    rows.append(smooth("yukawa that repels, ka = 4", [yukawa(40.0, 0.8)], 5.0, 190, look=(0, 3)))
    rows.append(smooth("gaussian, ka = 3", [gaussian(-20.0, 1.5)], 2.0, 30))
    rows.append(smooth("gaussian with absorption, ka = 3", [gaussian(-20.0, 1.5, W0=-10.0)], 2.0, 30))
    rows.append(smooth("exponential, ka = 1", [exponential(-10.0, 0.5)], 2.0, 70))
    rows.append(smooth("hulthen, ka = 1", [hulthen(-3.0, 1.0)], 1.0, 70))
    rows.append(smooth("woodsSaxon and yukawa", [wood(-16.0, 3.0, 0.4), yukawa(5.0, 0.7)], 1.5, 70))
    rows.append(smooth("polarization, k = 1", [polarization(1.5, 1.0)], 1.0, 8, sums=False, look=()))
    rows.append(smooth("polarization, k = 0.1", [polarization(1.5, 1.0)], 0.1, 4, sums=False, look=()))
    for eta in (1.5, -1.5):
        rows.append(charged(f"woodsSaxon beside a charge, eta = {eta}", [wood(-8.0, 5.0, 0.6)], 1.0, 50, eta))
    rows.append(charged("woodsSaxon with absorption beside a charge, eta = 4", [wood(-8.0, 5.0, 0.6, W0=-3.0)], 1.0, 54, 4.0))
    rows.append(charged("woodsSaxon beside a charge, eta = -0.25, kR = 20", [wood(-32.0, 5.0, 0.6)], 4.0, 140, -0.25))
    rows.append(charged("woodsSaxon beside a strong charge, eta = 16, kR = 20", [wood(-160.0, 5.0, 0.6)], 4.0, 120, 16.0))
    rows.append(charged("woodsSaxon with absorption beside a strong charge, eta = -8, kR = 10", [wood(-16.0, 5.0, 0.6, W0=-8.0)], 2.0, 90, -8.0))
    for k in (0.2, 1.0, 4.0):
        rows.append(entry(f"squareWell, kR = {5 * k:g}", [{"form": "squareWell", "values": well}], k, closed(square_well(k, **well)), 0.0))
        rows.append(entry(f"barrier, kR = {5 * k:g}", [{"form": "squareWell", "values": {"V0": 24.0, "R": 5.0}}], k, closed(square_well(k, 24.0, 5.0)), 0.0))
    rows.append(entry("squareWell with absorption, kR = 5", [{"form": "squareWell", "values": {**deep, "W0": -4.0}}], 1.0, closed(square_well(1.0, -32.0, 5.0, -4.0)), 0.0))
    rows.append(entry("deltaShell, kR = 3", [{"form": "deltaShell", "values": {"g": -6.0, "R": 2.0}}], 1.5, closed(delta_shell(1.5, -6.0, 2.0)), 0.0))
    rows.append(entry("deltaShell that repels, kR = 12", [{"form": "deltaShell", "values": {"g": 20.0, "R": 3.0}}], 4.0, closed(delta_shell(4.0, 20.0, 3.0)), 0.0))
    for k in (1e-3, 0.1, 1.0, 5.0, 10.0, 50.0):
        rows.append(entry(f"hardSphere, kR = {k:g}", [{"form": "hardSphere", "values": {"R": 1.0}}], k, closed(hard_sphere(k, 1.0)), 0.0))
    turning = [
        spinning("woodsSaxon and spinOrbit, kR = 5", [wood(-16.0, 5.0, 0.6)], surface(2e11, 5.0, 0.6), 1.0, 44),
        spinning("woodsSaxon with absorption and spinOrbit, kR = 10", [wood(-24.0, 5.0, 0.6, W0=-6.0)], surface(1e11, 4.5, 0.5), 2.0, 74),
    ]
    head = {
        "generator": "scripts/reference/methods/phase_shifts.py",
        "quantity": "T[l] = (S_l - 1)/2i, nuclear S_l where there is a charge, real and imaginary part; f = [q in 1/angstrom, Re f, Im f in angstrom]; with eta a term coulomb of strength 2 eta k/twoMuOverHbar2 stands beside the others; spinOrbit: up and down are T of j = l + 1/2 and l - 1/2, f = [q, Re f, Im f, |g|]",
    }
    lines = ",\n    ".join(json.dumps(row, allow_nan=False) for row in rows)
    spins = ",\n    ".join(json.dumps(row, allow_nan=False) for row in turning)
    OUT.mkdir(parents=True, exist_ok=True)
    (OUT / "phase-shifts.json").write_text(json.dumps(head, indent=2, ensure_ascii=False)[:-2] + ',\n  "rows": [\n    ' + lines + '\n  ],\n  "spinOrbit": [\n    ' + spins + "\n  ]\n}\n")


main()
