"""Writes ber-30-digits.json: bit error rates to 30 digits, for the tests of shared/modulation.

Independent of the core in method: for each point sent and each cell, the probability that noise carries the point into the cell is
the winding of noise about the cell's polygon, integrated over the polar angle at the point; cells are clipped by brute force
(make-ser.py). Points, labels and N0 are the doubles that the file states. Run: python3 make-ber.py (mpmath 1.3).
"""
import json
import os
import random
from mpmath import mp, mpf, exp, sqrt, nstr

here = os.path.dirname(os.path.abspath(__file__))


def load():
    """The geometry of make-ser.py, without running it."""
    with open(os.path.join(here, 'make-ser.py')) as file:
        source = file.read().rsplit('\nmain()', 1)[0]
    module = {'__file__': os.path.join(here, 'make-ser.py')}
    exec(compile(source, 'make-ser.py', 'exec'), module)
    return module


ser = load()
q, cell = ser['q'], ser['cell']
mp.dps = 42


def edge_flow(x, y, a, b, n0, floor):
    """Noise of the point at the origin that a directed edge from a to b sweeps, counterclockwise positive; below floor it is left out."""
    dx, dy = b[0] - a[0], b[1] - a[1]
    length = sqrt(dx * dx + dy * dy)
    if length < mpf(10) ** -30:
        return mpf(0)  # cells that touch in a corner
    ux, uy = dx / length, dy / length
    h = (a[0] - x) * uy - (a[1] - y) * ux   # positive when the point is on the left
    t1 = (a[0] - x) * ux + (a[1] - y) * uy
    t2 = t1 + length
    if h == 0:
        return mpf(0)
    sign, h = (1 if h > 0 else -1), abs(h)
    least = h * h + (0 if t1 < 0 < t2 else min(t1 * t1, t2 * t2))
    if exp(-least / n0) < floor:
        return mpf(0)
    return sign * ser['wedge'](h, t1, t2, n0)


def plane(points, labels, p, n0s):
    k = len(labels[0])
    distance = lambda a, b: sum(x != y for x, y in zip(a, b))
    rates = [mpf(0)] * len(n0s)
    cells = [cell(points, j) for j in range(len(points))]
    least = min((a[0] - b[0]) ** 2 + (a[1] - b[1]) ** 2 for n, a in enumerate(points) for b in points[:n])
    for j, edges in enumerate(cells):
        (u, v) = points[j]
        for (neighbour, a, b) in edges:
            if neighbour is None or neighbour < j:
                continue
            start, end = (u + a[0], v + a[1]), (u + b[0], v + b[1])
            for i, (x, y) in enumerate(points):
                bits = distance(labels[i], labels[neighbour]) - distance(labels[i], labels[j])
                if bits == 0:
                    continue
                for n, n0 in enumerate(n0s):
                    floor = exp(-least / (4 * n0)) * mpf(10) ** -34
                    rates[n] += p[i] * bits * edge_flow(x, y, start, end, n0, floor) / k
    return rates


def line(points, labels, p, n0s):
    k = len(labels[0])
    distance = lambda a, b: sum(x != y for x, y in zip(a, b))
    order = sorted(range(len(points)), key=lambda i: points[i][0])
    edges = [(points[order[n]][0] + points[order[n + 1]][0]) / 2 for n in range(len(order) - 1)]
    rates = [mpf(0)] * len(n0s)
    for i in range(len(points)):
        for n, j in enumerate(order):
            if i == j:
                continue
            # Into cell j from below or from above: the difference of two tails of the same side.
            x = points[i][0]
            if points[j][0] > x:
                tails = [(1, edges[n - 1] - x)] + ([(-1, edges[n] - x)] if n < len(edges) else [])
            else:
                tails = [(1, x - edges[n])] + ([(-1, x - edges[n - 1])] if n > 0 else [])
            for m, n0 in enumerate(n0s):
                rates[m] += p[i] * distance(labels[i], labels[j]) * sum(s * q(t * sqrt(2 / n0)) for s, t in tails) / k
    return rates


def natural(count):
    bits = count.bit_length() - 1
    return [format(i, '0%db' % bits) for i in range(count)]


def gray(count):
    bits = count.bit_length() - 1
    return [format(i ^ i >> 1, '0%db' % bits) for i in range(count)]


def shuffled(seed, count):
    labels = natural(count)
    random.Random(seed).shuffle(labels)
    return labels


circle, grid, scattered, turned, unequal = (ser[name] for name in ('circle', 'grid', 'scattered', 'turned', 'unequal'))
SETS = [
    ('two on a line', [[-1.0], [1.5]], natural(2), None),
    ('four unequal gaps on a line, natural labels', [[0.3], [-2.0], [1.1], [5.0]], natural(4), [0.1, 0.3, 0.4, 0.2]),
    ('8-PAM, Gray labels', [[2 * i - 7.0] for i in range(8)], gray(8), None),
    ('8-PAM, shuffled labels', [[2 * i - 7.0] for i in range(8)], shuffled(8, 8), None),
    ('two points in the plane', [[0.2, 0.1], [1.3, -0.4]], natural(2), None),
    ('collinear on a slant', [[0.1 * k * k, 0.2 * k * k] for k in range(8)], shuffled(2, 8), None),
    ('QPSK, natural labels', circle(4, 1, 0.7853981633974483), natural(4), None),
    ('8-PSK, Gray labels', circle(8, 1, 0), gray(8), None),
    ('8-PSK, natural labels', circle(8, 1, 0), natural(8), None),
    ('16-PSK, shuffled labels', circle(16, 1, 0.1), shuffled(16, 16), None),
    ('16-QAM, natural labels', grid(4, 4, 0.31622776601683794), natural(16), None),
    ('8 points of a turned grid', turned(grid(4, 2, 0.3), 0.7), shuffled(3, 8), None),
    ('heptagon with centre', [[0.0, 0.0]] + circle(7, 1, 0.2), natural(8), None),
    ('4+12 at 2.85', circle(4, 1, 0.7853981633974483) + circle(12, 2.85, 0.2617993877991494), shuffled(4, 16), None),
    ('cross of 32', [p for p in grid(6, 6, 1.0) if abs(p[0]) < 5 or abs(p[1]) < 5], shuffled(32, 32), None),
    ('four at random', scattered(1, 4), natural(4), None),
    ('sixteen at random', scattered(2, 16), shuffled(5, 16), None),
    ('sixteen at random, unequal probabilities', scattered(3, 16), shuffled(6, 16), unequal(3, 16)),
    ('one far outlier', scattered(4, 7) + [[1e4, 37.0]], natural(8), None),
    ('a nearly coincident pair', scattered(5, 6) + [[0.5, 0.5], [0.5 + 1e-7, 0.5 + 2e-7]], natural(8), None),
    ('far from the origin', [[x + 1e5, y - 3e5] for x, y in scattered(6, 8)], shuffled(7, 8), None),
    ('a thin rectangle', [[0.0, 0.0], [4.0, 0.0], [4.0, 0.01], [0.0, 0.01]], natural(4), None),
]
# d_min/sqrt(2 N0): from rates near 0.5 to about 1e-20.
ARGUMENTS = [0.02, 0.5, 2.0, 5.0, 9.3]


def main():
    result = []
    for name, points, labels, probabilities in SETS:
        exact = [[mpf(c) for c in point] for point in points]
        p = [mpf(x) for x in probabilities] if probabilities else [mpf(1) / len(points)] * len(points)
        least = min(sum((a - b) ** 2 for a, b in zip(points[i], points[j])) for i in range(len(points)) for j in range(i))
        n0s = [least / x ** 2 / 2 for x in ARGUMENTS]
        if name.startswith('a nearly'):
            n0s = [0.5, 0.05, 0.01]
        rates = (line if len(points[0]) == 1 else plane)(exact, labels, p, [mpf(n0) for n0 in n0s])
        result.append({
            'name': name, 'points': points, 'labels': labels, 'probabilities': probabilities,
            'rates': [{'n0': n0, 'berExact': nstr(rate, 30)} for n0, rate in zip(n0s, rates)],
        })
        print(name, [nstr(rate, 6) for rate in rates], flush=True)
    with open(os.path.join(here, 'ber-30-digits.json'), 'w') as file:
        file.write('[\n' + ',\n'.join(json.dumps(entry) for entry in result) + '\n]\n')


main()
