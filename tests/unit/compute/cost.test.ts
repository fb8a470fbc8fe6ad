import { describe, expect, it } from 'vitest'
import { evaluation } from '#shared/schemas/evaluate'
import { costIssues } from '../../../server/compute/cost'

const esN0Db = Array.from({ length: 1001 }, (_, i) => i / 50)
const paths = (constellation: object) =>
  costIssues(evaluation.parse({ constellation, esN0Db, quantities: ['serAllPairs'] })).map(issue => issue.path)

describe('the cost limit of an evaluation', () => {
  it('lets 256 points have their all-pairs sum', () => expect(paths({ family: 'qam', order: 256 })).toEqual([]))
  it('refuses it for 4096 points at 1,001 values', () => expect(paths({ family: 'qam', order: 4096 })).toEqual(['quantities']))
  it('lets 4096 points have it at 41 values', () =>
    expect(costIssues(evaluation.parse({ constellation: { family: 'qam', order: 4096 }, esN0Db: esN0Db.slice(0, 41), quantities: ['serAllPairs'] }))).toEqual([]))
  it('lets 256 scattered points have all quantities at 41 values', () => {
    const points = Array.from({ length: 256 }, (_, i) => [Math.cos(i * i), Math.sin(i * 3) * i / 256])
    const quantities = ['serExact', 'berExact', 'mutualInformation', 'bitMetricRate']
    expect(costIssues(evaluation.parse({ constellation: { family: 'custom', points }, esN0Db: esN0Db.slice(0, 41), quantities }))).toEqual([])
  })
  it('names the quantity that costs too much among others', () => {
    const issues = costIssues(evaluation.parse({ constellation: { family: 'psk', order: 4096 }, esN0Db: esN0Db.slice(0, 41), quantities: ['serExact', 'berExact'] }))
    expect([issues[0]!.path, issues[0]!.message.includes('Leave berExact out')]).toEqual(['quantities', true])
  })
  it('names points of many coordinates whose neighbours take too long', () => {
    const points = Array.from({ length: 1024 }, (_, i) => [Math.cos(i), Math.sin(i * i), i / 1024, Math.cos(i * i * i)])
    expect(costIssues(evaluation.parse({ constellation: { family: 'custom', points }, esN0Db: [10] }))[0]!.path).toBe('constellation.points')
  })
  it.each(['D4', 'E8'])('lets 256 points of %s have their neighbours', lattice =>
    expect(costIssues(evaluation.parse({ constellation: { family: 'lattice', lattice, order: 256 }, esN0Db: [10] }))).toEqual([]))
  it('names the order of a lattice cut whose neighbours take too long', () =>
    expect(costIssues(evaluation.parse({ constellation: { family: 'lattice', lattice: 'E8', order: 4096 }, esN0Db: [10] }))[0]!.path).toBe('constellation.order'))
  it('names the factors of a product with such a cut', () => {
    const factors = [{ family: 'lattice', lattice: 'E8', order: 2048 }, { family: 'pam', order: 2 }]
    expect(costIssues(evaluation.parse({ constellation: { family: 'product', factors }, esN0Db: [10] }))[0]!.path).toBe('constellation.factors')
  })
  it('counts the rings of APSK', () => expect(paths({ family: 'apsk', rings: [2048, 2048], ratios: [2] })).toEqual(['quantities']))
})
