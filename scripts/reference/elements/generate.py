"""Writes server/physics/tables/elements/ciaaw2021.json.

    /usr/bin/python3 scripts/reference/elements/generate.py

Needs Debian's python3-periodictable 1.6.0 (public domain), for the densities. Weights and names are typed here. As a check every weight is
compared with the one that the composition in server/physics/tables/nuclides gives; departures above 1e-4 are printed.
"""

import json
import sys
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parents[1]))
from table_file import ROOT, write_table  # noqa: E402

from periodictable.density import element_densities  # noqa: E402

NAMES = """Hydrogen Helium Lithium Beryllium Boron Carbon Nitrogen Oxygen Fluorine Neon Sodium Magnesium Aluminium Silicon Phosphorus Sulfur
Chlorine Argon Potassium Calcium Scandium Titanium Vanadium Chromium Manganese Iron Cobalt Nickel Copper Zinc Gallium Germanium Arsenic Selenium
Bromine Krypton Rubidium Strontium Yttrium Zirconium Niobium Molybdenum Technetium Ruthenium Rhodium Palladium Silver Cadmium Indium Tin Antimony
Tellurium Iodine Xenon Caesium Barium Lanthanum Cerium Praseodymium Neodymium Promethium Samarium Europium Gadolinium Terbium Dysprosium Holmium
Erbium Thulium Ytterbium Lutetium Hafnium Tantalum Tungsten Rhenium Osmium Iridium Platinum Gold Mercury Thallium Lead Bismuth Polonium Astatine
Radon Francium Radium Actinium Thorium Protactinium Uranium Neptunium Plutonium Americium Curium Berkelium Californium Einsteinium Fermium
Mendelevium Nobelium Lawrencium Rutherfordium Dubnium Seaborgium Bohrium Hassium Meitnerium Darmstadtium Roentgenium Copernicium Nihonium
Flerovium Moscovium Livermorium Tennessine Oganesson""".split()

# Prohaska et al. 2022, abridged to value and uncertainty where the standard weight is an interval.
WEIGHTS = """H 1.0080 0.0002 1.00784 1.00811; He 4.002602 0.000002; Li 6.94 0.06 6.938 6.997; Be 9.0121831 0.0000005; B 10.81 0.02 10.806 10.821;
C 12.011 0.002 12.0096 12.0116; N 14.007 0.001 14.00643 14.00728; O 15.999 0.001 15.99903 15.99977; F 18.998403162 0.000000005;
Ne 20.1797 0.0006; Na 22.98976928 0.00000002; Mg 24.305 0.002 24.304 24.307; Al 26.9815384 0.0000003; Si 28.085 0.001 28.084 28.086;
P 30.973761998 0.000000005; S 32.06 0.02 32.059 32.076; Cl 35.45 0.01 35.446 35.457; Ar 39.95 0.16 39.792 39.963; K 39.0983 0.0001;
Ca 40.078 0.004; Sc 44.955907 0.000004; Ti 47.867 0.001; V 50.9415 0.0001; Cr 51.9961 0.0006; Mn 54.938043 0.000002; Fe 55.845 0.002;
Co 58.933194 0.000003; Ni 58.6934 0.0004; Cu 63.546 0.003; Zn 65.38 0.02; Ga 69.723 0.001; Ge 72.630 0.008; As 74.921595 0.000006;
Se 78.971 0.008; Br 79.904 0.003 79.901 79.907; Kr 83.798 0.002; Rb 85.4678 0.0003; Sr 87.62 0.01; Y 88.905838 0.000002; Zr 91.224 0.002;
Nb 92.90637 0.00001; Mo 95.95 0.01; Ru 101.07 0.02; Rh 102.90549 0.00002; Pd 106.42 0.01; Ag 107.8682 0.0002; Cd 112.414 0.004;
In 114.818 0.001; Sn 118.710 0.007; Sb 121.760 0.001; Te 127.60 0.03; I 126.90447 0.00003; Xe 131.293 0.006; Cs 132.90545196 0.00000006;
Ba 137.327 0.007; La 138.90547 0.00007; Ce 140.116 0.001; Pr 140.90766 0.00001; Nd 144.242 0.003; Sm 150.36 0.02; Eu 151.964 0.001;
Gd 157.25 0.03; Tb 158.925354 0.000007; Dy 162.500 0.001; Ho 164.930329 0.000005; Er 167.259 0.003; Tm 168.934219 0.000005; Yb 173.045 0.010;
Lu 174.9668 0.0001; Hf 178.486 0.006; Ta 180.94788 0.00002; W 183.84 0.01; Re 186.207 0.001; Os 190.23 0.03; Ir 192.217 0.002; Pt 195.084 0.009;
Au 196.966570 0.000004; Hg 200.592 0.003; Tl 204.38 0.01 204.382 204.385; Pb 207.2 1.1 206.14 207.94; Bi 208.98040 0.00001; Th 232.0377 0.0004;
Pa 231.03588 0.00001; U 238.02891 0.00003"""

GASES = {"H", "He", "N", "O", "F", "Ne", "Cl", "Ar", "Kr", "Xe", "Rn"}
LIQUIDS = {"Br", "Hg"}
# What the source's caveat means to whoever fills in a target.
CAVEATS = {
    "C": "graphite as bought, 1.9 to 2.3; ideal crystal 2.26; evaporated films 1.8 to 2.0",
    "P": "white phosphorus",
    "S": "rhombic",
    "Se": "grey",
    "Sn": "white tin",
    "Ga": "at 29.6 °C, just below melting",
    "Ru": "other handbooks give 12.1 to 12.45",
    "Cs": "melts at 28.5 °C",
}

nuclides = json.loads((ROOT / "server/physics/tables/nuclides/ame2012.json").read_text())
symbols = nuclides["elements"]
composed = {}
for name, mass, abundance, _ in nuclides["nuclides"]:
    if abundance is not None:
        symbol = name.split("-")[0]
        composed[symbol] = composed.get(symbol, 0) + mass * abundance

weights = {}
for item in WEIGHTS.split(";"):
    symbol, *numbers = item.split()
    weights[symbol] = [float(number) for number in numbers]


def phase(z, symbol):
    if symbol in GASES:
        return "gas"
    if symbol in LIQUIDS:
        return "liquid"
    return "unknown" if z > 98 or symbol in ("At", "Fr") else "solid"


def density(symbol, state):
    """g/cm³ and what to know of it. The source lists a gas as its boiling liquid: left out."""
    found = element_densities.get(symbol)
    value, caveat = found if isinstance(found, tuple) else (found, "")
    if state == "gas" or value is None:
        return None, ""
    caveat = caveat.replace("T=25", "at 25 °C").replace("T=18.7", "at 18.7 °C").replace("T=17", "at 17 °C")
    return value, CAVEATS.get(symbol, caveat)


rows = []
for index, symbol in enumerate(symbols):
    z = index + 1
    value, uncertainty, *interval = weights.get(symbol, [None, None])
    if value is not None and abs(composed[symbol] / value - 1) > 1e-4:
        print(f"{symbol}: {value} against {composed[symbol]:.6f} from the composition")
    state = phase(z, symbol)
    rows.append([z, symbol, NAMES[index], value, uncertainty, interval or None, state, *density(symbol, state)])

write_table(
    "elements/ciaaw2021.json",
    {
        "edition": "CIAAW 2021",
        "source": "Standard atomic weights: Prohaska et al., Pure Appl. Chem. 94 (2022) 573 (IUPAC/CIAAW 2021). Densities at 20 °C unless said: CRC Handbook of Chemistry and Physics, 80th edition (1999), as in the ILL Neutron Data Booklet (2003)",
        "licence": "Numbers with their published source; densities by way of Debian python3-periodictable 1.6.0 (public domain)",
        "script": "scripts/reference/elements/generate.py",
        "notes": [
            "Where the standard weight is an interval, `weight` and `weightUncertainty` are its abridged value and uncertainty, and `interval` holds it: natural material varies by more than the uncertainty of any measurement.",
            "Commercial lithium is often depleted in Li-6, boron may be either way, and lead depends on the ore.",
            "A null weight: no isotope lives long enough to define a standard weight; name a nuclide.",
            "Gases have no density here: it follows from pressure and temperature.",
            "Densities are of the bulk element. Films, foils and powders differ by several per cent: an areal density that was weighed is worth more.",
        ],
        "columns": ["atomicNumber", "symbol", "name", "weight", "weightUncertainty", "interval", "phase", "density", "densityNote"],
    },
    {"elements": rows},
)
