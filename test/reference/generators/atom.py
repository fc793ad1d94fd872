"""The three-level atom, first formulation: the value columns.

Unknowns (x_p, T_m/T_r, and in the calibrated tier y = He+/He) over N = -ln(1+z), all models side by side; collocation at the
Radau points (Radau IIA, s stages, order 2s - 1, stiffly accurate), Newton with the exact Jacobian by the complex step.  The
steps are uniform in ln(1+z) and small against every smooth scale of the problem, stiff transients are damped by the method.
Start: x_p and y from Saha, T_m = T_r, at z = 2800 (peebles) or 3500 (calibrated).
"""

import mpmath
import numpy as np

import background as B
import constants as K
import saha

START = {"peebles": 2800.0, "calibrated": 3500.0}
FUDGE = {"peebles": 1.0, "calibrated": 1.14}


def radau(stages):
    """Nodes and the matrix A of Radau IIA with s stages, from mpmath."""
    with mpmath.workdps(40):
        # interior nodes: zeros of the Jacobi polynomial (1, 0) of degree s - 1 on [-1, 1], by Newton from a scan
        f = lambda x: mpmath.jacobi(stages - 1, 1, 0, x)
        grid = [-1 + mpmath.mpf(2) * i / 400 for i in range(401)]
        values = [f(x) for x in grid]
        nodes = [mpmath.findroot(f, (grid[i], grid[i + 1]), solver="anderson")
                 for i in range(400) if values[i] * values[i + 1] < 0]
        assert len(nodes) == stages - 1
        c = [(1 + x) / 2 for x in nodes] + [mpmath.mpf(1)]
        V = mpmath.matrix(stages, stages)
        W = mpmath.matrix(stages, stages)
        for i in range(stages):
            for j in range(stages):
                V[i, j] = c[i] ** j
                W[i, j] = c[i] ** (j + 1) / (j + 1)
        A = W * V ** -1
        return (np.array([float(x) for x in c]),
                np.array([[float(A[i, j]) for j in range(stages)] for i in range(stages)]))


class Atom:
    """Right-hand sides for a list of backgrounds; arrays are (model, node)."""

    def __init__(self, backgrounds, tier, correction):
        self.tier, self.correction = tier, correction
        col = lambda f: np.array([[float(f(b))] for b in backgrounds])
        con = lambda key: col(lambda b: b.con[key])
        self.T0, self.n_H0, self.f = col(lambda b: b.T), col(lambda b: b.n_H0), col(lambda b: b.f_He)
        self.H0 = col(lambda b: b.H0)
        h, k, m_e, c = con("h"), con("k"), con("m_e"), float(K.C)
        self.thermal = 2 * np.pi * m_e * k / h ** 2
        self.kelvin = {key: h * c * float(v) * 100 / k for key, v in K.LEVEL.items()}
        self.compton = 8 * con("sigma_T") * col(lambda b: b.radiation) * self.T0 ** 4 / (3 * m_e * c)
        self.m_He_over_2k = float(K.MASS_HE_U) * con("u") / (2 * k)

    def rates(self, v, H, x_p, theta, y):
        """d(x_p, theta, y)/dN; any argument may be complex."""
        zz = np.exp(v)
        Tr = self.T0 * zz
        T = Tr * theta
        n_H = self.n_H0 * zz ** 3
        f, kelvin, c = self.f, self.kelvin, float(K.C)
        if y is None:
            G = (self.thermal * Tr) ** 1.5
            s = 4 * G * np.exp(-kelvin["He_limit"] / Tr) / n_H
            # x_e = x_p + f s/(s + x_e), the positive root, written without cancellation on either side
            b = s - x_p
            root = np.sqrt(b * b + 4 * s * (x_p + f))
            x_e = np.where(b.real > 0, 2 * s * (x_p + f) / np.where(b.real > 0, root + b, 1), (root - b) / 2)
        else:
            x_e = x_p + f * y
        # hydrogen
        t = T / 1e4
        alpha = FUDGE[self.tier] * 1e-19 * 4.309 * t ** -0.6166 / (1 + 0.6703 * t ** 0.5300)
        G = (self.thermal * T) ** 1.5
        beta = alpha * G * np.exp(-(kelvin["H_limit"] - kelvin["H_alpha"]) / T)
        lift = np.exp(-kelvin["H_alpha"] / T)
        L_a = float(K.LEVEL["H_alpha"]) * 100
        Kx = 1 / (8 * np.pi * H * L_a ** 3)
        if self.tier == "calibrated":
            d = v - np.log(1090.0)
            c0, c1, c2 = self.correction
            Kx = Kx * (1 + (c0 + c1 * d + c2 * d * d) * np.exp(-(d / 0.4) ** 2))
        two = float(K.RATE["H_two_photon"])
        n_1s = n_H * (1 - x_p)
        C = (1 + Kx * two * n_1s) / (1 + Kx * (two + beta) * n_1s)
        dx = -(x_e * x_p * n_H * alpha - beta * (1 - x_p) * lift) * C / H
        # matter temperature: d theta/dN, from dT/dz with the adiabatic term against T_r's own fall
        gamma = self.compton * zz ** 4 / H * x_e / (1 + f + x_e)
        dtheta = -gamma * (theta - 1) - theta
        if y is None:
            return x_e, (dx, dtheta)
        # helium I
        one_y = np.where((1 - y).real < 1e-15, 1e-15, 1 - y)
        one_x = np.where((1 - x_p).real < 1e-12, 1e-12, 1 - x_p)
        s1, s2 = np.sqrt(T / 10 ** 5.114), np.sqrt(T / 3.0)

        def recombination(q, p):
            return 10 ** q / (s2 * (1 + s2) ** (1 - p) * (1 + s1) ** (1 + p))

        def escape(A, level, sigma, a1, b1):
            L = float(K.LEVEL[level]) * 100
            nu = c * L
            tau = 3 * A * f * n_H * one_y / (8 * np.pi * H * L ** 3)
            D = nu * np.sqrt(T / self.m_He_over_2k) / c
            g = 3 * A * f * one_y * c ** 2 / (8 * np.pi ** 1.5 * sigma * nu ** 2 * D * one_x)
            return (1 - np.exp(-tau)) / tau + 1 / (1 + a1 * g ** b1)

        A_s, A_t = float(K.RATE["He_singlet"]), float(K.RATE["He_triplet"])
        P_s = escape(A_s, "He_2p", float(K.SIGMA_1S["singlet"]), 0.36, 0.86)
        P_t = escape(A_t, "He_3P", float(K.SIGMA_1S["triplet"]), 0.66, 0.9)
        a_s, a_t = recombination(-16.744, 0.711), recombination(-16.306, 0.761)
        b_s = 4 * a_s * G * np.exp(-(kelvin["He_limit"] - kelvin["He_2s"]) / T)
        X = 3 * A_s * P_s * np.exp(-(kelvin["He_2p"] - kelvin["He_2s"]) / T)
        two = float(K.RATE["He_two_photon"])
        # b (1-y) e^(-L/kT) with the exponents added first: L_He in both cases
        ground = G * np.exp(-kelvin["He_limit"] / T) * (1 - y)
        S = a_s * (x_e * y * n_H - 4 * ground) * (X + two) / (X + two + b_s)
        stay = 4 / 3 * a_t * G * np.exp(-(kelvin["He_limit"] - kelvin["He_3P"]) / T) / (A_t * P_t)
        Tr_ = a_t * (x_e * y * n_H - 4 * ground) / (1 + stay)
        return x_e, (dx, dtheta, -(S + Tr_) / H)


class History:
    """The solution on panels: v (panel edges), stage nodes, and x_e, T_m as polynomials of the panel coordinate."""


def solve(backgrounds, tier, correction, panels, stages):
    atom = Atom(backgrounds, tier, correction)
    M, D = len(backgrounds), 2 if tier == "peebles" else 3
    c, A = radau(stages)
    v0 = np.log1p(START[tier])
    h = v0 / panels
    edges = v0 - h * np.arange(panels + 1)
    edges[-1] = 0.0
    nodes = edges[:-1, None] - h * c[None, :]  # (panel, stage)
    H = np.array([(b.H0 * b.E(-nodes.astype(b.setting.real))).astype(float) for b in backgrounds])
    state = np.empty((M, D))
    for i, b in enumerate(backgrounds):
        _, _, x_p, y, _ = saha.Saha(b).fractions(np.array([b.setting.num(repr(v0))]))
        state[i] = [float(x_p[0]), 1.0, float(y[0])][:D]
    points = np.concatenate(([0.0], c))
    extrapolate = np.vander(1 + c, stages + 1, increasing=True) @ np.linalg.inv(np.vander(points, stages + 1, increasing=True))
    all_states = np.empty((panels, M, stages + 1, D))
    all_xe = np.empty((panels, M, stages + 1))
    previous, eye = None, np.eye(stages * D)
    for p in range(panels):
        v = nodes[p][None, :]
        Z = np.repeat(state[:, None, :], stages, axis=1) if previous is None else np.einsum("ij,mjd->mid", extrapolate, previous)
        for sweep in range(30):
            f0 = None
            J = np.empty((M, stages, D, D))
            for d in range(D):
                W = Z.astype(complex)
                W[:, :, d] += 1e-40j
                _, f = atom.rates(v, H[:, p], W[:, :, 0], W[:, :, 1], W[:, :, 2] if D == 3 else None)
                f = np.stack(f, axis=-1)
                J[:, :, :, d] = f.imag / 1e-40
                f0 = f.real
            residual = Z - state[:, None, :] - h * np.einsum("ij,mjd->mid", A, f0)
            block = -h * np.einsum("ij,mjab->miajb", A, J).reshape(M, stages * D, stages * D) + eye
            step = np.linalg.solve(block, residual.reshape(M, stages * D)).reshape(M, stages, D)
            Z = Z - step
            size = np.abs(step).max(axis=(0, 1))
            if size[0] < 2e-15 and size[1] < 1e-14 and (D == 2 or size[2] < 1e-14) and sweep > 0:
                break
        else:
            raise RuntimeError("Newton did not settle at 1+z = %g: %s" % (np.exp(v[0, 0]), size))
        if not (Z[:, :, 0].min() > 0 and Z[:, :, 0].max() < 1):
            raise RuntimeError("x_p left (0, 1)")
        previous = np.concatenate((state[:, None, :], Z), axis=1)
        all_states[p] = previous
        vv = np.concatenate(([edges[p]], nodes[p]))[None, :]
        all_xe[p], _ = atom.rates(vv, np.concatenate((H[:, p, :1], H[:, p]), axis=1), previous[:, :, 0] + 0j, previous[:, :, 1],
                                  previous[:, :, 2] if D == 3 else None)[0].real, None
        state = Z[:, -1, :]
    out = []
    for i, b in enumerate(backgrounds):
        s = History()
        s.background, s.tier, s.edges, s.h, s.points = b, tier, edges, h, points
        s.x_e = all_xe[:, i]
        s.T_m = all_states[:, i, :, 1] * float(b.T) * np.exp(np.concatenate((edges[:-1, None], nodes), axis=1))
        s.x_p = all_states[:, i, :, 0]
        out.append(s)
    return out
