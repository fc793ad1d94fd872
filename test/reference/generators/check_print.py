"""Prints the reference beside print and beside exact solutions; ends 1 when one misses.  Writes nothing.

Print: Planck Collaboration VI 2020, A&A 641, A6, Table 2, TT,TE,EE+lowE+lensing (model planckFifthColumn; z_*, z_drag and k_D of this
column are what the correction was fitted to, so they only show that the equations are the same); Callin 2006, astro-ph/0606683.
Exact: Einstein-de Sitter, Milne, de Sitter, Mattig 1958, flat Lambda, matter and radiation (Hogg 1999; textbook).
"""

import json
import os
import sys

import numpy as np
from scipy.optimize import brentq

import background as B
import output
import saha

missed = 0


def line(label, ours, expected, tolerance):
    global missed
    off = abs(float(ours) - float(expected))
    ok = off <= tolerance
    missed += not ok
    print("%-52s %-24.17g %-24.17g %.1e %s" % (label, float(ours), float(expected), off, "" if ok else "MISSED"))


def value(name, model="planckFifthColumn"):
    with open(os.path.join(output.VALUES, name + ".json")) as f:
        return next(r[-2] for r in json.load(f)["rows"] if r[0] == model)


def planck():
    for name, expected, half in (
        ("lastScatteringRedshift.calibrated", 1089.92, 0.005), ("dragRedshift.calibrated", 1059.94, 0.005),
        ("lastScatteringSoundHorizon.calibrated", 144.43, 0.005), ("dragSoundHorizon.calibrated", 147.09, 0.005),
        ("acousticAngle.calibrated", 1.04110, 5e-5), ("dampingWavenumber.calibrated", 0.14087, 5e-6),
        ("age", 13.797, 0.0005), ("equalityRedshift", 3402, 1.0), ("equalityWavenumber", 0.010384, 1e-6),
        ("equalitySoundAngle.calibrated", 0.4494, 5e-5),
    ):
        line("Planck 2018 VI Table 2: " + name, value(name), expected, half)
    line("omega_nu of 0.06 eV at N_eff 3.046: 6.4522e-4", value("neutrinoDensity"), 6.4522e-4, 5e-9)
    line("helium of the printed column, about 0.2454", value("helium"), 0.2454, 5e-5)


def callin():
    """Pure hydrogen, h 0.7, T 2.725 K, Omega_b 0.046: x_e = 0.99 at z = 1587.6 with 13.6057 eV, 1586.7 with the limit used here."""
    b = B.Background({"hubble": 70, "baryonDensity": 0.046 * 0.49, "coldMatterDensity": 0.1, "photonTemperature": 2.725, "helium": 0.0},
                     B.LOOSE)
    s = saha.Saha(b)
    find = lambda: brentq(lambda z: float(s.fractions(np.array([np.log1p(z)]))[0][0]) - 0.99, 1400, 1800)
    line("Callin 2006, hydrogen limit of NIST", find(), 1586.7, 0.05)
    s.kelvin = dict(s.kelvin, H_limit=13.6057 * b.con["e"] / b.con["k"])
    line("Callin 2006, 13.6057 eV", find(), 1587.6, 0.05)


def cold(hubble, matter, curvature=0.0, temperature=1e-7):
    """A model almost without radiation: at 1e-7 K it holds 1e-30 of the critical density."""
    return B.Background({"hubble": hubble, "baryonDensity": 0.0, "coldMatterDensity": matter, "curvature": curvature,
                         "photonTemperature": temperature, "neutrinos": {"masses": [0, 0, 0]}, "helium": 0.25}, B.TIGHT)


def exact():
    L = np.longdouble
    rel = lambda label, ours, expected: line(label + " (ratio)", ours / expected, 1, 1e-15)
    b = cold(50.0, 0.25)
    D_H, T_H = b.c_over_H0, 1 / b.H0 / b.Gyr
    for z in (0.0001, 1.25, 1100.0):
        zz = 1 + L(repr(z))
        rel("Einstein-de Sitter D_M at %g" % z, b.transverseDistance(z), -2 * D_H * np.expm1(-np.log1p(L(repr(z))) / 2))
        rel("Einstein-de Sitter age at %g" % z, b.ageAt(z), 2 * T_H / 3 / zz ** L("1.5"))
    rel("Einstein-de Sitter D_A at 5/4, 8/27 D_H", b.angularDiameterDistance(1.25), 8 * D_H / 27)
    b = cold(70.0, 0.0, 1.0)
    rel("Milne D_L at 3", b.luminosityDistance(3.0), b.c_over_H0 * 3 * L("2.5"))
    b = cold(70.0, 0.0)
    rel("de Sitter D_L at 3", b.luminosityDistance(3.0), b.c_over_H0 * 12)
    rel("de Sitter event horizon at 0, c/H", b.eventHorizon(0.0), b.c_over_H0)
    b = cold(50.0, 0.0625, 0.75)
    O, z = b.Omega_m, L("1.25")
    q = 2 * (O * z + (O - 2) * (np.sqrt(1 + O * z) - 1)) / (O * O)
    rel("Mattig D_L, Omega_m 1/4, at 1.25", b.luminosityDistance(1.25), b.c_over_H0 * q)
    chi = b.comovingDistance(1.25) / b.c_over_H0
    root = np.sqrt(L("0.75"))
    s = np.sinh(root * chi) / root
    rel("open volume at 1.25, Hogg eq. 29", b.comovingVolume(1.25),
        4 * b.pi * (b.c_over_H0 / 1000) ** 3 / L("1.5") * (s * np.sqrt(1 + L("0.75") * s * s) - np.arcsinh(root * s) / root))
    b = cold(50.0, 0.0625)
    rel("flat Lambda age", b.age(), 2 * (1 / b.H0 / b.Gyr) / 3 / np.sqrt(b.dark) * np.arcsinh(np.sqrt(b.dark / b.Omega_m)))
    hot = B.Background({"hubble": 100.0, "baryonDensity": 0.0, "coldMatterDensity": 0.75, "photonTemperature": 20.0,
                        "neutrinos": {"masses": [0, 0, 0]}, "helium": 0.25}, B.TIGHT)
    # matter and radiation at 1e6, where Lambda is 1e-25 of them
    a, r, m = 1 / L(1000001), hot.omega_r / hot.h2, hot.Omega_m
    rel("matter and radiation conformal time at 1e6", hot.conformalTime(1e6),
        hot.c_over_H0 * 2 / m * (a * m / (np.sqrt(r + m * a) + np.sqrt(r))))


if __name__ == "__main__":
    planck()
    callin()
    exact()
    print("missed: %d" % missed)
    sys.exit(1 if missed else 0)
