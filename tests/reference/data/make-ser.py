"""Writes ser-30-digits.json: symbol error rates to 30 digits, for the tests of shared/modulation.

Independent of the core in method: cells by brute-force clipping of a large square at 42 digits, error probabilities by
Gauss-Legendre quadrature of the wedge over each edge in its polar angle, with the error estimate of mpmath. Run: python3 make-ser.py (mpmath 1.3).
"""
import json
import math
import os
import random
from mpmath import mp, mpf, quad, exp, erfc, sqrt, cos, atan2, nstr

mp.dps = 42


def q(x):
    return erfc(x / sqrt(mpf(2))) / 2


def cell(points, i):
    """Edges of the cell of point i, relative to it: (neighbour or None for the square, start, end)."""
    (x, y) = points[i]
    size = 10000 * max(max(abs(c) for c in p) for p in points) + 1
    corners = [(-size, -size), (size, -size), (size, size), (-size, size)]
    edges = [(None, corners[n], corners[(n + 1) % 4]) for n in range(4)]
    for j, (u, v) in enumerate(points):
        if j == i:
            continue
        dx, dy = u - x, v - y
        side = lambda p: p[0] * dx + p[1] * dy - (dx * dx + dy * dy) / 2
        kept, cut = [], []
        for (owner, a, b) in edges:
            sa, sb = side(a), side(b)
            if sa > 0 and sb > 0:
                continue
            if (sa > 0) != (sb > 0):
                t = sa / (sa - sb)
                c = (a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1]))
                cut.append((sa > 0, c))
                a, b = (c, b) if sa > 0 else (a, c)
            kept.append((owner, a, b))
        if len(cut) == 2:
            entry = next(c for inward, c in cut if inward)
            leaving = next(c for inward, c in cut if not inward)
            kept.append((j, leaving, entry))
            # Back into order around the cell.
            kept.sort(key=lambda e: atan2((e[1][1] + e[2][1]) / 2, (e[1][0] + e[2][0]) / 2))
        edges = kept
    return edges


def wedge(h, t1, t2, n0):
    """(1/2 pi) times the integral of exp(-h^2/(n0 cos^2 theta)) over the edge's polar angle."""
    least = h * h + (0 if t1 < 0 < t2 else min(t1 * t1, t2 * t2))
    # The integrand lives within a few lengths sqrt(n0) of the foot, or less than that beyond the nearer end.
    centre = mpf(0) if t1 < 0 < t2 else t1 if t1 >= 0 else t2
    length = min(sqrt(n0), n0 / abs(centre)) if centre else sqrt(n0)
    ends = {t1, t2, centre} | {centre + sign * w * length for sign in (-1, 1) for w in (1, 3, 9)}
    # Almost through the point, the polar angle crowds towards a right angle.
    ends |= {sign * h * mpf(10) ** m for sign in (-1, 1) for m in range(1, 10)} if h < length / 10 else set()
    cuts = [atan2(t, h) for t in sorted(ends) if t1 <= t <= t2]
    value = quad(lambda theta: exp((least - (h / cos(theta)) ** 2) / n0), cuts, method='gauss-legendre')
    return exp(-least / n0) * value / (2 * mp.pi)


def plane(points, p, n0s):
    exact, union, nearest = ([mpf(0)] * len(n0s) for _ in range(3))
    distance = lambda a, b: sqrt((a[0] - b[0]) ** 2 + (a[1] - b[1]) ** 2)
    least = min(distance(points[i], points[j]) for i in range(len(points)) for j in range(i))
    relevant = []
    for i in range(len(points)):
        neighbours = []
        for (j, a, b) in cell(points, i):
            if j is None:
                continue
            dx, dy = points[j][0] - points[i][0], points[j][1] - points[i][1]
            d = sqrt(dx * dx + dy * dy)
            t1, t2 = sorted((-dy * c[0] + dx * c[1]) / d for c in (a, b))
            if t2 - t1 > least * mpf(10) ** -9:
                neighbours.append(j)
                for n, n0 in enumerate(n0s):
                    union[n] += p[i] * q(d / sqrt(2 * n0))
                    if d <= least * (1 + mpf(10) ** -9):
                        nearest[n] += p[i] * q(least / sqrt(2 * n0))
            for n, n0 in enumerate(n0s):
                if (d * d - least * least) / (4 * n0) > 150:
                    continue  # below 1e-60 of the whole
                exact[n] += p[i] * wedge(d / 2, t1, t2, n0)
        relevant.append(sorted(neighbours))
    return least, relevant, exact, union, nearest


def line(points, p, n0s):
    order = sorted(range(len(points)), key=lambda i: points[i][0])
    gaps = [points[order[n + 1]][0] - points[order[n]][0] for n in range(len(order) - 1)]
    least = min(gaps)
    relevant = [[] for _ in points]
    exact, nearest = [mpf(0)] * len(n0s), [mpf(0)] * len(n0s)
    for n, gap in enumerate(gaps):
        i, j = order[n], order[n + 1]
        relevant[i].append(j)
        relevant[j].append(i)
        for k, n0 in enumerate(n0s):
            exact[k] += (p[i] + p[j]) * q(gap / sqrt(2 * n0))
            if gap <= least * (1 + mpf(10) ** -9):
                nearest[k] += (p[i] + p[j]) * q(least / sqrt(2 * n0))
    return least, [sorted(r) for r in relevant], exact, list(exact), nearest


def circle(n, radius, phase):
    return [[radius * math.cos(2 * math.pi * i / n + phase), radius * math.sin(2 * math.pi * i / n + phase)] for i in range(n)]


def scattered(seed, count):
    rng = random.Random(seed)
    return [[rng.uniform(-1, 1), rng.uniform(-1, 1)] for _ in range(count)]


def grid(columns, rows, step):
    return [[(2 * a + 1 - columns) * step, (2 * b + 1 - rows) * step] for a in range(columns) for b in range(rows)]


def turned(points, angle):
    c, s = math.cos(angle), math.sin(angle)
    return [[c * x - s * y, s * x + c * y] for x, y in points]


def unequal(seed, count):
    rng = random.Random(seed)
    weights = [rng.uniform(0.2, 1) for _ in range(count)]
    return [w / sum(weights) for w in weights]


def hexagonal(rows, step):
    return [[step * (2 * a + b % 2) / 2, step * b * math.sqrt(3) / 2] for b in range(len(rows)) for a in range(rows[b])]


def cocircular(seed, count):
    rng = random.Random(seed)
    angles = sorted(rng.uniform(0, 2 * math.pi) for _ in range(count))
    return [[math.cos(angle), math.sin(angle)] for angle in angles]


def clustered(seed, clusters, each, spread):
    rng = random.Random(seed)
    centres = [[rng.uniform(-1, 1), rng.uniform(-1, 1)] for _ in range(clusters)]
    return [[x + rng.gauss(0, spread), y + rng.gauss(0, spread)] for x, y in centres for _ in range(each)]


SETS = [
    ('binary on a line', [[-1.0], [1.0]], None),
    ('five unequal gaps on a line', [[0.3], [-2.0], [1.1], [5.0], [-0.25]], [0.1, 0.2, 0.3, 0.15, 0.25]),
    ('two points in the plane', [[0.2, 0.1], [1.3, -0.4]], None),
    ('collinear on a slant', [[0.1 * k * k, 0.2 * k * k] for k in range(6)], None),
    ('QPSK', circle(4, 1, math.pi / 4), None),
    ('8-PSK', circle(8, 1, 0), None),
    ('16-PSK', circle(16, 1, 0), None),
    ('16-QAM', grid(4, 4, 1 / math.sqrt(10)), None),
    ('4 x 2 grid turned', turned(grid(4, 2, 0.3), 0.7), None),
    ('hexagon with centre', [[0.0, 0.0]] + circle(6, 1, 0.2), None),
    ('5+11 at 2.2', circle(5, 1, math.pi / 5) + circle(11, 2.2, math.pi / 11), None),
    ('1+5+10 at 1.95', [[0.0, 0.0]] + circle(5, 1, math.pi / 5) + circle(10, 1.95, math.pi / 10), None),
    ('cross 32', [p for p in grid(6, 6, 1.0) if abs(p[0]) < 5 or abs(p[1]) < 5], None),
    ('five at random', scattered(1, 5), None),
    ('twelve at random', scattered(2, 12), None),
    ('twenty at random, unequal probabilities', scattered(3, 20), unequal(3, 20)),
    ('one far outlier', scattered(4, 7) + [[1e4, 37.0]], None),
    ('a nearly coincident pair', scattered(5, 6) + [[0.5, 0.5], [0.5 + 1e-7, 0.5 + 2e-7]], None),
    ('far from the origin', [[x + 1e5, y - 3e5] for x, y in scattered(6, 8)], None),
    ('a thin rectangle', [[0.0, 0.0], [4.0, 0.0], [4.0, 0.01], [0.0, 0.01]], None),
    ('two on a line, unequal probabilities', [[0.1], [0.7]], [0.9, 0.1]),
    ('sixteen equal gaps on a line', [[2 * i - 15.0] for i in range(16)], None),
    ('gaps that double on a line', [[float(2 ** i)] for i in range(10)], None),
    ('three points, obtuse', [[0.0, 0.0], [2.0, 0.3], [4.0, 0.0]], None),
    ('three points, right-angled', [[0.0, 0.0], [3.0, 0.0], [0.0, 4.0]], None),
    ('a kite', [[0.0, 1.0], [-0.7, 0.0], [0.7, 0.0], [0.0, -3.0]], None),
    ('a parallelogram', [[0.0, 0.0], [2.0, 0.1], [2.7, 1.3], [0.7, 1.2]], None),
    ('nine cocircular at random angles', cocircular(9, 9), None),
    ('twelve cocircular and their centre', cocircular(10, 12) + [[0.0, 0.0]], None),
    ('collinear on the horizontal', [[0.5 * k, 2.0] for k in range(9)], unequal(7, 9)),
    ('collinear on the vertical', [[-1.0, k ** 1.5] for k in range(7)], None),
    ('hexagonal, three rows', hexagonal([4, 5, 4], 1.0), None),
    ('hexagonal, five rows, turned', turned(hexagonal([4, 4, 4, 4, 4], 0.4), 0.3), None),
    ('5 x 5 grid', grid(5, 5, 0.5), None),
    ('6 x 3 grid, unequal probabilities', grid(6, 3, 0.25), unequal(8, 18)),
    ('two rings in phase', circle(6, 1, 0) + circle(6, 2.1, 0), None),
    ('4+12+16 at 2.84, 5.27', circle(4, 1, math.pi / 4) + circle(12, 2.84, math.pi / 12) + circle(16, 5.27, 0), None),
    ('three clusters', clustered(11, 3, 5, 0.05), None),
    ('an offset mean', [[x + 40, y + 9] for x, y in grid(4, 4, 0.5)], None),
    ('two nearly coincident pairs', scattered(12, 5) + [[0.2, 0.2], [0.2 + 3e-6, 0.2], [-0.4, 0.1], [-0.4, 0.1 + 2e-6]], None),
    ('an outlier on an axis', grid(3, 3, 0.3) + [[-3e5, 0.0]], None),
    ('thirty at random', scattered(13, 30), None),
]
# d_min/sqrt(2 N0): from error rates near 1 to about 1e-30.
ARGUMENTS = [0.02, 0.3, 2.0, 6.0, 11.4]


def main():
    result = []
    for name, points, probabilities in SETS:
        exact_points = [[mpf(c) for c in point] for point in points]
        p = [mpf(x) for x in probabilities] if probabilities else [mpf(1) / len(points)] * len(points)
        least = min(math.dist(points[i], points[j]) for i in range(len(points)) for j in range(i))
        n0s = [(least / x) ** 2 / 2 for x in ARGUMENTS]
        if name.startswith('a nearly'):
            n0s += [0.5, 0.05]
        compute = line if len(points[0]) == 1 else plane
        d, relevant, exact, union, nearest = compute(exact_points, p, [mpf(n0) for n0 in n0s])
        digits = lambda x: nstr(x, 30)
        result.append({
            'name': name, 'points': points, 'probabilities': probabilities,
            'minimumDistance': digits(d), 'relevant': relevant,
            'rates': [{'n0': n0, 'serExact': digits(e), 'serUnion': digits(u), 'serNearest': digits(a)}
                      for n0, e, u, a in zip(n0s, exact, union, nearest)],
        })
        print(name, digits(exact[0])[:12], digits(exact[-1])[:12], flush=True)
    target = os.path.join(os.path.dirname(os.path.abspath(__file__)), 'ser-30-digits.json')
    with open(target, 'w') as file:
        file.write('[\n' + ',\n'.join(json.dumps(entry) for entry in result) + '\n]\n')


main()
