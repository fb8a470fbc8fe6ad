import { afterAll, describe, expect, it } from 'vitest'
import { closePool } from '../../../server/compute/pool'
import { checkValues, methodsPage } from '../../../server/services/methods'
import { columns } from '../../../shared/columns'
import { checks } from '../../../shared/methods/checks'
import { coreVersion } from '../../../shared/modulation'
import { methodsAnswer } from '../../../shared/schemas/methods'

const page = methodsPage()
const methods = page.sections.flatMap(section => section.methods)
const publishedOf = (id: string) => methods.flatMap(method => method.checks).find(check => check.id === id)
afterAll(closePool)

describe('the page of methods', () => {
  it('is as the API describes it', () => expect(methodsAnswer.parse(page)).toEqual(page))
  it('shows every column once', () => {
    const shown = [...methods.flatMap(method => method.columns), ...page.entered].map(({ id }) => id)
    expect(shown.sort()).toEqual(columns.map(({ id }) => id).sort())
  })
  it('shows every published value once', () => expect(methods.flatMap(method => method.checks).length).toBe(checks.length))
  it('numbers sources as it names them', () => expect(methods[0]?.sources).toEqual([1]))
  it('names no source that it does not list', () => {
    const named = methods.flatMap(method => [...method.sources, ...method.checks.map(({ source }) => source)])
    expect(Math.max(...named)).toBe(page.sources.length)
  })
  it('shows a printed value as printed', () => expect(publishedOf('rateThreshold-6')?.published).toBe('2.040'))
  it('shows ten digits of a closed form', () => expect(publishedOf('exactSer-1')?.published).toBe('0.06674188215'))
  it('sets formulas for the eye and for the ear', () => {
    expect(methods.find(({ id }) => id === 'evm')?.formulas[0]?.html).toMatch(/<math.*aria-hidden="true"/s)
  })
})

describe('the values that this build computes', () => {
  it('hold, every one', { timeout: 60_000 }, async () => {
    const { items, coreVersion: version } = await checkValues()
    expect([items.filter(({ holds }) => !holds), items.length, version]).toEqual([[], checks.length, coreVersion])
  })
  it('are computed once', () => expect(checkValues()).toBe(checkValues()))
})
