import { describe, expect, it } from 'vitest'
import { coreVersion, evaluate } from '../../../shared/modulation'
import type { EvaluationRequest, ModulationError } from '../../../shared/modulation'

const points = [[1, 0], [-0.2, 1.1], [-1, -0.5], [0.1, -1]]
const request: EvaluationRequest = {
  constellation: { family: 'custom', points, labels: ['00', '01', '11', '10'], probabilities: [0.25, 0.25, 0.25, 0.25] },
  esN0Db: [8, 12.5],
  target: { quantity: 'ser', value: 1e-6 },
  quantities: ['serUnion', 'serAllPairs', 'serNearest', 'serExact'],
}
const answer = evaluate(request)

describe('an evaluation', () => {
  it('answers with the fields of the contract', () => expect(Object.keys(answer)).toEqual([
    'order', 'dimensions', 'bitsPerSymbol', 'meanEnergy', 'peakEnergy', 'paprDb', 'minimumDistance', 'neighbours', 'curves', 'requiredEsN0Db']))
  it('takes points as given', () => expect(answer.meanEnergy).toBeCloseTo(1.1275, 14))
  it('lists relevant neighbours', () => expect(answer.neighbours).toEqual({
    relevantMean: 2.5, nearestMean: 0.5, relevant: [[1, 3], [0, 2, 3], [1, 3], [0, 1, 2]] }))
  it('has a value for each SNR', () => expect(Object.values(answer.curves).map(curve => curve.length)).toEqual([2, 2, 2, 2, 2]))
  it('has a required Es/N0 for each quantity', () => {
    expect(Object.keys(answer.requiredEsN0Db!)).toEqual(['serUnion', 'serAllPairs', 'serNearest', 'serExact'])
  })
  it('has the three error rates when no quantities are named', () => {
    expect(Object.keys(evaluate({ ...request, quantities: undefined }).curves)).toEqual(['esN0Db', 'serUnion', 'serNearest', 'serExact'])
  })
  it('has no required Es/N0 without a target', () => expect('requiredEsN0Db' in evaluate({ ...request, target: undefined })).toBe(false))
  it('has information rates, which need no target', () => {
    const rates = evaluate({ ...request, quantities: ['mutualInformation', 'bitMetricRate', 'serExact'] })
    // by tests/reference/data/make-information.py
    expect(rates.curves.mutualInformation![0]).toBeCloseTo(1.9251003718877868, 10)
    expect(rates.curves.bitMetricRate![1]).toBeCloseTo(1.9991044213955758, 10)
    expect(Object.keys(rates.requiredEsN0Db!)).toEqual(['serExact'])
  })
  it('gives families unit mean energy', () => {
    expect(evaluate({ constellation: { family: 'apsk', rings: [4, 12], ratios: [3.15] }, esN0Db: [10] }).meanEnergy).toBeCloseTo(1, 14)
  })
  it('survives JSON', () => expect(JSON.parse(JSON.stringify(answer))).toEqual(answer))
})

describe('an evaluation of bit error rates', () => {
  const kinds = ['berAllPairs', 'berNearest', 'berExact']
  const qpsk = evaluate({ constellation: { family: 'psk', order: 4 }, esN0Db: [10], target: { quantity: 'ber', value: 1e-5 }, quantities: ['serExact', ...kinds] })
  it('has their curves beside others', () => expect(Object.keys(qpsk.curves)).toEqual(['esN0Db', 'serExact', ...kinds]))
  // Q(√10)
  it('gives a family its own labels', () => expect(qpsk.curves.berExact![0]).toBeCloseTo(7.82701129001e-4, 12))
  it('requires Es/N0 of them alone when the target is one', () => expect(Object.keys(qpsk.requiredEsN0Db!)).toEqual(kinds))
  // Binary PSK at 9.588 dB, and two bits a symbol
  it('finds it', () => expect(qpsk.requiredEsN0Db!.berExact).toBeCloseTo(9.588 + 3.010, 3))
  it('prefers labels that are given', () => {
    const natural = evaluate({ constellation: { family: 'psk', order: 4, labels: ['00', '01', '10', '11'] }, esN0Db: [10], quantities: ['berNearest'] })
    expect(natural.curves.berNearest![0]! / evaluate({ constellation: { family: 'psk', order: 4 }, esN0Db: [10], quantities: ['berNearest'] }).curves.berNearest![0]!).toBeCloseTo(1.5, 12)
  })
})

describe('a refused evaluation names the field', () => {
  const cases: [string, Partial<EvaluationRequest>, (string | number)[]][] = [
    ['family', { constellation: { family: 'spiral' } }, ['constellation', 'family']],
    ['order', { constellation: { family: 'psk', order: 1 } }, ['constellation', 'order']],
    ['coincident points', { constellation: { family: 'custom', points: [[0, 1], [0, 1]] } }, ['constellation', 'points', 1]],
    ['quantity', { quantities: ['serExact', 'berGuessed'] }, ['quantities', 1]],
    ['labels for a bit error rate', { constellation: { family: 'custom', points }, quantities: ['berExact'] }, ['constellation', 'labels']],
    ['labels for six points', { constellation: { family: 'psk', order: 6 }, quantities: ['berNearest'] }, ['constellation', 'labels']],
    ['target of neither kind', { target: { quantity: 'fer', value: 1e-3 } }, ['target', 'quantity']],
    ['target of a bit error rate without one', { target: { quantity: 'ber', value: 1e-3 } }, ['target', 'quantity']],
    ['SNR', { esN0Db: [1, NaN] }, ['esN0Db', 1]],
    ['labels', { constellation: { family: 'custom', points }, quantities: ['bitMetricRate'] }, ['constellation', 'labels']],
    ['target', { target: { quantity: 'ser', value: 0.95 } }, ['target', 'value']],
  ]
  it.each(cases)('%s', (_, change, path) => {
    try {
      evaluate({ ...request, ...change })
      expect.unreachable()
    } catch (error) {
      expect((error as ModulationError).path).toEqual(path)
    }
  })
})

describe('the core', () => {
  it('has a version', () => expect(coreVersion).toMatch(/^\d+\.\d+\.\d+$/))
})

describe('an evaluation of more than two dimensions', () => {
  const of = (constellation: EvaluationRequest['constellation']) => evaluate({ constellation, esN0Db: [10], target: { quantity: 'ser', value: 1e-4 } })
  it('tells neighbours', () => expect(of({ family: 'hypercube', order: 8 }).neighbours.relevant[0]).toEqual([1, 2, 4]))
  it('has numbers where the exact rate is known', () => expect(typeof of({ family: 'hypercube', order: 8 }).curves.serExact![0]).toBe('number'))
  it('has an exact requirement there', () => expect(typeof of({ family: 'biorthogonal', order: 8 }).requiredEsN0Db!.serExact).toBe('number'))
  it('has intervals elsewhere', () => expect(of({ family: 'lattice', lattice: 'D4', order: 16 }).curves.serExact![0]).toEqual({ value: expect.any(Number), low: expect.any(Number), high: expect.any(Number) }))
  it('has an interval as requirement there', () => expect(of({ family: 'lattice', lattice: 'D4', order: 16 }).requiredEsN0Db!.serExact).toHaveProperty('low'))
  it('takes custom points of three coordinates', () => expect(of({ family: 'custom', points: [[0, 1, 2], [0, 1, 3]] }).dimensions).toBe(3))
})
