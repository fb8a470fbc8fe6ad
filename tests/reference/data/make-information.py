"""Makes scipy-information.json: python3 make-information.py > scipy-information.json (SciPy 1.10 or later).

Independent of the core in method: the equivocations as an expectation over each point's own noise, in one dimension by SciPy's
adaptive quadrature, in two by composite Gauss-Legendre in polar coordinates about the sent point; each node asks every point.
"""
import json

import numpy as np
import scipy
from scipy.integrate import quad

nodes16, weights16 = np.polynomial.legendre.leggauss(16)


def panels(a, b, count):
    """Composite Gauss-Legendre rule of `count` panels with 16 nodes each."""
    edges = np.linspace(a, b, count + 1)
    half = np.diff(edges)[:, None] / 2
    return (edges[:-1, None] + half * (nodes16 + 1)).ravel(), (half * weights16).ravel()


def losses(points, p, bits, i, u):
    """For noise vectors u in sqrt(N0): log2 of all over own, and the sum over bits of log2 of all over those with the own bit."""
    square = ((u[:, None, :] + points[i] - points[None, :, :]) ** 2).sum(axis=2)
    like = p * np.exp((u ** 2).sum(axis=1)[:, None] - square)
    symbol = np.log2(like.sum(axis=1) / p[i])
    bit = np.zeros(len(u))
    for b in range(bits.shape[1]):
        bit += np.log2(like.sum(axis=1) / like[:, bits[:, b] == bits[i, b]].sum(axis=1))
    return symbol, bit


def line(points, p, bits):
    total = np.zeros(2)
    for i in range(len(points)):
        for which in (0, 1):
            f = lambda x: np.exp(-x * x) / np.sqrt(np.pi) * losses(points, p, bits, i, np.array([[x]]))[which][0]
            breaks = [-3, -1.5, 0, 1.5, 3]
            total[which] += p[i] * sum(quad(f, a, b, epsabs=1e-13, epsrel=1e-12, limit=400)[0] for a, b in zip([-6.5] + breaks, breaks + [6.5]))
    return total


def plane(points, p, bits, count):
    radius, wr = panels(0, 6.5, count)
    angle, wa = panels(0, 2 * np.pi, count)
    total = np.zeros(2)
    for i in range(len(points)):
        for r, w in zip(radius, wr):
            u = r * np.column_stack((np.cos(angle), np.sin(angle)))
            symbol, bit = losses(points, p, bits, i, u)
            total += p[i] * w * r * np.exp(-r * r) / np.pi * np.array([(wa * symbol).sum(), (wa * bit).sum()])
    return total


def rates(points, p, labels, db):
    energy = (p * (points ** 2).sum(axis=1)).sum()
    scaled = points / np.sqrt(energy / 10 ** (db / 10))
    bits = np.array([[int(c) for c in word] for word in labels])
    entropy = -(p * np.log2(p)).sum()
    lost = line(scaled, p, bits) if points.shape[1] == 1 else plane(scaled, p, bits, 24)
    if points.shape[1] == 2:
        other = plane(scaled, p, bits, 17)
        assert np.abs(lost - other).max() < 2e-10, (db, lost - other)
    return {'db': db, 'mutualInformation': entropy - lost[0], 'bitMetricRate': max(0.0, entropy - lost[1])}


def words(count, order=None):
    k = int(np.log2(count))
    return [format(n if order is None else order[n], f'0{k}b') for n in range(count)]


gray = lambda n: n ^ (n >> 1)
random = np.random.default_rng(5)
circle = lambda m, radius=1.0, phase=0.0: [[float(radius * np.cos(phase + 2 * np.pi * n / m)), float(radius * np.sin(phase + 2 * np.pi * n / m))] for n in range(m)]
boltzmann = lambda points, nu: (lambda w: (w / w.sum()).tolist())(np.exp(-nu * (np.array(points) ** 2).sum(axis=1)))
pam4 = [[-3.0], [-1.0], [1.0], [3.0]]
grid = [[x, y] for x in (-3.0, -1.0, 1.0, 3.0) for y in (-3.0, -1.0, 1.0, 3.0)]
grid_labels = [format(gray(c), '02b') + format(gray(r), '02b') for c in range(4) for r in range(4)]
scattered = random.uniform(-1, 1, (16, 2)).round(4).tolist()
weights = random.uniform(0.5, 2, 16)
cases = [
    ('binary on a line', [[-1.0], [1.0]], None, words(2), (-10, -2.823, 3, 8)),
    ('binary, unequal and offset', [[-0.5], [1.0]], [0.2, 0.8], words(2), (-5, 3, 9)),
    ('4-PAM, Gray', pam4, None, words(4, [gray(n) for n in range(4)]), (-5, 5, 12, 18)),
    ('4-PAM, natural, shaped', pam4, boltzmann(pam4, 0.12), words(4), (-5, 5, 12, 18)),
    ('8-PSK, Gray', circle(8), None, words(8, [gray(n) for n in range(8)]), (-5, 5.76, 12)),
    ('8-PSK, natural', circle(8), None, words(8), (-5, 5.76, 12)),
    ('16-QAM, Gray, shaped', grid, boltzmann(grid, 0.06), grid_labels, (0, 8, 14)),
    ('16-QAM, labels not of the coordinates', grid, None, words(16, random.permutation(16).tolist()), (0, 8, 14)),
    ('4+12 points on rings', circle(4, 1.0, np.pi / 4) + circle(12, 2.85, np.pi / 12), None, words(16), (0, 10, 15)),
    ('16 random points, unequal', scattered, (weights / weights.sum()).tolist(), words(16), (0, 10, 20)),
    ('collinear in the plane', [[0.0, 0.0], [1.0, 2.0], [2.0, 4.0], [-1.5, -3.0]], None, words(4), (0, 10)),
    ('one far outlier', [[0.0, 0.0], [0.1, 0.0], [0.0, 0.1], [40.0, 3.0]], None, words(4), (30, 52)),
]
table = {'madeWith': f'SciPy {scipy.__version__}, NumPy {np.__version__}', 'cases': []}
for name, points, p, labels, dbs in cases:
    q = np.full(len(points), 1 / len(points)) if p is None else np.array(p)
    table['cases'].append({
        'name': name, 'points': points, 'probabilities': p, 'labels': labels,
        'rates': [rates(np.array(points), q, labels, db) for db in dbs],
    })
print(json.dumps(table, indent=1))
