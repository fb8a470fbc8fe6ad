import { describe, expect, it } from 'vitest'
import { defaultRequirements, requirements } from '#shared/schemas/requirements'

const power = (id: string, unit: 'dBm' | 'dBW') => ({ id, name: `Power ${id}`, source: '', kind: 'power', unit, valueDb: 3 })
const noise = { id: 'n', name: 'Noise', source: '', kind: 'noiseFigure', noiseFigureDb: 5 }

/** Paths and sentences of a link budget's mistakes. */
function mistakes(common: object[], own: object[]) {
  const { error } = requirements.safeParse({
    ...defaultRequirements,
    available: { from: 'link', lines: common, cases: [{ id: 'c', name: 'Clear', requiredMarginDb: null, lines: own }] },
  })
  return error?.issues.map(({ path, message }) => [path.join('.'), message]) ?? []
}

/** Sentences against requirements that differ from the default ones. */
const sentences = (change: object) => requirements.safeParse({ ...defaultRequirements, ...change }).error?.issues.map(({ message }) => message)
const must = (kind: string, value: number) => sentences({ mustHaves: [{ id: 'R1', kind, value, reason: '' }] })

describe('a must-have has the limits of its kind', () => {
  it.each([
    ['margin', 101, 'Enter a required margin from −100 to 100 dB.'],
    ['netBitRate', -1, 'Enter a net bit rate from 0 to 1e9 Mbit/s.'],
    ['occupiedBandwidth', -5, 'Enter a bandwidth from 0 to 1e9 MHz.'],
    ['spectralEfficiency', -0.1, 'Enter a spectral efficiency from 0 to 100 bit/s/Hz.'],
    ['papr', -3, 'Enter a PAPR from 0 to 100 dB.'],
  ])('%s: not %d', (kind, value, sentence) => expect(must(kind, value)).toEqual([sentence]))
  it('margin: a negative one', () => expect(must('margin', -3)).toBeUndefined())
})

describe('a number that no link has is refused', () => {
  it('as what is held constant', () =>
    expect(sentences({ heldConstant: { kind: 'symbolRate', value: 1e-300 } })).toEqual(['Enter a value from 1e-9 to 1e9.']))
  it('as N0', () =>
    expect(sentences({ available: { from: 'noiseDensity', n0: 1e-320 } })).toEqual(['Enter N0 from 1e-30 to 1e12, in signal units squared.']))
})

describe('a link budget', () => {
  it('with one power and one noise line is taken', () => expect(mistakes([power('a', 'dBm'), noise], [])).toEqual([]))
  it('that mixes dBm and dBW is refused at the line of the other unit', () => {
    expect(mistakes([power('a', 'dBm'), noise], [power('b', 'dBW')])).toEqual([
      ['available.cases.0.lines.0.unit', '“Power a” is in dBm and “Power b” in dBW: use one unit in a link case.'],
    ])
  })
  it('without a noise line is refused at the case', () => {
    expect(mistakes([power('a', 'dBm')], [])).toEqual([
      ['available.cases.0.lines', 'A link case has exactly one noise line; this one has none.'],
    ])
  })
  it('with a second power is refused at its own line', () => {
    expect(mistakes([power('a', 'dBm'), power('b', 'dBm'), noise], []).map(([path]) => path)).toEqual(['available.lines.1.kind'])
  })
})
