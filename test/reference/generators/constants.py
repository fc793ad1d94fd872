"""Constants of the reference generators, typed in by hand from the project's physics contract, section 1.

Decimal strings, so that every precision (float64, 80-bit long double, mpmath) reads the printed digits itself.
CODATA sets: Mohr et al. 2012 (2010), 2016 (2014), Tiesinga et al. 2021 (2018), Mohr et al. 2024 (2022); sigma_SB as printed.
c exact (SI); au, parsec: IAU 2012 B2 and 2015 B2.
"""

SETS = {
    "codata2010": {
        "G": "6.67384e-11", "h": "6.62606957e-34", "k": "1.3806488e-23", "e": "1.602176565e-19",
        "m_e": "9.10938291e-31", "m_p": "1.672621777e-27", "u": "1.660538921e-27",
        "sigma_T": "6.652458734e-29", "sigma_SB": "5.670373e-8",
    },
    "codata2014": {
        "G": "6.67408e-11", "h": "6.62607004e-34", "k": "1.38064852e-23", "e": "1.6021766208e-19",
        "m_e": "9.10938356e-31", "m_p": "1.672621898e-27", "u": "1.66053904e-27",
        "sigma_T": "6.6524587158e-29", "sigma_SB": "5.670367e-8",
    },
    "codata2018": {
        "G": "6.67430e-11", "h": "6.62607015e-34", "k": "1.380649e-23", "e": "1.602176634e-19",
        "m_e": "9.1093837015e-31", "m_p": "1.67262192369e-27", "u": "1.66053906660e-27",
        "sigma_T": "6.6524587321e-29", "sigma_SB": "5.6703744191844314e-8",
    },
    "codata2022": {
        "G": "6.67430e-11", "h": "6.62607015e-34", "k": "1.380649e-23", "e": "1.602176634e-19",
        "m_e": "9.1093837139e-31", "m_p": "1.67262192595e-27", "u": "1.66053906892e-27",
        "sigma_T": "6.6524587051e-29", "sigma_SB": "5.6703744191844314e-8",
    },
}

C = "299792458"
AU = "149597870700"
JULIAN_YEAR = "31557600"

# neutral atoms, u: AME2020 (memory)
MASS_H_U = "1.00782503190"
MASS_HE_U = "4.002603254"

# 1/cm above the ground state: NIST Atomic Spectra Database; He_2p and He_3P (memory)
LEVEL = {
    "H_limit": "109678.77174307",
    "H_alpha": "82259.16304",
    "He_limit": "198310.66637",
    "He_2s": "166277.440",
    "He_2p": "171134.897",
    "He_3S": "159855.974",
    "He_3P": "169086.843",
    "HeII_limit": "438908.8789",
}

# 1/s: hydrogen two-photon, Goldman 1989; helium two-photon, Drake, Victor & Dalgarno 1969; 2 1P1 and 2 3P1 to the ground (all memory)
RATE = {"H_two_photon": "8.22458", "He_two_photon": "51.3", "He_singlet": "1.798287e9", "He_triplet": "177.58"}
# hydrogen 1s photo-ionisation at the two helium lines, m2: Stobbe 1930, as the contract prints it (memory)
SIGMA_1S = {"singlet": "1.8742e-22", "triplet": "1.9381e-22"}

# T_cmb: Fixsen 2009; N_eff: Bennett et al. 2021; the rest are the vocabulary's defaults
DEFAULTS = {
    "curvature": 0.0, "w0": -1.0, "wa": 0.0, "effectiveNumber": 3.044, "masses": [0.06, 0.0, 0.0],
    "photonTemperature": 2.7255, "helium": "nucleosynthesis", "constants": "codata2022", "closure": "radiationInside",
}


def flat(givens):
    """The nested givens of models.json with every default filled in, as one flat dictionary."""
    d = dict(DEFAULTS)
    for key in ("hubble", "baryonDensity", "coldMatterDensity"):
        d[key] = givens[key]
    for key in ("curvature", "photonTemperature", "helium"):
        if key in givens:
            d[key] = givens[key]
    for group in ("darkEnergy", "neutrinos", "conventions"):
        d.update(givens.get(group, {}))
    return d
