import { describe, expect, it } from 'vitest'
import { advanceLabelSearch, analyse, berAllPairs, berExact, createConstellation, createLabelSearch, familyLabels, generate, naturalLabels } from '../../../shared/modulation'
import type { FamilyId, FamilyParameters, LabelSearchState } from '../../../shared/modulation'
import { randomFrom } from './seeded'
import { pathOf } from './refusal'

/** Natural labels in random order. */
const shuffledLabels = (seed: number, order: number) => {
  const random = randomFrom(seed)
  return naturalLabels(order)!.map(label => ({ label, key: random() })).sort((a, b) => a.key - b.key).map(({ label }) => label)
}
const scattered = (seed: number, order: number, dimensions = 2) => {
  const random = randomFrom(seed)
  return Array.from({ length: order }, () => Array.from({ length: dimensions }, () => 2 * random() - 1))
}
const finished = (state: LabelSearchState, swaps = 1e9): LabelSearchState => {
  let now = state
  while (!now.done) now = advanceLabelSearch(now, { swaps })
  return now
}

describe('from random labels it finds a rate as low as that of Gray labels', () => {
  it.each([
    ['psk', { order: 8 }, 0.05, 8], ['psk', { order: 16 }, 0.01, 8], ['qam', { order: 16 }, 0.1, 8], ['pam', { order: 8 }, 0.02, 8],
  ] as [FamilyId, FamilyParameters, number, number][])('%s %j at N0 = %d within %d starts', (id, parameters, n0, starts) => {
    const order = parameters.order!
    const gray = berExact(analyse(generate(id, parameters, { labels: familyLabels(id, parameters) })), n0)
    for (const seed of [1, 2, 3]) {
      const constellation = generate(id, parameters, { labels: shuffledLabels(seed, order) })
      expect(finished(createLabelSearch({ constellation, n0, seed, starts })).ber / gray).toBeLessThan(1 + 1e-9)
    }
  })
})

describe('a label search', () => {
  const constellation = createConstellation(scattered(1, 32), { labels: shuffledLabels(4, 32) })
  const n0 = constellation.meanEnergy / 10 ** 1.5
  const start = createLabelSearch({ constellation, n0, seed: 5, starts: 6 })
  const end = finished(start)

  it('begins with the rate of the labels given', () => expect([start.startBer, start.ber]).toEqual([berExact(analyse(constellation), n0), start.startBer]))
  it('ends with the exact rate of its labels', () => {
    expect(end.ber).toBe(berExact(analyse(createConstellation(scattered(1, 32), { labels: end.labels })), n0))
  })
  it('lowers the rate of random labels by a third at least', () => expect(end.ber).toBeLessThan(2 / 3 * end.startBer))
  it('counts its starts', () => expect([end.startsDone, end.done]).toEqual([6, true]))
  it('is the same every time', () => expect(finished(start)).toEqual(end))
  it('is the same in small pieces, through JSON', () => {
    let now = start
    while (!now.done) now = JSON.parse(JSON.stringify(advanceLabelSearch(now, { swaps: 100 }))) as LabelSearchState
    expect(now).toEqual(end)
  })
  it('leaves the state that it goes on from as it is', () => {
    const before = JSON.stringify(start)
    advanceLabelSearch(start, { swaps: 1000 })
    expect(JSON.stringify(start)).toBe(before)
  })
  it('with another seed takes another course', () => {
    expect(finished(createLabelSearch({ constellation, n0, seed: 6, starts: 6 })).swapsTried).not.toBe(end.swapsTried)
  })
  it('ends within its time, one point later at most', () => {
    const large = createLabelSearch({ constellation: createConstellation(scattered(9, 256)), n0: 0.01, seed: 1, starts: 1000 })
    const later = advanceLabelSearch(large, { milliseconds: 5 })
    expect([later.done, later.swapsTried > 0]).toEqual([false, true])
  })
  it('once done stays as it is', () => expect(advanceLabelSearch(end, { swaps: 1000 })).toBe(end))
})

describe('its labels are never worse than those of the start', () => {
  it.each(Array.from({ length: 12 }, (_, n) => n + 1))('set %d', (seed) => {
    const order = [4, 8, 16, 32][seed % 4]!
    const constellation = createConstellation(scattered(seed, order), { labels: shuffledLabels(seed, order) })
    const n0 = constellation.meanEnergy / 10 ** (seed / 5)
    const now = advanceLabelSearch(createLabelSearch({ constellation, n0, seed, starts: 3 }), { swaps: 20 * seed })
    expect(now.ber).toBeLessThanOrEqual(now.startBer)
  })
  it('Gray labels of 64-QAM stay', () => {
    const parameters = { order: 64 }
    const constellation = generate('qam', parameters, { labels: familyLabels('qam', parameters) })
    const end = finished(createLabelSearch({ constellation, n0: 0.02, seed: 1, starts: 2 }))
    expect(end.ber).toBeLessThanOrEqual(berExact(analyse(constellation), 0.02))
  })
})

describe('in more than two dimensions', () => {
  const constellation = createConstellation(scattered(2, 16, 4), { labels: shuffledLabels(8, 16) })
  const end = finished(createLabelSearch({ constellation, n0: 0.1, seed: 1, starts: 4 }))
  it('lowers the bound over all pairs', () => expect([end.measure, end.ber < end.startBer]).toEqual(['berAllPairs', true]))
  it('says the bound of its labels', () => {
    expect(end.ber).toBe(berAllPairs(createConstellation(scattered(2, 16, 4), { labels: end.labels }), 0.1))
  })
})

describe('refused', () => {
  const labelled = generate('psk', { order: 8 })
  it('six points', () => expect(pathOf(() => createLabelSearch({ constellation: generate('psk', { order: 6 }), n0: 1, seed: 1, starts: 1 }))).toEqual(['labels']))
  it('no starts', () => expect(pathOf(() => createLabelSearch({ constellation: labelled, n0: 1, seed: 1, starts: 0 }))).toEqual(['starts']))
  it('no noise', () => expect(pathOf(() => createLabelSearch({ constellation: labelled, n0: 0, seed: 1, starts: 1 }))).toEqual(['n0']))
})
