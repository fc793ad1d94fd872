"""formulas/<function>.json: one file a function, one row a line, numbers with 17 significant digits."""

import json
import os
import platform

import mpmath
from mpmath import mpf

HERE = os.path.dirname(os.path.abspath(__file__))
FORMULAS = os.path.join(HERE, "..", "formulas")
DIGITS = 40
mpmath.mp.dps = DIGITS


def exact(argument):
    """A binary number of the test as exactly that number; a name stays a name."""
    return argument if isinstance(argument, str) else mpf(argument)


def write(name, source, generator, arguments, rows, tools=None):
    """rows: (list of arguments, value); the function of the program named `name` is to give the value."""
    head = {
        "function": name,
        "source": source,
        "generator": "test/reference/generators/" + generator,
        "toolVersions": tools or "Python %s, mpmath %s at %d digits" % (platform.python_version(), mpmath.__version__, DIGITS),
        "columns": arguments + ["value"],
    }
    lines = []
    for given, value in rows:
        if not mpmath.isfinite(value):
            raise ValueError("%s: a reference value is not finite" % name)
        lines.append("    [" + ", ".join([json.dumps(a) for a in given] + ["%.16e" % float(value)]) + "]")
    os.makedirs(FORMULAS, exist_ok=True)
    with open(os.path.join(FORMULAS, name + ".json"), "w") as out:
        text = json.dumps(head, indent=2)
        out.write(text[:-2] + ',\n  "rows": [\n' + ",\n".join(lines) + "\n  ]\n}\n")
    print("%-44s rows %4d" % (name, len(rows)), flush=True)


def tabulate(name, source, generator, arguments, function, points, tools=None):
    write(name, source, generator, arguments, [(list(p), function(*[exact(a) for a in p])) for p in points], tools)
