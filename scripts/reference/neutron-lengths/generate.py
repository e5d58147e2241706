"""Writes server/physics/tables/neutron-lengths/rauch-waschkowski-2003.json. Run after the generator of nuclides.

    /usr/bin/python3 scripts/reference/neutron-lengths/generate.py

Needs Debian's python3-periodictable 1.6.0 (public domain), whose table of Rauch and Waschkowski (2003) is read as text, and python3-gemmi 0.5.7
for the comparison with Sears (1992). Finds and lists what the table contradicts itself in.
"""

import json
import math
import re
import sys
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parents[1]))
from table_file import ROOT, write_table  # noqa: E402

import gemmi  # noqa: E402
from periodictable import nsf  # noqa: E402

WAVELENGTH = 1.798
TOLERANCE = 0.03

# Lowest level, eV, of nuclides whose capture departs from 1/v below about 1 eV for it; negative: a bound level. From memory, to choose by only.
LEVELS = {
    "Rh-103": 1.26, "Cd-113": 0.178, "In-113": 1.80, "In-115": 1.46, "Sm-149": 0.097, "Eu-151": 0.32, "Eu-153": 1.7, "Gd-155": 0.027,
    "Gd-157": 0.031, "Dy-160": 1.9, "Dy-163": 1.7, "Dy-164": -1.9, "Er-167": 0.46, "Yb-168": 0.60, "Lu-176": 0.14, "Hf-177": 1.1, "Ta-180": 0.43,
    "Ir-191": 0.65, "Ir-193": 1.3, "Hg-199": -2, "Pa-231": 0.40, "U-233": 0.17, "U-235": 0.29, "Np-237": 0.49, "Pu-239": 0.30, "Pu-240": 1.06,
    "Am-243": 1.4,
}
# An isotope matters for the element where it does more than this part of the absorption.
SHARE = 0.05

nuclides = json.loads((ROOT / "server/physics/tables/nuclides/ame2012.json").read_text())
symbols = nuclides["elements"]
abundance = {name: fraction for name, _, fraction, _ in nuclides["nuclides"] if fraction is not None}


def measured(cell):
    """(value, standard uncertainty, remark) of a cell such as 35.24(2)*, 940.0(4.0), <6.0E-6 or nothing. (4) counts last digits, (4.0) units."""
    if cell == "":
        return None, None, ""
    remark = "limit" if cell.startswith("<") else "estimate" if cell.endswith("*") else ""
    text = cell.lstrip("<").rstrip("*")
    found = re.match(r"^([-+0-9.E]+?)(?:\(([0-9.]+)\))?$", text)
    if not found:  # a misprint such as 0.011(59 without its bracket: the value stands, the uncertainty does not
        return float(text.split("(")[0]), None, remark
    value, spread = found.groups()
    if spread is None:
        return float(value), None, remark
    decimals = len(value.partition(".")[2])
    scale = 1 if "." in spread else 10**-decimals
    spread = spread.rstrip(".")  # one cell ends "(19.0.)"
    return float(value), float(f"{float(spread) * scale:.3g}"), remark


def name_of(key):
    _, symbol, *mass = key.split("-")
    return "-".join([symbol, *mass])


def half_digit(cell):
    digits = cell.split("(")[0].partition(".")[2]
    return 0.5 * 10 ** -len(digits)


imaginary = {name_of(line.split(",")[0]): measured(line.split(",")[1])[0] for line in nsf.nsftableI.rstrip("\\").splitlines()}
entries, printed = [], {}
for line in nsf.nsftable.rstrip("\\").splitlines():
    key, _, _, b, _, _, flag, coherent, incoherent, _, absorbed = line.split(",")[:11] if not line.startswith("0-") else [""] * 11
    if not key:  # the neutron on the neutron is no target
        continue
    name = name_of(key)
    cells = [measured(cell) for cell in (b, coherent, incoherent, absorbed)]
    remarks = []
    if cells[0][2]:
        remarks.append("b is an estimate")
    if cells[2][2]:
        remarks.append("sigma_inc is an estimate")
    if cells[3][2]:
        remarks.append("sigma_abs is an upper limit")
    printed[name] = (b, coherent)
    entries.append({"name": name, "cells": [cell[:2] for cell in cells], "remarks": remarks, "energyDependent": flag == "E"})
by_name = {entry["name"]: entry for entry in entries}

for entry in entries:
    name = entry["name"]
    symbol = name.split("-")[0]
    # He-3 is marked energy-dependent by the source, but its absorption follows 1/v over all slow neutrons.
    resonant = name in LEVELS or (entry["energyDependent"] and name != "He-3")
    if "-" not in name and not resonant:
        total = entry["cells"][3][0] or 0
        part = sum(
            abundance.get(level, 0) * (by_name[level]["cells"][3][0] or 0)
            for level in by_name
            if level.startswith(f"{symbol}-") and (level in LEVELS or by_name[level]["energyDependent"]) and level != "He-3"
        )
        resonant = part > SHARE * total
    entry["resonant"] = resonant


def bound_square(entry):
    """|b|² in fm², the imaginary part as tabulated or from the absorption."""
    length, absorbed = entry["cells"][0][0], entry["cells"][3][0] or 0
    part = imaginary.get(entry["name"], -absorbed / (2000 * WAVELENGTH))
    return length**2 + part**2


exceptions, absorption_exceptions = [], []
for entry in entries:
    name, (length, _), (coherent, _), (absorbed, _) = entry["name"], *[entry["cells"][index] for index in (0, 1, 3)]
    if length is not None and coherent is not None:
        sigma = 4 * math.pi * bound_square(entry) / 100
        if abs(sigma - coherent) > max(TOLERANCE * coherent, half_digit(printed[name][1])):
            exceptions.append([name, length, coherent, float(f"{sigma:.4g}")])
    if name in imaginary:
        sigma = -2000 * WAVELENGTH * imaginary[name]
        if abs(sigma / absorbed - 1) > TOLERANCE:
            absorption_exceptions.append([name, imaginary[name], absorbed, float(f"{sigma:.4g}")])

differs = []
for z, symbol in enumerate(symbols[:96], start=1):
    own = [entry for entry in entries if entry["name"] == symbol] or [entry for entry in entries if entry["name"].startswith(f"{symbol}-")]
    if not own or own[0]["cells"][0][0] is None:
        continue
    sears = gemmi.Element(z).neutron92.calculate_sf(0)
    if sears and abs(own[0]["cells"][0][0] - sears) > 0.006:
        differs.append([symbol, own[0]["cells"][0][0], round(sears, 4)])

rows = [
    [entry["name"], *[number for cell in entry["cells"] for number in cell], imaginary.get(entry["name"]), entry["resonant"], "; ".join(entry["remarks"])]
    for entry in entries
]
write_table(
    "neutron-lengths/rauch-waschkowski-2003.json",
    {
        "edition": "Rauch and Waschkowski 2003",
        "source": "Rauch and Waschkowski, Neutron scattering lengths, in: Neutron Data Booklet, 2nd edition (Old City, Philadelphia 2003), elements and isotopes",
        "licence": "Debian python3-periodictable 1.6.0 (public domain)",
        "script": "scripts/reference/neutron-lengths/generate.py",
        "notes": [
            "Why this edition: it has isotopes as well as elements, uncertainties, and lengths revised since Sears (1992), under free terms. Its price is that lengths were renewed and cross sections were not: see `exceptions`.",
            "Bound lengths b = b' - i b'' in fm (`imaginary` is -b'', as printed); bound cross sections in barn; absorption at 1.798 angstrom (2200 m/s), proportional to the wavelength except for `resonant` entries.",
            "`resonant`: a level below about 2 eV, or a bound one, bends the absorption away from 1/v, and b depends on the energy. Marked by the source (E), by the known lowest level (from memory), or for an element because such isotopes do more than 5 % of its absorption. He-3 is marked E by the source too, but follows 1/v.",
            "`exceptions`: 4π|b|² departs from the printed coherent cross section by more than 3 % (and more than half its last digit). |b|² includes the imaginary part, as tabulated or from the absorption.",
            "`absorptionExceptions`: the absorption that the printed imaginary part implies, 4π b''/k, departs from the printed one by more than 3 %.",
            "`differsFromSears1992`: element, b here, b in Sears, Neutron News 3 no. 3 (1992) 26, where they are more than 0.006 fm apart.",
        ],
        "wavelength": WAVELENGTH,
        "columns": ["name", "b", "u(b)", "sigmaCoherent", "u", "sigmaIncoherent", "u", "sigmaAbsorption", "u", "imaginary", "resonant", "remark"],
    },
    {
        "exceptions": exceptions,
        "absorptionExceptions": absorption_exceptions,
        "differsFromSears1992": differs,
        "entries": rows,
    },
)
print("resonant:", " ".join(entry["name"] for entry in entries if entry["resonant"]))
