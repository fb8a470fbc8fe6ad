import { beforeAll, describe, expect, it } from 'vitest'
import type { StartedSweep, Sweep, SweepCancellation } from '#shared/schemas/sweeps'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { otherServer } from './other-server'
import { allRows, ownStudy, Stream } from './own-study'
import type { Refused } from './own-study'

let owner: Client
beforeAll(async () => {
  owner = await signIn('owner')
})

const rings = { family: 'apsk', rings: [4, 12] }
const ratios = (step: number) => ({ field: 'ratios.0', start: 2, stop: 3, step })
/** Hundreds of rows that no other test has computed: each has a roll-off and an implementation loss of its own. */
const long = (loss: number) => ({
  base: { family: 'qam', order: 256, implementationLossDb: loss },
  axes: [{ field: 'rollOff', start: 0.1, stop: 0.9, step: 0.004 }, { field: 'order', values: [64, 128, 256] }],
})
const begin = <Body = Sweep>(client: Client, study: string, definition: object) => client.post<Body>(`/api/studies/${study}/sweeps`, definition)
const sweepOf = async (client: Client, study: string) => (await client.get<{ items: Sweep[] }>(`/api/studies/${study}/sweeps`)).body.items[0]!

/** Waits by the study's events until its sweep has ended. */
async function ended(client: Client, study: string): Promise<Sweep> {
  const stream = await Stream.open(client, study)
  const last = () => stream.received.findLast(({ data }) => data.sweep)?.data.sweep
  if ((await sweepOf(client, study)).state === 'running') await stream.until(() => (last()?.state ?? 'running') !== 'running')
  await stream.close()
  return sweepOf(client, study)
}

describe('a sweep', () => {
  it('answers at once with the number of its rows', async () => {
    const { status, body } = await begin(owner, await ownStudy(owner, 'Count'), { base: rings, axes: [ratios(0.01)] })
    expect([status, body.total, body.state]).toEqual([202, 101, 'running'])
  })
  it('makes and computes all its rows', async () => {
    const study = await ownStudy(owner, 'All rows')
    await begin(owner, study, { base: rings, axes: [ratios(0.02)] })
    expect(await ended(owner, study)).toMatchObject({ state: 'done', total: 51, made: 51, computed: 51 })
    expect((await allRows(owner, study)).filter(row => row.state === 'computed')).toHaveLength(51)
  })
  it('makes its rows in the order of its parameters', async () => {
    const study = await ownStudy(owner, 'In order')
    await begin(owner, study, { base: rings, axes: [ratios(0.25)] })
    await ended(owner, study)
    expect((await allRows(owner, study)).map(row => row.inputs.ratios)).toEqual([[2], [2.25], [2.5], [2.75], [3]])
  })
  it('leaves out what a family cannot have', async () => {
    const axes = [{ field: 'family', values: ['psk', 'cross-qam'] }, { field: 'order', values: [16, 32] }]
    expect((await begin(owner, await ownStudy(owner, 'Left out'), { base: {}, axes })).body.total).toBe(3)
  })
  it('says how much it leaves out, and why', async () => {
    const axes = [{ field: 'family', values: ['psk', 'cross-qam'] }, { field: 'order', values: [16, 32] }]
    const { body } = await begin<StartedSweep>(owner, await ownStudy(owner, 'Left out and told'), { base: {}, axes })
    expect(body.leftOut).toEqual({ count: 1, reason: 'Cross QAM has 32, 128 or 512 points.' })
  })
  it('makes the published ring sets, each with its own pair of ratios and its phases', async () => {
    const study = await ownStudy(owner, 'Presets')
    await begin(owner, study, { base: {}, axes: [{ field: 'preset', values: ['16-APSK 9/10', '32-APSK 3/4', '32-APSK 4/5'] }] })
    await ended(owner, study)
    expect((await allRows(owner, study)).map(({ inputs }) => [inputs.name, inputs.phasesDeg])).toEqual([
      ['4+12 at 2.57', [45, 15]], ['4+12+16 at 2.84, 5.27', [45, 15, 0]], ['4+12+16 at 2.72, 4.87', [45, 15, 0]],
    ])
  })
  it('is refused above 10,000 rows', async () => {
    const study = await ownStudy(owner, 'Too many')
    const axes = [ratios(0.01), { field: 'rollOff', start: 0, stop: 1, step: 0.01 }]
    const { status, body } = await begin<Refused>(owner, study, { base: rings, axes })
    expect([status, body.detail]).toEqual([422, 'This sweep makes 10,201 rows; at most 10,000 are possible. Shorten a list or a range.'])
    expect((await owner.get<{ items: Sweep[] }>(`/api/studies/${study}/sweeps`)).body.items).toEqual([])
  })
  it('is refused while others are about to fill the study', async () => {
    const study = await ownStudy(owner, 'Three at once')
    const axes = [{ field: 'rollOff', start: 0, stop: 1, step: 0.001 }, { field: 'implementationLossDb', start: 0, stop: 8, step: 1 }]
    const answers = await Promise.all([1, 2, 3].map(() => begin(owner, study, { base: { family: 'psk', order: 4, backOff: 'papr' }, axes })))
    for (const sweep of (await owner.get<{ items: Sweep[] }>(`/api/studies/${study}/sweeps`)).body.items) await owner.delete(`/api/sweeps/${sweep.id}`)
    expect(answers.map(answer => answer.status).sort()).toEqual([202, 202, 422])
  })

  const bad: [string, object, string][] = [
    ['a range that runs backwards', { base: rings, axes: [{ ...ratios(0.1), stop: 1 }] }, 'axes.0.stop'],
    ['a range of more than 1,001 values', { base: rings, axes: [ratios(0.0009)] }, 'axes.0.step'],
    ['a value that the field cannot have', { base: {}, axes: [{ field: 'order', values: [4, 'many'] }] }, 'axes.0.values.1'],
    ['a parameter that does not exist', { base: {}, axes: [{ field: 'colour', values: [1] }] }, 'axes.0.field'],
    ['a parameter that is varied twice', { base: rings, axes: [ratios(0.1), ratios(0.2)] }, 'axes'],
    ['a preset that the standard does not have', { base: {}, axes: [{ field: 'preset', values: ['64-APSK 2/3'] }] }, 'axes.0.values.0'],
    ['a preset beside what it sets', { base: {}, axes: [{ field: 'preset', values: ['16-APSK 2/3'] }, ratios(0.1)] }, 'axes'],
    ['an unknown field of the base', { base: { colour: 'red' }, axes: [ratios(0.1)] }, 'base.colour'],
  ]
  for (const [what, definition, path] of bad) {
    it(`is refused for ${what}`, async () => {
      const { status, body } = await begin<Refused>(owner, await ownStudy(owner, 'Refused'), definition)
      expect([status, body.errors![0]!.path]).toEqual([422, path])
    })
  }
})

describe('a sweep that is cancelled', () => {
  it('keeps the rows that are computed and says how many it removed', async () => {
    const study = await ownStudy(owner, 'Cancelled')
    const { body: sweep } = await begin(owner, study, long(0.1))
    const stream = await Stream.open(owner, study)
    await stream.until(() => [...stream.rows.values()].some(row => row.state === 'computed'))
    const { body } = await owner.delete<SweepCancellation>(`/api/sweeps/${sweep.id}`)
    await stream.close()
    const rows = await allRows(owner, study)
    expect([body.state, body.removed > 0, rows.length, rows.every(row => row.state === 'computed')]).toEqual(['cancelled', true, body.kept, true])
  })
  it('stays as it is when it has ended', async () => {
    const study = await ownStudy(owner, 'Ended')
    await begin(owner, study, { base: rings, axes: [ratios(0.5)] })
    const { id } = await ended(owner, study)
    expect((await owner.delete<SweepCancellation>(`/api/sweeps/${id}`)).body).toMatchObject({ state: 'done', removed: 0, kept: 3 })
  })
})

describe('a server that is killed in the middle of a sweep', () => {
  it('loses no row and doubles none', async () => {
    const first = await otherServer()
    const study = await ownStudy(first.client, 'Killed')
    await begin(first.client, study, long(0.2))
    const stream = await Stream.open(owner, study)
    await stream.until(() => [...stream.rows.values()].some(row => row.state === 'computed'))
    await stream.close()
    await first.kill()

    const second = await otherServer()
    const { total, computed } = await ended(second.client, study)
    const rows = await allRows(second.client, study)
    await second.stop()
    const kinds = new Set(rows.map(({ inputs }) => `${inputs.order} ${inputs.rollOff}`))
    expect([computed, rows.length, kinds.size]).toEqual([total, total, total])
  })
})
