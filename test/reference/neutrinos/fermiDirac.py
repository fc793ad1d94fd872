"""Energy and pressure of a massive neutrino species over those of a massless one, by mpmath at 30 digits.

rho(y)/rho(0) = (120/(7 pi^4)) int x^2 sqrt(x^2 + y^2)/(e^x + 1) dx,  3 P(y)/rho(0) = (120/(7 pi^4)) int x^4/sqrt(x^2 + y^2)/(e^x + 1) dx.
Run: python3 fermiDirac.py  (Debian: python3-mpmath); writes fermiDirac.json beside itself, each value at two settings.
"""

import json
import os
import platform

import mpmath as mp

HERE = os.path.dirname(os.path.abspath(__file__))
Y = ["0.00001", "0.0001", "0.0003", "0.001", "0.01", "0.1", "0.3", "1", "2", "3.1415926", "5", "10", "30", "100", "356.9", "1000",
     "1095", "1100", "3000", "10000", "100000"]


def integrals(y, digits, points):
    with mp.workdps(digits):
        y = mp.mpf(y)
        norm = 7 * mp.pi ** 4 / 120
        grid = [mp.mpf(p) for p in points]
        # the scale y is a break in the integrand where it is small
        grid = sorted(set(grid + ([y] if y < 1 else [])))
        energy = mp.quad(lambda x: x ** 2 * mp.sqrt(x * x + y * y) / (mp.exp(x) + 1), grid) / norm
        pressure = mp.quad(lambda x: x ** 4 / mp.sqrt(x * x + y * y) / (mp.exp(x) + 1), grid) / norm
        return energy, pressure


def main():
    rows = []
    for y in Y:
        e, p = integrals(y, 30, [0, "0.001", "0.1", 1, 2, 5, 10, 20, 40, 80, 120])
        f, q = integrals(y, 20, [0, "0.01", 1, 3, 8, 16, 32, 64, 100])
        rows.append([float(y), float(e), float(f), float(p), float(q)])
    head = {
        "source": "Fermi-Dirac statistics; definition in the generator",
        "generator": "test/reference/neutrinos/fermiDirac.py",
        "toolVersions": "Python %s, mpmath %s" % (platform.python_version(), mp.__version__),
        "columns": ["y", "energy", "energy, looser", "pressure", "pressure, looser"],
    }
    text = json.dumps(head, indent=2)[:-2]
    lines = ",\n".join("    " + json.dumps(row) for row in rows)
    with open(os.path.join(HERE, "fermiDirac.json"), "w") as out:
        out.write(text + ',\n  "rows": [\n' + lines + "\n  ]\n}\n")


if __name__ == "__main__":
    main()
