import { beforeAll, describe, expect, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import type { StudySummary } from '#shared/schemas/studies'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { allRows, Stream } from './own-study'

let observer: Client
let studies: StudySummary[]
beforeAll(async () => {
  observer = await signIn('observer')
  studies = (await observer.get<{ items: StudySummary[] }>('/api/studies')).body.items
})

const named = (name: string) => studies.find(study => study.name === name)!

/** Rows of a study when all of them have their numbers. */
async function computedRows(study: string): Promise<Candidate[]> {
  const stream = await Stream.open(observer, study)
  const rows = new Map((await allRows(observer, study)).map(row => [row.id, row]))
  const waiting = () => [...rows.keys()].filter(id => (stream.rows.get(id) ?? rows.get(id)!).state === 'computing')
  await stream.until(() => waiting().length === 0)
  await stream.close()
  return allRows(observer, study)
}

describe('the demonstration', () => {
  // Other tests make studies of their own beside them.
  it('has three studies', () => expect(studies.map(study => study.name)).toEqual(expect.arrayContaining(
    ['Buoy to shore', 'Ridge station to valley gateway', 'Ring ratios of sixteen points'])))
  it('passes 5+11, hexagonal 16, 1+5+10, the usual 4+12 at small ratios and 6+10', async () => {
    const rows = await computedRows(named('Ridge station to valley gateway').id)
    expect(rows.filter(row => row.values!.passes).map(row => row.inputs.name)).toEqual([
      '4+12 at 2.57', '5+11 at 2.20', 'hexagonal 16', '1+5+10 at 1.95', '4+12 at 2.60', '4+12 at 2.70', '6+10 at 2.00',
    ])
  })
  it('takes 4+12 at 2.57 for its published labels', async () => {
    const rows = await allRows(observer, named('Ridge station to valley gateway').id)
    expect(rows.find(row => row.inputs.role === 'chosen')!.inputs.name).toBe('4+12 at 2.57')
  })
  it('pins four rows', async () => {
    const rows = await allRows(observer, named('Ridge station to valley gateway').id)
    expect(rows.flatMap(row => row.pin ?? [])).toEqual([1, 2, 3, 4])
  })
  it('sweeps 200 rows over ring ratios', async () =>
    expect((await computedRows(named('Ring ratios of sixteen points').id)).filter(row => row.state === 'computed')).toHaveLength(200))
  it('has an empty study', async () => expect(await allRows(observer, named('Buoy to shore').id)).toEqual([]))
})
