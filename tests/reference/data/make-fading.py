"""Makes fading-averages.json: python3 make-fading.py > fading-averages.json (NumPy and SciPy).

The exact error probability on the Gaussian channel, averaged over the density of the power gain: no moment generating function enters.
Craig's integral over the angle within, the gain g = x⁴ without, both by composite Gauss-Legendre rules; a second set of panels confirms each value.
"""
import json

import numpy as np
import scipy
from scipy.special import gammaln, ive


def rule(ends, n):
    nodes, weights = np.polynomial.legendre.leggauss(n)
    ends = np.asarray(ends)
    half = np.diff(ends)[:, None] / 2
    return (ends[:-1, None] + half * (1 + nodes)).ravel(), (half * weights).ravel()


def density(channel, branches, parameter, g):
    """Density of the sum of like gains of mean 1."""
    if channel == 'rician':
        # Non-central chi-squared with 2L degrees of freedom, scaled to mean L.
        a, y = branches * parameter, (1 + parameter) * g
        root = 2 * np.sqrt(a * y)
        return (1 + parameter) * (y / a) ** ((branches - 1) / 2) * np.exp(root - y - a) * ive(branches - 1, root)
    m = 1 if channel == 'rayleigh' else parameter
    return np.exp(m * branches * np.log(m) + (m * branches - 1) * np.log(g) - m * g - gammaln(m * branches))


def averaged(h, a, b, n0, channel, branches, parameter, panels, n):
    low, high = np.arctan(a / h), np.pi / 2 if b is None else np.arctan(b / h)
    angles, angle_weights = rule(low + (high - low) * np.linspace(0, 1, panels) ** 3, n)
    x, weights = rule(np.r_[0, np.geomspace(1e-3, 4, 2 * panels)], n)
    g = x ** 4
    edge = np.exp(-g[:, None] * h * h / n0 / np.cos(angles) ** 2) @ angle_weights / (2 * np.pi)
    return float(np.sum(weights * 4 * x ** 3 * density(channel, branches, parameter, g) * edge))


channels = [('rayleigh', 1, None), ('rayleigh', 4, None), ('rician', 1, 4), ('rician', 2, 10), ('nakagami', 1, 0.5), ('nakagami', 3, 2.5)]
pieces = [(1, 0, None), (1, 0, 0.7), (0.3, 2, 5), (0.2, 4, 4.2), (0.01, 0.5, None)]
rows = []
for channel, branches, parameter in channels:
    for h, a, b in pieces:
        for n0 in (3, 0.1, 0.002):
            value = averaged(h, a, b, n0, channel, branches, parameter, 14, 40)
            finer = averaged(h, a, b, n0, channel, branches, parameter, 21, 40)
            assert abs(value / finer - 1) < 3e-13, (channel, branches, h, a, b, n0, value / finer - 1)
            rows.append({'channel': channel, 'branches': branches, 'parameter': parameter, 'h': h, 'a': a, 'b': b, 'n0': n0, 'value': finer})
print(json.dumps({'madeWith': f'SciPy {scipy.__version__}', 'rows': rows}, indent=1))
