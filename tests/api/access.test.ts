import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { beforeAll, describe, expect, inject, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import type { Study } from '#shared/schemas/studies'
import type { Search } from '#shared/schemas/searches'
import type { Sweep } from '#shared/schemas/sweeps'
import { operations } from '../../server/api-description/operations'
import { rules } from '../../server/access/rules'
import type { Route } from '../../server/access/rules'
import { accountOf, anonymous, signIn, withToken } from '../support/client'
import type { Client } from '../support/client'
import { callers, expected, outsideTheApi } from './access-table'
import type { CallerName } from './access-table'
import { ownPerson } from './people-of-test'

const routes = Object.keys(rules) as Route[]

/** Routes of the built server, those of packages included; written beside it by the build. */
function builtRoutes(): string[] {
  const [, entry = ''] = readFileSync(`/proc/${inject('serverPid')}/cmdline`, 'utf8').split('\0')
  const list: { method: string, route: string }[] = JSON.parse(readFileSync(join(entry, '..', 'routes.json'), 'utf8'))
  return list.map(({ method, route }) => `${method} ${route}`)
}

interface Ids { study: string, candidate: string, sweep: string, search: string }

/** A study with a row, a sweep and a search, in which the demonstration's people have their roles. */
async function walkedStudy(owner: Client): Promise<Ids> {
  const { body: study } = await owner.post<Study>('/api/studies', { name: 'Walked' })
  for (const role of ['editor', 'reviewer', 'observer']) {
    await owner.put(`/api/studies/${study.id}/members`, { email: accountOf(role).email, role })
  }
  const { body: row } = await owner.post<Candidate>(`/api/studies/${study.id}/candidates`, {})
  const { body: sweep } = await owner.post<Sweep>(`/api/studies/${study.id}/sweeps`, { base: { family: 'psk' }, axes: [{ field: 'order', values: [4] }] })
  const { body: search } = await owner.post<Search>(`/api/candidates/${row.id}/searches`, { kind: 'labels', starts: 1 })
  return { study: study.id, candidate: row.id, sweep: sweep.id, search: search.id }
}

const nobody = '00000000-0000-7000-8000-000000000000'

/** Address of a route with its parameters filled in; a sweep, a search and a candidate stand for what they belong to. */
const addressOf = (path: string, ids: Ids) => path
  .replace('/candidates/:id', `/candidates/${ids.candidate}`).replace('/sweeps/:id', `/sweeps/${ids.sweep}`).replace('/searches/:id', `/searches/${ids.search}`)
  .replace(':id', ids.study).replace(/:(token|person|user)/, nobody)

/**
 * Calls a route without a body, or with one that no route takes: whoever is let through changes nothing.
 * Who is let through is never answered 401, 403 or, as all that is asked for is there, 404.
 */
async function statusOf(client: Client, route: Route, ids: Ids): Promise<'ok' | number> {
  const [method = '', path = ''] = route.split(' ')
  const body = ['GET', 'DELETE'].includes(method) ? undefined : JSON.stringify({ nothing: true })
  const caller = new AbortController()
  const response = await client.fetch(addressOf(path, ids), { method, body, headers: body ? { 'content-type': 'application/json' } : {}, signal: caller.signal })
  const detail = response.headers.get('content-type')?.includes('problem') ? String((await response.json() as { detail?: string }).detail) : ''
  caller.abort()
  const letThrough = response.status < 400 || [400, 422, 428].includes(response.status) || /^You have no such token|^There is no such account|^This person has no part/.test(detail)
  return letThrough ? 'ok' : response.status
}

describe('the table of routes', () => {
  it('has every route of the rules', () => expect(Object.keys(expected).sort()).toEqual(Object.keys(rules).sort()))
  it('has every route of the built server, those of packages included', () => {
    expect(builtRoutes().sort()).toEqual([...Object.keys(expected), ...outsideTheApi].sort())
  })
  it('is that of the API\'s description', async () => {
    const { body } = await anonymous().get<{ paths: Record<string, Record<string, unknown>> }>('/api/openapi.json')
    const described = Object.entries(body.paths).flatMap(([path, methods]) =>
      Object.keys(methods).map(method => `${method.toUpperCase()} ${path.replace(/\{(\w+)\}/g, ':$1')}`))
    expect(described.sort()).toEqual(Object.keys(expected).sort())
  })
  it('is described by schemas that the description has', async () => {
    const { body } = await anonymous().get<{ components: { schemas: object } }>('/api/openapi.json')
    const references = new Set([...JSON.stringify(body).matchAll(/"\$ref":"#\/components\/schemas\/([^"]+)"/g)].map(([, name]) => name!))
    expect([references.size > 20, [...references].filter(name => !(name in body.components.schemas))]).toEqual([true, []])
  })
  it('has a summary of each route in the description', () => {
    expect(routes.filter(route => !/^[A-Z].*\.$/.test(operations[route].summary))).toEqual([])
  })
})

describe('the role walk', () => {
  let clients: Record<CallerName, () => Promise<Client>>
  let owner: Client
  let ids: Ids
  // Signing out ends a session, so each caller's is kept for all routes but those.
  const kept = new Map<CallerName, Client>()
  const clientOf = async (name: CallerName, route: Route) => {
    if (route === 'DELETE /api/session' || route === 'DELETE /api/_auth/session') return clients[name]()
    const client = kept.get(name) ?? await clients[name]()
    kept.set(name, client)
    return client
  }

  beforeAll(async () => {
    const outsider = await ownPerson('Walking Outsider')
    clients = {
      owner: () => signIn('owner'), editor: () => signIn('editor'), reviewer: () => signIn('reviewer'), observer: () => signIn('observer'),
      admin: () => signIn('admin'), outsider: outsider.signIn, anonymous: async () => anonymous(),
    }
    owner = await signIn('owner')
    ids = await walkedStudy(owner)
  })

  it.each(routes)('%s', async (route) => {
    // Of routes that change without a body, the owner's call comes last and may succeed: a study of its own each.
    const own = ['DELETE /api/sweeps/:id', 'POST /api/studies/:id/restore'].includes(route) ? await walkedStudy(owner) : ids
    const answers: Record<string, 'ok' | number> = {}
    for (const name of callers.toReversed()) answers[name] = await statusOf(await clientOf(name, route), route, own)
    expect(answers).toEqual(Object.fromEntries(callers.map((name, i) => [name, expected[route][i]])))
  })
})

describe('an address that the rules do not have', () => {
  it('is 404 for the owner too', async () => expect((await (await signIn('owner')).get('/api/secrets')).status).toBe(404))
  it('is 404 with a slash at the end of one that they have', async () => expect((await (await signIn('owner')).get('/api/studies/')).status).toBe(404))
  it('is 401 to nobody when it is one of theirs in other letters', async () => expect((await anonymous().get('/%61pi/studies')).status).toBe(401))
  it('is 405 and names the methods when only the method is another', async () => {
    const { status, headers } = await anonymous().delete('/api/health')
    expect([status, headers.get('allow')]).toEqual([405, 'GET'])
  })
})

describe('refusals', () => {
  it('are problem+json with a sentence', async () => {
    const { headers, body } = await anonymous().get('/api/studies')
    expect([headers.get('content-type'), body]).toEqual([
      'application/problem+json', { type: 'about:blank', title: 'Unauthorized', status: 401, detail: 'Sign in to use this.' },
    ])
  })
  it('say which roles may', async () => {
    const owner = await signIn('owner')
    const { study } = await walkedStudy(owner)
    const { body } = await (await signIn('observer')).patch<{ detail: string }>(`/api/studies/${study}`, { name: 'x' })
    expect(body.detail).toBe('Only owners and editors of the study may do this; your role in it is observer.')
  })
})

describe('an API token', () => {
  const tokenOf = async (scope: 'read' | 'write') => {
    const { body } = await (await signIn('owner')).post<{ id: string, secret: string }>('/api/account/tokens', { name: scope, scope, days: 1 })
    return body
  }
  it('says who calls', async () => {
    const { body } = await withToken((await tokenOf('read')).secret).get<{ email: string }>('/api/session')
    expect(body.email).toBe(accountOf('owner').email)
  })
  it('that may only read does not create a study', async () => {
    expect((await withToken((await tokenOf('read')).secret).post('/api/studies', { name: 'x' })).status).toBe(403)
  })
  it('that may only read evaluates', async () => {
    const { status } = await withToken((await tokenOf('read')).secret).post('/api/evaluate', { constellation: { family: 'psk', order: 8 }, esN0Db: [10] })
    expect(status).toBe(200)
  })
  it('that may write creates a study', async () => {
    expect((await withToken((await tokenOf('write')).secret).post('/api/studies', { name: 'By token' })).status).toBe(201)
  })
  it('makes no further tokens', async () => {
    const { status } = await withToken((await tokenOf('write')).secret).post('/api/account/tokens', { name: 'x', scope: 'read', days: 1 })
    expect(status).toBe(403)
  })
  it('is worth nothing once revoked', async () => {
    const { id, secret } = await tokenOf('read')
    await (await signIn('owner')).delete(`/api/account/tokens/${id}`)
    expect((await withToken(secret).get('/api/session')).status).toBe(401)
  })
  it('is listed without its text', async () => {
    const { secret } = await tokenOf('read')
    const { body } = await (await signIn('owner')).get('/api/account/tokens')
    expect(JSON.stringify(body)).not.toContain(secret)
  })
  it('that is none is 401', async () => expect((await withToken('hp_nothing').get('/api/session')).status).toBe(401))
})
