"""Coulomb functions by hypergeometric functions of many digits (DLMF 33.2.3, 33.2.7, 33.4.4), and those of the GNU Scientific Library.

Used by the generators beside it. Debian packages: python3-mpmath, libgsl27.
"""

import ctypes
import ctypes.util

from mpmath import exp, hyp1f1, hyperu, log, loggamma, mp, mpc, mpf, pi, sqrt

gsl = ctypes.CDLL(ctypes.util.find_library("gsl"))
gsl.gsl_set_error_handler_off()


class Result(ctypes.Structure):
    _fields_ = [("val", ctypes.c_double), ("err", ctypes.c_double)]


def from_gsl(l, eta, rho):
    """F, F', G, G', or None where the library refuses or scales."""
    results = [Result() for _ in range(4)]
    scale = [ctypes.c_double(), ctypes.c_double()]
    arguments = [ctypes.byref(r) for r in results] + [ctypes.byref(s) for s in scale]
    status = gsl.gsl_sf_coulomb_wave_FG_e(ctypes.c_double(eta), ctypes.c_double(rho), ctypes.c_double(l), ctypes.c_int(0), *arguments)
    return [r.val for r in results] if status == 0 and scale[0].value == 0 == scale[1].value else None


def regular(l, eta, rho):
    factor = mpf(2) ** l * exp(-pi * eta / 2 + loggamma(mpc(l + 1, eta)).real - loggamma(2 * l + 2))
    return (factor * rho ** (l + 1) * exp(-1j * rho) * hyp1f1(mpc(l + 1, -eta), 2 * l + 2, 2j * rho)).real


def irregular(l, eta, rho):
    a = mpc(l + 1, eta)
    theta = rho - eta * log(2 * rho) - l * pi / 2 + loggamma(a).imag
    z = -2j * rho
    return (exp(1j * theta) * exp(a * log(z)) * hyperu(a, 2 * l + 2, z)).real


def coulomb_values(l, eta, rho):
    """F, F', G, G' to 25 digits or more."""
    eta, rho = mpf(eta), mpf(rho)
    with mp.workdps(60 + int(1.4 * abs(eta) + 0.9 * rho)):
        f, above = regular(l, eta, rho), regular(l + 1, eta, rho)
    with mp.workdps(60 + int(1.4 * abs(eta))):
        g, g_above = irregular(l, eta, rho), irregular(l + 1, eta, rho)
        root, slope = sqrt(1 + (eta / (l + 1)) ** 2), (l + 1) / rho + eta / (l + 1)
        df, dg = slope * f - root * above, slope * g - root * g_above
        assert abs(df * g - f * dg - 1) < mpf(10) ** -25, (l, eta, rho)
    return f, df, g, dg


def coulomb_rows(lmax, eta, rho):
    """The same for l = 0 … lmax, F downwards and G upwards by recurrence in 60 digits more than are needed."""
    eta, rho = mpf(eta), mpf(rho)
    with mp.workdps(80 + int(1.4 * abs(eta) + 0.9 * rho)):
        root = [None] + [sqrt(1 + (eta / l) ** 2) for l in range(1, lmax + 3)]
        slope = [None] + [l / rho + eta / l for l in range(1, lmax + 3)]
        f = {l: regular(l, eta, rho) for l in (lmax, lmax + 1)}
        for l in range(lmax, 0, -1):
            f[l - 1] = ((slope[l] + slope[l + 1]) * f[l] - root[l + 1] * f[l + 1]) / root[l]
        g = {l: irregular(l, eta, rho) for l in (0, 1)}
        for l in range(1, lmax + 1):
            g[l + 1] = ((slope[l] + slope[l + 1]) * g[l] - root[l] * g[l - 1]) / root[l + 1]
        rows = []
        for l in range(lmax + 1):
            df, dg = slope[l + 1] * f[l] - root[l + 1] * f[l + 1], slope[l + 1] * g[l] - root[l + 1] * g[l + 1]
            assert abs(df * g[l] - f[l] * dg - 1) < mpf(10) ** -25, (l, eta, rho)
            rows.append((f[l], df, g[l], dg))
    return rows
