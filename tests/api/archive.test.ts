import { beforeAll, describe, expect, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import type { Problem } from '#shared/schemas/common'
import { defaultRequirements } from '#shared/schemas/requirements'
import type { Study } from '#shared/schemas/studies'
import { accountOf, signIn } from '../support/client'
import type { Client } from '../support/client'
import { allRows, change, ownRow } from './own-study'

let owner: Client
let study: Study
let row: Candidate

const patch = <Body = Problem>(changes: object) => owner.patch<Body>(`/api/studies/${study.id}`, changes, { 'if-match': `"${study.version}"` })

beforeAll(async () => {
  owner = await signIn('owner')
  study = (await owner.post<Study>('/api/studies', { name: 'Shut away' })).body
  row = await ownRow(owner, study.id)
  study = (await patch<Study>({ archived: true })).body
})

const sentence = 'This study is archived: it can be read and exported. Take it back into work to change it.'

describe('an archived study does not take', () => {
  const below = (path: string) => `/api/studies/${study.id}/${path}`
  const sweep = { base: { family: 'psk' }, axes: [{ field: 'order', values: [4, 8] }] }
  const calls: [string, () => Promise<{ status: number, body: Problem }>][] = [
    ['a new row', () => owner.post(below('candidates'), {})],
    ['a duplicate of a row', () => owner.post(below('candidates/duplicate'), { ids: [row.id] })],
    ['another order of its rows', () => owner.post(below('candidates/move'), { ids: [row.id], after: null })],
    ['the deletion of rows', () => owner.post(below('candidates/delete'), { ids: [row.id] })],
    ['a sweep', () => owner.post(below('sweeps'), sweep)],
    ['a pin', () => owner.put(below('pins'), { candidate: row.id, pinned: true })],
    ['a change of a row', () => change<Problem>(owner, row, { order: 4 })],
    ['the deletion of a row', () => owner.delete(`/api/candidates/${row.id}`, undefined, { 'if-match': '"1"' })],
    ['a new name', () => patch({ name: 'Other' })],
    ['other requirements', () => patch({ requirements: { ...defaultRequirements, rollOff: 0.4 } })],
  ]
  it.each(calls)('%s', async (_, call) => {
    const { status, body } = await call()
    expect([status, body.detail]).toEqual([409, sentence])
  })
})

describe('an archived study', () => {
  it('is read and exported', async () => {
    expect([(await allRows(owner, study.id)).length, (await owner.get(`/api/studies/${study.id}/export.csv`)).status]).toEqual([1, 200])
  })
  it('takes new members', async () => {
    expect((await owner.put(`/api/studies/${study.id}/members`, { email: accountOf('observer').email, role: 'observer' })).status).toBe(200)
  })
  it('is duplicated into one in work', async () => {
    const { status, body } = await owner.post<Study>('/api/studies', { name: 'Taken up', copyOf: study.id })
    expect([status, body.archivedAt, (await allRows(owner, body.id)).length]).toEqual([201, null, 1])
  })
  it('takes rows again once it is back in work', async () => {
    const { status } = await patch({ archived: false })
    expect([status, (await owner.post(`/api/studies/${study.id}/candidates`, {})).status]).toEqual([200, 201])
  })
})
