"""What follows from a recombination history, first formulation (value): depths, visibility, drag, damping, angles.

Every integrand lives on the collocation points of atom.py as a polynomial of degree s on each panel; cumulative integrals are exact
integrals of those polynomials, roots are by Brent's method on them.  Horizons and distances from background.py, TIGHT.
"""

import numpy as np
from numpy.polynomial import chebyshev
from scipy.optimize import brentq

import background as B
import constants as K
import saha


class Panels:
    """A function of v on falling panels, and its integral from v = 0 upwards."""

    def __init__(self, history, values):
        self.h, self.v0 = history.h, history.edges[0]
        degree = len(history.points) - 1
        inverse = np.linalg.inv(chebyshev.chebvander(2 * history.points - 1, degree))
        self.coefficients = values @ inverse.T
        self.integrals = np.array([chebyshev.chebint(c, scl=0.5) for c in self.coefficients])
        whole = chebyshev.chebval(1.0, self.integrals.T) - chebyshev.chebval(-1.0, self.integrals.T)
        self.below = np.concatenate((np.cumsum((self.h * whole)[::-1])[::-1], [0.0]))
        self.above = np.concatenate(([0.0], np.cumsum(self.h * whole)))

    def place(self, v):
        p = min(max(int((self.v0 - v) / self.h), 0), len(self.coefficients) - 1)
        return p, 2 * ((self.v0 - v) / self.h - p) - 1

    def at(self, v):
        p, x = self.place(v)
        return chebyshev.chebval(x, self.coefficients[p])

    def slope(self, v):
        p, x = self.place(v)
        return -2 / self.h * chebyshev.chebval(x, chebyshev.chebder(self.coefficients[p]))

    def integral(self, v):
        p, x = self.place(v)
        c = self.integrals[p]
        return self.below[p + 1] + self.h * (chebyshev.chebval(1.0, c) - chebyshev.chebval(x, c))

    def integral_above(self, v):
        """From v up to the start; a sum of its own, since the damping integrand is huge at low z."""
        p, x = self.place(v)
        c = self.integrals[p]
        return self.above[p] + self.h * (chebyshev.chebval(x, c) - chebyshev.chebval(-1.0, c))


def damping_factor(R):
    return (R * R + 16 * (1 + R) / 15) / (1 + R) ** 2


class Depths:
    def __init__(self, history, tight):
        s, b = history, tight
        self.b = b
        points = s.edges[:-1, None] - s.h * s.points[None, :]
        real = b.setting.real
        H = (b.H0 * b.E(-points.astype(real))).astype(float)
        scatter = float(b.c * b.con["sigma_T"] * b.n_H0)
        density = np.exp(3 * points) * s.x_e
        self.R0 = float(3 * b.omega_b / (4 * b.omega_gamma))
        self.tau = Panels(s, scatter * density / H)
        self.drag = Panels(s, scatter * density / H * np.exp(points) / self.R0)
        R = self.R0 * np.exp(-points)
        # Mpc2 per unit v: c (1+z)/H times the comoving mean free path (1+z)/(n_e sigma_T)
        per_mpc2 = float(b.c / (b.con["sigma_T"] * b.n_H0) / b.Mpc ** 2)
        self.silk = Panels(s, per_mpc2 * np.exp(2 * points) / (H * density) * damping_factor(R))
        self.x_e, self.T_m = Panels(s, s.x_e), Panels(s, s.T_m)
        v_start = s.edges[0]
        above = saha.Saha(b)

        def silk_above(u):
            v = -u
            x = above.fractions(v)[0]
            RR = 3 * b.omega_b / (4 * b.omega_gamma) * np.exp(u)
            return np.exp(-v) / (b.H0 * b.E(u) * x) * damping_factor(RR)

        far = float(b.integral(silk_above, -real(repr(v_start)) - 24, -real(repr(v_start)), 0.1))
        self.silk_above = per_mpc2 * far

    def log_visibility(self, v):
        return np.log(self.tau.at(v)) - v - self.tau.integral(v)

    def visibility(self, z):
        return float(np.exp(self.log_visibility(np.log1p(z))))

    def numbers(self):
        b = self.b
        root = lambda f, low, high: float(brentq(f, np.log1p(low), np.log1p(high), xtol=1e-15, rtol=1e-15))
        out = {}
        v_star = root(lambda v: self.tau.integral(v) - 1, 500, 2000)
        v_half = root(lambda v: self.tau.integral(v) - np.log(2), 500, 2000)
        v_drag = root(lambda v: self.drag.integral(v) - 1, 500, 2000)
        v_peak = root(lambda v: self.tau.slope(v) / self.tau.at(v) - 1 - self.tau.at(v), 800, 1500)
        half = self.log_visibility(v_peak) - np.log(2)
        v_low = root(lambda v: self.log_visibility(v) - half, 600, np.expm1(v_peak))
        v_high = root(lambda v: self.log_visibility(v) - half, np.expm1(v_peak), 1700)
        z_star = float(np.expm1(v_star))
        out["lastScatteringRedshift"] = z_star
        out["visibilityMedianRedshift"] = float(np.expm1(v_half))
        out["visibilityPeakRedshift"] = float(np.expm1(v_peak))
        out["visibilityWidth"] = float(np.expm1(v_high) - np.expm1(v_low))
        out["dragRedshift"] = float(np.expm1(v_drag))
        r_star, D = float(b.soundHorizon(z_star)), float(b.transverseDistance(z_star))
        r_drag = float(b.soundHorizon(out["dragRedshift"]))
        out["lastScatteringSoundHorizon"] = r_star
        out["acousticAngle"] = 100 * r_star / D
        out["acousticMultipole"] = np.pi * D / r_star
        out["shiftParameter"] = float(np.sqrt(b.Omega_m) / b.c_over_H0) * D
        out["dragSoundHorizon"] = r_drag
        out["dragSoundHorizonTimesReducedHubble"] = r_drag * float(b.hubble) / 100
        total = self.silk_above + self.silk.integral_above(v_star)
        k_D = (total / 6) ** -0.5
        out["dampingWavenumber"] = k_D
        out["dampingAngle"] = 100 * np.pi / (k_D * D)
        z_eq = float(b.equalityRedshift())
        out["equalityHorizonAngle"] = 100 * float(b.conformalTime(z_eq)) / D
        out["equalitySoundAngle"] = 100 * float(b.soundHorizon(z_eq)) / D
        return out


def saha_last_scattering(b):
    """tau = 1 with equilibrium electrons, in the precision of the background; nothing is left below z = 150."""
    real, order = b.setting.real, b.setting.order
    sah = saha.Saha(b)
    scatter = b.c * b.con["sigma_T"] * b.n_H0
    rate = lambda v: scatter * np.exp(3 * v) * sah.fractions(v)[0] / (b.H0 * b.E(-v))
    x, w = B.gauss(order, real)
    width = 0.01 if order > 10 else 0.02
    low = real(repr(float(np.log(151.0))))
    total, edge = real(0), low
    one = np.ones(1, dtype=real)
    while True:
        part = width * (rate(edge + width * x) @ w)
        if total + part > 1:
            break
        total, edge = total + part, edge + width
    v = edge + width * (1 - total) / part
    for _ in range(8):
        step = v - edge
        v = v - (total + step * (rate(edge + step * x) @ w) - 1) / rate(v * one)[0]
    return float(np.expm1(v))
