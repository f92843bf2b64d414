"""The stress history of three boreholes by dense linear algebra.

Written from the description in doc.go, apart from the Go code and in another
way: every reading is a row of its own, every set of wild tests is a matrix of
its own, and leaving a test out means building everything again without it.

    python3 independent.py > independent.json

needs NumPy and SciPy (Debian: python3-numpy, python3-scipy; run with 1.24 and 1.10).
"""
import itertools
import json
import sys

import numpy as np
from scipy.optimize import brentq
from scipy.special import ndtr, ndtri

DEPARTURE = [(0.05, 4.0, 0.67), (0.20, 2.0, 0.165), (0.20, 8.0, 0.165)]
NOISE = [(0.2, 0.35), (0.6, 0.40), (1.3, 0.25)]
TRUST = [(0.7, 0.3, 0.5, 0.5), (2.0, 0.6, 0.9, 0.5)]  # within, drift, common, prior
WILD, WILD_SD = 0.06, 0.7
DRIFT_LENGTH, TILT = 4.0, 0.6
JITTER = 1e-8
LOG = np.log


def matern(za, zb, length):
    d = np.sqrt(3) * np.abs(np.subtract.outer(za, zb)) / length
    return (1 + d) * np.exp(-d)


def mechanisms(site):
    """name, prior, [(mean, sd, cells)], ln s'p of (parameters, depth, s'v0)"""
    top, base, water = site["top"], site["base"], site["water"]
    inside = lambda z: np.clip((z - top) / (base - top), 0, 1)
    pop = (LOG(50), 1.2, 9)
    out = [
        ["normally consolidated", 0.10, [(0.05, 0.08, 1)], lambda p, z, s: LOG(s) + p[0]],
        ["removed overburden", 0.18, [pop], lambda p, z, s: LOG(s + np.exp(p[0]))],
        ["ageing", 0.18, [(0.40, 0.25, 1)], lambda p, z, s: LOG(s) + p[0]],
        ["removed overburden and ageing", 0.13, [pop, (0.25, 0.12, 1)], lambda p, z, s: LOG(s + np.exp(p[0])) + p[1]],
        ["dried crust", 0.14, [(LOG(80), 0.9, 4), (LOG(1.5), 0.5, 3), (0.30, 0.25, 1)],
         lambda p, z, s: LOG(s * np.exp(p[2]) + np.exp(p[0]) * np.exp(-(z - top) / np.exp(p[1])))],
        ["former lower water level", 0.09, [(LOG(4), 0.7, 5)],
         lambda p, z, s: LOG(s + 9.81 * np.maximum(0, np.minimum(z - water, np.exp(p[0]))))],
        ["under-drainage", 0.05, [(LOG(50), 0.8, 5)], lambda p, z, s: LOG(s + np.exp(p[0]) * inside(z))],
        ["still consolidating", 0.04, [(LOG(0.3), 0.4, 3)],
         lambda p, z, s: LOG(s) + LOG(1 - 4 * inside(z) * (1 - inside(z)) * min(0.8, np.exp(p[0])))],
        ["cementation, leaching or mixed causes", 0.09, [(0.45, 0.6, 1), (0.5, 0.35, 1)],
         lambda p, z, s: LOG(100) + p[0] + p[1] * LOG(s / 100)],
    ]
    if "removed" in site:
        size, sd = site["removed"]
        for m in out:
            if m[0].startswith("removed"):
                m[1] *= 4
                m[2] = [(LOG(size), min(1.2, sd / size), 9)] + m[2][1:]
    total = sum(m[1] for m in out)
    for m in out:
        m[1] /= total
    return out


def pieces(mean, sd, cells):
    if cells == 1:
        return [(mean, sd, 1.0)]
    at = np.linspace(mean - 2 * sd, mean + 2 * sd, cells)
    width = 0.6 * (at[1] - at[0])
    between = max(np.sqrt(max(0.0, sd * sd - width * width)), 0.2 * sd)
    w = np.exp(-0.5 * ((at - mean) / between) ** 2)
    return [(a, width, b) for a, b in zip(at, w / w.sum())]


def nodes(site):
    for k, (_, prior, parameters, f) in enumerate(mechanisms(site)):
        for combo in itertools.product(*[pieces(*p) for p in parameters]):
            yield k, prior * np.prod([c[2] for c in combo]), combo, f


def rows(site, without=None):
    """depth, s'v0, value, kind and own errors of every observation"""
    out = []
    for i, (z, s, p, sd) in enumerate(site["tests"]):
        if i != without:
            out.append(dict(z=z, s=s, y=LOG(p), test=True, sd=sd, near=0.0, source=None))
    for z, s, p, sd in site.get("neighbours", []):
        out.append(dict(z=z, s=s, y=LOG(p), test=False, sd=sd, near=0.2, source=None))
    for name, between, within, readings in site.get("sources", []):
        for z, s, p in readings:
            out.append(dict(z=z, s=s, y=LOG(p), test=False, sd=None, near=0.0, source=name, between=between, within=within))
    return out


def covariance(r, a, length, noise, trust):
    z = np.array([x["z"] for x in r])
    c = a * a * matern(z, z, length)
    for i, x in enumerate(r):
        for j, y in enumerate(r):
            c[i, j] += x["near"] * y["near"]
            if x["source"] is not None and y["source"] is not None:
                m = matern([x["z"]], [y["z"]], DRIFT_LENGTH)[0, 0]
                c[i, j] += trust[2] ** 2 * m + TILT**2 * LOG(x["s"] / 100) * LOG(y["s"] / 100)
                if x["source"] == y["source"]:
                    c[i, j] += x["between"] ** 2 + trust[1] ** 2 * m
        if x["source"] is None:
            c[i, i] += noise**2 * x["sd"] ** 2 + JITTER
        else:
            c[i, i] += trust[0] ** 2 * x["within"] ** 2
    return c


class Sum:
    """weighted moments with logarithmic weights"""

    def __init__(self):
        self.log, self.mean, self.square = [], [], []

    def add(self, log, mean, variance):
        self.log.append(log)
        self.mean.append(mean)
        self.square.append(variance + mean * mean)

    def done(self, top):
        w = np.exp(np.array(self.log) - top)
        m = (w[:, None] * np.array(self.mean)).sum(0) / w.sum()
        q = (w[:, None] * np.array(self.square)).sum(0) / w.sum()
        return w.sum(), m, np.sqrt(q - m * m)


def run(site, z_out, s_out, without=None, own=0.0, pairs=None):
    """for every node under every setting: the log weights and moments of its sets of wild tests

    pairs limits the sets of two to those listed for the node"""
    r = rows(site, without)
    z, s, y = (np.array([x[k] for x in r]) for k in ("z", "s", "y"))
    tests = [i for i, x in enumerate(r) if x["test"]]
    z_out, s_out = np.array(z_out), np.array(s_out)
    has_sources = any(x["source"] for x in r)
    per_node = []
    for (a, length, pa), (noise, pn) in itertools.product(DEPARTURE, NOISE):
        for ti, t in enumerate(TRUST if has_sources else [(0, 0, 0, 1.0)]):
            base = covariance(r, a, length, noise, t)
            cross = a * a * matern(z_out, z, length)
            for ni, (k, prior, combo, f) in enumerate(nodes(site)):
                at = np.array([c[0] for c in combo])
                mean, mean_out = f(at, z, s), f(at, z_out, s_out)
                slope, slope_out = [], []
                for d, c in enumerate(combo):
                    e = np.zeros(len(at))
                    e[d] = c[1]
                    slope.append((f(at + e, z, s) - f(at - e, z, s)) / 2)
                    slope_out.append((f(at + e, z_out, s_out) - f(at - e, z_out, s_out)) / 2)
                slope, slope_out = np.array(slope), np.array(slope_out)
                c0 = base + slope.T @ slope
                k_out = cross + slope_out.T @ slope
                v_out = a * a + (slope_out**2).sum(0) + own * (noise**2) + (JITTER if own else 0)
                logs, means, variances, steps, spreads = [], [], [], [], []
                sets = [()] + [(i,) for i in tests]
                if pairs is None:
                    sets += list(itertools.combinations(tests, 2))
                else:
                    sets += pairs[len(per_node)]
                for chosen in sets:
                    size = len(chosen)
                    c = c0.copy()
                    for i in chosen:
                        c[i, i] += WILD_SD**2
                    inv = np.linalg.inv(c)
                    res = y - mean
                    log = -0.5 * res @ inv @ res - 0.5 * np.linalg.slogdet(c)[1] - 0.5 * len(y) * LOG(2 * np.pi)
                    log += size * LOG(WILD / (1 - WILD)) + LOG(prior * pa * pn * t[3])
                    logs.append(log)
                    means.append(mean_out + k_out @ inv @ res)
                    variances.append(v_out - np.einsum("ij,jk,ik->i", k_out, inv, k_out))
                    steps.append(slope @ inv @ res)
                    spreads.append(1 - np.einsum("ij,jk,ik->i", slope, inv, slope))
                per_node.append((k, (a, length, noise, ti), combo, logs, means, variances, steps, spreads, sets))
    return per_node


def weighty(per_node, without):
    """the pairs that make up 1 % of a node's sets and do not hold a test, as rows without it"""
    out = []
    for n in per_node:
        w = np.exp(np.array(n[3]) - max(n[3]))
        w /= w.sum()
        keep = [s for s, q in zip(n[8], w) if len(s) == 2 and q > 0.01 and without not in s]
        out.append([tuple(i - (i > without) for i in s) for s in keep])
    return out


def combine(per_node, count, light):
    top = max(max(n[3]) for n in per_node)
    total = sum(np.exp(np.array(n[3]) - top).sum() for n in per_node)
    groups, probability, sizes = {}, np.zeros(count), {}
    for k, setting, combo, logs, means, variances, steps, spreads, _ in per_node:
        w = np.exp(np.array(logs) - top) / total
        probability[k] += w.sum()
        if w.sum() <= light:
            continue
        g = groups.setdefault((k, setting), [0.0, 0.0, 0.0])
        g[0] += w.sum()
        g[1] += w @ np.array(means)
        g[2] += w @ (np.array(variances) + np.array(means) ** 2)
        m = w @ np.array(steps) / w.sum()
        q = w @ (np.array(spreads) + np.array(steps) ** 2) / w.sum() - m * m
        for d, c in enumerate(combo):
            sizes.setdefault((k, d), []).append((w.sum(), c[0] + c[1] * m[d], c[1] * np.sqrt(q[d])))
    mixtures = []
    for j in range(len(next(iter(groups.values()))[1])):
        mixtures.append([(g[0], g[1][j] / g[0], np.sqrt(g[2][j] / g[0] - (g[1][j] / g[0]) ** 2)) for g in groups.values()])
    return probability, [trim(m) for m in mixtures], {k: trim(m) for k, m in sizes.items()}


def trim(m):
    total = sum(x[0] for x in m)
    m = [x for x in m if x[0] >= 5e-4 * total]
    total = sum(x[0] for x in m)
    return np.array([(w / total, a, b) for w, a, b in m])


def below(m, x):
    return (m[:, 0] * ndtr((x - m[:, 1]) / m[:, 2])).sum()


def band(m):
    lo, hi = (m[:, 1] - 10 * m[:, 2]).min(), (m[:, 1] + 10 * m[:, 2]).max()
    return [brentq(lambda x: below(m, x) - p, lo, hi, xtol=1e-13, rtol=1e-14) for p in (0.05, 0.5, 0.95)]


CASES = [
    dict(name="eight tests, one of them wild", top=1.0, base=16.0, water=1.0,
         tests=[[2.0, 25.0, 88.0, 0.15], [3.5, 37.0, 92.0, 0.15], [5.0, 49.0, 112.0, 0.10], [7.0, 65.0, 65.0, 0.25],
                [9.0, 81.0, 150.0, 0.15], [11.0, 97.0, 148.0, 0.15], [13.0, 113.0, 176.0, 0.15], [15.0, 129.0, 188.0, 0.10]],
         stations=[[1.0, 17.0], [4.0, 41.0], [8.0, 73.0], [12.0, 105.0], [16.0, 137.0]]),
    dict(name="neighbours and known removed ground", top=0.0, base=12.0, water=2.0, removed=[60.0, 12.0],
         tests=[[1.5, 27.0, 120.0, 0.15], [4.0, 54.0, 131.0, 0.15], [6.0, 72.0, 128.0, 0.10], [8.5, 93.0, 166.0, 0.25], [11.0, 115.0, 171.0, 0.15]],
         neighbours=[[3.0, 45.0, 98.0, 0.15], [7.0, 80.0, 150.0, 0.15]],
         stations=[[0.5, 9.0], [5.0, 63.0], [12.0, 124.0]]),
    dict(name="two sources", top=2.0, base=14.0, water=1.0,
         tests=[[3.0, 33.0, 75.0, 0.15], [5.0, 48.0, 84.0, 0.15], [7.5, 67.0, 101.0, 0.15], [10.0, 86.0, 125.0, 0.15], [13.0, 109.0, 150.0, 0.15]],
         sources=[["cone", 0.30, 0.20, [[3.0, 33.0, 61.0], [6.0, 56.0, 70.0], [9.0, 78.0, 98.0], [12.0, 101.0, 118.0]]],
                  ["vane", 0.31, 0.23, [[3.0, 33.0, 90.0], [5.0, 48.0, 88.0], [8.0, 71.0, 131.0]]]],
         stations=[[2.0, 25.0], [6.5, 60.0], [11.5, 97.0], [14.0, 116.0]]),
]


def main():
    out = []
    for site in CASES:
        ms = mechanisms(site)
        z, s = zip(*site["stations"])
        full = run(site, z, s)
        probability, lines, sizes = combine(full, len(ms), 1e-5)
        expected = []
        for i, (zt, st, p, sd) in enumerate(site["tests"]):
            # The test that is left out is good. Of the others one is wild, or a
            # pair that weighs something with all tests in.
            _, m, _ = combine(run(site, [zt], [st], without=i, own=sd * sd, pairs=weighty(full, i)), len(ms), 0.0)
            expected.append(dict(band=band(m[0]), z=float(ndtri(below(m[0], LOG(p))))))
            print(site["name"], i, file=sys.stderr)
        out.append(dict(
            site=site,
            mechanisms={m[0]: float(q) for m, q in zip(ms, probability)},
            lines=[band(m) for m in lines],
            sizes={ms[k][0] + " " + str(d): band(m) for (k, d), m in sizes.items() if probability[k] > 1e-3},
            expected=expected))
    json.dump(out, sys.stdout, indent=1)
    print()


main()
