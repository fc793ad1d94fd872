"""One JSON file a quantity, one row a line, numbers with 17 significant digits."""

import json
import os
import platform

import mpmath
import numpy
import scipy

HERE = os.path.dirname(os.path.abspath(__file__))
VALUES = os.path.join(HERE, "..", "values")
VERSIONS = "Python %s, NumPy %s, SciPy %s, mpmath %s" % (
    platform.python_version(), numpy.__version__, scipy.__version__, mpmath.__version__)


def models():
    with open(os.path.join(HERE, "..", "models.json")) as f:
        return [(m["name"], m["givens"]) for m in json.load(f)]


def correction():
    with open(os.path.join(HERE, "correction.json")) as f:
        return json.load(f)["coefficients"]


def number(v):
    if not numpy.isfinite(v):
        raise ValueError("a reference value is not finite")
    return "%.16e" % float(v)


def write(name, unit, source, generator, tolerance, arguments, rows):
    """rows: (modelName, [arguments], value, looserValue)."""
    worst = max((abs(float(v) - float(w)) / abs(float(v)) for _, _, v, w in rows if v != 0), default=0.0)
    head = {
        "quantity": name.split(".")[0],
        "unit": unit,
        "source": source,
        "generator": "test/reference/generators/" + generator,
        "toolVersions": VERSIONS,
        "tolerance": tolerance,
        "worstRelativeDifferenceOfTheTwoRuns": float("%.2e" % worst),
        "columns": ["model"] + arguments + ["value", "looserValue"],
    }
    lines = []
    for model, args, value, looser in rows:
        cells = [json.dumps(model)] + [json.dumps(a) for a in args] + [number(value), number(looser)]
        lines.append("    [" + ", ".join(cells) + "]")
    os.makedirs(VALUES, exist_ok=True)
    with open(os.path.join(VALUES, name + ".json"), "w") as out:
        text = json.dumps(head, indent=2)
        out.write(text[:-2] + ',\n  "rows": [\n' + ",\n".join(lines) + "\n  ]\n}\n")
    print("%-48s rows %5d  worst difference %.1e" % (name, len(rows), worst), flush=True)
