import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import { defaultInputs } from '#shared/schemas/candidates'
import { defaultRequirements } from '#shared/schemas/requirements'
import { canonicalInputs } from '#shared/study'
import { closePool } from '../../server/compute/pool'
import { closeDatabase, useDatabase } from '../../server/database/client'
import { candidates } from '../../server/database/schema'
import { enqueue } from '../../server/services/queue'
import { newId } from '../../server/utils/ids'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { allRows, ownStudy, Stream } from './own-study'

let owner: Client
beforeAll(async () => {
  process.env.DATABASE_URL = inject('databaseUrl')
  owner = await signIn('owner')
})
afterAll(async () => {
  await closePool()
  await closeDatabase()
})

/** Rows that only this process computes, as another server would; the worker breaks down over the one named. */
async function compute(study: string, count: number, broken: number): Promise<Candidate[]> {
  const stream = await Stream.open(owner, study)
  const rows = Array.from({ length: count }, (_, i) => {
    const inputs = canonicalInputs(defaultInputs, defaultRequirements)
    const key = newId().replaceAll('-', '').padEnd(64, '0')
    return { id: newId(), studyId: study, sweepId: null, key, inputs: i === broken ? { ...inputs, study: undefined as never } : inputs }
  })
  await useDatabase().insert(candidates).values(rows.map(({ id, key }, i) => (
    { id, studyId: study, position: i, inputs: { ...defaultInputs, name: `row ${i}` }, resultKey: key, errors: [] })))
  await enqueue(rows)
  await stream.until(() => rows.every(({ id }) => stream.rows.has(id)))
  await stream.close()
  return allRows(owner, study)
}

describe('a row over which its worker breaks down', () => {
  const sentence = 'The computation broke down twice. Change the row, or ask the administrator to look at the server\'s log.'

  it('fails with a sentence', async () => {
    const [row] = await compute(await ownStudy(owner, 'Alone'), 1, 0)
    expect([row!.state, row!.errors]).toEqual(['failed', [{ path: 'family', message: sentence }]])
  })
  it('takes no other row of its batch with it', async () => {
    const rows = await compute(await ownStudy(owner, 'Among others'), 30, 5)
    expect(rows.map(row => row.state).toSorted()).toEqual([...Array.from({ length: 29 }, () => 'computed'), 'failed'])
  })
})
