"""Writes ../models.json: the models of the reference, from a fixed seed.

Each of curvature, neutrino masses, dark energy and N_eff leaves its default in about half of the models; the ends of the
ranges are put in by hand so that they are certain to be there.
"""

import json
import os
import random

SEED = 20261201
HERE = os.path.dirname(os.path.abspath(__file__))

PLAIN = {"hubble": 67.4, "baryonDensity": 0.0224, "coldMatterDensity": 0.12}
PRINTED = {
    "hubble": 67.36, "baryonDensity": 0.02237, "coldMatterDensity": 0.12,
    "neutrinos": {"effectiveNumber": 3.046}, "conventions": {"constants": "codata2018"},
}

CURVATURES = [-0.06, -0.045, -0.03, -0.02, -0.01, -0.003, 0.0007, 0.004, 0.01, 0.02, 0.03, 0.045, 0.06]
MASSES = [
    [0, 0, 0], [0.6, 0, 0], [0.3, 0, 0], [0.12, 0, 0], [0.01, 0, 0], [0.02, 0.02, 0.02], [0.1, 0.1, 0.1], [0.2, 0.2, 0.2],
    [0.003, 0.00912, 0.0502], [0.02, 0.05, 0.09], [0.08, 0.15, 0.22], [0.05, 0.05, 0], [0.001, 0.3, 0.299],
]
DARK = [
    {"w0": -0.9, "wa": 0.3}, {"w0": -0.7, "wa": 0.08}, {"w0": -0.8, "wa": 0.19}, {"w0": -1.2}, {"w0": -1.1, "wa": 0.45},
    {"w0": -0.9}, {"w0": -0.8, "wa": -0.6}, {"w0": -0.75, "wa": -0.9}, {"w0": -1.3, "wa": 0.2}, {"w0": -0.95, "wa": 0.1},
    {"w0": -1.05, "wa": -0.2}, {"w0": -0.65}, {"w0": -1, "wa": 0.3},
]
NUMBERS = [2.7, 2.8, 2.9, 2.99, 3.0, 3.046, 3.1, 3.2, 3.3, 3.4, 3.5, 3.6]
HELIUMS = [0.22, 0.235, 0.24, 0.245, 0.2453, 0.25, 0.265, 0.28]


def main():
    rng = random.Random(SEED)
    models = [{"name": "plain", "givens": PLAIN}, {"name": "planckFifthColumn", "givens": PRINTED}]
    count = 46
    # a deck a feature: every listed value is used before one comes twice, None is the default
    def deck(values, used):
        cards = [values[i % len(values)] for i in range(used)] + [None] * (count - used)
        rng.shuffle(cards)
        return cards

    curvature, masses, dark, number = deck(CURVATURES, 26), deck(MASSES, 28), deck(DARK, 26), deck(NUMBERS, 26)
    helium, closure = deck(HELIUMS, 14), deck(["radiationOnTop"], 20)
    constants, temperature = deck(["codata2010", "codata2014", "codata2018"], 33), deck([2.6, 2.65, 2.7, 2.725, 2.75, 2.8], 16)
    strata = {}
    for key, low, high, digits in (
        ("hubble", 50, 90, 2), ("baryonDensity", 0.018, 0.028, 5), ("coldMatterDensity", 0.09, 0.16, 4)):
        values = [round(low + (high - low) * (i + rng.random()) / count, digits) for i in range(count)]
        values[0], values[-1] = low, high
        rng.shuffle(values)
        strata[key] = values
    for i in range(count):
        givens = {key: strata[key][i] for key in ("hubble", "baryonDensity", "coldMatterDensity")}
        if curvature[i] is not None:
            givens["curvature"] = curvature[i]
        if dark[i] is not None:
            givens["darkEnergy"] = dark[i]
        neutrinos = {}
        if number[i] is not None:
            neutrinos["effectiveNumber"] = number[i]
        if masses[i] is not None:
            neutrinos["masses"] = masses[i]
        if neutrinos:
            givens["neutrinos"] = neutrinos
        if temperature[i] is not None:
            givens["photonTemperature"] = temperature[i]
        if helium[i] is not None:
            givens["helium"] = helium[i]
        conventions = {}
        if constants[i] is not None:
            conventions["constants"] = constants[i]
        if closure[i] is not None:
            conventions["closure"] = closure[i]
        if conventions:
            givens["conventions"] = conventions
        models.append({"name": "m%02d" % (i + 3), "givens": givens})
    with open(os.path.join(HERE, "..", "models.json"), "w") as out:
        out.write("[\n" + ",\n".join(json.dumps(m) for m in models) + "\n]\n")


if __name__ == "__main__":
    main()
