"""Writes server/physics/tables/nuclear-charge/devries1987-angeli2013.json from the numbers typed here.

    /usr/bin/python3 scripts/reference/nuclear-charge/generate.py

Needs Debian's python3-mpmath. A Fermi shape is kept only if its rms radius, by the exact moments, is within 1 % of the radius of 2013, or agrees
with the rms printed beside it in 1987. What is dropped is listed in the table.
"""

import sys
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parents[1]))
from table_file import write_table  # noqa: E402

import mpmath  # noqa: E402

TOLERANCE = 0.01

# rms charge radii, fm: Angeli and Marinova 2013, compared with an openly published transcription of that table.
RADII = """H-3 1.7591; He-3 1.9661; Li-6 2.589; Li-7 2.444; Be-9 2.519; B-10 2.4277; B-11 2.406; C-12 2.4702; C-13 2.4614; N-14 2.5582; N-15 2.6058;
O-16 2.6991; O-18 2.7726; F-19 2.8976; Ne-20 3.0055; Ne-22 2.9525; Na-23 2.9936; Mg-24 3.057; Mg-26 3.0337; Al-27 3.061; Si-28 3.1224; P-31 3.1889;
S-32 3.2611; Ar-36 3.3905; Ar-40 3.4274; Ca-40 3.4776; Ca-48 3.4771; Ti-48 3.5921; V-51 3.6002; Cr-50 3.6588; Cr-52 3.6452; Cr-53 3.6511; Mn-55 3.7057;
Fe-54 3.6933; Fe-56 3.7377; Fe-58 3.7745; Co-59 3.7875; Ni-58 3.7757; Ni-60 3.8118; Cu-63 3.8823; Cu-65 3.9022; Zn-64 3.9283; Zn-66 3.9491;
Zn-68 3.9658; Zn-70 3.9845; Ge-70 4.0414; Ge-72 4.0576; Sr-88 4.224; Y-89 4.243; Zr-90 4.2694; Nb-93 4.324; Mo-98 4.4091; Ag-107 4.5454;
Cd-110 4.5765; Cd-112 4.5944; Cd-114 4.6087; Cd-116 4.6203; In-115 4.6156; Sn-112 4.5948; Sn-116 4.625; Sn-118 4.6393; Sn-120 4.6519; Sn-124 4.6735;
I-127 4.75; Xe-132 4.7859; Cs-133 4.8041; La-139 4.855; Nd-142 4.9123; Sm-152 5.0819; Ho-165 5.2022; Ta-181 5.3507; W-184 5.3658; Pt-195 5.427;
Au-197 5.4371; Pb-206 5.4902; Pb-207 5.4943; Pb-208 5.5012; Bi-209 5.5211; Th-232 5.7848; U-238 5.8571"""
# CODATA 2022 for the three whose radii muonic atoms have changed since; that of H-2 from memory.
CODATA = {"H-1": 0.84075, "H-2": 2.12778, "He-4": 1.6785}

# Half-density radius c and diffuseness a, fm: de Vries, de Jager and de Vries 1987. First those compared with an open transcription of it.
TRANSCRIBED = """F-19 2.58 0.567; Ne-20 2.740 0.572; Ne-22 2.782 0.549; Mg-24 2.98 0.55132; Mg-26 3.05 0.523; Ar-36 3.54 0.507; Ar-40 3.53 0.542;
Ti-48 3.84315 0.5885; V-51 3.94 0.505; Cr-50 3.941 0.5665; Cr-52 4.01015 0.5785; Cr-53 4.000 0.557; Mn-55 3.8912 0.567; Fe-54 4.074 0.536; Fe-56 4.111 0.558;
Fe-58 4.027 0.576; Co-59 4.158 0.575; Cu-63 4.218 0.596; Cu-65 4.252 0.589; Zn-64 4.285 0.584; Zn-66 4.340 0.559; Zn-68 4.393 0.544; Zn-70 4.426 0.551;
Ge-70 4.442 0.5857; Ge-72 4.452 0.5737; Sr-88 4.83 0.49611; Y-89 4.76 0.57129; Nb-93 4.875 0.57329; Au-197 6.38 0.535; Th-232 6.7915 0.57115; U-238 6.8054 0.60516"""
FROM_MEMORY = """Al-27 3.07 0.519; Si-28 3.14 0.537; Cd-110 5.33 0.535; Cd-112 5.38 0.532; Cd-114 5.40 0.537; Cd-116 5.42 0.532; In-115 5.24 0.52; Sn-112 5.375 0.560;
Sn-116 5.358 0.550; Sn-118 5.412 0.560; Sn-124 5.490 0.534; La-139 5.71 0.535; Nd-142 5.774 0.513; Sm-152 5.804 0.581; Ho-165 6.18 0.57;
Ta-181 6.38 0.64; W-184 6.51 0.535; Pb-206 6.61 0.545; Pb-207 6.62 0.546; Pb-208 6.624 0.549; Bi-209 6.75 0.468"""
# rms printed beside c and a in 1987, from memory, with half a unit of its last digit.
PRINTED_RMS = {"Au-197": (5.33, 0.005), "Pb-208": (5.521, 0.001)}


def items(text):
    for item in text.split(";"):
        name, *numbers = item.split()
        yield name, [float(number) for number in numbers]


def fermi_rms(c, a):
    """sqrt of the ratio of the fourth and the second moment of 1/(1 + exp((r - c)/a)), by polylogarithms."""
    argument = -mpmath.exp(mpmath.mpf(c) / a)
    second = -2 * mpmath.mpf(a) ** 3 * mpmath.polylog(3, argument)
    fourth = -24 * mpmath.mpf(a) ** 5 * mpmath.polylog(5, argument)
    return float(mpmath.sqrt(mpmath.re(fourth) / mpmath.re(second)))


radii = {name: numbers[0] for name, numbers in items(RADII)} | CODATA
shapes, dropped = {}, []
for origin, text in (("transcription", TRANSCRIBED), ("memory", FROM_MEMORY)):
    for name, (c, a) in items(text):
        rms = fermi_rms(c, a)
        deviation = rms / radii[name] - 1
        printed, digit = PRINTED_RMS.get(name, (0, 0))
        if abs(rms - printed) <= digit:
            shapes[name] = [c, a, origin, "rms printed 1987"]
        elif abs(deviation) <= TOLERANCE:
            shapes[name] = [c, a, origin, "radius of 2013"]
        else:
            dropped.append([name, c, a, round(rms, 4), radii[name]])

symbols = "H He Li Be B C N O F Ne Na Mg Al Si P S Ar Ca Ti V Cr Mn Fe Co Ni Cu Zn Ge Sr Y Zr Nb Mo Ag Cd In Sn I Xe Cs La Nd Sm Ho Ta W Pt Au Pb Bi Th U"
order = {symbol: index for index, symbol in enumerate(symbols.split())}
names = sorted(radii, key=lambda name: (order[name.split("-")[0]], int(name.split("-")[1])))
rows = [
    [name, radii[name], "CODATA 2022" if name in CODATA else "Angeli and Marinova 2013", *shapes.get(name, [None, None, None, None])]
    for name in names
]
write_table(
    "nuclear-charge/devries1987-angeli2013.json",
    {
        "edition": "de Vries 1987, Angeli and Marinova 2013",
        "source": "rms charge radii: Angeli and Marinova, At. Data Nucl. Data Tables 99 (2013) 69; H-1, H-2, He-4: CODATA 2022. Two-parameter Fermi shapes: de Vries, de Jager and de Vries, At. Data Nucl. Data Tables 36 (1987) 495",
        "licence": "Numbers with their published source",
        "script": "scripts/reference/nuclear-charge/generate.py",
        "notes": [
            "Lengths in fm. c is the half-density radius, a the diffuseness of 1/(1 + exp((r - c)/a)); 90 to 10 % thickness 4.394 a.",
            "The two tables disagree: of gold c and a give 5.327 fm (5.33 printed in 1987), the radius of 2013 is 5.437. Name the one that was used.",
            "`origin` of c and a: compared with an open transcription of the table of 1987, or from memory. `check`: the independent number that their rms was held against. The rms of H-2, and those printed in 1987, from memory.",
            "`dropped`: nuclide, c, a, rms from them, radius of 2013: shapes that miss it by more than 1 %. They are not offered.",
        ],
        "columns": ["nuclide", "rms", "rmsSource", "c", "a", "origin", "check"],
    },
    {"dropped": dropped, "nuclides": rows},
)
print(len(shapes), "shapes; dropped:", " ".join(row[0] for row in dropped))
