"""Closed formulas of recombination, reionization, helium, neutrinos and densities, transcribed from the physics contract.

Written from the contract and the functions' names and argument order, before the program's text was read; OF_MODEL, peak_rows,
helium_beside and the continuum escape came after that, from the contract too. `formulas.py` also runs fits.py and blackbody.py; the
argument, if any, is blackbody.py's. The peaks need values/ as they are now.
"""

import json
import os
from itertools import product

from mpmath import exp, findroot, log, mpf, pi, quad, sqrt, tanh

import blackbody
import constants as K
import fits
from formulas_output import HERE, tabulate, write

m = mpf
C = m(K.C)
PARSEC = 648000 / pi * m(K.AU)
MEGAPARSEC = PARSEC * 10 ** 6
SETS = list(K.SETS)
LEVEL = {key: m(value) * 100 for key, value in K.LEVEL.items()}
RATE = {key: m(value) for key, value in K.RATE.items()}
M_H, M_HE = m(K.MASS_H_U), m(K.MASS_HE_U)
TEMPERATURES = [40.0, 700.0, 2970.1, 3500.0, 4800.0, 9000.0]


def con(name, key):
    return m(K.SETS[name][key])


def kelvin(level, name):
    return con(name, "h") * C * level / con(name, "k")


def states(T, name):
    return (2 * pi * con(name, "m_e") * con(name, "k") * T / con(name, "h") ** 2) ** (m(3) / 2)


def case_b(T):
    t = T / 10 ** 4
    return m("1e-19") * m("4.309") * t ** -m("0.6166") / (1 + m("0.6703") * t ** m("0.5300"))


def excited(T, name):
    return states(T, name) * exp(-kelvin(LEVEL["H_limit"] - LEVEL["H_alpha"], name) / T)


def ground(T, name):
    return excited(T, name) * exp(-kelvin(LEVEL["H_alpha"], name) / T)


def peebles(K_, beta, n):
    two = RATE["H_two_photon"]
    return (1 + K_ * two * n) / (1 + K_ * (two + beta) * n)


def helium_beside(x_p, T, n_H, f, name):
    """y > 0 of f y^2 + (x_p + s) y - s = 0, s = 4 G e^(-L_He/kT)/n_H."""
    s = 4 * states(T, name) * exp(-kelvin(LEVEL["He_limit"], name) / T) / n_H
    return (sqrt((x_p + s) ** 2 + 4 * f * s) - x_p - s) / (2 * f)


def helium_recombination(T, q, p):
    s1, s2 = sqrt(T / m(10) ** m("5.114")), sqrt(T / 3)
    return m(10) ** m(q) / (s2 * (1 + s2) ** (1 - m(p)) * (1 + s1) ** (1 + m(p)))


singlet = lambda T: helium_recombination(T, "-16.744", "0.711")
triplet = lambda T: helium_recombination(T, "-16.306", "0.761")


def escape(T, n_H, f, H, one_x, one_y, A, L, sigma, a, b, name):
    tau = 3 * A * f * n_H * one_y / (8 * pi * H * L ** 3)
    nu = C * L
    D = nu * sqrt(2 * con(name, "k") * T / (M_HE * con(name, "u") * C ** 2))
    g = 3 * A * f * one_y * C ** 2 / (8 * pi ** m("1.5") * sigma * nu ** 2 * D * one_x)
    return (1 - exp(-tau)) / tau + 1 / (1 + m(a) * g ** m(b))


def helium_logit(T, n_H, f, H, one_x, odds, x_e, name):
    """(S + T)/[y (1 - y)]."""
    y, one_y = odds / (1 + odds), 1 / (1 + odds)
    G = states(T, name)
    lift = lambda upper, lower: exp(-kelvin(LEVEL[upper] - LEVEL[lower], name) / T)
    fall = lambda level: exp(-kelvin(LEVEL[level], name) / T)
    P = lambda A, level, sigma, a, b: escape(T, n_H, f, H, one_x, one_y, A, LEVEL[level], m(sigma), a, b, name)
    A_s, A_t = RATE["He_singlet"], RATE["He_triplet"]
    b_s = 4 * singlet(T) * G * lift("He_limit", "He_2s")
    X = 3 * A_s * P(A_s, "He_2p", K.SIGMA_1S["singlet"], "0.36", "0.86") * lift("He_2p", "He_2s")
    two = RATE["He_two_photon"]
    S = (x_e * y * n_H * singlet(T) - b_s * one_y * fall("He_2s")) * (X + two) / (X + two + b_s)
    b_t = m(4) / 3 * triplet(T) * G * lift("He_limit", "He_3S")
    P_t = P(A_t, "He_3P", K.SIGMA_1S["triplet"], "0.66", "0.9")
    Tr = (x_e * y * n_H * triplet(T) - 3 * b_t * one_y * fall("He_3S")) / (1 + b_t / (A_t * P_t * lift("He_3P", "He_3S")))
    return (S + Tr) / (y * one_y)


def helium_of(wb, n):
    d = n - m("3.046")
    Y = (m("0.2311") + m("0.9502") * wb - m("11.27") * wb ** 2
         + d * (m("0.01356") + m("0.008581") * wb - m("0.1810") * wb ** 2)
         + d ** 2 * (-m("0.0009795") - m("0.001370") * wb + m("0.01746") * wb ** 2))
    return by_mass(Y)


def by_mass(Y):
    r = M_HE / (4 * M_H)
    return r * Y / (r * Y + 1 - Y)


def reionized(z, z_re, f_He):
    dz = m("0.5")
    D = m("1.5") * sqrt(1 + z_re) * dz
    rise = (1 + z_re) ** m("1.5") - (1 + z) ** m("1.5")
    return (1 + f_He) / 2 * (1 + tanh(rise / D)) + f_He / 2 * (1 + tanh((m("3.5") - z) / m("0.5")))


def correction(one_plus_z, c0, c1, c2):
    d = log(one_plus_z / 1090)
    return 1 + (c0 + c1 * d + c2 * d ** 2) * exp(-(d / m("0.4")) ** 2)


def unit_density(name):
    hundred = m(10) ** 5 / MEGAPARSEC
    return 3 * hundred ** 2 / (8 * pi * con(name, "G"))


def photons(T, name):
    return 4 * con(name, "sigma_SB") / C * T ** 4 / C ** 2 / unit_density(name)


def neutrino_temperature(n, T):
    return (m(4) / 11) ** (m(1) / 3) * (n / 3) ** (m(1) / 4) * T


SMALL, LARGE = m("7.42e-5"), m("2.51e-3")


def masses(total, ordering, which):
    """Largest first."""
    if ordering == "oneMassive":
        found = [total, m(0), m(0)]
    elif ordering == "degenerate":
        found = [total / 3] * 3
    else:
        if ordering == "normal":
            of = lambda least: [least, sqrt(least ** 2 + SMALL), sqrt(least ** 2 + LARGE)]
        else:  # the lightest is m3; m2^2 = m3^2 + LARGE, m1^2 = m2^2 - SMALL
            of = lambda least: [least, sqrt(least ** 2 + LARGE - SMALL), sqrt(least ** 2 + LARGE)]
        found = of(findroot(lambda least: sum(of(least)) - total, (m(0), total), solver="anderson"))
    return sorted(found, reverse=True)[int(which)]


def model(hubble, wb, wc, T, name):
    """(H0 in 1/s, Omega_m, Omega_r, Omega_L) of a flat model with massless neutrinos, N_eff 3.044 and radiation inside."""
    h2 = (hubble / 100) ** 2
    radiation = photons(T, name) * (1 + m(7) / 8 * (m(4) / 11) ** (m(4) / 3) * m("3.044")) / h2
    matter = (wb + wc) / h2
    return hubble * 1000 / MEGAPARSEC, matter, radiation, 1 - matter - radiation


def hydrogen_density(wb, Y, name):
    return (1 - Y) * wb * unit_density(name) / (M_H * con(name, "u"))


def baryons_per_photon(hubble, wb, wc, Y, T, name):
    n_H = hydrogen_density(wb, Y, name)
    n_He = Y / (M_HE / M_H * (1 - Y)) * n_H
    return (n_H + 4 * n_He) / blackbody.photons(T, name)


def reionization_depth(hubble, wb, wc, Y, T, name, z_re):
    H0, matter, radiation, rest = model(hubble, wb, wc, T, name)
    f_He = Y / (M_HE / M_H * (1 - Y))
    scale = C * con(name, "sigma_T") * hydrogen_density(wb, Y, name) / H0

    def slope(z):
        u = 1 + z
        return scale * u ** 2 * reionized(z, z_re, f_He) / sqrt(matter * u ** 3 + radiation * u ** 4 + rest)

    return quad(slope, [0, 2, 3, m("3.5"), 4, 5, z_re - 1, z_re, z_re + 1, z_re + 3, 20, 50])


def deceleration(hubble, wb, wc, Y, T, name, z):
    _, matter, radiation, rest = model(hubble, wb, wc, T, name)
    u = 1 + z
    return (matter * u ** 3 + 2 * radiation * u ** 4 - 2 * rest) / (matter * u ** 3 + radiation * u ** 4 + rest) / 2


def reference_value(file, name):
    """A value of values/ without arguments, of a reference model."""
    with open(os.path.join(HERE, "..", "values", file + ".json")) as f:
        return [m(repr(row[1])) for row in json.load(f)["rows"] if row[0] == name][0]


def peak_rows():
    """l_m = l_A (m - phi - d_m) with l_A, z_* and omega_nu of the reference; models with a constant, whose early share is nothing."""
    peaks, spacings = [], []
    for name, givens in [(each["name"], each["givens"]) for each in json.load(open(os.path.join(HERE, "..", "models.json")))]:
        if "darkEnergy" in givens or len(spacings) == 3:
            continue
        scale, star = reference_value("acousticMultipole.calibrated", name), reference_value("lastScatteringRedshift.calibrated", name)
        wb = m(repr(givens["baryonDensity"]))
        wm = wb + m(repr(givens["coldMatterDensity"])) + reference_value("neutrinoDensity", name)
        at = [scale * (peak - fits.phase(peak, wb, fits.ratio_at(wm, star), m("0.965"), m(0))) for peak in (1, 2, 3)]
        peaks += [([name, peak], at[peak - 1]) for peak in (1, 2, 3)]
        spacings.append(([name], (at[2] - at[0]) / 2))
    return peaks, spacings


# givens: hubble, omega_b, omega_c, Y_p, T_cmb, set; then the quantity's own arguments
OF_MODEL = {
    "baryonToPhotonRatio": ("n_H + 4 n_He over Planck's photons", baryons_per_photon, [()]),
    "reionizationDepth": ("Lewis 2008; int c sigma_T n_H x_re dz/[H (1+z)] from 0 to 50 by mpmath", reionization_depth, [(6.3,), (7.68,), (9.4,)]),
    "decelerationAt": ("(1/2) sum (rho + 3 P)/rho_c", deceleration, [(0.0,), (1.0,), (3400.0,)]),
    "backgroundBrightness": ("Planck 1901, MJy/sr at GHz",
                             lambda h, wb, wc, Y, T, name, ghz: blackbody.planck(ghz * 10 ** 9, T, name) * m(10) ** 20, [(30.0,), (160.23,), (857.0,)]),
    "wienFrequency": ("Wien 1893, GHz", lambda h, wb, wc, Y, T, name: blackbody.wien_frequency(T, name) / 10 ** 9, [()]),
    "wienWavelength": ("Wien 1893, mm", lambda h, wb, wc, Y, T, name: blackbody.wien_wavelength(T, name) * 1000, [()]),
    "photonNumberDensity": ("Planck 1901, 1/cm3", lambda h, wb, wc, Y, T, name: blackbody.photons(T, name) / 10 ** 6, [()]),
    "age.carroll1992": ("Carroll, Press & Turner 1992 (memory), Gyr",
                        lambda h, wb, wc, Y, T, name: fits.carroll(model(h, wb, wc, T, name)[1], model(h, wb, wc, T, name)[3])
                        / model(h, wb, wc, T, name)[0] / (m(K.JULIAN_YEAR) * 10 ** 9), [()]),
    "luminosityDistance.pen1999": ("Pen 1999, Mpc",
                                   lambda h, wb, wc, Y, T, name, z: C / 1000 / h * fits.pen(z, model(h, wb, wc, T, name)[1]), [(0.5,), (3.0,)]),
    "peakHeightRatio": ("Hu et al. 2001 (memory) at n_s 0.965, the vocabulary's default",
                        lambda h, wb, wc, Y, T, name, peak: (fits.second_height if peak == 2 else fits.third_height)(wb, wb + wc, m("0.965")), [(2,), (3,)]),
}
GIVENS = [(67.4, 0.0224, 0.12, 0.2454, 2.7255), (71.3, 0.0217, 0.113, 0.251, 2.71)]

FIELDS = {"gravitation": "G", "planck": "h", "boltzmann": "k", "elementaryCharge": "e", "electronMass": "m_e", "protonMass": "m_p",
          "atomicMassUnit": "u", "thomsonCrossSection": "sigma_T", "stefanBoltzmann": "sigma_SB"}
SCIPY_NAMES = {
    "e": "elementary charge",
    "G": "Newtonian constant of gravitation", "h": "Planck constant", "k": "Boltzmann constant", "m_e": "electron mass",
    "m_p": "proton mass", "u": "atomic mass constant", "sigma_T": "Thomson cross section", "sigma_SB": "Stefan-Boltzmann constant",
}


def check_sets():
    """The typed digits against those lists that the SciPy at hand ships; returns what was compared, for the file's head."""
    from scipy.constants import _codata
    import scipy
    compared = []
    for name in SETS:
        listed = getattr(_codata, "_physical_constants_" + name[-4:], None)
        if listed is None and hasattr(_codata, "txt" + name[-4:]):
            parse = getattr(_codata, "parse_constants_2002to2014" if int(name[-4:]) < 2018 else "parse_constants_2018toXXXX", None)
            exact = getattr(_codata, "exact" + ("2018" if name[-4:] == "2018" else name[-4:]), None)
            try:
                listed = parse(getattr(_codata, "txt" + name[-4:]), exact) if parse else None
            except TypeError:
                listed = parse(getattr(_codata, "txt" + name[-4:]))
        if listed is None:
            continue
        for key, word in SCIPY_NAMES.items():
            value = listed[word][0]
            if key == "sigma_SB" and int(name[-4:]) >= 2018:
                # exact since 2019, and the lists print its first ten digits only
                value = float(2 * pi ** 5 * con(name, "k") ** 4 / (15 * con(name, "h") ** 3 * C ** 2))
            if abs(value / float(K.SETS[name][key]) - 1) > 1e-15:
                raise ValueError("%s %s: typed %s, SciPy has %r" % (name, key, K.SETS[name][key], value))
        compared.append(name)
    return "typed from the contract; the same in SciPy %s's lists of %s" % (scipy.__version__, ", ".join(compared) or "none")


def main():
    put = lambda *given: tabulate(given[0], given[1], "formulas.py", *given[2:])
    sets = [(name,) for name in SETS]
    write("constantsSets", "CODATA 2010, 2014, 2018, 2022", "formulas.py", ["set", "field"],
          [([name, field], con(name, key)) for name in SETS for field, key in FIELDS.items()], check_sets())
    levels = {"hydrogenLimit": "H_limit", "lymanAlpha": "H_alpha", "heliumLimit": "He_limit", "heliumSinglet2s": "He_2s",
              "heliumSinglet2p": "He_2p", "heliumTriplet2s": "He_3S", "heliumTriplet2p": "He_3P", "heliumIonLimit": "HeII_limit"}
    rates = {"hydrogenTwoPhotonRate": "H_two_photon", "heliumTwoPhotonRate": "He_two_photon", "heliumSingletRate": "He_singlet",
             "heliumTripletRate": "He_triplet"}
    write("atoms", "NIST Atomic Spectra Database; AME2020; Goldman 1989; Drake, Victor & Dalgarno 1969 (see constants.py for what is memory)",
          "formulas.py", ["name"],
          [(["hydrogenMassInUnits"], M_H), (["heliumMassInUnits"], M_HE), (["heliumToHydrogenMass"], M_HE / M_H)]
          + [([name], LEVEL[key]) for name, key in levels.items()] + [([name], RATE[key]) for name, key in rates.items()]
          + [(["hydrogenCrossSectionAtSinglet"], m(K.SIGMA_1S["singlet"])), (["hydrogenCrossSectionAtTriplet"], m(K.SIGMA_1S["triplet"]))])
    write("astronomicalUnits", "SI; IAU 2012 B2; IAU 2015 B2; Julian year", "formulas.py", ["name"],
          [(["lightSpeed"], C), (["astronomicalUnit"], m(K.AU)), (["parsec"], PARSEC), (["megaparsec"], MEGAPARSEC),
           (["julianYear"], m(K.JULIAN_YEAR)), (["gigayear"], m(K.JULIAN_YEAR) * 10 ** 9), (["arcsecond"], pi / 648000)])
    put("radiationConstant", "a = 4 sigma_SB/c", ["constants"], lambda name: 4 * con(name, "sigma_SB") / C, sets)

    source = "Pequignot, Petitjean & Boisson 1991 (memory)"
    put("caseBRecombination", source, ["temperature"], case_b, [(T,) for T in TEMPERATURES])
    thermal = list(product(TEMPERATURES[1:], SETS))
    put("electronStates", "Saha's equation", ["temperature", "constants"], states, thermal)
    put("levelTemperature", "h c/k", ["constants"], lambda name: kelvin(m(1), name), sets)
    put("excitedIonizationOverRecombination", "Peebles 1968", ["temperature", "constants"], excited, thermal)
    put("groundIonizationOverRecombination", "Peebles 1968", ["temperature", "constants"], ground, thermal)
    write("lymanAlphaVolume", "Peebles 1968: 1/(8 pi L_a^3)", "formulas.py", [], [([], 1 / (8 * pi * LEVEL["H_alpha"] ** 3))])
    put("peeblesFactor", "Peebles 1968, eq. 31", ["escapeVolume", "ionization", "groundDensity"], peebles,
        [(9e-12, 1e3, 2e4), (8e-12, 30.0, 3e8), (1.2e-11, 0.2, 2e8), (5e-12, 4e5, 1e6)])
    for which, weight, level in (("hydrogen", 1, "H_limit"), ("helium", 4, "He_limit"), ("heliumIon", 1, "HeII_limit")):
        put("sahaLogarithms." + which, "Saha's equation", ["temperature", "constants"],
            lambda T, name, weight=weight, level=level: log(weight) + log(states(T, name)) - kelvin(LEVEL[level], name) / T,
            list(product([3000.0, 4500.0, 7000.0, 16000.0], SETS)))
    put("heliumWithHydrogen", "Saha's equation with x_e = x_p + f y", ["hydrogen", "temperature", "hydrogenDensity", "heliumRatio", "constants"],
        helium_beside, [(x_p, T, n_H, 0.081, name) for x_p, T, n_H in ((1.0, 7600.0, 4e9), (1.0, 7000.0, 3.1e9), (0.97, 5000.0, 1.2e9), (0.4, 3700.0, 5e8)) for name in SETS])
    wms = "Switzer & Hirata 2008; Kholupenko et al. 2007; Wong, Moss & Scott 2008 (coefficients memory)"
    put("heliumSingletRecombination", wms, ["temperature"], singlet, [(T,) for T in TEMPERATURES])
    put("heliumTripletRecombination", wms, ["temperature"], triplet, [(T,) for T in TEMPERATURES])
    # away from equilibrium on both sides, so that nothing cancels; 1 - x_p small while helium recombines, large later
    gases = [
        (7000.0, 2.6e9, 0.081, 1.2e-13, 3e-7, 3.0, 1.12), (6000.0, 1.7e9, 0.079, 9e-14, 2e-5, 1.0, 1.05),
        (5400.0, 1.25e9, 0.081, 7.2e-14, 1.5e-4, 0.25, 1.01), (5000.0, 9.8e8, 0.075, 6.2e-14, 0.002, 0.03125, 0.998),
        (4700.0, 8.1e8, 0.081, 5.5e-14, 0.02, 0.001953125, 0.98), (4300.0, 6.3e8, 0.085, 4.7e-14, 0.12, 3e-5, 0.88),
    ]
    put("heliumLogitRate", wms,
        ["temperature", "hydrogenDensity", "heliumRatio", "rate", "neutralHydrogen", "heliumOdds", "ionized", "constants"],
        helium_logit, [gas + (name,) for gas in gases for name in SETS])
    put("lymanAlphaCorrection", "the project's own smooth correction", ["onePlusRedshift", "c0", "c1", "c2"], correction,
        [(z, *c) for z in (700.0, 950.0, 1090.0, 1250.0, 1600.0) for c in ((0.0406, -0.4589, -1.9302), (0.03, 0.2, 1.5))])
    write("calibratedRecombinationFactor", "Seager, Sasselov & Scott 1999 (astro-ph/9909275)", "formulas.py", [], [([], m("1.14"))])
    put("nucleosynthesisHelium", "Planck 2015 XIII section 6.5 (memory)", ["baryonDensity", "effectiveNumber"], helium_of,
        list(product([0.0179, 0.0224, 0.0281], [2.5, 3.044, 3.046, 4.1])))
    put("massFractionFromNucleonFraction", "r Y/(r Y + 1 - Y), r = m_He/(4 m_H)", ["byNucleons"], by_mass, [(0.22,), (0.24682,), (0.28,)])
    put("heliumToHydrogenRatio", "Y_p/[(m_He/m_H)(1 - Y_p)]", ["helium"], lambda Y: Y / (M_HE / M_H * (1 - Y)), [(0.22,), (0.2454,), (0.28,)])
    put("reionizationProfile", "Lewis 2008 (0804.3865)", ["z", "reionizationRedshift", "heliumRatio"], reionized,
        list(product([0.0, 2.9, 3.5, 4.1, 6.9, 7.68, 8.2], [6.1, 7.68, 9.5], [0.075, 0.0815])))

    put("unitDensity", "3 (100 km/s/Mpc)^2/(8 pi G)", ["constants"], unit_density, sets)
    put("photonDensity", "a T^4/(c^2 rho_100)", ["temperature", "constants"], photons, list(product([2.6, 2.7255], SETS)))
    put("neutrinoTemperature", "(4/11)^(1/3) (N_eff/3)^(1/4) T", ["effectiveNumber", "photonTemperature"], neutrino_temperature,
        list(product([2.5, 3.044, 4.0], [2.6, 2.7255])))
    put("masslessSpeciesDensity", "(7/8) (4/11)^(4/3) (N_eff/3) omega_gamma", ["effectiveNumber", "photonDensity"],
        lambda n, w: m(7) / 8 * (m(4) / 11) ** (m(4) / 3) * n / 3 * w, list(product([2.5, 3.044, 4.0], [2.4728e-5])))
    put("massToTemperature", "m c^2/(k T_nu)", ["mass", "temperature", "constants"],
        lambda mass, T, name: mass * con(name, "e") / (con(name, "k") * T), list(product([0.01, 0.06, 0.3], [1.9525], SETS)))
    put("neutrinoMassesFromSum", "oscillation data, splittings memory; roots by mpmath", ["sum", "ordering", "which"], masses,
        [(total, ordering, which) for total, ordering in (
            (0.06, "oneMassive"), (0.12, "degenerate"), (0.0591, "normal"), (0.065, "normal"), (0.12, "normal"), (0.3, "normal"),
            (0.1, "inverted"), (0.12, "inverted"), (0.3, "inverted"))
         for which in ((0,) if ordering == "oneMassive" else (0, 1, 2))])
    names = ["hubble", "baryonDensity", "coldMatterDensity", "helium", "photonTemperature", "constants"]
    for quantity, (source, function, own) in OF_MODEL.items():
        put("ofModel." + quantity, source, names + ["argument"] * len(own[0]), function,
            [given + (name,) + argument for given in GIVENS for name in SETS for argument in own])
    peaks, spacings = peak_rows()
    doran = "Doran & Lilley 2002 (memory) with l_A, z_* and omega_nu of values/; dark energy before last scattering left out (3e-10)"
    write("ofReferenceModel.peakMultipole", doran, "formulas.py", ["model", "peak"], peaks)
    write("ofReferenceModel.peakSpacing", doran, "formulas.py", ["model"], spacings)
    for line, A, level, sigma, a, b in (("singlet", "He_singlet", "He_2p", "singlet", "0.36", "0.86"), ("triplet", "He_triplet", "He_3P", "triplet", "0.66", "0.9")):
        strength = lambda A, level, sigma: RATE[A] / (m(K.SIGMA_1S[sigma]) * LEVEL[level] ** 3)
        ratio = strength(A, level, sigma) / strength("He_singlet", "He_2p", "singlet")
        put("continuumEscape." + line, wms + "; 1/(1 + a' g^b'), the singlet line's g given", ["singletStrength"],
            lambda g, ratio=ratio, a=a, b=b: 1 / (1 + m(a) * (ratio * g) ** m(b)), [(r ** 8,) for r in (0.5, 1.0, 1.5, 2.0, 3.0, 6.0)])
    fits.main()
    blackbody.main()


if __name__ == "__main__":
    main()
