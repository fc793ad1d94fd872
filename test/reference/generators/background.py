"""Expansion, distances and times of one model, by composite Gauss-Legendre quadrature in ln a.

Runs at two settings: TIGHT in 80-bit long double (epsilon 1e-19, 20 nodes on panels of 0.5 in ln a, Fermi-Dirac step 0.12) and
LOOSE in float64 (10 nodes on panels of 1, Fermi-Dirac step 0.24).  The Fermi-Dirac integral is the trapezoidal rule in
t = ln x: the integrand is analytic in |Im t| < pi/2 (branch point x = iy, first pole x = i pi), so the rule errs by about
exp(-pi^2/step) times a power of 1/step; measured against mpmath for y from 0 to 5000: below 2e-19 (step 0.12) and 1.3e-14 (0.24).
check_mpmath.py compares TIGHT with mpmath at 30 digits.

Conventions where the contract leaves a choice are listed in ../README.md.
"""

import functools

import mpmath
import numpy as np

import constants as K


class Setting:
    def __init__(self, name, real, order, width, step):
        self.name, self.real, self.order, self.width, self.step = name, real, order, width, step

    def num(self, text):
        return self.real(text)


TIGHT = Setting("tight", np.longdouble, 20, 0.5, "0.12")
LOOSE = Setting("loose", np.float64, 10, 1.0, "0.24")


@functools.lru_cache(None)
def gauss(order, real):
    """Gauss-Legendre nodes and weights on [0, 1], from mpmath at 40 digits."""
    with mpmath.workdps(40):
        guess = np.polynomial.legendre.leggauss(order)[0]
        nodes, weights = [], []
        for g in guess:
            x = mpmath.mpf(float(g))
            for _ in range(8):
                p, q = mpmath.mpf(1), x
                for n in range(2, order + 1):
                    p, q = q, ((2 * n - 1) * x * q - (n - 1) * p) / n
                slope = order * (x * q - p) / (x * x - 1)
                x -= q / slope
            nodes.append(real(mpmath.nstr((1 + x) / 2, 30)))
            weights.append(real(mpmath.nstr(1 / ((1 - x * x) * slope * slope), 30)))
    return np.array(nodes, dtype=real), np.array(weights, dtype=real)


@functools.lru_cache(None)
def fermi(step, real):
    """Squared momenta and weights w with sum w sqrt(x^2 + y^2) = int x^2 sqrt(x^2 + y^2)/(e^x + 1) dx."""
    h = real(step)
    t = h * np.arange(int(-17 / float(step)), int(4.3 / float(step)) + 1).astype(real)
    x = np.exp(t)
    return x * x, h * x ** 3 / (np.exp(x) + 1)


class Background:
    def __init__(self, givens, setting=TIGHT):
        s = setting
        self.setting, num = s, s.num
        g = K.flat(givens)
        self.givens = g
        con = {k: num(v) for k, v in K.SETS[g["constants"]].items()}
        self.con = con
        one = num(1)
        pi = num("3.14159265358979323846264338327950288")
        self.pi, self.c = pi, num(K.C)
        self.parsec = 648000 / pi * num(K.AU)
        self.Mpc = self.parsec * num("1e6")
        self.Gyr = num(K.JULIAN_YEAR) * num("1e9")
        self.hubble = num(repr(g["hubble"]))
        self.H0 = self.hubble * 1000 / self.Mpc
        self.h2 = (self.hubble / 100) ** 2
        rho100 = 3 * (num("1e5") / self.Mpc) ** 2 / (8 * pi * con["G"])
        self.rho100 = rho100
        T = num(repr(g["photonTemperature"]))
        self.T = T
        self.radiation = 4 * con["sigma_SB"] / self.c
        self.omega_b, self.omega_c = num(repr(g["baryonDensity"])), num(repr(g["coldMatterDensity"]))
        self.omega_gamma = self.radiation * T ** 4 / self.c ** 2 / rho100
        self.Neff = num(repr(g["effectiveNumber"]))
        ratio = (num(4) / 11) ** (one / 3) * (self.Neff / 3) ** (one / 4)
        self.masses = [m for m in g["masses"] if m > 0]
        # energy of one species over that of the photons: (15/pi^4) (T_nu/T)^4 F(y), F(0) = 7 pi^4/120
        self.per_species = 15 / pi ** 4 * ratio ** 4 * self.omega_gamma
        massless = one * 7 / 8 * ratio ** 4 * self.omega_gamma
        self.y0 = [num(repr(m)) * con["e"] / (con["k"] * ratio * T) for m in self.masses]
        self.omega_r = self.omega_gamma + (3 - len(self.masses)) * massless
        self.omega_nu = self.massive(np.zeros(1, dtype=s.real))[0]
        self.omega_m = self.omega_b + self.omega_c + self.omega_nu
        self.curvature = num(repr(g["curvature"]))
        self.w0, self.wa = num(repr(g["w0"])), num(repr(g["wa"]))
        self.Omega_m = self.omega_m / self.h2
        dark = 1 - self.curvature - self.Omega_m
        if g["closure"] == "radiationInside":
            dark = dark - self.omega_r / self.h2
        elif g["closure"] != "radiationOnTop":
            raise ValueError(g["closure"])
        self.dark = dark
        self.c_over_H0 = self.c / 1000 / self.hubble  # Mpc
        mass_ratio = num(K.MASS_HE_U) / num(K.MASS_H_U)
        helium = g["helium"]
        if helium == "nucleosynthesis":
            w, d = self.omega_b, self.Neff - num("3.046")
            Y = (num("0.2311") + num("0.9502") * w - num("11.27") * w ** 2
                 + d * (num("0.01356") + num("0.008581") * w - num("0.1810") * w ** 2)
                 + d ** 2 * (num("-0.0009795") - num("0.001370") * w + num("0.01746") * w ** 2))
            r = mass_ratio / 4
            self.helium = r * Y / (r * Y + 1 - Y)
        else:
            self.helium = num(repr(helium))
        self.f_He = self.helium / (mass_ratio * (1 - self.helium))
        self.n_H0 = (1 - self.helium) * self.omega_b * rho100 / (num(K.MASS_H_U) * con["u"])

    def massive(self, u):
        """Density of the massive neutrinos over rho_100 times a^4, at u = ln a."""
        total = np.zeros(u.shape, dtype=self.setting.real)
        if not self.masses:
            return total
        x2, w = fermi(self.setting.step, self.setting.real)
        a2 = np.exp(2 * u)
        for y0 in self.y0:
            block = 400
            flat_a2 = a2.ravel()
            out = np.empty(flat_a2.shape, dtype=self.setting.real)
            room = np.empty((block, x2.size), dtype=self.setting.real)
            for i in range(0, flat_a2.size, block):
                part = flat_a2[i:i + block]
                here = room[:part.size]
                np.add(x2[None, :], (part * y0 * y0)[:, None], out=here)
                out[i:i + block] = np.sqrt(here, out=here) @ w
            total = total + self.per_species * out.reshape(a2.shape)
        return total

    def matter_at(self, u):
        """Omega_m(a) E^2: baryons, cold matter, massive neutrinos."""
        return ((self.omega_b + self.omega_c) * np.exp(-3 * u) + self.massive(u) * np.exp(-4 * u)) / self.h2

    def a4E2(self, u):
        """a^4 E^2 at u = ln a; finite for u -> -infinity."""
        a = np.exp(u)
        f = np.exp((1 - 3 * (self.w0 + self.wa)) * u - 3 * self.wa * (1 - a))
        return ((self.omega_b + self.omega_c) * a + self.omega_r + self.massive(u)) / self.h2 + self.curvature * a * a + self.dark * f

    def E(self, u):
        return np.sqrt(self.a4E2(u)) * np.exp(-2 * u)

    def u_of_z(self, z):
        return -np.log1p(self.setting.num(repr(float(z))))

    def integral(self, function, low, high, width=None):
        """int function(u) du by Gauss-Legendre panels."""
        s = self.setting
        panels = max(1, int(np.ceil(float(high - low) / (width or s.width))))
        x, w = gauss(s.order, s.real)
        step = (high - low) / panels
        u = low + step * (np.arange(panels).astype(s.real)[:, None] + x[None, :])
        return step * (function(u) @ w).sum()

    # -- integrals in units of c/H0 and 1/H0.  du/(a E) = a du/sqrt(a4E2); below u = -60 nothing is left (a < 1e-26).
    def chi_between(self, u_far, u_near):
        return self.integral(lambda u: np.exp(u) / np.sqrt(self.a4E2(u)), u_far, u_near)

    def time_between(self, u_far, u_near):
        return self.integral(lambda u: np.exp(2 * u) / np.sqrt(self.a4E2(u)), u_far, u_near)

    def start(self, power):
        return self.setting.num(-60 if power == 1 else -36)

    def comovingDistance(self, z1, z2=None):
        if z2 is None:
            z1, z2 = 0.0, z1
        return self.c_over_H0 * self.chi_between(self.u_of_z(z2), self.u_of_z(z1))

    def bend(self, chi):
        """Transverse from line-of-sight comoving distance, both in Mpc."""
        k = self.curvature
        if k == 0:
            return chi
        radius = self.c_over_H0 / np.sqrt(abs(k))
        return radius * (np.sinh(chi / radius) if k > 0 else np.sin(chi / radius))

    def transverseDistance(self, z1, z2=None):
        return self.bend(self.comovingDistance(z1, z2))

    def one_plus(self, z):
        return 1 + self.setting.num(repr(float(z)))

    def angularDiameterDistance(self, z1, z2=None):
        return self.transverseDistance(z1, z2) / self.one_plus(z1 if z2 is None else z2)

    def luminosityDistance(self, z):
        return self.transverseDistance(z) * self.one_plus(z)

    def hubbleRate(self, z):
        return self.hubble * self.E(np.array([self.u_of_z(z)]))[0]

    def hubbleDistance(self, z):
        return self.c / 1000 / self.hubbleRate(z)

    def criticalDensity(self, z):
        H = self.hubbleRate(z) * 1000 / self.Mpc
        return 3 * H * H / (8 * self.pi * self.con["G"])

    def matterFractionAt(self, z):
        u = np.array([self.u_of_z(z)])
        return self.matter_at(u)[0] / self.E(u)[0] ** 2

    def volumeDistance(self, z):
        num = self.setting.num
        return (self.transverseDistance(z) ** 2 * num(repr(float(z))) * self.hubbleDistance(z)) ** (num(1) / 3)

    def distanceModulus(self, z):
        return 5 * np.log10(self.luminosityDistance(z) * self.setting.num("1e5"))

    def comovingVolume(self, z):
        """Whole sky, Gpc3: 4 pi int S_k^2 d chi = (4 pi/3) chi^3 times a power series in (chi/radius)^2."""
        chi = self.comovingDistance(z)
        q = 4 * self.curvature * (chi / self.c_over_H0) ** 2
        term = total = self.setting.num(1)
        k = 1
        while abs(term) > 1e-22 * abs(total):
            term = term * q / ((2 * k + 2) * (2 * k + 3))
            total = total + term
            k += 1
        return 4 * self.pi / 3 * chi ** 3 * total / self.setting.num("1e9")

    def comovingVolumeElement(self, z):
        return 4 * self.pi * self.transverseDistance(z) ** 2 * self.hubbleDistance(z) / self.setting.num("1e9")

    def properScale(self, z):
        return self.angularDiameterDistance(z) * 1000 * self.pi / 648000

    def alcockPaczynskiRatio(self, z):
        return self.transverseDistance(z) / self.hubbleDistance(z)

    def lookbackTime(self, z):
        return self.time_between(self.u_of_z(z), self.setting.num(0)) / self.H0 / self.Gyr

    def ageAt(self, z):
        return self.time_between(self.start(2), self.u_of_z(z)) / self.H0 / self.Gyr

    def age(self):
        return self.ageAt(0.0)

    def lightTravelDistance(self, z):
        return self.time_between(self.u_of_z(z), self.setting.num(0)) * self.c_over_H0

    def conformalTime(self, z):
        return self.c_over_H0 * self.chi_between(self.start(1), self.u_of_z(z))

    particleHorizon = conformalTime

    def event_horizon_is_finite(self):
        """wa > 0 ends in ever faster acceleration; wa = 0 needs w0 < -1/3; wa < 0 loses its dark energy: no horizon."""
        return self.dark > 0 and (self.wa > 0 or (self.wa == 0 and self.w0 < -1 / 3))

    def eventHorizon(self, z):
        u0 = self.u_of_z(z)
        if self.wa > 0:
            top = self.setting.num(repr(float(np.log(40 / self.wa + 20))))
        else:
            # integrand falls as a^((1 + 3 w0)/2): 46 e-folds of it are 1e-20
            top = self.setting.num(repr(float(min(300.0, 46 / (-(1 + 3 * self.w0) / 2) + 5))))
        zero = self.setting.num(0)
        width = self.setting.width / 4 if self.wa > 0 else self.setting.width
        future = self.integral(lambda u: np.exp(u) / np.sqrt(self.a4E2(u)), zero, top, width)
        return self.c_over_H0 * (future + self.chi_between(u0, zero))

    # -- sound and equality
    def baryonLoading(self, z):
        return 3 * self.omega_b / (4 * self.omega_gamma * self.one_plus(z))

    def soundSpeed(self, z):
        return 1 / np.sqrt(3 * (1 + self.baryonLoading(z)))

    def soundHorizon(self, z):
        R0 = 3 * self.omega_b / (4 * self.omega_gamma)
        return self.c_over_H0 * self.integral(
            lambda u: np.exp(u) / np.sqrt(3 * (1 + R0 * np.exp(u)) * self.a4E2(u)), self.start(1), self.u_of_z(z))

    def equalityRedshift(self):
        one = self.setting.num(1)
        radiation = self.omega_gamma * (1 + one * 7 / 8 * (one * 4 / 11) ** (one * 4 / 3) * self.Neff)
        return (self.omega_b + self.omega_c) / radiation - 1

    def equalityWavenumber(self):
        z = self.equalityRedshift()
        u = -np.log1p(z)
        return self.E(np.array([u]))[0] / (self.c_over_H0 * (1 + z))
