"""Writes the distances, times and background quantities of every model of ../models.json."""

import background as B
import output

Z = [0.0001, 0.015, 0.38, 1.25, 3.0, 20.0, 200.0, 1100.0]
PAIRS = [[0.0001, 0.015], [0.38, 1.25], [1.25, 3.0], [0.5, 1089.92], [20.0, 1100.0]]

HOGG = "Hogg 1999, astro-ph/9905116"
TOLERANCE = ("value: Gauss-Legendre, 20 nodes on panels of 0.5 in ln a, 80-bit long double, agrees with mpmath at 30 digits within "
             "1e-15 (check_mpmath.py); looserValue: 10 nodes on panels of 1, float64, Fermi-Dirac step 0.24")

OF_Z = [
    ("hubbleRate", "km/s/Mpc", "Friedmann equation, physics contract section 2"),
    ("hubbleDistance", "Mpc", HOGG + ", c/H(z)"),
    ("criticalDensity", "kg/m3", "3 H(z)^2/(8 pi G)"),
    ("matterFractionAt", "1", "baryons, cold matter and massive neutrinos over the critical density at z"),
    ("comovingDistance", "Mpc", HOGG + ", eq. 15"),
    ("transverseDistance", "Mpc", HOGG + ", eq. 16"),
    ("angularDiameterDistance", "Mpc", HOGG + ", eq. 18"),
    ("luminosityDistance", "Mpc", HOGG + ", eq. 21"),
    ("volumeDistance", "Mpc", "(D_M^2 c z/H)^(1/3)"),
    ("distanceModulus", "mag", HOGG + ", eq. 25"),
    ("comovingVolume", "Gpc3", HOGG + ", eq. 29, whole sky"),
    ("comovingVolumeElement", "Gpc3", HOGG + ", eq. 28, whole sky, per unit z"),
    ("properScale", "kpc/arcsec", "D_A times one arcsecond"),
    ("alcockPaczynskiRatio", "1", "D_M H/c, Alcock & Paczynski 1979"),
    ("lookbackTime", "Gyr", HOGG + ", eq. 30; Julian years"),
    ("ageAt", "Gyr", "int da/(a H) from a = 0; Julian years"),
    ("lightTravelDistance", "Mpc", "c times the lookback time"),
    ("conformalTime", "Mpc", "c int dt/a from a = 0, a = 1 today"),
    ("particleHorizon", "Mpc", "comoving, c int dt/a from a = 0"),
    ("baryonLoading", "1", "3 omega_b/(4 omega_gamma (1+z))"),
    ("soundSpeed", "1", "c_s/c = 1/sqrt(3 (1 + R))"),
    ("soundHorizon", "Mpc", "int c_s da/(a^2 H) from a = 0"),
]


def main():
    bag = [(name, B.Background(g, B.TIGHT), B.Background(g, B.LOOSE)) for name, g in output.models()]

    def put(name, unit, source, arguments, rows):
        output.write(name, unit, source, "distances.py", TOLERANCE, arguments, rows)

    for name, unit, source in OF_Z:
        put(name, unit, source, ["z"],
            [(m, [z], getattr(t, name)(z), getattr(l, name)(z)) for m, t, l in bag for z in Z])
    for name in ("comovingDistance", "transverseDistance", "angularDiameterDistance"):
        put(name + ".between", "Mpc", HOGG + ", between two redshifts", ["z1", "z2"],
            [(m, p, getattr(t, name)(*p), getattr(l, name)(*p)) for m, t, l in bag for p in PAIRS])
    put("eventHorizon", "Mpc", "comoving, c int dt/a from z to the infinite future; only models where it is finite", ["z"],
        [(m, [z], t.eventHorizon(z), l.eventHorizon(z)) for m, t, l in bag if t.event_horizon_is_finite() for z in [0.0] + Z])
    put("age", "Gyr", "int da/(a H) over all a", [], [(m, [], t.age(), l.age()) for m, t, l in bag])
    put("neutrinoDensity", "1", "massive species only, exact Fermi-Dirac energy today", [],
        [(m, [], t.omega_nu, l.omega_nu) for m, t, l in bag])
    put("darkEnergyFraction", "1", "closure, physics contract section 2", [], [(m, [], t.dark, l.dark) for m, t, l in bag])
    put("helium", "1", "Planck 2015 XIII section 6.5, to a mass fraction; or as given", [],
        [(m, [], t.helium, l.helium) for m, t, l in bag])
    put("equalityRedshift", "1", "baryons and cold matter, all N_eff massless, physics contract section 5", [],
        [(m, [], t.equalityRedshift(), l.equalityRedshift()) for m, t, l in bag])
    put("equalityWavenumber", "1/Mpc", "H(z_eq)/(c (1+z_eq)) with the exact H", [],
        [(m, [], t.equalityWavenumber(), l.equalityWavenumber()) for m, t, l in bag])


if __name__ == "__main__":
    main()
