"""Writes ionisation, last scattering and acoustics of every model: `recombination.py saha peebles calibrated`, or only some of these."""

import sys

import numpy as np

import atom
import background as B
import depths
import depths_check
import output
import saha

Z_SAHA = [8000.0, 7000.0, 6000.0, 5000.0, 4000.0, 3500.0, 3000.0, 2500.0, 2000.0, 1800.0, 1600.0, 1500.0, 1400.0, 1300.0, 1200.0]
Z_PEEBLES = [1700.0, 1600.0, 1500.0, 1400.0, 1300.0, 1200.0, 1100.0, 1000.0, 900.0, 800.0, 600.0, 400.0, 200.0, 100.0, 50.0, 20.0,
             10.0, 5.0, 1.0]
Z_CALIBRATED = [3000.0, 2700.0, 2400.0, 2200.0, 2000.0, 1900.0, 1800.0] + Z_PEEBLES
Z_DEPTH = [10.0, 100.0, 500.0, 800.0, 1000.0, 1090.0, 1200.0, 1500.0, 2500.0]
Z_VISIBILITY = [600.0, 900.0, 1000.0, 1080.0, 1150.0, 1250.0]

PEEBLES = "Peebles 1968; Zeldovich, Kurt & Sunyaev 1968; rates of Pequignot, Petitjean & Boisson 1991; physics contract section 4.2"
CALIBRATED = ("as peebles with F = 1.14 (Seager, Sasselov & Scott 1999), helium I out of equilibrium (Switzer & Hirata 2008; Wong, Moss & "
              "Scott 2008) and the project's correction, coefficients %r; physics contract section 4.3")
SAHA = "Saha equilibrium of H, He I, He II; physics contract section 4.1"

ATOM = ("value: collocation at 8 Radau points, 1600 steps in ln(1+z) (agrees with 6 points, 800 steps within 1e-12); looserValue: SciPy "
        "Radau then LSODA at rtol 1e-13, second formulation")
DERIVED = ("value: polynomials on the collocation panels, long double horizons; looserValue: second formulation on the LSODA solution, "
           "Gauss panels and SciPy quad")

UNITS = {
    "lastScatteringRedshift": "1", "lastScatteringSoundHorizon": "Mpc", "visibilityPeakRedshift": "1", "visibilityWidth": "1",
    "visibilityMedianRedshift": "1", "acousticAngle": "0.01 rad", "acousticMultipole": "1", "shiftParameter": "1",
    "dragRedshift": "1", "dragSoundHorizon": "Mpc", "dragSoundHorizonTimesReducedHubble": "Mpc", "dampingWavenumber": "1/Mpc",
    "dampingAngle": "0.01 rad", "equalityHorizonAngle": "0.01 rad", "equalitySoundAngle": "0.01 rad",
}


def put(name, unit, source, tolerance, arguments, rows):
    output.write(name, unit, source, "recombination.py", tolerance, arguments, rows)


def equilibrium(models, tight, loose):
    rows, width = [], []
    for (name, _), t, l in zip(models, tight, loose):
        value = saha.Saha(t).fractions(np.log1p(np.array(Z_SAHA, dtype=np.longdouble)))[0]
        looser = saha.Saha(l).fractions(np.log1p(np.array(Z_SAHA)))[0]
        rows += [(name, [z], v, w) for z, v, w in zip(Z_SAHA, value, looser)]
        width.append((name, [], depths.saha_last_scattering(t), depths.saha_last_scattering(l)))
    put("residualIonizedFraction.saha", "1", SAHA, "value: long double; looserValue: float64; bisection and Newton to rounding", ["z"], rows)
    put("lastScatteringRedshift.saha", "1", SAHA + "; tau = 1",
        "value: long double, 20 nodes on panels of 0.01 in ln(1+z); looserValue: float64, 10 nodes on 0.02", [], width)


def three_level(models, tight, loose, tier):
    coefficients = output.correction() if tier == "calibrated" else [0.0, 0.0, 0.0]
    source = PEEBLES if tier == "peebles" else CALIBRATED % (coefficients,)
    z_list = Z_PEEBLES if tier == "peebles" else Z_CALIBRATED
    histories = atom.solve(loose, tier, coefficients, 1600, 8)
    names = list(UNITS)
    table = {key: [] for key in ["x", "T", "tau", "drag", "g"] + names}
    for (name, givens), t, history in zip(models, tight, histories):
        first = depths.Depths(history, t)
        second = depths_check.Second(givens, tier, coefficients, z_list)
        for z, (x, T) in zip(z_list, second.rows):
            table["x"].append((name, [z], first.x_e.at(np.log1p(z)), x))
            table["T"].append((name, [z], first.T_m.at(np.log1p(z)), T))
        for z in Z_DEPTH:
            v = float(np.log1p(z))
            table["tau"].append((name, [z], first.tau.integral(v), second.tau(v)))
            table["drag"].append((name, [z], first.drag.integral(v), second.integral(second.drag_rate, v)))
        for z in Z_VISIBILITY:
            table["g"].append((name, [z], first.visibility(z), second.visibility(z)))
        one, two = first.numbers(), second.numbers()
        for key in names:
            table[key].append((name, [], one[key], two[key]))
    put("residualIonizedFraction." + tier, "1", source, ATOM, ["z"], table["x"])
    put("matterTemperature." + tier, "K", source, ATOM, ["z"], table["T"])
    put("opticalDepth." + tier, "1", "int_0^z c sigma_T n_e dz/[H (1+z)], no reionisation; " + source, DERIVED, ["z"], table["tau"])
    put("dragDepth." + tier, "1", "int_0^z dtau/R, no reionisation; " + source, DERIVED, ["z"], table["drag"])
    put("visibility." + tier, "1", "(dtau/dz) e^-tau per unit z; " + source, DERIVED, ["z"], table["g"])
    for key in names:
        put(key + "." + tier, UNITS[key], "physics contract section 5; " + source, DERIVED, [], table[key])


def main():
    wanted = sys.argv[1:] or ["saha", "peebles", "calibrated"]
    models = output.models()
    tight = [B.Background(g, B.TIGHT) for _, g in models]
    loose = [B.Background(g, B.LOOSE) for _, g in models]
    for tier in wanted:
        if tier == "saha":
            equilibrium(models, tight, loose)
        else:
            three_level(models, tight, loose, tier)


if __name__ == "__main__":
    main()
