"""Writes server/physics/tables/screening/published.json from the coefficients typed here, and prints what their sums leave.

    /usr/bin/python3 scripts/reference/screening/generate.py
"""

import sys
from decimal import Decimal
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parents[1]))
from table_file import write_table  # noqa: E402

# key, label, length over the Bohr radius, (weight, decay) as printed, source.
SCREENINGS = [
    (
        "moliere",
        "Molière",
        "(9π²/128)^(1/3) Z^(-1/3)",
        "0.88534",
        [("0.35", "0.3"), ("0.55", "1.2"), ("0.10", "6.0")],
        "Molière, Z. Naturforsch. 2a (1947) 133",
    ),
    (
        "krc",
        "Kr–C",
        "0.8853 (Z1^(1/2) + Z2^(1/2))^(-2/3)",
        "0.8853",
        [("0.190945", "0.278544"), ("0.473674", "0.637174"), ("0.335381", "1.919249")],
        "Wilson, Haggmark and Biersack, Phys. Rev. B 15 (1977) 2458",
    ),
    (
        "universalIon",
        "Universal ion–atom",
        "0.8854 (Z1^0.23 + Z2^0.23)^(-1)",
        "0.8854",
        [("0.1818", "3.2"), ("0.5099", "0.9423"), ("0.2802", "0.4029"), ("0.02817", "0.2016")],
        "Ziegler, Biersack and Littmark, The Stopping and Range of Ions in Solids (Pergamon, New York 1985)",
    ),
]

entries = []
for key, label, length, prefactor, terms, source in SCREENINGS:
    residual = sum(Decimal(weight) for weight, _ in terms) - 1
    print(f"{key}: the weights add up to 1 {'+' if residual >= 0 else '-'} {abs(residual)}")
    entries.append(
        {
            "key": key,
            "label": label,
            "lengthFormula": length,
            "prefactor": float(prefactor),
            "weights": [float(weight) for weight, _ in terms],
            "decays": [float(decay) for _, decay in terms],
            "residual": float(residual),
            "source": source,
        }
    )

write_table(
    "screening/published.json",
    {
        "edition": "as printed 1947, 1977, 1985",
        "source": "; ".join(source for *_, source in SCREENINGS),
        "licence": "Numbers with their published source",
        "script": "scripts/reference/screening/generate.py",
        "notes": [
            "Screening function: sum of weight exp(-decay r/a), a = lengthFormula times the Bohr radius. V = Z1 Z2 e²/r times it.",
            "`residual`: what the printed weights add up to, less 1. That of the universal function is 7e-5: its potential at the origin is that much stronger than the bare Coulomb one. Coefficients are used as printed, not rescaled.",
            "Molière's function fits the Thomas-Fermi one: bad for Z below about 10 and far out. The two others are for ions on atoms, averaged over many pairs.",
            "Kr–C coefficients from memory; their sum to six digits and an openly published transcription agree.",
            "The printed prefactors 0.8853 and 0.8854 are the Thomas-Fermi number (9π²/128)^(1/3) = 0.885341377 rounded. Molière's length uses 0.88534.",
        ],
    },
    {"screenings": entries},
)
