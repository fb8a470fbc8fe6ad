import { beforeAll, describe, expect, it } from 'vitest'
import { valueOf } from '#shared/modulation/estimate'
import type { ActivityEntry } from '#shared/schemas/activity'
import type { Candidate } from '#shared/schemas/candidates'
import type { Study, StudySummary } from '#shared/schemas/studies'
import { defaultRequirements } from '#shared/schemas/requirements'
import { accountOf, signIn } from '../support/client'
import type { Client } from '../support/client'
import { databaseConnection } from './database-of-test'
import { ownPerson } from './people-of-test'
import { ownServer } from './server-of-test'

interface List<T> { items: T[], next: string | null }
interface Conflict { detail: string, current: Study, sent: unknown }

const database = databaseConnection()
let owner: Client
let admin: Client
beforeAll(async () => {
  owner = await signIn('owner')
  admin = await signIn('admin')
})

const make = async (name: string, more: object = {}) => (await owner.post<Study>('/api/studies', { name, ...more })).body
const patch = <Body = Study>(study: Study, change: object, client = owner) =>
  client.patch<Body>(`/api/studies/${study.id}`, change, { 'if-match': `"${study.version}"` })
const remove = (study: Study) => owner.delete(`/api/studies/${study.id}`, undefined, { 'if-match': `"${study.version}"` })
const listed = async (state: string, client = owner) => (await client.get<List<StudySummary>>(`/api/studies?state=${state}`)).body.items.map(({ id }) => id)

describe('a new study', () => {
  it('belongs to its creator and has requirements that compute at once', async () => {
    const study = await make('New')
    expect([study.role, study.version, study.requirements]).toEqual(['owner', 1, defaultRequirements])
  })
  it('is answered with 201 and its version as ETag', async () => {
    const { status, headers } = await owner.post('/api/studies', { name: 'Tagged' })
    expect([status, headers.get('etag')]).toEqual([201, '"1"'])
  })
  it('copied from another one has its requirements and candidates', async () => {
    const { body: list } = await owner.get<List<StudySummary>>('/api/studies')
    const source = list.items.find(({ candidates }) => candidates === 24)!
    const copy = await make('Copy of the ridge', { copyOf: source.id })
    const { body: original } = await owner.get<Study>(`/api/studies/${source.id}`)
    const { body: rows } = await owner.get<List<Candidate>>(`/api/studies/${copy.id}/candidates`)
    expect([copy.requirements, rows.items.length]).toEqual([original.requirements, 24])
  })
  it('is no copy of a study that the caller may not read', async () => {
    const secret = await make('Secret')
    const outsider = await (await ownPerson('Copying Outsider')).signIn()
    const { status, body } = await outsider.post<{ errors: unknown }>('/api/studies', { name: 'x', copyOf: secret.id })
    expect([status, body.errors]).toEqual([422, [{ path: 'copyOf', message: 'The study to duplicate does not exist, or is not shared with you.' }]])
  })
})

describe('a changed study', () => {
  it('has the change and the next version', async () => {
    const { body, headers } = await patch(await make('Old name'), { name: 'New name', description: 'Why.' })
    expect([body.name, body.description, body.version, headers.get('etag')]).toEqual(['New name', 'Why.', 2, '"2"'])
  })
  it('keeps its version when nothing differs', async () => expect((await patch(await make('Same'), { name: 'Same' })).body.version).toBe(1))
  it('needs a version', async () => expect((await owner.patch(`/api/studies/${(await make('Bare')).id}`, { name: 'x' })).status).toBe(428))
  it('needs a version that is one', async () => {
    expect((await owner.patch(`/api/studies/${(await make('Odd')).id}`, { name: 'x' }, { 'if-match': 'latest' })).status).toBe(400)
  })
  it('is refused on an older version, with both values', async () => {
    const study = await make('Contested')
    await patch(study, { name: 'First' })
    const { status, body } = await patch<Conflict>(study, { name: 'Second' })
    expect([status, body.current.name, body.current.version, body.sent]).toEqual([409, 'First', 2, { name: 'Second' }])
  })
  it('takes one of two changes made at once', async () => {
    const study = await make('Raced')
    const answers = await Promise.all(['a', 'b', 'c'].map(name => patch(study, { name })))
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409])
  })
  it('has its candidates computed under new requirements', async () => {
    const study = await make('Recomputed')
    await owner.post(`/api/studies/${study.id}/candidates`, {})
    await patch(study, { requirements: { ...defaultRequirements, available: { from: 'entered', esN0Db: 30 } } })
    const read = async () => (await owner.get<List<Candidate>>(`/api/studies/${study.id}/candidates`)).body.items[0]!
    await expect.poll(async () => (await read()).values?.availableEsN0Db, { timeout: 20_000 }).toBe(30)
  })
  it('says in its history what was changed, before and after', async () => {
    const study = await make('Noted')
    await patch(study, { name: 'Renamed', requirements: { ...defaultRequirements, rollOff: 0.3 } })
    const { body } = await owner.get<List<ActivityEntry>>(`/api/studies/${study.id}/activity`)
    expect(body.items.map(({ action, from, to }) => ({ action, from, to }))).toEqual([
      { action: 'changed study', from: { name: 'Noted', rollOff: 0.25 }, to: { name: 'Renamed', rollOff: 0.3 } },
      { action: 'created study', from: undefined, to: undefined },
    ])
  })
})

describe('a study in the list', () => {
  it('moves between in work and archived', async () => {
    const study = await make('Shelved')
    const { body: archived } = await patch(study, { archived: true })
    const there = [(await listed('draft')).includes(study.id), (await listed('archived')).includes(study.id)]
    await patch(archived, { archived: false })
    expect([there, (await listed('draft')).includes(study.id)]).toEqual([[false, true], true])
  })
  it('tells its people, rows, passing rows and the leading candidate', async () => {
    const { body } = await owner.get<List<StudySummary>>('/api/studies')
    const ring = body.items.find(({ name }) => name === 'Ring ratios of sixteen points')!
    await expect.poll(async () => (await owner.get<List<StudySummary>>('/api/studies')).body.items.find(({ id }) => id === ring.id)!.computing, { timeout: 60_000 }).toBe(0)
    const { items: rows } = (await owner.get<List<Candidate>>(`/api/studies/${ring.id}/candidates`)).body
    const best = rows.filter(row => row.values?.passes).toSorted((a, b) => valueOf(b.values!.surplusDb!) - valueOf(a.values!.surplusDb!))
    const { items } = (await owner.get<List<StudySummary>>('/api/studies')).body
    const summary = items.find(({ id }) => id === ring.id)!
    expect(summary.members.map(({ role }) => role)).toEqual(['owner', 'editor', 'reviewer', 'observer'])
    expect([summary.candidates, summary.passing, summary.leading]).toEqual([200, best.length, { name: best[0]!.inputs.name, surplusDb: best[0]!.values!.surplusDb }])
  })
  it('comes once, page by page', async () => {
    for (const name of ['p1', 'p2', 'p3']) await make(name)
    const all: string[] = []
    for (let next: string | null = ''; next !== null;) {
      const { body }: { body: List<StudySummary> } = await owner.get(`/api/studies?limit=2${next ? `&cursor=${next}` : ''}`)
      all.push(...body.items.map(({ id }) => id))
      next = body.next
    }
    expect(all).toEqual(await listed('draft'))
  })
  it('is there for administrators and for nobody else without a part in it', async () => {
    const study = await make('Private')
    const outsider = await (await ownPerson('Listing Outsider')).signIn()
    expect([(await listed('draft', admin)).includes(study.id), (await listed('draft', outsider)).includes(study.id)]).toEqual([true, false])
  })
})

describe('a deleted study', () => {
  it('is gone for everybody, its owner and administrators included', async () => {
    const study = await make('Gone')
    await remove(study)
    expect([(await owner.get(`/api/studies/${study.id}`)).status, (await admin.get(`/api/studies/${study.id}`)).status]).toEqual([404, 404])
  })
  it('takes its rows along', async () => {
    const study = await make('Gone with rows')
    const { body: row } = await owner.post<Candidate>(`/api/studies/${study.id}/candidates`, {})
    await remove(study)
    expect((await owner.get(`/api/candidates/${row.id}`)).status).toBe(404)
  })
  it('needs the version that is there', async () => {
    const study = await make('Kept')
    await patch(study, { name: 'Still kept' })
    expect([(await remove(study)).status, (await owner.delete(`/api/studies/${study.id}`)).status]).toEqual([409, 428])
  })
  it('is listed for its owner only, who brings it back', async () => {
    const study = await make('Missed')
    await owner.put(`/api/studies/${study.id}/members`, { email: accountOf('editor').email, role: 'editor' })
    await remove(study)
    const there = [(await listed('deleted')).includes(study.id), (await listed('deleted', await signIn('editor'))).includes(study.id)]
    const { body } = await owner.post<Study>(`/api/studies/${study.id}/restore`)
    expect([there, body.deletedAt, (await owner.get(`/api/studies/${study.id}`)).status]).toEqual([[true, false], null, 200])
  })
  it('is not brought back by an editor', async () => {
    const study = await make('Not theirs')
    await owner.put(`/api/studies/${study.id}/members`, { email: accountOf('editor').email, role: 'editor' })
    await remove(study)
    expect((await (await signIn('editor')).post(`/api/studies/${study.id}/restore`)).status).toBe(403)
  })
})

describe('the people of a study', () => {
  const put = <Body = unknown>(study: Study, email: string, role: string) => owner.put<Body>(`/api/studies/${study.id}/members`, { email, role })

  it('are added by e-mail address', async () => {
    const study = await make('Shared')
    const { body } = await put<{ email: string, role: string }>(study, accountOf('reviewer').email, 'reviewer')
    expect([body.email, body.role, (await (await signIn('reviewer')).get(`/api/studies/${study.id}`)).status]).toEqual([accountOf('reviewer').email, 'reviewer', 200])
  })
  it('may at once what a new role allows', async () => {
    const study = await make('Promoted')
    await put(study, accountOf('reviewer').email, 'observer')
    await put(study, accountOf('reviewer').email, 'editor')
    expect((await patch(study, { name: 'Edited' }, await signIn('reviewer'))).status).toBe(200)
  })
  it('must have an account', async () => {
    const { status, body } = await put<{ errors: unknown }>(await make('Unknown'), 'stranger@example.org', 'editor')
    expect([status, body.errors]).toEqual([422, [{ path: 'email', message: 'There is no account with this address; an administrator can create one.' }]])
  })
  it('always have an owner among them', async () => {
    const study = await make('Owned')
    const { body: self } = await owner.get<{ id: string }>('/api/session')
    const demoted = await put<{ errors: { path: string }[] }>(study, accountOf('owner').email, 'editor')
    const removed = await owner.delete(`/api/studies/${study.id}/members/${self.id}`)
    expect([demoted.status, demoted.body.errors[0]!.path, removed.status]).toEqual([422, 'role', 422])
  })
  it('keep an owner when two of them leave at once', async () => {
    const study = await make('Left')
    const second = await ownPerson('Second Owner')
    await put(study, second.email, 'owner')
    const { body: self } = await owner.get<{ id: string }>('/api/session')
    const other = await second.signIn()
    const answers = await Promise.all([
      owner.delete(`/api/studies/${study.id}/members/${second.id}`), other.delete(`/api/studies/${study.id}/members/${self.id}`),
    ])
    const { body } = await admin.get<List<{ role: string }>>(`/api/studies/${study.id}/members`)
    expect([answers.filter(({ status }) => status === 204).length, body.items.map(({ role }) => role)]).toEqual([1, ['owner']])
  })
  it('keep an owner whose account is not disabled', async () => {
    const study = await make('Orphaned')
    const second = await ownPerson('Disabled Owner')
    await put(study, second.email, 'owner')
    await admin.patch(`/api/people/${second.id}`, { disabled: true })
    const { body: self } = await owner.get<{ id: string }>('/api/session')
    expect((await owner.delete(`/api/studies/${study.id}/members/${self.id}`)).status).toBe(422)
  })
  it('lose access and their open event stream at once when they are removed', async () => {
    const study = await make('Parted')
    const person = await ownPerson('Parting Person')
    await put(study, person.email, 'editor')
    const client = await person.signIn()
    const stream = await client.fetch(`/api/studies/${study.id}/events`)
    await owner.delete(`/api/studies/${study.id}/members/${person.id}`)
    await stream.text()
    expect((await client.get(`/api/studies/${study.id}`)).status).toBe(404)
  })
})

describe('purging', () => {
  it('is for studies that were deleted more than thirty days ago', async () => {
    const [old, recent] = [await make('Long gone'), await make('Just gone')]
    await remove(old)
    await remove(recent)
    await database().query('update studies set deleted_at = deleted_at - interval 31 day where id = ?', [old.id])
    const server = await ownServer('purge', {})
    await expect.poll(async () => fetch(`${server.baseUrl}/api/health`).then(({ status }) => status, () => 0), { timeout: 20_000 }).toBe(200)
    await server.stop()
    const [rows] = await database().query('select id from studies where id in (?, ?)', [old.id, recent.id])
    expect(rows).toEqual([{ id: recent.id }])
  })
})
