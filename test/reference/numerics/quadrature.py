"""Reference values for test/cosmo/numerics: integrals, roots, curved sines and volumes, to 20 digits.

Writes quadrature.json beside itself. Every value is computed with 50 and with 70 digits, and both must agree.
Run: /usr/bin/python3 quadrature.py   (mpmath from Debian)
"""
import json
import os
import mpmath
from mpmath import mp, mpf


def twice(compute, *arguments):
    """The value at two working precisions, as a string of 20 digits; refuses if they differ."""
    out = []
    for digits in (50, 70):
        mp.dps = digits
        out.append(mp.nstr(compute(*[mpf(a) for a in arguments]), 20))
    if out[0] != out[1]:
        raise SystemExit(f"{compute} {arguments}: {out}")
    return out[0]


def curved_sine(x, k):
    if k == 0:
        return x
    r = mp.sqrt(abs(k))
    return (mp.sin(r * x) if k > 0 else mp.sinh(r * x)) / r


def curved_volume(x, k):
    # by quadrature of the definition, not by the closed form
    return mp.quad(lambda t: curved_sine(t, k) ** 2, mp.linspace(0, x, 9))


def legendre(n, x):
    p, q = mpf(1), x
    for k in range(1, n):
        p, q = q, ((2 * k + 1) * x * q - k * p) / (k + 1)
    return q if n > 0 else mpf(1)


def legendre_root(n, i):
    """The root of P_n with index i from the largest downward, in Bruns' bracket, with guard digits for the recurrence."""
    with mp.extradps(30):
        bracket = [mp.cos(mp.pi * (2 * i + 2) / (2 * n + 1)), mp.cos(mp.pi * (2 * i + 1) / (2 * n + 1))]
        return mp.findroot(lambda x: legendre(n, x), bracket, solver="anderson")


points = [("0.5", "1"), ("1", "-1"), ("2.5", "1"), ("3", "-0.4"), ("0.01", "1"), ("1", "0.00098"), ("1", "0.00102"),
          ("1", "-0.00098"), ("1", "-0.00102"), ("1", "0.99"), ("1", "1.01"), ("1", "-0.99"), ("1", "-1.01"),
          ("14000", "1.0e-9"), ("14000", "-3.0e-9"), ("9000", "1e-14"), ("-2", "0.7"), ("1e-3", "5"), ("8000", "0"),
          ("3", "1"), ("6", "-1"), ("1", "1e-300")]
data = {
    "source": "test/reference/numerics/quadrature.py, mpmath " + mpmath.__version__ + ", 50 and 70 digits agree to 20",
    "curvedSine": [{"x": x, "k": k, "value": twice(curved_sine, x, k)} for x, k in points],
    "curvedVolume": [{"x": x, "k": k, "value": twice(curved_volume, x, k)} for x, k in points],
    "integrals": {
        # 1 / sqrt(0.3 (1+z)^3 + 9e-5 (1+z)^4 + 0.69991) over z, a distance integral
        "distance": [
            {"upper": z, "value": twice(lambda z: mp.quad(
                lambda t: mp.exp(t) / mp.sqrt(mpf("0.3") * mp.exp(3 * t) + mpf("9e-5") * mp.exp(4 * t) + mpf("0.69991")),
                mp.linspace(0, mp.log(1 + z), 25)), z)}
            for z in ("0.1", "1", "3", "30", "1100")],
        "oscillating": twice(lambda: mp.quad(lambda x: mp.cos(100 * x) * mp.exp(-x), mp.linspace(0, 1, 60))),
        "peak": twice(lambda: mp.atan(mpf(700)) / 1000 + mp.atan(mpf(300)) / 1000),
        "gamma": twice(lambda: mp.gammainc(mpf("2.5"), 0, 20)),
    },
    "gaussLegendre": [
        {"n": n, "index": i, "node": twice(lambda: legendre_root(n, i)),
         "weight": twice(lambda: (lambda x: 2 * (1 - x * x) / (n * legendre(n - 1, x)) ** 2)(legendre_root(n, i)))}
        for n, i in [(2, 0), (3, 0), (5, 1), (10, 0), (20, 3), (64, 0), (64, 20), (200, 0), (200, 50)]],
    "roots": {
        "dottie": twice(lambda: mp.findroot(lambda x: mp.cos(x) - x, mpf("0.7"))),
        "wien": twice(lambda: mp.findroot(lambda x: (x - 5) * mp.exp(x) + 5, mpf("4.9"))),
        "bessel": twice(lambda: mp.besseljzero(0, 1)),
    },
}
path = os.path.join(os.path.dirname(os.path.abspath(__file__)), "quadrature.json")
with open(path, "w") as file:
    json.dump(data, file, indent=1)
    file.write("\n")
print(path)
