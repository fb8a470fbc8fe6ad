import { beforeAll, describe, expect, it } from 'vitest'
import type { Evaluation } from '#shared/modulation'
import type { Problem } from '#shared/schemas/common'
import { signIn } from '../support/client'
import type { Client } from '../support/client'

let observer: Client
beforeAll(async () => {
  observer = await signIn('observer')
})

const evaluate = <Body = Evaluation>(body: object) => observer.post<Body>('/api/evaluate', body)
const points = { family: 'custom', points: [[1, 0], [-0.2, 1.1], [-1, -0.5], [0.1, -1]] }

describe('POST /api/evaluate', () => {
  it('takes points as given', async () => {
    const { body } = await evaluate({ constellation: points, esN0Db: [8] })
    expect(body.meanEnergy).toBeCloseTo((1 + 1.25 + 1.25 + 1.01) / 4, 14)
  })
  it('answers the contract\'s own example', async () => {
    const { status, body } = await evaluate({
      constellation: { ...points, labels: ['00', '01', '11', '10'], probabilities: [0.25, 0.25, 0.25, 0.25] }, esN0Db: [8, 12.5],
      target: { quantity: 'ser', value: 1e-6 }, quantities: ['serUnion', 'serNearest', 'serExact', 'berExact', 'mutualInformation', 'bitMetricRate'],
    })
    expect([status, Object.keys(body.curves), Object.keys(body.requiredEsN0Db!)]).toEqual([
      200, ['esN0Db', 'serUnion', 'serNearest', 'serExact', 'berExact', 'mutualInformation', 'bitMetricRate'], ['serUnion', 'serNearest', 'serExact'],
    ])
  })
  it('finds the SNR that a target rate needs', async () => {
    // Ungerboeck 1982: 8-PSK reaches 2 bit/symbol at 5.76 dB, computed
    const { body } = await evaluate({ constellation: { family: 'psk', order: 8 }, esN0Db: [8], target: { quantity: 'rate', value: 2 }, quantities: ['mutualInformation'] })
    expect(body.requiredEsN0Db!.mutualInformation).toBeCloseTo(5.76, 2)
  })
  it('scales families to unit mean energy', async () => {
    const { body } = await evaluate({ constellation: { family: 'apsk', rings: [4, 12], ratios: [3.15] }, esN0Db: [8] })
    expect(body.meanEnergy).toBeCloseTo(1, 14)
  })
  it('gives the three symbol error rates where none is named', async () => {
    const { body } = await evaluate({ constellation: points, esN0Db: [8, 12.5] })
    expect(Object.keys(body.curves)).toEqual(['esN0Db', 'serUnion', 'serNearest', 'serExact'])
  })
  it('names the relevant neighbours of each point', async () => {
    const { body } = await evaluate({ constellation: { family: 'psk', order: 4 }, esN0Db: [8] })
    expect(body.neighbours.relevant).toEqual([[1, 3], [0, 2], [1, 3], [0, 2]])
  })
  it('finds the required Es/N0 of a target', async () => {
    const { body } = await evaluate({
      constellation: { family: 'qam', order: 16 }, esN0Db: [8], target: { quantity: 'ser', value: 1e-6 }, quantities: ['serExact'],
    })
    expect(body.requiredEsN0Db!.serExact).toBeCloseTo(20.918, 3)
  })
  it('leaves the required Es/N0 out without a target', async () =>
    expect((await evaluate({ constellation: points, esN0Db: [8] })).body.requiredEsN0Db).toBeUndefined())

  const bad: [string, object, string][] = [
    ['a quantity that is not offered', { constellation: points, esN0Db: [8], quantities: ['serExact', 'colour'] }, 'quantities.1'],
    ['a family that does not exist', { constellation: { family: 'spiral' }, esN0Db: [8] }, 'constellation.family'],
    ['an order that a family cannot have', { constellation: { family: 'cross-qam', order: 16 }, esN0Db: [8] }, 'constellation.order'],
    ['points beside a family that takes its order', { constellation: { ...points, family: 'qam', order: 16 }, esN0Db: [8] }, 'constellation.points'],
    ['coincident points', { constellation: { family: 'custom', points: [[1, 0], [1, 0]] }, esN0Db: [8] }, 'constellation.points.1'],
    ['a string where a number belongs', { constellation: points, esN0Db: ['8'] }, 'esN0Db.0'],
    ['no SNR value', { constellation: points, esN0Db: [] }, 'esN0Db'],
    ['1,002 SNR values', { constellation: points, esN0Db: Array.from({ length: 1002 }, (_, i) => i / 100) }, 'esN0Db'],
    ['a bit error rate without labels', { constellation: { family: 'psk', order: 12 }, esN0Db: [8], quantities: ['berExact'] }, 'constellation.labels'],
    ['a target that no quantity has', { constellation: points, esN0Db: [8], target: { quantity: 'rate', value: 1 } }, 'target.quantity'],
    ['an unknown field', { constellation: points, esN0Db: [8], precision: 3 }, 'precision'],
    ['probabilities that do not add up', { constellation: { ...points, probabilities: [0.5, 0.1, 0.1, 0.1] }, esN0Db: [8] }, 'constellation.probabilities'],
    ['points of nine coordinates', { constellation: { family: 'custom', points: [[1, 0, 0, 0, 0, 0, 0, 0, 0], [0, 1, 0, 0, 0, 0, 0, 0, 0]] }, esN0Db: [8] }, 'constellation.points.0'],
  ]
  for (const [what, body, path] of bad) {
    it(`refuses ${what}, naming it`, async () => {
      const answer = await evaluate<Problem>(body)
      expect([answer.status, answer.body.errors![0]!.path]).toEqual([422, path])
    })
  }
  it('says which family takes a field that this one does not use', async () => {
    const { body } = await evaluate<Problem>({ constellation: { ...points, family: 'qam', order: 16 }, esN0Db: [8] })
    expect(body.errors![0]!.message).toBe('QAM takes its order; points are for the family custom.')
  })
  it('marks the ratios of rings whose points coincide', async () => {
    const { body } = await evaluate<Problem>({ constellation: { family: 'apsk', rings: [4, 4], ratios: [1.0000000001] }, esN0Db: [8] })
    expect(body.errors![0]!.path).toBe('constellation.ratios')
  })
  it('gives the SER of points of three coordinates that are no product as an interval', async () => {
    const { body } = await evaluate({ constellation: { family: 'custom', points: [[1, 0, 0.2], [0, 1, 0], [-1, 0.3, 0], [0, 0, 1]] }, esN0Db: [8], quantities: ['serExact'] })
    expect(body.curves.serExact).toEqual([{ value: expect.any(Number), low: expect.any(Number), high: expect.any(Number) }])
  })
  it('refuses what would take too long, saying what to reduce', async () => {
    const { status, body } = await evaluate<Problem>({
      constellation: { family: 'psk', order: 4096 }, esN0Db: Array.from({ length: 1001 }, (_, i) => i / 50), quantities: ['serAllPairs'],
    })
    expect([status, body.errors![0]!.path]).toEqual([422, 'quantities'])
  })
})
