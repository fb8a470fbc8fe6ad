import { describe, expect, it } from 'vitest'
import { parseAxis, sweepParameters } from '~/utils/candidates/sweep-axis'
import { sweepAxis, sweepFields } from '#shared/schemas/sweeps'

describe('values of a swept parameter', () => {
  it('are a list', () => expect(parseAxis({ field: 'order', text: '4, 8 16' })).toEqual({ field: 'order', values: [4, 8, 16] }))
  it('are a range', () => expect(parseAxis({ field: 'ratios.0', text: '2 to 3 step 0.05' })).toEqual({ field: 'ratios.0', start: 2, stop: 3, step: 0.05 }))
  it('are sets of rings', () => expect(parseAxis({ field: 'rings', text: '4+12; 5+11' })).toEqual({ field: 'rings', values: [[4, 12], [5, 11]] }))
  it('are ticked words', () => expect(parseAxis({ field: 'family', text: 'psk,qam' })).toEqual({ field: 'family', values: ['psk', 'qam'] }))
  it('name what is no number', () => expect(parseAxis({ field: 'order', text: '4, many' })).toEqual({ refused: '“many” is not a number.' }))
  it('say what to type instead of a decimal comma', () => expect(parseAxis({ field: 'ratios.0', text: '2,57' }))
    .toEqual({ refused: '“2,57” has a comma: enter 2.57, with a point.' }))
  it('say the same of a range', () => expect(parseAxis({ field: 'ratios.0', text: '2 to 3 step 0,05' }))
    .toEqual({ refused: '“0,05” has a comma: enter 0.05, with a point.' }))
  it('are orders with a comma alone between them', () => expect(parseAxis({ field: 'order', text: '4,8' })).toEqual({ field: 'order', values: [4, 8] }))
  it('name what is no set of rings', () => expect(parseAxis({ field: 'rings', text: '4+x' })).toHaveProperty('refused'))
  it('are needed', () => expect(parseAxis({ field: 'order', text: ' ' })).toEqual({ refused: 'Enter at least one value.' }))
  it('are offered for every field that the server sweeps', () => expect(sweepParameters.map(p => p.value).sort()).toEqual([...sweepFields].sort()))
  it.each(sweepParameters.filter(p => p.example))('follow the example of $title', ({ value, example }) =>
    expect(sweepAxis.safeParse(parseAxis({ field: value, text: example })).success).toBe(true))
})
