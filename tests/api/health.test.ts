import { readFileSync } from 'node:fs'
import { mkdtemp, rm } from 'node:fs/promises'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { spawnTied } from '../../scripts/lib/children.mjs'
import { keepSecrets } from '../../scripts/lib/data-folder.mjs'
import { startMariadb } from '../../scripts/lib/mariadb.mjs'
import { testFolder } from '../../scripts/lib/stack.mjs'
import packageJson from '../../package.json'
import { accountOf, anonymous, Client } from '../support/client'
import { ownServer } from './server-of-test'
import type { OwnServer } from './server-of-test'

interface Health { status?: string | number, detail?: string }

/** A MariaDB of this file's own, which is stopped and comes back at the same port. */
class Database {
  private constructor(private readonly program: string, private readonly flags: string[], private running: { stop: (ms: number) => Promise<void> }, readonly url: string, readonly adminUrl: string) {}

  static async start(folder: string): Promise<Database> {
    const { pid, url, adminUrl, stop } = await startMariadb(undefined, folder, keepSecrets(folder))
    const [program = '', ...flags] = readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').filter(part => part !== '' && !part.startsWith('--init-file'))
    return new Database(program, flags, { stop }, url, adminUrl)
  }

  stop = () => this.running.stop(10_000)
  restart() {
    this.running = spawnTied(this.program, this.flags, { stdio: 'ignore' })
  }
}

let folder: string
let database: Database
let server: OwnServer
let client: Client
const health = () => client.get<Health>('/api/health')
const untilStatus = (status: number) => vi.waitFor(async () => expect((await health()).status).toBe(status), { timeout: 20_000, interval: 50 })

beforeAll(async () => {
  folder = await mkdtemp(join(testFolder, 'health-'))
  database = await Database.start(folder)
  await database.stop()
  server = await ownServer('health', { DATABASE_URL: database.url, DATABASE_ADMIN_URL: database.adminUrl, HALFPLANE_DATA_DIR: folder, HALFPLANE_DEMO: '0' })
  client = new Client(server.baseUrl)
  await vi.waitFor(health, { timeout: 20_000, interval: 50 })
})
afterAll(async () => {
  await server?.stop()
  await database?.stop()
  await rm(folder, { recursive: true, force: true })
})

describe('health', () => {
  it('is ok with the version where there is a database', async () => {
    expect((await anonymous().get('/api/health')).body).toEqual({ status: 'ok', version: packageJson.version, database: 'ok' })
  })
  it('is 503 with what is wrong before the database has started', async () => {
    const { status, headers, body } = await health()
    expect([status, headers.get('content-type'), body.detail]).toEqual([503, 'application/problem+json', 'The database cannot be reached.'])
  })
  it('becomes ok when the database starts, its tables made', async () => {
    database.restart()
    await untilStatus(200)
    expect((await client.post('/api/session', { email: 'nobody@example.org', password: 'anything' })).status).toBe(401)
  })
  it('is 503 while the database is away, and so are the API and the pages', async () => {
    await database.stop()
    const [itself, api, page] = [await health(), await client.get('/api/session'), await client.get<string>('/sign-in')]
    expect([itself.status, api.status, page.status, page.body.includes('waiting for its database')]).toEqual([503, 503, 503, true])
  })
  it('is ok again by itself when the database is back', async () => {
    database.restart()
    await untilStatus(200)
    expect((await client.get<string>('/sign-in')).status).toBe(200)
  })
})

describe('a server that people reach by https', () => {
  let secure: OwnServer
  beforeAll(async () => {
    secure = await ownServer('https', { BASE_URL: 'https://halfplane.example.org' })
    await vi.waitFor(async () => expect((await new Client(secure.baseUrl).get('/api/health')).status).toBe(200), { timeout: 20_000, interval: 50 })
  })
  afterAll(() => secure?.stop())
  const signIn = (headers: Record<string, string>) => {
    const { email, password } = accountOf('observer')
    return new Client(secure.baseUrl).post('/api/session', { email, password }, headers)
  }

  it('marks its cookie Secure', async () => {
    const { headers } = await signIn({ origin: 'https://halfplane.example.org' })
    expect(headers.getSetCookie()[0]).toContain('; Secure')
  })
  it('asks browsers to stay with https', async () => {
    const { headers } = await new Client(secure.baseUrl).get('/api/health')
    expect(headers.get('strict-transport-security')).toBe('max-age=31536000; includeSubDomains')
  })
  it('counts attempts by the address that its proxy tells', async () => {
    const attempts = (address: string) => Promise.all(Array.from({ length: 31 }, (_, i) => new Client(secure.baseUrl)
      .post('/api/session', { email: `proxied-${i}@example.org`, password: 'x' }, { 'x-forwarded-for': address, 'origin': 'https://halfplane.example.org' })))
    await attempts('192.0.2.7')
    expect((await signIn({ 'origin': 'https://halfplane.example.org', 'x-forwarded-for': '192.0.2.8' })).status).toBe(200)
  })
})

describe('the end of a server', () => {
  it('comes within two seconds of SIGTERM, an open event stream notwithstanding', async () => {
    const ending = await ownServer('ending', {})
    const owner = new Client(ending.baseUrl)
    await vi.waitFor(async () => expect((await owner.get('/api/health')).status).toBe(200), { timeout: 20_000, interval: 50 })
    const { email, password } = accountOf('owner')
    await owner.post('/api/session', { email, password })
    const { body } = await owner.get<{ items: { id: string }[] }>('/api/studies')
    const stream = await owner.fetch(`/api/studies/${body.items[0]!.id}/events`)
    const began = performance.now()
    process.kill(ending.pid, 'SIGTERM')
    const [how] = await Promise.all([ending.ended, stream.text()])
    expect([how, performance.now() - began < 2000]).toEqual(['exit code 0', true])
  })
})
