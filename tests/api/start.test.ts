import { existsSync, mkdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import type { AddressInfo } from 'node:net'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { freePort } from '../../scripts/lib/address.mjs'
import { testFolder } from '../../scripts/lib/stack.mjs'
import { Client } from '../support/client'
import { alive, familyOn, npmStart, untilGone, untilReady } from '../support/start'
import type { Family, Start } from '../support/start'

// Named as the other data of a test run, so that npm test removes them even when it is killed.
const ownFolder = (name: string) => join(testFolder, `data-${process.env.HALFPLANE_TEST_RUN ?? process.pid}-${name}`)
const dataDir = ownFolder('start')
const refused = ownFolder('refused')
afterAll(() => [dataDir, refused].forEach(folder => rmSync(folder, { recursive: true, force: true, maxRetries: 5 })))

/** What a start says itself, without npm's two lines about the script. */
const sentences = (start: Start) => start.said().split('\n').filter(line => line !== '' && !line.startsWith('>'))

describe('a start that cannot be', () => {
  it('says in one sentence that the port is taken, with exit code 1', async () => {
    const other = createServer()
    await new Promise<void>(resolve => other.listen(0, '127.0.0.1', resolve))
    const { port } = other.address() as AddressInfo
    const start = npmStart(join(refused, 'unused'), port)
    expect(await start.ended).toBe(1)
    expect(sentences(start)).toEqual([expect.stringContaining(`Port ${port} on 127.0.0.1 is taken`)])
    other.close()
  })

  it('says in one sentence that the data folder cannot be written, with exit code 1', async () => {
    const file = join(refused, 'file')
    mkdirSync(refused, { recursive: true })
    writeFileSync(file, '')
    const start = npmStart(join(file, 'data'), await freePort())
    expect(await start.ended).toBe(1)
    expect(sentences(start)).toEqual([expect.stringContaining(`Cannot write to the data folder ${join(file, 'data')}`)])
  })
})

// One start after another on the same folder, as each costs seconds: the order of these tests is part of what they say.
describe('starts on one folder', () => {
  let port: number
  let start: Start
  let family: Family
  let accounts: string

  async function startAgain() {
    start = npmStart(dataDir, port)
    await untilReady(start)
    family = familyOn(dataDir)
  }

  /** The answer's status, and the client that is then signed in. */
  async function signIn() {
    const client = new Client(`http://127.0.0.1:${port}`)
    const { email, password } = JSON.parse(accounts)[0]
    const { status } = await client.post('/api/session', { email, password })
    return { client, status }
  }

  /** Opens the event stream of the first study, and leaves it open. */
  async function openStream(): Promise<Response> {
    const { client } = await signIn()
    const { body } = await client.get<{ items: { id: string }[] }>('/api/studies')
    return client.fetch(`/api/studies/${body.items[0]?.id}/events`)
  }

  beforeAll(async () => {
    mkdirSync(join(dataDir, 'mariadb.new-1', 'mysql'), { recursive: true })
    writeFileSync(join(dataDir, 'mariadb.new-1', 'ibdata1'), 'half a file')
    port = await freePort()
    await startAgain()
    accounts = readFileSync(join(dataDir, 'demo-accounts.json'), 'utf8')
  })

  afterAll(async () => {
    if (alive([start.npm]).length > 0) process.kill(start.npm, 'SIGTERM')
    await start.ended
  })

  it('removes what a killed initialisation has left, and starts', () => {
    expect(existsSync(join(dataDir, 'mariadb.new-1'))).toBe(false)
  })

  it('prints the address and where the demonstration\'s accounts are', () => {
    expect(sentences(start).slice(-3)).toEqual([
      `Halfplane is ready at http://127.0.0.1:${port}`,
      `Accounts of the demonstration: ${join(dataDir, 'demo-accounts.json')}`,
      'Ctrl-C stops it.',
    ])
  })

  it.each(['secrets.json', 'demo-accounts.json'])('keeps %s from other accounts of the machine', (name) => {
    expect(statSync(join(dataDir, name)).mode & 0o777).toBe(0o600)
  })

  it('refuses a second start on the folder in one sentence, and the first goes on', async () => {
    const second = npmStart(dataDir, await freePort())
    expect(await second.ended).toBe(1)
    expect(sentences(second)).toEqual([expect.stringContaining(`Halfplane already runs on the data folder ${dataDir}`)])
    expect((await signIn()).status).toBeLessThan(300)
  })

  it('leaves nothing running when it is killed', async () => {
    process.kill(family.script, 'SIGKILL')
    await untilGone(Object.values(family))
    await start.ended
  })

  it('leaves nothing running when npm is killed', async () => {
    await startAgain()
    process.kill(start.npm, 'SIGKILL')
    await untilGone(Object.values(family))
  })

  it('recovers its data after it and its database were killed', async () => {
    await startAgain()
    process.kill(family.database, 'SIGKILL')
    process.kill(family.script, 'SIGKILL')
    await untilGone(Object.values(family))
    await startAgain()
    expect((await signIn()).status).toBeLessThan(300)
  })

  it('ends with exit code 1 and stops the server when the database dies', async () => {
    process.kill(family.database, 'SIGKILL')
    expect(await start.ended).toBe(1)
    expect(start.said()).toContain('The database ended by itself (signal SIGKILL)')
    expect(alive(Object.values(family))).toEqual([])
  })

  it('stops everything within 3 s of a SIGTERM to npm with an event stream open, with exit code 0', async () => {
    await startAgain()
    const stream = await openStream()
    expect(stream.headers.get('content-type')).toContain('text/event-stream')
    const began = performance.now()
    process.kill(start.npm, 'SIGTERM')
    const code = await start.ended
    expect(performance.now() - began).toBeLessThan(3000)
    expect(alive([start.npm, ...Object.values(family)])).toEqual([])
    expect(code).toBe(0)
    // The stream's end is no answer to anybody: only that it has one.
    await stream.body?.cancel().catch(() => {})
  })

  it('stops everything within 3 s of Ctrl-C, with exit code 0', async () => {
    await startAgain()
    const began = performance.now()
    process.kill(-start.npm, 'SIGINT')
    const code = await start.ended
    expect(performance.now() - began).toBeLessThan(3000)
    expect(alive([start.npm, ...Object.values(family)])).toEqual([])
    expect(code).toBe(0)
  })
})
