import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { Study, StudySummary } from '#shared/schemas/studies'
import { closeDatabase, useDatabase } from '../../server/database/client'
import { appendEvent } from '../../server/services/events'
import { countsQuery, rowSummaries } from '../../server/services/row-summaries'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { databaseConnection } from './database-of-test'
import { ownRow, ownStudy } from './own-study'

const database = databaseConnection()
let owner: Client
beforeAll(async () => {
  process.env.DATABASE_URL = inject('databaseUrl')
  owner = await signIn('owner')
})
afterAll(async () => {
  delete process.env.DATABASE_URL
  await closeDatabase()
})

async function eventNumber(study: string): Promise<number> {
  const [rows] = await database().query('select event_number as n from studies where id = ?', [study])
  return Number((rows as { n: number }[])[0]!.n)
}
const counted = async (study: string) => (await rowSummaries([{ id: study, eventNumber: await eventNumber(study) }])).get(study)!.candidates
const listed = async (study: string) =>
  (await owner.get<{ items: StudySummary[] }>('/api/studies')).body.items.find(({ id }) => id === study)!

describe('what the list of studies tells of rows', () => {
  it('is read again once the study has had an event, and not before', async () => {
    const study = await ownStudy(owner, 'Counted once')
    await ownRow(owner, study)
    const before = await counted(study)
    // Behind the application's back: no event says so.
    await database().query('update candidates set deleted_at = current_timestamp(3) where study_id = ?', [study])
    const unread = await counted(study)
    await useDatabase().transaction(tx => appendEvent(tx, study, { study: true }))
    expect([before, unread, await counted(study)]).toEqual([1, 1, 0])
  })
  it('follows rows that are added, computed, changed, deleted and restored', async () => {
    const study = await ownStudy(owner, 'Followed')
    const empty = await listed(study)
    const row = await ownRow(owner, study, { name: 'leader', family: 'psk', order: 4 })
    await expect.poll(async () => (await listed(study)).leading?.name, { timeout: 20_000 }).toBe('leader')
    await owner.patch(`/api/candidates/${row.id}`, { name: 'renamed' }, { 'if-match': `"${row.version}"` })
    const renamed = await listed(study)
    await owner.post(`/api/studies/${study}/candidates/delete`, { ids: [row.id] })
    const deleted = await listed(study)
    await owner.post(`/api/studies/${study}/candidates/restore`, { ids: [row.id] })
    const restored = await listed(study)
    expect([empty, renamed, deleted, restored].map(({ candidates, leading }) => [candidates, leading?.name])).toEqual([
      [0, undefined], [1, 'renamed'], [0, undefined], [1, 'renamed'],
    ])
  })
  it('is there for a copy at once', async () => {
    const study = await ownStudy(owner, 'Copied from')
    await ownRow(owner, study)
    await ownRow(owner, study)
    const { body: copy } = await owner.post<Study>('/api/studies', { name: 'Copied to', copyOf: study })
    expect((await listed(copy.id)).candidates).toBe(2)
  })
  it('comes from indexes alone, never from the wide rows of results', async () => {
    const { sql, params } = countsQuery([await ownStudy(owner, 'Planned')]).toSQL()
    const [plan] = await database().query(`explain ${sql}`, params)
    expect((plan as { key: string, Extra: string }[]).map(({ key, Extra }) => [key, Extra.includes('Using index')])).toEqual([
      ['candidates_summary', true], ['results_summary', true],
    ])
  })
})
