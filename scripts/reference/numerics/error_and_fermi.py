"""Reference values of erf, erfc and the Fermi-Dirac integrals in server/physics/numerics, to 30 digits.

Run:  python3 scripts/reference/numerics/error_and_fermi.py        (Debian package: python3-mpmath)
Writes tests/reference/numerics/error-and-fermi.json; a value is high + low, two doubles. Every one is compared with mpmath's
quadrature of the defining integral before it is written.
"""

import json
import pathlib

from mpmath import erf, erfc, exp, gamma, inf, mp, mpf, pi, polylog, quad, sqrt

mp.dps = 50
OUT = pathlib.Path(__file__).resolve().parents[3] / "tests" / "reference" / "numerics"


def split(value):
    high = float(value)
    return {"high": high, "low": float(value - mpf(high))}


def error_functions():
    for argument in [0.0, 1e-300, 1e-9, 0.01, 0.3, 0.4999, 0.5, 0.7, 1.0, 1.7, 3.0, 5.5, 6.9, 7.1, 12.0, 26.0]:
        x = mpf(argument)
        direct = 2 / sqrt(pi) * exp(-x * x) * quad(lambda t: exp(-t * (2 * x + t)), [0, 1, 3, 12])
        assert abs(direct / erfc(x) - 1) < mpf(10) ** -30, argument
        yield {"x": argument, "erfc": split(erfc(x)), "erf": split(erf(x))}


def fermi_dirac():
    for order in (2, 3, 5):
        for argument in [-700.0, -60.0, -5.0, -1.0001, -0.9999, -0.1, 0.0, 0.3, 0.9, 2.0, 11.925, 100.0, 1e5]:
            eta = mpf(argument)
            value = -polylog(order, -exp(eta)) if eta < 200 else by_inversion(order, eta)
            value = mpf(value.real)
            cuts = [0] + [c for c in (1, 5, 20, 50, eta - 40, eta - 5, eta, eta + 5, eta + 40) if c > 0] + [max(eta, 0) + 120]
            # mpmath's tolerance is absolute: the size is taken out.
            size = exp(min(eta, 0))
            direct = size * quad(lambda t: t ** (order - 1) / (size + exp(t - max(eta, 0))), sorted(set(cuts))) / gamma(order)
            assert abs(direct / value - 1) < mpf(10) ** -25, (order, argument, direct, value)
            yield {"order": order, "eta": argument, **split(value)}


def by_inversion(order, eta):
    """The reflected part is below e^-200."""
    return {2: eta**2 / 2 + pi**2 / 6, 3: eta**3 / 6 + pi**2 * eta / 6, 5: eta**5 / 120 + pi**2 * eta**3 / 36 + 7 * pi**4 * eta / 360}[order]


def main():
    tables = {"errorFunctions": list(error_functions()), "fermiDirac": list(fermi_dirac())}
    head = {"generator": "scripts/reference/numerics/error_and_fermi.py", "quantity": "value = high + low"}
    parts = [json.dumps(head, indent=2)[:-2]]
    for name, rows in tables.items():
        parts.append(f'  "{name}": [\n    ' + ",\n    ".join(json.dumps(row) for row in rows) + "\n  ]")
        print(name, len(rows))
    OUT.mkdir(parents=True, exist_ok=True)
    (OUT / "error-and-fermi.json").write_text(",\n".join(parts) + "\n}\n")


main()
