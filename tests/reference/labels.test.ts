import { describe, expect, it } from 'vitest'
import { familyLabels, generate } from '../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../shared/modulation'

const pointsOf = (id: FamilyId, parameters: FamilyParameters) => {
  const { points } = generate(id, parameters)
  return familyLabels(id, parameters)!.map((label, i) => ({ label, x: points[2 * i]!, y: points[2 * i + 1]! }))
}

// 3GPP TS 38.211 §5.1.3 to §5.1.6: the standard's own formulas, bit by bit
describe('3GPP TS 38.211 §5.1', () => {
  const signs = (label: string) => [...label].map(bit => 1 - 2 * Number(bit)) as [number, number, number, number, number, number, number, number]
  const formulas: [string, number, (b: ReturnType<typeof signs>) => [number, number]][] = [
    ['QPSK', 4, b => [b[0] / Math.sqrt(2), b[1] / Math.sqrt(2)]],
    ['16-QAM', 16, b => [b[0] * (2 - b[2]) / Math.sqrt(10), b[1] * (2 - b[3]) / Math.sqrt(10)]],
    ['64-QAM', 64, b => [b[0] * (4 - b[2] * (2 - b[4])) / Math.sqrt(42), b[1] * (4 - b[3] * (2 - b[5])) / Math.sqrt(42)]],
    ['256-QAM', 256, b => [
      b[0] * (8 - b[2] * (4 - b[4] * (2 - b[6]))) / Math.sqrt(170), b[1] * (8 - b[3] * (4 - b[5] * (2 - b[7]))) / Math.sqrt(170)]],
  ]
  it.each(formulas)('%s', (_, order, formula) => {
    const apart = pointsOf('qam', { order }).map(({ label, x, y }) => {
      const [re, im] = formula(signs(label))
      return Math.hypot(x - re, y - im)
    })
    expect(Math.max(...apart)).toBeLessThan(1e-14)
  })
  it('BPSK has bit 0 at the positive end', () => expect(familyLabels('psk', { order: 2 })).toEqual(['0', '1']))
  it('four points on the axes are its QPSK turned by −45°', () => {
    const turned = pointsOf('psk', { order: 4 }).map(({ label, x, y }) => [label, Math.sign(x - y + 1e-9), Math.sign(x + y + 1e-9)])
    expect(turned).toEqual([['00', 1, 1], ['10', -1, 1], ['11', -1, -1], ['01', 1, -1]])
  })
})

// IEEE 802.11, OFDM modulation mapping (from memory): an axis of 16-QAM is 00, 01, 11, 10 from −3 up, of 64-QAM 000, 001, 011, 010, 110, 111, 101, 100
describe('IEEE 802.11', () => {
  it('4 levels', () => expect(familyLabels('pam', { order: 4 })).toEqual(['00', '01', '11', '10']))
  it('8 levels', () => expect(familyLabels('pam', { order: 8 })).toEqual(['000', '001', '011', '010', '110', '111', '101', '100']))
})

// ETSI EN 302 307-1, figures 11 and 12: angles in degrees of some labels on each ring
describe('ETSI EN 302 307-1', () => {
  const placeOf = (parameters: FamilyParameters, label: string) => {
    const { x, y } = pointsOf('apsk', parameters).find(point => point.label === label)!
    return { degrees: Math.round(Math.atan2(y + 1e-12, x) * 180 / Math.PI * 10) / 10, radius: Math.hypot(x, y) }
  }
  const sixteen = { rings: [4, 12], ratios: [3.15] }
  const thirtyTwo = { rings: [4, 12, 16], ratios: [2.84, 5.27], phases: [Math.PI / 4, Math.PI / 12, 0] }
  it.each([
    ['1100', 45], ['1110', 135], ['1111', -135], ['1101', -45],
    ['0100', 15], ['0000', 45], ['1000', 75], ['1010', 105], ['0010', 135], ['0110', 165],
    ['0111', -165], ['0011', -135], ['1011', -105], ['1001', -75], ['0001', -45], ['0101', -15],
  ])('4+12: %s stands at %d°', (label, degrees) => expect(placeOf(sixteen, label).degrees).toBe(degrees))
  it.each([
    ['10001', 45], ['10111', -135], ['10000', 15], ['00000', 45], ['00101', 105], ['00110', -135], ['10010', -15],
    ['11000', 0], ['01000', 22.5], ['11001', 45], ['01101', 90], ['11110', 180], ['01011', -90], ['11010', -22.5],
  ])('4+12+16: %s stands at %d°', (label, degrees) => expect(placeOf(thirtyTwo, label).degrees).toBe(degrees))
  it('11 begins the words of the inner ring of 4+12', () => {
    expect(['1100', '1110', '1111', '1101'].map(label => placeOf(sixteen, label).radius / placeOf(sixteen, '0000').radius)).toEqual(
      Array.from({ length: 4 }, () => expect.closeTo(1 / 3.15, 12)))
  })
})

// J. G. Smith, "Odd-bit quadrature amplitude-shift keying", IEEE Trans. Commun. 23 (1975) (from memory): 7/6 bits a neighbour for
// 32 points, the mean over points of their neighbours' mean
describe('Smith 1975', () => {
  it('near-Gray labels of 32-point cross QAM cost 7/6', () => {
    const points = pointsOf('cross-qam', { order: 32 })
    const apart = (a: typeof points[number], b: typeof points[number]) => Math.hypot(a.x - b.x, a.y - b.y)
    const least = Math.min(...points.slice(1).map(point => apart(point, points[0]!)))
    const differing = (a: string, b: string) => [...a].filter((bit, n) => bit !== b[n]).length
    const means = points.map((point) => {
      const near = points.filter(other => other !== point && apart(point, other) < 1.001 * least)
      return near.reduce((sum, other) => sum + differing(point.label, other.label), 0) / near.length
    })
    expect(means.reduce((sum, mean) => sum + mean, 0) / 32).toBeCloseTo(7 / 6, 12)
  })
})
