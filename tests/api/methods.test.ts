import { describe, expect, it } from 'vitest'
import { checks } from '#shared/methods/checks'
import { coreVersion } from '#shared/modulation'
import type { ChecksAnswer, MethodsAnswer } from '#shared/schemas/methods'
import { anonymous, signIn } from '../support/client'

describe('GET /api/methods', () => {
  it('shows formulas as HTML with MathML', async () => {
    const { status, body } = await (await signIn('observer')).get<MethodsAnswer>('/api/methods')
    const evm = body.sections.flatMap(section => section.methods).find(({ id }) => id === 'evm')
    expect([status, evm?.formulas[0]?.html.slice(0, 20)]).toEqual([200, '<span class="katex-d'])
    expect(evm?.formulas[0]?.html).toContain('<math')
  })
  it('is for those who are signed in', async () => expect((await anonymous().get('/api/methods')).status).toBe(401))
})

describe('GET /api/methods/checks', () => {
  it('answers what the running build computes, all of it within tolerance', async () => {
    const { status, body } = await (await signIn('observer')).get<ChecksAnswer>('/api/methods/checks')
    expect([status, body.coreVersion, body.items.length, body.items.filter(({ holds }) => !holds)]).toEqual([200, coreVersion, checks.length, []])
  })
  it('is for those who are signed in', async () => expect((await anonymous().get('/api/methods/checks')).status).toBe(401))
})
