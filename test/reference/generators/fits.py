"""Published fitting formulas, transcribed from the project's list of them (digits as the papers print them, decimal strings).

Nothing of the program was read for this file but the names of its functions and the order of their arguments.
"""

from itertools import product

from mpmath import asin, asinh, exp, fabs, log, mpf, pi, sqrt

from formulas_output import tabulate

m = mpf

W_B = [0.0179, 0.022383, 0.0281]
W_M = [0.091, 0.14314, 0.31]
TILTS = [0.93, 0.965, 1.04]


def carroll(om, ol):
    """Carroll, Press & Turner 1992 (memory); in units of 1/H0."""
    total = om + ol
    a = om - m("0.3") * total + m("0.3")
    side = asinh if a <= 1 else asin
    if a == 1:
        return m(2) / 3
    return m(2) / 3 / sqrt(fabs(1 - a)) * side(sqrt(fabs(1 - a) / a))


def aubourg16(wb, wcb, wnu):
    return m("55.154") * exp(-m("72.3") * (wnu + m("0.0006")) ** 2) / (wcb ** m("0.25351") * wb ** m("0.12807"))


def aubourg17(wb, wcb, wnu, n):
    top = m("56.067") * exp(-m("49.7") * (wnu + m("0.002")) ** 2)
    return top / (wcb ** m("0.2436") * wb ** m("0.128876") * (1 + (n - m("3.046")) / m("30.60")))


def brieden(wb, wbc, n):
    return m("147.05") * (wb / m("0.02236")) ** -m("0.13") * (wbc / m("0.1432")) ** -m("0.23") * (n / m("3.04")) ** -m("0.1")


def eh_theta(temperature):
    return temperature / m("2.7")


def eh_equality(wm, temperature):
    return m("2.50e4") * wm * eh_theta(temperature) ** -4


def eh_wavenumber(wm, temperature):
    return m("7.46e-2") * wm * eh_theta(temperature) ** -2


def eh_drag(wb, wm):
    b1 = m("0.313") * wm ** -m("0.419") * (1 + m("0.607") * wm ** m("0.674"))
    b2 = m("0.238") * wm ** m("0.223")
    return 1291 * wm ** m("0.251") / (1 + m("0.659") * wm ** m("0.828")) * (1 + b1 * wb ** b2)


def eh_sound(z, wb, wm, temperature):
    R = lambda at: m("31.5") * wb * eh_theta(temperature) ** -4 * (1000 / at)
    eq = R(eh_equality(wm, temperature))
    here = R(z)
    inside = (sqrt(1 + here) + sqrt(here + eq)) / (1 + sqrt(eq))
    return 2 / (3 * eh_wavenumber(wm, temperature)) * sqrt(6 / eq) * log(inside)


def eh_silk(wb, wm):
    return m("1.6") * wb ** m("0.52") * wm ** m("0.73") * (1 + (m("10.4") * wm) ** -m("0.95"))


def eh_short(wb, wm):
    return m("44.5") * log(m("9.83") / wm) / sqrt(1 + 10 * wb ** m("0.75"))


def hu_sugiyama(wb, wm):
    g1 = m("0.0783") * wb ** -m("0.238") / (1 + m("39.5") * wb ** m("0.763"))
    g2 = m("0.560") / (1 + m("21.1") * wb ** m("1.81"))
    return 1048 * (1 + m("0.00124") * wb ** -m("0.738")) * (1 + g1 * wm ** g2)


def pen(z, O):
    s = ((1 - O) / O) ** (m(1) / 3)

    def eta(a):
        terms = (a ** -4 - m("0.1540") * s * a ** -3 + m("0.4304") * s ** 2 * a ** -2
                 + m("0.19097") * s ** 3 * a ** -1 + m("0.066941") * s ** 4)
        return 2 * sqrt(s ** 3 + 1) * terms ** (-m(1) / 8)

    return (1 + z) * (eta(m(1)) - eta(1 / (1 + z)))


def komatsu(y):
    return (1 + (m("0.3173") * y) ** m("1.83")) ** (1 / m("1.83"))


def ratio_at(wm, z):
    return m("0.042") / wm * (z / 1000)


def first_phase(r):
    return m("0.267") * (r / m("0.3")) ** m("0.1")


def second_height(wb, wm, n):
    return (m("0.925") * wm ** m("0.18") * m("2.4") ** (n - 1)
            / (1 + (wb / m("0.0164")) ** (12 * wm ** m("0.52"))) ** m("0.2"))


def third_height(wb, wm, n):
    return (m("2.17") / (1 + (wb / m("0.044")) ** 2) * wm ** m("0.59") * m("3.6") ** (n - 1)
            / (1 + m("1.63") * (1 - wb / m("0.071")) * wm))


def phase(peak, wb, r, n, O):
    a1 = m("0.286") + m("0.626") * wb
    a2 = m("0.1786") - m("6.308") * wb + m("174.9") * wb ** 2 - 1168 * wb ** 3
    phi = (m("1.466") - m("0.466") * n) * (a1 * r ** a2 + m("0.291") * O)
    if peak == 1:
        return phi
    if peak == 2:
        c0 = -m("0.1") + (m("0.213") - m("0.123") * O) * exp(-(52 - m("63.6") * O) * wb)
        c1 = m("0.063") * exp(-3500 * wb ** 2) + m("0.015")
        c2 = m("6e-6") + m("0.137") * (wb - m("0.07")) ** 2
        return phi + c0 - c1 * r - c2 / r + m("0.05") * (n - 1)
    e1 = m("9.97") + (m("3.3") - 3 * O) * wb
    e2 = (m("0.0016") + m("0.0067") * O + (m("0.196") - m("0.22") * O) * wb
          + (m("2.25") + m("2.77") * O) * m("1e-5") / wb)
    return phi + 10 - e1 * r ** e2 + m("0.08") * (n - 1)


def main():
    def put(name, source, arguments, function, points):
        tabulate(name, source, "fits.py", arguments, function, points)

    put("carrollAge", "Carroll, Press & Turner 1992 (memory)", ["matter", "lambda"], carroll,
        [(0.3, 0.7), (0.25, 0.6), (0.31, 0.0), (1.6, 0.2), (1.4, 0.9), (0.2, 0.95), (1.0, 0.0)])
    w_nu = [0.0, 6.451e-4, 0.0064]
    eq16 = "Aubourg et al. 2015 (1411.1074), eq. 16"
    put("aubourgDragSoundHorizon", eq16, ["baryonDensity", "baryonsAndCold", "neutrinoDensity"], aubourg16,
        list(product(W_B, [0.11, 0.142493], w_nu)))
    put("aubourgDragSoundHorizonWithNeutrinos", "Aubourg et al. 2015 (1411.1074), eq. 17 (memory)",
        ["baryonDensity", "baryonsAndCold", "neutrinoDensity", "effectiveNumber"], aubourg17,
        list(product(W_B, [0.11, 0.142493], w_nu, [3.046, 3.7])))
    put("briedenDragSoundHorizon", "Brieden, Gil-Marin & Verde 2023 (2212.04522), as quoted in 2503.14738",
        ["baryonDensity", "baryonsAndCold", "effectiveNumber"], brieden, list(product(W_B, [0.11, 0.1432], [2.7, 3.04, 3.5])))
    eh = "Eisenstein & Hu 1998 (astro-ph/9709112) (memory)"
    temperatures = [2.6, 2.7, 2.7255]
    put("eisensteinHuEqualityRedshift", eh, ["matterDensity", "temperature"], eh_equality, list(product(W_M, temperatures)))
    put("eisensteinHuEqualityWavenumber", eh, ["matterDensity", "temperature"], eh_wavenumber, list(product(W_M, temperatures)))
    put("eisensteinHuDragRedshift", eh, ["baryonDensity", "matterDensity"], eh_drag, list(product(W_B, W_M)))
    put("eisensteinHuSoundHorizon", eh, ["z", "baryonDensity", "matterDensity", "temperature"], eh_sound,
        list(product([900.0, 1020.756, 1500.0], W_B, W_M[:2], [2.6, 2.7255])))
    put("eisensteinHuSilkWavenumber", eh, ["baryonDensity", "matterDensity"], eh_silk, list(product(W_B, W_M)))
    put("eisensteinHuShortSoundHorizon", eh, ["baryonDensity", "matterDensity"], eh_short, list(product(W_B, W_M)))
    put("huSugiyamaLastScatteringRedshift", "Hu & Sugiyama 1996, eq. E-1", ["baryonDensity", "matterDensity"], hu_sugiyama,
        list(product([0.004, *W_B, 0.2], [0.03, *W_M])))
    put("penLuminosityDistance", "Pen 1999 (astro-ph/9904172)", ["z", "matter"], pen,
        list(product([0.3, 1.0, 7.0, 1090.0], [0.2, 0.31, 0.9, 1.0])))
    put("komatsuNeutrinoEnergy", "Komatsu et al. 2011 (1001.4538), eq. 26", ["y"], komatsu,
        [(y,) for y in (0.0, 0.1, 1.0, 3.0, 30.0, 356.0, 1e4)])
    put("jonesWyseOpticalDepth", "Jones & Wyse 1985", ["z"], lambda z: m("0.37") * (z / 1000) ** m("14.25"),
        [(800.0,), (1000.0,), (1065.0,), (1200.0,)])
    put("jonesWyseVisibility", "Jones & Wyse 1985", ["z"],
        lambda z: exp(-((z - 1065) / 80) ** 2 / 2) / (80 * sqrt(2 * pi)), [(900.0,), (1065.0,), (1100.0,), (1234.5,)])
    hu = "Hu, Fukugita, Zaldarriaga & Tegmark 2001 (astro-ph/0006436) (memory)"
    put("radiationToMatterAt", hu, ["matterDensity", "lastScattering"], ratio_at, list(product(W_M, [1060.0, 1090.0])))
    put("firstPeakPhase", hu, ["ratio"], first_phase, [(0.2,), (0.3,), (0.32,), (0.5,)])
    put("secondPeakHeightRatio", hu, ["baryonDensity", "matterDensity", "spectralIndex"], second_height,
        list(product([0.015, *W_B], W_M, TILTS)))
    put("thirdPeakHeightRatio", hu, ["baryonDensity", "matterDensity", "spectralIndex"], third_height,
        list(product([0.015, *W_B], W_M, TILTS)))
    put("peakPhase", "Doran & Lilley 2002 (astro-ph/0104486) (memory); phi + d_m",
        ["peak", "baryonDensity", "ratio", "spectralIndex", "earlyDarkEnergy"], phase,
        list(product([1, 2, 3], [0.015, 0.0224, 0.028], [0.25, 0.37], [0.93, 1.04], [0.0, 0.03, 0.11])))


if __name__ == "__main__":
    main()
