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
