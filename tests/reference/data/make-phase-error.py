"""Makes scipy-phase-error.json: python3 make-phase-error.py > scipy-phase-error.json (Debian 12, SciPy 1.10 or later, mpmath 1.3).

Error rates under a normal carrier phase error, and symbol error rates of MAP decisions, by ways that share nothing with the core.
PSK: a turned point's error is a sum over the two rays of its sector by Owen's T (Owen 1956). Square QAM: that of two intervals.
Gray QPSK: each bit is the sign of one coordinate. Averages: 20 nodes of Gauss-Legendre on each of 8,000 panels over 13 sigma
either side; whole turns follow by themselves. MAP: pairs, and a grid of two independent lines, in 40 digits.
"""
import json

import numpy as np
import scipy
from mpmath import erfc as exact_erfc, inf, log, mp, mpf, sqrt as exact_sqrt
from scipy.special import erfc, owens_t

mp.dps = 40
nodes, weights = np.polynomial.legendre.leggauss(20)


def mean(rate, sigma):
    """Average of rate(phi) over a normal phi."""
    edges = np.linspace(-13 * sigma, 13 * sigma, 8001)
    half = np.diff(edges) / 2
    phi = (edges[:-1] + half)[:, None] + half[:, None] * nodes
    density = np.exp(-phi ** 2 / (2 * sigma ** 2)) / (sigma * np.sqrt(2 * np.pi))
    return float(np.sum(half[:, None] * weights * density * rate(phi)))


def q(x):
    return erfc(x / np.sqrt(2)) / 2


def psk(order, s, sigma):
    side = np.pi / order

    def ray(angle):
        """Flow of the noise over a ray from the origin, at this angle from the point; from behind it is negative."""
        angle = np.angle(np.exp(1j * angle))
        h = np.sqrt(2 * s) * np.sin(np.abs(angle))
        return np.sign(angle) * (q(h) / 2 + owens_t(h, 1 / np.tan(np.abs(angle))))

    def rate(phi):
        outside = np.abs(np.angle(np.exp(1j * phi))) > side
        return outside + ray(side - phi) + ray(side + phi)
    return mean(rate, sigma)


def leaving(x, low, high, n0):
    k = np.sqrt(2 / n0)
    return q((high - x) * k) + q((x - low) * k)


def qam(side, s, sigma):
    d = 1 / np.sqrt(2 / 3 * (side ** 2 - 1))
    levels = [2 * i - side + 1 for i in range(side)]

    def limits(a):
        return (-np.inf if a == levels[0] else (a - 1) * d, np.inf if a == levels[-1] else (a + 1) * d)

    def one(a, b):
        r, angle = np.hypot(a, b) * d, np.arctan2(b, a)

        def rate(phi):
            x, y = leaving(r * np.cos(angle + phi), *limits(a), 1 / s), leaving(r * np.sin(angle + phi), *limits(b), 1 / s)
            return x + y - x * y
        return mean(rate, sigma)
    return sum(one(a, b) for a in levels for b in levels) / side ** 2


def qpsk_bits(s, sigma):
    return mean(lambda phi: q(np.sqrt(2 * s) * np.cos(np.pi / 4 + phi)), sigma)


def exact_q(x):
    return exact_erfc(x / exact_sqrt(mpf(2))) / 2


def map_line(levels, p, n0):
    """Each level's interval is what no other level's boundary takes from it."""
    levels, p, n0 = [mpf(x) for x in levels], [mpf(w) for w in p], mpf(n0)
    k = exact_sqrt(2 / n0)
    error = mpf(0)
    for i, x in enumerate(levels):
        def boundary(j):
            return (x + levels[j]) / 2 + n0 / (2 * (levels[j] - x)) * log(p[i] / p[j])
        low = max([boundary(j) for j in range(i)], default=-inf)
        high = min([boundary(j) for j in range(i + 1, len(levels))], default=inf)
        if high <= low:
            error += p[i]
            continue
        error += p[i] * ((exact_q((high - x) * k) if high != inf else 0) + (exact_q((x - low) * k) if low != -inf else 0))
    return error


deg = np.pi / 180
levels, grid = (-3, -1, 1, 3), (0.3125, 0.015625, 0.171875, 0.5)
pairs = ((2, 0.75, 0.02), (2, 0.75, 0.5), (1.5, 0.875, 2), (0.5, 0.96875, 3), (2, 0.625, 8))
print(json.dumps({
    'madeWith': f'SciPy {scipy.__version__}, mpmath',
    'psk': [{'order': m, 'esN0': s, 'degrees': a, 'ser': psk(m, s, a * deg)}
            for m, s, a in ((2, 3, 20), (4, 10, 5), (4, 30, 3), (4, 3, 60), (8, 40, 3), (8, 100, 2), (8, 1e5, 4), (16, 300, 1.5))],
    'qam': [{'side': n, 'esN0': s, 'degrees': a, 'ser': qam(n, s, a * deg)}
            for n, s, a in ((4, 20, 3), (4, 100, 2), (4, 1000, 3), (4, 30, 25), (8, 300, 1), (8, 1e4, 2), (8, 10, 5))],
    'qpskBits': [{'esN0': s, 'degrees': a, 'ber': qpsk_bits(s, a * deg)} for s, a in ((5, 10), (20, 5), (60, 4), (1e5, 8))],
    'mapPair': [{'d': d, 'p': p, 'n0': n, 'ser': float(map_line((0, d), (p, 1 - p), n))} for d, p, n in pairs],
    'mapGrid': {'levels': levels, 'probabilities': grid, 'rates': [
        {'n0': n, 'ser': float(2 * e - e ** 2)} for n in (0.03, 0.2, 1, 3, 6, 20) for e in [map_line(levels, grid, n)]]},
}, indent=1))
