"""What follows from a recombination history, second formulation (looserValue), on atom_check.py's LSODA solution.

Gauss-Legendre panels of 0.02 in v carry the depths; horizons, distances and the early damping integral are SciPy's adaptive quad in the
scale factor with a scalar H; equilibrium above the start is a scalar root.  Shares constants and today's densities with the first.
"""

import math

import numpy as np
from scipy.integrate import quad
from scipy.interpolate import BarycentricInterpolator
from scipy.optimize import brentq

import atom_check
import constants as K

NODES, WEIGHTS = np.polynomial.legendre.leggauss(10)


class Second:
    def __init__(self, givens, tier, correction, z_list):
        z0 = {"peebles": 2800.0, "calibrated": 3500.0}[tier]
        count = math.ceil(math.log1p(z0) / 0.02)
        edges = np.linspace(0.0, math.log1p(z0), count + 1)
        self.edges, self.half = edges, (edges[1] - edges[0]) / 2
        self.v = (edges[:-1, None] + self.half * (1 + NODES[None, :]))
        wanted = np.unique(np.concatenate((self.v.ravel(), np.log1p(np.array(z_list)))))[::-1]
        b, x_e, T_m, _, hubble, _ = atom_check.solve(givens, tier, correction, wanted)
        self.b, self.hubble, self.z0 = b, hubble, z0
        rows = {v: i for i, v in enumerate(wanted)}
        self.rows = [(float(x_e[rows[v]]), float(T_m[rows[v]])) for v in np.log1p(np.array(z_list))]
        self.x = np.array([[x_e[rows[v]] for v in line] for line in self.v])
        con = {k: float(v) for k, v in b.con.items()}
        self.con, self.c = con, float(K.C)
        H = np.array([[hubble(math.exp(v)) for v in line] for line in self.v])
        zz = np.exp(self.v)
        n_e = float(b.n_H0) * zz ** 3 * self.x
        self.R0 = 3 * float(b.omega_b) / (4 * float(b.omega_gamma))
        self.Mpc = float(b.Mpc)
        self.tau_rate = self.c * con["sigma_T"] * n_e / H
        self.drag_rate = self.tau_rate * zz / self.R0
        R = self.R0 / zz
        self.silk_rate = self.c * zz ** 2 / (H * n_e * con["sigma_T"]) / self.Mpc ** 2 * (R ** 2 / (1 + R) ** 2 + 16 / (15 * (1 + R)))

    def panel(self, v):
        return min(int(v / (2 * self.half)), len(self.v) - 1)

    def inside(self, rate, v):
        p = self.panel(v)
        return BarycentricInterpolator(self.v[p], rate[p])

    def integral(self, rate, v):
        p = self.panel(v)
        whole = self.half * float((rate[:p] @ WEIGHTS).sum())
        part = (v - self.edges[p]) / 2
        here = BarycentricInterpolator(self.v[p], rate[p])(self.edges[p] + part * (1 + NODES))
        return whole + part * float(here @ WEIGHTS)

    def integral_above(self, rate, v):
        p = self.panel(v)
        part = (self.edges[p + 1] - v) / 2
        here = BarycentricInterpolator(self.v[p], rate[p])(v + part * (1 + NODES))
        return self.half * float((rate[p + 1:] @ WEIGHTS).sum()) + part * float(here @ WEIGHTS)

    def tau(self, v):
        return self.integral(self.tau_rate, v)

    def visibility(self, z):
        v = math.log1p(z)
        return float(self.inside(self.tau_rate, v)(v)) / (1 + z) * math.exp(-self.tau(v))

    def equilibrium(self, zz):
        con, b = self.con, self.b
        T = float(b.T) * zz
        kT = con["k"] * T
        G = (2 * math.pi * con["m_e"] * kT / con["h"] ** 2) ** 1.5 / (float(b.n_H0) * zz ** 3)
        e = lambda key: math.exp(-con["h"] * self.c * 100 * float(K.LEVEL[key]) / kT)
        s, s1, s2 = G * e("H_limit"), 4 * G * e("He_limit"), G * e("HeII_limit")
        f = float(b.f_He)

        def charge(x):
            r1 = s1 / x
            r2 = r1 * s2 / x
            return s / (s + x) + f * (r1 + 2 * r2) / (1 + r1 + r2) - x

        return brentq(charge, 1e-12, 1.5, xtol=1e-16, rtol=1e-14)

    def scale_integral(self, weight, z_far, z_near):
        """c int weight(a) da/(a^2 H) in Mpc between two redshifts; z_far None is the Big Bang."""
        f = lambda a: weight(a) / (a * a * self.hubble(1 / a))
        top = 1 / (1 + z_near)
        low = 0.0 if z_far is None else 1 / (1 + z_far)
        # geometric break points: each piece is smooth
        cuts = [top]
        while cuts[-1] / 2 > max(low, 1e-7):
            cuts.append(cuts[-1] / 2)
        cuts.append(low)
        floor = lambda a: f(max(a, 1e-12))
        return self.c / self.Mpc * math.fsum(
            quad(floor, q, p, epsabs=0, epsrel=2e-13, limit=200)[0] for p, q in zip(cuts[:-1], cuts[1:]))

    def transverse(self, z):
        chi = self.scale_integral(lambda a: 1.0, z, 0.0)
        k = float(self.b.curvature)
        if k == 0:
            return chi
        q = math.sqrt(abs(k)) * float(self.b.H0) * self.Mpc / self.c
        return (math.sinh(q * chi) if k > 0 else math.sin(q * chi)) / q

    def sound(self, z):
        return self.scale_integral(lambda a: 1 / math.sqrt(3 + 3 * self.R0 * a), None, z)

    def log_g(self, v):
        return math.log(float(self.inside(self.tau_rate, v)(v))) - v - self.tau(v)

    def slope_g(self, v):
        """d ln g/dv from the polynomial through the panel's nodes, by differentiating its Legendre fit."""
        p = self.panel(v)
        fit = np.polynomial.Legendre.fit(self.v[p], np.log(self.tau_rate[p]), 9)
        return float(fit.deriv()(v)) - 1 - math.exp(float(fit(v)))

    def numbers(self):
        root = lambda f, low, high: brentq(f, math.log1p(low), math.log1p(high), xtol=1e-15, rtol=1e-14)
        v_star = root(lambda v: self.tau(v) - 1, 500, 2000)
        z_star = math.expm1(v_star)
        z_drag = math.expm1(root(lambda v: self.integral(self.drag_rate, v) - 1, 500, 2000))
        v_peak = root(self.slope_g, 800, 1500)
        level = self.log_g(v_peak) - math.log(2)
        low = root(lambda v: self.log_g(v) - level, 600, math.expm1(v_peak))
        high = root(lambda v: self.log_g(v) - level, math.expm1(v_peak), 1700)
        D, r, r_drag = self.transverse(z_star), self.sound(z_star), self.sound(z_drag)
        b = self.b
        early, _ = quad(self.early, math.log1p(self.z0), math.log1p(self.z0) + 12, epsabs=0, epsrel=1e-12, limit=400)
        silk = early + self.integral_above(self.silk_rate, v_star)
        k_D = math.sqrt(6 / silk)
        h = float(b.hubble) / 100
        Omega_m = float(b.omega_b + b.omega_c + b.omega_nu) / h ** 2
        z_eq = float(b.equalityRedshift())
        return {
            "lastScatteringRedshift": z_star,
            "visibilityMedianRedshift": math.expm1(root(lambda v: self.tau(v) - math.log(2), 500, 2000)),
            "visibilityPeakRedshift": math.expm1(v_peak),
            "visibilityWidth": math.expm1(high) - math.expm1(low),
            "dragRedshift": z_drag,
            "lastScatteringSoundHorizon": r,
            "acousticAngle": 100 * r / D,
            "acousticMultipole": math.pi * D / r,
            "shiftParameter": math.sqrt(Omega_m) * float(b.H0) * self.Mpc / self.c * D,
            "dragSoundHorizon": r_drag,
            "dragSoundHorizonTimesReducedHubble": r_drag * h,
            "dampingWavenumber": k_D,
            "dampingAngle": 100 * math.pi / (k_D * D),
            "equalityHorizonAngle": 100 * self.scale_integral(lambda a: 1.0, None, z_eq) / D,
            "equalitySoundAngle": 100 * self.sound(z_eq) / D,
        }

    def early(self, v):
        zz = math.exp(v)
        R = self.R0 / zz
        n_e = float(self.b.n_H0) * zz ** 3 * self.equilibrium(zz)
        path = zz / (n_e * self.con["sigma_T"] * self.Mpc)
        return self.c / self.Mpc * zz / self.hubble(zz) * path * (R ** 2 + 16 * (1 + R) / 15) / (1 + R) ** 2
