"""
The full suite of a model, written for this benchmark as an analyst writes it in Python on SciPy: quad, solve_ivp by LSODA at
1e-6, brentq. Nothing of the project's own method.

    suite.py MODELS COUNT C0 C1 C2

MODELS, the coefficients and the output are those of ../gsl/suite.c. Functions of one number are plain Python on the math module,
which is several times faster there than NumPy.
"""

import math
import sys
import time

import numpy as np
from scipy.integrate import quad, solve_ivp
from scipy.interpolate import CubicSpline
from scipy.optimize import brentq

# CODATA 2022, IAU 2012 B2 and 2015 B2, SI.
c, G, h, k_B, eV = 299792458.0, 6.67430e-11, 6.62607015e-34, 1.380649e-23, 1.602176634e-19
m_e, u, sigma_T = 9.1093837139e-31, 1.66053906892e-27, 6.6524587051e-29
sigma_SB = 5.6703744191844314e-8
Mpc, Gyr = 1e6 * 648000 / math.pi * 149597870700.0, 1e9 * 31557600.0
T_cmb = 2.7255

# Atomic levels in 1/m, rates in 1/s, cross sections in m2.
m_H, m_He = 1.0078250319, 4.002603254
L_H, L_a, L_He, L_2s, L_2p = 10967877.174307, 8225916.304, 19831066.637, 16627744.0, 17113489.7
L_3P, L_HeII = 16908684.3, 43890887.89
TWO_PHOTON_H, TWO_PHOTON_HE, A_S, A_T = 8.22458, 51.3, 1.798287e9, 177.58
SIGMA_SINGLET, SIGMA_TRIPLET = 1.8742e-22, 1.9381e-22
Q_SINGLET, Q_TRIPLET, T_1 = 10**-16.744, 10**-16.306, 10**5.114

UNIT_RATE = 1e5 / Mpc
UNIT_DENSITY = 3 * UNIT_RATE**2 / (8 * math.pi * G)
UNIT_DISTANCE = c / 1e5
UNIT_TIME = Mpc / 1e5 / Gyr
RADIATION = 4 * sigma_SB / c
LEVEL = h * c / k_B
STATES = 2 * math.pi * m_e * k_B / (h * h)

# ln(1+z) at which helium leaves Saha equilibrium, and hydrogen.
START, HYDROGEN_START = math.log(3501), math.log(1951)
ATOL = 1e-6
FIT = [float(value) for value in sys.argv[3:6]]
QUAD = {"epsabs": 0, "epsrel": 1e-7, "limit": 200}

exp, log, sqrt = math.exp, math.log, math.sqrt


def spline_of_energy():
    """rho(y)/rho(0) of a neutrino species, as a function of ln y: a table made once and read in plain Python."""
    low, step = -9.0, 0.01
    y = low + step * np.arange(1801)
    massless = 7 * math.pi**4 / 120
    values = [
        quad(lambda x: x * x * sqrt(x * x + m * m) / (exp(x) + 1), 0, 80, epsabs=0, epsrel=1e-11, limit=200)[0] / massless
        for m in np.exp(y)
    ]
    pieces = CubicSpline(y, values).c.T.tolist()
    large = 1.5 * 1.2020569031595942 / massless

    def energy(mass):
        place = (log(mass) - low) / step
        if place < 0:
            return 1 + 5 / (7 * math.pi**2) * mass * mass
        i = int(place)
        if i >= len(pieces):
            return mass * large
        d = (place - i) * step
        a3, a2, a1, a0 = pieces[i]
        return a0 + d * (a1 + d * (a2 + d * a3))

    return energy


energy = spline_of_energy()


class Model:
    def __init__(self, row):
        hubble, self.baryons, self.cold, self.curvature, self.w0, self.wa, n_eff, *masses = row
        self.h2 = (hubble / 100) ** 2
        t_nu = (4 / 11) ** (1 / 3) * (n_eff / 3) ** 0.25 * T_cmb
        self.photons = RADIATION * T_cmb**4 / c**2 / UNIT_DENSITY
        self.species = 7 / 8 * (4 / 11) ** (4 / 3) * n_eff / 3 * self.photons
        self.masses = [m * eV / (k_B * t_nu) for m in masses if m > 0]
        neutrinos = self.species * sum(energy(m) for m in self.masses)
        self.radiation = self.photons + (3 - len(self.masses)) * self.species
        self.dark = self.h2 * (1 - self.curvature) - self.baryons - self.cold - neutrinos - self.radiation
        w, d, r = self.baryons, n_eff - 3.046, m_He / m_H / 4
        y = (
            0.2311 + 0.9502 * w - 11.27 * w**2
            + d * (0.01356 + 0.008581 * w - 0.1810 * w**2)
            + d**2 * (-0.0009795 - 0.001370 * w + 0.01746 * w**2)
        )  # fmt: skip
        y = r * y / (r * y + 1 - y)
        self.f_he = y / (m_He / m_H * (1 - y))
        self.n_h = (1 - y) * w * UNIT_DENSITY / (m_H * u)
        self.compton = 8 * sigma_T * RADIATION * T_cmb**4 / (3 * m_e * c)
        self.scattering = c * sigma_T * self.n_h
        self.loading = 3 * w / (4 * self.photons)

    def squared(self, a):
        """a^4 (H/100 km/s/Mpc)^2"""
        total = self.radiation
        for m in self.masses:
            total += self.species * energy(m * a)
        growth = 1.0
        if self.w0 != -1 or self.wa != 0:
            growth = exp(-3 * (1 + self.w0 + self.wa) * log(a) - 3 * self.wa * (1 - a))
        return total + a * (self.baryons + self.cold + a * self.curvature * self.h2) + a**4 * self.dark * growth

    def rate(self, t):
        """H in 1/s at ln(1+z) = t"""
        return UNIT_RATE * exp(2 * t) * sqrt(self.squared(exp(-t)))


def saha(model, t):
    """x_e, x_p and He+ a helium nucleus in equilibrium"""
    z1 = exp(t)
    temperature = T_cmb * z1
    s = (STATES * temperature) ** 1.5 / (model.n_h * z1**3)
    per = LEVEL / temperature
    hydrogen, first, second = s * exp(-L_H * per), 4 * s * exp(-L_He * per), s * exp(-L_HeII * per)
    x, last = 1 + model.f_he, 0
    while abs(x - last) > 1e-12 * x:
        last = x
        r1 = first / x
        r2 = r1 * second / x
        p = hydrogen / (hydrogen + x)
        x = p + model.f_he * (r1 + 2 * r2) / (1 + r1 + r2)
    return x, p, r1 / (1 + r1 + r2)


def escape(model, rate, level, sigma, a, b, n, hubble, temperature, neutral, neutral_hydrogen):
    strength = 3 * rate * model.f_he * neutral
    nu = c * level
    tau = strength * n / (8 * math.pi * hubble * level**3)
    doppler = nu * sqrt(2 * k_B * temperature / (m_He * u * c * c))
    g = strength * c**2 / (8 * math.pi**1.5 * sigma * nu**2 * doppler * neutral_hydrogen)
    return -math.expm1(-tau) / tau + 1 / (1 + a * g**b)


def helium_recombination(temperature, q, p):
    s1, s2 = sqrt(temperature / T_1), sqrt(temperature / 3)
    return q / (s2 * (1 + s2) ** (1 - p) * (1 + s1) ** (1 + p))


def helium_rate(model, v, x_e, neutral, n, hubble, temperature):
    """d ln[y/(1-y)]/ds"""
    per = LEVEL / temperature
    g = (STATES * temperature) ** 1.5
    odds = exp(v)
    a_s = helium_recombination(temperature, Q_SINGLET, 0.711)
    a_t = helium_recombination(temperature, Q_TRIPLET, 0.761)
    b_s = 4 * a_s * g * exp(-(L_He - L_2s) * per)
    b_t = 4 / 3 * a_t * g * exp(-(L_He - L_3P) * per)
    net = x_e * n * (1 + odds) - 4 * g * exp(-L_He * per) * (1 + 1 / odds)
    gas = (n, hubble, temperature, 1 / (1 + odds), neutral)
    x = 3 * A_S * escape(model, A_S, L_2p, SIGMA_SINGLET, 0.36, 0.86, *gas) * exp(-(L_2p - L_2s) * per) + TWO_PHOTON_HE
    # One exponential for both of b_t and its escape, which underflow late.
    y = A_T * escape(model, A_T, L_3P, SIGMA_TRIPLET, 0.66, 0.9, *gas)
    # Once fewer than 1e-13 of its atoms are ionized, helium is let be, smoothly: nothing sees it fall further.
    return -net * (a_s * x / (x + b_s) + a_t / (1 + b_t / y)) / hubble * odds / (odds + 1e-13)


def hydrogen_share(model, v, n, temperature):
    """x_p in Saha equilibrium while helium is as it is, and 1 - x_p."""
    s = (STATES * temperature) ** 1.5 * exp(-L_H * LEVEL / temperature) / n
    b = s + model.f_he / (1 + exp(-v))
    x_p = 2 * s / (b + sqrt(b * b + 4 * s))
    return x_p, x_p * (x_p + b - s) / s


def early_derivative(s, state, model):
    """Helium alone: ln[y/(1-y)] over s = -ln(1+z). Hydrogen is in Saha equilibrium and the gas as hot as the radiation."""
    v = max(-100, min(float(state[0]), 100))
    z1 = exp(-s)
    n, temperature = model.n_h * z1**3, T_cmb * z1
    x_p, neutral = hydrogen_share(model, v, n, temperature)
    return (helium_rate(model, v, x_p + model.f_he / (1 + exp(-v)), neutral, n, model.rate(-s), temperature),)


def derivative(s, state, model, fit):
    """State over s = -ln(1+z): ln[x_p/(1-x_p)], ln[y/(1-y)], T_m/T_r."""
    w, v, ratio = state.tolist()
    # A trial step of the solver may go far astray; that must not end in an overflow.
    w, v, ratio = max(-100, min(w, 100)), max(-100, min(v, 100)), max(ratio, 1e-3)
    z1 = exp(-s)
    temperature = T_cmb * z1 * ratio
    n = model.n_h * z1**3
    hubble = model.rate(-s)
    per = LEVEL / temperature
    odds = exp(w)
    neutral = 1 / (1 + odds)
    x_e = odds * neutral + model.f_he / (1 + exp(-v))
    th = temperature / 1e4
    g = (STATES * temperature) ** 1.5
    d = log(z1 / 1090)
    alpha = 1.14e-19 * 4.309 * th**-0.6166 / (1 + 0.6703 * th**0.5300)
    beta = alpha * g * exp(-(L_H - L_a) * per)
    k = (1 + (fit[0] + d * (fit[1] + d * fit[2])) * exp(-d * d / 0.16)) / (8 * math.pi * hubble * L_a**3)
    share = (1 + k * TWO_PHOTON_H * n * neutral) / (1 + k * (TWO_PHOTON_H + beta) * n * neutral)
    dw = -share * alpha * (x_e * n * (1 + odds) - g * exp(-L_H * per) * (1 + 1 / odds)) / hubble
    dv = helium_rate(model, v, x_e, neutral, n, hubble, temperature)
    dr = -model.compton * z1**4 * x_e / (1 + model.f_he + x_e) * (ratio - 1) / hubble - ratio
    return dw, dv, dr


def solve(f, times, start, args):
    solution = solve_ivp(f, (times[0], times[-1]), start, method="LSODA", t_eval=times, rtol=1e-6, atol=ATOL, args=args)
    if not solution.success:
        raise RuntimeError(solution.message)
    return solution.y


def electrons(model):
    """x_e over ln(1+z) up to START as a spline, by helium alone first, then all three equations."""
    # Where x_e is wanted for its spline: close while it falls, wide after.
    early = -np.linspace(START, HYDROGEN_START, 120)
    late = np.concatenate([np.linspace(-HYDROGEN_START, -6, 321), np.linspace(-6, 0, 121)[1:]])
    helium = saha(model, START)[2]
    (v,) = solve(early_derivative, early, [log(helium / (1 - helium))], (model,))
    z1 = np.exp(-early)
    shares = [hydrogen_share(model, *each)[0] for each in zip(v, model.n_h * z1**3, T_cmb * z1)]
    first = np.array(shares) + model.f_he / (1 + np.exp(-v))
    w = log(shares[-1] / hydrogen_share(model, v[-1], model.n_h * z1[-1] ** 3, T_cmb * z1[-1])[1])
    w, v, _ = solve(derivative, late, [w, v[-1], 1.0], (model, FIT))
    second = 1 / (1 + np.exp(-w)) + model.f_he / (1 + np.exp(-v))
    return CubicSpline(np.concatenate([-late[::-1], -early[-2::-1]]), np.concatenate([second[::-1], first[-2::-1]]))


def suite(row):
    model = Model(row)
    spline = electrons(model)

    def scattering(t):
        x_e = spline(t) if t < START else saha(model, t)[0]
        return model.scattering * exp(3 * t) * x_e / model.rate(t)

    def dragging(t):
        return scattering(t) * exp(t) / model.loading

    def crossing(f):
        fixed = log(801)
        below = quad(f, 0, fixed, **QUAD)[0]
        return brentq(lambda t: below + quad(f, fixed, t, **QUAD)[0] - 1, fixed + 1e-3, log(1601), xtol=1e-9)

    def sound(a):
        return 1 / sqrt(3 * (1 + model.loading * a) * model.squared(a))

    def diffusion(t):
        r = model.loading * exp(-t)
        horizon = exp(-2 * t) / model.squared(exp(-t))
        return horizon * (r * r + 16 * (1 + r) / 15) / (1 + r) ** 2 / scattering(t)

    star, drag = crossing(scattering), crossing(dragging)
    along = UNIT_DISTANCE * quad(lambda t: exp(-t) / sqrt(model.squared(exp(-t))), 0, star, **QUAD)[0]
    if model.curvature != 0:
        k = sqrt(abs(model.curvature) * model.h2) / UNIT_DISTANCE
        along = (math.sinh if model.curvature > 0 else math.sin)(k * along) / k
    r_star = UNIT_DISTANCE * quad(sound, 0, exp(-star), **QUAD)[0]
    r_drag = UNIT_DISTANCE * quad(sound, 0, exp(-drag), **QUAD)[0]
    damping = quad(diffusion, star, START, **QUAD)[0] + quad(diffusion, START, START + 10, **QUAD)[0]
    age = UNIT_TIME * quad(lambda a: a / sqrt(model.squared(a)), 0, 1, **QUAD)[0]
    return (
        math.expm1(star), math.expm1(drag), r_star, r_drag, 100 * r_star / along,
        1 / (UNIT_DISTANCE * sqrt(damping / 6)), age,
    )  # fmt: skip


def main():
    path, count = sys.argv[1:3]
    with open(path) as file:
        rows = [[float(value) for value in file.readline().split()] for _ in range(int(count))]
    suite(rows[0])
    wall, processor = time.perf_counter(), time.process_time()
    results = [suite(row) for row in rows]
    wall, processor = time.perf_counter() - wall, time.process_time() - processor
    for result in results:
        print(*(repr(float(value)) for value in result))
    print("seconds", wall, processor)


main()
