import { describe, expect, it } from 'vitest'
import { parseRingsOrPreset, ringPresets, ringsSource } from '../../../shared/columns/rings-entry'
import { sampleRow } from './sample-row'

const row = (inputs: Parameters<typeof sampleRow>[1]) => sampleRow({}, { family: 'apsk', ...inputs }).inputs

describe('the ring sets of the standard', () => {
  it('are eleven', () => expect(ringPresets).toHaveLength(11))
  it('are titled by rings, ratios and code rate', () => expect([ringPresets[5]!.title, ringPresets[10]!.title]).toEqual([
    '4+12 at 2.57 (ETSI 16-APSK 9/10)', '4+12+16 at 2.53, 4.30 (ETSI 32-APSK 9/10)']))
  it('set family, order, rings, ratios and phases in one change', () => expect(parseRingsOrPreset('4+12+16 at 2.84, 5.27 (ETSI 32-APSK 3/4)'))
    .toEqual({ change: { family: 'apsk', order: 32, rings: [4, 12, 16], ratios: [2.84, 5.27], phasesDeg: [45, 15, 0] } }))
  it('are read in any case of letters', () => expect(parseRingsOrPreset(' 4+12 at 2.57 (etsi 16-apsk 9/10) ')).toHaveProperty('change.ratios', [2.57]))
  it('refuse a title that is none of theirs', () => expect(parseRingsOrPreset('4+12 at 2.58 (ETSI 16-APSK 9/10)')).toHaveProperty('refused'))
})

describe('free entry beside them', () => {
  it('makes the row an APSK one', () => expect(parseRingsOrPreset('5+11 at 2.2')).toEqual({ change: { family: 'apsk', rings: [5, 11], ratios: [2.2] } }))
  it('leaves the family of a cleared cell', () => expect(parseRingsOrPreset('')).toEqual({ change: { rings: null, ratios: null } }))
  it('drops phases of another number of rings', () => expect(parseRingsOrPreset('5+11 at 2.2', row({ phasesDeg: [45, 15, 0] })))
    .toHaveProperty('change.phasesDeg', null))
  it('keeps phases of as many rings', () => expect(parseRingsOrPreset('4+12+16 at 2.5, 4.4', row({ phasesDeg: [45, 15, 0] })))
    .not.toHaveProperty('change.phasesDeg'))
})

describe('where rings were published', () => {
  it('is the standard and its code rate', () => expect(ringsSource(row({ rings: [4, 12], ratios: [2.57], phasesDeg: [45, 15] })))
    .toBe('16-APSK 9/10 of ETSI EN 302 307-1'))
  it('is found where the phases are left to the family, if those are the standard\'s', () =>
    expect(ringsSource(row({ rings: [4, 12], ratios: [2.57] }))).toBe('16-APSK 9/10 of ETSI EN 302 307-1'))
  it('is not said of an outer ring that is turned otherwise', () => expect(ringsSource(row({ rings: [4, 12, 16], ratios: [2.53, 4.3] }))).toBeNull())
  it('is not said of a ratio of one\'s own', () => expect(ringsSource(row({ rings: [4, 12], ratios: [2.58] }))).toBeNull())
  it('is not said of another family', () => expect(ringsSource(sampleRow({}, { rings: [4, 12], ratios: [2.57] }).inputs)).toBeNull())
})
