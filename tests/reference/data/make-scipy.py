"""Makes scipy-erfc-owens.json: python3 make-scipy.py > scipy-erfc-owens.json (Debian 12, SciPy 1.10)."""
import json
from math import pi, sin, sqrt, tan

import scipy
from scipy.special import erfc, owens_t


def q(x):
    return 0.5 * erfc(x / sqrt(2))


def psk(order, es_n0):
    """Two half lines from the apex of a wedge: Owen's T from the foot to the apex on each (Owen 1956)."""
    h = sqrt(2 * es_n0) * sin(pi / order)
    return q(h) + 2 * owens_t(h, 1 / tan(pi / order))


def polygon(k, h):
    """A regular cell of k edges at distance h, each twice from its foot to a corner."""
    return 2 * k * owens_t(h, tan(pi / k))


def rectangle(h1, h2):
    """A rectangular cell with half sides h1 and h2, each edge twice from its foot to a corner."""
    return 4 * (owens_t(h1, h2 / h1) + owens_t(h2, h1 / h2))


table = {
    'madeWith': f'SciPy {scipy.__version__}',
    'q': [{'x': x, 'q': q(x)} for x in (-5, -2, -0.5, 0.25, 1, 2, 3, 4.5, 6, 8, 12, 18, 25, 30, 36)],
    'psk': [{'order': m, 'esN0': s, 'ser': psk(m, s)} for m in (3, 5, 8, 16, 64) for s in (1, 10, 40, 160)],
    'polygon': [{'k': k, 'h': h, 'error': polygon(k, h)} for k in (3, 4, 5, 6, 12) for h in (0.01, 0.5, 1, 2.5, 4, 6)],
    'rectangle': [{'h1': h1, 'h2': h2, 'error': rectangle(h1, h2)} for h1, h2 in ((0.5, 0.5), (0.3, 2), (1, 4), (2, 3), (5, 5.5))],
}
print(json.dumps(table, indent=1))
