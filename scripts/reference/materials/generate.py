"""Writes server/physics/tables/materials/handbooks-2024.json from the lines typed here.

    /usr/bin/python3 scripts/reference/materials/generate.py
"""

import sys
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parents[1]))
from table_file import write_table  # noqa: E402

PDG, CRC, MAKER = "PDG", "CRC", "maker"
SOURCES = {
    PDG: "Review of Particle Physics (Particle Data Group), Atomic and nuclear properties of materials; from memory",
    CRC: "CRC Handbook of Chemistry and Physics; from memory",
    MAKER: "Typical of makers' data sheets; from memory",
}

# key | label | formula | density g/cm³ or gas | lowest and highest | phase | source | notes
LINES = """
graphite | Graphite | C | 2.21 | 1.7 2.26 | solid | PDG | Pores decide the density: weigh it. The ideal crystal has 2.26.
carbon-evaporated | Carbon, evaporated film | C | 1.9 | 1.8 2.0 | solid | maker | Holds some per cent of hydrogen and oxygen.
diamond | Diamond | C | 3.515 | | solid | CRC |
beryllium | Beryllium | Be | 1.848 | | solid | PDG | Dust and oxide are toxic: do not machine it.
lithium | Lithium | Li | 0.534 | | solid | PDG | Reacts with water and air. Often depleted in Li-6: state the isotopes.
aluminium | Aluminium | Al | 2.699 | | solid | PDG |
silicon | Silicon | Si | 2.329 | | solid | PDG | Single crystals channel charged beams.
titanium | Titanium | Ti | 4.54 | 4.50 4.54 | solid | PDG | Handbooks differ by 1 %.
vanadium | Vanadium | V | 6.11 | 6.0 6.11 | solid | PDG | Scatters neutrons almost only incoherently: the usual standard.
iron | Iron | Fe | 7.874 | | solid | PDG | Magnetic: neutrons and slow electrons feel its field.
nickel | Nickel | Ni | 8.902 | | solid | PDG |
copper | Copper | Cu | 8.96 | | solid | PDG |
germanium | Germanium | Ge | 5.323 | | solid | PDG |
molybdenum | Molybdenum | Mo | 10.22 | | solid | PDG |
silver | Silver | Ag | 10.5 | | solid | PDG |
cadmium | Cadmium | Cd | 8.65 | | solid | PDG | Toxic. Its neutron absorption does not follow 1/v.
tantalum | Tantalum | Ta | 16.654 | | solid | PDG |
tungsten | Tungsten | W | 19.3 | | solid | PDG |
platinum | Platinum | Pt | 21.45 | | solid | PDG |
gold | Gold | Au | 19.32 | 19.28 19.32 | solid | PDG |
lead | Lead | Pb | 11.35 | | solid | PDG | Toxic: wash hands.
bismuth | Bismuth | Bi | 9.747 | | solid | PDG |
uranium | Uranium | U | 18.95 | | solid | PDG | Toxic, a controlled material: ask the responsible officer. Burns as fine powder.
polyethylene | Polyethylene | CH2 | 0.94 | 0.91 0.97 | solid | PDG | Loses hydrogen under a charged beam.
polyethylene-deuterated | Polyethylene, deuterated | CD2 | 1.06 | 1.04 1.10 | solid | maker | Deuteration is never complete: state it.
polystyrene | Polystyrene | C8H8 | 1.05 | 1.03 1.06 | solid | PDG | Base of many plastic scintillators.
pet | PET film | C10H8O4 | 1.4 | 1.38 1.40 | solid | PDG |
polyimide | Polyimide film | C22H10N2O5 | 1.42 | | solid | PDG |
pmma | PMMA | C5H8O2 | 1.19 | 1.17 1.20 | solid | PDG |
water | Water, 25 °C | H2O | 0.99705 | | liquid | CRC | 0.9982 at 20 °C.
heavy-water | Heavy water | D2O | 1.107 | 1.104 1.107 | liquid | CRC | Takes up hydrogen from moist air: state the purity.
ice | Ice, 0 °C | H2O | 0.917 | | solid | CRC |
silica | Silica glass | SiO2 | 2.2 | 2.19 2.21 | solid | PDG |
sapphire | Sapphire | Al2O3 | 3.97 | 3.97 3.99 | solid | PDG | Ceramic alumina is less dense.
lithium-fluoride | Lithium fluoride | LiF | 2.635 | | solid | PDG | Often enriched in Li-6: state the isotopes.
calcium-fluoride | Calcium fluoride | CaF2 | 3.18 | | solid | PDG |
boron-carbide | Boron carbide | B4C | 2.52 | 2.3 2.52 | solid | PDG | Sintered parts are less dense. State the isotopes of boron.
silicon-nitride | Silicon nitride membrane | Si3N4 | 3.17 | 2.8 3.2 | solid | maker | Membranes are rich in silicon and less dense than the crystal.
caesium-iodide | Caesium iodide | CsI | 4.51 | | solid | PDG |
sodium-iodide | Sodium iodide | NaI | 3.67 | | solid | PDG | Takes up water: sealed.
air | Air, dry | N1.56168O0.41972Ar0.00934C0.0004 | gas | | gas | PDG | One formula unit is one mean molecule.
hydrogen-gas | Hydrogen | H2 | gas | | gas | PDG | Forms explosive mixtures with air.
deuterium-gas | Deuterium | D2 | gas | | gas | PDG | Forms explosive mixtures with air.
helium-gas | Helium | He | gas | | gas | PDG |
helium-3-gas | Helium-3 | 3He | gas | | gas | PDG | Scarce: the counter gas of neutron detectors.
nitrogen-gas | Nitrogen | N2 | gas | | gas | PDG | Displaces oxygen in closed rooms.
argon-gas | Argon | Ar | gas | | gas | PDG | Displaces oxygen in closed rooms.
boron-trifluoride | Boron trifluoride | BF3 | gas | | gas | CRC | Very toxic and corrosive. Often enriched in B-10: state the isotopes.
"""

entries = []
for line in LINES.strip().splitlines():
    key, label, formula, density, limits, phase, source, *note = [part.strip() for part in line.split("|")]
    entries.append(
        [
            key,
            label,
            formula,
            None if density == "gas" else float(density),
            [float(limit) for limit in limits.split()] or None,
            phase,
            source,
            note[0] if note else "",
        ]
    )

write_table(
    "materials/handbooks-2024.json",
    {
        "edition": "Handbooks 2024",
        "source": "; ".join(SOURCES.values()),
        "licence": "Numbers with their published source; notes our own",
        "script": "scripts/reference/materials/generate.py",
        "notes": [
            "Typical densities at 20 °C and one atmosphere, to start from. What was weighed or measured is worth more; an areal density most of all.",
            "The range, where given, is what is sold under the name: an input uncertainty, not a confidence interval.",
            "Gases have no density here: it follows from pressure and temperature.",
            "The notes name what to ask before use and are no safety sheet.",
        ],
        "sources": SOURCES,
        "columns": ["key", "label", "formula", "density", "range", "phase", "source", "notes"],
    },
    {"materials": entries},
)
