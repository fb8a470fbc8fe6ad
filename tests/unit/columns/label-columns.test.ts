import { describe, expect, it } from 'vitest'
import { labelling, labels, probabilities, probabilityRule } from '../../../shared/columns/label-columns'
import { defaultInputs } from '../../../shared/schemas/candidates'

const four = { ...defaultInputs, family: 'pam' as const, order: 4 }

describe('own labels', () => {
  it('begin with those of the family', () => expect(labelling.parse('own', four)).toEqual({ change: { labelling: 'own', labels: ['00', '01', '11', '10'] } }))
  it('begin with natural ones where the row has these', () =>
    expect(labelling.parse('own', { ...four, labelling: 'natural' })).toEqual({ change: { labelling: 'own', labels: ['00', '01', '10', '11'] } }))
  it('stay as they were entered', () => expect(labelling.parse('own', { ...four, labels: ['11', '10', '00', '01'] })).toEqual({ change: { labelling: 'own' } }))
  it('begin with none where there are none', () => expect(labelling.parse('own', { ...four, family: 'psk', order: 12 })).toEqual({ change: { labelling: 'own', labels: null } }))
  it('are words of bits', () => expect(labels.parse('00, 01 11;10')).toEqual({ change: { labels: ['00', '01', '11', '10'] } }))
  it('name what is no word of bits', () => expect(labels.parse('00 02')).toEqual({ refused: '“02” is no label: enter words of bits such as 00 01 11 10, one a point.' }))
  it('are not used beside the family\'s', () => expect(labels.unused?.(four)).toBe('Used where the labels are your own only.'))
})

describe('own probabilities', () => {
  it('begin with all alike', () => expect(probabilityRule.parse('own', four)).toEqual({ change: { probabilityRule: 'own', probabilities: [0.25, 0.25, 0.25, 0.25] } }))
  it('may be fractions', () => expect(probabilities.parse('1/2 1/4 1/8 1/8')).toEqual({ change: { probabilities: [0.5, 0.25, 0.125, 0.125] } }))
  it('name what is none', () => expect(probabilities.parse('1/2 half')).toHaveProperty('refused', '“half” is no probability: enter numbers such as 0.25 or fractions such as 1/4, one a point.'))
})
