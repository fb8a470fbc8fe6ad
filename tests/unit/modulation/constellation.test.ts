import { describe, expect, it } from 'vitest'
import { ModulationError, asymptoticEfficiencyDb, createConstellation, generate, minimumDistanceOf, normalise, paprDb } from '../../../shared/modulation'

const square = [[1, 1], [1, -1], [-1, 1], [-1, -1]]

/** What a call throws. */
function refusal(call: () => unknown): ModulationError {
  try {
    call()
  } catch (error) {
    if (error instanceof ModulationError) return error
    throw error
  }
  throw new Error('nothing was refused')
}

describe('a constellation', () => {
  const c = createConstellation(square, { labels: ['00', '01', '10', '11'], probabilities: [0.4, 0.3, 0.2, 0.1] })
  it('keeps its points row after row', () => expect([...c.points]).toEqual([1, 1, 1, -1, -1, 1, -1, -1]))
  it('has k = 2 bits', () => expect(c.bitsPerSymbol).toBe(2))
  it('has its entropy', () => expect(c.entropy).toBeCloseTo(1.8464393446710154, 15))
  it('counts energy about the origin', () => expect(createConstellation([[1], [3]]).meanEnergy).toBe(5))
  it('weighs energy with probabilities', () => expect(createConstellation([[1], [3]], { probabilities: [0.75, 0.25] }).meanEnergy).toBe(3))
  it('has a peak energy', () => expect(createConstellation([[1], [-3]]).peakEnergy).toBe(9))
  it('may have points of eight coordinates', () => {
    expect(createConstellation([[1, 0, 0, 0, 0, 0, 0, 0], [0, 0, 0, 0, 0, 0, 0, 1]]).dimensions).toBe(8)
  })
})

describe('refused constellations', () => {
  const cases: [string, () => unknown, string, (string | number)[]][] = [
    ['a single point', () => createConstellation([[1, 0]]), 'A constellation has 2 to 4096 points.', ['points']],
    ['4097 points', () => createConstellation(Array.from({ length: 4097 }, (_, i) => [i])), 'A constellation has 2 to 4096 points.', ['points']],
    ['nine coordinates', () => createConstellation([[1, 2, 3, 4, 5, 6, 7, 8, 9], [0]]), 'A point has 1 to 8 coordinates.', ['points', 0]],
    ['mixed lengths', () => createConstellation([[1, 2], [0]]), 'All points have the same number of coordinates: point 2 has 1, the first 2.', ['points', 1]],
    ['NaN', () => createConstellation([[1, 2], [0, NaN]]), 'A coordinate is a number from −1e60 to 1e60.', ['points', 1, 1]],
    ['infinity', () => createConstellation([[1], [Infinity]]), 'A coordinate is a number from −1e60 to 1e60.', ['points', 1, 0]],
    ['a coordinate of 1e61', () => createConstellation([[1], [1e61]]), 'A coordinate is a number from −1e60 to 1e60.', ['points', 1, 0]],
    ['points all within 1e-61', () => createConstellation([[1e-61], [0]]), 'The largest point is at least 1e-60 from the origin.', ['points']],
    ['coincident points', () => createConstellation([[1, 0], [0, 1], [1 + 1e-10, 0]]), 'All points are different: points 1 and 3 coincide.', ['points', 2]],
    ['all points at the origin', () => createConstellation([[0, 0], [0, 0]]), 'The points are not all at the origin: the mean energy is above 0.', ['points']],
    ['too few probabilities', () => createConstellation(square, { probabilities: [0.5, 0.5] }), 'Probabilities are as many as points: 4.', ['probabilities']],
    ['a probability of 0', () => createConstellation([[1], [2], [3]], { probabilities: [0.5, 0.5, 0] }), 'A probability is above 0 and below 1.', ['probabilities', 2]],
    ['a sum beside 1', () => createConstellation([[1], [2]], { probabilities: [0.5, 0.4] }), 'The probabilities have the sum 1, within 1e-9.', ['probabilities']],
    ['labels of three points', () => createConstellation([[1], [2], [3]], { labels: ['0', '1', '0'] }), 'Labels need a power of two of points.', ['labels']],
    ['short labels', () => createConstellation(square, { labels: ['0', '01', '10', '11'] }), 'A label is a word of 2 bits 0 or 1.', ['labels', 0]],
    ['equal labels', () => createConstellation(square, { labels: ['00', '01', '00', '11'] }), 'All labels are different: points 1 and 3 have the same one.', ['labels', 2]],
    ['a spacing of 0', () => normalise(createConstellation(square), { normalisation: 'minimumDistance', spacing: 0 }), 'Spacing is the minimum distance in signal units, a number above 0.', ['spacing']],
  ]
  it.each(cases)('%s: the sentence', (_, call, message) => expect(refusal(call).message).toBe(message))
  it.each(cases)('%s: the path', (_, call, __, path) => expect(refusal(call).path).toEqual(path))
  it('accepts points just more than 1e-9 of the largest apart', () => expect(createConstellation([[1, 0], [1, 1.1e-9]]).order).toBe(2))
  it('finds a coincidence among 4096 points on a vertical line', () => {
    const points = Array.from({ length: 4096 }, (_, i) => [0.5, i])
    points[4000] = [0.5, 17]
    expect(refusal(() => createConstellation(points)).message).toBe('All points are different: points 18 and 4001 coincide.')
  })
})

describe('normalisation', () => {
  const c = createConstellation([[3, 0], [0, 1], [-1, 0], [0, -1]])
  it('to unit mean energy', () => expect(normalise(c, { normalisation: 'meanEnergy' }).meanEnergy).toBeCloseTo(1, 15))
  it('to unit peak energy', () => expect(normalise(c, { normalisation: 'peakEnergy' }).peakEnergy).toBeCloseTo(1, 15))
  it('to a spacing', () => expect(minimumDistanceOf(normalise(c, { normalisation: 'minimumDistance', spacing: 2.5 }))).toBeCloseTo(2.5, 14))
  it('keeps the labels', () => {
    const labelled = createConstellation(square, { labels: ['00', '01', '10', '11'] })
    expect(normalise(labelled, { normalisation: 'peakEnergy' }).labels).toEqual(['00', '01', '10', '11'])
  })
})

describe('figures of a constellation', () => {
  it('PAPR of points of energy 1 and 9', () => expect(paprDb(createConstellation([[1], [-3]]))).toBeCloseTo(2.5527250510330606, 13))
  it('asymptotic efficiency of QPSK is that of binary antipodal signalling', () => {
    const c = generate('qam', { order: 4 })
    expect(asymptoticEfficiencyDb(c, minimumDistanceOf(c))).toBeCloseTo(0, 13)
  })
  // d²/(4·Eb) = (4/10)·4/4
  it('asymptotic efficiency of 16-QAM', () => {
    const c = generate('qam', { order: 16 })
    expect(asymptoticEfficiencyDb(c, minimumDistanceOf(c))).toBeCloseTo(-3.979400086720376, 13)
  })
})
