import { describe, expect, it } from 'vitest'
import { expandSweep } from '#shared/study'

const ringSweep = { field: 'ratios.0' as const, start: 2, stop: 3, step: 0.25 }
const rings = { family: 'apsk' as const, rings: [4, 12] }

describe('a sweep multiplied out', () => {
  it('counts the values of a range', () => expect(expandSweep({ base: rings, axes: [ringSweep] }).rows).toBe(5))
  it('makes the last row from the end of the range', () => expect(expandSweep({ base: rings, axes: [ringSweep] }).make(4).ratios).toEqual([3]))
  it('names rows after their parameters', () => expect(expandSweep({ base: rings, axes: [ringSweep] }).make(1).name).toBe('4+12 at 2.25'))
  it('numbers the rows of a name', () => expect(expandSweep({ base: { ...rings, name: 'Rings' }, axes: [ringSweep] }).make(1).name).toBe('Rings 2'))
  it('runs the last parameter fastest', () => {
    const plan = expandSweep({ base: {}, axes: [{ field: 'family', values: ['qam', 'psk'] }, { field: 'order', values: [4, 16] }] })
    expect([0, 1, 2, 3].map(i => plan.make(i).name)).toEqual(['4-QAM', '16-QAM', 'QPSK', '16-PSK'])
  })
  it('counts what a family cannot have, with the reason', () => {
    const plan = expandSweep({ base: {}, axes: [{ field: 'family', values: ['psk', 'cross-qam'] }, { field: 'order', values: [16, 32] }] })
    expect([plan.rows, plan.leftOut]).toEqual([3, { count: 1, reason: 'Cross QAM has 32, 128 or 512 points.' }])
  })
  it('makes a row once where its numbers do not depend on a parameter', () => {
    const plan = expandSweep({ base: { ratios: [2.5], rings: [4, 12] }, axes: [{ field: 'family', values: ['qam', 'apsk'] }, ringSweep] })
    expect([plan.rows, plan.leftOut.count]).toEqual([6, 4])
  })
  it('makes a row once where a list has a value twice', () => {
    const plan = expandSweep({ base: { family: 'psk' }, axes: [{ field: 'order', values: [8, 16, 8] }] })
    expect([plan.rows, plan.leftOut]).toEqual([2, { count: 1, reason: 'A value stands twice in the list for the order M: it is used once.' }])
  })
  it('says so when no combination makes a row', () =>
    expect(expandSweep({ base: {}, axes: [{ field: 'family', values: ['cross-qam'] }] }).issues).toEqual([
      { path: 'axes', message: 'No combination makes a row. Cross QAM has 32, 128 or 512 points.' },
    ]))
  it('refuses a range that runs backwards', () =>
    expect(expandSweep({ base: rings, axes: [{ ...ringSweep, stop: 1 }] }).issues[0]!.path).toBe('axes.0.stop'))
  it('refuses a range of more than 1,001 values', () =>
    expect(expandSweep({ base: rings, axes: [{ ...ringSweep, step: 0.0009 }] }).issues[0]!.path).toBe('axes.0.step'))
  it('names a value that a field cannot have', () =>
    expect(expandSweep({ base: {}, axes: [{ field: 'order', values: [4, 'many'] }] }).issues).toEqual([
      { path: 'axes.0.values.1', message: 'Order M is a whole number from 2 to 4096.' },
    ]))
  it('makes 10,000 rows', () => {
    const axes = [{ ...ringSweep, step: 0.01 }, { field: 'rollOff' as const, start: 0.01, stop: 0.99, step: 0.01 }]
    expect(expandSweep({ base: rings, axes }).rows).toBe(101 * 99)
  })
  it('refuses more than 10,000 rows', () => {
    const axes = [{ ...ringSweep, step: 0.01 }, { field: 'rollOff' as const, start: 0, stop: 1, step: 0.01 }]
    expect(expandSweep({ base: rings, axes }).issues[0]!.message)
      .toBe('This sweep makes 10,201 rows; at most 10,000 are possible. Shorten a list or a range.')
  })
  it('does not look through millions of combinations', () => {
    const range = { start: 0, stop: 1, step: 0.001 }
    expect(expandSweep({ base: {}, axes: [{ field: 'rollOff', ...range }, { field: 'implementationLossDb', ...range }] }).issues[0]!.message)
      .toBe('These parameters make 1,002,001 combinations; a sweep makes at most 10,000 rows. Shorten a list or a range.')
  })
})

describe('a sweep over published ring sets', () => {
  const sets = { base: {}, axes: [{ field: 'preset' as const, values: ['16-APSK 9/10', '32-APSK 3/4', '32-APSK 9/10'] }] }
  it('makes a row of each', () => expect(expandSweep(sets).rows).toBe(3))
  it('pairs the two ratios of 32-APSK as the standard does', () =>
    expect([1, 2].map(i => expandSweep(sets).make(i).ratios)).toEqual([[2.84, 5.27], [2.53, 4.3]]))
  it('turns the outer ring of 32-APSK to 0°', () => expect(expandSweep(sets).make(1).phasesDeg).toEqual([45, 15, 0]))
  it('makes APSK rows whatever the start is', () =>
    expect(expandSweep({ ...sets, base: { family: 'qam', order: 64 } }).make(0)).toMatchObject({ family: 'apsk', order: 16, rings: [4, 12] }))
  it('is multiplied out with other parameters', () =>
    expect(expandSweep({ base: {}, axes: [...sets.axes, { field: 'rollOff', values: [0.1, 0.2] }] }).rows).toBe(6))
  it('names what is no title of the standard', () => {
    const [issue] = expandSweep({ base: {}, axes: [{ field: 'preset', values: ['16-APSK 2/3', '64-APSK 2/3'] }] }).issues
    expect([issue!.path, issue!.message.slice(0, 46)]).toEqual(['axes.0.values.1', 'A preset is one of 16-APSK 2/3, 16-APSK 3/4, 1'])
  })
})
