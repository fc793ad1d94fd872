"""Holds the TIGHT run of background.py against mpmath at 30 digits, from formulas written again; prints the worst difference.

The Fermi-Dirac integral is here by mpmath's adaptive quad with break points, not by the trapezoidal rule, tabulated as a
Chebyshev series of 26 terms on each of 24 pieces in ln y (measured at points between: 5e-27), else nested quadrature takes an hour.
"""

import sys

import mpmath as mp
import numpy as np

import background as B
import constants as K
import output
import saha

mp.mp.dps = 30
PIECES = []


def exact_fermi(y):
    cuts = [0, y, 2 * y] if y < 1 else [0]
    return mp.quad(lambda x: x * x * mp.sqrt(x * x + y * y) / (mp.exp(x) + 1), cuts + [2, 5, 10, 20, 40, 80])


def chebyshev_table():
    """ln F over ln y from ln 1e-5 to ln 1e4 (below: F(0) and its first correction, y^2 pi^2/24)."""
    low, high, pieces, terms = mp.log(mp.mpf("1e-5")), mp.log(mp.mpf("1e4")), 24, 26
    for p in range(pieces):
        a = low + (high - low) * p / pieces
        b = low + (high - low) * (p + 1) / pieces
        nodes = [mp.cos(mp.pi * (k + mp.mpf(1) / 2) / terms) for k in range(terms)]
        values = [mp.log(exact_fermi(mp.exp((a + b) / 2 + (b - a) / 2 * x))) for x in nodes]
        coefficients = [
            2 * mp.fsum(v * mp.cos(mp.pi * j * (k + mp.mpf(1) / 2) / terms) for k, v in enumerate(values)) / terms
            for j in range(terms)]
        PIECES.append((a, b, coefficients))
    return max(abs(fermi(mp.mpf(y)) / exact_fermi(mp.mpf(y)) - 1) for y in ("1.234e-5", "0.0031", "0.77", "3.3", "41", "777", "9000"))


def fermi(y):
    if y < mp.mpf("1e-5"):
        return 7 * mp.pi ** 4 / 120 + y * y * mp.pi ** 2 / 24
    t = mp.log(y)
    p = min(int((t - PIECES[0][0]) / (PIECES[0][1] - PIECES[0][0])), len(PIECES) - 1)
    a, b, coefficients = PIECES[p]
    x = (2 * t - a - b) / (b - a)
    d = dd = mp.mpf(0)
    for c in reversed(coefficients[1:]):
        d, dd = 2 * x * d - dd + c, d
    return mp.exp(x * d - dd + coefficients[0] / 2)


class Plain:
    def __init__(self, givens):
        g = K.flat(givens)
        con = {k: mp.mpf(v) for k, v in K.SETS[g["constants"]].items()}
        get = lambda key: mp.mpf(repr(g[key]))
        c = mp.mpf(K.C)
        self.Mpc = mp.mpf(10) ** 6 * 648000 / mp.pi * mp.mpf(K.AU)
        self.H0 = get("hubble") * 1000 / self.Mpc
        rho = 3 * self.H0 ** 2 / (8 * mp.pi * con["G"])
        h = get("hubble") / 100
        T = get("photonTemperature")
        self.photons = 4 * con["sigma_SB"] / c ** 3 * T ** 4 / rho
        self.cb = (get("baryonDensity") + get("coldMatterDensity")) / h ** 2
        self.R0 = 3 * get("baryonDensity") / h ** 2 / (4 * self.photons)
        tn = mp.cbrt(mp.mpf(4) / 11) * mp.root(get("effectiveNumber") / 3, 4)
        self.unit = 15 / mp.pi ** 4 * tn ** 4 * self.photons
        self.y = [mp.mpf(repr(m)) * con["e"] / (con["k"] * tn * T) for m in g["masses"] if m > 0]
        self.r = self.photons + (3 - len(self.y)) * self.unit * 7 * mp.pi ** 4 / 120
        self.k, self.w0, self.wa = get("curvature"), get("w0"), get("wa")
        self.m = self.cb + self.nu(mp.mpf(1))
        self.de = 1 - self.k - self.m - (self.r if g["closure"] == "radiationInside" else 0)
        self.c = c

    def nu(self, a):
        return self.unit * mp.fsum(fermi(y * a) for y in self.y)

    def root(self, a):
        de = self.de * a ** (1 - 3 * (self.w0 + self.wa)) * mp.exp(-3 * self.wa * (1 - a))
        return mp.sqrt(self.cb * a + self.r + self.nu(a) + self.k * a * a + de)

    def over(self, f, z1, z2):
        """int f(a) du/sqrt(a^4 E^2) in ln a, break points every 1.5; z2 = None is the Big Bang."""
        top = -mp.log(1 + mp.mpf(repr(z1)))
        end = mp.mpf(-66) if z2 is None else -mp.log(1 + mp.mpf(repr(z2)))
        cuts = [end]
        while cuts[-1] + mp.mpf("1.5") < top:
            cuts.append(cuts[-1] + mp.mpf("1.5"))
        return mp.quad(lambda u: f(mp.exp(u)) / self.root(mp.exp(u)), cuts + [top], maxdegree=6)


def saha_difference(givens):
    b = B.Background(givens, B.TIGHT)
    con = {k: mp.mpf(v) for k, v in K.SETS[b.givens["constants"]].items()}
    f, n0 = mp.mpf(str(b.f_He)), mp.mpf(str(b.n_H0))
    worst = 0.0
    for z in (8000, 6000, 5000, 3000, 2300, 1800, 1400, 1000, 700):
        kT = con["k"] * mp.mpf(repr(b.givens["photonTemperature"])) * (1 + z)
        G = (2 * mp.pi * con["m_e"] * kT / con["h"] ** 2) ** 1.5 / (n0 * mp.mpf(1 + z) ** 3)
        e = lambda key: mp.exp(-con["h"] * mp.mpf(K.C) * 100 * mp.mpf(K.LEVEL[key]) / kT)
        s, s1, s2 = G * e("H_limit"), 4 * G * e("He_limit"), G * e("HeII_limit")
        charge = lambda x: s / (s + x) + f * (s1 * x + 2 * s1 * s2) / (x * x + s1 * x + s1 * s2) - x
        ours = mp.mpf(str(saha.Saha(b).fractions(np.log1p(np.array([z], dtype=np.longdouble)))[0][0]))
        worst = max(worst, abs(float(ours / mp.findroot(charge, ours) - 1)))
    return worst


def main():
    print("Chebyshev table of the Fermi-Dirac integral: %s" % mp.nstr(chebyshev_table(), 3), flush=True)
    chosen = [m for m in output.models() if m[0] in (sys.argv[1:] or ["plain", "m03", "m04", "m10", "m12"])]
    worst = 0
    for name, givens in chosen:
        t, p = B.Background(givens, B.TIGHT), Plain(givens)
        to_mpc, to_gyr = p.c / p.H0 / p.Mpc, 1 / p.H0 / (mp.mpf(K.JULIAN_YEAR) * 10 ** 9)
        pairs = [
            ("comoving 1e-4", t.comovingDistance(0.0001), to_mpc * p.over(lambda a: a, 0.0, 0.0001)),
            ("comoving 1.25", t.comovingDistance(1.25), to_mpc * p.over(lambda a: a, 0.0, 1.25)),
            ("comoving 1100", t.comovingDistance(1100.0), to_mpc * p.over(lambda a: a, 0.0, 1100.0)),
            ("lookback 3", t.lookbackTime(3.0), to_gyr * p.over(lambda a: a * a, 0.0, 3.0)),
            ("age", t.age(), to_gyr * p.over(lambda a: a * a, 0.0, None)),
            ("age at 1100", t.ageAt(1100.0), to_gyr * p.over(lambda a: a * a, 1100.0, None)),
            ("conformal 1100", t.conformalTime(1100.0), to_mpc * p.over(lambda a: a, 1100.0, None)),
            ("sound horizon 1100", t.soundHorizon(1100.0),
             to_mpc * p.over(lambda a: a / mp.sqrt(3 * (1 + p.R0 * a)), 1100.0, None)),
            ("hubble 200", t.hubbleRate(200.0), p.H0 * p.Mpc / 1000 * 201 ** 2 * p.root(mp.mpf(1) / 201)),
        ]
        for label, ours, theirs in pairs:
            d = abs(float(mp.mpf(str(ours)) / theirs - 1))
            worst = max(worst, d)
            print("%-20s %-20s %.25g  %.1e" % (name, label, ours, d), flush=True)
    print("worst %.1e" % worst)
    electrons = max(saha_difference(givens) for _, givens in chosen)
    print("Saha electrons, z 8000 to 700, worst %.1e" % electrons)
    return 0 if worst < 1e-15 and electrons < 1e-15 else 1


if __name__ == "__main__":
    sys.exit(main())
