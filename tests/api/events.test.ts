import { beforeAll, describe, expect, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import type { CreatedToken } from '#shared/schemas/session'
import { accountOf, signIn, withToken } from '../support/client'
import type { Client } from '../support/client'
import { otherServer } from './other-server'
import { change, ownRow, ownStudy, Stream } from './own-study'
import type { Rows } from './own-study'
import { ownPerson } from './people-of-test'

let owner: Client
beforeAll(async () => {
  owner = await signIn('owner')
})

describe('events of a study', () => {
  it('begin with the number that a page has to come back with', async () => {
    const stream = await Stream.open(owner, await ownStudy(owner, 'Begin'))
    expect(typeof stream.received[0]!.id).toBe('number')
    await stream.close()
  })
  it('bring a changed row with its computed cells', async () => {
    const study = await ownStudy(owner, 'Changed')
    const row = await ownRow(owner, study)
    const stream = await Stream.open(owner, study)
    await change(owner, row, { order: 64, implementationLossDb: 0.75 })
    await stream.until(() => stream.rows.get(row.id)?.state === 'computed')
    expect(stream.rows.get(row.id)!.values!.bitsPerSymbol).toBe(6)
    await stream.close()
  })
  it('are numbered one after another', async () => {
    const study = await ownStudy(owner, 'Numbers')
    const stream = await Stream.open(owner, study)
    const start = stream.received[0]!.id!
    for (const name of ['a', 'b', 'c']) await ownRow(owner, study, { name, family: 'psk', order: 4 })
    await stream.until(() => [...stream.rows.values()].filter(row => row.state === 'computed').length === 3)
    const numbers = stream.received.flatMap(({ id }) => id ?? [])
    expect([numbers[0], numbers.every((number, i) => i === 0 || number > numbers[i - 1]!)]).toEqual([start, true])
    await stream.close()
  })
  it('name the rows that are gone', async () => {
    const study = await ownStudy(owner, 'Gone')
    const row = await ownRow(owner, study)
    const stream = await Stream.open(owner, study)
    await owner.post(`/api/studies/${study}/candidates/delete`, { ids: [row.id] })
    await stream.until(() => stream.received.some(({ data }) => data.removed?.includes(row.id)))
    await stream.close()
  })
  it('bring many rows in one message', async () => {
    const study = await ownStudy(owner, 'Together')
    const stream = await Stream.open(owner, study)
    await owner.post(`/api/studies/${study}/candidates`, { items: Array.from({ length: 300 }, () => ({})) })
    await stream.until(() => stream.rows.size === 300)
    expect(stream.received.find(({ data }) => data.rows)!.data.rows).toHaveLength(300)
    await stream.close()
  })
  it('are repeated from the last one that a page has, as few messages', async () => {
    const study = await ownStudy(owner, 'Replay')
    let row = await ownRow(owner, study, { name: 'kept' })
    const gone = await ownRow(owner, study, { name: 'gone' })
    const before = await Stream.open(owner, study)
    const { id } = before.received[0]!
    await before.close()
    for (const note of ['one', 'two', 'three']) row = (await change(owner, row, { note })).body
    await owner.post(`/api/studies/${study}/candidates/delete`, { ids: [gone.id] })
    const after = await Stream.open(owner, study, id!)
    await after.until(() => after.received.some(({ data }) => data.removed))
    expect(after.received.flatMap(({ data }) => data.rows ?? []).map(({ inputs }) => inputs.note)).toEqual(['three'])
    expect(after.received.flatMap(({ data }) => data.removed ?? [])).toEqual([gone.id])
    await after.close()
  })
  it('bring what a page missed that names its last event in the address', async () => {
    const study = await ownStudy(owner, 'Taken over')
    const row = await ownRow(owner, study)
    const before = await Stream.open(owner, study)
    const { id } = before.received[0]!
    await before.close()
    await change(owner, row, { note: 'missed' })
    const after = await Stream.open(owner, study, undefined, `?after=${id}`)
    expect(after.received[0]!.data.rows?.map(({ inputs }) => inputs.note)).toEqual(['missed'])
    await after.close()
  })
  it('are refused after what is no number', async () => {
    const { status } = await owner.get(`/api/studies/${await ownStudy(owner, 'No number')}/events?after=latest`)
    expect(status).toBe(422)
  })
  it('ask a page to load the rows again when what it has is no longer known', async () => {
    const stream = await Stream.open(owner, await ownStudy(owner, 'Unknown'), 999_999)
    expect(stream.received[0]!.data.reload).toBe(true)
    await stream.close()
  })
  it('come from another server on the same database', async () => {
    const other = await otherServer()
    const study = await ownStudy(owner, 'Two servers')
    const stream = await Stream.open(owner, study)
    const row = await ownRow(other.client, study, { name: 'from there' })
    await stream.until(() => stream.rows.has(row.id))
    await stream.close()
    await other.stop()
  })
})

describe('a stream', () => {
  it('ends at once when its reader is removed from the study', async () => {
    const study = await ownStudy(owner, 'Removed')
    const { email } = accountOf('observer')
    await owner.put(`/api/studies/${study}/members`, { email, role: 'observer' })
    const observer = await signIn('observer')
    const me = (await observer.get<{ id: string, account?: { id: string } }>('/api/session')).body
    const stream = await Stream.open(observer, study)
    await owner.delete(`/api/studies/${study}/members/${me.account?.id ?? me.id}`)
    await stream.ended
    expect((await observer.get(`/api/studies/${study}/candidates`)).status).toBeGreaterThanOrEqual(403)
  })
  it('ends at once when its session ends', async () => {
    const editor = await signIn('owner')
    const stream = await Stream.open(editor, await ownStudy(editor, 'Signed out'))
    await editor.delete('/api/session')
    await stream.ended
    expect((await editor.get('/api/studies')).status).toBe(401)
  })
  it('ends at once when its token is revoked', async () => {
    const { body: token } = await owner.post<CreatedToken>('/api/account/tokens', { name: 'of a stream', scope: 'read', days: 1 })
    const stream = await Stream.open(withToken(token.secret), await ownStudy(owner, 'Revoked'))
    await owner.delete(`/api/account/tokens/${token.id}`)
    await stream.ended
  })
  it('ends at once when its reader is no administrator any more', async () => {
    const person = await ownPerson('Second admin', 'admin')
    const stream = await Stream.open(await person.signIn(), await ownStudy(owner, 'Demoted'))
    await (await signIn('admin')).patch(`/api/people/${person.id}`, { role: 'member' })
    await stream.ended
  })
  it('is one of at most fifty of its account', async () => {
    const person = await ownPerson('Many Streams')
    const client = await person.signIn()
    const study = await ownStudy(client, 'Fifty')
    const streams = await Promise.all(Array.from({ length: 50 }, () => Stream.open(client, study)))
    expect((await client.fetch(`/api/studies/${study}/events`)).status).toBe(429)
    await Promise.all(streams.map(stream => stream.close()))
  })
  it('is refused to somebody outside the study', async () => {
    const observer = await signIn('observer')
    await expect(Stream.open(observer, await ownStudy(owner, 'Closed'))).rejects.toThrow('The stream was refused')
  })
})

describe('two changes at once through two pages', () => {
  it('bring the winner\'s value to both', async () => {
    const study = await ownStudy(owner, 'Race')
    const row = await ownRow(owner, study)
    const stream = await Stream.open(owner, study)
    const answers = await Promise.all(['one', 'two'].map(note => change<Candidate>(owner, row, { note })))
    const winner = answers.find(({ status }) => status === 200)!.body
    await stream.until(() => stream.rows.get(row.id)?.version === winner.version)
    expect(stream.rows.get(row.id)!.inputs.note).toBe(winner.inputs.note)
    expect((await owner.get<Rows>(`/api/studies/${study}/candidates`)).body.items[0]!.inputs.note).toBe(winner.inputs.note)
    await stream.close()
  })
})
