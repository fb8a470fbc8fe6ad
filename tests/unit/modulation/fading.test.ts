import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, gaussLegendre, generate, serAllPairs, serExact, serExactCurve, serFading, serFadingCurve, serNearest, serUnionBound } from '../../../shared/modulation'
import type { FadingChannel } from '../../../shared/modulation'
import { fadingOf } from '../../../shared/modulation/fading'
import { fadedPiece } from '../../../shared/modulation/fading-edge'
import { FadedPairwise } from '../../../shared/modulation/fading-pairwise'
import table from '../../reference/data/fading-averages.json'
import { randomFrom } from './seeded'

const relative = (value: number, wanted: number) => Math.abs(value / wanted - 1)
const rayleigh = { kind: 'rayleigh', branches: 1 } as const

/** ∫ rate(N0/g) over the density of L Nakagami gains of parameter m·L = n, n whole, at g = x²: composite Gauss–Legendre on steps of one decade of x and less. */
function averaged(rates: (n0s: number[]) => Float64Array, n0: number, m: number, branches: number): number {
  const n = m * branches
  const { nodes, weights } = gaussLegendre(40)
  const ends = [0, 1e-4, 1e-3, 1e-2, 0.03, 0.1, 0.3, 0.6, 1, 1.5, 2, 3, 4, 6, 8]
  const places = ends.slice(1).flatMap((end, e) => [...nodes].map((node, i) => ({ x: ends[e]! + (end - ends[e]!) * node, weight: weights[i]! * (end - ends[e]!) })))
  let logGamma = 0
  for (let k = 2; k < n; k++) logGamma += Math.log(k)
  const values = rates(places.map(({ x }) => n0 / (x * x)))
  return places.reduce((sum, { x, weight }, i) => sum + weight * 2 * x * values[i]! * Math.exp(n * Math.log(m) + (2 * n - 2) * Math.log(x) - m * x * x - logGamma), 0)
}

describe('an edge under fading', () => {
  it.each(table.rows)('$channel of $parameter, $branches branches: h = $h, $a to $b at N0 = $n0', ({ channel, branches, parameter, h, a, b, n0, value }) => {
    const fading = fadingOf({ kind: channel, branches, kFactor: parameter, m: parameter } as FadingChannel)
    expect(relative(fadedPiece(fading, h, a, b ?? Infinity, n0), value)).toBeLessThan(1e-11)
  })

  it('is the sum of its parts', () => {
    const random = randomFrom(31)
    for (let round = 0; round < 300; round++) {
      const kind = (['rayleigh', 'rician', 'nakagami'] as const)[round % 3]!
      const fading = fadingOf({ kind, branches: 1 + Math.floor(random() * 16), kFactor: 10 ** (6 * random() - 3), m: 0.5 * 200 ** random() })
      const h = 10 ** (6 * random() - 5)
      const [a, b, c] = [random(), random(), random()].map(x => 10 ** (5 * x - 3)).sort((x, y) => x - y)
      const n0 = 10 ** (5 * random() - 3)
      const whole = fadedPiece(fading, h, a!, c!, n0)
      if (whole < 1e-200) continue
      expect(relative(fadedPiece(fading, h, a!, b!, n0) + fadedPiece(fading, h, b!, c!, n0), whole)).toBeLessThan(2e-12)
    }
  })
})

describe('pairs under fading', () => {
  it('polynomials carry what the integral gives', () => {
    const channels: FadingChannel[] = [
      rayleigh, { kind: 'rayleigh', branches: 16 }, { kind: 'rician', branches: 1, kFactor: 100 }, { kind: 'rician', branches: 4, kFactor: 1e6 },
      { kind: 'nakagami', branches: 1, m: 0.5 }, { kind: 'nakagami', branches: 16, m: 100 },
    ]
    for (const channel of channels) {
      const fading = fadingOf(channel)
      const pairwise = new FadedPairwise(fading)
      for (let c = 1e-3; c < 1e4; c *= 1.7) {
        const wanted = 2 * fadedPiece(fading, 1, 0, Infinity, 1 / c)
        if (wanted > 1e-100) expect(relative(pairwise.at(c), wanted)).toBeLessThan(5e-12)
      }
    }
  })
})

describe('symbol error rates under fading against averages of the Gaussian channel', () => {
  const random = randomFrom(5)
  const points = Array.from({ length: 24 }, () => [2 * random() - 1, 2 * random() - 1])
  const geometry = analyse(createConstellation(points))
  const line = analyse(createConstellation([[-1.3], [-0.2], [0.1], [1.6]]))
  describe.each([[1, 1], [1, 3], [4, 2]])('Nakagami of m = %d, %d branches', (m, branches) => {
    const channel = { kind: 'nakagami', branches, m } as const
    it.each([0.5, 0.02, 0.0005])('at N0 = %d', (n0) => {
      const each = (rate: (at: number) => number) => averaged(n0s => Float64Array.from(n0s, rate), n0, m, branches)
      expect(relative(serFading(geometry, 'serExact', n0, channel), averaged(n0s => serExactCurve(geometry, n0s), n0, m, branches))).toBeLessThan(1e-9)
      expect(relative(serFading(line, 'serExact', n0, channel), each(at => serExact(line, at)))).toBeLessThan(1e-9)
      expect(relative(serFading(geometry, 'serUnion', n0, channel), each(at => serUnionBound(geometry, at)))).toBeLessThan(1e-9)
      expect(relative(serFading(geometry, 'serNearest', n0, channel), each(at => serNearest(geometry, at)))).toBeLessThan(1e-9)
      expect(relative(serFading(geometry, 'serAllPairs', n0, channel), each(at => serAllPairs(geometry.constellation, at)))).toBeLessThan(1e-9)
    })
  })

  it('many noise densities at once are each alone', () => {
    const curve = serFadingCurve(geometry, 'serExact', [0.3, 0.01], rayleigh)
    expect(curve[1]).toBe(serFading(geometry, 'serExact', 0.01, rayleigh))
  })

  it('without fading they are those of the Gaussian channel', () => {
    expect(serFading(geometry, 'serUnion', 0.1, { kind: 'awgn' })).toBe(serUnionBound(geometry, 0.1))
  })
})

describe('refusals', () => {
  const geometry = analyse(generate('psk', { order: 4 }))
  it.each([
    [{ kind: 'rayleigh', branches: 17 }, 'branches'], [{ kind: 'rician', branches: 1 }, 'kFactor'], [{ kind: 'nakagami', branches: 1, m: 0.4 }, 'm'],
  ] as const)('%o names the field', (channel, field) => {
    expect(() => serFading(geometry, 'serExact', 0.1, channel)).toThrow(expect.objectContaining({ path: [field] }))
  })
})
