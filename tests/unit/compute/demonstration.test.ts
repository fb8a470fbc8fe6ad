import { describe, expect, it } from 'vitest'
import { valueOf } from '#shared/modulation'
import { canonicalInputs, inputIssues } from '#shared/study'
import { evaluateCandidate } from '../../../server/compute/evaluate-candidate'
import { ridgeLink, ridgeRows } from '../../../server/services/demonstration-study'

/** The study's nine named rows: required Es/N0, simulated back-off and margin in dB, and whether they pass. */
const stated: [string, number, number, number, boolean][] = [
  ['5+11 at 2.20', 20.84, 4.89, 1.52, true],
  ['hexagonal 16', 20.44, 5.31, 1.50, true],
  ['1+5+10 at 1.95', 20.87, 5.06, 1.32, true],
  ['4+12 at 2.57', 21.41, 4.77, 1.08, true],
  ['16-QAM', 20.92, 5.47, 0.86, false],
  ['4+12 at 3.15', 22.17, 4.83, 0.26, false],
  ['16-PSK', 24.97, 4.04, -1.76, false],
  ['cross 32', 23.96, 5.29, -2.00, false],
  ['8-PSK', 19.12, 4.03, 4.10, false],
]

const valuesOf = (name: string) =>
  evaluateCandidate(canonicalInputs(ridgeRows.find(row => row.name === name)!, ridgeLink.requirements)).values!

describe('the demonstration study', () => {
  it('has 24 rows', () => expect(ridgeRows).toHaveLength(24))
  it('has no row with a contradiction', () => expect(ridgeRows.flatMap(inputIssues)).toEqual([]))
  it('has one reference', () => expect(ridgeRows.filter(row => row.role === 'reference').map(row => row.name)).toEqual(['16-QAM']))

  for (const [name, required, backOff, margin, passes] of stated) {
    it(`requires ${required} dB of ${name}, to 0.01 dB`, () => expect(Math.abs(valueOf(valuesOf(name).requiredEsN0Db!) - required)).toBeLessThan(0.01))
    it(`backs ${name} off by ${backOff} dB, to 0.05 dB`, () => expect(Math.abs(valuesOf(name).backOffDb! - backOff)).toBeLessThan(0.05))
    it(`leaves ${name} a margin of ${margin} dB, to 0.05 dB`, () => expect(Math.abs(valueOf(valuesOf(name).marginDb!) - margin)).toBeLessThan(0.05))
    it(`${passes ? 'passes' : 'fails'} ${name}`, () => expect(valuesOf(name).passes).toBe(passes))
  }
  it('decides by the faded case', () => expect(valuesOf('16-QAM').decidingCase).toBe('Faded'))
  it('has 28.75 dB at saturation in the faded case', () =>
    expect(valuesOf('16-QAM').availableEsN0Db! + valuesOf('16-QAM').backOffDb!).toBeCloseTo(28.75, 2))
  it('has 45.95 dB at saturation in the clear case', () =>
    expect(valuesOf('16-QAM').cases[0]!.availableEsN0Db! + valuesOf('16-QAM').backOffDb!).toBeCloseTo(45.95, 2))
})
