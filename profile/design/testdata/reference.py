#!/usr/bin/python3
"""Writes reference.json: the numbers of this package computed with NumPy and
SciPy, so that the Go test compares two independent programs.

    /usr/bin/python3 reference.py > reference.json
"""
import json
import sys

import numpy as np
import scipy
from scipy import integrate, stats

SAMPLES = {
    "sixty to a hundred": [[2, 60], [4, 70], [6, 80], [8, 90], [10, 100]],
    "scattered": [[1.5, 112.0], [3.2, 87.5], [4.1, 141.2], [5.9, 95.3], [8.4, 120.9], [9.0, 133.0], [12.7, 101.1]],
    "small numbers": [[2.0, 0.0061], [3.0, 0.0075], [4.5, 0.0052], [6.5, 0.0088]],
    "twelve with a trend": [[1, 31], [2, 38], [3, 33], [4, 47], [5, 50], [6, 49], [7, 63], [8, 58], [9, 71],
                            [10, 77], [11, 74], [12, 90]],
    "repeated depths": [[3, 1.9], [3, 2.4], [6, 1.6], [6, 1.7], [9, 1.2], [9, 1.45]],
    "far from zero": [[1, 1000.5], [2, 1000.9], [3, 1001.4], [4, 1001.1], [5, 1002.2]],
}
WEIGHTS = [1, 0.6, 0.3, 1, 0.6, 1, 0.3, 1, 1, 0.6, 0.3, 1]


def isf(p, df):
    """SciPy 1.10's own inverse is good to eight digits only (t95(4) ends in ...78134
    where the closed form gives ...78633), so its own tail is inverted to the last digit."""
    t = stats.t.isf(p, df)
    for _ in range(5):
        t += (stats.t.sf(t, df) - p) / stats.t.pdf(t, df)
    return t


def constant(x):
    n, m, s = len(x), np.mean(x), np.std(x, ddof=1)
    mean = isf(0.05, n - 1) * stats.sem(x)
    half = isf(0.05, n - 1) * s * np.sqrt(1 + 1 / n)
    return {"mean-unknown": [m - mean, m + mean], "fractile-unknown": [m - half, m + half],
            "percentile": [stats.norm.ppf(0.05, m, s), stats.norm.ppf(0.95, m, s)]}


def known(x, spread):
    n, m = len(x), np.mean(x)
    low, high = stats.norm.interval(0.90, loc=m, scale=spread / np.sqrt(n))
    wide, wider = stats.norm.interval(0.90, loc=m, scale=spread * np.sqrt(1 + 1 / n))
    return {"mean-known": [low, high], "fractile-known": [wide, wider]}


def line(z, x):
    fit = stats.linregress(z, x)
    n = len(x)
    r = x - (fit.intercept + fit.slope * z)
    s = np.sqrt(np.sum(r ** 2) / (n - 2))
    at = z.min() + 0.25 * (z.max() - z.min())
    y = fit.intercept + fit.slope * at
    t = isf(0.05, n - 2)
    inside = 1 / n + (at - z.mean()) ** 2 / np.sum((z - z.mean()) ** 2)
    c, p = t * s * np.sqrt(inside), t * s * np.sqrt(1 + inside)
    k, kf = t * s * np.sqrt(1 / n), t * s * np.sqrt(1 + 1 / n)
    return {"slope": fit.slope, "intercept": fit.intercept, "p": fit.pvalue, "sd": s, "at": at, "value": y,
            "mean": [y - c, y + c], "fractile": [y - p, y + p],
            "shifted_mean": [y - k, y + k], "shifted_fractile": [y - kf, y + kf]}


def weighted(z, x, w):
    n = len(x)
    m = np.average(x, weights=w)
    sd = np.sqrt(np.cov(x, aweights=w, ddof=1))
    wn = w * n / w.sum()
    X = np.column_stack([np.ones(n), z])
    root = np.sqrt(wn)
    beta = np.linalg.lstsq(X * root[:, None], x * root, rcond=None)[0]
    s = np.sqrt(np.sum(wn * (x - X @ beta) ** 2) / (n - 2))
    return {"mean": m, "sd": float(sd), "count": w.sum() ** 2 / np.sum(w ** 2),
            "intercept": beta[0], "slope": beta[1], "line_sd": s}


def sample(rows):
    a = np.array(rows, float)
    z, x = a[:, 0], a[:, 1]
    theil = stats.theilslopes(x, z)
    half = len(x) // 2
    order = np.lexsort((x, z))
    first, rest = x[order[:half]], x[order[half:]]
    out = {"rows": rows, "mean": np.mean(x), "median": np.median(x), "sd": np.std(x, ddof=1),
           "cov": stats.variation(x, ddof=1), "mad": stats.median_abs_deviation(x),
           "theil_sen": theil[0], "normal": constant(x), "log": {}, "line": line(z, x), "log_line": line(z, np.log(x)),
           "difference_p": stats.ttest_ind(first, rest).pvalue}
    out["normal"].update(known(x, 0.25 * abs(np.mean(x))))
    for source in (constant(np.log(x)), known(np.log(x), np.sqrt(np.log(1 + 0.25 ** 2)))):
        out["log"].update({k: [np.exp(v) for v in pair] for k, pair in source.items()})
    out["weighted"] = weighted(z, x, np.array(WEIGHTS[:len(x)], float))
    gap = np.abs(z[:, None] - z[None, :])
    out["effective_count"] = len(x) ** 2 / np.sum(np.exp(-2 * gap / 2.5))
    return out


def grubbs(n):
    t = isf(0.05 / (2 * n), n - 2)
    return (n - 1) / np.sqrt(n) * np.sqrt(t * t / (n - 2 + t * t))


def reduction(length, delta):
    """The definition, not the closed form: the mean correlation of two points."""
    inner = integrate.quad(lambda tau: (1 - tau / length) * np.exp(-2 * tau / delta), 0, length,
                           epsabs=1e-14, epsrel=1e-13, limit=200)[0]
    return 2 * inner / length


out = {
    "made_with": "Python %s, NumPy %s, SciPy %s" % (sys.version.split()[0], np.__version__, scipy.__version__),
    "student": [[df, isf(0.05, df)] for df in (0.2, 0.5, 1, 1.5, 2, 2.7, 3, 4, 5, 7.3, 9, 11, 14, 19, 29, 60, 99, 500, 1e4)],
    "student_tail": [[t, df, stats.t.sf(t, df)] for t in (0, 0.1, 1, 2.5, 8, 40) for df in (1, 2, 3.5, 10, 200)],
    "grubbs": [[n, grubbs(n)] for n in (3, 4, 5, 6, 7, 8, 10, 12, 15, 30, 100)],
    "variance_reduction": [[l, d, reduction(l, d)] for l in (1e-5, 0.01, 0.5, 1, 4, 10, 50) for d in (0.3, 1, 2.5, 6)],
    "samples": {name: sample(rows) for name, rows in SAMPLES.items()},
}
json.dump(out, sys.stdout, indent=1, default=float, ensure_ascii=False)
print()
