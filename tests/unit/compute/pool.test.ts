import { afterAll, describe, expect, it } from 'vitest'
import { defaultInputs } from '#shared/schemas/candidates'
import { defaultRequirements } from '#shared/schemas/requirements'
import { canonicalInputs } from '#shared/study'
import { closePool, compute, ComputationFailed } from '../../../server/compute/pool'
import { randomFrom } from '../modulation/seeded'

const row = canonicalInputs(defaultInputs, defaultRequirements)
const broken = { ...row, study: null as unknown as typeof row.study }
const random = randomFrom(1)
/** Takes ten seconds and more: 4,096 scattered points, all pairs at 1,001 values. */
const long = {
  kind: 'evaluation' as const,
  asked: {
    constellation: { family: 'custom', points: Array.from({ length: 4096 }, () => [random(), random()]) },
    esN0Db: Array.from({ length: 1001 }, (_, i) => i / 50), quantities: ['serAllPairs'],
  },
}

afterAll(closePool)

describe('the worker pool', () => {
  it('computes rows in order', async () => {
    const other = canonicalInputs({ ...defaultInputs, order: 64 }, defaultRequirements)
    const answers = await compute({ kind: 'rows', asked: [row, other] }, { priority: 'bulk' })
    expect(answers.map(answer => answer.values!.order)).toEqual([16, 64])
  })
  it('says with one sentence that a computation broke down', async () => {
    await expect(compute({ kind: 'rows', asked: [broken] }, { priority: 'interactive' })).rejects.toThrow(ComputationFailed)
  })
  it('gives the refusals of the core as data', async () => {
    const asked = { constellation: { family: 'psk', order: 1 }, esN0Db: [1] }
    expect(await compute({ kind: 'evaluation', asked }, { priority: 'interactive' })).toEqual({
      issues: [{ path: 'constellation.order', message: 'PSK has any whole number of points from 2 to 4096.' }],
    })
  })
  it('stops a running task when its caller goes away, and goes on', async () => {
    const caller = new AbortController()
    const going = compute(long, { priority: 'interactive', signal: caller.signal })
    caller.abort(new Error('gone'))
    await expect(going).rejects.toThrow('gone')
    expect(await compute({ kind: 'rows', asked: [row] }, { priority: 'interactive' })).toHaveLength(1)
  })
  it('keeps a worker free while there is interactive work', async () => {
    await compute({ kind: 'rows', asked: [row] }, { priority: 'interactive' })
    const caller = new AbortController()
    const going = [1, 2, 3].map(() => compute(long, { priority: 'bulk', signal: caller.signal }).catch(() => 'stopped'))
    expect(await compute({ kind: 'rows', asked: [row] }, { priority: 'interactive' })).toHaveLength(1)
    caller.abort()
    expect(await Promise.all(going)).toEqual(['stopped', 'stopped', 'stopped'])
  })
  it('computes rows while evaluations wait for one another', async () => {
    const caller = new AbortController()
    const going = Array.from({ length: 5 }, () => compute(long, { priority: 'evaluation', signal: caller.signal }).catch(() => 'stopped'))
    expect(await compute({ kind: 'rows', asked: [row] }, { priority: 'interactive' })).toHaveLength(1)
    caller.abort()
    expect(new Set(await Promise.all(going))).toEqual(new Set(['stopped']))
  })
})
