"""Writes tests/reference/constants/codata.json: recommended values of the two newest CODATA editions as SciPy carries them (BSD-3).

    python3 scripts/reference/constants/generate.py > tests/reference/constants/codata.json

Needs SciPy 1.15 or later (the first with CODATA 2022; Debian 12's 1.10 has 2018 only).
"""

import json
import scipy
from scipy.constants import _codata

NAMES = {
    "planck": ("Planck constant", 1),
    "elementaryCharge": ("elementary charge", 1),
    "speedOfLight": ("speed of light in vacuum", 1),
    "boltzmann": ("Boltzmann constant", 1),
    "avogadro": ("Avogadro constant", 1),
    "fineStructure": ("fine-structure constant", 1),
    "bohrRadius": ("Bohr radius", 1e10),
    "hartree": ("Hartree energy in eV", 1),
    "classicalElectronRadius": ("classical electron radius", 1e10),
    "atomicMass": ("atomic mass constant energy equivalent in MeV", 1e6),
    "electronMass": ("electron mass energy equivalent in MeV", 1e6),
    "muonMass": ("muon mass energy equivalent in MeV", 1e6),
    "protonMass": ("proton mass energy equivalent in MeV", 1e6),
    "neutronMass": ("neutron mass energy equivalent in MeV", 1e6),
    "deuteronMass": ("deuteron mass energy equivalent in MeV", 1e6),
    "tritonMass": ("triton mass energy equivalent in MeV", 1e6),
    "helionMass": ("helion mass energy equivalent in MeV", 1e6),
    "alphaMass": ("alpha particle mass energy equivalent in MeV", 1e6),
}


def edition(constants):
    return {
        key: {"value": constants[name][0], "uncertainty": constants[name][2], "scale": scale}
        for key, (name, scale) in NAMES.items()
    }


EXACT = {"2018": _codata.exact2018, "2022": _codata.exact2022}
tables = {
    year: edition(_codata.parse_constants_2018toXXXX(getattr(_codata, f"txt{year}"), exact))
    for year, exact in EXACT.items()
}
print(json.dumps({"generator": "scripts/reference/constants/generate.py", "source": f"SciPy {scipy.__version__}, scipy.constants (BSD-3), after NIST", **tables}, indent=1))
