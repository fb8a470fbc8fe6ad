"""The sweep's SER columns in NumPy and SciPy, to measure the core against: bound, approximation, exact SER and required Es/N0.

Reads {"rows": [[[x, y], ...], ...], "esN0Db": [...], "target": 1e-6} from standard input, writes {"seconds": s, "required": [...]}.
Points have unit mean energy. Everything inside a constellation is whole-array work: Voronoi cells by Qhull, the edges' integrals of
all SNR values at once by 32 Gauss-Legendre nodes, roots by Brent's method.
"""
import json
import sys
import time
import numpy as np
from scipy.optimize import brentq
from scipy.spatial import Voronoi
from scipy.special import erfc

NODES, WEIGHTS = np.polynomial.legendre.leggauss(32)
NODES, WEIGHTS = (NODES + 1) / 2, WEIGHTS / 2


def q(x):
    return erfc(x / np.sqrt(2)) / 2


def edges_of(points):
    """Pairs of neighbours' distances, and the pieces (h, a, b) of their edges from the foot of the perpendicular outwards."""
    if np.ptp(points[:, 1]) == 0 or len(points) < 3:
        direction = points[-1] - points[0]
        along = np.sort(points @ (direction / np.linalg.norm(direction)))
        distances = np.diff(along)
        h = np.repeat(distances / 2, 2)
        return distances, (h, np.zeros_like(h), np.full_like(h, np.inf))
    diagram = Voronoi(points)
    pairs = diagram.ridge_points
    first, second = points[pairs[:, 0]], points[pairs[:, 1]]
    difference = second - first
    distances = np.linalg.norm(difference, axis=1)
    tangent = np.stack([-difference[:, 1], difference[:, 0]], 1) / distances[:, None]
    middle = (first + second) / 2
    ends = np.array(diagram.ridge_vertices)
    t = np.empty(ends.shape)
    for side in (0, 1):
        finite = ends[:, side] >= 0
        t[finite, side] = ((diagram.vertices[ends[finite, side]] - middle[finite]) * tangent[finite]).sum(1)
    # An open ridge leads away from the other points.
    for n in np.flatnonzero(ends[:, 0] < 0):
        along = (points - middle[n]) @ tangent[n]
        t[n, 0] = np.inf if -along.min() > along.max() else -np.inf
    lower, upper = t.min(1), t.max(1)
    kept = upper - lower > 1e-9 * distances.min()
    distances, lower, upper = distances[kept], lower[kept], upper[kept]
    h = distances / 2
    crossing = (lower < 0) & (upper > 0)
    a = np.where(crossing, 0, np.minimum(abs(lower), abs(upper)))
    b = np.where(crossing, upper, np.maximum(abs(lower), abs(upper)))
    return distances, (np.r_[h, h[crossing]], np.r_[a, np.zeros(crossing.sum())], np.r_[b, -lower[crossing]])


class Curves:
    def __init__(self, points):
        self.m = len(points)
        self.distances, (self.h, self.a, self.b) = edges_of(points)
        self.nearest = (self.distances <= self.distances.min() * (1 + 1e-9)).sum() * 2 / self.m

    def union(self, n0):
        return 2 / self.m * q(self.distances[:, None] / np.sqrt(2 * n0)).sum(0)

    def approximation(self, n0):
        return self.nearest * q(self.distances.min() / np.sqrt(2 * n0))

    def exact(self, n0):
        h, a = self.h[:, None], self.a[:, None]
        b = np.minimum(self.b[:, None], np.sqrt(a * a + 42 * n0))
        low, high = np.arcsinh(a / h), np.arcsinh(b / h)
        cosh = np.cosh(low[..., None] + (high - low)[..., None] * NODES)
        integrand = np.exp(-(h * h / n0)[..., None] * cosh * cosh) / cosh
        return 2 / self.m * (integrand @ WEIGHTS * (high - low)).sum(0) / (2 * np.pi)


def required(rate, target):
    excess = lambda db: np.log(max(rate(np.array([10 ** (-db / 10)]))[0], 1e-300) / target)
    return brentq(excess, -30, 90, xtol=1e-9)


def main():
    asked = json.load(sys.stdin)
    n0 = 10 ** (-np.array(asked['esN0Db']) / 10)
    rows = [np.array([point + [0] if len(point) == 1 else point for point in row], float) for row in asked['rows']]
    Curves(np.array([[1.0, 0.0], [0.0, 1.0], [-1.0, 0.0], [0.0, -1.0]])).exact(n0)
    start = time.perf_counter()
    answers = []
    for points in rows:
        curves = Curves(points)
        curves.union(n0), curves.approximation(n0), curves.exact(n0)
        answers.append([required(rate, asked['target']) for rate in (curves.union, curves.approximation, curves.exact)])
    json.dump({'seconds': time.perf_counter() - start, 'required': answers}, sys.stdout)


main()
