import { beforeAll, describe, expect, inject, it } from 'vitest'
import type { Problem } from '#shared/schemas/common'
import { defaultRequirements } from '#shared/schemas/requirements'
import type { Study } from '#shared/schemas/studies'
import { signIn } from '../support/client'
import type { Client } from '../support/client'

let owner: Client
let admin: Client
let study: Study
beforeAll(async () => {
  owner = await signIn('owner')
  admin = await signIn('admin')
  study = (await owner.post<Study>('/api/studies', { name: 'Input' })).body
})

const paths = ({ status, body }: { status: number, body: Problem }) => [status, (body.errors ?? []).map(({ path }) => path).sort()]
const required = (change: object) => owner.patch<Problem>(`/api/studies/${study.id}`, { requirements: { ...defaultRequirements, ...change } }, { 'if-match': '"1"' })
const line = { id: 'l', name: 'Line', source: '' }
const link = (lines: object[], cases: object[] = [{ id: 'c', name: 'Clear', requiredMarginDb: null, lines: [] }]) => ({ available: { from: 'link', lines, cases } })

describe('requirements are refused at', () => {
  it.each([
    ['target.quantity', { target: { quantity: 'fer', value: 1e-6 } }],
    ['target.value', { target: { quantity: 'ser', value: 0 } }],
    ['target.value', { target: { quantity: 'ser', value: '1e-6' } }],
    ['target.value', { target: { quantity: 'ser', value: null } }],
    ['target.aim', { target: { quantity: 'ser', value: 1e-6, aim: 1 } }],
    ['mustHaves.0.kind', { mustHaves: [{ id: 'R1', kind: 'price', value: 1, reason: '' }] }],
    ['mustHaves.0.value', { mustHaves: [{ id: 'R1', kind: 'margin', value: '1', reason: '' }] }],
    ['mustHaves.0.id', { mustHaves: [{ id: ' ', kind: 'margin', value: 1, reason: '' }] }],
    ['mustHaves.0.reason', { mustHaves: [{ id: 'R1', kind: 'margin', value: 1, reason: 'x'.repeat(1001) }] }],
    ['mustHaves', { mustHaves: [{ id: 'R1', kind: 'margin', value: 1, reason: '' }, { id: 'r1', kind: 'papr', value: 1, reason: '' }] }],
    ['heldConstant.kind', { heldConstant: { kind: 'power', value: 1 } }],
    ['heldConstant.value', { heldConstant: { kind: 'symbolRate', value: 0 } }],
    ['limitedBy', { limitedBy: 'money' }],
    ['overhead', { overhead: 1 }],
    ['overhead', { overhead: -0.1 }],
    ['rollOff', { rollOff: 1.01 }],
    ['implementationLossDb', { implementationLossDb: '1 dB' }],
    ['dimensionsPerInterval', { dimensionsPerInterval: 3 }],
    ['available.from', { available: { from: 'weather' } }],
    ['available.esN0Db', { available: { from: 'entered', esN0Db: 401 } }],
    ['available.esN0Db', { available: { from: 'entered' } }],
    ['available.n0', { available: { from: 'noiseDensity', n0: -1 } }],
    ['available.lines.0.kind', link([{ ...line, kind: 'magic' }])],
    ['available.lines.0.valueDb', link([{ ...line, kind: 'loss', valueDb: -3 }])],
    ['available.lines.0.unit', link([{ ...line, kind: 'power', unit: 'W', valueDb: 1 }])],
    ['available.lines.0.frequencyGhz', link([{ ...line, kind: 'freeSpaceLoss', frequencyGhz: 0, distanceKm: 1 }])],
    ['available.lines.0.noiseFigureDb', link([{ ...line, kind: 'noiseFigure', noiseFigureDb: 101 }])],
    ['available.cases', link([], [])],
    ['available.cases.0.name', link([], [{ id: 'c', name: '', requiredMarginDb: null, lines: [] }])],
    ['available.cases.0.lines.0.valueDb', link([], [{ id: 'c', name: 'Clear', requiredMarginDb: null, lines: [{ ...line, kind: 'gain', valueDb: 'x' }] }])],
    ['colour', { colour: 'red' }],
  ])('%s: %j', async (path, change) => expect(paths(await required(change))).toEqual([422, [`requirements.${path}`]]))
})

describe('a refused change', () => {
  it('leaves the study as it was', async () => {
    await owner.patch(`/api/studies/${study.id}`, { name: 'Half', requirements: { ...defaultRequirements, rollOff: 2 } }, { 'if-match': '"1"' })
    const { body } = await owner.get<Study>(`/api/studies/${study.id}`)
    expect([body.name, body.version]).toEqual(['Input', 1])
  })
  it('names every mistake', async () => {
    const answer = await owner.patch<Problem>(`/api/studies/${study.id}`, { name: '', description: 4, archived: 'no', owner: 'me' }, { 'if-match': '"1"' })
    expect(paths(answer)).toEqual([422, ['archived', 'description', 'name', 'owner']])
  })
  it('has a sentence for each mistake', async () => {
    const { body } = await owner.post<Problem>('/api/studies', { description: null, copyOf: 'that one' })
    expect(body.errors!.filter(({ message }) => !/^[A-Z].+\.$/.test(message))).toEqual([])
  })
})

describe('other routes refuse', () => {
  it.each<[string, () => Promise<{ status: number, body: Problem }>, string[]]>([
    ['a study without a name', () => owner.post('/api/studies', {}), ['name']],
    ['a study whose name is too long', () => owner.post('/api/studies', { name: 'x'.repeat(121) }), ['name']],
    ['a list instead of a study', () => owner.post('/api/studies', []), ['']],
    ['a word instead of a study', () => owner.post('/api/studies', 'study'), ['']],
    ['a list in a state that there is not', () => owner.get('/api/studies?state=lost'), ['state']],
    ['a page of no items', () => owner.get('/api/studies?limit=0'), ['limit']],
    ['a page of too many items', () => owner.get('/api/studies?limit=2001'), ['limit']],
    ['a page of a word', () => owner.get('/api/studies?limit=many'), ['limit']],
    ['a cursor of another list', () => owner.get('/api/studies?cursor=abc'), ['cursor']],
    ['a query that there is not', () => owner.get('/api/studies?sort=name'), ['sort']],
    ['a cursor of activity that is none', () => owner.get(`/api/studies/${study.id}/activity?cursor=1`), ['cursor']],
    ['a role that there is not', () => owner.put(`/api/studies/${study.id}/members`, { email: 'a@example.org', role: 'king' }), ['role']],
    ['a member without an address', () => owner.put(`/api/studies/${study.id}/members`, { role: 'editor' }), ['email']],
    ['a member to remove who is no id', () => owner.delete(`/api/studies/${study.id}/members/me`), ['user']],
    ['a token of no days', () => owner.post('/api/account/tokens', { name: 't', scope: 'read', days: 0 }), ['days']],
    ['a token of a string of days', () => owner.post('/api/account/tokens', { name: 't', scope: 'read', days: '7' }), ['days']],
    ['a token of all scopes', () => owner.post('/api/account/tokens', { name: 't', scope: 'all', days: 7 }), ['scope']],
    ['a token without a name', () => owner.post('/api/account/tokens', { name: '', scope: 'read', days: 7 }), ['name']],
    ['a token to revoke that is no id', () => owner.delete('/api/account/tokens/all'), ['token']],
    ['an account of a role that there is not', () => admin.post('/api/people', { email: 'a@example.org', name: 'A', role: 'owner', password: 'long enough for one' }), ['role']],
    ['an account with a short password', () => admin.post('/api/people', { email: 'a@example.org', name: 'A', role: 'member', password: 'short' }), ['password']],
    ['a person to change who is no id', () => admin.patch('/api/people/me', { name: 'x' }), ['person']],
    ['a person with fields that there are not', () => admin.patch('/api/people/00000000-0000-7000-8000-000000000000', { email: 'x@example.org' }), ['email']],
  ])('%s', async (_, call, expected) => expect(paths(await call())).toEqual([422, expected]))
})

describe('a body', () => {
  const send = (body: BodyInit, headers: Record<string, string> = { 'content-type': 'application/json' }, more: object = {}) =>
    owner.fetch('/api/studies', { method: 'POST', body, headers, ...more })

  it('that is no JSON is 400', async () => expect((await send('{"name": ')).status).toBe(400))
  it('that is empty is 400', async () => expect((await send('')).status).toBe(400))
  it('with NaN is 400, which JSON does not know', async () => expect((await send('{"name": NaN}')).status).toBe(400))
  it('of another kind is 415', async () => expect((await send('name=x', { 'content-type': 'application/x-www-form-urlencoded' })).status).toBe(415))
  it('of 10 MB is 413', async () => expect((await send(JSON.stringify({ name: 'x'.repeat(10e6) }))).status).toBe(413))
  it('of 10 MB in pieces of unstated length is 413', async () => {
    const piece = new Uint8Array(1e6).fill(0x20)
    let left = 10
    const stream = new ReadableStream<Uint8Array>({
      pull: (controller) => {
        if (left-- > 0) controller.enqueue(piece)
        else controller.close()
      },
    })
    expect((await send(stream, { 'content-type': 'application/json' }, { duplex: 'half' })).status).toBe(413)
  })
  it('of a sign-in has at most 16 KB', async () => {
    const response = await fetch(`${inject('baseUrl')}/api/session`, {
      method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify({ email: 'a@example.org', password: 'x'.repeat(20_000) }),
    })
    expect([response.status, (await response.json() as Problem).detail]).toEqual([413, 'A body has at most 16 kB.'])
  })
  it('that is not in UTF-8 is 400', async () => {
    const response = await send(new Uint8Array([...new TextEncoder().encode('{"name":"'), 0xFF, ...new TextEncoder().encode('"}')]))
    expect([response.status, (await response.json() as Problem).detail]).toEqual([400, 'The body is not in UTF-8.'])
  })
  it('with control characters in a text is refused at its path', async () => {
    const response = await send('{"name":"a\\u0007"}')
    expect([response.status, (await response.json() as Problem).errors?.map(({ path }) => path)]).toEqual([422, ['name']])
  })
  it('with a field of JavaScript\'s own is refused by its name', async () => {
    const response = await send('{"name": "x", "__proto__": {"role": "owner"}}')
    expect([response.status, (await response.json() as Problem).errors?.map(({ path }) => path)]).toEqual([422, ['__proto__']])
  })
})
