"""Reference estimates of first order, from the typed body to cross sections, in 50 digits, for tests/physics/observables.

Run:  python3 scripts/reference/observables/estimates.py        (Debian packages: python3-mpmath)
Writes tests/reference/observables/estimates.json. Constants are CODATA 2022 in decimals; hbar c = h c/(2 pi e) exactly. Kinematics,
transforms and integrals are the textbook ones, written here without regard to cancellation; the angular integrals are mpmath's own
quadrature in t = sin(theta/2). A value is kept as two doubles, high + low, so that a test can form (computed - high) - low.
"""

import json
import pathlib

from mpmath import acos, asin, atan2, cos, coth, exp, mp, mpf, pi, quad, sin, sinh, sqrt

mp.dps = 50
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "observables" / "estimates.json"

H, C_LIGHT, E_CHARGE = mpf("6.62607015e-34"), mpf(299792458), mpf("1.602176634e-19")
HBAR_C = H * C_LIGHT / (2 * pi * E_CHARGE) * mpf(10) ** 10  # eV angstrom
ALPHA = mpf("7.2973525643e-3")
MASS = {"electron": mpf("510998.95069"), "proton": mpf("938272089.43"), "neutron": mpf("939565421.94"), "alpha": mpf("3727379411.8")}
CHARGE = {"electron": -1, "proton": 1, "neutron": 0, "alpha": 2}
SPIN = {"electron": mpf(1) / 2, "proton": mpf(1) / 2, "neutron": mpf(1) / 2, "alpha": mpf(0)}
ENERGY = {"meV": mpf("1e-3"), "eV": mpf(1), "keV": mpf(1000), "MeV": mpf(10) ** 6}
LENGTH = {"angstrom": mpf(1), "fm": mpf("1e-5"), "nm": mpf(10)}
MASS_UNIT = {"u": mpf("931494103.72"), "MeV": mpf(10) ** 6}


def number(quantity, table):
    # The double that was typed is the input; its unit is exact.
    return mpf(repr(quantity["value"])) * table[quantity["unit"]]


def woods_saxon(q, R, a):
    z = exp(-R / a)
    n_max = int(mp.dps * 2.4 / (R / a)) + 3
    tail = sum((-1) ** (n - 1) * n * z**n / (n * n + (q * a) ** 2) ** 2 for n in range(1, n_max))
    if q == 0:
        main = R**3 / 3 + pi**2 * a**2 * R / 3
    else:
        p = pi * q * a
        main = pi * a / (q * sinh(p)) * (pi * a * coth(p) * sin(q * R) - R * cos(q * R))
    return main + 2 * a**3 * tail


def ball(q, R):
    return R**3 / 3 if q == 0 else (sin(q * R) - q * R * cos(q * R)) / q**3


def term(sent, charges, factor):
    """(complex strength, S(q)) of one term."""
    form = sent["form"]
    length = lambda key: number(sent[key], LENGTH)
    strength = number(sent["V0"], ENERGY) + 1j * number(sent.get("W0", {"value": 0, "unit": "eV"}), ENERGY) if "V0" in sent else None
    if form == "yukawa":
        a = length("a")
        return strength, lambda q: a**3 / (1 + (q * a) ** 2)
    if form == "exponential":
        a = length("a")
        return strength, lambda q: 2 * a**3 / (1 + (q * a) ** 2) ** 2
    if form == "gaussian":
        a = length("a")
        return strength, lambda q: sqrt(pi) / 4 * a**3 * exp(-((q * a) ** 2) / 4)
    if form == "squareWell":
        R = length("R")
        return strength, lambda q: ball(q, R)
    if form == "woodsSaxon":
        R, a = length("R"), length("a")
        return strength, lambda q: woods_saxon(q, R, a)
    if form == "deltaShell":
        R = length("R")
        assert sent["g"]["unit"] == "eV angstrom"
        return mpf(repr(sent["g"]["value"])), lambda q: R**2 if q == 0 else R * sin(q * R) / q
    product = mpf(sent.get("chargeProduct", charges[0] * charges[1])) * ALPHA * HBAR_C
    if form == "coulomb":
        return product, lambda q: 1 / q**2
    if form == "screenedCoulomb":
        a = length("a")
        return product, lambda q: a**2 / (1 + (q * a) ** 2)
    if form == "contact":
        return 4 * pi * length("b") / factor, lambda q: 1 / (4 * pi)
    raise ValueError(form)


def kinematics(body):
    m1 = MASS[body["projectile"]["species"]]
    target, T = body["target"], number(body["energy"], ENERGY)
    relativistic = body.get("kinematics") == "relativistic"
    if target["kind"] == "fixed":
        if relativistic:
            return sqrt(T * (T + 2 * m1)) / HBAR_C, m1 + T, None
        return sqrt(2 * m1 * T) / HBAR_C, m1, None
    m2 = MASS[target["species"]] if target["kind"] == "species" else number(target["mass"], MASS_UNIT)
    if relativistic:
        s = m1**2 + m2**2 + 2 * m2 * (T + m1)
        p = sqrt((s - (m1 + m2) ** 2) * (s - (m1 - m2) ** 2) / (4 * s))
        e1, e2 = sqrt(p**2 + m1**2), sqrt(p**2 + m2**2)
        beta = sqrt(T * (T + 2 * m1)) / (T + m1 + m2)
        return p / HBAR_C, e1 * e2 / (e1 + e2), (beta / (p / e1), 1 / sqrt(1 - beta**2))
    mu = m1 * m2 / (m1 + m2)
    return sqrt(2 * mu * T * m2 / (m1 + m2)) / HBAR_C, mu, (m1 / m2, mpf(1))


def branches(theta_lab, frame):
    """Centre-of-mass angles and dOmega_cm/dOmega_lab, by the tangent formula solved as a quadratic for cos(theta)."""
    rho, gamma = frame
    if theta_lab == 0:
        found = [mpf(0)] + ([pi] if rho > 1 else [])
    else:
        t2 = (gamma * mp.tan(theta_lab)) ** 2
        # sin² = t2 (cos + rho)²: (1 + t2) c² + 2 t2 rho c + t2 rho² - 1 = 0
        root = sqrt(1 + t2 - t2 * rho**2)
        candidates = [(-t2 * rho + sign * root) / (1 + t2) for sign in (1, -1)]
        same = lambda c: (c + rho) * cos(theta_lab) > 0
        found = [acos(c) for c in candidates if same(c)]
    out = []
    for theta in sorted(found):
        d = sqrt(sin(theta) ** 2 + gamma**2 * (cos(theta) + rho) ** 2)
        out.append((theta, d**3 / (gamma * abs(1 + rho * cos(theta)))))
    return out


def pair(value):
    high = float(value)
    return [high, float(value - mpf(high))]


def mott(body, charges, angle):
    """Point charge with recoil in the lab: energies by conservation, solved for the momentum that is left."""
    m, M, T = MASS["electron"], MASS[body["target"]["species"]], number(body["energy"], ENERGY)
    E = T + m
    p = sqrt(T * (T + 2 * m))
    left = mp.findroot(
        lambda x: E + M - sqrt(x**2 + m**2) - sqrt(M**2 + p**2 + x**2 - 2 * p * x * cos(angle)), p / (1 + E / M * (1 - cos(angle)))
    )
    half = sin(angle / 2) ** 2
    point = charges[0] * charges[1] * ALPHA * HBAR_C * E / (2 * p**2 * half)
    return point**2 * (1 - (p / E) ** 2 * half) * sqrt(left**2 + m**2) / E


def estimate(body):
    k, mu, frame = kinematics(body)
    factor = 2 * mu / HBAR_C**2
    target = body["target"]
    z2 = CHARGE[target["species"]] if target["kind"] == "species" else target["charge"]
    charges = (CHARGE[body["projectile"]["species"]], z2)
    parts = [term(sent, charges, factor) for sent in body["interaction"]["terms"]]
    f = lambda q: -factor * sum(strength * shape(q) for strength, shape in parts)
    square = lambda z: z.real**2 + z.imag**2 if isinstance(z, mp.mpc) else z**2
    identical = target["kind"] == "species" and target["species"] == body["projectile"]["species"]
    spin = SPIN[body["projectile"]["species"]]
    weight = 2 * (-1) ** int(2 * spin) / (2 * spin + 1)

    charged = all(sent["form"] in ("coulomb", "screenedCoulomb") for sent in body["interaction"]["terms"])
    lepton = body["projectile"]["species"] == "electron" and body.get("kinematics") == "relativistic" and charged
    gamma = 1 + number(body["energy"], ENERGY) / MASS[body["projectile"]["species"]]
    beta2 = 1 - 1 / gamma**2

    def dcs(t):
        direct = f(2 * k * t)
        if not identical:
            # The spin of a relativistic electron on a fixed charge, N. F. Mott (1929).
            return square(direct) * (1 - beta2 * t**2 if lepton else 1)
        exchanged = f(2 * k * sqrt(1 - t**2))
        return square(direct) + square(exchanged) + weight * (direct * mp.conj(exchanged)).real

    rows = []
    for theta in body["angles"]["values"]:
        angle = mpf(repr(theta)) * pi / 180
        if lepton and target["kind"] != "fixed":
            rows.append({"theta": theta, "dcs": pair(mott(body, charges, angle))})
            continue
        if body.get("frame") == "lab":
            ways = branches(angle, frame)
            value = sum(dcs(sin(cm / 2)) * jacobian for cm, jacobian in ways)
            if not ways:
                continue
            rows.append({"theta": theta, "dcs": pair(value), "branches": [pair(dcs(sin(cm / 2)) * j) for cm, j in ways]})
        else:
            rows.append({"theta": theta, "dcs": pair(dcs(sin(angle / 2)))})
    answer = {"k": pair(k), "differential": rows}
    if not any(sent["form"] == "coulomb" for sent in body["interaction"]["terms"]):
        scale = 1 / (2 * k)
        ranges = [number(s[key], LENGTH) for s in body["interaction"]["terms"] for key in ("a", "R") if key in s] or [1 / k]
        steps = sorted({mpf(0), mpf(1)} | {x for r in ranges for x in (scale / r * 2**n for n in range(-3, 12)) if x < 1}
                       | {n * 3 * scale / max(ranges) for n in range(1, int(max(ranges) / scale / 3) + 1) if n * 3 * scale / max(ranges) < 1})
        half = mpf(1) / 2 if identical else mpf(1)
        moment = lambda w: 8 * pi * half * quad(lambda t: dcs(t) * w(t) * t, steps, method="gauss-legendre", maxdegree=5)
        answer["elastic"] = pair(moment(lambda t: 1))
        answer["momentumTransfer"] = pair(moment(lambda t: 2 * t**2))
        answer["viscosity"] = pair(moment(lambda t: 4 * t**2 * (1 - t**2)))
        forward = f(mpf(0))
        answer["absorption"] = pair(4 * pi / k * (forward.imag if isinstance(forward, mp.mpc) else mpf(0)))
    return answer


def q(value, unit):
    return {"value": value, "unit": unit}


CM = {"unit": "deg", "values": [0, 1, 7.3, 30, 60, 90, 123.4, 179, 180]}
ELECTRON = {"projectile": {"species": "electron"}, "target": {"kind": "fixed", "charge": 0}, "methods": ["born1"], "angles": CM}
MIX = [
    {"form": "yukawa", "V0": q(-10, "eV"), "a": q(1, "angstrom")},
    {"form": "gaussian", "V0": q(35.5, "eV"), "a": q(0.6, "angstrom")},
    {"form": "squareWell", "V0": q(-3, "eV"), "W0": q(-1.25, "eV"), "R": q(1.7, "angstrom")},
]
NUCLEON = {"target": {"kind": "custom", "mass": q(39.96, "u"), "charge": 20, "spin": 0}, "methods": ["born1"], "angles": CM}
BODIES = [
    {**ELECTRON, "energy": q(100, "eV"), "interaction": {"terms": [{"form": "yukawa", "V0": q(-10, "eV"), "a": q(1, "angstrom")}]}},
    {**ELECTRON, "energy": q(0.01, "meV"), "interaction": {"terms": [{"form": "exponential", "V0": q(0.3, "eV"), "a": q(0.7, "angstrom")}]}},
    {**ELECTRON, "energy": q(100, "eV"), "interaction": {"terms": MIX}},
    {**ELECTRON, "energy": q(300, "keV"), "kinematics": "relativistic", "interaction": {"terms": [{"form": "screenedCoulomb", "a": q(0.2, "angstrom"), "chargeProduct": -6}]}},
    {**ELECTRON, "energy": q(500, "MeV"), "kinematics": "relativistic", "target": {"kind": "species", "species": "proton"}, "frame": "lab",
     "angles": {"unit": "deg", "values": [1, 10, 60, 90, 150, 180]}, "interaction": {"terms": [{"form": "coulomb"}]}},
    {**ELECTRON, "energy": q(100, "eV"), "interaction": {"terms": [{"form": "squareWell", "V0": q(-2, "eV"), "R": q(20, "angstrom")}]}},
    {**ELECTRON, "energy": q(100, "eV"), "interaction": {"terms": [{"form": "deltaShell", "g": q(-2, "eV angstrom"), "R": q(9.5, "angstrom")}]}},
    {**ELECTRON, "energy": q(2, "keV"), "interaction": {"terms": [{"form": "gaussian", "V0": q(-2, "eV"), "a": q(1.5, "angstrom")}]}},
    {**NUCLEON, "projectile": {"species": "neutron"}, "energy": q(14.1, "MeV"), "kinematics": "relativistic",
     "interaction": {"terms": [{"form": "woodsSaxon", "V0": q(-45, "MeV"), "W0": q(-7, "MeV"), "R": q(4.2, "fm"), "a": q(0.65, "fm")}]}},
    {**NUCLEON, "projectile": {"species": "neutron"}, "energy": q(25.3, "meV"), "interaction": {"terms": [{"form": "contact", "b": q(6.646, "fm")}]}},
    {**NUCLEON, "projectile": {"species": "alpha"}, "energy": q(5.486, "MeV"), "frame": "lab", "angles": {"unit": "deg", "values": [1, 10, 60, 90, 150, 180]},
     "interaction": {"terms": [{"form": "coulomb"}]}},
    {"projectile": {"species": "proton"}, "target": {"kind": "species", "species": "proton"}, "energy": q(2, "MeV"), "methods": ["born1"], "angles": CM,
     "interaction": {"terms": [{"form": "yukawa", "V0": q(-30, "MeV"), "a": q(1.4, "fm")}, {"form": "gaussian", "V0": q(90, "MeV"), "a": q(0.7, "fm")}]}},
    {"projectile": {"species": "alpha"}, "target": {"kind": "species", "species": "alpha"}, "energy": q(40, "MeV"), "methods": ["born1"], "frame": "lab",
     "angles": {"unit": "deg", "values": [0, 5, 30, 45, 60, 89.9]}, "interaction": {"terms": [{"form": "exponential", "V0": q(-8, "MeV"), "a": q(1.1, "fm")}]}},
    {"projectile": {"species": "alpha"}, "target": {"kind": "species", "species": "proton"}, "energy": q(20, "MeV"), "kinematics": "relativistic", "methods": ["born1"],
     "frame": "lab", "angles": {"unit": "deg", "values": [0, 1, 5, 10, 14, 14.5, 14.56]},
     "interaction": {"terms": [{"form": "gaussian", "V0": q(-20, "MeV"), "a": q(1.3, "fm")}]}},
]


def main():
    rows = []
    for body in BODIES:
        rows.append({"body": body, "expected": estimate(body)})
        print(len(rows), body["interaction"]["terms"][0]["form"], flush=True)
    head = {
        "generator": "scripts/reference/observables/estimates.py",
        "quantity": "value = high + low in angstrom, angstrom2 and angstrom2/sr (k in 1/angstrom); dcs in the frame of the body",
    }
    lines = ",\n    ".join(json.dumps(row) for row in rows)
    OUT.parent.mkdir(parents=True, exist_ok=True)
    OUT.write_text(json.dumps(head, indent=2)[:-2] + ',\n  "rows": [\n    ' + lines + "\n  ]\n}\n")


main()
