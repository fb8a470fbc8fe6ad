import { describe, expect, it } from 'vitest'
import { parseNumberList, parsePoints, parseRings, parseSnrRange, pointsText, ringsText, snrRangeText } from '../../../shared/columns/entry-lists'

describe('rings and ratios in one text', () => {
  it('reads both', () => expect(parseRings('4+12 at 2.57')).toEqual({ change: { rings: [4, 12], ratios: [2.57] } }))
  it('reads several ratios', () => expect(parseRings('4 + 12 + 16 at 2.53, 4.30')).toEqual({ change: { rings: [4, 12, 16], ratios: [2.53, 4.3] } }))
  it('reads rings alone and leaves the ratios', () => expect(parseRings('5+11')).toEqual({ change: { rings: [5, 11] } }))
  it('reads ratios alone and leaves the rings', () => expect(parseRings('2.2')).toEqual({ change: { ratios: [2.2] } }))
  it('reads ratios behind at', () => expect(parseRings('at 3')).toEqual({ change: { ratios: [3] } }))
  it('reads a single ring', () => expect(parseRings('8')).toEqual({ change: { rings: [8] } }))
  it('clears both', () => expect(parseRings('')).toEqual({ change: { rings: null, ratios: null } }))
  it('says what to type instead of a decimal comma', () => expect(parseRings('4+12 at 2,57'))
    .toEqual({ refused: '“2,57” has a comma: enter 2.57, with a point.' }))
  it('finds the decimal comma among several ratios', () => expect(parseRings('4+12+16 at 2.84; 5,27'))
    .toEqual({ refused: '“5,27” has a comma: enter 5.27, with a point.' }))
  it('finds the decimal comma without rings', () => expect(parseRings('2,57')).toEqual({ refused: '“2,57” has a comma: enter 2.57, with a point.' }))
  it('counts no ratio for a point at the centre', () => expect(parseRings('1+5+10 at 1,95'))
    .toEqual({ refused: '“1,95” has a comma: enter 1.95, with a point.' }))
  it('reads two whole ratios where the rings have two', () => expect(parseRings('4+12+16 at 3,5')).toEqual({ change: { rings: [4, 12, 16], ratios: [3, 5] } }))
  it('refuses words', () => expect(parseRings('4+twelve')).toHaveProperty('refused'))
  it('writes what it reads', () => expect(ringsText({ rings: [1, 5, 10], ratios: [1.95] })).toBe('1+5+10 at 1.95'))
})

describe('the SNR range in one text', () => {
  it('reads words', () => expect(parseSnrRange('0 to 40 step 1')).toEqual({ change: { snrStart: 0, snrStop: 40, snrStep: 1 } }))
  it('reads three numbers', () => expect(parseSnrRange('−5 20 0.5')).toEqual({ change: { snrStart: -5, snrStop: 20, snrStep: 0.5 } }))
  it('leaves a step that is not given', () => expect(parseSnrRange('0 to 30')).toEqual({ change: { snrStart: 0, snrStop: 30 } }))
  it('refuses a range that runs backwards', () => expect(parseSnrRange('10 to 5 step 1'))
    .toEqual({ refused: 'The SNR range runs backwards: its stop 5 is below its start 10.' }))
  it('refuses 1,002 values', () => expect(parseSnrRange('0 to 100.1 step 0.1'))
    .toEqual({ refused: 'This SNR range makes 1,002 values; at most 1,001 are allowed: take a larger step.' }))
  it('takes 1,001 values', () => expect(parseSnrRange('0 to 100 step 0.1')).toHaveProperty('change'))
  it('refuses one number', () => expect(parseSnrRange('40')).toHaveProperty('refused'))
  it('writes what it reads', () => expect(snrRangeText({ snrStart: 0, snrStop: 40, snrStep: 1 })).toBe('0 to 40 step 1'))
})

describe('points, one a line', () => {
  it('reads coordinates', () => expect(parsePoints('1 0\n−0.2, 1.1\n')).toEqual({ change: { points: [[1, 0], [-0.2, 1.1]] } }))
  it('names the line of a mistake', () => expect(parsePoints('1 0\n\n0 i')).toEqual({ refused: 'Line 3: “i” is not a number.' }))
  it('says what to type instead of a decimal comma', () => expect(parsePoints('1 0\n0,5 −1,5'))
    .toEqual({ refused: 'Line 2: “0,5” has a comma: enter 0.5, with a point.' }))
  it('reads coordinates with a comma alone between them', () => expect(parsePoints('1,0\n0,1')).toEqual({ change: { points: [[1, 0], [0, 1]] } }))
  it('names a line of other length', () => expect(parsePoints('1 0\n1'))
    .toEqual({ refused: 'Line 2 has 1 coordinates and the first point 2: give every point the same number.' }))
  it('writes a point a line', () => expect(pointsText([[1, 0], [-1, 0.5]])).toBe('1 0\n−1 0.5'))
})

describe('lists of numbers', () => {
  it('reads ring phases', () => expect(parseNumberList('phasesDeg')('45 15')).toEqual({ change: { phasesDeg: [45, 15] } }))
  it('leaves an empty list to the family', () => expect(parseNumberList('phasesDeg')(' ')).toEqual({ change: { phasesDeg: null } }))
})
