"""Writes tests/reference/kinematics/two-body.json: elastic two-body kinematics with 120 digits, each rounded to the nearest double.

    python3 scripts/reference/kinematics/generate.py > tests/reference/kinematics/two-body.json

Needs mpmath (Debian python3-mpmath). The route is not that of the engine: four-vectors are boosted, angles are those of the boosted
momenta, the ratio of solid angles is a numerical derivative, lab angles are inverted by bisection. Without relativity velocities are added.
"""

import json
from mpmath import mp, mpf, sqrt, sin, cos, atan2, diff, pi, acos

# Energies of a neutron at 1e-6 eV cancel 30 digits, a numerical derivative takes half of the rest.
mp.dps = 120
H, E, C = mpf("6.62607015e-34"), mpf("1.602176634e-19"), mpf(299792458)
HBAR_C = H * C / (2 * pi * E) * mpf(10) ** 10

ELECTRON, PROTON, NEUTRON, ALPHA = 510998.95069, 938272089.43, 939565421.94, 3727379411.8
GOLD, CARBON, KILOGRAM = 183432811400.0, 11177929229.5, 5.609588603804452e35
CASES = [
    ("electron on fixed, 100 eV", ELECTRON, None, 100.0, "nonrelativistic"),
    ("electron on fixed, 200 keV", ELECTRON, None, 200e3, "relativistic"),
    ("electron on fixed, 1 meV", ELECTRON, None, 1e-3, "relativistic"),
    ("electron on proton, 1 GeV", ELECTRON, PROTON, 1e9, "relativistic"),
    ("electron on proton, 1e17 eV", ELECTRON, PROTON, 1e17, "relativistic"),
    ("neutron on carbon, 1e-6 eV", NEUTRON, CARBON, 1e-6, "relativistic"),
    ("neutron on carbon, thermal", NEUTRON, CARBON, 0.0253, "nonrelativistic"),
    ("alpha on gold, 5.486 MeV", ALPHA, GOLD, 5.486e6, "nonrelativistic"),
    ("alpha on gold, 5.486 MeV, relativistic", ALPHA, GOLD, 5.486e6, "relativistic"),
    ("alpha on proton, 4 MeV", ALPHA, PROTON, 4e6, "nonrelativistic"),
    ("alpha on proton, 10 GeV", ALPHA, PROTON, 1e10, "relativistic"),
    ("alpha on electron, 5 MeV", ALPHA, ELECTRON, 5e6, "nonrelativistic"),
    ("proton on proton, 1 GeV", PROTON, PROTON, 1e9, "relativistic"),
    ("proton on proton, 1 MeV", PROTON, PROTON, 1e6, "nonrelativistic"),
    ("electron on electron, 100 keV", ELECTRON, ELECTRON, 1e5, "relativistic"),
    ("neutron on proton, 1 MeV", NEUTRON, PROTON, 1e6, "nonrelativistic"),
    ("projectile heavier by 1e-8", PROTON * (1 + 1e-8), PROTON, 1e6, "relativistic"),
    ("electron on a kilogram, 1 MeV", ELECTRON, KILOGRAM, 1e6, "relativistic"),
]
CM_ANGLES = [0.0, 1e-9, 1e-3, 0.3, 1.0, 1.5707963267948966, 2.0, 2.9, 3.1415, 3.141592653589]
LAB_ANGLES = [0.0, 1e-9, 1e-3, 0.05, 0.2, 0.25, 0.5, 1.0, 1.5, 1.5707, 1.6, 2.5, 3.14]


class Collision:
    def __init__(self, m1, m2, energy, regime):
        self.m1, self.t = mpf(m1), mpf(energy)
        self.fixed = m2 is None
        self.m2 = mpf("1e400") if self.fixed else mpf(m2)
        self.relativistic = regime == "relativistic"
        m1, m2, t = self.m1, self.m2, self.t
        if self.relativistic:
            e1 = t + m1
            self.p_lab = sqrt(e1**2 - m1**2)
            self.beta_cm = self.p_lab / (e1 + m2)
            self.gamma = 1 / sqrt(1 - self.beta_cm**2)
            self.p = self.gamma * (self.p_lab - self.beta_cm * e1)
            self.e1, self.e2 = sqrt(self.p**2 + m1**2), sqrt(self.p**2 + m2**2)
            self.mu = self.e1 * self.e2 / (self.e1 + self.e2)
            self.energy_cm = (self.e1 - m1) + (self.e2 - m2)
            self.beta_lab = self.p_lab / e1
        else:
            self.p_lab = sqrt(2 * m1 * t)
            self.beta_lab = self.p_lab / m1
            self.beta_cm = self.p_lab / (m1 + m2)
            self.gamma = mpf(1)
            self.p = m1 * (self.beta_lab - self.beta_cm)
            self.mu = 1 / (1 / m1 + 1 / m2)
            self.energy_cm = self.p**2 / (2 * self.mu)
        if self.fixed:
            self.p = self.p_lab
            self.energy_cm = t
            self.gamma = mpf(1)
            self.mu = m1 + t if self.relativistic else m1

    def outgoing(self, theta):
        """Lab momentum (across, along) and kinetic energy of the projectile."""
        across, along = self.p * sin(theta), self.p * cos(theta)
        if self.fixed:
            return across, along, self.t
        if self.relativistic:
            z = self.gamma * (along + self.beta_cm * self.e1)
            energy = self.gamma * (self.e1 + self.beta_cm * along) - self.m1
            return across, z, energy
        z = along + self.m1 * self.beta_cm
        return across, z, (across**2 + z**2) / (2 * self.m1)

    def lab(self, theta):
        across, along, _ = self.outgoing(theta)
        return atan2(across, along)

    def jacobian(self, theta):
        """dOmega_cm/dOmega_lab through mu = cos(theta)."""
        def lab_cosine(c):
            s2 = 1 - c**2
            along = self.p * c
            if not self.fixed:
                along = self.gamma * (along + self.beta_cm * self.e1) if self.relativistic else along + self.m1 * self.beta_cm
            return along / sqrt(self.p**2 * s2 + along**2)
        return abs(1 / diff(lab_cosine, cos(theta)))

    def recoil(self, theta):
        across, along, _ = self.outgoing(theta)
        if self.fixed or theta == 0:
            return None
        return atan2(across, self.p_lab - along)

    def turning(self):
        """Centre-of-mass angle of the largest lab angle, None for a lighter or equal projectile."""
        if self.fixed or self.m1 <= self.m2:
            return None
        v1 = self.p / self.e1 if self.relativistic else self.p / self.m1
        return acos(-v1 / self.beta_cm)

    def invert(self, lab):
        turning = self.turning()
        if turning is None:
            if not self.fixed and self.m1 == self.m2 and lab >= pi / 2:
                return []
            brackets = [(mpf(0), pi)]
        else:
            if lab >= self.lab(turning):
                return []
            brackets = [(mpf(0), turning), (turning, pi)]
        if lab == 0:
            return [mpf(0)] if turning is None else [mpf(0), pi]
        return [self.bisect(lab, *bracket) for bracket in brackets]

    def bisect(self, lab, low, high):
        rising = self.lab(high) > self.lab(low)
        for _ in range(240):
            middle = (low + high) / 2
            if (self.lab(middle) < lab) == rising:
                low = middle
            else:
                high = middle
        return (low + high) / 2


def row(name, m1, m2, energy, regime):
    c = Collision(m1, m2, energy, regime)
    turning = c.turning()
    values = {
        "k": c.p / HBAR_C,
        "momentumLab": c.p_lab,
        "reducedMass": c.mu,
        "twoMuOverHbar2": 2 * c.mu / HBAR_C**2,
        "energyCm": c.energy_cm,
        "betaLab": c.beta_lab,
        "relativeVelocity": c.p / c.mu,
    }
    angles = []
    for theta in CM_ANGLES:
        t = mpf(theta)
        recoil = c.recoil(t)
        angles.append({
            "thetaCm": theta,
            "thetaLab": float(c.lab(t)),
            "jacobian": float(c.jacobian(t)),
            "kept": float(c.outgoing(t)[2] / c.t),
            "recoilAngle": None if recoil is None else float(recoil),
        })
    lab = []
    for angle in LAB_ANGLES:
        branches = c.invert(mpf(angle))
        lab.append({
            "thetaLab": angle,
            "branches": [{"thetaCm": float(t), "jacobian": float(c.jacobian(t))} for t in branches],
        })
    return {
        "name": name,
        "input": {"projectileMass": m1, "targetMass": m2, "energy": energy, "regime": regime},
        "values": {key: float(value) for key, value in values.items()},
        "thetaMax": None if turning is None else float(c.lab(turning)),
        "cm": angles,
        "lab": lab,
    }


print(json.dumps({"generator": "scripts/reference/kinematics/generate.py", "cases": [row(*case) for case in CASES]}, indent=1))
