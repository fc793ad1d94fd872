"""The three-level atom, second formulation: the looserValue columns.

Written from the equations of the contract a second time, scalar and literal: unknowns x_p, T_m (K) and y over v = ln(1+z), with
SciPy's LSODA (Fortran, variable order Adams and BDF) at rtol 1e-13.  The Jacobian is by differences that step down in x_p and by
a part of 1 - x_p, since LSODA's own would step beyond x_p = 1 at z = 3500.
Shares with the first formulation the constants, the
background densities and the Saha start, but neither the method, nor the unknowns, nor the code of the rates.
"""

import math

import numpy as np
from scipy.integrate import LSODA, solve_ivp

import background as B
import constants as K
import saha

RTOL = 1e-13
RADAU_RTOL = 1e-11
HANDOVER = (1900.0, 1750.0, 1600.0, 1500.0, 1400.0)
STEPS = 20000


def right_hand_side(b, tier, correction):
    con = {k: float(v) for k, v in b.con.items()}
    c, pi = float(K.C), math.pi
    hc_over_k = con["h"] * c / con["k"] * 100
    L = {k: float(v) for k, v in K.LEVEL.items()}
    chi = lambda upper, lower="": hc_over_k * (L[upper] - (L[lower] if lower else 0.0))
    T0, n0, f = float(b.T), float(b.n_H0), float(b.f_He)
    m_He = float(K.MASS_HE_U) * con["u"]
    quantum = 2 * pi * con["m_e"] * con["k"] / con["h"] ** 2
    compton = 8 * con["sigma_T"] * (4 * con["sigma_SB"] / c) / (3 * con["m_e"] * c)
    H0, h2 = float(b.H0), float(b.h2)
    cb, r = float(b.omega_b + b.omega_c) / h2, float(b.omega_r) / h2
    ok, dark, w0, wa = float(b.curvature), float(b.dark), float(b.w0), float(b.wa)
    x2, weight = B.fermi(b.setting.step, np.float64)
    y02 = [float(y) ** 2 for y in b.y0]
    unit = float(b.per_species) / h2
    c0, c1, c2 = correction
    calibrated = tier == "calibrated"
    exp, sqrt, log = math.exp, math.sqrt, math.log
    sites = {
        "s": (1.798287e9, L["He_2p"] * 100, 1.8742e-22, 0.36, 0.86),
        "t": (177.58, L["He_3P"] * 100, 1.9381e-22, 0.66, 0.9),
    }

    def hubble(zz):
        a2 = 1 / (zz * zz)
        nu = sum(unit * float(np.sqrt(x2 + y2 * a2) @ weight) for y2 in y02)
        de = dark * zz ** (3 * (1 + w0 + wa)) * exp(-3 * wa * (1 - 1 / zz))
        return H0 * sqrt(cb * zz ** 3 + (r + nu) * zz ** 4 + ok * zz ** 2 + de)

    def electrons(zz, x_p, y):
        """x_e of a state; in the peebles tier helium I by Saha at that electron density, iterated to the end."""
        if calibrated:
            return x_p + f * y
        T = T0 * zz
        s = 4 * (quantum * T) ** 1.5 * exp(-chi("He_limit") / T) / (n0 * zz ** 3)
        x = x_p + f
        for _ in range(60):
            # Newton on x - x_p - f s/(s + x), a convex function whose root is approached from above
            q = s + x
            dx = (x - x_p - f * s / q) / (1 + f * s / (q * q))
            x -= dx
            if abs(dx) < 3e-16 * x:
                break
        return x

    def rhs(v, state):
        zz = exp(v)
        x_p, T = state[0], state[1]
        x_1s = 1 - x_p
        y = state[2] if calibrated else None
        n = n0 * zz ** 3
        H = hubble(zz)
        x_e = electrons(zz, x_p, y)
        Tr = T0 * zz
        tt = T / 1e4
        alpha = (1.14 if calibrated else 1.0) * 1e-19 * 4.309 * tt ** -0.6166 / (1 + 0.6703 * tt ** 0.53)
        G = (quantum * T) ** 1.5
        beta = alpha * G * exp(-chi("H_limit", "H_alpha") / T)
        Kx = 1 / (8 * pi * H * (L["H_alpha"] * 100) ** 3)
        if calibrated:
            d = log(zz / 1090)
            Kx *= 1 + (c0 + c1 * d + c2 * d ** 2) * exp(-(d / 0.4) ** 2)
        n1 = n * x_1s
        C = (1 + Kx * 8.22458 * n1) / (1 + Kx * (8.22458 + beta) * n1)
        out = [(x_e * x_p * n * alpha - beta * x_1s * exp(-chi("H_alpha") / T)) * C / H,
               compton * Tr ** 4 / H * x_e / (1 + f + x_e) * (T - Tr) + 2 * T]
        if calibrated:
            neutral, free = max(1 - y, 1e-15), max(x_1s, 1e-12)
            s1, s2 = sqrt(T / 10 ** 5.114), sqrt(T / 3)
            P = {}
            for key, (A, level, sigma, a1, b1) in sites.items():
                tau = 3 * A * f * n * neutral / (8 * pi * H * level ** 3)
                nu = c * level
                D = nu * sqrt(2 * con["k"] * T / (m_He * c * c))
                gamma = 3 * A * f * neutral * c * c / (8 * pi ** 1.5 * sigma * nu * nu * D * free)
                P[key] = -math.expm1(-tau) / tau + 1 / (1 + a1 * gamma ** b1)
            a_s = 10 ** -16.744 / (s2 * (1 + s2) ** (1 - 0.711) * (1 + s1) ** (1 + 0.711))
            a_t = 10 ** -16.306 / (s2 * (1 + s2) ** (1 - 0.761) * (1 + s1) ** (1 + 0.761))
            b_s = 4 * a_s * G * exp(-chi("He_limit", "He_2s") / T)
            b_t = 4 / 3 * a_t * G * exp(-chi("He_limit", "He_3S") / T)
            X = 3 * sites["s"][0] * P["s"] * exp(-chi("He_2p", "He_2s") / T)
            S = (x_e * y * n * a_s - b_s * (1 - y) * exp(-chi("He_2s") / T)) * (X + 51.3) / (X + 51.3 + b_s)
            leave = b_t / (sites["t"][0] * P["t"] * exp(-chi("He_3P", "He_3S") / T)) if b_t > 0 else 0.0
            Tt = (x_e * y * n * a_t - 3 * b_t * (1 - y) * exp(-chi("He_3S") / T)) / (1 + leave)
            out.append((S + Tt) / H)
        return out

    return rhs, electrons, hubble


def walk(rhs, jacobian, v1, state, wanted, atol):
    """LSODA from v1 to 0, its own interpolant at the wanted v; None when it takes more than STEPS steps (1500 to 5000 are usual)."""
    solver = LSODA(rhs, v1, state, 0.0, jac=jacobian, rtol=RTOL, atol=atol, max_step=0.02)
    columns, done = [], 0
    for _ in range(STEPS):
        message = solver.step()
        if solver.status == "failed":
            raise RuntimeError(message)
        last = len(wanted) if solver.status == "finished" else int(np.searchsorted(-wanted, -solver.t, side="right"))
        if last > done:
            columns.append(solver.dense_output()(wanted[done:last]))
            done = last
        if solver.status == "finished":
            return np.concatenate(columns, axis=1)
    return None


def solve(givens, tier, correction, v_out):
    """x_e, T_m, x_p at the v = ln(1+z) asked for (falling), and H(z) in 1/s as a function of 1+z."""
    b = B.Background(givens, B.LOOSE)
    z0 = {"peebles": 2800.0, "calibrated": 3500.0}[tier]
    v0 = math.log1p(z0)
    rhs, electrons, hubble = right_hand_side(b, tier, correction)
    _, _, x_p, y, _ = saha.Saha(b).fractions(np.array([v0]))
    start = [float(x_p[0]), float(b.T) * (1 + z0)] + ([float(y[0])] if tier == "calibrated" else [])
    atol = [1e-17, 1e-15] + ([1e-17] if tier == "calibrated" else [])

    def jacobian(v, state):
        here = rhs(v, state)
        columns = []
        for i, value in enumerate(state):
            moved = list(state)
            moved[i] -= 1e-3 * (1 - value) if i == 0 and value > 0.9 else 1e-7 * value + 1e-25
            step = moved[i] - value
            columns.append([(p - q) / step for p, q in zip(rhs(v, moved), here)])
        return np.array(columns).T

    # Radau through the stiffest part (hydrogen relaxes 1e14 times in a unit of v at z = 3500, where LSODA's first, explicit steps
    # cannot begin), then LSODA; where its explicit start crawls instead of changing to BDF it begins lower down
    v_out = np.asarray(v_out)
    for handover in HANDOVER:
        v1 = math.log1p(handover)
        early, late = v_out[v_out > v1], v_out[v_out <= v1]
        first = solve_ivp(rhs, (v0, v1), start, method="Radau", jac=jacobian, t_eval=np.append(early, v1), rtol=RADAU_RTOL,
                          atol=[max(1e-13, a) for a in atol])
        if not first.success or first.y.shape[1] != len(early) + 1:
            raise RuntimeError(first.message)
        second = walk(rhs, jacobian, v1, first.y[:, -1], late, atol)
        if second is not None:
            break
    else:
        raise RuntimeError("LSODA crawled from every start")
    answer = np.concatenate((first.y[:, :-1], second), axis=1)
    x_p = answer[0]
    y = answer[2] if tier == "calibrated" else [None] * len(v_out)
    x_e = np.array([electrons(math.exp(v), p, q) for v, p, q in zip(v_out, x_p, y)])
    return b, x_e, answer[1], x_p, hubble, rhs
