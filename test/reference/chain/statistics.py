"""Weighted statistics of a small invented chain, by NumPy and SciPy: python3 statistics.py > statistics.json

A weight is a whole number of repeats, so that every statistic is that of the repeated samples, which NumPy computes without weights.
Made with Python 3.11.2, NumPy 1.24.2, SciPy 1.10.1.
"""
import json

import numpy as np
import scipy
from scipy import stats

rng = np.random.default_rng(20261201)
rows = 400
x = [0.0]
for _ in range(rows - 1):
    x.append(0.7 * x[-1] + rng.normal())
x = np.round(68 + 0.5 * np.array(x), 6)
y = np.round(0.0224 + 0.0001 * rng.normal(size=rows) + 2e-5 * (x - 68), 9)
skewed = np.round(rng.gamma(1.5, size=rows), 6)
weights = rng.integers(0, 5, size=rows)

shares = [0, 0.01, 0.025, 0.16, 0.25, 0.5, 0.75, 0.84, 0.975, 0.99, 1]
columns = {"x": x, "y": y, "skewed": skewed}
repeated = {name: np.repeat(values, weights) for name, values in columns.items()}


def statistics(values):
    return {
        "mean": float(np.mean(values)),
        "deviation": float(np.sqrt(stats.moment(values, 2))),
        "quantiles": [float(q) for q in np.quantile(values, shares, method="inverted_cdf")],
    }


print(
    json.dumps(
        {
            "source": f"NumPy {np.__version__}, SciPy {scipy.__version__}: numpy.mean, scipy.stats.moment, numpy.quantile (inverted_cdf), scipy.stats.pearsonr of the repeated samples; statistics.py",
            "shares": shares,
            "weights": weights.tolist(),
            "columns": {name: values.tolist() for name, values in columns.items()},
            "weighted": {name: statistics(values) for name, values in repeated.items()},
            "unweighted": {name: statistics(values) for name, values in columns.items()},
            "correlation": {
                "x y": float(stats.pearsonr(repeated["x"], repeated["y"])[0]),
                "x skewed": float(stats.pearsonr(repeated["x"], repeated["skewed"])[0]),
                "y skewed": float(stats.pearsonr(repeated["y"], repeated["skewed"])[0]),
            },
        }
    )
)
