"""Laws of the blackbody, from their definitions, and the CIE 1931 table from a general-purpose color library.

The color-matching functions are those of Debian's colord-data (the file below, from the colord project), rounded to the six
decimals that CIE 15 prints; the file named on the command line is read instead of the installed one.
"""

import platform
import sys

import mpmath
from mpmath import exp, expm1, findroot, mpf, pi, zeta

import constants as K
from formulas_output import DIGITS, tabulate, write

COLORD = "/usr/share/colord/cmf/CIE1931-2deg-XYZ.cmf"
m = mpf
C = m(K.C)
TEMPERATURES = [2.7255, 300.0, 2970.1, 5772.0]
SETS = list(K.SETS)


def con(name, key):
    return m(K.SETS[name][key])


def planck(nu, T, name):
    h = con(name, "h")
    return 2 * h * nu ** 3 / C ** 2 / expm1(h * nu / (con(name, "k") * T))


def photons(T, name):
    return 16 * pi * zeta(3) * (con(name, "k") * T / (con(name, "h") * C)) ** 3


def wien_wavelength(T, name):
    x = findroot(lambda x: x - 5 * (1 - exp(-x)), m("4.965"))
    return con(name, "h") * C / (con(name, "k") * x) / T


def wien_frequency(T, name):
    x = findroot(lambda x: x - 3 * (1 - exp(-x)), m("2.82"))
    return x * con(name, "k") / con(name, "h") * T


def color_matching(path):
    """{nm: (x, y, z)} from 380 to 780 nm."""
    rows, numbers = [], False
    start = step = None
    for line in open(path):
        words = line.split()
        if line.startswith("SPECTRAL_START_NM"):
            start = int(float(words[1]))
        if line.startswith("SPECTRAL_END_NM"):
            end = int(float(words[1]))
        if line.startswith("SPECTRAL_BANDS"):
            step = (end - start) // (int(words[1]) - 1)
        if line.startswith("END_DATA") and "FORMAT" not in line:
            numbers = False
        if numbers and words:
            rows.append([round(float(w), 6) for w in words])
        if line.startswith("BEGIN_DATA") and "FORMAT" not in line:
            numbers = True
    if len(rows) != 3 or step != 5:
        raise ValueError("%s: expected three rows in steps of 5 nm" % path)
    return {start + step * i: values for i, values in enumerate(zip(*rows)) if 380 <= start + step * i <= 780}


def main():
    path = sys.argv[1] if len(sys.argv) > 1 else COLORD
    put = lambda *given: tabulate(given[0], given[1], "blackbody.py", *given[2:])
    both = [(T, name) for T in TEMPERATURES for name in SETS]
    put("planckLaw", "Planck 1901", ["frequency", "temperature", "constants"], planck,
        [(nu, T, name) for nu, T in ((1e9, 2.7255), (160.23e9, 2.7255), (9e11, 2.7255), (5e14, 2970.1), (3e13, 300.0)) for name in SETS])
    put("photonNumberDensity", "Planck 1901: 16 pi zeta(3) (kT/hc)^3", ["temperature", "constants"], photons, both)
    put("wienWavelength", "Wien 1893: root of x = 5 (1 - e^-x) by mpmath", ["temperature", "constants"], wien_wavelength, both)
    put("wienFrequency", "Wien 1893: root of x = 3 (1 - e^-x) by mpmath", ["temperature", "constants"], wien_frequency, both)

    table = color_matching(path)
    tools = "Python %s, mpmath %s at %d digits, Debian colord-data 1.4.6" % (platform.python_version(), mpmath.__version__, DIGITS)
    source = "CIE 15, table T.4: color-matching functions of the 2-degree observer, colord's CIE1931-2deg-XYZ.cmf to six decimals"
    write("colorMatching", source, "blackbody.py", ["wavelengthInNanometers", "coordinate"],
          [([nm, axis], table[nm][axis]) for nm in sorted(table) for axis in range(3)], tools)

    def color(T, name, axis):
        sums = [mpf(0)] * 3
        for nm, values in table.items():
            wavelength = m(nm) * m("1e-9")
            power = wavelength ** -5 / expm1(con(name, "h") * C / (wavelength * con(name, "k") * T))
            sums = [s + power * m(repr(v)) for s, v in zip(sums, values)]
        return sums["xyz".index(axis)] / sum(sums)

    write("blackbodyChromaticity", source + "; sum over 380 to 780 nm in steps of 5 nm of Planck's law",
          "blackbody.py", ["temperature", "constants", "coordinate"],
          [([T, name, axis], color(m(T), name, axis)) for T in (1500.0, 2856.0, 3000.0, 6504.0, 20000.0)
           for name in ("codata2010", "codata2022") for axis in "xy"], tools)


if __name__ == "__main__":
    main()
