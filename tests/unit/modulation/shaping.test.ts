import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { createConstellation, generate, shapedProbabilities, withProbabilities } from '../../../shared/modulation'

const qam16 = generate('qam', { order: 16 })

describe('Maxwell–Boltzmann probabilities', () => {
  it.each([2.001, 2.5, 3, 3.7, 3.999999])('of 16-QAM at %d bit have that entropy to 1e-12', (entropy) => {
    expect(Math.abs(withProbabilities(qam16, shapedProbabilities(qam16, entropy)).entropy - entropy)).toBeLessThan(1e-12)
  })
  it('of random points have the wanted entropy to 1e-12', () => fc.assert(fc.property(
    fc.uniqueArray(fc.tuple(fc.integer({ min: -50, max: 50 }), fc.integer({ min: -50, max: 50 })), { selector: String, minLength: 3, maxLength: 40 }),
    fc.double({ min: 0.6, max: 1, noNaN: true }), (points, part) => {
      const constellation = createConstellation([...points, [60, 1]])
      const entropy = part * constellation.bitsPerSymbol
      // Several points of least energy may leave too many bits.
      const least = Math.min(...points.map(([x, y]) => x * x + y * y))
      fc.pre(Math.log2(points.filter(([x, y]) => x * x + y * y < least + 30).length) < entropy - 0.3)
      expect(Math.abs(withProbabilities(constellation, shapedProbabilities(constellation, entropy)).entropy - entropy)).toBeLessThan(1e-12)
    }), { seed: 3, numRuns: 200 }))
  it('are exactly equal at log2 M bit', () => {
    expect([...shapedProbabilities(qam16, 4)]).toEqual(Array.from({ length: 16 }, () => 1 / 16))
  })
  it('have logarithms on a straight line over the energies', () => {
    const p = shapedProbabilities(generate('pam', { order: 8 }), 2.5)
    // energies of 1, 3, 5, 7: 1, 9, 25, 49
    const slope = Math.log(p[4]! / p[5]!) / 8
    expect(Math.log(p[5]! / p[6]!) / 16).toBeCloseTo(slope, 12)
    expect(Math.log(p[6]! / p[7]!) / 24).toBeCloseTo(slope, 12)
  })
  it('do not depend on the scale of the points', () => {
    const small = createConstellation([[1e-30], [2e-30], [4e-30]])
    const large = createConstellation([[1e30], [2e30], [4e30]])
    const [a, b] = [small, large].map(constellation => shapedProbabilities(constellation, 1.2))
    a!.forEach((p, i) => expect(p).toBeCloseTo(b![i]!, 12))
  })
  it.each([1.9, 4.1, Number.NaN])('of 16-QAM do not exist at %d bit', (entropy) => {
    expect(() => shapedProbabilities(qam16, entropy)).toThrow('Shaping gives these points an entropy from 2.000 to 4.000 bit.')
  })
  it('do not exist for points of one energy', () => {
    expect(() => shapedProbabilities(generate('psk', { order: 8 }), 2.5)).toThrow('All points have the same energy')
  })
  it('need less energy at the same entropy than equal probabilities on fewer points', () => {
    const shaped = withProbabilities(generate('pam', { order: 8 }), shapedProbabilities(generate('pam', { order: 8 }), 2))
    // d_min of 4-PAM over that of 8-PAM at unit mean energy: 2/√5 and 2/√21
    expect(10 * Math.log10(5 / 21 / shaped.meanEnergy)).toBeGreaterThan(0.5)
  })
})

describe('other probabilities', () => {
  it('keep points and labels', () => {
    const constellation = createConstellation([[1], [-1], [3], [-3]], { labels: ['00', '01', '10', '11'] })
    const changed = withProbabilities(constellation, [0.4, 0.4, 0.1, 0.1])
    expect(changed.labels).toEqual(['00', '01', '10', '11'])
    expect([...changed.points]).toEqual([1, -1, 3, -3])
  })
  it('change the mean energy, for nothing is rescaled', () => {
    expect(withProbabilities(createConstellation([[1], [-1], [3], [-3]]), [0.4, 0.4, 0.1, 0.1]).meanEnergy).toBeCloseTo(2.6, 14)
  })
  it('that are null are all equal again', () => {
    expect(withProbabilities(createConstellation([[1], [-2]], { probabilities: [0.1, 0.9] }), null).entropy).toBe(1)
  })
})
