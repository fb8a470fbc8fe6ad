import { describe, expect, it } from 'vitest'
import { parseAxis, sweepParameters, takenBy } from '~/utils/candidates/sweep-axis'
import { sweepAxis, sweepCreation, sweepFields } from '#shared/schemas/sweeps'

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

describe('published ring sets', () => {
  const sets = sweepParameters.find(parameter => parameter.value === 'preset')!.sets!
  it('are ticked six at a time for 16-APSK', () => expect(sets[0]!.values).toEqual(
    ['16-APSK 2/3', '16-APSK 3/4', '16-APSK 4/5', '16-APSK 5/6', '16-APSK 8/9', '16-APSK 9/10']))
  it('are ticked five at a time for 32-APSK', () => expect(sets[1]!.values).toHaveLength(5))
  it('leave nothing of what they set to be varied beside them', () =>
    expect(takenBy(['preset'])).toEqual(['preset', 'family', 'order', 'rings', 'ratios.0', 'ratios.1', 'ratios.2']))
  it('are not varied beside a ring ratio', () => expect(takenBy(['ratios.0'])).toContain('preset'))
  it.each(sweepFields)('agree with the server about what is varied beside $0', (field) => {
    const axes = [{ field: 'preset', values: ['16-APSK 2/3'] }, { field, values: [1] }]
    expect(sweepCreation.safeParse({ base: {}, axes }).success).toBe(!takenBy(['preset']).includes(field))
  })
})
