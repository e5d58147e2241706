"""Writes server/physics/tables/xray-form-factors/it92.json and waasmaier-kirfel-1995.json.

    /usr/bin/python3 scripts/reference/xray-form-factors/generate.py

Needs Debian's python3-gemmi 0.5.7 and python3-periodictable 1.6.0. Only numbers are taken, neutral atoms alone; each table names its publication.
"""

import sys
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parents[1]))
from table_file import write_table  # noqa: E402

import gemmi  # noqa: E402
import periodictable  # noqa: E402

SCRIPT = "scripts/reference/xray-form-factors/generate.py"
FORM = "f(s) = c + sum of a exp(-b s²), s = sin(theta/2)/lambda = q/4π in 1/angstrom; a and c in electrons, b in angstrom²"
COLUMNS = ["symbol", "a", "b", "c"]
elements = [gemmi.Element(z) for z in range(1, 99)]
# The package carries the bonded atom of Stewart, Davidson and Simpson under H. The free one of the same table, from memory; the tests hold it
# against the exact 1/(1 + (2π a0 s)²)².
FREE_HYDROGEN = ["H", [0.489918, 0.262003, 0.196767, 0.049879], [20.6593, 7.74039, 49.5519, 2.20159], 0.001305]


def waasmaier_kirfel():
    """symbol -> the eleven numbers of a neutral atom, in the order a1..a5, c, b1..b5."""
    path = Path(periodictable.__file__).parent / "xsf/f0_WaasKirf.dat"
    found, name = {}, None
    for line in path.read_text(encoding="latin1").splitlines():
        if line.startswith("#S"):
            name = line.split()[2]
        elif name and not line.startswith("#"):
            numbers = [float(word) for word in line.split()]
            if len(numbers) == 11:
                found[name] = numbers
                name = None
    return found


write_table(
    "xray-form-factors/it92.json",
    {
        "edition": "IT92",
        "source": "International Tables for Crystallography C (1992), table 6.1.1.4, four Gaussians and a constant, neutral atoms",
        "licence": "Numbers with their published source; read from Debian python3-gemmi 0.5.7, of which no file is taken",
        "script": SCRIPT,
        "notes": [
            FORM,
            "Fitted for s up to 2 per angstrom. Beyond, f tends to c, which for some atoms is large and of either sign (N -11.5 with a slow Gaussian): at s = 6 the electron scattering factor from it is wrong by up to 23 %.",
            "H is the free atom (coefficients from memory, within 1.4e-4 electrons of the exact factor up to s = 1), not the bonded one of Stewart, Davidson and Simpson.",
        ],
        "fittedTo": 2,
        "columns": COLUMNS,
    },
    {"atoms": [FREE_HYDROGEN, *([e.name, list(e.it92.a), list(e.it92.b), e.it92.c] for e in elements[1:])]},
)

table = waasmaier_kirfel()
write_table(
    "xray-form-factors/waasmaier-kirfel-1995.json",
    {
        "edition": "Waasmaier and Kirfel 1995",
        "source": "Waasmaier and Kirfel, Acta Cryst. A51 (1995) 416, five Gaussians and a constant fitted to the factors of International Tables C (1992), neutral atoms",
        "licence": "Numbers with their published source; by way of Debian python3-periodictable 1.6.0 (public domain)",
        "script": SCRIPT,
        "notes": [
            FORM,
            "Fitted for s up to 6 per angstrom: the table to use for the Mott-Bethe tail beyond s = 2. Never beyond 6, where the fit tends to c instead of falling and that of C, which has a slightly negative width, grows: there f lies between 0 and its value at 6, at most 6 % of the electrons.",
        ],
        "fittedTo": 6,
        "columns": COLUMNS,
    },
    {"atoms": [[e.name, table[e.name][:5], table[e.name][6:], table[e.name][5]] for e in elements]},
)
